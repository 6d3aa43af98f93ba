import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  logAddExp,
  logBinomial,
  logFactorial,
  logGamma,
  logStirling1,
  logStirling1Row,
  logStirlingB,
  logStirlingBRow,
  logSumExp,
} from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { logCoefficientByContour } from '../../src/special/stirling-contour.ts';
import { stirlingRow } from '../../src/special/stirling-row.ts';
import { logSymmetricFunction } from '../../src/special/stirling-symmetric.ts';
import { relativeError } from '../support/reference.ts';

const relative = (a: number, b: number): number => Math.abs(a - b) / Math.abs(b);

/** Exact coefficients of prod (t + root(j)), j = 1 .. n. */
function exactRow(n: number, root: (j: number) => number): readonly bigint[] {
  let row = [1n];
  for (let j = 1; j <= n; j++) {
    const r = BigInt(root(j));
    row = Array.from(
      { length: j + 1 },
      (_, k) => (row[k] ?? 0n) * r + (k > 0 ? (row[k - 1] as bigint) : 0n),
    );
  }
  return row;
}

const kinds = [
  { name: 'first kind', single: logStirling1, row: logStirling1Row, root: (j: number) => j - 1 },
  { name: 'type B', single: logStirlingB, row: logStirlingBRow, root: (j: number) => 2 * j - 1 },
] as const;

describe.each(kinds)('Stirling numbers, $name', ({ name, single, row, root }) => {
  it('has exact rows up to n = 60', () => {
    for (let n = 0; n <= 60; n++) {
      const exact = exactRow(n, root);
      const logs = row(n);
      expect(logs.length).toBe(n + 1);
      exact.forEach((number, k) => {
        if (number === 0n) {
          expect(logs[k]).toBe(Number.NEGATIVE_INFINITY);
          expect(single(n, k)).toBe(Number.NEGATIVE_INFINITY);
          return;
        }
        const text = number.toString();
        // the logarithm of an integer of many digits, to the rounding of its leading 17
        const log = Math.log(Number(`0.${text.slice(0, 25)}`)) + text.length * Math.LN10;
        expect(Math.abs((logs[k] as number) - log)).toBeLessThan(4e-16 * (1 + text.length * 2.3));
        expect(single(n, k)).toBe(logs[k]);
      });
    }
  });

  it('recovers small numbers exactly by rounding', () => {
    for (let n = 0; n <= 11; n++) {
      const exact = exactRow(n, root).map(Number);
      const rounded = Array.from(row(n), (log) => Math.round(Math.exp(log)));
      expect(rounded).toEqual(exact);
    }
  });

  it('adds up to the product at t = 1', () => {
    for (const n of [1, 10, 100, 700, 2000]) {
      const total = logFactorial(n) + (name === 'type B' ? n * Math.LN2 : 0);
      expect(relative(logSumExp(row(n)), total + 0) || 0).toBeLessThan(1e-15);
    }
  });

  it('gives single values that agree with rows, from all three methods', () => {
    for (const n of [61, 62, 100, 101, 333, 1000, 2000, 5000]) {
      const logs = row(n);
      for (let k = name === 'type B' ? 0 : 1; k < n; k += n < 5000 ? 1 : 7) {
        expect(relative(single(n, k), logs[k] as number)).toBeLessThan(1e-15);
      }
      expect(single(n, n)).toBe(0);
    }
  });

  it('satisfies its recurrence far beyond rows', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(5000), max: Math.log(4e15), noNaN: true }),
        fc.double({ min: 1e-9, max: 1, noNaN: true }),
        fc.boolean(),
        (logN, share, nearEnd) => {
          const n = Math.floor(Math.exp(logN));
          const distance = Math.max(1, Math.floor(share ** 3 * (n - 2)));
          const k = nearEnd ? n - distance : distance;
          const left = single(n + 1, k);
          const right = logAddExp(single(n, k - 1), Math.log(root(n + 1)) + single(n, k));
          expect(relative(left, right)).toBeLessThan(2e-15);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('joins its methods without a jump', () => {
    // the symmetric function and the contour, well inside both regions
    const c = name === 'type B' ? 0.5 : 1;
    for (const n of [400, 5000, 123456, 1e9, 1e15]) {
      for (const m of [1, 2, 3, 5, 7, 20, 40]) {
        if (8 * m * m >= n) continue;
        const a = logSymmetricFunction(n, m, c);
        expect(relative(logCoefficientByContour(n, n - m, c), a)).toBeLessThan(1e-15);
      }
    }
    // both sides of m = 40 and of 8 m^2 = n: ratios of neighbours fall evenly (log-concavity)
    const n = 20000;
    for (let k = n - 45; k < n - 35; k++) {
      const before = single(n, k) - single(n, k - 1);
      const after = single(n, k + 1) - single(n, k);
      expect(after).toBeLessThan(before);
    }
  });

  it('is right by the contour for every k from n = 34 on, where its gamma functions begin', () => {
    const c = name === 'type B' ? 0.5 : 1;
    for (let n = 34; n <= 130; n++) {
      // coefficients of prod_{i < n} (s + c + i) from rows of either kind
      const logs = name === 'type B' ? row(n) : row(n + 1);
      for (let k = 1; k < n; k++) {
        const exact =
          name === 'type B' ? (logs[k] as number) - (n - k) * Math.LN2 : (logs[k + 1] as number);
        const size = name === 'type B' ? (logs[k] as number) : exact;
        expect(Math.abs(logCoefficientByContour(n, k, c) - exact) / size).toBeLessThan(1e-15);
      }
    }
  });

  it('refuses what is not 0 <= k <= n', () => {
    const names =
      name === 'type B' ? ['logStirlingB', 'logStirlingBRow'] : ['logStirling1', 'logStirling1Row'];
    for (const bad of [
      -1,
      1.5,
      Number.NaN,
      Number.POSITIVE_INFINITY,
      2 ** 53,
      '3',
      undefined,
      null,
    ]) {
      expect(() => single(bad as number, 0)).toThrow(DomainError);
      expect(() => single(10, bad as number)).toThrow(DomainError);
      expect(() => row(bad as number)).toThrow(DomainError);
    }
    expect(() => single(5, 6)).toThrow(
      `${names[0]}: k must be an integer from 0 to n (n is 5), got 6`,
    );
    expect(() => row(5001)).toThrow(`${names[1]}: n must be an integer from 0 to 5000, got 5001`);
    expect(row(5000).length).toBe(5001);
  });
});

describe('logStirling1', () => {
  it('has the values of permutations with very many or very few cycles, up to 2^53 - 1', () => {
    for (const n of [61, 1000, 123456789, 2 ** 53 - 1]) {
      expect(logStirling1(n, n)).toBe(0);
      // a transposition
      expect(relative(logStirling1(n, n - 1), logBinomial(n, 2))).toBeLessThan(1e-15);
      // 3-cycles and pairs of transpositions: binom(n, 3) (3 n - 1)/4
      const two = logBinomial(n, 3) + Math.log((3 * n - 1) / 4);
      expect(relative(logStirling1(n, n - 2), two)).toBeLessThan(1e-15);
      // one cycle
      expect(relative(logStirling1(n, 1), logGamma(n))).toBeLessThan(1e-15);
      expect(logStirling1(n, 0)).toBe(Number.NEGATIVE_INFINITY);
    }
    // two cycles: (n - 1)! H_(n-1)
    let harmonic = 0;
    for (let j = 999; j >= 1; j--) harmonic += 1 / j;
    expect(relative(logStirling1(1000, 2), logGamma(1000) + Math.log(harmonic))).toBeLessThan(
      1e-15,
    );
    expect(logStirling1(0, 0)).toBe(0);
    expect(logStirling1(1, 0)).toBe(Number.NEGATIVE_INFINITY);
  });
});

describe('logStirlingB', () => {
  it('has the odd double factorials at k = 0 and sums of odd numbers next to the diagonal', () => {
    let product = 1n;
    for (let j = 1n; j <= 40n; j++) product *= 2n * j - 1n;
    expect(relative(logStirlingB(40, 0), Math.log(Number(product)))).toBeLessThan(1e-15);
    for (const n of [61, 1000, 94906265]) {
      expect(relative(logStirlingB(n, n - 1), 2 * Math.log(n))).toBeLessThan(1e-15);
    }
    // (2n)! / (2^n n!)
    const n = 5000;
    const exact = logFactorial(2 * n) - logFactorial(n) - n * Math.LN2;
    expect(relative(logStirlingB(n, 0), exact)).toBeLessThan(2e-15);
    expect(logStirlingB(0, 0)).toBe(0);
  });
});

describe('stirlingRow', () => {
  it('keeps each entry as a double times a power of 2^512', () => {
    const n = 400;
    const mantissa = new Float64Array(n + 1);
    const exponent = new Int32Array(n + 1);
    stirlingRow(n, 0, 1, mantissa, exponent);
    const exact = exactRow(n, (j) => j - 1);
    expect(Math.max(...exponent)).toBeGreaterThan(3);
    for (let k = 1; k <= n; k++) {
      // compare the leading digits: shift the exact integer to 2^200
      const scaledExact = (exact[k] as bigint) * 2n ** 400n;
      const shift = 512 * (exponent[k] as number);
      const ratio = Number((scaledExact >> BigInt(shift)).toString()) / 2 ** 400;
      expect(Number.isFinite(ratio)).toBe(true);
      expect(relativeError(mantissa[k] as number, ratio.toString())).toBeLessThan(6e-14);
    }
  });
});
