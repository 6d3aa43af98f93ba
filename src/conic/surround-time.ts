/**
 * The number of points drawn until the target is surrounded.
 *
 * T <= n exactly when n points surround it, so the distribution function is Wendel's formula in n, and
 * T - 1 is the number of tosses of a fair coin until d heads.
 */

import type { Distribution } from '../distribution.ts';
import { checkInteger, checkNumber, checkOptions } from '../domain.ts';
import { narrow } from '../numeric/monotone-search.ts';
import { oddsGap, targetOf } from '../numeric/target.ts';
import { certainty, type Probability } from '../probability.ts';
import { logBinomialPmfKernel } from '../special/binomial.ts';
import { checkProbability } from '../special/probability-argument.ts';
import { wendel } from './wendel.ts';

/**
 * The distribution of the number of points that it takes to surround the target in R^d.
 *
 * With $T = \min\lbrace n : 0 \in \operatorname{conv}(X_1,\dots,X_n)\rbrace$,
 *
 * $$ P(T \le n) = P\bigl(\mathrm{Bin}(n-1,\tfrac12) \ge d\bigr), \qquad
 *    P(T = n) = \binom{n-2}{d-1} 2^{1-n}, $$
 *
 * with mean 2d + 1, variance 2d and median 2d. Assumptions as for {@link originInHull}.
 *
 * @param args - `d`: dimension, an integer from 0 to 2^53 - 1
 * @returns the distribution; `logPdf(n)` is the logarithm of P(T = n), `-Infinity` off the integers;
 *   `quantile(0)` is the smallest possible value d + 1 and `quantile(1)` is `Infinity`
 * @remarks Constant cost of `cdf`; about ten evaluations of it for `quantile`.
 * @throws A {@link DomainError} if `d` is missing or out of its domain; `cdf`, `quantile` and `logPdf`
 *   throw it for NaN or a probability outside [0, 1]
 *
 * Source: "A problem in geometric probability", Mathematica Scandinavica 11 (1962) 109-111,
 * doi:10.7146/math.scand.a-10655.
 *
 * @example
 * ```ts
 * import { Probability, surroundTime } from 'hullgauge';
 * const time = surroundTime({ d: 40 });
 * time.mean; // => 81
 * time.quantile(0.5); // => 80
 * time.quantile(Probability.fromComplement(1e-12)); // => 169
 * ```
 */
export function surroundTime(args: { readonly d: number }): Distribution {
  const fn = 'surroundTime';
  checkOptions(fn, args, ['d']);
  const { d } = args;
  checkInteger(fn, 'd', d, 0);
  return {
    mean: 2 * d + 1,
    variance: 2 * d,
    cdf(x: number): Probability {
      checkNumber(`${fn}.cdf`, 'x', x);
      // The points surround the target at some time with certainty.
      if (x === Number.POSITIVE_INFINITY) {
        return certainty(true);
      }
      return wendel(Math.max(0, Math.floor(x)), d);
    },
    quantile(p: number | Probability): number {
      checkProbability(`${fn}.quantile`, 'p', p);
      return quantile(d, targetOf(p));
    },
    logPdf(x: number): number {
      checkNumber(`${fn}.logPdf`, 'x', x);
      if (!Number.isInteger(x) || x <= d) return Number.NEGATIVE_INFINITY;
      if (d === 0) return x === 1 ? 0 : Number.NEGATIVE_INFINITY;
      return logBinomialPmfKernel(x - 2, d - 1, 0.5, 0.5) - Math.LN2;
    },
  };
}

/** The smallest n with P(T <= n) >= target. */
function quantile(d: number, target: Probability): number {
  if (target.logComplement === Number.NEGATIVE_INFINITY) {
    return d === 0 ? 1 : Number.POSITIVE_INFINITY;
  }
  const gapAt = (n: number): number => oddsGap(wendel(n, d), target);
  const first = { x: d + 1, gap: gapAt(d + 1) };
  if (first.gap >= 0) return d + 1;
  // 2 d - 1 + L + sqrt(L^2 + 4 L (d - 1)) points suffice for a complement of e^-L, by Hoeffding.
  const log = -target.logComplement;
  const enough = Math.ceil(2 * d + log + Math.sqrt(log) * Math.sqrt(log + 4 * d)) + 1;
  return narrow({ lower: first, upper: { x: enough, gap: gapAt(enough) } }, gapAt, true).upper.x;
}
