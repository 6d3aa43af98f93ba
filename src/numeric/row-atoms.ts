/**
 * The rows of a matrix as atoms, with a working set that grows where the search looks.
 *
 * A pass over all rows costs n d operations and reads the whole matrix from memory. The search needs
 * such a pass only to be sure; until then a sample of the rows, kept together, and the rows that
 * earlier passes found lowest serve as well.
 */
import type { AtomSet } from './minimum-norm-point.ts';

/** The first n rows of a matrix with d columns, as atoms. */
export function rowAtoms(rows: Float64Array, n: number, d: number): AtomSet {
  const read = (index: number, out: Float64Array, start: number): void => {
    for (let j = 0; j < d; j++) out[start + j] = rows[index * d + j] as number;
  };
  const sample = 32 + 12 * d;
  if (n < 3 * sample) {
    return { dimension: d, size: n, lowest: (direction) => lowestRow(rows, n, d, direction), read };
  }
  const batch = 16 + d;
  const capacity = sample + 20 * batch;
  const near = new Float64Array(capacity * d);
  const names = new Float64Array(capacity);
  const values = new Float64Array(n);
  let count = 0;
  const add = (index: number): void => {
    if (count === capacity) return;
    near.set(rows.subarray(index * d, (index + 1) * d), count * d);
    names[count++] = index;
  };
  for (let k = 0; k < sample; k++) add(Math.floor((k * n) / sample));
  return {
    dimension: d,
    size: n,
    read,
    lowestAtHand: (direction) => names[lowestRow(near, count, d, direction)] as number,
    lowest: (direction, level) => {
      const lowest = lowestRow(rows, n, d, direction, values);
      // Those in the lower half of what matters join, up to a batch.
      const bound = 0.5 * ((values[lowest] as number) + level);
      add(lowest);
      for (let i = 0, left = batch; i < n && left > 0; i++) {
        if ((values[i] as number) < bound && i !== lowest) {
          add(i);
          left--;
        }
      }
      return lowest;
    },
  };
}

/** Index of the row with the smallest product with `direction`; the products go to `values`. */
export function lowestRow(
  rows: Float64Array,
  n: number,
  d: number,
  direction: Float64Array,
  values?: Float64Array,
): number {
  let best = 0;
  let bestValue = Number.POSITIVE_INFINITY;
  const end = d - (d % 4);
  for (let i = 0, at = 0; i < n; i++, at += d) {
    // Four sums run side by side: one sum would wait for each addition.
    let s0 = 0;
    let s1 = 0;
    let s2 = 0;
    let s3 = 0;
    let j = 0;
    for (; j < end; j += 4) {
      s0 += (rows[at + j] as number) * (direction[j] as number);
      s1 += (rows[at + j + 1] as number) * (direction[j + 1] as number);
      s2 += (rows[at + j + 2] as number) * (direction[j + 2] as number);
      s3 += (rows[at + j + 3] as number) * (direction[j + 3] as number);
    }
    for (; j < d; j++) s0 += (rows[at + j] as number) * (direction[j] as number);
    const value = s0 + s1 + (s2 + s3);
    if (values !== undefined) values[i] = value;
    if (value < bestValue) {
      bestValue = value;
      best = i;
    }
  }
  return best;
}
