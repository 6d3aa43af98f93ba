import fc from 'fast-check';
import {
  DomainError,
  dichotomyCount,
  type LogNumber,
  labelSeparability,
  largest,
  logisticFitExists,
  nextPointInHull,
  originInHull,
  originInHullLowerBound,
  Probability,
  recoverySuccess,
  smallest,
} from 'hullgauge';
import { coneMeetsSubspace, orthant } from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';
import { type NamedRow, readTable } from '../support/reference.ts';

const rows = readTable<NamedRow>('conic');

describe('reference sizes', () => {
  it.each(rows.filter(({ quantity }) => quantity === 'wendel.n_for'))(
    '$args -> $value',
    ({ args, value }) => {
      const { d, p } = args as { d: number; p: string };
      const answer = smallest(originInHull, 'n', { d }, Number(p));
      expect([answer.value, answer.exact, answer.bracket]).toEqual([
        Number(value),
        true,
        [Number(value), Number(value)],
      ]);
    },
  );

  it.each(rows.filter(({ quantity }) => quantity === 'wendel.n_for_q'))(
    '$args -> $value',
    ({ args, value }) => {
      const { d, q } = args as { d: number; q: string };
      const answer = smallest(originInHull, 'n', { d }, { complementAtMost: Number(q) });
      expect([answer.value, answer.exact]).toEqual([Number(value), true]);
    },
  );

  it.each(rows.filter(({ quantity }) => quantity === 'wendel.d_for'))(
    '$args -> $value',
    ({ args, value }) => {
      const { n, p } = args as { n: number; p: string };
      const answer = largest(originInHull, 'd', { n }, Number(p));
      expect([answer.value, answer.exact]).toEqual([Number(value), true]);
    },
  );
});

describe('ties', () => {
  it('are exact at n = 2d and at dyadic targets', () => {
    for (const d of [1, 2, 3, 40, 1000, 1e6, 1e9, 1e15]) {
      const answer = smallest(originInHull, 'n', { d }, 0.5);
      expect([answer.value, answer.exact, answer.probability.value]).toEqual([2 * d, true, 0.5]);
    }
    for (const d of [1, 5, 30, 500, 1000]) {
      const answer = smallest(originInHull, 'n', { d }, 2 ** -d);
      expect([answer.value, answer.exact]).toEqual([d + 1, true]);
    }
    // P_in(10, 3) = 233/256
    expect(smallest(originInHull, 'n', { d: 3 }, 233 / 256)).toMatchObject({
      value: 10,
      exact: true,
    });
    expect(smallest(originInHull, 'n', { d: 3 }, 233 / 256 + 2 ** -53)).toMatchObject({
      value: 11,
      exact: true,
    });
    expect(largest(originInHull, 'd', { n: 80 }, 0.5)).toMatchObject({ value: 40, exact: true });
    expect(largest(labelSeparability, 'n', { d: 9, intercept: false }, 0.5)).toMatchObject({
      value: 18,
      exact: true,
    });
  });
});

describe('targets', () => {
  it('has four forms that agree', () => {
    const args = { d: 40 };
    const plain = smallest(originInHull, 'n', args, 0.95);
    expect(smallest(originInHull, 'n', args, { atLeast: 0.95 })).toEqual(plain);
    expect(smallest(originInHull, 'n', args, { complementAtMost: 1 - 0.95 })).toEqual(plain);
    expect(smallest(originInHull, 'n', args, Probability.fromValue(0.95))).toEqual(plain);
    const labels = smallest(labelSeparability, 'n', { d: 40 }, { atMost: 0.01 });
    expect(labels.value).toBe(smallest(logisticFitExists, 'n', { d: 40 }, 0.99).value);
    expect(labels.probability.value).toBeLessThanOrEqual(0.01);
  });

  it('reaches 1 - 1e-300 and beyond doubles', () => {
    const answer = smallest(originInHull, 'n', { d: 3 }, { complementAtMost: 1e-300 });
    expect(answer.exact).toBe(true);
    expect(answer.probability.complement).toBeLessThanOrEqual(1e-300);
    expect(originInHull({ n: answer.value - 1, d: 3 }).complement).toBeGreaterThan(1e-300);
    const log = -300000 * Math.LN10;
    const far = smallest(
      originInHull,
      'n',
      { d: 3 },
      { complementAtMost: Probability.fromLog(log) },
    );
    expect(far.probability.logComplement).toBeLessThanOrEqual(log);
    expect(originInHull({ n: far.value - 1, d: 3 }).logComplement).toBeGreaterThan(log);
    const tiny = largest(originInHull, 'd', { n: 5000 }, Probability.fromLog(-3000));
    expect(tiny.probability.log).toBeGreaterThanOrEqual(-3000);
    expect(originInHull({ n: 5000, d: tiny.value + 1 }).log).toBeLessThan(-3000);
  });

  it('refuses what is no target', () => {
    for (const [target, message] of [
      [1.5, 'smallest: target must be a number from 0 to 1, got 1.5'],
      [Number.NaN, 'smallest: target must be a number from 0 to 1, got NaN'],
      ['0.5', 'smallest: target must be a number from 0 to 1, got "0.5"'],
      [
        { atMost: 0.1, atLeast: 0.2 },
        'smallest: target must be an object with exactly one of atLeast, atMost, complementAtMost, got 2 of them',
      ],
      [{}, 'smallest: target must be an object with exactly one of'],
      [
        { above: 0.1 },
        'smallest: above must be left out (the options are atLeast, atMost, complementAtMost), got 0.1',
      ],
      [{ atLeast: -1 }, 'smallest: target.atLeast must be a number from 0 to 1, got -1'],
    ] as const) {
      expect(() => smallest(originInHull, 'n', { d: 3 }, target as never)).toThrow(message);
    }
  });
});

describe('directions and ends', () => {
  it('answers with the low end where everything reaches the target', () => {
    expect(smallest(originInHull, 'n', { d: 40 }, { atMost: 0.5 })).toMatchObject({
      value: 0,
      exact: true,
    });
    expect(smallest(originInHull, 'd', { n: 40 }, 0.5)).toMatchObject({ value: 0, exact: true });
    expect(smallest(originInHull, 'n', { d: 4 }, 0)).toMatchObject({ value: 0, exact: true });
  });

  it('ends among logarithms where the domain does', () => {
    // a scale so small is refused for more than about 1e100 points
    const { value, log, exact } = largest(
      nextPointInHull,
      'n',
      { d: 20, queryScale: 5e-324 },
      0.0108,
    );
    expect(exact).toBe(false);
    expect(value / 1e100).toBeCloseTo(1, 10);
    expect(log).toBeCloseTo(100 * Math.LN10, 10);
    expect(() =>
      smallest(nextPointInHull, 'n', { d: 20, queryScale: 5e-324 }, 0.0108),
    ).not.toThrow();
  });

  it('refuses a largest that does not exist, and a target out of reach with the limit', () => {
    expect(() => largest(originInHull, 'n', { d: 40 }, 0.5)).toThrow(
      /^largest: target must be one that larger n fails/,
    );
    const never = ({ n }: { n: number }): Probability => {
      if (!(Number.isInteger(n) && n >= 0)) throw new DomainError('never', 'n', 'whole', n);
      return Probability.fromValue(0.25 * (n / (1 + n)));
    };
    expect(() => smallest(never, 'n', {}, 0.3)).toThrow(
      'smallest: target must be within reach (never reaches 0.25 at n = 9007199254740991), got 0.3',
    );
    const counted = ({ n }: { n: number | LogNumber }): Probability =>
      typeof n === 'number' ? never({ n }) : Probability.fromValue(0.25);
    expect(() => smallest(counted, 'n', {}, 0.3)).toThrow(
      'smallest: target must be within reach (counted reaches 0.25 in the limit), got 0.3',
    );
    expect(() => smallest(originInHull, 'd', { n: 40 }, { atMost: 0 })).not.toThrow();
    const flat = (_: { n: number }): Probability => Probability.fromValue(0);
    expect(() => largest(flat, 'n', {}, 0.3)).toThrow(DomainError);
  });

  it('refuses what cannot be searched', () => {
    expect(() => smallest(originInHull, 'n', { d: 3, n: 4 } as never, 0.5)).toThrow(
      'smallest: args.n must be left out (n is searched for), got 4',
    );
    expect(() => smallest(originInHull, 'm' as never, { n: 3, d: 4 } as never, 0.5)).toThrow(
      DomainError,
    );
    expect(() => smallest('originInHull' as never, 'n' as never, {} as never, 0.5)).toThrow(
      DomainError,
    );
    expect(() => smallest(originInHull, 'n', null as never, 0.5)).toThrow(DomainError);
    expect(() => smallest(originInHull, '' as never, {} as never, 0.5)).toThrow(DomainError);
    expect(() => smallest(originInHull, 'n', {} as never, 0.5)).toThrow(
      'originInHull: d must be an integer',
    );
    expect(() => smallest((() => 0.5) as never, 'n' as never, {} as never, 0.5)).toThrow(
      'a function that returns a Probability',
    );
  });
});

describe('real arguments', () => {
  it('find the depth that a sample size needs', () => {
    const answer = smallest(originInHullLowerBound, 'depth', { n: 50, d: 3 }, 0.99);
    expect(answer.exact).toBe(false);
    const { value, bracket } = answer;
    // As narrow as the error of the probability allows.
    expect(bracket[1] / bracket[0] - 1).toBeLessThan(1e-14);
    expect(bracket[0]).toBeLessThan(bracket[1]);
    expect(originInHullLowerBound({ n: 50, d: 3, depth: value }).value).toBeGreaterThanOrEqual(
      0.99,
    );
    expect(originInHullLowerBound({ n: 50, d: 3, depth: value * (1 - 2e-14) }).value).toBeLessThan(
      0.99,
    );
  });

  it('stop at the end of a domain', () => {
    const answer = largest(originInHullLowerBound, 'depth', { n: 50, d: 3 }, 0.99);
    expect(answer.value).toBe(1);
  });

  it('take negative arguments and open ends', () => {
    const logistic = ({ x }: { x: number }): Probability => {
      if (!Number.isFinite(x)) throw new DomainError('logistic', 'x', 'a finite number', x);
      const e = Math.exp(-Math.abs(x));
      return x < 0 ? Probability.fromValue(e / (1 + e)) : Probability.fromComplement(e / (1 + e));
    };
    expect(smallest(logistic, 'x', {}, 0.25).value).toBeCloseTo(-Math.log(3), 14);
    expect(largest(logistic, 'x', {}, { atMost: 0.75 }).value).toBeCloseTo(Math.log(3), 14);
    expect(() => smallest(logistic, 'x', {}, { atMost: 0.75 })).toThrow(
      /keeps it all the way down/,
    );
  });
});

describe('counts beyond doubles', () => {
  it('answer by their logarithm', () => {
    const slow = ({ n }: { n: number | LogNumber }): Probability => {
      if (typeof n === 'number' && !Number.isInteger(n))
        throw new DomainError('slow', 'n', 'whole', n);
      const log = typeof n === 'number' ? Math.log(n) : n.log;
      return Probability.fromLogComplement(-Math.max(0, log) / 5000);
    };
    const answer = smallest(slow, 'n', {}, 0.5);
    expect(answer.value).toBe(Number.POSITIVE_INFINITY);
    expect(answer.log / (5000 * Math.LN2)).toBeCloseTo(1, 13);
    expect(answer.exact).toBe(false);
    const half = smallest(originInHull, 'n', { d: 2 ** 53 - 1 }, 0.5);
    expect(half.value / (2 * (2 ** 53 - 1))).toBeCloseTo(1, 15);
  });
});

describe('properties', () => {
  const targets = fc.double({ min: 1e-12, max: 1 - 1e-12, noNaN: true });

  it('the answer reaches the target and its neighbour does not', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 100000 }), targets, (d, target) => {
        const answer = smallest(originInHull, 'n', { d }, target);
        expect(answer.exact).toBe(true);
        // Above 1/2 the complement is the finer side.
        const reaches = (n: number): boolean => {
          const p = originInHull({ n, d });
          return target > 0.5 ? p.complement <= 1 - target : p.value >= target;
        };
        expect([reaches(answer.value), reaches(answer.value - 1)]).toEqual([true, false]);
      }),
    );
  });

  it('smallest n and largest d are inverse to each other', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 3000 }), targets, (d, target) => {
        const n = smallest(originInHull, 'n', { d }, target).value;
        expect(largest(originInHull, 'd', { n }, target).value).toBeGreaterThanOrEqual(d);
        expect(largest(originInHull, 'd', { n: n - 1 }, target).value).toBeLessThan(d);
      }),
    );
  });

  it('brackets what an honest error leaves open', () => {
    // A probability known only to a tenth: several integers remain possible.
    const vague = ({ n }: { n: number }): Probability => {
      if (!Number.isInteger(n) || n < 0) throw new DomainError('vague', 'n', 'an integer >= 0', n);
      return Probability.fromLogComplement(-n / 100, 0.1);
    };
    const answer = smallest(vague, 'n', {}, { complementAtMost: Math.exp(-5) });
    expect(answer.value).toBe(500);
    expect(answer.exact).toBe(false);
    expect(answer.bracket[0]).toBeLessThanOrEqual(490);
    expect(answer.bracket[0]).toBeGreaterThanOrEqual(488);
    expect(answer.bracket[1]).toBeGreaterThanOrEqual(510);
    expect(answer.bracket[1]).toBeLessThanOrEqual(512);
  });

  it('takes few evaluations', () => {
    let count = 0;
    const counted = (args: { n: number | LogNumber; d: number }): Probability => {
      count++;
      return originInHull(args);
    };
    for (const d of [3, 40, 1000, 1e6, 1e9]) {
      count = 0;
      smallest(counted, 'n', { d }, 0.95);
      expect(count).toBeLessThanOrEqual(30);
    }
  });
});

describe('arguments whose domain another argument limits', () => {
  it('finds the number of variables that recovery allows', () => {
    const args = { model: 'nonnegativeFeasible', sparsity: 10 } as const;
    // P(Bin(n - 11, 1/2) <= m - 11) is 1/2 at n = 2m - 10
    for (const measurements of [1, 100, 1e6, 1e9]) {
      const question = { ...args, sparsity: measurements === 1 ? 0 : 10, measurements };
      const { value, exact } = largest(recoverySuccess, 'n', question, 0.5);
      expect([value, exact]).toEqual([2 * measurements - question.sparsity, true]);
    }
    const l1 = { model: 'l1', sparsity: 10, measurements: 100 } as const;
    const { value } = largest(recoverySuccess, 'n', l1, 0.99);
    const at = (n: number): number => recoverySuccess({ ...l1, n }).value;
    expect([at(value) >= 0.99, at(value + 1) >= 0.99]).toEqual([true, false]);
  });

  it('takes a question that passes the argument on under another name', () => {
    const meets = ({ m }: { m: number }): Probability =>
      coneMeetsSubspace(orthant(50), { codimension: m });
    expect(smallest(meets, 'm', {}, { atMost: 0.01 }).value).toBe(34);
  });

  it('still says which other argument is wrong', () => {
    const count = dichotomyCount as unknown as typeof labelSeparability;
    expect(() => largest(count, 'n', { d: 2 }, 0.5)).toThrow(
      'largest: question must be a function that returns a Probability',
    );
    expect(() => smallest(originInHull, 'n', { d: -1 }, 0.5)).toThrow(
      'originInHull: d must be an integer >= 0, got -1',
    );
  });
});

describe('targets of 0 and 1', () => {
  it('are not those beyond every double', () => {
    // 2^(1 - n) times the number of terms
    const { value, bracket } = smallest(
      originInHull,
      'n',
      { d: 1 },
      Probability.fromLogComplement(-1e300),
    );
    expect(Math.abs((value * Math.LN2) / 1e300 - 1)).toBeLessThan(1e-12);
    expect(bracket[0] * Math.LN2).toBeLessThanOrEqual(1e300);
    for (const certain of [1, { complementAtMost: 0 }]) {
      expect(() => smallest(originInHull, 'n', { d: 3 }, certain)).toThrow(
        'within reach (originInHull reaches 1 in the limit)',
      );
    }
  });

  it('are certain where they are', () => {
    const l1 = { model: 'l1', n: 1000, sparsity: 20 } as const;
    const surely = smallest(recoverySuccess, 'measurements', l1, 1);
    expect([surely.value, surely.exact, surely.bracket]).toEqual([1000, true, [1000, 1000]]);
    const anyway = smallest(originInHull, 'n', { d: 12 }, { atMost: 1 });
    expect([anyway.value, anyway.exact]).toEqual([0, true]);
  });
});
