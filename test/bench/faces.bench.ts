/** Membership by integrals against membership by simulation with a general linear-programming package. */
import { expectedVertices, gaussian, nextPointInHull, pointInHull, uniformBall } from 'hullgauge';
import { sampler } from 'hullgauge/data';
import { loadLinearSolver } from '../support/linear-program.ts';
import { hullProgram } from '../support/membership-program.ts';
import { type BenchRow, printRows, timePerCall } from './measure.ts';

/** Times of the library alone, then beside the time in which simulation yields three digits. */
export async function benchFaces(): Promise<void> {
  const alone: readonly (readonly [string, () => unknown])[] = [
    ['nextPointInHull n = 1000, d = 6', () => nextPointInHull({ n: 1000, d: 6 })],
    ['nextPointInHull n = 1e6, d = 100', () => nextPointInHull({ n: 1e6, d: 100 })],
    ['nextPointInHull n = 1e6, d = 500', () => nextPointInHull({ n: 1e6, d: 500 })],
    [
      'nextPointInHull n = 2.785e112, d = 500 (half)',
      () => nextPointInHull({ n: 2.785e112, d: 500 }),
    ],
    [
      'nextPointInHull ball, n = 1e6, d = 20',
      () => nextPointInHull({ n: 1e6, d: 20, law: uniformBall() }),
    ],
    [
      'expectedVertices n = 1e6, d = 20',
      () => expectedVertices({ n: 1e6, d: 20, law: gaussian() }),
    ],
    [
      'pointInHull n = 1000, d = 10, distance 2',
      () => pointInHull({ n: 1000, d: 10, mahalanobisDistance: 2 }),
    ],
    [
      'pointInHull n = 1000, d = 10, distance 3',
      () => pointInHull({ n: 1000, d: 10, mahalanobisDistance: 3 }),
    ],
    [
      'pointInHull n = 1e6, d = 50, distance 7',
      () => pointInHull({ n: 1e6, d: 50, mahalanobisDistance: 7 }),
    ],
  ];
  printRows(
    'membership and faces',
    alone.map(([name, call]) => ({ name, own: timePerCall(call), others: {} })),
  );

  const solve = await loadLinearSolver();
  const rows: BenchRow[] = [];
  for (const [n, d] of [
    [40, 4],
    [1000, 6],
    [1000, 10],
  ] as const) {
    const draw = sampler(gaussian(), { d, seed: 20_26 });
    const trial = (): void => {
      const points = Array.from({ length: n }, draw);
      solve(hullProgram(points, draw()));
    };
    trial();
    const start = performance.now();
    let trials = 0;
    while (performance.now() - start < 400) {
      trial();
      trials++;
    }
    const perTrial = (1e6 * (performance.now() - start)) / trials;
    const { value, complement } = nextPointInHull({ n, d });
    // Relative standard error 1e-3 of the smaller tail.
    const needed = (1e6 * Math.max(value, complement)) / Math.min(value, complement);
    const seconds = (needed * perTrial) / 1e9;
    rows.push({
      name: `nextPointInHull n = ${n}, d = ${d}`,
      own: timePerCall(() => nextPointInHull({ n, d })),
      others: { 'one linear program': perTrial, 'three digits by simulation': needed * perTrial },
      note: `${(1e9 / perTrial).toFixed(0)} programs a second, ${seconds.toFixed(0)} s for three digits`,
    });
  }
  printRows('membership by simulation', rows);
}
