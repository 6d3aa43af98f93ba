import { describe, expect, it } from 'vitest';
import { portableExp, portableLog, randomStream } from '../../src/numeric/random.ts';
import { ulpDistance } from '../support/ulp.ts';

/** Mean of f over m draws, with its standard error. */
function meanOf(m: number, draw: () => number): { mean: number; error: number } {
  let sum = 0;
  let squares = 0;
  for (let i = 0; i < m; i++) {
    const x = draw();
    sum += x;
    squares += x * x;
  }
  const mean = sum / m;
  return { mean, error: Math.sqrt((squares / m - mean * mean) / m) };
}

describe('random', () => {
  it('gives one stream per seed, the same on every engine', () => {
    const stream = randomStream(2024);
    const uniforms = [stream.uniform(), stream.uniform(), stream.uniform()];
    const normals = [stream.normal(), stream.normal(), stream.normal()];
    const gammas = [stream.gamma(2.5), stream.gamma(0.25)];
    // Exact equality on purpose: only operations that the language defines exactly are used.
    expect({ uniforms, normals, gammas }).toEqual({
      uniforms: [0.4936067650041883, 0.7146366977156863, 0.5578291695895129],
      normals: [-0.0886170179585149, 0.7166573279278008, 0.2864422712966803],
      gammas: [2.4056976355206605, 0.009248157279586784],
    });
    let sum = 0;
    for (let i = 0; i < 50_000; i++) sum += stream.normal() + stream.gamma(0.7);
    expect(sum).toBe(34777.75233023408);
  });

  it('does not repeat across neighbouring or large seeds', () => {
    const seen = new Set<number>();
    for (let seed = 0; seed < 2000; seed++) seen.add(randomStream(seed).uniform());
    for (let e = 32; e < 53; e++) seen.add(randomStream(2 ** e).uniform());
    seen.add(randomStream(Number.MAX_SAFE_INTEGER).uniform());
    expect(seen.size).toBe(2022);
    const firsts = meanOf(2000, seedCounter());
    expect(Math.abs(firsts.mean - 0.5)).toBeLessThan(4 * firsts.error);
  });

  it('has uniform numbers inside (0, 1) with the right moments in every bit range', () => {
    const { uniform } = randomStream(1);
    const counts = new Float64Array(64);
    let low = 0;
    let outside = 0;
    for (let i = 0; i < 64_000; i++) {
      const x = uniform();
      if (!(x > 0 && x < 1)) outside++;
      counts[Math.floor(x * 64)] = (counts[Math.floor(x * 64)] as number) + 1;
      if ((x * 2 ** 40) % 1 < 0.5) low++;
    }
    expect(outside).toBe(0);
    // Chi-squared with 63 degrees of freedom: 130 has probability 1e-6.
    expect(counts.reduce((sum, c) => sum + (c - 1000) ** 2 / 1000, 0)).toBeLessThan(130);
    expect(Math.abs(low - 32_000)).toBeLessThan(5 * Math.sqrt(16_000));
  });

  it('has normal numbers with the moments and tails of the normal law', () => {
    const { normal } = randomStream(7);
    const m = 200_000;
    const draws = Float64Array.from({ length: m }, normal);
    const moment = (f: (x: number) => number): { mean: number; error: number } => {
      let i = 0;
      return meanOf(m, () => f(draws[i++] as number));
    };
    const checks: readonly (readonly [(x: number) => number, number])[] = [
      [(x) => x, 0],
      [(x) => x * x, 1],
      [(x) => x * x * x, 0],
      [(x) => x ** 4, 3],
      [(x) => (x > 1 ? 1 : 0), 0.15865525393145707],
      [(x) => (x < -2.5 ? 1 : 0), 0.0062096653257761352],
    ];
    for (const [f, exact] of checks) {
      const { mean, error } = moment(f);
      expect(Math.abs(mean - exact)).toBeLessThan(4.5 * error);
    }
    let lag = 0;
    for (let i = 1; i < m; i++) lag += (draws[i] as number) * (draws[i - 1] as number);
    expect(Math.abs(lag / m)).toBeLessThan(4.5 / Math.sqrt(m));
  });

  it.each([0.05, 0.5, 1, 3.7, 400])(
    'has gamma numbers of shape %s with mean and variance equal to it',
    (shape) => {
      const stream = randomStream(11);
      const mean = meanOf(40_000, () => stream.gamma(shape));
      expect(Math.abs(mean.mean - shape)).toBeLessThan(4.5 * mean.error);
      const variance = meanOf(40_000, () => (stream.gamma(shape) - shape) ** 2);
      expect(Math.abs(variance.mean - shape)).toBeLessThan(4.5 * variance.error);
    },
  );

  it('has a logarithm and an exponential within 2 ulp', () => {
    const { uniform } = randomStream(3);
    let worst = 0;
    for (let i = 0; i < 20_000; i++) {
      const x = i % 2 === 0 ? uniform() : 1 + (uniform() - 0.5) * 10 ** -(i % 12);
      worst = Math.max(worst, ulpDistance(portableLog(x), Math.log(x)));
      const y = -uniform() * (i % 3 === 0 ? 700 : 2);
      worst = Math.max(worst, ulpDistance(portableExp(y), Math.exp(y)));
    }
    expect(worst).toBeLessThanOrEqual(3); // 2 of ours and 1 of the engine's
    for (const x of [Number.MIN_VALUE, 2 ** -1022, 1e-300, 2, 1e300, Number.MAX_VALUE]) {
      expect(ulpDistance(portableLog(x), Math.log(x))).toBeLessThanOrEqual(2);
    }
    expect(portableLog(1)).toBe(0);
    expect(portableExp(0)).toBe(1);
    expect(portableExp(-1e6)).toBe(0);
  });
});

function seedCounter(): () => number {
  let seed = 0;
  return () => randomStream(seed++).uniform();
}
