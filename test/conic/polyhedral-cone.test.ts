import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  approxPolyhedralCone,
  type Cone,
  orthant,
  polarCone,
  polyhedralCone,
  productCone,
  subspace,
  weylChamber,
} from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';

const close = (a: number, b: number, tolerance: number): void =>
  expect(Math.abs(a - b)).toBeLessThanOrEqual(tolerance);
const sameVolumes = (a: Cone, b: Cone, tolerance: number): void => {
  expect([a.ambient, a.dimension, a.lineality]).toEqual([b.ambient, b.dimension, b.lineality]);
  a.intrinsicVolumes.forEach((v, k) => {
    close(v, b.intrinsicVolumes[k] as number, tolerance);
  });
};
const cube = [-1, 1].flatMap((x) => [-1, 1].flatMap((y) => [-1, 1].map((z) => [x, y, z, 1])));
const coordinate = fc.integer({ min: -9, max: 9 });
const octahedron = [0, 1, 2].flatMap((i) =>
  [-1, 1].map((sign) => [0, 1, 2, 3].map((j) => (j === 3 ? 1 : j === i ? sign : 0))),
);

describe('polyhedralCone', () => {
  it('reproduces cones of known volumes', () => {
    const unit = (n: number): number[][] =>
      Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => (i === j ? 1 : 0)));
    for (const n of [1, 2, 3, 4]) sameVolumes(polyhedralCone(unit(n)), orthant(n), 1e-15);
    const steps = (n: number): number[][] =>
      Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => (j <= i ? 1 : 0)));
    for (const n of [2, 3, 4]) {
      sameVolumes(polyhedralCone(steps(n)), weylChamber('B', n), 3e-15);
      // the chamber of type A has the line of equal coordinates on both sides
      const line = new Array(n).fill(1);
      const chamber = [...steps(n).slice(0, -1), line, line.map(() => -1)];
      sameVolumes(polyhedralCone(chamber), weylChamber('A', n), 3e-15);
    }
  });

  it('measures regular cones', () => {
    // pointed halves of the cube and the octahedron, polar to each other; 24-cell: 1/24 and 1/8
    const c = polyhedralCone(cube);
    const o = polyhedralCone(octahedron);
    close(o.intrinsicVolumes[4] as number, 1 / 24, 1e-15);
    close(c.intrinsicVolumes[4] as number, 1 / 8, 1e-15);
    sameVolumes(polarCone(c), o, 2e-15);
  });

  it('is recognised in a larger space, in any position', () => {
    const inner = [
      [1, 0, 0],
      [0, 1, 0.2],
      [0.3, 0.3, 1],
    ];
    // an isometry into R^6
    const s = Math.SQRT1_2;
    const frame = [
      [s, 0, s, 0, 0, 0],
      [0, s, 0, 0, s, 0],
      [0.5, 0.5, -0.5, 0, -0.5, 0],
    ];
    const outer = inner.map((g) =>
      [0, 1, 2, 3, 4, 5].map((j) =>
        g.reduce((t, x, i) => t + x * ((frame[i] as number[])[j] as number), 0),
      ),
    );
    const own = polyhedralCone(inner);
    const embedded = polyhedralCone(outer);
    expect([embedded.ambient, embedded.dimension]).toEqual([6, 3]);
    own.intrinsicVolumes.forEach((v, k) => {
      close(embedded.intrinsicVolumes[k] as number, v, 2e-15);
    });
  });

  it('ignores scale, order, repetition, zeros and inner generators', () => {
    const basic = polyhedralCone([
      [1, 0, 0, 1],
      [0, 1, 0, 1],
      [0, 0, 1, 1],
      [0, 0, 0, 1],
    ]);
    const messy = polyhedralCone([
      [0, 0, 0, 7],
      [1e200, 0, 0, 1e200],
      [0, 0, 0, 0],
      [0, 0, 1e-200, 1e-200],
      [0, 1, 0, 1],
      [1, 1, 1, 4],
      [2, 0, 0, 2],
    ]);
    sameVolumes(messy, basic, 1e-15);
  });

  it('finds subspaces', () => {
    const isSubspace = (rows: number[][], dimension: number): void =>
      sameVolumes(
        polyhedralCone(rows),
        subspace({ dimension, ambient: (rows[0] as number[]).length }),
        0,
      );
    isSubspace([[0, 0]], 0);
    isSubspace(
      [
        [1, 2],
        [-2, -4],
      ],
      1,
    );
    isSubspace(
      [
        [1, 0],
        [-1, 1],
        [-1, -1],
      ],
      2,
    );
    isSubspace(
      [
        [1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 0, 1, 0],
        [0, 0, 0, 1],
        [-1, -1, -1, -1],
      ],
      4,
    );
    isSubspace(
      [
        [1, 1, 0],
        [-1, 0, 0],
        [0, -1, 0],
      ],
      2,
    );
    const wedge = polyhedralCone([
      [1, 0, 0],
      [-1, 0, 0],
      [0, 1, 0],
      [0, 1, 1],
    ]);
    expect(wedge.lineality).toBe(1);
    close(wedge.intrinsicVolumes[3] as number, 1 / 8, 1e-15);
  });

  it('of planes is a product of angles', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 3.1, noNaN: true }),
        fc.double({ min: 0.01, max: 3.1, noNaN: true }),
        (a, b) => {
          const plane = (angle: number): Cone =>
            polyhedralCone([
              [1, 0],
              [Math.cos(angle), Math.sin(angle)],
            ]);
          const product = polyhedralCone([
            [1, 0, 0, 0],
            [Math.cos(a), Math.sin(a), 0, 0],
            [0, 0, 1, 0],
            [0, 0, Math.cos(b), Math.sin(b)],
          ]);
          const exact = productCone(plane(a), plane(b));
          close(plane(a).intrinsicVolumes[2] as number, a / (2 * Math.PI), 1e-15);
          exact.logIntrinsicVolumes.forEach((log, k) => {
            const computed = product.logIntrinsicVolumes[k] as number;
            close(computed, log, (product.logErrors[k] as number) + (exact.logErrors[k] as number));
          });
        },
      ),
      { numRuns: 60 },
    );
  });

  it('obeys Gauss-Bonnet for random cones of dimension 4', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(coordinate, coordinate, coordinate), {
          minLength: 3,
          maxLength: 9,
        }),
        (points) => {
          const cone = polyhedralCone(points.map((p) => [...p, 5]));
          // Within what the cone states of itself, which is little but for nearly flat pieces.
          const stated = cone.logErrors.map(
            (error, k) => error * (cone.intrinsicVolumes[k] as number),
          );
          const sum = (parity: number, of: readonly number[]): number =>
            of.filter((_, k) => k % 2 === parity).reduce((t, v) => t + v, 0);
          for (const parity of [0, 1]) {
            const error = sum(parity, stated);
            expect(error).toBeLessThan(1e-8);
            close(sum(parity, cone.intrinsicVolumes), 0.5, error + 1e-15);
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('states the error of nearly degenerate cones, or refuses them', () => {
    const tiny = fc.integer({ min: -13, max: -2 }).map((power) => 10 ** power);
    const entry = fc.oneof(
      fc.constant(0),
      coordinate,
      fc.tuple(coordinate, tiny).map(([x, e]) => x * e),
    );
    const dimension = fc.integer({ min: 1, max: 4 });
    const rows = dimension.chain((n) =>
      fc.array(fc.array(entry, { minLength: n, maxLength: n }), { minLength: 1, maxLength: 7 }),
    );
    fc.assert(
      fc.property(rows, (generators) => {
        let cone: Cone;
        try {
          cone = polyhedralCone(generators);
        } catch (error) {
          expect((error as Error).message).toContain('too nearly dependent');
          return;
        }
        if (cone.lineality === cone.dimension) return;
        const declared = cone.intrinsicVolumes.reduce(
          (t, v, k) => t + v * (cone.logErrors[k] as number),
          0,
        );
        for (const which of [0, 1]) {
          const half = cone.intrinsicVolumes
            .filter((_, k) => k % 2 === which)
            .reduce((t, v) => t + v, 0);
          close(half, 0.5, declared + 1e-15);
        }
        cone.intrinsicVolumes.forEach((v) => {
          expect(v).toBeGreaterThanOrEqual(0);
        });
      }),
      { numRuns: 400 },
    );
  });

  it('keeps relative accuracy in narrow cones', () => {
    // three generators at distance e from an axis: the volumes scale with e, e^2, e^3
    const narrow = (e: number): Cone =>
      polyhedralCone([
        [1, e, 0, 0],
        [1, 0, e, 0],
        [1, 0, 0, e],
        [1, -e, -e, -e],
      ]);
    for (const e of [1e-4, 1e-6]) {
      const cone = narrow(e);
      const smaller = narrow(e / 2);
      for (const k of [2, 3, 4]) {
        const ratio =
          (cone.intrinsicVolumes[k] as number) / (smaller.intrinsicVolumes[k] as number);
        close(ratio / 2 ** (k - 1), 1, 20 * e * e + (cone.logErrors[k] as number) * 2);
      }
    }
  });

  it('refuses what it cannot measure', () => {
    const axes = [0, 1, 2, 3, 4].map((i) => [0, 1, 2, 3, 4].map((j) => (i === j ? 1 : 0)));
    expect(() => polyhedralCone(axes)).toThrow('approxPolyhedralCone takes more');
    expect(() => polyhedralCone([])).toThrow(DomainError);
    expect(() => polyhedralCone([[]])).toThrow(DomainError);
    expect(() => polyhedralCone([[1, 2], [1]])).toThrow(
      'generators[1] must be an array of 2 numbers',
    );
    expect(() => polyhedralCone([[1, Number.NaN]])).toThrow('generators[0][1] must be');
    expect(() => polyhedralCone([[1, Number.POSITIVE_INFINITY]])).toThrow(DomainError);
    expect(() => polyhedralCone('cone' as never)).toThrow(DomainError);
    // between what counts as one direction and what can be told apart
    const e = 5e-11;
    expect(() =>
      polyhedralCone([
        [1, e, 0],
        [1, 0, e],
        [1, -e, -e],
      ]),
    ).toThrow('too nearly dependent');
    expect(
      polyhedralCone([
        [1, 1e-12, 0],
        [1, 0, 1e-12],
        [1, 0, 0],
      ]).dimension,
    ).toBe(1);
  });
});

describe('approxPolyhedralCone', () => {
  const options = { trials: 4000, seed: 42 };
  const agrees = (rows: number[][], exact: Cone): void => {
    const cone = approxPolyhedralCone(rows, options);
    expect([cone.dimension, cone.lineality]).toEqual([exact.dimension, exact.lineality]);
    expect(cone.method).toBe('simulated');
    cone.intrinsicVolumes.forEach((v, k) => {
      close(
        v,
        exact.intrinsicVolumes[k] as number,
        4 * ((cone.standardErrors as number[])[k] as number),
      );
    });
    const spread = Math.sqrt(exact.variance / options.trials);
    close(cone.statisticalDimension, exact.statisticalDimension, 4 * spread);
  };

  it('agrees with exact cones within four standard errors', () => {
    agrees(cube, polyhedralCone(cube));
    agrees(
      [
        [1, 0, 0, 0],
        [-1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 1, 1, 0],
        [0, 0, 0, 1],
      ],
      polyhedralCone([
        [1, 0, 0, 0],
        [-1, 0, 0, 0],
        [0, 1, 0, 0],
        [0, 1, 1, 0],
        [0, 0, 0, 1],
      ]),
    );
    const steps = Array.from({ length: 12 }, (_, i) =>
      Array.from({ length: 12 }, (_, j) => (j >= i ? 1 : 0)),
    );
    agrees(steps, weylChamber('B', 12));
    const line = new Array(12).fill(1);
    agrees([...steps.slice(1), line, line.map(() => -1)], weylChamber('A', 12));
  });

  it('repeats itself for the same seed only', () => {
    const a = approxPolyhedralCone(cube, options);
    expect(approxPolyhedralCone(cube, options)).toEqual(a);
    expect(approxPolyhedralCone(cube, { trials: 4000, seed: 43 })).not.toEqual(a);
  });

  it('counts the same on every engine', () => {
    const cone = approxPolyhedralCone(octahedron, { trials: 1000, seed: 1 });
    expect(cone.intrinsicVolumes.map((v) => Math.round(1000 * v))).toEqual(HITS);
  });

  it('recognises subspaces', () => {
    const plane = approxPolyhedralCone(
      [
        [1, 0, 0],
        [-1, 1, 0],
        [-1, -1, 0],
      ],
      options,
    );
    expect(plane).toEqual(subspace({ dimension: 2, ambient: 3 }));
  });

  it('gives a standard error to faces that were never hit', () => {
    const cone = approxPolyhedralCone(
      [
        [1, 1e-3],
        [1, -1e-3],
      ],
      { trials: 100, seed: 1 },
    );
    expect(cone.intrinsicVolumes[2]).toBe(0);
    expect(cone.logErrors[2]).toBe(Number.POSITIVE_INFINITY);
    expect((cone.standardErrors as number[])[2]).toBeGreaterThan(0);
  });

  it('carries its errors through products and polars', () => {
    const cone = approxPolyhedralCone(cube, options);
    const product = productCone(cone, orthant(2));
    expect(product.method).toBe('simulated');
    const exact = productCone(polyhedralCone(cube), orthant(2));
    product.intrinsicVolumes.forEach((v, k) => {
      close(
        v,
        exact.intrinsicVolumes[k] as number,
        4 * ((product.standardErrors as number[])[k] as number),
      );
    });
    expect(polarCone(cone).standardErrors).toEqual(
      [...(cone.standardErrors as number[])].reverse(),
    );
  });

  it('refuses bad input', () => {
    expect(() => approxPolyhedralCone(cube, { trials: 0, seed: 1 })).toThrow('trials must be');
    expect(() => approxPolyhedralCone(cube, { trials: 10 } as never)).toThrow('seed must be');
    expect(() => approxPolyhedralCone(cube, { trials: 10, seed: -1 })).toThrow(DomainError);
    expect(() => approxPolyhedralCone([], options)).toThrow('generators must be');
  });
});

/** Recorded on Node.js; other engines must count the same. */
const HITS: readonly number[] = [135, 332, 334, 155, 44];
