/** Seeded generation of argument sets, sensible and absurd, from the rows of the export walk. */
import {
  betaLaw,
  betaPrimeLaw,
  gaussian,
  LogNumber,
  Probability,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import type { OptionsCall, PositionalCall } from '../package/bad-input.ts';

/** Uniform numbers in [0, 1). */
export type Random = () => number;

/** Uniform numbers from a seed: a 32-bit mixing generator, the same on every engine. */
export function randomFrom(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** One of the items. */
export const pick = <T>(random: Random, items: readonly T[]): T =>
  items[Math.floor(random() * items.length)] as T;

/** An integer from `low` to `high`. */
export const between = (random: Random, low: number, high: number): number =>
  low + Math.floor(random() * (high - low + 1));

/** Values that no parameter may let through as NaN. */
const ABSURD = [
  Number.NaN,
  Number.POSITIVE_INFINITY,
  Number.NEGATIVE_INFINITY,
  -0,
  -1,
  2.5,
  2 ** 53 - 1,
  2 ** 53,
  1e300,
  5e-324,
  '3',
  null,
  undefined,
] as const;

/** Largest value of parameters whose cost grows with them; of one function before those of all. */
const SIZES: Readonly<Record<string, number>> = {
  d: 300,
  k: 200,
  r: 50,
  ambient: 300,
  dimension: 300,
  rank: 10,
  rows: 40,
  columns: 40,
  perDecade: 20,
  digits: 60,
  'circularCone.n': 3000,
  'hausdorffDistance.d': 40,
  'pointInHull.d': 40,
  'halfspace.n': 3000,
  'orthant.n': 3000,
  'weylChamber.n': 300,
  'l1DescentCone.n': 60,
  'linfDescentCone.n': 3000,
  'totalOrder.k': 300,
  'simpleTree.k': 60,
  'logStirling1Row.n': 300,
  'logStirlingBRow.n': 300,
  'hullVolumeRatioDecimal.d': 12,
  'hullVolumeRatioDecimal.n': 3000,
  'dichotomyCountExact.n': 3000,
  'originInHullExact.n': 3000,
};

/** One generated value in this many may exceed the size above. */
const OVERSIZED = 300;

const CHOICES: Readonly<Record<string, readonly string[]>> = {
  hull: ['plain', 'symmetric', 'withCentre'],
  model: ['l1', 'nonnegativeL1', 'nonnegativeFeasible'],
  polytope: ['simplex', 'simplexWithOrigin', 'crosspolytope', 'cube'],
  type: ['A', 'B', 'D'],
};

/** A law of points, with formulas in few or many dimensions. */
export function lawFrom(random: Random): unknown {
  const free = 10 ** (4 * random() - 2);
  return pick(random, [
    gaussian(),
    uniformBall(),
    uniformSphere(),
    betaLaw(-0.5),
    betaLaw(free),
    betaPrimeLaw(200),
    betaPrimeLaw(free),
    studentT({ degreesOfFreedom: free }),
  ]);
}

/** The generated arguments of a function, after the row of its valid call. */
export function argumentsFor(
  random: Random,
  fn: string,
  call: OptionsCall | PositionalCall,
): unknown[] {
  if ('options' in call) {
    const options: Record<string, unknown> = {};
    for (const [key, example] of Object.entries(call.options)) {
      if (call.optional?.includes(key) && random() < 0.3) continue;
      const count = call.counts?.includes(key) ?? false;
      options[key] = valueFor(random, fn, key, example, count);
    }
    return [options];
  }
  const args: unknown[] = [];
  for (const [index, key] of call.names.entries()) {
    if (call.optional?.includes(key) && random() < 0.5) break;
    const before = args[index - 1];
    // the exact complement of the argument before, as far as a double holds it
    const complement = (key === 'y' || key === 'q') && typeof before === 'number';
    if (complement && random() < 0.9) args.push(1 - before);
    else args.push(valueFor(random, fn, key, call.args[index], false));
  }
  return args;
}

/** A value for a parameter, by its name and a valid example. */
function valueFor(
  random: Random,
  fn: string,
  name: string,
  example: unknown,
  count: boolean,
): unknown {
  if (random() < 0.04) return pick(random, ABSURD);
  if (name === 'law') return lawFrom(random);
  if (typeof example === 'string') return pick(random, CHOICES[name] ?? [example]);
  if (typeof example === 'boolean') return random() < 0.5;
  if (typeof example !== 'number') return example;
  if (name === 'p' || name === 'prob') {
    return random() < 0.3 ? Probability.fromLog(-(10 ** (6 * random() - 2))) : random();
  }
  if (Number.isInteger(example)) {
    const size = random() * OVERSIZED < 1 ? undefined : (SIZES[`${fn}.${name}`] ?? SIZES[name]);
    return wholeNumber(random, size ?? 2 ** 53 - 1, count);
  }
  return realNumber(random);
}

/** A whole number up to a largest, small ones and every order of magnitude. */
export function wholeNumber(random: Random, largest: number, count = false): number | LogNumber {
  const kind = random();
  if (count && kind < 0.1) return LogNumber.fromLog(10 ** (random() * 4));
  if (count && kind < 0.15) return Math.floor(10 ** (16 + 200 * random()));
  if (kind < 0.5) return Math.min(largest, Math.floor(random() * 13));
  return Math.min(largest, Math.floor(largest ** random()));
}

/** A real number: mostly in [0, 1), sometimes negative, sometimes far away. */
export function realNumber(random: Random): number {
  const kind = random();
  const sign = random() < 0.8 ? 1 : -1;
  if (kind < 0.5) return sign * random();
  if (kind < 0.8) return sign * 20 * random();
  return sign * 10 ** (600 * random() - 300);
}
