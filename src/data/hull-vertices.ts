/**
 * The vertices of the hull of the user's points.
 *
 * A working set of points known to be vertices grows by support directions. A point inside the hull
 * of the working set is none; otherwise the hyperplane that cuts it off from the working set gives a
 * direction, and the point farthest in that direction is a new vertex. Each test therefore sees the
 * vertices found so far, never all points, and each failed test finds a vertex. Where several points
 * are farthest together, as on grids, the lexicographically last of them is taken, and checked
 * against all other vertices at the end.
 */
import { checkOptions } from '../domain.ts';
import { DEFAULT_TOLERANCE, nearest, productError, reproduces } from './in-hull.ts';
import { type LongWorkOptions, type Pace, startPace } from './long-work.ts';
import {
  allIntegers,
  checkPoints,
  columnRanges,
  columnTolerances,
  type Matrix,
  type Points,
  powerOfTwoAbove,
} from './points.ts';

/**
 * Finds the points that are vertices of the convex hull: those outside the hull of the others.
 *
 * Of identical points the first is listed, so that the hull of the vertices is always the hull of
 * the points. A point nearer than 1e-12 of the columns' ranges to the hull of the other vertices
 * counts as lying in it; with integer coordinates throughout, only one that rounding cannot tell from
 * it.
 *
 * @param points - rows of finite numbers of size at most 1e150, all of one length; at least one
 * @param options - `onProgress`: called with the number of points settled and the number of points;
 *   `signal`: aborts when its `aborted` turns true
 * @returns the indices of the vertices, ascending
 * @remarks Cost: one nearest-point search among the vertices for each point and one pass over the points for
 * each vertex; 2,000 Gaussian points in 10 dimensions, most of them vertices, take a few seconds.
 * Gives way to the event loop about every 50 ms.
 * @throws A {@link DomainError} if a row is empty, ragged or holds anything but finite numbers; the
 *   message names row and column. An `Error` named `AbortError` if called off
 *
 * Source: More output-sensitive geometric algorithms, Proceedings of the 35th Symposium on
 * Foundations of Computer Science, 1994, doi:10.1109/SFCS.1994.365723.
 *
 * @example
 * ```ts
 * import { hullVertices } from 'hullgauge/data';
 * const points = [[0, 0], [1, 1], [4, 0], [4, 4], [2, 0], [0, 4], [4, 4]];
 * await hullVertices(points); // => [0, 2, 3, 5]
 * ```
 */
export async function hullVertices(
  points: Points,
  options: LongWorkOptions = {},
): Promise<number[]> {
  const matrix = checkPoints('hullVertices', points);
  checkOptions('hullVertices', options, ['onProgress', 'signal']);
  const pace = startPace('hullVertices', matrix.n, options);
  const { vertices } = await hullVerticesKernel(matrix, pace);
  pace.finish();
  return vertices;
}

/** The vertices, ascending, and how many points coincide with each. */
export interface VertexList {
  readonly vertices: number[];
  readonly copies: number[];
}

/** {@link hullVertices} without checks. */
export async function hullVerticesKernel(matrix: Matrix, pace: Pace): Promise<VertexList> {
  const { n, d } = matrix;
  const exact = allIntegers(matrix.rows);
  const { rows, allowed } = scaled(matrix, exact);
  const { firsts, copies } = distinctRows(rows, n, d);
  const search = new VertexSearch(rows, d, allowed, firsts, exact);
  const settledBefore = n - firsts.length;
  // Far points first: they are vertices, and the sooner those are known the fewer tests fail.
  const order = byDistance(rows, d, firsts);
  if (pace.spend(40 * n * d)) await pace.pause(settledBefore);
  for (let j = 0; j < d; j++) {
    search.seed(j);
    if (pace.spend(4 * n * d)) await pace.pause(settledBefore);
  }
  for (let k = 0; k < order.length; k++) {
    let work = search.settle(order[k] as number);
    while (work < 0) {
      if (pace.spend(-work)) await pace.pause(settledBefore + k);
      work = search.settle(order[k] as number);
    }
    if (pace.spend(work)) await pace.pause(settledBefore + k);
  }
  for (const doubtful of search.doubtful.slice()) {
    if (pace.spend(search.confirm(doubtful))) await pace.pause(n - 1);
  }
  const vertices = search.vertices().sort((a, b) => a - b);
  return { vertices, copies: vertices.map((index) => copies[index] as number) };
}

/** The columns scaled to about their ranges, around 0; columns that only carry rounding become 0. */
function scaled(matrix: Matrix, exact: boolean): { rows: Float64Array; allowed: Float64Array } {
  const { n, d } = matrix;
  const ranges = columnRanges(matrix);
  const tolerances = columnTolerances(ranges, DEFAULT_TOLERANCE, exact);
  const rows = new Float64Array(n * d);
  const allowed = new Float64Array(d);
  for (let j = 0; j < d; j++) {
    const low = ranges.min[j] as number;
    const range = (ranges.max[j] as number) - low;
    const tolerance = tolerances[j] as number;
    if (!(range > tolerance)) continue;
    const factor = 1 / powerOfTwoAbove(Math.max(range, tolerance / DEFAULT_TOLERANCE));
    const middle = low + range / 2;
    allowed[j] = tolerance * factor;
    for (let at = j; at < n * d; at += d)
      rows[at] = ((matrix.rows[at] as number) - middle) * factor;
  }
  return { rows, allowed };
}

/** The first index of each distinct row, and how many rows equal it. */
function distinctRows(
  rows: Float64Array,
  n: number,
  d: number,
): { firsts: number[]; copies: Int32Array } {
  const order = Array.from({ length: n }, (_, i) => i);
  order.sort((a, b) => compareRows(rows, d, a, b) || a - b);
  const copies = new Int32Array(n);
  const firsts: number[] = [];
  let first = -1;
  for (const i of order) {
    if (first < 0 || compareRows(rows, d, first, i) !== 0) {
      first = i;
      firsts.push(i);
    }
    copies[first] = (copies[first] as number) + 1;
  }
  return { firsts, copies };
}

/** Lexicographic order of two rows. */
function compareRows(rows: Float64Array, d: number, a: number, b: number): number {
  for (let j = 0; j < d; j++) {
    const difference = (rows[a * d + j] as number) - (rows[b * d + j] as number);
    if (difference !== 0) return difference;
  }
  return 0;
}

/** The points by distance from their mean, farthest first. */
function byDistance(rows: Float64Array, d: number, indices: readonly number[]): number[] {
  const mean = new Float64Array(d);
  for (const i of indices) {
    for (let j = 0; j < d; j++) {
      mean[j] = (mean[j] as number) + (rows[i * d + j] as number) / indices.length;
    }
  }
  const squares = new Map<number, number>();
  for (const i of indices) {
    let sum = 0;
    for (let j = 0; j < d; j++) sum += ((rows[i * d + j] as number) - (mean[j] as number)) ** 2;
    squares.set(i, sum);
  }
  return indices.slice().sort((a, b) => (squares.get(b) as number) - (squares.get(a) as number));
}

/** The working set and the two questions about a point: settled, confirmed. */
class VertexSearch {
  /** Vertices that were farthest in their direction together with others. */
  readonly doubtful: number[] = [];
  private readonly rows: Float64Array;
  private readonly d: number;
  private readonly allowed: Float64Array;
  private readonly firsts: readonly number[];
  /** Any proven separation counts, however narrow. */
  private readonly exact: boolean;
  private readonly ones: Float64Array;
  private readonly names: number[] = [];
  private readonly known = new Set<number>();
  /** The rows of the working set, and room for them shifted. */
  private set: Float64Array;
  private shifted: Float64Array;

  constructor(
    rows: Float64Array,
    d: number,
    allowed: Float64Array,
    firsts: readonly number[],
    exact: boolean,
  ) {
    this.exact = exact;
    this.rows = rows;
    this.d = d;
    this.allowed = allowed;
    this.firsts = firsts;
    this.ones = new Float64Array(d).fill(1);
    this.set = new Float64Array(64 * d);
    this.shifted = new Float64Array(64 * d);
  }

  vertices(): number[] {
    return this.names.slice();
  }

  /** The extremes of a column. */
  seed(column: number): void {
    const direction = new Float64Array(this.d);
    for (const sign of [1, -1]) {
      direction[column] = sign;
      this.addFarthest(direction);
    }
  }

  /**
   * One test of a point; returns the operations it took, negative when it found another vertex and
   * the point must be tested again.
   */
  settle(point: number): number {
    if (this.known.has(point)) return 1;
    const { d, names, set, allowed } = this;
    const matrix: Matrix = { rows: set, n: names.length, d };
    const q = this.row(point);
    const attempt = nearest(matrix, q, this.ones, this.shifted);
    const work = 8 * names.length * d + d * d * d;
    if (!(this.exact && attempt.proven) && reproduces(attempt, allowed)) return work;
    if (!attempt.proven) {
      // Too close to call: it joins and must stand the check against the final set.
      this.add(point, true);
      return work;
    }
    const away = attempt.found.normal.map((x) => -x);
    const added = this.addFarthest(away);
    if (added < 0) this.add(point, true);
    return added === point || added < 0 ? work : -work - this.firsts.length * d;
  }

  /** Drops a doubtful vertex that the other vertices hold; returns the operations it took. */
  confirm(point: number): number {
    const { d, names } = this;
    const at = names.indexOf(point);
    const last = names.length - 1;
    // The point goes to the end, out of the set that is tested.
    this.set.copyWithin(at * d, last * d, names.length * d);
    names[at] = names[last] as number;
    names.pop();
    const matrix: Matrix = { rows: this.set, n: last, d };
    const q = this.row(point);
    if (last > 0) {
      const attempt = nearest(matrix, q, this.ones, this.shifted);
      const tied = !this.exact && reproduces(attempt, this.allowed);
      if (!attempt.proven || tied) return 8 * last * d + d * d * d;
    }
    this.set.set(q, last * d);
    names.push(point);
    return 8 * last * d + d * d * d;
  }

  private row(point: number): Float64Array {
    return this.rows.subarray(point * this.d, (point + 1) * this.d);
  }

  private add(point: number, doubtful: boolean): void {
    const { d, names } = this;
    if ((names.length + 1) * d > this.set.length) {
      const larger = new Float64Array(2 * this.set.length);
      larger.set(this.set);
      this.set = larger;
      this.shifted = new Float64Array(larger.length);
    }
    this.set.set(this.row(point), names.length * d);
    names.push(point);
    this.known.add(point);
    if (doubtful) this.doubtful.push(point);
  }

  /** Adds the point farthest in a direction; returns it, or -1 when it was known. */
  private addFarthest(direction: Float64Array): number {
    const { rows, d, firsts } = this;
    const error = productError(d, Math.sqrt(d));
    let best = Number.NEGATIVE_INFINITY;
    const values = new Float64Array(firsts.length);
    firsts.forEach((index, k) => {
      let sum = 0;
      for (let j = 0, at = index * d; j < d; j++, at++) {
        sum += (rows[at] as number) * (direction[j] as number);
      }
      values[k] = sum;
      if (sum > best) best = sum;
    });
    let farthest = -1;
    let count = 0;
    // The distinct rows are in lexicographic order: the last of those that tie stays.
    firsts.forEach((index, k) => {
      if ((values[k] as number) < best - error) return;
      farthest = index;
      count++;
    });
    if (this.known.has(farthest)) return -1;
    this.add(farthest, count > 1);
    return farthest;
  }
}
