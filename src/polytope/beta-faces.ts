/**
 * Hulls of beta and beta-prime points: membership of the next point and expected numbers of faces.
 *
 * Notation: v is the number of vertices of a face, alpha the parameter of beta-angles.ts. With v <= d,
 *
 *   E f = 2 (T_d + T_(d-2) + ..),  C(n, v) - E f = 2 (T_(d+2) + T_(d+4) + ..),  T_m = I_(n,m) J_(m,v),
 *
 * and the next point is outside the hull of n points with probability E f / (n + 1) at n + 1 points
 * and v = 1. The terms m <= d are positive; for the beta law those beyond m = alpha + 2 vanish or
 * alternate in sign, and near the sphere they hardly fall before they grow without bound, up to m = n.
 */

import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { type BetaLaw, excessOf, type ResolvedBetaPrimeLaw } from '../law.ts';
import { alternatingSum } from '../numeric/alternating-sum.ts';
import { BetaAngles } from '../numeric/beta-angles.ts';
import { type LogTerm, logOutwardSum, probabilityFromSum } from '../numeric/parity-split.ts';
import { complementError } from '../numeric/stated-error.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { logChoices } from './gaussian-faces.ts';
import type { Hull } from './hull-options.ts';
import { membershipOnLine } from './line.ts';
import { volumeRatioKernel } from './volume-ratio-kernel.ts';

/** log 0.75: a sum above it is most of the probability, and the other side is to be summed. */
const MOSTLY = -0.2876820724517809;

/** alpha = 2b + d or 2b - d. */
export function alphaOf(law: BetaLaw | ResolvedBetaPrimeLaw, d: number): number {
  return law.family === 'beta' ? 2 * law.b + d : 2 * excessOf(law, d);
}

/** P(the next point lies in the hull of n points); other hulls than the plain one for b = 0 and b = -1. */
export function betaMembership(
  count: ResolvedCount,
  d: number,
  law: BetaLaw | ResolvedBetaPrimeLaw,
  hull: Hull,
): Probability {
  const { n, log } = count;
  if (law.family === 'beta' && law.b === -1) {
    // Points of a sphere are all vertices; the sphere of R^1 has only two points.
    if (d > 1) return certainty(false);
    return hull === 'symmetric' ? certainty(n > 0) : wendel(n + 1, 1);
  }
  // the next point is uniform in the ball
  if (law.family === 'beta' && law.b === 0) return volumeRatioKernel(d, 0.5 * (d - 1), count, hull);
  if (d === 1) return membershipOnLine(count, 'plain');
  if (n <= d) return certainty(false);
  const next = { n: n + 1, log: n < 2 ** 53 ? Math.log(n + 1) : log };
  const angles = new BetaAngles(law.family, alphaOf(law, d));
  const error = new Float64Array(1);
  const rounding = EPSILON * (2 + next.log);
  if (angles.logTerm(next, d + 2, 1, error) < angles.logTerm(next, d, 1, error)) {
    const logInside = Math.LN2 + logLoss(angles, next, d, error) - next.log;
    const bound = (error[0] as number) + rounding;
    // where one minus the other sum is as good, it is the safer one
    if (logInside < MOSTLY && bound * Math.exp(logInside) < 1e-15 * (50 + 20 * d)) {
      return probabilityFromSum(logInside, 'lower', bound);
    }
  }
  const logOutside =
    Math.LN2 + logOutwardSum((m, e) => angles.logTerm(next, m, 1, e), d, -2, 1, error) - next.log;
  const bound = (error[0] as number) + rounding;
  if (logOutside < MOSTLY) return probabilityFromSum(logOutside, 'upper', bound);
  const inside = Math.max(-Math.expm1(logOutside), bound);
  const open = inside > 2 * bound ? -Math.log1p(-bound / inside) : Number.POSITIVE_INFINITY;
  return probabilityFromTail(inside, Math.log(inside), 'lower', open);
}

/**
 * log of the sum over m = d + 2, d + 4, .. of the terms for v = 1: half of n - E f. Writes a bound on
 * its error to `error[0]`, `Infinity` if there is none.
 */
function logLoss(angles: BetaAngles, count: ResolvedCount, d: number, error: Float64Array): number {
  const { alpha, family } = angles;
  const { n } = count;
  const beta = family === 'beta';
  const term: LogTerm = (m, e) => angles.logTerm(count, m, 1, e);
  const positive = logOutwardSum(term, d + 2, 2, beta ? Math.min(n, alpha + 2) : n, error);
  const first = d + 4 + 2 * Math.floor((alpha - d) / 2);
  if (!beta || first > n) return positive;
  const bound = error[0] as number;
  const top = Math.max(positive, term(first, error));
  if (angles.sign === 0) {
    error[0] = bound;
    return positive;
  }
  const head = Math.exp(positive - top);
  const rest = alternatingSum((i) => {
    const m = first + 2 * i;
    if (m > n) return 0;
    return Math.exp(term(m, error) - top) * angles.sign;
  }, error);
  const sum = head + rest;
  const total = bound * head + (error[0] as number);
  error[0] = sum > 2 * total ? -Math.log1p(-total / sum) + 4 * EPSILON : Number.POSITIVE_INFINITY;
  return sum > 0 ? top + Math.log(sum) : Number.NEGATIVE_INFINITY;
}

/**
 * log of the expected number of faces with v <= d vertices, those at the centre left out; a bound on its
 * error in `error[0]`. Other hulls than the plain one for v = 1, b = 0 and b = -1.
 */
export function logBetaFaces(
  count: ResolvedCount,
  d: number,
  v: number,
  law: BetaLaw | ResolvedBetaPrimeLaw,
  hull: Hull,
  error: Float64Array,
): number {
  const { n, log } = count;
  const { family } = law;
  error[0] = 0;
  if (n < v) return Number.NEGATIVE_INFINITY;
  const signs = hull === 'symmetric' ? Math.LN2 : 0;
  if (family === 'beta' && law.b === -1) {
    // the two points of the sphere of R^1 may coincide
    if (d === 1) return Math.log(2 - 2 * Math.exp(-n * Math.LN2));
    if (v === 1) return signs + logChoices(count, 1, error);
  }
  if (family === 'beta' && law.b === 0 && v === 1) {
    const before = { n: n - 1, log: n < 2 ** 53 ? Math.log(n - 1) : log };
    const loss = betaMembership(before, d, law, hull);
    error[0] = EPSILON * log + complementError(loss);
    return signs + log + loss.logComplement;
  }
  if (d === 1) return Math.log(Math.min(n, 2));
  if (n <= d + 1) return logChoices(count, v, error);
  const angles = new BetaAngles(family, alphaOf(law, d));
  return Math.LN2 + logOutwardSum((m, e) => angles.logTerm(count, m, v, e), d, -2, v, error);
}
