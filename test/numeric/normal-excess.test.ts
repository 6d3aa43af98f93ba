import { describe, expect, it } from 'vitest';
import { normalExcess } from '../../src/numeric/normal-excess.ts';

/** I_0..I_4 over phi at a level, from mpmath with 40 digits: the forward recurrence from Mills' ratio. */
const EXACT: readonly (readonly [number, readonly number[]])[] = [
  [0, [1.2533141373155003, 1, 0.6266570686577501, 0.3333333333333333, 0.15666426716443753]],
];

describe('moments of the normal excess', () => {
  it('are elementary at level 0', () => {
    const out = new Float64Array(5);
    for (const [t, exact] of EXACT) {
      expect(normalExcess(t, out)).toBeCloseTo(0.3989422804014327, 16);
      exact.forEach((value, m) => {
        expect((out[m] as number) / value).toBeCloseTo(1, 14);
      });
    }
  });

  it('obey their recurrence on both sides of the switch of methods', () => {
    const out = new Float64Array(5);
    for (let t = 0.01; t < 40; t *= 1.07) {
      normalExcess(t, out);
      const [i0, i1, i2, i3, i4] = out as unknown as [number, number, number, number, number];
      // sums of positive terms: I_(m-2) = t I_(m-1) + m I_m
      expect(Math.abs(t * i0 + i1 - 1)).toBeLessThan(5e-15);
      expect(Math.abs((t * i1 + 2 * i2) / i0 - 1)).toBeLessThan(5e-15);
      expect(Math.abs((t * i2 + 3 * i3) / i1 - 1)).toBeLessThan(5e-15);
      expect(Math.abs((t * i3 + 4 * i4) / i2 - 1)).toBeLessThan(5e-15);
    }
  });

  it('are continuous where the method changes', () => {
    const [below, above] = [new Float64Array(5), new Float64Array(5)];
    normalExcess(0.8 - 1e-12, below);
    normalExcess(0.8, above);
    below.forEach((value, m) => {
      expect(Math.abs(value / (above[m] as number) - 1)).toBeLessThan(1e-11);
    });
  });

  it('underflow with the density, not with the ratio', () => {
    const out = new Float64Array(5);
    expect(normalExcess(60, out)).toBe(0);
    // (1/t)(1 - 1/t^2 + ..)
    expect(out[0]).toBeCloseTo(1 / 60, 5);
    expect(out[4]).toBeGreaterThan(0);
  });
});
