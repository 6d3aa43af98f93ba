import fc from 'fast-check';
import { DomainError, Probability } from 'hullgauge';
import { binomialCdf, binomialQuantile } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';

const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true });

/** Whether P[X <= k] reaches a probability, compared on the small side. */
const reaches = (k: number, n: number, p: number, target: Probability): boolean => {
  if (k < 0) return false;
  const cdf = binomialCdf(k, n, p);
  if (target.value <= 0.5) return cdf.value >= target.value && cdf.log >= target.log;
  return cdf.complement <= target.complement && cdf.logComplement <= target.logComplement;
};

describe('binomialQuantile', () => {
  it('is the smallest k that reaches the probability', () => {
    fc.assert(
      fc.property(
        between(0, Math.log(1e15)),
        fc.oneof(between(1e-9, 1), fc.constant(0.5)),
        fc.oneof(between(-3, -0.7), between(-600, -0.7)),
        fc.boolean(),
        (logN, p, log, upper) => {
          const n = Math.floor(Math.exp(logN));
          const target = upper ? Probability.fromLogComplement(log) : Probability.fromLog(log);
          const k = binomialQuantile(target, n, p);
          expect(reaches(k, n, p, target)).toBe(true);
          expect(reaches(k - 1, n, p, target)).toBe(false);
        },
      ),
      { numRuns: 1500 },
    );
  });

  it('comes back from the distribution function at k to k', () => {
    fc.assert(
      fc.property(
        between(0, Math.log(1e6)),
        between(0.001, 0.999),
        between(-30, 30),
        (logN, p, z) => {
          const n = Math.ceil(Math.exp(logN));
          const k = Math.min(n, Math.max(0, Math.round(n * p + z * Math.sqrt(n * p * (1 - p)))));
          expect(binomialQuantile(binomialCdf(k, n, p), n, p)).toBe(k);
        },
      ),
      { numRuns: 1000 },
    );
  });

  it('meets every dyadic tie of a fair coin for n <= 53', () => {
    for (let n = 1; n <= 53; n++) {
      for (let k = 0; k < n; k++) {
        const { value, complement } = binomialCdf(k, n);
        expect(binomialQuantile(value, n)).toBe(k);
        expect(binomialQuantile(value - value * 2 ** -53, n)).toBe(k);
        expect(binomialQuantile(Probability.fromComplement(complement), n)).toBe(k);
        if (value * (1 + 2 ** -52) < 1)
          expect(binomialQuantile(value * (1 + 2 ** -52), n)).toBe(k + 1);
      }
    }
  });

  it('takes the lower middle of an odd number of tosses for one half, whatever n', () => {
    for (const n of [1, 3, 55, 107, 1001, 1e6 + 1, 2 ** 53 - 1]) {
      expect(binomialQuantile(0.5, n)).toBe((n - 1) / 2);
      expect(binomialQuantile(Probability.fromValue(0.5), n)).toBe((n - 1) / 2);
      expect(binomialQuantile(Probability.fromLog(-Math.LN2), n)).toBe((n - 1) / 2);
    }
    for (const n of [2, 100, 1e6]) expect(binomialQuantile(0.5, n)).toBe(n / 2);
  });

  it('returns the ends for certain events', () => {
    expect(binomialQuantile(0, 10, 0.3)).toBe(0);
    expect(binomialQuantile(1, 10, 0.3)).toBe(10);
    expect(binomialQuantile(Probability.fromLog(Number.NEGATIVE_INFINITY), 10, 0.3)).toBe(0);
    expect(binomialQuantile(0.5, 10, 0)).toBe(0);
    expect(binomialQuantile(1, 10, 0)).toBe(0);
    expect(binomialQuantile(0.5, 10, 1)).toBe(10);
    expect(binomialQuantile(0, 10, 1)).toBe(0);
    expect(binomialQuantile(0.7, 0)).toBe(0);
    expect(binomialQuantile(1e-300, 10, 0.3)).toBe(0);
  });

  it('takes a q that is known more exactly', () => {
    // Poisson limit from the other end: failures have mean 2
    expect(binomialQuantile(0.5, 1e15, 1 - 2e-15, 2e-15)).toBe(1e15 - 2);
  });

  it('answers in tails far below the smallest double', () => {
    const target = Probability.fromLog(-1e6);
    const k = binomialQuantile(target, 1e8);
    expect(binomialCdf(k, 1e8).log).toBeGreaterThanOrEqual(-1e6);
    expect(binomialCdf(k - 1, 1e8).log).toBeLessThan(-1e6);
    for (const [n, p] of [
      [1e15, 0.5],
      [1e15, 1e-9],
      [4e12, 1e-10],
    ] as const) {
      for (const log of [-1e4, -1e8, -1e11]) {
        for (const goal of [Probability.fromLog(log), Probability.fromLogComplement(log)]) {
          const answer = binomialQuantile(goal, n, p);
          expect(answer >= 0 && answer <= n && Number.isInteger(answer)).toBe(true);
        }
      }
    }
  });

  it('refuses arguments outside its domain', () => {
    for (const call of [
      () => binomialQuantile(1.1, 3),
      () => binomialQuantile(-0.1, 3),
      () => binomialQuantile(Number.NaN, 3),
      () => binomialQuantile(0.5, -1),
      () => binomialQuantile(0.5, 1.5),
      () => binomialQuantile(0.5, 3, 1.5),
      () => binomialQuantile(0.5, 3, 0.5, 0.4),
      () => binomialQuantile({} as unknown as number, 3),
    ]) {
      expect(call).toThrow(DomainError);
    }
  });
});
