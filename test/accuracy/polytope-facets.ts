/** Accuracy of facet counts, facet heights, caps and random simplices. */
import {
  capProbability,
  expectedFacets,
  expectedFacetsBelow,
  facetHeight,
  LogNumber,
  simplexVolume,
} from 'hullgauge';
import type { FacetHeight } from 'hullgauge/polytope';
import { facetModel, facetTotal } from '../../src/polytope/facet-measure.ts';
import type { AccuracyCheck } from '../support/accuracy.ts';
import { casesOf, countOf, lawOf, type RowArgs, resolvedOf } from '../support/polytope-rows.ts';

type Family = 'beta' | 'betaPrime' | 'gaussian';

/** log of the number of facets; by the kernel where log n is not that of an integer. */
const facets =
  (family: Family, hull: 'plain' | 'symmetric' = 'plain') =>
  (args: RowArgs): number => {
    const { d } = args;
    const law = lawOf(family, args);
    const count = resolvedOf(args);
    if (args.n === undefined && count.n <= 2 ** 53 && law.family !== 'studentT') {
      return facetTotal(facetModel(law, d), count, 'line').log;
    }
    return expectedFacets({ n: countOf(args), d, law, hull }).log;
  };

export const facetChecks: readonly AccuracyCheck[] = [
  {
    name: 'expectedFacets.log (beta)',
    cases: casesOf(['beta.expectedFacets'], 'log', () => 'all'),
    compute: facets('beta'),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'expectedFacets.log (beta, symmetric)',
    cases: casesOf(['beta.symExpectedFacets'], 'log', () => 'all'),
    compute: facets('beta', 'symmetric'),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'expectedFacets.log (beta-prime)',
    cases: casesOf(['betaPrime.expectedFacets'], 'log', () => 'all'),
    compute: facets('betaPrime'),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'expectedFacets.log (beta-prime)',
    cases: casesOf(['betaPrime.expectedFacetsLimit'], 'log', () => 'n to infinity'),
    compute: (args: RowArgs) =>
      expectedFacets({ n: LogNumber.fromLog(2000), d: args.d, law: lawOf('betaPrime', args) }).log,
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'expectedFacets.log (Gaussian)',
    cases: casesOf(['gauss.expectedFacets'], 'log', () => 'all'),
    compute: facets('gaussian'),
    measure: 'log',
    bound: 1e-15,
  },
  {
    name: 'expectedFacetsBelow.log (beta)',
    cases: casesOf(['beta.expectedFacetsBelow'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      expectedFacetsBelow({
        n: countOf(args),
        d: args.d,
        height: Number(args.h),
        law: lawOf('beta', args),
      }).log,
    measure: 'log',
    bound: 4e-15,
  },
];

const height = (args: RowArgs): FacetHeight =>
  facetHeight({ n: countOf(args), d: args.d, law: lawOf('beta', args) });

// Heights of the reference are exact decimals. At d = 5000 the typical height has a standard deviation of
// 1.3e-6, and the last bit of the double nearest to 0.7937, 54 deviations out, is 2e-9 of the logarithm.
const moderate = (row: { args: Readonly<Record<string, unknown>> }): string | null =>
  Number(row.args['d']) <= 100 ? 'd <= 10' : null;

export const heightChecks: readonly AccuracyCheck[] = [
  {
    name: 'facetHeight.cdf.log',
    cases: casesOf(['beta.typicalHeightCdf'], 'log', moderate),
    compute: (args: RowArgs) => height(args).cdf(Number(args.h)).log,
    measure: 'log',
    bound: 8e-15,
  },
  {
    name: 'facetHeight.cdf.log',
    cases: casesOf(['beta.typicalHeightCdf'], 'log', (row) =>
      row.args['d'] === 5000 ? 'd = 5000, 54 deviations below the mean' : null,
    ),
    compute: (args: RowArgs) => height(args).cdf(Number(args.h)).log,
    measure: 'log',
    bound: 8e-12,
  },
  {
    name: 'facetHeight.mean',
    cases: casesOf(['beta.typicalHeightMean'], 'value', () => 'all'),
    compute: (args: RowArgs) => height(args).mean,
    measure: 'relative',
    bound: 5e-16,
  },
  {
    name: 'facetHeight.variance',
    cases: casesOf(['beta.typicalHeightVariance'], 'value', () => 'all'),
    compute: (args: RowArgs) => height(args).variance,
    measure: 'relative',
    bound: 3e-12,
  },
];

export const capChecks: readonly AccuracyCheck[] = [
  {
    name: 'capProbability.log (beta)',
    cases: casesOf(['beta.capProbability'], 'log', () => 'all'),
    compute: (args: RowArgs) =>
      capProbability({ d: args.d, height: Number(args.h), law: lawOf('beta', args) }).log,
    measure: 'log',
    bound: 1e-15,
  },
];

const simplex =
  (family: Family) =>
  (args: RowArgs): ReturnType<typeof simplexVolume> =>
    simplexVolume({ d: args.d, r: args.r, law: lawOf(family, args) });

const families = [
  ['beta', 'beta', 'beta'],
  ['betaPrime', 'betaPrime', 'beta-prime'],
  ['gaussian', 'gauss', 'Gaussian'],
] as const;

export const simplexChecks: readonly AccuracyCheck[] = families
  .flatMap(([family, prefix, name]): AccuracyCheck[] => [
    {
      name: `simplexVolume.moment.log (${name})`,
      cases: casesOf([`${prefix}.simplexVolumeMoment`], 'log', () => 'all'),
      compute: (args: RowArgs) => simplex(family)(args).moment(args.power ?? 1).log,
      measure: 'log',
      bound: 1.5e-15,
    },
    {
      name: `simplexVolume.meanOfLog (${name})`,
      cases: casesOf([`${prefix}.simplexLogVolumeMean`], 'value', () => 'all'),
      compute: (args: RowArgs) => simplex(family)(args).meanOfLog,
      measure: 'log',
      bound: 2e-15,
    },
    {
      name: `simplexVolume.varianceOfLog (${name})`,
      cases: casesOf([`${prefix}.simplexLogVolumeVariance`], 'value', () => 'all'),
      compute: (args: RowArgs) => simplex(family)(args).varianceOfLog,
      measure: 'relative',
      bound: 2e-15,
    },
  ])
  .filter((check) => check.cases.length > 0);
