/** The double functions against arbitrary precision on generated arguments, both tails. */

import process from 'node:process';
import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import {
  betaLaw,
  dichotomyCount,
  hullVolumeRatio,
  labelSeparability,
  originInHull,
  type Probability,
} from 'hullgauge';
import {
  dichotomyCountExact,
  hullVolumeRatioDecimal,
  incompleteBetaDecimal,
  originInHullDecimal,
} from 'hullgauge/precise';
import { binomialCdf, incompleteBeta } from 'hullgauge/special';
import { expect, it, vi } from 'vitest';
import { exactDecimal } from '../support/reference.ts';

/** Generated cases of each test; more with the environment variable, as `npm run fuzz` does. */
const CASES = Number(process.env['HULLGAUGE_CASES'] ?? 150);

vi.setConfig({ testTimeout: 60_000 + 1000 * CASES });

const Wide = Decimal.clone({ precision: 80, defaults: true });

/** |log computed - log exact| for the smaller tail, and what the result says of it. */
function check(p: Probability, lower: Decimal, upper: Decimal): void {
  const isLower = lower.lte(upper);
  const exact = isLower ? lower : upper;
  const log = isLower ? p.log : p.logComplement;
  const value = isLower ? p.value : p.complement;
  if (exact.isZero()) {
    expect(value).toBe(0);
    return;
  }
  const logError = exactDecimal(log).minus(new Wide(exact).ln()).abs().toNumber();
  expect(logError).toBeLessThanOrEqual(p.logError);
  if (exact.lt('1e-300')) return;
  const relative = exactDecimal(value).minus(exact).div(exact).abs().toNumber();
  // The value may be rounded once more than its logarithm tells.
  expect(relative).toBeLessThanOrEqual(p.logError + 2.3e-16);
}

it('originInHull', () => {
  const sizes = fc
    .oneof(fc.integer({ min: 2, max: 3000 }), fc.integer({ min: 3000, max: 1_000_000 }))
    .chain((n) =>
      fc.tuple(
        fc.constant(n),
        fc.oneof(
          fc.integer({ min: 1, max: n - 1 }),
          fc.double({ min: -4, max: 4, noNaN: true }).map((z) => {
            const d = Math.round(n / 2 + (z * Math.sqrt(n)) / 2);
            return Math.min(n - 1, Math.max(1, d));
          }),
        ),
      ),
    );
  fc.assert(
    fc.property(sizes, ([n, d]) => {
      const inside = originInHullDecimal({ n, d, digits: 40 });
      check(originInHull({ n, d }), inside, originInHullDecimal({ n, d: n - d, digits: 40 }));
    }),
    { numRuns: CASES },
  );
});

it('labelSeparability and dichotomyCount', () => {
  const sizes = fc.tuple(
    fc.integer({ min: 1, max: 3000 }),
    fc.double({ min: -4, max: 4, noNaN: true }),
    fc.boolean(),
  );
  fc.assert(
    fc.property(sizes, ([n, z, intercept]) => {
      const middle = Math.round(n / 2 + (z * Math.sqrt(n)) / 2);
      const d = Math.min(n, Math.max(1, middle)) - (intercept ? 1 : 0);
      const count = dichotomyCountExact({ n, d, intercept });
      const all = 2n ** BigInt(n);
      const share = (part: bigint): Decimal => new Wide(`${part}`).div(new Wide(`${all}`));
      check(labelSeparability({ n, d, intercept }), share(count), share(all - count));
      const { log, logError } = dichotomyCount({ n, d, intercept });
      const error = exactDecimal(log)
        .minus(new Wide(`${count}`).ln())
        .abs()
        .toNumber();
      expect(error).toBeLessThanOrEqual(logError);
    }),
    { numRuns: CASES },
  );
});

/** Numbers spread evenly on the logarithmic scale. */
const logUniform = (min: number, max: number): fc.Arbitrary<number> =>
  fc
    .double({ min: Math.log(min), max: Math.log(max), noNaN: true })
    .map((t) => Math.min(max, Math.max(min, Math.exp(t))));

it('incompleteBeta', () => {
  const args = fc
    .tuple(
      logUniform(1e-3, 1e5),
      logUniform(1e-3, 1e5),
      fc.double({ min: -6, max: 6, noNaN: true }),
    )
    .map(([a, b, z]): [number, number, number] => {
      const mean = a / (a + b);
      const spread = Math.sqrt((mean * (1 - mean)) / (a + b + 1));
      return [a, b, Math.min(1 - 2 ** -30, Math.max(2 ** -40, mean + z * spread))];
    });
  fc.assert(
    fc.property(args, ([a, b, x]) => {
      const rest = new Wide(1).minus(exactDecimal(x));
      const lower = incompleteBetaDecimal(a, b, x, 40);
      // The default y = 1 - x is exact here or rounded; the exact complement of x tells which.
      const y = 1 - x;
      fc.pre(exactDecimal(y).eq(rest));
      check(incompleteBeta(a, b, x), lower, incompleteBetaDecimal(b, a, rest, 40));
    }),
    { numRuns: CASES },
  );
});

it('binomialCdf', () => {
  const args = fc
    .tuple(
      fc.integer({ min: 1, max: 100_000 }),
      fc.integer({ min: 1, max: 1023 }),
      fc.double({ min: -8, max: 8, noNaN: true }),
    )
    .map(([n, share, z]): [number, number, number] => {
      const p = share / 1024;
      const k = Math.round(n * p + z * Math.sqrt(n * p * (1 - p)));
      return [Math.min(n - 1, Math.max(0, k)), n, p];
    });
  fc.assert(
    fc.property(args, ([k, n, p]) => {
      // P(X <= k) = I_{1-p}(n - k, k + 1)
      const lower = incompleteBetaDecimal(n - k, k + 1, 1 - p, 40);
      check(binomialCdf(k, n, p), lower, incompleteBetaDecimal(k + 1, n - k, p, 40));
    }),
    {
      numRuns: CASES,
      // Here the convergents of the fraction cancel.
      examples: [[[41_959, 42_041, 0.998046875]]],
    },
  );
});

it('hullVolumeRatio', () => {
  const args = fc
    .tuple(
      fc.integer({ min: 1, max: 30 }),
      fc.constantFrom(-1, -0.5, 0, 0.25, 1, 4.5, 60),
      logUniform(1, 1e5),
    )
    .map(([d, b, extra]) => ({ n: d + Math.round(extra), d, b }));
  fc.assert(
    fc.property(args, ({ n, d, b }) => {
      // Enough digits for a complement as small as n^-5.
      const lower = new Wide(hullVolumeRatioDecimal({ n, d, b, digits: 70 }));
      const p = hullVolumeRatio({ n, d, law: betaLaw(b) });
      check(p, lower, d === 1 && b === -1 ? new Wide(2).pow(1 - n) : new Wide(1).minus(lower));
    }),
    { numRuns: Math.ceil(CASES / 3) },
  );
});
