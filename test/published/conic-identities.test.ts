/**
 * Published values of walks, chambers, polytopes and recovery, from the sources named with each.
 */
import { bridgeHull, polyhedralCone, walkHull, weakThreshold, weylChamber } from 'hullgauge/conic';
import { expect, it } from 'vitest';

it('a symmetric walk on the line stays on one side of 0 with probability 2 binom(2n, n)/4^n', () => {
  // "On the fluctuations of sums of random variables", Mathematica Scandinavica 1 (1953)
  const table = [
    [1, 1],
    [2, 3 / 4],
    [3, 5 / 8],
    [4, 35 / 64],
    [5, 63 / 128],
    [10, 46_189 / 131_072],
  ] as const;
  for (const [steps, outside] of table) {
    expect(walkHull({ steps, d: 1 }).complement).toBeCloseTo(outside, 15);
  }
});

it('a bridge of n steps on the line stays on one side of 0 with probability 2/n', () => {
  // the ballot theorem in its cyclic form, "A direct proof of a theorem on partial sums", 1953
  for (const steps of [2, 3, 7, 100, 1e6]) {
    expect(bridgeHull({ steps, d: 1 }).complement * steps).toBeCloseTo(2, 12);
  }
});

it('the chambers of the reflection groups fill the sphere', () => {
  // orders n!, 2^n n!, 2^(n-1) n!: Regular Polytopes, Dover (1973), table of finite groups
  const order = (type: 'A' | 'B' | 'D', n: number): number =>
    1 / (weylChamber(type, n).intrinsicVolumes[n] as number);
  expect(order('A', 5)).toBeCloseTo(120, 9);
  expect(order('B', 4)).toBeCloseTo(384, 9);
  expect(order('D', 4)).toBeCloseTo(192, 9);
  expect(order('B', 8)).toBeCloseTo(10_321_920, 3);
});

it('the corners of the Platonic solids have their known solid angles', () => {
  // tetrahedron arccos(23/27), cube pi/2, octahedron 4 arcsin(1/3), in steradians; Regular Polytopes, 1973
  const steradians = (rays: number[][]): number =>
    4 * Math.PI * (polyhedralCone(rays).intrinsicVolumes[3] as number);
  const tetrahedron = [
    [1, 1, 0],
    [1, 0, 1],
    [0, 1, 1],
  ];
  expect(steradians(tetrahedron)).toBeCloseTo(Math.acos(23 / 27), 14);
  expect(
    steradians([
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]),
  ).toBeCloseTo(Math.PI / 2, 14);
  const octahedron = [
    [1, 0, 1],
    [-1, 0, 1],
    [0, 1, 1],
    [0, -1, 1],
  ];
  expect(steradians(octahedron)).toBeCloseTo(4 * Math.asin(1 / 3), 14);
});

it('the cones over the facets of the regular polytopes of dimension 4 tile it', () => {
  // 5 cells, 16 cells, 8 cells: Regular Polytopes, 1973
  const fraction = (rays: number[][]): number => polyhedralCone(rays).intrinsicVolumes[4] as number;
  const s = Math.sqrt(5);
  const simplex = [
    [1, 1, 1, -1 / s],
    [1, -1, -1, -1 / s],
    [-1, 1, -1, -1 / s],
    [-1, -1, 1, -1 / s],
    [0, 0, 0, 4 / s],
  ];
  expect(fraction(simplex.slice(1))).toBeCloseTo(1 / 5, 14);
  expect(
    fraction([
      [1, 0, 0, 0],
      [0, 1, 0, 0],
      [0, 0, 1, 0],
      [0, 0, 0, 1],
    ]),
  ).toBeCloseTo(1 / 16, 15);
  const cube = [-1, 1].flatMap((x) => [-1, 1].flatMap((y) => [-1, 1].map((z) => [x, y, z, 1])));
  expect(fraction(cube)).toBeCloseTo(1 / 8, 15);
});

it('the weak thresholds at half as many measurements as variables are .3856 and .5581', () => {
  // "Counting faces of randomly projected polytopes when the projection radically lowers dimension",
  // J. Amer. Math. Soc. 22 (2009), and its companions; both values from memory, truncated
  const limit = (model: 'l1' | 'nonnegativeL1'): number =>
    Math.floor(1e4 * weakThreshold({ undersampling: 0.5, model }).perMeasurement) / 1e4;
  expect(limit('l1')).toBe(0.3856);
  expect(limit('nonnegativeL1')).toBeGreaterThanOrEqual(0.5581);
  expect(limit('nonnegativeL1')).toBeLessThanOrEqual(0.5582);
});
