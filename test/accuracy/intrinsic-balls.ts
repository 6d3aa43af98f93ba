/** Accuracy of ball volumes, sphere areas, and the vertices of balls. */
import { expectedVertices, uniformBall } from 'hullgauge';
import { ballVolume, sphereArea } from 'hullgauge/intrinsic';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { type NamedRow, readTable, type SpecialRow } from '../support/reference.ts';

function logCases(fn: string): readonly AccuracyCase[] {
  return readTable<SpecialRow>('special')
    .filter((row) => row.fn === fn && Number.isInteger(Number(Object.values(row.args)[0])))
    .map((row) => ({
      args: [Number(Object.values(row.args)[0])],
      // The rows of functions that return logarithms hold the logarithm as `log`.
      exact: row.log as string,
      region: fn,
    }));
}

const vertexCases = readTable<NamedRow>('polytope')
  .filter(({ quantity }) => quantity === 'ball.expectedVertices')
  .map(
    ({ args, value }): AccuracyCase => ({
      args: [{ n: Number(args['n']), d: Number(args['d']) }],
      exact: value as string,
      region: 'uniform ball',
    }),
  );

/** The checks. */
export const ballChecks: readonly AccuracyCheck[] = [
  {
    name: 'ballVolume.log',
    cases: logCases('logBallVolume'),
    compute: (d: number) => ballVolume(d).log,
    measure: 'log',
    bound: 4e-15,
  },
  {
    name: 'sphereArea.log',
    cases: logCases('logSphereSurface'),
    compute: (d: number) => sphereArea(d).log,
    measure: 'log',
    bound: 4e-15,
  },
  {
    name: 'expectedVertices.value',
    cases: vertexCases,
    compute: (args: { n: number; d: number }) =>
      Math.exp(expectedVertices({ ...args, law: uniformBall() }).log),
    measure: 'relative',
    bound: 2e-14,
  },
];
