/**
 * Arithmetic on logarithms, and the two differences that cancel when written plainly.
 *
 * Notation: `log` is natural; an argument called `a`, `b` or an element of `values` is the logarithm
 * of a non-negative number, so `-Infinity` stands for 0.
 */

import { logOfComplement as log1mExpKernel } from '../probability.ts';

export { log1mExpKernel };

/** log(e^a + e^b). */
export function logAddExpKernel(a: number, b: number): number {
  const larger = Math.max(a, b);
  const smaller = Math.min(a, b);
  // equal infinities would give NaN in the difference
  if (smaller === Number.NEGATIVE_INFINITY || larger === Number.POSITIVE_INFINITY) return larger;
  return larger + Math.log1p(Math.exp(smaller - larger));
}

/** log(e^a - e^b) for a >= b. */
export function logSubExpKernel(a: number, b: number): number {
  if (a === b) return Number.NEGATIVE_INFINITY;
  if (b === Number.NEGATIVE_INFINITY || a === Number.POSITIVE_INFINITY) return a;
  return a + log1mExpKernel(b - a);
}

/** log(sum of e^v) over an array; -Infinity for an empty one. */
export function logSumExpKernel(values: ArrayLike<number>): number {
  let largest = Number.NEGATIVE_INFINITY;
  let position = -1;
  for (let i = 0; i < values.length; i++) {
    const value = values[i] as number;
    if (value > largest) {
      largest = value;
      position = i;
    }
  }
  if (position < 0 || largest === Number.POSITIVE_INFINITY) return largest;
  let sum = 0;
  let carry = 0;
  for (let i = 0; i < values.length; i++) {
    if (i === position) continue;
    const term = Math.exp((values[i] as number) - largest) - carry;
    const next = sum + term;
    carry = next - sum - term;
    sum = next;
  }
  return largest + Math.log1p(sum);
}

/** log(1 + t) - t. */
export function log1pmxKernel(t: number): number {
  if (t < -0.5 || t > 1) return Math.log1p(t) - t;
  const r = t / (2 + t);
  const q = r * r;
  const terms = q < 1e-4 ? 5 : q < 0.01 ? 9 : q < 0.05 ? 14 : 19;
  let s = 0;
  for (let k = terms - 1; k >= 0; k--) s = s * q + 1 / (2 * k + 3);
  return r * (2 * q * s - t);
}

/** e^t - 1 - t. */
export function expm1mxKernel(t: number): number {
  if (t <= -0.5 || t >= 0.5) return Math.expm1(t) - t;
  let s = 0;
  for (let k = 17; k >= 3; k--) s = ((1 + s) * t) / k;
  return t * t * 0.5 * (1 + s);
}
