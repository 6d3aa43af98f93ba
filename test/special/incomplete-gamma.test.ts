import fc from 'fast-check';
import { DomainError, type Probability } from 'hullgauge';
import { erfc, incompleteGamma, logGamma, logGamma1p } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { gaussianTailSum } from '../../src/special/beta-expansion.ts';
import {
  gammaFraction,
  gammaPowerSeries,
  gammaTermSeries,
} from '../../src/special/gamma-series.ts';
import { GAMMA_TAIL_SLOTS, gammaTailKernel } from '../../src/special/incomplete-gamma.ts';
import { difference, readTable, type SpecialRow } from '../support/reference.ts';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
/** Log-uniform from min to max. */
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);

/** A point at about z standard deviations from the mean of the gamma law, in the cube root. */
function atDeviate(a: number, z: number): number {
  const w = 1 - 1 / (9 * a) + z / (3 * Math.sqrt(a));
  return a * Math.max(w, 1e-3) ** 3;
}

const smallTail = (p: Probability): number => Math.min(p.value, p.complement);
const smallLog = (p: Probability): number => Math.min(p.log, p.logComplement);

const relative = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

/** Nodes and weights of the Gauss-Legendre rule on [0, 1], by Newton's method. */
function gaussLegendre(n: number): readonly (readonly [number, number])[] {
  return Array.from({ length: n }, (_, i) => {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let step = 0; step < 10; step++) {
      let p0 = 1;
      let p1 = x;
      for (let k = 2; k <= n; k++) [p0, p1] = [p1, ((2 * k - 1) * x * p1 - (k - 1) * p0) / k];
      slope = (n * (x * p1 - p0)) / (x * x - 1);
      x -= p1 / slope;
    }
    return [(1 + x) / 2, 1 / ((1 - x * x) * slope * slope)];
  });
}
const rule = gaussLegendre(40);

/** The smaller tail over x^a e^-x / Gamma(a), as an integral over s with t = x e^(-+s). */
function tailIntegral(a: number, x: number): number {
  const lower = x <= a;
  const sign = lower ? -1 : 1;
  // a s - x (e^s - 1) in a form without cancellation for small s
  const exponent = (s: number): number => {
    const q = Math.abs(s) < 0.5 ? series(sign * s) : Math.expm1(sign * s) - sign * s;
    return sign * (a - x) * s - x * q;
  };
  const series = (t: number): number => {
    let term = (t * t) / 2;
    let sum = 0;
    for (let k = 3; k < 22; k++) {
      sum += term;
      term *= t / k;
    }
    return sum;
  };
  let end = 1;
  while (exponent(end) < -39) end /= 2;
  while (exponent(end) > -39) end *= 1.1;
  let sum = 0;
  const panels = 4;
  for (let i = 0; i < panels; i++) {
    for (const [node, weight] of rule) {
      sum += (weight / panels) * Math.exp(exponent((end * (i + node)) / panels));
    }
  }
  return end * sum;
}

describe('incompleteGamma', () => {
  it('has two tails that are each other’s complement', () => {
    fc.assert(
      fc.property(scaled(1e-8, 1e15), between(-12, 12), (a, z) => {
        const p = incompleteGamma(a, atDeviate(a, z));
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThanOrEqual(2 ** -53);
        expect(p.log).toBeLessThanOrEqual(0);
        expect(p.logComplement).toBeLessThanOrEqual(0);
        const small = smallTail(p);
        expect(small).toBeLessThanOrEqual(0.5);
        if (small > 1e-300) expect(Math.abs(Math.log(small) - smallLog(p))).toBeLessThan(3e-13);
      }),
      { numRuns: 500 },
    );
  });

  it('agrees with a quadrature of the tail integral for every size of a', () => {
    const out = new Float64Array(GAMMA_TAIL_SLOTS);
    fc.assert(
      fc.property(scaled(0.5, 1e14), between(-30, 30), (a, z) => {
        const x = atDeviate(a, z);
        fc.pre(x > 0.05 * a && (a > 1 || x > 1));
        gammaTailKernel(a, x, out);
        expect(relative(out[3] as number, tailIntegral(a, x))).toBeLessThan(2e-14);
      }),
      { numRuns: 300 },
    );
  });

  it('satisfies P(a, x) - P(a + 1, x) = x^a e^-x / Gamma(a + 1)', () => {
    fc.assert(
      fc.property(between(0.01, 60), between(0.01, 100), (a, x) => {
        const step = Math.exp(a * Math.log(x) - x - logGamma1p(a));
        const p = incompleteGamma(a, x);
        const q = incompleteGamma(a + 1, x);
        const error = 4e-16 * (4 + Math.abs(a * Math.log(x)) + x + logGamma(a + 2));
        // both written as sums of positive numbers
        expect(relative(q.value + step, p.value)).toBeLessThan(error + 3e-15);
        expect(relative(p.complement + step, q.complement)).toBeLessThan(error + 3e-15);
      }),
      { numRuns: 500 },
    );
  });

  it('is a Poisson tail for an integer a', () => {
    for (const x of [0.125, 1, 2.5, 7, 20]) {
      let term = 1;
      let sum = 1;
      for (let a = 1; a <= 25; a++) {
        const p = incompleteGamma(a, x);
        expect(relative(p.complement, Math.exp(-x) * sum)).toBeLessThan(2e-15);
        term *= x / a;
        sum += term;
      }
    }
  });

  it('is an error function for a = 1/2 and a finite sum for other half-integers', () => {
    for (const y of [2 ** -20, 0.125, 0.5, 0.75, 0.9375, 1.0625, 1.5, 2.25, 5.5, 17.25]) {
      const x = y * y; // exact
      let term = (2 * y * Math.exp(-x)) / Math.sqrt(Math.PI); // x^a e^-x / Gamma(a + 1)
      let sum = erfc(y);
      for (let a = 0.5; a < 20; a++) {
        expect(relative(incompleteGamma(a, x).complement, sum)).toBeLessThan(3e-15);
        sum += term;
        term *= x / (a + 1);
      }
    }
  });

  it('is exponential for a = 1', () => {
    for (const x of [1e-300, 1e-8, 0.5, 1, 3, 700, 1e5]) {
      const p = incompleteGamma(1, x);
      expect(relative(p.value, -Math.expm1(-x))).toBeLessThan(1e-15);
      expect(Math.abs(p.complement - Math.exp(-x))).toBeLessThanOrEqual(1e-15 * Math.exp(-x));
      expect(relative(p.logComplement, -x)).toBeLessThan(1e-15);
    }
  });

  it('grows with x and falls with a', () => {
    fc.assert(
      fc.property(scaled(1e-4, 1e12), between(-8, 8), between(0.001, 1), (a, z, step) => {
        const x = atDeviate(a, z);
        const p = incompleteGamma(a, x);
        expect(incompleteGamma(a, x * (1 + step)).log).toBeGreaterThanOrEqual(p.log);
        expect(incompleteGamma(a, x * (1 + step)).logComplement).toBeLessThanOrEqual(
          p.logComplement,
        );
        expect(incompleteGamma(a * (1 + step), x).log).toBeLessThanOrEqual(p.log);
      }),
      { numRuns: 500 },
    );
  });

  it('states an error that covers the true error of the smaller tail', () => {
    const rows = [
      ...readTable<SpecialRow>('special').map(({ fn, args, log }) => ({
        fn,
        args: Object.values(args),
        log,
      })),
      ...readTable<{ fn: string; args: number[]; log?: string }>('special-gamma'),
    ].filter(({ fn }) => fn === 'gammaP' || fn === 'gammaQ');
    let checked = 0;
    for (const { fn, args, log } of rows) {
      const [a, x] = args.map(Number) as [number, number];
      const p = incompleteGamma(a, x);
      if (log == null || Number(log) > -Math.LN2) continue;
      const error = Math.abs(difference(fn === 'gammaP' ? p.log : p.logComplement, log));
      expect(error).toBeLessThanOrEqual(p.logError);
      expect(p.logError).toBeLessThan(3e-15 * (1 - Number(log)));
      checked++;
    }
    expect(checked).toBeGreaterThan(500);
  });

  it('uses methods that agree where their regions overlap', () => {
    fc.assert(
      fc.property(between(15, 400), between(0, 1), fc.boolean(), (a, share, lower) => {
        // z^2 = 0.8 a share
        const t = Math.sqrt(0.8 * share) * (lower ? -1 : 1);
        const x = a * Math.max(0.2, 1 + t + (t * t) / 3);
        const delta = x - a;
        const z = Math.sqrt(2 * a * (delta / a - Math.log1p(delta / a)));
        fc.pre(z * z < 0.8 * a && Math.abs(t) > 0.05);
        const direct = lower ? gammaTermSeries(a, x) : longFraction(a, x);
        expect(relative(gaussianTailSum(a, lower ? 1 : -1, 0, z), direct)).toBeLessThan(1e-13);
      }),
      { numRuns: 300 },
    );
    fc.assert(
      fc.property(between(0.05, 1), between(0.3, 1), (a, x) => {
        // P by the alternating and by the positive series
        expect(
          relative((1 + gammaPowerSeries(a, x)) / a, gammaTermSeries(a, x) * Math.exp(-x)),
        ).toBeLessThan(2e-15);
      }),
    );
    fc.assert(
      fc.property(between(0.01, 200), between(0, 2), (a, share) => {
        const x = Math.max(1, a) * (1 + share);
        expect(relative(gammaFraction(a, x), longFraction(a, x))).toBeLessThan(1e-15);
      }),
      { numRuns: 500 },
    );
  });

  it('passes its thresholds without a jump', () => {
    const nearby = (a: number, x: number, da: number, dx: number): number => {
      const p = incompleteGamma(a - da, x - dx);
      const q = incompleteGamma(a + da, x + dx);
      return Math.abs(p.value - q.value);
    };
    const e = 1e-15;
    for (const x of [0.2, 0.9, 1, 1.1, 4]) expect(nearby(1, x, e, 0)).toBeLessThan(5e-15);
    for (const a of [0.01, 0.5, 0.999, 1]) expect(nearby(a, 1, 0, e)).toBeLessThan(5e-15);
    for (const x of [160, 199, 201, 230]) expect(nearby(200, x, 64 * e, 0)).toBeLessThan(1e-14);
    for (const a of [1.5, 7, 15, 40, 1e3, 1e6])
      expect(nearby(a, a, 0, a * e)).toBeLessThan(1e-15 * Math.sqrt(a) + 2e-15);
  });

  describe('meets the failures known elsewhere', () => {
    it('keeps all digits of Q for a tiny a', () => {
      // Q is about a E_1(x) here: one minus P would have none
      expect(incompleteGamma(1e-10, 20).complement.toPrecision(12)).toBe('9.83552529421e-21');
      expect(incompleteGamma(1e-300, 1).complement.toPrecision(12)).toBe('2.19383934396e-301');
    });
    it('returns at once for huge and for infinite arguments', () => {
      for (const a of [1e-300, 1e-10, 0.5, 1, 30, 1e9, 1e15, 1e300]) {
        for (const x of [5e-324, 1e-300, 1, 1e9, 1e15, 1e300, 1e308]) {
          const p = incompleteGamma(a, x);
          for (const field of [p.value, p.complement, p.log, p.logComplement, p.logError]) {
            expect(Number.isNaN(field)).toBe(false);
          }
          expect(smallLog(p)).toBeGreaterThan(Number.NEGATIVE_INFINITY);
        }
      }
    });
    it('is right in the second digit at a = 1000 near the mean', () => {
      expect(incompleteGamma(1000, 1000).value.toPrecision(10)).toBe('0.5042052442');
    });
    it('is right at a = 1e9 and beyond', () => {
      for (const a of [1e9, 1e12, 1e15]) {
        // P(a, a) = 1/2 + 1/(3 sqrt(2 pi a)) + O(a^-3/2)
        const excess = incompleteGamma(a, a).value - 0.5;
        expect(Math.abs(excess * 3 * Math.sqrt(2 * Math.PI * a) - 1)).toBeLessThan(
          1e-16 * Math.sqrt(a) * 10 + 1e-8,
        );
      }
    });
  });

  it('agrees with a general statistics package inside its trusted box', () => {
    fc.assert(
      fc.property(scaled(0.01, 20), between(-7, 6), (a, z) => {
        const x = atDeviate(a, z);
        const p = incompleteGamma(a, x);
        fc.pre(p.value > 1e-300);
        expect(relative(jstat.lowRegGamma(a, x), p.value)).toBeLessThan(3e-10);
        if (a >= 1 && p.complement > 1e-5) {
          expect(relative(1 - jstat.lowRegGamma(a, x), p.complement)).toBeLessThan(3e-10);
        }
      }),
    );
  });

  it('returns exact limits at the ends', () => {
    for (const a of [1e-300, 0.5, 1, 1e15, 1e300]) {
      const zero = incompleteGamma(a, 0);
      expect([zero.value, zero.complement, zero.log, zero.logComplement, zero.logError]).toEqual([
        0,
        1,
        Number.NEGATIVE_INFINITY,
        0,
        0,
      ]);
      expect(incompleteGamma(a, -0).value).toBe(0);
      const one = incompleteGamma(a, Number.POSITIVE_INFINITY);
      expect([one.value, one.complement, one.log, one.logComplement, one.logError]).toEqual([
        1,
        0,
        0,
        Number.NEGATIVE_INFINITY,
        0,
      ]);
    }
  });

  it('refuses arguments outside its domain', () => {
    for (const bad of [
      0,
      -1,
      Number.NaN,
      Number.POSITIVE_INFINITY,
      1e-301,
      1e301,
      '2',
      undefined,
    ]) {
      expect(() => incompleteGamma(bad as number, 1)).toThrow(DomainError);
    }
    for (const bad of [-1e-300, Number.NaN, Number.NEGATIVE_INFINITY, '2', undefined]) {
      expect(() => incompleteGamma(1, bad as number)).toThrow(DomainError);
    }
    expect(() => incompleteGamma(2, -3)).toThrow(
      'incompleteGamma: x must be a number >= 0, got -3',
    );
  });
});

/** The continued fraction with far more terms than needed. */
function longFraction(a: number, x: number): number {
  let rest = 0;
  for (let i = 600; i > 0; i--) rest = (i * (a - i)) / (x + 1 - a + 2 * i + rest);
  return 1 / (x + 1 - a + rest);
}
