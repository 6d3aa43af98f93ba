/**
 * The chi-squared law: a gamma law with shape df/2 and scale 2.
 */
import { checkNumber } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { incompleteGammaKernel, LARGEST_SHAPE, SMALLEST_SHAPE } from './incomplete-gamma.ts';
import { gammaInverseKernel } from './incomplete-gamma-inverse.ts';
import { checkProbability } from './probability-argument.ts';

/**
 * The probability that a chi-squared variable with df > 0 degrees of freedom is at most x.
 *
 * $$ P(\chi^2_{\mathrm{df}} \le x) = P\bigl(\tfrac{\mathrm{df}}2, \tfrac x2\bigr), $$
 *
 * the incomplete gamma function of {@link incompleteGamma}.
 *
 * @param x - any number, infinities included
 * @param df - degrees of freedom; from 2e-300 to 2e300, not only integers
 * @returns the distribution function as `value`, the upper tail as `complement`; 0 for x <= 0
 * @remarks Cost and accuracy as {@link incompleteGamma}.
 * @throws A {@link DomainError} if `x` is not a number or `df` is outside its domain
 *
 * Source: DLMF 8.2, https://dlmf.nist.gov/8.2.
 *
 * @example
 * ```ts
 * import { chiSquaredCdf } from 'hullgauge/special';
 * chiSquaredCdf(3.841458820694124, 1).complement.toPrecision(12); // => '0.0500000000000'
 * chiSquaredCdf(2000, 10).complement; // => 0
 * chiSquaredCdf(2000, 10).logComplement.toPrecision(12); // => '-975.543028717'
 * ```
 */
export function chiSquaredCdf(x: number, df: number): Probability {
  checkNumber('chiSquaredCdf', 'x', x);
  checkNumber('chiSquaredCdf', 'df', df, 2 * SMALLEST_SHAPE, 2 * LARGEST_SHAPE);
  return incompleteGammaKernel(0.5 * df, 0.5 * x);
}

/**
 * The point at which the distribution function of a chi-squared variable with df > 0 degrees of freedom
 * reaches a probability: the inverse of {@link chiSquaredCdf}.
 *
 * $$ P\bigl(\chi^2_{\mathrm{df}} \le x\bigr) = p. $$
 *
 * @param p - a number from 0 to 1, or a {@link Probability}, whose smaller tail is the one that is met
 * @param df - degrees of freedom; from 2e-300 to 2e300, not only integers
 * @returns the quantile; 0 at p = 0, `Infinity` at p = 1
 * @remarks Cost and accuracy as {@link incompleteGammaInverse}: relative error below 1e-14 for
 * df >= 0.2.
 * @throws A {@link DomainError} if an argument is outside its domain
 *
 * Source: as {@link incompleteGammaInverse}.
 *
 * @example
 * ```ts
 * import { Probability } from 'hullgauge';
 * import { chiSquaredQuantile } from 'hullgauge/special';
 * chiSquaredQuantile(0.95, 1).toPrecision(12); // => '3.84145882069'
 * chiSquaredQuantile(Probability.fromComplement(1e-20), 3).toPrecision(12); // => '96.2391239381'
 * ```
 */
export function chiSquaredQuantile(p: number | Probability, df: number): number {
  checkProbability('chiSquaredQuantile', 'p', p);
  checkNumber('chiSquaredQuantile', 'df', df, 2 * SMALLEST_SHAPE, 2 * LARGEST_SHAPE);
  return 2 * gammaInverseKernel(0.5 * df, p);
}
