/**
 * Logarithm of the gamma function, its ratio, and the ratio without its leading term.
 */

import { log1pmxKernel } from './log-domain.ts';
import {
  HALF_LOG_TWO_PI,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from './stirling-remainder.ts';

/** log Gamma(2 + z) for |z| <= 1/2. */
function logGammaAroundTwo(z: number): number {
  let s = 0;
  for (let i = ZETA.length - 1; i >= 0; i--) s = s * z + (ZETA[i] as number);
  return z * (0.42278433509846713939 + z * s);
}

const ZETA: readonly number[] = [
  0.3224670334241132182362, -0.06735230105319809513325, 0.020580808427784547879,
  -0.007385551028673985266273, 0.002890510330741523285753, -0.001192753911703260977114,
  0.0005096695247430424223357, -0.0002231547584535793797614, 0.0000994575127818085337146,
  -0.00004492623673813314170021, 0.00002050721277567069155317, -0.000009439488275268395903987,
  0.000004374866789907487804182, -0.000002039215753801366236782, 9.551412130407419832857e-7,
  -4.492469198764566043294e-7, 2.120718480555466586923e-7, -1.004322482396809960872e-7,
  4.76981016936398056576e-8, -2.271109460894316491032e-8, 1.083865921489695409107e-8,
  -5.183475041970046655121e-9, 2.483674543802478317185e-9, -1.192140140586091207443e-9,
  5.73136724167886201333e-10, -2.759522885124233145178e-10, 1.33047643742444894815e-10,
];

/** log Gamma(x) for x > 0. */
export function logGammaKernel(x: number): number {
  if (x >= 10)
    return (x - 0.5) * (Math.log(x) - 1) - 0.5 + HALF_LOG_TWO_PI + stirlingRemainderKernel(x);
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

/** log Gamma(1 + x) for x > -1. */
export function logGamma1pKernel(x: number): number {
  if (x >= -0.5 && x <= 0.5) return logGammaAroundTwo(x) - Math.log1p(x);
  if (x < -0.5) return logGammaKernel(1 + x);
  if (x <= 1.5) return logGammaAroundTwo(x - 1);
  return logGammaKernel(x) + Math.log(x);
}

/** log Gamma(x + a) - log Gamma(x) for x > 0 and x + a > 0. */
export function logGammaRatioKernel(x: number, a: number): number {
  if (a < 0) return -logGammaRatioKernel(x + a, -a);
  if (x < 10 && a >= 2) return logGammaKernel(x + a) - logGammaKernel(x);
  let sum = 0;
  let y = x;
  while (y < 10) {
    sum -= Math.log1p(a / y);
    y += 1;
  }
  const t = a / y;
  if (t < 1) {
    return (
      a * Math.log(y) +
      y * log1pmxKernel(t) +
      (a - 0.5) * Math.log1p(t) +
      stirlingRemainderDifference(y, a) +
      sum
    );
  }
  return (
    (y + a - 0.5) * Math.log1p(t) + a * (Math.log(y) - 1) + stirlingRemainderDifference(y, a) + sum
  );
}

/** log Gamma(x + a) - log Gamma(x) - a log x, to full accuracy when a/x is small. */
export function logGammaRatioExcess(x: number, a: number): number {
  if (a < 0) return -logGammaRatioExcess(x + a, -a) - a * (Math.log(x) - Math.log(x + a));
  let sum = 0;
  let y = x;
  while (y < 10) {
    sum -= Math.log1p(a / y);
    y += 1;
  }
  if (y > x) sum += a * Math.log(y / x);
  const t = a / y;
  const difference = stirlingRemainderDifference(y, a) + sum;
  if (t < 1) return y * log1pmxKernel(t) + (a - 0.5) * Math.log1p(t) + difference;
  return (y + a - 0.5) * Math.log1p(t) - a + difference;
}
