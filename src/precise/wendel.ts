/**
 * Wendel's probability and Cover's count as exact numbers, and the former to any number of digits.
 *
 * Both are sums of binomial coefficients: P(0 in conv) = 2^(1-n) sum_{k >= d} binom(n - 1, k).
 */
import type { Decimal } from 'decimal.js';
import { checkBoolean, checkInteger, checkOptions } from '../domain.ts';
import { arithmetic, exp, shift, toFloat } from './arithmetic.ts';
import { checkDigits, whole } from './fraction.ts';
import { logGammaIn } from './log-gamma.ts';
import { bitsFor, floatToDecimal, roundCorrectly, roundQuotient } from './round-correctly.ts';

/** Most points for which exact numbers are given: some 30,000 decimal digits, within a second. */
const MAX_EXACT_POINTS = 100_000;
/** Most points for decimals: some 10^6 terms, within two seconds. */
const MAX_POINTS = 100_000_000;
/** Up to here decimals are rounded from the exact fraction; ties occur only below. */
const FRACTION_POINTS = 2000;

/** A fraction in lowest terms. */
export interface ExactProbability {
  /** Numerator. */
  readonly numerator: bigint;
  /** Denominator, a positive power of two. */
  readonly denominator: bigint;
  /**
   * The fraction rounded to so many significant digits, ties to even.
   *
   * @param digits - an integer from 1 to 1000
   */
  toDecimal(digits: number): Decimal;
  /** Numerator and denominator with a slash between. */
  toString(): string;
}

/** Arguments of {@link originInHullExact}. */
export interface OriginInHullExactArgs {
  /** Number of points, an integer from 0 to 100,000. */
  readonly n: number;
  /** Dimension, an integer >= 0. */
  readonly d: number;
}

/** Arguments of {@link dichotomyCountExact}. */
export interface DichotomyCountExactArgs extends OriginInHullExactArgs {
  /** Whether an intercept is fitted too, which adds one coefficient; `true` if left out. */
  readonly intercept?: boolean;
}

/** Arguments of {@link originInHullDecimal}. */
export interface OriginInHullDecimalArgs {
  /** Number of points, an integer from 0 to 100 million. */
  readonly n: number;
  /** Dimension, an integer >= 0. */
  readonly d: number;
  /** Significant digits of the result, an integer from 1 to 1000. */
  readonly digits: number;
}

/**
 * The probability that n points surround the target in R^d as an exact fraction in lowest terms, for n
 * up to 100,000.
 *
 * $$ P(0 \in \operatorname{conv}\lbrace X_1,\dots,X_n\rbrace) = 2^{1-n} \sum_{k=d}^{n-1} \binom{n-1}{k} $$
 *
 * Assumptions: as for `originInHull`, the same question in doubles: a joint law unchanged by flipping
 * signs, points in general position; too optimistic for skewed laws.
 *
 * @param args - `n`: an integer from 0 to 100,000; `d`: an integer >= 0
 * @returns numerator and denominator, with `toDecimal` and `toString`; 0/1 for n <= d
 * @remarks min(d, n - d) additions of n-bit numbers: a millisecond at n = 1000, below a second at the
 *   largest n.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "A problem in geometric probability", Mathematica Scandinavica 11 (1962) 109-111,
 * doi:10.7146/math.scand.a-10655.
 *
 * @example
 * ```ts
 * import { originInHullExact } from 'hullgauge/precise';
 * const p = originInHullExact({ n: 10, d: 3 });
 * `${p}`; // => '233/256'
 * p.toDecimal(20).toString(); // => '0.91015625'
 * ```
 */
export function originInHullExact(args: OriginInHullExactArgs): ExactProbability {
  const fn = 'originInHullExact';
  checkOptions(fn, args, ['n', 'd']);
  const { n, d } = args;
  checkInteger(fn, 'n', n, 0, MAX_EXACT_POINTS);
  checkInteger(fn, 'd', d, 0);
  return new DyadicFraction(n === 0 ? 0n : binomialSum(n - 1, n - 1 - d), Math.max(0, n - 1));
}

/**
 * The number of ways in which d slopes and an intercept can split n points in general position into
 * two labelled classes, exactly, for n up to 100,000.
 *
 * $$ C(n, p) = 2 \sum_{k=0}^{p-1} \binom{n-1}{k}, \qquad p = d + 1 \text{ (}d\text{ without intercept)} $$
 *
 * Assumptions: the points are in general position; otherwise the count is smaller.
 *
 * @param args - `n`: an integer from 0 to 100,000; `d`: an integer >= 0; `intercept`: `true` if left out
 * @returns the count; all $2^n$ for n <= p, 1 for no points, 0 for points but no coefficient
 * @remarks Cost as {@link originInHullExact}.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "Geometrical and statistical properties of systems of linear inequalities with applications
 * in pattern recognition", IEEE Transactions on Electronic Computers EC-14 (1965) 326-334,
 * doi:10.1109/PGEC.1965.264137.
 *
 * @example
 * ```ts
 * import { dichotomyCountExact } from 'hullgauge/precise';
 * dichotomyCountExact({ n: 4, d: 2 }); // => 14n
 * dichotomyCountExact({ n: 100, d: 9 }).toString(); // => '3836629637040'
 * ```
 */
export function dichotomyCountExact(args: DichotomyCountExactArgs): bigint {
  const fn = 'dichotomyCountExact';
  checkOptions(fn, args, ['n', 'd', 'intercept']);
  const { n, d, intercept = true } = args;
  checkInteger(fn, 'n', n, 0, MAX_EXACT_POINTS);
  checkInteger(fn, 'd', d, 0);
  checkBoolean(fn, 'intercept', intercept);
  const p = intercept ? d + 1 : d;
  return n === 0 ? 1n : 2n * binomialSum(n - 1, p - 1);
}

/**
 * The probability that n points surround the target in R^d, correctly rounded to any number of digits
 * up to 1,000, for n up to 100 million.
 *
 * $$ P = 2^{1-n} \sum_{k=d}^{n-1} \binom{n-1}{k} $$
 *
 * The terms of the smaller tail are added by their ratios, the largest from log-gamma. The probability
 * of the complement is that of n - d in the place of d. Assumptions: as {@link originInHullExact}.
 *
 * @param args - `n`: an integer from 0 to 100 million; `d`: an integer >= 0; `digits`: an integer from 1
 *   to 1000
 * @returns the probability, rounded to `digits` significant digits, ties to even
 * @remarks About $\sqrt{n \cdot \text{digits}}$ terms at most: a millisecond for 50 digits at n = 10^6,
 *   about a second for 1,000 digits at the largest n.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "A problem in geometric probability", Mathematica Scandinavica 11 (1962) 109-111,
 * doi:10.7146/math.scand.a-10655.
 *
 * @example
 * ```ts
 * import { originInHullDecimal } from 'hullgauge/precise';
 * originInHullDecimal({ n: 1000000, d: 500100, digits: 25 }).toString(); // => '0.4207402577133000994288726'
 * ```
 */
export function originInHullDecimal(args: OriginInHullDecimalArgs): Decimal {
  const fn = 'originInHullDecimal';
  checkOptions(fn, args, ['n', 'd', 'digits']);
  const { n, d, digits } = args;
  checkInteger(fn, 'n', n, 0, MAX_POINTS);
  checkInteger(fn, 'd', d, 0);
  checkDigits(fn, digits);
  if (n <= FRACTION_POINTS) return originInHullExact({ n, d }).toDecimal(digits);
  if (d === 0 || n <= d) return roundQuotient(d === 0 ? 1n : 0n, 1n, digits);
  return roundCorrectly(digits, (accuracy) => fairTail(n - 1, d, accuracy));
}

/** P(Bin(trials, 1/2) >= from) with a relative error below 10^-accuracy; 0 < from <= trials. */
function fairTail(trials: number, from: number, accuracy: number): Decimal {
  const context = arithmetic(bitsFor(accuracy, 96));
  // The sum starts at the largest term of the smaller tail and runs outwards.
  const upper = 2 * from > trials;
  const start = upper ? from : trials - from + 1;
  let term = context.one;
  let sum = term;
  for (let k = start; k < trials && term !== 0n; k++) {
    term = (term * BigInt(trials - k)) / BigInt(k + 1);
    sum += term;
  }
  const logGamma = logGammaIn(context);
  let log = logGamma(whole(trials + 1)) - logGamma(whole(start + 1));
  log -= logGamma(whole(trials - start + 1)) + BigInt(trials) * context.ln2;
  const { mantissa, exponent } = exp(context, log);
  const tail = toFloat(context.bits, mantissa * sum, exponent - context.bits);
  if (upper) return floatToDecimal(context, tail);
  const rest = context.one - shift(tail.mantissa, tail.exponent + context.bits);
  return floatToDecimal(context, toFloat(context.bits, rest, -context.bits));
}

/** sum_{k <= last} binom(trials, k): 0 for a negative `last`. */
function binomialSum(trials: number, last: number): bigint {
  if (last >= trials) return 1n << BigInt(trials);
  // The shorter side.
  if (2 * last >= trials) return (1n << BigInt(trials)) - binomialSum(trials, trials - 1 - last);
  let term = 1n;
  let sum = last < 0 ? 0n : 1n;
  for (let k = 1; k <= last; k++) {
    term = (term * BigInt(trials - k + 1)) / BigInt(k);
    sum += term;
  }
  return sum;
}

/** numerator / 2^exponent in lowest terms. */
class DyadicFraction implements ExactProbability {
  readonly numerator: bigint;
  readonly denominator: bigint;

  constructor(numerator: bigint, exponent: number) {
    // The lowest set bit of the numerator is the greatest power of two that divides it.
    const full = 1n << BigInt(exponent);
    const lowest = numerator === 0n ? full : numerator & -numerator;
    this.numerator = numerator / lowest;
    this.denominator = full / lowest;
  }

  toDecimal(digits: number): Decimal {
    checkDigits('originInHullExact.toDecimal', digits);
    return roundQuotient(this.numerator, this.denominator, digits);
  }

  toString(): string {
    return `${this.numerator}/${this.denominator}`;
  }
}
