import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { erf, erfc, erfcx, millsRatio } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { expOfMinusHalfSquare, expOfMinusSquare } from '../../src/special/error-function.ts';
import { jumpAt, largestDrop } from './threshold.ts';

const INFINITY = Number.POSITIVE_INFINITY;
const reals = fc.double({ min: -26, max: 26, noNaN: true });

describe('erf and erfc', () => {
  it('are complementary, erf odd', () => {
    fc.assert(
      fc.property(reals, (x) => {
        expect(erf(-x)).toBe(-erf(x));
        expect(Math.abs(erf(x) + erfc(x) - 1)).toBeLessThanOrEqual(3e-16);
        expect(Math.abs(erfc(x) + erfc(-x) - 2)).toBeLessThanOrEqual(5e-16);
      }),
    );
  });

  it('have the derivative 2/sqrt(pi) exp(-x^2)', () => {
    fc.assert(
      fc.property(fc.double({ min: -2, max: 25, noNaN: true }), (x) => {
        const h = 1e-4 / Math.max(1, x);
        const slope = (erfc(x - h) - erfc(x + h)) / (2 * h);
        const density = 1.1283791670955126 * expOfMinusSquare(x);
        expect(slope / density).toBeCloseTo(1, 6);
      }),
    );
  });

  it('rise and fall', () => {
    expect(largestDrop(erf, -3, 3)).toBeLessThan(4e-16);
    expect(largestDrop((x) => -erfc(x), -3, 26)).toBeLessThan(9e-16);
  });

  it('join at 1/2', () => {
    expect(jumpAt(erf, 0.5)).toBeLessThanOrEqual(4);
    expect(jumpAt(erf, -0.5)).toBeLessThanOrEqual(4);
    expect(jumpAt(erfc, 0.5)).toBeLessThanOrEqual(6);
  });

  it('meet their limits and keep tiny arguments', () => {
    expect(erf(0)).toBe(0);
    expect(erf(-0)).toBe(-0);
    expect(erf(5e-324)).toBe(5e-324);
    expect(erf(1e-300)).toBe(1.1283791670955126e-300);
    expect([erf(INFINITY), erf(-INFINITY), erf(7)]).toEqual([1, -1, 1]);
    expect([erfc(INFINITY), erfc(-INFINITY), erfc(0), erfc(28)]).toEqual([0, 2, 1, 0]);
    expect(erfc(27)).toBeGreaterThan(0);
  });

  it('agree with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 3, noNaN: true }), (x) => {
        expect(Math.abs(jstat.erf(x) / erf(x) - 1)).toBeLessThan(2e-15);
        expect(Math.abs(jstat.erfc(x) / erfc(x) - 1)).toBeLessThan(7e-11);
      }),
    );
  });

  it('refuse NaN and what is no number', () => {
    for (const f of [erf, erfc, erfcx, millsRatio]) {
      expect(() => f(NaN)).toThrow(DomainError);
      expect(() => f('1' as unknown as number)).toThrow(DomainError);
    }
    expect(() => erf(NaN)).toThrow('erf: x must be a number, got NaN');
  });
});

describe('exponentials of squares', () => {
  it('multiply like exponentials', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -1700, max: 1700 }),
        fc.integer({ min: -50, max: 50 }),
        (p, q) => {
          // (h + k)^2 = h^2 + (2 h + k) k, exact for multiples of 1/64
          const h = p / 64;
          const k = q / 64;
          const rest = Math.exp(-(2 * h + k) * k);
          fc.pre(expOfMinusSquare(h + k) > 1e-300 && expOfMinusSquare(h) > 1e-300);
          expect(expOfMinusSquare(h + k) / (expOfMinusSquare(h) * rest)).toBeCloseTo(1, 14);
        },
      ),
    );
  });

  it('halve by the square root', () => {
    fc.assert(
      fc.property(reals, (x) => {
        const half = expOfMinusHalfSquare(x);
        expect(Math.abs(half * half - expOfMinusSquare(x))).toBeLessThanOrEqual(
          1.5e-15 * expOfMinusSquare(x) + Number.MIN_VALUE,
        );
      }),
    );
  });

  it('vanish for large arguments of either sign', () => {
    for (const x of [28, -40, 1e200, INFINITY, -INFINITY]) expect(expOfMinusSquare(x)).toBe(0);
    expect(expOfMinusHalfSquare(39)).toBe(0);
    expect(expOfMinusHalfSquare(38)).toBeGreaterThan(0);
    expect(expOfMinusSquare(0)).toBe(1);
  });
});

describe('erfcx and Mills ratio', () => {
  it('satisfy erfcx(x) + erfcx(-x) = 2 exp(x^2)', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 26, noNaN: true }), (x) => {
        const sum = erfcx(x) + erfcx(-x);
        expect(Math.abs((sum * expOfMinusSquare(x)) / 2 - 1)).toBeLessThan(1.5e-15);
      }),
    );
  });

  it('solve the differential equation of the ratio', () => {
    // M'(x) = x M(x) - 1, by a central difference
    fc.assert(
      fc.property(fc.double({ min: -3, max: 30, noNaN: true }), (x) => {
        const h = 1e-4;
        const slope = (millsRatio(x + h) - millsRatio(x - h)) / (2 * h);
        expect(Math.abs(slope - (x * millsRatio(x) - 1))).toBeLessThan(1e-5 * millsRatio(x) + 1e-8);
      }),
    );
  });

  it('lie between the classical bounds', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 1e100, noNaN: true }), (x) => {
        const m = millsRatio(x);
        // x/(1 + x^2) < M < 1/x
        expect(m * x).toBeLessThan(1 + 6e-16);
        expect(m * (1 / x + x)).toBeGreaterThan(1 - 9e-16);
      }),
    );
  });

  it('fall', () => {
    expect(largestDrop((x) => -erfcx(x), 0, 14)).toBeLessThan(7e-16);
    expect(largestDrop((x) => -millsRatio(x), -4, 20)).toBeLessThan(9e-16);
  });

  it('join where the method changes and meet their limits', () => {
    expect(jumpAt(erfcx, 12)).toBeLessThanOrEqual(5);
    expect(jumpAt(erfcx, 0)).toBeLessThanOrEqual(3);
    expect(jumpAt(millsRatio, 0)).toBeLessThanOrEqual(3);
    expect([erfcx(0), erfcx(-0), erfcx(INFINITY), erfcx(-INFINITY)]).toEqual([1, 1, 0, INFINITY]);
    expect(erfcx(1e300)).toBeCloseTo(5.6418958354775628e-301, 310);
    expect(erfcx(-27)).toBe(INFINITY);
    expect([millsRatio(INFINITY), millsRatio(-INFINITY), millsRatio(-38)]).toEqual([
      0,
      INFINITY,
      INFINITY,
    ]);
    expect(millsRatio(0)).toBeCloseTo(Math.sqrt(Math.PI / 2), 15);
  });
});
