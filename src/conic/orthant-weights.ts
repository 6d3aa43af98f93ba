/**
 * Weights of the test that several parameters are 0 against that none is negative.
 *
 * With the correlations R of the estimators and R = L L', the cone of non-negative parameters in the metric of
 * R^-1 is spanned by the columns of L^-1; its conic intrinsic volumes are the weights.
 */
import { checkFinite, checkOptions, DomainError } from '../domain.ts';
import { polyhedralCone } from './polyhedral-cone.ts';

/** Options of {@link orthantWeights}. */
export interface OrthantWeightsArgs {
  /** Covariance matrix of the estimators: rows of a symmetric positive definite matrix of 1 to 4 columns. */
  readonly covariance: readonly (readonly number[])[];
}

const MOST_PARAMETERS = 4;
/** Asymmetry, in units of standard deviations, that rounding may cause. */
const ASYMMETRY = 1e-9;
/** A pivot of the correlation matrix below this is no longer told from 0. */
const SINGULAR = 1e-10;

/**
 * The weights of the test that up to four parameters are all 0 against the alternative that none of them is
 * negative, from the covariance of their estimators.
 *
 * $$ w_m = P(N(0, \Sigma) \ge 0), \qquad w_0 = P(N(0, \Sigma^{-1}) \ge 0), $$
 *
 * and in between sums over the faces of the orthant. For two parameters with correlation r,
 * $w_2 = \tfrac14 + \arcsin(r)/(2\pi)$, $w_1 = \tfrac12$. Use: variance components, one-sided tests of
 * several parameters. Assumption: the estimators are normal with this covariance, known up to a factor.
 *
 * @param args - `covariance`: the matrix, an array of 1 to 4 rows; only its correlations matter. It is the
 *   covariance of the *estimators*, the inverse of their information matrix
 * @returns the weights, frozen; index = degrees of freedom, 0 to the number of parameters
 * @remarks Cost: below a millisecond. Absolute error of each weight below 1e-13 for correlation matrices with
 *   a determinant above 1e-6.
 * @throws A {@link DomainError} if the matrix is not symmetric and positive definite, or has more than four
 *   rows (the columns of the inverse Cholesky factor as generators of `approxPolyhedralCone` take more)
 *
 * Sources: "Constrained Statistical Inference", Wiley (2005); "Intrinsic volumes of polyhedral cones: a
 * combinatorial perspective", Discrete and Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @example
 * ```ts
 * import { chiBarSquared, orthantWeights } from 'hullgauge';
 * const weights = orthantWeights({ covariance: [[4, 1], [1, 1]] });
 * weights.map((w) => w.toFixed(12)); // => ['0.166666666667', '0.500000000000', '0.333333333333']
 * chiBarSquared(weights).quantile(0.95).toPrecision(6); // => '4.57731'
 * ```
 */
export function orthantWeights(args: OrthantWeightsArgs): readonly number[] {
  const fn = 'orthantWeights';
  checkOptions(fn, args, ['covariance']);
  const correlations = checkCovariance(fn, args.covariance);
  const factor = cholesky(correlations);
  if (factor === undefined) {
    const requirement = 'a positive definite matrix, its correlations not nearly singular';
    throw new DomainError(fn, 'covariance', requirement, args.covariance);
  }
  return polyhedralCone(inverseColumns(factor)).intrinsicVolumes;
}

/** Refuses anything but a symmetric matrix with a positive diagonal; returns its correlations. */
function checkCovariance(fn: string, covariance: unknown): number[][] {
  if (!Array.isArray(covariance) || covariance.length < 1) {
    throw new DomainError(fn, 'covariance', 'an array of rows', covariance);
  }
  const m = covariance.length;
  if (m > MOST_PARAMETERS) {
    const requirement = `a matrix of at most ${MOST_PARAMETERS} rows (approxPolyhedralCone takes more)`;
    throw new DomainError(fn, 'covariance', requirement, covariance);
  }
  const rows = covariance as readonly unknown[];
  rows.forEach((row, i) => {
    if (!Array.isArray(row) || row.length !== m) {
      throw new DomainError(fn, `covariance[${i}]`, `an array of ${m} numbers`, row);
    }
    row.forEach((entry, j) => {
      checkFinite(fn, `covariance[${i}][${j}]`, entry);
    });
  });
  const matrix = covariance as readonly (readonly number[])[];
  const deviations = matrix.map((row, i) => {
    const variance = row[i] as number;
    if (variance > 0) return Math.sqrt(variance);
    throw new DomainError(fn, `covariance[${i}][${i}]`, 'a variance > 0', variance);
  });
  const scaled = matrix.map((row, i) =>
    row.map((entry, j) => entry / (deviations[i] as number) / (deviations[j] as number)),
  );
  return scaled.map((row, i) =>
    row.map((entry, j) => {
      const other = (scaled[j] as number[])[i] as number;
      if (Math.abs(entry - other) > ASYMMETRY) {
        const requirement = `covariance[${j}][${i}], as covariances are symmetric`;
        throw new DomainError(fn, `covariance[${i}][${j}]`, requirement, matrix[i]?.[j]);
      }
      return i === j ? 1 : 0.5 * (entry + other);
    }),
  );
}

/** The lower triangular L with L L' = R; nothing if R is not clearly positive definite. */
function cholesky(matrix: readonly (readonly number[])[]): number[][] | undefined {
  const factor: number[][] = [];
  for (const [i, row] of matrix.entries()) {
    const line: number[] = [];
    for (let j = 0; j < i; j++) {
      let sum = row[j] as number;
      const other = factor[j] as number[];
      for (let l = 0; l < j; l++) sum -= (line[l] as number) * (other[l] as number);
      line.push(sum / (other[j] as number));
    }
    // the root of 1 less the squares, each difference of squares as a product
    let pivot = 1;
    for (const x of line) pivot = Math.sqrt(Math.max((pivot - x) * (pivot + x), 0));
    if (pivot * pivot < SINGULAR) return undefined;
    line.push(pivot);
    factor.push(line);
  }
  return factor;
}

/** The columns of the inverse of a lower triangular matrix. */
function inverseColumns(factor: readonly (readonly number[])[]): number[][] {
  const m = factor.length;
  return factor.map((_, column) => {
    const x = new Array<number>(m).fill(0);
    for (let i = column; i < m; i++) {
      const row = factor[i] as readonly number[];
      let sum = i === column ? 1 : 0;
      for (let l = column; l < i; l++) sum -= (row[l] as number) * (x[l] as number);
      x[i] = sum / (row[i] as number);
    }
    return x;
  });
}
