/**
 * The limit of d/n at which a logistic fit stops to exist, and the signal that belongs to a ratio.
 *
 * The mathematics is in logistic-limit.ts; here are the public questions and the inversion.
 */
import { checkBoolean, checkFinite, checkOptions, checkPositive, DomainError } from '../domain.ts';
import { type Bracket, narrow } from '../numeric/monotone-search.ts';
import { logisticThresholdKernel, RAREST_CLASS, rareClassShare } from './logistic-limit.ts';

/** Arguments of {@link logisticThreshold}. */
export interface LogisticThresholdArgs {
  /** Standard deviation of the linear predictor: a finite number >= 0. */
  readonly signal: number;
  /** The linear predictor of the average case; 0 if left out. */
  readonly offset?: number;
  /** Whether an intercept is fitted; `true` if left out. Without it the offset has to be 0. */
  readonly intercept?: boolean;
}

/** Arguments of {@link logisticSignal}. */
export interface LogisticSignalArgs {
  /** Slopes per case, d/n: a number above 0 that some signal has as its threshold. */
  readonly ratio: number;
  /** The linear predictor of the average case; 0 if left out. */
  readonly offset?: number;
}

/**
 * The ratio d/n beyond which a logistic regression has no maximum-likelihood fit, for many normal
 * covariates whose linear predictor has the standard deviation `signal`.
 *
 * With X and Z standard normal and $P(Y = 1 \mid X) = 1/(1 + e^{-(\beta_0 + \gamma X)})$, Y = -1 otherwise,
 *
 * $$ h(\beta_0, \gamma) = \min_{t_0, t_1} E\bigl[(t_0 Y + t_1 Y X - Z)_+^2\bigr]. $$
 *
 * As n and d grow with d/n tending to a limit below h the fit exists with probability tending to 1, above
 * h with probability tending to 0. Pure noise and equal classes give h(0, 0) = 1/2; signal and unequal
 * classes make fits rarer. Assumptions: independent cases, normal covariates of any covariance, the
 * logistic model true. At finite n see {@link approxSeparability}.
 *
 * @param args - `signal`: standard deviation of the linear predictor, >= 0; `offset`: its mean, such
 *   that the rarer class has a probability of at least 1e-12; `intercept`: `true` if left out; without
 *   an intercept, possible for offset 0 only, h is the same
 * @returns the threshold, above 0 and at most 1/2
 * @remarks Cost: about a millisecond, at most ten for unequal classes and a strong signal. Relative error
 *   below 3e-15.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "The phase transition for the existence of the maximum likelihood estimate in
 * high-dimensional logistic regression", Annals of Statistics 48 (2020) 27-42, arXiv:1804.09753.
 *
 * @example
 * ```ts
 * import { logisticThreshold } from 'hullgauge';
 * logisticThreshold({ signal: 0 }); // => 0.5
 * logisticThreshold({ signal: 2 }).toPrecision(12); // => '0.344930128404'
 * logisticThreshold({ signal: 2, offset: 2 }).toPrecision(12); // => '0.270266159536'
 * ```
 */
export function logisticThreshold(args: LogisticThresholdArgs): number {
  const fn = 'logisticThreshold';
  checkOptions(fn, args, ['signal', 'offset', 'intercept']);
  const { signal, offset = 0, intercept = true } = args;
  checkFinite(fn, 'signal', signal, 0);
  checkOffset(fn, offset, signal);
  checkBoolean(fn, 'intercept', intercept);
  if (!intercept && offset !== 0) {
    throw new DomainError(fn, 'offset', '0 where intercept is false', offset);
  }
  return logisticThresholdKernel(Math.abs(offset), signal);
}

/**
 * The largest signal at which a logistic fit with d/n = `ratio` still exists in the limit: the inverse
 * of {@link logisticThreshold}.
 *
 * $$ \gamma^* = \max \lbrace \gamma : h(\beta_0, \gamma) \ge \text{ratio} \rbrace. $$
 *
 * At offset 0 the threshold falls from 1/2 to 0 as the signal grows. At a large offset a little signal
 * first evens the classes out and raises the threshold; the answer is on the falling side.
 *
 * @param args - `ratio`: slopes per case, above 0 and at most the largest threshold at this offset, which
 *   is 1/2 at offset 0; at least 1e-300; `offset`: mean of the linear predictor, 0 if left out, such that
 *   without signal the rarer class has a probability of at least 1e-12
 * @returns the standard deviation of the linear predictor; 0 at a ratio equal to the threshold of pure noise
 * @remarks Cost: about ten thresholds, a hundred for a large offset. The threshold of the result is the
 *   ratio within 4e-16; close to the largest threshold half of the digits of the signal are lost, as for
 *   every maximum.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: as for {@link logisticThreshold}.
 *
 * @example
 * ```ts
 * import { logisticSignal } from 'hullgauge';
 * logisticSignal({ ratio: 0.1 }).toPrecision(12); // => '9.89044732510'
 * logisticSignal({ ratio: 0.5 }); // => 0
 * ```
 */
export function logisticSignal(args: LogisticSignalArgs): number {
  const fn = 'logisticSignal';
  checkOptions(fn, args, ['ratio', 'offset']);
  const { ratio, offset = 0 } = args;
  checkPositive(fn, 'ratio', ratio, 0.5);
  if (ratio < 1e-300) throw new DomainError(fn, 'ratio', 'a number from 1e-300 to 0.5', ratio);
  checkOffset(fn, offset, 0);
  const b = Math.abs(offset);
  const gapAt = (signal: number): number => ratio - logisticThresholdKernel(b, signal);
  let lower = { x: 0, gap: gapAt(0) };
  if (lower.gap === 0 && b === 0) return 0;
  if (lower.gap > 0) {
    const rising = firstAbove(b, ratio);
    if (rising.gap > 0) {
      const requirement = `at most the largest threshold at this offset, ${(ratio - rising.gap).toPrecision(12)}`;
      throw new DomainError(fn, 'ratio', requirement, ratio);
    }
    lower = rising;
  }
  // gamma h tends to 1.0153 from below at offset 0
  let upper = Math.max(1, 2 * lower.x, 1.02 / ratio);
  for (let gap = gapAt(upper); gap <= 0; gap = gapAt(upper)) {
    lower = { x: upper, gap };
    upper *= 2;
  }
  const bracket: Bracket = {
    // a gap of 0 counts as positive, and here it belongs to the lower end
    lower: { x: lower.x, gap: Math.min(lower.gap, -Number.MIN_VALUE) },
    upper: { x: upper, gap: gapAt(upper) },
  };
  return narrow(bracket, gapAt, false).lower.x;
}

/** Where the threshold reaches the ratio on its way up, or its maximum, by golden section. */
function firstAbove(b: number, ratio: number): { x: number; gap: number } {
  const gapAt = (signal: number): number => ratio - logisticThresholdKernel(b, signal);
  const golden = 0.61803398874989485;
  let low = 0;
  let high = 2 * b + 1;
  let left = { x: high - golden * high, gap: gapAt(high - golden * high) };
  let right = { x: golden * high, gap: gapAt(golden * high) };
  while (left.gap > 0 && right.gap > 0 && high - low > 1e-8 * high) {
    if (left.gap < right.gap) {
      high = right.x;
      right = left;
      const x = high - golden * (high - low);
      left = { x, gap: gapAt(x) };
    } else {
      low = left.x;
      left = right;
      const x = low + golden * (high - low);
      right = { x, gap: gapAt(x) };
    }
  }
  return left.gap < right.gap ? left : right;
}

/** Refuses an offset that leaves hardly any case to the rarer class. */
export function checkOffset(fn: string, offset: unknown, signal: number): asserts offset is number {
  checkFinite(fn, 'offset', offset);
  const slope = new Float64Array(1);
  if (rareClassShare(Math.abs(offset), signal, slope) >= 0.999 * RAREST_CLASS) return;
  const requirement = `such that the rarer class has a probability of at least ${RAREST_CLASS}`;
  throw new DomainError(fn, 'offset', requirement, offset);
}
