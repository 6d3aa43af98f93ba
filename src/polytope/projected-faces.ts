/**
 * Faces of random projections of regular polytopes, and which of them survive.
 */

import { wendel } from '../conic/wendel.ts';
import { checkChoice, checkInteger, checkOptions } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { LogNumber } from '../log-number.ts';
import { complementError, sumOfLogs } from '../numeric/stated-error.ts';
import { certainty, complementOf, type Probability } from '../probability.ts';
import { MAX_FACE_DIMENSION } from './face-options.ts';
import { faceLoss, logChoices } from './gaussian-faces.ts';

/** Arguments of {@link projectedFaces}. */
export interface ProjectedFacesArgs {
  /** The polytope in R^n: conv(e_1, .., e_n), conv(0, e_1, .., e_n), conv(+-e_1, .., +-e_n) or [0, 1]^n. */
  readonly polytope: ProjectedPolytope;
  /** Dimension of the space in which the polytope lies: an integer from 1 to 2^53 - 1. */
  readonly n: number;
  /** Dimension onto which it is projected: an integer from 1 to n, at most 10000 for all but the cube. */
  readonly d: number;
  /** Dimension of the faces: an integer from 0 to n - 1. */
  readonly k: number;
}

/** A polytope that {@link projectedFaces} projects. */
export type ProjectedPolytope = 'simplex' | 'simplexWithOrigin' | 'crosspolytope' | 'cube';

/** What {@link projectedFaces} returns. */
export interface ProjectedFaces {
  /** Expected number of k-dimensional faces of the projection. */
  readonly expected: LogNumber;
  /** Probability that a given k-face of the polytope projects onto a face of the projection. */
  readonly survival: Probability;
}

/**
 * The probability that a face of a regular polytope survives a uniformly random projection from R^n to
 * R^d, and the expected number of faces of the projection: also the probability that a sparse vector
 * is recovered from d random measurements.
 *
 * The face survives if the kernel of the projection meets the cone of its descent directions only in
 * 0, which by the conic Crofton formula has the probability
 *
 * $$ P = 2 \sum_{j \ge 0} \upsilon_{d-1-2j}, $$
 *
 * $\upsilon_i$ the conic intrinsic volumes of that cone, integrals over equicorrelated orthants. For the
 * cube it is $P(\mathrm{Bin}(n-k-1, \tfrac12) \le d-k-1)$, whatever the law of the matrix, as long as
 * flipping the signs of its columns does not change it.
 *
 * Minimising the l1 norm recovers a vector with s non-zeros from d Gaussian measurements with the
 * survival probability of 'crosspolytope' at k = s - 1; with known signs (x >= 0) that of
 * 'simplexWithOrigin'. A vector of the cube with k free coordinates is the only one with its
 * measurements with the survival probability of 'cube'.
 *
 * Assumptions: the kernel of the projection is a uniformly random subspace, as that of a Gaussian matrix.
 * For a designed matrix the number is an orientation, nothing is proved.
 *
 * @param args - `polytope`: one of the four; `n`: an integer from 1 to 2^53 - 1; `d`: an integer from 1 to n, at
 *   most 10000 but for the cube; `k`: an integer from 0 to n - 1; for 'simplexWithOrigin' `survival` is that of the faces
 *   without the origin, and `expected` counts the faces of both kinds
 * @returns `expected` and `survival`; survival is 1 for d = n and 0 for k >= d
 * @remarks Cost: a few to a few hundred terms, 0.1 to 20 ms. Error of the logarithm of the smaller
 *   tail, measured: 3e-14 up to n = 400.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: Random projections of regular simplices, Discrete & Computational Geometry 7 (1992)
 * 219-226, doi:10.1007/BF02187839; Counting faces of randomly projected polytopes when the projection
 * radically lowers dimension, Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364; Counting the
 * faces of randomly-projected hypercubes and orthants, with applications, Discrete & Computational
 * Geometry 43 (2010), arXiv:0807.3590.
 *
 * @example
 * ```ts
 * import { projectedFaces } from 'hullgauge';
 * const { survival } = projectedFaces({ polytope: 'crosspolytope', n: 40, d: 20, k: 4 });
 * `${survival}`; // => '0.956461246006'
 * `${projectedFaces({ polytope: 'cube', n: 200, d: 120, k: 40 }).survival}`; // => '0.5'
 * ```
 */
export function projectedFaces(args: ProjectedFacesArgs): ProjectedFaces {
  const fn = 'projectedFaces';
  checkOptions(fn, args, ['polytope', 'n', 'd', 'k']);
  const { polytope, n, d, k } = args;
  checkChoice(fn, 'polytope', polytope, ['simplex', 'simplexWithOrigin', 'crosspolytope', 'cube']);
  checkInteger(fn, 'n', n, 1);
  checkInteger(fn, 'd', d, 1, polytope === 'cube' ? n : Math.min(n, MAX_FACE_DIMENSION));
  checkInteger(fn, 'k', k, 0, n - 1);
  if (k >= d) {
    // A face of the dimension of the image cannot lie on its boundary.
    const survival = certainty(false);
    return { expected: LogNumber.fromLog(Number.NEGATIVE_INFINITY), survival };
  }
  const error = new Float64Array(1);
  const count = { n, log: Math.log(n) };
  const v = k + 1;
  if (polytope === 'cube') {
    const loss = wendel(n - k, d - k);
    const choices = logChoices(count, k, error) + (n - k) * Math.LN2;
    return result(choices, error[0] as number, loss);
  }
  const choices = logChoices(count, v, error);
  const bound = error[0] as number;
  if (polytope === 'simplex') return result(choices, bound, faceLoss(count, d, v, 'plain'));
  if (polytope === 'crosspolytope') {
    return result(choices + v * Math.LN2, bound, faceLoss(count, d, v, 'symmetric'));
  }
  const { expected, survival } = result(choices, bound, faceLoss(count, d, v, 'withCentre'));
  const central = result(logChoices(count, k, error), error[0] as number, wendel(n - k, d - k));
  const { log, logError } = central.expected;
  return { expected: sumOfLogs(expected.log, expected.logError, log, logError), survival };
}

/** Number of faces times the share that survives. */
function result(logCount: number, bound: number, loss: Probability): ProjectedFaces {
  const survival = complementOf(loss);
  if (survival.value === 0 && survival.log === Number.NEGATIVE_INFINITY) {
    return { expected: LogNumber.fromLog(Number.NEGATIVE_INFINITY), survival };
  }
  const logError = bound + complementError(loss) + EPSILON * (1 + logCount);
  return { expected: LogNumber.fromLog(logCount + survival.log, logError), survival };
}
