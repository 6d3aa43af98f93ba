/**
 * Binomial probabilities in the form that subtracts no large logarithms, for any size of n.
 *
 * log C(n, j) q^j (1-q)^(n-j) = constant(n, j) - deviance(j, nq) - deviance(n-j, n(1-q)) with
 * deviance(x, m) = x log(x/m) + m - x. Source: Fast and accurate computation of binomial
 * probabilities (2000).
 */
import { EPSILON } from '../epsilon.ts';
import { log1pmxKernel } from '../special/log-domain.ts';
import { stirlingRemainderKernel } from '../special/stirling-remainder.ts';

const LOG_TWO_PI = 1.8378770664093455;
/** From here on n is taken from its logarithm. */
export const HUGE_COUNT = 1e290;

/** The part that does not depend on q, for 0 < j < n; n may be `Infinity`. */
export function binomialConstant(n: number, j: number): number {
  return (
    stirlingRemainderKernel(n) -
    stirlingRemainderKernel(j) -
    stirlingRemainderKernel(n - j) -
    0.5 * (LOG_TWO_PI + Math.log(j)) -
    0.5 * (n < HUGE_COUNT ? Math.log1p(-j / n) : 0)
  );
}

/**
 * The sum of both deviances, for 0 < j < n; writes a bound on its error to `error[0]`.
 *
 * @param n - `Infinity` where only its logarithm is known
 * @param mean - n q
 * @param logMean - its logarithm, which counts where `mean` underflows
 * @param logError - bound on the error of the logarithm of the mean
 */
export function binomialDeviance(
  n: number,
  j: number,
  mean: number,
  logMean: number,
  logError: number,
  error: Float64Array,
): number {
  const rest = n - j;
  const excess = (mean - j) / j;
  const below = excess < -0.5 ? j * (Math.log(j) - logMean) + mean - j : -j * log1pmxKernel(excess);
  const above = n < HUGE_COUNT ? -rest * log1pmxKernel((j - mean) / rest) : 0;
  error[0] = EPSILON * (8 + 3 * Math.abs(below) + 3 * above) + logError * Math.abs(mean - j);
  return below + above;
}
