import fc from 'fast-check';
import { dichotomyCount, labelSeparability, logisticFitExists, originInHull } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { coinSum } from '../support/exact-binomial.ts';

/** Natural logarithm of a positive integer of any size. */
function logOfInteger(x: bigint): number {
  const bits = x.toString(2).length;
  const shift = Math.max(0, bits - 60);
  return Math.log(Number(x >> BigInt(shift))) + shift * Math.LN2;
}

describe('dichotomyCount', () => {
  it('is what a line can do in the plane', () => {
    // 3 points in general position: all 8; 4 points: all but the two diagonal splits
    expect(dichotomyCount({ n: 3, d: 2 }).value).toBe(8);
    expect(dichotomyCount({ n: 4, d: 2 }).value).toBe(14);
    expect(dichotomyCount({ n: 5, d: 1 }).value).toBe(10);
  });

  it('has the exact limits', () => {
    expect(dichotomyCount({ n: 0, d: 3 }).value).toBe(1);
    expect(dichotomyCount({ n: 0, d: 0, intercept: false }).value).toBe(1);
    expect(dichotomyCount({ n: 3, d: 0, intercept: false }).value).toBe(0);
    expect(dichotomyCount({ n: 3, d: 0 }).value).toBe(2);
    expect(dichotomyCount({ n: 1000, d: 2000 }).log / (1000 * Math.LN2)).toBeCloseTo(1, 15);
  });

  it('meets exact integers, on both sides of every method', () => {
    fc.assert(
      fc.property(
        fc
          .integer({ min: 1, max: 1500 })
          .chain((n) => fc.tuple(fc.constant(n), fc.integer({ min: 0, max: n + 2 }))),
        ([n, p]) => {
          const count = dichotomyCount({ n, d: p, intercept: false });
          if (p === 0) return;
          const exact = logOfInteger(2n * coinSum(n, p));
          expect(Math.abs(count.log - exact)).toBeLessThanOrEqual(2e-15 * Math.max(1, exact));
        },
      ),
      { numRuns: 300 },
    );
  });

  it('keeps its digits where 2^n and the fraction would cancel', () => {
    // log of 2 (1 + 10^15 - 1) = log(2e15)
    expect(dichotomyCount({ n: 1e15, d: 1 }).log).toBeCloseTo(Math.log(2e15), 13);
    // both methods around their meeting points
    for (const [n, p] of [
      [1e15, 300],
      [1e15, 301],
      [1e6, 301],
      [4000, 440],
      [4000, 441],
    ] as const) {
      const [a, b, c] = [0, 1, 2].map((i) => dichotomyCount({ n, d: p + i, intercept: false }).log);
      const next = dichotomyCount({ n: n + 1, d: p + 1, intercept: false }).log;
      // C(n + 1, p + 1) = C(n, p + 1) + C(n, p)
      const sum = (b as number) + Math.log1p(Math.exp((a as number) - (b as number)));
      expect(Math.abs(next / sum - 1)).toBeLessThan(2e-15);
      expect(c).toBeGreaterThan(b as number);
    }
  });
});

describe('labelSeparability and logisticFitExists', () => {
  const cases = fc.record({
    n: fc.integer({ min: 0, max: 5000 }),
    d: fc.integer({ min: 0, max: 3000 }),
    intercept: fc.boolean(),
  });

  it('are the two sides of one event, and of Wendel with the intercept counted', () => {
    fc.assert(
      fc.property(cases, ({ n, d, intercept }) => {
        const separable = labelSeparability({ n, d, intercept });
        const exists = logisticFitExists({ n, d, intercept });
        expect([separable.value, separable.log]).toEqual([exists.complement, exists.logComplement]);
        expect(exists).toEqual(originInHull({ n, d: intercept ? d + 1 : d }));
      }),
    );
  });

  it('is the count over 2^n', () => {
    fc.assert(
      fc.property(cases, ({ n, d, intercept }) => {
        const p = labelSeparability({ n, d, intercept });
        const count = dichotomyCount({ n, d, intercept });
        if (p.value === 0) return;
        expect(Math.abs(count.log - n * Math.LN2 - p.log)).toBeLessThanOrEqual(3e-15 * (1 + n));
      }),
    );
  });

  it('has the exact limits and the capacity of 2p points', () => {
    expect(labelSeparability({ n: 0, d: 5 }).value).toBe(1);
    expect(labelSeparability({ n: 6, d: 5 }).value).toBe(1);
    expect(labelSeparability({ n: 3, d: 0, intercept: false }).value).toBe(0);
    expect(labelSeparability({ n: 2 * (2 ** 52 - 1), d: 2 ** 52 - 2 }).value).toBe(0.5);
    expect(labelSeparability({ n: 80, d: 40, intercept: false }).value).toBe(0.5);
  });
});
