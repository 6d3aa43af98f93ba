/**
 * Power series of the incomplete beta function, and its closed form for b = 1.
 *
 *   I_x(a, b) = x^a / (a B(a, b)) (1 + a sum_(n >= 1) (1 - b)_n x^n / (n! (a + n))),
 *
 * for b x <= 0.7, or b <= 1 and x <= 0.7: the terms then fall like those of exp(-b x), or all have
 * one sign. Both functions write an exponent as `out[0] + out[1]` and return the factor beside it.
 * Where the result is close to 1 its logarithm, then of order a, has relative accuracy.
 */

import { betaAmplitude, betaDeviance, pairTail } from './beta-prefix.ts';
import { productError, sumError } from './double-double.ts';
import { logGamma1pKernel, logGammaRatioExcess } from './log-gamma.ts';
import { preciseLog, preciseLog1p, scaleLog } from './precise-log.ts';

const MAX_TERMS = 400;

/** Below it Gamma(1 + a + b) / (Gamma(1 + a) Gamma(1 + b)) = 1 - O(a b) is 1, even beside a/b. */
const TINY_SHAPE = 1e-9;

/** I_x(a, b) by the series; delta = b x - a y as high + low. */
export function betaSeries(
  a: number,
  b: number,
  x: number,
  y: number,
  delta: number,
  deltaTail: number,
  out: Float64Array,
): number {
  const sum = seriesSum(a, b, x);
  if (a > 1) {
    betaDeviance(a, b, x, y, delta, deltaTail, out);
    const amplitude = betaAmplitude(a, b, out);
    out[1] = (out[1] as number) - b * (x <= y ? Math.log1p(-x) : Math.log(y));
    return (amplitude / a) * (1 + sum);
  }
  const xTail = pairTail(x, y);
  if (b < a || b < TINY_SHAPE) {
    // 1/(a B) = b/(a + b) Gamma(1 + a + b) / (Gamma(1 + a) Gamma(1 + b))
    preciseLog(x, xTail, out);
    scaleLog(a, out);
    if (b >= a) {
      out[1] = (out[1] as number) + (Math.log1p(sum) - Math.log1p(a / b));
      return 1;
    }
    const ratio = logGamma1pKernel(a + b) - logGamma1pKernel(a) - logGamma1pKernel(b);
    const share = b / (a + b);
    out[1] = (out[1] as number) + ratio;
    if (share > 1e-307) return share * (1 + sum);
    out[1] = (out[1] as number) + (Math.log(b) - Math.log(a + b));
    return 1 + sum;
  }
  // 1/(a B) = b^a (Gamma(a + b) b^-a / Gamma(b)) / Gamma(1 + a)
  const product = b * x;
  if (product > 1e-290) {
    preciseLog(product, productError(b, x, product) + b * xTail, out);
  } else {
    preciseLog(b, 0, out);
    const log = out[0] as number;
    const logTail = out[1] as number;
    preciseLog(x, xTail, out);
    const total = log + (out[0] as number);
    out[1] = (out[1] as number) + (sumError(log, out[0] as number, total) + logTail);
    out[0] = total;
  }
  scaleLog(a, out);
  const ratio = logGammaRatioExcess(b, a) - logGamma1pKernel(a);
  out[1] = (out[1] as number) + (ratio + Math.log1p(sum));
  return 1;
}

/** I_x(a, 1) = x^a. */
export function betaPower(a: number, x: number, y: number, out: Float64Array): void {
  if (y <= 0.125) preciseLog1p(-y, out);
  else preciseLog(x, pairTail(x, y), out);
  scaleLog(a, out);
}

/** a sum_(n >= 1) (1 - b)_n x^n / (n! (a + n)). */
function seriesSum(a: number, b: number, x: number): number {
  let coefficient = 1;
  let sum = 0;
  for (let n = 1; n < MAX_TERMS; n++) {
    coefficient *= ((n - b) / n) * x;
    const term = coefficient / (a + n);
    sum += term;
    if (Math.abs(term) <= 1e-17 * Math.abs(sum)) return a * sum;
  }
  throw new Error(`series of the incomplete beta function at a = ${a}, b = ${b}, x = ${x}`);
}
