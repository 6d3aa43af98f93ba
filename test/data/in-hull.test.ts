import process from 'node:process';
import fc from 'fast-check';
import { type DomainError, uniformBall } from 'hullgauge';
import { inHull, sampler } from 'hullgauge/data';
import { beforeAll, describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';
import { type LinearSolver, loadLinearSolver } from '../support/linear-program.ts';
import { faultOf, hullCase, makeCloud } from './hull-cases.ts';

// Ten of each cloud and query; the long version runs with HULLGAUGE_CASES=20000.
const CASES = Number(process.env['HULLGAUGE_CASES'] ?? 1080);

const SQUARE = [
  [0, 0],
  [4, 0],
  [4, 4],
  [0, 4],
];

describe('inHull', () => {
  it('is right, with both certificates, on generated cases of every kind', () => {
    const faults: string[] = [];
    for (let index = 0; index < CASES; index++) {
      const question = hullCase(1, index);
      const fault = faultOf(question, inHull(question.points, question.q));
      if (fault !== null) faults.push(`${index} ${question.cloud}, ${question.query}: ${fault}`);
    }
    expect(faults).toEqual([]);
  });

  describe('against linear programming', () => {
    let solve: LinearSolver;
    beforeAll(async () => {
      solve = await loadLinearSolver();
    });

    /** Largest t with c . (p - q) >= t for all points and some c in the unit cube. */
    const margin = (points: readonly Float64Array[], q: Float64Array): number => {
      const d = q.length;
      const { objective } = solve({
        cost: [...new Float64Array(d), 1],
        lower: new Float64Array(d + 1).fill(-1e3).fill(-1, 0, d),
        upper: new Float64Array(d + 1).fill(1e3).fill(1, 0, d),
        rows: points.map((p) => [...p.map((x, j) => x - (q[j] as number)), -1]),
        low: new Float64Array(points.length),
        high: new Float64Array(points.length).fill(Number.POSITIVE_INFINITY),
      });
      return objective;
    };

    it.each(['grid', 'coarse grid', 'gaussian', 'flat face', 'duplicates'])(
      'agrees on clouds of the kind %s',
      (cloud) => {
        let inside = 0;
        for (let index = 0; index < 100; index++) {
          const stream = randomStream(900 + index);
          const n = 1 + Math.floor(60 * stream.uniform());
          const d = 1 + Math.floor(6 * stream.uniform());
          const points = makeCloud(stream, cloud, n, d);
          // Half steps on grids: queries on vertices, edges, faces and inside.
          const share = cloud.endsWith('grid') ? 0.5 : 0.4;
          const q = (makeCloud(stream, cloud, 1, d)[0] as Float64Array).map((x) =>
            stream.uniform() < 0.5 ? x : x * share,
          );
          const expected = margin(points, q) > 1e-6 ? 'outside' : 'inside';
          if (expected === 'inside') inside++;
          expect([index, inHull(points, q).position]).toEqual([index, expected]);
        }
        // Both answers must be among the cases, or the comparison says little.
        expect(inside).toBeGreaterThan(10);
        expect(inside).toBeLessThan(95);
      },
    );
  });

  it('gives the exact distance in simple figures', () => {
    expect(inHull(SQUARE, [7, 8]).distance).toBe(5);
    expect(inHull(SQUARE, [2, -3]).distance).toBe(3);
    expect(inHull(SQUARE, [2, 4]).position).toBe('inside');
    expect(inHull([[1, 2, 2]], [0, 0, 0]).distance).toBe(3);
    expect(inHull([[1, 2, 2]], [0, 0, 0]).separator?.normal.map((x) => x * 3)).toEqual([
      expect.closeTo(-1, 14),
      expect.closeTo(-2, 14),
      expect.closeTo(-2, 14),
    ]);
    expect(inHull([[3]], [3])).toEqual({
      position: 'inside',
      distance: 0,
      weights: [{ index: 0, weight: 1 }],
      separator: null,
    });
  });

  it('finds the distance from the cross-polytope, known in closed form', () => {
    for (const d of [2, 5, 17, 40]) {
      const points = Array.from({ length: 2 * d }, (_, i) =>
        Array.from({ length: d }, (_, j) => (i >> 1 === j ? (i % 2 === 0 ? 1 : -1) : 0)),
      );
      const q = Array.from({ length: d }, () => 1);
      const { distance, weights } = inHull(points, q);
      expect(Math.abs(distance / ((d - 1) / Math.sqrt(d)) - 1)).toBeLessThan(1e-14);
      expect(weights).toHaveLength(d);
      const q2 = q.map(() => 1 / d);
      expect(inHull(points, q2).position).toBe('inside');
      const q3 = q.map(() => (1 + 1e-10) / d);
      expect(inHull(points, q3).position).toBe('outside');
    }
  });

  it('tells how far beyond a face a query lies down to its tolerance', () => {
    const cube = Array.from({ length: 64 }, (_, i) =>
      Array.from({ length: 6 }, (_, j) => (i >> j) & 1),
    );
    for (const gap of [1, 1e-3, 1e-6, 1e-9, 1e-11, 4e-12]) {
      const answer = inHull(cube, [0.3, 0.4, 0.5, 0.6, 0.7, 1 + gap]);
      expect(answer.position).toBe('outside');
      expect(Math.abs(answer.distance - gap)).toBeLessThan(1e-15);
    }
    expect(inHull(cube, [0.3, 0.4, 0.5, 0.6, 0.7, 1 + 5e-13]).position).toBe('inside');
    expect(inHull(cube, [0.5, 0.5, 0.5, 0.5, 0.5, 1.001], { tolerance: 0.01 }).position).toBe(
      'inside',
    );
    expect(inHull(cube, [0.5, 0.5, 0.5, 0.5, 0.5, 1.02], { tolerance: 0.01 }).position).toBe(
      'outside',
    );
  });

  it('is exact on lattice points: one lattice step beyond an edge is outside', () => {
    // On the line through two lattice points with coprime differences (u, v), the nearest lattice
    // points off the line have cross product 1: they lie 1/|(u, v)| away, here down to 2e-7 in 8e6.
    let edges = 0;
    for (let seed = 0; seed < 60; seed++) {
      const { uniform } = randomStream(seed);
      const size = 10 ** (2 + 4.6 * uniform());
      const lattice = (): number => Math.round((2 * uniform() - 1) * size);
      const points = Array.from({ length: 8 }, () => [lattice(), lattice()] as const);
      const hull = hullOf(points);
      hull.forEach((a, i) => {
        const b = hull[(i + 1) % hull.length] as readonly [number, number];
        const [u, v] = [b[0] - a[0], b[1] - a[1]];
        const step = latticeStep(u, v);
        if (step === null) return;
        edges++;
        expect(inHull(points, [b[0] - step[0], b[1] - step[1]]).position).toBe('outside');
        const near = [a[0] + step[0], a[1] + step[1]] as const;
        const inside = hull.every(
          (c, k) => cross(c, hull[(k + 1) % hull.length] as typeof c, near) >= 0n,
        );
        if (inside) expect(inHull(points, near).position).toBe('inside');
      });
    }
    expect(edges).toBeGreaterThan(100);
  });

  it('does not depend on the units of the columns', () => {
    const draw = sampler(uniformBall(), { d: 4, seed: 5 });
    const points = Array.from({ length: 60 }, draw);
    for (const length of [0.3, 0.95, 1.05]) {
      const q = draw();
      const size = Math.sqrt(q.reduce((s, x) => s + x * x, 0));
      const query = q.map((x) => (x / size) * length);
      const expected = inHull(points, query).position;
      for (const units of [
        [1e-12, 1, 1, 1e12],
        [1e100, 1e-100, 1, 1],
        [2 ** 60, 1, 1, 2 ** -60],
      ]) {
        const scaled = points.map((row) => row.map((x, j) => x * (units[j] as number)));
        const scaledQuery = query.map((x, j) => x * (units[j] as number));
        expect(inHull(scaled, scaledQuery).position).toBe(expected);
      }
    }
  });

  it('has a verdict that no invertible affine map changes', () => {
    const coordinate = fc.integer({ min: -6, max: 6 });
    const row = fc.array(coordinate, { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(
        fc.array(row, { minLength: 1, maxLength: 25 }),
        row,
        fc.array(row, { minLength: 3, maxLength: 3 }),
        row,
        (points, query, map, shift) => {
          // Unit lower triangular times unit upper triangular: determinant 1, integers throughout.
          const [a, b, c] = map as [number[], number[], number[]];
          const apply = (x: readonly number[]): number[] => {
            const u = [
              (x[0] as number) +
                (a[0] as number) * (x[1] as number) +
                (a[1] as number) * (x[2] as number),
              (x[1] as number) + (b[0] as number) * (x[2] as number),
              x[2] as number,
            ] as const;
            return [
              u[0],
              u[1] + (c[0] as number) * u[0],
              u[2] + (c[1] as number) * u[0] + (c[2] as number) * u[1],
            ].map((y, j) => y + (shift[j] as number));
          };
          const before = inHull(points, query).position;
          expect(inHull(points.map(apply), apply(query)).position).toBe(before);
          expect(before).not.toBe('undecided');
        },
      ),
      { numRuns: 400, seed: 42 },
    );
  });

  it('has convex combinations inside and far points outside', () => {
    const finite = fc.double({ min: -1e3, max: 1e3, noNaN: true });
    const cloud = fc
      .integer({ min: 1, max: 6 })
      .chain((d) =>
        fc.array(fc.array(finite, { minLength: d, maxLength: d }), { minLength: 1, maxLength: 20 }),
      );
    fc.assert(
      fc.property(
        cloud,
        fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 20, maxLength: 20 }),
        (points, raw) => {
          const shares = points.map((_, i) => (raw[i] as number) + 1e-3);
          const total = shares.reduce((s, x) => s + x, 0);
          const d = (points[0] as number[]).length;
          const mean = Array.from({ length: d }, (_, j) =>
            points.reduce(
              (s, row, i) => s + ((shares[i] as number) / total) * (row[j] as number),
              0,
            ),
          );
          const answer = inHull(points, mean);
          expect(answer.position).toBe('inside');
          expect(
            Math.abs(answer.weights.reduce((s, { weight }) => s + weight, 0) - 1),
          ).toBeLessThan(1e-14);
          const far = mean.map((_, j) => (j === 0 ? 3e3 : 0));
          const away = inHull(points, far);
          expect(away.position).toBe('outside');
          expect(away.distance).toBeGreaterThan(1999);
        },
      ),
      { numRuns: 300, seed: 7 },
    );
  });

  it('takes rows as typed arrays and leaves them alone', () => {
    const points = SQUARE.map((row) => Float32Array.from(row));
    const before = points.map((row) => [...row]);
    expect(inHull(points, new Uint8Array([1, 1])).position).toBe('inside');
    expect(points.map((row) => [...row])).toEqual(before);
  });

  it('refuses bad rows with row and column', () => {
    const refuse = (call: () => unknown): string => {
      try {
        call();
      } catch (error) {
        return `${(error as DomainError).code} ${(error as DomainError).parameter}: ${(error as Error).message}`;
      }
      return 'accepted';
    };
    const call = (points: unknown, query: unknown, options?: unknown): string =>
      refuse(() => inHull(points as number[][], query as number[], options as object));
    expect(call([], [1])).toContain(
      'HULLGAUGE_DOMAIN points: inHull: points must be an array of at least one row',
    );
    expect(call('rows', [1])).toContain('points: inHull: points must be an array');
    expect(call([[]], [])).toContain(
      'points[0]: inHull: points[0] must be an array of at least one number',
    );
    expect(call([[1, 2], [1]], [1, 2])).toContain(
      'points[1]: inHull: points[1] must be an array of 2 numbers, as points[0] has, got an array of length 1',
    );
    expect(
      call(
        [
          [1, 2],
          [1, Number.NaN],
        ],
        [1, 2],
      ),
    ).toContain('points[1][1]: inHull: points[1][1] must be a finite number, got NaN');
    expect(
      call(
        [
          [1, 2],
          ['3', 1],
        ],
        [1, 2],
      ),
    ).toContain('points[1][0]: inHull: points[1][0] must be a finite number, got "3"');
    expect(call([[1, Number.POSITIVE_INFINITY]], [1, 2])).toContain('points[0][1]');
    expect(call([[1, 1e160]], [1, 2])).toContain(
      'points[0][1]: inHull: points[0][1] must be a number of size at most 1e150',
    );
    expect(call([[1, 2], null], [1, 2])).toContain('points[1]');
    expect(call(SQUARE, [1])).toContain('query: inHull: query must be an array of 2 numbers');
    expect(call(SQUARE, [1, undefined])).toContain('query[1]');
    expect(call(SQUARE, [1, 1], { tolerance: 0 })).toContain('tolerance');
    expect(call(SQUARE, [1, 1], { tolerence: 1e-9 })).toContain('tolerence');
    expect(call(SQUARE, [1, 1], { tolerance: 1e-15 })).toBe('accepted');
  });
});

type LatticePoint = readonly [number, number];

/** Twice the area of a triangle, exactly; positive when it turns left. */
function cross(o: LatticePoint, a: LatticePoint, b: LatticePoint): bigint {
  return BigInt(a[0] - o[0]) * BigInt(b[1] - o[1]) - BigInt(a[1] - o[1]) * BigInt(b[0] - o[0]);
}

/** The corners of the hull of lattice points, counter-clockwise. */
function hullOf(points: readonly LatticePoint[]): LatticePoint[] {
  const sorted = points.slice().sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const chain = (row: readonly LatticePoint[]): LatticePoint[] => {
    const out: LatticePoint[] = [];
    for (const p of row) {
      while (
        out.length > 1 &&
        cross(out[out.length - 2] as LatticePoint, out[out.length - 1] as LatticePoint, p) <= 0n
      ) {
        out.pop();
      }
      out.push(p);
    }
    return out.slice(0, -1);
  };
  return [...chain(sorted), ...chain(sorted.slice().reverse())];
}

/** (x, y) with u y - v x = 1 between the ends of (u, v), or null where u and v share a factor. */
function latticeStep(u: number, v: number): LatticePoint | null {
  let [a, b, x, y, p, q] = [u, -v, 1, 0, 0, 1];
  while (b !== 0) {
    const t = Math.trunc(a / b);
    [a, b, x, y, p, q] = [b, a - t * b, p, q, x - t * p, y - t * q];
  }
  if (Math.abs(a) !== 1) return null;
  // u (a x) - v (a y) = 1.
  let step: LatticePoint = [a * y, a * x];
  const t = Math.floor((step[0] * u + step[1] * v) / (u * u + v * v));
  step = [step[0] - t * u, step[1] - t * v];
  return cross([0, 0], [u, v], step) === 1n ? step : null;
}
