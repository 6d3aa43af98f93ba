import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { logFactorial, logGamma, logGamma1p, logGammaRatio } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { logGamma1pSlope, logGammaRatioExcess } from '../../src/special/log-gamma.ts';
import { elementaryCases } from '../accuracy/special-elementary.ts';
import { type AccuracyCase, violations } from '../support/accuracy.ts';
import { ulpDistance } from '../support/ulp.ts';
import { jumpAt } from './threshold.ts';

const INFINITY = Number.POSITIVE_INFINITY;

describe('logGamma', () => {
  it('is exactly 0 at its zeros and relative around them', () => {
    expect(logGamma(1)).toBe(0);
    expect(logGamma(2)).toBe(0);
    // -gamma eps and (1 - gamma) eps to first order
    expect(logGamma(1 + 2 ** -52) / (-0.5772156649015329 * 2 ** -52)).toBeCloseTo(1, 14);
    expect(logGamma(2 + 2 ** -51) / (0.42278433509846714 * 2 ** -51)).toBeCloseTo(1, 14);
  });

  it('obeys Gamma(x + 1) = x Gamma(x)', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (x) => {
        const scale = 1 + Math.abs(logGamma(x)) + Math.abs(Math.log(x)) * (1 + x);
        expect(Math.abs(logGamma(x + 1) - logGamma(x) - Math.log(x))).toBeLessThan(6e-16 * scale);
      }),
    );
  });

  it('obeys the reflection Gamma(x) Gamma(1 - x) = pi / sin(pi x)', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.5, noNaN: true }), (x) => {
        const sum = logGamma(x) + logGamma(1 - x);
        expect(Math.abs(sum - Math.log(Math.PI / Math.sin(Math.PI * x)))).toBeLessThan(4e-15);
      }),
    );
  });

  it('agrees with a general-purpose library where that one can be trusted', () => {
    fc.assert(
      fc.property(fc.double({ min: 2.1, max: 10, noNaN: true }), (x) => {
        expect(Math.abs(jstat.gammaln(x) / logGamma(x) - 1)).toBeLessThan(1e-13);
      }),
    );
  });

  it('joins where the method changes', () => {
    expect(jumpAt(logGamma, 0.5)).toBeLessThanOrEqual(5);
    expect(jumpAt(logGamma, 2.5)).toBeLessThanOrEqual(8);
    expect(jumpAt(logGamma, 10)).toBeLessThanOrEqual(6);
  });

  it('meets its limits', () => {
    expect(logGamma(INFINITY)).toBe(INFINITY);
    expect(logGamma(1e306)).toBe(INFINITY);
    expect(logGamma(5e-324)).toBe(-Math.log(5e-324));
  });

  it('refuses 0, negative numbers and NaN', () => {
    for (const bad of [0, -0, -0.5, -INFINITY, NaN, '2', null]) {
      expect(() => logGamma(bad as number)).toThrow(DomainError);
    }
    expect(() => logGamma(-1)).toThrow('logGamma: x must be a number > 0, got -1');
  });
});

describe('logGamma1p', () => {
  it('agrees with logGamma of the sum where that is exact', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1 - 2 ** 20, max: 2 ** 24 }), (k) => {
        const x = k / 2 ** 20;
        const exact = logGamma(1 + x);
        expect(Math.abs(logGamma1p(x) - exact)).toBeLessThanOrEqual(1.2e-15 * Math.abs(exact));
      }),
    );
  });

  it('is -gamma x for tiny x of either sign, 0 at 0', () => {
    expect(logGamma1p(0)).toBe(0);
    expect(logGamma1p(-0)).toBe(0);
    expect(ulpDistance(logGamma1p(1e-300), -0.5772156649015329e-300)).toBeLessThanOrEqual(2);
    expect(ulpDistance(logGamma1p(-1e-300), 0.5772156649015329e-300)).toBeLessThanOrEqual(3);
  });

  it('joins where the method changes and meets its limits', () => {
    expect(jumpAt(logGamma1p, -0.5)).toBeLessThanOrEqual(6);
    expect(jumpAt(logGamma1p, 1.5)).toBeLessThanOrEqual(8);
    expect(logGamma1p(INFINITY)).toBe(INFINITY);
    expect(logGamma1p(-1 + 2 ** -53)).toBe(logGamma(2 ** -53));
  });

  it('refuses -1 and below', () => {
    expect(() => logGamma1p(-1)).toThrow('logGamma1p: x must be a number > -1, got -1');
    expect(() => logGamma1p(NaN)).toThrow(DomainError);
  });
});

/** Rows and the size that its error is measured against, near the zeros of the excess too. */
const excess: readonly AccuracyCase[] = elementaryCases('logGammaRatioExcess');

describe('logGammaRatio', () => {
  it('is antisymmetric: going up by a undoes going down by a', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 2 ** 30 }),
        fc.integer({ min: 1, max: 2 ** 30 }),
        (p, q) => {
          const x = p / 1024;
          const y = q / 1024;
          expect(logGammaRatio(x, y - x) + logGammaRatio(y, x - y)).toBe(0);
        },
      ),
    );
  });

  it('adds up over a chain', () => {
    const point = fc.double({ min: 0.05, max: 200, noNaN: true });
    fc.assert(
      fc.property(point, point, point, (x, a, b) => {
        const chain = logGammaRatio(x, a) + logGammaRatio(x + a, b);
        const scale = 1 + Math.abs(chain) + Math.abs(logGammaRatio(x, a));
        // x + a and a + b are rounded
        expect(Math.abs(logGammaRatio(x, a + b) - chain)).toBeLessThan(4e-15 * scale);
      }),
    );
  });

  it('is the logarithm of a product for integer steps', () => {
    expect(logGammaRatio(1e15, 1)).toBe(Math.log(1e15));
    expect(logGammaRatio(1, 1)).toBe(0);
    expect(logGammaRatio(2, 3)).toBe(Math.log(24));
    expect(logGammaRatio(1, 25)).toBeCloseTo(logFactorial(25), 12);
    expect(logGammaRatio(5, 0)).toBe(0);
    expect(logGammaRatio(0.5, -0)).toBe(0);
  });

  it('joins where the method changes', () => {
    for (const a of [1e-8, 0.3, 1.7, 5.5, 40.25]) {
      const f = (x: number): number => logGammaRatio(x, a);
      for (const threshold of [0.125, 6, 7, 8 - a]) {
        if (threshold > 0.1) expect(jumpAt(f, threshold) * 2 ** -53).toBeLessThan(4e-15);
      }
    }
    // a = x: from a/x < 1 to a/x > 1
    expect(jumpAt((a) => logGammaRatio(20, a), 20)).toBeLessThanOrEqual(6);
    expect(jumpAt((a) => logGammaRatio(3, a), 3)).toBeLessThanOrEqual(8);
  });

  it('stays finite or overflows, but never gives NaN', () => {
    expect(logGammaRatio(1e308, 1e308)).toBe(INFINITY);
    expect(logGammaRatio(1e308, -9e307)).toBe(-INFINITY);
    expect(logGammaRatio(5e-324, 1e308)).toBe(INFINITY);
    expect(logGammaRatio(5e-324, 1)).toBe(Math.log(5e-324));
    expect(logGammaRatio(5e-324, 0.5)).toBeCloseTo(Math.log(Math.sqrt(Math.PI)) - 744.44, 1);
    expect(logGammaRatio(5e-324, 5e-324)).toBeCloseTo(-Math.LN2, 15);
    expect(logGammaRatio(1e300, 1e-300)).toBeCloseTo(0, 290);
  });

  it('refuses arguments out of the domain', () => {
    expect(() => logGammaRatio(2, -2)).toThrow(
      'logGammaRatio: a must be above -x (x is 2), got -2',
    );
    for (const [x, a] of [
      [0, 1],
      [-1, 3],
      [INFINITY, 1],
      [1, INFINITY],
      [NaN, 1],
      [1, NaN],
    ]) {
      expect(() => logGammaRatio(x as number, a as number)).toThrow(DomainError);
    }
  });
});

describe('logGammaRatioExcess', () => {
  it('has full relative accuracy for a < 1/2', () => {
    const check = {
      name: 'logGammaRatioExcess',
      cases: excess.filter(({ args: [, a] }) => Math.abs(Number(a)) < 0.5),
      compute: logGammaRatioExcess,
      measure: 'relative',
      bound: 2e-15,
    } as const;
    expect(check.cases.length).toBeGreaterThan(50);
    expect(violations(check)).toEqual([]);
  });

  it('loses nothing against its terms elsewhere', () => {
    const check = {
      name: 'logGammaRatioExcess',
      cases: excess,
      compute: logGammaRatioExcess,
      measure: 'relative',
      // its terms are of size a or a |log x|, and it vanishes at a = 1 and a = 0
      scale: ({ args, exact }: AccuracyCase) => {
        const [x, a] = args as readonly [number, number];
        const terms = Math.abs(a) * Math.min(1, 1 / x) * (1 + Math.max(0, -Math.log(x)));
        return Math.max(1, terms / Math.abs(Number(exact)));
      },
      bound: 4e-15,
    } as const;
    expect(violations(check)).toEqual([]);
  });
});

it('gives the slope of log Gamma(1 + z)/z', () => {
  const point = fc.double({ min: 1e-3, max: 1.5, noNaN: true });
  const q = (z: number): number => logGamma1p(z) / z;
  fc.assert(
    fc.property(point, point, (t, u) => {
      fc.pre(Math.abs(t - u) > 1e-3);
      expect(Math.abs(logGamma1pSlope(t, u) - (q(t) - q(u)) / (t - u))).toBeLessThan(1e-12);
    }),
  );
  // the derivative at 0 is zeta(2)/2
  expect(logGamma1pSlope(0, 0)).toBeCloseTo(Math.PI ** 2 / 12, 14);
});
