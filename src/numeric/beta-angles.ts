/**
 * Terms of the expected face numbers of beta and beta-prime polytopes: I_(n,m)(alpha) J_(m,k)(alpha).
 *
 * alpha is 2b + d for the beta law and 2b - d (the degrees of freedom) for the beta-prime law. With
 * c_p the constant that makes c_p cos^p a density on (-pi/2, pi/2), F its distribution function,
 * C_Q the constant of cosh^-Q on the line, and
 *
 * | | p | q | Q |
 * |---|---|---|---|
 * | beta | alpha | alpha m | alpha m + 2 |
 * | beta-prime | alpha - 1 | alpha m - 1 | alpha m - 1 |
 *
 * the external and internal quantities are
 *
 *   I_(n,m) = C(n, m) c_q int cos^q F^(n-m),
 *   J_(m,k) = C(m, k) C_Q int cosh(x)^-Q (1/2 + i c_p int_0^x cosh^p)^(m-k) dx.
 *
 * Both are written with the mean excess L of the one-dimensional beta law that F belongs to, which
 * leaves no large numbers to cancel: I is an expectation over the m-th order statistic of n uniform
 * numbers, and F(-a) = c_p cos(a)^(p+1) / ((p + 1) L) at the saddle of J.
 *
 * Here alpha is the same for all m of a sum; published formulas index J by a parameter that moves
 * with m. Source: Angles of random simplices and face numbers of random polytopes, Advances in
 * Mathematics 380 (2021), arXiv:1909.13335.
 */

import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { betaContourKernel } from './beta-contour.ts';
import { BetaTail } from './beta-tail.ts';
import { orderStatisticExpectation } from './order-statistic.ts';

const HALF_LOG_PI = 0.57236494292470009;

/** Which of the two families. */
export type BetaFamily = 'beta' | 'betaPrime';

const CONTOUR: Float64Array = /* @__PURE__ */ new Float64Array(3);

/** The terms at fixed family and alpha. */
export class BetaAngles {
  readonly family: BetaFamily;
  readonly alpha: number;
  /** Sign of the last term: negative only among the analytic continuations m > alpha + 3 of 'beta'. */
  sign = 1;
  private readonly p: number;
  private readonly external: BetaTail;
  private readonly internal: BetaTail;

  /** @param alpha - above -1 for 'beta', positive for 'betaPrime' */
  constructor(family: BetaFamily, alpha: number) {
    this.family = family;
    this.alpha = alpha;
    this.p = family === 'beta' ? alpha : alpha - 1;
    this.external = new BetaTail(0.5 * (this.p - 1));
    this.internal = new BetaTail(0.5 * (this.p - 1));
  }

  /**
   * log of |I_(n,m) J_(m,k)| for 1 <= k <= m <= n; writes a bound on its absolute error to `error[0]`
   * and sets `sign`.
   */
  logTerm(count: ResolvedCount, m: number, k: number, error: Float64Array): number {
    const { p, alpha, external, internal } = this;
    const beta = this.family === 'beta';
    const M = m - k;
    const q = beta ? alpha * m : alpha * m - 1;
    const Q = beta ? q + 2 : q;
    this.sign = 1;
    if (M === 1) internal.centreAtHeight(0);
    const e = beta ? M - k * alpha - 2 : 1 - alpha * k;
    let logInternal = M === 1 ? -internal.logExcess : 0;
    let internalBound = 0;
    if (M > 1) {
      betaContourKernel(internal, Q, M, e, CONTOUR);
      this.sign = CONTOUR[2] as number;
      if (this.sign === 0) {
        error[0] = 0;
        return Number.NEGATIVE_INFINITY;
      }
      logInternal = (CONTOUR[0] as number) + logConstant(Q / 2);
      internalBound = CONTOUR[1] as number;
    }
    const choices = logBinomialKernel(m, k);
    // (q + 1 - (p + 1) m) / 2, which cancels by hand, like e
    const width = beta ? 0.5 * (1 - m) : 0;
    const weight = (): number => (m - 1) * external.logExcess + width * external.logWidth;
    const order = { m, n: count.n, log: count.log };
    const expectation = orderStatisticExpectation(external, 'line', order, weight);
    const constants =
      logConstant(0.5 * (q + 1)) -
      k * external.logDensity +
      (k - 1) * Math.log(p + 1) -
      Math.log(m);
    const sizes =
      choices +
      Math.abs(logInternal) +
      Math.abs(expectation.log) +
      k * (Math.abs(external.logDensity) + Math.log(p + 1));
    error[0] = internalBound + expectation.error + EPSILON * (12 + 2 * M + 2 * k + 2 * sizes);
    return choices + constants + expectation.log + logInternal;
  }
}

/** log Gamma(x + 1/2) / (sqrt(pi) Gamma(x)): 1 / int cos^(2x - 1) = 1 / int cosh^(-2x). */
function logConstant(x: number): number {
  return logGammaRatioKernel(x, 0.5) - HALF_LOG_PI;
}
