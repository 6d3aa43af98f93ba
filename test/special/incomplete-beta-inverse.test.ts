import fc from 'fast-check';
import { DomainError, Probability } from 'hullgauge';
import { incompleteBeta, incompleteBetaInverse } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);
const relative = (x: number, y: number): number => Math.abs(x / y - 1);

/** How much the logarithm of the tail changes when the smaller of x and y changes by a part of itself. */
function sensitivity(a: number, b: number, x: number, y: number, upper: boolean): number {
  const h = 1e-6;
  const log = (s: number): number => {
    const moved =
      x < y ? incompleteBeta(a, b, x * s, 1 - x * s) : incompleteBeta(a, b, 1 - y * s, y * s);
    return upper ? moved.logComplement : moved.log;
  };
  return Math.abs(log(1 + h) - log(1 - h)) / (2 * h);
}

describe('incompleteBetaInverse', () => {
  it('comes back to the tail it was given, thousands of times', () => {
    fc.assert(
      fc.property(
        fc.oneof(scaled(1e-2, 1e12), scaled(1e-4, 1e2)),
        fc.oneof(scaled(1e-2, 1e12), scaled(1e-4, 1e2)),
        fc.oneof(between(-3, -0.7), between(-700, -0.7)),
        fc.boolean(),
        (a, b, log, upper) => {
          const p = upper ? Probability.fromLogComplement(log) : Probability.fromLog(log);
          const { x, y, logX, logY } = incompleteBetaInverse(a, b, p);
          expect(x).toBeGreaterThanOrEqual(0);
          expect(y).toBeGreaterThanOrEqual(0);
          expect(x + y).toBe(1);
          expect(logX).toBeLessThanOrEqual(0);
          expect(logY).toBeLessThanOrEqual(0);
          if (Math.min(x, y) < 1e-290) return;
          expect(Math.abs(Math.log(x) - (x <= 0.5 ? logX : Math.log1p(-y)))).toBeLessThan(1e-12);
          const back = incompleteBeta(a, b, x, y);
          const backLog = upper ? back.logComplement : back.log;
          const allowed = 6e-16 * sensitivity(a, b, x, y, upper) + 4e-16 * Math.abs(log) + 2e-15;
          expect(Math.abs(backLog - log)).toBeLessThan(allowed);
        },
      ),
      { numRuns: 4000 },
    );
  });

  it('comes back to the point from its tail', () => {
    fc.assert(
      fc.property(scaled(0.3, 1e4), scaled(0.3, 1e4), between(-6, 6), (a, b, z) => {
        const w = Math.log(a / b) + z / Math.sqrt((a / (a + b)) * b);
        const e = Math.exp(-Math.abs(w));
        const [x, y] = w < 0 ? [e / (1 + e), 1 / (1 + e)] : [1 / (1 + e), e / (1 + e)];
        const p = incompleteBeta(a, b, x, y);
        fc.pre(Math.min(p.value, p.complement) > 1e-200);
        const back = incompleteBetaInverse(a, b, p);
        const spread = 1 / Math.sqrt((a / (a + b)) * b);
        const logit = Math.log(back.x / back.y) - Math.log(x / y);
        expect(Math.abs(logit)).toBeLessThan(3e-15 * Math.max(1, spread, Math.abs(w)) + 4e-16);
      }),
      { numRuns: 1000 },
    );
  });

  it('takes a number on either side of one half', () => {
    for (const p of [1e-300, 1e-20, 0.01, 0.3, 0.49999, 0.6, 0.99, 1 - 1e-12]) {
      const fromNumber = incompleteBetaInverse(3, 7, p);
      const fromProbability = incompleteBetaInverse(3, 7, Probability.fromValue(p));
      expect(fromNumber).toEqual(fromProbability);
      expect(relative(incompleteBeta(3, 7, fromNumber.x, fromNumber.y).value, p)).toBeLessThan(
        2e-15,
      );
    }
  });

  it('is exact for closed forms', () => {
    // I_x(a, 1) = x^a
    expect(relative(incompleteBetaInverse(1, 1, 1e-300).x, 1e-300)).toBeLessThan(1e-15);
    expect(relative(incompleteBetaInverse(1, 1, 0.3).x, 0.3)).toBeLessThan(1e-15);
    expect(relative(incompleteBetaInverse(2, 1, 1e-200).x, 1e-100)).toBeLessThan(1e-15);
    expect(relative(incompleteBetaInverse(4, 1, 0.0016).x, 0.2)).toBeLessThan(1e-15);
    expect(
      relative(incompleteBetaInverse(1, 2, Probability.fromComplement(1e-40)).y, 1e-20),
    ).toBeLessThan(1e-15);
    // arcsine law: I_x(1/2, 1/2) = 2/pi asin(sqrt x)
    expect(relative(incompleteBetaInverse(0.5, 0.5, 1 / 3).x, 0.25)).toBeLessThan(1e-15);
  });

  it('is one half at the centre of a symmetric law', () => {
    for (const a of [1e-3, 0.5, 7, 1e10]) {
      const half = { x: 0.5, y: 0.5, logX: -Math.LN2, logY: -Math.LN2 };
      expect(incompleteBetaInverse(a, a, 0.5)).toEqual(half);
      expect(incompleteBetaInverse(a, a, Probability.fromValue(0.5))).toEqual(half);
    }
  });

  it('returns the ends for certain events', () => {
    const zero = { x: 0, y: 1, logX: Number.NEGATIVE_INFINITY, logY: 0 };
    const one = { x: 1, y: 0, logX: 0, logY: Number.NEGATIVE_INFINITY };
    expect(incompleteBetaInverse(2, 3, 0)).toEqual(zero);
    expect(incompleteBetaInverse(2, 3, -0)).toEqual(zero);
    expect(incompleteBetaInverse(2, 3, 1)).toEqual(one);
    expect(incompleteBetaInverse(2, 3, Probability.fromLog(Number.NEGATIVE_INFINITY))).toEqual(
      zero,
    );
    expect(
      incompleteBetaInverse(2, 3, Probability.fromLogComplement(Number.NEGATIVE_INFINITY)),
    ).toEqual(one);
  });

  it('keeps the logarithm where the point underflows', () => {
    // x^a / (a B(a, b)) = e^-1000, a = 1/2, b = 4: B = 32/35
    const deep = incompleteBetaInverse(0.5, 4, Probability.fromLog(-1000));
    expect(deep.x).toBe(0);
    expect(relative(deep.logX, 2 * (-1000 + Math.log(16 / 35)))).toBeLessThan(1e-15);
    expect(deep.logY).toBe(0);
    // the other end of a law with a tiny shape: half of it is beyond 1 - e^-6e4
    const top = incompleteBetaInverse(2, 1e-5, 0.4);
    expect(top.x).toBe(1);
    expect(top.y).toBe(0);
    // (1 - x)^b / (b B(2, b)) = 0.6, b B = 1/(1 + b)
    expect(relative(top.logY, Math.log(0.6 / 1.00001) / 1e-5)).toBeLessThan(1e-11);
    expect(top.logX).toBe(0);
    // both shapes tiny: nearly all of the law is at the two ends
    expect(incompleteBetaInverse(1e-4, 1e-4, 0.25).logX).toBeCloseTo(Math.log(0.5) * 1e4, 3);
  });

  it('grows with p', () => {
    fc.assert(
      fc.property(scaled(0.01, 1e6), scaled(0.01, 1e6), between(1e-6, 0.999), (a, b, p) => {
        const low = incompleteBetaInverse(a, b, p);
        const high = incompleteBetaInverse(a, b, p * (1 + 1e-9));
        expect(high.logX).toBeGreaterThanOrEqual(low.logX);
        expect(high.logY).toBeLessThanOrEqual(low.logY);
      }),
      { numRuns: 500 },
    );
  });

  it('exchanges its shapes with its tails', () => {
    fc.assert(
      fc.property(scaled(0.05, 1e5), scaled(0.05, 1e5), between(-100, -0.7), (a, b, log) => {
        const p = incompleteBetaInverse(a, b, Probability.fromLog(log));
        const q = incompleteBetaInverse(b, a, Probability.fromLogComplement(log));
        expect([q.x, q.y, q.logX, q.logY]).toEqual([p.y, p.x, p.logY, p.logX]);
      }),
      { numRuns: 200 },
    );
  });

  it('converges at every corner of its domain', () => {
    const shapes = [1e-6, 1e-3, 0.1, 0.5, 1, 1.5, 9.99, 10, 200, 1e6, 1e15, 1e100];
    const logs = [-Math.LN2, -0.6931, -0.7, -1, -5, -40, -300, -745, -1e4, -1e8];
    for (const a of shapes) {
      for (const b of shapes) {
        for (const log of logs) {
          for (const p of [Probability.fromLog(log), Probability.fromLogComplement(log)]) {
            const { x, y, logX, logY } = incompleteBetaInverse(a, b, p);
            expect(x >= 0 && x <= 1 && y >= 0 && y <= 1 && logX <= 0 && logY <= 0).toBe(true);
          }
        }
      }
    }
  });

  it('agrees with a general package where that is right', () => {
    for (const a of [1, 2, 3, 5]) {
      for (const b of [1, 2, 4]) {
        for (const p of [0.05, 0.3, 0.7, 0.95]) {
          expect(relative(incompleteBetaInverse(a, b, p).x, jstat.ibetainv(p, a, b))).toBeLessThan(
            5e-9,
          );
        }
      }
    }
  });

  it('refuses arguments outside its domain', () => {
    for (const call of [
      () => incompleteBetaInverse(0, 1, 0.5),
      () => incompleteBetaInverse(1, -1, 0.5),
      () => incompleteBetaInverse(Number.NaN, 1, 0.5),
      () => incompleteBetaInverse(1, Number.POSITIVE_INFINITY, 0.5),
      () => incompleteBetaInverse(1, 1, 1.1),
      () => incompleteBetaInverse(1, 1, -0.1),
      () => incompleteBetaInverse(1, 1, Number.NaN),
      () => incompleteBetaInverse(1, 1, '0.5' as unknown as number),
    ]) {
      expect(call).toThrow(DomainError);
    }
  });
});
