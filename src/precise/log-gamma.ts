/**
 * log Gamma of a fraction to any number of bits: Stirling's series with exact Bernoulli numbers,
 * after shifting the argument far enough to the right.
 */
import { type Arithmetic, ln, multiply, pi, ratio, toFloat } from './arithmetic.ts';
import type { Fraction } from './fraction.ts';

/**
 * log Gamma on positive fractions, fixed-point, with an absolute error of a few times (1 + x ln x)
 * units. The Bernoulli numbers are shared by all calls of the function returned.
 */
export function logGammaIn(context: Arithmetic): (x: Fraction) => bigint {
  const source = bernoulliNumbers();
  const bernoulli: Fraction[] = [];
  const halfLogTwoPi = ln(context, toFloat(context.bits, pi(context.bits), 1 - context.bits)) >> 1n;
  const scale = BigInt(context.bits);

  return (x: Fraction): bigint => {
    const { factors, log, shifted } = shiftedRight(context, x);
    const { denominator } = x;
    // (z - 1/2) ln z - z + ln(2 pi)/2 + sum B_2k / (2k (2k - 1) z^(2k - 1))
    let value = halfLogTwoPi - log - (shifted << scale) / denominator;
    const logShifted = ln(context, ratio(context.bits, shifted, denominator));
    value += ((2n * shifted - denominator) * logShifted) / (2n * denominator);
    // Twice the bits, since Bernoulli numbers grow almost as fast as the powers fall.
    let power = (denominator << (2n * scale)) / shifted;
    for (let k = 0; power !== 0n; k++) {
      if (k === bernoulli.length) bernoulli.push(source.next().value);
      const { numerator, denominator: divisor } = bernoulli[k] as Fraction;
      const order = BigInt(2 * k + 2);
      const term = ((power * numerator) / (divisor * order * (order - 1n))) >> scale;
      if (term === 0n || term === -1n) break;
      value += term;
      power = (power * denominator * denominator) / (shifted * shifted);
    }
    // The factors were numerators: each lacks a ln(denominator).
    if (denominator > 1n) value += factors * ln(context, toFloat(context.bits, denominator));
    return value;
  };
}

/** The numerator of x + m for the least m that suits the series, and ln of x (x + 1) ... (x + m - 1). */
function shiftedRight(
  context: Arithmetic,
  { numerator, denominator }: Fraction,
): { readonly shifted: bigint; readonly factors: bigint; readonly log: bigint } {
  // Far enough that the series needs about one term for each 16 bits.
  const target = BigInt(Math.ceil(context.bits * 1.5) + 8) * denominator;
  let shifted = numerator;
  let product = toFloat(context.bits, 1n);
  let pending = 1n;
  let factors = 0n;
  for (; shifted < target; shifted += denominator) {
    pending *= shifted;
    factors++;
    // Factors are gathered so that one rounding serves several.
    if (factors % 32n !== 0n) continue;
    product = multiply(context, product, toFloat(context.bits, pending));
    pending = 1n;
  }
  product = multiply(context, product, toFloat(context.bits, pending));
  return { shifted, factors, log: ln(context, product) };
}

/** B_2, B_4, B_6, ... exactly, from the tangent numbers: tan x differentiated again and again. */
function* bernoulliNumbers(): Generator<Fraction, never> {
  // Coefficients of powers of tan x; of a derivative of even order only odd ones differ from 0.
  let row: bigint[] = [0n, 1n];
  for (let k = 1n; ; k++) {
    row = derivative(row);
    // The derivative of order 2k - 1 at 0.
    const tangent = row[0] as bigint;
    row = derivative(row);
    const power = 4n ** k;
    const sign = k % 2n === 1n ? 1n : -1n;
    yield { numerator: sign * 2n * k * tangent, denominator: power * (power - 1n) };
  }
}

/** Derivative of a polynomial in tan x: (tan^j)' = j tan^(j-1) + j tan^(j+1). */
function derivative(row: readonly bigint[]): bigint[] {
  const next = new Array<bigint>(row.length + 1).fill(0n);
  for (let j = row.length - 1; j > 0; j -= 2) {
    const scaled = BigInt(j) * (row[j] as bigint);
    next[j - 1] = (next[j - 1] as bigint) + scaled;
    next[j + 1] = (next[j + 1] as bigint) + scaled;
  }
  return next;
}
