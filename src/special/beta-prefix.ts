/**
 * The factor x^a y^b / B(a, b) in front of every form of the incomplete beta function, and of the
 * binomial probabilities.
 *
 * Notation: nu = a + b, delta = b x - a y = nu x - a: the distance of x from the mean a/nu, times nu.
 *
 *   x^a y^b / B(a, b) = exp(dev(a, delta) + dev(b, -delta)) g(a) g(b) / g(nu),
 *   dev(a, delta) = a (log(1 + delta/a) - delta/a) <= 0,
 *   g(p) = p^p e^-p / Gamma(p) = sqrt(p / 2 pi) e^-D(p),  D the remainder of Stirling's formula.
 *
 * Nothing large is subtracted. The deviances are carried as high + low, because a rounded exponent
 * of 700 would cost 1e-13 of the value. Of the pair x + y = 1 the smaller number counts as exact and
 * the other as rounded. The saddle-point form is that of Fast and accurate computation of binomial
 * probabilities (2000), with delta to twice the precision.
 */

import { productError, quotientError, sumError } from './double-double.ts';
import { logGamma1pKernel } from './log-gamma.ts';
import { preciseLog } from './precise-log.ts';
import { largeStirlingRemainder, stirlingRemainderKernel } from './stirling-remainder.ts';

const TWO_PI = 6.283185307179586476925;

/** What x lacks of its exact value: 0 if it is the smaller one of the pair, else 1 - y - x. */
export function pairTail(x: number, y: number): number {
  if (x <= y) return 0;
  const rounded = 1 - y;
  return rounded - x + sumError(1, -y, rounded);
}

/** Writes delta = b x - a y as `out[0] + out[1]`, to about 2^-104 of the smaller of a and b. */
export function betaDelta(a: number, b: number, x: number, y: number, out: Float64Array): void {
  const nu = a + b;
  const nuTail = sumError(a, b, nu);
  let difference: number;
  let rest: number;
  if (x <= y) {
    const product = x * nu;
    difference = product - a;
    rest = sumError(product, -a, difference) + (productError(x, nu, product) + x * nuTail);
  } else {
    const product = y * nu;
    difference = b - product;
    rest = sumError(b, -product, difference) - (productError(y, nu, product) + y * nuTail);
  }
  const delta = difference + rest;
  out[0] = delta;
  out[1] = difference - delta + rest;
}

/** Up to here the series of log(1 + t) - t keeps 2^-59 with only its first term doubled. */
const NEAR_MEAN = 0.03125;

/**
 * Adds dev(a, delta) = a (log(1 + delta/a) - delta/a) to `out[0] + out[1]`, with an error of about
 * 2^-59 of itself.
 *
 * @param x - with nu + nuTail, gives 1 + delta/a as nu x / a where delta is close to -a
 */
export function addDeviance(
  a: number,
  delta: number,
  deltaTail: number,
  x: number,
  nu: number,
  nuTail: number,
  out: Float64Array,
): void {
  const t = delta / a;
  let high: number;
  let low: number;
  if (t >= -NEAR_MEAN && t <= NEAR_MEAN) {
    // log(1 + t) - t = -t r + 2 r^3/3 + 2 r^5/5 + ..., r = t/(2 + t)
    const half = 0.5 * delta;
    const divisor = a + half;
    const divisorTail = sumError(a, half, divisor) + 0.5 * deltaTail;
    const r = half / divisor;
    const rTail = quotientError(half, divisor, r) + (0.5 * deltaTail - r * divisorTail) / divisor;
    const q = r * r;
    const product = delta * r;
    const series = q * (1 / 3 + q * (1 / 5 + q * (1 / 7 + q * (1 / 9 + q * (1 / 11)))));
    high = -product;
    low = a * (2 * r * series) - (productError(delta, r, product) + delta * rTail + deltaTail * r);
  } else {
    let ratio: number;
    let ratioTail: number;
    if (t < -0.5) {
      const product = x * nu;
      ratio = product / a;
      ratioTail =
        quotientError(product, a, ratio) + (productError(x, nu, product) + x * nuTail) / a;
    } else {
      const sum = a + delta;
      ratio = sum / a;
      ratioTail = quotientError(sum, a, ratio) + (sumError(a, delta, sum) + deltaTail) / a;
    }
    const before = out[0] as number;
    const beforeTail = out[1] as number;
    preciseLog(ratio, ratioTail, out);
    const log = out[0] as number;
    const logTail = out[1] as number;
    out[0] = before;
    out[1] = beforeTail;
    const product = a * log;
    high = product - delta;
    low =
      sumError(product, -delta, high) + (productError(a, log, product) + a * logTail - deltaTail);
  }
  const sum = (out[0] as number) + high;
  const rest = (out[1] as number) + (sumError(out[0] as number, high, sum) + low);
  const total = sum + rest;
  out[0] = total;
  out[1] = sum - total + rest;
  if (!(sum > -Infinity)) {
    out[0] = -Infinity;
    out[1] = 0;
  }
}

/** Writes dev(a, delta) + dev(b, -delta) as `out[0] + out[1]`; returns the high part. */
export function betaDeviance(
  a: number,
  b: number,
  x: number,
  y: number,
  delta: number,
  deltaTail: number,
  out: Float64Array,
): number {
  const nu = a + b;
  const nuTail = sumError(a, b, nu);
  out[0] = 0;
  out[1] = 0;
  addDeviance(a, delta, deltaTail, x, nu, nuTail, out);
  addDeviance(b, -delta, -deltaTail, y, nu, nuTail, out);
  return out[0];
}

/**
 * Returns g(a) g(b) / g(nu), except that a part of its logarithm goes to `out[1]`, to be added to the
 * exponent in `out[0] + out[1]`.
 */
export function betaAmplitude(a: number, b: number, out: Float64Array): number {
  const nu = a + b;
  if (a < 0.5 || b < 0.5) return gammaFactor(b) * (gammaFactor(a) / gammaFactor(nu));
  out[1] =
    (out[1] as number) +
    (stirlingRemainderKernel(nu) - stirlingRemainderKernel(a) - stirlingRemainderKernel(b));
  return Math.sqrt(((a / nu) * b) / TWO_PI);
}

/** {@link betaAmplitude} for a, b >= 6. */
export function largeBetaAmplitude(a: number, b: number, out: Float64Array): number {
  const nu = a + b;
  out[1] =
    (out[1] as number) +
    (largeStirlingRemainder(nu) - largeStirlingRemainder(a) - largeStirlingRemainder(b));
  return Math.sqrt(((a / nu) * b) / TWO_PI);
}

/** g(p) = p^p e^-p / Gamma(p). */
function gammaFactor(p: number): number {
  if (p < 0.5) return p * Math.exp(p * Math.log(p) - p - logGamma1pKernel(p));
  return Math.sqrt(p / TWO_PI) * Math.exp(-stirlingRemainderKernel(p));
}
