/**
 * A probability distribution on the real line, as every distribution in the library presents itself.
 */
import type { Probability } from './probability.ts';

/** A distribution on the real line. */
export interface Distribution {
  /** Expected value. */
  readonly mean: number;
  /** Variance. */
  readonly variance: number;
  /** The probability of a value of at most `x`, with its complement. */
  cdf(x: number): Probability;
  /**
   * The smallest x whose `cdf` is at least `p`; a {@link Probability} reaches tails that a number
   * cannot.
   */
  quantile(p: number | Probability): number;
  /** Natural logarithm of the density, or of the probability of a single value where it is discrete. */
  logPdf?(x: number): number;
}
