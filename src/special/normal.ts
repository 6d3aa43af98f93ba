/**
 * The standard normal law.
 */

import {
  erfcxKernel,
  erfKernel,
  expOfMinusHalfSquare,
  expOfMinusSquare,
  millsRatioKernel,
} from './error-function.ts';
import { log1mExpKernel } from './log-domain.ts';

const SQRT_HALF = Math.SQRT1_2;
const SQRT_TWO_PI = 2.5066282746310005024;
const LOG_TWO_PI = 1.8378770664093454836;

/** Phi(-|x|): the smaller tail beyond x. */
export function normalTailKernel(x: number): number {
  const distance = Math.abs(x);
  if (distance <= 0.7) return 0.5 - 0.5 * erfKernel(distance * SQRT_HALF);
  return 0.5 * erfcxKernel(distance * SQRT_HALF) * expOfMinusHalfSquare(distance);
}

/** log Phi(x). */
export function logNormalCdfKernel(x: number): number {
  if (x < -0.7) return Math.log(0.5 * erfcxKernel(-x * SQRT_HALF)) - x * (0.5 * x);
  if (x <= 0.7) return Math.log1p(erfKernel(x * SQRT_HALF)) - Math.LN2;
  return Math.log1p(-normalTailKernel(x));
}

/** The x with log Phi(x) = lp, for lp <= 0. */
export function normalQuantileOfLog(lp: number): number {
  if (lp > -Math.LN2) return -lowerQuantileOfLog(log1mExpKernel(lp));
  return lowerQuantileOfLog(lp);
}

/** The x <= 0 (to rounding) with log Phi(x) = t, for t <= -log 2. */
function lowerQuantileOfLog(t: number): number {
  if (t > -1.2)
    return -quantileNearMedian(-0.5 * Math.expm1(t + Math.LN2 + 2.3190468138462996e-17));
  if (t === Number.NEGATIVE_INFINITY) return t;
  const s = Math.sqrt(-2 * t);
  let x = -Math.sqrt(Math.max(0.1, -2 * t - LOG_TWO_PI - 2 * Math.log(s)));
  for (let i = 0; i < 4; i++) {
    const mills = millsRatioKernel(-x);
    const h = (logNormalCdfKernel(x) - t) * mills;
    const step = h / (1 - 0.5 * h * (-x - 1 / mills));
    x -= step;
    if (Math.abs(step) < 1e-6 * -x) break;
  }
  return x;
}

/** The y with Phi(y) = 1/2 + q, for |q| <= 0.2. */
export function quantileNearMedian(q: number): number {
  const c = q * SQRT_TWO_PI;
  let y = c + (c * c * c) / 6 + (7 / 120) * c * c * c * c * c;
  for (let i = 0; i < 2; i++) {
    const z = y * SQRT_HALF;
    const h = ((0.5 * erfKernel(z) - q) * SQRT_TWO_PI) / expOfMinusSquare(z);
    y -= h / (1 + 0.5 * h * y);
  }
  return y;
}

/** The x with Phi(x) = p for 0 <= p <= 1. */
export function normalQuantileOfValue(p: number): number {
  const q = p - 0.5;
  if (q >= -0.2 && q <= 0.2) return quantileNearMedian(q);
  if (p < 0.5) return normalQuantileOfLog(Math.log(p));
  return -normalQuantileOfLog(Math.log(1 - p));
}
