import { approxSeparability, labelSeparability, separable, smallest } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';

describe('approxSeparability', () => {
  it('comes close to the exact value for fair labels', () => {
    for (const n of [60, 120, 1000]) {
      for (const share of [0.4, 0.45, 0.5, 0.55]) {
        for (const intercept of [true, false]) {
          const args = { n, d: Math.round(share * n), intercept };
          const gap = approxSeparability(args).value - labelSeparability(args).value;
          expect(Math.abs(gap)).toBeLessThan(0.15 / n);
        }
      }
    }
  });

  it('shows what unequal classes do: 94 % instead of 0.02 %', () => {
    const args = { n: 120, d: 40 };
    expect(labelSeparability(args).value).toBeCloseTo(0.0002, 4);
    expect(approxSeparability({ ...args, classShare: 0.1 }).value).toBeCloseTo(0.94, 2);
  });

  it('takes either class for the positive one, and an offset for a share', () => {
    const args = { n: 100, d: 30, signal: 1.5 };
    const value = approxSeparability({ ...args, classShare: 0.25 }).value;
    expect(approxSeparability({ ...args, classShare: 0.75 }).value).toBe(value);
    expect(approxSeparability({ ...args, classShare: 0.5 })).toEqual(approxSeparability(args));
    const plain = { n: 100, d: 30 };
    expect(approxSeparability({ ...plain, classShare: 0.25 }).value).toBeCloseTo(
      approxSeparability({ ...plain, offset: -Math.log(3) }).value,
      14,
    );
    expect(approxSeparability({ ...plain, offset: 1 })).toEqual(
      approxSeparability({ ...plain, offset: -1 }),
    );
  });

  it('is exact where nothing is left to chance or there are no slopes', () => {
    expect(approxSeparability({ n: 41, d: 40 }).complement).toBe(0);
    expect(approxSeparability({ n: 41, d: 40, intercept: false }).complement).toBeGreaterThan(0);
    expect(approxSeparability({ n: 0, d: 0, intercept: false }).value).toBe(1);
    expect(approxSeparability({ n: 1, d: 0, intercept: false }).value).toBe(0);
    const none = approxSeparability({ n: 10, d: 0, classShare: 0.25, signal: 3 });
    expect(none.value).toBeCloseTo(0.75 ** 10 + 0.25 ** 10, 15);
    const two = approxSeparability({ n: 2, d: 0, classShare: 0.001 });
    expect(two.complement / 0.001998).toBeCloseTo(1, 12);
  });

  it('is ordered in n, d and signal', () => {
    const at = (n: number, d: number, signal: number): number =>
      approxSeparability({ n, d, signal }).value;
    expect(at(100, 30, 2)).toBeGreaterThan(at(101, 30, 2));
    expect(at(100, 30, 2)).toBeLessThan(at(100, 31, 2));
    expect(at(100, 30, 2)).toBeLessThan(at(100, 30, 2.1));
  });

  it('can be inverted, and claims no certainty', () => {
    const args = { d: 40, classShare: 0.1 };
    const answer = smallest(approxSeparability, 'n', args, { atMost: 0.01 });
    expect(answer.exact).toBe(false);
    const at = (n: number): number => approxSeparability({ ...args, n }).value;
    expect(at(answer.value)).toBeLessThanOrEqual(0.01);
    expect(at(answer.value - 1)).toBeGreaterThan(0.01);
  });

  it('agrees with simulated data', () => {
    const stream = randomStream(20261201);
    const trials = 500;
    for (const { n, d, signal, offset } of [
      { n: 60, d: 12, signal: 0, offset: 2.2 },
      { n: 60, d: 16, signal: 2, offset: 1.5 },
      { n: 80, d: 26, signal: 2, offset: 0 },
    ]) {
      let hits = 0;
      for (let trial = 0; trial < trials; trial++) {
        const points = Array.from({ length: n }, () =>
          Array.from({ length: d }, () => stream.normal()),
        );
        const labels = points.map((x) => {
          const u = offset + signal * (x[0] as number);
          return stream.uniform() < 1 / (1 + Math.exp(-u)) ? 1 : 0;
        });
        const alike = labels.every((label) => label === labels[0]);
        if (alike || separable(points, labels).kind === 'complete') hits++;
      }
      const p = approxSeparability({ n, d, signal, offset }).value;
      const error = Math.sqrt((p * (1 - p)) / trials);
      expect(Math.abs(hits / trials - p)).toBeLessThan(4 * error);
    }
  });

  it('refuses what it does not cover', () => {
    const args = { n: 100, d: 30 };
    expect(() => approxSeparability({ ...args, classShare: 0.3, offset: 0 })).toThrow(
      'approxSeparability: classShare must be left out where offset is given, got 0.3',
    );
    expect(() => approxSeparability({ ...args, classShare: 0.3, intercept: false })).toThrow(
      'approxSeparability: classShare must be 1/2 where intercept is false, got 0.3',
    );
    expect(() => approxSeparability({ ...args, offset: 1, intercept: false })).toThrow(
      'approxSeparability: offset must be 0 where intercept is false, got 1',
    );
    expect(() => approxSeparability({ ...args, classShare: 0 })).toThrow('classShare must be');
    expect(() => approxSeparability({ ...args, classShare: 1 })).toThrow('classShare must be');
    expect(() => approxSeparability({ ...args, offset: 40 })).toThrow('offset must be such that');
    expect(() => approxSeparability({ ...args, signal: -1 })).toThrow('signal must be');
    expect(approxSeparability({ ...args, classShare: 1e-12 }).value).toBeGreaterThan(0.999);
  });
});
