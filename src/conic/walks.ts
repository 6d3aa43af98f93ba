/**
 * Hulls of random walks and random bridges.
 *
 * The number of independent directions in which a walk can be separated from its start is a sum K of
 * independent Bernoulli variables: 1/(2j), j = 2..n, for a walk of n steps; 1/j, j = 3..n, for a bridge.
 * The start is outside the hull iff K <= d - 1, in distribution. Several independent walks and bridges
 * pool their variables, 1/(2j) from j = 1 and 1/j from j = 2, and delete one of probability 1/2.
 * Source: Convex hulls of random walks, hyperplane arrangements, and Weyl chambers, Geometric and
 * Functional Analysis 27 (2017), arXiv:1510.04073.
 */
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { type BernoulliRun, poissonBinomialTail } from '../numeric/poisson-binomial.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';

/** Arguments of {@link walkHull} and {@link bridgeHull}. */
export interface WalkHullArgs {
  /** Number of steps; an integer from 0 to 2^53 - 1. */
  readonly steps: number;
  /** Dimension; an integer from 0 to 2^53 - 1. */
  readonly d: number;
}

/** Arguments of {@link jointWalkHull}. */
export interface JointWalkHullArgs {
  /** Number of steps of each walk; integers from 0 to 2^53 - 1. */
  readonly walks: readonly number[];
  /** Number of steps of each bridge; integers from 0 to 2^53 - 1. None if left out. */
  readonly bridges?: readonly number[];
  /** Dimension; an integer from 0 to 2^53 - 1. */
  readonly d: number;
}

/**
 * The probability that the hull of a random walk's positions S_1, ..., S_n in R^d contains its start,
 * for any number of steps up to 2^53 - 1.
 *
 * $$ P(0 \in \operatorname{conv}(S_1, \dots, S_n)) = P(K \ge d), \qquad
 *    K = \sum_{j=2}^{n} \operatorname{Bernoulli}\bigl(\tfrac{1}{2j}\bigr), $$
 *
 * the variables independent. $E K = (H_n - 1)/2 \approx \tfrac12 \ln n$: the hull reaches back only when
 * the walk is about $e^{2d}$ steps long. For $d = 1$ the complement is $2 \binom{2n}{n} / 4^n$.
 *
 * Assumptions: the joint law of the steps is unchanged by permutations and by independent changes of
 * sign (independent steps of one symmetric law suffice), and any $d$ of the positions are almost
 * surely linearly independent (no hyperplane has positive mass). Nothing else about the law matters.
 * Without symmetry the result does not apply: a drift makes it too large.
 *
 * Cost: below 0.1 ms up to 300 steps, about 0.1 ms beyond, whatever their number.
 *
 * Accuracy: relative error of the smaller tail at most $2 \cdot 10^{-14} \max(1, |\ln P|)$; the
 * largest measured is 5e-16 in that measure.
 *
 * Source: Convex hulls of random walks, hyperplane arrangements, and Weyl chambers, Geometric and
 * Functional Analysis 27 (2017), arXiv:1510.04073; in the form of a sum of independent variables.
 *
 * @param args - `steps`, the number of steps, and `d`, the dimension; both integers >= 0
 * @returns the probability that the hull contains the start; 0 for `steps` <= d, 1 for d = 0 and a
 * step or more
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { walkHull } from 'hullgauge/conic';
 * walkHull({ steps: 100, d: 2 }).value.toPrecision(12); // => '0.629864626174'
 * walkHull({ steps: 4, d: 3 }).value.toPrecision(12); // => '0.00520833333333'
 * ```
 */
export function walkHull(args: WalkHullArgs): Probability {
  const fn = 'walkHull';
  checkOptions(fn, args, ['steps', 'd']);
  const { steps, d } = args;
  checkInteger(fn, 'steps', steps, 0);
  checkInteger(fn, 'd', d, 0);
  return hullOfRuns([{ step: 2, from: 1, to: steps, count: 1 }], d);
}

/**
 * The probability that the hull of a random bridge's inner positions S_1, ..., S_(n-1) in R^d contains
 * its common start and end, for any number of steps up to 2^53 - 1.
 *
 * $$ P(0 \in \operatorname{conv}(S_1, \dots, S_{n-1})) = P(K \ge d), \qquad
 *    K = \sum_{j=3}^{n} \operatorname{Bernoulli}\bigl(\tfrac{1}{j}\bigr), \qquad S_n = 0, $$
 *
 * the variables independent. $E K = H_n - \tfrac32 \approx \ln n$. For $d = 1$ the complement is $2/n$.
 *
 * Assumptions: the steps are exchangeable (no symmetry is needed) and add up to 0, and any $d$ of the
 * inner positions are almost surely linearly independent. Any continuous sample minus its own mean,
 * in the order of observation, is such a bridge; so is a walk conditioned to return.
 *
 * Cost and accuracy: as for {@link walkHull}.
 *
 * Source: Convex hulls of random walks, hyperplane arrangements, and Weyl chambers, Geometric and
 * Functional Analysis 27 (2017), arXiv:1510.04073; in the form of a sum of independent variables.
 *
 * @param args - `steps`, the number of steps including the last, which returns to the start, and
 * `d`, the dimension; both integers >= 0
 * @returns the probability that the hull contains the start; 0 for `steps` <= d + 1, 1 for d = 0 and
 * two steps or more
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { bridgeHull } from 'hullgauge/conic';
 * bridgeHull({ steps: 100, d: 1 }).complement.toPrecision(12); // => '0.0200000000000'
 * bridgeHull({ steps: 1e12, d: 60 }).log.toPrecision(12); // => '-17.9447974154'
 * ```
 */
export function bridgeHull(args: WalkHullArgs): Probability {
  const fn = 'bridgeHull';
  checkOptions(fn, args, ['steps', 'd']);
  const { steps, d } = args;
  checkInteger(fn, 'steps', steps, 0);
  checkInteger(fn, 'd', d, 0);
  return hullOfRuns([{ step: 1, from: 2, to: steps, count: 1 }], d);
}

/**
 * The probability that the joint hull of several independent random walks and bridges in R^d, all
 * started at 0, contains the start.
 *
 * $$ P(0 \in \operatorname{conv}) = P(K \ge d), $$
 *
 * where $K$ is the sum of independent variables $\operatorname{Bernoulli}(1/(2j))$, $1 \le j \le n_i$, for each
 * walk of $n_i$ steps and $\operatorname{Bernoulli}(1/j)$, $2 \le j \le m_i$, for each bridge of $m_i$ steps, with
 * one variable of probability $\tfrac12$ left out. The start itself and the end of each bridge
 * are not among the points. With all walks of one step this is Wendel's formula.
 *
 * Assumptions: those of {@link walkHull} for each walk and of {@link bridgeHull} for each bridge,
 * all independent.
 *
 * Cost: as for {@link walkHull}, times the number of distinct lengths.
 *
 * Accuracy: relative error of the smaller tail at most $2 \cdot 10^{-14} \max(1, |\ln P|)$ for a few
 * walks; it grows with the square root of $E K$ for thousands, and `logError` says so.
 *
 * Source: derived from the product form in Convex hulls of random walks, hyperplane arrangements, and
 * Weyl chambers, Geometric and Functional Analysis 27 (2017), arXiv:1510.04073; checked by simulation.
 *
 * @param args - `walks` and `bridges`, the numbers of steps of each, and `d`, the dimension;
 * integers >= 0
 * @returns the probability that the hull contains the start; 0 while there are at most d points
 * @throws A {@link DomainError} if an argument is not such an integer or array, or an option is unknown
 *
 * @example
 * ```ts
 * import { jointWalkHull, originInHull } from 'hullgauge/conic';
 * jointWalkHull({ walks: [10, 10], bridges: [8], d: 3 }).value.toPrecision(12); // => '0.824897369668'
 * jointWalkHull({ walks: [1, 1, 1, 1, 1, 1], d: 3 }).value; // => 0.5
 * originInHull({ n: 6, d: 3 }).value; // => 0.5
 * ```
 */
export function jointWalkHull(args: JointWalkHullArgs): Probability {
  const fn = 'jointWalkHull';
  checkOptions(fn, args, ['walks', 'bridges', 'd']);
  const { walks, bridges = [], d } = args;
  checkLengths(fn, 'walks', walks);
  checkLengths(fn, 'bridges', bridges);
  checkInteger(fn, 'd', d, 0);
  return hullOfRuns([...pooled(2, 1, walks), ...pooled(1, 2, bridges)], d);
}

function checkLengths(fn: string, parameter: string, lengths: readonly number[]): void {
  if (!Array.isArray(lengths)) {
    throw new DomainError(fn, parameter, 'an array of integers >= 0', lengths);
  }
  for (let i = 0; i < lengths.length; i++) checkInteger(fn, `${parameter}[${i}]`, lengths[i], 0);
}

/** One run for each distinct length, counting the walks that are at least so long. */
function pooled(step: 1 | 2, first: number, lengths: readonly number[]): BernoulliRun[] {
  const sorted = [...lengths].filter((length) => length >= first).sort((a, b) => a - b);
  const runs: BernoulliRun[] = [];
  let from = first;
  for (let i = 0; i < sorted.length; i++) {
    const to = sorted[i] as number;
    if (to < from) continue;
    runs.push({ step, from, to, count: sorted.length - i });
    from = to + 1;
  }
  return runs;
}

/** P(0 in the hull) from the pooled variables, of which one of probability 1/2 is left out. */
function hullOfRuns(pool: readonly BernoulliRun[], d: number): Probability {
  const runs = pool.filter((run) => run.to >= run.from);
  const fair = runs.findIndex((run) => run.step * run.from === 2);
  // no point at all: an empty hull contains nothing
  if (fair < 0) return certainty(false);
  const { step, from, to, count } = runs[fair] as BernoulliRun;
  runs.splice(
    fair,
    1,
    { step, from, to: from, count: count - 1 },
    { step, from: from + 1, to, count },
  );
  const { tail, log, side, logError } = poissonBinomialTail(runs, d - 1);
  return probabilityFromTail(tail, log, side === 'lower' ? 'upper' : 'lower', logError);
}
