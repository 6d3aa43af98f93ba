/**
 * Tail integrals with a Gaussian peak, at a cost that falls as the parameters grow.
 *
 * The incomplete beta function over x^a y^b / B(a, b) is an integral over the logit w of its variable,
 *
 *   J = integral over zeta > z of exp(-(zeta^2 - z^2)/2) dw/dzeta,
 *
 * where -zeta^2/2 is the deviance of beta-prefix.ts at the point, z its value at the end. Expanding
 * dw/dzeta in powers of zeta and integrating term by term gives, with V = a b/nu,
 *
 *   J = V^(-1/2) sum_k (-1)^k c_k V^(-k/2) J_k(z),
 *   J_0 = Mills' ratio, J_1 = 1, J_(k+1) = z^k + k J_(k-1)       (all positive).
 *
 * With p = a/nu, q = b/nu the series c = 1 + c_1 zeta + ... and u = zeta + u_2 zeta^2 + ... (the
 * distance from the mean), both scaled, satisfy u c = zeta and u' = c + (q - p) zeta - pq u zeta.
 * The incomplete gamma function is the case pq = 0, q - p = 1. No error function is subtracted, so the
 * tail keeps its relative accuracy, and nothing special happens at the mean. Background: DLMF 8.18(ii),
 * https://dlmf.nist.gov/8.18.ii, where the same expansion stands in front of an error function.
 */

import { millsRatioKernel } from './error-function.ts';

/** Enough from V = 15, z^2 = 0.9 V on. */
const MAX_TERMS = 32;
/** Coefficients up to the one after MAX_TERMS. */
const u = /* @__PURE__ */ new Float64Array(34);
const c = /* @__PURE__ */ new Float64Array(34);

/**
 * The sum J for a tail that ends at distance z >= 0 from the mean.
 *
 * @param variance - V = a b/nu; for the incomplete gamma function a
 * @param skew - q - p for a lower tail, p - q for an upper one; 1 or -1 for the incomplete gamma function
 * @param pq - a b/nu^2; 0 for the incomplete gamma function
 * @param z - square root of minus twice the deviance
 */
export function gaussianTailSum(variance: number, skew: number, pq: number, z: number): number {
  const scale = 1 / Math.sqrt(variance);
  let previous = millsRatioKernel(z); // J_(m-1) V^(-(m-1)/2)
  let current = scale; // J_m V^(-m/2)
  let power = scale; // z^(m-1) V^(-m/2)
  u[0] = 0;
  u[1] = 1;
  c[0] = 1;
  let sum = previous;
  let small = false;
  for (let m = 1; m < MAX_TERMS; m++) {
    let convolution = 0;
    for (let i = 1; i < m; i++) convolution += (u[i + 1] as number) * (c[m - i] as number);
    const drive = (m === 1 ? skew : 0) - pq * (u[m - 1] as number);
    const coefficient = -(drive + (m + 1) * convolution) / (m + 2);
    c[m] = coefficient;
    u[m + 1] = (coefficient + drive) / (m + 1);
    const term = coefficient * current;
    sum += m % 2 === 0 ? term : -term;
    // for a = b every other coefficient vanishes: one small term proves nothing
    if (Math.abs(term) < 2e-17 * sum) {
      if (small) break;
      small = true;
    } else {
      small = false;
    }
    power *= scale * z;
    const next = power + m * scale * scale * previous;
    previous = current;
    current = next;
  }
  return sum * scale;
}

/**
 * Whether the expansion takes less time than the fraction, for z^2 = `z2` and `smaller` = min(a, b).
 *
 * Both have full accuracy on either side of this line: the expansion from min(a, b) = 16,
 * z^2 = 0.9 min(a, b) on, the fraction everywhere.
 */
export function expansionIsFaster(smaller: number, z2: number): boolean {
  return smaller >= 200 && z2 * z2 <= 0.0625 * smaller;
}
