import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { DomainError, type Probability } from 'hullgauge';
import { binomialCdf, incompleteBeta, logBinomialPmf } from 'hullgauge/special';
import jstat from 'jstat';
import { describe, expect, it } from 'vitest';
import { exactDecimal } from '../support/reference.ts';

const Ruler = Decimal.clone({ precision: 60, defaults: true });
const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });
const relative = (x: number, y: number): number => Math.abs(x / y - 1);

/** P[X <= k], P[X > k] and P[X = k] for every k, from the exact value of p. */
function exactLaw(n: number, p: number): { below: Decimal[]; above: Decimal[]; at: Decimal[] } {
  const exactP = new Ruler(exactDecimal(p));
  const exactQ = new Ruler(1).minus(exactP);
  let term = exactQ.pow(n);
  const at: Decimal[] = [];
  for (let k = 0; k <= n; k++) {
    at.push(term);
    term = term
      .times(n - k)
      .div(k + 1)
      .times(exactP)
      .div(exactQ);
  }
  const below: Decimal[] = [];
  const above: Decimal[] = [];
  let sum = new Ruler(0);
  for (let k = 0; k <= n; k++) {
    sum = sum.plus(at[k] as Decimal);
    below.push(sum);
  }
  sum = new Ruler(0);
  for (let k = n; k >= 0; k--) {
    above.unshift(sum);
    sum = sum.plus(at[k] as Decimal);
  }
  return { below, above, at };
}

const error = (computed: number, exact: Decimal): number =>
  exactDecimal(computed).div(exact).minus(1).abs().toNumber();

describe('binomialCdf', () => {
  it('agrees with exact sums in both tails, and so does its error bound', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 150 }),
        fc.oneof(between(1e-6, 0.999999), between(-50, -1).map(Math.exp)),
        (n, p) => {
          const { below, above } = exactLaw(n, p);
          for (let k = 0; k < n; k += 1 + Math.floor(n / 20)) {
            const computed = binomialCdf(k, n, p);
            const [b, a] = [below[k] as Decimal, above[k] as Decimal];
            if (b.gt(1e-300)) expect(error(computed.value, b)).toBeLessThan(1.2e-15);
            if (a.gt(1e-300)) expect(error(computed.complement, a)).toBeLessThan(1.2e-15);
            const [log, exact] = b.lt(a)
              ? [computed.log, b.ln()]
              : [computed.logComplement, a.ln()];
            const absolute = exactDecimal(log).minus(exact).abs().toNumber();
            expect(absolute).toBeLessThanOrEqual(computed.logError);
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('reproduces the five places of printed tables', () => {
    const rows: readonly [number, number, number, number][] = [
      [10, 3, 0.2, 0.87913],
      [10, 5, 0.5, 0.62305],
      [20, 4, 0.1, 0.95683],
      [20, 10, 0.4, 0.87248],
      [25, 6, 0.25, 0.5611],
      [50, 20, 0.5, 0.10132],
    ];
    for (const [n, k, p, expected] of rows) {
      expect(Math.abs(binomialCdf(k, n, p).value - expected)).toBeLessThan(5.1e-6);
    }
  });

  it('satisfies P_n(k) = q P_(n-1)(k) + p P_(n-1)(k - 1) for large n', () => {
    fc.assert(
      fc.property(
        between(Math.log(100), Math.log(1e12)),
        fc.constantFrom(0.25, 0.3, 0.875, 2 ** -10),
        between(-20, 20),
        (logN, p, z) => {
          const n = Math.floor(Math.exp(logN));
          const q = 1 - p;
          const k = Math.floor(n * p + z * Math.sqrt(n * p * q));
          fc.pre(k >= 1 && k < n - 1);
          const [whole, first, second] = [
            binomialCdf(k, n, p),
            binomialCdf(k, n - 1, p),
            binomialCdf(k - 1, n - 1, p),
          ];
          for (const pick of [(t: Probability) => t.value, (t: Probability) => t.complement]) {
            const sum = q * pick(first) + p * pick(second);
            if (pick(whole) > 1e-290) expect(relative(sum, pick(whole))).toBeLessThan(4e-15);
          }
        },
      ),
      { numRuns: 800 },
    );
  });

  it('is the incomplete beta function', () => {
    for (const [n, k, p] of [
      [10, 3, 0.2],
      [1e6, 3e5, 0.3],
      [1e15, 1, 1e-15],
    ] as const) {
      const cdf = binomialCdf(k, n, p);
      const beta = incompleteBeta(k + 1, n - k, p);
      expect([cdf.value, cdf.complement]).toEqual([beta.complement, beta.value]);
    }
  });

  it('takes a q that is known more exactly than 1 - p', () => {
    // P[X > n - 1] = p^n, p = 1 - 1e-20, n = 1e15: e^-1e-5
    const all = binomialCdf(1e15 - 1, 1e15, 1, 1e-20);
    expect(relative(all.value, -Math.expm1(-1e-5))).toBeLessThan(1e-15);
    expect(relative(binomialCdf(0, 10, 1, 1e-20).log, 10 * Math.log(1e-20))).toBeLessThan(1e-15);
    expect(relative(binomialCdf(9, 10, 1e-20).logComplement, 10 * Math.log(1e-20))).toBeLessThan(
      1e-15,
    );
  });

  it('does not lose n p to rounding', () => {
    // at n = 1e15 an n p rounded to a multiple of 1/8 moves the probability by 1e-9
    const n = 1e15;
    const p = 0.3;
    const k = 3e14;
    const ratio = binomialCdf(k, n, p).value - binomialCdf(k - 1, n, p).value;
    expect(relative(ratio, Math.exp(logBinomialPmf(k, n, p)))).toBeLessThan(1e-7);
  });

  it('returns exact limits', () => {
    const zero = [0, 1, Number.NEGATIVE_INFINITY, 0, 0];
    const one = [1, 0, 0, Number.NEGATIVE_INFINITY, 0];
    const fields = (t: Probability): number[] => [
      t.value,
      t.complement,
      t.log,
      t.logComplement,
      t.logError,
    ];
    expect(fields(binomialCdf(-1, 5, 0.3))).toEqual(zero);
    expect(fields(binomialCdf(-1e300, 5, 0.3))).toEqual(zero);
    expect(fields(binomialCdf(5, 5, 0.3))).toEqual(one);
    expect(fields(binomialCdf(1e300, 5, 0.3))).toEqual(one);
    expect(fields(binomialCdf(0, 0))).toEqual(one);
    expect(fields(binomialCdf(-1, 0))).toEqual(zero);
    expect(fields(binomialCdf(0, 5, 0))).toEqual(one);
    expect(fields(binomialCdf(4, 5, 0))).toEqual(one);
    expect(fields(binomialCdf(-1, 5, 0))).toEqual(zero);
    expect(fields(binomialCdf(4, 5, 1))).toEqual(zero);
    expect(fields(binomialCdf(5, 5, 1))).toEqual(one);
    expect(binomialCdf(-0, 3).value).toBe(0.125);
  });

  it('agrees with a general package where that is right', () => {
    for (const n of [10, 100, 1000, 1e5]) {
      for (const p of [0.1, 0.5, 0.7]) {
        for (const z of [-1.5, -0.5, 0.3, 2]) {
          const k = Math.floor(n * p + z * Math.sqrt(n * p * (1 - p)));
          const difference = Math.abs(binomialCdf(k, n, p).value - jstat.binomial.cdf(k, n, p));
          expect(difference).toBeLessThan(5e-10);
        }
      }
    }
  });
});

describe('logBinomialPmf', () => {
  it('agrees with exact probabilities', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 150 }),
        fc.oneof(between(1e-6, 0.999999), between(-50, -1).map(Math.exp)),
        (n, p) => {
          const { at } = exactLaw(n, p);
          for (let k = 0; k <= n; k += 1 + Math.floor(n / 20)) {
            const exact = (at[k] as Decimal).ln();
            const absolute = exactDecimal(logBinomialPmf(k, n, p))
              .minus(exact)
              .abs()
              .toNumber();
            expect(absolute).toBeLessThan(6e-16 * Math.max(1, Math.abs(exact.toNumber())));
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  it('sums to one', () => {
    for (const [n, p] of [
      [1, 0.3],
      [10, 0.5],
      [2000, 0.01],
      [5000, 0.77],
    ] as const) {
      let sum = 0;
      for (let k = 0; k <= n; k++) sum += Math.exp(logBinomialPmf(k, n, p));
      expect(Math.abs(sum - 1)).toBeLessThan(2e-14);
    }
  });

  it('is the step of the distribution function', () => {
    fc.assert(
      fc.property(
        between(Math.log(10), Math.log(1e6)),
        between(0.01, 0.99),
        between(-9, -1),
        (logN, p, z) => {
          const n = Math.floor(Math.exp(logN));
          const k = Math.floor(n * p + z * Math.sqrt(n * p * (1 - p)));
          fc.pre(k >= 1);
          const here = binomialCdf(k, n, p).value;
          const step = here - binomialCdf(k - 1, n, p).value;
          const pmf = Math.exp(logBinomialPmf(k, n, p));
          expect(Math.abs(step - pmf)).toBeLessThan(4e-15 * here + 4e-15 * pmf * (1 + z * z));
        },
      ),
      { numRuns: 500 },
    );
  });

  it('returns minus infinity for what cannot happen, and 0 for what must', () => {
    const impossible = Number.NEGATIVE_INFINITY;
    expect(logBinomialPmf(-1, 5, 0.3)).toBe(impossible);
    expect(logBinomialPmf(6, 5, 0.3)).toBe(impossible);
    expect(logBinomialPmf(1, 5, 0)).toBe(impossible);
    expect(logBinomialPmf(4, 5, 1)).toBe(impossible);
    expect(logBinomialPmf(0, 5, 0)).toBe(0);
    expect(logBinomialPmf(5, 5, 1)).toBe(0);
    expect(logBinomialPmf(0, 0, 0.3)).toBe(0);
    expect(logBinomialPmf(5, 5, 0)).toBe(impossible);
    expect(logBinomialPmf(0, 5, 1)).toBe(impossible);
  });

  it('uses q where p rounds to 1', () => {
    expect(relative(logBinomialPmf(3, 3, 1, 1e-20), -3e-20)).toBeLessThan(1e-15);
    expect(relative(logBinomialPmf(0, 3, 1, 1e-20), 3 * Math.log(1e-20))).toBeLessThan(1e-15);
    expect(relative(logBinomialPmf(2, 3, 1, 1e-20), Math.log(3e-20))).toBeLessThan(1e-15);
  });
});

describe('the arguments of the binomial law', () => {
  it('are refused outside their domain', () => {
    const message = (call: () => unknown): string => {
      try {
        call();
      } catch (caught) {
        expect(caught).toBeInstanceOf(DomainError);
        return (caught as DomainError).message;
      }
      return 'accepted';
    };
    expect(message(() => binomialCdf(1.5, 3))).toBe('binomialCdf: k must be an integer, got 1.5');
    expect(message(() => binomialCdf(Number.NaN, 3))).toContain('k must be');
    expect(message(() => binomialCdf(Number.POSITIVE_INFINITY, 3))).toContain('k must be');
    expect(message(() => binomialCdf(1, -1))).toContain('n must be an integer >= 0');
    expect(message(() => binomialCdf(1, 2.5))).toContain('n must be');
    expect(message(() => binomialCdf(1, 2 ** 53))).toContain(
      'n must be an integer from 0 to 2^53 - 1',
    );
    expect(message(() => binomialCdf(1, '3' as unknown as number))).toContain('n must be');
    expect(message(() => binomialCdf(1, 3, 1.1))).toContain('p must be');
    expect(message(() => binomialCdf(1, 3, -0.1))).toContain('p must be');
    expect(message(() => binomialCdf(1, 3, Number.NaN))).toContain('p must be');
    expect(message(() => binomialCdf(1, 3, 0.5, 0.6))).toContain('q must be 1 - p');
    expect(message(() => logBinomialPmf(0.5, 3))).toContain('logBinomialPmf: k must be');
    expect(message(() => logBinomialPmf(1, 3, 2))).toContain('p must be');
    expect(binomialCdf(1, 2 ** 53 - 1, 2 ** -53).value).toBeCloseTo(2 / Math.E, 12);
  });
});
