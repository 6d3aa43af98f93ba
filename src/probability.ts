/**
 * A probability with both tails.
 *
 * The four numbers are stored, none is derived from another where that would lose digits: a
 * probability of 1 - 1e-300 keeps its complement, and one of e^-1000000 its logarithm.
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

/** The data of a {@link Probability}, as JSON holds it: `-Infinity` is the string `"-Infinity"`. */
export interface PlainProbability {
  /** Always `'probability'`. */
  readonly kind: 'probability';
  /** The probability. */
  readonly value: number;
  /** One minus the probability. */
  readonly complement: number;
  /** Natural logarithm of the probability. */
  readonly log: number | string;
  /** Natural logarithm of the complement. */
  readonly logComplement: number | string;
  /** Bound on the absolute error of the logarithm of the smaller tail. */
  readonly logError: number | string;
}

/** What {@link Probability.of} takes: the four numbers and, if known, their error. */
export interface ProbabilityFields {
  /** The probability, from 0 to 1. */
  readonly value: number;
  /** One minus the probability, from 0 to 1. */
  readonly complement: number;
  /** Natural logarithm of the probability, at most 0. */
  readonly log: number;
  /** Natural logarithm of the complement, at most 0. */
  readonly logComplement: number;
  /** Bound on the absolute error of the logarithm of the smaller tail; 0 if left out. */
  readonly logError?: number;
}

/**
 * A probability that keeps both tails and their logarithms.
 *
 * Compare on a field (`p.value < 0.05`, `p.complement <= 1e-12`, `p.log < -1000`): the object
 * itself refuses arithmetic and comparison, so no tail is lost by accident.
 *
 * @example
 * ```ts
 * import { originInHull } from 'hullgauge';
 * const p = originInHull({ n: 10, d: 3 });
 * p.value; // => 0.91015625
 * p.complement; // => 0.08984375
 * `${originInHull({ n: 4000, d: 3 })}`; // => '1 - 1.21346930113e-1197'
 * ```
 */
export class Probability extends Displayable {
  /** Always `'probability'`; tells the type without `instanceof`. */
  readonly kind = 'probability' as const;
  /** The probability. */
  readonly value: number;
  /** One minus the probability, not computed by subtraction where that loses digits. */
  readonly complement: number;
  /** Natural logarithm of the probability; `-Infinity` for 0. */
  readonly log: number;
  /** Natural logarithm of the complement; `-Infinity` for a certain event. */
  readonly logComplement: number;
  /**
   * Bound on the absolute error of the logarithm of the smaller tail: when small, the relative
   * error of that tail. `Infinity` where the tail is known to be below every double's logarithm.
   */
  readonly logError: number;

  /** @internal Checks nothing: outside this file use the static methods. */
  constructor(
    value: number,
    complement: number,
    log: number,
    logComplement: number,
    logError: number,
  ) {
    super();
    this.value = value;
    this.complement = complement;
    this.log = log;
    this.logComplement = logComplement;
    this.logError = logError;
  }

  /**
   * Builds a probability from its four numbers.
   *
   * @param fields - value and complement in [0, 1], their logarithms at most 0, `logError` >= 0
   * @returns the probability
   * @throws A {@link DomainError} if a field is out of range or the four contradict each other
   */
  static of(fields: ProbabilityFields): Probability {
    return checkedFields('Probability.of', fields);
  }

  /**
   * The probability whose natural logarithm is given.
   *
   * @param log - at most 0; `-Infinity` for an impossible event
   * @param logError - bound on the absolute error of the logarithm of the smaller tail; 0 if left out
   * @returns the probability, with the complement to full relative accuracy
   * @throws A {@link DomainError} if `log` is positive or NaN, or `logError` negative or NaN
   *
   * @example
   * ```ts
   * import { Probability } from 'hullgauge';
   * Probability.fromLog(-2000).value; // => 0
   * `${Probability.fromLog(-2000)}`; // => '2.57653587296e-869'
   * ```
   */
  static fromLog(log: number, logError = 0): Probability {
    return checkedLog('Probability.fromLog', 'log', log, logError);
  }

  /**
   * The probability whose complement has the given natural logarithm.
   *
   * @param logComplement - at most 0; `-Infinity` for a certain event
   * @param logError - bound on the absolute error of the logarithm of the smaller tail; 0 if left out
   * @returns the probability, with the value to full relative accuracy
   * @throws A {@link DomainError} if `logComplement` is positive or NaN, or `logError` negative or NaN
   */
  static fromLogComplement(logComplement: number, logError = 0): Probability {
    const fn = 'Probability.fromLogComplement';
    return complementOf(checkedLog(fn, 'logComplement', logComplement, logError));
  }

  /**
   * The probability equal to a double.
   *
   * @param value - a number from 0 to 1
   * @param logError - bound on the absolute error of the logarithm of the smaller tail; 0 if left out
   * @returns the probability
   * @throws A {@link DomainError} if `value` is outside [0, 1] or NaN, or `logError` negative or NaN
   */
  static fromValue(value: number, logError = 0): Probability {
    return checkedValue('Probability.fromValue', 'value', value, logError);
  }

  /**
   * The probability whose complement equals a double: the way to write 1 - 1e-300.
   *
   * @param complement - a number from 0 to 1
   * @param logError - bound on the absolute error of the logarithm of the smaller tail; 0 if left out
   * @returns the probability
   * @throws A {@link DomainError} if `complement` is outside [0, 1] or NaN, or `logError` negative or NaN
   *
   * @example
   * ```ts
   * import { Probability } from 'hullgauge';
   * import { normalQuantile } from 'hullgauge/special';
   * normalQuantile(Probability.fromComplement(1e-300)).toPrecision(12); // => '37.0470962994'
   * ```
   */
  static fromComplement(complement: number, logError = 0): Probability {
    const fn = 'Probability.fromComplement';
    return complementOf(checkedValue(fn, 'complement', complement, logError));
  }

  /**
   * Restores a probability from JSON, a structured clone or another copy of this library.
   *
   * @param plain - an object with `kind: 'probability'` and the five numbers
   * @returns the probability
   * @throws A {@link DomainError} if `plain` is not such an object
   *
   * @example
   * ```ts
   * import { Probability } from 'hullgauge';
   * const text = JSON.stringify(Probability.fromLog(-Infinity));
   * Probability.from(JSON.parse(text)).complement; // => 1
   * ```
   */
  static from(plain: PlainProbability | Probability): Probability {
    const fn = 'Probability.from';
    if (!isProbability(plain)) {
      throw new DomainError(fn, 'plain', "an object of kind 'probability'", plain);
    }
    // An infinity that was written without toJSON is null, of which Number alone would make 0.
    return checkedFields(fn, {
      ...plain,
      log: Number(plain.log ?? NaN),
      logComplement: Number(plain.logComplement ?? NaN),
      logError: Number(plain.logError ?? NaN),
    });
  }

  /** Up to twelve digits; a probability within a millionth of 1 is written as `1 - complement`. */
  override toString(): string {
    if (this.complement < 1e-6) {
      if (this.logComplement === -Infinity && this.logError === 0) return '1';
      return `1 - ${tailText(this.complement, this.logComplement, this.logError)}`;
    }
    return this.value <= 0.5
      ? tailText(this.value, this.log, this.logError)
      : formatNumber(this.value);
  }

  /** The stored numbers, with `-Infinity` as a string. */
  toJSON(): PlainProbability {
    return {
      ...this,
      log: toPlainNumber(this.log),
      logComplement: toPlainNumber(this.logComplement),
      logError: toPlainNumber(this.logError),
    };
  }

  /** @internal */
  override displayRows(): readonly DisplayRow[] {
    return [
      ['value', tailText(this.value, this.log, this.value <= 0.5 ? this.logError : 0)],
      [
        'complement',
        tailText(this.complement, this.logComplement, this.value > 0.5 ? this.logError : 0),
      ],
      ['log', formatNumber(this.log)],
      ['logComplement', formatNumber(this.logComplement)],
      ['logError', formatNumber(this.logError, 1e-2)],
    ];
  }
}

// Outside the class: bundlers give a class that names itself in its body a second, mangled name.
function checkedFields(fn: string, fields: ProbabilityFields): Probability {
  // Anything but an object is refused for the value that it lacks.
  const { value, complement, log, logComplement, logError = 0 } = fields ?? {};
  if (Math.abs(value + complement - 1) > SLACK) {
    throw new DomainError(fn, 'complement', `1 - value = ${1 - value}`, complement);
  }
  checkTail(fn, 'value', value, 'log', log);
  checkTail(fn, 'complement', complement, 'logComplement', logComplement);
  checkNumber(fn, 'logError', logError, 0);
  return new Probability(value, complement, log, logComplement, logError);
}

function checkedLog(fn: string, name: string, log: number, logError: number): Probability {
  checkNumber(fn, name, log, undefined, 0);
  checkNumber(fn, 'logError', logError, 0);
  const complement = -Math.expm1(log) || 0;
  return new Probability(Math.exp(log), complement, log || 0, logOfComplement(log), logError);
}

function checkedValue(fn: string, name: string, value: number, logError: number): Probability {
  checkNumber(fn, name, value, 0, 1);
  checkNumber(fn, 'logError', logError, 0);
  return new Probability(value, 1 - value, Math.log(value), Math.log1p(-value) || 0, logError);
}

/** How far the numbers of one probability may contradict each other. */
const SLACK = 1e-9;

function checkTail(fn: string, name: string, value: number, logName: string, log: number): void {
  checkNumber(fn, name, value, 0, 1);
  checkNumber(fn, logName, log, undefined, 0);
  if (Math.abs(Math.exp(log) - value) > SLACK * value + 5e-324) {
    throw new DomainError(fn, logName, `the logarithm of ${name}`, log);
  }
}

function tailText(value: number, log: number, logError: number): string {
  return value > 1e-300 ? formatNumber(value, logError) : formatExponential(log, logError);
}

/** Whether a value is a probability, from this copy of the library or another, or its plain data. */
export function isProbability(value: unknown): value is Probability {
  return hasKind(value, 'probability');
}

/** @internal The probability of what is known to happen, or known not to. */
export function certainty(happens: boolean): Probability {
  return probabilityFromTail(0, Number.NEGATIVE_INFINITY, happens ? 'upper' : 'lower', 0);
}

/** The probability of the complementary event. */
export function complementOf(p: Probability): Probability {
  return new Probability(p.complement, p.value, p.logComplement, p.log, p.logError);
}

/**
 * $\ln(1 - e^x)$ for x <= 0, without cancellation and without a check.
 *
 * The branches meet at -ln 2: above it 1 - e^x is small and expm1 keeps its digits, below it e^x is
 * small and log1p does.
 */
export function logOfComplement(x: number): number {
  return x > -Math.LN2 ? Math.log(-Math.expm1(x)) : Math.log1p(-Math.exp(x)) || 0;
}

/**
 * Builds a probability from its small tail, which a kernel computed both as a number and as a
 * logarithm.
 *
 * @param tail - value of the small tail; 0 where it underflows
 * @param logTail - its logarithm, the authority where `tail` underflows
 * @param side - whether the small tail is the probability itself ('lower') or its complement ('upper')
 * @param logError - bound on the absolute error of `logTail`
 */
export function probabilityFromTail(
  tail: number,
  logTail: number,
  side: 'lower' | 'upper',
  logError: number,
): Probability {
  const other = 1 - tail;
  // From the number, not its logarithm: exp(logTail) would lose |logTail| ulps.
  const logOther = Math.log1p(-tail) || 0;
  return side === 'lower'
    ? new Probability(tail, other, logTail, logOther, logError)
    : new Probability(other, tail, logOther, logTail, logError);
}
