/** Accuracy of Wendel's formula and of the counts and bounds that rest on it. */
import {
  dichotomyCount,
  labelSeparability,
  logisticFitExists,
  originInHull,
  originInHullLowerBound,
} from 'hullgauge/conic';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

interface WendelRow {
  readonly n: string;
  readonly d: string;
  readonly small: 'in' | 'out';
  readonly log: string;
  readonly value: string | null;
  readonly complement: string;
}

const wendelRows = readTable<WendelRow>('wendel');
const conicRows = readTable<NamedRow>('conic');

/** The region of a Wendel case, by what the promise distinguishes. */
function regionOf(n: number, d: number): string {
  const smaller = Math.min(d, n - d);
  if (n <= 54) return 'n <= 54';
  if (smaller <= 300) return 'min(d, n - d) <= 300';
  return n <= 1e6 ? 'beyond, n <= 1e6' : 'beyond, n > 1e6';
}

function wendelCases(pick: (row: WendelRow) => string | null): readonly AccuracyCase[] {
  return wendelRows.flatMap((row) => {
    const exact = pick(row);
    const [n, d] = [Number(row.n), Number(row.d)];
    return exact === null ? [] : [{ args: [{ n, d }], exact, region: regionOf(n, d) }];
  });
}

const smallSide = (args: { n: number; d: number }): 'value' | 'complement' =>
  2 * args.d <= args.n ? 'complement' : 'value';

function tableCases(
  quantity: string,
  toArgs: (args: Record<string, number>) => object,
  field: 'value' | 'log' = 'value',
): readonly AccuracyCase[] {
  return conicRows
    .filter((row) => row.quantity === quantity && row[field] !== null)
    .map((row) => {
      const args = Object.fromEntries(Object.entries(row.args).map(([k, v]) => [k, Number(v)]));
      return { args: [toArgs(args)], exact: row[field] as string, region: quantity };
    });
}

const bound = (generalPosition: boolean) => (args: Record<string, number>) => ({
  n: args['n'],
  d: args['d'],
  depth: args['alpha'],
  generalPosition,
});

/** The checks. */
export const wendelChecks: readonly AccuracyCheck[] = [
  {
    name: 'originInHull smaller tail, value',
    cases: wendelCases(({ value }) => value),
    compute: (args: { n: number; d: number }) => originInHull(args)[smallSide(args)],
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'originInHull smaller tail, log',
    cases: wendelCases(({ log }) => log),
    compute: (args: { n: number; d: number }) =>
      smallSide(args) === 'value' ? originInHull(args).log : originInHull(args).logComplement,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'originInHull larger tail, value',
    cases: wendelCases(({ complement }) => complement),
    compute: (args: { n: number; d: number }) =>
      originInHull(args)[smallSide(args) === 'value' ? 'complement' : 'value'],
    measure: 'relative',
    bound: 1e-15,
  },
  {
    name: 'originInHull.complement',
    cases: tableCases('wendel.p_out', ({ n, d }) => ({ n, d })).filter(
      ({ exact }) => Number(exact) > 1e-290,
    ),
    compute: (args: { n: number; d: number }) => originInHull(args).complement,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'originInHull.value',
    cases: tableCases('wendel.p_in', ({ n, d }) => ({ n, d })).filter(
      ({ exact }) => Number(exact) > 1e-290,
    ),
    compute: (args: { n: number; d: number }) => originInHull(args).value,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'originInHull.logComplement',
    cases: tableCases('wendel.p_out', ({ n, d }) => ({ n, d }), 'log'),
    compute: (args: { n: number; d: number }) => originInHull(args).logComplement,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'originInHull.log',
    cases: tableCases('wendel.p_in', ({ n, d }) => ({ n, d }), 'log'),
    compute: (args: { n: number; d: number }) => originInHull(args).log,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'originInHullLowerBound.complement, any law',
    cases: tableCases('depth.bound_A', bound(false)),
    compute: (args: Parameters<typeof originInHullLowerBound>[0]) =>
      originInHullLowerBound(args).complement,
    measure: 'relative',
    bound: 4e-15,
  },
  {
    name: 'originInHullLowerBound.complement, general position',
    cases: tableCases('depth.bound_B', bound(true)),
    compute: (args: Parameters<typeof originInHullLowerBound>[0]) =>
      originInHullLowerBound(args).complement,
    measure: 'relative',
    bound: 6e-15,
  },
  {
    name: 'labelSeparability.value',
    cases: tableCases('cover.p_separable_affine', ({ n, d }) => ({ n, d })),
    compute: (args: { n: number; d: number }) => labelSeparability(args).value,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'logisticFitExists.value',
    cases: tableCases('logit.p_mle_exists_noise', ({ n, p_total }) => ({
      n,
      d: (p_total as number) - 1,
    })),
    compute: (args: { n: number; d: number }) => logisticFitExists(args).value,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'dichotomyCount.log, through the origin',
    cases: tableCases('cover.count_homogeneous', ({ n, d }) => ({ n, d, intercept: false }), 'log'),
    compute: (args: { n: number; d: number }) => dichotomyCount(args).log,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'dichotomyCount.log, with intercept',
    cases: tableCases('cover.count_affine', ({ n, d }) => ({ n, d }), 'log'),
    compute: (args: { n: number; d: number }) => dichotomyCount(args).log,
    measure: 'log',
    bound: 2e-15,
  },
];
