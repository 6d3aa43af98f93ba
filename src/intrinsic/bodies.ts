/**
 * Balls, boxes, regular simplices and cross-polytopes by their intrinsic volumes.
 *
 * A k-face of a polytope contributes its volume times its external angle. For the regular simplex and
 * the cross-polytope the angles are equicorrelated orthant probabilities of normal variables.
 */

import { checkFinite, checkInteger, checkOptions, DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { logAbsoluteOrthantKernel, logPositiveOrthantKernel } from '../numeric/orthant.ts';
import { logBinomialKernel, logFactorialKernel } from '../special/log-beta.ts';
import { logBallIntrinsicVolumeKernel } from './ball-kernel.ts';
import { type Body, bodyFromLogs } from './body.ts';
import { logElementarySymmetric } from './elementary-symmetric.ts';

/** Largest dimension of a body whose d + 1 intrinsic volumes are listed. */
const MAX_DIMENSION = 10_000;
/** Largest dimension where the list costs d^2 steps. */
const MAX_SIDES = 2000;

/** Dimension of a body and one length. */
export interface BallArgs {
  /** Dimension, from 1 to 10000. */
  readonly d: number;
  /** Radius, finite and >= 0; 1 if left out. */
  readonly radius?: number | undefined;
}

/** Options of {@link cube}. */
export interface CubeArgs {
  /** Dimension, from 1 to 10000. */
  readonly d: number;
  /** Length of an edge, finite and >= 0; 1 if left out. */
  readonly side?: number | undefined;
}

/** Options of {@link regularSimplex}. */
export interface RegularSimplexArgs {
  /** Dimension, from 1 to 10000. */
  readonly d: number;
  /** Length of an edge, finite and >= 0; 1 if left out. */
  readonly edge?: number | undefined;
}

/** Options of {@link crossPolytope}. */
export interface CrossPolytopeArgs {
  /** Dimension, from 1 to 10000. */
  readonly d: number;
  /** Distance of the vertices from the centre, finite and >= 0; 1 if left out. */
  readonly scale?: number | undefined;
}

/** The body with V_k = size^k exp(log(k)), k = 1, ..., d. */
function scaledBody(
  d: number,
  size: number,
  log: (k: number, error: Float64Array) => number,
): Body {
  const logSize = Math.log(size);
  const logs = [0];
  const errors = [0];
  const error = new Float64Array(1);
  for (let k = 1; k <= d; k++) {
    error[0] = 0;
    const value = log(k, error);
    const scale = k * logSize;
    logs.push(value + scale);
    const rounding = scale > Number.NEGATIVE_INFINITY ? 2 * Math.abs(scale) : 0;
    errors.push((error[0] as number) + EPSILON * (2 + Math.abs(value) + rounding));
  }
  return bodyFromLogs(logs, errors);
}

/** Checks the two options of a body of one length and returns them. */
function sized(
  fn: string,
  args: unknown,
  name: string,
  standard: number,
): { d: number; size: number } {
  checkOptions(fn, args, ['d', name]);
  const { d, [name]: size = standard } = args as Record<string, unknown>;
  checkInteger(fn, 'd', d, 1, MAX_DIMENSION);
  checkFinite(fn, name, size, 0);
  return { d, size };
}

/**
 * The ball of a given radius in R^d, for d from 1 to 10000.
 *
 * $$V_k = \binom dk \frac{\kappa_d}{\kappa_{d-k}}\, r^k$$
 *
 * Cost: d + 1 closed forms. Accuracy: within each `logError`.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param args - `d`: an integer from 1 to 10000; `radius`: finite and >= 0, 1 if left out
 * @returns the body
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { ball } from 'hullgauge/intrinsic';
 * ball({ d: 3 }).intrinsicVolumes[1].value; // => 4
 * ```
 */
export function ball(args: BallArgs): Body {
  const { d, size } = sized('ball', args, 'radius', 1);
  return scaledBody(d, size, (k, error) => logBallIntrinsicVolumeKernel(d, k, error));
}

/**
 * The cube of a given side in R^d, for d from 1 to 10000.
 *
 * $$V_k = \binom dk a^k$$
 *
 * Cost: d + 1 closed forms. Accuracy: within each `logError`. Source: as for {@link box}.
 *
 * @param args - `d`: an integer from 1 to 10000; `side`: finite and >= 0, 1 if left out
 * @returns the body
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { cube } from 'hullgauge/intrinsic';
 * cube({ d: 7 }).intrinsicVolumes[3].value; // => 35
 * ```
 */
export function cube(args: CubeArgs): Body {
  const { d, size } = sized('cube', args, 'side', 1);
  return scaledBody(d, size, (k, error) => {
    const value = logBinomialKernel(d, k);
    error[0] = EPSILON * (2 + 2 * value);
    return value;
  });
}

/**
 * The box with given sides, for up to 2000 of them: $V_k$ is the k-th elementary symmetric polynomial of the
 * sides.
 *
 * Cost: d^2 steps. Accuracy: within each `logError`; all terms are positive.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param sides - from 1 to 2000 numbers, finite and >= 0
 * @returns the body
 * @throws A {@link DomainError} if `sides` is empty, too long or has an element out of range
 *
 * @example
 * ```ts
 * import { box } from 'hullgauge/intrinsic';
 * box([1, 2, 3]).intrinsicVolumes.map((v) => v.value); // => [1, 6, 11, 6]
 * ```
 */
export function box(sides: readonly number[]): Body {
  if (!Array.isArray(sides) || sides.length < 1 || sides.length > MAX_SIDES) {
    throw new DomainError('box', 'sides', `an array of 1 to ${MAX_SIDES} numbers`, sides);
  }
  for (const [i, side] of sides.entries()) checkFinite('box', `sides[${i}]`, side, 0);
  const sideLogs = sides.map((side) => Math.log(side));
  const logs = [...logElementarySymmetric(sideLogs)];
  // Logarithms of long and short sides cancel.
  let size = sides.length;
  for (const log of sideLogs) if (log > Number.NEGATIVE_INFINITY) size += Math.abs(log);
  return bodyFromLogs(
    logs,
    logs.map((log, k) =>
      k > 0 && log > Number.NEGATIVE_INFINITY ? EPSILON * (size + 2 * Math.abs(log)) : 0,
    ),
  );
}

/**
 * The regular simplex with a given edge, for d from 1 to 10000.
 *
 * For edge $\sqrt 2$
 *
 * $$V_k = \binom{d+1}{k+1} \frac{\sqrt{k+1}}{k!}\, P\left(\xi_1, \dots, \xi_{d-k} < \frac{\xi}{\sqrt{k+1}}\right)$$
 *
 * with independent standard normal variables: the number of k-faces, their volume, and their external angle.
 *
 * Cost: d integrals of one variable. Accuracy: within each `logError`, 5e-15 max(1, |log|) for d up to 200.
 *
 * Source: Absorption probabilities for Gaussian polytopes and regular spherical simplices, Advances in Applied
 * Probability 52 (2020), arXiv:1704.04968.
 *
 * @param args - `d`: an integer from 1 to 10000; `edge`: finite and >= 0, 1 if left out
 * @returns the body
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { regularSimplex } from 'hullgauge/intrinsic';
 * // the equilateral triangle: half its perimeter, and its area
 * const [, half, area] = regularSimplex({ d: 2 }).intrinsicVolumes;
 * [half.value.toPrecision(12), area.value.toPrecision(12)]; // => ['1.50000000000', Math.sqrt(3 / 16).toPrecision(12)]
 * ```
 */
export function regularSimplex(args: RegularSimplexArgs): Body {
  const { d, size } = sized('regularSimplex', args, 'edge', 1);
  return scaledBody(d, size * Math.SQRT1_2, (k, error) => {
    const angle = logPositiveOrthantKernel(d - k, k + 1, error);
    const faces = logBinomialKernel(d + 1, k + 1);
    const volume = 0.5 * Math.log(k + 1) - logFactorialKernel(k);
    error[0] = (error[0] as number) + EPSILON * (2 + 2 * faces + 2 * Math.abs(volume));
    return faces + volume + angle;
  });
}

/**
 * The cross-polytope, the hull of the points +-s e_i, for d from 1 to 10000.
 *
 * For s = 1 and k < d
 *
 * $$V_k = 2^{k+1} \binom{d}{k+1} \frac{\sqrt{k+1}}{k!}\, P\left(|\xi_1|, \dots, |\xi_{d-k-1}| < \frac{\xi}{\sqrt{k+1}}\right),$$
 *
 * and $V_d = 2^d / d!$.
 *
 * Cost: d integrals of one variable. Accuracy: within each `logError`, 5e-15 max(1, |log|) for d up to 50.
 *
 * Source: Intrinsic volumes and lattice points of crosspolytopes, Monatshefte für Mathematik 115 (1993).
 *
 * @param args - `d`: an integer from 1 to 10000; `scale`: finite and >= 0, 1 if left out
 * @returns the body
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { crossPolytope, surfaceArea } from 'hullgauge/intrinsic';
 * // eight triangles of edge sqrt(2)
 * surfaceArea(crossPolytope({ d: 3 })).value.toPrecision(12); // => Math.sqrt(48).toPrecision(12)
 * ```
 */
export function crossPolytope(args: CrossPolytopeArgs): Body {
  const { d, size } = sized('crossPolytope', args, 'scale', 1);
  return scaledBody(d, size, (k, error) => {
    if (k === d) {
      const factorial = logFactorialKernel(d);
      error[0] = EPSILON * (d + factorial);
      return d * Math.LN2 - factorial;
    }
    const angle = logAbsoluteOrthantKernel(d - k - 1, k + 1, error);
    const faces = (k + 1) * Math.LN2 + logBinomialKernel(d, k + 1);
    const volume = 0.5 * Math.log(k + 1) - logFactorialKernel(k);
    error[0] = (error[0] as number) + EPSILON * (2 + 2 * faces + 2 * Math.abs(volume));
    return faces + volume + angle;
  });
}
