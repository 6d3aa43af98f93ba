/** Accuracy of the intrinsic volumes of bodies. */
import {
  type Body,
  ball,
  box,
  crossPolytope,
  ellipsoid,
  flagCoefficient,
  regularSimplex,
} from 'hullgauge/intrinsic';
import type { AccuracyCheck } from '../support/accuracy.ts';
import { casesOf } from '../support/polytope-rows.ts';

interface BodyArgs {
  readonly d: number;
  readonly k: number;
  readonly sides: readonly number[];
  readonly axes: readonly number[];
}

const logOf = (body: Body, k: number): number => body.intrinsicVolumes[k]?.log ?? Number.NaN;

const check = (
  name: string,
  quantity: string,
  compute: (args: BodyArgs) => number,
  bound: number,
): AccuracyCheck => ({
  name,
  cases: casesOf([quantity], 'log', () => 'all'),
  compute,
  measure: 'log',
  bound,
});

export const bodyChecks: readonly AccuracyCheck[] = [
  check('ball.intrinsicVolumes.log', 'ball.Vk', ({ d, k }) => logOf(ball({ d }), k), 3e-15),
  check('flagCoefficient.log', 'flagCoefficient', ({ d, k }) => flagCoefficient(d, k).log, 1e-15),
  check('box.intrinsicVolumes.log', 'box.Vk', ({ sides, k }) => logOf(box(sides), k), 1e-15),
  check(
    'regularSimplex.intrinsicVolumes.log',
    'regularSimplex.Vk',
    // the reference has edge sqrt(2), whose double is off by 1e-16: the unit edge is scaled exactly
    ({ d, k }) => logOf(regularSimplex({ d }), k) + 0.5 * k * Math.LN2,
    1.5e-15,
  ),
  check(
    'crossPolytope.intrinsicVolumes.log',
    'crossPolytope.Vk',
    ({ d, k }) => logOf(crossPolytope({ d }), k),
    1e-15,
  ),
  check(
    'ellipsoid.intrinsicVolumes.log',
    'ellipsoid.Vk',
    ({ axes, k }) => logOf(ellipsoid({ semiAxes: axes }), k),
    1e-15,
  ),
];
