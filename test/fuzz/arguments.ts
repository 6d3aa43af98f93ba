/** Seeded generation of argument sets, sensible and absurd, for the functions of the export walk. */
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

/** Uniform numbers in [0, 1) from a seed: a 32-bit mixing generator, the same on every engine. */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

type Random = () => number;

const pick = <T>(random: Random, items: readonly T[]): T =>
  items[Math.floor(random() * items.length)] as T;

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

/** Names of parameters whose cost may grow with their value: kept to ordinary sizes. */
const SIZES: Readonly<Record<string, number>> = {
  d: 300,
  k: 200,
  r: 50,
  ambient: 300,
  dimension: 300,
  rank: 10,
  rows: 40,
  columns: 40,
  trials: 50,
  perDecade: 20,
};

const laws = [
  gaussian(),
  uniformBall(),
  uniformSphere(),
  betaLaw(-0.5),
  betaLaw(3.25),
  betaPrimeLaw(200),
  studentT({ degreesOfFreedom: 2.5 }),
];

/** A value for a parameter, by its name and a valid example. */
export function valueFor(random: Random, name: string, example: unknown, count: boolean): unknown {
  if (random() < 0.04) return pick(random, ABSURD);
  if (name === 'law') return pick(random, laws);
  if (name === 'hull') return pick(random, ['plain', 'symmetric', 'withCentre']);
  if (typeof example === 'boolean') return random() < 0.5;
  if (typeof example !== 'number') return example;
  if (name === 'p' || name === 'prob') {
    return random() < 0.3 ? Probability.fromLog(-(10 ** (6 * random() - 2))) : random();
  }
  if (Number.isInteger(example)) return wholeNumber(random, SIZES[name] ?? 2 ** 53 - 1, count);
  return realNumber(random);
}

function wholeNumber(random: Random, largest: number, count: boolean): unknown {
  const kind = random();
  if (count && kind < 0.1) return LogNumber.fromLog(10 ** (random() * 4));
  if (count && kind < 0.15) return Math.floor(10 ** (16 + 200 * random()));
  if (kind < 0.5) return Math.floor(random() * 13);
  return Math.min(largest, Math.floor(largest ** random()));
}

function realNumber(random: Random): number {
  const kind = random();
  const sign = random() < 0.8 ? 1 : -1;
  if (kind < 0.5) return sign * random();
  if (kind < 0.8) return sign * 20 * random();
  return sign * 10 ** (600 * random() - 300);
}
