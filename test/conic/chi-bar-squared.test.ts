import fc from 'fast-check';
import {
  type Cone,
  chiBarSquared,
  eBarSquared,
  type OrderRestrictedLaw,
  Probability,
  reversedWeights,
  simpleTree,
  totalOrder,
} from 'hullgauge';
import { approxPolyhedralCone, halfspace, orthant, subspace, weylChamber } from 'hullgauge/conic';
import { chiSquaredCdf, incompleteBeta } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';
import { difference, type NamedRow, readTable } from '../support/reference.ts';

const rows = readTable<NamedRow>('conic-tests');

/** Non-decreasing fit by pooling adjacent violators; written for this test alone. */
function isotonic(means: readonly number[], weights: readonly number[]): number[] {
  let blocks = means.map((mean, i) => ({ mean, weight: weights[i] as number, size: 1 }));
  for (;;) {
    const i = blocks.findIndex((b, at) => at > 0 && b.mean < (blocks[at - 1]?.mean as number));
    if (i < 0) return blocks.flatMap((b) => new Array<number>(b.size).fill(b.mean));
    const [a, b] = [blocks[i - 1], blocks[i]] as [(typeof blocks)[number], (typeof blocks)[number]];
    const weight = a.weight + b.weight;
    const mean = (a.mean * a.weight + b.mean * b.weight) / weight;
    const pooled = { mean, weight, size: a.size + b.size };
    blocks = [...blocks.slice(0, i - 1), pooled, ...blocks.slice(i + 1)];
  }
}

/** Weights with sum 1. */
const weightsArbitrary = fc
  .array(fc.double({ min: 0.001, max: 1, noNaN: true }), { minLength: 2, maxLength: 7 })
  .map((raw) => {
    const sum = raw.reduce((total, w) => total + w);
    return raw.map((w) => w / sum);
  });

function expectInverse(law: OrderRestrictedLaw, target: Probability, span: number): void {
  const x = law.quantile(target);
  const at = law.cdf(x);
  const lower = target.log <= target.logComplement;
  const gap = lower ? at.log - target.log : target.logComplement - at.logComplement;
  // at or just above the target, and not more than the smallest step of x allows
  const size = Math.abs(lower ? target.log : target.logComplement);
  expect(gap).toBeGreaterThanOrEqual(-1e-14 * (1 + size));
  expect(gap).toBeLessThan(span * (1 + size));
}

describe('chiBarSquared', () => {
  it('is the chi-squared law for a single weight', () => {
    for (const df of [1, 2, 7]) {
      const law = chiBarSquared(Array.from({ length: df + 1 }, (_, j) => (j === df ? 1 : 0)));
      expect([law.mean, law.variance]).toEqual([df, 2 * df]);
      for (const x of [1e-8, 0.3, 5, 60, 5000]) {
        const exact = chiSquaredCdf(x, df);
        expect(law.cdf(x).log).toBeCloseTo(exact.log, 14);
        expect(law.cdf(x).logComplement / exact.logComplement).toBeCloseTo(1, 14);
      }
      const [a, b] = [law.cdf(3).value, law.cdf(3.002).value];
      expect(Math.exp(law.logPdf(3.001))).toBeCloseTo((b - a) / 0.002, 6);
    }
  });

  it('agrees with a general-purpose library in the middle', () => {
    for (const weights of [totalOrder(5), simpleTree(6, { control: 4 })]) {
      const law = chiBarSquared(weights);
      for (const x of [1, 2.5, 4, 7]) {
        const other = weights.reduce(
          (sum, w, j) => sum + w * (j === 0 ? 0 : 1 - jstat.chisquare.cdf(x, j)),
          0,
        );
        // jstat is good to 1e-11 there
        expect(Math.abs(law.pValue(x) - other)).toBeLessThan(1e-10);
      }
    }
  });

  it('inverts its distribution function in both tails', () => {
    fc.assert(
      fc.property(
        weightsArbitrary,
        fc.double({ min: -700, max: -0.7, noNaN: true }),
        fc.boolean(),
        (weights, log, far) => {
          const law = chiBarSquared(weights);
          const w0 = weights[0] as number;
          if (far)
            expectInverse(
              law,
              Probability.fromLogComplement(Math.min(log, Math.log(0.99 * (1 - w0)))),
              1e-14,
            );
          else expectInverse(law, Probability.fromValue(w0 + (1 - w0) * Math.exp(log)), 1e-14 / w0);
        },
      ),
    );
  });

  it('has all the mass at 0 in one point', () => {
    const law = chiBarSquared(totalOrder(4));
    expect(law.cdf(0).value).toBe(0.25);
    expect(law.cdf(-1e-300).value).toBe(0);
    expect(law.cdf(1e-300).value).toBe(0.25);
    expect([law.quantile(0), law.quantile(0.1), law.quantile(0.25)]).toEqual([0, 0, 0]);
    // the trap: an upper probability of 1 - w0 or more has no root
    expect(law.quantile(Probability.fromComplement(0.75))).toBe(0);
    expect(law.quantile(Probability.fromComplement(0.9))).toBe(0);
    expect(law.quantile(0.26)).toBeGreaterThan(1e-4);
    expect([law.pValue(0), law.pValue(-1)]).toEqual([1, 1]);
    expect(law.pValue(1e-300)).toBe(0.75);
    expect(law.pValue(Number.POSITIVE_INFINITY)).toBe(0);
    expect(law.quantile(1)).toBe(Number.POSITIVE_INFINITY);
    expect(law.logPdf(0)).toBe(Number.POSITIVE_INFINITY);
    expect(law.logPdf(-1)).toBe(Number.NEGATIVE_INFINITY);
    expect(chiBarSquared([0.5, 0, 0.5]).logPdf(0)).toBe(Math.log(0.25));
    expect(chiBarSquared([0.5, 0, 0, 0.5]).logPdf(0)).toBe(Number.NEGATIVE_INFINITY);
    const point = chiBarSquared([1]);
    expect([point.mean, point.variance, point.quantile(0.7), point.quantile(1)]).toEqual([
      0, 0, 0, 0,
    ]);
    expect([point.cdf(0).complement, point.pValue(1), point.pValue(0)]).toEqual([0, 0, 1]);
    expect(point.logPdf(1)).toBe(Number.NEGATIVE_INFINITY);
  });

  it('has the moments and the density of its tails', () => {
    for (const law of [chiBarSquared(totalOrder(6)), chiBarSquared(simpleTree(4))]) {
      // Simpson's rule in t, x = t^2: the tail and its moment integral
      let [mean, square, mass] = [0, 0, 0];
      const steps = 4000;
      const h = Math.sqrt(150) / steps;
      for (let i = 0; i <= steps; i++) {
        const t = i * h;
        const weight = (h / 3) * (i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2) * 2 * t;
        const tail = t === 0 ? 0 : law.pValue(t * t);
        mean += weight * tail;
        square += weight * 2 * t * t * tail;
        // density times 2 t has a finite limit at 0
        const density = Math.exp(law.logPdf(Math.max(t * t, 1e-30)));
        mass += (i === 0 ? (h / 3) * 2e-15 : weight) * density;
      }
      expect(mean / law.mean).toBeCloseTo(1, 9);
      expect((square - law.mean ** 2) / law.variance).toBeCloseTo(1, 9);
      expect(mass / (1 - (law.weights[0] as number))).toBeCloseTo(1, 6);
    }
  });

  it('takes a cone, and makes its null hypothesis explicit', () => {
    const chamber = weylChamber('A', 5);
    const byCone = chiBarSquared(chamber, { null: 'lineality' });
    const byWeights = chiBarSquared(totalOrder(5));
    for (const x of [0, 0.1, 3, 30, 3000]) {
      expect(byCone.cdf(x).log).toBeCloseTo(byWeights.cdf(x).log, 14);
      expect(byCone.cdf(x).logComplement).toBeCloseTo(byWeights.cdf(x).logComplement, 10);
    }
    expect(byCone.mean).toBeCloseTo(byWeights.mean, 14);
    expect(byCone.variance).toBeCloseTo(byWeights.variance, 14);
    const origin = chiBarSquared(chamber, { null: 'origin' });
    expect(origin.weights[0]).toBe(0);
    expect(origin.mean).toBeCloseTo(byWeights.mean + 1, 14);
    expect(() => chiBarSquared(chamber)).toThrow(
      'chiBarSquared: null must be "lineality" or "origin" for a cone that contains a subspace of dimension 1, got undefined',
    );
    expect(chiBarSquared(orthant(3)).cdf(2)).toEqual(
      chiBarSquared(orthant(3), { null: 'origin' }).cdf(2),
    );
    expect(chiBarSquared(halfspace(3), { null: 'lineality' }).weights).toEqual([0.5, 0.5]);
    const plane = subspace({ dimension: 2, ambient: 5 });
    expect(chiBarSquared(plane, { null: 'origin' }).cdf(2).value).toBeCloseTo(1 - Math.exp(-1), 15);
    expect(chiBarSquared(plane, { null: 'lineality' }).quantile(0.9)).toBe(0);
  });

  it('answers for weights far below the smallest double', () => {
    const law = chiBarSquared(weylChamber('A', 400), { null: 'lineality' });
    expect(law.weights[399]).toBe(0);
    const far = law.cdf(4e4);
    expect(far.complement).toBe(0);
    // the largest weight times its tail is a lower bound, the heaviest tail an upper one
    expect(far.logComplement).toBeLessThan(chiSquaredCdf(4e4, 399).logComplement);
    expect(far.logComplement).toBeGreaterThan(chiSquaredCdf(4e4, 6).logComplement - 2);
    expect(
      law.cdf(law.quantile(Probability.fromLogComplement(-1e4))).logComplement / -1e4,
    ).toBeCloseTo(1, 13);
    expect(law.cdf(1e300).logError).toBeLessThan(1e285);
  });

  it('does not jump where numbers give way to logarithms', () => {
    const law = chiBarSquared(totalOrder(8));
    // the upper tail passes 1e-300 between these
    for (const x of [1385, 1390, 1393, 1395, 1400]) {
      const { complement, logComplement } = law.cdf(x);
      expect(Math.abs(Math.log(complement) / logComplement - 1)).toBeLessThan(1e-15);
      const slope = law.logPdf(x) - logComplement;
      const ahead = law.cdf(x + 1e-3).logComplement;
      expect((logComplement - ahead) / 1e-3).toBeCloseTo(Math.exp(slope), 6);
    }
    expect(law.cdf(1390).complement).toBeGreaterThan(1e-300);
    expect(law.cdf(1395).complement).toBeLessThan(1e-300);
  });

  it('passes the uncertainty of a simulated cone on', () => {
    const cone: Cone = approxPolyhedralCone(
      [0, 1, 2].map((i) => [0, 1, 2].map((j) => (i === j ? 1 : 0))),
      { trials: 2000, seed: 3 },
    );
    const p = chiBarSquared(cone).cdf(4);
    const exact = chiBarSquared(orthant(3)).cdf(4);
    expect(p.logError).toBeGreaterThan(0.01);
    expect(Math.abs(p.logComplement - exact.logComplement)).toBeLessThan(p.logError);
  });

  it('states errors that cover the true ones without exaggeration', () => {
    let worst = 0;
    for (const row of rows) {
      const upper = row.quantity === 'chibar.upper' || row.quantity === 'ebar.upper';
      const lower = row.quantity === 'chibar.lower' || row.quantity === 'ebar.lower';
      if ((!upper && !lower) || row.log === null) continue;
      const weights = totalOrder(row.args['k'] as number);
      const observations = row.args['observations'] as number | undefined;
      const law =
        observations === undefined
          ? chiBarSquared(weights)
          : eBarSquared(weights, { observations });
      const p = law.cdf(Number(row.args['x']));
      if (upper === p.complement > 0.5) continue;
      const error = Math.abs(difference(upper ? p.logComplement : p.log, row.log));
      expect(error).toBeLessThanOrEqual(p.logError);
      worst = Math.max(worst, error / p.logError);
    }
    expect(worst).toBeGreaterThan(0.02);
  });

  it('refuses what is no weight', () => {
    expect(() => chiBarSquared([])).toThrow('weights must be an array of 1 to 1000001 numbers');
    expect(() => chiBarSquared([0.5, -0.5, 1])).toThrow('weights[1] must be a number from 0 to 1');
    expect(() => chiBarSquared([0.5, 0.4])).toThrow('weights must be numbers with sum 1');
    expect(() => chiBarSquared([0.5, 0.5], { null: 'origin' })).toThrow('null must be left out');
    expect(() => chiBarSquared([0.5, 0.5], { null: 'zero' as never })).toThrow('null must be');
    const law = chiBarSquared([0.5, 0.5]);
    expect(() => law.cdf(Number.NaN)).toThrow('chiBarSquared.cdf: x must be a number, got NaN');
    expect(() => law.quantile(1.5)).toThrow('chiBarSquared.quantile: p must be');
    expect(() => law.pValue('3' as never)).toThrow('chiBarSquared.pValue: x');
    expect(() => law.logPdf(null as never)).toThrow('chiBarSquared.logPdf: x');
  });
});

describe('eBarSquared', () => {
  it('is the beta law for a single weight', () => {
    const law = eBarSquared([0, 0, 0, 1], { observations: 12 });
    for (const x of [1e-5, 0.2, 0.7, 1 - 1e-9]) {
      const exact = incompleteBeta(1.5, 4, x);
      expect(law.cdf(x).value / exact.value).toBeCloseTo(1, 14);
      expect(law.cdf(x).logComplement).toBeCloseTo(exact.logComplement, 12);
    }
    expect(law.mean).toBeCloseTo(3 / 11, 15);
    expect(law.variance).toBeCloseTo((1.5 * 4) / (5.5 * 5.5 * 6.5), 15);
    const [a, b] = [law.cdf(0.3).value, law.cdf(0.3002).value];
    expect(Math.exp(law.logPdf(0.3001))).toBeCloseTo((b - a) / 0.0002, 6);
  });

  it('tends to the law of known variance', () => {
    const weights = totalOrder(5);
    const known = chiBarSquared(weights);
    const observations = 1e9;
    const law = eBarSquared(weights, { observations });
    for (const x of [0.5, 5, 20]) {
      expect(law.pValue(x / (observations - 1)) / known.pValue(x)).toBeCloseTo(1, 6);
    }
    expect((law.mean * observations) / known.mean).toBeCloseTo(1, 8);
    expect((law.variance * observations * observations) / known.variance).toBeCloseTo(1, 8);
  });

  it('inverts its distribution function in both tails', () => {
    fc.assert(
      fc.property(
        weightsArbitrary,
        fc.integer({ min: 10, max: 500 }),
        fc.double({ min: -20, max: -0.7, noNaN: true }),
        (weights, observations, log) => {
          const law = eBarSquared(weights, { observations });
          const w0 = weights[0] as number;
          const upper = Math.min(log, Math.log(0.99 * (1 - w0)));
          // 1 - x has few digits where x is near 1
          const x = law.quantile(Probability.fromLogComplement(upper));
          const span = 1e-14 + (1e-15 * observations) / Math.max(1e-16, 1 - x);
          expectInverse(law, Probability.fromLogComplement(upper), span);
          expectInverse(law, Probability.fromValue(w0 + (1 - w0) * Math.exp(log)), 1e-14 / w0);
        },
      ),
    );
  });

  it('ends at 1', () => {
    const law = eBarSquared(totalOrder(3), { observations: 4 });
    expect(law.cdf(1).complement).toBe(0);
    expect(law.cdf(7).complement).toBe(0);
    expect([law.pValue(1), law.pValue(0), law.quantile(1)]).toEqual([0, 1, 1]);
    expect(law.logPdf(1)).toBe(Number.POSITIVE_INFINITY);
    expect(law.logPdf(1.5)).toBe(Number.NEGATIVE_INFINITY);
    expect(law.quantile(Probability.fromLogComplement(-500))).toBe(1);
    expect(() => eBarSquared(totalOrder(3), { observations: 3 })).toThrow(
      'eBarSquared: observations must be an integer >= 4, got 3',
    );
    expect(() => eBarSquared(totalOrder(3), {} as never)).toThrow('observations');
  });
});

describe('simulated order-restricted fits', () => {
  it('follow the stated laws within four standard errors', () => {
    const stream = randomStream(4_042_026);
    const sizes = [4, 2, 6, 3];
    const observations = 15;
    const weights = totalOrder(4, sizes);
    const order = chiBarSquared(weights);
    const against = chiBarSquared(reversedWeights(weights));
    const unknown = eBarSquared(weights, { observations });
    const trials = 20_000;
    const levels = [order.quantile(0.9), against.quantile(0.9), unknown.quantile(0.9)] as const;
    const hits = [0, 0, 0];
    for (let trial = 0; trial < trials; trial++) {
      const means = sizes.map((size) => stream.normal() / Math.sqrt(size));
      // the sum of squares within the groups
      const within = 2 * stream.gamma((observations - 4) / 2);
      const grand = means.reduce((sum, mean, i) => sum + mean * (sizes[i] as number), 0) / 15;
      const fit = isotonic(means, sizes);
      let [explained, violated, between] = [0, 0, 0];
      sizes.forEach((size, i) => {
        explained += size * ((fit[i] as number) - grand) ** 2;
        violated += size * ((means[i] as number) - (fit[i] as number)) ** 2;
        between += size * ((means[i] as number) - grand) ** 2;
      });
      const statistics = [explained, violated, explained / (between + within)];
      statistics.forEach((statistic, i) => {
        if (statistic > (levels[i] as number)) hits[i] = (hits[i] as number) + 1;
      });
    }
    for (const count of hits) {
      expect(Math.abs(count / trials - 0.1)).toBeLessThan(4 * Math.sqrt(0.09 / trials));
    }
  });
});

describe('far lower tails', () => {
  it('keep the digits of a tiny mass at 0', () => {
    for (const law of [
      chiBarSquared([1e-300, 0, 1]),
      eBarSquared([1e-300, 0, 1], { observations: 9 }),
    ]) {
      expect(law.cdf(0).value).toBe(1e-300);
      expect(law.cdf(1e-320).value).toBe(1e-300);
    }
    // 0.3 (1 - e^(-x/2)) + 0.7 P(chi^2_3 <= x)
    const value = chiBarSquared([0, 0, 0.3, 0.7]).cdf(1e-300).value;
    expect(Math.abs(value / 1.5e-301 - 1)).toBeLessThan(4e-15);
  });

  it('have quantiles to 1e-307, and 0 below', () => {
    const law = chiBarSquared([0, 0, 0.3, 0.7]);
    for (const log of [-680, -695, -705]) {
      // P(T <= x) = 0.3 x/2 here
      const quantile = law.quantile(Probability.fromLog(log));
      expect(Math.abs(Math.log(quantile * 0.15) - log)).toBeLessThan(2.3e-13);
    }
    expect(law.quantile(Probability.fromLog(-800))).toBe(0);
    expect(chiBarSquared([0, 1]).quantile(Probability.fromLog(-800))).toBe(0);
  });
});
