import fc from 'fast-check';
import { logisticSignal, logisticThreshold } from 'hullgauge';
import { millsRatio, normalCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';

const h = (offset: number, signal: number): number => logisticThreshold({ offset, signal });

/** The objective of the minimisation at any point, by a plain sum over a grid of its own. */
function objective(offset: number, signal: number, t0: number, t1: number): number {
  const square = (a: number): number => {
    const density = Math.exp(-a * a * 0.5) / Math.sqrt(2 * Math.PI);
    if (a > -6) return (1 + a * a) * normalCdf(a).value + a * density;
    return density * (millsRatio(-a) * (1 + a * a) + a);
  };
  let sum = 0;
  const step = 0.11 / Math.max(1, signal);
  for (let x = -12; x < 12; x += step) {
    const u = offset + signal * x;
    const weight = (step * Math.exp(-0.5 * x * x)) / Math.sqrt(2 * Math.PI);
    const a = t0 + t1 * x;
    sum += weight * (square(a) / (1 + Math.exp(-u)) + square(-a) / (1 + Math.exp(u)));
  }
  return sum;
}

describe('logisticThreshold', () => {
  it('is one half for pure noise and falls from it quadratically', () => {
    expect(h(0, 0)).toBe(0.5);
    expect(h(-0, 0)).toBe(0.5);
    for (const [b, g] of [
      [0.01, 0],
      [0, 0.01],
      [0.006, 0.008],
    ] as const) {
      // relative deviation of order 1e-4 from the fourth order
      const ratio = ((0.5 - h(b, g)) * 4 * Math.PI) / (b * b + g * g);
      expect(Math.abs(ratio - 1)).toBeLessThan(1e-4);
    }
  });

  it('falls like 1.01526785754 / signal', () => {
    for (const g of [30, 300, 3e4]) {
      const deficit = (1.01526785754 - g * h(0, g)) * g * g;
      if (g < 1e3) expect(deficit).toBeCloseTo(2.7, 1);
      expect(g * h(0, g)).toBeCloseTo(1.01526785754, g > 1e3 ? 8 : 2);
    }
    expect(h(0, 1e300) * 1e300).toBeCloseTo(1.01526785754, 10);
  });

  it('is the minimum: no other line does better, and the offset may change its sign', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -6, max: 6, noNaN: true }),
        fc.double({ min: 0, max: 7, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        fc.double({ min: -3, max: 1, noNaN: true }),
        (offset, signal, t0, t1) => {
          const least = h(offset, signal);
          expect(h(-offset, signal)).toBe(least);
          expect(least).toBeGreaterThan(0);
          expect(least).toBeLessThanOrEqual(0.5);
          expect(objective(offset, signal, t0, t1)).toBeGreaterThan(least * (1 - 1e-12));
        },
      ),
      { numRuns: 40 },
    );
  });

  it('is reached: a search from the outside ends at the same value', () => {
    for (const [b, g] of [
      [1, 2],
      [3, 0.5],
      [0, 6],
    ] as const) {
      let [t0, t1, size] = [0, 0, 1];
      let best = objective(b, g, t0, t1);
      while (size > 1e-5) {
        const moves = [
          [size, 0],
          [-size, 0],
          [0, size],
          [0, -size],
        ] as const;
        const better = moves.find(([s, t]) => objective(b, g, t0 + s, t1 + t) < best);
        if (better === undefined) size /= 2;
        else {
          [t0, t1] = [t0 + better[0], t1 + better[1]];
          best = objective(b, g, t0, t1);
        }
      }
      expect(best / h(b, g) - 1).toBeLessThan(1e-9);
      expect(best / h(b, g) - 1).toBeGreaterThan(-1e-13);
    }
  });

  it('does not jump where the rule of integration changes', () => {
    for (const offset of [0, 3, 20, 50]) {
      const step = 2 ** -24;
      const [below, at, above] = [h(offset, 8 - step), h(offset, 8), h(offset, 8 + step)];
      // the second difference of a smooth function; its own curvature is worth 1e-14
      expect(Math.abs(below - 2 * at + above) / at).toBeLessThan(1e-13);
    }
  });

  it('needs no intercept at offset 0, and refuses what it does not cover', () => {
    expect(logisticThreshold({ signal: 2, intercept: false })).toBe(h(0, 2));
    expect(() => logisticThreshold({ signal: 2, offset: 1, intercept: false })).toThrow(
      'logisticThreshold: offset must be 0 where intercept is false, got 1',
    );
    expect(() => h(28, 0)).toThrow('rarer class');
    expect(() => h(1e300, 0)).toThrow('rarer class');
    expect(() => h(1e300, 1e3)).toThrow('rarer class');
    expect(h(27.6, 0)).toBeGreaterThan(0);
    expect(() => h(0, Number.POSITIVE_INFINITY)).toThrow('signal must be a finite number >= 0');
    expect(() => h(0, -1)).toThrow('signal must be');
  });
});

describe('logisticSignal', () => {
  it('inverts the threshold', () => {
    fc.assert(
      fc.property(fc.double({ min: -30, max: -0.7, noNaN: true }), (log) => {
        const ratio = Math.exp(log);
        const signal = logisticSignal({ ratio });
        expect(Math.abs(h(0, signal) / ratio - 1)).toBeLessThan(1e-15);
      }),
      { numRuns: 15 },
    );
  });

  it('takes the falling side where a little signal evens out the classes', () => {
    const peak = 0.3;
    expect(h(3, 0)).toBeLessThan(0.18);
    for (const ratio of [0.05, 0.17, 0.19]) {
      const signal = logisticSignal({ ratio, offset: -3 });
      expect(h(3, signal)).toBeCloseTo(ratio, 15);
      expect(h(3, 1.01 * signal)).toBeLessThan(ratio);
    }
    expect(() => logisticSignal({ ratio: peak, offset: 3 })).toThrow(
      /ratio must be at most the largest threshold at this offset, 0\.2\d+, got 0\.3/,
    );
  });

  it('has its limits', () => {
    expect(logisticSignal({ ratio: 0.5 })).toBe(0);
    expect(logisticSignal({ ratio: 1e-300 })).toBeCloseTo(1.01526785754e300, -290);
    expect(() => logisticSignal({ ratio: 0 })).toThrow('ratio must be a number > 0 and <= 0.5');
    expect(() => logisticSignal({ ratio: 1e-301 })).toThrow('ratio');
    expect(() => logisticSignal({ ratio: 0.1, offset: 29 })).toThrow('offset');
  });
});
