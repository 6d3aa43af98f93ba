/**
 * Expected volume and intrinsic volumes of the hull of random points.
 */

import type { Count, ResolvedCount } from '../count.ts';
import { checkInteger, checkOptions } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { logBallIntrinsicVolumeKernel } from '../intrinsic/ball-kernel.ts';
import { checkLaw, excessOf, type Law, type ResolvedBetaPrimeLaw } from '../law.ts';
import { LogNumber } from '../log-number.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { NormalTail } from '../numeric/normal-tail.ts';
import { orderStatisticExpectation } from '../numeric/order-statistic.ts';
import { complementError } from '../numeric/stated-error.ts';
import { complementOf } from '../probability.ts';
import {
  checkDimension,
  type Hull,
  resolveHull,
  resolveMarginal,
  resolvePoints,
} from './hull-options.ts';
import { volumeRatioKernel } from './volume-ratio-kernel.ts';

const HALF_LOG_TWO_PI = 0.91893853320467274;
const FAMILIES = ['beta', 'betaPrime', 'gaussian'] as const;

/** Options of {@link expectedHullVolume}. */
export interface ExpectedHullVolumeArgs {
  /** Number of points; of pairs for the symmetric hull. */
  readonly n: Count;
  /** Dimension, from 1 to a million. */
  readonly d: number;
  /** Any law. */
  readonly law: Law;
  /** Which hull is meant; `'plain'` if left out. */
  readonly hull?: Hull | undefined;
}

/** Options of {@link expectedHullIntrinsicVolume}. */
export interface ExpectedHullIntrinsicVolumeArgs extends ExpectedHullVolumeArgs {
  /** Order of the intrinsic volume, from 0 to d. */
  readonly k: number;
}

/**
 * Expected volume of the hull of n random points, for d from 1 to a million.
 *
 * For the standard Gaussian law in $\mathbb{R}^d$, with $\kappa_d$ the volume of the unit ball,
 *
 * $$\mathbb{E} \operatorname{vol} P = \kappa_d\, \mathbb{E}\left[\left(\frac{\varphi(\Phi^{-1}(1 - V))}{V}\right)^{d}\right],$$
 *
 * V the $(d+1)$-st smallest of n uniform numbers; alike for the beta and beta-prime laws with the mean
 * excess of one coordinate. For a beta law it is {@link hullVolumeRatio} times $\kappa_d$.
 *
 * Assumes independent points of the standard law: N(0, I) for `gaussian()`. For a covariance C multiply by
 * $\sqrt{\det C}$.
 *
 * Cost: one integral, about 50 microseconds. Accuracy: the logarithm is within 5e-15 max(1, |log|) for n
 * up to 2^53; the error of each result is in its `logError`.
 *
 * Source: as for {@link hullVolumeRatio}; for the Gaussian law, The convex hull of a random set of points,
 * Biometrika 52 (1965), doi:10.1093/biomet/52.3-4.331.
 *
 * @param args - `n`: an integer >= 0 or a `LogNumber`; `d`: an integer from 1 to a million; `law`: any
 * law; `hull`: `'plain'`, `'symmetric'` or `'withCentre'`
 * @returns the expected volume; exactly 0 where the hull has none (n <= d, or n < d for the two other
 * hulls), infinite for a beta-prime law with $b \le (d + 1)/2$ (Student t with at most one degree of freedom)
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { expectedHullVolume, gaussian } from 'hullgauge';
 * // three Gaussian points in the plane span a triangle of expected area sqrt(3)/2
 * expectedHullVolume({ n: 3, d: 2, law: gaussian() }).value.toPrecision(12); // => Math.sqrt(0.75).toPrecision(12)
 * ```
 */
export function expectedHullVolume(args: ExpectedHullVolumeArgs): LogNumber {
  const fn = 'expectedHullVolume';
  checkOptions(fn, args, ['n', 'd', 'law', 'hull']);
  checkDimension(fn, args.d);
  return expectedVolume(fn, args, args.d);
}

/**
 * Expected k-th intrinsic volume of the hull of n random points, for d from 1 to a million and k from 0
 * to d.
 *
 * $V_d$ is the volume, $2 V_{d-1}$ the surface area, and $V_1$ is proportional to the mean width. The
 * expected value is that of {@link expectedHullVolume} with k in place of d under the mean, times
 * $V_k(B) = \binom{d}{k} \kappa_d / \kappa_{d-k}$.
 *
 * Assumptions, cost, accuracy and source as for {@link expectedHullVolume}; for a covariance other than the
 * identity there is no such factor where k < d.
 *
 * @param args - as for {@link expectedHullVolume}, and `k`: an integer from 0 to d
 * @returns the expected intrinsic volume; exactly 0 for n <= k (n < k for the two other hulls)
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { expectedHullIntrinsicVolume, uniformSphere } from 'hullgauge';
 * // surface area 4 pi (n - 1)(n - 2) / ((n + 1)(n + 2)) on the sphere of R^3
 * const half = expectedHullIntrinsicVolume({ n: 10, d: 3, k: 2, law: uniformSphere() });
 * (2 * half.value).toPrecision(12); // => (4 * Math.PI * 72 / 132).toPrecision(12)
 * ```
 */
export function expectedHullIntrinsicVolume(args: ExpectedHullIntrinsicVolumeArgs): LogNumber {
  const fn = 'expectedHullIntrinsicVolume';
  checkOptions(fn, args, ['n', 'd', 'k', 'law', 'hull']);
  checkDimension(fn, args.d);
  checkInteger(fn, 'k', args.k, 0, args.d);
  return expectedVolume(fn, args, args.k);
}

function expectedVolume(fn: string, args: ExpectedHullVolumeArgs, k: number): LogNumber {
  const { d } = args;
  const law = checkLaw(fn, args.law, FAMILIES, d);
  const hull = resolveHull(fn, args.hull);
  const count = resolvePoints(fn, args.n);
  const rounding = new Float64Array(1);
  const ball = logBallIntrinsicVolumeKernel(d, k, rounding);
  const ballError = rounding[0] as number;
  if (law.family === 'beta') {
    const ratio = volumeRatioKernel(k, resolveMarginal(fn, law, d), count, hull);
    const error = complementError(complementOf(ratio)) + EPSILON;
    return LogNumber.fromLog(ball + ratio.log, ballError + error);
  }
  if (hull === 'plain' ? count.n <= k : count.n < k) {
    return LogNumber.fromLog(k === 0 && count.n > 0 ? 0 : Number.NEGATIVE_INFINITY);
  }
  if (k === 0) return LogNumber.fromLog(count.n > 0 ? 0 : Number.NEGATIVE_INFINITY);
  const mean =
    law.family === 'gaussian'
      ? gaussianMean(k, count, hull)
      : betaPrimeMean(law, d, k, count, hull);
  return LogNumber.fromLog(ball + mean.log, ballError + mean.error);
}

interface Mean {
  readonly log: number;
  readonly error: number;
}

/** log E[(phi / v)^k] over V_(k+1), and its counterparts for the other hulls. */
function gaussianMean(k: number, count: ResolvedCount, hull: Hull): Mean {
  const tail = new NormalTail();
  const { n, log } = count;
  if (hull === 'withCentre') {
    const weight = (): number => Math.log(tail.height) + (k - 1) * tail.logExcess;
    return orderStatisticExpectation(tail, 'half', { m: k, n, log }, weight);
  }
  if (hull === 'symmetric' && n === k) {
    return { log: k * (Math.LN2 - HALF_LOG_TWO_PI), error: k * EPSILON };
  }
  const range = hull === 'symmetric' ? 'folded' : 'line';
  return orderStatisticExpectation(tail, range, { m: k + 1, n, log }, () => k * tail.logExcess);
}

/**
 * The same for the beta-prime law: the mean excess of the marginal (1 + h^2)^-b is
 * (2b - 1)/(2b - 2) L w^(-1/2), L and w those of the beta law of exponent b - 3/2 at h / sqrt(1 + h^2).
 */
function betaPrimeMean(
  law: ResolvedBetaPrimeLaw,
  d: number,
  k: number,
  count: ResolvedCount,
  hull: Hull,
): Mean {
  // b - 1/2
  const half = excessOf(law, d);
  if (half <= 0.5) return { log: Number.POSITIVE_INFINITY, error: 0 };
  const factor = Math.log1p(1 / (2 * half - 1));
  const tail = new BetaTail(half - 1);
  const { n, log } = count;
  const excess = (): number => factor + tail.logExcess - 0.5 * tail.logWidth;
  if (hull === 'withCentre') {
    const weight = (): number => tail.logHeight - 0.5 * tail.logWidth + (k - 1) * excess();
    return orderStatisticExpectation(tail, 'half', { m: k, n, log }, weight);
  }
  if (hull === 'symmetric' && n === k) {
    const value = k * (factor + Math.LN2 + tail.logA);
    return { log: value, error: k * EPSILON * (3 + Math.abs(tail.logA)) };
  }
  const range = hull === 'symmetric' ? 'folded' : 'line';
  return orderStatisticExpectation(tail, range, { m: k + 1, n, log }, () => k * excess());
}
