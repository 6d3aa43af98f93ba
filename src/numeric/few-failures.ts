/**
 * The far corner of a long sum of Bernoulli variables: nearly all of them are 1.
 *
 * The generating function of the failures has coefficients far beyond doubles there, and its contour
 * would have to be enumerated factor by factor; elementary symmetric polynomials do without.
 */
import { EPSILON } from '../epsilon.ts';
import { logFactorialKernel } from '../special/log-beta.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import type { BernoulliRun, SumTail } from './poisson-binomial.ts';

/** Runs up to this length are summed term by term. */
const SHORT_RUN = 1e4;

/**
 * P(K > k) where nearly all variables are 1: P(K = size - i) = prod p times the elementary symmetric
 * polynomial e_i of the odds against, x = step j - 1. Newton's identities, with e_i = P_1^i c_i / i!:
 * c_i = sum over l of (-1)^(l-1) (P_l/P_1^l) (i-1)!/(i-l)! c_(i-l); terms fall like (i/size)^l.
 */
export function fewFailures(runs: readonly BernoulliRun[], failures: number): SumTail {
  let log = 0;
  let bulk = 0;
  for (const { step, from, to, count } of runs) {
    const length = to + 1 - from;
    const ratio = count * logGammaRatioKernel(from, length);
    log -= ratio + (step === 2 ? count * length * Math.LN2 : 0);
    bulk += ratio;
  }
  const total = powerSum(runs, 1, 1);
  const sums = [0, 1];
  for (let l = 2; l <= 24; l++) sums[l] = powerSum(runs, l, total);
  const c = new Float64Array(failures + 1);
  c[0] = 1;
  for (let i = 1; i <= failures; i++) {
    let weight = 1;
    let sum = 0;
    for (let l = 1; l <= Math.min(i, 24); l++) {
      const term = weight * (sums[l] as number) * (c[i - l] as number);
      sum += l % 2 === 1 ? term : -term;
      if (Math.abs(term) < 1e-18) break;
      weight *= i - l;
    }
    c[i] = sum;
  }
  // e_(i-1)/e_i = i c_(i-1)/(P_1 c_i), tiny: the sum over fewer failures is short.
  let tail = 1;
  for (let i = failures, term = 1; i > 0; i--) {
    term *= (i * (c[i - 1] as number)) / (total * (c[i] as number));
    tail += term;
    if (term < 1e-17) break;
  }
  const logFactor = failures * Math.log(total) - logFactorialKernel(failures);
  log += logFactor + Math.log((c[failures] as number) * tail);
  const logError =
    EPSILON * (8 + 2 * failures + 4 * Math.abs(bulk) + 2 * Math.abs(logFactor) + Math.abs(log));
  return { tail: Math.exp(log), log, side: 'upper', logError };
}

/** Sum of (step j - 1)^power / total^power over all variables. */
function powerSum(runs: readonly BernoulliRun[], power: number, total: number): number {
  let sum = 0;
  for (const { step, from, to, count } of runs) {
    if (to - from < SHORT_RUN) {
      for (let j = from; j <= to; j++) sum += count * ((step * j - 1) / total) ** power;
      continue;
    }
    // midpoint rule with its first correction, exact for power 1 and 2; the rest is (to)^-4
    const low = (step * (from - 0.5) - 1) / total;
    const high = (step * (to + 0.5) - 1) / total;
    const size = step / total;
    const integral = (high ** (power + 1) - low ** (power + 1)) / ((power + 1) * size);
    const slope = power * size * (high ** (power - 1) - low ** (power - 1));
    sum += count * (integral + slope / 24);
  }
  return sum;
}
