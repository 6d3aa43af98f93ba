/**
 * Seeded random hulls in R^3 by a general convex-hull program: expected volume, surface, facets, heights
 * and the Hausdorff distance must lie within four standard errors of what the library says.
 */
import {
  betaLaw,
  expectedFacets,
  expectedFacetsBelow,
  expectedHullIntrinsicVolume,
  expectedHullVolume,
  facetHeight,
  gaussian,
  type Hull,
  hausdorffDistance,
  type Law,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { sampler } from 'hullgauge/data';
import quickhull from 'quickhull3d/dist/quickhull3d.js';
import { describe, expect, it } from 'vitest';

type Point = [number, number, number];

interface HullFigures {
  readonly volume: number;
  readonly surface: number;
  readonly facets: number;
  readonly heights: readonly number[];
  /** Smallest value of the support function: 1 - d_H when the centre is inside. */
  readonly depth: number;
}

const minus = (a: Point, b: Point): Point => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const dot = (a: Point, b: Point): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Point, b: Point): Point => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

function figures(points: readonly Point[]): HullFigures {
  const faces = quickhull(points);
  let volume = 0;
  let surface = 0;
  const heights: number[] = [];
  for (const face of faces) {
    const [a, b, c] = face.map((i) => points[i] as Point) as [Point, Point, Point];
    const normal = cross(minus(b, a), minus(c, a));
    const size = Math.sqrt(dot(normal, normal));
    volume += dot(a, normal) / 6;
    surface += size / 2;
    heights.push(dot(a, normal) / size);
  }
  return { volume, surface, facets: faces.length, heights, depth: Math.min(...heights) };
}

function simulate(law: Law, n: number, hull: Hull, trials: number, seed: number): HullFigures[] {
  const draw = sampler(law, { d: 3, seed });
  return Array.from({ length: trials }, () => {
    const points: Point[] = [];
    for (let i = 0; i < n; i++) {
      const [x, y, z] = draw() as unknown as Point;
      points.push([x, y, z]);
      if (hull === 'symmetric') points.push([-x, -y, -z]);
    }
    if (hull === 'withCentre') points.push([0, 0, 0]);
    return figures(points);
  });
}

/** (mean - expected) in standard errors. */
function score(values: readonly number[], expected: number): number {
  const mean = values.reduce((s, x) => s + x, 0) / values.length;
  const square = values.reduce((s, x) => s + (x - mean) ** 2, 0) / (values.length - 1);
  // on the sphere every hull has the same number of facets
  if (square === 0) return mean === expected ? 0 : Number.POSITIVE_INFINITY;
  return (mean - expected) / Math.sqrt(square / values.length);
}

const cases: readonly (readonly [string, Law, number, Hull])[] = [
  ['sphere', uniformSphere(), 12, 'plain'],
  ['ball', uniformBall(), 15, 'plain'],
  ['beta law', betaLaw(2.5), 10, 'plain'],
  ['Gaussian', gaussian(), 12, 'plain'],
  ['Student t', studentT({ degreesOfFreedom: 7 }), 12, 'plain'],
  ['sphere', uniformSphere(), 6, 'symmetric'],
  ['Gaussian', gaussian(), 6, 'symmetric'],
  ['Student t', studentT({ degreesOfFreedom: 9 }), 6, 'symmetric'],
  ['ball', uniformBall(), 5, 'withCentre'],
  ['Gaussian', gaussian(), 6, 'withCentre'],
  ['Student t', studentT({ degreesOfFreedom: 9 }), 6, 'withCentre'],
];

describe('hulls in R^3', () => {
  it.each(cases)('%s, %#', (_, law, n, hull) => {
    const trials = 700;
    const sample = simulate(law, n, hull, trials, 20_260_000 + n);
    const ask = { n, d: 3, law, hull };
    const scores = [
      score(
        sample.map((h) => h.volume),
        expectedHullVolume(ask).value,
      ),
      score(
        sample.map((h) => h.surface / 2),
        expectedHullIntrinsicVolume({ ...ask, k: 2 }).value,
      ),
      score(
        sample.map((h) => h.facets),
        expectedFacets(ask).value,
      ),
    ];
    for (const z of scores) expect(Math.abs(z)).toBeLessThan(4);
  });

  it('has the predicted heights', () => {
    const trials = 700;
    for (const [law, n] of [
      [uniformBall(), 20],
      [gaussian(), 15],
    ] as const) {
      const sample = simulate(law, n, 'plain', trials, 77);
      const height = facetHeight({ n, d: 3, law });
      for (const p of [0.1, 0.5, 0.9]) {
        const level = height.quantile(p);
        const below = sample.map((h) => h.heights.filter((x) => x <= level).length);
        const expected = expectedFacetsBelow({ n, d: 3, height: level, law }).value;
        expect(Math.abs(score(below, expected))).toBeLessThan(4);
        const excess = sample.map((h, i) => (below[i] as number) - p * h.facets);
        expect(Math.abs(score(excess, 0))).toBeLessThan(4);
      }
    }
  });

  it('lies between the proved bounds of the Hausdorff distance, near the estimate', () => {
    const n = 40;
    const trials = 700;
    const sample = simulate(uniformSphere(), n, 'plain', trials, 99);
    const distance = hausdorffDistance({ n, d: 3, law: uniformSphere() });
    for (const t of [0.35, 0.45, 0.55]) {
      const { lower, approx, upper } = distance.exceedance(t);
      const share = sample.filter((h) => 1 - h.depth > t).length / trials;
      const error = 4 * Math.sqrt((share * (1 - share)) / trials) + 1 / trials;
      expect(share).toBeGreaterThan(lower.value - error);
      expect(share).toBeLessThan(upper.value + error);
      expect(Math.abs(share - approx.value)).toBeLessThan(error + 0.01);
    }
  });
});
