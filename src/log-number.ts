/**
 * A non-negative number known by its logarithm: counts and volumes beyond the range of doubles.
 */
import {
  Displayable,
  type DisplayRow,
  formatExponential,
  formatNumber,
  hasKind,
  toPlainNumber,
} from './display.ts';
import { checkNumber, DomainError } from './domain.ts';

/** The data of a {@link LogNumber}, as JSON holds it: infinities are strings. */
export interface PlainLogNumber {
  /** Always `'logNumber'`. */
  readonly kind: 'logNumber';
  /** Natural logarithm. */
  readonly log: number | string;
  /** Bound on the absolute error of the logarithm. */
  readonly logError: number | string;
}

/**
 * A non-negative number stored as its natural logarithm.
 *
 * @example
 * ```ts
 * import { LogNumber } from 'hullgauge';
 * `${LogNumber.fromLog(5000)}`; // => '2.96762838402e+2171'
 * LogNumber.of(1000).value; // => 1000
 * ```
 */
export class LogNumber extends Displayable {
  /** Always `'logNumber'`; tells the type without `instanceof`. */
  readonly kind = 'logNumber' as const;
  /** Natural logarithm; `-Infinity` for 0, `Infinity` allowed. */
  readonly log: number;
  /** Bound on the absolute error of the logarithm. */
  readonly logError: number;

  /** @internal Checks nothing: outside this file use the static methods. */
  constructor(log: number, logError: number) {
    super();
    this.log = log;
    this.logError = logError;
  }

  /**
   * The number whose natural logarithm is given.
   *
   * @param log - any number but NaN; `-Infinity` for 0
   * @param logError - bound on the absolute error of `log`; 0 if left out
   * @returns the number
   * @throws A {@link DomainError} if `log` is NaN, or `logError` negative or NaN
   */
  static fromLog(log: number, logError = 0): LogNumber {
    checkNumber('LogNumber.fromLog', 'log', log);
    checkNumber('LogNumber.fromLog', 'logError', logError, 0);
    return make(log, logError);
  }

  /**
   * The number equal to a non-negative double.
   *
   * @param value - a number >= 0; `Infinity` allowed
   * @returns the number
   * @throws A {@link DomainError} if `value` is negative or NaN
   */
  static of(value: number): LogNumber {
    checkNumber('LogNumber.of', 'value', value, 0);
    return make(Math.log(value), 0);
  }

  /**
   * Restores a number from JSON, a structured clone or another copy of this library.
   *
   * @param plain - an object with `kind: 'logNumber'` and the two numbers
   * @returns the number
   * @throws A {@link DomainError} if `plain` is not such an object
   */
  static from(plain: PlainLogNumber | LogNumber): LogNumber {
    if (!isLogNumber(plain)) {
      throw new DomainError('LogNumber.from', 'plain', "an object of kind 'logNumber'", plain);
    }
    // An infinity that was written without toJSON is null, of which Number alone would make 0.
    const log = Number(plain.log ?? NaN);
    const logError = Number(plain.logError ?? NaN);
    checkNumber('LogNumber.from', 'log', log);
    checkNumber('LogNumber.from', 'logError', logError, 0);
    return make(log, logError);
  }

  /**
   * The number as a double: 0 or `Infinity` where it is out of range. A number within its own
   * error of an integer below 2^53 is given as that integer, so that counts come out whole.
   */
  get value(): number {
    const value = Math.exp(this.log);
    const nearest = Math.round(value);
    const slack = this.logError + 2.3e-16 * (2 + Math.abs(this.log));
    return nearest <= Number.MAX_SAFE_INTEGER && Math.abs(value - nearest) <= slack * value
      ? nearest
      : value;
  }

  /** The decimal logarithm. */
  get log10(): number {
    return this.log / Math.LN10;
  }

  /** Up to twelve digits, as many as the error leaves. */
  override toString(): string {
    return Math.abs(this.log) < 700
      ? formatNumber(this.value, this.logError)
      : formatExponential(this.log, this.logError);
  }

  /** The stored numbers, with infinities as strings. */
  toJSON(): PlainLogNumber {
    return {
      kind: this.kind,
      log: toPlainNumber(this.log),
      logError: toPlainNumber(this.logError),
    };
  }

  /** @internal */
  override displayRows(): readonly DisplayRow[] {
    return [
      ['log', formatNumber(this.log)],
      ['decimal log', formatNumber(this.log10)],
      ['error of the log', formatNumber(this.logError, 1e-2)],
    ];
  }
}

// Outside the class: bundlers give a class that names itself in its body a second, mangled name.
function make(log: number, logError: number): LogNumber {
  return new LogNumber(log || 0, logError);
}

/** Whether a value is a log number, from this copy of the library or another, or its plain data. */
export function isLogNumber(value: unknown): value is LogNumber {
  return hasKind(value, 'logNumber');
}
