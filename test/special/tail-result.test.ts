import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  quotientProbability,
  storeExact,
  TAIL_SLOTS,
  tailProbability,
} from '../../src/special/tail-result.ts';
import { isQuotient, statesExact } from '../support/exactness.ts';

describe('quotientProbability', () => {
  it('says that it is exact where it is, and only there', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.integer({ min: 2, max: 64 }),
          fc.integer({ min: 2, max: 2 ** 53 - 1 }),
          fc.integer({ min: 1, max: 53 }).map((bits) => 2 ** bits),
        ),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (b, share) => {
          const a = Math.min(b - 1, Math.max(1, Math.floor(share * b)));
          const p = quotientProbability(a, b);
          const lower = 2 * a <= b;
          const small = lower ? p.value : p.complement;
          expect(small).toBe((lower ? a : b - a) / b);
          expect(statesExact(p)).toBe(isQuotient(small, BigInt(lower ? a : b - a), BigInt(b)));
        },
      ),
      { numRuns: 500 },
    );
  });

  it('is exact at both ends of a power of two', () => {
    for (const b of [2, 8, 2 ** 30, 2 ** 53]) {
      for (const a of [1, b / 2, b - 1]) expect(statesExact(quotientProbability(a, b))).toBe(true);
    }
    expect(statesExact(quotientProbability(1, 3))).toBe(false);
    expect(quotientProbability(2, 3).complement).toBe(1 / 3);
  });
});

describe('storeExact', () => {
  it('keeps the value on either side', () => {
    const out = new Float64Array(TAIL_SLOTS);
    storeExact(0.375, out);
    expect(tailProbability(true, out).value).toBe(0.375);
    expect(tailProbability(false, out).complement).toBe(0.375);
    expect(statesExact(tailProbability(false, out))).toBe(true);
  });
});
