/** One valid call of every function of the conic room. */
import { orthant, ray } from 'hullgauge/conic';
import type { OptionsCall, PositionalCall, Skipped } from './types.ts';

const nd = { n: 10, d: 3 };
const weights = [0.25, 0.5, 0.25];

/** The calls by name. */
export const conicCalls: Readonly<Record<string, OptionsCall | PositionalCall | Skipped>> = {
  originInHull: { options: nd, integers: ['n', 'd'], counts: ['n'] },
  originInHullLowerBound: {
    options: { ...nd, depth: 0.3, generalPosition: true },
    integers: ['n', 'd'],
    counts: ['n'],
    optional: ['generalPosition'],
  },
  surroundTime: { options: { d: 3 }, integers: ['d'] },
  labelSeparability: {
    options: { ...nd, intercept: true },
    integers: ['n', 'd'],
    optional: ['intercept'],
  },
  logisticFitExists: {
    options: { ...nd, intercept: true },
    integers: ['n', 'd'],
    optional: ['intercept'],
  },
  dichotomyCount: {
    options: { ...nd, intercept: true },
    integers: ['n', 'd'],
    optional: ['intercept'],
  },

  arrangementRegions: {
    options: { ...nd, central: false, bounded: false },
    integers: ['n', 'd'],
    optional: ['central', 'bounded'],
  },
  arrangementFaces: {
    options: { ...nd, k: 2, central: false, bounded: false },
    integers: ['n', 'd', 'k'],
    optional: ['central', 'bounded'],
  },
  schlaefliCone: { options: nd, integers: ['n', 'd'] },
  coverEfronCone: { options: nd, integers: ['n', 'd'] },
  walkHull: { options: { steps: 20, d: 3 }, integers: ['steps', 'd'] },
  bridgeHull: { options: { steps: 20, d: 3 }, integers: ['steps', 'd'] },
  jointWalkHull: {
    options: { walks: [5, 6], bridges: [7], d: 3 },
    integers: ['d'],
    optional: ['bridges'],
    structured: ['walks', 'bridges'],
  },
  subspace: { options: { dimension: 2, ambient: 5 }, integers: ['dimension', 'ambient'] },
  ray: { skip: 'takes no arguments' },
  halfspace: { args: [3], names: ['n'], integers: ['n'] },
  orthant: { args: [3], names: ['n'], integers: ['n'] },
  circularCone: { args: [4, 0.7], names: ['n', 'angle'], integers: ['n'] },
  weylChamber: { args: ['B', 4], names: ['type', 'n'], integers: ['n'] },
  polyhedralCone: {
    args: [
      [
        [1, 0, 0],
        [0, 1, 0],
      ],
    ],
    names: ['generators'],
    structured: ['generators'],
  },
  approxPolyhedralCone: {
    args: [
      [
        [1, 0],
        [1, 1],
      ],
      { trials: 10, seed: 1 },
    ],
    names: ['generators', 'options'],
    structured: ['generators', 'options'],
  },
  productCone: { args: [orthant(2), ray()], names: ['first', 'second'] },
  polarCone: { args: [orthant(2)], names: ['cone'] },
  l1DescentCone: { options: { n: 8, sparsity: 2 }, integers: ['n', 'sparsity'] },
  linfDescentCone: { options: { n: 8, saturated: 2 }, integers: ['n', 'saturated'] },
  conesMeet: { args: [orthant(3), orthant(3)], names: ['first', 'second'] },
  coneMeetsSubspace: {
    args: [orthant(3), { codimension: 1 }],
    names: ['cone', 'options'],
    structured: ['options'],
  },
  recoverySuccess: {
    options: { model: 'l1', n: 20, sparsity: 2, measurements: 9 },
    integers: ['n', 'sparsity', 'measurements'],
  },
  recoveryBounds: { options: { cone: orthant(6), measurements: 3 }, integers: ['measurements'] },
  weakThreshold: { options: { undersampling: 0.5, model: 'l1' } },
  l1StatisticalDimension: { options: { n: 8, sparsity: 2 }, integers: ['n', 'sparsity'] },
  approxNuclearNormDimension: {
    options: { rank: 2, rows: 10, columns: 12 },
    integers: ['rank', 'rows', 'columns'],
  },
  logisticThreshold: {
    options: { signal: 1, offset: 0.5, intercept: true },
    optional: ['offset', 'intercept'],
  },
  logisticSignal: { options: { ratio: 0.3, offset: 0 }, optional: ['offset'] },
  approxSeparability: {
    options: { n: 100, d: 30, signal: 1, classShare: 0.3, intercept: true },
    integers: ['n', 'd'],
    optional: ['signal', 'classShare', 'intercept'],
  },
  chiBarSquared: {
    args: [weights, {}],
    names: ['weights', 'options'],
    optional: ['options'],
    structured: ['weights', 'options'],
  },
  eBarSquared: {
    args: [weights, { observations: 20 }],
    names: ['weights', 'options'],
    structured: ['weights', 'options'],
  },
  totalOrder: {
    args: [3, [1, 2, 3]],
    names: ['k', 'weights'],
    integers: ['k'],
    optional: ['weights'],
    structured: ['weights'],
  },
  simpleTree: {
    args: [4, { control: 2, treatment: 1 }],
    names: ['k', 'options'],
    integers: ['k'],
    optional: ['options'],
    structured: ['options'],
  },
  approxTotalOrder: {
    args: [[1, 2, 3], { trials: 10, seed: 1 }],
    names: ['weights', 'options'],
    structured: ['weights', 'options'],
  },
  reversedWeights: { args: [weights], names: ['weights'], structured: ['weights'] },
  orthantWeights: {
    options: {
      covariance: [
        [1, 0.2],
        [0.2, 1],
      ],
    },
    structured: ['covariance'],
  },
};
