/**
 * The user's rows as one typed array, with what each column's numbers can resolve.
 */
import { DomainError } from '../domain.ts';

/** Points as rows: arrays or typed arrays of numbers, all of one length. */
export type Points = readonly ArrayLike<number>[];

/** Rows one after the other in one array. */
export interface Matrix {
  readonly rows: Float64Array;
  /** Number of rows. */
  readonly n: number;
  /** Number of columns. */
  readonly d: number;
}

/** Largest size of a coordinate: squares and their sums stay far from overflow. */
const MAX_SIZE = 1e150;

/** Most columns where there are as many rows: the factorisations need their square in memory. */
const MAX_RANK = 4096;

/** Refuses anything but rows of one length that hold finite numbers; names the row and the column. */
export function checkPoints(fn: string, points: unknown): Matrix {
  if (!Array.isArray(points) || points.length === 0) {
    throw new DomainError(fn, 'points', 'an array of at least one row', points);
  }
  const n = points.length;
  const d = rowLength(points[0]);
  if (!(d > 0)) {
    throw new DomainError(fn, 'points[0]', 'an array of at least one number', points[0]);
  }
  if (Math.min(n, d) > MAX_RANK) {
    throw new DomainError(fn, 'points[0]', `an array of at most ${MAX_RANK} numbers`, points[0]);
  }
  const rows = new Float64Array(n * d);
  for (let i = 0; i < n; i++) copyRow(fn, i, points[i], d, rows, i * d, 'as points[0] has');
  return { rows, n, d };
}

/** Refuses anything but one row of d finite numbers. */
export function checkRow(
  fn: string,
  parameter: string,
  row: unknown,
  d: number,
  why = 'as the rows of points have',
): Float64Array {
  const copy = new Float64Array(d);
  copyRow(fn, parameter, row, d, copy, 0, why);
  return copy;
}

function copyRow(
  fn: string,
  place: number | string,
  row: unknown,
  d: number,
  out: Float64Array,
  start: number,
  why: string,
): void {
  if (rowLength(row) !== d) {
    const plural = d === 1 ? 'number' : 'numbers';
    const shown = ArrayBuffer.isView(row) ? Array.from(row as unknown as ArrayLike<number>) : row;
    throw new DomainError(fn, nameOf(place), `an array of ${d} ${plural}, ${why}`, shown);
  }
  if (ArrayBuffer.isView(row) && isNumbers(row as unknown as ArrayLike<unknown>)) {
    out.set(row as unknown as ArrayLike<number>, start);
    for (let j = 0; j < d; j++) checkSize(fn, place, j, out[start + j]);
    return;
  }
  const numbers = row as ArrayLike<unknown>;
  for (let j = 0; j < d; j++) {
    const x = numbers[j];
    checkSize(fn, place, j, x);
    out[start + j] = x as number;
  }
}

/** A row's name: its parameter, or its index among the points. */
function nameOf(place: number | string): string {
  return typeof place === 'string' ? place : `points[${place}]`;
}

/** Does a typed array hold numbers, not bigints? */
function isNumbers(list: ArrayLike<unknown>): boolean {
  return typeof list[0] === 'number';
}

function checkSize(fn: string, place: number | string, j: number, x: unknown): void {
  if (typeof x === 'number' && x <= MAX_SIZE && x >= -MAX_SIZE) return;
  const requirement =
    typeof x === 'number' && Number.isFinite(x)
      ? 'a number of size at most 1e150'
      : 'a finite number';
  throw new DomainError(fn, `${nameOf(place)}[${j}]`, requirement, x);
}

/** Length of an array of numbers, typed or not; NaN for anything else. */
function rowLength(row: unknown): number {
  if (Array.isArray(row)) return row.length;
  if (ArrayBuffer.isView(row) && !(row instanceof DataView)) {
    return (row as unknown as ArrayLike<number>).length;
  }
  return Number.NaN;
}

/** Lowest, highest and largest absolute number of each column. */
export interface ColumnRanges {
  readonly min: Float64Array;
  readonly max: Float64Array;
  readonly size: Float64Array;
}

/** The ranges of the columns. */
export function columnRanges({ rows, n, d }: Matrix): ColumnRanges {
  const min = new Float64Array(d).fill(Number.POSITIVE_INFINITY);
  const max = new Float64Array(d).fill(Number.NEGATIVE_INFINITY);
  const size = new Float64Array(d);
  for (let i = 0, at = 0; i < n; i++) {
    for (let j = 0; j < d; j++, at++) {
      const x = rows[at] as number;
      if (x < (min[j] as number)) min[j] = x;
      if (x > (max[j] as number)) max[j] = x;
    }
  }
  for (let j = 0; j < d; j++) {
    size[j] = Math.max(Math.abs(min[j] as number), Math.abs(max[j] as number));
  }
  return { min, max, size };
}

/** A point of the flat that the rows span: their mean, or the first row where only that is exact. */
export function centreOf({ rows, n, d }: Matrix, exact: boolean): Float64Array {
  if (exact) return rows.slice(0, d);
  const mean = new Float64Array(d);
  for (let i = 0, at = 0; i < n; i++) {
    for (let j = 0; j < d; j++, at++) mean[j] = (mean[j] as number) + (rows[at] as number) / n;
  }
  return mean;
}

/**
 * The difference that counts as none in each column: `tolerance` times its range, and 64 roundings of
 * its largest number, since data and means computed from them are no sharper than that; where all
 * numbers are integers, differences are, and the roundings are left out.
 */
export function columnTolerances(
  ranges: ColumnRanges,
  tolerance: number,
  exact: boolean,
): Float64Array {
  const roundings = exact ? 0 : 64 * Number.EPSILON;
  return ranges.size.map(
    (size, j) =>
      tolerance * ((ranges.max[j] as number) - (ranges.min[j] as number)) + roundings * size,
  );
}

/**
 * Are all numbers integers of at most 2^52 in size? Then differences are exact, and a separation that
 * rounding cannot feign is real, however narrow.
 */
export function allIntegers(numbers: Float64Array): boolean {
  for (const x of numbers) if (Math.floor(x) !== x || Math.abs(x) > 2 ** 52) return false;
  return true;
}

/** The smallest power of two from 2^-1000 on that is at least x: scaling by it is exact. */
export function powerOfTwoAbove(x: number): number {
  let power = 1;
  while (power < x) power *= 2;
  while (power / 2 >= x && power > 2 ** -1000) power /= 2;
  return power;
}

/**
 * The unit vector, in the units of the data, of a normal given for columns divided by `scales`, and
 * what its products must be multiplied with; columns with scale 0 take no part.
 */
export function unscaledNormal(
  normal: ArrayLike<number>,
  scales: Float64Array,
): { unit: number[]; factor: number } {
  const least = scales.reduce((m, s) => (s > 0 && s < m ? s : m), Number.POSITIVE_INFINITY);
  // Relative to the least scale no component exceeds 1.
  const components = Array.from(scales, (scale, j) =>
    scale > 0 ? (normal[j] as number) * (least / scale) : 0,
  );
  const length = Math.sqrt(components.reduce((sum, x) => sum + x * x, 0));
  return { unit: components.map((x) => x / length + 0), factor: least / length };
}
