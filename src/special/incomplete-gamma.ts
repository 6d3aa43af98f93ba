/**
 * The regularised incomplete gamma functions P(a, x) and Q(a, x) = 1 - P(a, x).
 *
 * Notation: f(x) = x^a e^-x / Gamma(a), delta = x - a, and
 *
 *   f(x) = sqrt(a / 2 pi) exp(-z^2 / 2 - D(a)),   -z^2 / 2 = a (log(1 + delta/a) - delta/a),
 *
 * D being the remainder of Stirling's formula. The smaller tail is computed as f(x) times one of
 * four forms, in this order:
 *
 * | where                       | form                                          |
 * |-----------------------------|-----------------------------------------------|
 * | a <= 1 and x <= 1           | alternating power series for P                |
 * | a > 200 and z^2 <= 0.9 a    | expansion in integrals of Mills' ratio        |
 * | x <= a                      | series with positive terms for P              |
 * | x > a                       | continued fraction for Q                      |
 *
 * The expansion is exact to rounding from a = 15 on, but slower than the others up to 200, and beyond
 * wherever the series needs fewer than 125 terms.
 *
 * The exponent is carried in two doubles, so that a tail of 1e-300 has as many digits as one of 0.1.
 * Background: Computation of the incomplete gamma function ratios and their inverse, ACM
 * Transactions on Mathematical Software 12 (1986) 377-393, doi 10.1145/22721.23109; DLMF 8.
 */
import { checkNumber } from '../domain.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { gaussianTailSum } from './beta-expansion.ts';
import { addDeviance } from './beta-prefix.ts';
import { productError, sumError } from './double-double.ts';
import { gammaFraction, gammaPowerSeries, gammaTermSeries } from './gamma-series.ts';
import { logGamma1pKernel } from './log-gamma.ts';
import { preciseLog } from './precise-log.ts';
import { stirlingRemainderKernel } from './stirling-remainder.ts';
import { tailValue } from './tail-result.ts';

const TWO_PI = 6.283185307179586476925;
/** Below it x^a is the whole of P and x / a might underflow. */
const TINY = 1e-200;

/** Beyond these shapes intermediate results would leave the range of doubles. */
export const SMALLEST_SHAPE = 1e-300;
export const LARGEST_SHAPE = 1e300;

/** Length of the array that {@link gammaTailKernel} needs. */
export const GAMMA_TAIL_SLOTS = 4;

/**
 * One of the two tails at a > 0 and 0 < x < Infinity, and whether it is the lower one, P: the
 * smaller tail, or a tail below 2/3.
 *
 * `out[0]` is its value, `out[1] + out[2]` its logarithm to more than double precision, `out[3]` the
 * tail divided by f(x).
 */
export function gammaTailKernel(a: number, x: number, out: Float64Array): boolean {
  if ((a <= 1 && x <= 1) || x < TINY) return powerTail(a, x, out);
  const delta = x - a;
  const lower = delta <= 0;
  if (a <= 1) {
    preciseLog(x, 0, out);
    const log = out[0] as number;
    const product = a * log;
    const high = product - x;
    const low =
      sumError(product, -x, high) + productError(a, log, product) + a * (out[1] as number);
    const ratio = gammaFraction(a, x);
    store(high, low - logGamma1pKernel(a), a, ratio, out);
    return false;
  }
  out[0] = 0;
  out[1] = 0;
  addDeviance(a, delta, sumError(x, -a, delta), x, 1, 0, out);
  const high = out[0];
  const low = out[1] - stirlingRemainderKernel(a);
  const square = -2 * high;
  let ratio: number;
  if (a > 200 && square <= 0.9 * a && !(lower && seriesIsShort(a, x))) {
    ratio = gaussianTailSum(a, lower ? 1 : -1, 0, Math.sqrt(square));
  } else {
    ratio = lower ? gammaTermSeries(a, x) : gammaFraction(a, x);
  }
  store(high, low, Math.sqrt(a / TWO_PI), ratio, out);
  return lower;
}

/** Whether the series for P has about 125 terms at most: 9 sqrt(a) at the mean, fewer below. */
function seriesIsShort(a: number, x: number): boolean {
  return 39 * a < 125 * (a - x + 4.4 * Math.sqrt(a));
}

/** P = x^a / Gamma(1 + a) (1 + s), or its complement where that is smaller. */
function powerTail(a: number, x: number, out: Float64Array): boolean {
  preciseLog(x, 0, out);
  const logX = out[0] as number;
  const high = a * logX;
  const low = productError(a, logX, high) + a * (out[1] as number) - logGamma1pKernel(a);
  const s = gammaPowerSeries(a, x);
  const log = high + (low + Math.log1p(s));
  if (log < -Math.LN2) {
    store(high, low, 1, 1 + s, out);
    out[3] = ((1 + s) * Math.exp(x)) / a;
    return true;
  }
  const upper = -Math.expm1(log);
  out[0] = upper;
  out[1] = Math.log(upper);
  out[2] = 0;
  out[3] = (upper / Math.exp(log)) * (((1 + s) * Math.exp(x)) / a);
  return false;
}

/** Stores the tail exp(high + low) amplitude ratio. */
function store(
  high: number,
  low: number,
  amplitude: number,
  ratio: number,
  out: Float64Array,
): void {
  const factor = amplitude * ratio;
  // the factor underflows for a tiny a and a huge x, or for both huge
  const rest = low + (factor > 1e-290 ? Math.log(factor) : Math.log(amplitude) + Math.log(ratio));
  out[0] = tailValue(high, low, factor, high + rest);
  out[1] = high;
  out[2] = rest;
  out[3] = ratio;
}

/**
 * The regularised incomplete gamma functions: the probability P(a, x) that a gamma variable with
 * shape a > 0 and scale 1 is at most x >= 0, and its complement Q(a, x).
 *
 * $$ P(a, x) = \frac{1}{\Gamma(a)} \int_0^x t^{a-1} e^{-t} \, dt, \qquad Q(a, x) = 1 - P(a, x). $$
 *
 * For an integer a, Q(a, x) is the probability that a Poisson variable with mean x is below a.
 *
 * @param a - shape; from 1e-300 to 1e300
 * @param x - end point; >= 0, `Infinity` included
 * @returns P(a, x) as `value`, Q(a, x) as `complement`; 0 at x = 0 and 1 at x = `Infinity`
 * @remarks Cost: at most 130 terms of a series, constant for a large a. Accuracy: relative error of either
 * tail below 3e-15 for a from 1e-12 to 1e15, down to tails of 1e-300; the logarithm of the smaller tail L
 * has an absolute error below 1e-15 + 2e-16 |L|.
 * @throws A {@link DomainError} if `a` or `x` is outside its domain
 *
 * Source: "Computation of the incomplete gamma function ratios and their inverse", ACM Transactions on
 * Mathematical Software 12 (1986) 377-393, doi 10.1145/22721.23109.
 *
 * @example
 * ```ts
 * import { incompleteGamma } from 'hullgauge/special';
 * incompleteGamma(1, 0.5).value.toPrecision(12); // => '0.393469340287'
 * incompleteGamma(2.5, 40).complement.toPrecision(12); // => '8.39182511483e-16'
 * incompleteGamma(1e6, 9e5).log.toPrecision(12); // => '-5366.03985661'
 * ```
 */
export function incompleteGamma(a: number, x: number): Probability {
  checkNumber('incompleteGamma', 'a', a, SMALLEST_SHAPE, LARGEST_SHAPE);
  checkNumber('incompleteGamma', 'x', x, 0);
  return incompleteGammaKernel(a, x);
}

/** {@link incompleteGamma} without checks. */
export function incompleteGammaKernel(a: number, x: number): Probability {
  if (x <= 0) return certainty(false);
  if (x === Infinity) {
    return certainty(true);
  }
  const out = new Float64Array(GAMMA_TAIL_SLOTS);
  const lower = gammaTailKernel(a, x, out);
  const log = (out[1] as number) + (out[2] as number);
  return probabilityFromTail(out[0] as number, log, lower ? 'lower' : 'upper', gammaTailError(log));
}

/** Bound of the error of the logarithm of the smaller tail: worst measured 9e-16, and its rounding. */
export function gammaTailError(log: number): number {
  return 1.6e-15 - 2.3e-16 * log;
}
