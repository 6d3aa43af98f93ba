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

type Pick = (row: GammaRow) => string | undefined;
const value: Pick = (row) => row.exact;
const log: Pick = (row) => row.log;

function cases(
  fn: string,
  pick: Pick,
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

const P = (a: number, x: number): Probability => incompleteGamma(a, x);

export const incompleteGammaChecks: readonly AccuracyCheck[] = [
  {
    name: 'incompleteGamma.value',
    cases: cases('gammaP', value, normal),
    compute: (a: number, x: number) => P(a, x).value,
    measure: 'relative',
    bound: 1.6e-15,
  },
  {
    name: 'incompleteGamma.complement',
    cases: cases('gammaQ', value, normal),
    compute: (a: number, x: number) => P(a, x).complement,
    measure: 'relative',
    bound: 1.6e-15,
  },
  {
    name: 'incompleteGamma.log (small tail)',
    cases: cases('gammaP', log, isSmall),
    compute: (a: number, x: number) => P(a, x).log,
    measure: 'tail',
    bound: 5e-16,
  },
  {
    name: 'incompleteGamma.logComplement (small tail)',
    cases: cases('gammaQ', log, isSmall),
    compute: (a: number, x: number) => P(a, x).logComplement,
    measure: 'tail',
    bound: 5e-16,
  },
  {
    name: 'incompleteGamma.log (large tail)',
    cases: cases('gammaP', log, isLarge),
    compute: (a: number, x: number) => P(a, x).log,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'incompleteGamma.logComplement (large tail)',
    cases: cases('gammaQ', log, isLarge),
    compute: (a: number, x: number) => P(a, x).logComplement,
    measure: 'relative',
    bound: 2e-15,
  },
];

const wellConditioned = (row: GammaRow): boolean => (row.args[0] as number) >= 0.1;

export const inverseChecks: readonly AccuracyCheck[] = [
  {
    name: 'incompleteGammaInverse, lower tail given',
    cases: cases('gammaPInvLog', value, wellConditioned),
    compute: (a: number, logP: number) => incompleteGammaInverse(a, Probability.fromLog(logP)),
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'incompleteGammaInverse, upper tail given',
    cases: cases('gammaQInvLog', value, wellConditioned),
    compute: (a: number, logQ: number) =>
      incompleteGammaInverse(a, Probability.fromLogComplement(logQ)),
    measure: 'relative',
    bound: 5e-15,
  },
  {
    name: 'incompleteGammaInverse, a < 0.1',
    cases: cases('gammaPInvLog', value, (row) => !wellConditioned(row)),
    compute: (a: number, logP: number) => incompleteGammaInverse(a, Probability.fromLog(logP)),
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'incompleteGammaInverse, a < 0.1, upper tail given',
    cases: cases('gammaQInvLog', value, (row) => !wellConditioned(row)),
    compute: (a: number, logQ: number) =>
      incompleteGammaInverse(a, Probability.fromLogComplement(logQ)),
    measure: 'relative',
    bound: 6e-15,
  },
  {
    name: 'chiSquaredQuantile, lower tail given',
    cases: cases('chi2QuantileLogP', value),
    compute: (df: number, logP: number) => chiSquaredQuantile(Probability.fromLog(logP), df),
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'chiSquaredQuantile, upper tail given',
    cases: cases('chi2QuantileLogQ', value),
    compute: (df: number, logQ: number) =>
      chiSquaredQuantile(Probability.fromLogComplement(logQ), df),
    measure: 'relative',
    bound: 1e-15,
  },
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
/** Away from the zero of w that the table approaches to seven digits. */
const awayFromZero = (row: GammaRow): boolean => bothParts(row) && row.args[0] !== 1.9914668;

export const faddeevaChecks: readonly AccuracyCheck[] = [
  {
    name: 'faddeeva.re, error over |w|',
    cases: cases('faddeevaRe', value, awayFromZero),
    compute: (re: number, im: number) => faddeeva(re, im).re,
    measure: 'absolute',
    bound: 1e-15,
    scale: modulus,
  },
  {
    name: 'faddeeva.im, error over |w|',
    cases: cases('faddeevaIm', value, awayFromZero),
    compute: (re: number, im: number) => faddeeva(re, im).im,
    measure: 'absolute',
    bound: 1e-15,
    scale: modulus,
  },
  {
    name: 'faddeeva.im beside a zero of w',
    cases: cases('faddeevaIm', value, (row) => row.args[0] === 1.9914668),
    compute: (re: number, im: number) => faddeeva(re, im).im,
    measure: 'absolute',
    bound: 1e-15,
  },
  {
    name: 'faddeeva.re, upper half-plane',
    cases: cases('faddeevaRe', value, upper),
    compute: (re: number, im: number) => faddeeva(re, im).re,
    measure: 'relative',
    bound: 4e-15,
  },
  {
    name: 'faddeeva.im, upper half-plane',
    cases: cases('faddeevaIm', value, upper),
    compute: (re: number, im: number) => faddeeva(re, im).im,
    measure: 'relative',
    bound: 4e-15,
  },
];

const rowable = (row: GammaRow): boolean => (row.args[0] as number) <= 2000;

export const stirlingChecks: readonly AccuracyCheck[] = [
  {
    name: 'logStirling1',
    cases: cases('logStirling1', log),
    compute: logStirling1,
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'logStirlingB',
    cases: cases('logStirlingB', log),
    compute: logStirlingB,
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'logStirling1Row',
    cases: cases('logStirling1', log, rowable),
    compute: (n: number, k: number) => logStirling1Row(n)[k] as number,
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'logStirlingBRow',
    cases: cases('logStirlingB', log, rowable),
    compute: (n: number, k: number) => logStirlingBRow(n)[k] as number,
    measure: 'relative',
    bound: 1e-15,
  },
];
