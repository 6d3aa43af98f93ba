/**
 * Logarithms of the beta function, of binomial coefficients and of factorials.
 */

import { logGamma1pKernel, logGammaKernel, logGammaRatioKernel } from './log-gamma.ts';
import {
  HALF_LOG_TWO_PI,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from './stirling-remainder.ts';

/** log B(a, b) for a, b > 0. */
export function logBetaKernel(first: number, second: number): number {
  const a = Math.min(first, second);
  const b = Math.max(first, second);
  if (a < 1) return logGamma1pKernel(a) - Math.log(a) - logGammaRatioKernel(b, a);
  if (a < 10) return logGammaKernel(a) - logGammaRatioKernel(b, a);
  return (
    HALF_LOG_TWO_PI -
    0.5 * Math.log(a) -
    a * Math.log1p(b / a) -
    (b - 0.5) * Math.log1p(a / b) +
    stirlingRemainderKernel(a) -
    stirlingRemainderDifference(b, a)
  );
}

/** log of the binomial coefficient n over k for 0 <= k <= n, reals. */
export function logBinomialKernel(n: number, k: number): number {
  const h = Math.min(k, n - k);
  if (h === 0) return 0;
  const g = n - h;
  if (h < 1) return logGammaRatioKernel(g + 1, h) - logGamma1pKernel(h);
  return (
    h * Math.log(n / h) -
    g * Math.log1p(-h / n) +
    0.5 * Math.log(n / g / (2 * Math.PI * h)) +
    stirlingRemainderKernel(n) -
    stirlingRemainderKernel(h) -
    stirlingRemainderKernel(g)
  );
}

/** log n! for an integer n >= 0. */
export function logFactorialKernel(n: number): number {
  return logGammaKernel(n + 1);
}
