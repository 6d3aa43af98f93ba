/** Accuracy of sparse recovery, of descent cones and of statistical dimensions. */
import {
  approxNuclearNormDimension,
  l1DescentCone,
  l1StatisticalDimension,
  recoverySuccess,
  weakThreshold,
} from 'hullgauge/conic';
import { nuclearLimit } from '../../src/conic/descent-cones.ts';
import { dimensionBound, secondOrderMoments } from '../../src/conic/weak-threshold.ts';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { type ProbabilityCase, probabilityChecks } from '../support/probability-checks.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

const table = readTable<NamedRow>('conic');
const extra = readTable<NamedRow>('conic-extra');
const faces = readTable<NamedRow>('faces');

function cases(quantity: string, field: 'value' | 'log' = 'value'): readonly AccuracyCase[] {
  return [...table, ...extra].flatMap((row) => {
    const exact = row[field];
    return row.quantity === quantity && exact !== null
      ? [{ args: [row.args], exact, region: 'all' }]
      : [];
  });
}

const number = (args: NamedRow['args'], name: string): number => Number(args[name]);
const sparse = (args: NamedRow['args']): { n: number; sparsity: number } => ({
  n: number(args, 'n'),
  sparsity: number(args, args['s'] === undefined ? 'sparsity' : 's'),
});

const relative = (
  name: string,
  quantity: string,
  compute: (args: NamedRow['args']) => number,
  bound: number,
): AccuracyCheck => ({ name, cases: cases(quantity), compute, measure: 'relative', bound });

/** Success probabilities of the tables, with the arguments of {@link recoverySuccess}. */
const successes: readonly ProbabilityCase[] = [...table, ...extra].flatMap((row) => {
  if (row.value === null) return [];
  const { value, log, complement } = row;
  if (row.quantity === 'recovery') {
    return [{ args: row.args, value, log, complement, region: String(row.args['model']) }];
  }
  const models: Record<string, string> = {
    'recovery.l1_success_exact': 'l1',
    'recovery.nonneg_feasible_unique': 'nonnegativeFeasible',
  };
  const model = models[row.quantity];
  if (model === undefined) return [];
  const args = { model, ...sparse(row.args), measurements: number(row.args, 'm') };
  return [{ args, value, log, complement, region: model }];
});

/** The same as faces of random projections that survive. */
const survivals: readonly ProbabilityCase[] = faces.flatMap((row) => {
  const models: Record<string, string> = { C: 'l1', T0: 'nonnegativeL1', O: 'box' };
  const model = models[String(row.args['kind'])];
  if (row.quantity !== 'face_survival' || row.value === null || model === undefined) return [];
  const support = { [model === 'box' ? 'free' : 'sparsity']: number(row.args, 'k') };
  const args = { model, n: number(row.args, 'N'), measurements: number(row.args, 'd'), ...support };
  const { value, log, complement } = row;
  return [{ args, value, log, complement, region: `${model}, as faces` }];
});

/** The same for other tests; exported arrays of this folder hold checks. */
export const recoveryCases = (): readonly ProbabilityCase[] => [...successes, ...survivals];

const volume = (args: NamedRow['args']): number =>
  l1DescentCone(sparse(args)).logIntrinsicVolumes[number(args, 'k')] as number;

export const recoveryChecks: readonly AccuracyCheck[] = [
  ...probabilityChecks('recoverySuccess', recoveryCases(), recoverySuccess, 6e-14),
  {
    name: 'l1DescentCone.logIntrinsicVolumes',
    cases: [...cases('civ.l1_descent', 'log'), ...cases('l1.v', 'log')],
    compute: volume,
    measure: 'log',
    bound: 6e-14,
  },
  relative(
    'l1DescentCone.variance',
    'variance.l1_exact',
    (a) => l1DescentCone(sparse(a)).variance,
    6e-14,
  ),
  relative(
    'l1DescentCone.statisticalDimension',
    'statdim.l1_exact',
    (a) => l1DescentCone(sparse(a)).statisticalDimension,
    6e-14,
  ),
  relative(
    'l1StatisticalDimension.exact',
    'statdim.l1_exact',
    (a) => l1StatisticalDimension(sparse(a)).exact,
    6e-14,
  ),
  relative(
    'l1StatisticalDimension.upper',
    'statdim.l1_upper',
    (a) => l1StatisticalDimension(sparse(a)).upper,
    2e-15,
  ),
  relative(
    'dimensionBound (one-sided)',
    'statdim.l1_nonneg_upper',
    (a) => dimensionBound(number(a, 'n'), number(a, 's'), 1),
    2e-15,
  ),
  relative(
    'dimensionBound per variable',
    'psi.l1',
    (a) => dimensionBound(1, number(a, 'rho'), 2),
    2e-15,
  ),
  relative(
    'secondOrderMoments.mean',
    'statdim.l1_second_order',
    (a) => secondOrderMoments(number(a, 'n'), number(a, 's'), 2).mean,
    2e-15,
  ),
  relative(
    'secondOrderMoments.variance',
    'variance.l1_second_order',
    (a) => secondOrderMoments(number(a, 'n'), number(a, 's'), 2).variance,
    5e-15,
  ),
  relative(
    'weakThreshold (l1)',
    'weak_threshold.l1',
    (a) => weakThreshold({ undersampling: number(a, 'delta'), model: 'l1' }).perMeasurement,
    2e-15,
  ),
  relative(
    'weakThreshold (nonnegativeL1)',
    'weak_threshold.nonneg',
    (a) =>
      weakThreshold({ undersampling: number(a, 'delta'), model: 'nonnegativeL1' }).perMeasurement,
    2e-15,
  ),
  relative(
    'nuclearLimit',
    'psi.nuclear',
    (a) => nuclearLimit(number(a, 'rho'), number(a, 'nu')),
    1e-15,
  ),
  relative(
    'approxNuclearNormDimension',
    'psi.nuclear',
    (a) => {
      // sides and rank in whole hundreds have exactly these ratios
      const [rows, columns] = [100 * 1000 * number(a, 'nu'), 100 * 1000];
      const rank = Math.round(number(a, 'rho') * rows);
      return approxNuclearNormDimension({ rank, rows, columns }) / rows / columns;
    },
    1e-15,
  ),
];
