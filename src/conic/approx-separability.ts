/**
 * Separability of two classes at finite n, with signal and unequal classes, to second order.
 *
 * Separation means that a random subspace of dimension d meets a random cone of statistical dimension
 * n (1 - h) + c; the normal law below is the central limit theorem for that cone's intrinsic volumes
 * with its first correction.
 */
import { checkBoolean, checkFinite, checkInteger, checkOptions, DomainError } from '../domain.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { logAddExpKernel } from '../special/log-domain.ts';
import { logNormalCdfKernel, normalTailKernel } from '../special/normal.ts';
import { logisticLimit, offsetOfShare, RAREST_CLASS, rareClassShare } from './logistic-limit.ts';
import { checkOffset } from './logistic-threshold.ts';

/** Arguments of {@link approxSeparability}. */
export interface ApproxSeparabilityArgs {
  /** Number of cases: an integer from 0 to 2^53 - 1. */
  readonly n: number;
  /** Number of slopes: an integer from 0 to 2^53 - 1. */
  readonly d: number;
  /** Standard deviation of the linear predictor; 0, pure noise, if left out. */
  readonly signal?: number;
  /** Probability of the positive class over all cases; 1/2 if left out. Instead of `offset`. */
  readonly classShare?: number;
  /** Mean of the linear predictor; 0 if left out. Instead of `classShare`. */
  readonly offset?: number;
  /** Whether an intercept is fitted; `true` if left out. Without it the classes have to be equal. */
  readonly intercept?: boolean;
}

/** Twice what simulations showed of the absolute error; a resolution, not a bound. */
const RESOLUTION = 0.03;
/** The smallest n of those simulations. */
const SIMULATED = 60;

/**
 * An approximation of the probability that two classes are linearly separable, so that the logistic
 * regression has no finite fit, when the labels follow a signal or the classes are unequal.
 *
 * With h, the minimiser and $a = t_0 Y + t_1 Y X - Z$ of {@link logisticThreshold}, and w = (1, X)
 * (w = X without an intercept),
 *
 * $$ P(\text{separable}) \approx \Phi\left( \frac{d - 1 - n h + c}{\sqrt{n (m_4 - h^2 - 2h)}} \right), \qquad
 *    m_4 = E\,a_+^4, \quad c = \operatorname{tr}\bigl( E[1_{a>0}\, w w^\top]^{-1} E[a_+^2\, w w^\top] \bigr). $$
 *
 * Assumptions: independent cases, normal covariates of any covariance, the logistic model true. For fair
 * coins as labels {@link labelSeparability} is exact and needs no law of the points. This is an
 * approximation and says so: a normal law corrected to second order, whose error falls like $n^{-1/2}$. It
 * was within 0.015 of 8000 simulations each at n = 60 and 120; nothing is known of far tails.
 *
 * @param args - `n`: number of cases; `d`: number of slopes; `signal`: standard deviation of the linear
 *   predictor, 0 if left out; `classShare`: marginal probability of the positive class, from 1e-12 to
 *   1 - 1e-12, or else `offset`: mean of the linear predictor; `intercept`: `true` if left out
 * @returns the probability; exactly 1 where n is at most the number of coefficients, exact for d = 0.
 *   `logError` is not proved: it stands for an absolute error of 0.03, more below n = 60
 * @remarks Cost: about a millisecond, at most ten for unequal classes and a strong signal, whatever n and d.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain, if both
 *   `classShare` and `offset` are given, or the classes are unequal and `intercept` is false
 *
 * Source for h: "The phase transition for the existence of the maximum likelihood estimate in
 * high-dimensional logistic regression", Annals of Statistics 48 (2020) 27-42, arXiv:1804.09753. The
 * correction is this library's own.
 *
 * @example
 * ```ts
 * import { approxSeparability, labelSeparability } from 'hullgauge';
 * // pure noise in 120 cases and 40 variables: fair labels, and one label in ten
 * labelSeparability({ n: 120, d: 40 }).value.toFixed(5); // => '0.00022'
 * approxSeparability({ n: 120, d: 40, classShare: 0.1 }).value.toFixed(2); // => '0.94'
 * ```
 */
export function approxSeparability(args: ApproxSeparabilityArgs): Probability {
  const fn = 'approxSeparability';
  checkOptions(fn, args, ['n', 'd', 'signal', 'classShare', 'offset', 'intercept']);
  const { n, d, signal = 0, intercept = true } = args;
  checkInteger(fn, 'n', n, 0);
  checkInteger(fn, 'd', d, 0);
  checkFinite(fn, 'signal', signal, 0);
  checkBoolean(fn, 'intercept', intercept);
  const b = offsetOf(fn, args, signal);
  if (!intercept && b > 0) {
    const name = args.classShare === undefined ? 'offset' : 'classShare';
    const requirement = `${name === 'offset' ? '0' : '1/2'} where intercept is false`;
    throw new DomainError(fn, name, requirement, args[name]);
  }
  const coefficients = intercept ? d + 1 : d;
  if (n <= coefficients) return certainty(true);
  if (d === 0) return equalLabels(n, b, signal, intercept);
  const { threshold: h, fourth, trace } = logisticLimit(b, signal, intercept);
  const spread = Math.sqrt(n) * Math.sqrt(fourth - h * h - 2 * h);
  const z = (d - 1 - n * h + trace) / spread;
  const logTail = logNormalCdfKernel(-Math.abs(z));
  const resolution = RESOLUTION * Math.max(1, Math.sqrt(SIMULATED / n));
  const logError = logAddExpKernel(0, Math.log(resolution) - logTail);
  return probabilityFromTail(normalTailKernel(z), logTail, z <= 0 ? 'lower' : 'upper', logError);
}

/** The offset, made non-negative by swapping the classes. */
function offsetOf(fn: string, args: ApproxSeparabilityArgs, signal: number): number {
  const { classShare, offset } = args;
  if (classShare === undefined) {
    if (offset === undefined) return 0;
    checkOffset(fn, offset, signal);
    return Math.abs(offset);
  }
  checkShare(fn, classShare);
  if (offset !== undefined) {
    throw new DomainError(fn, 'classShare', 'left out where offset is given', classShare);
  }
  return offsetOfShare(classShare <= 0.5 ? classShare : 1 - classShare, signal);
}

function checkShare(fn: string, share: unknown): asserts share is number {
  if (typeof share === 'number' && Math.min(share, 1 - share) >= 0.999 * RAREST_CLASS) return;
  const requirement = `a number from ${RAREST_CLASS} to 1 - ${RAREST_CLASS}`;
  throw new DomainError(fn, 'classShare', requirement, share);
}

/** Without slopes an intercept separates the classes only if there is no more than one. */
function equalLabels(n: number, b: number, signal: number, intercept: boolean): Probability {
  if (!intercept) return certainty(false);
  const rare = rareClassShare(b, signal, new Float64Array(1));
  const log = logAddExpKernel(n * Math.log1p(-rare), n * Math.log(rare));
  const error = 2 ** -52 * (4 + 2 * Math.abs(log));
  if (log < -Math.LN2) return probabilityFromTail(Math.exp(log), log, 'lower', error);
  const tail = -Math.expm1(log);
  return probabilityFromTail(tail, Math.log(tail), 'upper', error * (1 / tail));
}
