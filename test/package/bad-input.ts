/**
 * Every exported function with one valid call: the test beside this file replaces each argument by bad
 * ones and expects a DomainError that names it.
 */
import { gaussian } from 'hullgauge';

/** A valid call of a function with one options object. */
export interface OptionsCall {
  readonly options: Readonly<Record<string, unknown>>;
  /** Options that must be whole numbers. */
  readonly integers?: readonly string[];
  /** Options that are Counts: 2^53 and LogNumber are welcome. */
  readonly counts?: readonly string[];
  /** Options that may be left out. */
  readonly optional?: readonly string[];
  /** Options that take objects or arrays, to which only the primitives among the bad values apply. */
  readonly structured?: readonly string[];
}

/** A valid call of a function with positional arguments. */
export interface PositionalCall {
  readonly args: readonly unknown[];
  /** Names of the arguments, in order. */
  readonly names: readonly string[];
  readonly integers?: readonly string[];
  readonly optional?: readonly string[];
  readonly structured?: readonly string[];
}

/** A function that the walk leaves out, and why. */
export interface Skipped {
  readonly skip: string;
}

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

  // Conic.
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
};
