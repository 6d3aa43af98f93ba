import {
  betaLaw,
  capProbability,
  facetHeight,
  gaussian,
  LogNumber,
  Probability,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { expect, test } from 'vitest';

// log P(H <= x) is n log F(x) to leading order, and F(x) = v(-x)
test('the wrong side of the law of very many heights', () => {
  const height = facetHeight({ n: 1e100, d: 9999, law: uniformBall() });
  const nearlyNone = height.cdf(-0.79898939);
  expect(nearlyNone.complement).toBe(1);
  // v(0.79898939) from capProbability
  const logF = capProbability({ d: 9999, height: 0.79898939, law: uniformBall() }).log;
  expect(nearlyNone.log / (1e100 * logF)).toBeCloseTo(1, 10);
  expect(height.cdf(0).log / (1e100 * Math.LN2)).toBeCloseTo(-1, 10);
  expect(nearlyNone.logError).toBeLessThan(1e-10 * -nearlyNone.log);
  let last = Number.NEGATIVE_INFINITY;
  for (const x of [-0.5, -0.1, 0, 0.1, 0.15, 0.2, height.mean, 0.4]) {
    const { log } = height.cdf(x);
    expect(log).toBeGreaterThanOrEqual(last * (1 + 1e-12));
    last = log;
  }
});

// on the sphere of R^3 (1 + H)/2 has the law Beta(n - 1, 2); mpmath with 60 digits
test.each([
  [-0.9, -2995732273523.415755384733],
  [-0.5, -1386294361091.160985429867],
  [-0.999999999, -21416413045739.24089477705],
])('the slope at a cut that no integral resolves, %f', (x, log) => {
  const height = facetHeight({ n: 1e12, d: 3, law: uniformSphere() });
  const p = height.cdf(x);
  expect(Math.abs(p.log - log)).toBeLessThan(0.01);
  expect(Math.abs(p.log - log)).toBeLessThan(p.logError);
});

test.each([1e300, 1.7e308])('quantiles in the far tail of %d heights', (n) => {
  const height = facetHeight({ n, d: 13, law: gaussian() });
  for (const log of [-1, -50, -1e4, -1e100]) {
    const x = height.quantile(Probability.fromLog(log));
    // neighbouring doubles are as far apart as the slope of log F^n makes them
    expect(Math.abs(height.cdf(x).log / log - 1)).toBeLessThan(1e-11);
  }
});

test('heights nearer to 1 than any double below it', () => {
  const args = { d: 7, law: betaLaw(0.6103090986962633) };
  const near = facetHeight({ ...args, n: LogNumber.fromLog(174.91194699901186) });
  for (const p of [1e-300, 0.01, 0.4445945710130036, 0.99]) {
    expect(near.quantile(p)).toBe(1);
    expect(near.cdf(1).value).toBe(1);
  }
  // all between two doubles, the upper of which is the least that reaches any level
  const between = facetHeight({
    d: 4,
    law: betaLaw(12.255399188372753),
    n: LogNumber.fromLog(526.5283845129469),
  });
  for (const p of [0.1, 0.4641078320425004, 0.9]) {
    expect(between.quantile(p)).toBe(1 - 2 ** -53);
  }
  expect(between.quantile(0.009)).toBe(1 - 2 ** -52);
  // a distance of some units in the last place
  const units = facetHeight({ ...args, n: LogNumber.fromLog(165) });
  const median = units.quantile(0.5);
  expect(median).toBeLessThan(1);
  expect(units.cdf(median).value).toBeGreaterThan(0.1);
  expect(units.cdf(1 - 2 * (1 - median)).value).toBeLessThan(0.5);
});
