/** The other special functions, against a general package where it has them, else against Math.log. */
import {
  chiSquaredCdf,
  chiSquaredQuantile,
  erf,
  erfc,
  erfcx,
  faddeeva,
  incompleteGamma,
  incompleteGammaInverse,
  logBeta,
  logBinomial,
  logBinomialPmf,
  logFactorial,
  logGamma,
  logGammaRatio,
  logNormalCdf,
  logStirling1,
  millsRatio,
  normalCdf,
  normalQuantile,
  stirlingRemainder,
} from 'hullgauge/special';
import jstat from 'jstat';
import { type BenchRow, printRows, timePerCall } from './measure.ts';

type Case = readonly [name: string, own: () => unknown, jstat?: () => unknown];

const CASES: readonly Case[] = [
  ['logGamma(2.3)', () => logGamma(2.3), () => jstat.gammaln(2.3)],
  ['logGamma(1234.5)', () => logGamma(1234.5), () => jstat.gammaln(1234.5)],
  ['logFactorial(1000)', () => logFactorial(1000), () => jstat.factorialln(1000)],
  ['logBeta(3.5, 70)', () => logBeta(3.5, 70), () => jstat.betaln(3.5, 70)],
  ['logBinomial(1000, 300)', () => logBinomial(1000, 300), () => jstat.combinationln(1000, 300)],
  ['logGammaRatio(30, 0.5)', () => logGammaRatio(30, 0.5)],
  ['stirlingRemainder(12.5)', () => stirlingRemainder(12.5)],
  ['erf(0.8)', () => erf(0.8), () => jstat.erf(0.8)],
  ['erfc(2.5)', () => erfc(2.5), () => jstat.erfc(2.5)],
  ['erfcx(10)', () => erfcx(10)],
  ['millsRatio(3)', () => millsRatio(3)],
  ['normalCdf(-3)', () => normalCdf(-3), () => jstat.normal.cdf(-3, 0, 1)],
  ['logNormalCdf(-30)', () => logNormalCdf(-30)],
  ['normalQuantile(0.975)', () => normalQuantile(0.975), () => jstat.normal.inv(0.975, 0, 1)],
  ['incompleteGamma(2.5, 3)', () => incompleteGamma(2.5, 3), () => jstat.lowRegGamma(2.5, 3)],
  [
    'incompleteGamma(1e4, 9900)',
    () => incompleteGamma(1e4, 9900),
    () => jstat.lowRegGamma(1e4, 9900),
  ],
  [
    'incompleteGammaInverse(2.5, 0.1)',
    () => incompleteGammaInverse(2.5, 0.1),
    () => jstat.gammapinv(0.1, 2.5),
  ],
  ['chiSquaredCdf(12, 10)', () => chiSquaredCdf(12, 10), () => jstat.chisquare.cdf(12, 10)],
  [
    'chiSquaredQuantile(0.95, 10)',
    () => chiSquaredQuantile(0.95, 10),
    () => jstat.chisquare.inv(0.95, 10),
  ],
  [
    'logBinomialPmf(40, 100)',
    () => logBinomialPmf(40, 100),
    () => jstat.binomial.pdf(40, 100, 0.5),
  ],
  ['faddeeva(1, 2)', () => faddeeva(1, 2)],
  ['logStirling1(50, 20)', () => logStirling1(50, 20)],
  ['logStirling1(1e12, 40)', () => logStirling1(1e12, 40)],
];

/** One row a function. */
export function benchSpecialFunctions(): void {
  let x = 1.5;
  const log = timePerCall(() => {
    x = x < 1e9 ? x * 1.0001 : 1.5;
    return Math.log(x);
  });
  const rows = CASES.map(([name, own, other]): BenchRow => {
    const time = timePerCall(own, 60);
    const note = `${(time / log).toPrecision(2)} times Math.log`;
    return { name, own: time, others: other ? { jstat: timePerCall(other, 60) } : {}, note };
  });
  printRows(
    'Special functions: time of the library, then how many times as long the other takes',
    rows,
  );
}
