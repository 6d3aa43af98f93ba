/**
 * Expected intrinsic volumes of beta polytopes, relative to those of the ball.
 *
 * Let X_1, ..., X_n have the beta law of exponent beta on the ball B of R^d, b = beta + (d - 1)/2 the
 * exponent of its one-dimensional marginal, L the mean excess of that marginal as a function of the
 * tail v, and V_(m) the m-th smallest of n uniform numbers. For k = 1, ..., d
 *
 *   E V_k(conv(X_1, ..., X_n)) / V_k(B) = E[L(V_(k+1))^k],
 *   E V_k(conv(+-X_1, ..., +-X_n)) / V_k(B) = E[L(V/2)^k],  V ~ Beta(k + 1, n - k),
 *   E V_k(conv(0, X_1, ..., X_n)) / V_k(B) = E[h_+ L^(k-1)] over V_(k):
 *
 * the ambient dimension enters only through b. The complement is the expectation of one minus the
 * weight, again a positive integrand, so both tails keep their digits.
 */
import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import {
  centralLogTail,
  type LogExpectation,
  orderStatisticExpectation,
} from '../numeric/order-statistic.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { fairBinomialTail } from '../special/fair-binomial.ts';
import { logAddExpKernel } from '../special/log-domain.ts';
import { quotientProbability } from '../special/tail-result.ts';
import type { Hull } from './hull-options.ts';

/** The smaller tail is meant; a first guess that turns out to be above this is recomputed. */
const LOG_HALF_WITH_MARGIN = /* @__PURE__ */ Math.log(0.55);

/** E V_k(hull) / V_k(B) for 0 <= k <= d and the marginal exponent b >= -1. */
export function volumeRatioKernel(
  k: number,
  b: number,
  count: ResolvedCount,
  hull: Hull,
): Probability {
  const { n } = count;
  if (k === 0) return certainty(n > 0);
  if (hull === 'plain' ? n <= k : n < k) return certainty(false);
  if (b === -1) return twoPoint(count, hull);
  const closed = b === 0 ? uniformMarginal(k, n, hull) : undefined;
  if (closed !== undefined) return closed;
  if (hull === 'symmetric') return symmetricRatio(k, b, count);
  return hull === 'plain' ? plainRatio(k, b, count) : centredRatio(k, b, count);
}

/** d = 1 and points at -1 and 1: the hull is a segment or a point, which is one coin for each point. */
function twoPoint({ n }: ResolvedCount, hull: Hull): Probability {
  if (hull === 'symmetric') return certainty(true);
  return wendel(hull === 'plain' ? n : n + 1, 1);
}

/**
 * A uniform marginal, b = 0, has L(v) = 1 - v, and the moments of 1 - V_(k+1) ~ Beta(n - k, k + 1) and of
 * V ~ Beta(2, n - 1) are quotients of whole numbers; undefined where these are beyond 2^53.
 */
function uniformMarginal(k: number, n: number, hull: Hull): Probability | undefined {
  if (hull === 'symmetric' && k === 1 && n < 2 ** 53) return quotientProbability(n, n + 1);
  if (hull !== 'plain') return undefined;
  let numerator = 1;
  let denominator = 1;
  for (let i = 0; i < k; i++) {
    numerator *= n - k + i;
    denominator *= n + 1 + i;
    // 2^53 + 1 would be rounded to 2^53
    if (!(n + i < 2 ** 53 && denominator <= 2 ** 53)) return undefined;
  }
  return quotientProbability(numerator, denominator);
}

/** The probability from whichever of the two expectations is the smaller. */
function smallerTail(
  probablyLow: boolean,
  value: () => LogExpectation,
  complement: () => LogExpectation,
  complementRounding: number,
): Probability {
  let low = probablyLow;
  let result = low ? value() : complement();
  if (result.log > LOG_HALF_WITH_MARGIN) {
    low = !low;
    result = low ? value() : complement();
  }
  const log = Math.min(result.log, 0);
  const tail = Math.min(result.value, 1);
  const error = low ? result.error : result.error + complementRounding;
  return probabilityFromTail(tail, log, low ? 'lower' : 'upper', error);
}

/** What 1 - L loses to cancellation on the line, where a nearly two-point law has L near 1. */
function lostInComplement(b: number): number {
  return b < -0.5 ? 2 ** -50 / (b + 1) : 0;
}

/** Whether the k-th power of the mean excess is below 1/2 at the reference point of the tail. */
function isLow(tail: BetaTail, k: number): boolean {
  return k * tail.logExcess < -Math.LN2;
}

function plainRatio(k: number, b: number, count: ResolvedCount): Probability {
  const tail = new BetaTail(b);
  const order = { m: k + 1, n: count.n, log: count.log };
  tail.centreAtTail(centralLogTail(order), 'line');
  return smallerTail(
    isLow(tail, k),
    () => orderStatisticExpectation(tail, 'line', order, () => k * tail.logExcess),
    () => orderStatisticExpectation(tail, 'line', order, () => tail.logOneMinusPower(k)),
    lostInComplement(b),
  );
}

function symmetricRatio(k: number, b: number, count: ResolvedCount): Probability {
  const tail = new BetaTail(b);
  if (count.n === k) {
    // the cross-polytope spanned by k points
    const log = Math.min(k * (Math.LN2 + tail.logA), 0);
    const error = k * (3 + Math.abs(tail.logA)) * 2 ** -52;
    if (log < -Math.LN2) return probabilityFromTail(Math.exp(log), log, 'lower', error);
    const complement = -Math.expm1(log);
    return probabilityFromTail(complement, Math.log(complement), 'upper', error / complement);
  }
  const order = { m: k + 1, n: count.n, log: count.log };
  tail.centreAtTail(centralLogTail(order), 'folded');
  return smallerTail(
    isLow(tail, k),
    () => orderStatisticExpectation(tail, 'folded', order, () => k * tail.logExcess),
    () => orderStatisticExpectation(tail, 'folded', order, () => tail.logOneMinusPower(k)),
    lostInComplement(b),
  );
}

function centredRatio(k: number, b: number, count: ResolvedCount): Probability {
  const tail = new BetaTail(b);
  const order = { m: k, n: count.n, log: count.log };
  const logWeight = (): number => tail.logHeight + (k - 1) * tail.logExcess;
  const logRest = (): number => {
    if (tail.s < 300) return Math.log(-Math.expm1(logWeight()));
    // h = 1 - w/2 and L = 1 - w (b + 1) / (2 (b + 2)) there
    return tail.logWidth + Math.log(0.5 + ((k - 1) * (b + 1)) / (2 * (b + 2)));
  };
  tail.centreAtTail(centralLogTail(order), 'half');
  return smallerTail(
    logWeight() < -Math.LN2,
    () => orderStatisticExpectation(tail, 'half', order, logWeight),
    () => {
      const inside = orderStatisticExpectation(tail, 'half', order, logRest);
      // V_(k) > 1/2, where h_+ = 0, when fewer than k of n points lie in a half-space
      const below = logFewerHeads(k, count);
      const log = logAddExpKernel(inside.log, below.log);
      const value = inside.value + Math.exp(below.log);
      return {
        log,
        value,
        error: inside.error + below.error * Math.exp(below.log - log),
        means: [],
      };
    },
    lostInComplement(b),
  );
}

/** log P[Bin(n, 1/2) < k], 1 <= k <= n. */
function logFewerHeads(k: number, count: ResolvedCount): { log: number; error: number } {
  if (count.log > 30) return { log: Number.NEGATIVE_INFINITY, error: 0 };
  const out = new Float64Array(3);
  const lower = fairBinomialTail(count.n, k - 1, out);
  const log = lower ? (out[1] as number) : Math.log1p(-(out[0] as number));
  return { log, error: out[2] as number };
}
