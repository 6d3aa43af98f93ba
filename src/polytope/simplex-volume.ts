/**
 * Volume of the simplex spanned by r + 1 random points: all moments and the logarithm's mean and variance.
 */

import { checkFinite, checkInteger, checkOptions, DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import {
  type BetaLaw,
  checkLaw,
  excessOf,
  type GaussianLaw,
  type Law,
  type ResolvedBetaPrimeLaw,
} from '../law.ts';
import { LogNumber } from '../log-number.ts';
import { digammaKernel, trigammaKernel } from '../numeric/polygamma.ts';
import { logFactorialKernel } from '../special/log-beta.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';

const FAMILIES = ['beta', 'betaPrime', 'gaussian'] as const;
const MAX_DIMENSION = 1_000_000;

/** Options of {@link simplexVolume}. */
export interface SimplexVolumeArgs {
  /** Dimension of the space, from 1 to a million. */
  readonly d: number;
  /** Dimension of the simplex, from 1 to d; d if left out. */
  readonly r?: number | undefined;
  /** Any law. */
  readonly law: Law;
}

/** The law of a random simplex's volume, as {@link simplexVolume} gives it. */
export interface SimplexVolume {
  /**
   * Expected q-th power of the volume, q > -(d - r + 1), for the beta law also q > -(d + 2b) - 2/(r + 1).
   *
   * @throws A {@link DomainError} if the moment does not exist
   */
  moment(q: number): LogNumber;
  /** Expected value of the logarithm of the volume. */
  readonly meanOfLog: number;
  /** Variance of the logarithm of the volume. */
  readonly varianceOfLog: number;
}

/**
 * Moments of the r-dimensional volume of the simplex spanned by r + 1 random points of R^d, for
 * 1 <= r <= d: how large a minimal sample's hull is.
 *
 * For the beta law of exponent $\beta$ and $X = (r+1)(\beta + (d+q)/2)$,
 *
 * $$\mathbb{E}\,(r!\,\mathrm{Vol})^q = \prod_{j=1}^{r} \frac{\Gamma(\frac{d-r+j+q}{2})}{\Gamma(\frac{d-r+j}{2})}
 * \left[\frac{\Gamma(\frac d2 + \beta + 1)}{\Gamma(\frac{d+q}2 + \beta + 1)}\right]^{r+1}
 * \frac{\Gamma(X + 1)}{\Gamma(X - \frac q2 + 1)},$$
 *
 * for every real $q > -(d - r + 1)$ and $q > -(d + 2\beta) - \frac{2}{r+1}$, which is above it for points on
 * or near the sphere; alike for the Gaussian law without the second limit, and for the beta-prime law while
 * $q < 2\beta - d$ (fewer than the degrees of freedom of a Student t). Mean and variance of the
 * logarithm are the derivatives at q = 0.
 *
 * Assumes independent points of the standard law; for a covariance C and r = d multiply volumes by
 * $\sqrt{\det C}$.
 *
 * Cost: r steps. Accuracy: the logarithm of a moment within the result's `logError`, 1e-15 per factor.
 *
 * Source: Isotropic random simplices, Advances in Applied Probability 3 (1971).
 *
 * @param args - `d`: an integer from 1 to a million; `r`: an integer from 1 to d; `law`: any law (on the
 * line the two-point law is refused: its simplex can degenerate)
 * @returns the moments
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { simplexVolume, uniformBall } from 'hullgauge';
 * // a random triangle in the unit disk has the expected area 35 / (48 pi)
 * const triangle = simplexVolume({ d: 2, law: uniformBall() });
 * triangle.moment(1).value.toPrecision(12); // => (35 / (48 * Math.PI)).toPrecision(12)
 * ```
 */
export function simplexVolume(args: SimplexVolumeArgs): SimplexVolume {
  const fn = 'simplexVolume';
  checkOptions(fn, args, ['d', 'r', 'law']);
  const { d } = args;
  checkInteger(fn, 'd', d, 1, MAX_DIMENSION);
  const r = args.r === undefined ? d : args.r;
  checkInteger(fn, 'r', r, 1, d);
  const law = checkLaw(fn, args.law, FAMILIES, d);
  if (law.family === 'beta' && d === 1 && law.b === -1) {
    throw new DomainError(fn, 'law', 'a law without atoms (no sphere for d = 1)', law);
  }
  const { mean, variance } = logVolumeMoments(law, d, r);
  return Object.freeze({
    moment: (q: number): LogNumber => {
      checkFinite('simplexVolume.moment', 'q', q);
      const least = leastPower(law, d, r);
      if (q <= least) throw new DomainError('simplexVolume.moment', 'q', `above ${least}`, q);
      if (law.family === 'betaPrime' && q >= 2 * excessOf(law, d)) {
        throw new DomainError('simplexVolume.moment', 'q', `below ${2 * excessOf(law, d)}`, q);
      }
      return logMoment(law, d, r, q);
    },
    meanOfLog: mean,
    varianceOfLog: variance,
  });
}

/**
 * The moments of powers up to this one are infinite: too many nearly degenerate simplices, of points that
 * happen to agree or, near the boundary of the ball, have nowhere else to go.
 */
function leastPower(
  law: GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw,
  d: number,
  r: number,
): number {
  const degenerate = -(d - r + 1);
  return law.family === 'beta' ? Math.max(degenerate, -(d + 2 * law.b) - 2 / (r + 1)) : degenerate;
}

/** log E Vol^q. */
function logMoment(
  law: GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw,
  d: number,
  r: number,
  q: number,
): LogNumber {
  const half = q / 2;
  let log = 0;
  let size = 0;
  const add = (term: number): void => {
    log += term;
    size += Math.abs(term);
  };
  for (let j = 1; j <= r; j++) add(logGammaRatioKernel((d - r + j) / 2, half));
  if (law.family === 'gaussian') {
    add(half * (Math.log(r + 1) + r * Math.LN2));
  } else if (law.family === 'beta') {
    add(-(r + 1) * logGammaRatioKernel(d / 2 + law.b + 1, half));
    const x = (r + 1) * (law.b + d / 2) + r * half + 1;
    add(logGammaRatioKernel(x, half));
    // near the pole the digits that cancelled in the argument are missed
    if (x + half < 1) size += ((r + 1) * (d - half)) / (x + half);
  } else {
    const excess = excessOf(law, d);
    add((r + 1) * logGammaRatioKernel(excess, -half));
    add(logGammaRatioKernel((r + 1) * (excess - half), half));
  }
  add(-q * logFactorialKernel(r));
  return LogNumber.fromLog(log, EPSILON * (2 + 2 * size));
}

function logVolumeMoments(
  law: GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw,
  d: number,
  r: number,
): { mean: number; variance: number } {
  let mean = 0;
  let variance = 0;
  for (let j = 1; j <= r; j++) {
    mean += digammaKernel((d - r + j) / 2);
    variance += trigammaKernel((d - r + j) / 2);
  }
  if (law.family === 'gaussian') {
    mean += Math.log(r + 1) + r * Math.LN2;
  } else if (law.family === 'beta') {
    const x = (r + 1) * (law.b + d / 2) + 1;
    mean += digammaKernel(x) - (r + 1) * digammaKernel(d / 2 + law.b + 1);
    variance += (2 * r + 1) * trigammaKernel(x) - (r + 1) * trigammaKernel(d / 2 + law.b + 1);
  } else {
    const excess = excessOf(law, d);
    const x = (r + 1) * excess;
    mean += digammaKernel(x) - (r + 1) * digammaKernel(excess);
    variance += (r + 1) * trigammaKernel(excess) - (2 * r + 1) * trigammaKernel(x);
  }
  return { mean: mean / 2 - logFactorialKernel(r), variance: variance / 4 };
}
