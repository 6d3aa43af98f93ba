/** Rows of `test/reference/polytope.json` as accuracy cases. */
import { betaLaw, betaPrimeLaw, gaussian, type Law, LogNumber } from 'hullgauge';
import type { ResolvedCount } from '../../src/count.ts';
import type { AccuracyCase } from './accuracy.ts';
import { type NamedRow, readTable } from './reference.ts';

/** Arguments of a row; heights and shares are exact decimals as strings. */
export interface RowArgs {
  readonly d: number;
  readonly k?: number;
  readonly r?: number;
  readonly n?: number;
  readonly logn?: number;
  readonly beta?: number;
  readonly h?: string;
  readonly x?: number;
  readonly power?: number;
  readonly logCapProb?: number;
  readonly p?: string;
  readonly complement?: string;
}

let table: readonly NamedRow[] | undefined;

/** The rows of a quantity. */
export function rowsOf(...quantities: readonly string[]): readonly NamedRow[] {
  table ??= readTable<NamedRow>('polytope');
  return table.filter((row) => quantities.includes(row.quantity));
}

/** Cases of one field of the rows that `keep` accepts. */
export function casesOf(
  quantities: readonly string[],
  field: 'value' | 'log' | 'complement',
  region: (row: NamedRow) => string | null,
): readonly AccuracyCase[] {
  const cases: AccuracyCase[] = [];
  for (const row of rowsOf(...quantities)) {
    const name = region(row);
    const exact = row[field];
    if (name !== null && exact !== null && exact !== undefined) {
      cases.push({ args: [row.args], exact, region: name });
    }
  }
  return cases;
}

/** The law of a row. */
export function lawOf(quantity: 'beta' | 'betaPrime' | 'gaussian', args: RowArgs): Law {
  if (quantity === 'gaussian') return gaussian();
  return quantity === 'beta' ? betaLaw(args.beta ?? 0) : betaPrimeLaw(args.beta ?? 0);
}

/** The count of a row: an integer, or a logarithm that need not be that of one. */
export function countOf(args: RowArgs): number | LogNumber {
  return args.n ?? LogNumber.fromLog(logOf(args));
}

/** log n; for rows at the phase transition n = (k / 2x)^(d/2 + beta). */
export function logOf(args: RowArgs): number {
  if (args.n !== undefined) return Math.log(args.n);
  if (args.logn !== undefined) return args.logn;
  const k = args.k ?? args.d;
  return (args.d / 2 + (args.beta ?? 0)) * Math.log(k / (2 * (args.x ?? 1)));
}

/** The same as kernels take it, without rounding to an integer. */
export function resolvedOf(args: RowArgs): ResolvedCount {
  const log = logOf(args);
  return { n: args.n ?? Math.exp(log), log };
}
