/**
 * How far from the hull of random points a point of the ball can be.
 */
import { type Count, type ResolvedCount, resolveCount } from '../count.ts';
import { checkNumber, checkOptions } from '../domain.ts';
import { type BetaLaw, checkLaw, type Law } from '../law.ts';
import { targetOf } from '../numeric/target.ts';
import { certainty, complementOf, type Probability } from '../probability.ts';
import { checkProbability } from '../special/probability-argument.ts';
import { MAX_EULER_DIMENSION } from './euler-characteristic.ts';
import {
  circleExceedance,
  DEEPEST,
  distanceAt,
  EULER_ERROR,
  estimatedMean,
  type HoleEstimate,
  holeEstimate,
  logDeepExceedance,
  logExceedanceBound,
  probabilityFromBound,
} from './hausdorff-kernel.ts';
import { type LogBound, logLowerBound } from './hole-bounds.ts';
import { checkDimension } from './hull-options.ts';

/** Options of {@link hausdorffDistance}. */
export interface HausdorffDistanceArgs {
  /** Number of points, at least 1. */
  readonly n: Count;
  /** Dimension, from 2 to 500. */
  readonly d: number;
  /** A beta law: `uniformBall()`, `uniformSphere()` or `betaLaw(b)`. */
  readonly law: Law;
}

/** Options of {@link hausdorffWithin}. */
export interface HausdorffWithinArgs {
  /** Number of points, at least 1. */
  readonly n: Count;
  /** Dimension, from 2 to a million. */
  readonly d: number;
  /** The distance, from 0 to 2. */
  readonly distance: number;
  /** A beta law: `uniformBall()`, `uniformSphere()` or `betaLaw(b)`. */
  readonly law: Law;
}

/** What is known of P(d_H > t). */
export interface Exceedance {
  /** Proved lower bound. */
  readonly lower: Probability;
  /** Proved upper bound. */
  readonly upper: Probability;
  /** Estimate between the bounds, by the expected Euler characteristic. */
  readonly approx: Probability;
  /** The exact probability where a formula is known: t >= 1, and points on the circle. */
  readonly exact?: Probability;
}

/** The Hausdorff distance of the ball and the hull, as {@link hausdorffDistance} knows it. */
export interface HausdorffDistance {
  /** Bounds, estimate and, where known, the exact value of P(d_H > t), t from 0 to 2. */
  exceedance(t: number): Exceedance;
  /** A distance that d_H exceeds with probability at most 1 - confidence, by the proved upper bound. */
  guarantee(confidence: number | Probability): number;
  /** Estimate of the mean of d_H. */
  readonly approxMean: number;
}

/**
 * Hausdorff distance $d_H$ of the unit ball and the hull of n random points, for n >= 1 and d from 2 to
 * 500: the largest distance of a point of the ball from the hull, with proved bounds and an estimate.
 *
 * Proved, for $0 < t < 1$, $h = 1 - t$, F and v the distribution function and tail of one coordinate:
 *
 * $$P(d_H > t) \le p\, \mathbb{E}\,\#\lbrace \text{facets of height in } (0, h]\rbrace + P(0 \notin P),$$
 *
 * p the probability that the foot of the perpendicular from 0 lies in its facet; the count first rises
 * with n, and the bound is 1 there. From below the best of the second-moment bound for the uniform measure
 * of empty directions, of disjoint caps, and of $P(0 \notin P)$. For $t \ge 1$, and for points on the circle, the
 * exact probability is known (the largest of n spacings).
 *
 * Checked numerically only: `approx` is $1 - \exp(-\mathbb{E} \chi)$ with the expected Euler characteristic of
 * the empty directions, confined to the bounds. Against simulated hulls (d = 2 to 8, sphere and ball) it was
 * within 0.006 of true exceedance probabilities up to 0.2; it is too low in the upper half of the
 * distribution for small n: 0.73 at a true 0.95 for d = 8 and n = 35. The bounds are a constant factor apart
 * for fixed d, wider for larger d. `approxMean` is the integral of `approx`: 2 to 7 % low
 * against simulated hulls of 20 to 60 points in d = 2 to 4.
 *
 * Assumes independent points of a beta law in a perfect ball. Points that avoid a part of the ball, or depend
 * on each other, come closer to it less often: bound and estimate are then optimistic. They do not replace a
 * safety review.
 *
 * Cost: a few milliseconds for an exceedance, of the order of d^2 steps for the estimate; some tens of
 * milliseconds for a guarantee. Accuracy: the upper bound within its `logError`; the logarithm of the Euler
 * characteristic 1e-14 relative up to d = 200 against 400-digit values.
 *
 * Sources: Coverage processes on spheres and condition numbers for linear programming, Annals of
 * Probability 38 (2010), doi:10.1214/09-AOP489; Living on the edge, Information and Inference 3 (2014), for the
 * kinematic formula; Random secants of a convex body, Journal of Applied Probability 6 (1969).
 *
 * @param args - `n`: an integer >= 1 or a `LogNumber`; `d`: an integer from 2 to 500; `law`: a beta law
 * @returns exceedance probabilities, guarantees and an estimate of the mean
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { hausdorffDistance, uniformSphere } from 'hullgauge';
 * const distance = hausdorffDistance({ n: 400, d: 4, law: uniformSphere() });
 * // how far at most, with 99 % confidence
 * distance.guarantee(0.99).toFixed(3); // => '0.165'
 * const { lower, upper, approx } = distance.exceedance(0.13);
 * [lower, approx, upper].map((p) => p.value.toFixed(2)); // => ['0.04', '0.35', '0.68']
 * ```
 */
export function hausdorffDistance(args: HausdorffDistanceArgs): HausdorffDistance {
  const fn = 'hausdorffDistance';
  checkOptions(fn, args, ['n', 'd', 'law']);
  const { d } = args;
  checkDimension(fn, d, 2, MAX_EULER_DIMENSION);
  const { b: beta } = checkLaw(fn, args.law, ['beta'], d) as BetaLaw;
  const count = resolveCount(fn, 'n', args.n, 1);
  const estimate = count.n > d ? holeEstimate(d, beta, count) : null;
  return Object.freeze({
    exceedance: (t: number): Exceedance => {
      checkNumber('hausdorffDistance.exceedance', 't', t);
      return exceedance(d, beta, count, estimate, t);
    },
    guarantee: (confidence: number | Probability): number => {
      checkProbability('hausdorffDistance.guarantee', 'confidence', confidence);
      return guarantee(d, beta, count, targetOf(confidence));
    },
    approxMean:
      estimate === null
        ? meanWithoutCentre(d, beta, count)
        : estimatedMean(d, beta, count, estimate),
  });
}

/** Mean of d_H for n <= d, where the centre lies outside: 1 and the integral over [1, 2]. */
function meanWithoutCentre(d: number, beta: number, count: ResolvedCount): number {
  return estimatedMean(d, beta, count, { leastGap: 1, log: () => 0 });
}

function exceedance(
  d: number,
  beta: number,
  count: ResolvedCount,
  estimate: HoleEstimate | null,
  t: number,
): Exceedance {
  const known = (p: Probability): Exceedance =>
    Object.freeze({ lower: p, upper: p, approx: p, exact: p });
  if (t <= 0) return known(certainty(true));
  if (t >= 2) return known(certainty(false));
  const circle = d === 2 && beta === -1 ? circleExceedance(count, t) : null;
  if (circle !== null) return known(circle);
  if (t >= 1) return known(probabilityFromBound(logDeepExceedance(d, beta, count, t)));
  if (estimate === null) return known(certainty(true));
  const upper = logExceedanceBound(d, beta, count, t, true);
  const lower = logLowerBound(d, beta, count, t);
  const estimated = estimate.log(t);
  const error = EULER_ERROR * (1 + Math.abs(estimated));
  let middle: LogBound = estimated > lower.log ? { log: estimated, error } : lower;
  if (middle.log >= upper.log) middle = upper;
  return Object.freeze({
    lower: probabilityFromBound({ log: Math.min(lower.log, upper.log), error: lower.error }),
    upper: probabilityFromBound(upper),
    approx: probabilityFromBound(middle),
  });
}

/** Smallest t at which the upper bound is at most 1 - confidence, to 1e-12, on the safe side. */
function guarantee(d: number, beta: number, count: ResolvedCount, confidence: Probability): number {
  const goal = confidence.logComplement;
  if (goal === 0) return 0;
  if (goal === Number.NEGATIVE_INFINITY) return 2;
  const holds = (t: number): boolean => {
    const circle = d === 2 && beta === -1 ? circleExceedance(count, t) : null;
    if (circle !== null) return circle.log <= goal;
    const { log, error } = logExceedanceBound(d, beta, count, t, true);
    return log === Number.NEGATIVE_INFINITY || log + error <= goal;
  };
  if (!holds(1)) return bisect(holds, 1, 2);
  // by the argument atanh(1 - t), so that small distances keep their digits
  let low = 0;
  let high = 1 / Math.sqrt(beta + (d + 1) / 2);
  while (holds(distanceAt(high))) {
    if (high === DEEPEST) return distanceAt(high);
    low = high;
    high = Math.min(2 * high, DEEPEST);
  }
  return distanceAt(-bisect((s) => holds(distanceAt(-s)), -high, -low));
}

/** The least x in (low, high] with a property that holds at high and, once it holds, stays. */
function bisect(holds: (x: number) => boolean, low: number, high: number): number {
  let a = low;
  let b = high;
  for (let i = 0; i < 200 && b - a > 1e-13 * Math.abs(b); i++) {
    const middle = 0.5 * (a + b);
    if (middle === a || middle === b) break;
    if (holds(middle)) b = middle;
    else a = middle;
  }
  return b;
}

/**
 * Probability that no point of the ball is farther than a distance from the hull of n random points, as a
 * proved lower bound, for n >= 1 and d from 2 to a million: the question to size a sample by.
 *
 * One minus the upper bound of {@link hausdorffDistance}; for points on the circle the exact probability. It
 * rises with n and with the distance, and is 0 for the smaller n, for which the bound says nothing.
 * Assumptions and caution are there.
 *
 * Cost: two integrals, about half a millisecond. Accuracy: bounded by `logError`.
 *
 * Sources: as for {@link hausdorffDistance}.
 *
 * @param args - `n`: an integer >= 1 or a `LogNumber`; `d`: an integer from 2 to a million; `distance`: a
 * number from 0 to 2; `law`: a beta law
 * @returns a lower bound of P(d_H <= distance)
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { hausdorffWithin, uniformSphere } from 'hullgauge';
 * hausdorffWithin({ n: 500, d: 3, distance: 0.05, law: uniformSphere() }).value.toFixed(4); // => '0.9781'
 * ```
 */
export function hausdorffWithin(args: HausdorffWithinArgs): Probability {
  const fn = 'hausdorffWithin';
  checkOptions(fn, args, ['n', 'd', 'distance', 'law']);
  const { d, distance } = args;
  checkDimension(fn, d, 2);
  checkNumber(fn, 'distance', distance, 0, 2);
  const law = checkLaw(fn, args.law, ['beta'], d) as BetaLaw;
  const count = resolveCount(fn, 'n', args.n, 1);
  if (distance === 2) return certainty(true);
  if (distance === 0) return certainty(false);
  const circle = d === 2 && law.b === -1 ? circleExceedance(count, distance) : null;
  if (circle !== null) return complementOf(circle);
  const exact = d <= MAX_EULER_DIMENSION;
  return complementOf(probabilityFromBound(logExceedanceBound(d, law.b, count, distance, exact)));
}
