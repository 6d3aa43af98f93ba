import fc from 'fast-check';
import { originInHull, Probability, surroundTime } from 'hullgauge';
import { describe, expect, it } from 'vitest';

describe('surroundTime', () => {
  it('has the moments of a waiting time for heads, summed directly', () => {
    for (const d of [1, 2, 5, 30]) {
      const time = surroundTime({ d });
      let [total, mean, square] = [0, 0, 0];
      for (let n = d + 1; n < 40 * d + 200; n++) {
        const p = Math.exp(time.logPdf?.(n) as number);
        total += p;
        mean += n * p;
        square += n * n * p;
      }
      expect(total).toBeCloseTo(1, 13);
      expect(mean / time.mean).toBeCloseTo(1, 13);
      expect((square - mean * mean) / time.variance).toBeCloseTo(1, 10);
    }
  });

  it('steps by the probability of each size, far into both tails', () => {
    for (const [d, n] of [
      [40, 80],
      [40, 200],
      [40, 45],
      [1e6, 2e6],
      [1e9, 2.0001e9],
    ] as const) {
      const time = surroundTime({ d });
      const [before, at] = [originInHull({ n: n - 1, d }), originInHull({ n, d })];
      const step = n >= 2 * d ? before.complement - at.complement : at.value - before.value;
      expect(Math.exp(time.logPdf?.(n) as number) / step).toBeCloseTo(1, n > 1e5 ? 4 : 9);
    }
  });

  it('inverts its distribution function exactly', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 3000 }),
        fc.double({ min: -2000, max: -1e-9, noNaN: true }),
        fc.boolean(),
        (d, log, far) => {
          const target = far ? Probability.fromLogComplement(log) : Probability.fromLog(log);
          const time = surroundTime({ d });
          const n = time.quantile(target);
          const side = far ? 'logComplement' : 'log';
          const sign = far ? -1 : 1;
          expect(sign * (time.cdf(n)[side] - log)).toBeGreaterThanOrEqual(-1e-12 * Math.abs(log));
          expect(sign * (time.cdf(n - 1)[side] - log)).toBeLessThan(1e-12 * Math.abs(log));
        },
      ),
    );
  });

  it('has median 2d at every size', () => {
    for (const d of [1, 2, 40, 1e6, 1e9, 1e15])
      expect(surroundTime({ d }).quantile(0.5)).toBe(2 * d);
  });

  it('has the exact limits', () => {
    const time = surroundTime({ d: 3 });
    expect(time.cdf(3.99).value).toBe(0);
    expect(time.cdf(4).value).toBe(0.125);
    expect(time.cdf(-5).value).toBe(0);
    expect(time.cdf(Number.POSITIVE_INFINITY).value).toBe(1);
    expect(time.quantile(0)).toBe(4);
    expect(time.quantile(1)).toBe(Number.POSITIVE_INFINITY);
    // n log 2 - log((n - 1)(n - 2)/2 + n) = 1e300 and the square of that is no double
    const late = time.quantile(Probability.fromLogComplement(-1e300));
    expect(Math.abs((late * Math.LN2) / 1e300 - 1)).toBeLessThan(1e-15);
    expect(time.logPdf?.(4.5)).toBe(Number.NEGATIVE_INFINITY);
    expect(time.logPdf?.(3)).toBe(Number.NEGATIVE_INFINITY);
    const trivial = surroundTime({ d: 0 });
    expect([trivial.mean, trivial.variance, trivial.quantile(0.5), trivial.quantile(1)]).toEqual([
      1, 0, 1, 1,
    ]);
    expect([trivial.logPdf?.(1), trivial.logPdf?.(2)]).toEqual([0, Number.NEGATIVE_INFINITY]);
  });

  it('refuses what is no argument', () => {
    const time = surroundTime({ d: 3 });
    expect(() => time.cdf(Number.NaN)).toThrow('surroundTime.cdf: x must be a number, got NaN');
    expect(() => time.quantile(1.5)).toThrow('surroundTime.quantile: p must be');
    expect(() => time.logPdf?.('4' as never)).toThrow('surroundTime.logPdf');
    expect(() => surroundTime({ d: -1 })).toThrow(
      'surroundTime: d must be an integer >= 0, got -1',
    );
  });
});
