import fc from 'fast-check';
import { LogNumber, originInHull } from 'hullgauge';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { errorOf } from '../support/accuracy.ts';
import { coinSum, dyadic } from '../support/exact-binomial.ts';
import { difference, readTable } from '../support/reference.ts';
import { ulpDistance } from '../support/ulp.ts';

describe('small samples', () => {
  it('value and complement are correctly rounded for n <= 54', () => {
    for (let n = 0; n <= 54; n++) {
      for (let d = 0; d <= n + 2; d++) {
        const p = originInHull({ n, d });
        const bits = Math.max(0, n - 1);
        const outside = n === 0 ? 1n : d >= n ? 1n << BigInt(bits) : coinSum(n, d);
        expect(p.complement === dyadic(outside, bits)).toBe(true);
        expect(p.value === dyadic((1n << BigInt(bits)) - outside, bits)).toBe(true);
      }
    }
  });

  it('meets exact integers for every n up to 400 and random d', () => {
    let worst = 0;
    for (let n = 55; n <= 400; n++) {
      for (const d of [1, 2, 7, n >> 2, (n >> 1) - 3, n >> 1, (n >> 1) + 5, n - 9, n - 1]) {
        const outside = coinSum(n, d);
        const p = originInHull({ n, d });
        const all = 1n << BigInt(n - 1);
        worst = Math.max(worst, ulpDistance(p.complement, dyadic(outside, n - 1)));
        worst = Math.max(worst, ulpDistance(p.value, dyadic(all - outside, n - 1)));
      }
    }
    expect(worst).toBeLessThanOrEqual(8);
  });
});

describe('edges', () => {
  it('has the exact limits', () => {
    expect(originInHull({ n: 0, d: 0 }).value).toBe(0);
    expect(originInHull({ n: 0, d: 3 }).log).toBe(Number.NEGATIVE_INFINITY);
    expect(originInHull({ n: 1, d: 0 }).value).toBe(1);
    expect(originInHull({ n: 3, d: 3 }).complement).toBe(1);
    expect(originInHull({ n: 1000, d: 999 }).value).toBe(2 ** -999);
    expect(originInHull({ n: 1000, d: 1 }).complement).toBe(2 ** -999);
    expect(originInHull({ n: 2 ** 53 - 1, d: 2 ** 53 - 2 }).log).toBeCloseTo(
      -(2 ** 53 - 2) * Math.LN2,
      0,
    );
  });

  it('is exactly one half at n = 2d, far beyond 2^53', () => {
    for (const d of [1, 2, 27, 1000, 1e9, 1e15, 2 ** 53 - 1]) {
      const p = originInHull({ n: 2 * d, d });
      expect([p.value, p.complement]).toEqual([0.5, 0.5]);
    }
    // The neighbours of the tie, where n - 1 is no double.
    const d = 2 ** 53 - 1;
    const step = 1 / Math.sqrt(Math.PI * d);
    const above = originInHull({ n: 2 * d + 2, d });
    expect((above.value - 0.5) / step).toBeCloseTo(1, 6);
  });

  it('takes counts beyond doubles', () => {
    const large = originInHull({ n: 1e300, d: 3 });
    expect(large.value).toBe(1);
    expect(large.logComplement / (-1e300 * Math.LN2)).toBeCloseTo(1, 14);
    const beyond = originInHull({ n: LogNumber.fromLog(5000), d: 40 });
    expect([beyond.value, beyond.logComplement, beyond.logError]).toEqual([
      1,
      Number.NEGATIVE_INFINITY,
      Number.POSITIVE_INFINITY,
    ]);
    expect(originInHull({ n: LogNumber.of(10), d: 3 }).value).toBe(0.91015625);
  });
});

describe('the stated error', () => {
  it('covers the true error of the log and is not much larger', () => {
    const rows = readTable<{ n: string; d: string; small: string; log: string }>('wendel');
    for (const row of rows) {
      const p = originInHull({ n: Number(row.n), d: Number(row.d) });
      const log = row.small === 'in' ? p.log : p.logComplement;
      expect(Math.abs(difference(log, row.log))).toBeLessThanOrEqual(p.logError);
      expect(p.logError).toBeLessThanOrEqual(4e-15 + 1e-15 * Math.abs(log));
    }
  });

  it('measures what it says: a lost digit fails', () => {
    const check = {
      name: '',
      cases: [],
      compute: () => 0,
      measure: 'relative',
      bound: 3e-15,
    } as const;
    expect(
      errorOf(check, { args: [], exact: '0.1', region: '' }, 0.1 * (1 + 1e-14)),
    ).toBeGreaterThan(3e-15);
  });
});

const small = fc
  .integer({ min: 1, max: 2000 })
  .chain((n) => fc.tuple(fc.constant(n), fc.integer({ min: 1, max: n })));
const large = fc
  .tuple(fc.double({ min: 4, max: 15.9, noNaN: true }), fc.double({ min: -8, max: 8, noNaN: true }))
  .map(([size, z]): [number, number] => {
    const n = Math.floor(10 ** size);
    return [n, Math.max(1, Math.min(n - 1, Math.round(n / 2 + z * Math.sqrt(n))))];
  });

describe('properties', () => {
  it('agrees with exact integers', () => {
    fc.assert(
      fc.property(small, ([n, d]) => {
        const exact = dyadic(coinSum(n, d), n - 1);
        const p = originInHull({ n, d });
        if (exact > 1e-290) expect(Math.abs(p.complement / exact - 1)).toBeLessThan(3e-15);
      }),
    );
  });

  it('P_out(n, d) + P_out(n, n - d) = 1, to the last bit of each tail', () => {
    fc.assert(
      fc.property(fc.oneof(small, large), ([n, d]) => {
        const p = originInHull({ n, d });
        const q = originInHull({ n, d: n - d });
        expect([p.value, p.log]).toEqual([q.complement, q.logComplement]);
      }),
    );
  });

  it('obeys 2 P(n, d) = P(n - 1, d) + P(n - 1, d - 1)', () => {
    fc.assert(
      fc.property(fc.oneof(small, large), ([n, d]) => {
        fc.pre(n > 2 && d > 1);
        const [p, a, b] = [
          originInHull({ n, d }),
          originInHull({ n: n - 1, d }),
          originInHull({ n: n - 1, d: d - 1 }),
        ];
        for (const side of ['value', 'complement'] as const) {
          const mean = (a[side] + b[side]) / 2;
          expect(Math.abs(p[side] - mean)).toBeLessThanOrEqual(1e-14 * mean + 1e-305);
        }
      }),
    );
  });

  it('rises with n and falls with d', () => {
    fc.assert(
      fc.property(large, ([n, d]) => {
        const p = originInHull({ n, d });
        const q = originInHull({ n: n + 1, d });
        const r = originInHull({ n, d: d + 1 });
        const slack = 1 + 8e-15;
        expect(q.value).toBeGreaterThanOrEqual(p.value / slack);
        expect(q.complement).toBeLessThanOrEqual(p.complement * slack);
        expect(r.value).toBeLessThanOrEqual(p.value * slack);
        expect(r.complement).toBeGreaterThanOrEqual(p.complement / slack);
      }),
    );
  });

  it('has tails that belong together', () => {
    fc.assert(
      fc.property(fc.oneof(small, large), ([n, d]) => {
        const p = originInHull({ n, d });
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThanOrEqual(2.3e-16);
        for (const [value, log] of [
          [p.value, p.log],
          [p.complement, p.logComplement],
        ] as const) {
          if (value > 1e-290) {
            expect(Math.abs(Math.log(value) - log)).toBeLessThanOrEqual(
              4e-15 + 5e-16 * Math.abs(log),
            );
          }
        }
      }),
    );
  });
});

describe('against a general statistics package, where it may be trusted', () => {
  it('binomial.cdf to its ten decimals for n <= 1e5', () => {
    for (const [n, d] of [
      [20, 7],
      [100, 40],
      [100, 60],
      [1000, 480],
      [1e4, 5050],
      [1e5, 49900],
    ] as const) {
      const theirs = jstat.binomial.cdf(d - 1, n - 1, 0.5);
      expect(Math.abs(originInHull({ n, d }).complement - theirs)).toBeLessThan(3e-10);
    }
  });
});
