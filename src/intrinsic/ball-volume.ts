/**
 * Volumes and surface areas of balls, and the flag coefficients.
 */

import { checkFinite, checkInteger } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { LogNumber } from '../log-number.ts';
import { logBallIntrinsicVolumeKernel, logBallVolumeKernel } from './ball-kernel.ts';

/**
 * Volume of the ball of a given radius in R^d, for d from 0 up.
 *
 * $$\kappa_d r^d = \frac{\pi^{d/2}}{\Gamma(\frac d2 + 1)}\, r^d$$
 *
 * Cost: constant. Accuracy: the logarithm is within `logError`, a few ulps of its largest term.
 *
 * Source: NIST Digital Library of Mathematical Functions, 5.19(iii), https://dlmf.nist.gov/5.19.
 *
 * @param d - dimension, an integer >= 0
 * @param radius - finite and >= 0; 1 if left out
 * @returns the volume; 1 for d = 0
 * @throws A {@link DomainError} if an argument is out of range
 *
 * @example
 * ```ts
 * import { ballVolume } from 'hullgauge/intrinsic';
 * ballVolume(3).value.toPrecision(12); // => (4 * Math.PI / 3).toPrecision(12)
 * ballVolume(5000).log10.toFixed(3); // => '-6168.337'
 * ```
 */
export function ballVolume(d: number, radius = 1): LogNumber {
  checkInteger('ballVolume', 'd', d, 0);
  checkFinite('ballVolume', 'radius', radius, 0);
  return scaled(logBallVolumeKernel(d), d, radius);
}

/**
 * Surface area of the ball of a given radius in R^d, for d from 1 up.
 *
 * $$\omega_d r^{d-1} = d \kappa_d r^{d-1} = \frac{2 \pi^{d/2}}{\Gamma(\frac d2)}\, r^{d-1}$$
 *
 * Cost: constant. Accuracy: the logarithm is within `logError`, a few ulps of its largest term.
 *
 * Source: NIST Digital Library of Mathematical Functions, 5.19(iii), https://dlmf.nist.gov/5.19.
 *
 * @param d - dimension of the space, an integer >= 1
 * @param radius - finite and >= 0; 1 if left out
 * @returns the (d - 1)-dimensional area; 2 for d = 1
 * @throws A {@link DomainError} if an argument is out of range
 *
 * @example
 * ```ts
 * import { sphereArea } from 'hullgauge/intrinsic';
 * sphereArea(3).value.toPrecision(12); // => (4 * Math.PI).toPrecision(12)
 * ```
 */
export function sphereArea(d: number, radius = 1): LogNumber {
  checkInteger('sphereArea', 'd', d, 1);
  checkFinite('sphereArea', 'radius', radius, 0);
  return scaled(Math.log(d) + logBallVolumeKernel(d), d - 1, radius);
}

function scaled(log: number, power: number, radius: number): LogNumber {
  const scale = power === 0 ? 0 : power * Math.log(radius);
  const size = Math.abs(scale) === Number.POSITIVE_INFINITY ? 0 : Math.abs(scale);
  return LogNumber.fromLog(log + scale, EPSILON * (2 + 4 * Math.abs(log) + size + power));
}

/**
 * Flag coefficient, the norming constant of projection and section formulas, for 0 <= k <= d.
 *
 * $$\begin{bmatrix} d \\ k \end{bmatrix} = \binom dk \frac{\kappa_d}{\kappa_k \kappa_{d-k}}$$
 *
 * The k-th intrinsic volume of a body is this times the mean volume of its projections to uniformly
 * random k-dimensional subspaces.
 *
 * Cost: constant. Accuracy: the logarithm is within `logError`, a few ulps of its largest term.
 *
 * Source: Introduction to Geometric Probability, Cambridge University Press (1997).
 *
 * @param d - an integer >= 0
 * @param k - an integer from 0 to d
 * @returns the coefficient
 * @throws A {@link DomainError} if an argument is out of range
 *
 * @example
 * ```ts
 * import { flagCoefficient } from 'hullgauge/intrinsic';
 * flagCoefficient(3, 1).value; // => 2
 * ```
 */
export function flagCoefficient(d: number, k: number): LogNumber {
  checkInteger('flagCoefficient', 'd', d, 0);
  checkInteger('flagCoefficient', 'k', k, 0, d);
  // symmetric in k and d - k; the smaller one keeps the ball's part small
  const order = Math.min(k, d - k);
  const ball = logBallIntrinsicVolumeKernel(d, order);
  const projected = logBallVolumeKernel(order);
  const error = EPSILON * (4 + 4 * Math.abs(ball) + 4 * Math.abs(projected) + 2 * order);
  return LogNumber.fromLog(ball - projected, error);
}
