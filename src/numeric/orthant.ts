/**
 * Equicorrelated orthant probabilities and their relatives, as logarithms with error bounds.
 *
 * xi, xi_1, xi_2, .. are independent standard normal variables, eta_1, .., eta_k normal with mean 0,
 * variance 1 + r and covariance r. Every kernel returns a natural logarithm and writes a bound on its
 * absolute error to `error[0]`; arguments are not checked.
 *
 * | kernel | logarithm of |
 * |---|---|
 * | logNegativeOrthantKernel(k, kappa, error) | A_k(kappa) = P(all eta_i < 0) at r = -1/(k + kappa) |
 * | logPositiveOrthantKernel(N, lambda, error) | B_N(lambda) = P(all eta_i < 0) at r = 1/lambda, or P(all xi_i < xi / sqrt(lambda)) |
 * | logHalfOrthantKernel(N, lambda, error) | G+_N(lambda) = P(all xi_i < xi / sqrt(lambda), xi > 0) |
 * | logAbsoluteOrthantKernel(N, lambda, error) | G+-_N(lambda) = P(all abs(xi_i) < xi / sqrt(lambda)) |
 * | logAbsoluteSumKernel(M, kappa, error) | C_M(kappa) = P(sum of abs(xi_i), i = 1..M, <= sqrt(kappa) xi) |
 * | logOrthantTermKernel(n, logN, j, kappa, kind, error) | c^j C(n, j) A_j(kappa) E_(n-j)(j + kappa) |
 *
 * In the last, E = B, G+, G+- and c = 1, 1, 2 for the kinds 'line', 'half', 'absolute'; it is
 * assembled so that nothing large cancels, for any n. With 'line' the terms over j = 0..n are a parity
 * sequence (parity-split.ts); orthant-sequences.ts has the three that occur in sparse recovery.
 *
 * k, M, j are integers >= 0 up to about 1e4, N an integer >= 0, kappa and lambda positive reals, n an
 * integer or `Infinity` with only its logarithm logN known.
 * Sources: Absorption probabilities for Gaussian polytopes and regular spherical simplices, Advances
 * in Applied Probability 52 (2020), arXiv:1704.04968; The exponentially convergent trapezoidal rule,
 * SIAM Review 56 (2014), doi 10.1137/130932132.
 */
import { EPSILON } from '../epsilon.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { logAddExpKernel } from '../special/log-domain.ts';
import { logNormalCdfKernel } from '../special/normal.ts';
import { binomialConstant, binomialDeviance, HUGE_COUNT } from './binomial-weight.ts';
import { contourKernel, logScaledTail } from './orthant-contour.ts';
import { logGaussianFactor, type PeakKind, peakKernel } from './orthant-peak.ts';

export type { PeakKind } from './orthant-peak.ts';

const LOG_TWO_PI = 1.8378770664093455;

const CONTOUR: Float64Array = /* @__PURE__ */ new Float64Array(4);
const PEAK: Float64Array = /* @__PURE__ */ new Float64Array(6);

/** log A_k(kappa). */
export function logNegativeOrthantKernel(k: number, kappa: number, error: Float64Array): number {
  error[0] = 0;
  if (k === 0) return 0;
  contourKernel(k, kappa, false, CONTOUR);
  return contourLog(k, kappa, CONTOUR[1] as number, error) + logGaussianFactor(k + kappa);
}

/** log C_M(kappa). */
export function logAbsoluteSumKernel(M: number, kappa: number, error: Float64Array): number {
  error[0] = 0;
  if (M === 0) return -Math.LN2;
  contourKernel(M, kappa, true, CONTOUR);
  return contourLog(M, kappa, (CONTOUR[1] as number) + Math.LN2, error) - LOG_TWO_PI;
}

/** log of the contour integral in CONTOUR, with the given logarithm in place of log M(-a). */
function contourLog(k: number, kappa: number, logBase: number, error: Float64Array): number {
  const a = CONTOUR[0] as number;
  const power = k * logBase;
  const square = 0.5 * kappa * a * a;
  error[0] = (CONTOUR[3] as number) + EPSILON * (4 + 2 * k + 2 * Math.abs(power) + 2 * square);
  return power + square + (CONTOUR[2] as number);
}

/** log B_N(lambda). */
export function logPositiveOrthantKernel(N: number, lambda: number, error: Float64Array): number {
  return peakLog(N, lambda, 'line', error);
}

/** log G+_N(lambda). */
export function logHalfOrthantKernel(N: number, lambda: number, error: Float64Array): number {
  return peakLog(N, lambda, 'half', error);
}

/** log G+-_N(lambda). */
export function logAbsoluteOrthantKernel(N: number, lambda: number, error: Float64Array): number {
  return peakLog(N, lambda, 'absolute', error);
}

function peakLog(N: number, lambda: number, kind: PeakKind, error: Float64Array): number {
  error[0] = 0;
  if (N === 0) return kind === 'line' ? 0 : -Math.LN2;
  return peakOfAll(N, Math.log(N), lambda, kind, error);
}

/** Below this lambda the Gaussian factor is far wider than the rest of the integrand. */
const WIDE = 0.25;

/** log E_N(lambda) for N >= 1, `Infinity` with only its logarithm known. */
function peakOfAll(
  N: number,
  logN: number,
  lambda: number,
  kind: PeakKind,
  error: Float64Array,
): number {
  if (lambda < WIDE && N > 1) return widePeak(N, logN, lambda, kind, error);
  peakKernel(N, logN, lambda, kind, PEAK);
  const y0 = PEAK[0] as number;
  const power = N < HUGE_COUNT ? N * (PEAK[5] as number) : -(PEAK[4] as number);
  const square = 0.5 * lambda * y0 * y0;
  error[0] = (PEAK[2] as number) + EPSILON * (4 + 3 * Math.abs(power) + 2 * square);
  return power - square + (PEAK[1] as number) + logGaussianFactor(lambda);
}

/** The same by parts: E[Q(sqrt(lambda) max)], an integral over the density of the maximum. */
function widePeak(
  N: number,
  logN: number,
  lambda: number,
  kind: PeakKind,
  error: Float64Array,
): number {
  const s = Math.sqrt(lambda);
  const rest = N - 1;
  peakKernel(rest, N < HUGE_COUNT ? Math.log(rest) : logN, 1, kind, PEAK, s);
  const y0 = PEAK[0] as number;
  const power = N < HUGE_COUNT ? rest * (PEAK[5] as number) : -(PEAK[4] as number);
  const square = 0.5 * y0 * y0;
  const drag = logNormalCdfKernel(-s * y0);
  error[0] =
    (PEAK[2] as number) + EPSILON * (8 + 3 * Math.abs(power) + 2 * square + 2 * logN - 2 * drag);
  const log = logN + power - square + (PEAK[1] as number) + drag + logGaussianFactor(1);
  if (kind === 'absolute') return log + Math.LN2;
  // On the half line the maximum may also be negative.
  return kind === 'line' || N > 1e4 ? log : logAddExpKernel(log, -(N + 1) * Math.LN2);
}

/**
 * log of c^j C(n, j) A_j(kappa) E_{n-j}(j + kappa) for 0 <= j <= n, see the top of this file.
 *
 * At the peak y0 of E with tail q = 1 - F(y0), the factor c^j C(n, j) F(y0)^(n-j) becomes a binomial
 * probability of the parameter q, and what is left over are ratios of quantities near 1.
 */
export function logOrthantTermKernel(
  n: number,
  logN: number,
  j: number,
  kappa: number,
  kind: PeakKind,
  error: Float64Array,
): number {
  const lambda = j + kappa;
  if (j === n) {
    const log =
      logNegativeOrthantKernel(j, kappa, error) + (kind === 'absolute' ? j * Math.LN2 : 0);
    return kind === 'line' ? log : log - Math.LN2;
  }
  if (j === 0) return peakOfAll(n, logN, kappa, kind, error);
  const rest = n - j;
  peakKernel(rest, n < HUGE_COUNT ? Math.log(rest) : logN, lambda, kind, PEAK);
  const y0 = PEAK[0] as number;
  const external = PEAK[1] as number;
  const tail = PEAK[3] as number;
  if (kind === 'absolute' && tail > 0.5) return plainProduct(n, j, kappa, error);
  contourKernel(j, kappa, false, CONTOUR);
  const a = CONTOUR[0] as number;
  const ratio = j * ((CONTOUR[1] as number) - logScaledTail(y0));
  const square = 0.5 * kappa * (a - y0) * (a + y0);
  const binomial = logBinomialWeight(n, logN, j, tail, y0, kind === 'absolute', error);
  error[0] =
    (error[0] as number) +
    (PEAK[2] as number) +
    (CONTOUR[3] as number) +
    EPSILON * (8 + 4 * j + 2 * Math.abs(ratio) + 3 * Math.abs(square));
  return (
    binomial + ratio + square + external + (CONTOUR[2] as number) + (Math.log(lambda) - LOG_TWO_PI)
  );
}

/**
 * log of c^m C(n, m) C(m, v) A_(m-v)(v) E_(n-m)(m) for 1 <= v <= m <= n: the terms of expected numbers
 * of faces, which are c^v C(n, v) times those above but far larger than either factor's rounding.
 */
export function logFaceTermKernel(
  n: number,
  logN: number,
  m: number,
  v: number,
  kind: PeakKind,
  error: Float64Array,
): number {
  const choices = logBinomialKernel(m, v);
  const j = m - v;
  if (m === n) {
    const log = logNegativeOrthantKernel(j, v, error) + choices;
    error[0] = (error[0] as number) + EPSILON * (2 + 2 * choices);
    return kind === 'line' ? log : log + (kind === 'absolute' ? m - 1 : -1) * Math.LN2;
  }
  peakKernel(n - m, n > HUGE_COUNT ? logN : Math.log(n - m), m, kind, PEAK);
  const y0 = PEAK[0] as number;
  const external = PEAK[1] as number;
  const logTail = logScaledTail(y0);
  let internal = 0.5 * (LOG_TWO_PI - Math.log(m));
  let internalBound = 0;
  let ratio = -v * logTail;
  let square = 0;
  if (j > 0) {
    contourKernel(j, v, false, CONTOUR);
    const a = CONTOUR[0] as number;
    ratio += j * ((CONTOUR[1] as number) - logTail);
    square = 0.5 * v * a * a;
    internal = CONTOUR[2] as number;
    internalBound = CONTOUR[3] as number;
  }
  const binomial = logBinomialWeight(n, logN, m, PEAK[3] as number, y0, kind === 'absolute', error);
  error[0] =
    (error[0] as number) +
    (PEAK[2] as number) +
    internalBound +
    EPSILON * (8 + 4 * m + 2 * choices + 2 * Math.abs(ratio) + 2 * square);
  return binomial + choices + ratio + square + external + internal + (Math.log(m) - LOG_TWO_PI);
}

/** The term of kind 'absolute' factor by factor: F is small, and its logarithm too large to cancel. */
function plainProduct(n: number, j: number, kappa: number, error: Float64Array): number {
  const choices = logBinomialKernel(n, j) + j * Math.LN2;
  const internal = logNegativeOrthantKernel(j, kappa, error);
  const bound = (error[0] as number) + EPSILON * (4 + 2 * choices);
  const external = logAbsoluteOrthantKernel(n - j, j + kappa, error);
  error[0] = (error[0] as number) + bound;
  return choices + internal + external;
}

/**
 * Derivative of log of those terms in j, to leading order: its sign says on which side of 0 < j < n
 * the terms are larger, also where their logarithms are so large that their difference is lost.
 */
export function orthantTermSlope(
  n: number,
  logN: number,
  j: number,
  kappa: number,
  kind: PeakKind,
): number {
  const huge = !(n < HUGE_COUNT);
  peakKernel(n - j, huge ? logN : Math.log(n - j), j + kappa, kind, PEAK);
  const y0 = PEAK[0] as number;
  const logF0 = PEAK[5] as number;
  contourKernel(j, kappa, false, CONTOUR);
  const odds = (huge ? logN : Math.log(n - j)) - Math.log(j);
  const double = kind === 'absolute' ? Math.LN2 : 0;
  return odds + double + (CONTOUR[1] as number) - logF0 - 0.5 * y0 * y0;
}

/** log of C(n, j) q^j (1-q)^(n-j) for 0 < j < n, where q = Q(y0), or 2 Q(y0) if doubled. */
function logBinomialWeight(
  n: number,
  logN: number,
  j: number,
  q: number,
  y0: number,
  doubled: boolean,
  error: Float64Array,
): number {
  const huge = !(n < HUGE_COUNT);
  const logMean = huge
    ? logN + logNormalCdfKernel(-y0) + (doubled ? Math.LN2 : 0)
    : Math.log(n) + Math.log(q);
  const mean = huge ? Math.exp(logMean) : n * q;
  const logError = EPSILON * (huge ? Math.abs(logN) : 4);
  const deviance = binomialDeviance(n, j, mean, logMean, logError, error);
  return binomialConstant(n, j) - deviance;
}
