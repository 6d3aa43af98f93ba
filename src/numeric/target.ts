/**
 * Comparison of a computed probability with a target, on the side where digits live.
 *
 * A target of 1 - 1e-12 is compared through complements, one of 1e-300000 through logarithms, and the
 * stated error decides whether the answer is certain.
 */
import { EPSILON, exactLogError } from '../epsilon.ts';
import { Probability } from '../probability.ts';

/** The target as a probability: a number must lie in [0, 1], a Probability is taken as it is. */
export function targetOf(p: number | Probability): Probability {
  // Of the two tails of a number above 1/2 the complement is the exact difference.
  return typeof p === 'number' ? Probability.fromValue(p) : p;
}

/**
 * A signed distance from the target: negative below it, zero at it, positive above.
 *
 * It is the difference of the log-odds, drawn in as the square root where they are large. Probabilities
 * mostly have Gaussian tails in a well-chosen argument, and then the distance is nearly linear in it,
 * which is what root finding needs.
 */
export function oddsGap(p: Probability, target: Probability): number {
  const reached = reaches(p, target);
  const gap = drawnIn(p) - drawnIn(target);
  // The sign has to agree with the comparison of the small side, which is finer near a tie. Infinities
  // on both sides give NaN, which the clamps turn into an end.
  if (reached) return gap > 0 ? Math.min(gap, Number.MAX_VALUE) : 0;
  return gap < 0 ? Math.max(gap, -Number.MAX_VALUE) : -Number.MIN_VALUE;
}

function drawnIn(p: Probability): number {
  const odds = p.log - p.logComplement;
  return Math.sign(odds) * (Math.sqrt(1 + Math.abs(odds)) - 1);
}

/** Whether `p >= target`, taking the computed numbers at their word. */
export function reaches(p: Probability, target: Probability): boolean {
  if (target.log <= target.logComplement) {
    return comparable(p.value, target.value) ? p.value >= target.value : p.log >= target.log;
  }
  if (target.logComplement === Number.NEGATIVE_INFINITY) {
    // A complement below every double is not yet 0.
    return p.logComplement === target.logComplement && p.logError < Number.POSITIVE_INFINITY;
  }
  return comparable(p.complement, target.complement)
    ? p.complement <= target.complement
    : p.logComplement <= target.logComplement;
}

/** Whether the stated error cannot change the outcome of {@link reaches}. */
export function isCertain(p: Probability, target: Probability): boolean {
  const lower = target.log <= target.logComplement;
  const log = lower ? p.log : p.logComplement;
  const targetLog = lower ? target.log : target.logComplement;
  if (targetLog === Number.NEGATIVE_INFINITY) {
    // Every probability is at least 0; at most 0 is one that is known to be 0.
    if (lower) return true;
    return log === targetLog ? p.logError === 0 : p.logError < Number.POSITIVE_INFINITY;
  }
  if (log === Number.NEGATIVE_INFINITY) return true;
  const pIsLower = p.log <= p.logComplement;
  const small = pIsLower ? p.value : p.complement;
  if (pIsLower === lower && isExact(p) && isExact(target)) return true;
  const error = pIsLower === lower ? p.logError : (p.logError * small) / (1 - small) + EPSILON;
  const tail = lower ? p.value : p.complement;
  const targetTail = lower ? target.value : target.complement;
  const gap = comparable(tail, targetTail)
    ? Math.abs(Math.log1p((tail - targetTail) / targetTail))
    : Math.abs(log - targetLog) - EPSILON * Math.abs(targetLog);
  return gap > error + target.logError + EPSILON;
}

/**
 * Whether the smaller tail's value is exact: it states no error at all, or precisely the bound of
 * {@link exactLogError}.
 */
function isExact(p: Probability): boolean {
  const lower = p.log <= p.logComplement;
  const value = lower ? p.value : p.complement;
  if (p.logError === 0) return true;
  return value >= 2 ** -1022 && p.logError === exactLogError(lower ? p.log : p.logComplement);
}

/** Whether two tails are both normal doubles, so that values are finer than logarithms. */
function comparable(a: number, b: number): boolean {
  return a >= 2 ** -1022 && b >= 2 ** -1022;
}
