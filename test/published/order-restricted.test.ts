/**
 * Critical values of order-restricted tests with known variance.
 *
 * Tables of the chi-bar-squared test of equal means against a simple order and equal weights are in
 * "Order Restricted Statistical Inference", Wiley (1988), and "Constrained Statistical Inference", Wiley
 * (2005). The three-decimal values below are quoted from memory of such tables, not copied from the page;
 * for k = 3 at 1 % both 6.822 and 6.823 are remembered, and the exact value is 6.82265.
 */
import { chiBarSquared, Probability, totalOrder } from 'hullgauge';
import { expect, it } from 'vitest';

/** [k, level, critical value] */
const TABLE = [
  [2, 0.05, 2.706],
  [2, 0.01, 5.412],
  [3, 0.05, 3.82],
  [4, 0.05, 4.528],
  [5, 0.05, 5.049],
  [6, 0.05, 5.46],
  [3, 0.01, 6.823],
  [4, 0.01, 7.709],
  [5, 0.01, 8.356],
  [6, 0.01, 8.865],
] as const;

it.each(TABLE)('k = %i, level %f: %f', (k, level, value) => {
  const critical = chiBarSquared(totalOrder(k)).quantile(Probability.fromComplement(level));
  expect(Math.abs(critical - value)).toBeLessThanOrEqual(0.5e-3);
});

it('one parameter on the boundary halves the p-value', () => {
  expect(chiBarSquared([0.5, 0.5]).pValue(3.841458820694124)).toBeCloseTo(0.025, 12);
});
