/** One valid call of every function of the data room. */
import { gaussian } from 'hullgauge';
import type { OptionsCall, PositionalCall, Skipped } from './types.ts';

const triangle = [
  [0, 0],
  [1, 0],
  [0, 1],
];

/** The calls by name. */
export const dataCalls: Readonly<Record<string, OptionsCall | PositionalCall | Skipped>> = {
  inHull: {
    args: [triangle, [0.2, 0.2], { tolerance: 1e-9 }],
    names: ['points', 'query', 'options'],
    optional: ['options'],
    structured: ['points', 'query', 'options'],
  },
  hullVertices: {
    args: [triangle, {}],
    names: ['points', 'options'],
    optional: ['options'],
    structured: ['points', 'options'],
  },
  separable: {
    args: [triangle, [0, 1, 1], {}],
    names: ['points', 'labels', 'options'],
    optional: ['options'],
    structured: ['points', 'labels', 'options'],
  },
  interpolationAudit: {
    args: [triangle, {}],
    names: ['points', 'options'],
    optional: ['options'],
    structured: ['points', 'options'],
  },
  InterpolationAudit: { skip: 'a class; test/data/interpolation-audit.test.ts' },
  sampler: {
    args: [gaussian(), { d: 2, seed: 1 }],
    names: ['law', 'options'],
    structured: ['law', 'options'],
  },
  simulate: {
    args: [() => true, { n: 3, d: 2, law: gaussian(), trials: 2, seed: 1 }],
    names: ['event', 'options'],
    structured: ['event', 'options'],
  },
};
