import fc from 'fast-check';
import { DomainError, Probability } from 'hullgauge';
import { incompleteGamma, incompleteGammaInverse } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { GAMMA_TAIL_SLOTS, gammaTailKernel } from '../../src/special/incomplete-gamma.ts';
import { gammaInverseOfLog } from '../../src/special/incomplete-gamma-inverse.ts';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);
const relative = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

const out = new Float64Array(GAMMA_TAIL_SLOTS);

/**
 * By how much x would have to change, relatively, to have exactly the tail with that logarithm, and the
 * relative change of x for a relative change of the tail.
 */
function defect(a: number, x: number, logTail: number, upper: boolean): readonly [number, number] {
  const given = gammaTailKernel(a, x, out) !== upper;
  const value = out[0] as number;
  const ratio = out[3] as number; // smaller tail over x times the density
  const log = given
    ? (out[1] as number) - logTail + (out[2] as number)
    : Math.log1p(-value) - logTail;
  const condition = given ? ratio : ((1 - value) * ratio) / value;
  return [Math.abs(log * condition), condition];
}

describe('incompleteGammaInverse', () => {
  it('returns to the tail it was given, either tail, over the whole domain', () => {
    fc.assert(
      fc.property(scaled(1e-3, 1e15), scaled(1e-6, 1e3), fc.boolean(), (a, size, upper) => {
        const x = gammaInverseOfLog(a, -size, upper);
        if (x < 1e-300) return; // below the normal numbers
        const [error, condition] = defect(a, x, -size, upper);
        expect(error).toBeLessThan(4e-16 + 4e-15 * condition * Math.min(1, size));
      }),
      { numRuns: 4000 },
    );
  });

  it('needs few steps, and so never stops unfinished, in the corners of the domain', () => {
    const corners = [1e-300, 1e-100, 1e-8, 0.3, 1, 14.9, 15, 1e4, 1e15, 1e100, 1e300];
    const sizes = [5e-324, 1e-300, 1e-17, 0.1, 0.693, 0.694, 5, 40, 744, 1e4, 1e15, 1e100, 1e300];
    for (const a of corners) {
      for (const size of sizes) {
        for (const upper of [false, true]) {
          const x = gammaInverseOfLog(a, -size, upper);
          expect(x).toBeGreaterThanOrEqual(0);
          expect(x).toBeLessThan(Number.POSITIVE_INFINITY);
        }
      }
    }
  });

  it('inverts incompleteGamma at probabilities near 0, near 1 and between', () => {
    fc.assert(
      fc.property(scaled(0.1, 1e9), between(-35, 35), (a, z) => {
        const w = 1 - 1 / (9 * a) + z / (3 * Math.sqrt(a));
        const x = a * Math.max(w, 0.01) ** 3;
        const p = incompleteGamma(a, x);
        fc.pre(Math.min(p.value, p.complement) > 1e-300);
        gammaTailKernel(a, x, out);
        const small = Math.min(p.value, p.complement);
        const condition = ((out[3] as number) * small) / (out[0] as number);
        expect(relative(incompleteGammaInverse(a, p), x)).toBeLessThan(4e-16 + 4e-15 * condition);
      }),
      { numRuns: 2000 },
    );
  });

  it('takes a number as the probability itself', () => {
    for (const a of [0.2, 1, 2.5, 40, 1e6]) {
      for (const p of [1e-300, 1e-20, 0.001, 0.3, 0.5, 0.7, 0.999, 1 - 2 ** -53]) {
        const x = incompleteGammaInverse(a, p);
        expect(relative(incompleteGammaInverse(a, Probability.fromValue(p)), x) || 0).toBeLessThan(
          4e-16 * (1 + 1 / a),
        );
      }
    }
    // exponential law
    for (const p of [1e-300, 1e-10, 0.25, 0.5, 0.75]) {
      expect(relative(incompleteGammaInverse(1, p), -Math.log1p(-p))).toBeLessThan(1e-15);
      expect(
        relative(incompleteGammaInverse(1, Probability.fromComplement(p)), -Math.log(p)),
      ).toBeLessThan(1e-15);
    }
  });

  it('lets the logarithm decide where the value was made from it', () => {
    // exp(-600) carries an error of 600 half-bits: 6e-14 of x at a = 1
    const x = incompleteGammaInverse(1, Probability.fromLogComplement(-600.1));
    expect(relative(x, 600.1)).toBeLessThan(3e-16);
    const tiny = incompleteGammaInverse(0.5, Probability.fromLog(-300.7));
    // P = 2 sqrt(x / pi): x = pi/4 e^(-601.4)
    expect(relative(Math.log(tiny), Math.log(Math.PI / 4) - 601.4)).toBeLessThan(3e-16);
  });

  it('grows with p and with a', () => {
    fc.assert(
      fc.property(scaled(0.05, 1e8), between(1e-6, 0.99), between(1e-6, 0.009), (a, p, step) => {
        const x = incompleteGammaInverse(a, p);
        expect(incompleteGammaInverse(a, p + step)).toBeGreaterThan(x);
        expect(incompleteGammaInverse(a * (1 + step), p)).toBeGreaterThan(x);
      }),
    );
  });

  it('agrees with a general statistics package inside its trusted box', () => {
    fc.assert(
      fc.property(scaled(1, 1e4), between(1e-6, 0.99), (a, p) => {
        expect(relative(jstat.gammapinv(p, a), incompleteGammaInverse(a, p))).toBeLessThan(3e-10);
      }),
    );
  });

  it('returns exact limits at the ends', () => {
    for (const a of [1e-300, 0.5, 1, 1e15]) {
      expect(incompleteGammaInverse(a, 0)).toBe(0);
      expect(incompleteGammaInverse(a, 1)).toBe(Number.POSITIVE_INFINITY);
      expect(incompleteGammaInverse(a, Probability.fromLog(Number.NEGATIVE_INFINITY))).toBe(0);
      expect(incompleteGammaInverse(a, Probability.fromComplement(0))).toBe(
        Number.POSITIVE_INFINITY,
      );
    }
    // the quantile exp(-2300) is below every double
    expect(incompleteGammaInverse(0.01, 1e-10)).toBe(0);
    // a subnormal quantile: x = (p Gamma(3/2))^2
    const subnormal = incompleteGammaInverse(0.5, 1e-160);
    expect(Math.abs(subnormal - (Math.PI / 4) * 1e-320)).toBeLessThanOrEqual(1e-323);
  });

  it('refuses arguments outside its domain', () => {
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY, 1e301, '2', undefined]) {
      expect(() => incompleteGammaInverse(bad as number, 0.5)).toThrow(DomainError);
    }
    for (const bad of [-1e-300, 1.0000000000000002, Number.NaN, '0.5', undefined, null, {}]) {
      expect(() => incompleteGammaInverse(1, bad as number)).toThrow(DomainError);
    }
    const plain = Probability.fromLog(Number.NEGATIVE_INFINITY).toJSON();
    expect(() => incompleteGammaInverse(1, plain as unknown as Probability)).toThrow(
      'incompleteGammaInverse: p must be a number from 0 to 1 or a Probability, got an object',
    );
  });
});
