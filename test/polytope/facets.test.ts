import fc from 'fast-check';
import {
  betaLaw,
  betaPrimeLaw,
  capProbability,
  DomainError,
  expectedFacets,
  expectedFacetsBelow,
  facetHeight,
  gaussian,
  heightLimit,
  type Law,
  LogNumber,
  Probability,
  simplexVolume,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { incompleteBeta, normalCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { facetModel, facetTotal } from '../../src/polytope/facet-measure.ts';
import { type RowArgs, resolvedOf, rowsOf } from '../support/polytope-rows.ts';
import { difference } from '../support/reference.ts';

const laws: readonly Law[] = [
  uniformSphere(),
  uniformBall(),
  betaLaw(3),
  gaussian(),
  studentT({ degreesOfFreedom: 3 }),
  studentT({ degreesOfFreedom: 0.1 }),
];

describe('expectedFacets', () => {
  it('is n on the circle and 2(n - 2) on the 2-sphere', () => {
    // The Beauty of Random Polytopes Inscribed in the 2-sphere, arXiv:2007.07783
    for (const n of [4, 7, 100, 1_000_000]) {
      expect(expectedFacets({ n, d: 2, law: uniformSphere() }).value).toBe(n);
      expect(expectedFacets({ n, d: 3, law: uniformSphere() }).value).toBe(2 * (n - 2));
      const pairs = { n, d: 3, law: uniformSphere(), hull: 'symmetric' } as const;
      expect(expectedFacets(pairs).value).toBe(4 * n - 4);
    }
  });

  it('is d + 1 for a simplex and 2^d for a cross-polytope, whatever the law', () => {
    for (const law of laws) {
      for (const d of [2, 3, 10, 60]) {
        expect(expectedFacets({ n: d + 1, d, law }).value).toBe(d + 1);
        expect(expectedFacets({ n: d, d, law, hull: 'withCentre' }).value).toBe(d + 1);
        const cross = expectedFacets({ n: d, d, law, hull: 'symmetric' }).log;
        expect(cross).toBe(d * Math.LN2);
      }
    }
    for (const d of [1000, 10_000]) {
      expect(expectedFacets({ n: d + 1, d, law: gaussian() }).value).toBe(d + 1);
      expect(expectedFacets({ n: d + 1, d, law: uniformBall() }).value).toBe(d + 1);
    }
  });

  it('has the known closed form for the arcsine law in the plane', () => {
    // (4 / sqrt(pi)) Gamma(n - 1/2) / Gamma(n - 1): ratios of neighbours are (n - 1/2) / (n - 1)
    const at = (n: number): number => expectedFacets({ n, d: 2, law: betaLaw(-0.5) }).log;
    expect(at(3)).toBeCloseTo(Math.log(3), 14);
    for (const n of [3, 10, 1000]) {
      expect(at(n + 1) - at(n)).toBeCloseTo(Math.log((n - 0.5) / (n - 1)), 13);
    }
  });

  it('counts a simplex of lower dimension', () => {
    const ask = (n: number, d: number, hull?: 'symmetric' | 'withCentre'): number =>
      expectedFacets({ n, d, law: uniformBall(), hull }).value;
    expect([ask(0, 3), ask(2, 3), ask(3, 3), ask(4, 3)]).toEqual([0, 0, 1, 4]);
    expect([ask(1, 3, 'symmetric'), ask(2, 3, 'symmetric')]).toEqual([0, 1]);
    expect([ask(1, 3, 'withCentre'), ask(2, 3, 'withCentre')]).toEqual([0, 1]);
    expect([ask(0, 1), ask(1, 1), ask(2, 1)]).toEqual([0, 1, 2]);
    expect(expectedFacets({ n: 2, d: 1, law: uniformSphere() }).value).toBe(1.5);
  });

  it('rises with n', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...laws),
        fc.integer({ min: 2, max: 200 }),
        fc.nat(3000),
        (law, d, extra) => {
          const one = expectedFacets({ n: d + 1 + extra, d, law });
          const two = expectedFacets({ n: d + 2 + extra, d, law });
          expect(two.log).toBeGreaterThan(one.log - one.logError - two.logError);
        },
      ),
      { numRuns: 80 },
    );
  });

  it('saturates for heavy tails and tends to the Gaussian number for light ones', () => {
    const heavy = studentT({ degreesOfFreedom: 2 });
    const limit = expectedFacets({ n: LogNumber.fromLog(5000), d: 4, law: heavy }).value;
    const near = expectedFacets({ n: 1e7, d: 4, law: heavy }).value;
    expect(near / limit).toBeGreaterThan(0.99);
    expect(near / limit).toBeLessThan(1);
    const light = expectedFacets({ n: 50, d: 5, law: studentT({ degreesOfFreedom: 1e8 }) });
    const normal = expectedFacets({ n: 50, d: 5, law: gaussian() });
    expect(Math.abs(light.log - normal.log)).toBeLessThan(1e-6);
  });

  it('is the same with the centre for many points', () => {
    const law = studentT({ degreesOfFreedom: 0.02 });
    for (const n of [5000, 1e6, LogNumber.fromLog(129.85), LogNumber.fromLog(130.85)]) {
      const ask = { n, d: 63, law };
      const [plain, centred] = [
        expectedFacets(ask),
        expectedFacets({ ...ask, hull: 'withCentre' }),
      ];
      expect(Math.abs(centred.log - plain.log)).toBeLessThanOrEqual(plain.logError);
    }
    // where the two ways meet
    const near = (n: number): number =>
      expectedFacets({ n, d: 3, law: gaussian(), hull: 'withCentre' }).log;
    expect(near(2031) - near(2030)).toBeCloseTo(near(2030) - near(2029), 6);
  });

  it('agrees between its two forms where they meet, n = 2 d', () => {
    for (const law of [uniformBall(), gaussian(), betaPrimeLaw(40)] as const) {
      for (const d of [5, 40]) {
        const logs = [2 * d - 1, 2 * d, 2 * d + 1, 2 * d + 2].map(
          (n) => expectedFacets({ n, d, law }).log,
        );
        const [a, b, c, e] = logs as [number, number, number, number];
        // third differences of a smooth function of n
        expect(Math.abs(e - 3 * c + 3 * b - a)).toBeLessThan(0.02);
        const below = expectedFacetsBelow({ n: 2 * d + 1, d, height: 1e6, law }).log;
        expect(Math.abs(below - c)).toBeLessThan(1e-12 * Math.max(1, c));
      }
    }
  });

  it('states an error that covers the true one', () => {
    for (const row of rowsOf('beta.expectedFacets', 'gauss.expectedFacets')) {
      const args = row.args as unknown as RowArgs;
      const law = row.quantity.startsWith('gauss') ? gaussian() : betaLaw(args.beta ?? 0);
      const total = facetTotal(facetModel(law, args.d), resolvedOf(args), 'line');
      const exact = row.log ?? '';
      expect(Math.abs(difference(total.log, exact))).toBeLessThan(total.error);
      expect(total.error).toBeLessThan(2e-14 * Math.max(1, Math.abs(Number(exact))));
    }
  });
});

describe('facetHeight', () => {
  it('has its two tails and inverts itself', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 2, max: 60 }),
        fc.integer({ min: 1, max: 400 }),
        fc.boolean(),
        fc.double({ min: -300, max: -1e-3, noNaN: true }),
        fc.boolean(),
        (d, extra, bounded, size, lower) => {
          // near 1 doubles are 1e-16 apart, and the upper tail of a bounded law ends there
          const log = bounded && !lower ? size / 6 : size;
          const law = bounded ? uniformBall() : gaussian();
          const height = facetHeight({ n: d + extra, d, law });
          const p = lower ? Probability.fromLog(log) : Probability.fromLogComplement(log);
          const x = height.quantile(p);
          const back = height.cdf(x);
          const found = lower ? back.log : back.logComplement;
          // the height is a double: what its last bit means for the tail
          const granularity = 2 ** -51 * Math.abs(x) * Math.exp(height.logPdf(x) - found);
          const slack = 1e-12 * Math.max(1, Math.abs(log)) + 4 * granularity;
          expect(Math.abs(found - log)).toBeLessThan(slack);
        },
      ),
      { numRuns: 25 },
    );
  });

  it('rises with n in distribution', () => {
    for (const law of [uniformSphere(), gaussian()] as const) {
      let last = 1;
      for (const n of [11, 14, 20, 50, 1000]) {
        const { value } = facetHeight({ n, d: 10, law }).cdf(0.4);
        expect(value).toBeLessThan(last);
        last = value;
      }
    }
  });

  it('is (1 + H)/2 ~ Beta(n - 1, 2) on the 2-sphere', () => {
    const height = facetHeight({ n: 30, d: 3, law: uniformSphere() });
    for (const h of [-0.9, 0, 0.5, 0.9, 0.999]) {
      const exact = incompleteBeta(29, 2, (1 + h) / 2, (1 - h) / 2);
      const p = height.cdf(h);
      expect(Math.abs(p.log - exact.log)).toBeLessThan(1e-13 * Math.max(1, Math.abs(exact.log)));
      expect(Math.abs(p.complement / exact.complement - 1)).toBeLessThan(1e-13);
      // density n(n-1)... of Beta(29, 2), halved
      const density = 28 * Math.log((1 + h) / 2) + Math.log((1 - h) / 2) + Math.log((29 * 30) / 2);
      expect(height.logPdf(h)).toBeCloseTo(density, 11);
    }
    expect(height.variance).toBeCloseTo((4 * 29 * 2) / (31 * 31 * 32), 14);
  });

  it('is normal with variance 1/d for d + 1 Gaussian points, but for the weight of the last', () => {
    // the density is phi(h sqrt(d)) Phi(h)
    const d = 9;
    const height = facetHeight({ n: d + 1, d, law: gaussian() });
    // E H of phi(h sqrt d) Phi(h) is 2 phi(0) / sqrt(d (d + 1)) by Stein's identity
    expect(height.mean).toBeCloseTo(Math.sqrt(2 / (Math.PI * d * (d + 1))), 14);
    expect(height.variance).toBeCloseTo(1 / d - height.mean ** 2, 14);
  });

  it('approaches its limits', () => {
    const errors = [100, 1000, 10_000].map((d) => {
      const ask = { n: LogNumber.fromLog(d / 2), d };
      const { mean, limit } = facetHeight({ ...ask, law: uniformSphere() });
      expect(limit).toBe(heightLimit(ask).limit);
      return limit - mean;
    });
    expect(errors[0]).toBeGreaterThan(errors[1] as number);
    expect(errors[1]).toBeGreaterThan(errors[2] as number);
    expect(errors[2]).toBeLessThan(0.001);
    const far = facetHeight({ n: LogNumber.fromLog(40_000), d: 10, law: gaussian() });
    expect(far.mean / far.limit).toBeGreaterThan(0.999);
  });

  it('keeps its tails as far out as doubles reach', () => {
    const law = facetHeight({ n: 74, d: 9, law: gaussian() });
    for (const x of [-1e3, -1e8, -1e111]) expect(law.cdf(x).log / (-37 * x * x)).toBeCloseTo(1, 3);
    for (const x of [1e3, 1e8, 1e111]) {
      expect(law.cdf(x).logComplement / (-4.5 * x * x)).toBeCloseTo(1, 3);
    }
    for (const x of [-1e160, 1e160]) {
      expect(law.cdf(x).value).toBe(x < 0 ? 0 : 1);
      expect(law.cdf(x).logError).toBe(Number.POSITIVE_INFINITY);
      expect(law.logPdf(x)).toBe(Number.NEGATIVE_INFINITY);
    }
    // the two ways meet
    const far = law.mean + 1e4 * Math.sqrt(law.variance);
    const [before, after] = [law.cdf(far * (1 - 1e-9)), law.cdf(far * (1 + 1e-9))];
    const slope = (before.logComplement - after.logComplement) / (9 * far * far * 2e-9);
    expect(slope).toBeCloseTo(1, 2);
  });

  it('ends at the ends', () => {
    const height = facetHeight({ n: 10, d: 3, law: uniformBall() });
    expect(height.cdf(-1).value).toBe(0);
    expect(height.cdf(1).complement).toBe(0);
    expect(height.cdf(Number.NEGATIVE_INFINITY).value).toBe(0);
    expect([height.quantile(0), height.quantile(1)]).toEqual([-1, 1]);
    expect(height.logPdf(1.5)).toBe(Number.NEGATIVE_INFINITY);
    expect(() => height.cdf(Number.NaN)).toThrow(DomainError);
    expect(() => height.quantile(1.5)).toThrow(DomainError);
    expect(() => facetHeight({ n: 3, d: 3, law: uniformBall() })).toThrow('n must be');
    expect(() => facetHeight({ n: 3, d: 1, law: uniformBall() })).toThrow('d must be');
    expect(() => facetHeight({ n: 9, d: 3, law: betaPrimeLaw(4) })).toThrow('law must be');
  });
});

describe('expectedFacetsBelow', () => {
  it('goes from none to all', () => {
    const ask = { n: 40, d: 4, law: uniformBall() };
    const total = expectedFacets(ask).log;
    let last = Number.NEGATIVE_INFINITY;
    for (const height of [-1.5, -0.99, -0.5, 0, 0.3, 0.6, 0.9, 0.9999999]) {
      const { log } = expectedFacetsBelow({ ...ask, height });
      expect(log).toBeGreaterThanOrEqual(last);
      last = log;
    }
    expect(Math.abs(last - total)).toBeLessThan(3e-14);
    expect(expectedFacetsBelow({ ...ask, height: 1 }).log).toBe(total);
    expect(expectedFacetsBelow({ ...ask, n: 4, height: 1 }).value).toBe(0);
  });

  it('has none far below and all far above, as far as doubles reach', () => {
    for (const n of [10, 74, 1e6]) {
      const total = expectedFacets({ n, d: 9, law: gaussian() }).log;
      for (const size of [1e3, 1e8, 1e111, 1e160]) {
        const [below, above] = [-size, size].map((height) =>
          expectedFacetsBelow({ n, d: 9, height, law: gaussian() }),
        ) as [LogNumber, LogNumber];
        expect(above.log).toBeCloseTo(total, 12);
        // n exponents of -h^2/2
        const exponent = (-n / 2) * size * size;
        if (exponent > -1e300) expect(below.log / exponent).toBeCloseTo(1, 3);
        else expect(below.log).toBe(Number.NEGATIVE_INFINITY);
      }
    }
  });

  it('is 2 F(h)^n on the line', () => {
    const ask = { n: 7, d: 1 };
    const uniform = expectedFacetsBelow({ ...ask, height: 0.5, law: uniformBall() }).value;
    expect(uniform).toBeCloseTo(2 * 0.75 ** 7, 14);
    const normal = expectedFacetsBelow({ ...ask, height: 0.5, law: gaussian() }).log;
    expect(normal).toBeCloseTo(Math.LN2 + 7 * normalCdf(0.5).log, 14);
  });
});

describe('capProbability', () => {
  it('is half the incomplete beta function, also at the ends', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 3000 }),
        fc.double({ min: 0, max: 0.999, noNaN: true }),
        fc.double({ min: -0.9, max: 30, noNaN: true }),
        (d, height, b) => {
          const cap = capProbability({ d, height, law: betaLaw(b) });
          const w = (1 - height) * (1 + height);
          const marginal = b + (d - 1) / 2;
          const exact = incompleteBeta(marginal + 1, 0.5, w, height * height).log - Math.LN2;
          expect(Math.abs(cap.log - exact)).toBeLessThan(2e-13 * Math.max(1, Math.abs(exact)));
          const mirrored = capProbability({ d, height: -height, law: betaLaw(b) });
          expect(mirrored.logComplement).toBe(cap.log);
        },
      ),
      { numRuns: 200 },
    );
    expect(capProbability({ d: 3, height: 1, law: uniformBall() }).value).toBe(0);
    expect(capProbability({ d: 3, height: -1, law: uniformBall() }).complement).toBe(0);
    expect(capProbability({ d: 3, height: 0, law: uniformBall() }).value).toBe(0.5);
    expect(capProbability({ d: 1, height: 0.3, law: uniformSphere() }).value).toBe(0.5);
    expect(capProbability({ d: 1, height: 1, law: uniformSphere() }).value).toBe(0);
    expect(capProbability({ d: 1, height: -1, law: uniformSphere() }).value).toBe(0.5);
  });

  it('has Cauchy tails for one degree of freedom', () => {
    for (const height of [0.1, 1, 50, 1e9, 1e200]) {
      const { value } = capProbability({ d: 5, height, law: studentT({ degreesOfFreedom: 1 }) });
      expect(value / (Math.atan2(1, height) / Math.PI)).toBeCloseTo(1, 13);
    }
  });
});

describe('simplexVolume', () => {
  it('knows the second moment of every law', () => {
    // E (r! Vol)^2 = (r + 1) d! / (d - r)! (variance of a coordinate)^r
    for (const [d, r] of [
      [3, 1],
      [5, 3],
      [9, 9],
    ] as const) {
      let logs = Math.log(r + 1);
      for (let i = 0; i < r; i++) logs += Math.log(d - i) - 2 * Math.log(i + 1);
      const second = (law: Law): number => simplexVolume({ d, r, law }).moment(2).log;
      expect(second(gaussian())).toBeCloseTo(logs, 12);
      expect(second(uniformBall())).toBeCloseTo(logs - r * Math.log(d + 2), 12);
      expect(second(uniformSphere())).toBeCloseTo(logs - r * Math.log(d), 12);
      expect(second(studentT({ degreesOfFreedom: 5 }))).toBeCloseTo(logs - r * Math.log(3), 12);
    }
  });

  it('has mean and variance of the logarithm as derivatives of the moments', () => {
    for (const law of [uniformBall(), gaussian(), betaPrimeLaw(9)]) {
      const simplex = simplexVolume({ d: 6, r: 4, law });
      const q = 1e-3;
      const plus = simplex.moment(q).log;
      const minus = simplex.moment(-q).log;
      expect(simplex.meanOfLog).toBeCloseTo((plus - minus) / (2 * q), 5);
      expect(simplex.varianceOfLog).toBeCloseTo((plus + minus) / (q * q), 5);
      expect(simplex.moment(0).log).toBe(0);
    }
  });

  it('ends where points near the boundary have nowhere else to go', () => {
    const circle = uniformSphere();
    // three points of a circle: 4 pi^2 R = abc / (4 Vol), the area falls like the cube of their spread
    const triangle = simplexVolume({ d: 2, law: circle });
    expect(triangle.moment(-0.666).log).toBeGreaterThan(triangle.moment(-0.6).log);
    expect(() => triangle.moment(-0.67)).toThrow('q must be above -0.666');
    // a chord: E length^q = 2^q Gamma((1 + q)/2) / (sqrt(pi) Gamma(1 + q/2))
    const chord = simplexVolume({ d: 2, r: 1, law: circle });
    expect(chord.moment(-0.5).value).toBeCloseTo(
      (Math.SQRT1_2 * 3.6256099082219083) / (Math.sqrt(Math.PI) * 1.2254167024651776),
      12,
    );
    expect(() => chord.moment(-1)).toThrow('q must be above -1');
    expect(() => simplexVolume({ d: 4, r: 1, law: betaLaw(-0.999) }).moment(-3.75)).toThrow(
      DomainError,
    );
    // two points of the line that crowd at its ends agree to within delta with probability delta^0.002
    const crowd = simplexVolume({ d: 1, law: betaLaw(-0.999) });
    expect(crowd.moment(-0.0019999).log).toBeGreaterThan(crowd.moment(-0.001).log);
    expect(() => crowd.moment(-0.0021)).toThrow('q must be above -0.002');
  });

  it('refuses moments that do not exist', () => {
    expect(() => simplexVolume({ d: 2, law: uniformBall() }).moment(-1)).toThrow('q must be');
    expect(() => simplexVolume({ d: 2, law: betaPrimeLaw(2) }).moment(2)).toThrow('q must be');
    expect(() => simplexVolume({ d: 2, r: 3, law: uniformBall() })).toThrow('r must be');
    expect(() => simplexVolume({ d: 1, law: uniformSphere() })).toThrow('law must be');
  });
});

describe('bad input', () => {
  it('names the parameter', () => {
    const ask = { n: 9, d: 3, law: uniformBall() };
    expect(() => expectedFacets({ ...ask, n: 2.5 })).toThrow('expectedFacets: n must be');
    expect(() => expectedFacets({ ...ask, k: 2 } as never)).toThrow('k must be left out');
    expect(() => expectedFacetsBelow({ ...ask, height: Number.NaN })).toThrow('height must be');
    expect(() => capProbability({ d: 3, height: Number.NaN, law: gaussian() })).toThrow(
      DomainError,
    );
    const thin = studentT({ degreesOfFreedom: 0.01 });
    expect(() => expectedFacets({ ...ask, law: thin })).toThrow(
      'law.degreesOfFreedom must be >= 0.02',
    );
    expect(() => heightLimit({ n: 0, d: 3 })).toThrow('n must be');
  });
});
