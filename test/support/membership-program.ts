/** Linear programs whose answers the library predicts. */
import type { LinearProgram } from './linear-program.ts';

/** Feasible if and only if the query is a convex combination of the points. */
export function hullProgram(
  points: readonly ArrayLike<number>[],
  query: ArrayLike<number>,
): LinearProgram {
  const n = points.length;
  const target = [...Array.from(query), 1];
  return {
    cost: new Float64Array(n),
    lower: new Float64Array(n),
    upper: new Float64Array(n).fill(1),
    rows: target.map((_, i) =>
      Float64Array.from(points, (p) => (i < query.length ? (p[i] as number) : 1)),
    ),
    low: target,
    high: target,
  };
}

/**
 * Maximises minus the l1 norm of x = u - v under A x = A x0, where x0 is 1 in its first `sparsity`
 * places; the columns of A are given. Recovery fails if and only if the optimum exceeds -sparsity.
 */
export function recoveryProgram(
  columns: readonly ArrayLike<number>[],
  sparsity: number,
): LinearProgram {
  const n = columns.length;
  const d = (columns[0] as ArrayLike<number>).length;
  const rows = Array.from({ length: d }, (_, i) => {
    const half = columns.map((column) => column[i] as number);
    return Float64Array.from([...half, ...half.map((x) => -x)]);
  });
  const right = rows.map((row) => row.slice(0, sparsity).reduce((s, x) => s + x, 0));
  return {
    cost: new Float64Array(2 * n).fill(-1),
    lower: new Float64Array(2 * n),
    upper: new Float64Array(2 * n).fill(Number.POSITIVE_INFINITY),
    rows,
    low: right,
    high: right,
  };
}
