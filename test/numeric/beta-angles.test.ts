import { describe, expect, it } from 'vitest';
import { BetaAngles, type BetaFamily } from '../../src/numeric/beta-angles.ts';
import { logBinomialKernel } from '../../src/special/log-beta.ts';

const error = new Float64Array(1);

/** I_(n,m) J_(m,k) with its sign. */
function term(angles: BetaAngles, n: number, m: number, k: number): number {
  const log = angles.logTerm({ n, log: Math.log(n) }, m, k, error);
  return angles.sign === 0 ? 0 : angles.sign * Math.exp(log);
}

const families: readonly (readonly [BetaFamily, number])[] = [
  ['beta', 0.5],
  ['beta', 1],
  ['beta', 3.7],
  ['beta', 40],
  ['betaPrime', 0.5],
  ['betaPrime', 1],
  ['betaPrime', 2.25],
  ['betaPrime', 30],
];

/** Dimension, and the logarithm of the mean share that a random simplex has of the ball. */
const LARGE_SIMPLICES = [
  [1000, -4370.1115451815413],
  [2000, -9435.7286997529432],
  [5000, -25884.166897973251],
  [10000, -55237.231946742903],
] as const;

describe('the terms of beta polytopes', () => {
  it.each(families)('have equal sums over even and odd m: %s, alpha = %d', (family, alpha) => {
    const angles = new BetaAngles(family, alpha);
    for (const [n, k] of [
      [5, 1],
      [9, 2],
      [14, 1],
    ] as const) {
      const sums = [0, 0];
      let size = 0;
      for (let m = k; m <= n; m++) {
        const value = term(angles, n, m, k);
        sums[m % 2] = (sums[m % 2] as number) + value;
        size += Math.abs(value);
      }
      const half = 0.5 * Math.exp(logBinomialKernel(n, k));
      for (const sum of sums) expect(Math.abs(sum - half) / size).toBeLessThan(3e-14);
    }
  });

  it('vanish and alternate beyond the last simplex that exists', () => {
    for (const alpha of [1, 2, 5]) {
      const angles = new BetaAngles('beta', alpha);
      expect(term(angles, 20, alpha + 3, 1)).toBeGreaterThan(0);
      for (const m of [alpha + 4, alpha + 6, alpha + 8]) expect(term(angles, 20, m, 1)).toBe(0);
      expect(term(angles, 20, alpha + 5, 1)).toBeLessThan(0);
      expect(term(angles, 20, alpha + 7, 1)).toBeGreaterThan(0);
    }
  });

  it('give the mean volume of a random simplex in the ball', () => {
    // 2 J_(d+2,1)(d) / (d + 2): 35 / (48 pi^2) in the plane, 9/715 in space
    const share = (d: number): number =>
      (2 * term(new BetaAngles('beta', d), d + 2, d + 2, 1)) / (d + 2);
    expect(share(1)).toBeCloseTo(1 / 3, 14);
    expect(share(2)).toBeCloseTo(35 / (48 * Math.PI * Math.PI), 15);
    expect(share(3)).toBeCloseTo(9 / 715, 15);
    // 2^-d C(d+1, (d+1)/2)^(d+1) / C((d+1)^2, (d+1)^2/2), mpmath with 40 digits
    for (const [d, exact] of LARGE_SIMPLICES) {
      const log = new BetaAngles('beta', d).logTerm(
        { n: d + 2, log: Math.log(d + 2) },
        d + 2,
        1,
        error,
      );
      const gap = Math.abs(log - Math.log(d / 2 + 1) - exact);
      expect(gap).toBeLessThan(error[0] as number);
      expect(error[0]).toBeLessThan(1e-13 * d);
    }
  });

  it('know one-point and whole-simplex cases', () => {
    const angles = new BetaAngles('betaPrime', 2);
    expect(term(angles, 6, 6, 6)).toBeCloseTo(1, 13);
    expect(term(angles, 6, 6, 5)).toBeCloseTo(3, 13);
    // the angles of a triangle sum to half a turn
    expect(term(angles, 3, 3, 1)).toBeCloseTo(0.5, 14);
    expect(term(new BetaAngles('beta', 7), 3, 3, 1)).toBeCloseTo(0.5, 14);
  });
});
