import {
  betaLaw,
  expectedFaces,
  expectedFacets,
  expectedVertices,
  gaussian,
  type Hull,
  type Law,
  LogNumber,
  projectedFaces,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { recoverySuccess } from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';
import { BetaAngles } from '../../src/numeric/beta-angles.ts';

const cases: readonly (readonly [string, Law, Hull])[] = [
  ['Gaussian', gaussian(), 'plain'],
  ['Gaussian', gaussian(), 'symmetric'],
  ['Gaussian', gaussian(), 'withCentre'],
  ['ball', uniformBall(), 'plain'],
  ['sphere', uniformSphere(), 'plain'],
  ['beta', betaLaw(2.75), 'plain'],
  ['near the sphere', betaLaw(-0.9), 'plain'],
  ['t', studentT({ degreesOfFreedom: 0.5 }), 'plain'],
  ['t', studentT({ degreesOfFreedom: 3 }), 'plain'],
];

const choose = (n: number, k: number): number => {
  let product = 1;
  for (let i = 1; i <= k; i++) product = (product * (n - k + i)) / i;
  return Math.round(product);
};

/** f_0 .. f_(d-1). */
function vector(n: number, d: number, law: Law, hull: Hull): number[] {
  return Array.from({ length: d }, (_, k) => expectedFaces({ n, d, k, law, hull }).value);
}

describe('expectedFaces', () => {
  it.each(cases)("keeps Euler's and the Dehn-Sommerville relations: %s, %#", (_, law, hull) => {
    for (const [n, d] of [
      [9, 2],
      [20, 3],
      [30, 4],
      [40, 6],
      [12, 7],
    ] as const) {
      const f = vector(n, d, law, hull);
      for (let k = -1; k < d - 1; k++) {
        // f_(-1) = 1 stands for the empty face
        let sum = 0;
        let size = 0;
        for (let j = k; j < d; j++) {
          const term = choose(j + 1, k + 1) * (j < 0 ? 1 : (f[j] as number));
          sum += j % 2 === 0 ? term : -term;
          size += term;
        }
        const own = k < 0 ? 1 : (f[k] as number);
        expect(Math.abs(sum - (d % 2 === 1 ? own : -own)) / size).toBeLessThan(1e-13);
      }
    }
  });

  it.each(cases)('agrees with the direct integral for facets: %s, %#', (_, law, hull) => {
    for (const [n, d] of [
      [6, 5],
      [100, 2],
      [60, 8],
    ] as const) {
      const direct = expectedFacets({ n, d, law, hull });
      const faces = expectedFaces({ n, d, k: d - 1, law, hull });
      expect(Math.abs(direct.log - faces.log)).toBeLessThan(2e-13);
    }
  });

  it('has every face up to d + 1 points, and none with too few', () => {
    for (const law of [gaussian(), uniformBall(), studentT({ degreesOfFreedom: 2 })]) {
      for (const n of [0, 1, 3, 5, 6]) {
        for (let k = 0; k < 5; k++) {
          const { value } = expectedFaces({ n, d: 5, k, law });
          expect(value).toBe(k < n ? choose(n, k + 1) : 0);
        }
      }
    }
  });

  it('knows the sphere', () => {
    for (const [n, d] of [
      [1000, 4],
      [200, 9],
      [1e6, 40],
    ] as const) {
      expect(expectedVertices({ n, d, law: uniformSphere() }).value).toBe(n);
      // the sum that the shortcut stands for
      const angles = new BetaAngles('beta', d - 2);
      const error = new Float64Array(1);
      let sum = 0;
      for (let m = d; m >= 1; m -= 2)
        sum += Math.exp(angles.logTerm({ n, log: Math.log(n) }, m, 1, error));
      expect(Math.abs((2 * sum) / n - 1)).toBeLessThan(1e-13);
    }
    for (const n of [5, 17, 1000]) {
      const law = uniformSphere();
      expect(expectedFaces({ n, d: 3, k: 1, law }).value).toBe(3 * (n - 2));
      expect(expectedFaces({ n, d: 3, k: 2, law }).value).toBe(2 * (n - 2));
    }
    expect(expectedVertices({ n: 3, d: 1, law: uniformSphere() }).value).toBe(1.75);
  });

  it('leaves facets of other hulls to the integral over their heights, and takes the hull itself for one', () => {
    for (const hull of ['symmetric', 'withCentre'] as const) {
      for (const law of [betaLaw(0.7), studentT({ degreesOfFreedom: 3 }), uniformSphere()]) {
        const faces = expectedFaces({ n: 30, d: 5, k: 4, law, hull });
        expect(faces).toEqual(expectedFacets({ n: 30, d: 5, law, hull }));
      }
      for (const law of [gaussian(), betaLaw(0.7)]) {
        for (const d of [1, 2, 4]) {
          for (const n of [0, d - 1, d, d + 3]) {
            const faces = expectedFaces({ n, d, k: d - 1, law, hull }).value;
            const facets = expectedFacets({ n, d, law, hull }).value;
            expect(Math.abs(faces - facets)).toBeLessThan(1e-13 * facets + 1e-300);
          }
        }
      }
    }
    expect(expectedFaces({ n: 2, d: 3, k: 2, law: gaussian(), hull: 'symmetric' }).value).toBe(1);
    expect(expectedFacets({ n: 0, d: 1, law: gaussian(), hull: 'withCentre' }).value).toBe(1);
  });

  it('stays bounded for heavy tails and grows without end for light ones', () => {
    const at = (law: Law, log: number): number =>
      expectedFaces({ n: LogNumber.fromLog(log), d: 4, k: 0, law }).log;
    const heavy = studentT({ degreesOfFreedom: 4 });
    expect(at(heavy, 1000)).toBeCloseTo(at(heavy, 600), 12);
    expect(at(gaussian(), 1000)).toBeGreaterThan(at(gaussian(), 600) + 0.5);
    expect(at(gaussian(), 1e6)).toBeLessThan(40);
  });

  it('counts beyond doubles', () => {
    const { log, logError } = expectedFaces({
      n: LogNumber.fromLog(900),
      d: 500,
      k: 249,
      law: gaussian(),
    });
    expect(log).toBeGreaterThan(709);
    expect(logError).toBeLessThan(1e-10);
  });
});

describe('projectedFaces', () => {
  it('projects a simplex, a cross-polytope or a simplex with the origin to a Gaussian hull', () => {
    for (const [polytope, hull] of [
      ['simplex', 'plain'],
      ['crosspolytope', 'symmetric'],
      ['simplexWithOrigin', 'withCentre'],
    ] as const) {
      for (const [n, d] of [
        [8, 3],
        [60, 12],
      ] as const) {
        for (let k = 0; k < d; k += 2) {
          const { expected } = projectedFaces({ polytope, n, d, k });
          const faces = expectedFaces({ n, d, k, law: gaussian(), hull });
          expect(Math.abs(expected.log - faces.log)).toBeLessThan(1e-13);
        }
      }
    }
  });

  it('weighs the error of the faces at the origin by their share', () => {
    const { expected } = projectedFaces({
      polytope: 'simplexWithOrigin',
      n: Number.MAX_SAFE_INTEGER,
      d: 100,
      k: 2,
    });
    expect(expected.logError).toBeLessThan(1e-12);
  });

  it('keeps every face in full dimension and none of the dimension of the image', () => {
    for (const polytope of ['simplex', 'simplexWithOrigin', 'crosspolytope', 'cube'] as const) {
      for (let k = 0; k < 6; k++) {
        expect(projectedFaces({ polytope, n: 6, d: 6, k }).survival.complement === 0).toBe(true);
        if (k < 4) continue;
        // a simplex in R^6 has only 5 dimensions, which is the dimension of its own largest face
        const { survival, expected } = projectedFaces({ polytope, n: 6, d: 4, k });
        expect([survival.value, expected.value]).toEqual([0, 0]);
      }
    }
    expect(projectedFaces({ polytope: 'cube', n: 6, d: 6, k: 2 }).expected.value).toBe(16 * 15);
    expect(projectedFaces({ polytope: 'crosspolytope', n: 6, d: 6, k: 2 }).expected.value).toBe(
      8 * 20,
    );
  });

  it("keeps Euler's relation for the shadow of a cube", () => {
    for (const [n, d] of [
      [7, 3],
      [20, 6],
    ] as const) {
      let sum = 0;
      let size = 0;
      for (let k = 0; k < d; k++) {
        const term = projectedFaces({ polytope: 'cube', n, d, k }).expected.value;
        sum += k % 2 === 0 ? term : -term;
        size += term;
      }
      expect(Math.abs(sum - (d % 2 === 1 ? 2 : 0)) / size).toBeLessThan(1e-14);
    }
  });

  it('is what sparse recovery asks for', () => {
    const args = { n: 40, sparsity: 5, measurements: 18 };
    const shadow = { n: 40, d: 18, k: 4 };
    for (const [model, polytope] of [
      ['l1', 'crosspolytope'],
      ['nonnegativeL1', 'simplexWithOrigin'],
    ] as const) {
      const recovery = recoverySuccess({ model, ...args });
      const { survival } = projectedFaces({ polytope, ...shadow });
      expect(Math.abs(recovery.log - survival.log)).toBeLessThan(1e-13);
      expect(Math.abs(recovery.logComplement - survival.logComplement)).toBeLessThan(1e-13);
    }
  });
});
