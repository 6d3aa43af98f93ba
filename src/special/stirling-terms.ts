/**
 * The integrand of the contour integral for Stirling numbers, as a complex logarithm.
 *
 * Both functions write the real and the imaginary part to `out[0]` and `out[1]` and need two more
 * places of the array to work in. z = r e^(i theta) is the point, Q(z) = prod_{i < n} (z + c + i).
 */

import { complexLog1pmx, complexRemainder, logAbsOnePlus } from './complex-stirling.ts';

/** Factors of the product that are multiplied directly; the rest is a ratio of gamma functions. */
export const DIRECT_FACTORS = 12;

/**
 * log(Q(z) / Q(r)) - i k theta for r <= n and n > DIRECT_FACTORS.
 *
 * With d = z - r, N = r + c + n, M = r + c + 12 the gamma functions beyond the direct factors give
 * (N + d - 1/2) log(1 + d/N) - (M + d - 1/2) log(1 + d/M) + d log(N/M) + differences of D.
 */
export function innerTerm(
  n: number,
  k: number,
  c: number,
  r: number,
  theta: number,
  out: Float64Array,
): void {
  const half = Math.sin(0.5 * theta);
  const dx = -2 * r * half * half;
  const dy = r * Math.sin(theta);
  let px = 1;
  let py = 0;
  for (let i = 0; i < DIRECT_FACTORS; i++) {
    const inverse = 1 / (r + c + i);
    const fx = 1 + dx * inverse;
    const fy = dy * inverse;
    const next = px * fx - py * fy;
    py = px * fy + py * fx;
    px = next;
  }
  const upper = r + c + n;
  const lower = r + c + DIRECT_FACTORS;
  const logUpperX = logAbsOnePlus(dx / upper, dy / upper);
  const logUpperY = Math.atan2(dy, upper + dx);
  const logLowerX = logAbsOnePlus(dx / lower, dy / lower);
  const logLowerY = Math.atan2(dy, lower + dx);
  const u = upper + dx - 0.5;
  const v = lower + dx - 0.5;
  const logRatio = Math.log1p((n - DIRECT_FACTORS) / lower);
  const x = u * logUpperX - dy * logUpperY - (v * logLowerX - dy * logLowerY) + dx * logRatio;
  const y =
    u * logUpperY + dy * logUpperX - (v * logLowerY + dy * logLowerX) + dy * logRatio - k * theta;
  let remainderX = 0;
  let remainderY = 0;
  complexRemainder(upper + dx, dy, out);
  remainderX += out[0] as number;
  remainderY += out[1] as number;
  complexRemainder(upper, 0, out);
  remainderX -= out[0] as number;
  complexRemainder(lower + dx, dy, out);
  remainderX -= out[0] as number;
  remainderY -= out[1] as number;
  complexRemainder(lower, 0, out);
  remainderX += out[0] as number;
  out[0] = x + remainderX + 0.5 * Math.log(px * px + py * py);
  out[1] = y + remainderY + Math.atan2(py, px);
}

/**
 * log(Q(z) / z^n) + i m theta for r > n, with m = n - k.
 *
 * The sum of log(1 + (c + i)/z) is n log(1 + c/z) + X lambda(n/X) + (n - 1/2) log(1 + n/X) plus a
 * difference of D, where X = z + c and lambda(t) = log(1 + t) - t. Its size is m: with the other form,
 * phases of size n theta would have to cancel.
 */
export function outerTerm(
  n: number,
  m: number,
  c: number,
  r: number,
  theta: number,
  out: Float64Array,
): void {
  const zx = r * Math.cos(theta);
  const zy = r * Math.sin(theta);
  const scale = c / (r * r);
  const firstX = logAbsOnePlus(zx * scale, -zy * scale);
  const firstY = Math.atan2(-zy * scale, 1 + zx * scale);
  const x = zx + c;
  const y = zy;
  const inverse = n / (x * x + y * y);
  const tx = x * inverse;
  const ty = -y * inverse;
  const logX = logAbsOnePlus(tx, ty);
  const logY = Math.atan2(ty, 1 + tx);
  complexLog1pmx(tx, ty, logX, logY, out);
  const lambdaX = out[0] as number;
  const lambdaY = out[1] as number;
  complexRemainder(x + n, y, out);
  const remainderX = out[0] as number;
  const remainderY = out[1] as number;
  complexRemainder(x, y, out);
  const real = n * firstX + (x * lambdaX - y * lambdaY) + (n - 0.5) * logX;
  const imaginary = n * firstY + (x * lambdaY + y * lambdaX) + (n - 0.5) * logY;
  out[0] = real + (remainderX - (out[0] as number));
  out[1] = imaginary + (remainderY - (out[1] as number)) + m * theta;
}
