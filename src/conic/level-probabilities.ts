/**
 * Level probabilities: the weights of order-restricted tests.
 *
 * Notation: P(l, k) is the probability that the order-restricted fit to k normal means that are equal
 * has l distinct values; the degrees of freedom are l - 1, which is the index of the arrays here. Group i has
 * the weight w_i, its number of observations over their variance.
 */
import { checkInteger, checkOptions, checkPositive, DomainError } from '../domain.ts';
import { logOrthantTermKernel } from '../numeric/orthant.ts';
import { weylChamber } from './cone-families.ts';
import { checkWeights } from './mixture.ts';

const TWO_PI = 6.283185307179586;
/** Up to this many groups unequal weights have elementary level probabilities. */
const ELEMENTARY = 4;
/** Rows cost k^2/2 operations. */
const LARGEST_ORDER = 30_000;
/** Group weights may differ by this factor. */
const SMALLEST_RATIO = 1e-100;
/** Each weight of a tree is two integrals. */
const LARGEST_TREE = 2000;

/**
 * The level probabilities of k groups in a total order mu_1 <= ... <= mu_k, for equal weights and any
 * k, or unequal weights and k <= 4.
 *
 * With equal weights the degrees of freedom are a sum of independent events of probability 1/2, 1/3, .., 1/k:
 *
 * $$ \sum_j w_j t^j = \prod_{j=2}^{k} \frac{t + j - 1}{j}. $$
 *
 * With unequal ones they are solid angles, elementary up to four groups. They are continuous in the
 * weights, but not indifferent to them: tables for equal weights mislead if group sizes differ much.
 *
 * @param k - number of groups, an integer from 1 to 30000; to 4 if the weights differ
 * @param weights - one positive number a group, in the order of the groups: its number of observations
 *   divided by their variance; equal if left out. Only their ratios matter, for unequal weights at least
 *   1e-100 to the largest
 * @returns the level probabilities, frozen; index = degrees of freedom, 0 to k - 1
 * @remarks Cost: $k^2/2$ operations, 0.2 s at k = 10000. Relative error below 3e-15 to k = 4, below
 *   1e-14 for any k.
 * @throws A {@link DomainError} if an argument is out of its domain, or the weights of more than four
 *   groups differ ({@link approxTotalOrder} takes those)
 *
 * Source: "Order Restricted Statistical Inference", Wiley (1988).
 *
 * @example
 * ```ts
 * import { totalOrder } from 'hullgauge';
 * totalOrder(4); // => [0.25, 11 / 24, 0.25, 1 / 24]
 * totalOrder(3, [10, 40, 10])[2]?.toPrecision(12); // => '0.217952891576'
 * ```
 */
export function totalOrder(k: number, weights?: readonly number[]): readonly number[] {
  const fn = 'totalOrder';
  checkInteger(fn, 'k', k, 1, LARGEST_ORDER);
  if (weights !== undefined) {
    checkGroupWeights(fn, weights, k);
    if (weights.some((weight) => weight !== weights[0])) {
      if (k <= ELEMENTARY) return Object.freeze(unequalOrder(weights));
      const requirement = `equal for more than ${ELEMENTARY} groups (approxTotalOrder takes others)`;
      throw new DomainError(fn, 'weights', requirement, weights);
    }
  }
  return Object.freeze(weylChamber('A', k).intrinsicVolumes.slice(1));
}

/** Refuses anything but k positive numbers. */
export function checkGroupWeights(
  fn: string,
  weights: unknown,
  k?: number,
): asserts weights is readonly number[] {
  if (!Array.isArray(weights) || weights.length !== (k ?? weights.length) || weights.length < 1) {
    const requirement = k === undefined ? 'an array of numbers' : `an array of ${k} numbers`;
    throw new DomainError(fn, 'weights', requirement, weights);
  }
  let least = 0;
  let most = 0;
  for (let i = 0; i < weights.length; i++) {
    checkPositive(fn, `weights[${i}]`, weights[i]);
    if (weights[i] < weights[least]) least = i;
    if (weights[i] > weights[most]) most = i;
  }
  if (weights[least] < SMALLEST_RATIO * weights[most]) {
    const requirement = `at least ${SMALLEST_RATIO} times the largest weight`;
    throw new DomainError(fn, `weights[${least}]`, requirement, weights[least]);
  }
}

/**
 * Two to four groups. The cosine between neighbouring differences of means is -c; every angle comes
 * from an arc tangent whose arguments are free of cancellation where it is small.
 */
function unequalOrder(given: readonly number[]): number[] {
  const largest = Math.max(...given);
  const w = given.map((weight) => weight / largest) as [number, number, number, number];
  if (given.length === 2) return [0.5, 0.5];
  if (given.length === 3) {
    return [lowestLevel(w[0], w[1], w[2]), 0.5, highestLevel(w[0], w[1], w[2])];
  }
  const [a, b, c, d] = w;
  const left = cosine(a, b, c);
  const right = cosine(b, c, d);
  const leftSine = sine(a, b, c);
  const rightSine = sine(b, c, d);
  // determinant of the correlations of the three differences
  const determinant = (((a + b + c + d) / (a + b)) * (b / (b + c)) * c) / (c + d);
  // a right spherical triangle: tan(E/2) is the product of the tangents of the half legs
  const tangent = determinant / ((rightSine + left) * (leftSine + right));
  const all = Math.atan(tangent) / TWO_PI;
  // 1 - left - right, the difference of 1 and a cosine near 1 by way of the sine
  const [most, least] = left > right ? [leftSine, right] : [rightSine, left];
  const rest = (most * most) / (1 + Math.max(left, right)) - least;
  const one = Math.atan2(Math.sqrt(determinant), rest) / TWO_PI;
  const two = 0.125 + 0.5 * (lowestLevel(a, b, c) + lowestLevel(b, c, d));
  const three =
    0.5 * (highestLevel(a + b, c, d) + highestLevel(a, b + c, d) + highestLevel(a, b, c + d));
  return [one, two, three, all];
}

/** sqrt(a c / ((a + b)(b + c))), minus the correlation of the two differences of three means. */
function cosine(a: number, b: number, c: number): number {
  return Math.sqrt(a / (a + b)) * Math.sqrt(c / (b + c));
}

function sine(a: number, b: number, c: number): number {
  return Math.sqrt(b / (a + b)) * Math.sqrt((a + b + c) / (b + c));
}

/** P(3, 3): the angle between the two restrictions. */
function highestLevel(a: number, b: number, c: number): number {
  return Math.atan2(sine(a, b, c), cosine(a, b, c)) / TWO_PI;
}

/** P(1, 3). */
function lowestLevel(a: number, b: number, c: number): number {
  return Math.atan2(sine(a, b, c), -cosine(a, b, c)) / TWO_PI;
}

/** Options of {@link simpleTree}. */
export interface SimpleTreeOptions {
  /** Weight of the control group: its number of observations over their variance; 1 if left out. */
  readonly control?: number;
  /** Weight of each treatment group; 1 if left out. */
  readonly treatment?: number;
}

/**
 * The level probabilities of a simple tree order: one control group and k - 1 treatments that are not
 * below it, mu_0 <= mu_i, with one common weight of the treatments.
 *
 * With q(m, r) the probability that m normal variables with common correlation r are all positive, $w_0$
 * the weight of the control and w that of a treatment,
 *
 * $$ w_j = \binom{k-1}{j}\, q\Bigl(j, \frac{w}{w_0 + (k-j)\,w}\Bigr)\, q\Bigl(k-1-j, \frac{-w}{w_0 + (k-2-j)\,w}\Bigr). $$
 *
 * @param k - number of all groups, the control included: an integer from 1 to 2000
 * @param options - `control`, `treatment`: positive weights, numbers of observations over their variance,
 *   the control at least 1e-4 and at most 1e12 times a treatment
 * @returns the level probabilities, frozen; index = degrees of freedom, 0 to k - 1
 * @remarks Cost: two integrals a weight. Relative error of each below 1e-13.
 * @throws A {@link DomainError} if an argument is unknown or out of its domain
 *
 * Source: "Order Restricted Statistical Inference", Wiley (1988).
 *
 * @example
 * ```ts
 * import { simpleTree } from 'hullgauge';
 * simpleTree(4).map((w) => w.toFixed(9)); // => ['0.043869914', '0.250000000', '0.456130086', '0.250000000']
 * simpleTree(4, { control: 30, treatment: 10 })[3]?.toFixed(9); // => '0.185322967'
 * ```
 */
export function simpleTree(k: number, options: SimpleTreeOptions = {}): readonly number[] {
  const fn = 'simpleTree';
  checkInteger(fn, 'k', k, 1, LARGEST_TREE);
  checkOptions(fn, options, ['control', 'treatment']);
  const { control = 1, treatment = 1 } = options;
  checkPositive(fn, 'control', control);
  checkPositive(fn, 'treatment', treatment);
  const ratio = control / treatment;
  if (!(ratio >= 1e-4 && ratio <= 1e12)) {
    const requirement = `from 1e-4 to 1e12 times treatment (treatment is ${treatment})`;
    throw new DomainError(fn, 'control', requirement, control);
  }
  if (k <= 2) return Object.freeze(k === 1 ? [1] : [0.5, 0.5]);
  const n = k - 1;
  const error = new Float64Array(1);
  const weights: number[] = [];
  // j treatments are pooled with the control
  for (let j = n; j >= 0; j--) {
    weights.push(Math.exp(logOrthantTermKernel(n, Math.log(n), j, ratio, 'line', error)));
  }
  return Object.freeze(weights);
}

/**
 * The level probabilities of the test *of* an order, from those of the test *for* it: null hypothesis "the
 * means are ordered", alternative "they are not".
 *
 * With k groups and $w_j$ indexed by degrees of freedom, the statistic, the distance from the data to the
 * ordered fit, has the weights
 *
 * $$ w'_j = w_{k-1-j}, $$
 *
 * at equal means, which are the worst case among ordered ones: p-values are safe for all of them.
 *
 * @param weights - level probabilities indexed by degrees of freedom, up to the largest possible one
 * @returns the weights in the opposite order, frozen
 * @throws A {@link DomainError} if the weights are no probabilities with sum 1
 *
 * Source: "Order Restricted Statistical Inference", Wiley (1988).
 *
 * @example
 * ```ts
 * import { chiBarSquared, reversedWeights, totalOrder } from 'hullgauge';
 * reversedWeights(totalOrder(4)); // => [1 / 24, 0.25, 11 / 24, 0.25]
 * chiBarSquared(reversedWeights(totalOrder(4))).quantile(0.95).toPrecision(6); // => '6.17485'
 * ```
 */
export function reversedWeights(weights: readonly number[]): readonly number[] {
  checkWeights('reversedWeights', weights);
  return Object.freeze(Array.from(weights).reverse());
}
