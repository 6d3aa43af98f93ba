/**
 * Exceedance probabilities of the Hausdorff distance between the unit ball and the hull of random points.
 */

import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { RULE_POINTS, ruleNode, ruleWeight } from '../numeric/gauss-legendre.ts';
import { largestSpacingTail } from '../numeric/largest-spacing.ts';
import { type Probability, probabilityFromTail } from '../probability.ts';
import { logEulerCharacteristic } from './euler-characteristic.ts';
import { type LogBound, logOutside, logUpperBound } from './hole-bounds.ts';

/** Error of log E chi over 1 + |log|; measured: 1e-14 up to d = 200 against 400 digits. */
export const EULER_ERROR = 1e-12;

/** Beyond it the distance below is no double above 0. */
export const DEEPEST = 372;

/** The distance 1 - tanh(s), which keeps its digits where it is small. */
export function distanceAt(s: number): number {
  const q = Math.exp(-2 * s);
  return (2 * q) / (1 + q);
}

/** A probability from its logarithm, by its smaller tail. */
export function probabilityFromBound({ log, error }: LogBound): Probability {
  if (log <= -Math.LN2) return probabilityFromTail(Math.exp(log), log, 'lower', error);
  const complement = -Math.expm1(log) || 0;
  // what is left of 1 by rounding alone may be any number as small
  const unknown = error > 0 ? Number.POSITIVE_INFINITY : 0;
  const scaled = complement > 0 ? (error * Math.exp(log)) / complement : unknown;
  return probabilityFromTail(complement, Math.log(complement), 'upper', scaled);
}

/** log P(d_H > t) for 1 <= t < 2, exact: the empty directions form a convex set. */
export function logDeepExceedance(
  d: number,
  beta: number,
  count: ResolvedCount,
  t: number,
): LogBound {
  const outside = wendel(count.n, d);
  if (t === 1) return logOutside(outside);
  const log = logEulerCharacteristic(d, beta, count, 2 - t, true);
  const error = EPSILON * (8 * d + 8 * Math.abs(log) + 2 * Math.abs(count.log));
  return { log: Math.min(log, outside.logComplement, 0), error };
}

/** The uniform law on the circle: the exact P(d_H > t), or null beyond doubles. */
export function circleExceedance(count: ResolvedCount, t: number): Probability | null {
  if (!(count.n < Number.POSITIVE_INFINITY)) return null;
  // an empty arc of twice the angle arccos(1 - t)
  const share = (2 * Math.asin(Math.sqrt(t / 2))) / Math.PI;
  const rest = (2 * Math.asin(Math.sqrt(1 - t / 2))) / Math.PI;
  const out = new Float64Array(2);
  const allShort = largestSpacingTail(count.n, share, out, rest);
  const log = out[0] as number;
  // too few points for the circle, or more than doubles can tell
  const known = log === Number.NEGATIVE_INFINITY;
  const rounding = known ? 0 : EPSILON * (4 + 4 * Math.abs(log) + count.n * share);
  const error = (out[1] as number) + rounding;
  return probabilityFromTail(Math.exp(log), log, allShort ? 'upper' : 'lower', error);
}

/** The estimate 1 - exp(-E chi) with the height up to which it is meant. */
export interface HoleEstimate {
  /** 1 - h beyond whose height the characteristic falls again: the probability is 1 there. */
  readonly leastGap: number;
  /** log of the estimate of P(d_H > gap), 0 < gap < 1. */
  log(gap: number): number;
}

/** The estimate for n > d. */
export function holeEstimate(d: number, beta: number, count: ResolvedCount): HoleEstimate {
  const leastGap = gapOfMaximum(d, beta, count);
  const outside = wendel(count.n, d).logComplement;
  return {
    leastGap,
    log: (gap) => {
      if (gap <= leastGap) return 0;
      const logMean = logEulerCharacteristic(d, beta, count, gap, false);
      if (Number.isNaN(logMean)) return outside;
      const log = logMean < -36 ? logMean : Math.log(-Math.expm1(-Math.exp(logMean)));
      return Math.max(log, outside);
    },
  };
}

/**
 * 1 - h at the first maximum of E chi as h grows, by steps in log(n v): from where it is negligible to
 * where it falls. Beyond it E chi counts the holes in a set that covers nearly all directions.
 */
function gapOfMaximum(d: number, beta: number, count: ResolvedCount): number {
  const tail = new BetaTail(beta + (d - 1) / 2);
  const negligible = Math.log(2 * (count.log + d * Math.log(d + 1) + 50));
  let logMean = Math.min(count.log - Math.LN2 - 1e-9, negligible);
  let last = Number.NEGATIVE_INFINITY;
  let gap = 1;
  for (let i = 0; i < 2000; i++) {
    tail.centreAtTail(logMean - count.log, 'line');
    const next = distanceAt(Math.min(tail.s, DEEPEST));
    const value = next < 1 ? logEulerCharacteristic(d, beta, count, next, false) : last;
    if (!(value >= last)) return gap;
    last = value;
    gap = next;
    logMean -= 0.02;
  }
  return gap;
}

/** Integral of the estimate over all distances from 0 to 2: the mean of d_H. */
export function estimatedMean(
  d: number,
  beta: number,
  count: ResolvedCount,
  estimate: HoleEstimate,
): number {
  const start = 0.5 * (Math.log(2 - estimate.leastGap) - Math.log(estimate.leastGap));
  const steepness = beta + (d + 1) / 2;
  let total = estimate.leastGap;
  let from = start;
  for (let s = start; s > 0; s = from) {
    // the tail of a coordinate falls by a factor over 1/steepness near the sphere, and as a normal one inside
    const slope = steepness * Math.min(1, Math.max(Math.tanh(s), 1 / Math.sqrt(steepness)));
    from = Math.max(0, s - 0.12 / slope);
    let piece = 0;
    for (let i = 0; i < RULE_POINTS; i++) {
      const node = ruleNode(i, from, s);
      const cosh = Math.cosh(node);
      piece += (ruleWeight(i, from, s) * Math.exp(estimate.log(distanceAt(node)))) / (cosh * cosh);
    }
    total += piece;
    if (piece <= 1e-13 * total) return total;
  }
  for (let i = 0; i < RULE_POINTS; i++) {
    const t = ruleNode(i, 1, 2);
    total += ruleWeight(i, 1, 2) * Math.exp(logDeepExceedance(d, beta, count, t).log);
  }
  return total;
}

/** log of the rigorous upper bound of P(d_H > t), 0 < t < 2. */
export function logExceedanceBound(
  d: number,
  beta: number,
  count: ResolvedCount,
  t: number,
  deepIsExact: boolean,
): LogBound {
  if (t < 1) return logUpperBound(d, beta, count, t);
  if (deepIsExact) return logDeepExceedance(d, beta, count, t);
  return logOutside(wendel(count.n, d));
}
