/** inHull against a general linear-programming package, on the same points in the same run. */
import { gaussian } from 'hullgauge';
import { hullVertices, inHull, sampler } from 'hullgauge/data';
import { loadLinearSolver } from '../support/linear-program.ts';
import { type BenchRow, leastOf, printRows } from './measure.ts';

/** 10,000 points in 50 dimensions, with queries inside, near the boundary and outside. */
export async function benchData(): Promise<void> {
  const solve = await loadLinearSolver();
  const [n, d] = [10_000, 50];
  const points = Array.from({ length: n }, sampler(gaussian(), { d, seed: 1 }));
  const rows: BenchRow[] = [];
  for (const [place, shift] of [
    ['centre', 0],
    ['inside', 0.3],
    ['just outside', 0.6],
    ['outside', 2],
  ] as const) {
    const q = new Float64Array(d).fill(shift);
    // Weights that reproduce the query, if there are any.
    const feasibility = {
      cost: new Float64Array(n),
      lower: new Float64Array(n),
      upper: new Float64Array(n).fill(1),
      rows: [
        ...Array.from({ length: d }, (_, j) => points.map((p) => p[j] as number)),
        new Float64Array(n).fill(1),
      ],
      low: [...q, 1],
      high: [...q, 1],
    };
    // A direction with the largest gap between the query and the points.
    const margin = {
      cost: [...new Float64Array(d), 1],
      lower: new Float64Array(d + 1).fill(-1e3).fill(-1, 0, d),
      upper: new Float64Array(d + 1).fill(1e3).fill(1, 0, d),
      rows: points.map((p) => [...p.map((x, j) => x - (q[j] as number)), -1]),
      low: new Float64Array(n),
      high: new Float64Array(n).fill(Number.POSITIVE_INFINITY),
    };
    const { position } = inHull(points, q);
    // Seconds each, so once is enough.
    let [feasible, apart] = [false, false];
    const others = {
      'LP for weights': await leastOf(1, () => {
        feasible = solve(feasibility).status === 'optimal';
      }),
      'LP for a hyperplane': await leastOf(1, () => {
        apart = solve(margin).objective > 1e-6;
      }),
    };
    if (feasible !== (position === 'inside') || apart !== (position === 'outside')) {
      throw new Error(`disagreement at ${place}: ${position}, ${feasible}, ${apart}`);
    }
    rows.push({
      name: `inHull n = ${n}, d = ${d}, ${place}`,
      own: await leastOf(20, () => inHull(points, q)),
      others,
      note: position,
    });
  }
  const cloud = Array.from({ length: 2000 }, sampler(gaussian(), { d: 10, seed: 3 }));
  let reports = 0;
  let vertices: readonly number[] = [];
  const own = await leastOf(1, async () => {
    vertices = await hullVertices(cloud, { onProgress: () => reports++ });
  });
  rows.push({
    name: 'hullVertices n = 2000, d = 10',
    own,
    others: {},
    note: `${vertices.length} vertices, ${reports} progress reports`,
  });
  printRows('Membership in the hull of given points, against a general LP package', rows);
}
