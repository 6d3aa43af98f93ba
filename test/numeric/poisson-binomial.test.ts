import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactLogError } from '../../src/epsilon.ts';
import {
  type BernoulliRun,
  enumeratedTail,
  poissonBinomialTail,
  runSize,
  type SumTail,
} from '../../src/numeric/poisson-binomial.ts';
import { contourTail, tiltedMean } from '../../src/numeric/poisson-binomial-contour.ts';
import { isQuotient } from '../support/exactness.ts';

const run = (step: 1 | 2, from: number, to: number, count = 1): BernoulliRun => ({
  step,
  from,
  to,
  count,
});

/** log P(K <= k) from a tail, whichever side it is. */
const lowerLog = (t: SumTail): number => (t.side === 'lower' ? t.log : Math.log1p(-t.tail));

describe('tails of sums of Bernoulli variables', () => {
  it('agree between the recurrence and the contour within their error bounds', () => {
    let worst = 0;
    for (const n of [20, 60, 100, 300, 1000, 3000]) {
      for (const step of [1, 2] as const) {
        for (const from of [2, 3]) {
          const runs = [run(step, from, n)];
          const size = n - from + 1;
          const ks = [
            0,
            1,
            2,
            3,
            5,
            8,
            13,
            20,
            40,
            90,
            150,
            250,
            size - 12,
            size - 3,
            size - 2,
            size - 1,
          ];
          for (const k of ks.filter((value) => value >= 0 && value < size)) {
            const a = enumeratedTail(runs, k);
            const b = contourTail(runs, size, k);
            expect(b.side).toBe(a.side);
            const gap = Math.abs(a.log - b.log);
            expect(gap, `n = ${n}, k = ${k}`).toBeLessThanOrEqual(a.logError + b.logError);
            worst = Math.max(worst, gap / Math.max(1, Math.abs(a.log)));
          }
        }
      }
    }
    expect(worst).toBeLessThan(1e-14);
  });

  it('agree between the engines for pooled runs', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.record({
            step: fc.constantFrom<1 | 2>(1, 2),
            from: fc.integer({ min: 2, max: 6 }),
            length: fc.integer({ min: 0, max: 40 }),
            count: fc.integer({ min: 1, max: 20 }),
          }),
          { minLength: 1, maxLength: 4 },
        ),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (parts, share) => {
          const runs = parts.map((p) => run(p.step, p.from, p.from + p.length, p.count));
          const size = runSize(runs);
          const k = Math.min(size - 1, Math.floor(share * size));
          const a = enumeratedTail(runs, k);
          const b = contourTail(runs, size, k);
          expect(Math.abs(a.log - b.log)).toBeLessThanOrEqual(a.logError + b.logError);
        },
      ),
      { numRuns: 60 },
    );
  });

  it('sum to one and fall monotonically across the switch of sides', () => {
    for (const runs of [[run(1, 2, 5000)], [run(2, 1, 40, 30), run(1, 2, 9, 4)]]) {
      const mean = tiltedMean(runs, 1);
      let last = Number.NEGATIVE_INFINITY;
      for (let k = 0; k < 2 * mean; k++) {
        const log = lowerLog(poissonBinomialTail(runs, k));
        expect(log).toBeGreaterThanOrEqual(last);
        last = log;
      }
    }
  });

  it('of fair coins alone are binomial', () => {
    // P(Bin(400, 1/2) <= 180), from exact integers
    let choose = 1n;
    let sum = 0n;
    for (let i = 0n; i <= 180n; i++) {
      sum += choose;
      choose = (choose * (400n - i)) / (i + 1n);
    }
    const exact = Number((sum * 10n ** 18n) / 2n ** 400n) / 1e18;
    const t = poissonBinomialTail([run(2, 1, 1, 400)], 180);
    expect(t.side).toBe('lower');
    expect(Math.abs(t.tail / exact - 1)).toBeLessThan(1e-15);
    expect(Math.abs(Math.log(exact) - t.log)).toBeLessThanOrEqual(t.logError + 1e-16);
    const c = contourTail([run(2, 1, 1, 400)], 400, 180);
    expect(Math.abs(c.tail / exact - 1)).toBeLessThan(3e-13);
  });

  it('of a million fair coins agree with 34 digits of the saddle contour', () => {
    const t = contourTail([run(2, 1, 1, 1e6)], 1e6, 499_200);
    expect(Math.abs(t.log - -2.902054730265209518)).toBeLessThan(t.logError);
    expect(t.logError).toBeLessThan(1e-11);
    const fair = poissonBinomialTail([run(2, 1, 1, 5e5), run(1, 2, 2, 5e5)], 499_200);
    expect(Math.abs(fair.log - -2.902054730265209518)).toBeLessThanOrEqual(fair.logError);
    expect(fair.logError).toBeLessThan(1e-14);
  });

  it('are correctly rounded fractions while their denominator is a double', () => {
    let marked = 0;
    for (const runs of [
      [run(2, 2, 12)],
      [run(1, 3, 18)],
      [run(2, 1, 3, 4)],
      [run(2, 1, 1, 20), run(1, 2, 7, 2)],
      [run(1, 2, 4, 3), run(2, 2, 2, 5)],
      [run(2, 2, 2, 26)],
    ]) {
      let law = [1n];
      let denominator = 1n;
      for (const { step, from, to, count } of runs) {
        for (let j = from; j <= to; j++) {
          for (let copy = 0; copy < count; copy++) {
            const failure = BigInt(step * j - 1);
            law = [...law, 0n].map((x, i) => x * failure + (i > 0 ? (law[i - 1] as bigint) : 0n));
            denominator *= failure + 1n;
          }
        }
      }
      let below = 0n;
      for (let k = 0; k < law.length - 1; k++) {
        below += law[k] as bigint;
        const t = poissonBinomialTail(runs, k);
        const numerator = t.side === 'lower' ? below : denominator - below;
        expect(2n * numerator <= denominator).toBe(true);
        expect(t.tail).toBe(Number(numerator) / Number(denominator));
        const exact = isQuotient(t.tail, numerator, denominator);
        expect(t.logError === exactLogError(t.log)).toBe(exact);
        if (exact) marked++;
      }
    }
    expect(marked).toBeGreaterThan(30);
  });

  it('reach every corner of 2^53 - 1 variables without NaN', () => {
    const n = Number.MAX_SAFE_INTEGER;
    for (const k of [
      0,
      1,
      17,
      18,
      19,
      1e3,
      1e9,
      2 ** 52,
      n - 1e13,
      n - 1e7,
      n - 1e6,
      n - 5,
      n - 3,
      n - 2,
    ]) {
      for (const runs of [[run(1, 2, n)], [run(2, 2, n)]]) {
        const t = poissonBinomialTail(runs, k);
        expect(t.log).toBeLessThan(0);
        expect(t.tail).toBeGreaterThanOrEqual(0);
        expect(t.logError).toBeLessThan(Math.max(1e-12, 3e-14 * Math.abs(t.log)));
      }
    }
  });

  it('with nearly all variables 1 continue smoothly from the contour', () => {
    // log P(K > k) is smooth in k, so its second differences are small on both sides of the switch
    const runs = [run(2, 2, 100_001)];
    const size = 100_000;
    const log = (failures: number): number => poissonBinomialTail(runs, size - 1 - failures).log;
    const edge = 1000;
    const second = (m: number): number => log(m + 1) - 2 * log(m) + log(m - 1);
    expect(second(edge)).toBeCloseTo(-1 / edge, 4);
    expect(Math.abs(second(edge - 3) - 2 * second(edge) + second(edge + 3))).toBeLessThan(1e-7);
  });

  it('are certain outside the range of the sum', () => {
    expect(poissonBinomialTail([run(1, 2, 9)], -1)).toMatchObject({ tail: 0, side: 'lower' });
    expect(poissonBinomialTail([run(1, 2, 9)], 8)).toMatchObject({ tail: 0, side: 'upper' });
    expect(poissonBinomialTail([], 0)).toMatchObject({ tail: 0, side: 'upper' });
  });
});
