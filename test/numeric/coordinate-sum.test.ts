import { describe, expect, it } from 'vitest';
import { BLOCK, CoordinateSumTable, tableClass } from '../../src/numeric/coordinate-sum.ts';
import { CoordinateSumTransform } from '../../src/numeric/coordinate-sum-transform.ts';
import { logGamma, logGammaRatioKernel } from '../../src/special/log-gamma.ts';

const values = new Float64Array(BLOCK);
const errors = new Float64Array(BLOCK);

function direct(k: number, Z: number): number {
  const [low, high] = tableClass(k);
  new CoordinateSumTable(Z, low, high).logBlock(k, values, errors, 0);
  return values[0] as number;
}

/** E[((k-1) + Z^2 (k - c^2)) exp(-Z^2 c^2 / 2)] for k = 2, where c^2 = 1 + sin t, t uniform on (0, pi). */
function planar(Z: number): number {
  let sum = 0;
  const nodes = 4000;
  for (let i = 0; i < nodes; i++) {
    const s = Math.sin((Math.PI * (i + 0.5)) / nodes);
    sum += (1 + Z * Z * (1 - s)) * Math.exp(-0.5 * Z * Z * (1 + s));
  }
  return sum / nodes;
}

describe('the coordinate-sum transform', () => {
  it('is an average over a quarter circle for k = 2', () => {
    for (const Z of [0.1, 0.7, 1.19, 1.21, 2.5]) {
      const constant = logGammaRatioKernel(0.5, 0.5) - 0.5 * Math.log(Math.PI);
      const average = Math.log(planar(Z));
      // the midpoint rule is good to about 1e-6 at the ends of the quarter circle
      expect(Math.abs(direct(2, Z) + constant - average)).toBeLessThan(3e-6);
    }
  });

  it('is k - 1, up to its constant, at 0', () => {
    const transform = new CoordinateSumTransform();
    for (const k of [2, 3, 8, 30, 200]) {
      const exact =
        Math.log(k - 1) + 0.5 * Math.log(Math.PI) - logGammaRatioKernel((k - 1) / 2, 0.5);
      expect(transform.log(k, 0)).toBe(exact);
      expect(Math.abs(direct(k, 1e-8) - exact)).toBeLessThan(2e-13);
    }
  });

  it('is the mass at the corners for large Z', () => {
    // near an axis c^2 - 1 is twice the sum of the other coordinates, to order k^2 / Z^2
    for (const Z of [1e4, 1e5, 1e6]) {
      for (const k of [2, 10, 100, 499, 767]) {
        const logSphere = Math.LN2 + (k / 2) * Math.log(Math.PI) - logGamma(k / 2);
        const constant = logGammaRatioKernel((k - 1) / 2, 0.5) - 0.5 * Math.log(Math.PI);
        const corners =
          Math.log(k * (k - 1)) + k * Math.LN2 - logSphere - (2 * k - 4) * Math.log(Z);
        const rest = direct(k, Z) + 0.5 * Z * Z + constant - corners;
        expect(Math.abs(rest)).toBeLessThan((2 * k * k) / (Z * Z) + 1e-15 * Z * Z);
      }
    }
  });

  it('goes on smoothly where the path changes', () => {
    for (const [k, Z] of [
      [2, 1.2],
      [7, 1.2],
      [12, 1.2],
      [13, 1.58],
      [60, 1.58],
      [150, 1.58],
      [20, 9],
    ] as const) {
      const h = 1e-3;
      const at = [-1.5, -0.5, 0.5, 1.5].map((i) => direct(k, Z + i * h)) as [
        number,
        number,
        number,
        number,
      ];
      const third = at[3] - 3 * at[2] + 3 * at[1] - at[0];
      expect(Math.abs(third)).toBeLessThan(3e-9 * k);
    }
  });

  it('is interpolated within its error', () => {
    const transform = new CoordinateSumTransform();
    for (const k of [2, 3, 4, 5, 9, 12, 13, 24, 25, 40, 48]) {
      for (const Z of [0.03, 0.9, 1.55, 1.65, 2.2, 3.19, 4.4, 7.7]) {
        const log = transform.log(k, Z);
        const bound = transform.error;
        const exact = direct(k, Z);
        expect(Math.abs(log - exact)).toBeLessThan(bound + (errors[0] as number));
        expect(bound).toBeLessThan(2e-13);
      }
    }
  });

  it('yields a block of k at once', () => {
    const [low, high] = tableClass(20);
    const table = new CoordinateSumTable(2, low, high);
    table.logBlock(14, values, errors, 0);
    const block = values.slice();
    for (let m = 0; m < BLOCK; m++) {
      expect(Math.abs((block[m] as number) - direct(14 + 2 * m, 2))).toBeLessThan(1e-12);
    }
  });
});
