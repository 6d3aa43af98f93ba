import fc from 'fast-check';
import { DomainError, Probability, surroundTime } from 'hullgauge';
import { logNormalCdf, millsRatio, normalCdf, normalQuantile } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { logNormalCdfKernel, normalQuantileOfLog } from '../../src/special/normal.ts';
import { elementaryCases } from '../accuracy/special-elementary.ts';
import { violations } from '../support/accuracy.ts';
import { difference } from '../support/reference.ts';
import { ulpDistance } from '../support/ulp.ts';
import { jumpAt, largestDrop } from './threshold.ts';

const INFINITY = Number.POSITIVE_INFINITY;
const reals = fc.double({ min: -37, max: 37, noNaN: true });

describe('normalCdf', () => {
  it('is symmetric field by field', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-300, max: 1e10, noNaN: true }), (x) => {
        const below = normalCdf(-x);
        const above = normalCdf(x);
        expect([above.value, above.complement, above.log, above.logComplement]).toEqual([
          below.complement,
          below.value,
          below.logComplement,
          below.log,
        ]);
        expect(above.logError).toBe(below.logError);
      }),
    );
  });

  it('has fields that agree with each other and with logNormalCdf', () => {
    fc.assert(
      fc.property(reals, (x) => {
        const p = normalCdf(x);
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThanOrEqual(2 ** -53);
        expect(Math.abs(Math.log(p.value) - p.log)).toBeLessThanOrEqual(
          6e-16 * (1 + Math.abs(p.log)),
        );
        expect(Math.abs(logNormalCdf(x) - p.log)).toBeLessThanOrEqual(9e-16 * Math.abs(p.log));
        expect(Math.abs(logNormalCdf(-x) - p.logComplement)).toBeLessThanOrEqual(
          9e-16 * Math.abs(p.logComplement),
        );
      }),
    );
  });

  it('has the density as its slope', () => {
    fc.assert(
      fc.property(fc.double({ min: -36, max: 2, noNaN: true }), (x) => {
        // d log Phi / dx = 1/M(-x)
        const h = 1e-5 * Math.max(1, Math.abs(x));
        const slope = (normalCdf(x + h).log - normalCdf(x - h).log) / (2 * h);
        expect(slope * millsRatio(-x)).toBeCloseTo(1, 6);
      }),
    );
  });

  it('states an error that covers the true error of the smaller log', () => {
    for (const { args, exact } of elementaryCases('logNormalCdf')) {
      const x = Number(args[0]);
      if (x > 0) continue;
      const p = normalCdf(x);
      expect(Math.abs(difference(p.log, exact))).toBeLessThanOrEqual(p.logError);
      expect(p.logError).toBeLessThan(1e-15 * (1 - p.log));
    }
  });

  it('meets its limits', () => {
    const half = normalCdf(0);
    expect([half.value, half.complement, half.log, half.logComplement]).toEqual([
      0.5,
      0.5,
      -Math.LN2,
      -Math.LN2,
    ]);
    expect(normalCdf(-0).toJSON()).toEqual(half.toJSON());
    expect(`${normalCdf(INFINITY)} ${normalCdf(-INFINITY)}`).toBe('1 0');
    expect(normalCdf(INFINITY).logError).toBe(0);
    // the logarithm itself is beyond the doubles
    expect(normalCdf(-1e200).log).toBe(-INFINITY);
    expect(normalCdf(-1e200).logError).toBe(INFINITY);
    expect(normalCdf(-1e150).log).toBeCloseTo(-5e299, -286);
    expect(normalCdf(5e-324).value).toBe(0.5);
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 8, noNaN: true }), (x) => {
        expect(Math.abs(jstat.normal.cdf(x, 0, 1) / normalCdf(x).value - 1)).toBeLessThan(1e-10);
      }),
    );
  });

  it('refuses NaN', () => {
    expect(() => normalCdf(NaN)).toThrow('normalCdf: x must be a number, got NaN');
    expect(() => normalCdf(undefined as unknown as number)).toThrow(DomainError);
  });
});

describe('logNormalCdf', () => {
  it('joins where the method changes, rises and meets its limits', () => {
    expect(jumpAt(logNormalCdf, 0)).toBeLessThanOrEqual(3);
    expect(jumpAt(logNormalCdf, -0.7)).toBeLessThanOrEqual(5);
    expect(jumpAt(logNormalCdf, 0.7)).toBeLessThanOrEqual(5);
    expect(largestDrop(logNormalCdf, -5, 5)).toBeLessThan(1e-15);
    expect(logNormalCdf(INFINITY)).toBe(0);
    expect(logNormalCdf(40)).toBe(0);
    expect(logNormalCdf(-INFINITY)).toBe(-INFINITY);
    expect(logNormalCdf(-1e155)).toBe(-INFINITY);
    expect(() => logNormalCdf(NaN)).toThrow(DomainError);
  });
});

describe('normalQuantile', () => {
  it('undoes normalCdf through both tails, out to 1e5', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e5, max: 1e5, noNaN: true }), (x) => {
        const error = Math.abs(normalQuantile(normalCdf(x)) - x);
        // near 0 the probability is known up to 2^-54 only
        expect(error).toBeLessThanOrEqual(7e-16 * Math.abs(x) + 3e-16);
      }),
    );
    fc.assert(
      fc.property(fc.double({ min: -8, max: 8, noNaN: true }), (x) => {
        const error = Math.abs(normalQuantile(normalCdf(x)) - x);
        expect(error).toBeLessThanOrEqual(7e-16 * Math.abs(x) + 3e-16);
      }),
    );
  });

  it('is undone by normalCdf', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-300, max: 1, maxExcluded: true, noNaN: true }), (p) => {
        const x = normalQuantile(p);
        const back = normalCdf(x);
        const tail = Math.min(p, 1 - p);
        // the rounding of x alone moves the tail by |x| phi(x) eps
        const error = Math.abs((p < 0.5 ? back.value : back.complement) - tail);
        expect(error).toBeLessThanOrEqual(1e-15 * tail * (1 + x * x));
      }),
    );
  });

  it('is antisymmetric, and the same from a number as from a Probability', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 2 ** 30 - 1 }), (k) => {
        const p = k / 2 ** 30;
        expect(normalQuantile(1 - p)).toBe(-normalQuantile(p) + 0);
        const fromValue = normalQuantile(Probability.fromValue(p));
        expect(ulpDistance(fromValue, normalQuantile(p))).toBeLessThanOrEqual(2);
        expect(normalQuantile(Probability.fromComplement(p))).toBe(-fromValue + 0);
      }),
    );
  });

  it('joins where the method changes and rises', () => {
    for (const p of [0.2, 0.8]) expect(jumpAt(normalQuantile, p)).toBeLessThanOrEqual(6);
    // s = 8 of the start value
    for (const t of [-1.6, -0.223, -32]) {
      expect(jumpAt(normalQuantileOfLog, t)).toBeLessThanOrEqual(8);
    }
    expect(jumpAt(normalQuantileOfLog, -1e20)).toBeLessThanOrEqual(2);
    expect(largestDrop(normalQuantile, 1e-4, 1 - 1e-4)).toBeLessThan(7e-16);
    expect(largestDrop(normalQuantileOfLog, -100, -1e-3)).toBeLessThan(7e-16);
  });

  it('meets its limits', () => {
    expect(normalQuantile(0)).toBe(-INFINITY);
    expect(normalQuantile(1)).toBe(INFINITY);
    expect(normalQuantile(0.5)).toBe(0);
    expect(normalQuantile(-0)).toBe(-INFINITY);
    expect(normalQuantile(Probability.fromValue(0.5))).toBe(0);
    expect(normalQuantile(Probability.fromLog(-INFINITY))).toBe(-INFINITY);
    expect(normalQuantile(Probability.fromLog(0))).toBe(INFINITY);
    expect(normalQuantile(Probability.fromLogComplement(-5e9))).toBeCloseTo(1e5, 3);
    expect(normalQuantile(normalCdf(-INFINITY))).toBe(-INFINITY);
    expect(normalQuantile(normalCdf(INFINITY))).toBe(INFINITY);
  });

  it('refuses numbers outside [0, 1] and what is no probability', () => {
    for (const bad of [-1e-300, 1.0000000000000002, NaN, '0.5', undefined, { kind: 'logNumber' }]) {
      expect(() => normalQuantile(bad as number)).toThrow(DomainError);
    }
    const half = {
      kind: 'probability',
      value: 0.5,
      complement: 0.5,
      log: -0.7,
      logComplement: -0.7,
    };
    for (const field of ['value', 'complement', 'log', 'logComplement']) {
      for (const bad of [NaN, 2, undefined, '-Infinity']) {
        const forged = { ...half, [field]: bad } as unknown as Probability;
        for (const quantile of [normalQuantile, surroundTime({ d: 3 }).quantile]) {
          expect(() => quantile(forged)).toThrow(DomainError);
        }
      }
    }
    expect(() => normalQuantile(2)).toThrow(
      'normalQuantile: p must be a number from 0 to 1 or a Probability, got 2',
    );
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 0.499, noNaN: true }), (p) => {
        expect(Math.abs(jstat.normal.inv(p, 0, 1) / normalQuantile(p) - 1)).toBeLessThan(2e-12);
      }),
    );
  });
});

describe('normalQuantileOfLog', () => {
  it('keeps its relative accuracy through the median and out to -1e300', () => {
    const cases = elementaryCases('normalQuantileOfLog');
    const check = {
      name: 'normalQuantileOfLog',
      cases,
      compute: normalQuantileOfLog,
      measure: 'relative',
      bound: 7e-16,
    } as const;
    expect(cases.length).toBeGreaterThan(70);
    expect(violations(check)).toEqual([]);
  });

  it('undoes logNormalCdf from -1e150 to 37', () => {
    for (const x of [
      -1e150, -1e100, -1e11, -1e10, -1e9, -1e5, -300, -40, -8, -1, 1e-3, 5, 20, 37,
    ]) {
      const error = Math.abs(normalQuantileOfLog(logNormalCdfKernel(x)) / x - 1);
      expect(error).toBeLessThan(x === 1e-3 ? 1e-12 : 9e-16);
    }
  });

  it('never gives NaN at the ends', () => {
    expect(normalQuantileOfLog(-INFINITY)).toBe(-INFINITY);
    expect(normalQuantileOfLog(0)).toBe(INFINITY);
    expect(normalQuantileOfLog(-Number.MAX_VALUE) / -1.8961503816218355e154).toBeCloseTo(1, 14);
    expect(normalQuantileOfLog(-5e-324)).toBeCloseTo(38.4674, 3);
  });
});
