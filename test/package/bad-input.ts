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
