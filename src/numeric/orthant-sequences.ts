/**
 * The three parity sequences that orthant integrals build: logarithms of v_0, v_1, .. whose even and
 * whose odd members each sum to 1/2, for {@link paritySplit}.
 *
 * They are the intrinsic volumes of three cones in R^(M+1), with s the last coordinate and kappa > 0:
 *
 * | sequence | cone | v_j |
 * |---|---|---|
 * | 'simplex' | y >= 0, sum y = sqrt(kappa) s | C(M, j) A_j(kappa) B_(M-j)(j + kappa), j <= M |
 * | 'nonnegative' | y >= 0, sum y <= sqrt(kappa) s | C(M, j) A_j(kappa) G+_(M-j)(j + kappa) + C(M, j-1) 2^-M C_(j-1)(kappa), j <= M + 1 |
 * | 'absolute' | sum abs(y) <= sqrt(kappa) s | 2^j C(M, j) A_j(kappa) G+-_(M-j)(j + kappa), and v_(M+1) = C_M(kappa) |
 *
 * A query that is sigma times a Gaussian point has kappa = 1/sigma^2. At a k-sparse vector in R^n the
 * descent cones (of the simplex; of l1 with x >= 0; of l1) are these with M = n - k, kappa = k, times
 * a subspace of k - 1 dimensions: their intrinsic volume of order i is v_(i+1-k).
 *
 * Sources: Random projections of regular simplices, Discrete & Computational Geometry 7 (1992);
 * Counting faces of randomly projected polytopes when the projection radically lowers dimension,
 * Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364.
 */
import { logBinomialKernel } from '../special/log-beta.ts';
import { logAddExpKernel } from '../special/log-domain.ts';
import { logAbsoluteSumKernel, logOrthantTermKernel, orthantTermSlope } from './orthant.ts';
import type { LogTerm } from './parity-split.ts';

/** Which of the three sequences. */
export type OrthantSequence = 'simplex' | 'nonnegative' | 'absolute';

/** Index of the last member that is not 0; the first is 0. */
export function lastOrthantIndex(sequence: OrthantSequence, M: number): number {
  return sequence === 'simplex' ? M : M + 1;
}

/**
 * log v_j for 0 <= j <= lastOrthantIndex, as a function that also gives an error bound.
 *
 * @param M - an integer >= 1, or `Infinity` where only its logarithm is known
 * @param logM - its logarithm
 */
export function orthantSequence(
  sequence: OrthantSequence,
  M: number,
  logM: number,
  kappa: number,
): LogTerm {
  if (sequence === 'simplex') {
    return (j, error) => logOrthantTermKernel(M, logM, j, kappa, 'line', error);
  }
  if (sequence === 'absolute') {
    return (j, error) =>
      j > M
        ? logAbsoluteSumKernel(M, kappa, error)
        : logOrthantTermKernel(M, logM, j, kappa, 'absolute', error);
  }
  return (j, error) => {
    let log = Number.NEGATIVE_INFINITY;
    let bound = 0;
    if (j <= M) {
      log = logOrthantTermKernel(M, logM, j, kappa, 'half', error);
      bound = error[0] as number;
    }
    // 2^-M is beyond all comparison for such M
    if (j === 0 || M > 1e15) return log;
    const choices = logBinomialKernel(M, j - 1);
    const other = choices - M * Math.LN2 + logAbsoluteSumKernel(j - 1, kappa, error);
    const otherBound = (error[0] as number) + 2 ** -52 * (2 + M + 2 * choices);
    error[0] = bound + otherBound * Math.exp(Math.min(0, other - log));
    return logAddExpKernel(log, other);
  };
}

const KIND = { simplex: 'line', nonnegative: 'half', absolute: 'absolute' } as const;

/** Sign of v_(j+1) - v_(j-1), for 0 < j <= M, where the terms themselves do not tell. */
export function orthantSequenceSlope(
  sequence: OrthantSequence,
  M: number,
  logM: number,
  kappa: number,
): (j: number) => number {
  return (j) => (j < M ? orthantTermSlope(M, logM, j, kappa, KIND[sequence]) : -1);
}
