import { expect, it } from 'vitest';
import { logOutwardSum } from '../../src/numeric/parity-split.ts';
import { logSmoothSum } from '../../src/numeric/smooth-sum.ts';

it('agrees with the sum of all terms of a wide law', () => {
  const [mean, deviation] = [1e6, 5000];
  const term = (index: number, error: Float64Array): number => {
    const z = (index - mean) / deviation;
    error[0] = 1e-15;
    return -0.5 * z * z + 0.01 * z * z * z * Math.exp(-z * z);
  };
  const error = new Float64Array(1);
  for (const start of [mean, mean + 3000, mean + 20_000, mean + 60_000]) {
    const all = logOutwardSum(term, start, 2, Number.POSITIVE_INFINITY, error);
    const scale = Math.min(deviation, (4 * deviation * deviation) / Math.max(1, start - mean));
    const smooth = logSmoothSum(term, start, 1, scale, error);
    expect(Math.abs(smooth - all)).toBeLessThan(error[0] as number);
    const mirrored = logSmoothSum(term, 2 * mean - start, -1, scale, error);
    const others = logOutwardSum(term, 2 * mean - start, -2, 0, error);
    expect(Math.abs(mirrored - others)).toBeLessThan(5e-13);
  }
});
