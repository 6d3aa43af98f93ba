import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { logBeta, logBinomial, logFactorial, logGamma } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { jumpAt } from './threshold.ts';

const INFINITY = Number.POSITIVE_INFINITY;
const positive = fc
  .double({ min: -6, max: 15, noNaN: true })
  .map((exponent) => Math.exp(exponent * Math.LN10));

describe('logBeta', () => {
  it('does not care for the order of its arguments', () => {
    fc.assert(
      fc.property(positive, positive, (a, b) => {
        expect(logBeta(a, b)).toBe(logBeta(b, a));
      }),
    );
  });

  it('obeys B(a + 1, b) = B(a, b) a/(a + b)', () => {
    fc.assert(
      fc.property(positive, positive, (a, b) => {
        const step = Math.log1p(b / a);
        const scale = 1 + Math.abs(logBeta(a, b)) + step;
        expect(Math.abs(logBeta(a + 1, b) - logBeta(a, b) + step)).toBeLessThan(2e-15 * scale);
      }),
    );
  });

  it('is log of 1/a for b = 1', () => {
    fc.assert(
      fc.property(positive, (a) => {
        expect(Math.abs(logBeta(a, 1) + Math.log(a))).toBeLessThan(
          9e-16 * Math.max(1, Math.abs(Math.log(a))),
        );
      }),
    );
    expect(logBeta(1, 1)).toBe(0);
    expect(logBeta(0.5, 0.5)).toBeCloseTo(Math.log(Math.PI), 15);
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    const ordinary = fc.double({ min: 1, max: 10, noNaN: true });
    fc.assert(
      fc.property(ordinary, ordinary, (a, b) => {
        expect(Math.abs(jstat.betaln(a, b) - logBeta(a, b))).toBeLessThan(2e-11);
      }),
    );
  });

  it('joins where the method changes', () => {
    for (const b of [8.5, 300, 1e9]) {
      expect(jumpAt((a) => logBeta(a, b), 8)).toBeLessThanOrEqual(6);
      expect(jumpAt((a) => logBeta(a, b), 1)).toBeLessThanOrEqual(8);
    }
  });

  it('meets its limits', () => {
    expect(logBeta(3, INFINITY)).toBe(-INFINITY);
    expect(logBeta(INFINITY, INFINITY)).toBe(-INFINITY);
    expect(logBeta(1e308, 1e308) / 1e308).toBeCloseTo(-2 * Math.LN2, 14);
    expect(logBeta(5e-324, 5e-324)).toBeCloseTo(Math.LN2 - Math.log(5e-324), 12);
    expect(logBeta(5e-324, 1e308)).toBeCloseTo(-Math.log(5e-324), 12);
  });

  it('refuses arguments that are not positive', () => {
    expect(() => logBeta(0, 1)).toThrow('logBeta: a must be a number > 0, got 0');
    expect(() => logBeta(1, -1)).toThrow('logBeta: b must be a number > 0, got -1');
    expect(() => logBeta(NaN, 1)).toThrow(DomainError);
    expect(() => logBeta(1, undefined as unknown as number)).toThrow(DomainError);
  });
});

describe('logBinomial', () => {
  it('is the log of the exact integer up to n = 50', () => {
    let row = [1n];
    for (let n = 0; n <= 50; n++) {
      row.forEach((coefficient, k) => {
        expect(logBinomial(n, k)).toBe(Math.log(Number(coefficient)));
      });
      row = [1n, ...row.slice(1).map((c, i) => c + (row[i] as bigint)), 1n];
    }
  });

  it('is symmetric where n - k is exact', () => {
    fc.assert(
      fc.property(fc.maxSafeNat(), fc.maxSafeNat(), (p, q) => {
        const n = Math.max(p, q);
        const k = Math.min(p, q);
        expect(logBinomial(n, k)).toBe(logBinomial(n, n - k));
      }),
    );
  });

  it('obeys the absorption identity k C(n, k) = n C(n - 1, k - 1)', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2, max: 1e9, noNaN: true }),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (n, share) => {
          const k = 1 + share * (n - 1);
          const left = Math.log(k) + logBinomial(n, k);
          const right = Math.log(n) + logBinomial(n - 1, k - 1);
          expect(Math.abs(left - right)).toBeLessThan(6e-15 * (1 + left));
        },
      ),
    );
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.integer({ min: 51, max: 1000 }), fc.nat(50), (n, k) => {
        expect(Math.abs(jstat.combinationln(n, k) - logBinomial(n, k))).toBeLessThan(1e-9);
      }),
    );
  });

  it('joins where the method changes', () => {
    expect(jumpAt((k) => logBinomial(1e6, k), 1)).toBeLessThanOrEqual(6);
    expect(jumpAt((k) => logBinomial(3.5, k), 1)).toBeLessThanOrEqual(8);
    expect(jumpAt((n) => logBinomial(n, 0.2), 0.5)).toBeLessThanOrEqual(10);
    expect(jumpAt((n) => logBinomial(n, 7), 50)).toBeLessThanOrEqual(6);
  });

  it('meets its ends', () => {
    expect(logBinomial(0, 0)).toBe(0);
    expect(logBinomial(5, -0)).toBe(0);
    expect(logBinomial(1e300, 1e300)).toBe(0);
    expect(logBinomial(2 ** 53, 1)).toBe(53 * Math.LN2);
    expect(logBinomial(1.7e308, 8e307)).toBeLessThan(1.7e308 * Math.LN2);
    expect(logBinomial(1e-300, 5e-301)).toBe(0);
  });

  it('refuses k outside 0..n', () => {
    expect(() => logBinomial(3, 4)).toThrow('logBinomial: k must be at most n (n is 3), got 4');
    for (const [n, k] of [
      [3, -1],
      [-1, 0],
      [INFINITY, 1],
      [NaN, 1],
      [3, NaN],
    ]) {
      expect(() => logBinomial(n as number, k as number)).toThrow(DomainError);
    }
  });
});

describe('logFactorial', () => {
  it('is the log of the exact factorial up to 22!, and goes on from there', () => {
    let factorial = 1;
    for (let n = 0; n <= 22; n++) {
      factorial *= n || 1;
      expect(logFactorial(n)).toBe(Math.log(factorial));
    }
    fc.assert(
      fc.property(fc.maxSafeNat(), (n) => {
        fc.pre(n < Number.MAX_SAFE_INTEGER);
        const error = Math.abs(logFactorial(n) - logGamma(n + 1));
        expect(error).toBeLessThanOrEqual(6e-16 * logFactorial(n));
      }),
    );
    expect(logFactorial(Number.MAX_SAFE_INTEGER)).toBe(logGamma(2 ** 53));
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 1e6 }), (n) => {
        expect(Math.abs(jstat.factorialln(n) / logFactorial(n) - 1)).toBeLessThan(1e-12);
      }),
    );
  });

  it('refuses what is no integer of its range', () => {
    for (const bad of [-1, 0.5, 2 ** 53 + 2, INFINITY, NaN, '3']) {
      expect(() => logFactorial(bad as number)).toThrow(DomainError);
    }
    expect(() => logFactorial(1.5)).toThrow('logFactorial: n must be an integer >= 0, got 1.5');
  });
});
