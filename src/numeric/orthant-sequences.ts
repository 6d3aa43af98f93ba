/**
 * The three parity sequences that orthant integrals build: logarithms of v_0, v_1, .. whose even and
 * whose odd members each sum to 1/2 (for {@link paritySplit}).
 *
 * They are the intrinsic volumes of three cones in R^n, named here by the set whose descent they are
 * in sparse recovery; k is the number of non-zeros, M = n - k.
 *
 * | sequence | cone at a k-sparse vector | v_i, with j = i + 1 - k |
 * |---|---|---|
 * | 'simplex' | of conv(e_1, .., e_n) | C(M, j) A_j(k) B_(M-j)(k + j) |
 * | 'nonnegative' | of conv(0, e_1, .., e_n): l1 with x >= 0 | C(M, j) A_j(k) G+_(M-j)(k + j) + C(M, j-1) 2^-M C_(j-1)(k) |
 * | 'absolute' | of conv(+-e_1, .., +-e_n): l1 | 2^j C(M, j) A_j(k) G+-_(M-j)(k + j), and v_n = C_M(k) |
 *
 * Sources: Random projections of regular simplices, Discrete & Computational Geometry 7 (1992);
 * Counting faces of randomly projected polytopes when the projection radically lowers dimension,
 * Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364.
 */
import { logBinomialKernel } from '../special/log-beta.ts';
import { logAddExpKernel } from '../special/log-domain.ts';
import { logAbsoluteSumKernel, logOrthantTermKernel } from './orthant.ts';
import type { LogTerm } from './parity-split.ts';

/** Which of the three sequences. */
export type OrthantSequence = 'simplex' | 'nonnegative' | 'absolute';

/** Index of the last member that is not 0; the first is k - 1 for all three. */
export function lastOrthantIndex(sequence: OrthantSequence, n: number): number {
  return sequence === 'simplex' ? n - 1 : n;
}

/** log v_i for k - 1 <= i <= lastOrthantIndex, as a function that also gives an error bound. */
export function orthantSequence(sequence: OrthantSequence, n: number, k: number): LogTerm {
  const M = n - k;
  const logM = Math.log(M);
  if (sequence === 'simplex') {
    return (i, error) => logOrthantTermKernel(M, logM, i + 1 - k, k, 'line', error);
  }
  if (sequence === 'absolute') {
    return (i, error) =>
      i === n
        ? logAbsoluteSumKernel(M, k, error)
        : logOrthantTermKernel(M, logM, i + 1 - k, k, 'absolute', error);
  }
  return (i, error) => {
    const j = i + 1 - k;
    let log = Number.NEGATIVE_INFINITY;
    let bound = 0;
    if (j <= M) {
      log = logOrthantTermKernel(M, logM, j, k, 'half', error);
      bound = error[0] as number;
    }
    if (j === 0) return log;
    const choices = logBinomialKernel(M, j - 1);
    const other = choices - M * Math.LN2 + logAbsoluteSumKernel(j - 1, k, error);
    const otherBound = (error[0] as number) + 2 ** -52 * (2 + M + 2 * choices);
    error[0] = Math.max(bound, otherBound);
    return logAddExpKernel(log, other);
  };
}
