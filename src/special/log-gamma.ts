/**
 * Logarithm of the gamma function and of ratios of two of its values.
 *
 * log Gamma keeps its relative accuracy through the zeros 1 and 2, and a ratio is computed as such:
 * the difference of two rounded values of log Gamma would have no digit where a is far smaller than x.
 */

import { checkAbove, checkFinite, checkPositive, DomainError } from '../domain.ts';
import { log1pmxKernel } from './log-domain.ts';
import { evaluatePolynomial } from './polynomial.ts';
import {
  HALF_LOG_TWO_PI,
  SMALL,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from './stirling-remainder.ts';

export function logGamma(x: number): number {
  checkAbove('logGamma', 'x', x, 0);
  return logGammaKernel(x);
}

/** {@link logGamma} without checks. */
export function logGammaKernel(x: number): number {
  if (x >= 7) {
    return (x - 0.5) * (Math.log(x) - 1) + (HALF_LOG_TWO_PI - 0.5) + stirlingRemainderKernel(x);
  }
  if (x < 0.5) return logGamma1pKernel(x) - Math.log(x);
  if (x < 1.5) return logGammaAroundTwo(x - 1) - Math.log(x);
  let product = 1;
  let y = x;
  while (y > 2.5) {
    y -= 1;
    product *= y;
  }
  return Math.log(product) + logGammaAroundTwo(y - 2);
}

/** log Gamma(2 + z) for |z| <= 1/2. */
function logGammaAroundTwo(z: number): number {
  return z * evaluatePolynomial(AROUND_TWO, z);
}

/** log Gamma(2 + z)/z in powers of z, |z| <= 1/2, relative error 1.8e-17. */
const AROUND_TWO: readonly number[] = [
  0.42278433509846713, 0.32246703342411326, -0.0673523010531956, 0.020580808427780335,
  -0.007385551028937974, 0.002890510331036772, -0.0011927539009204018, 0.0005096695153484373,
  -0.00022315497868931946, 9.945767440096764e-5, -4.492371708374659e-5, 2.0505584372896933e-5,
  -9.456338120610123e-6, 4.3847319318293745e-6, -1.9741884532905586e-6, 9.199898075671394e-7,
  -5.812501250599261e-7, 2.7880013392491846e-7,
];

export function logGamma1p(x: number): number {
  checkAbove('logGamma1p', 'x', x, -1);
  return logGamma1pKernel(x);
}

/** {@link logGamma1p} without checks. */
export function logGamma1pKernel(x: number): number {
  if (x >= -0.5 && x <= 0.5) return logGammaAroundTwo(x) - Math.log1p(x);
  if (x < -0.5) return logGammaKernel(1 + x);
  if (x <= 1.5) return logGammaAroundTwo(x - 1);
  return logGammaKernel(x) + Math.log(x);
}

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
  if (x < SMALL) return logGammaRatioKernel(x + 1, a) - logOnePlusQuotient(a, x);
  const t = a / x;
  const difference = stirlingRemainderDifference(x, a);
  if (t < 1) {
    return a * Math.log(x) + (x * log1pmxKernel(t) + (a - 0.5) * Math.log1p(t) + difference);
  }
  return (x + a - 0.5) * Math.log1p(t) + a * (Math.log(x) - 1) + difference;
}

/**
 * log Gamma(x + a) - log Gamma(x) - a log x for x > 0, x + a > 0.
 *
 * Of the order of a (a - 1)/(2 x) for large x, and to full relative accuracy when a is small, so that
 * it may be multiplied or divided by a.
 */
export function logGammaRatioExcess(x: number, a: number): number {
  if (a < 0) {
    const y = x + a;
    return -logGammaRatioExcess(y, -a) - a * logOnePlusQuotient(-a, y);
  }
  if (x < SMALL) {
    const shift = a * (Math.log1p(x) - Math.log(x));
    return logGammaRatioExcess(x + 1, a) + shift - logOnePlusQuotient(a, x);
  }
  const t = a / x;
  const difference = stirlingRemainderDifference(x, a);
  if (t < 1) return x * log1pmxKernel(t) + (a - 0.5) * Math.log1p(t) + difference;
  return (x + a - 0.5) * Math.log1p(t) - a + difference;
}

/** log(x (x + 1) ... (x + a - 1)). */
function logRisingFactorial(x: number, a: number): number {
  let product = 1;
  for (let i = 0; i < a; i++) product *= x + i;
  return Math.log(product);
}

/** log(1 + a/x), also where the quotient overflows. */
function logOnePlusQuotient(a: number, x: number): number {
  const t = a / x;
  return t < Number.POSITIVE_INFINITY ? Math.log1p(t) : Math.log(a) - Math.log(x);
}
