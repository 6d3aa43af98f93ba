/**
 * How the kernels of the beta family hand over a tail.
 *
 * Slots of the array that the caller gives: `out[0]` the value of the smaller tail, `out[1]` its
 * logarithm, `out[2]` a bound of the error of that logarithm. A value that is exact says so by the
 * bound of epsilon.ts, and a search for it ends in a tie.
 */
import { EPSILON, exactLogError } from '../epsilon.ts';
import { type Probability, probabilityFromTail } from '../probability.ts';
import { quotientError } from './double-double.ts';

/** Length of the array. */
export const TAIL_SLOTS = 3;

/**
 * Relative error of a value in front of which everything is known to about 1e-18: worst measured
 * 8.2e-16 over 10^4 random tails of at least 1e-300 in all regions.
 */
const VALUE_ERROR = 1.6e-15;

/** Half a bit of a logarithm, and a little. */
const LOG_ROUNDING = 1.2e-16;

/** exp(high) below this would soon have fewer digits: subnormal. */
const DEEP = -600;
/** exp of this is 0. */
const UNDERFLOW = -746;
const EXP_MINUS_128 = 2.5722093726424152e-56;

/** exp(high + low) * factor, whose logarithm is given; exact to rounding down to the normal numbers. */
export function tailValue(high: number, low: number, factor: number, log: number): number {
  if (!(log > UNDERFLOW)) return 0;
  const mantissa = low > -1 ? factor + factor * Math.expm1(low) : factor * Math.exp(low);
  return high > DEEP ? Math.exp(high) * mantissa : Math.exp(high + 128) * mantissa * EXP_MINUS_128;
}

/**
 * Stores the tail exp(high + low) * factor, or its complement if that is smaller, and returns whether
 * the complement was stored. The logarithm of the tail must have relative accuracy where it is near 0.
 */
export function storeTail(high: number, low: number, factor: number, out: Float64Array): boolean {
  const logFactor = Math.log(factor);
  const log = high + (low + logFactor);
  const value = tailValue(high, low, factor, log);
  if (value > 0.5) {
    // a tail known as a number only
    const complement = log > -0.25 ? 0 - Math.expm1(Math.min(log, 0)) : 1 - value;
    const logComplement = Math.log(complement);
    store(complement, logComplement, VALUE_ERROR - 2 * LOG_ROUNDING * logComplement, out);
    return true;
  }
  store(value, log, VALUE_ERROR + LOG_ROUNDING * (Math.abs(logFactor) - log), out);
  return false;
}

/** Fills the slots. */
export function store(value: number, log: number, error: number, out: Float64Array): void {
  out[0] = value;
  out[1] = log;
  out[2] = error;
}

/** Stores a tail that is exactly the given double. */
export function storeExact(value: number, out: Float64Array): void {
  const log = Math.log(value);
  store(value, log, exactLogError(log), out);
}

/**
 * Stores the smaller one of a/b and 1 - a/b for whole numbers 0 < a < b <= 2^53, correctly rounded, and
 * returns whether it is a/b.
 */
export function storeQuotient(a: number, b: number, out: Float64Array): boolean {
  const lower = 2 * a <= b;
  const numerator = lower ? a : b - a;
  const value = numerator / b;
  storeExact(value, out);
  if (quotientError(numerator, b, value) !== 0) {
    out[2] = EPSILON * (1 - (out[1] as number));
  }
  return lower;
}

/** The probability a/b for whole numbers 0 < a < b <= 2^53. */
export function quotientProbability(a: number, b: number): Probability {
  const out = new Float64Array(TAIL_SLOTS);
  return tailProbability(storeQuotient(a, b, out), out);
}

/** The probability whose smaller tail is stored: itself if `lower`, else its complement. */
export function tailProbability(lower: boolean, out: Float64Array): Probability {
  return probabilityFromTail(
    out[0] as number,
    out[1] as number,
    lower ? 'lower' : 'upper',
    out[2] as number,
  );
}

/** Stores an impossible event. */
export function storeZero(out: Float64Array): void {
  store(0, -Infinity, 0, out);
}
