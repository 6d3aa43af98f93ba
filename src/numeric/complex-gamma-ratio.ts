/**
 * The logarithm of a ratio of gamma functions at a real and a complex point.
 */

/**
 * Adds factor * [log Gamma(y + h) - log Gamma(y) - h log y] for real y >= 12 and complex h with
 * |y + h| >= 12 in the right half plane:
 * y (log(1 + w) - w) + (h - 1/2) log(1 + w) + R(y + h) - R(y), w = h/y, R Stirling's remainder.
 */
export function addGammaRatio(
  y: number,
  hRe: number,
  hIm: number,
  factor: number,
  out: Float64Array,
): void {
  const wRe = hRe / y;
  const wIm = hIm / y;
  const logRe = 0.5 * Math.log1p(wRe * (2 + wRe) + wIm * wIm);
  const logIm = Math.atan2(wIm, 1 + wRe);
  let excessRe: number;
  let excessIm: number;
  if (Math.abs(wRe) + Math.abs(wIm) > 0.4) {
    excessRe = logRe - wRe;
    excessIm = logIm - wIm;
  } else {
    // log(1 + w) - w = -w^2 (1/2 - w/3 + w^2/4 - ...)
    let sRe = 0;
    let sIm = 0;
    for (let m = wRe * wRe + wIm * wIm < 1e-4 ? 10 : 44; m >= 2; m--) {
      const nextRe = 1 / m - (sRe * wRe - sIm * wIm);
      sIm = -(sRe * wIm + sIm * wRe);
      sRe = nextRe;
    }
    const squareRe = wRe * wRe - wIm * wIm;
    const squareIm = 2 * wRe * wIm;
    excessRe = -(squareRe * sRe - squareIm * sIm);
    excessIm = -(squareRe * sIm + squareIm * sRe);
  }
  // R(y + h) - R(y), R(z) = 1/(12 z) - 1/(360 z^3) + ...
  const zRe = y + hRe;
  const norm = zRe * zRe + hIm * hIm;
  const uRe = zRe / norm;
  const uIm = -hIm / norm;
  const vRe = uRe * uRe - uIm * uIm;
  const vIm = 2 * uRe * uIm;
  let sRe = 0;
  let sIm = 0;
  let real = 0;
  const v = 1 / (y * y);
  for (let m = REMAINDER.length - 1; m >= 0; m--) {
    const coefficient = REMAINDER[m] as number;
    const nextRe = coefficient + sRe * vRe - sIm * vIm;
    sIm = sRe * vIm + sIm * vRe;
    sRe = nextRe;
    real = coefficient + real * v;
  }
  const remainderRe = sRe * uRe - sIm * uIm - real / y;
  const remainderIm = sRe * uIm + sIm * uRe;
  const reFactor = hRe - 0.5;
  out[0] =
    (out[0] as number) + factor * (y * excessRe + reFactor * logRe - hIm * logIm + remainderRe);
  out[1] =
    (out[1] as number) + factor * (y * excessIm + reFactor * logIm + hIm * logRe + remainderIm);
}

/** B_2m / (2m (2m - 1)), m = 1..9: Stirling's series. */
const REMAINDER: readonly number[] = [
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
