/**
 * Accuracy of the incomplete beta function and the binomial law, of their logarithms and inverses.
 */
import { Probability } from 'hullgauge';
import {
  binomialCdf,
  binomialQuantile,
  incompleteBeta,
  incompleteBetaInverse,
  logBinomialPmf,
} from 'hullgauge/special';
import jstat from 'jstat';
import { fairBinomialTail } from '../../src/special/fair-binomial.ts';
import { TAIL_SLOTS } from '../../src/special/tail-result.ts';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { readTable } from '../support/reference.ts';

interface TableRow {
  readonly fn: string;
  readonly args: Readonly<Record<string, string>>;
  readonly value: string | null;
  readonly log: string | null;
  readonly logY?: string;
  readonly region: string;
}

interface OwnRow {
  readonly fn: string;
  readonly args: readonly string[];
  readonly exact?: string;
  readonly log?: string;
  readonly region: string;
}

const table = readTable<TableRow>('special');
const own = readTable<OwnRow>('special-beta');

/** Cases of one function of the table; `pick` gives the exact result or nothing. */
function cases(
  fn: string,
  names: readonly string[],
  pick: (row: TableRow) => string | null | undefined,
): readonly AccuracyCase[] {
  return table.flatMap((row) => {
    const exact = row.fn === fn ? pick(row) : undefined;
    return exact === null || exact === undefined
      ? []
      : [{ args: names.map((name) => Number(row.args[name])), exact, region: row.region }];
  });
}

const LOG_HALF = -0.69;
const normalValue = ({ value }: TableRow): string | null =>
  value !== null && Number(value) > 1e-300 ? value : null;
/** The logarithm of a tail of at most one half. */
const smallLog = ({ log }: TableRow): string | null =>
  log !== null && Number(log) < LOG_HALF ? log : null;
/** The logarithm of a tail beyond one half: as good, relatively, as the smaller tail. */
const largeLog = ({ log }: TableRow): string | null =>
  log !== null && Number(log) >= LOG_HALF && Number(log) < -1e-290 ? log : null;

interface Family {
  readonly fn: string;
  readonly name: string;
  readonly names: readonly string[];
  readonly of: (...args: never[]) => Probability;
  readonly upper: boolean;
  /** The value by a general package, where it takes these arguments. */
  readonly jstat?: (...args: never[]) => number;
}

const beta = (a: number, b: number, x: number): Probability => incompleteBeta(a, b, x);
const betaPair = (a: number, b: number, x: number, y: number): Probability =>
  incompleteBeta(a, b, x, y);
const binomial = (n: number, k: number, p: number): Probability => binomialCdf(k, n, p);

const jstatBeta = (a: number, b: number, x: number): number => jstat.ibeta(x, a, b);
const jstatBinomial = (n: number, k: number, p: number): number => jstat.binomial.cdf(k, n, p);

const families: readonly Family[] = [
  {
    fn: 'ibeta',
    name: 'incompleteBeta',
    names: ['a', 'b', 'x'],
    of: beta,
    upper: false,
    jstat: jstatBeta,
  },
  { fn: 'ibetac', name: 'incompleteBeta', names: ['a', 'b', 'x'], of: beta, upper: true },
  {
    fn: 'ibetaXY',
    name: 'incompleteBeta(x, y)',
    names: ['a', 'b', 'x', 'y'],
    of: betaPair,
    upper: false,
  },
  {
    fn: 'ibetacXY',
    name: 'incompleteBeta(x, y)',
    names: ['a', 'b', 'x', 'y'],
    of: betaPair,
    upper: true,
  },
  {
    fn: 'binomCdf',
    name: 'binomialCdf',
    names: ['n', 'k', 'p'],
    of: binomial,
    upper: false,
    jstat: jstatBinomial,
  },
  { fn: 'binomSf', name: 'binomialCdf', names: ['n', 'k', 'p'], of: binomial, upper: true },
];

const tailChecks = families.flatMap(
  ({ fn, name, names, of, upper, jstat: other }): readonly AccuracyCheck[] => {
    const value = (...args: never[]): number =>
      upper ? of(...args).complement : of(...args).value;
    const log = (...args: never[]): number => (upper ? of(...args).logComplement : of(...args).log);
    const field = upper ? 'complement' : 'value';
    const logField = upper ? 'logComplement' : 'log';
    return [
      {
        name: `${name}.${field}`,
        cases: cases(fn, names, normalValue),
        compute: value,
        measure: 'relative',
        bound: 1.5e-15,
        ...(other === undefined ? {} : { jstat: other }),
      },
      {
        name: `${name}.${logField}, smaller tail`,
        cases: cases(fn, names, smallLog),
        compute: log,
        measure: 'tail',
        bound: 4e-16,
      },
      {
        name: `${name}.${logField}, larger tail`,
        cases: cases(fn, names, largeLog),
        compute: log,
        measure: 'relative',
        bound: 1.5e-15,
      },
    ];
  },
);

const OWN_COLUMNS = { betaTail: 4, fairTail: 2, betaInverse: 3 } as const;

/** Cases of the denser table, those of one side; the numbers come first in its arguments. */
function ownCases(
  fn: keyof typeof OWN_COLUMNS,
  side: 'lower' | 'upper',
  field: 'exact' | 'log',
): readonly AccuracyCase[] {
  const columns = OWN_COLUMNS[fn];
  return own.flatMap((row) => {
    const exact = row[field];
    return row.fn === fn && row.args[columns] === side && exact !== undefined
      ? [{ args: row.args.slice(0, columns).map(Number), exact, region: row.region }]
      : [];
  });
}

const sides = ['lower', 'upper'] as const;

const denseChecks = sides.flatMap((side): readonly AccuracyCheck[] => [
  {
    name: `incompleteBeta.${side === 'lower' ? 'value' : 'complement'}, by region`,
    cases: ownCases('betaTail', side, 'exact'),
    compute: (...args: [number, number, number, number]): number =>
      side === 'lower' ? incompleteBeta(...args).value : incompleteBeta(...args).complement,
    measure: 'relative',
    bound: 1.5e-15,
  },
  {
    name: `incompleteBeta.${side === 'lower' ? 'log' : 'logComplement'}, by region`,
    cases: ownCases('betaTail', side, 'log'),
    compute: (...args: [number, number, number, number]): number =>
      side === 'lower' ? incompleteBeta(...args).log : incompleteBeta(...args).logComplement,
    measure: 'tail',
    bound: 4e-16,
  },
]);

const work = new Float64Array(TAIL_SLOTS);

const fairChecks = sides.flatMap((side): readonly AccuracyCheck[] => [
  {
    name: `fair binomial tail, ${side}`,
    cases: ownCases('fairTail', side, 'exact'),
    compute: (n: number, k: number): number =>
      fairBinomialTail(n, k, work) === (side === 'lower') ? (work[0] as number) : Number.NaN,
    measure: 'relative',
    bound: 1.2e-15,
  },
  {
    name: `log of fair binomial tail, ${side}`,
    cases: ownCases('fairTail', side, 'log'),
    compute: (n: number, k: number): number =>
      fairBinomialTail(n, k, work) === (side === 'lower') ? (work[1] as number) : Number.NaN,
    measure: 'tail',
    bound: 4e-16,
  },
]);

export const tailsChecks: readonly AccuracyCheck[] = [
  ...tailChecks,
  ...denseChecks,
  ...fairChecks,
  {
    name: 'logBinomialPmf',
    cases: cases('binomPmf', ['k', 'n', 'p'], ({ log }) => log),
    compute: (k: number, n: number, p: number): number => logBinomialPmf(k, n, p),
    measure: 'log',
    bound: 6e-16,
  },
];

const given = (log: number, side: 'lower' | 'upper'): Probability =>
  side === 'lower' ? Probability.fromLog(log) : Probability.fromLogComplement(log);

const tableInverse = sides.flatMap((side): readonly AccuracyCheck[] => {
  const fn = side === 'lower' ? 'ibetaInvLog' : 'ibetacInvLog';
  const names = ['a', 'b', side === 'lower' ? 'logP' : 'logQ'];
  const normalX = ({ value }: TableRow): string | null =>
    value !== null && Number(value) > 1e-300 ? value : null;
  return [
    {
      name: `incompleteBetaInverse.x, ${side} tail given`,
      cases: cases(fn, names, normalX),
      compute: (a: number, b: number, log: number): number =>
        incompleteBetaInverse(a, b, given(log, side)).x,
      measure: 'relative',
      bound: 3e-15,
    },
    {
      name: `incompleteBetaInverse.logX, ${side} tail given`,
      cases: cases(fn, names, ({ log }) => log),
      compute: (a: number, b: number, log: number): number =>
        incompleteBetaInverse(a, b, given(log, side)).logX,
      measure: 'log',
      bound: 1e-15,
    },
    {
      name: `incompleteBetaInverse.logY, ${side} tail given`,
      cases: cases(fn, names, ({ logY }) => (logY === '0.0' ? undefined : logY)),
      compute: (a: number, b: number, log: number): number =>
        incompleteBetaInverse(a, b, given(log, side)).logY,
      measure: 'log',
      bound: 1e-15,
    },
    {
      name: `incompleteBetaInverse, logit, ${side} tail given`,
      cases: ownCases('betaInverse', side, 'exact'),
      compute: (a: number, b: number, log: number): number => {
        const { logX, logY } = incompleteBetaInverse(a, b, given(log, side));
        return logX - logY;
      },
      measure: 'log',
      bound: 2e-15,
    },
  ];
});

export const inverseChecks: readonly AccuracyCheck[] = [
  ...tableInverse,
  {
    name: 'binomialQuantile',
    cases: table
      .filter(({ fn }) => fn === 'binomQuantileLog')
      .map(({ args, value, region }) => ({
        args: [Number(args['logProb']), Number(args['n']), Number(args['p'])],
        exact: value as string,
        region,
      })),
    compute: (log: number, n: number, p: number): number =>
      binomialQuantile(Probability.fromLog(log), n, p),
    measure: 'absolute',
    bound: 0,
  },
];
