/**
 * Are two classes of the user's points linearly separable? With a hyperplane or weights as proof.
 *
 * Complete separation is the distance between the hulls of the classes (through the origin: the
 * distance of the hull of the points, those of the negative class reflected). Where the hulls meet,
 * `overlap.ts` tells a weak separator from a proper overlap.
 */
import { checkBoolean, checkOptions, DomainError } from '../domain.ts';
import { matrixRank } from '../numeric/rank.ts';
import { completeSeparator, type Problem, weakHyperplane } from './class-hyperplane.ts';
import { DEFAULT_TOLERANCE, type HullWeight } from './in-hull.ts';
import { judgeOverlap } from './overlap.ts';
import {
  allIntegers,
  type ColumnRanges,
  centreOf,
  checkPoints,
  columnRanges,
  columnTolerances,
  type Matrix,
  type Points,
  powerOfTwoAbove,
} from './points.ts';

/** What {@link separable} answers. */
export interface Separability {
  /**
   * `'complete'`: a hyperplane has the classes strictly on its two sides. `'quasi-complete'`: one
   * has them weakly on its two sides, and not all points on it. `'overlapping'`: none has.
   * `'undecided'`: no proof passed its check.
   */
  readonly kind: 'complete' | 'quasi-complete' | 'overlapping' | 'undecided';
  /** Unit normal of the hyperplane, pointing to the positive class, or null if there is none. */
  readonly normal: readonly number[] | null;
  /** The hyperplane is `normal . x = offset`; 0 without intercept, null if there is none. */
  readonly offset: number | null;
  /** Smallest distance of a point from the hyperplane, the largest possible when complete; else 0. */
  readonly margin: number;
  /** Number of slopes that the points determine; below d the design is deficient. */
  readonly rank: number;
  /**
   * Overlapping: positive weights of all points, half of them in each class, with which both classes
   * have the same mean; without intercept, with which the difference of the sums is 0. Otherwise empty.
   */
  readonly weights: readonly HullWeight[];
}

/** Options of {@link separable}. */
export interface SeparableOptions {
  /** Whether the hyperplane may miss the origin; true if left out. */
  readonly intercept?: boolean;
}

/**
 * Tells whether a hyperplane separates two classes of points, and proves it.
 *
 * Complete and quasi-complete separation are the cases in which a logistic fit has no finite
 * solution. When complete, the hyperplane is the one of largest margin, with
 * $n \cdot x - c \ge m$ for the positive class and $\le -m$ for the negative one. Differences below
 * 1e-12 of a column's range count as none, with integers throughout those below rounding.
 *
 * @param points - rows of finite numbers of size at most 1e150, all of one length; at least one
 * @param labels - one per row: `true` or 1 for the positive class; `false`, 0 or -1 for the other
 * @param options - `intercept`: whether the hyperplane may miss the origin, true if left out
 * @returns the kind, the hyperplane with its margin, the rank and the weights. With an intercept and
 *   one class only, the kind is `'complete'` with a zero normal and the margin `Infinity`. `rank` is
 *   what `labelSeparability` takes as d
 * @remarks Cost: about d passes over the points, and as many again for each check of an overlap.
 * @throws A {@link DomainError} if a row is empty, ragged or holds anything but finite numbers, or a
 *   label is none of the above; the message names the place
 *
 * Source: On the existence of maximum likelihood estimates in logistic regression models,
 * Biometrika, 1984, doi:10.1093/biomet/71.1.1.
 *
 * @example
 * ```ts
 * import { separable } from 'hullgauge/data';
 * const points = [[0, 0], [0, 2], [4, 0], [4, 2]];
 * separable(points, [0, 0, 1, 1]).margin; // => 2
 * separable(points, [0, 1, 1, 0]).kind; // => 'overlapping'
 * ```
 */
export function separable(
  points: Points,
  labels: ArrayLike<number | boolean>,
  options: SeparableOptions = {},
): Separability {
  const matrix = checkPoints('separable', points);
  const signs = checkLabels(labels, matrix.n);
  checkOptions('separable', options, ['intercept']);
  const { intercept = true } = options;
  checkBoolean('separable', 'intercept', intercept);
  return separableKernel(matrix, signs, intercept);
}

function checkLabels(labels: unknown, n: number): Int8Array {
  const list = labels as ArrayLike<unknown>;
  const isList = Array.isArray(labels) || ArrayBuffer.isView(labels);
  if (!isList || list.length !== n) {
    throw new DomainError('separable', 'labels', `an array of ${n} labels, one per row`, labels);
  }
  const signs = new Int8Array(n);
  for (let i = 0; i < n; i++) {
    const label = list[i];
    if (label === true || label === 1) signs[i] = 1;
    else if (label === false || label === 0 || label === -1) signs[i] = -1;
    else throw new DomainError('separable', `labels[${i}]`, 'true, false, 1, 0 or -1', label);
  }
  return signs;
}

/** {@link separable} without checks. */
export function separableKernel(
  matrix: Matrix,
  signs: Int8Array,
  intercept: boolean,
): Separability {
  const { n, d, rows } = matrix;
  const ranges = intercept ? columnRanges(matrix) : symmetricRanges(columnRanges(matrix));
  const exact = allIntegers(rows);
  const allowed = columnTolerances(ranges, DEFAULT_TOLERANCE, exact);
  const middle = ranges.min.map((low, j) => low + ((ranges.max[j] as number) - low) / 2);
  const rank = matrixRank(
    rows,
    n,
    d,
    intercept ? centreOf(matrix, exact) : new Float64Array(d),
    allowed,
  );
  const positives = signs.reduce((count, sign) => count + (sign > 0 ? 1 : 0), 0);
  if (intercept && (positives === 0 || positives === n)) {
    return {
      kind: 'complete',
      normal: Array.from({ length: d }, () => 0),
      offset: positives === 0 ? 1 : -1,
      margin: Number.POSITIVE_INFINITY,
      rank,
      weights: [],
    };
  }
  const scales = new Float64Array(d);
  for (let j = 0; j < d; j++) {
    const range = (ranges.max[j] as number) - (ranges.min[j] as number);
    const tolerance = allowed[j] as number;
    if (range > tolerance) {
      scales[j] = powerOfTwoAbove(Math.max(range, tolerance / DEFAULT_TOLERANCE));
    }
  }
  const problem: Problem = {
    matrix,
    signs,
    intercept,
    exact,
    middle,
    allowed,
  };
  const complete = completeSeparator(problem, scales);
  if (complete !== null) return { kind: 'complete', ...complete, rank, weights: [] };
  return { ...incomplete(problem, scales), rank };
}

/** Ranges that hold 0 in their middle. */
function symmetricRanges({ size }: ColumnRanges): ColumnRanges {
  return { min: size.map((x) => -x), max: size, size };
}

/** Quasi-complete, overlapping or undecided. */
function incomplete(problem: Problem, scales: Float64Array): Omit<Separability, 'rank'> {
  const { matrix, signs, intercept, middle } = problem;
  const { rows, n, d } = matrix;
  const wide = intercept ? d + 1 : d;
  const z = new Float64Array(n * wide);
  const lengths = new Float64Array(n);
  const kept: number[] = [];
  for (let i = 0; i < n; i++) {
    const v = z.subarray(kept.length * wide, (kept.length + 1) * wide);
    for (let j = 0; j < d; j++) {
      const scale = scales[j] as number;
      v[j] = scale > 0 ? ((rows[i * d + j] as number) - (middle[j] as number)) / scale : 0;
    }
    if (intercept) v[d] = 1;
    const length = Math.sqrt(v.reduce((sum, x) => sum + x * x, 0));
    // Without intercept, a point at the origin is on every hyperplane.
    if (!(length > DEFAULT_TOLERANCE)) continue;
    for (let j = 0; j < wide; j++) v[j] = ((v[j] as number) * (signs[i] as number)) / length;
    lengths[kept.length] = length;
    kept.push(i);
  }
  const nothing = { normal: null, offset: null, margin: 0, weights: [] };
  if (kept.length === 0) {
    const weights = Array.from({ length: n }, (_, index) => ({ index, weight: 1 / n }));
    return { ...nothing, kind: 'overlapping', weights };
  }
  const judged = judgeOverlap({ rows: z.subarray(0, kept.length * wide), n: kept.length, d: wide });
  if (judged.kind === 'overlapping') {
    const raw = judged.weights.map((w, k) => w / (lengths[k] as number));
    const all = new Float64Array(n);
    kept.forEach((index, k) => {
      all[index] = raw[k] as number;
    });
    // Points at the origin take any weight.
    const least = raw.reduce((m, w) => Math.min(m, w), Number.POSITIVE_INFINITY);
    const filled = all.map((w) => (w > 0 ? w : least));
    const total = filled.reduce((sum, w) => sum + w, 0);
    const weights = Array.from(filled, (w, index) => ({ index, weight: w / total }));
    return { ...nothing, kind: 'overlapping', weights };
  }
  if (judged.kind === 'undecided') return { ...nothing, kind: 'undecided' };
  const hyperplane = weakHyperplane(problem, judged.beta, scales);
  return { ...nothing, ...hyperplane, kind: 'quasi-complete' };
}
