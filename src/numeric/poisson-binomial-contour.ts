/**
 * Tails of long sums of Bernoulli variables by a contour integral.
 *
 * With G(t) = E t^K = prod (1 + (t - 1)/(step j)), a ratio of gamma functions of (t - 1)/step,
 *
 *   P(K <= k) = mean over |t| = r of G(t) t^-k / (1 - t),   0 < r < 1,
 *   P(K > k)  = mean over |t| = r of G(t) t^-k / (t - 1),   r > 1.
 *
 * The trapezoidal rule with M nodes adds sum over l of P(K <= k + l M) r^(l M), l not 0, and its upper
 * counterpart; at the saddle these are far below a rounding error once M exceeds 42 standard
 * deviations of the tilted law. |G(r e^(i theta))| decreases on 0 < theta < pi, so only the nodes
 * before it has decayed are visited: about 60 whatever the length of the runs. Source: The
 * exponentially convergent trapezoidal rule, SIAM Review 56 (2014), doi 10.1137/130932132.
 */
import { EPSILON } from '../epsilon.ts';
import { logAbsOnePlus } from '../special/complex-stirling.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { addGammaRatio } from './complex-gamma-ratio.ts';
import { fewFailures } from './few-failures.ts';
import type { BernoulliRun, SumTail } from './poisson-binomial.ts';

/** Modulus, relative to the largest, at which nodes are dropped. */
const NEGLIGIBLE = 1e-19;
/** Tilts beyond this decay before the contour reaches the left half plane; below, j up to it is enumerated. */
const ENUMERATED_TILT = 200;
/** Longest run that may be enumerated at every node, in the far corner where most variables are 1. */
const LONGEST_PRODUCT = 1e4;
/** Largest number of variables equal to 0 that Newton's identities handle. */
const MOST_FAILURES = 1e6;

/** psi(x + length) - psi(x) for x > 0 and length >= 16, to about 1e-14: good enough to place contours. */
function digammaDifference(x: number, length: number): number {
  let sum = 0;
  let y = x;
  let left = length;
  while (y < 12) {
    sum += 1 / y;
    y += 1;
    left -= 1;
  }
  const z = y + left;
  const u = 1 / (y * y);
  const v = 1 / (z * z);
  const lower = u * (1 / 12 - u * (1 / 120 - u * (1 / 252 - u / 240)));
  const upper = v * (1 / 12 - v * (1 / 120 - v * (1 / 252 - v / 240)));
  return sum + Math.log1p(left / y) + (0.5 * left) / (y * z) + lower - upper;
}

/** Mean of the law tilted by r^K, r > 0: r G'(r)/G(r), between 0 and the number of variables. */
export function tiltedMean(runs: readonly BernoulliRun[], r: number): number {
  let mean = 0;
  for (const { step, from, to, count } of runs) {
    if (to - from < 16) {
      for (let j = from; j <= to; j++) mean += (count * r) / (step * j - 1 + r);
    } else {
      const first = from + (r - 1) / step;
      mean += ((count * r) / step) * digammaDifference(first, to + 1 - from);
    }
  }
  return mean;
}

/** log G(r) for r > 0, and a bound of its rounding error in `error[0]`. */
function logMoment(runs: readonly BernoulliRun[], r: number, error: Float64Array): number {
  let sum = 0;
  let size = 0;
  for (const { step, from, to, count } of runs) {
    const a = (r - 1) / step;
    if (to - from < 16) {
      for (let j = from; j <= to; j++) {
        const term = count * Math.log1p((r - 1) / (step * j));
        sum += term;
        size += Math.abs(term);
      }
    } else {
      // Whichever pair of gamma ratios is small and does not cancel.
      const length = to + 1 - from;
      const upper =
        count * (a > to ? logGammaRatioKernel(from + a, length) : logGammaRatioKernel(to + 1, a));
      const lower =
        count * (a > to ? logGammaRatioKernel(from, length) : logGammaRatioKernel(from, a));
      sum += upper - lower;
      size += Math.abs(upper) + Math.abs(lower);
    }
  }
  error[0] = EPSILON * (2 + 2 * size);
  return sum;
}

/** The saddle: the minimum over r of G(r) r^-(k + 1/2) / |1 - r| on one side of 1. */
function saddle(runs: readonly BernoulliRun[], k: number, side: 'lower' | 'upper'): number {
  // r = 1 -+ e^s covers both ends; the balance is monotone in s.
  const lower = side === 'lower';
  let low = lower ? Math.log(1e-20) : -36;
  let high = lower ? 36 : 90;
  for (let i = 0; i < 60; i++) {
    const s = 0.5 * (low + high);
    // lower: r/(1 - r) = e^s
    const r = lower ? 1 / (1 + Math.exp(-s)) : 1 + Math.exp(s);
    const balance = lower ? Math.exp(s) : -r / (r - 1);
    if (tiltedMean(runs, r) + balance < k + 0.5) low = s;
    else high = s;
    if (high - low < 1e-4) break;
  }
  const s = 0.5 * (low + high);
  return lower ? 1 / (1 + Math.exp(-s)) : 1 + Math.exp(s);
}

const ERROR: Float64Array = /* @__PURE__ */ new Float64Array(1);
const POINT: Float64Array = /* @__PURE__ */ new Float64Array(2);

/** The smaller of P(K <= k) and P(K > k) for 0 <= k < size. */
export function contourTail(runs: readonly BernoulliRun[], size: number, k: number): SumTail {
  const side = k < tiltedMean(runs, 1) ? 'lower' : 'upper';
  const failures = size - 1 - k;
  if (side === 'upper' && failures <= Math.min(0.01 * size, MOST_FAILURES)) {
    return fewFailures(runs, failures);
  }
  const r = saddle(runs, k, side);
  const lift = 1e-3;
  const deviation = Math.sqrt(
    (tiltedMean(runs, r * Math.exp(lift)) - tiltedMean(runs, r * Math.exp(-lift))) / (2 * lift),
  );
  const moment = logMoment(runs, r, ERROR);
  const power = k * Math.log(r);
  const pole = Math.log(Math.abs(1 - r));
  const base = moment - power - pole;
  const rounding = (ERROR[0] as number) + EPSILON * (4 + 2 * Math.abs(power) + Math.abs(pole));
  // Phases of size k theta lose digits that matter only where log P is astronomically large.
  const phaseError = EPSILON * (8 + (4 * (k + r)) / Math.max(1, deviation));
  const mean = phaseError < 1e-4 ? circleMean(runs, k, r, deviation) : Number.NaN;
  const normalised = mean > 0 ? mean : gaussianMean(r, deviation);
  const far = deviation * Math.abs(1 - r) > 10 * r;
  const methodError = mean > 0 ? phaseError : (far ? 2 : 0.2 * deviation) / deviation;
  const log = base + Math.log(normalised);
  return {
    tail: Math.exp(log),
    log,
    side,
    logError: rounding + methodError + EPSILON * Math.abs(log),
  };
}

/** Leading order of the mean over the circle at the saddle of a law with a large spread. */
function gaussianMean(r: number, deviation: number): number {
  const pole = r / ((1 - r) * (1 - r));
  return 1 / Math.sqrt(2 * Math.PI * (deviation * deviation + pole));
}

/** Mean of [G(t)/G(r)] (r/t)^k (1 - r)/(1 - t) over the circle; NaN where it would take too long. */
function circleMean(
  runs: readonly BernoulliRun[],
  k: number,
  r: number,
  deviation: number,
): number {
  const nodes = 2 * Math.ceil(0.5 * Math.max(64, 42 * deviation, 48 / Math.abs(Math.log(r))));
  let sum = 1;
  for (let j = 1; 2 * j <= nodes; j++) {
    const theta = (2 * Math.PI * j) / nodes;
    const half = Math.sin(0.5 * theta);
    const sine = Math.sin(theta);
    // t - r without cancellation near the real axis
    const re = -2 * r * half * half;
    const im = r * sine;
    if (!addLogRatios(runs, r, re, im, POINT)) return Number.NaN;
    const modulus = Math.exp(POINT[0] as number);
    if (modulus < NEGLIGIBLE) break;
    const phase = (POINT[1] as number) - k * theta;
    // (1 - r)/(1 - t) = 1/(1 - (t - r)/(1 - r))
    const poleRe = 1 - re / (1 - r);
    const poleIm = -im / (1 - r);
    const term =
      (modulus * (Math.cos(phase) * poleRe + Math.sin(phase) * poleIm)) /
      (poleRe * poleRe + poleIm * poleIm);
    sum += 2 * j === nodes ? term : 2 * term;
  }
  return sum / nodes;
}

/** Writes log [G(r + re + i im)/G(r)], up to multiples of 2 pi i, to out; false if a product would be too long to enumerate. */
function addLogRatios(
  runs: readonly BernoulliRun[],
  r: number,
  re: number,
  im: number,
  out: Float64Array,
): boolean {
  out[0] = 0;
  out[1] = 0;
  for (const { step, from, to, count } of runs) {
    const a = (r - 1) / step;
    const hRe = re / step;
    const hIm = im / step;
    const margin = 20 + (r < ENUMERATED_TILT ? Math.ceil((2 * r) / step) : 0);
    let last = Math.min(to, from + margin);
    if (last < to && last + a + hRe < 12) last = to;
    if (last - from > LONGEST_PRODUCT) return false;
    // the product of 1 + h/(j + a); its logarithm is taken when it has grown or shrunk enough, and at
    // every factor where many copies would magnify the rounding of a product near 1
    const often = count > 8;
    let productRe = 1;
    let productIm = 0;
    let logRe = 0;
    // whole turns do not matter: count is an integer and only cos and sin of the argument are used
    let argument = 0;
    for (let j = from; j <= last; j++) {
      const inverse = 1 / (j + a);
      const wRe = hRe * inverse;
      const wIm = hIm * inverse;
      if (often) {
        logRe += logAbsOnePlus(wRe, wIm);
        argument += Math.atan2(wIm, 1 + wRe);
        continue;
      }
      const nextRe = productRe + (productRe * wRe - productIm * wIm);
      productIm = productIm + (productRe * wIm + productIm * wRe);
      productRe = nextRe;
      const size = Math.abs(productRe) + Math.abs(productIm);
      if (size < 1e-100 || size > 1e100) {
        logRe += Math.log(size);
        productRe /= size;
        productIm /= size;
      }
    }
    if (!often) {
      logRe += 0.5 * Math.log(productRe * productRe + productIm * productIm);
      argument = Math.atan2(productIm, productRe);
    }
    out[0] = (out[0] as number) + count * logRe;
    out[1] = (out[1] as number) + count * argument;
    if (last < to) {
      addGammaRatio(last + 1 + a, hRe, hIm, -count, out);
      addGammaRatio(to + 1 + a, hRe, hIm, count, out);
      const spread = count * Math.log((to + 1 + a) / (last + 1 + a));
      out[0] = (out[0] as number) + spread * hRe;
      out[1] = (out[1] as number) + spread * hIm;
    }
  }
  return true;
}
