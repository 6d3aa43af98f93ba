import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  arrangementFaces,
  arrangementRegions,
  coverEfronCone,
  dichotomyCount,
  schlaefliCone,
} from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';
import { relativeError } from '../support/reference.ts';

function binomial(n: bigint, k: bigint): bigint {
  if (k < 0n || k > n) return 0n;
  let value = 1n;
  for (let i = 1n; i <= k; i++) value = (value * (n - i + 1n)) / i;
  return value;
}
const small = fc.integer({ min: 0, max: 30 });
const dimension = fc.integer({ min: 1, max: 12 });

describe('arrangements', () => {
  it('state the rounding of the logarithm of an exact count', () => {
    // log 2 = 0.693147180559945309417..., and the double nearest to it is 2.3e-17 lower
    expect(arrangementRegions({ n: 1, d: 1 }).logError).toBeGreaterThan(2.3e-17);
    expect(arrangementRegions({ n: 1, d: 1 }).value).toBe(2);
    expect(arrangementRegions({ n: 0, d: 1 }).logError).toBe(0);
  });

  it('grow by the regions that a further hyperplane meets', () => {
    fc.assert(
      fc.property(small, dimension, fc.boolean(), (n, d, central) => {
        const more = arrangementRegions({ n: n + 1, d: d + 1, central }).value;
        const cut = n === 0 && central ? 1 : arrangementRegions({ n, d, central }).value;
        const before = arrangementRegions({ n, d: d + 1, central }).value;
        expect(more).toBe(before + (central && n === 0 ? 1 : cut));
      }),
    );
  });

  it('have faces that add up to the Euler characteristic', () => {
    fc.assert(
      fc.property(small, dimension, (n, d) => {
        const sum = (central: boolean, bounded: boolean): number => {
          let total = 0;
          for (let k = 0; k <= d; k++) {
            total += (k % 2 === 0 ? 1 : -1) * arrangementFaces({ n, d, k, central, bounded }).value;
          }
          return total;
        };
        expect(sum(false, false)).toBe(d % 2 === 0 ? 1 : -1);
        expect(sum(true, false)).toBe(d % 2 === 0 ? 1 : -1);
        // the bounded faces form a contractible complex, once there is a vertex
        expect(sum(false, true)).toBe(n >= d ? 1 : 0);
      }),
    );
  });

  it('of central hyperplanes have as many regions as points have dichotomies', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 2000 }), fc.integer({ min: 1, max: 300 }), (n, d) => {
        const regions = arrangementRegions({ n, d, central: true });
        const count = dichotomyCount({ n, d, intercept: false });
        expect(Math.abs(regions.log - count.log)).toBeLessThan(4e-15 * Math.max(1, count.log));
      }),
    );
  });

  it('count exactly below 2^52, and to rounding beyond', () => {
    for (const [n, d, k] of [
      [60, 3, 1],
      [1000, 4, 2],
      [300, 40, 7],
      [2000, 999, 600],
      [5000, 4999, 17],
    ] as const) {
      const [N, D, K] = [BigInt(n), BigInt(d), BigInt(k)];
      let exact = 0n;
      for (let i = 0n; i <= K; i++) exact += binomial(N - D + K, i);
      exact *= binomial(N, D - K);
      const faces = arrangementFaces({ n, d, k });
      const digits = exact.toString();
      const log =
        Math.log(Number(digits.slice(0, 17))) +
        (digits.length - Math.min(17, digits.length)) * Math.LN10;
      if (digits.length < 16) expect(faces.value).toBe(Number(exact));
      expect(Math.abs(faces.log - log)).toBeLessThan(Math.max(faces.logError, 2e-15 * log));
      expect(faces.logError).toBeLessThan(1e-14 * Math.max(1, log));
    }
  });

  it('take huge numbers without losing the small logarithm', () => {
    const n = Number.MAX_SAFE_INTEGER;
    expect(arrangementRegions({ n, d: 1 }).log).toBeCloseTo(53 * Math.LN2, 13);
    expect(arrangementRegions({ n, d: 2 }).log).toBeCloseTo(105 * Math.LN2, 12);
    expect(arrangementRegions({ n: 1e15, d: 1e15 }).log / (1e15 * Math.LN2)).toBeCloseTo(1, 14);
  });

  it('have exact degenerate counts', () => {
    expect(arrangementRegions({ n: 0, d: 3 }).value).toBe(1);
    expect(arrangementRegions({ n: 0, d: 3, central: true }).value).toBe(1);
    expect(arrangementRegions({ n: 0, d: 3, bounded: true }).log).toBe(Number.NEGATIVE_INFINITY);
    expect(arrangementRegions({ n: 5, d: 3, central: true, bounded: true }).value).toBe(0);
    expect(arrangementFaces({ n: 5, d: 3, k: 0, central: true, bounded: true }).value).toBe(1);
    expect(arrangementFaces({ n: 2, d: 3, k: 0, central: true }).value).toBe(0);
    expect(arrangementFaces({ n: 2, d: 3, k: 1, central: true }).value).toBe(1);
    expect(arrangementFaces({ n: 3, d: 2, k: 0 }).value).toBe(3);
    expect(arrangementFaces({ n: 1, d: 4, k: 1 }).value).toBe(0);
  });

  it.each([
    [{ n: -1, d: 2 }, 'n'],
    [{ n: 3, d: 0 }, 'd'],
    [{ n: 2 ** 53, d: 2 }, 'n'],
    [{ n: 3, d: 2, central: 1 }, 'central'],
    [{ n: 3, d: 2, bounded: 'yes' }, 'bounded'],
    [{ n: 3, d: 2, k: 1 }, 'k'],
  ])('refuse %o', (args, parameter) => {
    expect(() => arrangementRegions(args as never)).toThrow(DomainError);
    expect(() => arrangementRegions(args as never)).toThrow(`: ${parameter} must be`);
  });

  it('refuse faces of a larger dimension', () => {
    expect(() => arrangementFaces({ n: 3, d: 2, k: 3 })).toThrow(
      'k must be an integer from 0 to 2',
    );
  });
});

describe('random cones', () => {
  const sizes = fc.tuple(fc.integer({ min: 1, max: 200 }), fc.integer({ min: 1, max: 60 }));

  it('have volumes that sum to one and obey Gauss-Bonnet in the mean', () => {
    fc.assert(
      fc.property(sizes, ([n, d]) => {
        for (const cone of [schlaefliCone({ n, d }), coverEfronCone({ n, d })]) {
          const v = cone.expectedIntrinsicVolumes;
          expect(v).toHaveLength(d + 1);
          expect(v.reduce((t, x) => t + x, 0)).toBeCloseTo(1, 13);
          const signed = v.reduce((t, x, k) => t + (k % 2 === 0 ? x : -x), 0);
          // a region of fewer hyperplanes than dimensions is no subspace either
          expect(signed).toBeCloseTo(0, 13);
          expect(cone.statisticalDimension).toBeCloseTo(
            v.reduce((t, x, k) => t + k * x, 0),
            12,
          );
          expect(cone.solidAngle).toBe(v[d]);
        }
      }),
    );
  });

  it('are polar to each other in volumes and faces', () => {
    fc.assert(
      fc.property(sizes, ([n, d]) => {
        const region = schlaefliCone({ n, d });
        const hull = coverEfronCone({ n, d });
        expect([...hull.expectedIntrinsicVolumes].reverse()).toEqual(
          region.expectedIntrinsicVolumes,
        );
        for (let k = 0; k <= d; k++) {
          expect(hull.expectedFaces(k)).toEqual(region.expectedFaces(d - k));
        }
      }),
    );
  });

  it('have faces that add up to the Euler relation of a pointed cone', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 20 }), fc.integer({ min: 0, max: 40 }), (d, more) => {
        const cone = schlaefliCone({ n: d + more, d });
        let sum = 0;
        let size = 0;
        for (let k = 0; k <= d; k++) {
          const faces = cone.expectedFaces(k).value;
          sum += k % 2 === 0 ? faces : -faces;
          size += faces;
        }
        expect(Math.abs(sum)).toBeLessThan(1e-13 * size);
      }),
    );
  });

  it('tend to cubes as the number of hyperplanes grows', () => {
    // 2^(d - k) binom(d - 1, k - 1) faces
    const cone = schlaefliCone({ n: Number.MAX_SAFE_INTEGER, d: 6 });
    expect(
      [1, 2, 3, 4, 5, 6].map((k) => Math.round(cone.expectedFaces(k).value * 1e9) / 1e9),
    ).toEqual([32, 80, 80, 40, 10, 1]);
    expect(cone.logExpectedIntrinsicVolumes[6]).toBeLessThan(-170);
  });

  it('of fewer hyperplanes than dimensions are simplicial', () => {
    const cone = coverEfronCone({ n: 3, d: 5 });
    expect([0, 1, 2, 3, 4, 5].map((k) => cone.expectedFaces(k).value)).toEqual([1, 3, 3, 1, 0, 0]);
    const volumes = [0, 0, 1, 3, 3, 1].map((x) => x / 8);
    schlaefliCone({ n: 3, d: 5 }).expectedIntrinsicVolumes.forEach((v, k) => {
      expect(v).toBeCloseTo(volumes[k] as number, 15);
    });
  });

  it('are confirmed by a seeded simulation of random half-planes', () => {
    // d = 2: the cone of n random directions, given that they fit into a half-plane
    const stream = randomStream(21);
    let pointed = 0;
    let opening = 0;
    let square = 0;
    const [n, trials] = [4, 20_000];
    for (let trial = 0; trial < trials; trial++) {
      const angles = Array.from({ length: n }, () => 2 * Math.PI * stream.uniform()).sort(
        (a, b) => a - b,
      );
      const gaps = angles.map((a, i) =>
        i === 0 ? a + 2 * Math.PI - (angles.at(-1) as number) : a - (angles[i - 1] as number),
      );
      const gap = Math.max(...gaps);
      if (gap < Math.PI) continue;
      pointed++;
      const share = 1 - gap / (2 * Math.PI);
      opening += share;
      square += share * share;
    }
    const mean = opening / pointed;
    const deviation = Math.sqrt((square / pointed - mean * mean) / pointed);
    expect(Math.abs(mean - coverEfronCone({ n, d: 2 }).solidAngle)).toBeLessThan(4 * deviation);
  });

  it('keep their digits in high dimension', () => {
    // exact fractions, by Python integers
    const faces = schlaefliCone({ n: 5001, d: 5000 }).expectedFaces(1);
    expect(relativeError(faces.log, '15.648292001715250501')).toBeLessThan(4e-16);
    expect(faces.logError).toBeLessThan(1e-13);
    const volume = coverEfronCone({ n: 5000, d: 4999 }).expectedIntrinsicVolumes[1344] as number;
    expect(relativeError(volume, '7.681907205880984999e-244')).toBeLessThan(1e-14);
    const angle = schlaefliCone({ n: 4680695353, d: 31 }).solidAngle;
    expect(relativeError(angle, '1.0311428883917563526e-258')).toBeLessThan(1e-14);
  });

  it('refuse bad input', () => {
    expect(() => schlaefliCone({ n: 0, d: 3 })).toThrow('n must be an integer >= 1');
    expect(() => coverEfronCone({ n: 3, d: 2_000_000 })).toThrow(DomainError);
    expect(() => schlaefliCone({ n: 3 } as never)).toThrow('d must be');
    expect(() => schlaefliCone({ n: 3, d: 2 }).expectedFaces(3)).toThrow(
      'schlaefliCone.expectedFaces: k must be',
    );
    expect(() => coverEfronCone({ n: 3, d: 2 }).expectedFaces(0.5)).toThrow(DomainError);
  });
});
