/**
 * Integrals over (-1, 1) of functions symmetrised about 0, by the trapezoidal rule after the
 * substitution h = tanh s, s = (pi/2) sinh t.
 *
 * The error of a step falls like e^(-constant/step), so each halving doubles the digits.
 */
import {
  type Arithmetic,
  add,
  exp,
  type Float,
  log2Estimate,
  multiply,
  pi,
  shift,
  toFloat,
} from './arithmetic.ts';

/** Halvings of the step before the rule gives up. */
const MAX_LEVELS = 16;
/** The first step is 1/2; this many halvings of 1. */
const FIRST_LEVEL = 1;

/**
 * The integrand at h = tanh s and at -h together, times dh/ds and the growth cosh t of s.
 *
 * @param decay - e^-s, at most 1
 * @param growth - cosh t
 * @param least - a number below whose last bit neither this nor any later value matters
 * @returns the value, or null where it and all later ones do not matter
 */
export type SymmetricIntegrand = (decay: Float, growth: Float, least: Float) => Float | null;

/** The integral with a relative error below 10^-accuracy. */
export function integrate(
  context: Arithmetic,
  accuracy: number,
  integrand: SymmetricIntegrand,
): Float {
  const { bits, one } = context;
  const zero: Float = { mantissa: 0n, exponent: 0 };
  const unit: Float = { mantissa: one, exponent: -bits };
  const quarterTurn = pi(bits) >> 1n;
  // h = 0 is its own mirror image.
  const centre = integrand(unit, unit, zero) ?? zero;
  let sum: Float = { ...centre, exponent: centre.exponent - 1 };
  let previous = zero;
  let agreedBefore = 0;
  for (let level = FIRST_LEVEL; level < MAX_LEVELS; level++) {
    const step = one >> BigInt(level);
    // The first level takes all multiples of the step, later ones the odd multiples.
    const stride = exponential(context, level === FIRST_LEVEL ? step : 2n * step);
    let grown = exponential(context, step);
    for (;;) {
      const shrunk = (one * one) / grown;
      const s = (quarterTurn * (grown - shrunk)) >> BigInt(bits + 1);
      const growth = toFloat(bits, (grown + shrunk) >> 1n, -bits);
      const value = integrand(exp(context, -s), growth, sum);
      if (value === null) break;
      sum = add(context, sum, value);
      grown = (grown * stride) >> BigInt(bits);
    }
    const current: Float = { mantissa: sum.mantissa, exponent: sum.exponent - level };
    const agreed = digitsAgreed(context, current, previous);
    // Once the digits are seen to double, those of this sum are known from the difference to the last.
    const doubling = agreedBefore > 6 && agreed > 1.7 * agreedBefore;
    if (agreed > accuracy + 1 || (doubling && 1.6 * agreed > accuracy + 1)) {
      return multiply(context, current, toFloat(bits, quarterTurn, -bits));
    }
    previous = current;
    agreedBefore = agreed;
  }
  throw new Error(`quadrature does not converge: ${agreedBefore.toFixed(0)} digits agree`);
}

/** e^x as a fixed-point number. */
function exponential(context: Arithmetic, x: bigint): bigint {
  const { mantissa, exponent } = exp(context, x);
  return shift(mantissa, exponent + context.bits);
}

/** Decimal digits in which two positive floats agree. */
function digitsAgreed(context: Arithmetic, x: Float, y: Float): number {
  if (y.mantissa === 0n) return 0;
  const difference = x.mantissa - shift(y.mantissa, y.exponent - x.exponent);
  if (difference === 0n) return Number.POSITIVE_INFINITY;
  const size = toFloat(context.bits, difference < 0n ? -difference : difference, x.exponent);
  return (log2Estimate(context, x) - log2Estimate(context, size)) * (Math.LN2 / Math.LN10);
}
