/**
 * Logarithms to twice the precision of a double.
 *
 * A probability near 1e-300 is the exponential of a number near -700, whose last bit alone is worth
 * 1e-13 of the result. Values that keep their digits there need the exponent as high + low.
 *
 * Method: the argument is m 2^e with m in [1, 2); m over the nearest c = 1 + i/128 is 1 + f with
 * |f| <= 1/256, log c comes from a table, and log(1 + f) from its series, whose first two terms are
 * carried as high + low. The absolute error stays below 1e-21. The table is summed on first use from
 * log((j + 1)/j) = 2 artanh(1/(2 j + 1)), so that no constant is stored but log 2.
 */

import { productError, quotientError, sumError } from './double-double.ts';

/** log 2 rounded to 32 bits, so that its multiples by exponents are exact, and the rest. */
const LN2_HIGH = 0.693147180369123816490173339844;
const LN2_LOW = 1.90821492927058781614e-10;

const STEPS = 128;

interface LogTable {
  /** log(1 + i/128) = high + low. */
  readonly high: Float64Array;
  readonly low: Float64Array;
  /** One number and the 32-bit words that hold it. */
  readonly double: Float64Array;
  readonly words: Uint32Array;
  /** Index of the word with the exponent. */
  readonly upper: number;
}

let table: LogTable | undefined;

function buildTable(): LogTable {
  const high = new Float64Array(STEPS + 1);
  const low = new Float64Array(STEPS + 1);
  let sum = 0;
  let rest = 0;
  for (let i = 0; i < STEPS; i++) {
    // log((STEPS + i + 1)/(STEPS + i)) = 2 (r + r^3/3 + r^5/5 + ...), r = 1/(2 (STEPS + i) + 1)
    const divisor = 2 * (STEPS + i) + 1;
    const r = 1 / divisor;
    const q = r * r;
    const term = 2 * r;
    const tail = 2 * r * q * (1 / 3 + q * (1 / 5 + q * (1 / 7 + q * (1 / 9))));
    const next = sum + term;
    rest += sumError(sum, term, next) + 2 * quotientError(1, divisor, r) + tail;
    sum = next + rest;
    rest += next - sum;
    high[i + 1] = sum;
    low[i + 1] = rest;
  }
  const double = new Float64Array([1]);
  const words = new Uint32Array(double.buffer);
  table = { high, low, double, words, upper: words[1] === 0 ? 0 : 1 };
  return table;
}

/** Writes log(x + tail) as `out[0] + out[1]`, for x > 0 and a tail of at most its last bit. */
export function preciseLog(x: number, tail: number, out: Float64Array): void {
  const { high, low, double, words, upper } = table ?? buildTable();
  let exponent = 0;
  let argument = x;
  if (x < 2.3e-308) {
    argument *= 2 ** 64; // subnormal numbers keep their exponent elsewhere
    exponent = -64;
  }
  double[0] = argument;
  const word = words[upper] as number;
  exponent += (word >>> 20) - 1023;
  words[upper] = (word & 0xfffff) | 0x3ff00000;
  const m = double[0] as number;
  const index = Math.round((m - 1) * STEPS);
  const centre = 1 + index / STEPS;
  const numerator = m - centre;
  const f = numerator / centre;
  const mTail = tail === 0 ? 0 : tail * (m / x);
  const fTail = quotientError(numerator, centre, f) + mTail / centre;
  const square = f * f;
  const squareTail = productError(f, f, square) + 2 * f * fTail;
  const series =
    square * f * (1 / 3 - f * (1 / 4 - f * (1 / 5 - f * (1 / 6 - f * (1 / 7 - f * (1 / 8))))));
  const base = exponent * LN2_HIGH;
  const fromTable = high[index] as number;
  const first = base + fromTable;
  const second = first + f;
  const third = second - 0.5 * square;
  const rest =
    sumError(base, fromTable, first) +
    sumError(first, f, second) +
    sumError(second, -0.5 * square, third) +
    ((low[index] as number) + exponent * LN2_LOW + (fTail - 0.5 * squareTail + series));
  const sum = third + rest;
  out[0] = sum;
  out[1] = rest - (sum - third);
}

/** Writes log(1 + t) as `out[0] + out[1]`, to 2^-58 of itself, for -1/8 <= t <= 1/8. */
export function preciseLog1p(t: number, out: Float64Array): void {
  // 2 artanh r, r = t/(2 + t)
  const divisor = 2 + t;
  const r = t / divisor;
  const rTail = quotientError(t, divisor, r) - (r * sumError(2, t, divisor)) / divisor;
  const q = r * r;
  const rest =
    2 * rTail +
    2 * r * q * (1 / 3 + q * (1 / 5 + q * (1 / 7 + q * (1 / 9 + q * (1 / 11 + q * (1 / 13))))));
  const sum = 2 * r + rest;
  out[0] = sum;
  out[1] = 2 * r - sum + rest;
}

/** Multiplies the logarithm `out[0] + out[1]` by a. */
export function scaleLog(a: number, out: Float64Array): void {
  const high = out[0] as number;
  const product = a * high;
  out[1] = a * (out[1] as number) + productError(a, high, product);
  out[0] = product;
}
