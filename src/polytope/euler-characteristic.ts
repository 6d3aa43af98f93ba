/**
 * Expected Euler characteristic of the directions in which a random polytope stays low.
 *
 * V_h = {u in the unit sphere of R^d : <X_i, u> <= h for all i} is the intersection of n random caps. By
 * the spherical kinematic formula its expected Euler characteristic is
 *
 *   2 sum_(i >= 0) [t^(d - 1 - 2i)] (sum_(j=1..d) v_j t^(d - j))^n,
 *
 * v_j the expected spherical intrinsic volumes of one cap: v_d = F(h), and for j < d, with w = 1 - h^2,
 *
 *   v_j = s_j (1/2) Gamma(d/2 + beta + 1) / (Gamma((d - j + 1)/2) Gamma((j + 1)/2 + beta + 1))
 *         w^(beta + (j + 1)/2) |h|^(d - j - 1),
 *
 * s_j = (-1)^(d - j - 1) for h > 0 and 1 otherwise (the mean over the radius is a beta integral). For
 * h <= 0 the set V_h is convex or empty, and the number is the probability that it is not empty.
 *
 * The power is taken by a recurrence, whose terms are all positive for n >= d - 1 and alike in sign to v;
 * for fewer points, and h <= 0, by squaring.
 */
import type { ResolvedCount } from '../count.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';

/** Largest dimension for which the coefficients are formed, at a cost of d^2 steps. */
export const MAX_EULER_DIMENSION = 500;

/**
 * log of the expected Euler characteristic, or NaN where it is not positive; h = 1 - gap, or the negative
 * of 1 - gap.
 */
export function logEulerCharacteristic(
  d: number,
  beta: number,
  count: ResolvedCount,
  gap: number,
  negative: boolean,
): number {
  const h = 1 - gap;
  const tail = new BetaTail(beta + (d - 1) / 2);
  tail.centreAtHeight(negative ? -h : h, gap);
  const logF = tail.logOther;
  const { logWidth } = tail;
  // logarithms of |a_i|, a_i = v_(d-i) / v_d
  const logs = new Float64Array(d);
  const logHeight = Math.log1p(-gap);
  const j0 = d / 2 + beta + 1;
  for (let i = 1; i < d; i++) {
    const j = d - i;
    const power = i === 1 ? 0 : (i - 1) * logHeight;
    logs[i] =
      -Math.LN2 +
      logGammaRatioKernel(j0 - (i - 1) / 2, (i - 1) / 2) -
      logGammaRatioKernel(1, (i - 1) / 2) +
      (beta + (j + 1) / 2) * logWidth +
      power -
      logF;
  }
  if (negative && count.n < d - 1) return logFewPoints(logs, logF, count.n);
  // t in units of rho, so that n a_1 rho = d and the coefficients stay below e^d
  const logRho = Math.log(d) - count.log - (logs[1] as number);
  const scaled = new Float64Array(d);
  for (let i = 1; i < d; i++) {
    const sign = negative || h === 0 || i % 2 === 1 ? 1 : -1;
    scaled[i] = sign * Math.exp(count.log + (logs[i] as number) + i * logRho);
  }
  const inverse = Math.exp(-count.log);
  const c = new Float64Array(d);
  c[0] = 1;
  for (let k = 1; k < d; k++) {
    let sum = 0;
    for (let i = 1; i <= k; i++) {
      // ((n + 1) i - k) a_i / k with n a_i = scaled
      sum += (i * (1 + inverse) - k * inverse) * (scaled[i] as number) * (c[k - i] as number);
    }
    c[k] = sum / k;
  }
  let total = 0;
  for (let i = 0; 2 * i <= d - 1; i++) {
    total += (c[d - 1 - 2 * i] as number) * Math.exp(2 * i * logRho);
  }
  if (!(total > 0)) return Number.NaN;
  const logAll = tail.logTail < -30 ? -Math.exp(count.log + tail.logTail) : count.n * logF;
  return Math.LN2 + logAll - (d - 1) * logRho + Math.log(total);
}

/**
 * The same for positive coefficients and n < d - 1. With t in units that make n variables of the law
 * v_(d - i), i = 0 .. d - 1, have the sum d - 1 in the mean, or fewer, no coefficient that counts
 * underflows.
 */
function logFewPoints(logs: Float64Array, logF: number, n: number): number {
  const d = logs.length;
  const law = new Float64Array(d);
  let logRho = 0;
  let logSum = tilt(logs, 0, law);
  if (n * meanOf(law) > d - 1) {
    let low = -1;
    while (n * meanOf(law) > d - 1) {
      low *= 2;
      tilt(logs, low, law);
    }
    let high = 0;
    while (high - low > 1e-3 * (1 - high)) {
      logRho = 0.5 * (low + high);
      logSum = tilt(logs, logRho, law);
      if (n * meanOf(law) > d - 1) high = logRho;
      else low = logRho;
    }
  }
  const power = powerOf(law, n);
  let total = 0;
  for (let i = 0; 2 * i <= d - 1; i++) {
    total += (power[d - 1 - 2 * i] as number) * Math.exp(2 * i * logRho);
  }
  return Math.LN2 + n * (logF + logSum) - (d - 1) * logRho + Math.log(total);
}

/** Writes the law in proportion to exp(logs[i] + i logRho), and returns the logarithm of the sum. */
function tilt(logs: Float64Array, logRho: number, law: Float64Array): number {
  let top = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < logs.length; i++) top = Math.max(top, (logs[i] as number) + i * logRho);
  let sum = 0;
  for (let i = 0; i < logs.length; i++) {
    law[i] = Math.exp((logs[i] as number) + i * logRho - top);
    sum += law[i] as number;
  }
  for (let i = 0; i < logs.length; i++) law[i] = (law[i] as number) / sum;
  return top + Math.log(sum);
}

function meanOf(law: Float64Array): number {
  return law.reduce((sum, p, i) => sum + i * p, 0);
}

/** The law of the sum of n variables, as far as the law itself reaches. */
function powerOf(law: Float64Array, n: number): Float64Array {
  if (n === 1) return law;
  const half = powerOf(law, Math.floor(n / 2));
  const even = convolve(half, half);
  return n % 2 === 0 ? even : convolve(even, law);
}

function convolve(a: Float64Array, b: Float64Array): Float64Array {
  const out = new Float64Array(a.length);
  for (let k = 0; k < out.length; k++) {
    let sum = 0;
    for (let i = 0; i <= k; i++) sum += (a[i] as number) * (b[k - i] as number);
    out[k] = sum;
  }
  return out;
}
