import fc from 'fast-check';
import {
  LogNumber,
  nextPointInHull,
  originInHull,
  pointInHull,
  queriesInHull,
  smallest,
} from 'hullgauge';
import { logNormalCdf, normalCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { FixedQuerySequence } from '../../src/numeric/fixed-query.ts';

describe('pointInHull', () => {
  it('is the chance of points on both sides, on the line', () => {
    for (const n of [2, 10, 1e4]) {
      for (const r of [0.1, 1, 3.5]) {
        const p = pointInHull({ n, d: 1, mahalanobisDistance: r });
        const beyond = n * normalCdf(r).logComplement;
        const outside = n * logNormalCdf(r);
        const log = outside + Math.log1p(Math.exp(beyond - outside));
        expect(Math.abs(p.logComplement - log)).toBeLessThan(1e-13 * Math.max(1, -log));
      }
    }
  });

  it('is Wendel at the mean, and nearly so beside it', () => {
    const args = { n: 50, d: 20 };
    const centre = originInHull(args);
    expect(pointInHull({ ...args, mahalanobisDistance: 0 })).toEqual(centre);
    const beside = pointInHull({ ...args, mahalanobisDistance: 1e-9 });
    expect(Math.abs(beside.logComplement - centre.logComplement)).toBeLessThan(2e-13);
  });

  it('is exactly 0 up to d points', () => {
    for (const n of [0, 1, 5]) {
      expect(pointInHull({ n, d: 5, mahalanobisDistance: 1 }).value === 0).toBe(true);
    }
  });

  it('falls like the normal density of the query, as far as distances go', () => {
    for (const [n, d] of [
      [250_000, 500],
      [1e6, 3],
      [LogNumber.fromLog(800), 1000],
    ] as const) {
      let last = 0;
      for (const r of [1e3, 1e4, 1e5, 1e6]) {
        const { log, logError } = pointInHull({ n, d, mahalanobisDistance: r });
        expect(log).toBeLessThan(last);
        // what is left grows with d log(r) only
        expect(Math.abs(log + 0.5 * r * r)).toBeLessThan(60 * d + 1000);
        expect(logError).toBeLessThan(1e-15 * r * r + 1e-9);
        last = log;
      }
    }
  });

  it('has terms of mass 1/2 on each parity', () => {
    const error = new Float64Array(1);
    for (const [n, r] of [
      [5, 0.3],
      [6, 1],
      [7, 4],
      [30, 2],
      [100, 1.5],
    ] as const) {
      const sequence = new FixedQuerySequence(n, Math.log(n), r);
      const sums = [0, 0];
      for (let k = 0; k <= n; k++) {
        sums[k % 2] = (sums[k % 2] as number) + Math.exp(sequence.logTerm(k, error));
      }
      for (const sum of sums) expect(Math.abs(sum - 0.5)).toBeLessThan(3e-14);
    }
  });

  it('averages over the distances of Gaussian queries to nextPointInHull', () => {
    for (const [n, d, scale] of [
      [20, 3, 1],
      [60, 10, 1.5],
      [15, 5, 0.5],
    ] as const) {
      let sum = 0;
      let weights = 0;
      const step = 0.2;
      for (let s = step; s < 12; s += step) {
        const weight = Math.exp((d - 1) * Math.log(s) - 0.5 * s * s);
        if (weight < 1e-18) continue;
        weights += weight;
        sum += weight * pointInHull({ n, d, mahalanobisDistance: scale * s }).value;
      }
      const exact = nextPointInHull({ n, d, queryScale: scale }).value;
      expect(Math.abs(sum / weights - exact)).toBeLessThan(d % 2 === 1 ? 1e-14 : 1e-7);
    }
  });

  it('falls with the distance and with d, and rises with n', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 12 }),
        fc.integer({ min: 1, max: 300 }),
        fc.double({ min: 0.01, max: 5, noNaN: true }),
        fc.double({ min: 1.05, max: 2, noNaN: true }),
        (d, extra, r, growth) => {
          const args = { n: d + extra, d, mahalanobisDistance: r };
          const p = pointInHull(args);
          const slack = 4 * p.logError + 1e-13;
          const farther = pointInHull({ ...args, mahalanobisDistance: growth * r });
          const more = pointInHull({ ...args, n: Math.ceil(growth * args.n) });
          const higher = pointInHull({ ...args, d: d + 1 });
          expect(farther.log - p.log).toBeLessThanOrEqual(slack);
          expect(p.log - more.log).toBeLessThanOrEqual(slack);
          expect(higher.log - p.log).toBeLessThanOrEqual(slack);
          expect(Math.abs(p.value + p.complement - 1)).toBeLessThan(4e-16);
        },
      ),
      { numRuns: 25 },
    );
  });

  it('holds far out and for counts beyond doubles', () => {
    const far = pointInHull({ n: 100, d: 3, mahalanobisDistance: 1000 });
    expect(far.log).toBeLessThan(-500_000);
    expect(far.log).toBeGreaterThan(-500_100);
    expect(far.logError).toBeLessThan(1e-9);
    const many = pointInHull({ n: LogNumber.fromLog(800), d: 5, mahalanobisDistance: 41 });
    expect(many.log).toBeCloseTo(-53.27756832547, 9);
    // nearly every point would have to be missing: only the order of magnitude of the logarithm is known
    const crowd = pointInHull({ n: 1e15, d: 3, mahalanobisDistance: 1 });
    expect(crowd.logComplement / (1e15 * logNormalCdf(1))).toBeCloseTo(1, 12);
    const certain = pointInHull({ n: LogNumber.fromLog(1e5), d: 3, mahalanobisDistance: 1 });
    expect([certain.complement, certain.logError]).toEqual([0, Number.POSITIVE_INFINITY]);
  });

  it('is inverted like every question', () => {
    const answer = smallest(pointInHull, 'n', { d: 5, mahalanobisDistance: 2 }, 0.5);
    expect(answer.exact).toBe(true);
    const at = (n: number): number => pointInHull({ n, d: 5, mahalanobisDistance: 2 }).value;
    expect(at(answer.value) >= 0.5 && at(answer.value - 1) < 0.5).toBe(true);
  });
});

describe('queriesInHull', () => {
  it('of equal queries is that of one, ties included', () => {
    for (const mahalanobisDistance of [0, 1.5]) {
      const one = pointInHull({ n: 6, d: 3, mahalanobisDistance });
      const mahalanobisDistances = [mahalanobisDistance, mahalanobisDistance, mahalanobisDistance];
      expect(queriesInHull({ n: 6, d: 3, mahalanobisDistances })).toEqual(one);
    }
  });

  it('is the mean of its queries, in both tails', () => {
    const args = { n: 200, d: 4 };
    const distances = [0, 1, 1, 4.5];
    const all = distances.map((r) => pointInHull({ ...args, mahalanobisDistance: r }));
    const p = queriesInHull({ ...args, mahalanobisDistances: new Float64Array(distances) });
    expect(p.value).toBeCloseTo(all.reduce((s, q) => s + q.value, 0) / 4, 15);
    expect(p.complement).toBeCloseTo(all.reduce((s, q) => s + q.complement, 0) / 4, 15);
    expect(p.logError).toBeLessThan(1e-12);
    const tail = queriesInHull({ n: 50, d: 3, mahalanobisDistances: [40, 60] });
    const one = pointInHull({ n: 50, d: 3, mahalanobisDistance: 40 });
    expect(tail.log).toBeCloseTo(one.log - Math.LN2, 10);
  });

  it('refuses what is no list of distances', () => {
    for (const mahalanobisDistances of [[], [1, -1], [Number.NaN], 3, null, ['1']]) {
      const ask = (): unknown => queriesInHull({ n: 9, d: 2, mahalanobisDistances } as never);
      expect(ask).toThrow(/mahalanobisDistances/);
    }
  });
});
