import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { erfcx, faddeeva } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { faddeevaKernel } from '../../src/special/faddeeva.ts';
import { readTable, relativeError, type SpecialRow } from '../support/reference.ts';

const finite = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true, noDefaultInfinity: true });

const modulus = (w: { re: number; im: number }): number => Math.sqrt(w.re * w.re + w.im * w.im);

/** Coefficients of the Taylor series of w at z: w' = -2 z w + 2 i / sqrt(pi), differentiated. */
function taylor(x: number, y: number, terms: number): { re: number; im: number }[] {
  const w = faddeeva(x, y);
  const c = [
    w,
    { re: -2 * (x * w.re - y * w.im), im: -2 * (x * w.im + y * w.re) + 2 / Math.sqrt(Math.PI) },
  ];
  for (let n = 0; c.length < terms; n++) {
    // (n + 2) c_(n+2) = -2 z c_(n+1) - 2 c_n
    const a = c[n + 1] as { re: number; im: number };
    const b = c[n] as { re: number; im: number };
    c.push({
      re: (-2 * (x * a.re - y * a.im) - 2 * b.re) / (n + 2),
      im: (-2 * (x * a.im + y * a.re) - 2 * b.im) / (n + 2),
    });
  }
  return c;
}

describe('faddeeva', () => {
  it('is 1 at the origin, whatever the sign of zero', () => {
    for (const re of [0, -0]) {
      for (const im of [0, -0]) {
        const w = faddeeva(re, im);
        expect(w.re).toBe(1);
        expect(w.im + 0).toBe(0);
      }
    }
  });

  it('takes conjugate values at points mirrored in the imaginary axis', () => {
    fc.assert(
      fc.property(finite(0, 40), finite(-20, 40), (x, y) => {
        fc.pre(y * y - x * x < 700);
        const right = faddeeva(x, y);
        const left = faddeeva(-x, y);
        expect(left.re).toBe(right.re);
        expect(left.im + 0).toBe(-right.im + 0);
      }),
    );
  });

  it('satisfies w(z) + w(-z) = 2 exp(-z^2)', () => {
    fc.assert(
      fc.property(finite(-5, 5), finite(-5, 5), (x, y) => {
        const a = faddeeva(x, y);
        const b = faddeeva(-x, -y);
        const e = 2 * Math.exp(y * y - x * x);
        const size = modulus(a) + modulus(b) + e;
        expect(Math.abs(a.re + b.re - e * Math.cos(2 * x * y))).toBeLessThan(3e-14 * size);
        expect(Math.abs(a.im + b.im + e * Math.sin(2 * x * y))).toBeLessThan(3e-14 * size);
      }),
    );
  });

  it('continues its own Taylor series', () => {
    // an error of one part in 1e14 anywhere in the plane would show in the next disc
    fc.assert(
      fc.property(finite(-8, 8), finite(-1, 8), finite(0, 6.3), (x, y, angle) => {
        const h = 0.1;
        const dx = h * Math.cos(angle);
        const dy = h * Math.sin(angle);
        let re = 0;
        let im = 0;
        const c = taylor(x, y, 24);
        for (let n = c.length - 1; n >= 0; n--) {
          const t = c[n] as { re: number; im: number };
          const next = re * dx - im * dy + t.re;
          im = re * dy + im * dx + t.im;
          re = next;
        }
        const w = faddeeva(x + dx, y + dy);
        // x + dx rounds: |w'| is at most 2 |z| |w| + 2
        const tolerance = 2e-15 * (1 + modulus(w)) * (1 + Math.abs(x) + Math.abs(y));
        expect(Math.abs(w.re - re)).toBeLessThan(tolerance);
        expect(Math.abs(w.im - im)).toBeLessThan(tolerance);
      }),
      { numRuns: 2000 },
    );
  });

  it('is erfcx on the imaginary axis and exp(-x^2) on the real one', () => {
    fc.assert(
      fc.property(finite(-20, 1e6), (y) => {
        const w = faddeeva(0, y);
        expect(w.im + 0).toBe(0);
        expect(Math.abs(w.re / erfcx(y) - 1)).toBeLessThan(2e-15);
      }),
    );
    fc.assert(
      fc.property(finite(-5, 5), (x) => {
        const exact = Math.exp(-x * x);
        expect(Math.abs(faddeeva(x, 0).re / exact - 1)).toBeLessThan(1e-14);
      }),
    );
  });

  it('keeps the real part near the real axis, where it is tiny beside the imaginary part', () => {
    // Re w(x + iy) = exp(-x^2) + y (...) ; two rules interchanged would show here first
    const w = faddeeva(1e-8, 1e-8);
    expect(w.re).toBeCloseTo(1 - 2e-8 / Math.sqrt(Math.PI), 15);
    expect(w.im).toBeCloseTo(2e-8 / Math.sqrt(Math.PI), 15);
    expect(faddeeva(25, 0).re).toBe(Math.exp(-625));
  });

  it('gives the complex error function of the reference table', () => {
    const rows = readTable<SpecialRow>('special').filter((row) => /^cerf/.test(row.fn));
    expect(rows.length).toBe(8);
    for (const row of rows) {
      // erf(z) = 1 - exp(-z^2) w(iz)
      const [x, y] = Object.values(row.args).map(Number) as [number, number];
      const w = faddeeva(-y, x);
      const e = Math.exp(y * y - x * x);
      const c = e * Math.cos(2 * x * y);
      const s = -e * Math.sin(2 * x * y);
      const erf = row.fn === 'cerfRe' ? 1 - (c * w.re - s * w.im) : -(c * w.im + s * w.re);
      const size = 1 + e * modulus(w);
      expect(relativeError(erf, row.value as string)).toBeLessThan((2e-15 * size) / Math.abs(erf));
    }
  });

  it('does not jump where the method changes', () => {
    const h = Math.sqrt(Math.PI / 13);
    const crossings: [number, number, number, number][] = [];
    for (let k = 1; k < 30; k++) crossings.push([(k / 2 + 0.25) * h, 0.3, 1e-10, 0]); // the rule
    for (const x of [0, 1, 6]) crossings.push([x, Math.PI / h, 0, 1e-10]); // the pole
    crossings.push([9, 9, 0, 1e-10], [1e4, 1, 1e-6, 0], [1, 1e4, 0, 1e-6]);
    for (const [x, y, dx, dy] of crossings) {
      const a = faddeeva(x - dx, y - dy);
      const b = faddeeva(x + dx, y + dy);
      const w = faddeeva(x, y);
      // the derivative is -2 z w + 2 i / sqrt(pi)
      const re = -2 * (x * w.re - y * w.im);
      const im = -2 * (x * w.im + y * w.re) + 2 / Math.sqrt(Math.PI);
      expect(Math.abs(b.re - a.re - 2 * (re * dx - im * dy))).toBeLessThan(3e-15 * modulus(w));
      expect(Math.abs(b.im - a.im - 2 * (re * dy + im * dx))).toBeLessThan(3e-15 * modulus(w));
    }
  });

  it('decays like i / (sqrt(pi) z) to the end of the range', () => {
    const w = faddeeva(3e200, 4e200);
    expect(w.re * 1e201 * Math.sqrt(Math.PI)).toBeCloseTo(1.6, 14);
    expect(w.im * 1e201 * Math.sqrt(Math.PI)).toBeCloseTo(1.2, 14);
    for (const x of [0, 5e-324, 1, 1e154, 1e300, Number.MAX_VALUE]) {
      for (const y of [0, 5e-324, 1, 1e154, 1e300, Number.MAX_VALUE]) {
        const far = faddeeva(x, y);
        expect(far.re).toBeGreaterThanOrEqual(0);
        expect(far.re).toBeLessThanOrEqual(1);
        expect(far.im).toBeGreaterThanOrEqual(0);
        expect(far.im).toBeLessThan(0.62);
      }
    }
  });

  it('is finite below the real axis up to its limit and refuses beyond', () => {
    for (const x of [0, 1, 30, 1e6]) {
      const edge = Math.sqrt(x * x + 709);
      const w = faddeeva(x, -edge * (1 - 1e-15));
      expect(Number.isFinite(w.re) && Number.isFinite(w.im)).toBe(true);
      expect(() => faddeeva(x, -edge * (1 + 1e-8) - 1)).toThrow(DomainError);
    }
    expect(() => faddeeva(1, -30)).toThrow(
      'faddeeva: im must be at least -sqrt(re^2 + 709), as w overflows below, got -30',
    );
    expect(() => faddeeva(-1e200, -1e200)).toThrow(/the phase of w is lost/);
    expect(faddeeva(1e200, -1e199)).toEqual({ re: expect.closeTo(0), im: expect.closeTo(0) });
    expect(Math.abs(modulus(faddeeva(1e150, -1e150)) - 2)).toBeLessThan(1e-15);
  });

  it('refuses what is not a finite number', () => {
    for (const bad of [
      Number.NaN,
      Number.POSITIVE_INFINITY,
      Number.NEGATIVE_INFINITY,
      '1',
      undefined,
      null,
    ]) {
      expect(() => faddeeva(bad as number, 1)).toThrow(DomainError);
      expect(() => faddeeva(1, bad as number)).toThrow(DomainError);
    }
    expect(() => faddeeva(Number.NaN, 1)).toThrow('faddeeva: re must be a finite number, got NaN');
  });

  it('keeps a small part far from the origin', () => {
    // mpmath 1.2 at 700 digits; |z|^-4 times the small part alone would underflow
    const { im } = faddeeva(1.9858700776308385e-134, 7.333664885524832e55);
    expect(relativeError(im, '2.0832134652954196466e-246')).toBeLessThan(4e-16);
    const { re } = faddeeva(1e8, 1e-290);
    expect(relativeError(re, '5.64189583547756371e-307')).toBeLessThan(4e-16);
  });

  it('has a kernel that writes to the array it is given', () => {
    const out = new Float64Array(2);
    faddeevaKernel(1, -2, out);
    expect({ re: out[0], im: out[1] }).toEqual(faddeeva(1, -2));
  });
});
