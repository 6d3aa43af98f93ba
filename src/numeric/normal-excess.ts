/**
 * Repeated integrals of the normal tail, the moments of the excess of a normal variable over a level.
 *
 *   I_m(t) = integral over x > t of (x - t)^m / m! phi(x) dx = E (Z - t)_+^m / m!,   t >= 0,
 *
 * I_-1 = phi and I_(m-2) = t I_(m-1) + m I_m. The sequence is the minimal solution, so its ratios come
 * from the continued fraction I_m/I_(m-1) = 1/(t + (m + 1) I_(m+1)/I_m), all positive; forming
 * phi - t Q instead would lose t^2 in relative accuracy, and each further order another t.
 */
import { expOfMinusHalfSquare, millsRatioKernel } from '../special/error-function.ts';

const INVERSE_SQRT_TWO_PI = 0.39894228040143267794;
/** Below this level the forward recurrence loses less than a digit up to order 3. */
const FORWARD = 0.8;
/** The continued fraction is accurate to rounding after this many steps for t >= 0.8. */
const STEPS = 700;

/** Writes I_0(t)/phi(t), .., I_4(t)/phi(t) to `out` and returns phi(t), for t >= 0. */
export function normalExcess(t: number, out: Float64Array): number {
  if (t < FORWARD) {
    out[0] = millsRatioKernel(t);
    out[1] = 1 - t * out[0];
    for (let m = 2; m <= 4; m++) {
      out[m] = ((out[m - 2] as number) - t * (out[m - 1] as number)) / m;
    }
  } else {
    // large t converges at once
    const steps = Math.min(STEPS, 12 + Math.ceil(400 / (t * t)) + 30);
    let ratio = 0;
    for (let m = steps; m > 4; m--) ratio = 1 / (t + (m + 1) * ratio);
    for (let m = 4; m >= 0; m--) {
      ratio = 1 / (t + (m + 1) * ratio);
      out[m] = ratio;
    }
    for (let m = 1; m <= 4; m++) out[m] = (out[m] as number) * (out[m - 1] as number);
  }
  return INVERSE_SQRT_TWO_PI * expOfMinusHalfSquare(t);
}
