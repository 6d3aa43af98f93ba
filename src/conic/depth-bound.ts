/**
 * A bound on the probability of being surrounded that holds for any law, through the half-space depth
 * of the target.
 *
 * Notation: a = depth, K = Bin(n, a). Two bounds on P(not surrounded):
 *
 *   A: P(K <= d), for any law;
 *   B: P(K <= d - 1) + binom(n - 1, d - 1) a^n, where no hyperplane through the target carries mass.
 *
 * B in its other form, with only positive terms, for the probability of being surrounded, where
 * r = (a/(1 - a))^(n-d):
 *
 *   P(K >= d + 1) + P(K = d) ((n - d)/n + d/n (1 - r)).
 */
import { type Count, resolveCount } from '../count.ts';
import { checkBoolean, checkFinite, checkInteger, checkOptions } from '../domain.ts';
import { certainty, Probability, probabilityFromTail } from '../probability.ts';
import { logBinomialPmfKernel } from '../special/binomial.ts';
import { incompleteBetaKernel, incompleteBetaProbability } from '../special/incomplete-beta.ts';
import { wendel } from './wendel.ts';

/** Arguments of {@link originInHullLowerBound}. */
export interface OriginInHullLowerBoundArgs {
  /** Number of points: an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 0 to 2^53 - 1. */
  readonly d: number;
  /**
   * Half-space depth of the target under the law of the points: the smallest probability of a closed
   * half-space that contains it; from 0 to 1, and at most 1/2 in general position.
   */
  readonly depth: number;
  /** Whether no hyperplane through the target carries mass; `false` if left out. */
  readonly generalPosition?: boolean;
}

/**
 * A lower bound on the probability that n points surround the target in R^d, for any law, from the
 * half-space depth of the target: the safe size where {@link originInHull} is the optimistic one.
 *
 * With $K \sim \mathrm{Bin}(n, \alpha)$ and depth $\alpha$,
 *
 * $$ P(\text{not surrounded}) \le P(K \le d) $$
 *
 * for any law (bound A), and if no hyperplane through the target carries mass (bound B)
 *
 * $$ P(\text{not surrounded}) \le P(K \le d-1) + \binom{n-1}{d-1}\alpha^n . $$
 *
 * Status: A follows from the exact feasibility theorem of scenario programs. B is this library's own;
 * its proof is only sketched and it was checked numerically (against simulation in R^3 and exactly in
 * the plane). B is attained by mixtures of a symmetric law with one fixed direction, and equals
 * Wendel's formula at depth 1/2.
 *
 * The depth is a property of the law and the target, not of the sample; a sample depth does not replace
 * it. The mean of a log-concave law has depth at least 1/e. The number holds under these assumptions;
 * it does not replace a safety review.
 *
 * @param args - `n`: number of points; `d`: dimension; `depth`: half-space depth in [0, 1];
 *   `generalPosition`: whether bound B may be used, `false` if left out
 * @returns a probability that is at most the true one; 0 for n <= d
 * @remarks Constant cost. Relative error of the bound's smaller tail below its `logError`.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, or if `depth`
 *   exceeds 1/2 with `generalPosition`
 *
 * Source: "The exact feasibility of randomized solutions of uncertain convex programs", SIAM Journal on
 * Optimization 19 (2008) 1211-1230, doi:10.1137/07069821X, for A; "A continuous analogue of the upper
 * bound theorem", Discrete and Computational Geometry 26 (2001) 205-219, doi:10.1007/s00454-001-0028-9,
 * for the function from which B is derived.
 *
 * @example
 * ```ts
 * import { originInHull, originInHullLowerBound } from 'hullgauge';
 * originInHull({ n: 20, d: 3 }).value.toPrecision(6); // => '0.999636'
 * originInHullLowerBound({ n: 20, d: 3, depth: 0.3 }).value.toPrecision(6); // => '0.892913'
 * originInHullLowerBound({ n: 20, d: 3, depth: 0.3, generalPosition: true }).value.toPrecision(6); // => '0.964517'
 * ```
 */
export function originInHullLowerBound(args: OriginInHullLowerBoundArgs): Probability {
  const fn = 'originInHullLowerBound';
  checkOptions(fn, args, ['n', 'd', 'depth', 'generalPosition']);
  const { n } = resolveCount(fn, 'n', args.n);
  const { d, depth, generalPosition = false } = args;
  checkInteger(fn, 'd', d, 0);
  checkBoolean(fn, 'generalPosition', generalPosition);
  checkFinite(fn, 'depth', depth, 0, generalPosition ? 0.5 : 1);
  if (n === 0 || (d > 0 && (n <= d || depth === 0))) {
    return certainty(false);
  }
  if (d === 0 || depth === 1) return certainty(true);
  if (n === Number.POSITIVE_INFINITY) {
    return probabilityFromTail(0, Number.NEGATIVE_INFINITY, 'upper', Number.POSITIVE_INFINITY);
  }
  if (generalPosition && depth === 0.5) return wendel(n, d);
  const bound = generalPosition
    ? inGeneralPosition(n, d, depth)
    : incompleteBetaProbability(d + 1, n - d, depth, 1 - depth);
  return n <= 2 ** 53 ? bound : ofRoundedCount(bound, n, d, depth);
}

/** The bound with what the rounding of n - d beyond 2^53 may add to the error of its smaller tail. */
function ofRoundedCount(bound: Probability, n: number, d: number, depth: number): Probability {
  const mean = n * depth;
  const shift = (2 ** -52 * (Math.abs(d - mean) + Math.sqrt(mean))) / (1 - depth);
  const { value, complement, log, logComplement, logError } = bound;
  return new Probability(value, complement, log, logComplement, logError + shift);
}

/**
 * Bound B for 0 < depth < 1/2 and n > d, on its smaller side. With the ratio r = (a/(1 - a))^(n-d) its
 * extra terms are P(K = d) d/n r and P(K = d)(1 - d/n r), so no large logarithms are subtracted.
 */
function inGeneralPosition(n: number, d: number, depth: number): Probability {
  const rest = n - d;
  const atLevel = logBinomialPmfKernel(n, d, depth, 1 - depth);
  const logRatio =
    rest *
    (depth > 0.25 ? Math.log1p((2 * depth - 1) / (1 - depth)) : Math.log(depth / (1 - depth)));
  const outside = new TermSum();
  outside.addTail(d, rest + 1, depth, false);
  outside.addTerm(atLevel + (logRatio + Math.log(d / n)), Math.abs(atLevel) - logRatio);
  if (outside.log < -Math.LN2) return outside.probability('upper');
  const inside = new TermSum();
  inside.addTail(d + 1, rest, depth, true);
  const share = rest / n - (d / n) * Math.expm1(logRatio);
  inside.addTerm(atLevel + Math.log(share), Math.abs(atLevel));
  return inside.probability('lower');
}

/** A sum of positive terms given by logarithms, with the error that each brings. */
class TermSum {
  log: number = Number.NEGATIVE_INFINITY;
  private value = 0;
  private weightedError = 0;

  /** Adds I_p(a, b), or its complement. */
  addTail(a: number, b: number, p: number, lower: boolean): void {
    const out = new Float64Array(3);
    const small = incompleteBetaKernel(a, b, p, 1 - p, out);
    const tail = out[0] as number;
    if (small === lower) this.add(tail, out[1] as number, out[2] as number);
    else this.add(1 - tail, Math.log1p(-tail), out[2] as number);
  }

  /** Adds e^log, formed from logarithms whose sizes add up to `size`. */
  addTerm(log: number, size: number): void {
    this.add(Math.exp(log), log, 2 ** -51 * (4 + size));
  }

  private add(value: number, log: number, error: number): void {
    // nothing to add, and its error may be infinite
    if (log === Number.NEGATIVE_INFINITY) return;
    const largest = Math.max(this.log, log);
    const before = Math.exp(this.log - largest);
    const added = Math.exp(log - largest);
    this.weightedError = (before * this.weightedError + added * error) / (before + added);
    this.log = largest + Math.log(before + added);
    // The number keeps digits that the rounding of a large logarithm loses.
    this.value += value;
  }

  /** The sum as the smaller tail of a probability. */
  probability(side: 'lower' | 'upper'): Probability {
    const error = this.weightedError + 2 ** -51 * (1 + Math.abs(this.log));
    return probabilityFromTail(Math.min(this.value, 1), Math.min(this.log, 0), side, error);
  }
}
