/**
 * The binomial law: both tails, and the logarithm of its probabilities.
 *
 * For X ~ Bin(n, p), q = 1 - p: P[X > k] = I_p(k + 1, n - k), the incomplete beta function, and
 *
 *   log P[X = k] = dev(k, n p - k) + dev(n - k, k - n p) + D(n) - D(k) - D(n - k)
 *                  + log(n / (2 pi k (n - k))) / 2
 *
 * with the deviance and remainder of beta-prefix.ts, where n p - k has twice the precision. A fair
 * coin has its own file, fair-binomial.ts.
 */

import { checkInteger, DomainError } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { betaAmplitude, betaDelta, betaDeviance } from './beta-prefix.ts';
import { fairBinomialTail } from './fair-binomial.ts';
import { checkPair, incompleteBetaKernel, rest } from './incomplete-beta.ts';
import { storeZero, TAIL_SLOTS, tailProbability } from './tail-result.ts';

const work = /* @__PURE__ */ new Float64Array(TAIL_SLOTS);

/**
 * The distribution function of the number of successes in n independent trials at an integer k, with
 * both tails.
 *
 * $$ P(X \le k) = \sum_{i=0}^{k} \binom{n}{i} p^i q^{n-i} = I_q(n - k,\, k + 1) $$
 *
 * @param k - number of successes; an integer, 0 comes out below 0 and 1 from n on
 * @param n - number of trials; an integer from 0 to 2^53 - 1
 * @param p - probability of a success; from 0 to 1, 1/2 if left out
 * @param q - 1 - p, where it is known more exactly than the subtraction gives; of the two the smaller
 *   one is taken as exact
 * @returns the probability of at most k successes, that of more than k as `complement`
 * @remarks Constant cost in n and k. Relative error of the smaller tail below 1.6e-15 down to 1e-300; its
 *   logarithm L has an absolute error below 1.6e-15 + 1.2e-16 |L|. For p = 1/2 the smaller tail is exact
 *   for n <= 53 and correctly rounded for n <= 106.
 * @throws A {@link DomainError} if k is no integer, n no integer from 0 to 2^53 - 1, p or q outside [0, 1], or
 *   p + q not 1 to rounding
 *
 * Source: https://dlmf.nist.gov/8.17.E5 for the incomplete beta function behind it.
 *
 * @example
 * ```ts
 * import { binomialCdf } from 'hullgauge/special';
 * binomialCdf(2, 4).value; // => 0.6875
 * binomialCdf(70, 1000, 0.1).value.toPrecision(12); // => '0.000574495840838'
 * binomialCdf(4e14, 1e15).log.toPrecision(12); // => '-2.01355135507e+13'
 * ```
 */
export function binomialCdf(
  k: number,
  n: number,
  p: number = 0.5,
  q: number = rest(p),
): Probability {
  const fn = 'binomialCdf';
  checkCount(fn, k);
  checkBinomial(fn, n, p, q);
  return binomialProbability(n, k, p, q);
}

/**
 * The logarithm of the probability of exactly k successes in n independent trials.
 *
 * $$ \ln \left[ \binom{n}{k} p^k q^{n-k} \right] $$
 *
 * @param k - number of successes; an integer
 * @param n - number of trials; an integer from 0 to 2^53 - 1
 * @param p - probability of a success; from 0 to 1, 1/2 if left out
 * @param q - 1 - p, where it is known more exactly than the subtraction gives
 * @returns the logarithm, at most 0; `-Infinity` where k is impossible
 * @remarks Constant cost. Error below 1e-15 max(1, |result|), for all n.
 * @throws A {@link DomainError} if k is no integer, n no integer from 0 to 2^53 - 1, p or q outside [0, 1], or
 *   p + q not 1 to rounding
 *
 * Source: "Fast and accurate computation of binomial probabilities" (2000), with the distance from the
 * mean to twice the precision.
 *
 * @example
 * ```ts
 * import { logBinomialPmf } from 'hullgauge/special';
 * logBinomialPmf(5, 10).toPrecision(12); // => '-1.40204271809'
 * logBinomialPmf(3e14, 1e15, 0.3).toPrecision(12); // => '-17.4080028565'
 * logBinomialPmf(11, 10); // => -Infinity
 * ```
 */
export function logBinomialPmf(k: number, n: number, p: number = 0.5, q: number = rest(p)): number {
  const fn = 'logBinomialPmf';
  checkCount(fn, k);
  checkBinomial(fn, n, p, q);
  return logBinomialPmfKernel(n, k, p, q);
}

function checkCount(fn: string, k: number): void {
  if (!Number.isInteger(k)) throw new DomainError(fn, 'k', 'an integer', k);
}

/** Refuses anything but a number of trials and two probabilities with sum 1. */
export function checkBinomial(fn: string, n: number, p: number, q: number): void {
  checkInteger(fn, 'n', n, 0);
  checkPair(fn, 'p', p, 'q', q);
}

/** {@link binomialCdf} without checks. */
function binomialProbability(n: number, k: number, p: number, q: number): Probability {
  return tailProbability(binomialTail(n, k, p, q, work), work);
}

/**
 * The smaller one of P[X <= k] and P[X > k], in the slots of tail-result.ts; returns whether it is
 * P[X <= k].
 */
export function binomialTail(
  n: number,
  k: number,
  p: number,
  q: number,
  out: Float64Array,
): boolean {
  if (k < 0 || k >= n) {
    storeZero(out);
    return k < 0;
  }
  if (p === 0.5 && q === 0.5) return fairBinomialTail(n, k, out);
  return !incompleteBetaKernel(k + 1, n - k, p, q, out);
}

/** {@link logBinomialPmf} without checks; n first. */
export function logBinomialPmfKernel(n: number, k: number, p: number, q: number): number {
  if (k < 0 || k > n) return -Infinity;
  if (k === 0) return n === 0 ? 0 : n * logOf(q, p);
  if (k === n) return n * logOf(p, q);
  if (p === 0 || q === 0) return -Infinity;
  const rest = n - k;
  betaDelta(k, rest, p, q, work);
  betaDeviance(k, rest, p, q, work[0] as number, work[1] as number, work);
  const amplitude = betaAmplitude(k, rest, work);
  return (work[0] as number) + ((work[1] as number) + Math.log(amplitude / ((k / n) * rest)));
}

/** log p, from the smaller one of p and q = 1 - p. */
function logOf(p: number, q: number): number {
  return p <= q ? Math.log(p) : Math.log1p(-q) || 0;
}
