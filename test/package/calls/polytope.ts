/** One valid call of every function of the polytope and intrinsic rooms. */
import { gaussian, uniformBall } from 'hullgauge';
import { cube } from 'hullgauge/intrinsic';
import type { OptionsCall, PositionalCall, Skipped } from './types.ts';

const nd = { n: 10, d: 3 };
const count = { integers: ['n', 'd'], counts: ['n'] };

/** The calls by name. */
export const polytopeCalls: Readonly<Record<string, OptionsCall | PositionalCall | Skipped>> = {
  hullVolumeRatio: {
    options: { ...nd, law: uniformBall(), hull: 'plain' },
    ...count,
    optional: ['hull'],
    structured: ['law'],
  },
  hullIntrinsicVolumeRatio: {
    options: { ...nd, k: 2, law: uniformBall(), hull: 'plain' },
    integers: ['n', 'd', 'k'],
    counts: ['n'],
    optional: ['hull'],
    structured: ['law'],
  },
  expectedHullVolume: {
    options: { ...nd, law: uniformBall(), hull: 'plain' },
    ...count,
    optional: ['hull'],
    structured: ['law'],
  },
  expectedHullIntrinsicVolume: {
    options: { ...nd, k: 2, law: uniformBall(), hull: 'plain' },
    integers: ['n', 'd', 'k'],
    counts: ['n'],
    optional: ['hull'],
    structured: ['law'],
  },
  expectedFacets: {
    options: { ...nd, law: gaussian(), hull: 'plain' },
    ...count,
    optional: ['hull'],
    structured: ['law'],
  },
  expectedFaces: {
    options: { ...nd, k: 1, law: gaussian(), hull: 'plain' },
    integers: ['n', 'd', 'k'],
    counts: ['n'],
    optional: ['hull'],
    structured: ['law'],
  },
  expectedVertices: {
    options: { ...nd, law: gaussian(), hull: 'plain' },
    ...count,
    optional: ['hull'],
    structured: ['law'],
  },
  nextPointInHull: {
    options: { ...nd, law: gaussian(), queryScale: 1, hull: 'plain' },
    ...count,
    optional: ['law', 'queryScale', 'hull'],
    structured: ['law'],
  },
  pointInHull: { options: { ...nd, mahalanobisDistance: 1 }, ...count },
  queriesInHull: {
    options: { ...nd, mahalanobisDistances: [0.5, 1] },
    ...count,
    structured: ['mahalanobisDistances'],
  },
  facetHeight: { options: { ...nd, law: gaussian() }, ...count, structured: ['law'] },
  expectedFacetsBelow: {
    options: { ...nd, height: 0.5, law: gaussian() },
    ...count,
    structured: ['law'],
  },
  hausdorffDistance: { options: { ...nd, law: uniformBall() }, ...count, structured: ['law'] },
  hausdorffWithin: {
    options: { ...nd, distance: 0.5, law: uniformBall() },
    ...count,
    structured: ['law'],
  },
  heightLimit: { options: nd, ...count },
  approxVolumeThreshold: {
    options: { d: 3, k: 2, law: uniformBall(), share: 0.5 },
    integers: ['d', 'k'],
    optional: ['k', 'share'],
    structured: ['law'],
  },
  simplexVolume: {
    options: { d: 3, r: 2, law: gaussian() },
    integers: ['d', 'r'],
    optional: ['r'],
    structured: ['law'],
  },
  projectedFaces: {
    options: { polytope: 'simplex', n: 10, d: 5, k: 1 },
    integers: ['n', 'd', 'k'],
  },
  capProbability: {
    options: { d: 3, height: 0.5, law: uniformBall() },
    integers: ['d'],
    structured: ['law'],
  },

  ballVolume: { args: [3, 2], names: ['d', 'radius'], integers: ['d'], optional: ['radius'] },
  sphereArea: { args: [3, 2], names: ['d', 'radius'], integers: ['d'], optional: ['radius'] },
  flagCoefficient: { args: [3, 2], names: ['d', 'k'], integers: ['d', 'k'] },
  ball: { options: { d: 3, radius: 2 }, integers: ['d'], optional: ['radius'] },
  cube: { options: { d: 3, side: 2 }, integers: ['d'], optional: ['side'] },
  box: { args: [[1, 2]], names: ['sides'], structured: ['sides'] },
  regularSimplex: { options: { d: 3, edge: 2 }, integers: ['d'], optional: ['edge'] },
  crossPolytope: { options: { d: 3, scale: 2 }, integers: ['d'], optional: ['scale'] },
  ellipsoid: { options: { semiAxes: [1, 2] }, structured: ['semiAxes'] },
  steinerVolume: { args: [cube({ d: 3 }), 1], names: ['body', 'distance'] },
  meanWidth: { args: [cube({ d: 3 })], names: ['body'] },
  surfaceArea: { args: [cube({ d: 3 })], names: ['body'] },
};
