/**
 * The exact confidence interval of a binomial proportion.
 *
 * The lower end L has P[X >= hits] = alpha/2 at p = L, the upper end U has P[X <= hits] = alpha/2 at
 * p = U; both are quantiles of beta laws (The use of confidence or fiducial limits illustrated in the
 * case of the binomial, Biometrika, 1934, doi:10.1093/biomet/26.4.404). The interval covers the true
 * proportion with at least the confidence asked for, whatever it is.
 */
import { incompleteBetaInverseKernel, POINT_SLOTS } from '../special/incomplete-beta-inverse.ts';

/** Lower and upper end for `hits` out of `trials` > 0 at the given confidence. Checks nothing. */
export function binomialInterval(
  hits: number,
  trials: number,
  confidence: number,
): [lower: number, upper: number] {
  const tail = (1 - confidence) / 2;
  return [
    hits === 0 ? 0 : lowerPoint(hits, trials - hits + 1, tail)[0],
    hits === trials ? 1 : lowerPoint(trials - hits, hits + 1, tail)[1],
  ];
}

/** x and 1 - x with I_x(a, b) = tail. */
function lowerPoint(a: number, b: number, tail: number): [x: number, y: number] {
  const out = new Float64Array(POINT_SLOTS);
  incompleteBetaInverseKernel(a, b, tail, Math.log(tail), out);
  return [out[0] as number, out[1] as number];
}
