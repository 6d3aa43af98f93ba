/**
 * Comparison of a computed probability with a target, on the side where digits live.
 *
 * A target of 1 - 1e-12 is compared through complements, one of 1e-300000 through logarithms, and the
 * stated error decides whether the answer is certain.
 */
import { Probability } from '../probability.ts';

/** Rounding of one operation, relative. */
const ROUNDING = 2 ** -52;

/** The target as a probability: a number must lie in [0, 1], a Probability is taken as it is. */
export function targetOf(p: number | Probability): Probability {
  // Of the two tails of a number above 1/2 the complement is the exact difference.
  return typeof p === 'number' ? Probability.fromValue(p) : p;
}

/**
 * Log-odds of `p` minus log-odds of `target`: negative below the target, zero at it, positive above.
 * Finite differences keep their size in both tails, which is what root finding needs.
 */
export function oddsGap(p: Probability, target: Probability): number {
  if (p.log === Number.NEGATIVE_INFINITY || p.logComplement === Number.NEGATIVE_INFINITY) {
    const end = p.log === Number.NEGATIVE_INFINITY ? -Number.MAX_VALUE : Number.MAX_VALUE;
    return reaches(p, target) ? Math.max(end, 0) : Math.min(end, -Number.MIN_VALUE);
  }
  const gap = p.log - p.logComplement - (target.log - target.logComplement);
  // The sign has to agree with the comparison of the small side, which is finer near a tie.
  if (reaches(p, target)) return Math.min(Math.max(gap, 0), Number.MAX_VALUE);
  return Math.max(Math.min(gap, -Number.MIN_VALUE), -Number.MAX_VALUE);
}

/** Whether `p >= target`, taking the computed numbers at their word. */
export function reaches(p: Probability, target: Probability): boolean {
  if (target.log <= target.logComplement) {
    return comparable(p.value, target.value) ? p.value >= target.value : p.log >= target.log;
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
  if (log === targetLog && log === Number.NEGATIVE_INFINITY) return p.logError === 0;
  if (log === Number.NEGATIVE_INFINITY) return true;
  const pIsLower = p.log <= p.logComplement;
  const small = pIsLower ? p.value : p.complement;
  if (pIsLower === lower && isExact(p) && target.logError === 0) return true;
  const error = pIsLower === lower ? p.logError : (p.logError * small) / (1 - small) + ROUNDING;
  const tail = lower ? p.value : p.complement;
  const targetTail = lower ? target.value : target.complement;
  const gap = comparable(tail, targetTail)
    ? Math.abs(tail - targetTail) / targetTail
    : Math.abs(log - targetLog) - ROUNDING * Math.abs(targetLog);
  return gap > error + target.logError + ROUNDING;
}

/**
 * Whether the smaller tail's value is exact. A kernel says so by an error bound no larger than the
 * rounding of the logarithm itself; every inexact value has at least one rounding more.
 */
function isExact(p: Probability): boolean {
  const lower = p.log <= p.logComplement;
  const value = lower ? p.value : p.complement;
  return value >= 2 ** -1022 && p.logError <= exactLogError(lower ? p.log : p.logComplement);
}

/** The error bound to state for the logarithm of a tail whose value is exact. */
export function exactLogError(log: number): number {
  return Math.abs(log) * ROUNDING;
}

/** Whether two tails are both normal doubles, so that values are finer than logarithms. */
function comparable(a: number, b: number): boolean {
  return a >= 2 ** -1022 && b >= 2 ** -1022;
}
