/**
 * Exact arguments: every number, decimal text or Decimal is a fraction of whole numbers.
 */
import { Decimal } from 'decimal.js';
import { checkInteger, DomainError } from '../domain.ts';

/** A number given exactly: a double stands for its binary value, text for its decimal value. */
export type ExactNumber = number | string | Decimal;

/** A fraction with a positive denominator, not necessarily in lowest terms. */
export interface Fraction {
  /** Numerator. */
  readonly numerator: bigint;
  /** Denominator, positive. */
  readonly denominator: bigint;
}

/** Most significant digits of any result. */
export const MAX_DIGITS = 1000;
/** Most decimal places of an argument; every double has fewer. */
const MAX_PLACES = 2000;

/** Refuses anything but a number of digits that the room works with. */
export function checkDigits(fn: string, value: unknown): asserts value is number {
  checkInteger(fn, 'digits', value, 1, MAX_DIGITS);
}

/** The fraction that an exact number is; `requirement` completes the message of a refusal. */
export function exactFraction(
  fn: string,
  parameter: string,
  value: unknown,
  requirement: string,
): Fraction {
  const refuse = (): never => {
    throw new DomainError(fn, parameter, requirement, value);
  };
  if (typeof value === 'number') return Number.isFinite(value) ? binaryFraction(value) : refuse();
  const decimal = typeof value === 'string' ? readDecimal(value) : value;
  if (!Decimal.isDecimal(decimal) || !decimal.isFinite()) return refuse();
  const places = decimal.decimalPlaces();
  if (places > MAX_PLACES || decimal.abs().gt(Number.MAX_SAFE_INTEGER)) return refuse();
  const whole = decimal.toFixed(places).replace('.', '');
  return { numerator: BigInt(whole), denominator: 10n ** BigInt(places) };
}

/** Decimal text as people write it; nothing hexadecimal, no blanks, no words. */
function readDecimal(text: string): Decimal | null {
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,4})?$/i.test(text) ? new Decimal(text) : null;
}

/** A double as the fraction that it is. */
function binaryFraction(value: number): Fraction {
  let scaled = value;
  let places = 0n;
  while (!Number.isInteger(scaled)) {
    scaled *= 2;
    places++;
  }
  return { numerator: BigInt(scaled), denominator: 1n << places };
}

/** Sign of x - y. */
export function compare(x: Fraction, y: Fraction): number {
  const difference = x.numerator * y.denominator - y.numerator * x.denominator;
  return difference < 0n ? -1 : difference > 0n ? 1 : 0;
}

/** x + y. */
export function sum(x: Fraction, y: Fraction): Fraction {
  return {
    numerator: x.numerator * y.denominator + y.numerator * x.denominator,
    denominator: x.denominator * y.denominator,
  };
}

/** The same fraction in lowest terms. */
export function lowestTerms({ numerator, denominator }: Fraction): Fraction {
  let [common, rest] = [denominator, numerator < 0n ? -numerator : numerator];
  while (rest !== 0n) [common, rest] = [rest, common % rest];
  return { numerator: numerator / common, denominator: denominator / common };
}

/** A whole number as a fraction. */
export function whole(n: number): Fraction {
  return { numerator: BigInt(n), denominator: 1n };
}

/** A fraction as the nearest double, or nearly so, for estimates only. */
export function estimate({ numerator, denominator }: Fraction): number {
  const quotient = (numerator << 1100n) / denominator;
  const digits = quotient.toString(2);
  const kept = Number(BigInt(`0b${digits.slice(0, 60)}`));
  return kept * 2 ** (Math.max(0, digits.length - 60) - 1100);
}
