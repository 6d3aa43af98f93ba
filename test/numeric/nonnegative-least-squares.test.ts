import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ConeProjection } from '../../src/numeric/nonnegative-least-squares.ts';
import { dot, unit } from '../../src/numeric/small-vectors.ts';

const coordinate = fc.double({ min: -1, max: 1, noNaN: true });
const vector = (n: number): fc.Arbitrary<number[]> =>
  fc.array(coordinate, { minLength: n, maxLength: n });

describe('ConeProjection', () => {
  it('satisfies the optimality conditions', () => {
    const problem = fc
      .integer({ min: 1, max: 7 })
      .chain((n) => fc.tuple(fc.array(vector(n), { minLength: 1, maxLength: 12 }), vector(n)));
    fc.assert(
      fc.property(problem, ([generators, point]) => {
        const rays = generators.map(unit).filter((g) => dot(g, g) > 0.5);
        fc.pre(rays.length > 0 && dot(point, point) > 1e-6);
        const projection = new ConeProjection(rays);
        const face = projection.project(point);
        expect(face).toBeLessThanOrEqual(point.length);
        // no generator makes an acute angle with what is left, and none that was used any angle
        const distance = projection.squaredDistance(point);
        for (const ray of rays) {
          const step = Math.max(0, dot(point, ray));
          expect(distance).toBeLessThanOrEqual(dot(point, point) - step * step + 1e-9);
        }
        expect(projection.project(point)).toBe(face);
      }),
      { numRuns: 300 },
    );
  });

  it('of an orthant counts the positive coordinates', () => {
    const axes = [0, 1, 2, 3].map((i) => [0, 1, 2, 3].map((j) => (i === j ? 1 : 0)));
    const projection = new ConeProjection(axes);
    expect(projection.project([1, -2, 3, 0.5])).toBe(3);
    expect(projection.squaredDistance([1, -2, 3, 0.5])).toBe(4);
    expect(projection.project([-1, -2, -3, -4])).toBe(0);
  });

  it('copes with repeated and opposite generators', () => {
    const rays = [
      [1, 0],
      [1, 0],
      [-1, 0],
      [0, 1],
      [Math.SQRT1_2, Math.SQRT1_2],
    ];
    const projection = new ConeProjection(rays);
    for (const point of [
      [1, 1],
      [-3, 2],
      [2, -1],
      [-1, -1],
    ]) {
      projection.project(point);
      expect(projection.squaredDistance(point)).toBeCloseTo(
        Math.min(0, point[1] as number) ** 2,
        12,
      );
    }
  });
});
