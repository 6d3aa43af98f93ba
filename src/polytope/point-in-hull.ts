/**
 * Whether given queries interpolate: membership of fixed points in the hull of a Gaussian sample.
 */
import { wendel } from '../conic/wendel.ts';
import { type Count, type ResolvedCount, resolveCount } from '../count.ts';
import { checkFinite, checkInteger, checkOptions, DomainError } from '../domain.ts';
import { FixedQuerySequence } from '../numeric/fixed-query.ts';
import { paritySplit } from '../numeric/parity-split.ts';
import { complementError, errorShare } from '../numeric/stated-error.ts';
import { certainty, complementOf, Probability, probabilityFromTail } from '../probability.ts';
import { logSumExpKernel } from '../special/log-domain.ts';
import { logNormalCdfKernel } from '../special/normal.ts';

/** Arguments of {@link pointInHull}. */
export interface PointInHullArgs {
  /** Number of points: an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 1 to 1000. */
  readonly d: number;
  /** Distance of the query from the true mean, in units of the true covariance: a number from 0 to 1e6. */
  readonly mahalanobisDistance: number;
}

/** Arguments of {@link queriesInHull}. */
export interface QueriesInHullArgs {
  /** Number of points: an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 1 to 1000. */
  readonly d: number;
  /** Distances of the queries from the true mean, in units of the true covariance: numbers from 0 to 1e6, at least one. */
  readonly mahalanobisDistances: ArrayLike<number>;
}

/** Largest dimension: beyond it the integrals over the sphere have not been checked. */
const MAX_QUERY_DIMENSION = 1000;
const MAX_DISTANCE = 1e6;
/** Beyond this log of n Q(r) the tail is below every double's logarithm. */
const UNREACHABLE = 705;

/**
 * The probability that a given query, at a given Mahalanobis distance from the mean, lies in the convex
 * hull of n Gaussian points in R^d: does this query interpolate?
 *
 * $$ P(x \notin P_n) = 2 \sum_{j \ge 0} B_{d-1-2j}(r), \qquad r = |\Sigma^{-1/2} (x - \mu)|, $$
 *
 * with positive terms that do not depend on d, integrals over the coordinate of the points along the
 * query. The average over a query of any law independent of the sample is the integral over the law
 * of its distance; over chi with d degrees of freedom it is {@link nextPointInHull}.
 *
 * Assumptions: independent Gaussian points with one covariance; the distance is taken with the TRUE
 * mean and covariance. A distance computed with the sample's own mean and covariance is smaller for
 * points of that sample and larger for new ones, more so the larger d/n; there is no formula for it
 * here, and the number is an approximation then.
 *
 * @param args - `n`: an integer >= 0, a double above 2^53 or a `LogNumber`; `d`: an integer from 1 to 1000;
 *   `mahalanobisDistance`: a number from 0 to 1e6
 * @returns the probability; exactly 0 for n <= d; at distance 0 that of {@link originInHull}
 * @remarks Cost: 2 to 20 ms at d = 10, up to 50 ms at d = 500; less for the next query at a like distance,
 *   whatever its n and d. Error of the logarithm of the smaller tail, measured: 2e-14 for d <= 100. The number holds under the stated assumptions; it does not replace
 *   a safety review.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: Absorption probabilities for Gaussian polytopes and regular spherical simplices, Advances
 * in Applied Probability 52 (2020), arXiv:1704.04968, which has the number as an inverse Laplace
 * transform; the integral here is the same conditioned on one coordinate.
 *
 * @example
 * ```ts
 * import { pointInHull } from 'hullgauge';
 * `${pointInHull({ n: 1000, d: 10, mahalanobisDistance: 2 })}`; // => '0.999997373629'
 * `${pointInHull({ n: 1000, d: 10, mahalanobisDistance: 4 })}`; // => '9.95197655815e-7'
 * ```
 */
export function pointInHull(args: PointInHullArgs): Probability {
  const fn = 'pointInHull';
  checkOptions(fn, args, ['n', 'd', 'mahalanobisDistance']);
  const { d, mahalanobisDistance } = args;
  const count = resolveCount(fn, 'n', args.n);
  checkInteger(fn, 'd', d, 1, MAX_QUERY_DIMENSION);
  checkFinite(fn, 'mahalanobisDistance', mahalanobisDistance, 0, MAX_DISTANCE);
  return membership(count, d, mahalanobisDistance);
}

/**
 * The expected share of given queries that lie in the convex hull of n Gaussian points in R^d: the mean
 * of {@link pointInHull} over their Mahalanobis distances.
 *
 * Assumptions as there. The mean is right however the queries depend on each other, as long as they
 * are independent of the sample.
 *
 * @param args - `n` and `d`, as for {@link pointInHull}; `mahalanobisDistances`: at least one number from 0
 *   to 1e6
 * @returns the mean probability, both tails averaged by themselves
 * @remarks Cost: one {@link pointInHull} per different distance. Accuracy, caution and source are there.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, or the list
 *   is empty
 *
 * @example
 * ```ts
 * import { queriesInHull } from 'hullgauge';
 * `${queriesInHull({ n: 1000, d: 10, mahalanobisDistances: [1, 2, 3, 4] })}`; // => '0.505402566258'
 * ```
 */
export function queriesInHull(args: QueriesInHullArgs): Probability {
  const fn = 'queriesInHull';
  checkOptions(fn, args, ['n', 'd', 'mahalanobisDistances']);
  const { d, mahalanobisDistances } = args;
  const count = resolveCount(fn, 'n', args.n);
  checkInteger(fn, 'd', d, 1, MAX_QUERY_DIMENSION);
  const length: unknown =
    typeof mahalanobisDistances === 'object' && mahalanobisDistances !== null
      ? mahalanobisDistances.length
      : undefined;
  if (typeof length !== 'number' || !(length >= 1)) {
    const requirement = 'an array of at least one number';
    throw new DomainError(fn, 'mahalanobisDistances', requirement, mahalanobisDistances);
  }
  const seen = new Map<number, Probability>();
  const all: Probability[] = [];
  for (let i = 0; i < length; i++) {
    const distance = mahalanobisDistances[i];
    checkFinite(fn, `mahalanobisDistances[${i}]`, distance, 0, MAX_DISTANCE);
    const probability = seen.get(distance) ?? membership(count, d, distance);
    seen.set(distance, probability);
    all.push(probability);
  }
  // of equal queries the mean is each of them, with ties kept
  return seen.size === 1 ? (all[0] as Probability) : mean(all);
}

function membership(count: ResolvedCount, d: number, r: number): Probability {
  const { n, log } = count;
  if (r === 0) return wendel(n, d);
  if (n <= d) return certainty(false);
  if (log + logNormalCdfKernel(-r) > UNREACHABLE) {
    return probabilityFromTail(0, Number.NEGATIVE_INFINITY, 'upper', Number.POSITIVE_INFINITY);
  }
  const sequence = new FixedQuerySequence(n, log, r);
  const slope = (k: number): number => sequence.slope(k);
  return paritySplit((k, error) => sequence.logTerm(k, error), d, 0, n, slope);
}

/** The mean of probabilities, each tail averaged by itself. */
function mean(all: readonly Probability[]): Probability {
  const size = Math.log(all.length);
  const log = Math.min(0, logSumExpKernel(all.map((p) => p.log)) - size);
  const logComplement = Math.min(0, logSumExpKernel(all.map((p) => p.logComplement)) - size);
  const lower = log <= logComplement;
  let value = 0;
  let complement = 0;
  let error = 0;
  for (const p of all) {
    value += p.value / all.length;
    complement += p.complement / all.length;
    const tail = lower ? complementOf(p) : p;
    const sum = (lower ? log : logComplement) + size;
    error += errorShare(tail.logComplement, complementError(tail), sum);
  }
  return new Probability(
    value,
    complement,
    log,
    logComplement,
    error + 2 ** -52 * (4 + all.length),
  );
}
