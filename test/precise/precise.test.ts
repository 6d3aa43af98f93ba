/** Exact and decimal results against known values, reference values and themselves at other precisions. */
import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  dichotomyCountExact,
  hullVolumeRatioDecimal,
  incompleteBetaDecimal,
  originInHullDecimal,
  originInHullExact,
} from 'hullgauge/precise';
import { describe, expect, it } from 'vitest';
import { coinSum } from '../support/exact-binomial.ts';
import { readTable } from '../support/reference.ts';

interface Row {
  readonly fn: string;
  readonly args: readonly (string | number)[];
  readonly value: string;
}

const Wide = Decimal.clone({ precision: 1100, rounding: Decimal.ROUND_HALF_EVEN, defaults: true });

describe('reference values of 60 digits', () => {
  const compute: Readonly<Record<string, (args: readonly (string | number)[]) => Decimal>> = {
    incompleteBeta: ([a, b, x]) => incompleteBetaDecimal(a as string, b as string, x as string, 55),
    originInHull: ([n, d]) => originInHullDecimal({ n: n as number, d: d as number, digits: 55 }),
    hullVolumeRatio: ([n, d, b]) =>
      hullVolumeRatioDecimal({ n: n as number, d: d as number, b: b as string, digits: 55 }),
  };
  it.each(readTable<Row>('precise'))('$fn $args', ({ fn, args, value }) => {
    const computed = compute[fn]?.(args);
    expect(computed?.toString()).toBe(new Wide(value).toSignificantDigits(55).toString());
  });
});

describe('originInHullExact', () => {
  it('is a fraction in lowest terms', () => {
    expect(originInHullExact({ n: 10, d: 3 }).toString()).toBe('233/256');
    expect(originInHullExact({ n: 80, d: 40 }).toString()).toBe('1/2');
    expect(originInHullExact({ n: 3, d: 3 }).toString()).toBe('0/1');
    expect(originInHullExact({ n: 0, d: 0 }).toString()).toBe('0/1');
    expect(originInHullExact({ n: 1, d: 0 }).toString()).toBe('1/1');
  });

  it('is the sum of binomial coefficients, and 1 less the probability at n - d', () => {
    const sizes = fc.tuple(fc.integer({ min: 1, max: 150 }), fc.integer({ min: 0, max: 160 }));
    fc.assert(
      fc.property(sizes, ([n, d]) => {
        const p = originInHullExact({ n, d });
        const power = 2n ** BigInt(n - 1);
        expect(p.numerator * power).toBe((power - coinSum(n, d)) * p.denominator);
        expect(p.denominator === 1n || p.numerator % 2n === 1n).toBe(true);
        if (d > 0 && d < n) {
          const rest = originInHullExact({ n, d: n - d });
          expect(rest.denominator).toBe(p.denominator);
          expect(rest.numerator + p.numerator).toBe(p.denominator);
        }
      }),
    );
  });

  it('rounds ties to even', () => {
    // 233/256 = 0.91015625
    const p = originInHullExact({ n: 10, d: 3 });
    expect(p.toDecimal(7).toString()).toBe('0.9101562');
    expect(p.toDecimal(8).toString()).toBe('0.91015625');
    expect(p.toDecimal(3).toString()).toBe('0.91');
    expect(() => p.toDecimal(0)).toThrow(DomainError);
  });

  it('takes 100,000 points', () => {
    expect(originInHullExact({ n: 100_000, d: 99_999 }).numerator).toBe(1n);
    expect(() => originInHullExact({ n: 100_001, d: 1 })).toThrow(/from 0 to 100000/);
  });
});

describe('dichotomyCountExact', () => {
  it('counts what Cover counts', () => {
    expect(dichotomyCountExact({ n: 4, d: 2 })).toBe(14n);
    expect(dichotomyCountExact({ n: 4, d: 2, intercept: false })).toBe(8n);
    expect(dichotomyCountExact({ n: 0, d: 5 })).toBe(1n);
    expect(dichotomyCountExact({ n: 3, d: 0, intercept: false })).toBe(0n);
    expect(dichotomyCountExact({ n: 5, d: 9 })).toBe(32n);
  });

  it('obeys C(n + 1, p) = C(n, p) + C(n, p - 1)', () => {
    const sizes = fc.tuple(fc.integer({ min: 1, max: 200 }), fc.integer({ min: 1, max: 220 }));
    fc.assert(
      fc.property(sizes, ([n, d]) => {
        const sum = dichotomyCountExact({ n, d }) + dichotomyCountExact({ n, d: d - 1 });
        expect(dichotomyCountExact({ n: n + 1, d })).toBe(sum);
      }),
    );
  });
});

describe('rounding', () => {
  const half = (x: Decimal, digits: number): string =>
    new Wide(x).toSignificantDigits(digits).toString();
  const digits = fc.constantFrom(1, 2, 7, 16, 30, 59);

  it('fewer digits are the rounding of more: incompleteBetaDecimal', () => {
    const shape = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
    const limit = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(shape, shape, limit, digits, (a, b, x, count) => {
        const [few, many] = [count, 130].map((c) => incompleteBetaDecimal(a, b, x, c));
        expect(few?.toString()).toBe(half(many as Decimal, count));
      }),
      { numRuns: 60 },
    );
  });

  it('fewer digits are the rounding of more: originInHullDecimal', () => {
    const sizes = fc
      .integer({ min: 2001, max: 50_000 })
      .chain((n) => fc.tuple(fc.constant(n), fc.integer({ min: 1, max: n - 1 })));
    fc.assert(
      fc.property(sizes, digits, ([n, d], count) => {
        const many = originInHullDecimal({ n, d, digits: 130 });
        expect(originInHullDecimal({ n, d, digits: count }).toString()).toBe(half(many, count));
      }),
      { numRuns: 60 },
    );
  });

  it('fewer digits are the rounding of more: hullVolumeRatioDecimal', () => {
    const args = fc.record({
      n: fc.integer({ min: 2, max: 2000 }),
      d: fc.integer({ min: 1, max: 12 }),
      b: fc.constantFrom('-0.5', '0', '1', '0.3', '7.25'),
    });
    fc.assert(
      fc.property(args, digits, (given, count) => {
        const few = hullVolumeRatioDecimal({ ...given, digits: count });
        const many = hullVolumeRatioDecimal({ ...given, digits: 75 });
        expect(few.toString()).toBe(half(many, count));
      }),
      { numRuns: 40 },
    );
  });

  it('keeps a thousand digits', () => {
    const value = incompleteBetaDecimal('2.5', '3.5', '0.3', 1000);
    expect(value.precision()).toBeGreaterThan(990);
    expect(half(value, 100)).toBe(incompleteBetaDecimal('2.5', '3.5', '0.3', 100).toString());
    const wendel = originInHullDecimal({ n: 10_000, d: 4950, digits: 1000 });
    const exact = originInHullExact({ n: 10_000, d: 4950 }).toDecimal(1000);
    expect(wendel.toString()).toBe(exact.toString());
    const ratio = hullVolumeRatioDecimal({ n: 5, d: 2, b: 0, digits: 400 });
    expect(half(ratio, 120)).toBe(
      hullVolumeRatioDecimal({ n: 5, d: 2, b: 0, digits: 120 }).toString(),
    );
  });
});

describe('incompleteBetaDecimal', () => {
  it('takes a double as its binary value and text as its decimal value', () => {
    const fromNumber = incompleteBetaDecimal(1, 1, 0.1, 70);
    expect(fromNumber.toString()).toBe('0.1000000000000000055511151231257827021181583404541015625');
    expect(incompleteBetaDecimal(1, 1, '0.1', 70).toString()).toBe('0.1');
    expect(incompleteBetaDecimal('1', new Decimal(1), new Decimal('0.1'), 70).toString()).toBe(
      '0.1',
    );
  });

  it('is a polynomial for whole parameters', () => {
    // I_x(2, 3) = x^2 (6 - 8 x + 3 x^2)
    expect(incompleteBetaDecimal(2, 3, '0.1', 30).toString()).toBe('0.0523');
    expect(incompleteBetaDecimal(2, 3, '0.9', 30).toString()).toBe('0.9963');
    expect(incompleteBetaDecimal(1, 1, 0.25, 1).toString()).toBe('0.2');
    expect(incompleteBetaDecimal(1, 1, '0.35', 1).toString()).toBe('0.4');
  });

  it('meets its ends and its complement', () => {
    expect(incompleteBetaDecimal(3, 4, 0, 10).toString()).toBe('0');
    expect(incompleteBetaDecimal(3, 4, 1, 10).toString()).toBe('1');
    const shape = fc.integer({ min: 1, max: 5000 }).map((k) => `${k / 100}`);
    const limit = fc.integer({ min: 1, max: 9999 });
    fc.assert(
      fc.property(shape, shape, limit, (a, b, k) => {
        const x = new Decimal(k).div(10_000);
        const sum = new Wide(incompleteBetaDecimal(a, b, x, 60)).plus(
          incompleteBetaDecimal(b, a, new Decimal(1).minus(x), 60),
        );
        expect(sum.minus(1).abs().lt('1e-59')).toBe(true);
      }),
      { numRuns: 40 },
    );
  });

  it('reaches far tails', () => {
    const tiny = incompleteBetaDecimal('1e-300', 1, '1e-400', 30);
    expect(tiny.toString()).toBe('1');
    const small = incompleteBetaDecimal(1e6, 0.5, '1e-2000', 20);
    expect(small.e).toBe(-2_000_000_004);
  });

  it('refuses what is no decimal number in range', () => {
    for (const bad of ['', 'x', '0x10', ' 1', '1e', '-1', '0', 'Infinity', '2e6', `1e-301`]) {
      expect(() => incompleteBetaDecimal(bad, 1, 0.5, 10)).toThrow(DomainError);
    }
    expect(() => incompleteBetaDecimal(1, 1, '1e-2001', 10)).toThrow(DomainError);
    expect(() => incompleteBetaDecimal(1, 1, -1e-300, 10)).toThrow(DomainError);
    expect(() => incompleteBetaDecimal(1, 1, 0.5, 1001)).toThrow(/from 1 to 1000/);
    expect(() => incompleteBetaDecimal(new Decimal(Number.NaN), 1, 0.5, 9)).toThrow(DomainError);
  });
});

describe('hullVolumeRatioDecimal', () => {
  it('gives the closed forms', () => {
    // Sphere in R^3: (n-1)(n-2)(n-3)/((n+1)(n+2)(n+3)).
    expect(hullVolumeRatioDecimal({ n: 10, d: 3, b: -1, digits: 40 }).toString()).toBe(
      new Wide(504).div(1716).toSignificantDigits(40).toString(),
    );
    // Interval: (n-1)/(n+1).
    expect(hullVolumeRatioDecimal({ n: 4, d: 1, b: 0, digits: 40 }).toString()).toBe('0.6');
    // Tetrahedron in the ball: 9/715. Two-point law: 1 - 2^(1-n).
    expect(hullVolumeRatioDecimal({ n: 4, d: 3, b: 0, digits: 40 }).toString()).toBe(
      new Wide(9).div(715).toSignificantDigits(40).toString(),
    );
    expect(hullVolumeRatioDecimal({ n: 5, d: 1, b: -1, digits: 40 }).toString()).toBe('0.9375');
    expect(hullVolumeRatioDecimal({ n: 5, d: 5, b: 0, digits: 40 }).toString()).toBe('0');
    // Triangle in the disc: 35/(48 pi^2).
    const pi = new Wide('3.14159265358979323846264338327950288419716939937510582097494459');
    expect(hullVolumeRatioDecimal({ n: 3, d: 2, b: 0, digits: 40 }).toString()).toBe(
      new Wide(35).div(pi.times(pi).times(48)).toSignificantDigits(40).toString(),
    );
  });

  it('refuses what would take long, and exponents next to the two-point law', () => {
    expect(() => hullVolumeRatioDecimal({ n: 101, d: 2, b: 0, digits: 301 })).toThrow(/n must be/);
    expect(() => hullVolumeRatioDecimal({ n: 100, d: 11, b: 0, digits: 301 })).toThrow(/d must be/);
    expect(() => hullVolumeRatioDecimal({ n: 9, d: 2, b: 0.3, digits: 301 })).toThrow(/b must be/);
    expect(() => hullVolumeRatioDecimal({ n: 9, d: 51, b: 0, digits: 30 })).toThrow(/d must be/);
    expect(() => hullVolumeRatioDecimal({ n: 9, d: 1, b: '-0.999', digits: 9 })).toThrow(/b must/);
    expect(() => hullVolumeRatioDecimal({ n: 9, d: 2, b: -1.1, digits: 9 })).toThrow(/b must/);
    expect(() => hullVolumeRatioDecimal({ n: 9, d: 2, b: 1001, digits: 9 })).toThrow(/b must/);
  });
});

it('neither reads nor changes global settings of decimal.js', () => {
  const before = Decimal.precision;
  Decimal.set({ precision: 5 });
  try {
    expect(incompleteBetaDecimal('0.5', '0.5', '0.1', 30).toString()).toBe(
      '0.204832764699133451649197847551',
    );
    expect(Decimal.precision).toBe(5);
  } finally {
    Decimal.set({ precision: before });
  }
});
