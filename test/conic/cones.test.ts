import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  type Cone,
  circularCone,
  halfspace,
  l1DescentCone,
  linfDescentCone,
  orthant,
  polarCone,
  polyhedralCone,
  productCone,
  ray,
  subspace,
  weylChamber,
} from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';

/** One cone of each family, none of them a subspace. */
const samples: readonly (readonly [string, Cone])[] = [
  ['ray', ray()],
  ['halfspace', halfspace(7)],
  ['orthant', orthant(12)],
  ['narrow circular', circularCone(30, 0.05)],
  ['wide circular', circularCone(9, 1.5)],
  ['chamber A', weylChamber('A', 15)],
  ['chamber B', weylChamber('B', 15)],
  ['chamber D', weylChamber('D', 15)],
  ['l1 descent', l1DescentCone({ n: 25, sparsity: 4 })],
  ['linf descent', linfDescentCone({ n: 25, saturated: 4 })],
  [
    'polyhedral',
    polyhedralCone([
      [1, 2, 0, 0],
      [0, 1, 1, 0],
      [-1, 0, 1, 3],
      [1, 1, 1, 1],
      [2, 0, 0, -1],
    ]),
  ],
  ['with a line', productCone(subspace({ dimension: 1, ambient: 2 }), circularCone(5, 0.7))],
  ['polar', polarCone(weylChamber('A', 9))],
];

const sum = (values: readonly number[]): number => values.reduce((total, x) => total + x, 0);
const parity = (cone: Cone, which: 0 | 1): number =>
  sum(cone.intrinsicVolumes.filter((_, k) => k % 2 === which));
const close = (a: number, b: number, tolerance: number): void =>
  expect(Math.abs(a - b)).toBeLessThanOrEqual(tolerance);

describe.each(samples)('the cone "%s"', (_, cone) => {
  it('obeys the Gauss-Bonnet relation', () => {
    close(parity(cone, 0), 0.5, 2e-14);
    close(parity(cone, 1), 0.5, 2e-14);
  });

  it('has volumes between its lineality and its dimension, and nowhere else', () => {
    cone.intrinsicVolumes.forEach((v, k) => {
      if (k < cone.lineality || k > cone.dimension) expect(v).toBe(0);
      else expect(cone.logIntrinsicVolumes[k]).toBeGreaterThan(Number.NEGATIVE_INFINITY);
    });
    expect(cone.intrinsicVolumes).toHaveLength(cone.ambient + 1);
  });

  it('has volumes that are the exponentials of their logarithms', () => {
    cone.intrinsicVolumes.forEach((v, k) => {
      const log = cone.logIntrinsicVolumes[k] as number;
      if (v > 1e-300) close(Math.log(v), log, 1e-15 * Math.max(1, Math.abs(log)));
    });
  });

  it('states the moments of its volumes', () => {
    const mean = sum(cone.intrinsicVolumes.map((v, k) => k * v));
    close(cone.statisticalDimension, mean, 1e-13 * cone.ambient);
    const variance = sum(cone.intrinsicVolumes.map((v, k) => (k - mean) ** 2 * v));
    close(cone.variance, variance, 1e-12 * cone.ambient);
  });

  it('keeps the variance bound 2 delta (n - delta)/n', () => {
    const { ambient, statisticalDimension: delta, variance } = cone;
    expect(variance).toBeLessThanOrEqual((2 * delta * (ambient - delta)) / ambient + 1e-12);
  });

  it('interlaces half-tails with tails', () => {
    const v = cone.intrinsicVolumes;
    for (let k = 0; k < cone.ambient; k++) {
      const half = 2 * sum(v.filter((_, i) => i > k && (i - k) % 2 === 1));
      expect(half).toBeGreaterThanOrEqual(sum(v.slice(k + 1)) - 1e-13);
      expect(half).toBeLessThanOrEqual(sum(v.slice(k)) + 1e-13);
    }
  });

  it('is the polar of its polar, with reversed volumes', () => {
    const polar = polarCone(cone);
    expect(polar.intrinsicVolumes).toEqual([...cone.intrinsicVolumes].reverse());
    expect(polar.dimension).toBe(cone.ambient - cone.lineality);
    close(polar.statisticalDimension + cone.statisticalDimension, cone.ambient, 1e-12);
    const { statisticalDimension, ...rest } = polarCone(polar);
    close(statisticalDimension, cone.statisticalDimension, 1e-14 * cone.ambient);
    expect(cone).toMatchObject(rest);
  });

  it('is plain frozen data that survives JSON', () => {
    expect(Object.isFrozen(cone)).toBe(true);
    expect(Object.isFrozen(cone.intrinsicVolumes)).toBe(true);
    expect(structuredClone(cone)).toEqual(cone);
    expect(cone).toMatchObject({ kind: 'cone', method: 'exact' });
  });

  it('times the origin is itself', () => {
    const product = productCone(cone, orthant(0));
    product.logIntrinsicVolumes.forEach((log, k) => {
      const own = cone.logIntrinsicVolumes[k] as number;
      if (own === Number.NEGATIVE_INFINITY) expect(log).toBe(own);
      else close(log, own, 1e-15 * Math.max(1, Math.abs(own)));
    });
  });
});

describe('products', () => {
  it('of orthants are orthants', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 60 }), (a, b) => {
        const product = productCone(orthant(a), orthant(b));
        const whole = orthant(a + b);
        product.intrinsicVolumes.forEach((v, k) => {
          close(v / (whole.intrinsicVolumes[k] as number), 1, 1e-13);
          close(
            product.logIntrinsicVolumes[k] as number,
            whole.logIntrinsicVolumes[k] as number,
            (product.logErrors[k] as number) + (whole.logErrors[k] as number),
          );
        });
      }),
      { numRuns: 30 },
    );
  });

  it('of small orthants are exact', () => {
    for (const [a, b] of [
      [1, 1],
      [7, 12],
      [25, 25],
    ] as const) {
      const product = productCone(orthant(a), orthant(b));
      expect(product).toEqual(orthant(a + b));
    }
    // beyond, they know their error at the corner, where one sum of logarithms is all
    let corner = ray();
    for (let i = 1; i < 70; i++) corner = productCone(corner, ray());
    const log = corner.logIntrinsicVolumes[0] as number;
    expect(Math.abs(log + 70 * Math.LN2)).toBeLessThanOrEqual(corner.logErrors[0] as number);
  });

  it('are known to be symmetric where both factors are', () => {
    const quarter = circularCone(4, Math.PI / 4);
    for (const [cone, symmetric] of [
      [ray(), true],
      [halfspace(4), true],
      [subspace({ dimension: 2, ambient: 5 }), true],
      [orthant(90), true],
      [quarter, true],
      [circularCone(4, 0.7853981633974484), undefined],
      [circularCone(4, 0), true],
      [weylChamber('A', 4), undefined],
      [polarCone(quarter), true],
      [productCone(quarter, halfspace(2)), true],
      [productCone(quarter, weylChamber('B', 2)), undefined],
    ] as const) {
      expect(cone.symmetric).toBe(symmetric);
      if (symmetric === undefined) continue;
      const { lineality, dimension, intrinsicVolumes: v } = cone;
      for (let k = lineality; k <= dimension; k++) {
        close(v[k] as number, v[lineality + dimension - k] as number, 1e-16);
      }
    }
  });

  it('commute, and add lineality, dimension and moments', () => {
    for (const [, first] of samples) {
      for (const [, second] of samples.slice(0, 5)) {
        const product = productCone(first, second);
        const other = productCone(second, first);
        expect(product.lineality).toBe(first.lineality + second.lineality);
        expect(product.dimension).toBe(first.dimension + second.dimension);
        expect(product.ambient).toBe(first.ambient + second.ambient);
        product.intrinsicVolumes.forEach((v, k) => {
          close(v, other.intrinsicVolumes[k] as number, 1e-15);
        });
        const mean = sum(product.intrinsicVolumes.map((v, k) => k * v));
        close(mean, product.statisticalDimension, 1e-12);
      }
    }
  });
});

describe('families', () => {
  it('contain one another', () => {
    const same = (a: Cone, b: Cone): void =>
      a.intrinsicVolumes.forEach((v, k) => {
        close(v, b.intrinsicVolumes[k] as number, 1e-15);
      });
    expect(orthant(-0)).toEqual(orthant(0));
    expect(subspace({ dimension: -0, ambient: 2 })).toEqual(subspace({ dimension: 0, ambient: 2 }));
    same(circularCone(2, Math.PI / 4), orthant(2));
    same(weylChamber('B', 1), ray());
    same(weylChamber('D', 2), orthant(2));
    same(weylChamber('A', 1), subspace({ dimension: 1, ambient: 1 }));
    // D_3 is A_3 without its line
    same(
      productCone(weylChamber('D', 3), subspace({ dimension: 1, ambient: 1 })),
      weylChamber('A', 4),
    );
    same(circularCone(5, Math.PI / 2), halfspace(5));
    same(circularCone(5, 0), productCone(ray(), subspace({ dimension: 0, ambient: 4 })));
    same(l1DescentCone({ n: 5, sparsity: 5 }), halfspace(5));
    same(l1DescentCone({ n: 5, sparsity: 0 }), subspace({ dimension: 0, ambient: 5 }));
    same(linfDescentCone({ n: 5, saturated: 5 }), orthant(5));
    same(linfDescentCone({ n: 5, saturated: 1 }), halfspace(5));
  });

  it('approach their limits', () => {
    const narrow = circularCone(6, 1e-9).intrinsicVolumes;
    close(narrow[0] as number, 0.5, 1e-8);
    close(narrow[1] as number, 0.5, 1e-8);
    const wide = circularCone(6, Math.PI / 2 - 1e-9).intrinsicVolumes;
    close(wide[5] as number, 0.5, 1e-8);
  });

  it('of circular cones are polar to each other', () => {
    const polar = polarCone(circularCone(20, 0.4)).logIntrinsicVolumes;
    circularCone(20, Math.PI / 2 - 0.4).logIntrinsicVolumes.forEach((log, k) => {
      close(log, polar[k] as number, 2e-14 * Math.max(1, Math.abs(log)));
    });
  });

  it('have the volumes of chambers as exact fractions of the group order', () => {
    const row = (roots: readonly number[]): bigint[] => {
      let p = [1n];
      for (const root of roots) {
        p = p.concat(0n).map((x, i) => x * BigInt(root) + (i > 0 ? (p[i - 1] as bigint) : 0n));
      }
      return p;
    };
    const range = (n: number): number[] => Array.from({ length: n }, (_, i) => i + 1);
    for (const n of [2, 3, 6, 20, 60]) {
      const chambers: [Cone, bigint[]][] = [
        [weylChamber('A', n), row(range(n).map((j) => j - 1))],
        [weylChamber('B', n), row(range(n).map((j) => 2 * j - 1))],
        [weylChamber('D', n), row([...range(n - 1).map((j) => 2 * j - 1), n - 1])],
      ];
      for (const [cone, coefficients] of chambers) {
        const order = coefficients.reduce((total, x) => total + x, 0n);
        coefficients.forEach((x, k) => {
          const exact = Number((x * 10n ** 320n) / order / 10n ** 290n) / 1e30;
          if (exact > 1e-12) close((cone.intrinsicVolumes[k] as number) / exact, 1, 5e-15);
        });
      }
    }
  });

  it('reach a million dimensions and volumes far below the range of doubles', () => {
    const chamber = weylChamber('A', 3000);
    expect(chamber.intrinsicVolumes[3000]).toBe(0);
    // log 1/3000!
    expect(chamber.logIntrinsicVolumes[3000]).toBeCloseTo(-21024.02485304535, 9);
    expect(sum(chamber.intrinsicVolumes)).toBeCloseTo(1, 13);
    expect(orthant(100_000).logIntrinsicVolumes[0]).toBeCloseTo(-100_000 * Math.LN2, 9);
  });
});

describe('bad input', () => {
  it.each<[string, () => unknown, string]>([
    ['subspace', () => subspace({ dimension: 3, ambient: 2 }), 'dimension'],
    ['subspace', () => subspace({ dimension: 1 } as never), 'ambient'],
    ['subspace', () => subspace({ dimension: 1, ambient: 2, n: 3 } as never), 'n'],
    ['halfspace', () => halfspace(0), 'n'],
    ['orthant', () => orthant(2.5), 'n'],
    ['orthant', () => orthant(1e7), 'n'],
    ['circularCone', () => circularCone(1, 0.5), 'n'],
    ['circularCone', () => circularCone(4, 1.6), 'angle'],
    ['circularCone', () => circularCone(4, Number.NaN), 'angle'],
    ['circularCone', () => circularCone(4, 1e-160), 'angle'],
    ['weylChamber', () => weylChamber('C' as never, 4), 'type'],
    ['weylChamber', () => weylChamber('D', 1), 'n'],
    ['productCone', () => productCone(orthant(2), {} as never), 'second'],
    ['productCone', () => productCone(orthant(600_000), orthant(600_000)), 'second'],
    ['polarCone', () => polarCone(null as never), 'cone'],
    ['l1DescentCone', () => l1DescentCone({ n: 5, sparsity: 6 }), 'sparsity'],
    ['l1DescentCone', () => l1DescentCone({ n: 0, sparsity: 0 }), 'n'],
    ['linfDescentCone', () => linfDescentCone({ n: 5, saturated: 0 }), 'saturated'],
  ])('to %s is refused', (fn, call, parameter) => {
    expect(call).toThrow(DomainError);
    expect(call).toThrow(`${fn}: ${parameter} must be`);
  });
});
