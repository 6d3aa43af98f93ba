import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { expm1mx, log1mExp, log1pmx, logAddExp, logSubExp, logSumExp } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { logOfComplement } from '../../src/probability.ts';
import { expm1mxKernel, log1mExpKernel, log1pmxKernel } from '../../src/special/log-domain.ts';
import { jumpAt, largestDrop } from './threshold.ts';

const INFINITY = Number.POSITIVE_INFINITY;
const logs = fc.double({ min: -800, max: 800, noNaN: true });

describe('log1mExp', () => {
  it('is the complement on the log scale and its own inverse', () => {
    fc.assert(
      fc.property(fc.double({ min: -30, max: -1e-12, noNaN: true }), (x) => {
        const error = Math.abs(log1mExp(log1mExp(x)) - x);
        // x = log p is determined by log(1 - p) up to p/(1 - p) times its rounding
        expect(error).toBeLessThan(4e-16 * (Math.abs(x) + Math.exp(-x) * Math.abs(log1mExp(x))));
      }),
    );
  });

  it('is one mechanism with the complement of a Probability', () => {
    expect(log1mExpKernel).toBe(logOfComplement);
  });

  it('joins at -log 2 and meets both ends', () => {
    expect(jumpAt(log1mExp, -Math.LN2)).toBeLessThanOrEqual(3);
    expect(log1mExp(0)).toBe(-INFINITY);
    expect(log1mExp(-0)).toBe(-INFINITY);
    expect(log1mExp(-INFINITY)).toBe(0);
    expect(log1mExp(-5e-324)).toBe(Math.log(5e-324));
    expect(log1mExp(-746)).toBe(0);
    expect(largestDrop((x) => log1mExp(-x), 1e-3, 5)).toBe(0);
  });

  it('refuses positive numbers', () => {
    for (const bad of [1e-300, NaN, '0', undefined]) {
      expect(() => log1mExp(bad as number)).toThrow(DomainError);
    }
    expect(() => log1mExp(1)).toThrow('log1mExp: x must be a number <= 0, got 1');
  });
});

describe('logAddExp and logSubExp', () => {
  it('undo one another', () => {
    fc.assert(
      fc.property(logs, logs, (a, b) => {
        const sum = logAddExp(a, b);
        expect(logAddExp(b, a)).toBe(sum);
        const larger = Math.max(a, b);
        fc.pre(sum > Math.min(a, b));
        // what is left of the larger number is known up to the rounding of the sum
        const scale = Math.max(1, Math.abs(sum), Math.abs(larger));
        expect(Math.abs(logSubExp(sum, Math.min(a, b)) - larger)).toBeLessThan(
          4e-16 * scale * (1 + Math.exp(Math.min(a, b) - larger)) + 4e-16 * scale,
        );
      }),
    );
  });

  it('meet their limits at 0 and infinity', () => {
    expect(logAddExp(-INFINITY, -INFINITY)).toBe(-INFINITY);
    expect(logAddExp(-INFINITY, 2)).toBe(2);
    expect(logAddExp(INFINITY, INFINITY)).toBe(INFINITY);
    expect(logAddExp(INFINITY, -INFINITY)).toBe(INFINITY);
    expect(logAddExp(1e308, -1e308)).toBe(1e308);
    expect(logAddExp(0, 0)).toBe(Math.LN2);
    expect(logSubExp(-INFINITY, -INFINITY)).toBe(-INFINITY);
    expect(logSubExp(5, 5)).toBe(-INFINITY);
    expect(logSubExp(2, -INFINITY)).toBe(2);
    expect(logSubExp(INFINITY, 2)).toBe(INFINITY);
    expect(logSubExp(1e308, -1e308)).toBe(1e308);
    expect(logSubExp(1 + 2 ** -52, 1)).toBeCloseTo(1 + Math.log(2 ** -52), 12);
  });

  it('refuse NaN, strings and a negative difference', () => {
    expect(() => logAddExp(NaN, 0)).toThrow('logAddExp: a must be a number, got NaN');
    expect(() => logAddExp(0, '1' as unknown as number)).toThrow(DomainError);
    expect(() => logSubExp(0, NaN)).toThrow(DomainError);
    expect(() => logSubExp(1, 2)).toThrow('logSubExp: b must be at most a (a is 1), got 2');
    expect(() => logSubExp(INFINITY, INFINITY)).toThrow(DomainError);
  });
});

describe('logSumExp', () => {
  it('agrees with repeated addition', () => {
    fc.assert(
      fc.property(fc.array(logs, { minLength: 1, maxLength: 40 }), (values) => {
        const chain = values.reduce((sum, v) => logAddExp(sum, v), -INFINITY);
        const scale = Math.max(1, ...values.map(Math.abs));
        expect(Math.abs(logSumExp(values) - chain)).toBeLessThan(8e-15 * scale);
        expect(logSumExp(values)).toBeGreaterThanOrEqual(Math.max(...values));
      }),
    );
  });

  it('adds up a million equal terms without drift', () => {
    const values = new Float64Array(1e6).fill(-3.7);
    expect(Math.abs(logSumExp(values) - (Math.log(1e6) - 3.7))).toBeLessThan(3e-15);
  });

  it('meets its limits', () => {
    expect(logSumExp([])).toBe(-INFINITY);
    expect(logSumExp([-INFINITY, -INFINITY])).toBe(-INFINITY);
    expect(logSumExp([-INFINITY, 1.5])).toBe(1.5);
    expect(logSumExp([INFINITY, 1, INFINITY])).toBe(INFINITY);
    expect(logSumExp([0])).toBe(0);
    expect(logSumExp([-0])).toBe(0);
  });

  it('refuses what is no array of numbers', () => {
    expect(() => logSumExp([0, NaN])).toThrow('logSumExp: values[1] must be a number, got NaN');
    expect(() => logSumExp([0, '1'] as unknown as number[])).toThrow(DomainError);
    for (const bad of [undefined, null, 3, {}, 'abc']) {
      expect(() => logSumExp(bad as unknown as number[])).toThrow(DomainError);
    }
  });
});

describe('log1pmx and expm1mx', () => {
  it('are inverse in the sense that e^log(1 + x) = 1 + x', () => {
    fc.assert(
      fc.property(fc.double({ min: -0.9, max: 3, noNaN: true }), (x) => {
        fc.pre(x === 0 || Math.abs(x) > 1e-140);
        // with t = log(1 + x): expm1mx(t) = x - t = -log1pmx(x)
        const t = Math.log1p(x);
        const rounding = 3e-16 * Math.abs(t * x);
        expect(Math.abs(expm1mx(t) + log1pmx(x))).toBeLessThanOrEqual(
          9e-16 * Math.abs(log1pmx(x)) + rounding,
        );
      }),
    );
  });

  it('join where the method changes', () => {
    expect(jumpAt(log1pmxKernel, -0.5)).toBeLessThanOrEqual(6);
    expect(jumpAt(log1pmxKernel, 1)).toBeLessThanOrEqual(6);
    expect(jumpAt(expm1mxKernel, -1)).toBeLessThanOrEqual(6);
    expect(jumpAt(expm1mxKernel, 1)).toBeLessThanOrEqual(6);
    expect(largestDrop(log1pmx, -0.9, 0)).toBeLessThan(4e-16);
    expect(largestDrop(expm1mx, 0, 3)).toBeLessThan(4e-16);
  });

  it('meet their limits', () => {
    expect(log1pmx(0)).toBe(0);
    expect(log1pmx(-0)).toBe(0);
    expect(log1pmx(INFINITY)).toBe(-INFINITY);
    expect(log1pmx(neighbourOfMinusOne)).toBeCloseTo(Math.log(2 ** -53) + 1, 12);
    expect(log1pmx(1e-200)).toBe(0);
    expect(log1pmx(1e300)).toBe(-1e300);
    expect(expm1mx(0)).toBe(0);
    expect(expm1mx(-0)).toBe(0);
    expect(expm1mx(INFINITY)).toBe(INFINITY);
    expect(expm1mx(-INFINITY)).toBe(INFINITY);
    expect(expm1mx(1000)).toBe(INFINITY);
    expect(expm1mx(-1e300)).toBe(1e300);
  });

  it('refuse arguments out of their domain', () => {
    expect(() => log1pmx(-1)).toThrow('log1pmx: x must be a number > -1, got -1');
    expect(() => log1pmx(NaN)).toThrow(DomainError);
    expect(() => expm1mx(NaN)).toThrow('expm1mx: x must be a number, got NaN');
  });
});

const neighbourOfMinusOne = -1 + 2 ** -53;
