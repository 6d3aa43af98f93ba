/**
 * Where the phase-transition theorem puts the number of points that fill a share of the ball.
 */
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { type BetaLaw, checkLaw, type Law } from '../law.ts';
import { LogNumber } from '../log-number.ts';
import { checkDimension } from './hull-options.ts';

/** Options of {@link approxVolumeThreshold}. */
export interface ApproxVolumeThresholdArgs {
  /** Dimension, from 1 to a million. */
  readonly d: number;
  /** Order of the intrinsic volume, from 1 to d; d if left out. */
  readonly k?: number | undefined;
  /** A beta law. */
  readonly law: Law;
  /** Share of the ball, strictly between 0 and 1; 1/2 if left out. */
  readonly share?: number | undefined;
}

/**
 * Number of points at which the hull fills a share of the ball according to the limit theorem for d to
 * infinity, for d from 1 to a million: to stand beside the exact answer, not to replace it.
 *
 * For the beta law of exponent $\beta$ and $n = (d / (2x))^{d/2 + \beta}$ points the share tends to $e^{-x}$;
 * solved for n at the share p,
 *
 * $$\ln n = \left(\tfrac d2 + \beta\right) \ln \frac{k}{-2 \ln p},$$
 *
 * with k = d for the volume. For the k-th intrinsic volume the same holds when k tends to infinity with d.
 *
 * The limit is approached slowly, like $4 \ln d / d$: at d = 100 and x = 1 the exact share is 0.2998, not
 * 0.3679, and at d = 10000 it is 0.3665. The exact number of points is
 * `smallest(hullVolumeRatio, 'n', { d, law }, share)`.
 *
 * Cost: constant. Accuracy: of the theorem's number a few roundings, as a size of a sample what is said above.
 *
 * Source: Phase transition for the volume of high-dimensional random polytopes, Random Structures and
 * Algorithms 58 (2021), arXiv:1911.12696.
 *
 * @param args - `d`: an integer from 1 to a million; `k`: an integer from 1 to d; `law`: a beta law with
 * d/2 + b > 0; `share`: a number strictly between 0 and 1
 * @returns the number of points of the limit theorem, which can be below d + 1 for small d
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { approxVolumeThreshold, uniformBall } from 'hullgauge';
 * approxVolumeThreshold({ d: 5000, law: uniformBall() }).log10.toFixed(1); // => '8892.8'
 * ```
 */
export function approxVolumeThreshold(args: ApproxVolumeThresholdArgs): LogNumber {
  const fn = 'approxVolumeThreshold';
  checkOptions(fn, args, ['d', 'k', 'law', 'share']);
  const { d, share = 0.5 } = args;
  checkDimension(fn, d);
  const k = args.k === undefined ? d : args.k;
  checkInteger(fn, 'k', k, 1, d);
  const law = checkLaw(fn, args.law, ['beta'], d) as BetaLaw;
  if (!(typeof share === 'number' && share > 0 && share < 1)) {
    throw new DomainError(fn, 'share', 'a number strictly between 0 and 1', share);
  }
  const exponent = d / 2 + law.b;
  if (!(exponent > 0)) throw new DomainError(fn, 'law.b', `above -d/2 = ${-d / 2}`, law.b);
  const log = exponent * Math.log(k / (-2 * Math.log(share)));
  return LogNumber.fromLog(log, 2 ** -51 * (Math.abs(log) + exponent));
}
