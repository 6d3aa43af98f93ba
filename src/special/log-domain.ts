/**
 * Arithmetic on logarithms, and the two differences that cancel when written plainly.
 *
 * Notation: `log` is natural; an argument called `a`, `b` or an element of `values` is the logarithm
 * of a non-negative number, so `-Infinity` stands for 0.
 */

import { checkAbove, checkNumber, DomainError } from '../domain.ts';
import { logOfComplement as log1mExpKernel } from '../probability.ts';
import { evaluatePolynomial } from './polynomial.ts';

export { log1mExpKernel };

/**
 * The logarithm of 1 - e^x for x <= 0, without cancellation near 0; -Infinity at 0.
 *
 * $$ \ln(1 - e^x) $$
 *
 * It turns the logarithm of a probability into the logarithm of its complement.
 *
 * @param x - logarithm of a probability, at most 0; `-Infinity` for an impossible event
 * @returns the logarithm of the complement: `-Infinity` at 0, 0 at `-Infinity`
 * @remarks Constant cost. Relative error below 5e-16.
 * @throws A {@link DomainError} if `x` is positive or NaN
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.2, for log and exp.
 *
 * @example
 * ```ts
 * import { log1mExp } from 'hullgauge/special';
 * log1mExp(-1e-20).toPrecision(12); // => '-46.0517018599'
 * log1mExp(-Infinity); // => 0
 * ```
 */
export function log1mExp(x: number): number {
  checkNumber('log1mExp', 'x', x, -Infinity, 0);
  return log1mExpKernel(x);
}

/**
 * The logarithm of e^a + e^b for any a and b: a sum of two numbers known by their logarithms.
 *
 * $$ \ln(e^a + e^b) = \max(a, b) + \ln\bigl(1 + e^{-|a - b|}\bigr) $$
 *
 * @param a - logarithm of the first number; `-Infinity` for 0, `Infinity` allowed
 * @param b - logarithm of the second number; likewise
 * @returns the logarithm of the sum
 * @remarks Constant cost. Absolute error below 4e-16 times the largest of 1, |a|, |b|: where the result
 *   is close to 0 the rounding of a and b leaves no better.
 * @throws A {@link DomainError} if an argument is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.2, for log and exp.
 *
 * @example
 * ```ts
 * import { logAddExp } from 'hullgauge/special';
 * logAddExp(-1000, -1001).toPrecision(12); // => '-999.686738312'
 * logAddExp(-Infinity, 3); // => 3
 * ```
 */
export function logAddExp(a: number, b: number): number {
  checkNumber('logAddExp', 'a', a);
  checkNumber('logAddExp', 'b', b);
  return logAddExpKernel(a, b);
}

/** {@link logAddExp} without checks. */
export function logAddExpKernel(a: number, b: number): number {
  const larger = Math.max(a, b);
  const smaller = Math.min(a, b);
  // Two equal infinities would leave NaN as their difference.
  if (smaller === -Infinity || larger === Infinity) return larger;
  return larger + Math.log1p(Math.exp(smaller - larger));
}

/**
 * The logarithm of e^a - e^b for a >= b: a difference of two numbers known by their logarithms.
 *
 * $$ \ln(e^a - e^b) = a + \ln\bigl(1 - e^{-(a - b)}\bigr) $$
 *
 * @param a - logarithm of the larger number; `-Infinity` for 0, `Infinity` allowed
 * @param b - logarithm of the smaller number, at most `a` and below `Infinity`
 * @returns the logarithm of the difference; `-Infinity` if both are equal
 * @remarks Constant cost. Absolute error below 4e-16 times the largest of 1, |a| and the result.
 * @throws A {@link DomainError} if `b` exceeds `a`, is `Infinity`, or an argument is NaN
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.2, for log and exp.
 *
 * @example
 * ```ts
 * import { logSubExp } from 'hullgauge/special';
 * logSubExp(-1000, -1001).toPrecision(12); // => '-1000.45867515'
 * logSubExp(2, 2); // => -Infinity
 * ```
 */
export function logSubExp(a: number, b: number): number {
  checkNumber('logSubExp', 'a', a);
  checkNumber('logSubExp', 'b', b);
  if (b > a) throw new DomainError('logSubExp', 'b', `at most a (a is ${a})`, b);
  if (b === Infinity) {
    throw new DomainError('logSubExp', 'b', 'below Infinity', b);
  }
  return logSubExpKernel(a, b);
}

/** {@link logSubExp} without checks. */
export function logSubExpKernel(a: number, b: number): number {
  if (a === b) return -Infinity;
  if (a === Infinity) return a;
  return a + log1mExpKernel(b - a);
}

/**
 * The logarithm of the sum of e^v over an array, whatever the size of its elements.
 *
 * $$ \ln \sum_i e^{v_i} $$
 *
 * The largest element stays out of the sum of the others, which is compensated, so that adding up a
 * million terms costs no digit.
 *
 * @param values - logarithms of non-negative numbers, in any order; `-Infinity` for 0
 * @returns the logarithm of the sum; `-Infinity` for an empty array
 * @remarks One exponential an element. Absolute error below 1e-15 times the largest of 1 and the
 *   modulus of the largest element.
 * @throws A {@link DomainError} if `values` is no array, or an element is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.2, for log and exp.
 *
 * @example
 * ```ts
 * import { logSumExp } from 'hullgauge/special';
 * logSumExp([-1000, -1001, -1002]).toPrecision(12); // => '-999.592394036'
 * logSumExp([]); // => -Infinity
 * ```
 */
export function logSumExp(values: ArrayLike<number>): number {
  const fn = 'logSumExp';
  if (typeof values !== 'object' || values === null || !Number.isInteger(values.length)) {
    throw new DomainError(fn, 'values', 'an array of numbers', values);
  }
  for (let i = 0; i < values.length; i++) {
    const value: unknown = values[i];
    if (typeof value !== 'number' || Number.isNaN(value)) {
      throw new DomainError(fn, `values[${i}]`, 'a number', value);
    }
  }
  return logSumExpKernel(values);
}

/** {@link logSumExp} without checks. */
export function logSumExpKernel(values: ArrayLike<number>): number {
  let largest = -Infinity;
  let position = -1;
  for (let i = 0; i < values.length; i++) {
    const value = values[i] as number;
    if (value > largest) {
      largest = value;
      position = i;
    }
  }
  if (position < 0 || largest === Infinity) return largest;
  // The largest term is exactly 1 and stays out of the compensated sum of the others.
  let sum = 0;
  let carry = 0;
  for (let i = 0; i < values.length; i++) {
    if (i === position) continue;
    const term = Math.exp((values[i] as number) - largest) - carry;
    const next = sum + term;
    carry = next - sum - term;
    sum = next;
  }
  return largest + Math.log1p(sum);
}

/**
 * The difference log(1 + x) - x for x > -1, to full relative accuracy at x = 0.
 *
 * $$ \ln(1 + x) - x = -\frac{x^2}{2} + \frac{x^3}{3} - \cdots $$
 *
 * The deviance of a binomial or Poisson count from its mean is made of it; written plainly it has no
 * digit at x = 1e-8. Computed from $\operatorname{artanh}$ of $x/(2 + x)$ for -1/2 <= x <= 1.
 *
 * @param x - a number above -1
 * @returns the difference, at most 0; `-Infinity` at `Infinity`
 * @remarks Constant cost. Relative error below 6e-16.
 * @throws A {@link DomainError} if `x` is -1 or below, or NaN
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.6.
 *
 * @example
 * ```ts
 * import { log1pmx } from 'hullgauge/special';
 * log1pmx(1e-9).toPrecision(12); // => '-4.99999999667e-19'
 * ```
 */
export function log1pmx(x: number): number {
  checkAbove('log1pmx', 'x', x, -1);
  return log1pmxKernel(x);
}

/** {@link log1pmx} without checks. */
export function log1pmxKernel(x: number): number {
  if (x < -0.5 || x > 1) return x < Infinity ? Math.log1p(x) - x : -x;
  const r = x / (2 + x);
  const q = r * r;
  // 0 - ... so that the result at -0 is 0, too
  return 0 - r * (x - 2 * q * evaluatePolynomial(LOG1PMX, q));
}

/**
 * (atanh(r)/r - 1)/r^2 in powers of q = r^2, 0 <= q <= 1/9. Its relative error of 1.2e-16 weighs at
 * most 8 % in log1pmx.
 */
const LOG1PMX: readonly number[] = [
  0.3333333333333333, 0.20000000000007456, 0.1428571428351453, 0.11111111362409382,
  0.09090894546491375, 0.07692789505129312, 0.06657003641335145, 0.060011469977136564,
  0.04397433369474833, 0.08087903454072548,
];

/**
 * The difference e^x - 1 - x for any x, to full relative accuracy at x = 0.
 *
 * $$ e^x - 1 - x = \frac{x^2}{2} + \frac{x^3}{6} + \cdots $$
 *
 * @param x - a number
 * @returns the difference, at least 0; `Infinity` at both infinities
 * @remarks Constant cost. Relative error below 6e-16.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/4.2.
 *
 * @example
 * ```ts
 * import { expm1mx } from 'hullgauge/special';
 * expm1mx(1e-9).toPrecision(12); // => '5.00000000167e-19'
 * ```
 */
export function expm1mx(x: number): number {
  checkNumber('expm1mx', 'x', x);
  return expm1mxKernel(x);
}

/** {@link expm1mx} without checks. */
export function expm1mxKernel(x: number): number {
  if (x >= -1 && x <= 1) return x * x * evaluatePolynomial(EXPM1MX, x);
  return x < Infinity ? Math.expm1(x) - x : x;
}

/** (e^x - 1 - x)/x^2 in powers of x, |x| <= 1, relative error 1.6e-17. */
const EXPM1MX: readonly number[] = [
  0.5, 0.16666666666666666, 0.04166666666666609, 0.008333333333333236, 0.0013888888888981446,
  0.00019841269841374776, 2.4801587246079535e-5, 2.7557319174038892e-6, 2.7557335072267237e-7,
  2.5052120586633744e-8, 2.087443527953241e-9, 1.605744835014058e-10, 1.16392040024203e-11,
  7.753295105383928e-13,
];
