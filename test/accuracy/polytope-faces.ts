/** Accuracy of membership, faces, projections and the orthant integrals behind them. */
import type { AccuracyCheck } from '../support/accuracy.ts';
import { faceRows } from '../support/face-rows.ts';

/**
 * Absolute errors of the logarithm of the smaller tail, or of the number, by quantity and region: about
 * twice the worst of the table.
 */
const BOUNDS: Readonly<Record<string, Readonly<Record<string, number>>>> = {
  'nextPointInHull, scale 0': { 'd <= 100': 1e-14, 'd <= 500': 1e-14 },
  nextPointInHull: { 'd <= 100': 1e-13, 'd <= 500': 3e-13 },
  'nextPointInHull, beta': { 'd <= 100': 1e-13 },
  'nextPointInHull, t': { 'd <= 100': 5e-15 },
  'nextPointInHull, betaPrime': { 'd <= 100': 5e-15 },
  'nextPointInHull, wide query': { 'd <= 100': 3e-14 },
  'continued angle': { 'd > 500': 2e-13 },
  pointInHull: { 'd <= 100': 3e-14 },
  expectedFaces: { 'd <= 100': 8e-14, 'd <= 500': 3e-13 },
  'expectedFaces, n = e^600': { 'd <= 100': 1e-14 },
  projectedFaces: { 'd <= 100': 4e-14, 'd <= 500': 8e-14, 'd > 500': 1.5e-12 },
  'internal angle': { 'd <= 100': 1e-13, 'd <= 500': 8e-13, 'd > 500': 4e-12 },
  'external angle': { 'd <= 100': 1e-13, 'd <= 500': 5e-13 },
  'orthant probability': { 'd <= 100': 6e-14 },
  'beta angles': { 'd <= 100': 1e-13, 'd <= 500': 4e-12 },
  'coordinate-sum transform': { 'd <= 100': 1e-13, 'd <= 500': 3e-13 },
  'fixed query': { 'd <= 100': 4e-14 },
};

const names = [...new Set(faceRows.map((row) => row.name))];

export const faceChecks: readonly AccuracyCheck[] = names.flatMap((name) =>
  Object.entries(BOUNDS[name] ?? {}).flatMap(([region, bound]) => {
    const rows = faceRows.filter((row) => row.name === name && row.region === region);
    return [
      {
        name: `${name}.log, ${region}`,
        cases: rows.map((row) => ({ args: [row], exact: row.exact, region })),
        compute: (row: (typeof rows)[number]) => row.compute().log,
        measure: 'absolute' as const,
        bound,
      },
    ];
  }),
);
