/** hullVolumeRatio and its inverse against adaptive quadrature of the classical integral. */
import {
  expectedFacets,
  facetHeight,
  hausdorffWithin,
  hullVolumeRatio,
  LogNumber,
  simplexVolume,
  smallest,
  uniformBall,
} from 'hullgauge';
import { ballVolume } from 'hullgauge/intrinsic';
import { incompleteBeta, logBinomial, logGammaRatio } from 'hullgauge/special';
import { integrateSmooth } from '../../src/numeric/gauss-legendre.ts';
import { type BenchRow, printRows, timePerCall } from './measure.ts';

/**
 * The textbook formula: binom(n, d + 1) E vol(simplex) / vol(ball) times the integral of
 * c_q (1 - h^2)^q F(h)^(n - d - 1), by adaptive quadrature with 60 points a panel,
 * to a tolerance of 1e-9.
 */
function classical(n: number, d: number): number {
  const law = uniformBall();
  const b = (d - 1) / 2;
  const q = (d + 1) * b + d;
  const front =
    logBinomial(n, d + 1) +
    simplexVolume({ d, law }).moment(1).log -
    ballVolume(d).log +
    logGammaRatio(q + 1, 0.5) -
    0.5 * Math.log(Math.PI);
  const integrand = (h: number): number => {
    const w = (1 - h) * (1 + h);
    if (w <= 0) return 0;
    const half = incompleteBeta(b + 1, 0.5, w, h * h).value / 2;
    const logF = h >= 0 ? Math.log1p(-half) : Math.log(half);
    return Math.exp(front + q * Math.log(w) + (n - d - 1) * logF);
  };
  const sixty = (a: number, e: number): number => {
    const third = (e - a) / 3;
    return (
      integrateSmooth(integrand, a, a + third) +
      integrateSmooth(integrand, a + third, a + 2 * third) +
      integrateSmooth(integrand, a + 2 * third, e)
    );
  };
  const adapt = (a: number, e: number, whole: number, depth: number): number => {
    const middle = 0.5 * (a + e);
    const left = sixty(a, middle);
    const right = sixty(middle, e);
    if (depth === 0 || Math.abs(left + right - whole) < 1e-9 * Math.abs(whole) + 1e-300) {
      return left + right;
    }
    return adapt(a, middle, left, depth - 1) + adapt(middle, e, right, depth - 1);
  };
  return adapt(-1, 1, sixty(-1, 1), 9);
}

/** Times of one ratio, with the classical integral beside it in the same run. */
export async function benchPolytope(): Promise<readonly BenchRow[]> {
  const rows: BenchRow[] = [];
  for (const [d, n] of [
    [3, 30],
    [10, 1000],
    [30, 1e6],
    [100, 1e12],
    [1000, 1e15],
  ] as const) {
    const ask = { n, d, law: uniformBall() };
    const own = hullVolumeRatio(ask).value;
    const other = d <= 30 ? classical(n, d) : Number.NaN;
    rows.push({
      name: `hullVolumeRatio d = ${d}, n = ${n}`,
      own: timePerCall(() => hullVolumeRatio(ask)),
      others: d <= 30 ? { 'classical integral': timePerCall(() => classical(n, d)) } : {},
      note: d <= 30 ? `they differ by ${Math.abs(other / own - 1).toExponential(1)}` : '',
    });
  }
  const beyond = { n: LogNumber.fromLog(4000), d: 1000, law: uniformBall() };
  rows.push({
    name: 'hullVolumeRatio d = 1000, log n = 4000',
    own: timePerCall(() => hullVolumeRatio(beyond)),
    others: {},
  });
  const big = { d: 5000, law: uniformBall() };
  rows.push({
    name: 'smallest n for one half, d = 5000',
    own: timePerCall(() => smallest(hullVolumeRatio, 'n', big, 0.5)),
    others: {},
  });
  rows.push({
    name: 'expectedFacets d = 1000, n = 1e6',
    own: timePerCall(() => expectedFacets({ n: 1e6, d: 1000, law: uniformBall() })),
    others: {},
  });
  const height = facetHeight({ n: 1e6, d: 100, law: uniformBall() });
  rows.push({
    name: 'facetHeight.cdf d = 100, n = 1e6',
    own: timePerCall(() => height.cdf(height.mean)),
    others: {},
  });
  rows.push({
    name: 'hausdorffWithin d = 10, n = 1e6',
    own: timePerCall(() => hausdorffWithin({ n: 1e6, d: 10, distance: 0.1, law: uniformBall() })),
    others: {},
  });
  printRows(
    'Polytopes: time of the library, then how many times as long the classical way takes',
    rows,
  );
  return rows;
}
