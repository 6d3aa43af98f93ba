/**
 * The numerical rank of a matrix: orthogonalisation with the largest remaining column first.
 *
 * Every column carries what it may be wrong by; what is left of a column after orthogonalisation counts
 * only above the errors that it has by then, its own and its share of those of the columns subtracted.
 */

/** A column counts as dependent when less than this share of its length is left. */
const DEPENDENT = 1e-10;

/**
 * Rank of the n x d matrix whose rows stand one after the other, after subtracting `centre` from
 * every row. Entries of column j may be wrong by `floor[j]`; a column with none above it counts as zero.
 */
export function matrixRank(
  rows: Float64Array,
  n: number,
  d: number,
  centre: Float64Array,
  floor: Float64Array,
): number {
  const columns: Column[] = [];
  for (let j = 0; j < d; j++) {
    const column = new Float64Array(n);
    for (let i = 0; i < n; i++) column[i] = (rows[i * d + j] as number) - (centre[j] as number);
    // The largest entry scales the column, so squares neither overflow nor vanish.
    const size = column.reduce((m, x) => Math.max(m, Math.abs(x)), 0);
    if (!(size > (floor[j] as number))) continue;
    scale(column, 1 / size);
    const rest = length(column);
    scale(column, 1 / rest);
    columns.push({ entries: column, error: (((floor[j] as number) / size) * Math.sqrt(n)) / rest });
  }
  let rank = 0;
  while (rank < Math.min(n, columns.length)) {
    let best = rank;
    let bestLength = 0;
    for (let c = rank; c < columns.length; c++) {
      const column = columns[c] as Column;
      const rest = length(column.entries);
      if (rest > bestLength && rest > column.error) {
        bestLength = rest;
        best = c;
      }
    }
    if (!(bestLength > DEPENDENT)) break;
    const pivot = columns[best] as Column;
    columns[best] = columns[rank] as Column;
    columns[rank] = pivot;
    // What is left of a column has lost digits: orthogonalise it again before it becomes a direction.
    for (let k = 0; k < rank; k++) subtractPart(pivot, columns[k] as Column);
    const rest = length(pivot.entries);
    if (!(rest > 0.5 * bestLength)) {
      columns.splice(rank, 1);
      continue;
    }
    scale(pivot.entries, 1 / rest);
    pivot.error /= rest;
    rank++;
    for (let c = rank; c < columns.length; c++) subtractPart(columns[c] as Column, pivot);
  }
  return rank;
}

/** A column, at first of length 1, and the length of its error; errors of columns add like independent ones. */
interface Column {
  readonly entries: Float64Array;
  error: number;
}

/** Subtracts from a column its part along a column of length 1. */
function subtractPart(column: Column, unit: Column): void {
  const v = column.entries;
  const u = unit.entries;
  let sum = 0;
  for (let i = 0; i < v.length; i++) sum += (u[i] as number) * (v[i] as number);
  for (let i = 0; i < v.length; i++) v[i] = (v[i] as number) - sum * (u[i] as number);
  const passed = sum * unit.error;
  column.error = Math.sqrt(column.error * column.error + passed * passed);
}

function scale(v: Float64Array, factor: number): void {
  for (let i = 0; i < v.length; i++) v[i] = (v[i] as number) * factor;
}

function length(v: Float64Array): number {
  let sum = 0;
  for (const x of v) sum += x * x;
  return Math.sqrt(sum);
}
