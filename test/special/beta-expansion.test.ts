import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expansionIsFaster, gaussianTailSum } from '../../src/special/beta-expansion.ts';
import { betaFraction } from '../../src/special/beta-fraction.ts';
import { betaDelta, betaDeviance } from '../../src/special/beta-prefix.ts';
import { betaTailIntegral } from '../support/beta-quadrature.ts';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const scaled = (min: number, max: number): fc.Arbitrary<number> =>
  between(Math.log(min), Math.log(max)).map(Math.exp);
const relative = (x: number, y: number): number => Math.abs(x / y - 1);

interface Point {
  readonly a: number;
  readonly b: number;
  readonly x: number;
  readonly y: number;
  readonly delta: number;
  readonly z: number;
}

/** The point about z standard deviations of the logit below the mean. */
function pointBelow(a: number, b: number, deviations: number): Point {
  const nu = a + b;
  const w = Math.log(a / b) - deviations / Math.sqrt((a / nu) * b);
  const e = Math.exp(-Math.abs(w));
  const [x, y] = w < 0 ? [e / (1 + e), 1 / (1 + e)] : [1 / (1 + e), e / (1 + e)];
  const out = new Float64Array(3);
  betaDelta(a, b, x, y, out);
  const delta = out[0] as number;
  const deviance = betaDeviance(a, b, x, y, delta, out[1] as number, out);
  return { a, b, x, y, delta, z: Math.sqrt(-2 * deviance) };
}

const byExpansion = ({ a, b, z }: Point): number => {
  const nu = a + b;
  return gaussianTailSum((a / nu) * b, (b - a) / nu, (a / nu) * (b / nu), z);
};
const byFraction = ({ a, b, x, y, delta }: Point): number => betaFraction(a, b, x, y, -delta);
/** The first convergent over the result is what the fraction loses. */
const fractionBound = (point: Point): number =>
  1.5e-15 + 4e-16 / ((1 - point.delta) * byExpansion(point));
const byQuadrature = ({ a, b, x, y, delta }: Point): number => betaTailIntegral(a, b, x, y, delta);

describe('expansion and fraction', () => {
  it('agree where both apply, far beyond the line between them', () => {
    fc.assert(
      fc.property(scaled(20, 2e5), scaled(0.01, 100), between(0, 8), (m, ratio, deviations) => {
        const point = pointBelow(m * Math.max(1, ratio), m * Math.max(1, 1 / ratio), deviations);
        fc.pre(point.delta <= 0 && point.z ** 2 <= 0.6 * m);
        expect(relative(byExpansion(point), byFraction(point))).toBeLessThan(fractionBound(point));
      }),
      { numRuns: 1500 },
    );
  });

  it('agree with a quadrature of the integral', () => {
    fc.assert(
      fc.property(scaled(15, 1e15), scaled(1e-6, 1e6), between(0, 12), (m, ratio, deviations) => {
        const point = pointBelow(m * Math.max(1, ratio), m * Math.max(1, 1 / ratio), deviations);
        fc.pre(point.delta <= 0 && point.z < 40);
        const integral = byQuadrature(point);
        if (point.z ** 2 <= 0.6 * m) {
          expect(relative(byExpansion(point), integral)).toBeLessThan(5e-15);
        }
        if (!expansionIsFaster(m, point.z ** 2)) {
          expect(relative(byFraction(point), integral)).toBeLessThan(5e-15);
        }
      }),
      { numRuns: 800 },
    );
  });

  it('agree on both sides of the line where the method changes', () => {
    for (const m of [200, 1000, 1e5, 1e8]) {
      for (const ratio of [1, 3, 1e4]) {
        for (const [a, b] of [
          [m, m * ratio],
          [m * ratio, m],
        ] as const) {
          const line = (m / 16) ** 0.25;
          for (const factor of [0.9, 0.999, 1.001, 1.1]) {
            const point = pointBelow(a, b, line * factor);
            expect(relative(byExpansion(point), byFraction(point))).toBeLessThan(2e-15);
          }
        }
      }
    }
    expect(expansionIsFaster(200, 3.53)).toBe(true);
    expect(expansionIsFaster(200, 3.6)).toBe(false);
    expect(expansionIsFaster(199.9, 0)).toBe(false);
    expect(expansionIsFaster(1e300, 1e200)).toBe(false);
  });

  it('do not stop at a single vanishing term', () => {
    // for a = b every odd coefficient is 0
    for (const m of [20, 60, 200, 1e4]) {
      for (const deviations of [0, 1, 3]) {
        const point = pointBelow(m, m, deviations);
        expect(relative(byExpansion(point), byFraction(point))).toBeLessThan(2e-15);
      }
    }
  });

  it('needs thousands of fraction steps at the mean of large shapes, and takes them', () => {
    const point = pointBelow(3e7, 5e7, 0);
    expect(relative(byFraction(point), byExpansion(point))).toBeLessThan(fractionBound(point));
  });
});

describe('gaussianTailSum', () => {
  it('is the half-normal integral in the limit of large variance', () => {
    const scaledTail = gaussianTailSum(1e30, 0, 0.25, 0) * 1e15;
    expect(relative(scaledTail, Math.sqrt(Math.PI / 2))).toBeLessThan(1e-15);
  });

  it('gives half the integral of a symmetric peak at its centre', () => {
    // B(a, a) 4^a / 2 for a = 100: 2^200 / (2 * 100 * binom(200, 100))
    let binomial = 1n;
    for (let i = 1n; i <= 100n; i++) binomial = (binomial * (100n + i)) / i;
    // 2 * (2 binom(199, 99))^-1 / 100 ... B(100, 100) = 2/(100 binom(200, 100))
    const half = Number(((1n << 200n) << 80n) / (100n * binomial)) / 2 ** 80;
    expect(relative(gaussianTailSum(50, 0, 0.25, 0), half)).toBeLessThan(1e-15);
  });
});
