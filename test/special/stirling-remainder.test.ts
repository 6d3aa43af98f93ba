import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { logGamma, stirlingRemainder } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import {
  HALF_LOG_TWO_PI,
  stirlingRemainderDifference,
  stirlingRemainderKernel,
} from '../../src/special/stirling-remainder.ts';
import { elementaryCases } from '../accuracy/special-elementary.ts';
import { violations } from '../support/accuracy.ts';
import { ulpDistance } from '../support/ulp.ts';
import { jumpAt, largestDrop } from './threshold.ts';

describe('stirlingRemainder', () => {
  it('is what Stirling leaves of log Gamma', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 30, noNaN: true }), (x) => {
        const main = (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI;
        const scale = Math.abs(main) + Math.abs(logGamma(x)) + x + 1;
        expect(Math.abs(logGamma(x) - main - stirlingRemainder(x))).toBeLessThan(5e-16 * scale);
      }),
    );
  });

  it('obeys its recurrence D(x) - D(x + 1) = (x + 1/2) log(1 + 1/x) - 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 9, noNaN: true }), (x) => {
        const step = (x + 0.5) * Math.log1p(1 / x) - 1;
        const drop = stirlingRemainder(x) - stirlingRemainder(x + 1);
        expect(Math.abs(drop - step)).toBeLessThan(4e-16 * (2 + step));
      }),
    );
  });

  it('joins at 1/8 and 6 and falls', () => {
    expect(jumpAt(stirlingRemainder, 0.125)).toBeLessThanOrEqual(8);
    expect(jumpAt(stirlingRemainder, 6)).toBeLessThanOrEqual(6);
    expect(largestDrop((x) => -stirlingRemainder(x), 0.01, 1)).toBeLessThan(9e-16);
    expect(largestDrop((x) => -stirlingRemainder(x), 1, 40)).toBeLessThan(9e-16);
  });

  it('meets its limits', () => {
    expect(stirlingRemainder(Number.POSITIVE_INFINITY)).toBe(0);
    expect(ulpDistance(stirlingRemainder(1e300), 1 / 1.2e301)).toBeLessThanOrEqual(1);
    expect(stirlingRemainder(5e-324)).toBeCloseTo(371.3011, 3);
  });

  it('refuses 0, negative numbers and NaN', () => {
    for (const bad of [0, -0, -1, NaN, '1']) {
      expect(() => stirlingRemainder(bad as number)).toThrow(DomainError);
    }
    expect(() => stirlingRemainder(0)).toThrow('stirlingRemainder: x must be a number > 0, got 0');
  });
});

describe('stirlingRemainderDifference', () => {
  it('has full relative accuracy for small and large steps, up and down', () => {
    const cases = elementaryCases('stirlingRemainderDifference');
    const check = {
      name: 'stirlingRemainderDifference',
      cases,
      compute: stirlingRemainderDifference,
      measure: 'relative',
      bound: 2e-15,
    } as const;
    expect(cases.length).toBeGreaterThan(100);
    expect(violations(check)).toEqual([]);
  });

  it('agrees with the plain difference where the two remainders are far apart', () => {
    // multiples of 1/1024, whose differences are exact
    const points = fc.integer({ min: 1, max: 50_000 }).map((k) => k / 1024);
    fc.assert(
      fc.property(points, points, (x, y) => {
        const plain = stirlingRemainderKernel(y) - stirlingRemainderKernel(x);
        const scale = stirlingRemainderKernel(x) + stirlingRemainderKernel(y);
        expect(Math.abs(stirlingRemainderDifference(x, y - x) - plain)).toBeLessThan(1e-15 * scale);
      }),
    );
    expect(stirlingRemainderDifference(3, 0)).toBeCloseTo(0, 300);
  });
});
