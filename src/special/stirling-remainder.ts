/**
 * Remainder of Stirling's formula.
 */

import { logGamma1pKernel } from './log-gamma.ts';

export const HALF_LOG_TWO_PI = 0.91893853320467274178;

/** D(x) = log Gamma(x) - (x - 1/2) log x + x - log(2 pi)/2 for x > 0. */
export function stirlingRemainderKernel(x: number): number {
  if (x >= 10) return asymptoticRemainder(x);
  if (x < 0.5) return logGamma1pKernel(x) - (x + 0.5) * Math.log(x) + x - HALF_LOG_TWO_PI;
  let sum = 0;
  let y = x;
  while (y < 10) {
    const r = 1 / (2 * y + 1);
    const q = r * r;
    let s = 0;
    for (let k = 24; k >= 0; k--) s = s * q + 1 / (2 * k + 3);
    sum += q * s;
    y += 1;
  }
  return sum + asymptoticRemainder(y);
}

function asymptoticRemainder(x: number): number {
  const u = 1 / x;
  const z = u * u;
  return (
    u *
    (1 / 12 +
      z *
        (-1 / 360 +
          z *
            (1 / 1260 +
              z *
                (-1 / 1680 +
                  z *
                    (1 / 1188 +
                      z *
                        (-691 / 360360 +
                          z * (1 / 156 + z * (-3617 / 122400 + z * (43867 / 244188)))))))))
  );
}

/** D(x + a) - D(x), without cancellation for small a where x >= 10. */
export function stirlingRemainderDifference(x: number, a: number): number {
  if (x < 10 || x + a < 10) return stirlingRemainderKernel(x + a) - stirlingRemainderKernel(x);
  const u = 1 / x;
  const v = 1 / (x + a);
  let f = 1;
  let power = u;
  let sum = 0;
  for (let k = 0; k < 9; k++) {
    sum += (COEFFICIENTS[k] as number) * f;
    f = v * f + power;
    power *= u;
    f = v * f + power;
    power *= u;
  }
  return -a * u * v * sum;
}

const COEFFICIENTS: readonly number[] = [
  1 / 12,
  -1 / 360,
  1 / 1260,
  -1 / 1680,
  1 / 1188,
  -691 / 360360,
  1 / 156,
  -3617 / 122400,
  43867 / 244188,
];
