/**
 * In which direction the answer of every monotone function goes with each argument, and how to take a
 * step in that direction.
 */
import { LogNumber, Probability } from 'hullgauge';
import { isProbability } from '../../src/probability.ts';
import { between, pick, type Random } from './arguments.ts';

/** What is known of a function. */
export interface Relation {
  /** Arguments with which the answer rises. */
  readonly rises?: readonly string[];
  /** Arguments with which the answer falls. */
  readonly falls?: readonly string[];
  /** Where a plain number, or every number of a plain result, has to lie. */
  readonly range?: readonly [number, number];
  /** Relative error of plain numbers, where it is larger than 1e-13. */
  readonly slack?: number;
  /** Where an argument has that direction, if not everywhere. */
  readonly where?: (args: Readonly<Record<string, unknown>>, parameter: string) => boolean;
}

const nd: Relation = { rises: ['n'], falls: ['d'] };
const n: Relation = { rises: ['n'] };
const share = [0, 1] as const;
const positive = [0, Number.POSITIVE_INFINITY] as const;

/** Not without any coefficient, where no case is separated in one way and one case in none. */
const cover: Relation = {
  rises: ['n', 'd'],
  where: ({ d, intercept }) => d !== 0 || intercept !== false,
};

const family = (args: Readonly<Record<string, unknown>>): string =>
  (args['law'] as { family?: string } | undefined)?.family ?? 'gaussian';

/** Whether the law is that of the sphere on the line. */
const isTwoPoints = ({ d, law }: Readonly<Record<string, unknown>>): boolean =>
  d === 1 && (law as { b?: number } | undefined)?.b === -1;

/** The relations by function. */
export const relations: Readonly<Record<string, Relation>> = {
  originInHull: nd,
  originInHullLowerBound: { rises: ['n', 'depth'], falls: ['d'] },
  labelSeparability: { rises: ['d'], falls: ['n'] },
  logisticFitExists: nd,
  dichotomyCount: cover,
  arrangementRegions: n,
  arrangementFaces: n,
  walkHull: { rises: ['steps'], falls: ['d'] },
  bridgeHull: { rises: ['steps'], falls: ['d'] },
  jointWalkHull: { falls: ['d'] },
  subspace: { rises: ['dimension'] },
  orthant: n,
  halfspace: n,
  weylChamber: n,
  circularCone: { rises: ['n', 'angle'] },
  l1DescentCone: { rises: ['n', 'sparsity'] },
  linfDescentCone: { rises: ['n'], falls: ['saturated'] },
  coneMeetsSubspace: { falls: ['codimension'] },
  recoverySuccess: { rises: ['measurements'], falls: ['n', 'sparsity', 'free'] },
  recoveryBounds: { rises: ['measurements'] },
  weakThreshold: { rises: ['undersampling'], range: share },
  l1StatisticalDimension: { rises: ['n', 'sparsity'], range: positive, slack: 1e-11 },
  approxNuclearNormDimension: {
    rises: ['rank', 'rows', 'columns'],
    range: positive,
    slack: 1e-9,
  },
  logisticThreshold: {
    falls: ['signal', 'offset'],
    range: [0, 0.5],
    slack: 1e-13,
    // with an offset a signal also makes the classes more equal
    where: ({ offset = 0 }, parameter) =>
      offset === 0 || (parameter === 'offset' && Number(offset) > 0),
  },
  logisticSignal: { falls: ['ratio'], range: positive, slack: 1e-11 },
  approxSeparability: { rises: ['d', 'signal'], falls: ['n'] },
  totalOrder: { range: share },
  simpleTree: { range: share },
  approxTotalOrder: { range: share },
  reversedWeights: { range: share },
  orthantWeights: { range: share },

  hullVolumeRatio: { rises: ['n', 'hull'] },
  hullIntrinsicVolumeRatio: { rises: ['n', 'hull'] },
  expectedHullVolume: { rises: ['n', 'hull'] },
  expectedHullIntrinsicVolume: { rises: ['n', 'hull'] },
  expectedFacets: n,
  expectedFaces: n,
  expectedVertices: n,
  nextPointInHull: {
    rises: ['n', 'hull'],
    falls: ['d', 'queryScale'],
    where: (args, parameter) => {
      if (parameter === 'd') return family(args) === 'gaussian';
      // two points meet the next one more often than they surround the centre
      return parameter !== 'queryScale' || !isTwoPoints(args);
    },
  },
  pointInHull: { rises: ['n'], falls: ['d', 'mahalanobisDistance'] },
  queriesInHull: nd,
  expectedFacetsBelow: { rises: ['height'] },
  hausdorffWithin: { rises: ['n', 'distance'] },
  heightLimit: n,
  approxVolumeThreshold: { rises: ['share'] },
  projectedFaces: { rises: ['d'] },
  capProbability: { falls: ['height'] },

  ballVolume: { rises: ['radius'] },
  sphereArea: { rises: ['radius'] },
  steinerVolume: { rises: ['distance'] },
  meanWidth: { range: positive },

  log1mExp: { falls: ['x'], range: [Number.NEGATIVE_INFINITY, 0] },
  logAddExp: { rises: ['a', 'b'] },
  logSubExp: { rises: ['a'], falls: ['b'] },
  stirlingRemainder: { falls: ['x'], range: positive },
  expm1mx: { range: positive },
  log1pmx: { range: [Number.NEGATIVE_INFINITY, 0] },
  erf: { rises: ['x'], range: [-1, 1] },
  erfc: { falls: ['x'], range: [0, 2] },
  erfcx: { falls: ['x'], range: positive },
  millsRatio: { falls: ['x'], range: positive },
  normalCdf: { rises: ['x'] },
  logNormalCdf: { rises: ['x'], range: [Number.NEGATIVE_INFINITY, 0] },
  normalQuantile: { rises: ['p'] },
  incompleteBeta: {
    rises: ['x', 'b'],
    falls: ['a'],
    where: ({ y }, parameter) => parameter !== 'x' || y === undefined,
  },
  incompleteGamma: { rises: ['x'], falls: ['a'] },
  incompleteGammaInverse: { rises: ['p', 'a'], range: positive },
  chiSquaredCdf: { rises: ['x'], falls: ['df'] },
  chiSquaredQuantile: { rises: ['p', 'df'], range: positive },
  binomialCdf: {
    rises: ['k'],
    falls: ['n', 'p'],
    where: ({ q }, parameter) => parameter !== 'p' || q === undefined,
  },
  binomialQuantile: {
    rises: ['prob', 'n', 'p'],
    range: positive,
    where: ({ q }, parameter) => parameter !== 'p' || q === undefined,
  },
  logBinomialPmf: { range: [Number.NEGATIVE_INFINITY, 0] },
  logFactorial: { rises: ['n'], range: positive },
  logBinomial: { rises: ['n'], where: ({ k }) => Number(k) > 0 },
  logBeta: { falls: ['a', 'b'] },
  logStirling1: n,
  logStirlingB: n,

  originInHullExact: {},
  originInHullDecimal: nd,
  dichotomyCountExact: cover,
  hullVolumeRatioDecimal: n,
  incompleteBetaDecimal: { rises: ['b', 'x'], falls: ['a'] },
};

const HULLS = ['plain', 'withCentre', 'symmetric'];

/** A larger value of an argument; undefined where there is none. */
export function larger(random: Random, value: unknown): unknown {
  if (typeof value === 'string') {
    const index = HULLS.indexOf(value);
    return index < 0 ? undefined : HULLS[between(random, index, HULLS.length) + 1];
  }
  if (isProbability(value)) return Probability.fromLog(value.log * random());
  if (value instanceof LogNumber) {
    return LogNumber.fromLog(value.log + pick(random, [1e-9 * value.log, 0.01, 1, 100 * random()]));
  }
  if (typeof value !== 'number' || !Number.isFinite(value)) return undefined;
  if (Number.isInteger(value) && Math.abs(value) > 1) {
    const step = Math.floor(Math.abs(value) * pick(random, [0, 1e-6, 0.01, 1])) + 1;
    return value + step;
  }
  if (Number.isInteger(value)) return value + pick(random, [0.5, 1, 2]);
  const size = Math.abs(value) * pick(random, [2 ** -52, 1e-12, 1e-6, 0.1, 2]);
  return value + pick(random, [size, Math.max(size, (1 - value) * random())]);
}
