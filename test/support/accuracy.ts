/**
 * Accuracy checks as data: a function, its reference rows, how the error is measured, and the bound.
 *
 * The test suite asserts each bound; `npm run accuracy` prints the same checks as a table, so what the
 * documentation says and what the tests demand cannot drift apart.
 */
import { difference, relativeError } from './reference.ts';

/** One argument list with its exact result. */
export interface AccuracyCase {
  /** Arguments as the function takes them. */
  readonly args: readonly unknown[];
  /** The exact result as a decimal string of 25 or more digits. */
  readonly exact: string;
  /** Which part of the domain the case belongs to, as the table prints it. */
  readonly region: string;
}

/**
 * How an error is measured, with x the computed and X the exact number:
 * - `relative`: |x - X| / |X|
 * - `absolute`: |x - X|
 * - `log`: |x - X| / max(1, |X|), for logarithms
 * - `tail`: |x - X| / (2 + |X|), for the logarithm of a small tail
 */
export type ErrorMeasure = 'relative' | 'absolute' | 'log' | 'tail';

/** A function, its cases and the bound that all of them keep. */
export interface AccuracyCheck {
  /** The public function and field measured, as the table prints it: `logGamma`, `normalCdf.value`. */
  readonly name: string;
  readonly cases: readonly AccuracyCase[];
  readonly compute: (...args: never[]) => number;
  readonly measure: ErrorMeasure;
  /** Largest admissible error in that measure. */
  readonly bound: number;
  /** The error per case may also be scaled: bound times this. Documented where used. */
  readonly scale?: (testCase: AccuracyCase) => number;
  /** A general-purpose library's result for the same arguments, where it may be compared. */
  readonly jstat?: (...args: never[]) => number;
}

/** The error of one case in the check's measure. */
export function errorOf(check: AccuracyCheck, testCase: AccuracyCase, computed: number): number {
  if (Number.isNaN(computed)) return Number.POSITIVE_INFINITY;
  const exact = testCase.exact;
  const scale = check.scale?.(testCase) ?? 1;
  if (check.measure === 'relative') return relativeError(computed, exact) / scale;
  if (!Number.isFinite(computed)) return Number(exact) === computed ? 0 : Number.POSITIVE_INFINITY;
  const error = Math.abs(difference(computed, exact));
  if (check.measure === 'absolute') return error / scale;
  const size = Math.abs(Number(exact));
  return error / (check.measure === 'log' ? Math.max(1, size) : 2 + size) / scale;
}

/** The worst case of a check or of one region of it. */
export interface WorstCase {
  readonly region: string;
  readonly count: number;
  readonly error: number;
  readonly args: readonly unknown[];
}

/** Worst case per region, in the order in which regions first appear. */
export function worstByRegion(
  check: AccuracyCheck,
  compute: (...args: never[]) => number = check.compute,
): readonly WorstCase[] {
  const regions = new Map<string, { count: number; error: number; args: readonly unknown[] }>();
  for (const testCase of check.cases) {
    const error = errorOf(check, testCase, compute(...(testCase.args as never[])));
    const worst = regions.get(testCase.region);
    if (worst === undefined) {
      regions.set(testCase.region, { count: 1, error, args: testCase.args });
    } else {
      worst.count++;
      if (error > worst.error) Object.assign(worst, { error, args: testCase.args });
    }
  }
  return [...regions].map(([region, worst]) => ({ region, ...worst }));
}

/** A message per region whose worst error exceeds the bound; empty when the check holds. */
export function violations(check: AccuracyCheck): readonly string[] {
  return worstByRegion(check)
    .filter(({ error }) => !(error <= check.bound))
    .map(
      ({ region, error, args }) =>
        `${check.name} (${region}): ${check.measure} error ${error.toExponential(2)} > ${check.bound} at ${JSON.stringify(args)}`,
    );
}
