/**
 * Tabulated fair binomial probabilities.
 *
 * Source: "Handbook of Mathematical Functions", National Bureau of Standards (1964), section 26.1, whose
 * tables and those of "Tables of the Binomial Probability Distribution", National Bureau of Standards,
 * Applied Mathematics Series 6 (1950) give such sums to seven decimals. The values below, from memory of
 * the common short tables for p = 1/2, are the four-decimal entries printed in most statistics texts.
 */
import { originInHull } from 'hullgauge';
import { binomialCdf } from 'hullgauge/special';
import { expect, it } from 'vitest';

/** [n, k, P(X <= k)] for a fair coin. */
const TABLE = [
  [5, 0, 0.0312],
  [5, 1, 0.1875],
  [5, 2, 0.5],
  [10, 2, 0.0547],
  [10, 3, 0.1719],
  [10, 5, 0.623],
  [10, 8, 0.9893],
  [15, 4, 0.0592],
  [15, 7, 0.5],
  [20, 5, 0.0207],
  [20, 9, 0.4119],
  [20, 13, 0.9423],
  [25, 8, 0.0539],
  [25, 12, 0.5],
  [25, 17, 0.9784],
] as const;

it.each(TABLE)('P(Bin(%i, 1/2) <= %i) = %f', (n, k, probability) => {
  // Half a unit of the fourth decimal, and the tie at 0.03125 that tables round down.
  expect(Math.abs(binomialCdf(k, n).value - probability)).toBeLessThanOrEqual(0.5001e-4);
  expect(originInHull({ n: n + 1, d: k + 1 }).complement).toBe(binomialCdf(k, n).value);
});
