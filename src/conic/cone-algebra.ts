/**
 * Products and polars of cones.
 */

import { DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { type Cone, checkCone, exactErrors, exactTogether, MAX_AMBIENT, makeCone } from './cone.ts';

/** Terms this far below the largest do not change a sum. */
const CUT = 45;

/**
 * The product of two cones, in the space of their dimensions' sum.
 *
 * $$ v_k(C \times D) = \sum_{i+j=k} v_i(C)\, v_j(D); $$
 *
 * statistical dimension and variance add.
 *
 * Cost: proportional to the product of the two dimensions.
 *
 * Accuracy: errors of the logarithms are those of the factors plus a few roundings. If a factor is
 * simulated, so is the product, with upper bounds for its standard errors.
 *
 * Source: Intrinsic volumes of polyhedral cones: a combinatorial perspective, Discrete and
 * Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @param first - a cone
 * @param second - a cone; the two dimensions add up to at most 1000000
 * @returns the product
 * @throws A {@link DomainError} if an argument is not a cone, or the product is too large
 *
 * @example
 * ```ts
 * import { orthant, productCone } from 'hullgauge/conic';
 * productCone(orthant(1), orthant(1)).intrinsicVolumes; // => [0.25, 0.5, 0.25]
 * ```
 */
export function productCone(first: Cone, second: Cone): Cone {
  const fn = 'productCone';
  checkCone(fn, 'first', first);
  checkCone(fn, 'second', second);
  const ambient = first.ambient + second.ambient;
  if (ambient > MAX_AMBIENT) {
    throw new DomainError(
      fn,
      'second',
      `a cone with ambient at most ${MAX_AMBIENT - first.ambient}`,
      second,
    );
  }
  const dimension = first.dimension + second.dimension;
  const lineality = first.lineality + second.lineality;
  const moments = {
    mean: first.statisticalDimension + second.statisticalDimension,
    variance: first.variance + second.variance,
  };
  const symmetric = first.symmetric && second.symmetric;
  const shape = { dimension, lineality, moments, symmetric };
  if (exactTogether(first, second)) {
    const volumes = plainProduct(first.intrinsicVolumes, second.intrinsicVolumes);
    const exactLogs = volumes.map(Math.log);
    return makeCone({ ...shape, logs: exactLogs, volumes, logErrors: exactErrors(exactLogs) });
  }
  const logs = new Array<number>(ambient + 1).fill(Number.NEGATIVE_INFINITY);
  const logErrors = new Array<number>(ambient + 1).fill(0);
  const error = new Float64Array(1);
  for (let k = lineality; k <= dimension; k++) {
    logs[k] = logProductVolume(first, second, k, error);
    logErrors[k] = error[0] as number;
  }
  const standardErrors = productStandardErrors(first, second);
  const data = { ...shape, logs, logErrors };
  return makeCone(standardErrors === undefined ? data : { ...data, standardErrors });
}

function plainProduct(u: readonly number[], v: readonly number[]): number[] {
  const product = new Array<number>(u.length + v.length - 1).fill(0);
  for (let i = 0; i < u.length; i++) {
    for (let j = 0; j < v.length; j++) {
      product[i + j] = (product[i + j] as number) + (u[i] as number) * (v[j] as number);
    }
  }
  return product;
}

/** log v_k of the product of two cones; writes its error bound to `error[0]`. */
export function logProductVolume(
  first: Cone,
  second: Cone,
  k: number,
  error: Float64Array,
): number {
  const u = first.logIntrinsicVolumes;
  const v = second.logIntrinsicVolumes;
  const start = Math.max(first.lineality, k - second.dimension);
  const end = Math.min(first.dimension, k - second.lineality);
  let top = Number.NEGATIVE_INFINITY;
  for (let i = start; i <= end; i++) {
    const log = (u[i] as number) + (v[k - i] as number);
    if (log > top) top = log;
  }
  error[0] = 0;
  if (top === Number.NEGATIVE_INFINITY) return top;
  let sum = 0;
  let weighted = 0;
  for (let i = start; i <= end; i++) {
    const log = (u[i] as number) + (v[k - i] as number) - top;
    if (log < -CUT) continue;
    const term = Math.exp(log);
    sum += term;
    weighted += term * ((first.logErrors[i] as number) + (second.logErrors[k - i] as number));
  }
  const count = end - start + 1;
  const rounding =
    count > 1
      ? EPSILON * (3 + 0.5 * Math.sqrt(count) + Math.abs(top))
      : u[start] === 0 || v[k - start] === 0
        ? 0
        : EPSILON * Math.abs(top);
  error[0] = weighted / sum + rounding;
  return top + Math.log(sum);
}

/** Upper bounds: the estimates within one cone are negatively correlated, the factors are positive. */
function productStandardErrors(first: Cone, second: Cone): number[] | undefined {
  const s = first.standardErrors;
  const t = second.standardErrors;
  if (s === undefined && t === undefined) return undefined;
  const squares = new Array<number>(first.ambient + second.ambient + 1).fill(0);
  for (let i = first.lineality; i <= first.dimension; i++) {
    for (let j = second.lineality; j <= second.dimension; j++) {
      const a = (s?.[i] ?? 0) * (second.intrinsicVolumes[j] as number);
      const b = (t?.[j] ?? 0) * (first.intrinsicVolumes[i] as number);
      squares[i + j] = (squares[i + j] as number) + a * a + b * b;
    }
  }
  return squares.map((square) => Math.sqrt(square));
}

/**
 * The polar cone: all vectors at a right or obtuse angle to every vector of the cone.
 *
 * $$ C^\circ = \lbrace y : \langle x, y \rangle \le 0 \text{ for all } x \in C \rbrace, \qquad v_k(C^\circ) = v_{n-k}(C). $$
 *
 * Exact, given the cone.
 *
 * Source: Intrinsic volumes of polyhedral cones: a combinatorial perspective, Discrete and
 * Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @param cone - a cone
 * @returns its polar
 * @throws A {@link DomainError} if the argument is not a cone
 *
 * @example
 * ```ts
 * import { polarCone, weylChamber } from 'hullgauge/conic';
 * polarCone(weylChamber('B', 2)).intrinsicVolumes; // => [0.125, 0.5, 0.375]
 * ```
 */
export function polarCone(cone: Cone): Cone {
  checkCone('polarCone', 'cone', cone);
  const data = {
    dimension: cone.ambient - cone.lineality,
    lineality: cone.ambient - cone.dimension,
    logs: [...cone.logIntrinsicVolumes].reverse(),
    volumes: [...cone.intrinsicVolumes].reverse(),
    logErrors: [...cone.logErrors].reverse(),
    moments: { mean: cone.ambient - cone.statisticalDimension, variance: cone.variance },
    symmetric: cone.symmetric,
  };
  const { standardErrors } = cone;
  return makeCone(
    standardErrors === undefined
      ? data
      : { ...data, standardErrors: [...standardErrors].reverse() },
  );
}

/** The same cone in a larger space. */
export function embed(cone: Cone, ambient: number): Cone {
  const pad = (values: readonly number[], fill: number): number[] => [
    ...values,
    ...new Array<number>(ambient - cone.ambient).fill(fill),
  ];
  const data = {
    dimension: cone.dimension,
    lineality: cone.lineality,
    logs: pad(cone.logIntrinsicVolumes, Number.NEGATIVE_INFINITY),
    volumes: pad(cone.intrinsicVolumes, 0),
    logErrors: pad(cone.logErrors, 0),
    moments: { mean: cone.statisticalDimension, variance: cone.variance },
    symmetric: cone.symmetric,
  };
  const { standardErrors } = cone;
  return makeCone(
    standardErrors === undefined ? data : { ...data, standardErrors: pad(standardErrors, 0) },
  );
}
