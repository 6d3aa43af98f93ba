/**
 * How stated errors pass on: to the other tail of a probability, and from terms to the logarithm of
 * their sum.
 */
import { EPSILON } from '../epsilon.ts';
import { LogNumber } from '../log-number.ts';
import type { Probability } from '../probability.ts';
import { logAddExpKernel } from '../special/log-domain.ts';

/** Bound on the error of the logarithm of the complement, whichever tail is the smaller. */
export function complementError({ value, complement, logError }: Probability): number {
  return value > 0.5 ? logError : (logError * value) / complement;
}

/** What the error of one term adds to that of the logarithm of a sum; of a term that vanishes, nothing. */
export function errorShare(log: number, error: number, logSum: number): number {
  const share = Math.exp(log - logSum);
  return share > 0 ? share * error : 0;
}

/** The sum of two numbers given by their logarithms, each with the bound of its error. */
export function sumOfLogs(a: number, aError: number, b: number, bError: number): LogNumber {
  const log = logAddExpKernel(a, b);
  const error = errorShare(a, aError, log) + errorShare(b, bError, log);
  return LogNumber.fromLog(log, error + EPSILON * Math.abs(log));
}
