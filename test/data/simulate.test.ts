import {
  betaLaw,
  betaPrimeLaw,
  gaussian,
  type Law,
  originInHull,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { inHull, sampler, simulate } from 'hullgauge/data';
import { binomialCdf, incompleteBeta } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { binomialInterval } from '../../src/numeric/binomial-interval.ts';

describe('sampler', () => {
  it('draws the same points for the same seed on every engine', () => {
    const draw = sampler(gaussian(), { d: 3, seed: 2 });
    expect([...draw(), ...draw()]).toEqual([
      0.34880089353398386, -1.1487027564063603, -0.6445357034690593, 0.840701714581863,
      0.28874415432930745, 2.0324549451773883,
    ]);
    const heavy = sampler(studentT({ degreesOfFreedom: 2 }), { d: 2, seed: 2 });
    expect([...heavy(), ...heavy()]).toEqual([
      0.47755394470732454, -1.5727239889211666, 2.0031073262540127, 2.2798487210245715,
    ]);
  });

  /** Share of draws with |x|^2 at most `square`, against the exact probability. */
  const check = (law: Law, d: number, square: number, exact: number): void => {
    const draw = sampler(law, { d, seed: 17 });
    const m = 20_000;
    let below = 0;
    const mean = new Float64Array(d);
    for (let i = 0; i < m; i++) {
      const x = draw();
      let sum = 0;
      for (let j = 0; j < d; j++) {
        sum += (x[j] as number) ** 2;
        mean[j] = (mean[j] as number) + Math.sign(x[j] as number) / m;
      }
      if (sum <= square) below++;
    }
    expect(Math.abs(below / m - exact)).toBeLessThan(
      4.5 * Math.sqrt((exact * (1 - exact)) / m) + 1e-12,
    );
    for (const x of mean) expect(Math.abs(x)).toBeLessThan(4.5 / Math.sqrt(m));
  };

  it.each([1, 2, 7])('has the right radial law in dimension %s', (d) => {
    check(uniformBall(), d, 0.5, 0.5 ** (d / 2));
    check(uniformSphere(), d, 1 - 1e-9, 0);
    check(uniformSphere(), d, 1 + 1e-9, 1);
    // |x|^2 has a beta law for the beta law, |x|^2/(1 + |x|^2) for the beta-prime law.
    check(betaLaw(-0.7), d, 0.8, incompleteBeta(d / 2, 0.3, 0.8).value);
    check(betaLaw(3), d, 0.2, incompleteBeta(d / 2, 4, 0.2).value);
    check(betaPrimeLaw(d / 2 + 0.4), d, 3, incompleteBeta(d / 2, 0.4, 0.75).value);
    check(studentT({ degreesOfFreedom: 5 }), d, 1, incompleteBeta(d / 2, 2.5, 0.5).value);
    check(
      studentT({ degreesOfFreedom: 1 / 8 }),
      d,
      1e6,
      incompleteBeta(d / 2, 1 / 16, 1e6 / (1 + 1e6)).value,
    );
  });

  it('refuses laws and seeds out of range', () => {
    expect(() => sampler(gaussian(), { d: 0, seed: 1 })).toThrow(
      'sampler: d must be an integer from 1 to 134217728, got 0',
    );
    expect(() => sampler(gaussian(), { d: 1, seed: -1 })).toThrow('seed');
    expect(() => sampler(gaussian(), { d: 1 } as never)).toThrow(
      'seed must be an integer >= 0, got undefined',
    );
    expect(() => sampler('gaussian' as never, { d: 1, seed: 1 })).toThrow('law');
    expect(() => sampler(betaPrimeLaw(2), { d: 4, seed: 1 })).toThrow(
      'law.b must be finite and > d/2',
    );
    expect(() => sampler(betaPrimeLaw(2.01), { d: 4, seed: 1 })).toThrow(
      'law.b must be >= d/2 + 1/16',
    );
    expect(() => sampler(studentT({ degreesOfFreedom: 0.1 }), { d: 4, seed: 1 })).toThrow(
      'law.degreesOfFreedom must be >= 1/8, got 0.1',
    );
    expect(() => sampler(gaussian(), { d: 1, seed: 1, n: 3 } as never)).toThrow('n');
  });
});

describe('simulate', () => {
  const surrounded = (points: readonly Float64Array[]): boolean =>
    inHull([...points], [0, 0, 0]).position === 'inside';

  it('counts the same hits on every engine, and covers the exact probability', async () => {
    const run = await simulate(surrounded, { n: 8, d: 3, law: gaussian(), trials: 3000, seed: 4 });
    expect(run.hits).toBe(2334);
    expect(run.trials).toBe(3000);
    expect(run.estimate).toBe(run.hits / 3000);
    const exact = originInHull({ n: 8, d: 3 }).value;
    expect(run.interval[0]).toBeLessThan(exact);
    expect(run.interval[1]).toBeGreaterThan(exact);
  });

  it('has an interval whose ends have exactly the tails asked for', () => {
    for (const [hits, trials] of [
      [0, 10],
      [1, 10],
      [37, 120],
      [120, 120],
      [5, 1_000_000],
    ] as const) {
      const [lower, upper] = binomialInterval(hits, trials, 0.95);
      if (hits === 0) expect(lower).toBe(0);
      else
        expect(Math.abs(binomialCdf(hits - 1, trials, lower).complement / 0.025 - 1)).toBeLessThan(
          1e-9,
        );
      if (hits === trials) expect(upper).toBe(1);
      else expect(Math.abs(binomialCdf(hits, trials, upper).value / 0.025 - 1)).toBeLessThan(1e-9);
    }
    // No hits in n trials: the upper end solves (1 - p)^n = alpha/2.
    expect(
      Math.abs(binomialInterval(0, 10, 0.95)[1] - (1 - Math.exp(Math.log(0.025) / 10))),
    ).toBeLessThan(1e-15);
  });

  it('gives way, reports progress and stops when called off', async () => {
    const seen: number[] = [];
    let timers = 0;
    const timer = setInterval(() => timers++, 1);
    const options = { n: 30, d: 4, law: gaussian(), trials: 4000, seed: 1 };
    await simulate((_, next) => (next[0] as number) > 0, {
      ...options,
      onProgress: (done, total) => {
        expect(total).toBe(4000);
        seen.push(done);
      },
    });
    clearInterval(timer);
    expect(timers).toBeGreaterThan(1);
    expect(seen.length).toBeGreaterThan(20);
    expect(seen.at(-1)).toBe(4000);
    const controller = new AbortController();
    const run = simulate(() => true, {
      ...options,
      signal: controller.signal,
      onProgress: () => controller.abort(),
    });
    await expect(run).rejects.toMatchObject({
      name: 'AbortError',
      message: 'simulate: aborted after 64 of 4000',
    });
  });

  it('takes a sampler of the user, and no points at all', async () => {
    let k = 0;
    const run = await simulate(
      (points, next) => points.length === 2 && next[0] === 3 && next[1] === 9,
      {
        n: 2,
        d: 2,
        trials: 5,
        sampler: () => [++k % 3 === 0 ? 3 : k % 3, 9],
      },
    );
    expect(run.hits).toBe(5);
    expect(run.interval[1]).toBe(1);
    const none = await simulate((points) => points.length > 0, {
      n: 0,
      d: 1,
      law: uniformBall(),
      trials: 3,
      seed: 0,
    });
    expect(none.hits).toBe(0);
  });

  it('refuses bad arguments', async () => {
    const good = { n: 2, d: 2, law: gaussian(), trials: 3, seed: 1 };
    const call = (event: unknown, options: object): Promise<unknown> =>
      simulate(event as never, options as never);
    await expect(call(3, good)).rejects.toThrow('simulate: event must be a function, got 3');
    await expect(call(() => 1, good)).rejects.toThrow(
      'event must be a function that returns true or false, got 1',
    );
    await expect(call(() => true, { ...good, trials: 0 })).rejects.toThrow(
      'trials must be an integer >= 1',
    );
    await expect(call(() => true, { ...good, seed: undefined })).rejects.toThrow('seed');
    await expect(call(() => true, { ...good, law: undefined })).rejects.toThrow(
      'law must be given',
    );
    await expect(call(() => true, { ...good, sampler: () => [1, 2] })).rejects.toThrow(
      'law must be left out',
    );
    await expect(call(() => true, { ...good, n: 2 ** 20, d: 2 ** 20 })).rejects.toThrow(
      'n must be so small',
    );
    await expect(call(() => true, { ...good, seeds: 1 })).rejects.toThrow('seeds');
    const draws = (point: unknown): object => ({ n: 1, d: 2, trials: 1, sampler: () => point });
    await expect(call(() => true, draws([1]))).rejects.toThrow(
      'sampler() must be an array of 2 numbers',
    );
    await expect(call(() => true, draws([1, Number.NaN]))).rejects.toThrow(
      'sampler()[1] must be a finite number',
    );
  });
});
