/** originInHull against a general package's binomial cdf, the naive sum and exact integers. */
import { originInHull } from 'hullgauge';
import jstat from 'jstat';
import { type BenchRow, printRows, timePerCall } from './measure.ts';

/** The textbook formula: a loop over binomial coefficients in doubles. */
function naive(n: number, d: number): number {
  let term = 2 ** -(n - 1);
  let sum = 0;
  for (let k = 0; k < d; k++) {
    sum += term;
    term = (term * (n - 1 - k)) / (k + 1);
  }
  return 1 - sum;
}

/** The exact numerator over 2^(n-1). */
function exact(n: number, d: number): bigint {
  let term = 1n;
  let sum = 0n;
  for (let k = 0n; k < BigInt(d); k++) {
    sum += term;
    term = (term * (BigInt(n) - 1n - k)) / (k + 1n);
  }
  return (1n << BigInt(n - 1)) - sum;
}

const ratioOf = (numerator: bigint, bits: number): number =>
  Number((numerator << 64n) >> BigInt(bits)) / 2 ** 64;

const relative = (x: number, truth: number): string =>
  Number.isFinite(x) ? Math.abs(x / truth - 1).toExponential(1) : String(x);

/** Times and errors at d slightly above n/2, one standard deviation from the tie. */
export function benchWendel(): void {
  const rows: BenchRow[] = [];
  for (const n of [100, 1e4, 1e6, 1e12]) {
    const d = Math.round(n / 2 + Math.sqrt(n) / 2);
    const own = originInHull({ n, d }).value;
    const small = n <= 1e4;
    const truth = small ? ratioOf(exact(n, d), n - 1) : own;
    const others: Record<string, number> = {};
    others['jstat'] = timePerCall(() => jstat.binomial.cdf(d - 1, n - 1, 0.5));
    if (n <= 1e6) others['naive sum'] = timePerCall(() => naive(n, d));
    if (small) others['BigInt'] = timePerCall(() => exact(n, d));
    const errors = [
      `error own ${small ? relative(own, truth) : 'reference'}`,
      `jstat ${relative(1 - jstat.binomial.cdf(d - 1, n - 1, 0.5), truth)}`,
      ...(n <= 1e6 ? [`naive ${relative(naive(n, d), truth)}`] : []),
    ];
    rows.push({
      name: `originInHull n = ${n}, d = ${d}`,
      own: timePerCall(() => originInHull({ n, d })),
      others,
      note: errors.join(', '),
    });
  }
  printRows('Wendel: time of the library, then how many times as long the others take', rows);
}
