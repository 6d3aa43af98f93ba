/**
 * Elementary functions on binary fixed-point and floating numbers of any size, in whole-number
 * arithmetic.
 *
 * A fixed-point number x is the integer round(x 2^bits). Big integers of the engine are some twenty
 * times faster than decimal digit arrays at the sizes needed here, so decimals only carry arguments
 * and results. Nothing here rounds correctly: each step errs by a few units in the last bit, and the
 * callers work with enough spare bits (see `round-correctly.ts`).
 */

/** A precision with the constants that argument reduction needs. */
export interface Arithmetic {
  /** Bits after the binary point. */
  readonly bits: number;
  /** The fixed-point number 1. */
  readonly one: bigint;
  /** ln 2. */
  readonly ln2: bigint;
}

/** A positive number mantissa 2^exponent, or 0 with mantissa 0. */
export interface Float {
  /** From 2^bits up to, but not including, 2^(bits + 1); or 0. */
  readonly mantissa: bigint;
  /** The power of 2. */
  readonly exponent: number;
}

/** Fixed-point arithmetic with so many bits. */
export function arithmetic(bits: number): Arithmetic {
  const ln2 = combineArctangents(bits, 1n, [18n, 26n], [-2n, 4801n], [8n, 8749n]);
  return { bits, one: 1n << BigInt(bits), ln2 };
}

/** pi, by Machin's formula. */
export function pi(bits: number): bigint {
  return combineArctangents(bits, -1n, [16n, 5n], [-4n, 239n]);
}

/** Sum of multiples of artanh(1/m), or with sign -1 of arctan(1/m), by their power series. */
function combineArctangents(
  bits: number,
  sign: 1n | -1n,
  ...multiples: readonly (readonly [factor: bigint, m: bigint])[]
): bigint {
  const spare = 32;
  let sum = 0n;
  for (const [factor, m] of multiples) {
    const square = m * m * sign;
    let power = (factor << BigInt(bits + spare)) / m;
    for (let k = 1n; power !== 0n; k += 2n) {
      sum += power / k;
      power /= square;
    }
  }
  return sum >> BigInt(spare);
}

/** Number of binary digits of a positive integer. */
export function bitLength(x: bigint): number {
  const hex = x.toString(16);
  return hex.length * 4 - Math.clz32(Number.parseInt(hex.charAt(0), 16)) + 28;
}

/** x shifted left by `by` places, right where it is negative. */
export function shift(x: bigint, by: number): bigint {
  return by >= 0 ? x << BigInt(by) : x >> BigInt(-by);
}

/** e^x for a fixed-point x of any size. */
export function exp({ bits, one, ln2 }: Arithmetic, x: bigint): Float {
  const doublings = roundedQuotient(x, ln2);
  let mantissa = expNearZero(x - doublings * ln2, bits);
  let exponent = Number(doublings) - bits;
  if (mantissa < one) {
    mantissa <<= 1n;
    exponent--;
  }
  return { mantissa, exponent };
}

function roundedQuotient(x: bigint, y: bigint): bigint {
  return (2n * x + (x < 0n ? -y : y)) / (2n * y);
}

/** e^x for |x| < 1: halved until a short Taylor series serves, then squared as often. */
function expNearZero(x: bigint, bits: number): bigint {
  const halvings = Math.ceil(Math.sqrt(bits) * 0.8);
  const work = bits + 2 * halvings + 8;
  const scale = BigInt(work);
  const reduced = shift(x, work - bits - halvings);
  // The even and the odd terms are cosh and sinh, which need powers of the square only.
  const square = (reduced * reduced) >> scale;
  let even = 1n << scale;
  let odd = even;
  let term = even;
  for (let k = 1n; term !== 0n; k += 2n) {
    term = (term * square) >> scale;
    term /= k * (k + 1n);
    even += term;
    odd += term / (k + 2n);
  }
  let value = even + ((odd * reduced) >> scale);
  for (let i = 0; i < halvings; i++) value = (value * value) >> scale;
  return value >> BigInt(work - bits);
}

/** ln of a positive float: Halley steps on the exponential, each with three times the digits. */
export function ln({ bits, ln2 }: Arithmetic, { mantissa, exponent }: Float): bigint {
  const leading = Number(mantissa >> BigInt(bits - 52)) / 2 ** 52;
  let precision = 48;
  let value = BigInt(Math.round(Math.log(leading) * 2 ** precision));
  while (precision < bits + 8) {
    const next = Math.min(3 * precision - 12, bits + 8);
    value = shift(value, next - precision);
    const target = shift(mantissa, next - bits);
    const reached = expNearZero(value, next);
    value += ((target - reached) << BigInt(next + 1)) / (target + reached);
    precision = next;
  }
  return shift(value, bits - precision) + BigInt(exponent + bits) * ln2;
}

/** The float nearest to value 2^exponent, for any integer value >= 0. */
export function toFloat(bits: number, value: bigint, exponent = 0): Float {
  if (value === 0n) return { mantissa: 0n, exponent: 0 };
  const excess = bitLength(value) - bits - 1;
  return { mantissa: shift(value, -excess), exponent: exponent + excess };
}

/** The quotient of two positive integers. */
export function ratio(bits: number, numerator: bigint, denominator: bigint): Float {
  const up = Math.max(0, bits + 2 + bitLength(denominator) - bitLength(numerator));
  return toFloat(bits, (numerator << BigInt(up)) / denominator, -up);
}

/** The product of two floats. */
export function multiply({ bits, one }: Arithmetic, x: Float, y: Float): Float {
  if (x.mantissa === 0n || y.mantissa === 0n) return { mantissa: 0n, exponent: 0 };
  const mantissa = (x.mantissa * y.mantissa) >> BigInt(bits);
  const exponent = x.exponent + y.exponent + bits;
  return mantissa >> 1n >= one
    ? { mantissa: mantissa >> 1n, exponent: exponent + 1 }
    : { mantissa, exponent };
}

/** x^n for an integer n >= 0 by repeated squaring: relative error n units in the last bit. */
export function power(context: Arithmetic, x: Float, n: number): Float {
  let result: Float = { mantissa: context.one, exponent: -context.bits };
  let square = x;
  for (let rest = n; rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) result = multiply(context, result, square);
    if (rest > 1) square = multiply(context, square, square);
  }
  return result;
}

/** The sum of two floats. */
export function add({ bits }: Arithmetic, x: Float, y: Float): Float {
  if (x.mantissa === 0n) return y;
  if (y.mantissa === 0n) return x;
  const [large, small] = x.exponent >= y.exponent ? [x, y] : [y, x];
  const sum = large.mantissa + shift(small.mantissa, small.exponent - large.exponent);
  return sum >> BigInt(bits + 1) === 0n
    ? { mantissa: sum, exponent: large.exponent }
    : { mantissa: sum >> 1n, exponent: large.exponent + 1 };
}

/** A float as a fixed-point number; what lies below the last bit is cut off. */
export function toFixed({ bits }: Arithmetic, x: Float): bigint {
  return shift(x.mantissa, x.exponent + bits);
}

/** Base-2 logarithm of a positive float, to double precision. */
export function log2Estimate({ bits }: Arithmetic, { mantissa, exponent }: Float): number {
  return Math.log(Number(mantissa >> BigInt(bits - 52))) / Math.LN2 - 52 + exponent + bits;
}

/** Whether x is below the last bit of y. */
export function isNegligible({ bits }: Arithmetic, x: Float, y: Float): boolean {
  return x.mantissa === 0n || (y.mantissa !== 0n && x.exponent + bits < y.exponent - 2);
}
