import {
  betaLaw,
  betaPrimeLaw,
  capProbability,
  DomainError,
  expectedHullIntrinsicVolume,
  gaussian,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { checkLaw, describeLaw } from '../src/law.ts';

const all = ['gaussian', 'beta', 'betaPrime'] as const;

describe('laws', () => {
  it('are plain frozen data', () => {
    const laws = [
      gaussian(),
      uniformBall(),
      uniformSphere(),
      betaLaw(2.5),
      betaPrimeLaw(3),
      studentT({ degreesOfFreedom: 4 }),
    ];
    for (const law of laws) {
      expect(Object.isFrozen(law)).toBe(true);
      expect(JSON.parse(JSON.stringify(law))).toEqual(law);
    }
    expect(laws.map(describeLaw)).toEqual([
      'Gaussian',
      'uniform ball',
      'uniform sphere',
      'beta law with b = 2.5',
      'beta-prime law with b = 3',
      'Student t with 4 degrees of freedom',
    ]);
  });

  it('accept the ends that mean something', () => {
    expect(betaLaw(-1)).toEqual(uniformSphere());
    expect(betaLaw(0)).toEqual(uniformBall());
  });

  it('refuse exponents without a density', () => {
    for (const bad of [-1.1, Number.NaN, Number.POSITIVE_INFINITY, '0', undefined]) {
      expect(() => betaLaw(bad as number)).toThrow(DomainError);
    }
    for (const bad of [0, -1, Number.NaN, undefined]) {
      expect(() => betaPrimeLaw(bad as number)).toThrow(DomainError);
      expect(() => studentT({ degreesOfFreedom: bad as number })).toThrow(DomainError);
    }
    expect(() => studentT({ df: 3 } as never)).toThrow('studentT: df must be left out');
  });

  it('resolve Student t to the beta-prime law of each dimension', () => {
    expect(checkLaw('f', studentT({ degreesOfFreedom: 3 }), all, 4)).toMatchObject(
      betaPrimeLaw(3.5),
    );
    expect(checkLaw('f', JSON.parse(JSON.stringify(gaussian())), all, 4)).toEqual(gaussian());
  });

  it('keep the degrees of freedom of Student t in any dimension', () => {
    // (degreesOfFreedom + d)/2 - d/2 would lose them
    for (const degreesOfFreedom of [1e-3, 0.1, 3.3]) {
      const law = studentT({ degreesOfFreedom });
      const line = capProbability({ d: 1, height: 2, law });
      for (const d of [2, 10, 1000, 1_000_000]) {
        expect(capProbability({ d, height: 2, law })).toEqual(line);
      }
    }
    const law = studentT({ degreesOfFreedom: 3.3 });
    const width = (d: number): number =>
      expectedHullIntrinsicVolume({ n: 50, d, k: 1, law }).log -
      expectedHullIntrinsicVolume({ n: 50, d, k: 1, law: gaussian() }).log;
    for (const d of [10, 1000, 1_000_000])
      expect(Math.abs(width(d) - width(1))).toBeLessThan(1e-14);
  });

  it('are refused where there is no formula or no density', () => {
    expect(() => checkLaw('f', uniformBall(), ['gaussian'], 2)).toThrow(
      'f: law must be gaussian() (no formula for other laws here), got uniform ball',
    );
    expect(() => checkLaw('f', betaPrimeLaw(1), all, 3)).toThrow(
      'law.b must be finite and > d/2 = 1.5',
    );
    expect(() => checkLaw('f', 'gaussian', all, 3)).toThrow('law must be a law such as gaussian()');
    expect(() => checkLaw('f', { kind: 'law', family: 'cauchy' }, all, 3)).toThrow(DomainError);
    expect(() => checkLaw('f', { kind: 'law', family: 'beta', b: -3 }, all, 3)).toThrow(
      DomainError,
    );
  });
});
