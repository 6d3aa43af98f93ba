/**
 * Linear algebra on a handful of short vectors, as plain arrays.
 */

/** Parts shorter than this share of a unit vector count as dependent. */
export const DEPENDENT = 1e-10;

/** A vector; all vectors of one call have the same length. */
export type Vector = readonly number[];

export function dot(a: Vector, b: Vector): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += (a[i] as number) * (b[i] as number);
  return sum;
}

/** The vector scaled to unit length. */
export function unit(a: Vector): number[] {
  let largest = 0;
  for (const x of a) largest = Math.max(largest, Math.abs(x));
  if (largest === 0) return [...a];
  const scaled = a.map((x) => x / largest);
  const norm = Math.sqrt(dot(scaled, scaled));
  return scaled.map((x) => x / norm);
}

/** Determinant of the columns i, j, k of three rows. */
function minor(a: Vector, b: Vector, c: Vector, i: number, j: number, k: number): number {
  const [a0, a1, a2] = [a[i] as number, a[j] as number, a[k] as number];
  const [b0, b1, b2] = [b[i] as number, b[j] as number, b[k] as number];
  const [c0, c1, c2] = [c[i] as number, c[j] as number, c[k] as number];
  return a0 * (b1 * c2 - b2 * c1) - a1 * (b0 * c2 - b2 * c0) + a2 * (b0 * c1 - b1 * c0);
}

/**
 * The vector orthogonal to n - 1 vectors of length n <= 4, as long as the volume that they span.
 */
export function orthogonal(rows: readonly Vector[], n: number): number[] {
  const [a = [], b = [], c = []] = rows;
  if (n === 1) return [1];
  if (n === 2) return [a[1] as number, -(a[0] as number)];
  if (n === 3) {
    const axis = (i: number, j: number): number =>
      (a[i] as number) * (b[j] as number) - (a[j] as number) * (b[i] as number);
    return [axis(1, 2), axis(2, 0), axis(0, 1)];
  }
  return [
    minor(a, b, c, 1, 2, 3),
    -minor(a, b, c, 0, 2, 3),
    minor(a, b, c, 0, 1, 3),
    -minor(a, b, c, 0, 1, 2),
  ];
}

/** An orthonormal basis of the span, by pivoted Gram-Schmidt; directions shorter than `tolerance` are dropped. */
export function orthonormalBasis(vectors: readonly Vector[], tolerance: number): number[][] {
  const basis: number[][] = [];
  let rest: number[][] = vectors.map((vector) => [...vector]);
  for (;;) {
    let longest: number[] | undefined;
    let square = tolerance * tolerance;
    for (const vector of rest) {
      const size = dot(vector, vector);
      if (size > square) {
        square = size;
        longest = vector;
      }
    }
    if (longest === undefined) return basis;
    // orthogonalised twice: the first pass may cancel
    const direction = unit(removeAll(longest, basis));
    basis.push(direction);
    rest = rest.map((vector) => removeAll(vector, [direction]));
  }
}

/** What is left of a vector outside the span of an orthonormal basis. */
export function removeAll(vector: Vector, basis: readonly Vector[]): number[] {
  let result = [...vector];
  for (const direction of basis) {
    const product = dot(result, direction);
    result = result.map((x, i) => x - product * (direction[i] as number));
  }
  return result;
}

/** Coordinates in an orthonormal basis. */
export function coordinates(vector: Vector, basis: readonly Vector[]): number[] {
  return basis.map((direction) => dot(vector, direction));
}
