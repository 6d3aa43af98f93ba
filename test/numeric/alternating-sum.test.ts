import { describe, expect, it } from 'vitest';
import { alternatingSum } from '../../src/numeric/alternating-sum.ts';
import { logOutwardSum } from '../../src/numeric/parity-split.ts';

/** The sum of terms known to rounding, with its error bound. */
function sumOf(term: (index: number) => number): readonly [number, number] {
  const error = new Float64Array(1);
  const sum = alternatingSum((i) => {
    error[0] = 2 ** -52;
    return term(i);
  }, error);
  return [sum, error[0] as number];
}

const sign = (i: number): number => (i % 2 === 0 ? 1 : -1);

/** i! / 20^i without overflow. */
function scaledFactorial(i: number): number {
  let product = 1;
  for (let j = 1; j <= i; j++) product *= j / 20;
  return product;
}

describe('alternatingSum', () => {
  it.each([
    ['log 2', (i: number) => sign(i) / (i + 1), Math.LN2, 1e-13],
    ['pi / 4', (i: number) => sign(i) / (2 * i + 1), Math.PI / 4, 1e-13],
    // 20 e^20 E_1(20), whose asymptotic series has a least term of 5e-9; mpmath
    ['a divergent series', (i: number) => sign(i) * scaledFactorial(i), 0.95437090991921683, 1e-12],
    // falls faster than any power; mpmath
    ['a theta series', (i: number) => sign(i) * Math.exp(-0.3 * i * i), 0.50086713230738451, 1e-15],
    ['a finite sum', (i: number) => (i < 3 ? sign(i) * (3 - i) : 0), 2, 1e-14],
  ] as const)('finds %s within its error', (_, term, exact, useful) => {
    const [sum, error] = sumOf(term);
    expect(Math.abs(sum - exact)).toBeLessThanOrEqual(error + 1e-15);
    expect(error).toBeLessThan(useful);
  });
});

describe('logOutwardSum', () => {
  it('takes few terms of a long smooth sum', () => {
    let calls = 0;
    const error = new Float64Array(1);
    const log = logOutwardSum(
      (m, bound) => {
        calls++;
        bound[0] = 1e-15;
        return -0.5 * (m / 3000) ** 2;
      },
      0,
      2,
      1e6,
      error,
    );
    // half of the integral of the Gaussian and, by Euler and Maclaurin, half of the first term
    const exact = Math.log(0.25 * 3000 * Math.sqrt(2 * Math.PI) + 0.5);
    expect(Math.abs(log - exact)).toBeLessThanOrEqual(error[0] as number);
    expect(error[0]).toBeLessThan(3e-12);
    expect(calls).toBeLessThan(400);
  });

  it('takes every term of a rough one', () => {
    const error = new Float64Array(1);
    const log = logOutwardSum(
      (m, bound) => {
        bound[0] = 0;
        return m % 7 === 0 ? -0.001 * m - 1 : -0.001 * m;
      },
      0,
      1,
      1000,
      error,
    );
    let sum = 0;
    for (let m = 0; m <= 1000; m++) sum += Math.exp(m % 7 === 0 ? -0.001 * m - 1 : -0.001 * m);
    expect(Math.abs(log - Math.log(sum))).toBeLessThan(1e-13);
  });
});
