/** What an answer has to do for its own arguments: inverses, searches, certificates. */
import type { Answer, Probability } from 'hullgauge';
import {
  binomialCdf,
  chiSquaredCdf,
  incompleteBeta,
  incompleteGamma,
  normalCdf,
} from 'hullgauge/special';
import type { Four } from './inspect.ts';

/** At most four arguments are looked at. */
type Check = (args: readonly [never, never, never, never], result: never) => string | undefined;

/** The checks by function. */
export const checks: Readonly<Record<string, Check>> = {
  normalQuantile: ([p], x) => around(p, x, normalCdf),
  chiSquaredQuantile: ([p, df], x) => around(p, x, (t) => chiSquaredCdf(t, df)),
  incompleteGammaInverse: ([a, p], x) => around(p, x, (t) => incompleteGamma(a, t)),
  incompleteBetaInverse: ([a, b, p], { x, y }: { x: number; y: number }) =>
    x <= 0.5
      ? around(p, x, (t) => incompleteBeta(a, b, Math.min(t, 1)))
      : around(flip(p), y, (t) => incompleteBeta(b, a, Math.min(t, 1))),
  binomialQuantile: ([prob, n, p, q], k: number) => {
    const cdf = (j: number): Probability =>
      q === undefined ? binomialCdf(j, n, p) : binomialCdf(j, n, p, q);
    if (isBelow(cdf(k), prob)) return `cdf(${k}) is below the level`;
    return k > 0 && isBelow(prob, cdf(k - 1)) ? `cdf(${k} - 1) is above the level` : undefined;
  },
  smallest: ([question, parameter, fixed, target], answer) =>
    searched(question, parameter, fixed, target, answer, -1),
  largest: ([question, parameter, fixed, target], answer) =>
    searched(question, parameter, fixed, target, answer, 1),
  totalOrder: (_, weights) => sumsToOne(weights),
  simpleTree: (_, weights) => sumsToOne(weights),
  approxTotalOrder: (_, weights) => sumsToOne(weights),
  orthantWeights: (_, weights) => sumsToOne(weights),
  reversedWeights: (_, weights) => sumsToOne(weights),
  logSpaced: (_, grid: number[]) =>
    grid.every((x, i) => i === 0 || x > (grid[i - 1] as number)) ? undefined : 'not ascending',
  inHull: ([points, query], membership) => certified(points, query, membership),
  hullVertices: ([points], vertices: number[]) =>
    vertices.every((i, at) => i < (points as unknown[]).length && i > (vertices[at - 1] ?? -1))
      ? undefined
      : `no ascending indices: ${vertices}`,
};

type Level = number | Four;

const lowerLog = (p: Level): number => (typeof p === 'number' ? Math.log(p) : p.log);
const upperLog = (p: Level): number => (typeof p === 'number' ? Math.log1p(-p) : p.logComplement);
const errorOf = (p: Level): number => (typeof p === 'number' ? 0 : p.logError);

function flip(p: Level): Level {
  if (typeof p === 'number') {
    const [log, logComplement] = [Math.log1p(-p), Math.log(p)];
    return { value: 1 - p, complement: p, log, logComplement, logError: 0 };
  }
  const { value, complement, log, logComplement, logError } = p;
  return { value: complement, complement: value, log: logComplement, logComplement: log, logError };
}

/** Whether p is below q by more than their errors, on the scale of the smaller tail. */
function isBelow(p: Level, q: Level): boolean {
  const [logs, rests] = [
    [lowerLog(p), lowerLog(q)],
    [upperLog(q), upperLog(p)],
  ] as [[number, number], [number, number]];
  const [first, second] = Math.min(...logs) < Math.min(...rests) ? logs : rests;
  const error = errorOf(p) + errorOf(q) + 1e-13 * (1 + Math.min(1e300, Math.abs(second)));
  return first < second - error;
}

/** Whether a distribution function passes the level between the doubles beside the quantile. */
function around(p: Level, x: number, cdf: (x: number) => Four): string | undefined {
  if (!Number.isFinite(x) || Math.abs(x) < 1e-290) return undefined;
  const step = 8 * 2 ** -52 * Math.abs(x);
  if (isBelow(cdf(x + step), p)) return `cdf beyond ${x} is below the level`;
  return isBelow(p, cdf(x - step)) ? `cdf before ${x} is above the level` : undefined;
}

const sumsToOne = (weights: readonly number[]): string | undefined => {
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return Math.abs(sum - 1) < 1e-12 * (1 + weights.length) ? undefined : `weights sum to ${sum}`;
};

/** Whether the answer reaches the target, and the next one on the other side fails where it is exact. */
function searched(
  question: (args: object) => Probability,
  parameter: string,
  fixed: object,
  target: unknown,
  answer: Answer,
  outwards: 1 | -1,
): string | undefined {
  const reaches = (p: Probability): number => {
    if (typeof target === 'number') return p.value - target;
    const { atMost, complementAtMost } = target as { atMost?: number; complementAtMost?: Four };
    if (atMost !== undefined) return atMost - p.value;
    if (complementAtMost !== undefined) return complementAtMost.log - p.logComplement;
    return p.log - (target as Four).log;
  };
  const { value, probability, exact, bracket } = answer;
  if (!(bracket[0] <= value && value <= bracket[1])) return `${value} outside ${bracket}`;
  const here = reaches(probability);
  if (here < -1e-9 * (1 + Math.abs(probability.log) + Math.abs(probability.logComplement)))
    return `misses the target by ${here} at ${value}`;
  if (!exact) return undefined;
  try {
    const beyond = question({ ...fixed, [parameter]: value + outwards });
    return reaches(beyond) > 1e-12 ? `${value + outwards} reaches the target too` : undefined;
  } catch {
    // the end of the domain
    return undefined;
  }
}

interface Membership {
  readonly position: string;
  readonly distance: number;
  readonly weights: readonly { readonly index: number; readonly weight: number }[];
  readonly separator: { readonly normal: readonly number[]; readonly offset: number } | null;
}

/** Whether the weights of a point inside rebuild it, and the separator of one outside separates. */
function certified(
  points: readonly number[][],
  query: readonly number[],
  { position, distance, weights, separator }: Membership,
): string | undefined {
  if (!(distance >= 0)) return `distance ${distance}`;
  if (weights.some(({ weight }) => !(weight >= 0 && weight <= 1 + 1e-12))) return 'weights';
  if (position === 'inside') {
    for (const [j, q] of query.entries()) {
      const column = points.map((row) => row[j] as number);
      const sum = weights.reduce((total, w) => total + w.weight * (column[w.index] as number), 0);
      const size = Math.max(...column.map(Math.abs), Math.abs(q));
      if (Math.abs(sum - q) > 1e-11 * size) return `weights give ${sum} in place of ${q}`;
    }
  }
  if (separator === null) return position === 'outside' ? 'no separator' : undefined;
  const { normal, offset } = separator;
  const dot = (x: readonly number[]): number =>
    x.reduce((sum, value, j) => sum + value * (normal[j] as number), 0);
  const separates = points.every((point) => dot(point) < offset) && dot(query) > offset;
  return separates ? undefined : 'the separator does not separate';
}
