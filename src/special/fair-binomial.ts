/**
 * Tails of the number of heads in n tosses of a fair coin.
 *
 * For X ~ Bin(n, 1/2) the smaller one of P[X <= k] and P[X > k] is by symmetry P[X <= j] with
 * j = min(k, n - 1 - k). With b = j + 1, a = n - j, nu = a + b = n + 1,
 *
 *   P[X <= j] = 2^-n sum_(i <= j) binom(n, i) = I_(1/2)(a, b),
 *
 * which is
 * - looked up in a table of correctly rounded values for n <= 106 (its sums fit in two doubles),
 * - summed in twice the precision for j <= 8,
 * - else 2^-nu / B(a, b) times the expansion or the fraction of the incomplete beta function.
 *
 * The exponent of that factor, carried as high + low, is with tau = (a - b)/nu
 *
 *   -nu/2 ((1 + tau) log(1 + tau) + (1 - tau) log(1 - tau)) = -nu tau^2/2 (1 + tau^2/6 + tau^4/15 + ...).
 */

import { expansionIsFaster, gaussianTailSum } from './beta-expansion.ts';
import { betaFraction } from './beta-fraction.ts';
import { addDeviance, largeBetaAmplitude } from './beta-prefix.ts';
import { productError, quotientError, sumError } from './double-double.ts';
import { store, storeExact, storeTail } from './tail-result.ts';

/** Largest n of the table: below 2^106 a sum of binomial coefficients is exact as two doubles. */
const TABLE_SIZE = 106;

let table: Float64Array | undefined;

/** P[X <= j] for 2 j < n <= 106, at [n^2/4] + j. */
function buildTable(): Float64Array {
  const values = new Float64Array(((TABLE_SIZE + 1) ** 2) >> 2);
  const tails = new Float64Array(TABLE_SIZE);
  for (let n = 1; n <= TABLE_SIZE; n++) {
    const row = (n * n) >> 2;
    const above = ((n - 1) * (n - 1)) >> 2;
    // P_n(j) = (P_(n-1)(j) + P_(n-1)(j-1))/2, from the right so that one row of tails is enough
    for (let j = (n - 1) >> 1; j >= 0; j--) {
      if (2 * j === n - 1) {
        values[row + j] = 0.5;
        tails[j] = 0;
        continue;
      }
      const x = values[above + j] as number;
      const y = j === 0 ? 0 : (values[above + j - 1] as number);
      const sum = x + y;
      const rest =
        sumError(x, y, sum) + ((tails[j] as number) + (j === 0 ? 0 : (tails[j - 1] as number)));
      const high = sum + rest;
      values[row + j] = 0.5 * high;
      tails[j] = 0.5 * (sum - high + rest);
    }
  }
  table = values;
  return values;
}

/**
 * The smaller one of P[X <= k] and P[X > k] for X ~ Bin(n, 1/2) and integers 0 <= k < n, in the slots
 * of tail-result.ts; returns whether it is P[X <= k]. Of two equal tails, both exactly 1/2, the lower
 * one is meant.
 *
 * n and k may be any doubles that are integers, also beyond 2^53. Cost: constant.
 */
export function fairBinomialTail(n: number, k: number, out: Float64Array): boolean {
  // n - 2 k - 1 as high + low; 2 k is exact
  const difference = n - 2 * k;
  const high = difference - 1;
  const low = sumError(n, -2 * k, difference) + sumError(difference, -1, high);
  return tailOfGap(n, k + 1, n - k, high, low, out);
}

/**
 * {@link fairBinomialTail} for n - 1 tosses and k = b - 1, where n - 1 itself may be no double.
 */
export function fairTailOfPoints(n: number, b: number, out: Float64Array): boolean {
  const gap = n - 2 * b;
  // Above 2^53 one toss more or less is below the rounding of everything but the gap.
  return tailOfGap(n - 1, b, n - b, gap, sumError(n, -2 * b, gap), out);
}

/** The smaller one of P[X <= b - 1] and P[X >= b], where a = n + 1 - b and a - b = gap + gapTail. */
function tailOfGap(
  n: number,
  b: number,
  a: number,
  gap: number,
  gapTail: number,
  out: Float64Array,
): boolean {
  if (gap === 0 && gapTail === 0) storeExact(0.5, out);
  else if (gap >= 0) smallerTail(n, b, a, gap, gapTail, out);
  else smallerTail(n, a, b, -gap, -gapTail, out);
  return gap >= 0;
}

/** P[X <= b - 1], where a = n + 1 - b and a - b = gap + gapTail > 0. */
function smallerTail(
  n: number,
  b: number,
  a: number,
  gap: number,
  gapTail: number,
  out: Float64Array,
): void {
  if (n <= TABLE_SIZE) {
    storeShare((table ?? buildTable())[((n * n) >> 2) + b - 1] as number, n, out);
    return;
  }
  if (b <= DIRECT + 1) {
    directSum(n, b - 1, out);
    return;
  }
  const nu = n + 1;
  const z2 = -2 * fairDeviance(a, b, nu, sumError(n, 1, nu), gap, gapTail, out);
  let factor = largeBetaAmplitude(a, b, out);
  if (expansionIsFaster(b, z2)) {
    const variance = (a / nu) * b;
    factor *= gaussianTailSum(variance, -gap / nu, variance / nu, Math.sqrt(z2));
  } else {
    factor *= betaFraction(a, b, 0.5, 0.5, 0.5 * gap);
  }
  storeTail(out[0] as number, out[1] as number, factor, out);
}

/** Writes the exponent of nu^nu / (2^nu a^a b^b) as `out[0] + out[1]`; returns the high part. */
function fairDeviance(
  a: number,
  b: number,
  nu: number,
  nuTail: number,
  gap: number,
  gapTail: number,
  out: Float64Array,
): number {
  const tau = gap / nu;
  // Beyond it the series below would need more terms; the general form serves.
  if (tau > 1 / 6) {
    out[0] = 0;
    out[1] = 0;
    addDeviance(a, -0.5 * gap, -0.5 * gapTail, 0.5, nu, nuTail, out);
    addDeviance(b, 0.5 * gap, 0.5 * gapTail, 0.5, nu, nuTail, out);
    return out[0];
  }
  const tauTail = quotientError(gap, nu, tau) + (gapTail - tau * nuTail) / nu;
  const product = gap * tau;
  const productTail = productError(gap, tau, product) + gap * tauTail + gapTail * tau;
  const q = tau * tau;
  // the coefficients are 1/(i (2 i - 1))
  const upper = 1 / 66 + q * (1 / 91 + q * (1 / 120 + q * (1 / 153 + q * (1 / 190))));
  const series = q * (1 / 6 + q * (1 / 15 + q * (1 / 28 + q * (1 / 45 + q * upper))));
  const rest = productTail + product * series;
  const sum = product + rest;
  out[0] = -0.5 * sum;
  out[1] = -0.5 * (product - sum + rest);
  return out[0];
}

/** Up to this j the sum is formed term by term; it is then below 2^440 for n < 2^53. */
const DIRECT = 8;

/** 2^-DEEP is the smallest normal number. */
const DEEP = 1022;

/** log 2 beyond Math.LN2. */
const LN2_TAIL = 2.3190468138462996e-17;

/** 2^-n sum_(i <= j) binom(n, i) by Horner's rule in twice the precision. */
function directSum(n: number, j: number, out: Float64Array): void {
  if (n >= 2 ** 53) {
    // n^j/j! is all of the sum, and its logarithm below the rounding of the first one
    let log = -n * Math.LN2;
    for (let i = 1; i <= j; i++) log += Math.log(n / i);
    storeRounded(0, log, out);
    return;
  }
  let sum = 1;
  let tail = 0;
  for (let i = j; i >= 1; i--) {
    // 1 + sum (n - i + 1)/i
    const factor = n - i + 1;
    const product = sum * factor;
    const productTail = productError(sum, factor, product) + tail * factor;
    const quotient = product / i;
    const quotientTail = quotientError(product, i, quotient) + productTail / i;
    const next = quotient + 1;
    const nextTail = sumError(quotient, 1, next) + quotientTail;
    sum = next + nextTail;
    tail = next - sum + nextTail;
  }
  const value = sum * halfToThe(Math.min(n, DEEP));
  if (n <= DEEP) {
    storeShare(value, n, out);
    return;
  }
  const product = n * Math.LN2;
  const logSum = Math.log(sum);
  const correction = productError(n, Math.LN2, product) + n * LN2_TAIL;
  storeRounded(value * halfToThe(n - DEEP), logSum - correction - product, out);
}

/** Stores a sum of binomial coefficients over 2^n: exact, unless the sum itself is beyond 2^53. */
function storeShare(value: number, n: number, out: Float64Array): void {
  if (value <= halfToThe(n - 53)) storeExact(value, out);
  else storeRounded(value, Math.log(value), out);
}

/** Stores a value and a logarithm that are off by a rounding at most. */
function storeRounded(value: number, log: number, out: Float64Array): void {
  store(value, log, 1.2e-16 - 2.3e-16 * log, out);
}

/** 2^-n for an integer n >= 0, exact; 1 for n < 0. */
function halfToThe(n: number): number {
  if (n > 2200) return 0;
  let power = 1;
  let base = 0.5;
  for (let rest = n; rest > 0; rest >>= 1) {
    if ((rest & 1) === 1) power *= base;
    base *= base;
  }
  return power;
}
