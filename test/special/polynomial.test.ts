import fc from 'fast-check';
import { expect, it } from 'vitest';
import { dividedDifference, evaluatePolynomial } from '../../src/special/polynomial.ts';

const unit = fc.double({ min: -1, max: 1, noNaN: true });
const coefficients = fc.array(unit, { minLength: 1, maxLength: 12 });

it('evaluates polynomials of even and odd degree', () => {
  expect(evaluatePolynomial([3], 7)).toBe(3);
  expect(evaluatePolynomial([3, 2], 7)).toBe(17);
  expect(evaluatePolynomial([3, 2, 1], 7)).toBe(66);
  expect(evaluatePolynomial([3, 2, 1, 4], 7)).toBe(1438);
  fc.assert(
    fc.property(coefficients, unit, (c, t) => {
      const plain = c.reduce((sum, value, i) => sum + value * t ** i, 0);
      expect(Math.abs(evaluatePolynomial(c, t) - plain)).toBeLessThan(1e-14);
    }),
  );
});

it('gives divided differences, and the derivative where both points coincide', () => {
  expect(dividedDifference([5], 2, 3)).toBe(0);
  // (t^3 - u^3)/(t - u) = t^2 + t u + u^2
  expect(dividedDifference([9, 0, 0, 1], 2, 3)).toBe(19);
  expect(dividedDifference([9, 0, 0, 1], 2, 2)).toBe(12);
  fc.assert(
    fc.property(coefficients, unit, unit, (c, t, u) => {
      const rise = evaluatePolynomial(c, t) - evaluatePolynomial(c, u);
      expect(Math.abs(dividedDifference(c, t, u) * (t - u) - rise)).toBeLessThan(1e-13);
    }),
  );
});
