/**
 * Hulls of Gaussian points: membership of a Gaussian query and expected numbers of faces.
 *
 * Both are one statement about the kernel of a Gaussian matrix, which misses a cone with probability
 * 2 (v_(d-1) + v_(d-3) + ..), v_j the conic intrinsic volumes (orthant-sequences.ts). Notation: v is
 * the number of vertices of a face, one more than its dimension.
 */

import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { logFaceTermKernel } from '../numeric/orthant.ts';
import {
  lastOrthantIndex,
  type OrthantSequence,
  orthantSequence,
  orthantSequenceSlope,
} from '../numeric/orthant-sequences.ts';
import { logOutwardSum, paritySplit } from '../numeric/parity-split.ts';
import { complementError } from '../numeric/stated-error.ts';
import { certainty, type Probability } from '../probability.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { stirlingRemainderKernel } from '../special/stirling-remainder.ts';
import type { Hull } from './hull-options.ts';
import { membershipOnLine } from './line.ts';

const LOG_TWO_PI = 1.8378770664093455;

const SEQUENCE = {
  plain: 'simplex',
  symmetric: 'absolute',
  withCentre: 'nonnegative',
} as const satisfies Record<Hull, OrthantSequence>;

/** P(scale times an independent point lies in the hull of n points), scale = 0 or 1e-140 .. 1e100. */
export function gaussianMembership(
  count: ResolvedCount,
  d: number,
  scale: number,
  hull: Hull,
): Probability {
  if (scale === 0) return centreMembership(count, d, hull);
  if (d === 1 && scale === 1 && hull !== 'withCentre') return membershipOnLine(count, hull);
  const sequence = SEQUENCE[hull];
  const parameters = [sequence, count.n, count.log, 1 / scale / scale] as const;
  const slope = orthantSequenceSlope(...parameters);
  const last = lastOrthantIndex(sequence, count.n);
  return paritySplit(orthantSequence(...parameters), d, 0, last, slope);
}

/** P(the centre of a symmetric law lies in the hull of n points). */
export function centreMembership(count: ResolvedCount, d: number, hull: Hull): Probability {
  if (hull === 'plain') return wendel(count.n, d);
  return certainty(hull === 'withCentre' || count.n > 0);
}

/** P(v given points do not span a face of the hull of n >= v points): the complement is survival. */
export function faceLoss(count: ResolvedCount, d: number, v: number, hull: Hull): Probability {
  const sequence = SEQUENCE[hull];
  const M = count.n - v;
  if (M === 0 && sequence === 'simplex') {
    // All points: a simplex, in general position, has no other face of its own dimension.
    return certainty(d < v - 1);
  }
  const logM = M < 1e15 ? Math.log(M) : count.log;
  const term = orthantSequence(sequence, M, logM, v);
  return paritySplit(term, d - v + 1, 0, lastOrthantIndex(sequence, M));
}

/**
 * log of the expected number of faces with v <= d vertices (with 'withCentre': those that do not have
 * the centre as a vertex); writes a bound on its absolute error to `error[0]`.
 */
export function logGaussianFaces(
  count: ResolvedCount,
  d: number,
  v: number,
  hull: Hull,
  error: Float64Array,
): number {
  error[0] = 0;
  // a cross-polytope of v - 1 pairs is itself a face of its dimension
  if (hull === 'symmetric' && count.n === v - 1 && v > 1) return 0;
  if (count.n < v) return Number.NEGATIVE_INFINITY;
  const loss = faceLoss(count, d, v, hull);
  const signs = hull === 'symmetric' ? v * Math.LN2 : 0;
  if (loss.value <= 0.5 || hull === 'withCentre') {
    const choices = logChoices(count, v, error) + signs;
    error[0] = (error[0] as number) + complementError(loss) + EPSILON * choices;
    return choices + loss.logComplement;
  }
  const kind = hull === 'symmetric' ? 'absolute' : 'line';
  const log = logOutwardSum(
    (m, bound) => logFaceTermKernel(count.n, count.log, m, v, kind, bound),
    Math.min(d, d - 2 * Math.ceil((d - count.n) / 2)),
    -2,
    v,
    error,
  );
  return Math.LN2 + log;
}

/** log of the number of ways to choose v out of n, n beyond doubles included. */
export function logChoices(count: ResolvedCount, v: number, error: Float64Array): number {
  const { n, log } = count;
  const choices =
    n < 1e290
      ? logBinomialKernel(n, v)
      : v === 0
        ? 0
        : v * (1 + log - Math.log(v)) -
          stirlingRemainderKernel(v) -
          0.5 * (LOG_TWO_PI + Math.log(v));
  error[0] = v < 2 ? 0.5 * EPSILON * choices : EPSILON * (4 + 2 * choices);
  return choices;
}
