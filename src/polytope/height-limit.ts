/**
 * The limit theorem for the height of the facets.
 */
import { type Count, resolveCount } from '../count.ts';
import { checkOptions } from '../domain.ts';
import { checkDimension } from './hull-options.ts';

/** Options of {@link heightLimit}. */
export interface HeightLimitArgs {
  /** Number of points. */
  readonly n: Count;
  /** Dimension, from 1 to a million. */
  readonly d: number;
}

/** What {@link heightLimit} returns. */
export interface HeightLimit {
  /** log(n) / d. */
  readonly rate: number;
  /** The limit of the height. */
  readonly limit: number;
}

/**
 * Height of the facets in the limit of d to infinity with log(n)/d fixed, for n >= 1: to stand beside the
 * exact law of {@link facetHeight}.
 *
 * If $\ln n / d \to \rho$, the height of the typical facet of a beta polytope of fixed exponent tends to
 *
 * $$\sqrt{1 - e^{-2\rho}}$$
 *
 * in probability: a limit for one fixed law, no bound at finite d. The exact height is below it by about
 * $3 (1 - h^2) \ln d / (2 h d)$.
 *
 * Cost: constant. Accuracy: a few roundings.
 *
 * Source: Facets of spherical random polytopes, arXiv:1908.04033.
 *
 * @param args - `n`: an integer >= 1 or a `LogNumber`; `d`: an integer from 1 to a million
 * @returns the rate log(n)/d and the limit, from 0 to 1
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { heightLimit, LogNumber } from 'hullgauge';
 * const { rate, limit } = heightLimit({ n: LogNumber.fromLog(250), d: 500 });
 * [rate, limit.toFixed(4)]; // => [0.5, '0.7951']
 * ```
 */
export function heightLimit(args: HeightLimitArgs): HeightLimit {
  const fn = 'heightLimit';
  checkOptions(fn, args, ['n', 'd']);
  checkDimension(fn, args.d);
  const count = resolveCount(fn, 'n', args.n, 1);
  const rate = count.log / args.d;
  return Object.freeze({ rate, limit: Math.sqrt(-Math.expm1(-2 * rate)) });
}
