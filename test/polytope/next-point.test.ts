import fc from 'fast-check';
import {
  betaLaw,
  betaPrimeLaw,
  DomainError,
  expectedFaces,
  expectedVertices,
  gaussian,
  hullVolumeRatio,
  type Law,
  LogNumber,
  nextPointInHull,
  originInHull,
  type Probability,
  smallest,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { statesExact } from '../support/exactness.ts';

/** Whether two probabilities agree within their stated errors, compared by their smaller tails. */
function agree(p: Probability, q: Probability, slack = 0): boolean {
  const lower = p.log <= p.logComplement;
  const [a, b] = lower ? [p.log, q.log] : [p.logComplement, q.logComplement];
  return Math.abs(a - b) <= p.logError + 2 * q.logError + slack;
}

/** Whether p >= q could be true within the stated errors. */
function atLeast(p: Probability, q: Probability): boolean {
  if (q.value === 0 && q.log === Number.NEGATIVE_INFINITY) return true;
  const gap = p.log - q.log;
  const complementGap = q.logComplement - p.logComplement;
  return Math.max(gap, complementGap) >= -2 * (p.logError + q.logError) - 4e-16;
}

const laws: readonly Law[] = [
  gaussian(),
  uniformBall(),
  betaLaw(-0.5),
  betaLaw(4.25),
  studentT({ degreesOfFreedom: 1 }),
  studentT({ degreesOfFreedom: 5.5 }),
];
const anyLaw = fc.constantFrom(...laws);

describe('nextPointInHull', () => {
  it.each([
    // the one integral that n = d + 1 leaves, with the power of sinh by its hypergeometric series, 40 digits
    [30, -0.5, -79.031040826796123],
    [30, -0.9, -81.364742638703369],
    [30, -0.25, -78.242204470123966],
    [300, -0.5, -1131.7214161904939],
    [300, -0.9, -1135.0029607108559],
    [300, -0.25, -1130.3504949246751],
    [400, -0.5, -1566.3416292921329],
    [400, -0.9, -1569.7390092378355],
    [1000, -0.5, -4373.2909664984286],
    [1000, -0.9, -4377.056238300339],
  ])('knows the simplex of d + 1 = %i + 1 points between ball and sphere, b = %f', (d, b, log) => {
    const p = nextPointInHull({ n: d + 1, d, law: betaLaw(b) });
    expect(Math.abs(p.log - log)).toBeLessThan(2e-15 * -log + 1e-13);
    expect(p.logError).toBeLessThan(1e-14 * -log);
  });

  it('is 2/(n + 1) outside on the line, whatever the law', () => {
    for (const law of laws) {
      for (const n of [2, 5, 1000, 1e9]) {
        const p = nextPointInHull({ n, d: 1, law });
        expect(Math.abs(p.logComplement - Math.log(2 / (n + 1)))).toBeLessThanOrEqual(p.logError);
      }
    }
  });

  it('is exactly 0 up to d points, and simplex angles decide the first beyond', () => {
    for (const law of laws) {
      for (const n of [0, 1, 6]) expect(nextPointInHull({ n, d: 6, law }).value === 0).toBe(true);
      expect(nextPointInHull({ n: 7, d: 6, law }).value).toBeGreaterThan(0);
    }
    // Four independent vectors of the plane, as likely inside as a regular tetrahedron's solid angle.
    const p = nextPointInHull({ n: 3, d: 2 });
    expect(p.value).toBeCloseTo(2 * 0.04386991402295545, 15);
  });

  it('answers for the centre like Wendel, and tends to it', () => {
    const args = { n: 50, d: 20 };
    const centre = originInHull(args);
    for (const law of laws) {
      expect(nextPointInHull({ ...args, law, queryScale: 0 })).toEqual(centre);
    }
    for (const queryScale of [1e-300, 1e-100, 1e-12]) {
      const p = nextPointInHull({ ...args, queryScale });
      expect(Math.abs(p.logComplement - centre.logComplement)).toBeLessThan(2e-13);
    }
    for (const hull of ['symmetric', 'withCentre'] as const) {
      expect(nextPointInHull({ ...args, queryScale: 0, hull }).complement === 0).toBe(true);
    }
  });

  it("agrees with the hull's share of the ball, by Efron's identity", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 40 }),
        fc.double({ min: 0, max: 8, noNaN: true }),
        (d, t) => {
          const n = Math.round(d + 1 + Math.expm1(t));
          const share = hullVolumeRatio({ n, d, law: uniformBall() });
          // so near the ball that 2b + d is d, but not the ball, which is asked for its volume
          const next = nextPointInHull({ n, d, law: betaLaw(1e-18) });
          expect(agree(share, next, 4e-14)).toBe(true);
        },
      ),
      { numRuns: 40 },
    );
  });

  it('is the complement of the share of vertices', () => {
    for (const law of laws) {
      for (const [n, d] of [
        [10, 2],
        [40, 5],
        [400, 12],
      ] as const) {
        const p = nextPointInHull({ n, d, law });
        const vertices = expectedVertices({ n: n + 1, d, law });
        const log = vertices.log - Math.log(n + 1);
        const slack = (p.logError * Math.max(p.value, p.complement)) / p.complement;
        expect(Math.abs(log - p.logComplement)).toBeLessThanOrEqual(
          slack + vertices.logError + 1e-15,
        );
      }
    }
  });

  it('rises with n and falls with d and with the scale', () => {
    fc.assert(
      fc.property(
        anyLaw,
        fc.integer({ min: 1, max: 30 }),
        fc.double({ min: 0, max: 12, noNaN: true }),
        fc.double({ min: 1, max: 3, noNaN: true }),
        (law, d, t, growth) => {
          const n = Math.round(d + Math.exp(t));
          const p = nextPointInHull({ n, d, law });
          expect(p.value >= 0 && p.value <= 1 && p.logError < 1e-9).toBe(true);
          expect(atLeast(nextPointInHull({ n: Math.ceil(n * growth), d, law }), p)).toBe(true);
          expect(atLeast(nextPointInHull({ n: n + 1, d, law }), p)).toBe(true);
          expect(
            atLeast(
              p,
              nextPointInHull({ n, d: d + 1, law: law.family === 'gaussian' ? law : gaussian() }),
            ) || law.family !== 'gaussian',
          ).toBe(true);
          const closer = nextPointInHull({ n, d, queryScale: 1 / growth });
          const farther = nextPointInHull({ n, d, queryScale: growth });
          expect(atLeast(closer, farther)).toBe(true);
        },
      ),
      { numRuns: 60 },
    );
  });

  it('grows with the points that are added to the hull', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 20 }),
        fc.integer({ min: 1, max: 200 }),
        fc.double({ min: 0.05, max: 4, noNaN: true }),
        (d, n, queryScale) => {
          const args = { n, d, queryScale };
          const plain = nextPointInHull(args);
          const withCentre = nextPointInHull({ ...args, hull: 'withCentre' });
          const symmetric = nextPointInHull({ ...args, hull: 'symmetric' });
          expect(atLeast(withCentre, plain)).toBe(true);
          expect(atLeast(symmetric, withCentre)).toBe(true);
        },
      ),
      { numRuns: 60 },
    );
  });

  it('goes over into the Gaussian law from both sides', () => {
    const args = { n: 3934, d: 10 };
    const limit = nextPointInHull(args).value;
    const heavy = nextPointInHull({ ...args, law: studentT({ degreesOfFreedom: 1e5 }) }).value;
    const light = nextPointInHull({ ...args, law: betaLaw(5e4) }).value;
    expect(light).toBeLessThan(limit);
    expect(heavy).toBeGreaterThan(limit);
    expect(heavy - light).toBeLessThan(1e-4);
  });

  it('keeps its digits far beyond doubles', () => {
    // Across the points where n is taken from its logarithm, and where it stops being a double.
    for (const args of [
      { d: 500 },
      { d: 20, law: uniformBall() },
      { d: 20, law: studentT({ degreesOfFreedom: 3 }) },
    ]) {
      for (const middle of [667.75, 709.79]) {
        const logs = [middle - 0.02, middle, middle + 0.02].map(
          (log) => nextPointInHull({ n: LogNumber.fromLog(log), ...args }).logComplement,
        );
        const [a, b, c] = logs as [number, number, number];
        expect(Math.abs(a - 2 * b + c)).toBeLessThan(1e-4 * Math.abs(b - a));
      }
    }
    const far = nextPointInHull({ n: LogNumber.fromLog(1e6), d: 500 });
    expect(far.logComplement).toBeLessThan(-997_000);
    expect(far.logError).toBeLessThan(1e-14 * 1e6);
    expect(nextPointInHull({ n: 1e6, d: 1000 }).log).toBeLessThan(-1700);
  });

  it('falls like the volume of the hull over that of the query for wide queries', () => {
    const args = { n: 50, d: 5 };
    const wide = (queryScale: number): number =>
      nextPointInHull({ ...args, queryScale }).log + 5 * Math.log(queryScale);
    expect(wide(1e100)).toBeCloseTo(wide(1e8), 10);
  });

  it('is 0 on the sphere, except on the line, whose sphere has two points', () => {
    expect(nextPointInHull({ n: 1e6, d: 3, law: uniformSphere() }).value === 0).toBe(true);
    expect(nextPointInHull({ n: 3, d: 1, law: uniformSphere() }).complement).toBeCloseTo(1 / 8, 15);
  });

  it('says how little is known near the sphere', () => {
    // One minus a number near 1: the error grows as the law approaches the sphere, and is stated.
    const p = nextPointInHull({ n: 1e10, d: 3, law: betaLaw(-0.9999) });
    expect(p.value).toBeGreaterThan(0);
    expect(p.logError).toBeGreaterThan(1e-12);
    expect(p.logError).toBeLessThan(1e-6);
  });

  it.each(['symmetric', 'withCentre'] as const)(
    'answers by volume for the ball what facets say by Euler, %s hull',
    (hull) => {
      for (const law of [uniformBall(), uniformSphere()]) {
        for (const n of [3, 4, 9, 50, 1e4, 1e15]) {
          // simplicial: f_1 = f_0 in the plane, f_2 = 2 f_0 - 4 in space
          const [plane, space] = [2, 3].map((d) => expectedVertices({ n, d, law, hull }).value);
          const edges = expectedFaces({ n, d: 2, k: 1, law, hull }).value;
          const facets = expectedFaces({ n, d: 3, k: 2, law, hull }).value;
          expect(edges / (plane as number)).toBeCloseTo(1, 12);
          expect(facets / (2 * (space as number) - 4)).toBeCloseTo(1, 12);
        }
      }
      // of n + 1 points the last is a vertex as often as any other; the centre is one by Wendel's formula
      const share = nextPointInHull({ n: 20, d: 4, law: uniformBall(), hull });
      const vertices = expectedVertices({ n: 21, d: 4, law: uniformBall(), hull }).value;
      const own = vertices - (hull === 'withCentre' ? originInHull({ n: 21, d: 4 }).complement : 0);
      expect(own / (hull === 'symmetric' ? 42 : 21)).toBeCloseTo(share.complement, 13);
    },
  );

  it('knows the hulls of few points, and of points on the line', () => {
    const values = (d: number, law: Law, hull: 'symmetric' | 'withCentre'): number[] =>
      [0, 1, 2, 3].map((n) => nextPointInHull({ n, d, law, hull }).value);
    expect(values(1, uniformSphere(), 'symmetric')).toEqual([0, 1, 1, 1]);
    expect(values(1, uniformSphere(), 'withCentre')).toEqual([0, 0.5, 0.75, 0.875]);
    expect(values(2, uniformSphere(), 'symmetric')).toEqual([0, 0, 0, 0]);
    expect(values(3, uniformBall(), 'withCentre').slice(0, 3)).toEqual([0, 0, 0]);
    const centre = { n: 1, d: 3, law: uniformBall(), queryScale: 0 };
    expect(nextPointInHull({ ...centre, hull: 'symmetric' }).value).toBe(1);
    expect(nextPointInHull({ ...centre, n: 0, hull: 'withCentre' }).value).toBe(1);
    expect(nextPointInHull({ ...centre, n: 0, hull: 'symmetric' }).value).toBe(0);
  });

  it('refuses what has no formula', () => {
    const ask =
      (extra: object): (() => unknown) =>
      () =>
        nextPointInHull({ n: 10, d: 3, ...extra });
    expect(ask({ law: uniformBall(), queryScale: 2 })).toThrow(DomainError);
    expect(ask({ law: betaLaw(0.5), hull: 'symmetric' })).toThrow(/no formula for other hulls/);
    expect(ask({ law: studentT({ degreesOfFreedom: 0.25 }) })).toThrow(/degrees of freedom/);
    expect(ask({ law: betaPrimeLaw(1.5) })).toThrow(/law\.b/);
    expect(ask({ d: 0 })).toThrow(/d must be an integer from 1/);
    expect(ask({ queryScale: 1e-200, n: 1e200 })).toThrow(/queryScale/);
  });
});

describe('on the line', () => {
  it('is a matter of order, exact at ties, whatever the law', () => {
    for (const law of [...laws, betaPrimeLaw(3)]) {
      for (const n of [1, 2, 3, 4, 7, 15, 1000, 2 ** 40 - 1, 2 ** 53 - 1]) {
        const p = nextPointInHull({ n, d: 1, law });
        // the smaller tail is correctly rounded
        if (n <= 3) expect(p.value).toBe((n - 1) / (n + 1));
        else expect(p.complement).toBe(2 / (n + 1));
        if (n > 1) expect(statesExact(p)).toBe([3, 7, 15, 2 ** 40 - 1, 2 ** 53 - 1].includes(n));
      }
      expect(smallest(nextPointInHull, 'n', { d: 1, law }, 0.75)).toMatchObject({
        value: 7,
        exact: true,
      });
    }
    const far = nextPointInHull({ n: LogNumber.fromLog(1e4), d: 1 });
    expect(Math.abs(far.logComplement - (Math.LN2 - 1e4))).toBeLessThanOrEqual(far.logError);
  });

  it('has n/(n + 1) for pairs, and one coin for each point of the sphere', () => {
    for (const n of [1, 2, 3, 10, 127]) {
      const p = nextPointInHull({ n, d: 1, hull: 'symmetric' });
      expect([p.complement, statesExact(p)]).toEqual([1 / (n + 1), n !== 2 && n !== 10]);
      const coins = nextPointInHull({ n, d: 1, law: uniformSphere() });
      expect([coins.complement, statesExact(coins)]).toEqual([2 ** -n, true]);
    }
    for (const law of [gaussian(), uniformSphere()]) {
      expect(nextPointInHull({ n: 0, d: 1, law }).value).toBe(0);
    }
    expect(nextPointInHull({ n: 0, d: 1, hull: 'symmetric' }).value).toBe(0);
  });

  it('continues queries of nearly the same scale', () => {
    for (const hull of ['plain', 'symmetric'] as const) {
      for (const n of [2, 5, 40]) {
        const near = nextPointInHull({ n, d: 1, hull, queryScale: 1 + 2 ** -40 });
        expect(agree(nextPointInHull({ n, d: 1, hull }), near, 2 ** -36)).toBe(true);
      }
    }
  });
});

describe('the smallest sample that interpolates', () => {
  it.each([
    [2, 0.5, 11],
    [2, 0.9, 87],
    [3, 0.5, 27],
    [3, 0.9, 286],
    [5, 0.5, 135],
    [5, 0.9, 2148],
    [10, 0.5, 3934],
    [10, 0.9, 139336],
    [20, 0.5, 1488471],
  ])('d = %i, %d', (d, target, n) => {
    const answer = smallest(nextPointInHull, 'n', { d }, target);
    expect([answer.value, answer.exact]).toEqual([n, true]);
  });

  it('is a logarithm in 500 dimensions', () => {
    let evaluations = 0;
    const counted = (args: { n: number | LogNumber; d: number }): Probability => {
      const answer = nextPointInHull(args);
      evaluations++;
      return answer;
    };
    const { log } = smallest(counted, 'n', { d: 500 }, 0.5);
    expect(log).toBeCloseTo(258.913871, 6);
    expect(evaluations).toBeLessThanOrEqual(15);
  });

  it('does not exist on the sphere, and the refusal names the limit', () => {
    const ask = (): unknown => smallest(nextPointInHull, 'n', { d: 5, law: uniformSphere() }, 0.5);
    expect(ask).toThrow(/nextPointInHull reaches 0 in the limit/);
  });
});
