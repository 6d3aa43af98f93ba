/**
 * All differences of a point of one set and a point of another, as atoms that are never formed:
 * the nearest point of their hull is the shortest way from one hull to the other.
 */
import type { AtomSet } from './minimum-norm-point.ts';
import { lowestRow } from './row-atoms.ts';

/** The atoms u_i - v_j, with index i * (number of v) + j; both matrices have d columns. */
export function differenceAtoms(
  u: Float64Array,
  uCount: number,
  v: Float64Array,
  vCount: number,
  d: number,
): AtomSet {
  const opposite = new Float64Array(d);
  return {
    dimension: d,
    size: uCount * vCount,
    lowest: (direction) => {
      for (let j = 0; j < d; j++) opposite[j] = -(direction[j] as number);
      const i = lowestRow(u, uCount, d, direction);
      return i * vCount + lowestRow(v, vCount, d, opposite);
    },
    read: (index, out, start) => {
      const j = index % vCount;
      const i = (index - j) / vCount;
      for (let k = 0; k < d; k++) {
        out[start + k] = (u[i * d + k] as number) - (v[j * d + k] as number);
      }
    },
  };
}
