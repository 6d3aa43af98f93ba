/**
 * Interpolation or extrapolation: the probability that the next point falls inside the hull.
 */

import { type Count, resolveCount } from '../count.ts';
import { checkFinite, checkOptions, DomainError } from '../domain.ts';
import { gaussian, type Law } from '../law.ts';
import type { Probability } from '../probability.ts';
import { betaMembership } from './beta-faces.ts';
import { checkFaceDimension, checkFaceLaw } from './face-options.ts';
import { centreMembership, gaussianMembership } from './gaussian-faces.ts';
import type { Hull } from './hull-options.ts';

/** Arguments of {@link nextPointInHull}. */
export interface NextPointInHullArgs {
  /** Number of points (of pairs, where the hull is symmetric): an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 1 to 10000. */
  readonly d: number;
  /** Law of the points and of the next one; Gaussian if left out. */
  readonly law?: Law | undefined;
  /** Standard deviation of the query over that of the points: from 0 to 1e100; 1 if left out. Other laws than the Gaussian take 0 and 1. */
  readonly queryScale?: number | undefined;
  /** Hull of the points ('plain', the default), of the points and their mirror images ('symmetric'), or of the points and their centre ('withCentre'). The last two are for the Gaussian law, the uniform ball and the sphere. */
  readonly hull?: Hull | undefined;
}

/** Beyond this scale 1/scale^2 leaves the range in which the integrals keep their digits. */
const LARGEST_SCALE = 1e100;
/** Below this scale the query is the centre, unless there are more points than this. */
const LEAST_SCALE = 1e-140;
const FEW_POINTS = 1e100;

/**
 * The probability that the next point interpolates: that it falls inside the convex hull of the n
 * points before it, for Gaussian points of any mean and covariance, and for ball, sphere, beta,
 * beta-prime and t laws.
 *
 * For Gaussian points and a query drawn with $\sigma$ = `queryScale` times their standard deviation,
 * with $\kappa = 1/\sigma^2$ and $g_k(r)$ the probability that $k$ normal variables of variance
 * $1 + r$ and covariance $r$ are all negative,
 *
 * $$ P(\sigma X \notin P_n) = 2 \sum_{j \ge 0} b_{n,\,d-1-2j}, \qquad
 *    b_{n,k} = \binom nk\, g_k\!\left(\tfrac{-1}{k+\kappa}\right) g_{n-k}\!\left(\tfrac{1}{k+\kappa}\right). $$
 *
 * For the other laws $P(X_{n+1} \notin P_n) = E f_0(P_{n+1})/(n+1)$, with the expected number of
 * vertices of {@link expectedVertices}; for the uniform ball it is the share of the ball that
 * {@link hullVolumeRatio} gives. Scale 0 asks for the centre itself, which any symmetric law
 * answers like {@link originInHull}.
 *
 * Assumptions: points and query are independent, and the query has the law of the points (times the
 * scale, about the same centre). Membership does not change under invertible affine maps, so the mean
 * and covariance need not be known, and a singular covariance of rank r means d = r. For points that
 * share one random scale with the query (the dependent elliptical model) the Gaussian number holds.
 * It is optimistic when the query comes from a shifted or wider law than the sample.
 *
 * @param args - `n`: an integer >= 0, a double above 2^53 or a `LogNumber`; `d`: an integer from 1 to 10000;
 *   `law`: any law, beta-prime and t laws with at least 1/2 degree of freedom (2b - d), Gaussian if left
 *   out; `queryScale`: a number from 0 to 1e100, for other laws than the Gaussian 0 or 1, 1 if left out;
 *   `hull`: `'plain'`, for the Gaussian law, the uniform ball and the sphere also `'symmetric'` or `'withCentre'`
 * @returns the probability; exactly 0 for n <= d (plain hull) and for the sphere in two or more
 *   dimensions
 * @remarks Cost grows with the number of terms that matter, a few to a few hundred: 0.1 to 2 ms for
 *   Gaussian points, up to d = 1000 and any n, and ten times that for the other laws (0.1 ms for the
 *   uniform ball). Error of the logarithm of the smaller tail, measured against 25-digit values: 1e-13
 *   for d <= 100, 2e-13 for d <= 500. The number holds under the stated assumptions; it does not
 *   replace a safety review.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, or if there
 *   is no formula for the combination
 *
 * Source: Absorption probabilities for Gaussian polytopes and regular spherical simplices, Advances
 * in Applied Probability 52 (2020), arXiv:1704.04968; Angles of random simplices and face numbers of
 * random polytopes, Advances in Mathematics 380 (2021), arXiv:1909.13335.
 *
 * @example
 * ```ts
 * import { nextPointInHull, smallest, studentT } from 'hullgauge';
 * `${nextPointInHull({ n: 1000, d: 6 })}`; // => '0.73160238952'
 * `${nextPointInHull({ n: 1000, d: 6, law: studentT({ degreesOfFreedom: 3 }) })}`; // => '0.937771058208'
 * nextPointInHull({ n: 1e6, d: 500 }).log.toPrecision(12); // => '-678.341436331'
 * smallest(nextPointInHull, 'n', { d: 6 }, 0.5).value; // => 278
 * ```
 */
export function nextPointInHull(args: NextPointInHullArgs): Probability {
  const fn = 'nextPointInHull';
  checkOptions(fn, args, ['n', 'd', 'law', 'queryScale', 'hull']);
  const { d, queryScale = 1 } = args;
  const count = resolveCount(fn, 'n', args.n);
  checkFaceDimension(fn, d);
  const { law, hull } = checkFaceLaw(
    fn,
    args.law === undefined ? gaussian() : args.law,
    args.hull,
    d,
    true,
  );
  checkFinite(fn, 'queryScale', queryScale, 0, LARGEST_SCALE);
  const tiny = queryScale > 0 && queryScale < LEAST_SCALE;
  if (tiny && count.n > FEW_POINTS) {
    const requirement = `0 or a number from ${LEAST_SCALE} up for so many points`;
    throw new DomainError(fn, 'queryScale', requirement, queryScale);
  }
  if (law.family === 'gaussian') return gaussianMembership(count, d, tiny ? 0 : queryScale, hull);
  if (queryScale === 0) return centreMembership(count, d, hull);
  if (queryScale !== 1) {
    const requirement = '0 or 1 for this law (no formula for other scales)';
    throw new DomainError(fn, 'queryScale', requirement, queryScale);
  }
  return betaMembership(count, d, law, hull);
}
