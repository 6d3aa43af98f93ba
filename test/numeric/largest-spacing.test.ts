import { expect, test } from 'vitest';
import { largestSpacingTail } from '../../src/numeric/largest-spacing.ts';

const share = (2 * Math.asin(Math.sqrt(0.0005))) / Math.PI;

// the alternating sum with 60 to 200 digits
test.each([
  [5, 0.203, 4 * Math.log(0.015)],
  [3, 0.5, Math.log(0.25)],
  [9, 0.2, -3.2192598986150799365],
  [12, 0.1, -17.709693645264085517],
  [40, 0.03, -62.84063618618018694],
])('log P(no spacing of %d longer than %f)', (n, a, log) => {
  const out = new Float64Array(2);
  expect(largestSpacingTail(n, a, out)).toBe(true);
  expect(Math.abs((out[0] as number) - log)).toBeLessThanOrEqual(1e-12);
});

test.each([
  [10_000, 0.0009765625, -0.8293209553463960531616814],
  [10_000, 0.0107421875, -98.78187283437018434535154],
  [100_000, 0.125, -13341.49280559466756359113],
  [Number.MAX_SAFE_INTEGER, share, -129151957277221.6716469688],
])('log P(a spacing of %d longer than %f)', (n, a, log) => {
  const out = new Float64Array(2);
  expect(largestSpacingTail(n, a, out)).toBe(false);
  expect(Math.abs((out[0] as number) - log)).toBeLessThanOrEqual(1e-14 * Math.abs(log));
  expect(Math.abs((out[0] as number) - log)).toBeLessThanOrEqual(out[1] as number);
});
