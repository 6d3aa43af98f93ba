/**
 * Quantiles of the binomial law: the smallest k whose distribution function reaches a probability.
 *
 * Newton's iteration on the square root of minus the logarithm of the smaller tail, with the slope from
 * the probability of k, from a normal start with skewness; every step stays inside a bracket of integers
 * and moves at least by one. It takes 4 evaluations of a tail on average. A tail is compared as a number
 * where it is a normal one, so that exact ties are met: for p = 1/2 and n <= 53 all tails are exact.
 */

import type { Probability } from '../probability.ts';
import { binomialTail, checkBinomial, logBinomialPmfKernel } from './binomial.ts';
import { rest } from './incomplete-beta.ts';
import { normalQuantileOfLog } from './normal.ts';
import { checkProbability } from './probability-argument.ts';
import { TAIL_SLOTS } from './tail-result.ts';

/**
 * The smallest number of successes in n independent trials whose distribution function reaches `prob`.
 *
 * $$ \min \lbrace k : P(X \le k) \ge \mathrm{prob} \rbrace $$
 *
 * @param prob - a number from 0 to 1, or a Probability, which is compared by its smaller tail
 * @param n - number of trials; an integer from 0 to 2^53 - 1
 * @param p - probability of a success; from 0 to 1, 1/2 if left out
 * @param q - 1 - p, where it is known more exactly than the subtraction gives
 * @returns an integer from 0 to n; 0 for `prob` = 0
 * @remarks Cost: 4 evaluations of {@link binomialCdf} on average, at most 50 in tails of e^-1e10. Exact
 *   ties are met for p = 1/2 and n <= 53; elsewhere a request within the error of the distribution
 *   function at a step may give either neighbour.
 * @throws A {@link DomainError} if `prob` is not a number from 0 to 1 or a Probability, n no integer from 0
 *   to 2^53 - 1, p or q outside [0, 1], or p + q not 1 to rounding
 *
 * Source: https://dlmf.nist.gov/8.17.E5; the search is our own.
 *
 * @example
 * ```ts
 * import { Probability } from 'hullgauge';
 * import { binomialQuantile } from 'hullgauge/special';
 * binomialQuantile(0.5, 9); // => 4
 * binomialQuantile(0.95, 1000, 0.1); // => 116
 * binomialQuantile(Probability.fromComplement(1e-100), 1e6); // => 510636
 * ```
 */
export function binomialQuantile(
  prob: number | Probability,
  n: number,
  p: number = 0.5,
  q: number = rest(p),
): number {
  const fn = 'binomialQuantile';
  checkProbability(fn, 'prob', prob);
  checkBinomial(fn, n, p, q);
  if (typeof prob === 'number') {
    if (prob <= 0.5) return binomialQuantileOfTail(n, p, q, prob, Math.log(prob), true);
    return binomialQuantileOfTail(n, p, q, 1 - prob, Math.log(1 - prob), false);
  }
  return prob.log <= prob.logComplement
    ? binomialQuantileOfTail(n, p, q, prob.value, prob.log, true)
    : binomialQuantileOfTail(n, p, q, prob.complement, prob.logComplement, false);
}

/** Below this a number may be subnormal, and its logarithm is compared. */
const SMALLEST_VALUE = 1e-306;

/** After so many steps the bracket is halved. */
const NEWTON_STEPS = 30;
const MAX_STEPS = 100;

/**
 * The smallest k with P[X <= k] >= tail (`lower`), or with P[X > k] <= tail; tail <= 1/2 as a number
 * and as a logarithm.
 */
function binomialQuantileOfTail(
  n: number,
  p: number,
  q: number,
  tail: number,
  logTail: number,
  lower: boolean,
): number {
  if (p === 0 || n === 0) return 0;
  if (logTail === -Infinity) return lower ? 0 : n;
  if (q === 0) return n;
  const out = new Float64Array(TAIL_SLOTS);
  let below = -1; // does not reach
  let above = n; // reaches
  let stride = 1;
  let k = startingPoint(n, p, q, logTail, lower);
  for (let step = 0; step < MAX_STEPS; step++) {
    k = Math.min(Math.max(k, below + 1), above - 1);
    const isLower = binomialTail(n, k, p, q, out);
    const value = out[0] as number;
    const log = out[1] as number;
    // whether the kernel returned the tail that is asked for, or the other
    const given = isLower === lower;
    const givenLog = given ? log : Math.log1p(-value);
    const excess = given
      ? logExcess(value, log, tail, logTail)
      : 1 - value > tail
        ? Math.max(givenLog - logTail, Number.MIN_VALUE)
        : 0;
    if (lower ? excess >= 0 : excess <= 0) above = k;
    else below = k;
    if (above - below <= 1) return above;
    const slope = logStep(n, k, p, q, givenLog, lower);
    // Newton's step for the square root of the logarithm, which is nearly linear in k
    const root = Math.sqrt(givenLog / logTail);
    const move = ((excess / slope) * 2 * root) / (1 + root);
    const next = Math.ceil(lower ? k - move : k + move);
    if (step > NEWTON_STEPS || Number.isNaN(next)) {
      k = below + Math.floor((above - below) / 2);
    } else if (next > below && next < above) {
      k = next;
    } else {
      // at the step itself, or where neighbours cannot be told apart: close the bracket, ever faster
      k = next <= below ? below + stride : above - stride;
      stride *= 2;
    }
  }
  throw new Error(`binomialQuantile: n = ${n}, p = ${p}: between ${below} and ${above}`);
}

/** About log(value/tail), with the sign of value - tail wherever both are normal numbers. */
function logExcess(value: number, log: number, tail: number, logTail: number): number {
  if (!(value > SMALLEST_VALUE && tail > SMALLEST_VALUE)) return log - logTail;
  const difference = (value - tail) / tail;
  return Math.abs(difference) < 0.5 ? difference : Math.log(value / tail);
}

/** Change of the logarithm of a tail from k - 1 to k, in absolute value. */
function logStep(n: number, k: number, p: number, q: number, log: number, lower: boolean): number {
  if (log < -1e8) {
    // the ratio of neighbouring probabilities: those of logarithms would be noise
    return Math.log(lower ? (((n - k + 1) / k) * p) / q : (((k + 1) / (n - k)) * q) / p);
  }
  const share = Math.exp(logBinomialPmfKernel(n, k, p, q) - log);
  return lower ? -Math.log1p(-Math.min(share, 1 - 1e-16)) : Math.log1p(share);
}

/** Normal law with the correction for skewness; halfway to the end where that is out of range. */
function startingPoint(n: number, p: number, q: number, logTail: number, lower: boolean): number {
  const mean = n * p;
  const z = normalQuantileOfLog(logTail) * (lower ? 1 : -1);
  const k = Math.floor(mean + z * Math.sqrt(mean * q) + ((z * z - 1) * (q - p)) / 6);
  if (k >= 0 && k < n) return k;
  return Math.floor(lower ? 0.5 * mean : 0.5 * (mean + n));
}
