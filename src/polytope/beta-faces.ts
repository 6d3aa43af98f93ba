/**
 * Hulls of beta and beta-prime points: membership of the next point and expected numbers of faces.
 *
 * Notation: v is the number of vertices of a face, alpha the parameter of beta-angles.ts. With v <= d,
 *
 *   E f = 2 (T_d + T_(d-2) + ..),  C(n, v) - E f = 2 (T_(d+2) + T_(d+4) + ..),  T_m = I_(n,m) J_(m,v),
 *
 * and the next point is outside the hull of n points with probability E f / (n + 1) at n + 1 points
 * and v = 1. The terms m <= d are positive; for the beta law those beyond m = alpha + 3 vanish or
 * alternate in sign, but fall so fast that nothing cancels.
 */

import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { type BetaLaw, excessOf, type ResolvedBetaPrimeLaw } from '../law.ts';
import { BetaAngles } from '../numeric/beta-angles.ts';
import { logOutwardSum, probabilityFromSum } from '../numeric/parity-split.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { logChoices } from './gaussian-faces.ts';
import { membershipOnLine } from './line.ts';

const CUT = 41;
/** log 0.75: a sum above it is most of the probability, and the other side is to be summed. */
const MOSTLY = -0.2876820724517809;
/** The sum over m is given up beyond d + this. */
const MAX_SPAN = 1200;

/** alpha = 2b + d or 2b - d. */
export function alphaOf(law: BetaLaw | ResolvedBetaPrimeLaw, d: number): number {
  return law.family === 'beta' ? 2 * law.b + d : 2 * excessOf(law, d);
}

/** P(the next point lies in the hull of n points). */
export function betaMembership(
  count: ResolvedCount,
  d: number,
  law: BetaLaw | ResolvedBetaPrimeLaw,
): Probability {
  const { n, log } = count;
  // Points of a sphere are all vertices; the sphere of R^1 has only two points.
  if (law.family === 'beta' && law.b === -1) return d > 1 ? certainty(false) : wendel(n + 1, 1);
  if (d === 1) return membershipOnLine(count, 'plain');
  if (n <= d) return certainty(false);
  const next = { n: n + 1, log: n < 2 ** 53 ? Math.log(n + 1) : log };
  const angles = new BetaAngles(law.family, alphaOf(law, d));
  const error = new Float64Array(1);
  const rounding = EPSILON * (2 + next.log);
  if (angles.logTerm(next, d + 2, 1, error) < angles.logTerm(next, d, 1, error)) {
    const logInside = Math.LN2 + logLoss(angles, next, d, error) - next.log;
    if ((error[0] as number) < Number.POSITIVE_INFINITY && logInside < MOSTLY) {
      return probabilityFromSum(logInside, 'lower', (error[0] as number) + rounding);
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
 * its error to `error[0]`: `Infinity` if one minus the other sum would be as good, as it is for laws
 * near the sphere, whose continued terms alternate and hardly fall.
 */
function logLoss(angles: BetaAngles, count: ResolvedCount, d: number, error: Float64Array): number {
  let top = Number.NEGATIVE_INFINITY;
  let sum = 0;
  let bound = 0;
  let small = 0;
  // about what the other sum leaves
  const absolute = 1e-15 * (50 + 20 * d);
  for (let m = d + 2; m <= count.n; m += 2) {
    const log = angles.logTerm(count, m, 1, error);
    if (log > top) {
      const scale = Math.exp(top - log);
      sum *= scale;
      bound *= scale;
      top = log;
    }
    const term = angles.sign === 0 ? 0 : Math.exp(log - top);
    sum += angles.sign * term;
    bound += term * (error[0] as number);
    // A continued term may vanish by itself, so two small ones in a row end the sum.
    small = log < top - CUT ? small + 1 : 0;
    if (small === 2) break;
    if (m > d + MAX_SPAN || 2 * bound * Math.exp(top - count.log) > absolute) {
      error[0] = Number.POSITIVE_INFINITY;
      return Number.NEGATIVE_INFINITY;
    }
  }
  error[0] = sum > 2 * bound ? -Math.log1p(-bound / sum) + 4 * EPSILON : Number.POSITIVE_INFINITY;
  return sum > 0 ? top + Math.log(sum) : Number.NEGATIVE_INFINITY;
}

/** log of the expected number of faces with v <= d vertices; a bound on its error in `error[0]`. */
export function logBetaFaces(
  count: ResolvedCount,
  d: number,
  v: number,
  law: BetaLaw | ResolvedBetaPrimeLaw,
  error: Float64Array,
): number {
  const { n } = count;
  const sphere = law.family === 'beta' && law.b === -1;
  error[0] = 0;
  if (n < v) return Number.NEGATIVE_INFINITY;
  if (d === 1) return sphere ? Math.log(2 - 2 * Math.exp(-n * Math.LN2)) : Math.log(Math.min(n, 2));
  if (n <= d + 1 || (sphere && v === 1)) return logChoices(count, v, error);
  const angles = new BetaAngles(law.family, alphaOf(law, d));
  return Math.LN2 + logOutwardSum((m, e) => angles.logTerm(count, m, v, e), d, -2, v, error);
}
