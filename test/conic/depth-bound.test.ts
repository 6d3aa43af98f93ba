import fc from 'fast-check';
import { DomainError, LogNumber, originInHull, originInHullLowerBound, smallest } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { difference, type NamedRow, readTable, relativeError } from '../support/reference.ts';

const cases = fc.record({
  d: fc.integer({ min: 1, max: 60 }),
  extra: fc.integer({ min: 1, max: 400 }),
  depth: fc.double({ min: 0.01, max: 0.5, noNaN: true }),
});

/** Bound B on P(not surrounded) in exact integers for depth = m/64. */
function exactBoundB(n: number, d: number, m: number): number {
  const choose = (top: number, k: number): bigint => {
    let c = 1n;
    for (let i = 0; i < k; i++) c = (c * BigInt(top - i)) / BigInt(i + 1);
    return c;
  };
  const [a, b] = [BigInt(m), BigInt(64 - m)];
  let sum = choose(n - 1, d - 1) * a ** BigInt(n);
  for (let k = 0; k < d; k++) sum += choose(n, k) * a ** BigInt(k) * b ** BigInt(n - k);
  const bits = 6 * n;
  return Number((sum << 80n) >> BigInt(bits)) / 2 ** 80;
}

describe('the bounds', () => {
  it('equal Wendel at depth 1/2 in general position', () => {
    fc.assert(
      fc.property(cases, ({ d, extra }) => {
        const n = d + extra;
        const bound = originInHullLowerBound({ n, d, depth: 0.5, generalPosition: true });
        expect(bound).toEqual(originInHull({ n, d }));
      }),
    );
  });

  it('approach Wendel continuously, on both sides of the small tail', () => {
    for (const [n, d] of [
      [12, 5],
      [40, 5],
      [30, 25],
      [100, 80],
    ] as const) {
      const near = originInHullLowerBound({ n, d, depth: 0.5 - 1e-13, generalPosition: true });
      const wendel = originInHull({ n, d });
      expect(near.value / wendel.value).toBeCloseTo(1, 10);
      expect(near.complement / wendel.complement).toBeCloseTo(1, 10);
    }
  });

  it('B is no smaller than A, neither exceeds Wendel, and both grow with the depth', () => {
    fc.assert(
      fc.property(cases, ({ d, extra, depth }) => {
        const n = d + extra;
        const a = originInHullLowerBound({ n, d, depth });
        const b = originInHullLowerBound({ n, d, depth, generalPosition: true });
        const deeper = originInHullLowerBound({
          n,
          d,
          depth: Math.min(0.5, depth * 1.05),
          generalPosition: true,
        });
        const wendel = originInHull({ n, d });
        const slack = 1e-12;
        expect(a.log).toBeLessThanOrEqual(b.log + slack);
        expect(b.log).toBeLessThanOrEqual(wendel.log + slack);
        expect(b.log).toBeLessThanOrEqual(deeper.log + slack);
        expect(Math.abs(b.value + b.complement - 1)).toBeLessThanOrEqual(2.3e-16);
      }),
    );
  });

  it('B meets exact integers on both sides, within its stated error', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 12 }),
        fc.integer({ min: 1, max: 30 }),
        fc.integer({ min: 3, max: 31 }),
        (d, extra, m) => {
          const n = d + extra;
          const bound = originInHullLowerBound({ n, d, depth: m / 64, generalPosition: true });
          const outside = exactBoundB(n, d, m);
          expect(Math.abs(bound.complement - outside)).toBeLessThanOrEqual(1e-14 * outside + 1e-24);
          const inside = 1 - outside;
          expect(Math.abs(bound.value - inside)).toBeLessThanOrEqual(1e-14 * inside + 2e-16);
          expect(bound.logError).toBeLessThan(
            6e-15 * (2 - Math.min(bound.log, bound.logComplement)),
          );
        },
      ),
    );
  });

  it('matches the plane case (1 - a)^n + a^n at d = 1', () => {
    const p = originInHullLowerBound({ n: 30, d: 1, depth: 0.25, generalPosition: true });
    expect(p.complement / (0.75 ** 30 + 0.25 ** 30)).toBeCloseTo(1, 14);
  });
});

describe('sizes', () => {
  it('meet the reference sizes of bound B', () => {
    const rows = readTable<NamedRow>('conic').filter(
      (row) => row.quantity === 'depth.n_sufficient_B',
    );
    expect(rows.length).toBeGreaterThan(0);
    for (const { args, value } of rows) {
      const { d, alpha, q } = args as { d: number; alpha: string; q: string };
      const answer = smallest(
        originInHullLowerBound,
        'n',
        { d, depth: Number(alpha), generalPosition: true },
        { complementAtMost: Number(q) },
      );
      expect([answer.value, answer.exact]).toEqual([Number(value), true]);
    }
  });
});

describe('bound B for many points', () => {
  // mpmath 1.2 at 90 digits, the incomplete beta function by quadrature
  it.each([
    [7403, 1035, 0.10374347573703413, '1.3881063924688790506e-22'],
    [56451205, 14265482, 0.2525415200056971, '0.0023958096948356072298'],
    [77384721870362, 25523631780216, 0.32982739919667764, '1.347487416949568368e-13'],
    [1651318025000815, 688245200426127, 0.41678532846728916, '0.000091247217940241389209'],
  ])('keeps its digits at n = %d, d = %d, depth %d', (n, d, depth, exact) => {
    const p = originInHullLowerBound({ n, d, depth, generalPosition: true });
    expect(relativeError(p.value, exact)).toBeLessThan(4e-15);
    expect(p.logError).toBeLessThan(1e-13);
  });
});

describe('edges', () => {
  it('states errors beyond 2^53 points too', () => {
    const many = originInHullLowerBound({ n: 1e308, d: 2, depth: 1e-300, generalPosition: true });
    expect(many.logError).toBeLessThan(1e-6);
    // n - d + 1 is no double here; mpmath 1.2 at 90 digits
    const args = { n: 1e17, d: 1e9, depth: 1e-8, generalPosition: true };
    const { log, logError } = originInHullLowerBound(args);
    expect(Math.abs(difference(log, '-0.6931387701529187072546'))).toBeLessThanOrEqual(logError);
    expect(logError).toBeLessThan(1e-11);
  });

  it('has the exact limits', () => {
    expect(originInHullLowerBound({ n: 3, d: 3, depth: 0.3 }).value).toBe(0);
    expect(originInHullLowerBound({ n: 3, d: 2, depth: 0 }).value).toBe(0);
    expect(originInHullLowerBound({ n: 3, d: 2, depth: 1 }).value).toBe(1);
    expect(originInHullLowerBound({ n: 0, d: 0, depth: 0.3 }).value).toBe(0);
    expect(originInHullLowerBound({ n: 1, d: 0, depth: 0.3 }).value).toBe(1);
    const many = originInHullLowerBound({ n: LogNumber.fromLog(5000), d: 3, depth: 0.1 });
    expect([many.value, many.logError]).toEqual([1, Number.POSITIVE_INFINITY]);
  });

  it('refuses a depth that cannot be', () => {
    const args = { n: 9, d: 2 };
    expect(() => originInHullLowerBound({ ...args, depth: 0.6, generalPosition: true })).toThrow(
      'originInHullLowerBound: depth must be a number from 0 to 0.5, got 0.6',
    );
    for (const depth of [Number.NaN, -0.1, 1.1, '0.3', undefined]) {
      expect(() => originInHullLowerBound({ ...args, depth: depth as number })).toThrow(
        DomainError,
      );
    }
  });
});
