/**
 * Partial sums of binomial coefficients, as counts: exact integers where they fit a double.
 *
 * S(n, k) = sum of binom(n, i) over i <= k is half of Cover's number of dichotomies of n + 1 points
 * with k + 1 coefficients, which has the stable evaluation.
 */
import { EPSILON, exactLogError } from '../epsilon.ts';
import { LogNumber } from '../log-number.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { logDichotomies } from './separability.ts';

/** log 2^52: below it, sums of binomial coefficients are exact in doubles. */
const EXACT = 36.04;

/** log S(n, k) for integers n >= 0 and k; -Infinity for k < 0. */
export function logBinomialSum(n: number, k: number): number {
  if (k < 0) return Number.NEGATIVE_INFINITY;
  return k >= n ? n * Math.LN2 : logDichotomies(n + 1, k + 1) - Math.LN2;
}

/** binom(n, k) as a count; 0 outside 0 <= k <= n. */
export function binomialCount(n: number, k: number): LogNumber {
  if (k < 0 || k > n) return LogNumber.of(0);
  return countOf(logBinomialKernel(n, k), () => integerBinomial(n, k));
}

/** The count with the given logarithm, from integers where these are exact doubles. */
export function countOf(log: number, integer: () => number): LogNumber {
  if (log < EXACT) {
    const exact = Math.log(integer());
    return LogNumber.fromLog(exact, exactLogError(exact));
  }
  return LogNumber.fromLog(log, EPSILON * (4 + 4 * Math.abs(log)));
}

/** binom(n, k), exact where it is below 2^52. */
export function integerBinomial(n: number, k: number): number {
  let value = 1n;
  for (let i = 1; i <= Math.min(k, n - k); i++) value = (value * BigInt(n - i + 1)) / BigInt(i);
  return Number(value);
}

/** S(n, k), exact where it is below 2^52. */
export function integerBinomialSum(n: number, k: number): number {
  if (k >= n) return 2 ** n;
  let sum = 0n;
  let value = 1n;
  for (let i = 0; i <= k; i++) {
    sum += value;
    value = (value * BigInt(n - i)) / BigInt(i + 1);
  }
  return Number(sum);
}
