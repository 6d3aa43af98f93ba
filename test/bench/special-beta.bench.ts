/** Binomial tails, the incomplete beta function and its inverse against a general package. */
import {
  binomialCdf,
  binomialQuantile,
  incompleteBeta,
  incompleteBetaInverse,
} from 'hullgauge/special';
import jstat from 'jstat';
import { type BenchRow, printRows, timePerCall } from './measure.ts';

/** Fair tails at the mean and one, two and three standard deviations below it. */
export function benchBinomialTails(): void {
  const rows: BenchRow[] = [];
  for (const n of [20, 100, 400, 1e4, 1e6, 1e9, 1e15]) {
    for (const z of [0, 1, 2, 3]) {
      const k = Math.floor(n / 2 - (z * Math.sqrt(n)) / 2);
      rows.push({
        name: `binomialCdf n = ${n}, z = -${z}`,
        own: timePerCall(() => binomialCdf(k, n)),
        others: { jstat: timePerCall(() => jstat.binomial.cdf(k, n, 0.5)) },
      });
    }
  }
  for (const n of [100, 1e4, 1e6, 1e9]) {
    const k = Math.floor(0.3 * n - Math.sqrt(0.21 * n));
    rows.push({
      name: `binomialCdf n = ${n}, p = 0.3, z = -1`,
      own: timePerCall(() => binomialCdf(k, n, 0.3)),
      others: { jstat: timePerCall(() => jstat.binomial.cdf(k, n, 0.3)) },
    });
  }
  printRows(
    'Binomial tails: time of the library, then how many times as long the other takes',
    rows,
  );
}

/** One standard deviation below the mean, for shapes of several sizes. */
export function benchIncompleteBeta(): void {
  const rows: BenchRow[] = [];
  for (const [a, b] of [
    [0.5, 0.5],
    [2.5, 30],
    [30, 40],
    [300, 500],
    [1e4, 3e4],
    [0.5, 1e6],
  ] as const) {
    const nu = a + b;
    const x = (a / nu) * Math.exp(-Math.sqrt((b / nu) * (1 / a)));
    rows.push({
      name: `incompleteBeta a = ${a}, b = ${b}`,
      own: timePerCall(() => incompleteBeta(a, b, x)),
      others: { jstat: timePerCall(() => jstat.ibeta(x, a, b)) },
    });
    rows.push({
      name: `incompleteBetaInverse a = ${a}, b = ${b}, p = 0.1`,
      own: timePerCall(() => incompleteBetaInverse(a, b, 0.1)),
      others: { jstat: timePerCall(() => jstat.ibetainv(0.1, a, b)) },
    });
  }
  for (const n of [100, 1e6, 1e15]) {
    rows.push({
      name: `binomialQuantile n = ${n}, prob = 0.01`,
      own: timePerCall(() => binomialQuantile(0.01, n)),
      others: {},
    });
  }
  printRows('Incomplete beta function and inverses', rows);
}
