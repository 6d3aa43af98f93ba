/**
 * Cones by their conic intrinsic volumes, and the simplest families.
 *
 * v_k of a closed convex cone in R^n is the probability that the nearest point of the cone to a standard
 * Gaussian vector lies in the relative interior of a face of dimension k. The v_k are the law of an
 * integer V between the lineality (largest subspace contained) and the dimension (smallest subspace
 * containing) of the cone; for a cone that is not a subspace its even and its odd values have
 * probability 1/2 each. Everything that depends on a cone only up to rotation is a function of them.
 */

import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { EPSILON, exactLogError } from '../epsilon.ts';
import { logBinomialPmfKernel } from '../special/binomial.ts';

/** A closed convex cone, known up to rotation: plain frozen data. */
export interface Cone {
  /** Always `'cone'`. */
  readonly kind: 'cone';
  /** Dimension of the space that the cone lies in. */
  readonly ambient: number;
  /** Dimension of the smallest subspace that contains the cone. */
  readonly dimension: number;
  /** Dimension of the largest subspace that the cone contains. */
  readonly lineality: number;
  /** Conic intrinsic volumes, index 0 to `ambient`; they sum to 1. */
  readonly intrinsicVolumes: readonly number[];
  /** Their natural logarithms, also where the numbers underflow; `-Infinity` for 0. */
  readonly logIntrinsicVolumes: readonly number[];
  /** Bounds on the absolute errors of the logarithms; for a simulated cone four standard errors. */
  readonly logErrors: readonly number[];
  /** The sum of k times the k-th intrinsic volume: how much of space the cone fills, as a dimension. */
  readonly statisticalDimension: number;
  /** Variance of the law whose probabilities are the intrinsic volumes. */
  readonly variance: number;
  /** Whether the intrinsic volumes are computed or estimated. */
  readonly method: 'exact' | 'simulated';
  /** Standard errors of the intrinsic volumes; only of a simulated cone. */
  readonly standardErrors?: readonly number[];
  /**
   * Present where the intrinsic volumes are known to be the same from the lineality upwards as from the
   * dimension downwards, as they are for a cone that is its own polar but for a sign.
   */
  readonly symmetric?: true;
}

/** What {@link makeCone} builds a cone from; moments are summed where they are left out. */
export interface ConeData {
  readonly dimension: number;
  readonly lineality: number;
  readonly logs: number[];
  /** The volumes themselves, where they are known better than through their logarithms. */
  readonly volumes?: number[];
  readonly logErrors: number[];
  readonly moments?: { readonly mean: number; readonly variance: number };
  readonly standardErrors?: number[];
  readonly symmetric?: boolean | undefined;
}

/** Largest ambient dimension: whole vectors of intrinsic volumes are kept. */
export const MAX_AMBIENT = 1_000_000;

/** Freezes the data of a cone in the space of dimension logs.length - 1. */
export function makeCone(data: ConeData): Cone {
  const { logs, logErrors, standardErrors } = data;
  const volumes = data.volumes ?? logs.map((log) => Math.exp(log));
  const { mean, variance } = data.moments ?? momentsOf(volumes);
  const cone: Cone = {
    kind: 'cone',
    ambient: logs.length - 1,
    dimension: data.dimension,
    lineality: data.lineality,
    intrinsicVolumes: Object.freeze(volumes),
    logIntrinsicVolumes: Object.freeze(logs),
    logErrors: Object.freeze(logErrors),
    statisticalDimension: mean,
    variance,
    method: standardErrors === undefined ? 'exact' : 'simulated',
    ...(standardErrors === undefined ? {} : { standardErrors: Object.freeze(standardErrors) }),
    ...(data.symmetric ? { symmetric: true } : {}),
  };
  return Object.freeze(cone);
}

/** Mean and variance of the law with the given probabilities. */
export function momentsOf(volumes: ArrayLike<number>): { mean: number; variance: number } {
  let mean = 0;
  for (let k = 0; k < volumes.length; k++) mean += k * (volumes[k] as number);
  let variance = 0;
  for (let k = 0; k < volumes.length; k++) {
    variance += (k - mean) * (k - mean) * (volumes[k] as number);
  }
  return { mean, variance };
}

/** Error bounds of logarithms that are each good to a few roundings of their own size. */
export function roundingErrors(logs: readonly number[], factor = 4): number[] {
  return logs.map((log) => (Number.isFinite(log) ? factor * EPSILON * (1 + Math.abs(log)) : 0));
}

/** Error bounds of the logarithms of volumes that are exact doubles. */
export function exactErrors(logs: readonly number[]): number[] {
  return logs.map((log) => (Number.isFinite(log) ? exactLogError(log) : 0));
}

/** The largest space in which exact volumes are made use of. */
const EXACT_AMBIENT = 53;

/** Whether all products of volumes, one from each cone, are exact, and their sums as well. */
export function exactTogether(...cones: readonly Cone[]): boolean {
  return cones.reduce((product, cone) => product * denominator(cone), 1) <= 2 ** 53;
}

/** The power of two of which all volumes are exact multiples; infinite if one is not known exactly. */
function denominator(cone: Cone): number {
  if (cone.ambient > EXACT_AMBIENT) return Number.POSITIVE_INFINITY;
  let scale = 1;
  for (let k = cone.lineality; k <= cone.dimension; k++) {
    const log = cone.logIntrinsicVolumes[k] as number;
    if (cone.logErrors[k] !== exactLogError(log)) return Number.POSITIVE_INFINITY;
    while (!Number.isInteger((cone.intrinsicVolumes[k] as number) * scale)) scale *= 2;
  }
  return scale;
}

/** Refuses anything but a cone. */
export function checkCone(fn: string, parameter: string, value: unknown): asserts value is Cone {
  if (typeof value === 'object' && value !== null && (value as Cone).kind === 'cone') return;
  throw new DomainError(fn, parameter, 'a cone', value);
}

/** Whether the cone is a linear subspace: for all others no volume exceeds 1/2. */
export function isSubspace(cone: Cone): boolean {
  return cone.lineality === cone.dimension;
}

/** The cone with all its weight on one index. */
export function subspaceKernel(dimension: number, ambient: number): Cone {
  const logs = new Array<number>(ambient + 1).fill(Number.NEGATIVE_INFINITY);
  logs[dimension] = 0;
  return makeCone({
    dimension,
    lineality: dimension,
    logs,
    logErrors: new Array<number>(ambient + 1).fill(0),
    moments: { mean: dimension, variance: 0 },
    symmetric: true,
  });
}

/**
 * A linear subspace as a cone: the intrinsic volume of its own dimension is 1.
 *
 * Cost: proportional to the ambient dimension. Exact.
 *
 * Source: Intrinsic volumes of polyhedral cones: a combinatorial perspective, Discrete and
 * Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @param args - `dimension` of the subspace, an integer from 0 to `ambient`, and `ambient`, the
 * dimension of the space, an integer from 0 to 1000000
 * @returns the cone
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { productCone, orthant, subspace } from 'hullgauge/conic';
 * subspace({ dimension: 2, ambient: 3 }).intrinsicVolumes; // => [0, 0, 1, 0]
 * productCone(subspace({ dimension: 1, ambient: 1 }), orthant(1)).intrinsicVolumes; // => [0, 0.5, 0.5]
 * ```
 */
export function subspace(args: { dimension: number; ambient: number }): Cone {
  const fn = 'subspace';
  checkOptions(fn, args, ['dimension', 'ambient']);
  const { dimension, ambient } = args;
  checkInteger(fn, 'ambient', ambient, 0, MAX_AMBIENT);
  checkInteger(fn, 'dimension', dimension, 0, ambient);
  return subspaceKernel(dimension || 0, ambient);
}

/**
 * The half-line in R^1; products with subspaces carry it to any space.
 *
 * Exact: $v_0 = v_1 = \tfrac12$.
 *
 * @returns the cone
 *
 * @example
 * ```ts
 * import { ray } from 'hullgauge/conic';
 * ray().intrinsicVolumes; // => [0.5, 0.5]
 * ```
 */
export function ray(): Cone {
  return orthantKernel(1);
}

/**
 * The half-space of R^n, for n from 1 to 1000000.
 *
 * Exact: $v_{n-1} = v_n = \tfrac12$. Cost: proportional to n.
 *
 * @param n - ambient dimension, an integer from 1 to 1000000
 * @returns the cone
 * @throws A {@link DomainError} if `n` is not such an integer
 *
 * @example
 * ```ts
 * import { halfspace } from 'hullgauge/conic';
 * halfspace(3).statisticalDimension; // => 2.5
 * ```
 */
export function halfspace(n: number): Cone {
  checkInteger('halfspace', 'n', n, 1, MAX_AMBIENT);
  return halfspaceKernel(n);
}

/** The half-space without checks. */
export function halfspaceKernel(n: number): Cone {
  const logs = new Array<number>(n + 1).fill(Number.NEGATIVE_INFINITY);
  logs[n - 1] = -Math.LN2;
  logs[n] = -Math.LN2;
  return makeCone({
    dimension: n,
    lineality: n - 1,
    logs,
    volumes: logs.map((log) => (log === -Math.LN2 ? 0.5 : 0)),
    logErrors: exactErrors(logs),
    moments: { mean: n - 0.5, variance: 0.25 },
    symmetric: true,
  });
}

/**
 * The non-negative orthant of R^n, for n from 0 to 1000000: the vectors without a negative coordinate.
 *
 * $$ v_k = \binom{n}{k} 2^{-n}, \qquad \delta = \tfrac{n}{2}, \qquad \sigma^2 = \tfrac{n}{4}. $$
 *
 * Cost: proportional to n.
 *
 * Accuracy: error of $\ln v_k$ at most $10^{-15} \max(1, |\ln v_k|)$.
 *
 * Source: Intrinsic volumes of polyhedral cones: a combinatorial perspective, Discrete and
 * Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @param n - dimension, an integer from 0 to 1000000
 * @returns the cone
 * @throws A {@link DomainError} if `n` is not such an integer
 *
 * @example
 * ```ts
 * import { coneMeetsSubspace, orthant } from 'hullgauge/conic';
 * orthant(3).intrinsicVolumes; // => [0.125, 0.375, 0.375, 0.125]
 * coneMeetsSubspace(orthant(10), { codimension: 3 }).value; // => 0.91015625
 * ```
 */
export function orthant(n: number): Cone {
  checkInteger('orthant', 'n', n, 0, MAX_AMBIENT);
  return orthantKernel(n || 0);
}

/** The orthant without checks. */
export function orthantKernel(n: number): Cone {
  const shape = {
    dimension: n,
    lineality: 0,
    moments: { mean: n / 2, variance: n / 4 },
    symmetric: true,
  };
  if (n <= EXACT_BINOMIALS) {
    const volumes = exactBinomials(n);
    const logs = volumes.map(Math.log);
    return makeCone({ ...shape, logs, volumes, logErrors: exactErrors(logs) });
  }
  const logs = new Array<number>(n + 1);
  for (let k = 0; 2 * k <= n; k++) {
    logs[k] = logBinomialPmfKernel(n, k, 0.5, 0.5);
    logs[n - k] = logs[k] as number;
  }
  return makeCone({ ...shape, logs, logErrors: roundingErrors(logs) });
}

/** Up to here the binomial coefficients are exact doubles. */
const EXACT_BINOMIALS = 50;

function exactBinomials(n: number): number[] {
  const values = [1];
  for (let j = 1; j <= n; j++) {
    values[j] = 1;
    for (let k = j - 1; k > 0; k--) values[k] = (values[k] as number) + (values[k - 1] as number);
  }
  return values.map((value) => value * 2 ** -n);
}
