import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { productError, quotientError, sumError } from '../../src/special/double-double.ts';

/** A double as an integer multiple of 2^-1074. */
function integer(x: number): bigint {
  const bits = new BigUint64Array(new Float64Array([x]).buffer)[0] as bigint;
  const exponent = (bits >> 52n) & 0x7ffn;
  const fraction = bits & 0xf_ffff_ffff_ffffn;
  const magnitude = exponent === 0n ? fraction : (fraction | (1n << 52n)) << (exponent - 1n);
  return x < 0 ? -magnitude : magnitude;
}

const ONE = integer(1);
const wide = fc.double({ min: -1e140, max: 1e140, noNaN: true });
const ordinary = fc.double({ min: 1e-60, max: 1e60, noNaN: true });

describe('sumError', () => {
  it('is exactly what rounding the sum loses', () => {
    fc.assert(
      fc.property(wide, wide, (a, b) => {
        const s = a + b;
        expect(integer(sumError(a, b, s))).toBe(integer(a) + integer(b) - integer(s));
      }),
    );
    expect(sumError(1, 1e-30, 1)).toBe(1e-30);
    expect(sumError(1e-30, 1, 1)).toBe(1e-30);
  });
});

/** a b - p - error as a multiple of 2^-2148; 0 when the error is exact. */
const defect = (a: number, b: number, p: number): bigint =>
  integer(a) * integer(b) - (integer(p) + integer(productError(a, b, p))) * ONE;

describe('productError', () => {
  it('is exactly what rounding the product loses', () => {
    fc.assert(
      fc.property(wide, wide, (a, b) => {
        const p = a * b;
        fc.pre(Math.abs(p) > 1e-270);
        expect(defect(a, b, p)).toBe(0n);
      }),
    );
  });

  it('survives factors near the largest double', () => {
    for (const [a, b] of [
      [1.7e308, 0.3],
      [0.3, -1.7e308],
      [1.2345e300, 1.1e-300],
      [1.3e154, 1.3e154],
      [Number.MAX_VALUE, 1],
    ] as const) {
      expect(defect(a, b, a * b)).toBe(0n);
    }
  });

  it('is 0 where the product overflows or vanishes', () => {
    expect(productError(1e200, 1e200, Number.POSITIVE_INFINITY)).toBe(0);
    expect(productError(Number.POSITIVE_INFINITY, 2, Number.POSITIVE_INFINITY)).toBe(0);
    expect(productError(0, 3, 0)).toBe(0);
  });
});

describe('quotientError', () => {
  it('gives the quotient 31 digits', () => {
    fc.assert(
      fc.property(ordinary, ordinary, (a, b) => {
        const q = a / b;
        // (q + error) b - a in multiples of 2^-2148, against a
        const residue =
          (integer(q) + integer(quotientError(a, b, q))) * integer(b) - integer(a) * ONE;
        const size = residue < 0n ? -residue : residue;
        expect(size << 103n).toBeLessThanOrEqual(integer(a) * ONE);
      }),
    );
  });
});
