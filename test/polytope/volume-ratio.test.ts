import fc from 'fast-check';
import {
  betaLaw,
  DomainError,
  expectedHullIntrinsicVolume,
  expectedHullVolume,
  gaussian,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
  LogNumber,
  type Probability,
  simplexVolume,
  smallest,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { ballVolume, regularSimplex } from 'hullgauge/intrinsic';
import { describe, expect, it } from 'vitest';
import { BetaTail } from '../../src/numeric/beta-tail.ts';
import { orderStatisticExpectation } from '../../src/numeric/order-statistic.ts';
import { volumeRatioKernel } from '../../src/polytope/volume-ratio-kernel.ts';
import { statesExact } from '../support/exactness.ts';
import { type RowArgs, resolvedOf, rowsOf } from '../support/polytope-rows.ts';
import { difference } from '../support/reference.ts';

const gap = (p: Probability, exact: number): number => Math.abs(p.value - exact) / exact;

describe('published closed forms', () => {
  it('is (n-1)(n-2)(n-3) / ((n+1)(n+2)(n+3)) on the 2-sphere', () => {
    // The Beauty of Random Polytopes Inscribed in the 2-sphere, arXiv:2007.07783
    for (const n of [4, 5, 10, 100, 12345]) {
      const m = (k: number): number => (n - k) / (n + k);
      const ask = { n, d: 3, law: uniformSphere() };
      expect(gap(hullVolumeRatio(ask), m(1) * m(2) * m(3))).toBeLessThan(4e-15);
      const second = ((n - 1) * (n - 2)) / ((n + 1) * (n + 2));
      expect(gap(hullIntrinsicVolumeRatio({ ...ask, k: 2 }), second)).toBeLessThan(4e-15);
      expect(gap(hullIntrinsicVolumeRatio({ ...ask, k: 1 }), (n - 1) / (n + 1))).toBeLessThan(
        4e-15,
      );
      const complement = (12 * (n * n + 1)) / ((n + 1) * (n + 2) * (n + 3));
      const { complement: computed } = hullVolumeRatio(ask);
      expect(Math.abs(computed / complement - 1)).toBeLessThan(1e-14);
    }
  });

  it('is a quotient of whole numbers for a uniform marginal, as the integral is beside it', () => {
    for (const k of [1, 2, 3, 6]) {
      for (const n of [k + 1, k + 2, 20, 300]) {
        const count = { n, log: Math.log(n) };
        for (const hull of ['plain', 'symmetric'] as const) {
          const p = volumeRatioKernel(k, 0, count, hull);
          const near = volumeRatioKernel(k, 1e-13, count, hull);
          const slack = 1e-11 + p.logError + near.logError;
          const small = p.log <= p.logComplement ? 'log' : 'logComplement';
          expect(Math.abs(p[small] - near[small])).toBeLessThan(slack);
        }
      }
    }
    const ties = [
      [hullVolumeRatio({ n: 3, d: 1, law: uniformBall() }), 0.5],
      [hullVolumeRatio({ n: 7, d: 1, law: uniformBall() }), 0.75],
      [hullVolumeRatio({ n: 1, d: 1, law: uniformBall(), hull: 'symmetric' }), 0.5],
      [hullIntrinsicVolumeRatio({ n: 15, d: 3, k: 1, law: uniformSphere() }), 0.875],
    ] as const;
    for (const [p, value] of ties) expect([p.value, statesExact(p)]).toEqual([value, true]);
  });

  it('is 35/(48 pi^2) for a triangle in the disk and 9/715 for a tetrahedron in the ball', () => {
    // Sylvester's problem; Recent results on random polytopes list both
    const triangle = hullVolumeRatio({ n: 3, d: 2, law: uniformBall() });
    expect(gap(triangle, 35 / (48 * Math.PI * Math.PI))).toBeLessThan(3e-15);
    expect(gap(hullVolumeRatio({ n: 4, d: 3, law: uniformBall() }), 9 / 715)).toBeLessThan(3e-15);
  });

  it('is (n-1)/(n+1) on the interval and 1 - 2^(1-n) for two points', () => {
    for (const n of [2, 3, 17, 1e6]) {
      const uniform = hullVolumeRatio({ n, d: 1, law: uniformBall() });
      expect(gap(uniform, (n - 1) / (n + 1))).toBeLessThan(4e-15);
    }
    const coins = hullVolumeRatio({ n: 60, d: 1, law: uniformSphere() });
    expect(coins.complement).toBe(2 ** -59);
    expect(hullVolumeRatio({ n: 2, d: 1, law: uniformSphere() }).value).toBe(0.5);
    const withCentre = { n: 3, d: 1, law: uniformSphere(), hull: 'withCentre' } as const;
    expect(hullVolumeRatio(withCentre).value).toBe(0.875);
  });

  it('agrees with the simplex moment for d + 1 points', () => {
    for (const [d, b] of [
      [2, -1],
      [5, 0],
      [17, 2.5],
      [200, -0.5],
      [3000, 1],
    ] as const) {
      const law = betaLaw(b);
      const simplex = simplexVolume({ d, law }).moment(1).log - ballVolume(d).log;
      const ratio = hullVolumeRatio({ n: d + 1, d, law }).log;
      expect(Math.abs(ratio - simplex)).toBeLessThan(3e-15 * Math.abs(simplex) + 1e-14);
    }
  });

  it('gives the Gaussian hull as a projection of the regular simplex', () => {
    // E V_d = kappa_d d! / (2 pi)^(d/2) V_d(regular simplex with n vertices, edge sqrt 2)
    for (const [n, d] of [
      [5, 3],
      [20, 4],
      [60, 10],
    ] as const) {
      const simplex = regularSimplex({ d: n - 1 }).intrinsicVolumes[d]?.log ?? Number.NaN;
      let factor = ballVolume(d).log - (d / 2) * Math.log(2 * Math.PI) + (d / 2) * Math.LN2;
      for (let i = 2; i <= d; i++) factor += Math.log(i);
      const hull = expectedHullVolume({ n, d, law: gaussian() }).log;
      expect(Math.abs(hull - simplex - factor)).toBeLessThan(3e-14);
    }
  });

  it('is the cross-polytope for d pairs', () => {
    const disk = hullVolumeRatio({ n: 2, d: 2, law: uniformSphere(), hull: 'symmetric' });
    // two random diameters: E of 2 |sin| over pi is 4 / pi^2
    expect(gap(disk, 4 / (Math.PI * Math.PI))).toBeLessThan(2e-15);
  });
});

describe('two formulas for one number', () => {
  const k = fc.integer({ min: 1, max: 60 });
  const b = fc.double({ min: -0.5, max: 60, noNaN: true });

  it('E[L^k] at the (k+1)-st order statistic is E[h L^(k-1)] at the k-th', () => {
    fc.assert(
      fc.property(k, b, fc.double({ min: 0.2, max: 40, noNaN: true }), (order, marginal, extra) => {
        // enough points that h is positive but for 1e-18
        const n = Math.ceil((order + 60) * (2 + Math.exp(extra / 4)));
        const count = { n, log: Math.log(n) };
        const tail = new BetaTail(marginal);
        const second = orderStatisticExpectation(
          tail,
          'line',
          { m: order, ...count },
          () => (tail.height > 0 ? tail.logHeight : -99) + (order - 1) * tail.logExcess,
        );
        const first = volumeRatioKernel(order, marginal, count, 'plain');
        expect(Math.abs(first.log - second.log)).toBeLessThan(
          1e-14 * Math.max(1, Math.abs(first.log)),
        );
      }),
      { numRuns: 60 },
    );
  });

  it('both tails are one probability', () => {
    fc.assert(
      fc.property(k, b, fc.integer({ min: 1, max: 3000 }), (order, marginal, extra) => {
        const n = order + extra;
        const p = volumeRatioKernel(order, marginal, { n, log: Math.log(n) }, 'plain');
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThan(2e-16);
        expect(Math.abs(Math.exp(p.log) / p.value - 1)).toBeLessThan(1e-13);
      }),
      { numRuns: 60 },
    );
  });

  it('gives the same tail from the value and from the complement side', () => {
    // near one half both integrals are formed for neighbouring n: the step between them is smooth
    const law = uniformBall();
    for (const d of [2, 10, 50]) {
      const n = smallest(hullVolumeRatio, 'n', { d, law }, 0.5).value;
      const logs = [-2, -1, 0, 1, 2].map(
        (i) => hullVolumeRatio({ n: Math.max(n + i, d + 1), d, law }).log,
      );
      for (let i = 1; i < logs.length; i++) {
        expect((logs[i] as number) >= (logs[i - 1] as number) - 1e-14).toBe(true);
      }
    }
  });
});

describe('monotonicity, within the stated errors', () => {
  const slack = (p: Probability, q: Probability): number =>
    p.logError + q.logError + 2e-16 * Math.abs(p.log);
  const dimension = fc.integer({ min: 1, max: 400 });

  it('rises with n', () => {
    fc.assert(
      fc.property(dimension, fc.nat(2000), fc.integer({ min: 1, max: 50 }), (d, extra, more) => {
        const law = d % 2 === 0 ? uniformSphere() : uniformBall();
        const less = hullVolumeRatio({ n: d + 1 + extra, d, law });
        const most = hullVolumeRatio({ n: d + 1 + extra + more, d, law });
        expect(most.log).toBeGreaterThan(less.log - slack(less, most));
        expect(most.logComplement).toBeLessThan(less.logComplement + slack(less, most));
      }),
      { numRuns: 60 },
    );
  });

  it('rises smoothly with log n beyond every double', () => {
    const args = { d: 5000, law: uniformBall() };
    let last = Number.NEGATIVE_INFINITY;
    for (let log = 15_000; log < 45_000; log += 499) {
      const p = hullVolumeRatio({ ...args, n: LogNumber.fromLog(log) });
      const score = p.log - p.logComplement;
      expect(score).toBeGreaterThan(last);
      last = score;
    }
    const at = (log: number): number =>
      hullVolumeRatio({ ...args, n: LogNumber.fromLog(log) }).value;
    expect(Math.abs(at(20_000.001) - 2 * at(20_000) + at(19_999.999))).toBeLessThan(1e-13);
  });

  it('falls with k and with the exponent', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 60 }), fc.integer({ min: 1, max: 500 }), (d, extra) => {
        const n = d + extra;
        const k = 1 + (extra % (d - 1));
        const law = betaLaw(0.5);
        const lower = hullIntrinsicVolumeRatio({ n, d, k, law });
        const higher = hullIntrinsicVolumeRatio({ n, d, k: k + 1, law });
        expect(higher.log).toBeLessThan(lower.log);
        const inward = hullIntrinsicVolumeRatio({ n, d, k, law: betaLaw(1) });
        expect(inward.log).toBeLessThan(lower.log);
      }),
      { numRuns: 60 },
    );
  });

  it('orders the three hulls: plain, with centre, symmetric', () => {
    for (const d of [2, 3, 10, 100]) {
      for (const n of [d + 1, 3 * d, 20 * d]) {
        const ask = { n, d, law: uniformBall() };
        const plain = hullVolumeRatio(ask);
        const centre = hullVolumeRatio({ ...ask, hull: 'withCentre' });
        const symmetric = hullVolumeRatio({ ...ask, hull: 'symmetric' });
        // where the centre is inside but for 1e-20, the first two are one number
        expect(plain.log).toBeLessThan(centre.log + slack(plain, centre));
        expect(centre.log).toBeLessThan(symmetric.log);
      }
    }
  });
});

describe('the stated error', () => {
  it('covers the true one in every reference row and is not a blank cheque', () => {
    const quantities = ['beta.volumeRatio', 'beta.VkRatio', 'beta.volumeRatioAtPhase'];
    let covered = 0;
    for (const row of rowsOf(...quantities)) {
      const args = row.args as unknown as RowArgs;
      if (row.log === null || row.args['closedForm'] === true) continue;
      const { d, k = d, beta = 0 } = args;
      const p = volumeRatioKernel(k, beta + (d - 1) / 2, resolvedOf(args), 'plain');
      const lower = p.log < p.logComplement;
      // the logarithm of the complement, from its digits
      const text = row.complement ?? '';
      if (!lower && !(Number(text) > 1e-300)) continue;
      const error = lower
        ? Math.abs(difference(p.log, row.log))
        : Math.abs(difference(p.complement, text)) / Number(text);
      expect(error).toBeLessThanOrEqual(p.logError);
      const size = Math.abs(lower ? p.log : p.logComplement);
      expect(p.logError).toBeLessThan(1e-11 * Math.max(1, size));
      covered++;
    }
    expect(covered).toBeGreaterThan(180);
  });
});

describe('extremes', () => {
  it('keeps the smaller tail far below the smallest double', () => {
    const few = hullVolumeRatio({ n: 10_001, d: 10_000, law: uniformBall() });
    expect(few.value).toBe(0);
    expect(few.log).toBeCloseTo(-55_237.2319467429, 8);
    const many = hullVolumeRatio({ n: LogNumber.fromLog(50_000), d: 3, law: uniformSphere() });
    // 12/n to leading order
    expect(many.logComplement).toBeCloseTo(Math.log(12) - 50_000, 9);
    expect(many.complement).toBe(0);
  });

  it('is certain only in the limit and never where the hull is flat', () => {
    for (const hull of ['plain', 'symmetric', 'withCentre'] as const) {
      expect(hullVolumeRatio({ n: 0, d: 1, law: uniformBall(), hull }).value).toBe(0);
      expect(hullVolumeRatio({ n: 3, d: 4, law: uniformBall(), hull }).value).toBe(0);
    }
    expect(hullVolumeRatio({ n: 4, d: 4, law: uniformBall() }).value).toBe(0);
    expect(hullVolumeRatio({ n: 4, d: 4, law: uniformBall(), hull: 'symmetric' }).value > 0).toBe(
      true,
    );
    const one = { n: 1, d: 1, law: uniformSphere(), hull: 'symmetric' } as const;
    expect(hullVolumeRatio(one).complement).toBe(0);
    expect(hullIntrinsicVolumeRatio({ n: 1, d: 4, k: 0, law: uniformBall() }).value).toBe(1);
    expect(hullIntrinsicVolumeRatio({ n: 0, d: 4, k: 0, law: uniformBall() }).value).toBe(0);
  });

  it('takes laws near the two-point law down to exponent -0.99', () => {
    const p = hullVolumeRatio({ n: 50, d: 1, law: betaLaw(-0.99) });
    expect(p.value).toBeLessThan(1);
    expect(p.value).toBeGreaterThan(hullVolumeRatio({ n: 50, d: 1, law: betaLaw(-0.9) }).value);
    expect(() => hullVolumeRatio({ n: 50, d: 1, law: betaLaw(-0.995) })).toThrow('law.b');
  });
});

describe('expected volumes', () => {
  it('are the ratio times the volume of the ball', () => {
    const ask = { n: 30, d: 5, law: uniformSphere() };
    const volume = expectedHullVolume(ask).log;
    expect(volume).toBeCloseTo(hullVolumeRatio(ask).log + ballVolume(5).log, 13);
  });

  it('know a pair of Gaussian points on the line', () => {
    const ask = { d: 1, law: gaussian() } as const;
    // E|X - Y| = 2 / sqrt(pi), E max(X, 0) - min(X, 0) = E|X|, E 2 max|X_i| for one pair
    expect(expectedHullVolume({ ...ask, n: 2 }).value).toBeCloseTo(2 / Math.sqrt(Math.PI), 14);
    const half = Math.sqrt(2 / Math.PI);
    expect(expectedHullVolume({ ...ask, n: 1, hull: 'withCentre' }).value).toBeCloseTo(half, 14);
    expect(expectedHullVolume({ ...ask, n: 1, hull: 'symmetric' }).value).toBeCloseTo(2 * half, 14);
    // E max(|X|, |Y|) = 2 / sqrt(pi)
    const two = expectedHullVolume({ ...ask, n: 2, hull: 'symmetric' });
    expect(two.value).toBeCloseTo(4 / Math.sqrt(Math.PI), 13);
  });

  it('are infinite for a law without a mean', () => {
    const heavy = { n: 10, d: 3, law: studentT({ degreesOfFreedom: 1 }) };
    expect(expectedHullVolume(heavy).log).toBe(Number.POSITIVE_INFINITY);
    expect(expectedHullVolume({ ...heavy, n: 3 }).value).toBe(0);
    const light = { ...heavy, law: studentT({ degreesOfFreedom: 1.5 }) };
    expect(Number.isFinite(expectedHullVolume(light).log)).toBe(true);
  });

  it('of a Student t law tend to the Gaussian ones', () => {
    const nu = 1e9;
    const t = expectedHullIntrinsicVolume({
      n: 40,
      d: 6,
      k: 4,
      law: studentT({ degreesOfFreedom: nu }),
    });
    // the standard law of the family has variance 1/nu to leading order
    const scaled = t.log + 2 * Math.log(nu);
    const normal = expectedHullIntrinsicVolume({ n: 40, d: 6, k: 4, law: gaussian() }).log;
    expect(Math.abs(scaled - normal)).toBeLessThan(1e-7);
  });
});

describe('bad input', () => {
  it.each([
    [{ n: 3.5, d: 2, law: uniformBall() }, 'n'],
    [{ n: -1, d: 2, law: uniformBall() }, 'n'],
    [{ n: Number.NaN, d: 2, law: uniformBall() }, 'n'],
    [{ n: 5, d: 0, law: uniformBall() }, 'd'],
    [{ n: 5, d: 2e6, law: uniformBall() }, 'd'],
    [{ n: 5, d: 2, law: gaussian() }, 'law'],
    [{ n: 5, d: 2 }, 'law'],
    [{ n: 5, d: 2, law: uniformBall(), hull: 'open' }, 'hull'],
    [{ n: 5, d: 2, law: uniformBall(), k: 1 }, 'k'],
  ])('hullVolumeRatio(%o) names %s', (options, parameter) => {
    expect(() => hullVolumeRatio(options as never)).toThrow(DomainError);
    expect(() => hullVolumeRatio(options as never)).toThrow(`hullVolumeRatio: ${parameter} `);
  });

  it('refuses an order above the dimension', () => {
    const ask = { n: 5, d: 2, law: uniformBall() };
    expect(() => hullIntrinsicVolumeRatio({ ...ask, k: 3 })).toThrow('k must be');
    expect(() => expectedHullIntrinsicVolume({ ...ask, k: -1 })).toThrow('k must be');
  });
});

it('has the complement 2/(n + 1) on the line, through 2^53', () => {
  for (const n of [2 ** 53 - 2, 2 ** 53 - 1, 2 ** 53, 2 ** 53 + 2, 2 ** 54]) {
    const { complement } = hullVolumeRatio({ n, d: 1, law: uniformBall() });
    expect(complement * (n / 2)).toBeCloseTo(1, 12);
  }
});

it('states the error of the volume of the ball itself', () => {
  // so many points fill the ball: log C(d, k) + log kappa_d / kappa_(d - k), mpmath with 60 digits
  for (const [d, k, exact] of [
    [300, 93, 10.8744972838103042974892586],
    [200, 100, -22.2718782300419561618248020023],
    [400, 17, 32.8610998549744133798193590272],
  ] as const) {
    const n = LogNumber.fromLog(50_000);
    const { log, logError } = expectedHullIntrinsicVolume({ n, d, k, law: uniformSphere() });
    expect(Math.abs(log - exact)).toBeLessThanOrEqual(logError);
    expect(logError).toBeLessThan(2e-13);
  }
});
