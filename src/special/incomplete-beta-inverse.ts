/**
 * The inverse of the incomplete beta function.
 *
 * Halley's iteration on F(u) = log I_x(a, b) - log(given tail) in the logit u = log(x/y): F is concave
 * and increasing, F' = f = x^a y^b / B(a, b) / I, F''/F' = a y - b x - f. An upper tail is a lower one
 * with (a, x) and (b, y) exchanged. Starting points: the power law of either end where it holds, else
 * the normal law of cube roots of gamma variables, or a gamma variable where one shape is below 1/2.
 * Steps are applied to x and y as factors, so the smaller of them keeps all its digits; out of the range
 * of doubles the power law gives its logarithm.
 */

import { checkNumber } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { betaAmplitude, betaDelta, betaDeviance } from './beta-prefix.ts';
import { incompleteBetaKernel } from './incomplete-beta.ts';
import { LARGEST_SHAPE, SMALLEST_SHAPE } from './incomplete-gamma.ts';
import { gammaInverseOfLog } from './incomplete-gamma-inverse.ts';
import { logBetaKernel } from './log-beta.ts';
import { log1mExpKernel } from './log-domain.ts';
import { logGamma1pKernel, logGammaRatioKernel } from './log-gamma.ts';
import { normalQuantileOfLog } from './normal.ts';
import { checkProbability } from './probability-argument.ts';
import { TAIL_SLOTS } from './tail-result.ts';

/** A point x of [0, 1] with y = 1 - x and both logarithms. */
export interface BetaPoint {
  /** The point. */
  readonly x: number;
  /** 1 - x, to full relative accuracy. */
  readonly y: number;
  /** Natural logarithm of x, also where x underflows. */
  readonly logX: number;
  /** Natural logarithm of y, also where y underflows. */
  readonly logY: number;
}

/**
 * The point that a variable of the beta law with shapes a, b > 0 stays below with probability p: the
 * inverse of the incomplete beta function.
 *
 * $$ I_x(a, b) = p $$
 *
 * A number p above 1/2 is inverted from 1 - p, which is exact; a {@link Probability} from its smaller
 * tail, by its logarithm where that tail underflows.
 *
 * @param a - first shape; from 1e-300 to 1e300
 * @param b - second shape; from 1e-300 to 1e300
 * @param p - a number from 0 to 1, or a Probability
 * @returns x and y = 1 - x, neither derived from the other where that loses digits, and both logarithms,
 *   which remain where x or y underflows; x = 0 for p = 0, y = 0 for p = 1
 * @remarks Cost: 2 evaluations of the incomplete beta function on average, at most 9 for shapes from 0.01
 *   to 1e12 and tails above e^-700, up to 190 at the ends of the domain. Relative error of the smaller one
 *   of x and y below 1e-14 where a small change of it changes p as much, absolute error of log(x/y) below
 *   2e-15 max(1, |log(x/y)|).
 * @throws A {@link DomainError} if a shape is not a number from 1e-300 to 1e300, or p not a number from 0
 *   to 1 or a Probability
 *
 * Source: the equation is solved by Halley's iteration in log(x/y) on the logarithm of the smaller tail,
 * which is concave there; https://dlmf.nist.gov/8.17.
 *
 * @example
 * ```ts
 * import { Probability } from 'hullgauge';
 * import { incompleteBetaInverse } from 'hullgauge/special';
 * incompleteBetaInverse(2, 2, 0.5).x; // => 0.5
 * incompleteBetaInverse(3, 7, 0.05).x.toPrecision(12); // => '0.0977468134393'
 * incompleteBetaInverse(0.5, 4, Probability.fromLog(-1000)).logX.toPrecision(12); // => '-2001.56551868'
 * ```
 */
export function incompleteBetaInverse(a: number, b: number, p: number | Probability): BetaPoint {
  const fn = 'incompleteBetaInverse';
  checkNumber(fn, 'a', a, SMALLEST_SHAPE, LARGEST_SHAPE);
  checkNumber(fn, 'b', b, SMALLEST_SHAPE, LARGEST_SHAPE);
  checkProbability(fn, 'p', p);
  if (typeof p === 'number') {
    return p <= 0.5
      ? inverseOfTail(a, b, p, Math.log(p), true)
      : inverseOfTail(a, b, 1 - p, Math.log(1 - p), false);
  }
  return p.log <= p.logComplement
    ? inverseOfTail(a, b, p.value, p.log, true)
    : inverseOfTail(a, b, p.complement, p.logComplement, false);
}

/** The point whose lower (or upper) tail, at most 1/2, is given as a number and as a logarithm. */
function inverseOfTail(
  a: number,
  b: number,
  tail: number,
  logTail: number,
  lower: boolean,
): BetaPoint {
  const out = new Float64Array(POINT_SLOTS);
  if (lower) incompleteBetaInverseKernel(a, b, tail, logTail, out);
  else incompleteBetaInverseKernel(b, a, tail, logTail, out);
  const x = out[lower ? 0 : 1] as number;
  const y = out[lower ? 1 : 0] as number;
  const logX = out[lower ? 2 : 3] as number;
  const logY = out[lower ? 3 : 2] as number;
  return { x, y, logX, logY };
}

/** Slots of a point: x, y, log x, log y. */
export const POINT_SLOTS = 4;

/** Halley's iteration has taken at most 9 steps in tails above e^-1e8; then the bracket is halved. */
const NEWTON_STEPS = 40;
const MAX_STEPS = 300;
/** Below this the exponential of a difference of such logarithms is noise. */
const DEEP = -1e8;
/** A tail above this is a normal number, as good as its logarithm at least. */
const SMALLEST_VALUE = 1e-306;
/** A logarithm below this belongs to a number out of the range of normal doubles. */
const UNDERFLOW = -700;

const work = /* @__PURE__ */ new Float64Array(TAIL_SLOTS);

/** Writes the point with I_x(a, b) = tail <= 1/2; the logarithm counts where the tail underflows. */
export function incompleteBetaInverseKernel(
  a: number,
  b: number,
  tail: number,
  logTail: number,
  out: Float64Array,
): void {
  if (logTail === -Infinity) {
    storePoint(0, 1, logTail, 0, out);
    return;
  }
  if (a === b && tail === 0.5) {
    storePoint(0.5, 0.5, -Math.LN2, -Math.LN2, out);
    return;
  }
  // I is close to x^a / (a B) for small x, its complement to y^b / (b B) for small y
  const logPower = (logTail + logShapeTimesBeta(a, b)) / a;
  const negligible = logPower + Math.log(Math.max(1, b));
  if (logPower < UNDERFLOW && negligible < -37) {
    const x = Math.exp(logPower);
    storePoint(x, 1, logPower, -x || 0, out);
    return;
  }
  const logUpper = (log1mExpKernel(logTail) + logShapeTimesBeta(b, a)) / b;
  const negligibleUpper = logUpper + Math.log(Math.max(1, a));
  if (logUpper < UNDERFLOW && negligibleUpper < -37) {
    const y = Math.exp(logUpper);
    storePoint(1, y, -y || 0, logUpper, out);
    return;
  }
  let u: number;
  if (negligible < -0.7) u = logPower - log1mExpKernel(logPower);
  else if (negligibleUpper < -0.7) u = log1mExpKernel(logUpper) - logUpper;
  else u = startingLogit(a, b, logTail);
  solve(a, b, tail, logTail, u, out);
}

/** Halley's iteration from a logit; every step keeps x and y as factors of the last ones. */
function solve(
  a: number,
  b: number,
  tail: number,
  logTail: number,
  start: number,
  out: Float64Array,
): void {
  const nu = a + b;
  const deviation = Math.sqrt((a / nu) * b); // inverse of the spread of the logit
  work[1] = 0;
  const height = betaAmplitude(a, b, work) * Math.exp(work[1]);
  const byValue = tail > SMALLEST_VALUE;
  let u = Number.isNaN(start) ? 0 : start;
  setLogit(u, out);
  let left = -Infinity;
  let right = Infinity;
  let stride = Math.min(Math.max(1 / deviation, RESOLUTION), 4);
  for (let step = 0; step < MAX_STEPS; step++) {
    const x = out[0] as number;
    const y = out[1] as number;
    const given = incompleteBetaKernel(a, b, x, y, work);
    const value = work[0] as number;
    const log = given ? (work[1] as number) : Math.log1p(-value);
    const difference = ((given ? value : 1 - value) - tail) / tail;
    const excess = byValue && Math.abs(difference) < 0.5 ? Math.log1p(difference) : log - logTail;
    betaDelta(a, b, x, y, work);
    const delta = work[0] as number;
    const deviance = betaDeviance(a, b, x, y, delta, work[1] as number, work);
    if (excess > 0) right = Math.min(right, u);
    else left = Math.max(left, u);
    let du: number;
    if (log < DEEP) {
      // F' is -delta there; Newton's step for the square root of the logarithm
      const root = Math.sqrt(log / logTail);
      du = ((excess / delta) * 2 * root) / (1 + root);
      if (Math.abs(du) < RESOLUTION) {
        move(u, du, out);
        return;
      }
    } else {
      const slope = Math.exp(deviance - log) * height;
      const h = excess / slope;
      const bend = h * (-delta - slope);
      const denominator = 1 - 0.5 * bend;
      du = denominator < 0.3 ? -h : -h / denominator;
      // the error after a cubic step, or a step that x and y cannot take
      if (Math.abs(h) * Math.max(1, slope, deviation) < 1e-5 || Math.abs(h) < RESOLUTION) {
        move(u, du, out);
        return;
      }
      if (!(Math.abs(bend) < 1) && excess > 0) {
        // on the flat side the slope says little
        du = -stride;
        stride *= 2;
      }
    }
    if (!(u + du > left && u + du < right) || step > NEWTON_STEPS) {
      if (right - left < Infinity) {
        du = left + 0.5 * (right - left) - u;
        if (Math.abs(du) < RESOLUTION * Math.max(1, Math.abs(u))) {
          move(u, du, out);
          return;
        }
      } else {
        du = excess > 0 ? -stride : stride;
        stride *= 2;
      }
    }
    move(u, du, out);
    u += du;
  }
  throw new Error(
    `inverse of the incomplete beta function at a = ${a}, b = ${b}: logit between ${left} and ${right}`,
  );
}

/** Relative change of x or y that is lost in rounding. */
const RESOLUTION = 3e-16;

function setLogit(u: number, out: Float64Array): void {
  const e = Math.exp(-Math.abs(u));
  const smaller = e / (1 + e);
  const logSmaller = e > 1e-300 ? Math.log(smaller) : -Math.abs(u);
  const logLarger = Math.log1p(-smaller) || 0;
  if (u < 0) storePoint(smaller, 1 - smaller, logSmaller, logLarger, out);
  else storePoint(1 - smaller, smaller, logLarger, logSmaller, out);
}

/** Moves the point from logit u to u + du. */
function move(u: number, du: number, out: Float64Array): void {
  if (Math.abs(du) > 1) {
    setLogit(u + du, out);
    return;
  }
  const x = out[0] as number;
  const y = out[1] as number;
  const growth = Math.expm1(du);
  const divisor = 1 + x * growth;
  const newX = (x + x * growth) / divisor;
  const newY = y / divisor;
  if (newX <= newY) {
    const logX = newX > 1e-300 ? Math.log(newX) : u + du;
    storePoint(newX, 1 - newX, logX, Math.log1p(-newX) || 0, out);
  } else {
    const logY = newY > 1e-300 ? Math.log(newY) : -u - du;
    storePoint(1 - newY, newY, Math.log1p(-newY) || 0, logY, out);
  }
}

function storePoint(x: number, y: number, logX: number, logY: number, out: Float64Array): void {
  out[0] = x;
  out[1] = y;
  out[2] = logX;
  out[3] = logY;
}

/** log(a B(a, b)). */
function logShapeTimesBeta(a: number, b: number): number {
  return a < 1
    ? logGamma1pKernel(a) - logGammaRatioKernel(b, a)
    : Math.log(a) + logBetaKernel(a, b);
}

/** A logit near the solution where neither power law holds. */
function startingLogit(a: number, b: number, logTail: number): number {
  if (Math.min(a, b) >= 0.5) return cubeRootStart(a, b, logTail);
  if (Math.max(a, b) <= 1) return Math.log(a / b);
  // the smaller shape alone matters: -log x or -log y is nearly a gamma variable
  if (a < b)
    return Math.log(Math.expm1(gammaInverseOfLog(a, logTail, false) / (b + 0.5 * (a - 1))));
  return -Math.log(Math.expm1(gammaInverseOfLog(b, logTail, true) / (a + 0.5 * (b - 1))));
}

/**
 * From the normal law of cube roots: with w^3 = (x/a)/(y/b), c = 1/(9 a), d = 1/(9 b),
 * ((1 - d) w - (1 - c))^2 = z^2 (d w^2 + c).
 */
function cubeRootStart(a: number, b: number, logTail: number): number {
  const z = normalQuantileOfLog(logTail);
  const c = 1 / (9 * a);
  const d = 1 / (9 * b);
  const constant = (1 - c) * (1 - c) - z * z * c;
  const centre = Math.log(a / b);
  if (!(constant > 0)) return centre;
  const square = (1 - d) * (1 - d) - z * z * d;
  const half = (1 - c) * (1 - d);
  const w = constant / (half + Math.sqrt(Math.max(0, half * half - square * constant)));
  return centre + 3 * Math.log(w);
}
