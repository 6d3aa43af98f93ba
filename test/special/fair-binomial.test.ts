import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import { binomialCdf } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { exactLogError } from '../../src/epsilon.ts';
import { fairBinomialTail } from '../../src/special/fair-binomial.ts';
import { TAIL_SLOTS } from '../../src/special/tail-result.ts';
import { coinSum, dyadic } from '../support/exact-binomial.ts';
import { isQuotient } from '../support/exactness.ts';
import { exactDecimal, type NamedRow, readTable, relativeError } from '../support/reference.ts';

const Ruler = Decimal.clone({ precision: 60, defaults: true });
const out = new Float64Array(TAIL_SLOTS);

interface Tail {
  readonly lower: boolean;
  readonly value: number;
  readonly log: number;
  readonly logError: number;
}

function tail(n: number, k: number): Tail {
  const lower = fairBinomialTail(n, k, out);
  return {
    lower,
    value: out[0] as number,
    log: out[1] as number,
    logError: out[2] as number,
  };
}

/** sum_(i <= j) binom(n, i), the numerator over 2^n. */
const sumTo = (n: number, j: number): bigint => coinSum(n + 1, j + 1);

const LN2 = new Ruler(2).ln();
const exactLog = (n: number, sum: bigint): Decimal =>
  new Ruler(sum.toString()).ln().minus(LN2.times(n));

/** Relative error of the value and error of the logarithm, by exact integers. */
function errors(n: number, k: number): { value: number; log: number; size: number } {
  const t = tail(n, k);
  const sum = sumTo(n, t.lower ? k : n - 1 - k);
  const truth = new Ruler(sum.toString()).div(new Ruler(2).pow(n));
  const log = exactLog(n, sum);
  return {
    value: exactDecimal(t.value).div(truth).minus(1).abs().toNumber(),
    log: exactDecimal(t.log).minus(log).abs().toNumber(),
    size: Math.abs(log.toNumber()),
  };
}

describe('fairBinomialTail', () => {
  it('gives the correctly rounded small tail for every k and n <= 106, exactly for n <= 53', () => {
    for (let n = 1; n <= 106; n++) {
      for (let k = 0; k < n; k++) {
        const t = tail(n, k);
        expect(t.lower).toBe(2 * k < n);
        const sum = sumTo(n, t.lower ? k : n - 1 - k);
        if (t.value !== dyadic(sum, n)) expect([n, k, t.value]).toEqual([n, k, dyadic(sum, n)]);
        if (n <= 53) expect(t.value * 2 ** n).toBe(Number(sum));
      }
    }
  });

  it('says that it is exact only where it is, and always for n <= 53, at the middle and at the ends', () => {
    const check = (n: number, k: number): boolean => {
      const t = tail(n, k);
      const marked = t.logError === exactLogError(t.log);
      if (marked) {
        const sum = sumTo(n, t.lower ? k : n - 1 - k);
        expect([n, k, isQuotient(t.value, sum, 1n << BigInt(n))]).toEqual([n, k, true]);
      }
      return marked;
    };
    let beyond = 0;
    for (const n of [1, 2, 20, 52, 53, 54, 55, 80, 105, 106, 107, 108, 300, 1021, 1022]) {
      for (let k = 0; k < n; k++) {
        const marked = check(n, k);
        if (n <= 53 || k === 0 || k === n - 1 || 2 * k === n - 1) expect(marked).toBe(true);
        else if (marked) beyond++;
      }
    }
    // 1 + n + .. stays below 2^53 for a while
    expect(beyond).toBeGreaterThan(50);
    expect([check(1023, 0), check(54, 26), check(54, 25)]).toEqual([false, true, true]);
    expect([check(106, 40), check(2001, 1000)]).toEqual([false, true]);
    const half = tail(2 ** 53 - 1, 2 ** 52 - 1);
    expect([half.value, half.logError]).toEqual([0.5, exactLogError(half.log)]);
  });

  it('has a correctly rounded complement for n <= 53', () => {
    for (let n = 1; n <= 53; n++) {
      for (let k = 0; k < n; k++) {
        const p = binomialCdf(k, n);
        expect(p.value).toBe(Number(sumTo(n, k)) / 2 ** n);
        expect(p.complement).toBe(Number((1n << BigInt(n)) - sumTo(n, k)) / 2 ** n);
      }
    }
  });

  it('agrees with exact integers for n up to 2000', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 54, max: 2000 }),
        fc.double({ min: -1, max: 1, noNaN: true }),
        fc.boolean(),
        (n, position, central) => {
          const spread = central ? Math.min(n / 2, 4 * Math.sqrt(n)) : n / 2;
          const k = Math.min(n - 1, Math.max(0, Math.floor(n / 2 + position * spread)));
          const { value, log, size } = errors(n, k);
          if (size < 700) expect(value).toBeLessThan(1e-15);
          expect(log).toBeLessThan(1e-15 + 1.2e-16 * size);
          expect(log).toBeLessThanOrEqual(out[2] as number);
        },
      ),
      { numRuns: 600 },
    );
  });

  it('agrees with exact integers for up to 300 terms and any n up to 2^53', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(300), max: Math.log(2 ** 53), noNaN: true }),
        fc.integer({ min: 0, max: 299 }),
        fc.boolean(),
        (logN, j, upper) => {
          const n = Math.floor(Math.exp(logN));
          fc.pre(2 * j < n);
          const { value, log, size } = errors(n, upper ? n - 1 - j : j);
          if (size < 700) expect(value).toBeLessThan(1e-15);
          expect(log).toBeLessThan(1e-15 + 1.2e-16 * size);
          expect(log).toBeLessThanOrEqual(out[2] as number);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('does not overflow at n = 2^53 with 299 terms', () => {
    const t = tail(2 ** 53, 299);
    expect(t.value).toBe(0);
    const sum = sumTo(2 ** 53, 299);
    expect(Math.abs(t.log / exactLog(2 ** 53, sum).toNumber() - 1)).toBeLessThan(2e-16);
  });

  it('is exact where few coefficients are summed and the sum fits in a double', () => {
    expect(tail(200, 0).value).toBe(2 ** -200);
    expect(tail(1000, 1).value).toBe(1001 * 2 ** -1000);
    expect(tail(1074, 1).value).toBe(1075 * Number.MIN_VALUE);
    expect(tail(5000, 0)).toMatchObject({ lower: true, value: 0 });
    expect(tail(200, 199)).toMatchObject({ lower: false, value: 2 ** -200 });
    expect(tail(300, 3).value).toBe((1 + 300 + 44850 + 4455100) * 2 ** -300);
    expect(tail(2 ** 53, 0).log).toBe(-(2 ** 53) * Math.LN2);
  });

  it('joins its methods: table, direct sum, fraction and expansion', () => {
    for (const n of [106, 107])
      for (let k = 40; k < 66; k++) expect(errors(n, k).value).toBeLessThan(1e-15);
    for (const n of [107, 500, 1000]) {
      for (const j of [7, 8, 9, 10]) expect(errors(n, j).value).toBeLessThan(1e-15);
    }
    for (const n of [398, 400, 402, 600, 2000, 9000]) {
      const line = (n / 32) ** 0.25 * Math.sqrt(n) * 0.5;
      for (const shift of [0.95, 1, 1.05]) {
        expect(errors(n, Math.floor(n / 2 - line * shift)).value).toBeLessThan(1e-15);
      }
    }
    // |tau| = 1/6
    for (const n of [700, 3000]) {
      for (const k of [-2, -1, 0, 1, 2].map((i) => Math.floor((5 / 12) * n) + i)) {
        expect(errors(n, k).value).toBeLessThan(1e-15);
      }
    }
  });

  it('is exactly one half at a tie, whatever n', () => {
    for (const k of [0, 1, 26, 52, 53, 500, 1e6, 2 ** 40 + 1, 2 ** 52 - 1]) {
      expect(tail(2 * k + 1, k)).toMatchObject({ lower: true, value: 0.5, log: -Math.LN2 });
      expect(out[2]).toBeLessThan(2e-16);
    }
  });

  it('takes n beyond 2^53', () => {
    const rows = [
      // n, k: close to the tie of 2^54, and k small against any n
      [2 ** 54, 2 ** 53 - 1],
      [2 ** 54, 2 ** 53],
      [1e300, 5],
      [1.7e308, 1000],
      [1e17, 300],
    ] as const;
    const half = rows.slice(0, 2).map(([n, k]) => tail(n, k));
    expect(half[0]?.lower).toBe(true);
    expect(half[1]?.lower).toBe(false);
    expect(half[0]?.value).toBe(half[1]?.value);
    // 1/2 - binom(n, n/2)/2^(n+1), n = 2^54: 1/2 - 1/sqrt(2 pi n)
    expect(
      Math.abs((half[0]?.value as number) - (0.5 - 1 / Math.sqrt(2 * Math.PI * 2 ** 54))),
    ).toBeLessThan(2e-16);
    for (const [n, k] of rows.slice(2)) {
      const t = tail(n, k);
      expect(t.value).toBe(0);
      expect(Math.abs(t.log / (-n * Math.LN2) - 1)).toBeLessThan(1e-12);
      expect(t.logError).toBeGreaterThanOrEqual(Math.abs(t.log) * 1e-16);
    }
    // 2^-1e300 to the last bit
    expect(tail(1e300, 0).log).toBe(-1e300 * Math.LN2);
  });

  it('satisfies P_n(k) = (P_(n-1)(k) + P_(n-1)(k-1))/2 for huge n', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(100), max: Math.log(2 ** 52), noNaN: true }),
        fc.double({ min: 0, max: 30, noNaN: true }),
        (logN, z) => {
          const n = Math.floor(Math.exp(logN));
          const k = Math.floor(n / 2 - (z * Math.sqrt(n)) / 2) - 1;
          fc.pre(k >= 1);
          const mean = 0.5 * (tail(n - 1, k).value + tail(n - 1, k - 1).value);
          expect(Math.abs(tail(n, k).value / mean - 1)).toBeLessThan(2e-15);
        },
      ),
      { numRuns: 1000 },
    );
  });

  it('grows with k and falls with n', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(60), max: Math.log(1e5), noNaN: true }),
        fc.double({ min: 0.01, max: 0.999, noNaN: true }),
        (logN, share) => {
          const n = Math.floor(Math.exp(logN));
          const k = Math.floor((n * share) / 2);
          fc.pre(k >= 1);
          expect(tail(n, k).log).toBeGreaterThan(tail(n, k - 1).log);
          expect(tail(n + 1, k).log).toBeLessThan(tail(n, k).log);
        },
      ),
    );
  });

  it('is Wendel’s formula: P_out(n, d) = P[Bin(n - 1, 1/2) <= d - 1]', () => {
    const rows = readTable<NamedRow>('conic').filter(({ quantity }) =>
      /^wendel\.p_(in|out)$/.test(quantity),
    );
    let used = 0;
    for (const { quantity, args, value, log } of rows) {
      const n = Number(args['n']);
      const d = Number(args['d']);
      if (!(n > d && d > 0) || log === null || Number(log) === 0) continue;
      used++;
      const p = binomialCdf(d - 1, n - 1);
      const out = quantity === 'wendel.p_out';
      if (value !== null && Number(value) > 1e-290) {
        expect(relativeError(out ? p.value : p.complement, value)).toBeLessThan(1e-15);
      }
      const computed = out ? p.log : p.logComplement;
      // the table has 30 digits; the larger tail's logarithm is relative to the smaller tail
      const error = exactDecimal(computed).minus(log).abs().toNumber();
      expect(error).toBeLessThanOrEqual(
        Number(log) < -0.7 ? p.logError : 1e-15 * Math.abs(Number(log)),
      );
    }
    expect(used).toBeGreaterThan(35);
  });

  it('is refused by the public function where k or n is no integer', () => {
    expect(() => binomialCdf(0.5, 3)).toThrow(DomainError);
    expect(() => binomialCdf(1, 3.5)).toThrow(DomainError);
  });
});
