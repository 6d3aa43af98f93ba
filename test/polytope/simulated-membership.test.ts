/**
 * Seeded simulation by linear programs: membership and recovery must lie within four standard errors of
 * what the library says. The solver shares nothing with the library.
 */
import {
  betaLaw,
  gaussian,
  nextPointInHull,
  type Probability,
  pointInHull,
  projectedFaces,
  studentT,
} from 'hullgauge';
import { sampler } from 'hullgauge/data';
import { describe, expect, it } from 'vitest';
import { type LinearSolver, loadLinearSolver } from '../support/linear-program.ts';
import { hullProgram, recoveryProgram } from '../support/membership-program.ts';

const solve: LinearSolver = await loadLinearSolver();
const TRIALS = 400;

interface Cell {
  readonly name: string;
  readonly exact: Probability;
  /** One trial: whether the event happened. */
  readonly trial: () => boolean;
}

function inside(points: readonly ArrayLike<number>[], query: ArrayLike<number>): boolean {
  return solve(hullProgram(points, query)).status === 'optimal';
}

const many = (draw: () => Float64Array, n: number): Float64Array[] =>
  Array.from({ length: n }, draw);
const times = (x: Float64Array, s: number): Float64Array => x.map((c) => s * c);

function cells(): Cell[] {
  const draw = (
    law: Parameters<typeof sampler>[0],
    d: number,
    seed: number,
  ): (() => Float64Array) => sampler(law, { d, seed });
  const heavy = studentT({ degreesOfFreedom: 3 });
  const [a, b, c, e, f, g, h] = [
    draw(gaussian(), 4, 61),
    draw(heavy, 4, 62),
    draw(betaLaw(0.5), 3, 63),
    draw(gaussian(), 5, 64),
    draw(gaussian(), 4, 65),
    draw(gaussian(), 4, 66),
    draw(gaussian(), 10, 67),
  ];
  return [
    {
      name: 'next Gaussian point',
      exact: nextPointInHull({ n: 40, d: 4 }),
      trial: () => inside(many(a, 40), a()),
    },
    {
      name: 'next t point',
      exact: nextPointInHull({ n: 25, d: 4, law: heavy }),
      trial: () => inside(many(b, 25), b()),
    },
    {
      name: 'next beta point',
      exact: nextPointInHull({ n: 30, d: 3, law: betaLaw(0.5) }),
      trial: () => inside(many(c, 30), c()),
    },
    {
      name: 'narrow query and its mirrored sample',
      exact: nextPointInHull({ n: 8, d: 5, queryScale: 0.6, hull: 'symmetric' }),
      trial: () => {
        const points = many(e, 8);
        return inside([...points, ...points.map((x) => times(x, -1))], times(e(), 0.6));
      },
    },
    {
      name: 'wide query and a sample with its centre',
      exact: nextPointInHull({ n: 12, d: 4, queryScale: 0.8, hull: 'withCentre' }),
      trial: () => inside([...many(f, 12), new Float64Array(4)], times(f(), 0.8)),
    },
    {
      name: 'fixed query',
      exact: pointInHull({ n: 20, d: 4, mahalanobisDistance: 1.25 }),
      trial: () => inside(many(g, 20), [1.25, 0, 0, 0]),
    },
    {
      name: 'l1 recovery',
      exact: projectedFaces({ polytope: 'crosspolytope', n: 20, d: 10, k: 2 }).survival,
      // columns of the 10 x 20 matrix are points; the vector is 1 in its first three places
      trial: () => solve(recoveryProgram(many(h, 20), 3)).objective < -3 + 1e-6,
    },
  ];
}

describe('simulation by linear programs', () => {
  it.each(cells().map((cell) => [cell.name, cell] as const))('%s', (_, { exact, trial }) => {
    let hits = 0;
    for (let i = 0; i < TRIALS; i++) if (trial()) hits++;
    const deviation = Math.sqrt(TRIALS * exact.value * exact.complement);
    expect(deviation).toBeGreaterThan(5);
    expect(Math.abs(hits - TRIALS * exact.value) / deviation).toBeLessThan(4);
  });
});
