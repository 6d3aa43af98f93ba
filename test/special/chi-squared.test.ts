import fc from 'fast-check';
import { DomainError, Probability } from 'hullgauge';
import {
  chiSquaredCdf,
  chiSquaredQuantile,
  incompleteGamma,
  normalCdf,
  normalQuantile,
} from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const relative = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

describe('chiSquaredCdf', () => {
  it('is the incomplete gamma function at half of both arguments', () => {
    for (const [x, df] of [
      [3, 1],
      [0.5, 7],
      [1000, 900],
      [1e-300, 0.25],
    ] as const) {
      expect(chiSquaredCdf(x, df)).toEqual(incompleteGamma(df / 2, x / 2));
    }
  });

  it('is the law of a squared normal variable for one degree of freedom', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 9000 }), (k) => {
        const z = k / 256; // z^2 is exact
        const tail = normalCdf(-z);
        const p = chiSquaredCdf(z * z, 1);
        expect(relative(p.complement, 2 * tail.value)).toBeLessThan(3e-15);
        const log = Math.LN2 + tail.log;
        expect(Math.abs(p.logComplement - log)).toBeLessThan(1e-15 * (1 + Math.abs(log)));
      }),
    );
  });

  it('is exponential for two degrees of freedom', () => {
    for (const x of [1e-10, 0.5, 3, 1400]) {
      expect(relative(chiSquaredCdf(x, 2).complement, Math.exp(-x / 2))).toBeLessThan(1e-15);
    }
  });

  it('has the published critical values', () => {
    // NIST/SEMATECH e-Handbook, section 1.3.6.7.4
    for (const [df, x] of [
      [1, 3.841],
      [2, 5.991],
      [10, 18.307],
      [30, 43.773],
      [100, 124.342],
    ] as const) {
      expect(chiSquaredCdf(x, df).complement).toBeCloseTo(0.05, 4);
      expect(chiSquaredQuantile(0.95, df)).toBeCloseTo(x, 3);
    }
  });

  it('is 0 for x <= 0 and 1 at infinity, exactly', () => {
    for (const x of [0, -0, -3, Number.NEGATIVE_INFINITY]) {
      expect(chiSquaredCdf(x, 3).toJSON()).toEqual({
        kind: 'probability',
        value: 0,
        complement: 1,
        log: '-Infinity',
        logComplement: 0,
        logError: 0,
      });
    }
    expect(chiSquaredCdf(Number.POSITIVE_INFINITY, 3).complement).toBe(0);
  });

  it('agrees with a general statistics package inside its trusted box', () => {
    fc.assert(
      fc.property(between(0.1, 40), between(0, 80), (df, x) => {
        expect(Math.abs(jstat.chisquare.cdf(x, df) - chiSquaredCdf(x, df).value)).toBeLessThan(
          3e-10,
        );
      }),
    );
    fc.assert(
      fc.property(between(1, 200), between(0.001, 0.999), (df, p) => {
        expect(relative(jstat.chisquare.inv(p, df), chiSquaredQuantile(p, df))).toBeLessThan(3e-10);
      }),
    );
  });

  it('refuses arguments outside its domain', () => {
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY, 1e-300, '3', undefined]) {
      expect(() => chiSquaredCdf(1, bad as number)).toThrow(DomainError);
      expect(() => chiSquaredQuantile(0.5, bad as number)).toThrow(DomainError);
    }
    for (const bad of [Number.NaN, '1', undefined]) {
      expect(() => chiSquaredCdf(bad as number, 1)).toThrow(DomainError);
      expect(() => chiSquaredQuantile(bad as number, 1)).toThrow(DomainError);
    }
    expect(() => chiSquaredQuantile(1.5, 1)).toThrow(
      'chiSquaredQuantile: p must be a number from 0 to 1 or a Probability, got 1.5',
    );
    expect(() => chiSquaredCdf(1, 0)).toThrow(
      'chiSquaredCdf: df must be a number from 2e-300 to 2e+300, got 0',
    );
  });
});

describe('chiSquaredQuantile', () => {
  it('inverts the distribution function in both tails', () => {
    fc.assert(
      fc.property(between(0.5, 400), between(-300, -0.001), fc.boolean(), (df, log, upper) => {
        const p = upper ? Probability.fromLogComplement(log) : Probability.fromLog(log);
        const x = chiSquaredQuantile(p, df);
        fc.pre(x > 1e-290);
        const q = chiSquaredCdf(x, df);
        const found = upper ? q.logComplement : q.log;
        // a rounded x moves the logarithm by up to max(df, x)/2 half-bits
        expect(Math.abs(found - log)).toBeLessThan(4e-16 * (10 + Math.abs(log) + df + x));
      }),
      { numRuns: 1000 },
    );
  });

  it('is the square of a normal quantile for one degree of freedom', () => {
    for (const q of [0.4, 0.05, 1e-10, 1e-100, 1e-300]) {
      const z = normalQuantile(q / 2);
      expect(relative(chiSquaredQuantile(Probability.fromComplement(q), 1), z * z)).toBeLessThan(
        2e-15,
      );
    }
  });

  it('has the whole half-line as its range', () => {
    expect(chiSquaredQuantile(0, 4)).toBe(0);
    expect(chiSquaredQuantile(1, 4)).toBe(Number.POSITIVE_INFINITY);
  });
});
