/**
 * Does a query lie in the convex hull of the points? With a proof either way.
 *
 * The nearest hull point is sought in coordinates centred at the query. Columns of very different
 * units are first scaled to their ranges, so that the verdict does not depend on the units; the
 * Euclidean distance is then computed in the units given. Both proofs are checked against the data
 * before they are returned: the weights by summing the rows, the separator by its product with
 * every row and a bound on the rounding of that product.
 */
import { checkNumber, checkOptions } from '../domain.ts';
import { type MinimumNormPoint, minimumNormPoint } from '../numeric/minimum-norm-point.ts';
import { rowAtoms } from '../numeric/row-atoms.ts';
import {
  allIntegers,
  checkPoints,
  checkRow,
  columnRanges,
  columnTolerances,
  type Matrix,
  type Points,
  powerOfTwoAbove,
  unscaledNormal,
} from './points.ts';

/** One point's share in a convex combination. */
export interface HullWeight {
  /** Index of the point. */
  readonly index: number;
  /** Its weight, positive. */
  readonly weight: number;
}

/** A hyperplane: all x with `normal . x = offset`. */
export interface Separator {
  /** Unit vector. */
  readonly normal: readonly number[];
  /** Where the hyperplane cuts the normal. */
  readonly offset: number;
}

/** What {@link inHull} answers. */
export interface HullMembership {
  /** The verdict; `'undecided'` when neither proof passed its check. */
  readonly position: 'inside' | 'outside' | 'undecided';
  /** Euclidean distance from the query to the hull; 0 inside, an upper bound when undecided. */
  readonly distance: number;
  /** Convex weights of the nearest hull point: inside, they reproduce the query. */
  readonly weights: readonly HullWeight[];
  /**
   * Outside: the hyperplane half-way between the hull and the query, with `normal . x < offset` for
   * every point and `normal . query > offset`. Otherwise null.
   */
  readonly separator: Separator | null;
}

/** Options of {@link inHull}. */
export interface InHullOptions {
  /** Difference that counts as none, as a share of each column's range; 1e-12 if left out. */
  readonly tolerance?: number;
}

/** Default tolerance: a few thousand roundings, far below what data resolve. */
export const DEFAULT_TOLERANCE = 1e-12;
/** Columns whose ranges differ by more than this are scaled before the verdict. */
const UNEVEN = 64;

/**
 * Tells whether a query lies in the convex hull of the points, and proves it.
 *
 * Inside, the weights $w_i > 0$ with $\sum w_i = 1$ give $\sum w_i p_i = q$; outside, a hyperplane
 * separates the query from all points. A query nearer to the hull than the tolerance counts as
 * inside, boundary included. Duplicates, collinear points, constant columns and fewer points than
 * dimensions are all in order. At most d + 1 points have weight.
 *
 * @param points - rows of finite numbers of size at most 1e150, all of one length d; at least
 *   one, and at most 4096 columns where there are as many rows
 * @param query - d numbers
 * @param options - `tolerance`: difference that counts as none, from 1e-15 to 0.01 of each column's
 *   range, 1e-12 if left out; 64 roundings of the column's largest number (1.4e-14 of it) are added,
 *   since data and means computed from them are no sharper than that. Left out with integer
 *   coordinates throughout, no distance above rounding, about 1e-14 of the range, counts as none
 * @returns the verdict, the distance in the units of the data, the weights of the nearest hull
 *   point, and outside the separating hyperplane. Either proof has been checked against the rows
 * @remarks Cost: about d passes over the n rows; 10,000 rows in 50 dimensions take some tens of
 *   milliseconds. Distances are right to 1e-14 of the largest column's range; the
 *   largest error seen is 2e-15 of it.
 * @throws A {@link DomainError} if a row is empty, ragged or holds anything but finite numbers; the
 *   message names row and column
 *
 * Source: Finding the nearest point in a polytope, Mathematical Programming, 1976,
 * doi:10.1007/BF01580381.
 *
 * @example
 * ```ts
 * import { inHull } from 'hullgauge/data';
 * const square = [[0, 0], [4, 0], [4, 4], [0, 4]];
 * inHull(square, [1, 3]).position; // => 'inside'
 * const far = inHull(square, [7, 8]);
 * far.position; // => 'outside'
 * far.distance; // => 5
 * far.weights; // => [{ index: 2, weight: 1 }]
 * ```
 */
export function inHull(
  points: Points,
  query: ArrayLike<number>,
  options: InHullOptions = {},
): HullMembership {
  const matrix = checkPoints('inHull', points);
  const q = checkRow('inHull', 'query', query, matrix.d);
  checkOptions('inHull', options, ['tolerance']);
  const { tolerance } = options;
  if (tolerance !== undefined) {
    checkNumber('inHull', 'tolerance', tolerance, 1e-15, 0.01);
    return inHullKernel(matrix, q, tolerance, false);
  }
  const exact = allIntegers(q) && allIntegers(matrix.rows);
  return inHullKernel(matrix, q, DEFAULT_TOLERANCE, exact);
}

/** {@link inHull} without checks; `exact`: any proven separation counts. Overwrites the matrix. */
export function inHullKernel(
  matrix: Matrix,
  q: Float64Array,
  tolerance: number,
  exact: boolean,
): HullMembership {
  const { d } = matrix;
  const ranges = columnRanges(matrix);
  const allowed = columnTolerances(ranges, tolerance, exact);
  const scales = new Float64Array(d);
  let largest = 0;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 0; j < d; j++) {
    const low = Math.min(ranges.min[j] as number, q[j] as number);
    const high = Math.max(ranges.max[j] as number, q[j] as number);
    // A column that never leaves its tolerance around the query says nothing.
    if (!(high - low > (allowed[j] as number))) continue;
    // Noise of the size of its tolerance weighs the same in each column.
    const scale = powerOfTwoAbove(Math.max(high - low, (allowed[j] as number) / tolerance));
    scales[j] = scale;
    largest = Math.max(largest, scale);
    smallest = Math.min(smallest, scale);
  }
  if (largest === 0) largest = 1;
  const uneven = largest > UNEVEN * smallest;
  const even = new Float64Array(d).fill(largest);
  // The copy of the rows is ours: unless they are needed again, they are shifted in place.
  const first = nearest(matrix, q, uneven ? scales : even, uneven ? undefined : matrix.rows);
  if (!(exact && first.proven) && reproduces(first, allowed)) {
    return { position: 'inside', distance: 0, weights: weightsOf(first.found), separator: null };
  }
  let proof = first;
  let measured = first;
  if (uneven) {
    measured = nearest(matrix, q, even, matrix.rows);
    if (measured.proven) proof = measured;
  }
  const distance = measured.found.upper * largest;
  const weights = weightsOf(measured.found);
  const position = proof.proven ? 'outside' : 'undecided';
  const separator = proof.proven ? separatorOf(q, proof) : null;
  return { position, distance, weights, separator };
}

/** A nearest point in scaled coordinates; `proven` when its hyperplane separates despite rounding. */
export interface Attempt {
  readonly found: MinimumNormPoint;
  readonly scales: Float64Array;
  readonly proven: boolean;
}

/**
 * Nearest hull point to q with column j divided by scales[j], or left out where that is 0. The
 * shifted rows go to `shifted`, which may be the rows themselves.
 */
export function nearest(
  { rows, n, d }: Matrix,
  q: Float64Array,
  scales: Float64Array,
  shifted: Float64Array = new Float64Array(n * d),
): Attempt {
  // Powers of two, so multiplying by the inverse is exact; 0 leaves a column out.
  const factors = scales.map((scale) => (scale > 0 ? 1 / scale : 0));
  let start = 0;
  let least = Number.POSITIVE_INFINITY;
  let most = 0;
  for (let i = 0, at = 0; i < n; i++) {
    let square = 0;
    for (let j = 0; j < d; j++, at++) {
      const x = ((rows[at] as number) - (q[j] as number)) * (factors[j] as number);
      shifted[at] = x;
      square += x * x;
    }
    if (square < least) {
      least = square;
      start = i;
    }
    if (square > most) most = square;
  }
  const found = minimumNormPoint(rowAtoms(shifted, n, d), start);
  return { found, scales, proven: found.lower > productError(d, Math.sqrt(most)) };
}

/**
 * Bound on what rounding can do to the smallest of many products of d-vectors, one of length 1 and one
 * of length at most `size`: the product with a wrong row, summed in another order.
 */
export function productError(d: number, size: number): number {
  return 2 * (d + 4) * Number.EPSILON * size;
}

/** Do the weights reproduce the query to the tolerance of every column? */
export function reproduces({ found, scales }: Attempt, allowed: Float64Array): boolean {
  return found.point.every((x, j) => Math.abs(x) * (scales[j] as number) <= (allowed[j] as number));
}

function weightsOf({ atoms, weights }: MinimumNormPoint): HullWeight[] {
  return atoms
    .map((index, i) => ({ index, weight: weights[i] as number }))
    .sort((a, b) => a.index - b.index);
}

/** The hyperplane half-way between the hull and the query, in the units of the data. */
function separatorOf(q: Float64Array, { found, scales }: Attempt): Separator {
  const { unit, factor } = unscaledNormal(
    found.normal.map((x) => -x),
    scales,
  );
  const height = unit.reduce((sum, x, j) => sum + x * (q[j] as number), 0);
  return { normal: unit, offset: height - (found.lower * factor) / 2 };
}
