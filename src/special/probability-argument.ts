/**
 * The argument of every quantile: a number from 0 to 1, or a probability with both tails.
 */
import { DomainError } from '../domain.ts';
import { isProbability, type Probability } from '../probability.ts';

/** Refuses anything but a number from 0 to 1 or a {@link Probability}. */
export function checkProbability(
  fn: string,
  parameter: string,
  value: unknown,
): asserts value is number | Probability {
  if (typeof value === 'number' && value >= 0 && value <= 1) return;
  if (isProbability(value)) {
    const { value: lower, complement, log, logComplement } = value;
    // NaN and the strings of JSON are none of these.
    if (isTail(lower, log) && isTail(complement, logComplement)) return;
  }
  throw new DomainError(fn, parameter, 'a number from 0 to 1 or a Probability', value);
}

function isTail(value: unknown, log: unknown): boolean {
  return (
    typeof value === 'number' && typeof log === 'number' && value >= 0 && value <= 1 && log <= 0
  );
}
