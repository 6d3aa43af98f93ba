/** Accuracy of volume and intrinsic volume ratios, and of expected volumes. */
import {
  expectedHullIntrinsicVolume,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
  type Probability,
} from 'hullgauge';
import { volumeRatioKernel } from '../../src/polytope/volume-ratio-kernel.ts';
import type { AccuracyCheck } from '../support/accuracy.ts';
import { casesOf, countOf, lawOf, type RowArgs, resolvedOf } from '../support/polytope-rows.ts';
import type { NamedRow } from '../support/reference.ts';

const RATIOS = [
  'beta.volumeRatio',
  'beta.volumeRatioAtPhase',
  'beta.VkRatio',
  'beta.VkRatioAtPhase',
  'beta.VkRatioFixedK',
];

/** The ratio by the public function, or by its kernel where log n is not that of an integer. */
function ratio(args: RowArgs): Probability {
  const { d, k = d, beta = 0 } = args;
  const count = resolvedOf(args);
  if (args.n === undefined && count.n <= 2 ** 53) {
    return volumeRatioKernel(k, beta + (d - 1) / 2, count, 'plain');
  }
  const law = lawOf('beta', args);
  return k === d
    ? hullVolumeRatio({ n: countOf(args), d, law })
    : hullIntrinsicVolumeRatio({ n: countOf(args), d, k, law });
}

/** The region of a ratio by its size. */
const bySize =
  (from: number, to: number, name: string) =>
  (row: NamedRow): string | null =>
    Number(row.log) > from && Number(row.log) <= to ? name : null;

const logCount = (row: NamedRow): number => resolvedOf(row.args as unknown as RowArgs).log;

/** Complements that a double holds. */
const complements =
  (from: number, to: number, name: string) =>
  (row: NamedRow): string | null => {
    const log = logCount(row);
    return Number(row.complement) > 1e-307 && log > from && log <= to ? name : null;
  };

const zeroRatio = (row: NamedRow): string | null => (row.log === null ? 'n <= k' : null);

export const ratioChecks: readonly AccuracyCheck[] = [
  {
    name: 'hullVolumeRatio.value',
    cases: casesOf(RATIOS, 'value', bySize(-1, 0, 'above 1/e')),
    compute: (args: RowArgs) => ratio(args).value,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'hullVolumeRatio.value',
    cases: casesOf(RATIOS, 'value', bySize(-50, -1, 'e^-50 to 1/e')),
    compute: (args: RowArgs) => ratio(args).value,
    measure: 'relative',
    bound: 1e-14,
  },
  {
    name: 'hullVolumeRatio.log',
    cases: casesOf(RATIOS, 'log', bySize(Number.NEGATIVE_INFINITY, -50, 'below e^-50')),
    compute: (args: RowArgs) => ratio(args).log,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'hullVolumeRatio.complement',
    cases: casesOf(RATIOS, 'complement', complements(0, 5000, 'log n <= 5000')),
    compute: (args: RowArgs) => ratio(args).complement,
    measure: 'relative',
    bound: 2e-13,
  },
  {
    name: 'hullVolumeRatio.complement',
    cases: casesOf(RATIOS, 'complement', complements(5000, 1e5, 'log n <= 50000')),
    compute: (args: RowArgs) => ratio(args).complement,
    measure: 'relative',
    bound: 3e-13,
  },
  {
    name: 'hullVolumeRatio.value',
    cases: casesOf(RATIOS, 'value', zeroRatio),
    compute: (args: RowArgs) => ratio(args).value,
    measure: 'absolute',
    bound: 0,
  },
  {
    name: 'hullVolumeRatio.value (symmetric)',
    cases: casesOf(['beta.symVolumeRatio'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      hullVolumeRatio({
        n: countOf(args),
        d: args.d,
        law: lawOf('beta', args),
        hull: 'symmetric',
      }).log,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'hullVolumeRatio.value (with centre)',
    cases: casesOf(['beta.originHullVolumeRatio'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      hullVolumeRatio({
        n: countOf(args),
        d: args.d,
        law: lawOf('beta', args),
        hull: 'withCentre',
      }).log,
    measure: 'log',
    bound: 1e-15,
  },
].filter((check) => check.cases.length > 0) as readonly AccuracyCheck[];

const expected =
  (family: 'beta' | 'betaPrime' | 'gaussian') =>
  (args: RowArgs): number =>
    expectedHullIntrinsicVolume({
      n: countOf(args),
      d: args.d,
      k: args.k ?? args.d,
      law: lawOf(family, args),
    }).log;

export const volumeChecks: readonly AccuracyCheck[] = [
  {
    name: 'expectedHullIntrinsicVolume.log (beta-prime)',
    cases: casesOf(['betaPrime.expectedVk'], 'log', () => 'all'),
    compute: expected('betaPrime'),
    measure: 'log',
    bound: 3e-15,
  },
  {
    name: 'expectedHullIntrinsicVolume.log (Gaussian)',
    cases: casesOf(['gauss.expectedVk'], 'log', () => 'all'),
    compute: expected('gaussian'),
    measure: 'log',
    bound: 4e-15,
  },
  {
    name: 'expectedHullIntrinsicVolume.value (surface area / 2, beta)',
    cases: casesOf(['beta.expectedSurfaceArea'], 'value', () => 'all'),
    compute: (args: RowArgs) =>
      2 *
      expectedHullIntrinsicVolume({
        n: countOf(args),
        d: args.d,
        k: args.d - 1,
        law: lawOf('beta', args),
      }).value,
    measure: 'relative',
    bound: 4e-15,
  },
  {
    name: 'hullIntrinsicVolumeRatio.value (mean width / 2, beta)',
    cases: casesOf(['beta.meanWidth'], 'value', () => 'all'),
    compute: (args: RowArgs) =>
      2 *
      hullIntrinsicVolumeRatio({ n: countOf(args), d: args.d, k: 1, law: lawOf('beta', args) })
        .value,
    measure: 'relative',
    bound: 2e-15,
  },
];
