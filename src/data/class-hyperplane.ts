/**
 * Hyperplanes between two classes: the one of largest margin, and weak separators in the units of the
 * data.
 */
import { differenceAtoms } from '../numeric/difference-atoms.ts';
import { type MinimumNormPoint, minimumNormPoint } from '../numeric/minimum-norm-point.ts';
import { productError } from './in-hull.ts';
import { type Matrix, unscaledNormal } from './points.ts';

/** Two classes of points. */
export interface Problem {
  readonly matrix: Matrix;
  readonly signs: Int8Array;
  readonly intercept: boolean;
  /** Any proven separation counts, however narrow. */
  readonly exact: boolean;
  /** Where the columns are centred: the middle of their ranges, or 0 without intercept. */
  readonly middle: Float64Array;
  readonly allowed: Float64Array;
}

/** All x with `normal . x = offset`, and the least distance of a point on its right side. */
export interface Hyperplane {
  readonly normal: number[];
  readonly offset: number;
  readonly margin: number;
}

/** The hyperplane of largest margin, or null when the classes touch to the tolerance. */
export function completeSeparator(problem: Problem, scales: Float64Array): Hyperplane | null {
  const largest = scales.reduce((m, s) => Math.max(m, s), 0);
  if (largest === 0) return null;
  const first = classDistance(problem, scales);
  if (!first.apart) return null;
  // The margin is a length in the units given, so the columns are scaled alike for it.
  const even = scales.map((scale) => (scale > 0 ? largest : 0));
  const second = classDistance(problem, even);
  const byUnits = second.apart ? hyperplaneOf(problem, second.found.normal, even) : null;
  if (byUnits !== null && byUnits.margin > 0) return byUnits;
  const byRanges = hyperplaneOf(problem, first.found.normal, scales);
  return byRanges.margin > 0 ? byRanges : null;
}

/** Shortest way between the classes in scaled columns; apart when proven and above the tolerance. */
function classDistance(
  { matrix, signs, intercept, exact, middle, allowed }: Problem,
  scales: Float64Array,
): { found: MinimumNormPoint; apart: boolean } {
  const { rows, n, d } = matrix;
  const upper: number[] = [];
  const lower: number[] = [];
  let most = 0;
  for (let i = 0; i < n; i++) {
    const sign = signs[i] as number;
    const out = intercept && sign < 0 ? lower : upper;
    let square = 0;
    for (let j = 0; j < d; j++) {
      const scale = scales[j] as number;
      const x = scale > 0 ? ((rows[i * d + j] as number) - (middle[j] as number)) / scale : 0;
      out.push(intercept ? x : sign * x);
      square += x * x;
    }
    most = Math.max(most, square);
  }
  if (!intercept) for (let j = 0; j < d; j++) lower.push(0);
  const atoms = differenceAtoms(
    Float64Array.from(upper),
    upper.length / d,
    Float64Array.from(lower),
    lower.length / d,
    d,
  );
  const found = minimumNormPoint(atoms, 0);
  const proven = found.lower > productError(d, 2 * Math.sqrt(most));
  const apart = found.point.some(
    (x, j) => Math.abs(x) * (scales[j] as number) > (allowed[j] as number),
  );
  return { found, apart: proven && (exact || apart) };
}

/** The hyperplane with a normal given in scaled columns, midway between the classes. */
function hyperplaneOf(problem: Problem, beta: Float64Array, scales: Float64Array): Hyperplane {
  const { matrix, signs, intercept, middle } = problem;
  const { rows, n, d } = matrix;
  const { unit: normal } = unscaledNormal(beta, scales);
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < n; i++) {
    let height = 0;
    for (let j = 0; j < d; j++) {
      height += (normal[j] as number) * ((rows[i * d + j] as number) - (middle[j] as number));
    }
    if ((signs[i] as number) > 0) lowest = Math.min(lowest, height);
    else highest = Math.max(highest, height);
  }
  if (!intercept) return { normal, offset: 0, margin: Math.min(lowest, -highest) };
  const shift = middle.reduce((sum, x, j) => sum + x * (normal[j] as number), 0);
  return {
    normal,
    offset: shift + highest + (lowest - highest) / 2,
    margin: (lowest - highest) / 2,
  };
}

/** A weak separator in the units of the data; with intercept, the last entry of beta is its constant. */
export function weakHyperplane(
  { matrix, intercept, middle }: Problem,
  beta: Float64Array,
  scales: Float64Array,
): { normal: number[]; offset: number } {
  const { unit, factor } = unscaledNormal(beta, scales);
  if (!intercept) return { normal: unit, offset: 0 };
  const shift = unit.reduce((sum, x, j) => sum + x * (middle[j] as number), 0);
  return { normal: unit, offset: shift - (beta[matrix.d] as number) * factor };
}
