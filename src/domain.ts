/**
 * Argument checks and the one error that a bad argument gives.
 *
 * Every public function validates here and then calls a kernel without checks, so that loops
 * inside the library do not pay twice. All messages have one wording:
 * `function: parameter must be requirement, got value`.
 */

/**
 * An argument lies outside the set on which a function is defined.
 *
 * Every public function throws it instead of returning `NaN`. It extends `RangeError`;
 * {@link DomainError.code} identifies it without `instanceof`, which matters when a program loads
 * both the ESM and the CommonJS build.
 *
 * @example
 * ```ts
 * import { DomainError, originInHull } from 'hullgauge';
 * try {
 *   originInHull({ n: 3.5, d: 2 });
 * } catch (error) {
 *   (error as DomainError).message; // => 'originInHull: n must be an integer >= 0, got 3.5'
 * }
 * ```
 */
export class DomainError extends RangeError {
  /** Always `'DomainError'`. */
  override readonly name: string = 'DomainError';
  /** Always `'HULLGAUGE_DOMAIN'`. */
  readonly code: string = 'HULLGAUGE_DOMAIN';
  /** Name of the offending parameter, as the documentation writes it. */
  readonly parameter: string;
  /** The value that was passed. */
  readonly received: unknown;

  /**
   * Builds the message `fn: parameter must be requirement, got received`.
   *
   * @param fn - name of the function that refuses
   * @param parameter - name of the offending parameter
   * @param requirement - completes the sentence "the parameter must be ..."
   * @param received - the value that was passed
   * @param shown - how the message shows it, if not as it is: what was counted or summed in it
   */
  constructor(
    fn: string,
    parameter: string,
    requirement: string,
    received: unknown,
    shown: string = describe(received),
  ) {
    super(`${fn}: ${parameter} must be ${requirement}, got ${shown}`);
    this.parameter = parameter;
    this.received = received;
  }
}

/** A value as an error message shows it: strings quoted, long things shortened. */
function describe(value: unknown): string {
  const type = typeof value;
  if (Array.isArray(value)) return `an array of length ${value.length}`;
  // Mostly a law without its brackets.
  if (type === 'function') return `a ${type}`;
  if (type === 'string') return JSON.stringify(value);
  if (type === 'bigint') return `${value}n`;
  return Object(value) === value ? `an ${type}` : String(value);
}

/** Largest integer argument where no count beyond exact doubles is meant: $2^{53} - 1$. */
export const MAX_INTEGER = 9007199254740991;

/** Refuses anything but an integer from `min` to `max`. */
export function checkInteger(
  fn: string,
  parameter: string,
  value: unknown,
  min: number,
  max: number = MAX_INTEGER,
): asserts value is number {
  if (typeof value === 'number' && Number.isInteger(value) && value >= min && value <= max) return;
  const requirement =
    max < MAX_INTEGER || (typeof value === 'number' && value > max)
      ? `an integer from ${min} to ${max === MAX_INTEGER ? '2^53 - 1' : max}`
      : `an integer >= ${min}`;
  throw new DomainError(fn, parameter, requirement, value);
}

/** Refuses anything but a number in the closed interval from `min` to `max`; NaN never passes. */
export function checkNumber(
  fn: string,
  parameter: string,
  value: unknown,
  min: number = -Infinity,
  max: number = Infinity,
): asserts value is number {
  if (typeof value === 'number' && value >= min && value <= max) return;
  throw new DomainError(fn, parameter, intervalText(min, max), value);
}

/** Refuses anything but a finite number from `min` to `max`, both included. */
export function checkFinite(
  fn: string,
  parameter: string,
  value: unknown,
  min: number = -Number.MAX_VALUE,
  max: number = Number.MAX_VALUE,
): asserts value is number {
  if (typeof value === 'number' && value >= min && value <= max) return;
  const lower = min === -Number.MAX_VALUE ? -Infinity : min;
  const upper = max === Number.MAX_VALUE ? Infinity : max;
  const interval = intervalText(lower, upper);
  const requirement = upper < Infinity ? interval : interval.replace('a ', 'a finite ');
  throw new DomainError(fn, parameter, requirement, value);
}

/** Refuses anything but a finite number above `min`, or below or at `max` where one is given. */
export function checkPositive(
  fn: string,
  parameter: string,
  value: unknown,
  max: number = Number.MAX_VALUE,
): asserts value is number {
  if (typeof value === 'number' && value > 0 && value <= max) return;
  const requirement =
    max === Number.MAX_VALUE ? 'a finite number > 0' : `a number > 0 and <= ${max}`;
  throw new DomainError(fn, parameter, requirement, value);
}

/** Refuses anything but a number above `min`; `Infinity` passes. */
export function checkAbove(
  fn: string,
  parameter: string,
  value: unknown,
  min: number,
): asserts value is number {
  if (typeof value === 'number' && value > min) return;
  throw new DomainError(fn, parameter, `a number > ${min}`, value);
}

/** Refuses anything but `true` or `false`. */
export function checkBoolean(
  fn: string,
  parameter: string,
  value: unknown,
): asserts value is boolean {
  if (typeof value !== 'boolean') throw new DomainError(fn, parameter, 'true or false', value);
}

/** Refuses anything but one of a few strings. */
export function checkChoice<T extends string>(
  fn: string,
  parameter: string,
  value: unknown,
  choices: readonly T[],
): asserts value is T {
  if (choices.includes(value as T)) return;
  const list = choices.map((choice) => JSON.stringify(choice)).join(' or ');
  throw new DomainError(fn, parameter, list, value);
}

/**
 * Refuses anything but an object whose own keys are all among `names`.
 *
 * A mistyped option would otherwise be ignored and its default used without a word.
 */
export function checkOptions(
  fn: string,
  options: unknown,
  names: readonly string[],
  parameter = 'options',
): void {
  const list = names.join(', ');
  if (typeof options !== 'object' || options === null || Array.isArray(options)) {
    throw new DomainError(fn, parameter, `an object (the options are ${list})`, options);
  }
  for (const key of Object.keys(options)) {
    if (!names.includes(key)) {
      const value = (options as Record<string, unknown>)[key];
      throw new DomainError(fn, key, `left out (the options are ${list})`, value);
    }
  }
}

function intervalText(min: number, max: number): string {
  if (max < Infinity)
    return min > -Infinity ? `a number from ${min} to ${max}` : `a number <= ${max}`;
  return min > -Infinity ? `a number >= ${min}` : 'a number';
}
