/** Accuracy of the elementary special functions: log domain, gamma family, error functions, normal law. */
import { Probability } from 'hullgauge';
import {
  erf,
  erfc,
  erfcx,
  expm1mx,
  log1mExp,
  log1pmx,
  logAddExp,
  logBeta,
  logBinomial,
  logFactorial,
  logGamma,
  logGamma1p,
  logGammaRatio,
  logNormalCdf,
  logSubExp,
  logSumExp,
  millsRatio,
  normalCdf,
  normalQuantile,
  stirlingRemainder,
} from 'hullgauge/special';
import jstat from 'jstat';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { readTable, type SpecialRow } from '../support/reference.ts';

interface ElementaryRow {
  readonly fn: string;
  readonly region: string;
  readonly args: readonly number[];
  readonly exact: string;
}

const elementaryRows = readTable<ElementaryRow>('special-elementary');
const specialRows = readTable<SpecialRow>('special');

/** Rows of `special-elementary.json`, whose arguments are positional. */
export function elementaryCases(fn: string): readonly AccuracyCase[] {
  return elementaryRows.filter((row) => row.fn === fn);
}

/** Rows of `special.json` with a result in the range of normal doubles; `field` says which column it is. */
function specialCases(fn: string, field: 'value' | 'log'): readonly AccuracyCase[] {
  return specialRows.flatMap((row) => {
    const exact = row[field];
    if (row.fn !== fn || exact === null) return [];
    if (exact !== '0.0' && !(Math.abs(Number(exact)) > 1e-307)) return [];
    return [{ args: Object.values(row.args).map(Number), exact, region: row.region }];
  });
}

/** Largest modulus among 1 and the arguments: the ruler where the rounding of a log is inherited. */
const largestArgument = ({ args }: AccuracyCase): number =>
  Math.max(1, ...(args as readonly number[]).map(Math.abs));

/**
 * How much of the relative error of a gamma ratio is due to cancellation between its two logarithms:
 * near its zeros, and where both are far larger than their difference because x is tiny.
 */
function ratioScale({ args, exact }: AccuracyCase): number {
  const [x, a] = args as readonly [number, number];
  const size = Math.abs(Number(exact));
  const logs = x < 0.125 && a > 1 ? Math.abs(Math.log(x)) / 4 : 0;
  return Math.max(1, Math.min(1, Math.abs(a)) / size, logs / size);
}

const relative = { measure: 'relative' } as const;

/** The checks. */
export const elementaryChecks: readonly AccuracyCheck[] = [
  {
    name: 'log1mExp',
    cases: [...elementaryCases('log1mExp'), ...specialCases('log1mExp', 'log')],
    compute: log1mExp,
    ...relative,
    bound: 5e-16,
  },
  {
    name: 'logAddExp',
    cases: [...elementaryCases('logAddExp'), ...specialCases('logAddExp', 'log')],
    compute: logAddExp,
    measure: 'absolute',
    scale: largestArgument,
    bound: 4e-16,
  },
  {
    name: 'logSubExp',
    cases: [...elementaryCases('logSubExp'), ...specialCases('logSubExp', 'log')],
    compute: logSubExp,
    measure: 'absolute',
    scale: (c) => Math.max(largestArgument(c), Math.abs(Number(c.exact))),
    bound: 4e-16,
  },
  {
    name: 'logSumExp',
    cases: specialCases('logSumExp', 'log'),
    compute: (...values: number[]) => logSumExp(values),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'log1pmx',
    cases: [...elementaryCases('log1pmx'), ...specialCases('log1pmx', 'value')],
    compute: log1pmx,
    ...relative,
    bound: 6e-16,
  },
  {
    name: 'expm1mx',
    cases: elementaryCases('expm1mx'),
    compute: expm1mx,
    ...relative,
    bound: 6e-16,
  },
  {
    name: 'logGamma',
    cases: [...elementaryCases('logGamma'), ...specialCases('logGamma', 'log')],
    compute: logGamma,
    jstat: jstat.gammaln,
    ...relative,
    bound: 7e-16,
  },
  {
    name: 'logGamma1p',
    cases: elementaryCases('logGamma1p'),
    compute: logGamma1p,
    ...relative,
    bound: 7e-16,
  },
  {
    name: 'logGammaRatio',
    cases: [...elementaryCases('logGammaRatio'), ...specialCases('logGammaRatio', 'log')],
    compute: logGammaRatio,
    ...relative,
    scale: ratioScale,
    bound: 4e-15,
  },
  {
    name: 'logGammaRatio, x >= 10 and a > 0',
    cases: elementaryCases('logGammaRatio').filter(
      ({ args: [x, a] }) => Number(x) >= 10 && Number(a) > 0,
    ),
    compute: logGammaRatio,
    ...relative,
    bound: 7e-16,
  },
  {
    name: 'stirlingRemainder',
    cases: [...elementaryCases('stirlingRemainder'), ...specialCases('stirlingRemainder', 'value')],
    compute: stirlingRemainder,
    ...relative,
    bound: 9e-16,
  },
  {
    name: 'logFactorial',
    cases: [
      ...elementaryCases('logFactorial'),
      ...specialCases('logFactorial', 'log').filter(({ args: [n] }) => Number.isSafeInteger(n)),
    ],
    compute: logFactorial,
    jstat: jstat.factorialln,
    ...relative,
    bound: 6e-16,
  },
  {
    name: 'logBeta',
    cases: [...elementaryCases('logBeta'), ...specialCases('logBeta', 'log')],
    compute: logBeta,
    jstat: jstat.betaln,
    measure: 'log',
    bound: 9e-16,
  },
  {
    name: 'logBinomial',
    cases: [...elementaryCases('logBinomial'), ...specialCases('logBinomial', 'log')],
    compute: logBinomial,
    jstat: jstat.combinationln,
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'erf',
    cases: [...elementaryCases('erf'), ...specialCases('erf', 'value')],
    compute: erf,
    jstat: jstat.erf,
    ...relative,
    bound: 8e-16,
  },
  {
    name: 'erfc',
    cases: [...elementaryCases('erfc'), ...specialCases('erfc', 'value')],
    compute: erfc,
    jstat: jstat.erfc,
    ...relative,
    bound: 9e-16,
  },
  {
    name: 'erfcx',
    cases: [...elementaryCases('erfcx'), ...specialCases('erfcx', 'value')],
    compute: erfcx,
    ...relative,
    bound: 7e-16,
  },
  {
    name: 'millsRatio',
    cases: [...elementaryCases('millsRatio'), ...specialCases('mills', 'value')],
    compute: millsRatio,
    ...relative,
    bound: 9e-16,
  },
  {
    name: 'normalCdf.value',
    cases: [...elementaryCases('normalCdf'), ...specialCases('normCdf', 'value')],
    compute: (x: number) => normalCdf(x).value,
    jstat: (x: number) => jstat.normal.cdf(x, 0, 1),
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'normalCdf.complement',
    cases: [
      ...elementaryCases('normalCdf').map((c) => ({ ...c, args: [-Number(c.args[0])] })),
      ...specialCases('normSf', 'value'),
    ],
    compute: (x: number) => normalCdf(x).complement,
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'normalCdf.log',
    cases: [...elementaryCases('logNormalCdf'), ...specialCases('normCdf', 'log')],
    compute: (x: number) => normalCdf(x).log,
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'normalCdf.logComplement',
    cases: specialCases('normSf', 'log'),
    compute: (x: number) => normalCdf(x).logComplement,
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'logNormalCdf',
    cases: [...elementaryCases('logNormalCdf'), ...specialCases('normCdf', 'log')],
    compute: logNormalCdf,
    ...relative,
    bound: 1e-15,
  },
  {
    name: 'normalQuantile of a number',
    cases: [...elementaryCases('normalQuantile'), ...specialCases('normQuantile', 'value')],
    compute: (p: number) => normalQuantile(p),
    jstat: (p: number) => jstat.normal.inv(p, 0, 1),
    ...relative,
    bound: 7e-16,
  },
  {
    name: 'normalQuantile of a logarithm',
    cases: [
      // Near the median a Probability is inverted from its rounded value.
      ...elementaryCases('normalQuantileOfLog').filter(
        ({ exact }) => Math.abs(Number(exact)) > 0.84,
      ),
      ...specialCases('normQuantileLog', 'value').filter(
        ({ exact }) => Math.abs(Number(exact)) > 0.84,
      ),
    ],
    compute: (log: number) => normalQuantile(Probability.fromLog(log)),
    ...relative,
    bound: 7e-16,
  },
];
