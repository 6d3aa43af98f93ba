/**
 * Expected numbers of vertices and faces of hulls of random points.
 */

import { wendel } from '../conic/wendel.ts';
import { type Count, resolveCount } from '../count.ts';
import { checkInteger, checkOptions } from '../domain.ts';
import type { Law } from '../law.ts';
import { LogNumber } from '../log-number.ts';
import { complementError, sumOfLogs } from '../numeric/stated-error.ts';
import { logBetaFaces } from './beta-faces.ts';
import { checkFaceDimension, checkFaceLaw } from './face-options.ts';
import { expectedFacetsKernel, resolveFacetLaw } from './facets.ts';
import { logChoices, logGaussianFaces } from './gaussian-faces.ts';
import { type Hull, resolveHull } from './hull-options.ts';

/** Arguments of {@link expectedVertices}. */
export interface ExpectedVerticesArgs {
  /** Number of points (of pairs, where the hull is symmetric): an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 1 to 10000. */
  readonly d: number;
  /** Law of the points. */
  readonly law: Law;
  /** Hull of the points ('plain', the default), of the points and their mirror images ('symmetric'), or of the points and their centre ('withCentre'). The last two are for the Gaussian law, for the vertices of the uniform ball and sphere, and for facets. */
  readonly hull?: Hull | undefined;
}

/** Arguments of {@link expectedFaces}. */
export interface ExpectedFacesArgs extends ExpectedVerticesArgs {
  /** Dimension of the faces: an integer from 0 (vertices) to d - 1 (facets). */
  readonly k: number;
}

/**
 * The expected number of k-dimensional faces of the convex hull of n random points in R^d, for
 * Gaussian points of any mean and covariance, and for ball, sphere, beta, beta-prime and t laws.
 *
 * For Gaussian points, with $v = k + 1$ vertices to a face, and the internal angle $\beta$ and the
 * external angle $\gamma$ of regular simplices with so many vertices,
 *
 * $$ E f_k = 2 \sum_{m = d, d-2, \dots \ge v} \binom nm \binom mv\, \beta(T_v, T_m)\, \gamma(T_m, T_n); $$
 *
 * the other laws have the same sum with the expected angles of beta simplices. Faces do not change
 * under invertible affine maps, so mean and covariance do not matter.
 *
 * Assumptions: independent points of one of these laws. For facets {@link expectedFacets} integrates
 * directly, and answers here too for the hulls that the sum does not. With `hull: 'symmetric'` the
 * points are $\pm X_1, \dots, \pm X_n$; with 'withCentre' the faces through the centre count, where it
 * is a vertex.
 *
 * @param args - `n`: an integer >= 0, a double above 2^53 or a `LogNumber`; `d`: an integer from 1 to 10000;
 *   `k`: an integer from 0 to d - 1; `law`: any law, beta-prime and t laws with at least 1/2 degree of
 *   freedom (2b - d); `hull`: `'plain'`, and `'symmetric'` or `'withCentre'` for the Gaussian law, for the
 *   vertices of the uniform ball and sphere, and for the facets of any law
 * @returns the number; 0 where there are too few points for a face, binomial(n, k + 1) for n <= d + 1
 * @remarks Cost: one angle a term, at most d/2 terms; 0.1 to 10 ms up to d = 1000. Error of the
 *   logarithm, measured: 3e-14 for d <= 100, 2e-13 for d <= 500.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, or if there
 *   is no formula for the combination
 *
 * Source: Random projections of regular simplices, Discrete & Computational Geometry 7 (1992)
 * 219-226, doi:10.1007/BF02187839; Angles of random simplices and face numbers of random polytopes,
 * Advances in Mathematics 380 (2021), arXiv:1909.13335.
 *
 * @example
 * ```ts
 * import { expectedFaces, gaussian, uniformSphere } from 'hullgauge';
 * `${expectedFaces({ n: 20, d: 4, k: 1, law: gaussian() })}`; // => '70.6963937351'
 * expectedFaces({ n: 10, d: 3, k: 1, law: uniformSphere() }).value; // => 24
 * ```
 */
export function expectedFaces(args: ExpectedFacesArgs): LogNumber {
  const fn = 'expectedFaces';
  checkOptions(fn, args, ['n', 'd', 'k', 'law', 'hull']);
  checkFaceDimension(fn, args.d);
  checkInteger(fn, 'k', args.k, 0, args.d - 1);
  return faces(fn, args, args.k);
}

/**
 * The expected number of vertices of the convex hull of n random points in R^d: how many of the points
 * are extreme, for Gaussian points of any mean and covariance, and for ball, sphere, beta, beta-prime
 * and t laws.
 *
 * $$ E f_0(P_n) = n\, P(X_n \notin \operatorname{conv}\lbrace X_1, \dots, X_{n-1}\rbrace), $$
 *
 * so it is n times the complement of {@link nextPointInHull} at n - 1 points. It is
 * {@link expectedFaces} with k = 0; formula, assumptions, accuracy and sources are there.
 *
 * @param args - `n`, `d`, `law` and `hull`, as for {@link expectedFaces}
 * @returns the number; exactly n for n <= d + 1 and for the sphere in two or more dimensions
 * @remarks Cost and accuracy as {@link expectedFaces}.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, or if there
 *   is no formula for the combination
 *
 * @example
 * ```ts
 * import { expectedVertices, gaussian, uniformBall } from 'hullgauge';
 * `${expectedVertices({ n: 1000, d: 10, law: gaussian() })}`; // => '737.283623149'
 * `${expectedVertices({ n: 20, d: 3, law: uniformBall() })}`; // => '14.543366153'
 * ```
 */
export function expectedVertices(args: ExpectedVerticesArgs): LogNumber {
  const fn = 'expectedVertices';
  checkOptions(fn, args, ['n', 'd', 'law', 'hull']);
  checkFaceDimension(fn, args.d);
  return faces(fn, args, 0);
}

function faces(fn: string, args: ExpectedVerticesArgs, k: number): LogNumber {
  const { d } = args;
  const count = resolveCount(fn, 'n', args.n);
  if (k === d - 1 && resolveHull(fn, args.hull) !== 'plain') {
    const law = resolveFacetLaw(fn, args.law, d);
    const hull = args.hull as Hull;
    if (law.family !== 'gaussian') return expectedFacetsKernel(law, d, count, hull);
  }
  const { law, hull } = checkFaceLaw(fn, args.law, args.hull, d, k === 0);
  const error = new Float64Array(1);
  const log =
    law.family === 'gaussian'
      ? logGaussianFaces(count, d, k + 1, hull, error)
      : logBetaFaces(count, d, k + 1, law, hull, error);
  if (hull !== 'withCentre' || count.n < k) return LogNumber.fromLog(log, error[0]);
  // The faces through the centre: spanned with k points, they are faces of the cone of the points.
  const bound = error[0] as number;
  const loss = wendel(count.n - k, d - k);
  const central = logChoices(count, k, error) + loss.logComplement;
  return sumOfLogs(log, bound, central, (error[0] as number) + complementError(loss));
}
