import fc from 'fast-check';
import { DomainError, type Probability } from 'hullgauge';
import {
  approxNuclearNormDimension,
  coneMeetsSubspace,
  l1DescentCone,
  l1StatisticalDimension,
  linfDescentCone,
  originInHull,
  orthant,
  productCone,
  type RecoveryArgs,
  recoveryBounds,
  recoverySuccess,
  subspace,
  weakThreshold,
  weylChamber,
} from 'hullgauge/conic';
import { smallest } from 'hullgauge/plan';
import { describe, expect, it } from 'vitest';
import { descentSequence } from '../../src/conic/descent-cones.ts';
import { dimensionBound, secondOrderMoments } from '../../src/conic/weak-threshold.ts';
import { paritySplit } from '../../src/numeric/parity-split.ts';
import { randomStream } from '../../src/numeric/random.ts';
import { recoveryCases } from '../accuracy/conic-recovery.ts';
import { loadLinearSolver } from '../support/linear-program.ts';
import { worstErrorShare } from '../support/probability-checks.ts';
import { relativeError } from '../support/reference.ts';

const close = (a: number, b: number, tolerance: number): void =>
  expect(a === b ? 0 : Math.abs(a - b)).toBeLessThanOrEqual(tolerance);
const success = (
  model: 'l1' | 'nonnegativeL1' | 'nonnegativeFeasible',
  n: number,
  sparsity: number,
  measurements: number,
): Probability => recoverySuccess({ model, n, sparsity, measurements });

describe('recoverySuccess', () => {
  it('with l1 is the Crofton formula of the descent cone', () => {
    for (const [n, sparsity] of [
      [1, 1],
      [5, 2],
      [30, 1],
      [30, 11],
      [30, 29],
      [120, 20],
    ] as const) {
      const cone = l1DescentCone({ n, sparsity });
      for (let m = 0; m <= n; m += Math.ceil(n / 13)) {
        const p = success('l1', n, sparsity, m);
        const q = coneMeetsSubspace(cone, { codimension: m });
        close(p.log, q.logComplement, 1e-12 * Math.max(1, Math.abs(p.log)));
        close(p.logComplement, q.log, 1e-12 * Math.max(1, Math.abs(q.log)));
      }
    }
  });

  it("without an objective is Wendel's formula", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 500 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (n, a, b) => {
          const sparsity = Math.floor(a * n);
          const m = Math.floor(b * (n + 1));
          const p = success('nonnegativeFeasible', n, sparsity, Math.min(m, n));
          expect(
            recoverySuccess({ model: 'box', n, free: sparsity, measurements: Math.min(m, n) }),
          ).toEqual(p);
          if (sparsity < n && m > sparsity && m < n) {
            expect(p.value).toBe(originInHull({ n: n - sparsity, d: m - sparsity }).complement);
          }
        },
      ),
    );
    const cone = productCone(subspace({ dimension: 3, ambient: 3 }), orthant(9));
    for (let m = 0; m <= 12; m++) {
      const p = success('nonnegativeFeasible', 12, 3, m);
      close(p.value, coneMeetsSubspace(cone, { codimension: m }).complement, 1e-15);
    }
  });

  it('rises with the measurements and with what is known, and falls with the sparsity', () => {
    const [n, sparsity] = [60, 6];
    for (const model of ['l1', 'nonnegativeL1', 'nonnegativeFeasible'] as const) {
      let last = Number.NEGATIVE_INFINITY;
      for (let m = 0; m <= n; m++) {
        const p = success(model, n, sparsity, m);
        expect(p.log).toBeGreaterThanOrEqual(last);
        last = p.log;
        if (m === 0 || m === n) continue;
        expect(success(model, n, sparsity + 1, m).log).toBeLessThanOrEqual(p.log);
        expect(success('nonnegativeL1', n, sparsity, m).logComplement).toBeLessThanOrEqual(
          Math.min(
            success('l1', n, sparsity, m).logComplement,
            success('nonnegativeFeasible', n, sparsity, m).logComplement,
          ),
        );
      }
    }
  });

  it('has exact limits', () => {
    for (const model of ['l1', 'nonnegativeL1', 'nonnegativeFeasible'] as const) {
      expect(success(model, 8, 3, 8)).toMatchObject({ value: 1, complement: 0, logError: 0 });
      expect(success(model, 8, 8, 8).value).toBe(1);
      expect(success(model, 8, 8, 7).value).toBe(0);
      expect(success(model, 8, 3, 2)).toMatchObject({ value: 0, log: Number.NEGATIVE_INFINITY });
      expect(success(model, 8, 3, 0).value).toBe(0);
      expect(success(model, 1, 1, 1).value).toBe(1);
    }
    expect(success('l1', 8, 0, 0).value).toBe(1);
    expect(success('nonnegativeL1', 8, 0, 3).value).toBe(1);
    expect(success('nonnegativeFeasible', 8, 0, 0).value).toBe(0);
    // in the plane: a random line misses a cone of 90 degrees, and one of 45
    close(success('l1', 2, 1, 1).value, 0.5, 1e-15);
    close(success('nonnegativeL1', 2, 1, 1).value, 0.75, 1e-15);
  });

  it('keeps both tails past underflow, and huge sizes', () => {
    const p = success('l1', 4000, 10, 2000);
    expect(p.complement).toBe(0);
    expect(p.logComplement).toBeLessThan(-900);
    expect(success('l1', 4000, 700, 720).value).toBe(0);
    expect(success('l1', 4000, 700, 720).log).toBeLessThan(-900);
    const n = Number.MAX_SAFE_INTEGER;
    for (const args of [
      { model: 'l1', n, sparsity: 1000, measurements: 60_000 },
      { model: 'nonnegativeL1', n, sparsity: 1000, measurements: 60_000 },
      { model: 'nonnegativeFeasible', n, sparsity: 2 ** 40, measurements: 2 ** 52 },
      { model: 'box', n, free: 2 ** 52, measurements: n - 1 },
    ] as const) {
      const q = recoverySuccess(args as RecoveryArgs);
      expect(q.log).toBeLessThanOrEqual(0);
      expect(q.value + q.complement).toBe(1);
      expect(q.logError).toBeGreaterThan(0);
    }
  });

  it('agrees with the sum of all terms where it takes an integral', () => {
    const [n, sparsity] = [5e7, 1e7];
    for (const [model, sequence, sides] of [
      ['l1', 'absolute', 2],
      ['nonnegativeL1', 'nonnegative', 1],
    ] as const) {
      const { mean, variance } = secondOrderMoments(n, sparsity, sides);
      for (const z of [-1, 0.1, 2]) {
        const m = Math.round(mean + z * Math.sqrt(variance));
        const p = success(model, n, sparsity, m);
        const { term, first, last } = descentSequence(sequence, n, sparsity);
        const all = paritySplit(term, m, first, last);
        close(p.log, all.logComplement, p.logError + all.logError);
        close(p.logComplement, all.log, p.logError + all.logError);
        expect(p.logError).toBeLessThan(1e-7);
      }
    }
  });

  it('stays quick and finite where the law is spread over millions of indices', () => {
    for (const [n, sparsity] of [
      [1e12, 1e11],
      [Number.MAX_SAFE_INTEGER, 1e12],
    ] as const) {
      const { mean, variance } = secondOrderMoments(n, sparsity, 2);
      let last = Number.NEGATIVE_INFINITY;
      for (const z of [-1e4, -8, -1, 0.1, 2, 9, 1e4]) {
        const p = success('l1', n, sparsity, Math.round(mean + z * Math.sqrt(variance)));
        expect(p.log - p.logComplement).toBeGreaterThan(last);
        last = p.log - p.logComplement;
      }
    }
  });

  it('states error bounds that cover the true errors', () => {
    expect(worstErrorShare(recoveryCases(), recoverySuccess)).toBeLessThan(1);
  });

  it('is inverted by smallest', () => {
    const args = { model: 'l1', n: 1000, sparsity: 20 } as const;
    const question = (a: { measurements: number }): Probability =>
      recoverySuccess({ ...args, ...a });
    const answer = smallest(question, 'measurements', {}, 0.99);
    expect(answer).toMatchObject({ value: 128, exact: true });
    expect(question({ measurements: 127 }).value).toBeLessThan(0.99);
  });

  it.each<[unknown, string]>([
    [{ model: 'l2', n: 5, sparsity: 1, measurements: 2 }, 'model'],
    [{ model: 'l1', n: 0, sparsity: 0, measurements: 0 }, 'n'],
    [{ model: 'l1', n: 5, sparsity: 6, measurements: 2 }, 'sparsity'],
    [{ model: 'l1', n: 5, sparsity: 1, measurements: 6 }, 'measurements'],
    [{ model: 'l1', n: 5, free: 1, measurements: 3 }, 'free'],
    [{ model: 'box', n: 5, sparsity: 1, measurements: 3 }, 'sparsity'],
    [{ model: 'box', n: 5, free: 1.5, measurements: 3 }, 'free'],
    [{ model: 'l1', n: 5, sparsity: 1 }, 'measurements'],
    [undefined, 'options'],
  ])('refuses %o', (args, parameter) => {
    expect(() => recoverySuccess(args as never)).toThrow(DomainError);
    expect(() => recoverySuccess(args as never)).toThrow(`: ${parameter} must be`);
  });
});

describe('seeded simulation with a linear-programming package', () => {
  it.each<['l1' | 'nonnegativeL1', number, number, number]>([
    ['l1', 12, 2, 6],
    ['nonnegativeL1', 12, 3, 6],
  ])('confirms %s at n = %i, s = %i, m = %i', async (model, n, s, m) => {
    const solve = await loadLinearSolver();
    const stream = randomStream(33);
    const trials = 200;
    let hits = 0;
    const copies = model === 'l1' ? 2 : 1;
    const zeros = new Array<number>(copies * n).fill(0);
    for (let trial = 0; trial < trials; trial++) {
      const matrix = Array.from({ length: m }, () =>
        Array.from({ length: n }, () => stream.normal()),
      );
      const x = Array.from({ length: n }, (_, i) => (i < s ? 1 + stream.uniform() : 0));
      const y = matrix.map((row) => row.reduce((t, a, i) => t + a * (x[i] as number), 0));
      // x = u - v, minimise the sum of u and v
      const rows = matrix.map((row) => (copies === 2 ? [...row, ...row.map((a) => -a)] : row));
      const { objective, status } = solve({
        cost: zeros.map(() => -1),
        lower: zeros,
        upper: zeros.map(() => 1e9),
        rows,
        low: y,
        high: y,
      });
      expect(status).toBe('optimal');
      if (Math.abs(objective) > x.reduce((t, a) => t + a, 0) - 1e-6) hits++;
    }
    const exact = success(model, n, s, m).value;
    close(hits / trials, exact, 4 * Math.sqrt((exact * (1 - exact)) / trials));
  });
});

describe('recoveryBounds', () => {
  it('enclose the exact probability of every cone', () => {
    for (const cone of [
      orthant(40),
      l1DescentCone({ n: 60, sparsity: 5 }),
      linfDescentCone({ n: 40, saturated: 30 }),
      weylChamber('A', 40),
      subspace({ dimension: 7, ambient: 20 }),
    ]) {
      for (let m = 0; m <= cone.ambient; m++) {
        const exact = coneMeetsSubspace(cone, { codimension: m });
        const { lower, upper } = recoveryBounds({ cone, measurements: m });
        expect(lower.log).toBeLessThanOrEqual(exact.logComplement + 1e-13);
        expect(lower.logComplement).toBeGreaterThanOrEqual(exact.log - 1e-13);
        expect(upper.log).toBeGreaterThanOrEqual(exact.logComplement - 1e-13);
      }
    }
  });

  it('need only the two dimensions, and are trivial on one side', () => {
    const cone = { ambient: 1000, statisticalDimension: 200 };
    const above = recoveryBounds({ cone, measurements: 300 });
    expect(above.upper).toMatchObject({ value: 1, complement: 0 });
    // exp(-max(200 h(1/2), 800 h(-1/8))/2)
    close(above.lower.complement, 2.0000241365168932e-5, 1e-18);
    const below = recoveryBounds({ cone, measurements: 100 });
    expect(below.lower.value).toBe(0);
    expect(below.upper.value).toBeLessThan(1e-4);
    const none = recoveryBounds({ cone, measurements: 200 }).lower;
    expect([none.value, none.logComplement]).toEqual([0, 0]);
    expect(
      recoveryBounds({ cone: { ambient: 5, statisticalDimension: 0 }, measurements: 1 }).lower
        .value,
    ).toBe(1);
    expect(
      recoveryBounds({ cone: { ambient: 5, statisticalDimension: 5 }, measurements: 4 }).upper
        .value,
    ).toBe(0);
    expect(
      recoveryBounds({ cone: { ambient: 1e9, statisticalDimension: 1e4 }, measurements: 1e8 }).lower
        .logComplement,
    ).toBeLessThan(-1e7);
  });

  it('refuse bad input', () => {
    expect(() => recoveryBounds({ cone: orthant(3), measurements: 4 })).toThrow(
      'measurements must be',
    );
    expect(() => recoveryBounds({ cone: null as never, measurements: 1 })).toThrow('cone must be');
    expect(() =>
      recoveryBounds({ cone: { ambient: 3, statisticalDimension: 4 }, measurements: 1 }),
    ).toThrow('cone.statisticalDimension must be');
    expect(() => recoveryBounds({ cone: orthant(3) } as never)).toThrow(DomainError);
  });
});

describe('thresholds and statistical dimensions', () => {
  it('are the limits of the exact transition', () => {
    // the exact 50 % sparsity approaches the weak threshold like 1/n
    for (const model of ['l1', 'nonnegativeL1'] as const) {
      const limit = weakThreshold({ undersampling: 0.5, model }).perMeasurement;
      const half = (n: number): number => {
        let s = Math.floor((limit * n) / 2);
        while (success(model, n, s, n / 2).value >= 0.5) s++;
        const [above, below] = [
          success(model, n, s - 1, n / 2).value,
          success(model, n, s, n / 2).value,
        ];
        return (s - 1 + (above - 0.5) / (above - below)) / (n / 2);
      };
      const [near, far] = [half(400) - limit, half(1600) - limit];
      expect(near / far).toBeGreaterThan(3);
      expect(near / far).toBeLessThan(5);
    }
  });

  it('invert each other', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 0.9999, noNaN: true }), (undersampling) => {
        const { perVariable, perMeasurement } = weakThreshold({ undersampling, model: 'l1' });
        close(dimensionBound(1, perVariable, 2) / undersampling, 1, 1e-12);
        close(perMeasurement * undersampling, perVariable, 1e-16);
        const { perVariable: more } = weakThreshold({ undersampling, model: 'nonnegativeL1' });
        expect(more).toBeGreaterThan(perVariable);
      }),
    );
  });

  it('keep the digits of what is missing to 1', () => {
    // mpmath 1.2, bisection at 80 digits
    for (const [undersampling, exact] of [
      [1 - 1e-10, '0.99998746685810855551'],
      [1 - 2 ** -53, '0.9999999867941897295'],
    ] as const) {
      const { perVariable } = weakThreshold({ undersampling, model: 'l1' });
      expect(relativeError(perVariable, exact)).toBeLessThan(4e-16);
    }
  });

  it('have exact ends', () => {
    for (const model of ['l1', 'nonnegativeL1'] as const) {
      expect(weakThreshold({ undersampling: 0, model })).toEqual({
        perMeasurement: 0,
        perVariable: 0,
      });
      expect(weakThreshold({ undersampling: 1, model })).toEqual({
        perMeasurement: 1,
        perVariable: 1,
      });
      const tiny = weakThreshold({ undersampling: 5e-324, model });
      expect(tiny.perMeasurement).toBeGreaterThan(0);
      expect(weakThreshold({ undersampling: 1 - 2 ** -53, model }).perMeasurement).toBeGreaterThan(
        0.999,
      );
    }
  });

  it('of l1 agree between the exact law, its sum in steps and the expansion', () => {
    for (const [n, sparsity] of [
      [50, 1],
      [400, 40],
      [2000, 100],
      [3000, 1500],
    ] as const) {
      const cone = l1DescentCone({ n, sparsity });
      const { exact, upper } = l1StatisticalDimension({ n, sparsity });
      close(cone.statisticalDimension / exact, 1, 1e-12);
      expect(upper - exact).toBeGreaterThan(0);
      expect(upper - exact).toBeLessThan(1);
      const expansion = secondOrderMoments(n, sparsity, 2);
      close(expansion.mean, exact, 0.01);
      close(expansion.variance / cone.variance, 1, 0.04);
    }
    // where the sum takes steps of hundreds, at the switch to the expansion; rounding leaves it 1e-13
    for (const sparsity of [1e7 - 1, 1e7]) {
      const { exact } = l1StatisticalDimension({ n: 1e8, sparsity });
      close(exact / secondOrderMoments(1e8, sparsity, 2).mean, 1, 3e-13);
    }
  });

  it('of l1 have exact ends and take huge sizes', () => {
    expect(l1StatisticalDimension({ n: 9, sparsity: 0 })).toEqual({ exact: 0, upper: 0 });
    expect(l1StatisticalDimension({ n: 9, sparsity: 9 })).toEqual({ exact: 8.5, upper: 9 });
    const { exact, upper } = l1StatisticalDimension({ n: Number.MAX_SAFE_INTEGER, sparsity: 5 });
    expect(exact).toBeLessThan(upper);
    expect(exact).toBeGreaterThan(upper - 1);
  });

  it('of the nuclear norm do not depend on the orientation, and have exact ends', () => {
    const tall = approxNuclearNormDimension({ rank: 2, rows: 30, columns: 20 });
    expect(approxNuclearNormDimension({ rank: 2, rows: 20, columns: 30 })).toBe(tall);
    expect(approxNuclearNormDimension({ rank: 0, rows: 20, columns: 30 })).toBe(0);
    expect(approxNuclearNormDimension({ rank: 20, rows: 20, columns: 30 })).toBe(600);
    // more than the degrees of freedom r (m + n - r)
    for (const rank of [1, 5, 10, 19]) {
      const delta = approxNuclearNormDimension({ rank, rows: 20, columns: 30 });
      expect(delta).toBeGreaterThan(rank * (50 - rank));
      expect(delta).toBeLessThan(600);
    }
  });

  it('refuse bad input', () => {
    expect(() => weakThreshold({ undersampling: 1.1, model: 'l1' })).toThrow(
      'undersampling must be',
    );
    expect(() => weakThreshold({ undersampling: Number.NaN, model: 'l1' })).toThrow(DomainError);
    expect(() => weakThreshold({ undersampling: 0.5, model: 'box' as never })).toThrow(
      'model must be',
    );
    expect(() => l1StatisticalDimension({ n: 3, sparsity: 4 })).toThrow('sparsity must be');
    expect(() => approxNuclearNormDimension({ rank: 4, rows: 3, columns: 9 })).toThrow(
      'rank must be',
    );
    expect(() => approxNuclearNormDimension({ rank: 1, rows: 0, columns: 9 })).toThrow(
      'rows must be',
    );
  });
});
