import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  ball,
  ballVolume,
  box,
  crossPolytope,
  cube,
  ellipsoid,
  flagCoefficient,
  meanWidth,
  regularSimplex,
  sphereArea,
  steinerVolume,
  surfaceArea,
} from 'hullgauge/intrinsic';
import { describe, expect, it } from 'vitest';
import { difference } from '../support/reference.ts';

const values = (body: ReturnType<typeof ball>): number[] =>
  body.intrinsicVolumes.map((v) => v.value);

describe('published closed forms', () => {
  it('knows the volumes and areas of balls in low dimensions', () => {
    expect(ballVolume(0).value).toBe(1);
    expect(ballVolume(1).value).toBe(2);
    expect(ballVolume(2, 3).value / (9 * Math.PI)).toBeCloseTo(1, 14);
    expect(ballVolume(4).value / (Math.PI ** 2 / 2)).toBeCloseTo(1, 14);
    expect(sphereArea(1).value).toBe(2);
    expect(sphereArea(2, 0).log).toBe(Number.NEGATIVE_INFINITY);
    expect(sphereArea(4).value / (2 * Math.PI ** 2)).toBeCloseTo(1, 14);
  });

  it('gives V_d and the perimeter or surface of the regular triangle and tetrahedron', () => {
    const tetrahedron = regularSimplex({ d: 3, edge: 2 });
    expect(surfaceArea(tetrahedron).value).toBeCloseTo(4 * Math.sqrt(3), 13);
    expect(values(tetrahedron)[3]).toBeCloseTo((8 * Math.SQRT1_2) / 6, 14);
    // V_1 of the tetrahedron: sum of edges times exterior dihedral angle over 2 pi
    const exterior = Math.PI - Math.acos(1 / 3);
    expect(values(tetrahedron)[1]).toBeCloseTo((6 * 2 * exterior) / (2 * Math.PI), 13);
  });

  it('gives the octahedron', () => {
    const octahedron = crossPolytope({ d: 3 });
    const exterior = Math.PI - Math.acos(-1 / 3);
    expect(values(octahedron)[1]).toBeCloseTo((12 * Math.SQRT2 * exterior) / (2 * Math.PI), 13);
    expect(values(octahedron)[3]).toBeCloseTo(4 / 3, 14);
  });

  it('gives the surface of a prolate spheroid', () => {
    const c = 3;
    const e = Math.sqrt(1 - 1 / (c * c));
    const area = 2 * Math.PI * (1 + (c / e) * Math.asin(e));
    expect(surfaceArea(ellipsoid({ semiAxes: [1, 1, c] })).value / area).toBeCloseTo(1, 13);
  });
});

describe('identities', () => {
  const axes = fc.array(fc.double({ min: 0.1, max: 10, noNaN: true }), {
    minLength: 1,
    maxLength: 6,
  });

  it('reduces the ellipsoid to the ball', () => {
    for (const d of [1, 2, 3, 7, 12]) {
      const round = ellipsoid({ semiAxes: new Array<number>(d).fill(2) });
      const exact = ball({ d, radius: 2 });
      for (let k = 0; k <= d; k++) {
        const a = round.intrinsicVolumes[k];
        const b = exact.intrinsicVolumes[k];
        expect(Math.abs((a?.log ?? 0) - (b?.log ?? 1))).toBeLessThan(1e-14);
      }
    }
  });

  it('pairs the intrinsic volumes of an ellipsoid with those of its polar', () => {
    fc.assert(
      fc.property(axes, (semiAxes) => {
        const d = semiAxes.length;
        const body = ellipsoid({ semiAxes });
        const polar = ellipsoid({ semiAxes: semiAxes.map((a) => 1 / a) });
        const logProduct = semiAxes.reduce((sum, a) => sum + Math.log(a), 0);
        for (let k = 0; k <= d; k++) {
          const left = body.intrinsicVolumes[k]?.log ?? Number.NaN;
          const right = polar.intrinsicVolumes[d - k]?.log ?? Number.NaN;
          const factor = ballVolume(k).log - ballVolume(d - k).log + logProduct;
          expect(Math.abs(left - right - factor)).toBeLessThan(3e-14);
        }
      }),
      { numRuns: 40 },
    );
  });

  it('agrees on the cube, the box of equal sides and the segment', () => {
    for (const d of [1, 4, 9]) {
      expect(values(box(new Array<number>(d).fill(3)))).toEqual(values(cube({ d, side: 3 })));
    }
    expect(values(regularSimplex({ d: 1, edge: 5 }))).toEqual([1, 5]);
    expect(values(crossPolytope({ d: 1, scale: 2.5 }))).toEqual([1, 5]);
    expect(values(ball({ d: 1, radius: 2.5 }))).toEqual([1, 5]);
  });

  it('grows a ball by a distance', () => {
    for (const d of [1, 2, 5, 50, 400]) {
      const grown = steinerVolume(ball({ d, radius: 2 }), 0.5).log;
      const exact = ballVolume(d, 2.5).log;
      expect(Math.abs(grown - exact)).toBeLessThan(4e-15 * Math.max(1, Math.abs(exact), d));
    }
  });

  it('has the width of a ball, of a body of constant width 1, and of the unit cube', () => {
    for (const d of [3, 500, 1000, 10_000]) {
      expect(Math.abs(meanWidth(ball({ d, radius: 0.5 })) - 1)).toBeLessThan(4e-15);
    }
    // mean width of the unit cube of R^3 is 3/2
    expect(meanWidth(cube({ d: 3 }))).toBeCloseTo(1.5, 14);
  });

  it('keeps the flag coefficients symmetric', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 300 }), (a, b) => {
        expect(flagCoefficient(a + b, a).log).toBe(flagCoefficient(a + b, b).log);
      }),
    );
  });

  it('satisfies the isoperimetric order V_k / V_k(ball) for a cube in a ball', () => {
    // (V_k / V_k(B))^(1/k) falls with k
    const d = 20;
    const body = cube({ d });
    const unit = ball({ d });
    let last = Number.POSITIVE_INFINITY;
    for (let k = 1; k <= d; k++) {
      const ratio =
        ((body.intrinsicVolumes[k]?.log ?? 0) - (unit.intrinsicVolumes[k]?.log ?? 0)) / k;
      expect(ratio).toBeLessThan(last);
      last = ratio;
    }
  });
});

describe('ends of the domain', () => {
  it('takes bodies of size zero', () => {
    expect(values(cube({ d: 3, side: 0 }))).toEqual([1, 0, 0, 0]);
    expect(values(box([0, 2]))).toEqual([1, 2, 0]);
    expect(steinerVolume(cube({ d: 2, side: 3 }), 0).value).toBe(9);
  });

  it('reaches d = 10000', () => {
    const simplex = regularSimplex({ d: 10_000 });
    expect(simplex.intrinsicVolumes.length).toBe(10_001);
    expect(simplex.intrinsicVolumes[10_000]?.log).toBeLessThan(-80_000);
  });

  it('refuses what is not a body or out of range', () => {
    expect(() => ball({ d: 0 })).toThrow(DomainError);
    expect(() => ball({ d: 3, radius: -1 })).toThrow(DomainError);
    expect(() => ball({ d: 3, raduis: 1 } as never)).toThrow('raduis');
    expect(() => box([])).toThrow(DomainError);
    expect(() => box([1, Number.NaN])).toThrow('sides[1]');
    expect(() => ellipsoid({ semiAxes: [1, 0] })).toThrow('semiAxes[1]');
    expect(() => flagCoefficient(3, 4)).toThrow(DomainError);
    expect(() => meanWidth({ dimension: 2, intrinsicVolumes: [] })).toThrow('body');
    expect(() => steinerVolume(cube({ d: 2 }), Number.NaN)).toThrow('distance');
    expect(() => sphereArea(0)).toThrow(DomainError);
  });

  it('works on a body that went through JSON', () => {
    const body = JSON.parse(JSON.stringify(cube({ d: 3, side: 2 })));
    expect(surfaceArea(body).value).toBe(24);
  });
});

describe('stated errors', () => {
  // mpmath 1.2 at 50 digits
  it('cover the cancellation of large logarithms', () => {
    const cases = [
      [ball({ d: 300 }).intrinsicVolumes[93], '10.87449728381030423929749'],
      [
        ellipsoid({ semiAxes: [1e100, 1e-100, 1] }).intrinsicVolumes[3],
        '1.432411958301181101582646',
      ],
      [cube({ d: 300, side: 1e200 }).intrinsicVolumes[287], '132219.7176580261421237933'],
    ] as const;
    for (const [volume, exact] of cases) {
      const error = Math.abs(difference(volume?.log as number, exact));
      expect(error).toBeLessThanOrEqual(volume?.logError as number);
      expect(volume?.logError).toBeLessThan(3e-13 + 1e-15 * Number(exact));
    }
  });

  it('of parallel bodies count terms by their share', () => {
    expect(steinerVolume(cube({ d: 100 }), 1e-300).logError).toBeLessThan(1e-14);
    // two large parts of the logarithm cancel: 100 log 4.5 and log Gamma(51)
    const parallel = steinerVolume(ball({ d: 100, radius: 2 }), 2.5);
    expect(Math.abs(difference(parallel.log, '59.16646701832438397696001'))).toBeLessThanOrEqual(
      parallel.logError,
    );
    expect(parallel.logError).toBeLessThan(2e-12);
    expect(steinerVolume(cube({ d: 3, side: 0 }), 0).log).toBe(Number.NEGATIVE_INFINITY);
  });
});
