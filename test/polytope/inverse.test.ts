/** How many points fill a share of the ball: the inverse of the volume ratio against its references. */
import {
  approxVolumeThreshold,
  betaLaw,
  type HullIntrinsicVolumeRatioArgs,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
  type LogNumber,
  type Probability,
  smallest,
  uniformBall,
} from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { type RowArgs, rowsOf } from '../support/polytope-rows.ts';
import { difference } from '../support/reference.ts';

type Row = RowArgs & { readonly smallestIntegerN?: number };

describe('smallest n for a share', () => {
  const rows = rowsOf('beta.nForRatio');
  it.each(rows.map((row) => [row.args as unknown as Row, row.log ?? ''] as const))(
    '%o',
    (args, log) => {
      const { d, k = d, beta = 0, p = '' } = args;
      let evaluations = 0;
      const counted = (options: HullIntrinsicVolumeRatioArgs): Probability => {
        evaluations++;
        return hullIntrinsicVolumeRatio(options);
      };
      const answer = smallest(counted, 'n', { d, k, law: betaLaw(beta) }, Number(p));
      expect(evaluations).toBeLessThanOrEqual(25);
      if (args.smallestIntegerN !== undefined) {
        expect(answer.value).toBe(args.smallestIntegerN);
        // (n - 1)/(n + 1) on the line meets 0.99 exactly at n = 199: no error bound separates a tie
        expect(answer.exact).toBe(d > 1);
        expect(answer.bracket).toContain(args.smallestIntegerN);
      } else {
        const size = Math.abs(Number(log));
        expect(Math.abs(difference(answer.log, log))).toBeLessThan(3e-14 * size + 1e-11);
      }
    },
  );

  it.each(
    rowsOf('beta.nForComplement').map(
      (row) => [row.args as unknown as Row, row.log ?? ''] as const,
    ),
  )('with a complement of %o', (args, log) => {
    const { d, beta = 0, complement = '' } = args;
    const target = { complementAtMost: Number(complement) };
    const answer = smallest(hullVolumeRatio, 'n', { d, law: betaLaw(beta) }, target);
    const size = Math.abs(Number(log));
    // an integer n is up to one above the real root
    expect(Math.abs(difference(answer.log, log))).toBeLessThan(
      1e-13 * size + 1e-11 + 1 / Math.max(1, Math.min(answer.value, 1e300)),
    );
  });

  it('takes at most 25 evaluations at d = 5000', () => {
    let evaluations = 0;
    const counted = (options: { n: number | LogNumber; d: number }): Probability => {
      evaluations++;
      return hullVolumeRatio({ ...options, law: uniformBall() });
    };
    const { log, probability } = smallest(counted, 'n', { d: 5000 }, 0.5);
    expect(evaluations).toBeLessThanOrEqual(25);
    expect(probability.value).toBeCloseTo(0.5, 11);
    expect(log).toBeGreaterThan(20_000);
  });

  it('answers in either direction', () => {
    const args = { d: 6, law: uniformBall() };
    const { value } = smallest(hullVolumeRatio, 'n', args, 0.25);
    expect(hullVolumeRatio({ ...args, n: value }).value).toBeGreaterThanOrEqual(0.25);
    expect(hullVolumeRatio({ ...args, n: value - 1 }).value).toBeLessThan(0.25);
  });
});

describe('approxVolumeThreshold', () => {
  it('approaches the exact size as d grows, from below', () => {
    const ratios = [20, 200, 2000].map((d) => {
      const exact = smallest(hullVolumeRatio, 'n', { d, law: uniformBall() }, 0.5).log;
      return approxVolumeThreshold({ d, law: uniformBall() }).log / exact;
    });
    expect(ratios[0]).toBeLessThan(ratios[1] as number);
    expect(ratios[1]).toBeLessThan(ratios[2] as number);
    expect(ratios[2]).toBeGreaterThan(0.99);
    expect(ratios[2]).toBeLessThan(1);
  });

  it('inverts the theorem: at that n the limit is the share', () => {
    const share = Math.exp(-1);
    const ask = { d: 10_000, law: uniformBall() };
    const n = approxVolumeThreshold({ ...ask, share });
    // 0.366519 from the reference table; the limit is 1/e
    expect(hullVolumeRatio({ ...ask, n }).value).toBeCloseTo(0.366519, 6);
    const half = approxVolumeThreshold({ d: 10_000, k: 5000, law: uniformBall(), share });
    expect(half.log).toBeCloseTo(5000 * Math.log(2500), 8);
  });

  it('refuses shares at the ends and laws without a threshold', () => {
    const ask = { d: 9, law: uniformBall() };
    expect(() => approxVolumeThreshold({ ...ask, share: 0 })).toThrow('share must be');
    expect(() => approxVolumeThreshold({ ...ask, share: 1 })).toThrow('share must be');
    expect(() => approxVolumeThreshold({ d: 2, law: betaLaw(-1) })).toThrow('law.b must be');
    expect(() => approxVolumeThreshold({ ...ask, k: 10 })).toThrow('k must be');
  });
});
