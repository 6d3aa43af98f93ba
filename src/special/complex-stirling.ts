/**
 * Pieces of the logarithm of the gamma function at a complex argument: log(1 + t), what is left of it
 * beyond t, and Stirling's remainder. The last two write real and imaginary part to `out[0]` and `out[1]`.
 */

/** log |1 + x + i y| */
export function logAbsOnePlus(x: number, y: number): number {
  return 0.5 * Math.log1p(x * (2 + x) + y * y);
}

/** log(1 + t) - t at t = x + i y, |t| < 1; the logarithm itself is given as well. */
export function complexLog1pmx(
  x: number,
  y: number,
  logX: number,
  logY: number,
  out: Float64Array,
): void {
  if (x * x + y * y > 0.04) {
    out[0] = logX - x;
    out[1] = logY - y;
    return;
  }
  // r (2 q S - t) with r = t/(2 + t), q = r^2, S = 1/3 + q/5 + q^2/7 + ...
  const size = (2 + x) * (2 + x) + y * y;
  const rx = (x * (2 + x) + y * y) / size;
  const ry = (2 * y) / size;
  const qx = (rx - ry) * (rx + ry);
  const qy = 2 * rx * ry;
  let sx = 1 / 21;
  let sy = 0;
  for (let i = 19; i >= 3; i -= 2) {
    const next = sx * qx - sy * qy + 1 / i;
    sy = sx * qy + sy * qx;
    sx = next;
  }
  const ux = 2 * (qx * sx - qy * sy) - x;
  const uy = 2 * (qx * sy + qy * sx) - y;
  out[0] = rx * ux - ry * uy;
  out[1] = rx * uy + ry * ux;
}

/**
 * Stirling's remainder at x + i y by its asymptotic series (https://dlmf.nist.gov/5.11.1), |z| > 6.
 * Near the negative axis it is off by a term of period 1, which differences of it do not see.
 */
export function complexRemainder(x: number, y: number, out: Float64Array): void {
  const size = x * x + y * y;
  const ux = x / size;
  const uy = -y / size;
  const qx = (ux - uy) * (ux + uy);
  const qy = 2 * ux * uy;
  let sx = 0;
  let sy = 0;
  for (let i = size > 1e5 ? 3 : 8; i >= 0; i--) {
    const next = sx * qx - sy * qy + (STIRLING_SERIES[i] as number);
    sy = sx * qy + sy * qx;
    sx = next;
  }
  out[0] = sx * ux - sy * uy;
  out[1] = sx * uy + sy * ux;
}

/**
 * B_2k / (2k (2k - 1)), k = 1..9, the coefficients of 1/(12 z) - 1/(360 z^3) + ... Written out: a
 * quotient at the top level would stay in every bundle.
 */
const STIRLING_SERIES: readonly number[] = [
  0.08333333333333333, // 1/12
  -0.002777777777777778, // -1/360
  0.0007936507936507937, // 1/1260
  -0.0005952380952380953, // -1/1680
  0.0008417508417508417, // 1/1188
  -0.0019175269175269176, // -691/360360
  0.00641025641025641, // 1/156
  -0.029550653594771242, // -3617/122400
  0.17964437236883057, // 43867/244188
];
