import { Probability } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { complementError, errorShare, sumOfLogs } from '../../src/numeric/stated-error.ts';

describe('stated errors', () => {
  it('carry over to the larger tail in proportion', () => {
    // the tail 0.2 may be off by a factor e^0.01, so 0.8 by 0.002
    expect(complementError(Probability.fromValue(0.2, 0.01))).toBeCloseTo(0.0025, 15);
    expect(complementError(Probability.fromComplement(0.2, 0.01))).toBe(0.01);
    expect(complementError(Probability.fromLog(-5000, 0.01))).toBe(0);
  });

  it('count with the share of their term, and not at all where it vanishes', () => {
    expect(errorShare(Math.log(0.25), 0.04, 0)).toBeCloseTo(0.01, 15);
    for (const log of [-1000, Number.NEGATIVE_INFINITY]) {
      expect(errorShare(log, Number.POSITIVE_INFINITY, 0)).toBe(0);
    }
  });

  it('cover the sum where both terms are off by as much as they state', () => {
    const sum = sumOfLogs(1, 1e-3, 0, 1e-5);
    const off = Math.log(Math.exp(1 + 1e-3) + Math.exp(1e-5));
    const exact = Math.log(Math.E + 1);
    expect(Math.abs(sum.log - exact)).toBeLessThan(1e-15);
    expect(sum.logError / (off - exact)).toBeCloseTo(1, 3);
    const alone = sumOfLogs(3, 1e-9, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY);
    expect(alone.log).toBe(3);
    expect(alone.logError).toBeCloseTo(1e-9, 14);
  });
});
