import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  addDeviance,
  betaAmplitude,
  betaDelta,
  betaDeviance,
} from '../../src/special/beta-prefix.ts';
import { exactDecimal } from '../support/reference.ts';

const Ruler = Decimal.clone({ precision: 90, defaults: true });
const out = new Float64Array(3);
const stored = (): Decimal => exactDecimal(out[0] as number).plus(exactDecimal(out[1] as number));
const exactly = (x: number): Decimal => new Ruler(exactDecimal(x));

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);

/** x = a/(a + b) (1 + t) rounded, with its complement. */
function pairNear(a: number, b: number, t: number): [number, number] {
  const x = (a / (a + b)) * (1 + t);
  return [x, 1 - x];
}

describe('betaDelta', () => {
  it('keeps its digits where it is a billionth of a and b', () => {
    fc.assert(
      fc.property(scaled(1, 1e15), scaled(1, 1e15), between(-1e-8, 1e-8), (a, b, t) => {
        const [x, y] = pairNear(a, b, t);
        fc.pre(x > 0 && y > 0);
        betaDelta(a, b, x, y, out);
        const exact =
          x <= y
            ? exactly(x)
                .times(exactly(a).plus(exactly(b)))
                .minus(exactly(a))
            : exactly(b).minus(exactly(y).times(exactly(a).plus(exactly(b))));
        const error = stored().minus(exact).abs().toNumber();
        expect(error).toBeLessThanOrEqual(
          2 ** -102 * Math.min(a, b) + 2 ** -105 * Math.abs(exact.toNumber()),
        );
      }),
      { numRuns: 300 },
    );
  });

  it('is exactly 0 at the centre', () => {
    for (const a of [0.5, 3, 1e8, 2 ** 53, 1e300]) {
      betaDelta(a, a, 0.5, 0.5, out);
      expect([out[0], out[1]]).toEqual([0, 0]);
    }
  });
});

describe('addDeviance', () => {
  /** a (log(1 + t) - t), t = delta/a, from the exact arguments. */
  const exactDeviance = (a: number, delta: number): Decimal => {
    const t = exactly(delta).div(exactly(a));
    return exactly(a).times(t.plus(1).ln().minus(t));
  };

  it('is relative to 2^-57 on either side of every change of form', () => {
    for (const t of [1e-9, 1e-3, 0.0312, 0.03124, 0.03126, 0.1, 0.49, 0.51, 0.9]) {
      for (const sign of [1, -1]) {
        for (const a of [0.7, 150, 1e6]) {
          const delta = sign * t * a;
          const x = (a + delta) * 2 ** -40; // nu = 2^40
          out.fill(0);
          // a + delta may round: the third form takes its point from x, so delta follows from it
          const used = sign * t < -0.5 ? x * 2 ** 40 - a : delta;
          addDeviance(a, used, 0, x, 2 ** 40, 0, out);
          const exact = exactDeviance(a, used);
          expect(stored().div(exact).minus(1).abs().toNumber()).toBeLessThan(2 ** -57);
        }
      }
    }
  });

  it('adds to what is there', () => {
    out[0] = 1000;
    out[1] = 1e-20;
    addDeviance(10, 0.1, 0, 0.5, 20.2, 0, out);
    const exact = exactDeviance(10, 0.1).plus(1000).plus('1e-20');
    expect(stored().minus(exact).abs().toNumber()).toBeLessThan(1e-20);
  });

  it('overflows to minus infinity, not to NaN', () => {
    out.fill(0);
    betaDeviance(1e308, 1, 1e-200, 1, -1e308, 0, out);
    expect(out[0]).toBe(Number.NEGATIVE_INFINITY);
    expect(out[1]).toBe(0);
  });
});

describe('betaAmplitude', () => {
  /** exp of what goes to out[1], times the factor: sqrt(ab/(2 pi nu)) e^(D(nu) - D(a) - D(b)). */
  const whole = (a: number, b: number): number => {
    out.fill(0);
    const factor = betaAmplitude(a, b, out);
    return factor * Math.exp(out[1] as number);
  };

  it('gives x^a y^b / B(a, b) for integers', () => {
    // B(4, 3) = 1/60; the factor at the mean is (4/7)^4 (3/7)^3 / B
    expect(Math.abs(whole(4, 3) / ((60 * 4 ** 4 * 3 ** 3) / 7 ** 7) - 1)).toBeLessThan(1e-15);
    expect(Math.abs(whole(1, 1) / 0.25 - 1)).toBeLessThan(1e-15);
  });

  it('joins its forms at shapes of 1/2', () => {
    const below = 0.5 - 2 ** -54;
    for (const b of [0.2, 3, 1e9]) {
      expect(Math.abs(whole(below, b) / whole(0.5, b) - 1)).toBeLessThan(2e-15);
      expect(Math.abs(whole(b, below) / whole(b, 0.5) - 1)).toBeLessThan(2e-15);
    }
  });

  it('is about a b/(a + b) for tiny shapes', () => {
    expect(Math.abs(whole(1e-200, 3e-200) / 0.75e-200 - 1)).toBeLessThan(1e-15);
  });
});
