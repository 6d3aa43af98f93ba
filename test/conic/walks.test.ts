import fc from 'fast-check';
import { DomainError, type Probability } from 'hullgauge';
import { bridgeHull, jointWalkHull, originInHull, walkHull } from 'hullgauge/conic';
import { smallest } from 'hullgauge/plan';
import { describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';
import { hullCases, jointCases } from '../accuracy/conic-walks.ts';
import { statesExact } from '../support/exactness.ts';
import { worstErrorShare } from '../support/probability-checks.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

/** Exact P(K <= d - 1) for a sum of Bernoulli variables 1/q, as numerator and denominator. */
function exactOutside(odds: readonly bigint[], d: number): [bigint, bigint] {
  let law = [1n];
  let denominator = 1n;
  for (const q of odds) {
    law = [...law, 0n].map((x, i) => x * (q - 1n) + (i > 0 ? (law[i - 1] as bigint) : 0n));
    denominator *= q;
  }
  return [law.slice(0, d).reduce((sum, x) => sum + x, 0n), denominator];
}

const quotient = ([a, b]: [bigint, bigint]): number => Number((a * 10n ** 40n) / b) / 1e40;
const range = (from: number, to: number): number[] =>
  Array.from({ length: Math.max(0, to - from + 1) }, (_, i) => from + i);

describe('walkHull and bridgeHull', () => {
  it('equal the exact rationals for few steps', () => {
    for (let n = 1; n <= 24; n++) {
      for (let d = 1; d < n; d++) {
        const walk = exactOutside(
          range(2, n).map((j) => BigInt(2 * j)),
          d,
        );
        const bridge = exactOutside(range(3, n).map(BigInt), d);
        expect(Math.abs(walkHull({ steps: n, d }).complement / quotient(walk) - 1)).toBeLessThan(
          2e-15,
        );
        if (d < n - 1) {
          const computed = bridgeHull({ steps: n, d }).complement;
          expect(Math.abs(computed / quotient(bridge) - 1)).toBeLessThan(2e-15);
        }
      }
    }
  });

  it('are exact at ties, and say so', () => {
    for (const steps of [4, 8, 1024, 2 ** 50]) {
      expect(statesExact(bridgeHull({ steps, d: 1 }))).toBe(true);
    }
    expect(statesExact(bridgeHull({ steps: 6, d: 1 }))).toBe(false);
    expect(statesExact(walkHull({ steps: 2, d: 1 }))).toBe(true);
    // 2 binom(2n, n)/4^n
    expect(walkHull({ steps: 14, d: 1 }).complement).toBe((2 * 40116600) / 4 ** 14);
    expect(statesExact(walkHull({ steps: 14, d: 1 }))).toBe(true);
  });

  it('have the closed forms of one dimension', () => {
    let choose = 1; // binom(2n, n)/4^n
    for (let n = 1; n <= 2000; n++) {
      choose *= (2 * n - 1) / (2 * n);
      if (n > 1) expect(walkHull({ steps: n, d: 1 }).complement / (2 * choose)).toBeCloseTo(1, 12);
    }
    for (const n of [3, 4, 10, 300, 301, 302, 303, 12345, 1e9, 1e15, Number.MAX_SAFE_INTEGER]) {
      expect(Math.abs((bridgeHull({ steps: n, d: 1 }).complement * n) / 2 - 1)).toBeLessThan(2e-14);
    }
  });

  it('have the closed form of one point more than the dimension', () => {
    for (const d of [1, 2, 5, 20, 100, 170]) {
      // 2/(2^n n!) with n = d + 1, and 2/n! with n = d + 2
      let log = Math.LN2;
      for (let j = 2; j <= d + 1; j++) log -= Math.log(j);
      expect(walkHull({ steps: d + 1, d }).log).toBeCloseTo(log - (d + 1) * Math.LN2, 10);
      expect(bridgeHull({ steps: d + 2, d }).log).toBeCloseTo(log - Math.log(d + 2), 10);
    }
  });

  it('agree with the alternating form of the source', () => {
    // P_out(walk) = 2 (B(n, d-1) + B(n, d-3) + ..)/(2^n n!), P_out(bridge) = 2 ([n, d] + [n, d-2] + ..)/n!
    const row = (roots: readonly bigint[]): bigint[] => {
      let p = [1n];
      for (const root of roots) {
        p = p.concat(0n).map((x, i) => x * root + (i > 0 ? (p[i - 1] as bigint) : 0n));
      }
      return p;
    };
    for (const n of [5, 12, 30]) {
      const b = row(range(1, n).map((j) => BigInt(2 * j - 1)));
      const s = row(range(1, n).map((j) => BigInt(j - 1)));
      const total = (p: readonly bigint[]): bigint => p.reduce((sum, x) => sum + x, 0n);
      for (let d = 1; d < n - 1; d++) {
        const alternate = (p: readonly bigint[], top: number): bigint =>
          p.filter((_, k) => k <= top && (top - k) % 2 === 0).reduce((sum, x) => sum + x, 0n);
        const walk = quotient([2n * alternate(b, d - 1), total(b)]);
        const bridge = quotient([2n * alternate(s, d), total(s)]);
        expect(walkHull({ steps: n, d }).complement / walk).toBeCloseTo(1, 13);
        expect(bridgeHull({ steps: n, d }).complement / bridge).toBeCloseTo(1, 13);
      }
    }
  });

  it('are monotone in steps and dimension, across the switch of engines', () => {
    for (const ask of [walkHull, bridgeHull]) {
      for (const d of [1, 2, 3, 6]) {
        let last: Probability = ask({ steps: 280, d });
        for (let steps = 281; steps < 330; steps++) {
          const p = ask({ steps, d });
          expect(p.log).toBeGreaterThan(last.log);
          expect(p.logComplement).toBeLessThan(last.logComplement);
          expect(p.log).toBeGreaterThan(ask({ steps, d: d + 1 }).log);
          last = p;
        }
      }
    }
  });

  it('state error bounds that cover the true errors', () => {
    expect(worstErrorShare(hullCases('walk', 'in'), walkHull)).toBeLessThan(1);
    expect(worstErrorShare(hullCases('bridge', 'in'), bridgeHull)).toBeLessThan(1);
    expect(worstErrorShare(hullCases('walk', 'in'), walkHull)).toBeGreaterThan(0.001);
  });

  it.each(
    readTable<NamedRow>('conic').filter(({ quantity }) =>
      /^(walk|bridge)\.n_for_q$/.test(quantity),
    ),
  )('need the tabulated number of steps: $quantity $args', ({ quantity, args, value }) => {
    const ask = quantity.startsWith('walk') ? walkHull : bridgeHull;
    const target = { complementAtMost: Number(args['q']) };
    const answer = smallest(ask, 'steps', { d: Number(args['d']) }, target);
    expect(answer.value).toBe(Number(value));
  });

  it('return exact limits where the answer is certain', () => {
    for (const ask of [walkHull, bridgeHull]) {
      expect(ask({ steps: 0, d: 0 })).toMatchObject({ value: 0, complement: 1, logError: 0 });
      expect(ask({ steps: 0, d: 3 }).log).toBe(Number.NEGATIVE_INFINITY);
      expect(ask({ steps: 7, d: 0 })).toMatchObject({
        value: 1,
        logComplement: Number.NEGATIVE_INFINITY,
      });
      expect(ask({ steps: 5, d: 5 }).value).toBe(0);
    }
    expect(bridgeHull({ steps: 1, d: 0 }).value).toBe(0);
    expect(bridgeHull({ steps: 2, d: 0 }).value).toBe(1);
    expect(bridgeHull({ steps: 6, d: 5 }).value).toBe(0);
    expect(walkHull({ steps: 6, d: 5 }).value).toBeGreaterThan(0);
  });

  it('reach both tails past underflow', () => {
    expect(walkHull({ steps: 1000, d: 500 }).value).toBe(0);
    expect(walkHull({ steps: 1000, d: 500 }).log).toBeCloseTo(-2518.69811459715, 10);
    const near = jointWalkHull({ walks: new Array(4000).fill(1), d: 3 });
    expect(near.complement).toBe(0);
    expect(near.logComplement).toBeCloseTo(originInHull({ n: 4000, d: 3 }).logComplement, 8);
  });

  it('take any number of steps', () => {
    const p = walkHull({ steps: 1e15, d: 21 });
    expect(p.value).toBeCloseTo(0.197553248063538, 13);
    for (const steps of [1e15, Number.MAX_SAFE_INTEGER]) {
      for (const d of [1, 19, 1e4, 2 ** 50]) {
        const q = bridgeHull({ steps, d });
        expect(q.log).toBeLessThanOrEqual(0);
        expect(q.value + q.complement).toBe(1);
      }
    }
  });

  it.each([
    [{ steps: 1.5, d: 2 }, 'steps'],
    [{ steps: -1, d: 2 }, 'steps'],
    [{ steps: 2 ** 53, d: 2 }, 'steps'],
    [{ steps: Number.NaN, d: 2 }, 'steps'],
    [{ steps: 5, d: -1 }, 'd'],
    [{ steps: 5, d: '2' }, 'd'],
    [{ steps: 5 }, 'd'],
    [{ steps: 5, d: 2, n: 3 }, 'n'],
    [undefined, 'options'],
  ])('refuse %o', (args, parameter) => {
    for (const ask of [walkHull, bridgeHull]) {
      expect(() => ask(args as never)).toThrow(DomainError);
      expect(() => ask(args as never)).toThrow(`: ${parameter} must be`);
    }
  });
});

describe('jointWalkHull', () => {
  it('is the single walk or bridge when there is only one', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 900 }), fc.integer({ min: 0, max: 30 }), (steps, d) => {
        expect(jointWalkHull({ walks: [steps], d }).toJSON()).toEqual(
          walkHull({ steps, d }).toJSON(),
        );
        const bridge = jointWalkHull({ walks: [], bridges: [steps], d });
        expect(bridge.toJSON()).toEqual(bridgeHull({ steps, d }).toJSON());
      }),
      { numRuns: 100 },
    );
  });

  it('is the formula of single points for walks of one step', () => {
    for (let n = 1; n <= 80; n++) {
      for (const d of [1, 2, 7, 20, 40]) {
        const joint = jointWalkHull({ walks: new Array(n).fill(1), d });
        expect(joint).toEqual(originInHull({ n, d }));
      }
    }
  });

  it('keeps ties, also of single steps and bridges of two', () => {
    for (const d of [3, 30, 2000]) {
      const walks = new Array(2 * d - 1).fill(1);
      const half = jointWalkHull({ walks, bridges: [2], d });
      expect([half.value, statesExact(half)]).toEqual([0.5, true]);
      expect(jointWalkHull({ walks, bridges: [3], d }).value).not.toBe(0.5);
    }
  });

  it('does not depend on the order, and grows with every walk', () => {
    const p = jointWalkHull({ walks: [3, 50, 7], bridges: [9, 4], d: 4 });
    expect(jointWalkHull({ walks: [50, 7, 3], bridges: [4, 9], d: 4 }).value).toBeCloseTo(
      p.value,
      14,
    );
    expect(jointWalkHull({ walks: [3, 50, 7, 2], bridges: [9, 4], d: 4 }).value).toBeGreaterThan(
      p.value,
    );
    expect(jointWalkHull({ walks: [3, 50, 7], bridges: [9, 5], d: 4 }).value).toBeGreaterThan(
      p.value,
    );
    // walks without steps and bridges without inner points add nothing
    expect(jointWalkHull({ walks: [0, 3, 50, 7], bridges: [9, 4, 1, 0], d: 4 }).value).toBeCloseTo(
      p.value,
      14,
    );
  });

  it('states error bounds that cover the true errors', () => {
    expect(worstErrorShare(jointCases(), jointWalkHull)).toBeLessThan(1);
  });

  it.each([
    [{ walks: 5, d: 2 }, 'walks'],
    [{ walks: [5, -1], d: 2 }, 'walks[1]'],
    [{ walks: [5], bridges: [2.5], d: 2 }, 'bridges[0]'],
    [{ walks: [5], bridges: null, d: 2 }, 'bridges'],
    [{ walks: [5] }, 'd'],
    [{ d: 2 }, 'walks'],
  ])('refuses %o', (args, parameter) => {
    expect(() => jointWalkHull(args as never)).toThrow(DomainError);
    expect(() => jointWalkHull(args as never)).toThrow(`: ${parameter} must be`);
  });
});

/** Whether the origin lies in the hull of points of the plane: no gap of half a turn between them. */
function surrounded(points: readonly (readonly [number, number])[]): boolean {
  const angles = points.map(([x, y]) => Math.atan2(y, x)).sort((a, b) => a - b);
  const gaps = angles.map((angle, i) =>
    i === 0 ? angle - (angles.at(-1) as number) + 2 * Math.PI : angle - (angles[i - 1] as number),
  );
  return Math.max(...gaps) < Math.PI;
}

describe('seeded simulation in the plane', () => {
  const trials = 20_000;
  const share = (draw: () => readonly (readonly [number, number])[]): number => {
    let hits = 0;
    for (let i = 0; i < trials; i++) if (surrounded(draw())) hits++;
    return hits / trials;
  };
  const within = (observed: number, exact: number): void => {
    const deviation = Math.sqrt((exact * (1 - exact)) / trials);
    expect(Math.abs(observed - exact)).toBeLessThan(4 * deviation);
  };
  const walk = (
    stream: { uniform(): number; normal(): number },
    steps: number,
  ): [number, number][] => {
    let [x, y] = [0, 0];
    return Array.from({ length: steps }, () => {
      // heavy-tailed, symmetric
      const scale = 1 / stream.uniform();
      x += scale * stream.normal();
      y += scale * stream.normal();
      return [x, y];
    });
  };

  it('confirms a walk', () => {
    const stream = randomStream(11);
    within(
      share(() => walk(stream, 12)),
      walkHull({ steps: 12, d: 2 }).value,
    );
  });

  it('confirms a bridge of a skewed law', () => {
    const stream = randomStream(12);
    const draw = (): [number, number][] => {
      const steps = Array.from({ length: 9 }, () => [
        -Math.log(stream.uniform()),
        stream.normal() ** 2,
      ]);
      const mean = [0, 1].map((i) => steps.reduce((sum, s) => sum + (s[i] as number), 0) / 9);
      let [x, y] = [0, 0];
      return steps.slice(0, -1).map((s) => {
        x += (s[0] as number) - (mean[0] as number);
        y += (s[1] as number) - (mean[1] as number);
        return [x, y];
      });
    };
    within(share(draw), bridgeHull({ steps: 9, d: 2 }).value);
  });

  it('confirms a joint hull', () => {
    const stream = randomStream(13);
    const draw = (): [number, number][] => [
      ...walk(stream, 3),
      ...walk(stream, 5),
      ...walk(stream, 1),
    ];
    within(share(draw), jointWalkHull({ walks: [3, 5, 1], d: 2 }).value);
  });
});
