/**
 * The logarithm of a ratio of gamma functions at a real and a complex point.
 */

import { complexLog1pmx, complexRemainder, logAbsOnePlus } from '../special/complex-stirling.ts';

const WORK: Float64Array = /* @__PURE__ */ new Float64Array(2);

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
  const logRe = logAbsOnePlus(wRe, wIm);
  const logIm = Math.atan2(wIm, 1 + wRe);
  complexLog1pmx(wRe, wIm, logRe, logIm, WORK);
  const excessRe = WORK[0] as number;
  const excessIm = WORK[1] as number;
  complexRemainder(y + hRe, hIm, WORK);
  const remainderRe = WORK[0] as number;
  const remainderIm = WORK[1] as number;
  complexRemainder(y, 0, WORK);
  const reFactor = hRe - 0.5;
  out[0] =
    (out[0] as number) +
    factor * (y * excessRe + reFactor * logRe - hIm * logIm + remainderRe - (WORK[0] as number));
  out[1] =
    (out[1] as number) + factor * (y * excessIm + reFactor * logIm + hIm * logRe + remainderIm);
}
