/** The quadrature engine and the tails it runs on. */
import fc from 'fast-check';
import { incompleteBeta, logBeta, normalCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { BetaTail } from '../../src/numeric/beta-tail.ts';
import { integrateSmooth } from '../../src/numeric/gauss-legendre.ts';
import { integrateHalfLine } from '../../src/numeric/half-line-integral.ts';
import { NormalTail } from '../../src/numeric/normal-tail.ts';
import { orderStatisticExpectation } from '../../src/numeric/order-statistic.ts';
import { digammaKernel, trigammaKernel } from '../../src/numeric/polygamma.ts';
import type { TailRange } from '../../src/numeric/tail.ts';
import { integrateUnimodal } from '../../src/numeric/unimodal-integral.ts';

describe('integrateUnimodal', () => {
  it('integrates a Gaussian wherever and however wide it is', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -30, max: 30, noNaN: true }),
        fc.double({ min: 0.05, max: 40, noNaN: true }),
        (centre, sigma) => {
          const { log, means } = integrateUnimodal((x) => -0.5 * ((x - centre) / sigma) ** 2, 1, [
            () => 2,
          ]);
          expect(Math.abs(log - Math.log(sigma) - 0.5 * Math.log(2 * Math.PI))).toBeLessThan(
            2e-15 * (4 + Math.abs(centre) / sigma),
          );
          expect(means[0]).toBeCloseTo(2, 14);
        },
      ),
    );
  });

  it('integrates skewed tails to a gamma function', () => {
    // int e^(k x - e^x) dx = Gamma(k)
    for (const k of [0.3, 1, 4, 50, 1e4]) {
      const { log, error } = integrateUnimodal((x) => k * x - Math.exp(x), 0.1);
      const exact = k === 1 ? 0 : logBeta(k, 1) + logGammaOf(k + 1);
      expect(Math.abs(log - exact)).toBeLessThan(4e-15 * Math.max(1, Math.abs(exact)));
      expect(error).toBeLessThan(1e-14);
    }
  });

  it('gives up on what does not decay', () => {
    expect(() => integrateUnimodal(() => 0, 1)).toThrow('does not decay');
  });
});

/** log Gamma by the sum over an integer or the reflection-free recurrence; test only. */
function logGammaOf(x: number): number {
  let y = x;
  let log = 0;
  while (y < 30) {
    log -= Math.log(y);
    y += 1;
  }
  const z = 1 / (y * y);
  const series = (1 / 12 - z * (1 / 360 - z * (1 / 1260 - z / 1680))) / y;
  return log + (y - 0.5) * Math.log(y) - y + 0.5 * Math.log(2 * Math.PI) + series;
}

describe('integrateHalfLine', () => {
  it('cuts a Gaussian anywhere', () => {
    for (const cut of [-30, -5, -1, 0, 0.3, 2, 10, 36]) {
      const f = (x: number): number => -0.5 * (x + cut) ** 2 - 0.5 * Math.log(2 * Math.PI);
      const above = integrateHalfLine(f, 1, 1, 3).log;
      const below = integrateHalfLine(f, -1, 1, 3).log;
      const exact = normalCdf(cut);
      expect(Math.abs(above - exact.logComplement)).toBeLessThan(3e-15 * (5 + cut * cut));
      expect(Math.abs(below - exact.log)).toBeLessThan(3e-15 * (5 + cut * cut));
    }
  });
});

describe('Gauss-Legendre', () => {
  it('is exact for degree 39 and not for 40', () => {
    const power = (n: number): number => integrateSmooth((x) => x ** n, 0, 1) * (n + 1);
    for (let n = 0; n < 40; n++) expect(Math.abs(power(n) - 1)).toBeLessThan(2e-15);
    expect(Math.abs(integrateSmooth((x) => x ** 40, -1, 1) * 20.5 - 1)).toBeGreaterThan(1e-12);
  });
});

describe('polygamma', () => {
  it('has the values at 1 and 1/2 and the recurrence', () => {
    expect(digammaKernel(1)).toBeCloseTo(-0.57721566490153286, 14);
    expect(digammaKernel(0.5)).toBeCloseTo(-1.9635100260214235, 14);
    expect(trigammaKernel(1)).toBeCloseTo(Math.PI ** 2 / 6, 14);
    expect(trigammaKernel(0.5)).toBeCloseTo(Math.PI ** 2 / 2, 14);
    for (const x of [1e-3, 0.7, 3, 11.5, 12.5, 1e3, 1e8]) {
      const step = digammaKernel(x + 1) - digammaKernel(x);
      expect(Math.abs(step - 1 / x)).toBeLessThan(
        4e-15 * Math.max(1 / x, Math.abs(Math.log(x)), 1),
      );
      const drop = trigammaKernel(x) - trigammaKernel(x + 1);
      expect(Math.abs(drop - 1 / (x * x))).toBeLessThan(4e-16 * trigammaKernel(x) * 4);
    }
  });
});

describe('tails', () => {
  it('the beta tail is half an incomplete beta function, at any offset from any reference', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -0.9, max: 3000, noNaN: true }),
        fc.double({ min: -400, max: -0.01, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        (b, logTail, offset) => {
          const tail = new BetaTail(b);
          tail.centreAtTail(logTail, 'line');
          expect(Math.abs(tail.logTail - logTail)).toBeLessThan(0.1 + 0.01 * Math.abs(logTail));
          const start = tail.logTail;
          tail.moveTo(offset / (2 * (b + 1)));
          const { height } = tail;
          const w = Math.exp(tail.logWidth);
          if (w < 1e-280) return;
          const half = incompleteBeta(b + 1, 0.5, w).log - Math.LN2;
          const exact = height >= 0 ? half : Math.log1p(-Math.exp(half));
          const slack = 8e-15 * (2 + Math.abs(exact)) * (1 + 2 / (b + 1)) + 4e-16 * b;
          expect(Math.abs(tail.logTail - exact)).toBeLessThan(slack);
          expect(Math.abs(start + tail.shift - tail.logTail)).toBeLessThan(
            1e-13 * Math.abs(start) + 1e-15,
          );
          // L = A w^(b+1) / v
          const product = tail.logA + (b + 1) * tail.logWidth - tail.logTail;
          expect(Math.abs(tail.logExcess - product)).toBeLessThan(slack);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('the beta tail is continuous where its two expansions meet', () => {
    for (const b of [-0.9, -0.5, 0, 3.5, 100, 2500, 1e5]) {
      const border = 1 / Math.sqrt(b + 3.5);
      const tail = new BetaTail(b);
      tail.centreAtHeight(border * (1 - 1e-15));
      const inner = [tail.logTail, tail.logExcess, tail.logOther];
      tail.centreAtHeight(border * (1 + 1e-15));
      const outer = [tail.logTail, tail.logExcess, tail.logOther];
      for (let i = 0; i < 3; i++) {
        expect(Math.abs((outer[i] as number) - (inner[i] as number))).toBeLessThan(2e-14);
      }
    }
  });

  it('the normal tail moves through the centre and far out', () => {
    for (const [start, end] of [
      [0, 3],
      [30, 30.01],
      [-2, 2],
      [300, 301],
      [1, -20],
    ] as const) {
      const tail = new NormalTail();
      tail.centreAtHeight(start);
      tail.moveTo(end - start);
      const exact = normalCdf(-end);
      expect(Math.abs(tail.logTail - exact.log)).toBeLessThan(
        1e-13 * Math.max(1, Math.abs(exact.log)),
      );
      const other = Math.abs(tail.logOther - exact.logComplement);
      expect(other).toBeLessThan(1e-13 * Math.max(Math.abs(exact.logComplement), 1e-30));
    }
  });
});

describe('orderStatisticExpectation', () => {
  const cases = fc.tuple(
    fc.integer({ min: 1, max: 400 }),
    fc.oneof(fc.integer({ min: 0, max: 2000 }), fc.integer({ min: 1e6, max: 1e15 })),
    fc.double({ min: -0.9, max: 500, noNaN: true }),
    fc.constantFrom<TailRange>('line', 'folded'),
  );

  it('has total mass 1 and moments of the beta law', () => {
    fc.assert(
      fc.property(cases, ([m, extra, b, range]) => {
        const n = m + extra;
        const tail = new BetaTail(b);
        const order = { m, n, log: Math.log(n) };
        const mass = orderStatisticExpectation(tail, range, order, () => 0);
        expect(Math.abs(mass.log)).toBeLessThan(1e-14 * Math.sqrt(m) + 1e-14);
        // E V = m / (n + 1)
        const mean = orderStatisticExpectation(tail, range, order, () => tail.logTail);
        expect(Math.abs(mean.log - Math.log(m / (n + 1)))).toBeLessThan(
          2e-14 * Math.sqrt(m) * Math.max(1, Math.abs(mean.log) / 10),
        );
      }),
      { numRuns: 120 },
    );
  });

  it('does not care which distribution carries it', () => {
    for (const [m, n] of [
      [1, 1],
      [2, 7],
      [10, 1000],
      [300, 1e12],
    ] as const) {
      const order = { m, n, log: Math.log(n) };
      const beta = new BetaTail(4);
      const normal = new NormalTail();
      const a = orderStatisticExpectation(beta, 'line', order, () => 0.7 * beta.logTail).log;
      const c = orderStatisticExpectation(normal, 'line', order, () => 0.7 * normal.logTail).log;
      expect(Math.abs(a - c)).toBeLessThan(3e-14 * Math.sqrt(m));
    }
  });
});
