/** The fuzzer itself: what it has to notice. */
import { LogNumber, originInHull, Probability } from 'hullgauge';
import { orthant } from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';
import { inspect } from './inspect.ts';
import { inspectMethods } from './methods.ts';
import { fallsBetween } from './order.ts';

describe('inspect', () => {
  const p = originInHull({ n: 30, d: 12 });

  it('finds nothing wrong with answers', () => {
    expect(inspect({ p, list: [p, 1, null], cone: orthant(5) })).toBeUndefined();
  });

  it('finds NaN anywhere', () => {
    expect(inspect(Number.NaN)).toBe('NaN');
    expect(inspect({ a: [{ b: new Float64Array([1, Number.NaN]) }] })).toContain('NaN');
    expect(inspect({ text: 'NaN points' })).toContain('NaN');
  });

  it('finds probabilities that cannot be', () => {
    const { value, complement, log, logComplement, logError } = p;
    const kind = 'probability';
    const good = { kind, value, complement, log, logComplement, logError };
    for (const wrong of [
      { value: 1.1 },
      { value: value * (1 - 1e-14) },
      { complement: -1e-300 },
      { log: log + 1e-11 },
      { logComplement: 1e-20 },
      { logError: -1e-16 },
      { logError: Number.NaN },
    ]) {
      expect(inspect({ ...good, ...wrong })).toBeDefined();
    }
  });

  it('finds cones whose volumes do not sum to 1', () => {
    const cone = orthant(4);
    const volumes = [...cone.intrinsicVolumes];
    volumes[2] = (volumes[2] as number) + 1e-12;
    expect(inspect({ ...cone, intrinsicVolumes: volumes })).toContain('sum');
  });
});

describe('order', () => {
  it('compares within the stated errors, on the smaller side', () => {
    const [low, high] = [Probability.fromComplement(1e-12), Probability.fromComplement(0.9e-12)];
    expect(fallsBetween(low, high)).toBeUndefined();
    expect(fallsBetween(high, low)).toBeDefined();
    const vague = Probability.fromComplement(1e-12, 0.2);
    expect(fallsBetween(high, vague)).toBeUndefined();
    expect(fallsBetween(LogNumber.fromLog(900), LogNumber.fromLog(899.9))).toBeDefined();
    expect(fallsBetween({ lower: 0.5, upper: 1 }, { lower: 0.4, upper: 1 })).toContain('lower');
  });

  it('notices a distribution function that falls', () => {
    const law = {
      mean: 0,
      variance: 1,
      cdf: (x: number) => Probability.fromValue(x < 0 ? 0.5 : 0.4),
      quantile: () => 0,
    };
    expect(inspectMethods(law, () => 0.5)).toContain('before');
  });
});
