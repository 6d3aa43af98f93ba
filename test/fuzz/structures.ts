/** Generated arguments of the functions that take arrays, cones, bodies, points or other functions. */
import * as hullgauge from 'hullgauge';
import * as conic from 'hullgauge/conic';
import * as intrinsic from 'hullgauge/intrinsic';
import { calls, type OptionsCall } from '../package/bad-input.ts';
import { argumentsFor, between, lawFrom, pick, type Random, realNumber } from './arguments.ts';

const list = <T>(random: Random, least: number, most: number, item: () => T): T[] =>
  Array.from({ length: between(random, least, most) }, item);

/** A positive number over many orders of magnitude. */
const scale = (random: Random): number =>
  random() < 0.9 ? 10 ** (4 * random() - 2) : 10 ** (400 * random() - 200);

const seeded = (random: Random): { trials: number; seed: number } => ({
  trials: between(random, 1, 50),
  seed: between(random, 0, 1e9),
});

/** A cone in the given space, or a small one. */
function coneFrom(random: Random, ambient = between(random, 1, 12)): conic.Cone {
  const inner = between(random, 0, ambient);
  return pick<() => conic.Cone>(random, [
    () => conic.orthant(ambient),
    () => conic.halfspace(ambient),
    () => conic.subspace({ dimension: inner, ambient }),
    () => conic.weylChamber(pick(random, ambient > 1 ? ['A', 'B', 'D'] : ['A', 'B']), ambient),
    () => conic.circularCone(Math.max(2, ambient), (random() * Math.PI) / 2),
    () => conic.l1DescentCone({ n: ambient, sparsity: inner }),
    () => conic.linfDescentCone({ n: ambient, saturated: Math.max(1, inner) }),
    () => conic.productCone(conic.orthant(inner), conic.halfspace(ambient - inner || 1)),
    () => conic.polarCone(conic.weylChamber('B', ambient)),
    () => conic.polyhedralCone(vectors(random, between(random, 1, 4), between(random, 1, 4))),
    () => conic.approxPolyhedralCone(vectors(random, 5, 6), seeded(random)),
  ])();
}

/** Rows of small whole numbers, where degenerate positions are common, or of any. */
function vectors(random: Random, rows: number, columns: number): number[][] {
  const whole = random() < 0.5;
  const size = random() < 0.8 ? 1 : scale(random);
  const entry = (): number => (whole ? between(random, -2, 2) : size * (2 * random() - 1));
  return Array.from({ length: rows }, () => Array.from({ length: columns }, entry));
}

/** Points with repetitions, and the same far from the origin. */
function pointsFrom(random: Random, columns: number, most = 24): number[][] {
  const points = vectors(random, between(random, 1, most), columns);
  if (random() < 0.3) points.push([...(points[0] as number[])]);
  const shift = random() < 0.2 ? 1e8 : 0;
  return points.map((row) => row.map((x) => x + shift));
}

/** Probabilities with sum 1. */
function weightsFrom(random: Random): readonly number[] {
  if (random() < 0.5) return coneFrom(random).intrinsicVolumes;
  const free = list(random, 1, 8, () => (random() < 0.2 ? 0 : random() ** 4));
  const sum = free.reduce((total, weight) => total + weight, 0);
  return sum > 0 ? free.map((weight) => weight / sum) : [1];
}

const bodyFrom = (random: Random): intrinsic.Body => {
  const d = between(random, 1, 12);
  return pick<() => intrinsic.Body>(random, [
    () => intrinsic.ball({ d, radius: scale(random) }),
    () => intrinsic.cube({ d, side: scale(random) }),
    () => intrinsic.box(list(random, 1, 6, () => (random() < 0.1 ? 0 : scale(random)))),
    () => intrinsic.regularSimplex({ d, edge: scale(random) }),
    () => intrinsic.crossPolytope({ d, scale: scale(random) }),
    () => intrinsic.ellipsoid({ semiAxes: list(random, 1, 5, () => scale(random)) }),
  ])();
};

/** Questions that a search or a chart may ask, with the argument that is free. */
const QUESTIONS = [
  [hullgauge.originInHull, 'n'],
  [hullgauge.originInHull, 'd'],
  [hullgauge.originInHullLowerBound, 'depth'],
  [hullgauge.labelSeparability, 'n'],
  [hullgauge.labelSeparability, 'd'],
  [hullgauge.walkHull, 'steps'],
  [hullgauge.recoverySuccess, 'measurements'],
  [hullgauge.hullVolumeRatio, 'n'],
  [hullgauge.nextPointInHull, 'n'],
  [hullgauge.bridgeHull, 'steps'],
  [hullgauge.hausdorffWithin, 'distance'],
  [hullgauge.capProbability, 'height'],
] as const;

/** A question, its free argument, and all the others. */
function questionFrom(random: Random): [unknown, string, Record<string, unknown>] {
  const [question, free] = pick<(typeof QUESTIONS)[number]>(random, QUESTIONS);
  const row = calls[question.name] as OptionsCall;
  const [options] = argumentsFor(random, question.name, row) as [Record<string, unknown>];
  const { [free]: _, ...fixed } = options;
  // A search asks some thirty times: small dimensions are enough.
  if (typeof fixed['d'] === 'number') fixed['d'] = Math.min(fixed['d'], 20);
  return [question, free, fixed];
}

function targetFrom(random: Random): unknown {
  const far = hullgauge.Probability.fromLog(-(10 ** (3 * random() - 1)));
  return pick(random, [0.5, random(), { atMost: random() }, { complementAtMost: far }, far]);
}

const search = (random: Random): unknown[] => [...questionFrom(random), targetFrom(random)];

const simulated = (random: Random): Record<string, unknown> => ({
  n: between(random, 1, 8),
  d: between(random, 1, 4),
  law: lawFrom(random),
  ...seeded(random),
});

/** A valid argument list, nearly always, by the name of the function. */
export const structures: Readonly<Record<string, (random: Random) => unknown[]>> = {
  logSumExp: (random) => [list(random, 0, 6, () => realNumber(random))],
  jointWalkHull: (random) => {
    const length = (): number => Math.floor(10 ** (4 * random()));
    const walks = list(random, 0, 4, length);
    return [{ walks, bridges: list(random, 0, 3, length), d: between(random, 0, 40) }];
  },
  ray: () => [],
  polyhedralCone: (random) => [vectors(random, between(random, 1, 6), between(random, 1, 4))],
  approxPolyhedralCone: (random) => [
    vectors(random, between(random, 1, 6), between(random, 1, 8)),
    seeded(random),
  ],
  productCone: (random) => [coneFrom(random), coneFrom(random)],
  polarCone: (random) => [coneFrom(random)],
  conesMeet: (random) => {
    const n = between(random, 1, 12);
    return [coneFrom(random, n), coneFrom(random, n)];
  },
  coneMeetsSubspace: (random) => {
    const cone = coneFrom(random, between(random, 1, random() < 0.9 ? 20 : 300));
    return [cone, { codimension: between(random, 0, cone.ambient) }];
  },
  recoveryBounds: (random) => {
    const cone = coneFrom(random);
    return [{ cone, measurements: between(random, 0, cone.ambient) }];
  },
  recoverySuccess: (random) => {
    const n = Math.floor(10 ** ((random() < 0.9 ? 4 : 15) * random()));
    const measurements = between(random, 0, n);
    const support = Math.floor(measurements * random() ** 2);
    const model = pick(random, ['l1', 'nonnegativeL1', 'nonnegativeFeasible', 'box']);
    return [{ model, n, [model === 'box' ? 'free' : 'sparsity']: support, measurements }];
  },
  logisticSignal: (random) => {
    const offset = random() < 0.5 ? 0 : 2 * random();
    return [{ ratio: 0.5 * random() ** 2, offset }];
  },
  chiBarSquared: (random) => {
    if (random() < 0.5) return [weightsFrom(random)];
    return [coneFrom(random), { null: pick(random, ['lineality', 'origin']) }];
  },
  eBarSquared: (random) => {
    const weights = weightsFrom(random);
    return [weights, { observations: weights.length + 1 + Math.floor(10 ** (4 * random())) }];
  },
  totalOrder: (random) => {
    const weights = list(random, 1, 4, () => scale(random));
    return random() < 0.5 ? [weights.length, weights] : [between(random, 1, 300)];
  },
  simpleTree: (random) => [
    between(random, 1, 30),
    { control: scale(random), treatment: scale(random) },
  ],
  approxTotalOrder: (random) => [list(random, 1, 8, () => scale(random)), seeded(random)],
  reversedWeights: (random) => [weightsFrom(random)],
  orthantWeights: (random) => {
    const m = between(random, 1, 4);
    const rows = vectors(random, m, m + 1);
    const dot = (a: number[], b: number[]): number =>
      a.reduce((sum, x, i) => sum + x * (b[i] as number), 0);
    return [{ covariance: rows.map((a) => rows.map((b) => dot(a, b))) }];
  },
  queriesInHull: (random) => {
    const mahalanobisDistances = list(random, 1, 2, () => 6 * random());
    const n = Math.floor(10 ** (6 * random()));
    return [{ n, d: between(random, 1, 8), mahalanobisDistances }];
  },
  box: (random) => [list(random, 1, 20, () => (random() < 0.1 ? 0 : scale(random)))],
  ellipsoid: (random) => [{ semiAxes: list(random, 1, 8, () => scale(random)) }],
  steinerVolume: (random) => [bodyFrom(random), random() < 0.1 ? 0 : scale(random)],
  meanWidth: (random) => [bodyFrom(random)],
  surfaceArea: (random) => [bodyFrom(random)],
  sizingReport: (random) => [
    { d: between(random, 1, 8), law: lawFrom(random), targets: list(random, 0, 2, random) },
  ],
  smallest: search,
  largest: search,
  chart: (random) => {
    const [question, free, args] = questionFrom(random);
    const values = list(random, 1, 5, () =>
      free === 'n' || free === 'd' || free === 'steps' ? between(random, 1, 200) : random(),
    );
    return [question, { x: { [free]: values }, args }];
  },
  sizingChart: (random) => {
    const targets = list(random, 1, 2, random);
    return [hullgauge.sizingReport({ d: between(random, 1, 6), targets })];
  },
  inHull: (random) => {
    const d = between(random, 1, 5);
    return [pointsFrom(random, d), vectors(random, 1, d)[0]];
  },
  separable: (random) => {
    const points = pointsFrom(random, between(random, 1, 5));
    return [points, points.map(() => random() < 0.5), { intercept: random() < 0.7 }];
  },
  hullVertices: (random) => [pointsFrom(random, between(random, 1, 4), 12)],
  interpolationAudit: (random) => [pointsFrom(random, between(random, 1, 4), 12)],
  sampler: (random) => [
    lawFrom(random),
    { d: between(random, 1, 40), seed: between(random, 0, 1e9) },
  ],
  simulate: (random) => [(_: unknown, next: Float64Array) => (next[0] ?? 0) > 0, simulated(random)],
  hullVolumeRatioDecimal: (random) => {
    const d = between(random, 1, 8);
    const n = d + Math.floor(10 ** (3 * random()));
    return [{ n, d, b: pick(random, [-1, -0.5, 0, '0.3', 2.5]), digits: between(random, 1, 40) }];
  },
};
