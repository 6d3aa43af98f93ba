/**
 * Logarithm of the gamma function and of ratios of two of its values.
 *
 * log Gamma keeps its relative accuracy through the zeros 1 and 2, and a ratio is computed as such:
 * the difference of two rounded values of log Gamma would have no digit where a is far smaller than x.
 */

import { checkAbove, checkFinite, checkPositive, DomainError } from '../domain.ts';
import { log1pmxKernel } from './log-domain.ts';
import { dividedDifference, evaluatePolynomial } from './polynomial.ts';
import {
  HALF_LOG_TWO_PI,
  SMALL,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from './stirling-remainder.ts';

/**
 * The logarithm of the gamma function for x > 0, to full relative accuracy at its zeros 1 and 2 also.
 *
 * $$ \ln\Gamma(x) $$
 *
 * @param x - a number > 0
 * @returns the logarithm; `Infinity` where it exceeds the doubles (x above 2.5e305)
 * @remarks Constant cost. Relative error below 7e-16.
 * @throws A {@link DomainError} if `x` is not above 0
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.
 *
 * @example
 * ```ts
 * import { logGamma } from 'hullgauge/special';
 * logGamma(1e6).toPrecision(12); // => '12815504.5691'
 * logGamma(1 + 2 ** -40).toPrecision(12); // => '-5.24974589008e-13'
 * ```
 */
export function logGamma(x: number): number {
  checkAbove('logGamma', 'x', x, 0);
  return logGammaKernel(x);
}

/** {@link logGamma} without checks. */
export function logGammaKernel(x: number): number {
  if (x >= 10) {
    return (x - 0.5) * (Math.log(x) - 1) + (HALF_LOG_TWO_PI - 0.5) + stirlingRemainderKernel(x);
  }
  if (x < 1) return logGamma1pKernel(x) - Math.log(x);
  if (x <= 2.5) return logGammaBetweenZeros(x - 1);
  let product = 1;
  let y = x;
  while (y > 2.5) {
    y -= 1;
    product *= y;
  }
  return Math.log(product) + logGammaBetweenZeros(y - 1);
}

/**
 * The logarithm of Gamma(1 + x) for x > -1, without rounding 1 + x: exact in the limit x = 0.
 *
 * $$ \ln\Gamma(1 + x) = -\gamma x + \frac{\pi^2}{12} x^2 - \cdots $$
 *
 * @param x - a number > -1
 * @returns the logarithm; `Infinity` where it exceeds the doubles
 * @remarks Constant cost. Relative error below 7e-16.
 * @throws A {@link DomainError} if `x` is not above -1
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.7.
 *
 * @example
 * ```ts
 * import { logGamma1p } from 'hullgauge/special';
 * logGamma1p(1e-20).toPrecision(12); // => '-5.77215664902e-21'
 * ```
 */
export function logGamma1p(x: number): number {
  checkAbove('logGamma1p', 'x', x, -1);
  return logGamma1pKernel(x);
}

/** {@link logGamma1p} without checks. */
export function logGamma1pKernel(x: number): number {
  if (x >= 0 && x <= 1.5) return logGammaBetweenZeros(x);
  if (x < -0.5) return logGammaKernel(1 + x);
  // log Gamma(2 + x) with its zero at x = 0 exact, though 1 + x is rounded
  if (x < 0) return x * ((1 + x) * evaluatePolynomial(BETWEEN_ZEROS, x + 0.25)) - Math.log1p(x);
  return logGammaKernel(x) + Math.log(x);
}

/** log Gamma(1 + z) for 0 <= z <= 3/2, to full relative accuracy at its zeros 0 and 1. */
function logGammaBetweenZeros(z: number): number {
  // 0 - ... so that neither zero comes out as -0
  return 0 - z * ((1 - z) * evaluatePolynomial(BETWEEN_ZEROS, z - 0.75));
}

/**
 * (q(t) - q(u))/(t - u) for q(z) = log Gamma(1 + z)/z, 0 <= t, u <= 3/2: a sum of positive terms.
 */
export function logGamma1pSlope(t: number, u: number): number {
  const slope = dividedDifference(BETWEEN_ZEROS, t - 0.75, u - 0.75);
  return evaluatePolynomial(BETWEEN_ZEROS, u - 0.75) + (t - 1) * slope;
}

/** log Gamma(1 + z)/(z (z - 1)) in powers of z - 3/4, 0 <= z <= 3/2, relative error 1e-17. */
const BETWEEN_ZEROS: readonly number[] = [
  0.4501393121092563, -0.11948158662524275, 0.044520447198509394, -0.019053957830246746,
  0.008776370425278911, -0.004226194125964975, 0.0020955338792023144, -0.0010605660740064494,
  0.0005448970031374375, -0.00028319064306197986, 0.00014851663517558285, -7.846155569226578e-5,
  4.17062857959138e-5, -2.2282591232262354e-5, 1.1945816117960494e-5, -6.432193465941823e-6,
  3.516893875615291e-6, -1.913573290325702e-6, 9.41640126227377e-7, -5.00752245779499e-7,
  4.3563120177338296e-7, -2.5212112949546115e-7, -3.405542058584176e-8, 2.7604122388061338e-8,
  9.133153705117035e-8, -5.2829122865756705e-8,
];

/**
 * The logarithm of Gamma(x + a)/Gamma(x) for x > 0 and x + a > 0, however much smaller a is than x.
 *
 * $$ \ln\frac{\Gamma(x + a)}{\Gamma(x)} $$
 *
 * For an integer a > 0 this is the logarithm of x (x + 1) ... (x + a - 1). The difference of two values of
 * log Gamma has no digit at x = 1e15, a = 1/2.
 *
 * @param x - a finite number > 0
 * @param a - a finite number with x + a > 0; may be negative
 * @returns the logarithm
 * @remarks Constant cost. Relative error below 4e-15, for x >= 10 and a > 0 below 7e-16. Where the result
 *   passes through 0 the error is below 4e-15 times the smaller of 1 and |a| instead, and for x < 1/8, a > 1,
 *   where log Gamma(x) is far larger than the result, below 1e-15 |log x|.
 * @throws A {@link DomainError} if an argument is out of its domain
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.11.
 *
 * @example
 * ```ts
 * import { logGammaRatio } from 'hullgauge/special';
 * logGammaRatio(1e15, 0.5).toPrecision(12); // => '17.2693881975'
 * ```
 */
export function logGammaRatio(x: number, a: number): number {
  checkPositive('logGammaRatio', 'x', x);
  checkFinite('logGammaRatio', 'a', a);
  if (!(x + a > 0)) throw new DomainError('logGammaRatio', 'a', `above -x (x is ${x})`, a);
  return logGammaRatioKernel(x, a);
}

/** {@link logGammaRatio} without checks. */
export function logGammaRatioKernel(x: number, a: number): number {
  if (a < 0) return -logGammaRatioKernel(x + a, -a);
  if (a <= 8 && x < 1e30 && Number.isInteger(a)) return logRisingFactorial(x, a);
  if (x < 7 && a > x && a > 1) return logGammaKernel(x + a) - logGammaKernel(x);
  if (x < SMALL) return logGammaRatioKernel(x + 1, a) - logOnePlusQuotient(a, x);
  const t = a / x;
  if (t < 1) return a * Math.log(x) + excessNear(x, a, t);
  const difference = stirlingRemainderDifference(x, a);
  return (x + a - 0.5) * Math.log1p(t) + a * (Math.log(x) - 1) + difference;
}

/**
 * log Gamma(x + a) - log Gamma(x) - a log x for x > 0, x + a > 0.
 *
 * Of the order of a (a - 1)/(2 x) for large x, and to full relative accuracy when a is small, so that
 * it may be multiplied or divided by a.
 */
export function logGammaRatioExcess(x: number, a: number): number {
  const y = x + a;
  if (x < SMALL) {
    const shift = a * (Math.log1p(x) - Math.log(x)) - logOnePlusQuotient(a, x);
    return logGammaRatioExcess(x + 1, a) + shift;
  }
  if (y < SMALL) return logGammaRatioExcess(x, a + 1) - Math.log(y / x);
  const t = a / x;
  if (t > -0.5 && t < 1) return excessNear(x, a, t);
  return (y - 0.5) * Math.log(y / x) - a + stirlingRemainderDifference(x, a);
}

/** The excess where t = a/x is not large: every term is of the order of a/x or a^2/x. */
function excessNear(x: number, a: number, t: number): number {
  const difference = stirlingRemainderDifference(x, a);
  return x * log1pmxKernel(t) + (a - 0.5) * Math.log1p(t) + difference;
}

/** log(x (x + 1) ... (x + a - 1)). */
function logRisingFactorial(x: number, a: number): number {
  let product = 1;
  for (let i = 0; i < a; i++) product *= x + i;
  return Math.log(product);
}

/** log((x + a)/x), also where the quotient overflows. */
function logOnePlusQuotient(a: number, x: number): number {
  const t = a / x;
  return t < Infinity ? Math.log1p(t) : Math.log(a) - Math.log(x);
}
