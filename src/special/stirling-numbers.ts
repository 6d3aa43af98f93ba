/**
 * Logarithms of unsigned Stirling numbers of the first kind and of their type B analogue.
 *
 * Both are coefficients of Q(s) = prod_{i < n} (s + c + i): with c = 1, n - 1 and k - 1 for the first
 * kind, with c = 1/2 and a factor 2^(n - k) for type B. Single values come from
 *
 * | where                                | method                                      |
 * |--------------------------------------|---------------------------------------------|
 * | n <= 60                              | the recurrence (stirling-row.ts)            |
 * | m = n - k <= 40 and 8 m^2 < n        | elementary symmetric function of order m    |
 * | elsewhere                            | Cauchy integral at the saddle point         |
 */
import { checkInteger, DomainError } from '../domain.ts';
import { logGammaRatioKernel } from './log-gamma.ts';
import { logCoefficientByContour } from './stirling-contour.ts';
import { logStirlingRow } from './stirling-row.ts';
import { logSymmetricFunction } from './stirling-symmetric.ts';

/** Up to here the recurrence is as quick as the contour, whose gamma functions need n >= 34. */
const RECURRENCE_LIMIT = 60;
/** Whole rows take n^2 / 2 steps: 50 milliseconds here. */
const ROW_LIMIT = 5000;

/**
 * The natural logarithm of the unsigned Stirling number of the first kind, the number of permutations
 * of n things with k cycles, for integers 0 <= k <= n.
 *
 * $$ \sum_{k=0}^{n} \left[{n \atop k}\right] t^k = \prod_{j=1}^{n} (t + j - 1). $$
 *
 * @param n - an integer from 0 to 2^53 - 1
 * @param k - an integer from 0 to n
 * @returns the logarithm; 0 at k = n, `-Infinity` at k = 0 < n
 * @remarks Cost: constant, some hundred times that of a logarithm. Accuracy: relative error of the
 * logarithm below 1e-15.
 * @throws A {@link DomainError} if `n` or `k` is not such an integer
 *
 * Source: contour integral at the saddle point after "Asymptotic estimates of Stirling numbers", Studies
 * in Applied Mathematics 89 (1993) 233-243, doi 10.1002/sapm1993893233; definition in DLMF 26.8.
 *
 * @example
 * ```ts
 * import { logStirling1 } from 'hullgauge/special';
 * Math.round(Math.exp(logStirling1(5, 2))); // => 50
 * logStirling1(1e15, 40).toPrecision(12); // => '3.35387763949e+16'
 * ```
 */
export function logStirling1(n: number, k: number): number {
  checkInteger('logStirling1', 'n', n, 0);
  checkOrder('logStirling1', n, k);
  return logStirling1Kernel(n, k);
}

/**
 * The natural logarithm of the Stirling number of the first kind of type B, the coefficient of t^k in
 * the product of t + 1, t + 3, ..., t + 2n - 1, for integers 0 <= k <= n.
 *
 * $$ \sum_{k=0}^{n} B(n, k)\, t^k = \prod_{j=1}^{n} (t + 2j - 1). $$
 *
 * @param n - an integer from 0 to 2^53 - 1
 * @param k - an integer from 0 to n
 * @returns the logarithm; 0 at k = n
 * @remarks Cost and accuracy as {@link logStirling1}.
 * @throws A {@link DomainError} if `n` or `k` is not such an integer
 *
 * Source: as {@link logStirling1}.
 *
 * @example
 * ```ts
 * import { logStirlingB } from 'hullgauge/special';
 * Math.round(Math.exp(logStirlingB(3, 1))); // => 23
 * ```
 */
export function logStirlingB(n: number, k: number): number {
  checkInteger('logStirlingB', 'n', n, 0);
  checkOrder('logStirlingB', n, k);
  return logStirlingBKernel(n, k);
}

/**
 * The natural logarithms of all Stirling numbers of the first kind of one order n <= 5000.
 *
 * Element k is {@link logStirling1}(n, k); their exponentials add up to n!.
 *
 * @param n - an integer from 0 to 5000
 * @returns n + 1 logarithms, index k = 0 .. n
 * @remarks Cost: n^2 / 2 multiplications and additions. Accuracy: relative error of each logarithm
 * below 1e-15.
 * @throws A {@link DomainError} if `n` is not such an integer
 *
 * Source: recurrence of DLMF 26.8.18.
 *
 * @example
 * ```ts
 * import { logStirling1Row } from 'hullgauge/special';
 * Array.from(logStirling1Row(4), (log) => Math.round(Math.exp(log))); // => [0, 6, 11, 6, 1]
 * ```
 */
export function logStirling1Row(n: number): Float64Array {
  checkInteger('logStirling1Row', 'n', n, 0, ROW_LIMIT);
  return logStirlingRow(n, 0, 1);
}

/**
 * The natural logarithms of all Stirling numbers of the first kind of type B of one order n <= 5000.
 *
 * Element k is {@link logStirlingB}(n, k); their exponentials add up to 2^n n!.
 *
 * @param n - an integer from 0 to 5000
 * @returns n + 1 logarithms, index k = 0 .. n
 * @remarks Cost and accuracy as {@link logStirling1Row}.
 * @throws A {@link DomainError} if `n` is not such an integer
 *
 * Source: the recurrence that multiplication by t + 2n - 1 gives.
 *
 * @example
 * ```ts
 * import { logStirlingBRow } from 'hullgauge/special';
 * Array.from(logStirlingBRow(3), (log) => Math.round(Math.exp(log))); // => [15, 23, 9, 1]
 * ```
 */
export function logStirlingBRow(n: number): Float64Array {
  checkInteger('logStirlingBRow', 'n', n, 0, ROW_LIMIT);
  return logStirlingRow(n, 1, 2);
}

/** {@link logStirling1} without checks. */
export function logStirling1Kernel(n: number, k: number): number {
  if (k === n) return 0;
  if (k === 0) return -Infinity;
  if (n <= RECURRENCE_LIMIT) return logStirlingRow(n, 0, 1)[k] as number;
  return logRisingCoefficient(n - 1, k - 1, 1);
}

/** {@link logStirlingB} without checks. */
export function logStirlingBKernel(n: number, k: number): number {
  if (k === n) return 0;
  if (n <= RECURRENCE_LIMIT) return logStirlingRow(n, 1, 2)[k] as number;
  return (n - k) * Math.LN2 + logRisingCoefficient(n, k, 0.5);
}

/** log of the coefficient of s^k in prod_{i < n} (s + c + i), for 0 <= k < n and n >= 60. */
function logRisingCoefficient(n: number, k: number, c: number): number {
  if (k === 0) return logGammaRatioKernel(c, n);
  const m = n - k;
  if (m <= 40 && 8 * m * m < n) return logSymmetricFunction(n, m, c);
  return logCoefficientByContour(n, k, c);
}

function checkOrder(fn: string, n: number, k: unknown): asserts k is number {
  if (typeof k === 'number' && Number.isInteger(k) && k >= 0 && k <= n) return;
  throw new DomainError(fn, 'k', `an integer from 0 to n (n is ${n})`, k);
}
