/**
 * Cover's counting of dichotomies, and what it says of random labels and logistic fits.
 *
 * Notation: p = number of fitted coefficients, the slopes and one more with an intercept. The number
 * of ways in which a hyperplane can split n points in general position is
 *
 *   C(n, p) = 2 sum_{k < p} binom(n - 1, k) = 2^n P(Bin(n - 1, 1/2) <= p - 1),
 *
 * so everything rests on Wendel's tail.
 */
import { checkBoolean, checkInteger, checkOptions } from '../domain.ts';
import { LogNumber } from '../log-number.ts';
import { complementOf, type Probability } from '../probability.ts';
import { betaFraction } from '../special/beta-fraction.ts';
import { logBetaKernel, logBinomialKernel } from '../special/log-beta.ts';
import { wendel, wendelTail } from './wendel.ts';

/** Arguments of the questions about labelled cases. */
export interface LabelArgs {
  /** Number of cases: an integer from 0 to 2^53 - 1. */
  readonly n: number;
  /** Number of fitted slopes, the rank of the design without the intercept: an integer >= 0. */
  readonly d: number;
  /** Whether an intercept is fitted too, which adds one coefficient; `true` if left out. */
  readonly intercept?: boolean;
}

/**
 * The probability that n cases with random labels are linearly separable by d slopes and an
 * intercept.
 *
 * With p = d + 1 coefficients (p = d without the intercept),
 *
 * $$ P(\text{separable}) = 2^{1-n} \sum_{k=0}^{p-1} \binom{n-1}{k}
 *    = P\bigl(\mathrm{Bin}(n-1,\tfrac12) \le p-1\bigr). $$
 *
 * Assumptions: each label is an independent fair coin, whatever the points, which lie in general
 * position. With biased coins or fixed class sizes the probability depends on the points and is larger
 * as a rule; this number is then neither.
 *
 * @param args - `n`: number of cases; `d`: number of slopes; `intercept`: `true` if left out
 * @returns the probability; exactly 1 for n <= p, exactly 1/2 at n = 2p
 * @remarks Cost and accuracy as {@link originInHull}.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "Geometrical and statistical properties of systems of linear inequalities with applications
 * in pattern recognition", IEEE Transactions on Electronic Computers EC-14 (1965) 326-334,
 * doi:10.1109/PGEC.1965.264137.
 *
 * @example
 * ```ts
 * import { labelSeparability } from 'hullgauge';
 * labelSeparability({ n: 82, d: 40 }).value; // => 0.5
 * labelSeparability({ n: 120, d: 40 }).value.toPrecision(6); // => '0.000222655'
 * ```
 */
export function labelSeparability(args: LabelArgs): Probability {
  const p = coefficients('labelSeparability', args);
  return complementOf(wendel(args.n, p));
}

/**
 * The probability that the maximum-likelihood fit of a logistic regression exists when the labels are
 * pure noise.
 *
 * The fit exists, finite and unique, if and only if the classes overlap; with p coefficients including
 * the intercept,
 *
 * $$ P(\text{exists}) = P\bigl(\mathrm{Bin}(n-1,\tfrac12) \ge p\bigr). $$
 *
 * The same holds for every binary link whose log-likelihood is strictly concave. Assumptions: labels
 * fair and independent of the points, points in general position; a signal makes separation likelier.
 *
 * @param args - `n`: number of cases; `d`: number of slopes; `intercept`: `true` if left out
 * @returns the probability; exactly 0 for n <= p
 * @remarks Cost and accuracy as {@link originInHull}.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "The phase transition for the existence of the maximum likelihood estimate in
 * high-dimensional logistic regression", Annals of Statistics 48 (2020) 27-42, arXiv:1804.09753.
 *
 * @example
 * ```ts
 * import { logisticFitExists } from 'hullgauge';
 * logisticFitExists({ n: 100, d: 20 }).complement.toExponential(5); // => '8.96208e-10'
 * ```
 */
export function logisticFitExists(args: LabelArgs): Probability {
  const p = coefficients('logisticFitExists', args);
  return wendel(args.n, p);
}

/**
 * The number of ways in which d slopes and an intercept can split n points in general position into
 * two labelled classes.
 *
 * $$ C(n, p) = 2 \sum_{k=0}^{p-1} \binom{n-1}{k}, \qquad p = d + 1 \text{ (}d\text{ without intercept)}. $$
 *
 * Assumptions: the points are in general position; otherwise the count is smaller.
 *
 * @param args - `n`: number of points; `d`: number of slopes; `intercept`: `true` if left out
 * @returns the count; all $2^n$ for n <= p, 1 for no points, 0 for points but no coefficient
 * @remarks At most 300 terms, constant cost beyond. Relative error of the logarithm below 2e-15.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "Geometrical and statistical properties of systems of linear inequalities with applications
 * in pattern recognition", IEEE Transactions on Electronic Computers EC-14 (1965) 326-334,
 * doi:10.1109/PGEC.1965.264137.
 *
 * @example
 * ```ts
 * import { dichotomyCount } from 'hullgauge';
 * dichotomyCount({ n: 4, d: 2 }).value; // => 14
 * `${dichotomyCount({ n: 1e6, d: 1000 })}`; // => '3.015669923e+3432'
 * ```
 */
export function dichotomyCount(args: LabelArgs): LogNumber {
  const p = coefficients('dichotomyCount', args);
  const log = logDichotomies(args.n, p);
  return LogNumber.fromLog(log, log > 0 ? 2e-15 * Math.max(1, log) : 0);
}

/** Validates and returns the number of fitted coefficients. */
function coefficients(fn: string, args: LabelArgs): number {
  checkOptions(fn, args, ['n', 'd', 'intercept']);
  const { n, d, intercept = true } = args;
  checkInteger(fn, 'n', n, 0);
  checkInteger(fn, 'd', d, 0);
  checkBoolean(fn, 'intercept', intercept);
  return intercept ? d + 1 : d;
}

/** Up to here twice the sum of binomial coefficients is an exact double. */
const EXACT_POINTS = 53;
/** Sums of at most this many coefficients are formed term by term. */
const DIRECT_TERMS = 300;

/** log C(n, p), without checks; also the logarithm of the number of regions of n central hyperplanes. */
export function logDichotomies(n: number, p: number): number {
  if (n === 0) return 0;
  if (p === 0) return Number.NEGATIVE_INFINITY;
  if (n <= p) return n * Math.LN2;
  if (n <= EXACT_POINTS) {
    let term = 1;
    let sum = 1;
    for (let k = 1; k < p; k++) {
      // The product may exceed 2^53 by a few bits, the quotient is whole.
      term = Math.round((term * (n - k)) / k);
      sum += term;
    }
    return Math.log(2 * sum);
  }
  if (2 * p <= n && p <= DIRECT_TERMS) {
    // The largest coefficient times a sum of ratios that decrease from 1.
    let ratio = 1;
    let sum = 1;
    for (let k = p - 1; k >= 1 && ratio > 1e-18 * sum; k--) {
      ratio *= k / (n - k);
      sum += ratio;
    }
    return Math.LN2 + logBinomialKernel(n - 1, p - 1) + Math.log(sum);
  }
  const out = new Float64Array(3);
  const insideIsSmall = wendelTail(n, p, out);
  const logOutside = insideIsSmall ? Math.log1p(-(out[0] as number)) : (out[1] as number);
  const all = n * Math.LN2;
  // All splits times the fraction that a hyperplane can do, unless the two logarithms would cancel.
  if (logOutside > -0.5 * all) return all + logOutside;
  return Math.log(betaFraction(n - p, p, 0.5, 0.5, n / 2 - p)) - logBetaKernel(n - p, p);
}
