/**
 * The incomplete beta function, both tails.
 *
 * Notation: I_x(a, b) with y = 1 - x, nu = a + b, mean a/nu. The tail that does not contain the mean is
 * computed and the other is its complement; by I_x(a, b) = 1 - I_y(b, a) it can be taken as a lower
 * tail. In this order:
 *
 * | where                                   | method                                            |
 * |-----------------------------------------|---------------------------------------------------|
 * | a = 1 or b = 1                          | closed form                                       |
 * | b <= 1, a y <= 1, y < 0.7               | power series of the other tail                    |
 * | x <= 0.7 and (b x <= 0.7 or b <= 1)     | power series                                      |
 * | min(a, b) >= 200, z^4 <= min(a, b)/16   | expansion around the mean (beta-expansion.ts)     |
 * | else                                    | continued fraction                                |
 *
 * The last two give the tail over x^a y^b / B(a, b); z^2/2 is minus the exponent of that factor.
 */

import { checkNumber, checkPositive, DomainError } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { expansionIsFaster, gaussianTailSum } from './beta-expansion.ts';
import { betaFraction } from './beta-fraction.ts';
import { betaAmplitude, betaDelta, betaDeviance } from './beta-prefix.ts';
import { betaPower, betaSeries } from './beta-series.ts';
import { storeExact, storeTail, storeZero, TAIL_SLOTS, tailProbability } from './tail-result.ts';

const work = /* @__PURE__ */ new Float64Array(TAIL_SLOTS);

/** How far x + y may be from 1: each is off by half a bit at most, and so is their sum. */
const PAIR_TOLERANCE = 4e-16;

/**
 * The incomplete beta function at 0 <= x <= 1 for shapes a, b > 0: the distribution function of the
 * beta law, with both tails.
 *
 * $$ I_x(a, b) = \frac{\Gamma(a + b)}{\Gamma(a)\,\Gamma(b)} \int_0^x t^{a-1} (1 - t)^{b-1}\,dt $$
 *
 * For integers a <= n it is the probability of at least a successes in n trials of probability x, with
 * b = n - a + 1.
 *
 * @param a - first shape; finite, > 0
 * @param b - second shape; finite, > 0
 * @param x - end point; from 0 to 1
 * @param y - 1 - x, where it is known more exactly than the subtraction gives; of the two the smaller
 *   one is taken as exact. They may differ from sum 1 by rounding only
 * @returns I_x(a, b) as `value`, I_y(b, a) as `complement`; 0 at x = 0, 1 at y = 0, both exactly 1/2 for
 *   a = b, x = y
 * @remarks Cost: constant, at most about 110 terms of a series or fraction for any size of a and b.
 *   Accuracy: relative error of the smaller tail below 1.6e-15 down to tails of 1e-300 (worst measured
 *   9e-16, shapes from 1e-4 to 1e15); its logarithm L has an absolute error below 1.6e-15 + 1.2e-16 |L|.
 * @throws A {@link DomainError} if a shape is not finite and positive, x or y is outside [0, 1], or x + y
 *   is not 1 to rounding
 *
 * Sources: "Algorithm 708: Significant digit computation of the incomplete beta function ratios", ACM
 * Transactions on Mathematical Software 18 (1992) 360-373, doi 10.1145/131766.131776, for the continued
 * fraction; DLMF 8.17 and 8.18, https://dlmf.nist.gov/8.17, for series and expansion.
 *
 * @example
 * ```ts
 * import { incompleteBeta } from 'hullgauge/special';
 * incompleteBeta(2, 3, 0.5).value.toPrecision(12); // => '0.687500000000'
 * incompleteBeta(1e8, 1e8, 0.5).value; // => 0.5
 * incompleteBeta(20, 0.5, 1, 1e-30).complement.toPrecision(12); // => '5.01482750478e-15'
 * ```
 */
export function incompleteBeta(a: number, b: number, x: number, y: number = rest(x)): Probability {
  const fn = 'incompleteBeta';
  checkPositive(fn, 'a', a);
  checkPositive(fn, 'b', b);
  checkPair(fn, 'x', x, 'y', y);
  return incompleteBetaProbability(a, b, x, y);
}

/** 1 - x; NaN where x is no number, which is then refused by name and not by the subtraction. */
export function rest(x: number): number {
  return typeof x === 'number' ? 1 - x : Number.NaN;
}

/** Refuses anything but two numbers in [0, 1] whose sum is 1 to rounding. */
export function checkPair(fn: string, first: string, x: number, second: string, y: number): void {
  checkNumber(fn, first, x, 0, 1);
  checkNumber(fn, second, y, 0, 1);
  if (!(Math.abs(x + y - 1) <= PAIR_TOLERANCE)) {
    throw new DomainError(fn, second, `1 - ${first} to rounding (${first} is ${x})`, y);
  }
}

/** {@link incompleteBeta} without checks. */
export function incompleteBetaProbability(a: number, b: number, x: number, y: number): Probability {
  return tailProbability(incompleteBetaKernel(a, b, x, y, work), work);
}

/**
 * The smaller one of I_x(a, b) and its complement, in the slots of tail-result.ts; returns whether it
 * is I_x(a, b) itself.
 */
export function incompleteBetaKernel(
  a: number,
  b: number,
  x: number,
  y: number,
  out: Float64Array,
): boolean {
  if (x <= 0 || y <= 0) {
    storeZero(out);
    return x <= 0;
  }
  if (a + b === Infinity) return hugeShapes(a, b, x, y, out);
  betaDelta(a, b, x, y, out);
  const delta = out[0] as number;
  const deltaTail = out[1] as number;
  return delta > 0
    ? !tailBelowMean(b, a, y, x, -delta, -deltaTail, out)
    : tailBelowMean(a, b, x, y, delta, deltaTail, out);
}

/** The same where a + b overflows: the logarithm is proportional to the scale, or the tails are equal. */
function hugeShapes(a: number, b: number, x: number, y: number, out: Float64Array): boolean {
  const lower = incompleteBetaKernel(0.25 * a, 0.25 * b, x, y, out);
  if ((out[1] as number) < -1) {
    out[1] = 4 * (out[1] as number);
    out[2] = 4 * (out[2] as number);
  }
  return lower;
}

/** For x at or below the mean; delta = b x - a y <= 0 as high + low. */
function tailBelowMean(
  a: number,
  b: number,
  x: number,
  y: number,
  delta: number,
  deltaTail: number,
  out: Float64Array,
): boolean {
  if (delta === 0 && a === b) {
    storeExact(0.5, out);
    return true;
  }
  if (b === 1) {
    betaPower(a, x, y, out);
    return !storeTail(out[0] as number, out[1] as number, 1, out);
  }
  // the smallest doubles have no half
  if (a === 1 && x > 1e-307) {
    betaPower(b, y, x, out);
    return storeTail(out[0] as number, out[1] as number, 1, out);
  }
  if (b <= 1 && a * y <= 1 && y < 0.7) {
    const factor = betaSeries(b, a, y, x, -delta, -deltaTail, out);
    return storeTail(out[0] as number, out[1] as number, factor, out);
  }
  if (x <= 0.7 && (b * x <= 0.7 || b <= 1)) {
    const factor = betaSeries(a, b, x, y, delta, deltaTail, out);
    return !storeTail(out[0] as number, out[1] as number, factor, out);
  }
  const nu = a + b;
  const z2 = -2 * betaDeviance(a, b, x, y, delta, deltaTail, out);
  const amplitude = betaAmplitude(a, b, out);
  const smaller = Math.min(a, b);
  let ratio: number;
  if (expansionIsFaster(smaller, z2)) {
    const variance = (a / nu) * b;
    ratio = gaussianTailSum(variance, (b - a) / nu, variance / nu, Math.sqrt(z2));
  } else {
    ratio = betaFraction(a, b, x, y, -delta);
  }
  let factor = amplitude * ratio;
  if (factor < 1e-300) {
    // far below the smallest double: only the logarithm is left
    out[1] = (out[1] as number) + Math.log(amplitude);
    factor = ratio;
  }
  return !storeTail(out[0] as number, out[1] as number, factor, out);
}
