/**
 * Logarithms of the beta function, of binomial coefficients and of factorials.
 *
 * None is a difference of values of log Gamma: log B(1/1000, 1e15) would be wrong in its first digit.
 */

import { checkAbove, checkFinite, checkInteger, DomainError } from '../domain.ts';
import {
  logGamma1pKernel,
  logGamma1pSlope,
  logGammaKernel,
  logGammaRatioKernel,
} from './log-gamma.ts';
import {
  HALF_LOG_TWO_PI,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from './stirling-remainder.ts';

/**
 * The logarithm of the beta function for a, b > 0, also when one is far larger than the other.
 *
 * $$ \ln B(a, b) = \ln\frac{\Gamma(a)\,\Gamma(b)}{\Gamma(a + b)} $$
 *
 * @param a - a number > 0
 * @param b - a number > 0
 * @returns the logarithm, the same whichever argument comes first; `-Infinity` if one is `Infinity`
 * @remarks Constant cost. Error below 9e-16 times the larger of 1 and the modulus of the result.
 * @throws A {@link DomainError} if an argument is not above 0
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.12.
 *
 * @example
 * ```ts
 * import { logBeta } from 'hullgauge/special';
 * logBeta(0.001, 1e15).toPrecision(12); // => '6.87264010899'
 * ```
 */
export function logBeta(a: number, b: number): number {
  checkAbove('logBeta', 'a', a, 0);
  checkAbove('logBeta', 'b', b, 0);
  return logBetaKernel(a, b);
}

/** {@link logBeta} without checks. */
export function logBetaKernel(first: number, second: number): number {
  const a = Math.min(first, second);
  const b = Math.max(first, second);
  if (b === Infinity) return -Infinity;
  if (a < 1) return logGamma1pKernel(a) - Math.log(a) - logGammaRatioKernel(b, a);
  if (a < 8) return logGammaKernel(a) - logGammaRatioKernel(b, a);
  return (
    HALF_LOG_TWO_PI -
    0.5 * Math.log(a) -
    a * Math.log1p(b / a) -
    (b - 0.5) * Math.log1p(a / b) +
    stirlingRemainderKernel(a) -
    stirlingRemainderDifference(b, a)
  );
}

/**
 * The logarithm of the binomial coefficient "n over k" for real 0 <= k <= n.
 *
 * $$ \ln\binom{n}{k} = \ln\frac{\Gamma(n + 1)}{\Gamma(k + 1)\,\Gamma(n - k + 1)} $$
 *
 * @param n - a finite number >= 0
 * @param k - a number from 0 to n
 * @returns the logarithm, at least 0
 * @remarks Constant cost. Relative error below 1e-15.
 * @throws A {@link DomainError} if an argument is out of its domain
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/26.3.
 *
 * @example
 * ```ts
 * import { logBinomial } from 'hullgauge/special';
 * logBinomial(1e6, 5e5).toPrecision(12); // => '693140.047013'
 * logBinomial(4, 4); // => 0
 * ```
 */
export function logBinomial(n: number, k: number): number {
  checkFinite('logBinomial', 'n', n, 0);
  checkFinite('logBinomial', 'k', k, 0);
  if (k > n) throw new DomainError('logBinomial', 'k', `at most n (n is ${n})`, k);
  return logBinomialKernel(n, k);
}

/** {@link logBinomial} without checks. */
export function logBinomialKernel(n: number, k: number): number {
  const h = Math.min(k, n - k);
  if (h === 0) return 0;
  const g = n - h;
  if (h === 1) return Math.log(n);
  if (n <= 50 && Number.isInteger(n) && Number.isInteger(h)) return Math.log(exactBinomial(h, g));
  if (n <= 0.5) {
    // With log Gamma(1 + z) = z q(z) and n = h + g, two differences of q with the factor h g remain.
    return h * g * (logGamma1pSlope(n, h) + logGamma1pSlope(n, g));
  }
  // The expansion below has -log(h)/2 and D(h), which cancel for small h.
  if (h < 1) return logGammaRatioKernel(g + 1, h) - logGamma1pKernel(h);
  return (
    h * Math.log(n / h) -
    g * Math.log1p(-h / n) +
    0.5 * Math.log(n / g / (2 * Math.PI) / h) +
    stirlingRemainderKernel(n) -
    stirlingRemainderKernel(h) -
    stirlingRemainderKernel(g)
  );
}

/** The binomial coefficient "g + h over h" for integers with g + h <= 50: every step is exact. */
function exactBinomial(h: number, g: number): number {
  let coefficient = 1;
  for (let i = 1; i <= h; i++) coefficient = (coefficient * (g + i)) / i;
  return coefficient;
}

/**
 * The logarithm of n! for an integer n from 0 to 2^53.
 *
 * $$ \ln n! $$
 *
 * @param n - an integer from 0 to 2^53
 * @returns the logarithm, from the exact factorial for n <= 22
 * @remarks Constant cost. Relative error below 6e-16.
 * @throws A {@link DomainError} if `n` is no such integer
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.4.
 *
 * @example
 * ```ts
 * import { logFactorial } from 'hullgauge/special';
 * logFactorial(100).toPrecision(12); // => '363.739375556'
 * ```
 */
export function logFactorial(n: number): number {
  checkInteger('logFactorial', 'n', n, 0, 2 ** 53);
  return logFactorialKernel(n);
}

/** {@link logFactorial} without checks. */
export function logFactorialKernel(n: number): number {
  if (n > 22) return logGammaKernel(n + 1);
  // exact: 22! is the largest factorial that is a double
  let product = 1;
  for (let i = 2; i <= n; i++) product *= i;
  return Math.log(product);
}
