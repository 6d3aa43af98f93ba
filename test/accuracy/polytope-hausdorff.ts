/** Accuracy of the bounds and of the estimate of the Hausdorff distance. */
import { hausdorffDistance, hausdorffWithin, originInHull } from 'hullgauge';
import { logEulerCharacteristic } from '../../src/polytope/euler-characteristic.ts';
import { logFootInFacet, logHoleCount, logLowerBound } from '../../src/polytope/hole-bounds.ts';
import type { AccuracyCheck } from '../support/accuracy.ts';
import { casesOf, countOf, lawOf, type RowArgs, resolvedOf } from '../support/polytope-rows.ts';

/** The double nearest to 1 - h: the difference of two doubles would be off by 1e-12 of it. */
const distanceOf = (args: RowArgs): number => Number((1 - Number(args.h)).toPrecision(12));

const gapOf = (args: RowArgs): number => 1 - Math.abs(Number(args.h));

const sampleOf = (args: RowArgs) => ({ n: countOf(args), d: args.d, law: lawOf('beta', args) });

/** P(d_H <= 1 - h) on the circle, where it is exact. */
const circle = (args: RowArgs) =>
  hausdorffWithin({ ...sampleOf(args), d: 2, distance: distanceOf(args) });

export const hausdorffChecks: readonly AccuracyCheck[] = [
  {
    name: 'hausdorffDistance, foot in facet (log)',
    cases: casesOf(['beta.footInFacetProbability'], 'log', () => 'all'),
    compute: (args: RowArgs) => logFootInFacet(args.d, args.beta ?? 0),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'hausdorffDistance, upper bound (log of holes)',
    cases: casesOf(['beta.holeCountUpperBound'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      logHoleCount(args.d, args.beta ?? 0, resolvedOf(args), gapOf(args)).log,
    measure: 'log',
    bound: 3e-14,
  },
  {
    name: 'hausdorffDistance, Euler characteristic (log)',
    cases: casesOf(['beta.expectedEulerCharacteristic'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      logEulerCharacteristic(args.d, args.beta ?? 0, resolvedOf(args), gapOf(args), false),
    measure: 'log',
    bound: 2e-14,
  },
  {
    name: 'hausdorffDistance, lower bound (log)',
    cases: casesOf(['beta.vacancySecondMomentLowerBound'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      logLowerBound(args.d, args.beta ?? 0, resolvedOf(args), gapOf(args)).log,
    measure: 'log',
    bound: 1e-10,
  },
  {
    name: 'hausdorffDistance.exceedance.exact.log (beyond 1)',
    cases: casesOf(['beta.hausdorffExceedanceExact'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      hausdorffDistance(sampleOf(args)).exceedance(1 - Number(args.h)).exact?.log ?? Number.NaN,
    measure: 'log',
    bound: 2e-15,
  },
  {
    name: 'hausdorffWithin.complement (circle, exact)',
    cases: casesOf(['sphere.circleHausdorffExceedance'], 'value', () => 'value'),
    compute: (args: RowArgs) => circle(args).complement,
    measure: 'relative',
    bound: 3e-14,
  },
  {
    name: 'hausdorffWithin.value (circle, exact)',
    cases: casesOf(['sphere.circleHausdorffExceedance'], 'complement', () => 'complement'),
    compute: (args: RowArgs) => circle(args).value,
    measure: 'relative',
    bound: 1e-13,
  },
  {
    name: 'originInHull.complement (in the upper bound)',
    cases: casesOf(['wendelProbability'], 'value', () => 'all'),
    compute: (args: RowArgs) => originInHull({ n: args.n as number, d: args.d }).complement,
    measure: 'relative',
    bound: 1e-15,
  },
];
