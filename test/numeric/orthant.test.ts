import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  logAbsoluteOrthantKernel,
  logAbsoluteSumKernel,
  logFaceTermKernel,
  logHalfOrthantKernel,
  logNegativeOrthantKernel,
  logOrthantTermKernel,
  logPositiveOrthantKernel,
} from '../../src/numeric/orthant.ts';
import { contourKernel } from '../../src/numeric/orthant-contour.ts';
import { trapezoidError } from '../../src/numeric/orthant-peak.ts';
import {
  lastOrthantIndex,
  type OrthantSequence,
  orthantSequence,
} from '../../src/numeric/orthant-sequences.ts';
import { paritySplit } from '../../src/numeric/parity-split.ts';
import { logBinomialKernel } from '../../src/special/log-beta.ts';

const error = new Float64Array(1);

/** A kernel's logarithm minus the exact one, and the bound it states. */
function miss(log: number, exact: number): number {
  return Math.abs(log - exact) - (error[0] as number) - 4e-16 * Math.abs(exact);
}

describe('orthant probabilities', () => {
  it('know the closed forms', () => {
    for (const N of [1, 2, 3, 10, 1000, 1e9]) {
      // P(xi_1, .., xi_N < xi): each of N + 1 variables is as likely the largest
      expect(miss(logPositiveOrthantKernel(N, 1, error), -Math.log(N + 1))).toBeLessThan(0);
      // xi > 0 besides: the other half has probability 2^-(N+1) / (N+1)
      const half = Math.log1p(-Math.exp(-(N + 1) * Math.LN2)) - Math.log(N + 1);
      expect(miss(logHalfOrthantKernel(N, 1, error), half)).toBeLessThan(0);
      expect(miss(logAbsoluteOrthantKernel(N, 1, error), -Math.log(2 * (N + 1)))).toBeLessThan(0);
    }
    for (const kappa of [0.01, 1, 7.5, 1e6]) {
      expect(miss(logNegativeOrthantKernel(1, kappa, error), -Math.LN2)).toBeLessThan(0);
      expect(miss(logPositiveOrthantKernel(1, kappa, error), -Math.LN2)).toBeLessThan(0);
      // two variables of correlation rho: 1/4 + asin(rho) / (2 pi)
      const negative = 0.25 + Math.asin(-1 / (1 + kappa)) / (2 * Math.PI);
      expect(miss(logNegativeOrthantKernel(2, kappa, error), Math.log(negative))).toBeLessThan(
        1e-16 / negative,
      );
      const positive = 0.25 + Math.asin(1 / (1 + kappa)) / (2 * Math.PI);
      expect(miss(logPositiveOrthantKernel(2, kappa, error), Math.log(positive))).toBeLessThan(0);
      // |xi_1| <= sqrt(kappa) xi
      const wedge = Math.atan(Math.sqrt(kappa)) / Math.PI;
      expect(miss(logAbsoluteSumKernel(1, kappa, error), Math.log(wedge))).toBeLessThan(0);
      const other = Math.atan(1 / Math.sqrt(kappa)) / Math.PI;
      expect(miss(logAbsoluteOrthantKernel(1, kappa, error), Math.log(other))).toBeLessThan(0);
    }
    expect(miss(logNegativeOrthantKernel(2, 1, error), -Math.log(6))).toBeLessThan(0);
  });

  it('are those of independence where the correlation vanishes', () => {
    for (const k of [1, 5, 40]) {
      const exact = -k * Math.LN2;
      expect(Math.abs(logNegativeOrthantKernel(k, 1e18, error) - exact)).toBeLessThan(3e-14);
      expect(Math.abs(logPositiveOrthantKernel(k, 1e18, error) - exact)).toBeLessThan(3e-14);
    }
  });

  it('are 1, or 1/2, for no variable', () => {
    expect(logNegativeOrthantKernel(0, 2, error)).toBe(0);
    expect(logPositiveOrthantKernel(0, 2, error)).toBe(0);
    expect(logHalfOrthantKernel(0, 2, error)).toBe(-Math.LN2);
    expect(logAbsoluteOrthantKernel(0, 2, error)).toBe(-Math.LN2);
    expect(logAbsoluteSumKernel(0, 2, error)).toBe(-Math.LN2);
  });
});

describe('the contour sum', () => {
  it('has the discretisation error that was bounded before it was summed', () => {
    const out = new Float64Array(4);
    const sum = (k: number, kappa: number, pole: boolean, tolerance: number): number => {
      contourKernel(k, kappa, pole, out, tolerance);
      return out[2] as number;
    };
    for (const pole of [false, true]) {
      for (const k of [1, 3, 20, 100, 499]) {
        for (const kappa of [0.01, 0.3, 1, 10, 200]) {
          const exact = sum(k, kappa, pole, 41);
          const rounding = 2 * (out[3] as number);
          for (const tolerance of [6, 10, 15, 20, 25]) {
            // Without the pole the aliases are positive: the sum is never too small.
            const excess = sum(k, kappa, pole, tolerance) - exact;
            if (!pole) expect(excess).toBeGreaterThan(-rounding);
            expect(Math.abs(excess)).toBeLessThan((out[3] as number) + rounding);
            // and the bound is no caution out of all proportion
            expect(out[3] as number).toBeLessThan(
              30 * Math.exp(-tolerance) * Math.sqrt(k / kappa + 1) + rounding,
            );
          }
        }
      }
    }
  });

  it('has its peak counterpart judged by coarser sums of the same nodes', () => {
    // errors e^-(C/h) and e^-(C/h^2) at h, 2h, 4h
    for (const c of [5, 10, 20]) {
      const strip = trapezoidError(Math.exp(-c), Math.exp(-c / 2));
      expect(strip).toBeGreaterThan(Math.exp(-2 * c));
      const gaussian = trapezoidError(Math.exp(-c), Math.exp(-c / 4));
      expect(gaussian).toBeGreaterThan(Math.exp(-4 * c));
      expect(gaussian).toBeLessThan(strip);
    }
    expect(trapezoidError(0, 0.3)).toBe(0);
    expect(trapezoidError(1e-9, 0.9)).toBeLessThan(1e-16);
  });
});

describe('the terms', () => {
  it('are the products of their factors', () => {
    for (const [n, j, kappa] of [
      [1, 1, 2],
      [5, 0, 1],
      [7, 3, 0.4],
      [40, 11, 1],
      [200, 150, 9],
      [1000, 4, 100],
    ] as const) {
      const choices = logBinomialKernel(n, j);
      const internal = logNegativeOrthantKernel(j, kappa, error);
      for (const [kind, external, sign] of [
        ['line', logPositiveOrthantKernel, 0],
        ['half', logHalfOrthantKernel, 0],
        ['absolute', logAbsoluteOrthantKernel, 1],
      ] as const) {
        const product =
          choices + internal + sign * j * Math.LN2 + external(n - j, j + kappa, error);
        const term = logOrthantTermKernel(n, Math.log(n), j, kappa, kind, error);
        expect(Math.abs(term - product)).toBeLessThan(2e-12);
      }
    }
  });

  it('of faces are those of survival times the number of faces', () => {
    for (const [n, m, v] of [
      [12, 4, 1],
      [12, 12, 3],
      [300, 20, 20],
      [300, 20, 7],
    ] as const) {
      const face = logFaceTermKernel(n, Math.log(n), m, v, 'line', error);
      const survival = logOrthantTermKernel(n - v, Math.log(n - v), m - v, v, 'line', error);
      expect(Math.abs(face - survival - logBinomialKernel(n, v))).toBeLessThan(1e-12);
    }
  });

  it('of each parity sum to 1/2', () => {
    fc.assert(
      fc.property(
        fc.constantFrom<OrthantSequence>('simplex', 'nonnegative', 'absolute'),
        fc.integer({ min: 1, max: 60 }),
        fc.double({ min: -6, max: 6, noNaN: true }),
        (sequence, M, logKappa) => {
          const term = orthantSequence(sequence, M, Math.log(M), Math.exp(logKappa));
          const sums = [0, 0];
          for (let j = 0; j <= lastOrthantIndex(sequence, M); j++) {
            sums[j % 2] = (sums[j % 2] as number) + Math.exp(term(j, error));
          }
          for (const sum of sums) expect(Math.abs(sum - 0.5)).toBeLessThan(3e-14);
        },
      ),
      { numRuns: 60 },
    );
  });

  it('go on where n stops being a double', () => {
    const at = (log: number): number =>
      logOrthantTermKernel(Math.exp(log), log, 40, 1, 'line', error);
    for (const log of [667.7, 709.75]) {
      const second = at(log - 0.1) - 2 * at(log) + at(log + 0.1);
      expect(Math.abs(second)).toBeLessThan(1e-6);
    }
  });
});

describe('the parity split', () => {
  it('chooses its side, and gives both', () => {
    // a fair binomial law, halved: v_j = C(9, j) / 2^10, whose parities have mass 1/4 each, doubled
    const term = (j: number, bound: Float64Array): number => {
      bound[0] = 1e-15;
      return logBinomialKernel(9, j) - 9 * Math.LN2;
    };
    for (let d = 1; d < 9; d++) {
      const p = paritySplit(term, d, 0, 9);
      let inside = 0;
      for (let j = d + 1; j <= 9; j += 2) inside += 2 * Math.exp(term(j, error));
      expect(p.value).toBeCloseTo(inside, 14);
      expect(p.value + p.complement).toBe(1);
    }
    expect(paritySplit(term, 9, 0, 9).value).toBe(0);
    expect(paritySplit(term, 0, 0, 9).value).toBe(1);
  });
});
