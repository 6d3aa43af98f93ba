/**
 * The integral of a high power of the normal distribution function against a Gaussian, about its peak.
 *
 *   int F(y)^N exp(-lambda y^2 / 2) dy,   F(y) = Phi(y) or erf(y / sqrt 2) = 2 Phi(y) - 1,
 *
 * over the real line or the half line y > 0, for a number N up to and beyond the range of doubles
 * and lambda > 0. Everything is evaluated relative to the peak y0, in the form in which N meets only
 * the small tail: N (log Phi(y) - log Phi(y0)) would lose all digits at N = 1e100. The integrand is
 * positive, unimodal and analytic, so the trapezoidal rule converges exponentially; coarser sums over
 * the same nodes, which cost nothing, bound its error.
 */
import { EPSILON } from '../epsilon.ts';
import { erfcxKernel, erfKernel } from '../special/error-function.ts';
import { log1pmxKernel } from '../special/log-domain.ts';
import { logNormalCdfKernel, normalTailKernel } from '../special/normal.ts';

const SQRT_HALF = Math.SQRT1_2;
const HALF_LOG_TWO_PI = 0.91893853320467274;
const LOG_TWO_PI = 1.8378770664093455;
/** Terms below e^-41 of the largest are dropped. */
const CUT = -41;
const MAX_NODES = 100_000;
/** Peaks below this may belong to N far larger than lambda. */
const CENTRAL = 0.5;
/** From this lambda on the peak is so narrow that differences of the tail would be lost. */
const NARROW = 1e6;
/** From here on N is taken from its logarithm. */
const HUGE_COUNT = 1e290;

/** Which F, and over which range. */
export type PeakKind =
  /** Phi over the real line */
  | 'line'
  /** Phi over y > 0 */
  | 'half'
  /** erf(y / sqrt 2) over y > 0 */
  | 'absolute';

/**
 * Writes y0 to `out[0]`, log I to `out[1]`, a bound on the absolute error of log I to `out[2]`, the
 * tail 1 - F(y0) to `out[3]`, N (1 - F(y0)) to `out[4]` and log F(y0) to `out[5]`, where the integral
 * is F(y0)^N exp(-lambda y0^2 / 2) I.
 *
 * @param N - a number > 0, `Infinity` where only its logarithm is known
 * @param logN - its logarithm
 * @param drag - with a number s > 0 the integrand has the factor Q(s y) / Q(s y0) besides
 */
export function peakKernel(
  N: number,
  logN: number,
  lambda: number,
  kind: PeakKind,
  out: Float64Array,
  drag = 0,
): void {
  const p = PEAK;
  p.absolute = kind === 'absolute';
  const y0 = peak(logN - Math.log(lambda), p.absolute, lambda > NARROW);
  p.central = y0 < CENTRAL || lambda > NARROW;
  p.y0 = y0;
  p.N = N;
  p.lambda = lambda;
  p.drag = drag;
  p.logDrag0 = drag > 0 ? logNormalCdfKernel(-drag * y0) : 0;
  p.tail0 = (p.absolute ? 2 : 1) * normalTailKernel(y0);
  p.logF0 = logF(y0, p.absolute);
  p.F0 = p.absolute ? erfKernel(y0 * SQRT_HALF) : 1 - p.tail0;
  p.erfcx0 = erfcxKernel(y0 * SQRT_HALF);
  const logHazard = (p.absolute ? Math.LN2 : 0) - 0.5 * y0 * y0 - HALF_LOG_TWO_PI - p.logF0;
  const hazard = Math.exp(logHazard);
  p.relativeSlope = hazard;
  p.huge = !(N < HUGE_COUNT);
  const logTail0 = (p.absolute ? Math.LN2 : 0) + Math.log(0.5 * p.erfcx0) - 0.5 * y0 * y0;
  p.countTail0 = p.huge ? Math.exp(logN + logTail0) : N * p.tail0;
  // At the peak N hazard = lambda y0.
  const rootCurvature = Math.sqrt(lambda * (1 + y0 * (hazard + y0)));
  const line = kind === 'line';
  const h = line
    ? 1 / (1.5 * rootCurvature + 4.2 * y0)
    : Math.min(0.08, 1 / (y0 * (2.8 * rootCurvature + 4.2 * y0)));
  let fourth = line ? 1 : y0;
  let second = 0;
  let odd = 0;
  for (let side = 1; side >= -1; side -= 2) {
    for (let j = 1; ; j++) {
      const t = side * j * h;
      const u = line ? t : y0 * Math.expm1(t);
      const exponent = line ? logRelative(u) : logRelative(u) + t;
      if (exponent < CUT) break;
      if (j > MAX_NODES) {
        throw new Error(`peak sum: no decay after ${MAX_NODES} nodes at N = ${N}, ${lambda}`);
      }
      const term = line ? Math.exp(exponent) : y0 * Math.exp(exponent);
      if (j % 2 === 1) odd += term;
      else if (j % 4 === 2) second += term;
      else fourth += term;
    }
  }
  const even = fourth + second;
  const total = even + odd;
  out[0] = y0;
  out[1] = Math.log(h * total);
  const sensitivity = p.central ? lambda * y0 : p.countTail0;
  out[2] =
    trapezoidError(Math.abs(even - odd) / total, (2 * Math.abs(fourth - second)) / total) +
    EPSILON * (10 + 4 * Math.min(sensitivity, p.countTail0));
  if (p.huge) out[2] += EPSILON * Math.abs(logN) * Math.sqrt(lambda);
  out[3] = p.tail0;
  out[4] = p.countTail0;
  out[5] = p.logF0;
}

/**
 * Bound on the relative error of a trapezoidal sum from the errors seen at two and four times its
 * step. They are e^(-C / step^s) with s between 1 (integrand analytic in a strip) and 2 (Gaussian), so
 * halving the step multiplies their logarithm by a factor from 2 to 4 which the coarser pair shows;
 * 15 % of the exponent and a factor 16 are kept in hand.
 */
export function trapezoidError(error2: number, error4: number): number {
  if (error2 === 0) return 0;
  const growth = error4 < 0.5 ? Math.log(error2) / Math.log(error4) : 2;
  return 16 * Math.exp(Math.max(2, 0.85 * Math.min(growth, 4)) * Math.log(error2));
}

/** State of the integral under way: what the integrand needs besides its argument. */
const PEAK = {
  absolute: false,
  huge: false,
  central: false,
  N: 0,
  lambda: 0,
  y0: 0,
  tail0: 0,
  F0: 0,
  logF0: 0,
  erfcx0: 0,
  relativeSlope: 0,
  countTail0: 0,
  drag: 0,
  logDrag0: 0,
};

/** log F(y). */
function logF(y: number, absolute: boolean): number {
  if (!absolute) return logNormalCdfKernel(y);
  if (y < 0.7) return Math.log(erfKernel(y * SQRT_HALF));
  return Math.log1p(-2 * normalTailKernel(y));
}

/** log of the integrand at y0 + u relative to its value at y0. */
function logRelative(u: number): number {
  const p = PEAK;
  const y = p.y0 + u;
  let gaussian = p.lambda * u * (p.y0 + 0.5 * u);
  let drag = 0;
  if (p.drag > 0) drag = logNormalCdfKernel(-p.drag * y) - p.logDrag0;
  if (p.central && Math.abs(u) * (p.y0 + 0.5) < 0.25) {
    // N F'/F = lambda y at y0, so the linear terms cancel by hand and N itself drops out.
    const h = p.relativeSlope;
    const bend = shiftExcess(p.y0, u);
    const second = h > 1e-150 ? log1pmxKernel(h * (u + bend)) / h : 0;
    return p.lambda * (p.y0 * (bend + second) - 0.5 * u * u) + drag;
  }
  gaussian -= drag;
  if (y < 0.5) return p.N * (logF(y, p.absolute) - p.logF0) - gaussian;
  const growth = (Math.exp(-u * (p.y0 + 0.5 * u)) * erfcxKernel(y * SQRT_HALF)) / p.erfcx0 - 1;
  if (p.huge) return -p.countTail0 * growth - gaussian;
  return p.N * Math.log1p((-p.tail0 * growth) / p.F0) - gaussian;
}

/** int_0^u exp(-y t - t^2/2) dt - u by its power series, for |u| (y + 1/2) < 1/4. */
function shiftExcess(y: number, u: number): number {
  let before = 0;
  let coefficient = 1;
  let power = u;
  let sum = 0;
  for (let i = 1; i < 40; i++) {
    const next = -(y * coefficient + before) / i;
    before = coefficient;
    coefficient = next;
    power *= u;
    const term = (coefficient * power) / (i + 1);
    sum += term;
    // one coefficient can vanish by chance, two in a row cannot
    if (Math.abs(term) + Math.abs(before * power) < 1e-18 * Math.abs(sum)) break;
  }
  return sum;
}

/**
 * The root of N F'(y)/F(y) = lambda y by Newton's method in log y. A few digits do, except where the
 * integrand relies on it.
 */
function peak(logRatio: number, absolute: boolean, precise: boolean): number {
  const target = logRatio - HALF_LOG_TWO_PI + (absolute ? Math.LN2 : 0);
  let y = Math.sqrt(2 * (logRatio > 30 ? logRatio : Math.log1p(Math.exp(logRatio))));
  if (y < 1e-150) y = 1e-150;
  for (let i = 0; i < 60; i++) {
    const log = logF(y, absolute);
    const value = target - 0.5 * y * y - log - Math.log(y);
    const hazard = Math.exp((absolute ? Math.LN2 : 0) - 0.5 * y * y - HALF_LOG_TWO_PI - log);
    const step = value / (1 + y * (y + hazard));
    y *= Math.exp(Math.max(-50, Math.min(step, 50)));
    if (Math.abs(step) < (precise || y < CENTRAL ? 3e-16 : 1e-6)) break;
  }
  return y;
}

/** log of (1 / sqrt(2 pi)) times the square root of lambda: the factor of a normal density. */
export function logGaussianFactor(lambda: number): number {
  return 0.5 * (Math.log(lambda) - LOG_TWO_PI);
}
