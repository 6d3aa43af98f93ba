/**
 * Accuracy of the incomplete gamma functions, their inverses, the Faddeeva function and Stirling
 * numbers.
 */
import { Probability } from 'hullgauge';
import {
  chiSquaredQuantile,
  faddeeva,
  incompleteGamma,
  incompleteGammaInverse,
  logStirling1,
  logStirling1Row,
  logStirlingB,
  logStirlingBRow,
} from 'hullgauge/special';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { readTable, type SpecialRow } from '../support/reference.ts';

interface GammaRow {
  readonly fn: string;
  readonly region: string;
  readonly args: readonly number[];
  readonly exact?: string;
  readonly log?: string;
}

/** The rows of both tables in one form. */
const rows: readonly GammaRow[] = [
  ...readTable<SpecialRow>('special').map((row) => ({
    fn: row.fn,
    region: row.region,
    args: Object.values(row.args).map(Number), // some rows name their arguments
    ...(row.value === null ? {} : { exact: row.value }),
    ...(row.log === null ? {} : { log: row.log }),
  })),
  ...readTable<GammaRow>('special-gamma'),
];

type Field = (row: GammaRow) => string | undefined;
const value: Field = (row) => row.exact;
const log: Field = (row) => row.log;

function cases(
  fn: string,
  pick: Field,
  keep: (row: GammaRow) => boolean = () => true,
): readonly AccuracyCase[] {
  return rows.flatMap((row) => {
    const exact = pick(row);
    return row.fn === fn && exact !== undefined && keep(row)
      ? [{ args: row.args, exact, region: row.region }]
      : [];
  });
}

/** Values below this are subnormal or lost to underflow. */
const normal = (row: GammaRow): boolean => row.exact !== undefined && Number(row.exact) > 1e-300;
const isSmall = (row: GammaRow): boolean => Number(row.log) <= -Math.LN2;
const isLarge = (row: GammaRow): boolean =>
  !isSmall(row) && normal(row) && -Number(row.log) > 1e-300;

/** One field of {@link incompleteGamma}: P is tabulated for the lower tail, Q for the upper one. */
const ofField = (
  field: 'value' | 'complement' | 'log' | 'logComplement',
  part: string,
  keep: (row: GammaRow) => boolean,
  measure: AccuracyCheck['measure'],
  bound: number,
): AccuracyCheck => ({
  name: `incompleteGamma.${field}${part}`,
  cases: cases(
    field === 'value' || field === 'log' ? 'gammaP' : 'gammaQ',
    field === 'value' || field === 'complement' ? value : log,
    keep,
  ),
  compute: (a: number, x: number) => incompleteGamma(a, x)[field],
  measure,
  bound,
});

export const incompleteGammaChecks: readonly AccuracyCheck[] = [
  ofField('value', '', normal, 'relative', 1.6e-15),
  ofField('complement', '', normal, 'relative', 1.6e-15),
  ofField('log', ' (small tail)', isSmall, 'tail', 5e-16),
  ofField('logComplement', ' (small tail)', isSmall, 'tail', 5e-16),
  ofField('log', ' (large tail)', isLarge, 'relative', 2e-15),
  ofField('logComplement', ' (large tail)', isLarge, 'relative', 2e-15),
];

const wellConditioned = (row: GammaRow): boolean => (row.args[0] as number) >= 0.1;
const illConditioned = (row: GammaRow): boolean => !wellConditioned(row);

/** A quantile from the logarithm of one tail. */
const ofQuantile = (
  name: string,
  given: 'lower' | 'upper',
  rowsUsed: readonly AccuracyCase[],
  quantile: (shape: number, p: Probability) => number,
  bound: number,
): AccuracyCheck => ({
  name: `${name}, ${given} tail given`,
  cases: rowsUsed,
  compute: (shape: number, logTail: number) =>
    quantile(
      shape,
      given === 'lower' ? Probability.fromLog(logTail) : Probability.fromLogComplement(logTail),
    ),
  measure: 'relative',
  bound,
});

const gammaTails = {
  lower: (keep: typeof wellConditioned) => cases('gammaPInvLog', value, keep),
  upper: (keep: typeof wellConditioned) => cases('gammaQInvLog', value, keep),
};
const chiSquared = (df: number, p: Probability): number => chiSquaredQuantile(p, df);

export const inverseChecks: readonly AccuracyCheck[] = [
  ...(
    [
      ['', wellConditioned, 'lower', 1e-15],
      ['', wellConditioned, 'upper', 5e-15],
      [', a < 0.1', illConditioned, 'lower', 1e-15],
      [', a < 0.1', illConditioned, 'upper', 6e-15],
    ] as const
  ).map(([part, keep, tail, bound]) =>
    ofQuantile(
      `incompleteGammaInverse${part}`,
      tail,
      gammaTails[tail](keep),
      incompleteGammaInverse,
      bound,
    ),
  ),
  ofQuantile('chiSquaredQuantile', 'lower', cases('chi2QuantileLogP', value), chiSquared, 1e-15),
  ofQuantile('chiSquaredQuantile', 'upper', cases('chi2QuantileLogQ', value), chiSquared, 1e-15),
];

/** The real and the imaginary part of every point whose two parts are in the tables. */
const parts = new Map<string, [number?, number?]>();
for (const row of rows) {
  const index = ['faddeevaRe', 'faddeevaIm'].indexOf(row.fn);
  if (index < 0 || row.exact === undefined) continue;
  const pair = parts.get(String(row.args)) ?? [];
  pair[index] = Number(row.exact);
  parts.set(String(row.args), pair);
}
const bothParts = (row: GammaRow): boolean => {
  const [re, im] = parts.get(String(row.args)) ?? [];
  return re !== undefined && im !== undefined;
};
/** |w|, without overflow. */
function modulus(testCase: AccuracyCase): number {
  const [re = 0, im = 0] = parts.get(String(testCase.args)) ?? [];
  const larger = Math.max(Math.abs(re), Math.abs(im));
  return larger * Math.sqrt((re / larger) ** 2 + (im / larger) ** 2);
}
const upper = (row: GammaRow): boolean => (row.args[1] as number) >= 0;
/** The table approaches a zero of w to seven digits. */
const besideZero = (row: GammaRow): boolean => row.args[0] === 1.9914668;
const awayFromZero = (row: GammaRow): boolean => bothParts(row) && !besideZero(row);

const ofPart = (
  part: 're' | 'im',
  where: string,
  keep: (row: GammaRow) => boolean,
  errors: Pick<AccuracyCheck, 'measure' | 'bound' | 'scale'>,
): AccuracyCheck => ({
  name: `faddeeva.${part}${where}`,
  cases: cases(part === 're' ? 'faddeevaRe' : 'faddeevaIm', value, keep),
  compute: (re: number, im: number) => faddeeva(re, im)[part],
  ...errors,
});

const overModulus = { measure: 'absolute', bound: 1e-15, scale: modulus } as const;
const ofItself = { measure: 'relative', bound: 4e-15 } as const;

export const faddeevaChecks: readonly AccuracyCheck[] = [
  ofPart('re', ', error over |w|', awayFromZero, overModulus),
  ofPart('im', ', error over |w|', awayFromZero, overModulus),
  ofPart('im', ' beside a zero of w', besideZero, { measure: 'absolute', bound: 1e-15 }),
  ofPart('re', ', upper half-plane', upper, ofItself),
  ofPart('im', ', upper half-plane', upper, ofItself),
];

const rowable = (row: GammaRow): boolean => (row.args[0] as number) <= 2000;

export const stirlingChecks: readonly AccuracyCheck[] = (
  [
    ['logStirling1', logStirling1, undefined],
    ['logStirlingB', logStirlingB, undefined],
    ['logStirling1', (n: number, k: number) => logStirling1Row(n)[k] as number, rowable],
    ['logStirlingB', (n: number, k: number) => logStirlingBRow(n)[k] as number, rowable],
  ] as const
).map(([table, compute, keep]) => ({
  name: keep === undefined ? table : `${table}Row`,
  cases: cases(table, log, keep),
  compute,
  measure: 'relative',
  bound: 1e-15,
}));
