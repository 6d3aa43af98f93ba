/**
 * Every exported function with one valid call: the test beside this file replaces each argument by bad
 * ones and expects a DomainError that names it.
 */
import { gaussian } from 'hullgauge';
import { conicCalls } from './calls/conic.ts';
import { dataCalls } from './calls/data.ts';
import { polytopeCalls } from './calls/polytope.ts';
import { preciseCalls } from './calls/precise.ts';
import { specialCalls } from './calls/special.ts';
import type { OptionsCall, PositionalCall, Skipped } from './calls/types.ts';

export type { OptionsCall, PositionalCall, Skipped };

const nd = { n: 10, d: 3 };

/** The calls by exported name. */
export const calls: Readonly<Record<string, OptionsCall | PositionalCall | Skipped>> = {
  // Root: result types and laws.
  Probability: { skip: 'a class; test/probability.test.ts' },
  LogNumber: { skip: 'a class; test/log-number.test.ts' },
  DomainError: { skip: 'the error itself; test/domain.test.ts' },
  gaussian: { skip: 'takes no arguments' },
  uniformBall: { skip: 'takes no arguments' },
  uniformSphere: { skip: 'takes no arguments' },
  betaLaw: { args: [0.5], names: ['b'] },
  betaPrimeLaw: { args: [3], names: ['b'] },
  studentT: { options: { degreesOfFreedom: 3 } },

  ...specialCalls,
  ...conicCalls,
  ...polytopeCalls,
  ...dataCalls,
  ...preciseCalls,

  // Conic: logistic fits with signal, order-restricted tests.
  logisticThreshold: {
    options: { signal: 2, offset: 0, intercept: true },
    optional: ['offset', 'intercept'],
  },
  logisticSignal: { options: { ratio: 0.2, offset: 1 }, optional: ['offset'] },
  approxSeparability: {
    options: { ...nd, signal: 1, classShare: 0.3, intercept: true },
    integers: ['n', 'd'],
    optional: ['signal', 'classShare', 'intercept'],
  },
  chiBarSquared: { args: [[0.5, 0.5]], names: ['weights'] },
  eBarSquared: {
    args: [[0.5, 0.5], { observations: 10 }],
    names: ['weights', 'options'],
    structured: ['options'],
  },
  totalOrder: {
    args: [3, [1, 2, 3]],
    names: ['k', 'weights'],
    integers: ['k'],
    optional: ['weights'],
  },
  approxTotalOrder: {
    args: [[1, 2, 3], { trials: 10, seed: 1 }],
    names: ['weights', 'options'],
    structured: ['options'],
  },
  simpleTree: {
    args: [3, { control: 2, treatment: 1 }],
    names: ['k', 'options'],
    integers: ['k'],
    optional: ['options'],
    structured: ['options'],
  },
  reversedWeights: { args: [[0.5, 0.5]], names: ['weights'] },
  orthantWeights: { options: { covariance: [[1]] } },

  // Plan.
  smallest: { skip: 'takes a function; test/plan/smallest.test.ts' },
  largest: { skip: 'takes a function; test/plan/smallest.test.ts' },
  sizingReport: {
    options: { ...nd, law: gaussian(), targets: [0.5] },
    integers: ['n', 'd'],
    counts: ['n'],
    optional: ['n', 'law', 'targets'],
    structured: ['law', 'targets'],
  },
  logSpaced: { args: [1, 100, 3], names: ['from', 'to', 'perDecade'], integers: ['perDecade'] },

  // Notebook.
  chart: { skip: 'takes a function; test/notebook/chart.test.ts' },
  sizingChart: { skip: 'takes a report; test/notebook/chart.test.ts' },
};
