import { describe, expect, it } from 'vitest';
import { differenceAtoms } from '../../src/numeric/difference-atoms.ts';
import { type MinimumNormPoint, minimumNormPoint } from '../../src/numeric/minimum-norm-point.ts';
import { randomStream } from '../../src/numeric/random.ts';
import { matrixRank } from '../../src/numeric/rank.ts';
import { rowAtoms } from '../../src/numeric/row-atoms.ts';

/** Random rows shifted by `shift` in the first coordinate, at most about 1 in size. */
function rowsOf(seed: number, n: number, d: number, shift: number): Float64Array {
  const { normal } = randomStream(seed);
  return Float64Array.from(
    { length: n * d },
    (_, at) => (normal() + (at % d === 0 ? shift : 0)) / 8,
  );
}

function faultOf(rows: Float64Array, d: number, found: MinimumNormPoint): string | null {
  const n = rows.length / d;
  const total = found.weights.reduce((s, w) => s + w, 0);
  if (Math.abs(total - 1) > 1e-14 || found.weights.some((w) => !(w > 0))) return 'weights';
  const point = Array.from({ length: d }, (_, j) =>
    found.atoms.reduce(
      (s, atom, i) => s + (found.weights[i] as number) * (rows[atom * d + j] as number),
      0,
    ),
  );
  if (point.some((x, j) => Math.abs(x - (found.point[j] as number)) > 1e-15)) return 'point';
  const upper = Math.sqrt(point.reduce((s, x) => s + x * x, 0));
  if (upper < 2e-15) return null;
  let lowest = Number.POSITIVE_INFINITY;
  for (let i = 0; i < n; i++) {
    let value = 0;
    for (let j = 0; j < d; j++) value += (rows[i * d + j] as number) * (found.normal[j] as number);
    lowest = Math.min(lowest, value);
  }
  return upper - lowest < 3e-14 ? null : `gap ${upper - lowest}`;
}

describe('minimumNormPoint', () => {
  it('meets its own lower bound, whatever the shape', () => {
    for (let seed = 0; seed < 300; seed++) {
      const { uniform } = randomStream(seed);
      const n = 1 + Math.floor(400 * uniform() ** 2);
      const d = 1 + Math.floor(20 * uniform());
      const rows = rowsOf(seed, n, d, 4 * uniform());
      const found = minimumNormPoint(rowAtoms(rows, n, d), 0);
      expect([seed, faultOf(rows, d, found)]).toEqual([seed, null]);
    }
  });

  it('gives the same point through the working set and without it', () => {
    const [n, d] = [4000, 6];
    for (const shift of [0, 3, 6]) {
      const rows = rowsOf(1, n, d, shift);
      const { lowestAtHand, ...plain } = rowAtoms(rows, n, d);
      expect(lowestAtHand).toBeDefined();
      const fast = minimumNormPoint(rowAtoms(rows, n, d), 0);
      const slow = minimumNormPoint(plain, 0);
      expect(Math.abs(fast.upper - slow.upper)).toBeLessThan(2e-15);
    }
  });

  it('finds the shortest way between two sets without forming their differences', () => {
    for (let seed = 0; seed < 60; seed++) {
      const { uniform } = randomStream(100 + seed);
      const [m, k, d] = [
        1 + Math.floor(12 * uniform()),
        1 + Math.floor(12 * uniform()),
        1 + Math.floor(5 * uniform()),
      ];
      const u = rowsOf(seed, m, d, 5 * uniform());
      const v = rowsOf(seed + 1000, k, d, 0);
      const differences = new Float64Array(m * k * d);
      for (let i = 0; i < m * k; i++) {
        for (let j = 0; j < d; j++) {
          differences[i * d + j] =
            (u[Math.floor(i / k) * d + j] as number) - (v[(i % k) * d + j] as number);
        }
      }
      const implicit = minimumNormPoint(differenceAtoms(u, m, v, k, d), 0);
      const explicit = minimumNormPoint(rowAtoms(differences, m * k, d), 0);
      expect(Math.abs(implicit.upper - explicit.upper)).toBeLessThan(5e-15);
    }
  });

  it('resolves distances down to rounding on a badly conditioned face', () => {
    // Points almost on a line, the hull passing the origin at a known tiny distance.
    for (const gap of [1e-3, 1e-6, 1e-9, 1e-12]) {
      const rows = Float64Array.from([-1, gap, 1, gap, -0.5, gap, 0.5, gap, 0.1, gap * 2]);
      const found = minimumNormPoint(rowAtoms(rows, 5, 2), 4);
      expect(Math.abs(found.upper - gap)).toBeLessThan(2e-16);
      expect(Math.abs(found.lower - gap)).toBeLessThan(2e-16);
    }
  });
});

describe('matrixRank', () => {
  it('counts independent columns, whatever their units', () => {
    const { normal } = randomStream(4);
    for (const [rank, d] of [
      [1, 1],
      [2, 5],
      [7, 7],
      [4, 12],
    ] as const) {
      const n = 40;
      const base = Array.from({ length: n }, () => Array.from({ length: rank }, normal));
      const mix = Array.from({ length: d }, (_, j) =>
        Array.from({ length: rank }, (_, r) => (j < rank ? (j === r ? 1 : 0) : normal())),
      );
      const rows = new Float64Array(n * d);
      base.forEach((row, i) => {
        mix.forEach((m, j) => {
          rows[i * d + j] =
            m.reduce((s, x, r) => s + x * (row[r] as number), 0) * 10 ** (5 * (j % 3));
        });
      });
      const zero = new Float64Array(d);
      expect(matrixRank(rows, n, d, zero, zero)).toBe(rank);
    }
    expect(matrixRank(new Float64Array(12), 4, 3, new Float64Array(3), new Float64Array(3))).toBe(
      0,
    );
    // Three rows have rank 3 at most.
    const few = Float64Array.from({ length: 30 }, normal);
    expect(matrixRank(few, 3, 10, new Float64Array(10), new Float64Array(10))).toBe(3);
  });
});
