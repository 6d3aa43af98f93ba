/**
 * Wendel's formula: the probability that random points surround a target.
 *
 * For n points whose joint law does not change when signs are flipped, in general position in R^d,
 *
 *   P(0 not in conv) = P(Bin(n - 1, 1/2) <= d - 1) = I_{1/2}(n - d, d),
 *
 * whatever the law. The binomial kernel of the special functions does the work.
 */
import { type Count, resolveCount } from '../count.ts';
import { checkInteger, checkOptions } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { fairTailOfPoints } from '../special/fair-binomial.ts';
import { store, TAIL_SLOTS, tailProbability } from '../special/tail-result.ts';

/** Arguments of {@link originInHull}. */
export interface OriginInHullArgs {
  /** Number of points: an integer >= 0, any finite double above 2^53, or a LogNumber. */
  readonly n: Count;
  /** Dimension: an integer from 0 to 2^53 - 1. */
  readonly d: number;
}

/**
 * The probability that n points surround the target in R^d. For skewed data this is the optimistic
 * size, never a safe one: {@link originInHullLowerBound} gives the bound that holds for any law.
 *
 * For independent points whose laws are symmetric about the target (or any joint law unchanged by
 * flipping signs) and that lie in general position, Wendel's formula holds whatever the law:
 *
 * $$ P(0 \in \operatorname{conv}\lbrace X_1,\dots,X_n\rbrace) = P\bigl(\mathrm{Bin}(n-1,\tfrac12) \ge d\bigr)
 *    = I_{1/2}(d,\, n-d). $$
 *
 * Assumptions: with probability 1 every d of the points are linearly independent, seen from the
 * target. If no hyperplane through the target carries mass but the law is not symmetric, the number is
 * an upper bound of the true probability, so the sample size it gives is necessary but not
 * sufficient. If hyperplanes carry mass it is nothing.
 *
 * @param args - `n`: number of points, an integer >= 0, a double above 2^53 or a LogNumber; `d`:
 *   dimension, an integer from 0 to 2^53 - 1
 * @returns the probability; exactly 0 for n <= d, exactly 1/2 at n = 2d; correctly rounded for n <= 54
 * @remarks Constant cost, a microsecond or less. Relative error of the smaller tail below 2e-15 down to
 *   1e-300, of its logarithm below 1e-15; measured figures on the accuracy page. The number holds under
 *   the stated assumptions; it does not replace a safety review.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "A problem in geometric probability", Mathematica Scandinavica 11 (1962) 109-111,
 * doi:10.7146/math.scand.a-10655. Upper bound for other laws: "A continuous analogue of the upper
 * bound theorem", Discrete and Computational Geometry 26 (2001) 205-219, doi:10.1007/s00454-001-0028-9.
 *
 * @example
 * ```ts
 * import { originInHull } from 'hullgauge';
 * originInHull({ n: 10, d: 3 }).value; // => 0.91015625
 * originInHull({ n: 80, d: 40 }).value; // => 0.5
 * originInHull({ n: 1e6, d: 40 }).logComplement.toPrecision(12); // => '-692714.315002'
 * ```
 */
export function originInHull(args: OriginInHullArgs): Probability {
  const fn = 'originInHull';
  checkOptions(fn, args, ['n', 'd']);
  const { n } = resolveCount(fn, 'n', args.n);
  checkInteger(fn, 'd', args.d, 0);
  return wendel(n, args.d);
}

/** Wendel's probability of being surrounded, without checks. */
export function wendel(n: number, d: number): Probability {
  const out = new Float64Array(TAIL_SLOTS);
  return tailProbability(wendelTail(n, d, out), out);
}

/**
 * The smaller of P(surrounded) and P(not surrounded): value, logarithm and error bound in `out`.
 *
 * @returns whether the smaller one is P(surrounded)
 */
export function wendelTail(n: number, d: number, out: Float64Array): boolean {
  if (n > d && d > 0 && n < Infinity) return !fairTailOfPoints(n, d, out);
  // The only point of R^0 is the target; no point surrounds nothing. Of the tail of more points than
  // doubles can count nothing is known but that it is below e^(-1e308).
  store(0, -Infinity, d > 0 && n === Infinity ? Infinity : 0, out);
  return n <= d;
}
