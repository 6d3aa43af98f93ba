/**
 * A number of points: an integer, a double so large that it stands for one, or a logarithm.
 */
import { DomainError } from './domain.ts';
import { isLogNumber, type LogNumber } from './log-number.ts';

/**
 * A number of points: an integer up to 2^53, any finite double above that, or a {@link LogNumber}
 * where even doubles end.
 */
export type Count = number | LogNumber;

/** A count as kernels take it. */
export interface ResolvedCount {
  /** The count as a double: exact up to 2^53, `Infinity` beyond the largest double. */
  readonly n: number;
  /** Its natural logarithm; `-Infinity` for none. */
  readonly log: number;
}

/** Below this a logarithm stands for one integer and is rounded to it. */
const EXACT_LOG = 36.7368005696771;

/** Refuses anything but a count of at least `min`; a logarithm below 2^53 means the nearest integer. */
export function resolveCount(
  fn: string,
  parameter: string,
  value: unknown,
  min = 0,
): ResolvedCount {
  if (typeof value === 'number' && Number.isInteger(value) && value >= min) {
    return { n: value, log: Math.log(value) };
  }
  if (isLogNumber(value)) {
    const log = Number(value.log ?? NaN);
    if (log > EXACT_LOG && log < Infinity) return { n: Math.exp(log), log };
    const n = Math.round(Math.exp(log));
    if (n >= min && n < 1e16) return { n, log: Math.log(n) };
  }
  throw new DomainError(fn, parameter, `an integer >= ${min}`, value);
}
