import {
  bridgeHull,
  capProbability,
  DomainError,
  gaussian,
  hullVolumeRatio,
  jointWalkHull,
  labelSeparability,
  largest,
  logisticFitExists,
  nextPointInHull,
  originInHull,
  Probability,
  pointInHull,
  recoverySuccess,
  smallest,
  uniformBall,
  uniformSphere,
  walkHull,
} from 'hullgauge';
import { circularCone, coneMeetsSubspace, orthant, weylChamber } from 'hullgauge/conic';
import { binomialCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { statesExact } from '../support/exactness.ts';

type Numbers = Record<string, unknown>;
type Question = (args: never) => Probability;
const ask = (question: Question, args: Numbers): Probability => question(args as never);
const search = { smallest, largest } as unknown as Record<
  'smallest' | 'largest',
  (q: Question, parameter: string, args: Numbers, target: unknown) => ReturnType<typeof smallest>
>;

const meets = ({ n, m }: { n: number; m: number }): Probability =>
  coneMeetsSubspace(orthant(n), { codimension: m });
const meetsCap = ({ m }: { m: number }): Probability =>
  coneMeetsSubspace(circularCone(40, Math.PI / 4), { codimension: m });
const meetsChamber = ({ m }: { m: number }): Probability =>
  coneMeetsSubspace(weylChamber('B', 12), { codimension: m });
const singleSteps = ({ n, d }: { n: number; d: number }): Probability => {
  if (!(Number.isInteger(n) && n <= 3000)) throw new DomainError('singleSteps', 'n', 'whole', n);
  return jointWalkHull({ walks: Array.from({ length: n }).fill(1) as number[], d });
};
const heads = ({ k, n, p }: { k: number; n: number; p?: number }): Probability =>
  binomialCdf(k, n, p);

describe('exact ties', () => {
  it.each<[string, 'smallest' | 'largest', Question, string, Numbers, unknown, number]>([
    ['d = 2^52', 'smallest', originInHull, 'n', { d: 2 ** 52 }, 0.5, 2 ** 53],
    ['orthant 3', 'largest', meets, 'm', { n: 3 }, 0.25, 2],
    ['orthant 50', 'largest', meets, 'm', { n: 50 }, 0.5, 25],
    ['orthant 1000', 'largest', meets, 'm', { n: 1000 }, 0.5, 500],
    ['orthants of n dimensions', 'smallest', meets, 'n', { m: 70 }, 0.5, 140],
    ['cap of pi/4', 'largest', meetsCap, 'm', {}, 0.5, 20],
    ['bridge, half', 'smallest', bridgeHull, 'steps', { d: 1 }, 0.5, 4],
    ['bridge, 3/4', 'smallest', bridgeHull, 'steps', { d: 1 }, 0.75, 8],
    ['bridge', 'smallest', bridgeHull, 'steps', { d: 1 }, { complementAtMost: 2 ** -40 }, 2 ** 41],
    ['bridge, dimension', 'largest', bridgeHull, 'd', { steps: 16 }, 0.875, 1],
    ['walk', 'smallest', walkHull, 'steps', { d: 1 }, 0.25, 2],
    ['single steps', 'smallest', singleSteps, 'n', { d: 10 }, 0.5, 20],
    ['many single steps', 'smallest', singleSteps, 'n', { d: 700 }, 0.5, 1400],
    ['heads', 'smallest', heads, 'k', { n: 151 }, 0.5, 75],
    ['tosses', 'largest', heads, 'n', { k: 30 }, 0.5, 61],
    ['tosses, 3/4', 'largest', heads, 'n', { k: 1 }, 0.75, 2],
    ['next point', 'smallest', nextPointInHull, 'n', { d: 1, law: uniformBall() }, 0.5, 3],
    ['next Gaussian point', 'smallest', nextPointInHull, 'n', { d: 1 }, 0.875, 15],
    ['next coin', 'smallest', nextPointInHull, 'n', { d: 1, law: uniformSphere() }, 0.75, 2],
    ['interval', 'smallest', hullVolumeRatio, 'n', { d: 1, law: uniformBall() }, 0.75, 7],
    ['labels', 'smallest', labelSeparability, 'n', { d: 9 }, { atMost: 0.5 }, 20],
    ['fit', 'smallest', logisticFitExists, 'n', { d: 9 }, 0.5, 20],
    ['centre', 'smallest', pointInHull, 'n', { d: 30, mahalanobisDistance: 0 }, 0.5, 60],
    [
      'recovery',
      'smallest',
      recoverySuccess,
      'measurements',
      { model: 'box', n: 400, free: 100 },
      0.5,
      250,
    ],
  ])('%s', (_, direction, question, parameter, args, target, value) => {
    const answer = search[direction](question, parameter, args, target);
    expect([answer.value, answer.exact, answer.bracket]).toEqual([value, true, [value, value]]);
  });

  it('are recognised in a probability that a question gave', () => {
    const target = originInHull({ n: 30, d: 10 });
    expect(smallest(originInHull, 'n', { d: 10 }, target)).toMatchObject({
      value: 30,
      exact: true,
    });
    // an inexact one leaves open on which side of itself it lies
    const open = smallest(originInHull, 'n', { d: 30 }, originInHull({ n: 100, d: 30 }));
    expect([open.exact, open.bracket]).toEqual([false, [100, 101]]);
  });
});

describe('targets that a question takes', () => {
  const range = (from: number, to: number): number[] =>
    Array.from({ length: to - from + 1 }, (_, i) => from + i);

  it.each<[Question, string, Numbers, number[]]>([
    [originInHull, 'n', { d: 3 }, range(4, 40)],
    [originInHull, 'n', { d: 40 }, range(60, 110)],
    [originInHull, 'd', { n: 30 }, range(1, 29)],
    [originInHull, 'd', { n: 200 }, range(80, 120)],
    [labelSeparability, 'n', { d: 5 }, range(7, 40)],
    [labelSeparability, 'd', { n: 70 }, range(2, 60)],
    [walkHull, 'steps', { d: 1 }, range(2, 40)],
    [walkHull, 'steps', { d: 2 }, range(3, 30)],
    [walkHull, 'd', { steps: 12 }, range(1, 6)],
    [bridgeHull, 'steps', { d: 1 }, range(3, 40)],
    [bridgeHull, 'steps', { d: 3 }, range(5, 40)],
    [singleSteps, 'n', { d: 4 }, range(5, 40)],
    [meets, 'm', { n: 30 }, range(1, 29)],
    [meets, 'm', { n: 101 }, range(30, 70)],
    [meets, 'n', { m: 5 }, range(6, 40)],
    [meetsCap, 'm', {}, range(3, 37)],
    [meetsChamber, 'm', {}, range(1, 9)],
    [heads, 'k', { n: 60 }, range(5, 55)],
    [heads, 'n', { k: 7, p: 0.25 }, range(9, 50)],
    [nextPointInHull, 'n', { d: 1 }, range(2, 40)],
    [nextPointInHull, 'n', { d: 2, law: uniformBall() }, range(3, 12)],
    [hullVolumeRatio, 'n', { d: 3, law: uniformSphere() }, range(4, 30)],
    [hullVolumeRatio, 'n', { d: 2, law: uniformBall() }, range(3, 12)],
    [recoverySuccess, 'measurements', { model: 'l1', n: 40, sparsity: 3 }, range(8, 30)],
    [recoverySuccess, 'sparsity', { model: 'l1', n: 40, measurements: 20 }, range(1, 9)],
  ])('%o over %s, %o', (question, parameter, args, xs) => {
    for (const x of xs) {
      const p = ask(question, { ...args, [parameter]: x });
      const next = ask(question, { ...args, [parameter]: x + 1 });
      const rises = next.log - next.logComplement > p.log - p.logComplement;
      const low = p.value <= 0.5;
      for (const target of [low ? p.value : { complementAtMost: p.complement }, p]) {
        const { value, exact, bracket } = (rises ? search.smallest : search.largest)(
          question,
          parameter,
          args,
          target,
        );
        const beside = rises ? x + 1 : x - 1;
        const both = [Math.min(x, beside), Math.max(x, beside)];
        // exact just where the value is, and else both sides remain possible
        expect([x, value, exact, bracket]).toEqual([
          x,
          x,
          statesExact(p),
          statesExact(p) ? [x, x] : both,
        ]);
      }
    }
  });
});

/** 1 - e^(-n/100), known only to a tenth of the smaller tail. */
const vague =
  (from = 0, to = Number.POSITIVE_INFINITY) =>
  ({ n }: { n: number }): Probability => {
    if (!(Number.isInteger(n) && n >= from && n <= to)) {
      throw new DomainError('vague', 'n', `an integer from ${from} to ${to}`, n);
    }
    return Probability.fromLogComplement(-n / 100, 0.1);
  };

describe('doubt', () => {
  it('reaches beyond the stations of the walk', () => {
    for (const n of [15, 16, 17, 4095, 4096, 4097]) {
      const goal = { complementAtMost: Math.exp(-(n - 0.3) / 100) };
      const { value, exact, bracket } = smallest(vague(), 'n', {}, goal);
      expect([value, exact]).toEqual([n, false]);
      expect(bracket[0]).toBeLessThan(n);
      expect(bracket[1]).toBeGreaterThan(n);
      // 10 % of the small tail: a tenth of it is n/10 below 1/2, ten above
      expect(n - bracket[0]).toBeLessThanOrEqual(11);
      const { value: last, bracket: held } = largest(
        vague(),
        'n',
        {},
        {
          atMost: Probability.fromComplement(Math.exp(-(n + 0.3) / 100)),
        },
      );
      expect(last).toBe(n);
      expect(held[0]).toBeLessThan(n);
      expect(held[1]).toBeGreaterThan(n);
    }
  });

  it('ends at the ends of the domain', () => {
    const goal = { complementAtMost: Math.exp(-0.168) };
    expect(smallest(vague(16, 18), 'n', {}, goal)).toMatchObject({ value: 17, bracket: [16, 18] });
    expect(smallest(vague(17), 'n', {}, goal)).toMatchObject({ value: 17, exact: false });
    expect(smallest(vague(17), 'n', {}, goal).bracket).toEqual([17, 19]);
    const most = { atMost: Probability.fromComplement(Math.exp(-0.172)) };
    expect(largest(vague(0, 17), 'n', {}, most)).toMatchObject({ value: 17, bracket: [15, 17] });
    // the condition ends at once, so there is nothing else
    expect(smallest(vague(17), 'n', {}, most)).toMatchObject({ value: 17, bracket: [17, 17] });
    expect(smallest(vague(17), 'n', {}, most).exact).toBe(false);
  });

  it('has no end where nothing is ever known better', () => {
    const flat = ({ n }: { n: number }): Probability => {
      if (!(Number.isInteger(n) && n >= 0)) throw new DomainError('flat', 'n', 'whole', n);
      return Probability.fromValue(0.5, 0.1);
    };
    const { exact, bracket } = smallest(flat, 'n', {}, 0.5);
    expect([exact, bracket]).toEqual([false, [0, Number.POSITIVE_INFINITY]]);
  });

  it('of a real argument surrounds a crossing at a station', () => {
    for (const args of [
      { d: 1, law: uniformBall() },
      { d: 3, law: uniformSphere() },
      { d: 3, law: gaussian() },
    ]) {
      for (const { bracket } of [
        largest(capProbability, 'height', args, 0.5),
        smallest(capProbability, 'height', args, { atMost: 0.5 }),
      ]) {
        expect(bracket[0]).toBeLessThanOrEqual(0);
        expect(bracket[1]).toBeGreaterThanOrEqual(0);
        expect(bracket[1] - bracket[0]).toBeLessThan(1e-14);
      }
    }
    const share = ({ x }: { x: number }): Probability => {
      if (!(x >= 0 && x <= 1)) throw new DomainError('share', 'x', 'from 0 to 1', x);
      return Probability.fromValue(0.05 + 0.9 * x, 0.1);
    };
    // at least and at most, in the middle and in doubt up to an end
    expect(smallest(share, 'x', {}, 0.06).bracket[0]).toBeLessThan(1 / 90);
    expect(smallest(share, 'x', {}, 0.06).bracket[1]).toBeGreaterThan(1 / 90);
    expect(smallest(share, 'x', {}, 0.94).bracket[1]).toBe(1);
    expect(smallest(share, 'x', {}, 0.05).bracket[0]).toBe(0);
    expect(smallest(share, 'x', {}, 0.05).bracket[1]).toBeGreaterThan(0.005);
    const high = largest(share, 'x', {}, { atMost: 0.95 });
    expect([high.bracket[0] < 0.995, high.bracket[1]]).toEqual([true, 1]);
  });
});

describe('steps of a real argument', () => {
  it('are found to the last digit, on either side', () => {
    for (const width of [1, 1 / 3, 1000, 1e-9, 2 ** -30]) {
      const steps = ({ x }: { x: number }): Probability =>
        Probability.fromValue(Math.min(1, Math.max(0, Math.floor(x / width) / 8)));
      for (const target of [1 / 8, 3 / 8, 0.6]) {
        const up = smallest(steps, 'x', {}, target);
        expect(steps({ x: up.value }).value).toBeGreaterThanOrEqual(target);
        expect(steps({ x: up.bracket[0] }).value).toBeLessThan(target);
        expect(up.bracket[1]).toBe(up.value);
        const between = up.bracket[0] + (up.value - up.bracket[0]) / 2;
        expect(up.bracket).toContain(between);
        const down = largest(steps, 'x', {}, { atMost: target });
        expect(steps({ x: down.value }).value).toBeLessThanOrEqual(target);
        expect(steps({ x: down.bracket[1] }).value).toBeGreaterThan(target);
      }
      const { value } = smallest(steps, 'x', {}, 0.5);
      if (width !== 1 / 3) expect(value).toBe(4 * width);
    }
  });
});
