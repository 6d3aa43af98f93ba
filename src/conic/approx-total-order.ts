/**
 * Level probabilities of a total order with unequal weights, by simulation.
 */
import { checkInteger, checkOptions } from '../domain.ts';
import { randomStream } from '../numeric/random.ts';
import { checkGroupWeights } from './level-probabilities.ts';

/** Options of {@link approxTotalOrder}. */
export interface ApproxTotalOrderOptions {
  /** Number of simulated fits: an integer from 1 to 10^9. */
  readonly trials: number;
  /** Seed of the random numbers: an integer from 0 to 2^53 - 1; the same seed gives the same weights. */
  readonly seed: number;
}

/**
 * Estimates of the level probabilities of groups in a total order with any weights: the shares of simulated
 * isotonic fits by their number of distinct values.
 *
 * Each trial draws $X_i \sim N(0, 1/w_i)$, fits a non-decreasing sequence by pooling adjacent violators and
 * counts its levels. The standard error of a share p is $\sqrt{p(1-p)/\text{trials}}$, and that of a p-value
 * computed from the weights at most $1/(2\sqrt{\text{trials}})$. The same on every engine.
 *
 * @param weights - one positive number a group, in the order of the groups: its number of observations
 *   divided by their variance
 * @param options - `trials`, `seed`
 * @returns the level probabilities, frozen; index = degrees of freedom, 0 to k - 1
 * @remarks Cost: proportional to the number of groups times trials; about 0.1 s for 10 groups and 100000
 *   trials.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "Order Restricted Statistical Inference", Wiley (1988).
 *
 * @example
 * ```ts
 * import { approxTotalOrder } from 'hullgauge';
 * const weights = approxTotalOrder([12, 9, 14, 30, 8], { trials: 20_000, seed: 1 });
 * weights.length; // => 5
 * weights.reduce((sum, w) => sum + w); // => expect.closeTo(1, 12)
 * ```
 */
export function approxTotalOrder(
  weights: readonly number[],
  options: ApproxTotalOrderOptions,
): readonly number[] {
  const fn = 'approxTotalOrder';
  checkGroupWeights(fn, weights);
  checkOptions(fn, options, ['trials', 'seed']);
  const { trials, seed } = options;
  checkInteger(fn, 'trials', trials, 1, 1e9);
  checkInteger(fn, 'seed', seed, 0);
  const k = weights.length;
  const largest = weights.reduce((most, weight) => Math.max(most, weight));
  const scaled = weights.map((weight) => weight / largest);
  const deviations = scaled.map((weight) => 1 / Math.sqrt(weight));
  const stream = randomStream(seed);
  const counts = new Float64Array(k);
  const means = new Float64Array(k);
  const masses = new Float64Array(k);
  for (let trial = 0; trial < trials; trial++) {
    let blocks = 0;
    for (let i = 0; i < k; i++) {
      let mean = (deviations[i] as number) * stream.normal();
      let mass = scaled[i] as number;
      while (blocks > 0 && (means[blocks - 1] as number) >= mean) {
        blocks--;
        const other = masses[blocks] as number;
        mean = (mean * mass + (means[blocks] as number) * other) / (mass + other);
        mass += other;
      }
      means[blocks] = mean;
      masses[blocks] = mass;
      blocks++;
    }
    counts[blocks - 1] = (counts[blocks - 1] as number) + 1;
  }
  return Object.freeze(Array.from(counts, (count) => count / trials));
}
