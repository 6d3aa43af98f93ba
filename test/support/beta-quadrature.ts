/**
 * The tail integral of the incomplete beta function by quadrature: an evaluation that shares nothing
 * with series, fraction and expansion but the definition.
 */

import { expm1mx, log1pmx } from 'hullgauge/special';
import { integrateSmooth } from '../../src/numeric/gauss-legendre.ts';

/**
 * I_x(a, b) B(a, b) / (x^a y^b) for x at or below the mean, delta = b x - a y <= 0, a >= 1/2.
 *
 * With t/(1 - t) = x/y e^-s the integrand is e^(-a s) (1 - x (1 - e^-s))^-(a + b), written so that
 * nothing cancels.
 */
export function betaTailIntegral(
  a: number,
  b: number,
  x: number,
  y: number,
  delta: number,
): number {
  const nu = a + b;
  const exponent = (s: number): number => {
    if (x <= 0.5) {
      const q = expm1mx(-s);
      const e = s - q;
      return delta * e - a * q - nu * log1pmx(-x * e);
    }
    const q = expm1mx(s);
    const e = s + q;
    if (y * e > 0.5) return -a * s - nu * Math.log1p(x * Math.expm1(-s));
    return delta * e - b * q - nu * log1pmx(y * e);
  };
  let end = 1;
  while (exponent(end) < -39) end /= 2;
  while (exponent(end) > -39) end *= 1.1;
  const panels = 16;
  let sum = 0;
  for (let i = 0; i < panels; i++) {
    sum += integrateSmooth(
      (s) => Math.exp(exponent(s)),
      (end * i) / panels,
      (end * (i + 1)) / panels,
    );
  }
  return sum;
}
