/**
 * From approximations of known error to correctly rounded decimals.
 */
import { Decimal } from 'decimal.js';
import type { Arithmetic, Float } from './arithmetic.ts';

/** Spare decimal digits beyond which a result that still sits between two decimals is a tie. */
const TIE_DIGITS = 150;

/** A constructor of its own: no program's global settings are read or changed. */
function decimals(precision: number): typeof Decimal {
  return Decimal.clone({ precision, rounding: Decimal.ROUND_HALF_EVEN, defaults: true });
}

/** numerator/denominator rounded to `digits` significant digits, ties to even; denominator > 0. */
export function roundQuotient(numerator: bigint, denominator: bigint, digits: number): Decimal {
  const Result = decimals(digits);
  if (numerator === 0n) return new Result(0);
  const size = numerator.toString().length - denominator.toString().length;
  // digits + 1 or + 2 of the quotient, and whether anything follows.
  const places = digits + 2 - size;
  const scaled = numerator * 10n ** BigInt(Math.max(0, places));
  const divisor = denominator * 10n ** BigInt(Math.max(0, -places));
  const quotient = scaled / divisor;
  const sticky = quotient * divisor === scaled ? '' : '1';
  return new Result(`${quotient}${sticky}e${-places - sticky.length}`).toSignificantDigits(digits);
}

/**
 * Rounds a non-negative number to `digits` significant digits, ties to even, by computing it with more
 * and more digits until its error cannot matter.
 *
 * @param digits - significant digits of the result
 * @param compute - the number with a relative error below 10^-accuracy, in an arithmetic of at least
 *   `accuracy` digits
 */
export function roundCorrectly(digits: number, compute: (accuracy: number) => Decimal): Decimal {
  const Result = decimals(digits);
  for (let spare = 12; ; spare *= 2) {
    const accuracy = digits + spare;
    const value = compute(accuracy);
    if (spare > TIE_DIGITS) {
      const settled = value.toSignificantDigits(accuracy - 8, Decimal.ROUND_HALF_EVEN);
      return new Result(settled.toSignificantDigits(digits, Decimal.ROUND_HALF_EVEN));
    }
    const Wide = decimals(accuracy + 10);
    const slack = new Wide(value).times(`1e-${accuracy}`);
    const low = new Wide(value).minus(slack).toSignificantDigits(digits);
    const high = new Wide(value).plus(slack).toSignificantDigits(digits);
    if (low.eq(high)) return new Result(low);
  }
}

/** A binary float as a decimal with all the digits that its bits hold. */
export function floatToDecimal({ bits }: Arithmetic, { mantissa, exponent }: Float): Decimal {
  const Wide = decimals(Math.ceil(bits * (Math.LN2 / Math.LN10)) + 3);
  return new Wide(2).pow(exponent).times(mantissa.toString());
}

/** Bits for so many decimal digits and some more bits. */
export function bitsFor(digits: number, spare: number): number {
  return Math.ceil(digits * (Math.LN10 / Math.LN2)) + spare;
}
