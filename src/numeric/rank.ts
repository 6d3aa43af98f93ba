/**
 * The numerical rank of a matrix: orthogonalisation with the largest remaining column first.
 */

/** A column counts as dependent when less than this share of its length is left. */
const DEPENDENT = 1e-10;

/**
 * Rank of the n x d matrix whose rows stand one after the other, after subtracting `centre` from
 * every row. A column of length at most its `floor` counts as zero.
 */
export function matrixRank(
  rows: Float64Array,
  n: number,
  d: number,
  centre: Float64Array,
  floor: Float64Array,
): number {
  const columns: Float64Array[] = [];
  for (let j = 0; j < d; j++) {
    const column = new Float64Array(n);
    for (let i = 0; i < n; i++) column[i] = (rows[i * d + j] as number) - (centre[j] as number);
    // The largest entry scales the column, so squares neither overflow nor vanish.
    const size = column.reduce((m, x) => Math.max(m, Math.abs(x)), 0);
    if (!(size > (floor[j] as number))) continue;
    scale(column, 1 / size);
    scale(column, 1 / length(column));
    columns.push(column);
  }
  let rank = 0;
  while (rank < Math.min(n, columns.length)) {
    let best = rank;
    let bestLength = 0;
    for (let c = rank; c < columns.length; c++) {
      const rest = length(columns[c] as Float64Array);
      if (rest > bestLength) {
        bestLength = rest;
        best = c;
      }
    }
    if (!(bestLength > DEPENDENT)) break;
    const pivot = columns[best] as Float64Array;
    columns[best] = columns[rank] as Float64Array;
    columns[rank] = pivot;
    // What is left of a column has lost digits: orthogonalise it again before it becomes a direction.
    for (let k = 0; k < rank; k++) subtractPart(pivot, columns[k] as Float64Array);
    const rest = length(pivot);
    if (!(rest > 0.5 * bestLength)) {
      columns.splice(rank, 1);
      continue;
    }
    scale(pivot, 1 / rest);
    rank++;
    for (let c = rank; c < columns.length; c++) subtractPart(columns[c] as Float64Array, pivot);
  }
  return rank;
}

/** Subtracts from v its part along the unit vector u. */
function subtractPart(v: Float64Array, u: Float64Array): void {
  let sum = 0;
  for (let i = 0; i < v.length; i++) sum += (u[i] as number) * (v[i] as number);
  for (let i = 0; i < v.length; i++) v[i] = (v[i] as number) - sum * (u[i] as number);
}

function scale(v: Float64Array, factor: number): void {
  for (let i = 0; i < v.length; i++) v[i] = (v[i] as number) * factor;
}

function length(v: Float64Array): number {
  let sum = 0;
  for (const x of v) sum += x * x;
  return Math.sqrt(sum);
}
