import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { DomainError, type Probability } from 'hullgauge';
import { incompleteBeta } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { betaAmplitude, betaDelta, betaDeviance } from '../../src/special/beta-prefix.ts';
import { incompleteBetaKernel } from '../../src/special/incomplete-beta.ts';
import { TAIL_SLOTS } from '../../src/special/tail-result.ts';
import { betaTailIntegral } from '../support/beta-quadrature.ts';
import { difference, exactDecimal, readTable, relativeError } from '../support/reference.ts';

interface BetaRow {
  readonly fn: string;
  readonly args: readonly string[];
  readonly exact?: string;
  readonly log?: string;
}

const Ruler = Decimal.clone({ precision: 80, defaults: true });
const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);
const relative = (x: number, y: number): number => Math.abs(x / y - 1);

/** x and y about z standard deviations of the logit from the mean. */
function pairAt(a: number, b: number, z: number): [number, number] {
  const w = Math.log(a / b) + z / Math.sqrt((a / (a + b)) * b);
  const e = Math.exp(-Math.min(Math.abs(w), 690));
  return w < 0 ? [e / (1 + e), 1 / (1 + e)] : [1 / (1 + e), e / (1 + e)];
}

const small = (p: Probability): number => Math.min(p.value, p.complement);
const smallLog = (p: Probability): number => Math.min(p.log, p.logComplement);

describe('incompleteBeta', () => {
  it('has two tails that belong together, for shapes of every size', () => {
    fc.assert(
      fc.property(scaled(1e-8, 1e15), scaled(1e-8, 1e15), between(-20, 20), (a, b, z) => {
        const [x, y] = pairAt(a, b, z);
        const p = incompleteBeta(a, b, x, y);
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThanOrEqual(2 ** -53);
        expect(small(p)).toBeLessThanOrEqual(0.5 + 1e-15);
        expect(p.log).toBeLessThanOrEqual(0);
        expect(p.logComplement).toBeLessThanOrEqual(0);
        if (small(p) > 1e-300) {
          expect(Math.abs(Math.log(small(p)) - smallLog(p))).toBeLessThan(3e-13);
        } else {
          expect(smallLog(p)).toBeLessThan(-690);
        }
        expect(p.logError).toBeGreaterThan(0);
        expect(p.logError).toBeLessThanOrEqual(1.7e-15 + 2.5e-16 * Math.abs(smallLog(p)));
      }),
      { numRuns: 1500 },
    );
  });

  it('is symmetric: I_x(a, b) = 1 - I_y(b, a), to the last bit', () => {
    fc.assert(
      fc.property(scaled(1e-6, 1e12), scaled(1e-6, 1e12), between(-9, 9), (a, b, z) => {
        const [x, y] = pairAt(a, b, z);
        const p = incompleteBeta(a, b, x, y);
        const q = incompleteBeta(b, a, y, x);
        expect([q.value, q.complement, q.log, q.logComplement]).toEqual([
          p.complement,
          p.value,
          p.logComplement,
          p.log,
        ]);
      }),
      { numRuns: 500 },
    );
  });

  it('is exactly one half at the centre of a symmetric law', () => {
    for (const a of [5e-324, 1e-8, 0.01, 0.5, 1, 3, 199.5, 200, 1e4, 1e8, 1e15, 1e300, 1.7e308]) {
      const p = incompleteBeta(a, a, 0.5);
      expect([p.value, p.complement, p.log, p.logComplement]).toEqual([
        0.5,
        0.5,
        -Math.LN2,
        Math.log1p(-0.5),
      ]);
      expect(p.logError).toBeLessThan(2e-16);
    }
  });

  it('agrees with a quadrature of its integral for shapes of every size', () => {
    const out = new Float64Array(3);
    const tail = new Float64Array(TAIL_SLOTS);
    fc.assert(
      fc.property(scaled(0.5, 1e14), scaled(0.5, 1e14), between(-30, 30), (a0, b0, z) => {
        let [a, b] = [a0, b0];
        let [x, y] = pairAt(a, b, z);
        betaDelta(a, b, x, y, out);
        if ((out[0] as number) > 0) {
          [a, b] = [b, a];
          [x, y] = [y, x];
        }
        betaDelta(a, b, x, y, out);
        const delta = out[0] as number;
        const deviance = betaDeviance(a, b, x, y, delta, out[1] as number, out);
        fc.pre(deviance > -650);
        const amplitude = betaAmplitude(a, b, out);
        const factor = Math.exp(out[0] as number) * (1 + Math.expm1(out[1] as number)) * amplitude;
        const truth = factor * betaTailIntegral(a, b, x, y, delta);
        const lower = incompleteBetaKernel(a, b, x, y, tail);
        const value = tail[0] as number;
        expect(relative(lower ? value : 1 - value, truth)).toBeLessThan(6e-15);
      }),
      { numRuns: 600 },
    );
  });

  it('bounds its error, and not by far too much, in every region of the reference table', () => {
    const out = new Float64Array(TAIL_SLOTS);
    let closest = 0;
    for (const { fn, args, log, exact } of readTable<BetaRow>('special-beta')) {
      if (fn !== 'betaTail' || log === undefined) continue;
      const [a, b, x, y] = args.slice(0, 4).map(Number) as [number, number, number, number];
      const lower = incompleteBetaKernel(a, b, x, y, out);
      expect(lower ? 'lower' : 'upper').toBe(args[4]);
      const [value, computed, bound] = [...out] as [number, number, number];
      const error = Math.abs(difference(computed, log));
      expect(error).toBeLessThanOrEqual(bound);
      if (exact !== undefined) expect(relativeError(value, exact)).toBeLessThanOrEqual(bound);
      expect(bound).toBeLessThan(2e-15 + 2.5e-16 * Math.abs(computed));
      closest = Math.max(closest, error / bound);
    }
    expect(closest).toBeGreaterThan(0.3);
  });

  it('is a polynomial for integer shapes, also where the tail is tiny', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 40 }),
        fc.integer({ min: 1, max: 40 }),
        scaled(1e-12, 1),
        fc.boolean(),
        (a, b, small, flip) => {
          const x = flip ? 1 - small / 2 : small / 2;
          const y = flip ? small / 2 : 1 - small / 2;
          const p = incompleteBeta(a, b, x, y);
          // sum over i >= a of binom(a + b - 1, i) x^i y^(n - i), with the smaller one exact
          const exactX = flip ? new Ruler(1).minus(exactDecimal(y)) : new Ruler(exactDecimal(x));
          const exactY = new Ruler(1).minus(exactX);
          const n = a + b - 1;
          let coefficient = new Ruler(1);
          let lower = new Ruler(0);
          let upper = new Ruler(0);
          for (let i = 0; i <= n; i++) {
            const term = coefficient.times(exactX.pow(i)).times(exactY.pow(n - i));
            if (i >= a) lower = lower.plus(term);
            else upper = upper.plus(term);
            coefficient = coefficient.times(n - i).div(i + 1);
          }
          for (const [computed, exact] of [
            [p.value, lower],
            [p.complement, upper],
          ] as const) {
            if (exact.lt(1e-300)) continue;
            expect(exactDecimal(computed).div(exact).minus(1).abs().toNumber()).toBeLessThan(1e-15);
          }
          const smaller = Decimal.min(lower, upper).ln();
          const error = exactDecimal(smallLog(p)).minus(smaller).abs().toNumber();
          expect(error).toBeLessThanOrEqual(p.logError);
        },
      ),
      { numRuns: 400 },
    );
  });

  it('satisfies I_x(a, b) = I_x(a + 1, b) + x^a y^b / (a B(a, b))', () => {
    const out = new Float64Array(3);
    fc.assert(
      fc.property(scaled(0.05, 3e3), scaled(0.05, 1e10), between(-12, 1), (a0, b, z) => {
        const a = Math.ceil(a0 * 2 ** 20) * 2 ** -20; // so that a + 1 is exact
        const [x, y] = pairAt(a, b, z);
        fc.pre(x > 1e-290 && y > 1e-290);
        betaDelta(a, b, x, y, out);
        betaDeviance(a, b, x, y, out[0] as number, out[1] as number, out);
        const amplitude = betaAmplitude(a, b, out);
        const step = (Math.exp(out[0] as number) * Math.exp(out[1] as number) * amplitude) / a;
        const here = incompleteBeta(a, b, x, y).value;
        const next = incompleteBeta(a + 1, b, x, y).value;
        if (here > 1e-290) expect(Math.abs(next + step - here)).toBeLessThan(2.5e-15 * here);
      }),
      { numRuns: 500 },
    );
  });

  it('grows with x and falls with a', () => {
    fc.assert(
      fc.property(scaled(0.01, 1e6), scaled(0.01, 1e6), between(-8, 8), (a, b, z) => {
        const at = (t: number): Probability => incompleteBeta(a, b, ...pairAt(a, b, t));
        const [p, q] = [at(z), at(z + 1e-3)];
        // at the ends both may round to the same number
        expect(q.log).toBeGreaterThanOrEqual(p.log);
        expect(q.logComplement).toBeLessThanOrEqual(p.logComplement);
        const r = incompleteBeta(a * 1.001, b, ...pairAt(a, b, z));
        expect(r.log).toBeLessThanOrEqual(p.log);
      }),
      { numRuns: 500 },
    );
  });

  it('has no jump where the method changes', () => {
    const up = 1 + 2 ** -44;
    const down = 1 - 2 ** -44;
    const pairs: readonly [string, Probability, Probability][] = [];
    const compare = (name: string, f: (s: number) => Probability): void => {
      (pairs as [string, Probability, Probability][]).push([name, f(down), f(up)]);
    };
    for (const a of [0.3, 1, 2.5, 30]) {
      for (const b of [3, 50, 1e6])
        compare(`bx ${a} ${b}`, (s) => incompleteBeta(a, b, (0.7 * s) / b));
      compare(`x = 0.7, a ${a}`, (s) => incompleteBeta(a, 0.4, 0.7 * s));
      compare(`y = 0.7, a ${a}`, (s) => incompleteBeta(a, 0.4, 1 - 0.7 * s, 0.7 * s));
      compare(`b = 1, a ${a}`, (s) => incompleteBeta(a, s, 0.3));
      compare(`a = 1, b ${a}`, (s) => incompleteBeta(s, a, 0.3));
    }
    for (const a of [5, 1e3, 1e9]) {
      compare(`a y = 1, a ${a}`, (s) => incompleteBeta(a, 0.3, 1 - s / a, s / a));
    }
    for (const b of [200, 1e5])
      compare(`min = 200, b ${b}`, (s) => incompleteBeta(200 * s, b, 200 / (200 + b)));
    for (const [name, p, q] of pairs) {
      // the argument itself moves by 1e-13, the logarithm by no more than a hundred times that
      const change = Math.abs(smallLog(p) - smallLog(q));
      if (!(change < 1e-11)) expect([name, change]).toEqual([name, 0]);
      if (small(p) > 1e-290 && !(relative(small(p), small(q)) < 1e-11)) expect(name).toBe('smooth');
    }
  });

  it('takes x = 1 - y with y beyond the last bit of x', () => {
    // I_y(b, a) ~ y^b / (b B(a, b)); B(3, 2) = 1/12
    const p = incompleteBeta(3, 2, 1, 1e-30);
    expect(relative(p.complement, 6e-60)).toBeLessThan(1e-15);
    expect(p.value).toBe(1);
    const q = incompleteBeta(2, 3, 1e-30, 1);
    expect(relative(q.value, 6e-60)).toBeLessThan(1e-15);
    // without y there is nothing to know
    expect(incompleteBeta(3, 2, 1).complement).toBe(0);
    expect(relative(incompleteBeta(1, 1, 1 - 1e-16, 1e-16).complement, 1e-16)).toBeLessThan(3e-16);
  });

  it('returns the exact limits at the ends', () => {
    for (const [a, b] of [
      [0.3, 4],
      [1, 1],
      [1e300, 1e-300],
    ] as const) {
      const zero = incompleteBeta(a, b, 0);
      expect([zero.value, zero.complement, zero.log, zero.logComplement, zero.logError]).toEqual([
        0,
        1,
        Number.NEGATIVE_INFINITY,
        0,
        0,
      ]);
      const one = incompleteBeta(a, b, 1);
      expect([one.value, one.complement, one.log, one.logComplement, one.logError]).toEqual([
        1,
        0,
        0,
        Number.NEGATIVE_INFINITY,
        0,
      ]);
    }
    expect(incompleteBeta(2, 3, -0).value).toBe(0);
  });

  it('is b x for a = 1 and the smallest doubles', () => {
    for (const x of [2 ** -1074, 2 ** -1073, 2 ** -1022, 1e-300, 1e-290, 1e-280]) {
      const p = incompleteBeta(1, 3, x, 1);
      expect(Math.abs(p.value - 3 * x)).toBeLessThanOrEqual(4e-16 * 3 * x + 2 ** -1074);
      expect(Math.abs(p.log - (Math.log(3) + Math.log(x)))).toBeLessThan(3e-13);
      expect(Object.is(p.complement, 1) && p.logComplement < 0).toBe(true);
    }
    // what the other tail lacks to 1 is below rounding: 0, not -0, of unknown logarithm
    const p = incompleteBeta(2.5, 2 ** -1074, 0.625, 0.375);
    expect(Object.is(p.value, 0) && Object.is(p.complement, 1)).toBe(true);
    expect(p.logError).toBe(Number.POSITIVE_INFINITY);
  });

  it('is never NaN, for any shapes a double can hold', () => {
    const anyShape = fc.oneof(
      scaled(1e-300, 1e300),
      fc.constantFrom(5e-324, 1e-310, 1e-9, 0.5, 1, 2, 200, 2 ** 53, 1e300, 1.7e308),
    );
    const tail = new Float64Array(TAIL_SLOTS);
    fc.assert(
      fc.property(anyShape, anyShape, scaled(1e-320, 0.5), fc.boolean(), (a, b, s, flip) => {
        const lower = flip
          ? incompleteBetaKernel(a, b, 1 - s, s, tail)
          : incompleteBetaKernel(a, b, s, 1 - s, tail);
        const [value, log, error] = [...tail] as [number, number, number];
        expect(value).toBeGreaterThanOrEqual(0);
        expect(value).toBeLessThanOrEqual(0.5 + 1e-15);
        expect(log).toBeLessThan(-0.69);
        expect(error).toBeGreaterThan(0);
        if (log > -700) expect(Math.abs(Math.log(value) - log)).toBeLessThan(1e-12);
        else expect(value).toBeLessThan(1e-303);
        expect(typeof lower).toBe('boolean');
      }),
      { numRuns: 3000 },
    );
  });

  it('avoids the known failures of other implementations', () => {
    // differences of log gamma: a first digit, or a value outside [0, 1]
    expect(incompleteBeta(1e8, 1e8, 0.5).value).toBe(0.5);
    expect(incompleteBeta(1e12, 1e12, 0.5).value).toBe(0.5);
    // a cap on the steps of the fraction, near the mean
    expect(relative(incompleteBeta(2e6, 1e6, 2 / 3).value, 0.49998004)).toBeLessThan(1e-3);
    // infinite loops and NaN at shapes of 3e16
    expect(incompleteBeta(3e16, 3e16, 0.5 - 1e-9).value).toBeGreaterThan(0);
    // the mean itself rounded: delta is a millionth of its last bit
    const p = incompleteBeta(1e15, 3e15, 0.25 * (1 + 2 ** -50));
    expect(Math.abs(p.value - 0.5)).toBeLessThan(1e-6);
  });

  it('states the error of a logarithm that two large ones make up', () => {
    // 60 digits
    const exact = -312.872004370176392241;
    const p = incompleteBeta(84.13611007846553, 4.2932215843360475e-120, 0.6624344859815715);
    expect(Math.abs(p.log - exact)).toBeLessThanOrEqual(p.logError);
  });

  it('agrees with a general package where that is right', () => {
    fc.assert(
      fc.property(scaled(0.5, 1e4), scaled(0.5, 1e4), between(-6, 6), (a, b, z) => {
        const [x] = pairAt(a, b, z);
        fc.pre(x > 0 && x < 1);
        expect(Math.abs(jstat.ibeta(x, a, b) - incompleteBeta(a, b, x).value)).toBeLessThan(1e-6);
      }),
      { numRuns: 300 },
    );
  });

  it('refuses arguments outside its domain', () => {
    const bad: readonly [() => unknown, string][] = [
      [() => incompleteBeta(0, 1, 0.5), 'a'],
      [() => incompleteBeta(-1, 1, 0.5), 'a'],
      [() => incompleteBeta(Number.POSITIVE_INFINITY, 1, 0.5), 'a'],
      [() => incompleteBeta(Number.NaN, 1, 0.5), 'a'],
      [() => incompleteBeta(1, 0, 0.5), 'b'],
      [() => incompleteBeta(1, Number.NaN, 0.5), 'b'],
      [() => incompleteBeta(1, 1, -1e-9), 'x'],
      [() => incompleteBeta(1, 1, 1.0001), 'x'],
      [() => incompleteBeta(1, 1, Number.NaN), 'x'],
      [() => incompleteBeta(1, 1, '0.5' as unknown as number), 'x'],
      [() => incompleteBeta(1, 1, 0.5, 0.6), 'y'],
      [() => incompleteBeta(1, 1, 0.5, Number.NaN), 'y'],
      [() => incompleteBeta(1, 1, 1, 1e-14), 'y'],
      [() => incompleteBeta(1, 1, 0.5, 0.5 + 5e-16), 'y'],
    ];
    for (const [call, parameter] of bad) {
      let caught: unknown;
      try {
        call();
      } catch (error) {
        caught = error;
      }
      expect(caught).toBeInstanceOf(DomainError);
      expect((caught as DomainError).parameter).toBe(parameter);
    }
    expect(() => incompleteBeta(1, 1, 0.5, 0.7)).toThrow(
      'incompleteBeta: y must be 1 - x to rounding (x is 0.5), got 0.7',
    );
    expect(incompleteBeta(1, 1, 0.5, 0.5 + 2 ** -53).value).toBe(0.5);
  });
});
