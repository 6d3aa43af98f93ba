import fc from 'fast-check';
import {
  betaLaw,
  DomainError,
  gaussian,
  hausdorffDistance,
  hausdorffWithin,
  LogNumber,
  originInHull,
  smallest,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { largestSpacingTail } from '../../src/numeric/largest-spacing.ts';
import { logEulerCharacteristic } from '../../src/polytope/euler-characteristic.ts';

const laws = [uniformSphere(), uniformBall(), betaLaw(1.5)];
const anyLaw = fc.constantFrom(...laws);

describe('hausdorffDistance', () => {
  it('states the error of the smaller tail where the centre is nearly never inside', () => {
    const args = { n: 60, d: 50 };
    const law = uniformSphere();
    const { logError } = originInHull(args);
    const distance = hausdorffDistance({ ...args, law });
    expect(distance.exceedance(1).exact?.logError).toBeLessThanOrEqual(2 * logError);
    expect(hausdorffWithin({ ...args, distance: 1, law }).logError).toBeLessThanOrEqual(
      2 * logError,
    );
    // just below the radius both bound and estimate are that of the centre
    const { lower, approx } = distance.exceedance(0.99999);
    expect(lower.logError).toBeLessThanOrEqual(2 * logError);
    expect(approx.logError).toBeLessThanOrEqual(2 * logError);
  });

  it('weighs the error of the hole count by its share', () => {
    const { upper, approx } = hausdorffDistance({ n: 800, d: 8, law: uniformSphere() }).exceedance(
      1 - 1e-16,
    );
    expect(upper.logError).toBeLessThan(1e-11);
    expect(approx.logError).toBeLessThan(1e-11);
    expect(upper.log).toBeCloseTo(originInHull({ n: 800, d: 8 }).logComplement, 9);
  });

  it('knows distances far below every double, and says so', () => {
    const law = uniformSphere();
    const args = { n: LogNumber.fromLog(1000), d: 3, law };
    const distance = hausdorffDistance(args);
    // all are about e^-1000, and a guarantee is on the safe side
    for (const t of [distance.approxMean, distance.guarantee(0.5), distance.guarantee(0.99)]) {
      expect(t).toBeGreaterThan(0);
      expect(t).toBeLessThan(1e-322);
    }
    // n times a cap of probability 5e-301: e^1000 has its digits to the rounding of 1000
    const { upper, lower } = distance.exceedance(1e-300);
    for (const p of [upper, lower]) {
      expect(Math.abs(p.log + 9.8503555700852349e133)).toBeLessThan(p.logError);
      expect(p.logError).toBeLessThan(2e-12 * Math.abs(p.log));
    }
    const near = hausdorffDistance({ n: LogNumber.fromLog(700), d: 3, law });
    expect(near.guarantee(0.5) / near.approxMean).toBeCloseTo(1, 2);
  });

  it('does not lose itself in steps where the points huddle about the centre', () => {
    const { approxMean, guarantee } = hausdorffDistance({ n: 1e9, d: 500, law: betaLaw(1e12) });
    expect(approxMean).toBeLessThan(guarantee(0.5));
    expect(1 - approxMean).toBeCloseTo(1 - guarantee(0.5), 7);
  });

  it('orders lower bound, estimate and upper bound', () => {
    fc.assert(
      fc.property(
        anyLaw,
        fc.integer({ min: 2, max: 12 }),
        fc.integer({ min: 1, max: 4000 }),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (law, d, extra, t) => {
          const { lower, approx, upper } = hausdorffDistance({ n: d + extra, d, law }).exceedance(
            t,
          );
          const slack = lower.logError + upper.logError;
          expect(lower.log).toBeLessThanOrEqual(approx.log + slack);
          expect(approx.log).toBeLessThanOrEqual(upper.log + slack);
        },
      ),
      { numRuns: 40 },
    );
  });

  it('is exact for distances of at least 1 and joins the probability that the centre is outside', () => {
    for (const law of laws) {
      for (const [n, d] of [
        [2, 3],
        [7, 3],
        [30, 10],
        [60, 40],
      ] as const) {
        const distance = hausdorffDistance({ n, d, law });
        const outside = originInHull({ n, d });
        const { exact } = distance.exceedance(1);
        expect(exact?.log).toBe(outside.logComplement);
        const beyond = distance.exceedance(1 + 1e-9).exact;
        expect(Math.abs((beyond?.log ?? 0) - outside.logComplement)).toBeLessThan(1e-5);
        let last = 0;
        for (const t of [1.1, 1.3, 1.7, 1.99]) {
          const log = distance.exceedance(t).exact?.log ?? Number.NaN;
          expect(log).toBeLessThanOrEqual(last);
          last = log;
        }
      }
    }
  });

  it('knows one point and two points on the circle', () => {
    // one point: the distance is 2; two: half the larger arc
    const one = hausdorffDistance({ n: 1, d: 2, law: uniformSphere() });
    expect(one.exceedance(1.999).exact?.value).toBe(1);
    const two = hausdorffDistance({ n: 2, d: 2, law: uniformSphere() });
    // P(larger gap > 2 alpha) for alpha > pi/2 is 2 (1 - alpha/pi)
    const alpha = Math.acos(-0.5);
    expect(two.exceedance(1.5).exact?.value).toBeCloseTo(2 * (1 - alpha / Math.PI), 14);
  });

  it('guarantees a distance: the upper bound there is the risk, just below it more', () => {
    for (const law of laws) {
      for (const [n, d] of [
        [60, 2],
        [300, 3],
        [5000, 6],
      ] as const) {
        const distance = hausdorffDistance({ n, d, law });
        let last = 0;
        for (const confidence of [0.5, 0.9, 0.99, 0.999999]) {
          const t = distance.guarantee(confidence);
          expect(t).toBeGreaterThan(last);
          last = t;
          expect(distance.exceedance(t).upper.value).toBeLessThanOrEqual(1 - confidence + 1e-12);
          const inner = distance.exceedance(t * (1 - 1e-6)).upper.value;
          expect(inner).toBeGreaterThan((1 - confidence) * (1 - 1e-9));
          const { complement } = hausdorffWithin({ n, d, law, distance: t });
          expect(complement).toBe(distance.exceedance(t).upper.value);
        }
        expect([distance.guarantee(0), distance.guarantee(1)]).toEqual([0, 2]);
      }
    }
  });

  it('estimates the mean between guarantees', () => {
    for (const [n, d] of [
      [50, 3],
      [400, 4],
      [1e5, 10],
    ] as const) {
      const distance = hausdorffDistance({ n, d, law: uniformSphere() });
      expect(distance.approxMean).toBeLessThan(distance.guarantee(0.9));
      const { lower } = distance.exceedance(distance.approxMean * 0.5);
      expect(lower.value).toBeGreaterThan(0.75);
    }
    // one point on the sphere is at distance 2 from its antipode
    const point = hausdorffDistance({ n: 1, d: 3, law: uniformSphere() });
    expect(point.approxMean).toBeCloseTo(2, 12);
  });

  it('lets the lower bound reach its ends', () => {
    const { exceedance } = hausdorffDistance({ n: 20, d: 3, law: uniformBall() });
    expect(exceedance(0).upper.complement).toBe(0);
    expect(exceedance(-1).lower.complement).toBe(0);
    expect(exceedance(2).upper.value).toBe(0);
    expect(() => exceedance(Number.NaN)).toThrow(DomainError);
  });

  it('refuses what it has no formula for', () => {
    const ask = { n: 20, d: 3, law: uniformBall() };
    expect(() => hausdorffDistance({ ...ask, d: 1 })).toThrow('d must be');
    expect(() => hausdorffDistance({ ...ask, d: 501 })).toThrow('d must be');
    expect(() => hausdorffDistance({ ...ask, n: 0 })).toThrow('n must be');
    expect(() => hausdorffDistance({ ...ask, law: gaussian() })).toThrow('law must be');
    expect(() => hausdorffDistance({ ...ask, distance: 1 } as never)).toThrow('distance');
    expect(() => hausdorffDistance(ask).guarantee(1.1)).toThrow('confidence');
  });
});

describe('hausdorffWithin', () => {
  it('rises with the number of points and with the distance', () => {
    fc.assert(
      fc.property(
        anyLaw,
        fc.integer({ min: 2, max: 40 }),
        fc.double({ min: 0.5, max: 60, noNaN: true }),
        fc.double({ min: 0.02, max: 0.98, noNaN: true }),
        (law, d, log, distance) => {
          const n = Math.ceil(d + Math.exp(log));
          const p = hausdorffWithin({ n, d, distance, law });
          const more = hausdorffWithin({ n: Math.ceil(n * 1.3), d, distance, law });
          const farther = hausdorffWithin({ n, d, distance: distance * 1.02, law });
          const slack =
            1e-12 * (1 + Math.abs(p.logComplement)) + p.logError + more.logError + farther.logError;
          expect(more.logComplement).toBeLessThanOrEqual(p.logComplement + slack);
          expect(farther.logComplement).toBeLessThanOrEqual(p.logComplement + slack);
        },
      ),
      { numRuns: 80 },
    );
  });

  it('sizes a sample', () => {
    const args = { d: 3, distance: 0.05, law: uniformSphere() };
    const { value, exact } = smallest(hausdorffWithin, 'n', args, 0.99);
    expect(exact).toBe(true);
    expect(hausdorffWithin({ ...args, n: value }).value).toBeGreaterThanOrEqual(0.99);
    expect(hausdorffWithin({ ...args, n: value - 1 }).value).toBeLessThan(0.99);
    const most = smallest(
      hausdorffWithin,
      'distance',
      { n: value, d: 3, law: uniformSphere() },
      0.99,
    );
    expect(most.value).toBeLessThanOrEqual(0.05 * (1 + 1e-9));
  });

  it('reaches large d and counts beyond doubles', () => {
    const ask = { d: 1000, distance: 0.5, law: uniformBall() };
    const few = hausdorffWithin({ ...ask, n: LogNumber.fromLog(100) });
    expect(few.value).toBe(0);
    const many = hausdorffWithin({ ...ask, n: LogNumber.fromLog(160) });
    expect(many.complement).toBe(0);
    const none = hausdorffWithin({ ...ask, n: LogNumber.fromLog(4000) });
    expect(none.logComplement).toBe(Number.NEGATIVE_INFINITY);
    expect(none.logError).toBe(Number.POSITIVE_INFINITY);
    const tiny = hausdorffWithin({
      n: LogNumber.fromLog(60),
      d: 2,
      distance: 1e-20,
      law: betaLaw(2),
    });
    expect(tiny.value).toBe(0);
  });

  it('has the ends of the domain', () => {
    const ask = { n: 20, d: 3, law: uniformBall() };
    expect(hausdorffWithin({ ...ask, distance: 2 }).complement).toBe(0);
    expect(hausdorffWithin({ ...ask, distance: 0 }).value).toBe(0);
    expect(() => hausdorffWithin({ ...ask, distance: 2.1 })).toThrow('distance must be');
    expect(() => hausdorffWithin({ ...ask, distance: Number.NaN })).toThrow('distance must be');
  });
});

describe('the expected Euler characteristic', () => {
  // its coefficients alternate in sign: 22 digits from the same sum at 400 digits (mpmath)
  it.each([
    [50, -1, 500_000, 0.5, 55.57988782772955820411],
    [50, 0, 500_000, 0.35, -2250.774836074465210459],
    [20, 0, 10_000, 0.3, -750.4571962219773739706],
    [120, 0, 1e9, 0.4, -1600.771153743087682582],
    [120, -1, 2000, 0.1, -10.59811979299303125963],
    [200, 1, 1e12, 0.35, -132429.9367037282886686],
  ])('keeps its digits at d = %d, beta = %d, n = %d, h = %d', (d, beta, n, h, log) => {
    const computed = logEulerCharacteristic(d, beta, { n, log: Math.log(n) }, 1 - h, false);
    expect(Math.abs(computed - log)).toBeLessThan(1e-14 * (10 + Math.abs(log)));
  });

  // few points: 20 digits by squaring in 60-digit arithmetic (mpmath)
  it.each([
    [10, 0.5, 2, 0.25, -2.3827490347384979891],
    [100, 0, 1, 0.25, -3.2072021853820181213e-13],
    [257, 0, 8, 0.5, -56.233363016591822102],
    [300, 0.5, 8, 0.25, -518.18123219144173287],
    [200, -0.5, 50, 0.0625, -9971.187538113427908],
    [500, 0, 50, 0.5, -2721.3461170863594014],
    [500, 1, 3, 0.75, 1.5557538194652854268e-61],
  ])('is a probability below the centre at d = %d, beta = %d, n = %d', (d, beta, n, gap, log) => {
    const computed = logEulerCharacteristic(d, beta, { n, log: Math.log(n) }, gap, true);
    expect(Math.abs(computed - log)).toBeLessThan(4e-16 * (d + Math.abs(log)));
  });

  it('leaves no hole in the exceedance of few points in many dimensions', () => {
    const { exceedance, approxMean } = hausdorffDistance({ n: 8, d: 265, law: uniformBall() });
    expect(exceedance(1.5).approx.log).toBeCloseTo(-57.3, 0);
    expect(approxMean).toBeGreaterThan(1);
    expect(approxMean).toBeLessThan(1.5);
  });
});

describe('the largest spacing', () => {
  const tail = (n: number, a: number): { allShort: boolean; log: number; error: number } => {
    const out = new Float64Array(2);
    const allShort = largestSpacingTail(n, a, out);
    return { allShort, log: out[0] as number, error: out[1] as number };
  };

  // 20 digits from the alternating sum in 400-digit arithmetic (mpmath)
  it.each([
    [10, 1 / 3, false, -1.3554287941029996274],
    [1000, 0.004501619094809194, true, -12.673268152111924859],
    [1000, 0.04505341364441213, false, -39.146015433720145954],
    [100, 0.014236437406239663, true, -89.560426727881273734],
    [20, 0.06376856085851988, true, -24.645457794485708446],
    [13, 0.10108262410425992, true, -14.028391236030208895],
    [40, 0.0375, true, -29.74423631062156351],
  ])('of %d at %d', (n, a, allShort, log) => {
    const computed = tail(n, a);
    expect(computed.allShort).toBe(allShort);
    expect(Math.abs(computed.log - log)).toBeLessThan(2e-14 * n);
    expect(Math.abs(computed.log - log)).toBeLessThan(computed.error + 3e-15);
    expect(computed.error).toBeLessThan(1e-12);
  });

  it('joins its two methods where the first term is e^-1/2', () => {
    for (const n of [13, 50, 1000, 1e6]) {
      // n (1 - a)^(n - 1) = e^-0.5
      const a = -Math.expm1(-(Math.log(n) + 0.5) / (n - 1));
      const below = tail(n, a * (1 - 1e-9));
      const above = tail(n, a * (1 + 1e-9));
      const value = ({ allShort, log }: typeof below): number =>
        allShort ? -Math.expm1(log) : Math.exp(log);
      expect(Math.abs(value(below) - value(above))).toBeLessThan(1e-7);
      expect(value(below)).toBeGreaterThan(value(above));
    }
  });

  it('is sure beyond its ends', () => {
    expect(tail(5, 0.2)).toEqual({ allShort: true, log: Number.NEGATIVE_INFINITY, error: 0 });
    expect(tail(5, 1)).toEqual({ allShort: false, log: Number.NEGATIVE_INFINITY, error: 0 });
  });
});
