/**
 * Convex bodies by their intrinsic volumes, and what follows from those alone.
 */

import { checkFinite, DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { isLogNumber, LogNumber } from '../log-number.ts';
import { errorShare } from '../numeric/stated-error.ts';
import { logSumExpKernel } from '../special/log-domain.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { logBallVolumeKernel } from './ball-kernel.ts';

const HALF_LOG_PI = 0.57236494292470009;

/** A convex body as far as its intrinsic volumes know it; plain frozen data. */
export interface Body {
  /** Dimension of the space. */
  readonly dimension: number;
  /** Intrinsic volumes V_0 = 1, V_1, ..., V_d = volume. */
  readonly intrinsicVolumes: readonly LogNumber[];
}

/** A body from the logarithms of its intrinsic volumes and bounds on their errors. */
export function bodyFromLogs(logs: readonly number[], errors: readonly number[]): Body {
  const volumes = logs.map((log, k) => LogNumber.fromLog(log, errors[k] as number));
  return Object.freeze({
    dimension: logs.length - 1,
    intrinsicVolumes: Object.freeze(volumes),
  });
}

function checkBody(fn: string, body: unknown): asserts body is Body {
  const { dimension, intrinsicVolumes } = (body ?? {}) as Partial<Body>;
  const fits =
    Array.isArray(intrinsicVolumes) &&
    intrinsicVolumes.length > 1 &&
    intrinsicVolumes.length === (dimension ?? -1) + 1 &&
    intrinsicVolumes.every(isLogNumber);
  if (!fits) throw new DomainError(fn, 'body', 'a body such as cube({ d: 3 })', body);
}

/** log of the k-th intrinsic volume, also of a body that came from JSON. */
function logVolume(body: Body, k: number): number {
  return Number((body.intrinsicVolumes[k] as LogNumber).log);
}

function errorOf(body: Body, k: number): number {
  return Number((body.intrinsicVolumes[k] as LogNumber).logError);
}

/**
 * Volume of the set of all points within a distance of a convex body, by Steiner's formula.
 *
 * $$\operatorname{vol}(K + rB) = \sum_{k=0}^{d} \kappa_{d-k}\, r^{d-k}\, V_k(K)$$
 *
 * Cost: d + 1 terms, all positive. Accuracy: within the result's `logError`.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param body - a body of this room
 * @param distance - finite and >= 0
 * @returns the volume
 * @throws A {@link DomainError} if `body` is not a body or `distance` out of range
 *
 * @example
 * ```ts
 * import { cube, steinerVolume } from 'hullgauge/intrinsic';
 * // a square of side 1 and all points within 1 of it: 1 + 4 + pi
 * steinerVolume(cube({ d: 2 }), 1).value.toPrecision(12); // => (5 + Math.PI).toPrecision(12)
 * ```
 */
export function steinerVolume(body: Body, distance: number): LogNumber {
  checkBody('steinerVolume', body);
  checkFinite('steinerVolume', 'distance', distance, 0);
  const d = body.dimension;
  const logDistance = Math.log(distance);
  const terms = new Float64Array(d + 1);
  const errors = new Float64Array(d + 1);
  for (let k = 0; k <= d; k++) {
    const scale = k === d ? 0 : (d - k) * logDistance;
    const kappa = logBallVolumeKernel(d - k);
    terms[k] = scale + kappa + logVolume(body, k);
    errors[k] = errorOf(body, k) + EPSILON * (4 + 4 * (Math.abs(scale) + Math.abs(kappa)));
  }
  const log = logSumExpKernel(terms);
  if (log === Number.NEGATIVE_INFINITY) return LogNumber.fromLog(log);
  // The error of each term counts with its share.
  let error = EPSILON * (4 + Math.abs(log));
  for (let k = 0; k <= d; k++) {
    error += errorShare(terms[k] as number, errors[k] as number, log);
  }
  return LogNumber.fromLog(log, error);
}

/**
 * Mean width of a convex body: the distance of two parallel supporting hyperplanes, averaged over all
 * directions.
 *
 * $$w(K) = \frac{2 \kappa_{d-1}}{d \kappa_d} V_1(K)$$
 *
 * Cost: constant. Accuracy: relative error at most that of the logarithm of $V_1$ plus 1e-15 for d up to
 * 1000.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param body - a body of this room
 * @returns the mean width
 * @throws A {@link DomainError} if `body` is not a body
 *
 * @example
 * ```ts
 * import { ball, meanWidth } from 'hullgauge/intrinsic';
 * meanWidth(ball({ d: 7, radius: 3 })).toPrecision(12); // => '6.00000000000'
 * ```
 */
export function meanWidth(body: Body): number {
  checkBody('meanWidth', body);
  const d = body.dimension;
  // kappa_(d-1) / kappa_d, without the cancellation of two volumes
  const ratio = logGammaRatioKernel(0.5 * (d + 1), 0.5) - HALF_LOG_PI;
  return Math.exp(Math.LN2 - Math.log(d) + ratio + logVolume(body, 1));
}

/**
 * Surface area of a convex body with inner points, from its intrinsic volumes.
 *
 * $$S(K) = 2\, V_{d-1}(K)$$
 *
 * Assumes that the body has inner points: of a flat one, of dimension d - 1, the number is both of its sides.
 *
 * Cost: constant. Accuracy: that of $V_{d-1}$.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param body - a body of this room
 * @returns the (d - 1)-dimensional measure of the boundary; 2 for d = 1
 * @throws A {@link DomainError} if `body` is not a body
 *
 * @example
 * ```ts
 * import { cube, surfaceArea } from 'hullgauge/intrinsic';
 * surfaceArea(cube({ d: 3, side: 2 })).value; // => 24
 * ```
 */
export function surfaceArea(body: Body): LogNumber {
  checkBody('surfaceArea', body);
  const k = body.dimension - 1;
  const log = logVolume(body, k);
  return LogNumber.fromLog(Math.LN2 + log, errorOf(body, k) + EPSILON * (1 + Math.abs(log)));
}
