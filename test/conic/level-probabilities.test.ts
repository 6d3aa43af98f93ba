import fc from 'fast-check';
import {
  approxTotalOrder,
  orthantWeights,
  reversedWeights,
  simpleTree,
  totalOrder,
} from 'hullgauge';
import { orthant, polyhedralCone, weylChamber } from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';

const sumOf = (weights: readonly number[], parity?: number): number =>
  weights.reduce((sum, w, j) => (parity === undefined || j % 2 === parity ? sum + w : sum), 0);

/** Positive and negative degrees of freedom weigh one half each, to rounding. */
function expectHalves(weights: readonly number[], digits = 14): void {
  expect(sumOf(weights)).toBeCloseTo(1, digits);
  if (weights.length > 1) expect(sumOf(weights, 0)).toBeCloseTo(0.5, digits);
  for (const w of weights) expect(w).toBeGreaterThanOrEqual(0);
}

/** The cone of ordered means, in the metric of the weights, as generators. */
function orderCone(w: readonly number[]): number[][] {
  const root = w.map((x) => Math.sqrt(x));
  const steps = w.map((_, first) => root.map((x, i) => (i >= first ? x : 0)));
  return [...steps, root.map((x) => -x)];
}

/** The cone of treatments not below the control. */
function treeCone(k: number, control: number, treatment: number): number[][] {
  const root = Array.from({ length: k }, (_, i) => Math.sqrt(i === 0 ? control : treatment));
  const single = root.slice(1).map((_, j) => root.map((x, i) => (i === j + 1 ? x : 0)));
  return [root, root.map((x) => -x), ...single];
}

const weight = fc.double({ min: 0.01, max: 100, noNaN: true });

describe('totalOrder', () => {
  it('with equal weights is the law of a sum of independent events, by exact fractions', () => {
    for (const k of [1, 2, 3, 4, 7, 20, 150]) {
      // coefficients of t (t + 1) .. (t + k - 1)
      let row = [0n, 1n];
      let factorial = 1n;
      for (let j = 1n; j < BigInt(k); j++) {
        factorial *= j + 1n;
        row = [...row.map((x, i) => x * j + (i > 0 ? (row[i - 1] as bigint) : 0n)), 1n];
      }
      totalOrder(k).forEach((w, j) => {
        const scaled = ((row[j + 1] as bigint) << 1200n) / factorial;
        const exact = Number(scaled >> 200n) * 2 ** -1000;
        if (exact > 1e-290) expect(Math.abs(w / exact - 1)).toBeLessThan(1e-14);
      });
    }
  });

  it('takes equal weights of any size for equal', () => {
    expect(totalOrder(6, [3, 3, 3, 3, 3, 3])).toEqual(totalOrder(6));
    expect(totalOrder(4)).toEqual(weylChamber('A', 4).intrinsicVolumes.slice(1));
    expect(totalOrder(1)).toEqual([1]);
    expect(totalOrder(1, [7])).toEqual([1]);
    expect(totalOrder(2, [7, 3])).toEqual([0.5, 0.5]);
    expect(Object.isFrozen(totalOrder(3, [1, 2, 3]))).toBe(true);
  });

  it('is continuous where the weights become equal', () => {
    for (const k of [3, 4]) {
      const nearly = totalOrder(
        k,
        Array.from({ length: k }, (_, i) => 1 + i * 1e-13),
      );
      totalOrder(k).forEach((w, j) => {
        expect(Math.abs((nearly[j] as number) / w - 1)).toBeLessThan(1e-12);
      });
    }
  });

  it('with unequal weights gives angles that add up, in either direction and scale', () => {
    fc.assert(
      fc.property(fc.array(weight, { minLength: 3, maxLength: 4 }), (w) => {
        const weights = totalOrder(w.length, w);
        expectHalves(weights);
        const mirrored = totalOrder(w.length, [...w].reverse());
        const scaled = totalOrder(
          w.length,
          w.map((x) => x * 1e-30),
        );
        weights.forEach((x, j) => {
          expect(mirrored[j]).toBeCloseTo(x, 14);
          expect(scaled[j]).toBeCloseTo(x, 14);
        });
      }),
    );
  });

  it('agrees with the faces of the polyhedral cone', () => {
    for (const w of [
      [1, 2, 3],
      [5, 1, 1],
      [1, 2, 3, 4],
      [10, 40, 10, 5],
      [1, 0.1, 6, 2],
    ]) {
      const cone = polyhedralCone(orderCone(w));
      expect(cone.lineality).toBe(1);
      const volumes = cone.intrinsicVolumes.slice(1);
      totalOrder(w.length, w).forEach((x, j) => {
        expect(volumes[j]).toBeCloseTo(x, 12);
      });
    }
  });

  it('keeps its digits where an angle is small', () => {
    // w_2 -> 0: the highest level of three needs two orders of almost opposite kind
    const small = totalOrder(3, [1, 1e-20, 1])[2] as number;
    expect(small / (Math.sqrt(2e-20) / (2 * Math.PI))).toBeCloseTo(1, 14);
    expectHalves(totalOrder(4, [1, 1e-90, 1e-50, 1]));
  });

  it('refuses more than four unequal groups, and what is no weight', () => {
    expect(() => totalOrder(5, [1, 1, 1, 1, 2])).toThrow(
      'totalOrder: weights must be equal for more than 4 groups (approxTotalOrder takes others), got an array of length 5',
    );
    expect(() => totalOrder(3, [1, 2])).toThrow('weights must be an array of 3 numbers');
    expect(() => totalOrder(3, [1, 0, 2])).toThrow('weights[1] must be a finite number > 0, got 0');
    expect(() => totalOrder(3, [1, 1e-200, 2])).toThrow('weights[1] must be at least');
    expect(() => totalOrder(0)).toThrow('k must be an integer');
    expect(() => totalOrder(30_001)).toThrow('k must be an integer from 1 to 30000');
  });
});

describe('approxTotalOrder', () => {
  it('agrees with exact weights within four standard errors', () => {
    const trials = 40_000;
    for (const [w, exact] of [
      [[10, 40, 10, 5], totalOrder(4, [10, 40, 10, 5])],
      [[1, 1, 1, 1, 1, 1], totalOrder(6)],
      [
        [2, 2],
        [0.5, 0.5],
      ],
    ] as const) {
      const estimate = approxTotalOrder(w, { trials, seed: 20261201 });
      expect(sumOf(estimate)).toBeCloseTo(1, 12);
      estimate.forEach((p, j) => {
        const x = exact[j] as number;
        expect(Math.abs(p - x)).toBeLessThan(4 * Math.sqrt((x * (1 - x)) / trials));
      });
    }
  });

  it('depends on nothing but its arguments', () => {
    const options = { trials: 1000, seed: 7 };
    const w = [3, 1, 4, 1, 5];
    expect(approxTotalOrder(w, options)).toEqual(approxTotalOrder(w, options));
    expect(approxTotalOrder(w, { ...options, seed: 8 })).not.toEqual(approxTotalOrder(w, options));
    expect(approxTotalOrder([4], options)).toEqual([1]);
    expect(() => approxTotalOrder(w, { trials: 0, seed: 1 })).toThrow('trials');
    expect(() => approxTotalOrder([], options)).toThrow('weights');
  });
});

describe('simpleTree', () => {
  it('has the closed forms of two and three groups', () => {
    expect(simpleTree(1)).toEqual([1]);
    fc.assert(
      fc.property(weight, weight, (control, treatment) => {
        const two = simpleTree(2, { control, treatment });
        expect(two).toEqual([0.5, 0.5]);
        const three = simpleTree(3, { control, treatment });
        const top = 0.25 + Math.asin(treatment / (control + treatment)) / (2 * Math.PI);
        expect(three[2]).toBeCloseTo(top, 14);
        expect(three[1]).toBeCloseTo(0.5, 14);
        expect(three[0]).toBeCloseTo(0.5 - top, 14);
      }),
      { numRuns: 50 },
    );
  });

  it('gives halves by parity for any number of groups', () => {
    for (const k of [4, 9, 60, 400]) {
      for (const ratio of [1e-4, 0.1, 1, 30, 1e12]) {
        expectHalves(simpleTree(k, { control: ratio, treatment: 1 }), 12);
      }
    }
  });

  it('agrees with the faces of the polyhedral cone', () => {
    for (const [control, treatment] of [
      [1, 1],
      [30, 10],
      [1, 8],
    ] as const) {
      const volumes = polyhedralCone(treeCone(4, control, treatment)).intrinsicVolumes.slice(1);
      simpleTree(4, { control, treatment }).forEach((x, j) => {
        expect(volumes[j]).toBeCloseTo(x, 12);
      });
    }
  });

  it('becomes independent with a heavy control', () => {
    const volumes = orthant(6).intrinsicVolumes;
    simpleTree(7, { control: 1e12 }).forEach((x, j) => {
      expect(x).toBeCloseTo(volumes[j] as number, 10);
    });
  });

  it('refuses what it cannot do', () => {
    expect(() => simpleTree(2001)).toThrow('k must be an integer from 1 to 2000');
    expect(() => simpleTree(3, { control: 0 })).toThrow('control must be');
    expect(() => simpleTree(3, { control: 1e-9 })).toThrow('control must be from 1e-4 to 1e12');
    expect(() => simpleTree(3, { treated: 1 } as never)).toThrow('treated');
  });
});

describe('reversedWeights', () => {
  it('is its own inverse', () => {
    for (const w of [totalOrder(7), simpleTree(5), [1], [0, 1]]) {
      expect(reversedWeights(reversedWeights(w))).toEqual(w);
    }
    expect(() => reversedWeights([0.5, 0.4])).toThrow('weights must be numbers with sum 1');
  });
});

describe('orthantWeights', () => {
  const correlation = fc.double({ min: -0.45, max: 0.9, noNaN: true });

  it('has the closed forms of one to three parameters', () => {
    expect(orthantWeights({ covariance: [[3]] })).toEqual([0.5, 0.5]);
    fc.assert(
      fc.property(correlation, correlation, correlation, (a, b, c) => {
        const two = orthantWeights({
          covariance: [
            [4, 2 * a],
            [2 * a, 1],
          ],
        });
        expect(two[2]).toBeCloseTo(0.25 + Math.asin(a) / (2 * Math.PI), 14);
        expectHalves(two);
        if (1 + 2 * a * b * c - a * a - b * b - c * c < 0.01) return;
        const three = orthantWeights({
          covariance: [
            [1, a, b],
            [a, 1, c],
            [b, c, 1],
          ],
        });
        const top = 0.125 + (Math.asin(a) + Math.asin(b) + Math.asin(c)) / (4 * Math.PI);
        expect(three[3]).toBeCloseTo(top, 13);
        expectHalves(three, 13);
      }),
    );
  });

  it('keeps the digits of small weights near correlation -1', () => {
    for (const gap of [2 ** -7, 2 ** -20, 2 ** -30]) {
      const r = gap - 1;
      const weights = orthantWeights({
        covariance: [
          [1, r],
          [r, 1],
        ],
      });
      // acos(-r) / (2 pi), the arc cosine by its half angle
      const exact = Math.asin(Math.sqrt(gap / 2)) / Math.PI;
      expect((weights[2] as number) / exact).toBeCloseTo(1, 14);
    }
  });

  it('is binomial for independent estimators, whatever their variances and order', () => {
    const covariance = [1, 4, 9, 0.01].map((v, i) => [0, 1, 2, 3].map((j) => (i === j ? v : 0)));
    orthantWeights({ covariance }).forEach((w, j) => {
      expect(w).toBeCloseTo(orthant(4).intrinsicVolumes[j] as number, 14);
    });
  });

  it('does not depend on units or the order of the parameters', () => {
    const matrix = [
      [1, 0.5, 0.25, -0.125],
      [0.5, 1, 0.375, 0],
      [0.25, 0.375, 1, 0.5],
      [-0.125, 0, 0.5, 1],
    ];
    const weights = orthantWeights({ covariance: matrix });
    expectHalves(weights, 13);
    const units = [1e-3, 1, 50, 1e4];
    const order = [2, 0, 3, 1];
    const other = order.map((i) =>
      order.map(
        (j) => ((matrix[i] as number[])[j] as number) * (units[i] as number) * (units[j] as number),
      ),
    );
    orthantWeights({ covariance: other }).forEach((w, j) => {
      expect(w).toBeCloseTo(weights[j] as number, 13);
    });
  });

  it('refuses what is no covariance', () => {
    const refuse = (covariance: unknown): (() => unknown) => {
      return () => orthantWeights({ covariance: covariance as number[][] });
    };
    const five = [0, 1, 2, 3, 4].map((i) => [0, 1, 2, 3, 4].map((j) => (i === j ? 1 : 0)));
    expect(refuse(five)).toThrow('at most 4 rows (approxPolyhedralCone takes more)');
    expect(refuse([[1, 2]])).toThrow('covariance[0] must be an array of 1 numbers');
    expect(refuse([[0]])).toThrow('covariance[0][0] must be a variance > 0, got 0');
    const skew = [
      [1, 0.5],
      [0.4, 1],
    ];
    expect(refuse(skew)).toThrow('as covariances are symmetric, got 0.5');
    const indefinite = [
      [1, 2],
      [2, 1],
    ];
    expect(refuse(indefinite)).toThrow('covariance must be a positive definite matrix');
    expect(refuse([[Number.NaN]])).toThrow('covariance[0][0] must be a finite number, got NaN');
  });
});
