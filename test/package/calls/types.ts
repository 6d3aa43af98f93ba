/** How a row of the export walk describes one valid call. */

/** A valid call of a function with one options object. */
export interface OptionsCall {
  readonly options: Readonly<Record<string, unknown>>;
  /** Options that must be whole numbers. */
  readonly integers?: readonly string[];
  /** Options that are Counts: 2^53 and LogNumber are welcome. */
  readonly counts?: readonly string[];
  /** Options that may be left out. */
  readonly optional?: readonly string[];
  /** Options that take objects or arrays, to which only the primitives among the bad values apply. */
  readonly structured?: readonly string[];
  /** Those that take decimal text, so that '3' is welcome. */
  readonly texts?: readonly string[];
}

/** A valid call of a function with positional arguments. */
export interface PositionalCall {
  readonly args: readonly unknown[];
  /** Names of the arguments, in order. */
  readonly names: readonly string[];
  /** Whether 2^53 itself is welcome. */
  readonly takes2to53?: boolean;
  readonly integers?: readonly string[];
  readonly optional?: readonly string[];
  readonly structured?: readonly string[];
  /** Those that take decimal text, so that '3' is welcome. */
  readonly texts?: readonly string[];
}

/** A function that the walk leaves out, and why. */
export interface Skipped {
  readonly skip: string;
}
