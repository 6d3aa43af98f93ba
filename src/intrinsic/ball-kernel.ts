/**
 * Volumes and intrinsic volumes of balls, as logarithms.
 *
 * kappa_d = pi^(d/2) / Gamma(d/2 + 1) is the volume of the unit ball of R^d; its intrinsic volumes are
 * V_k = binom(d, k) kappa_d / kappa_(d-k).
 */
import { EPSILON } from '../epsilon.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { logGamma1pKernel, logGammaRatioKernel } from '../special/log-gamma.ts';

const LOG_PI = 1.1447298858494002;

/** log kappa_d, d >= 0. */
export function logBallVolumeKernel(d: number): number {
  return 0.5 * d * LOG_PI - logGamma1pKernel(0.5 * d);
}

/**
 * log V_k of the unit ball of R^d, 0 <= k <= d, without the cancellation of two volumes; a bound of its
 * error goes to `error[0]`.
 */
export function logBallIntrinsicVolumeKernel(d: number, k: number, error?: Float64Array): number {
  if (error !== undefined) error[0] = 0;
  if (k === 0) return 0;
  const choices = logBinomialKernel(d, k);
  const ratio = logGammaRatioKernel(0.5 * (d - k) + 1, 0.5 * k);
  if (error !== undefined) error[0] = EPSILON * (4 + k + choices + Math.abs(ratio));
  return choices + 0.5 * k * LOG_PI - ratio;
}
