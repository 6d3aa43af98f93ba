/**
 * Regions and faces of generic hyperplane arrangements.
 *
 * All counts are partial sums of binomial coefficients, determined by n and d alone. Source: Facing up
 * to arrangements: face-count formulas for partitions of space by hyperplanes, Memoirs of the
 * American Mathematical Society 154 (1975); the central case: Geometrical and statistical properties
 * of systems of linear inequalities with applications in pattern recognition, IEEE Transactions on
 * Electronic Computers EC-14 (1965).
 */
import { checkBoolean, checkInteger, checkOptions } from '../domain.ts';
import { LogNumber } from '../log-number.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import {
  binomialCount,
  countOf,
  integerBinomial,
  integerBinomialSum,
  logBinomialSum,
} from './binomial-sum.ts';

/** Arguments of {@link arrangementRegions}. */
export interface ArrangementArgs {
  /** Number of hyperplanes; an integer from 0 to 2^53 - 1. */
  readonly n: number;
  /** Dimension; an integer from 1 to 2^53 - 1. */
  readonly d: number;
  /** Whether all hyperplanes pass through the origin; false if left out. */
  readonly central?: boolean;
  /** Whether only bounded regions or faces are counted; false if left out. */
  readonly bounded?: boolean;
}

/** Arguments of {@link arrangementFaces}. */
export interface ArrangementFacesArgs extends ArrangementArgs {
  /** Dimension of the faces; an integer from 0 to d. */
  readonly k: number;
}

/**
 * The number of regions into which n hyperplanes in general position divide R^d.
 *
 * $$ \sum_{i=0}^{d} \binom{n}{i} \ \text{(affine)}, \qquad \binom{n-1}{d} \ \text{(affine, bounded)}, \qquad
 *    2 \sum_{i=0}^{d-1} \binom{n-1}{i} \ \text{(central)}. $$
 *
 * Assumptions: general position. Affine: any $d$ hyperplanes meet in one point and no $d + 1$ do;
 * central: any $d$ of the normals are linearly independent. Otherwise the number is an upper bound.
 *
 * Cost: at most 500 terms, constant where a tail of the binomial law takes over.
 *
 * Accuracy: `value` is exact below $2^{46}$, where its logarithm still tells integers apart, and good to
 * $10^{-14}$ a few bits beyond; error of the logarithm at most $10^{-14} \max(1, |\ln x|)$.
 *
 * Source: Facing up to arrangements: face-count formulas for partitions of space by hyperplanes,
 * Memoirs of the American Mathematical Society 154 (1975), doi:10.1090/memo/0154.
 *
 * @param args - `n` hyperplanes (integer >= 0) in dimension `d` (integer >= 1); `central`: all
 * through the origin; `bounded`: count bounded regions only, of which a central arrangement has none
 * @returns the number of regions
 * @throws A {@link DomainError} if an argument is not of that kind, or an option is unknown
 *
 * @example
 * ```ts
 * import { arrangementRegions } from 'hullgauge/conic';
 * arrangementRegions({ n: 3, d: 2 }).value; // => 7
 * arrangementRegions({ n: 3, d: 2, bounded: true }).value; // => 1
 * arrangementRegions({ n: 10, d: 3, central: true }).value; // => 92
 * `${arrangementRegions({ n: 1e6, d: 100 })}`; // => '1.0663258859e+442'
 * ```
 */
export function arrangementRegions(args: ArrangementArgs): LogNumber {
  const fn = 'arrangementRegions';
  checkOptions(fn, args, ['n', 'd', 'central', 'bounded']);
  checkArrangement(fn, args);
  return faces(args, args.d);
}

/**
 * The number of k-dimensional faces of the arrangement of n hyperplanes in general position in R^d;
 * k = d counts the regions.
 *
 * $$ \binom{n}{d-k} \sum_{i=0}^{k} \binom{n-d+k}{i} \ \text{(affine)}, \qquad
 *    \binom{n}{d-k} \binom{n-d+k-1}{k} \ \text{(affine, bounded)}, \qquad
 *    2 \binom{n}{d-k} \sum_{i=0}^{k-1} \binom{n-d+k-1}{i} \ \text{(central, } k \ge 1). $$
 *
 * A central arrangement has one face of dimension 0, the origin, from $n \ge d$ on; it is its only
 * bounded face.
 *
 * Assumptions, cost, accuracy and source: as for {@link arrangementRegions}.
 *
 * @param args - `n` hyperplanes (integer >= 0) in dimension `d` (integer >= 1), `k` from 0 to d;
 * `central`: all through the origin; `bounded`: count bounded faces only
 * @returns the number of faces; 0 where n < d - k
 * @throws A {@link DomainError} if an argument is not of that kind, or an option is unknown
 *
 * @example
 * ```ts
 * import { arrangementFaces } from 'hullgauge/conic';
 * arrangementFaces({ n: 5, d: 3, k: 1 }).value; // => 40
 * arrangementFaces({ n: 10, d: 3, k: 2, central: true }).value; // => 180
 * ```
 */
export function arrangementFaces(args: ArrangementFacesArgs): LogNumber {
  const fn = 'arrangementFaces';
  checkOptions(fn, args, ['n', 'd', 'k', 'central', 'bounded']);
  checkArrangement(fn, args);
  checkInteger(fn, 'k', args.k, 0, args.d);
  return faces(args, args.k);
}

function checkArrangement(fn: string, args: ArrangementArgs): void {
  checkInteger(fn, 'n', args.n, 0);
  checkInteger(fn, 'd', args.d, 1);
  if (args.central !== undefined) checkBoolean(fn, 'central', args.central);
  if (args.bounded !== undefined) checkBoolean(fn, 'bounded', args.bounded);
}

function faces({ n, d, central, bounded }: ArrangementArgs, k: number): LogNumber {
  const codimension = d - k;
  if (n < codimension) return LogNumber.of(0);
  // Within the flat of a face the remaining hyperplanes cut out an arrangement of dimension k.
  const rest = n - codimension;
  if (central) {
    if (k === 0) return LogNumber.of(1);
    return bounded ? LogNumber.of(0) : coverFaces(n, codimension, rest, k);
  }
  const flats = logBinomialKernel(n, codimension);
  if (bounded) {
    if (rest === 0) return k === 0 ? binomialCount(n, codimension) : LogNumber.of(0);
    if (rest - 1 < k) return LogNumber.of(0);
    return countOf(
      flats + logBinomialKernel(rest - 1, k),
      () => integerBinomial(n, codimension) * integerBinomial(rest - 1, k),
    );
  }
  return countOf(
    flats + logBinomialSum(rest, k),
    () => integerBinomial(n, codimension) * integerBinomialSum(rest, k),
  );
}

/** binom(n, codimension) Cover(rest, k) for k >= 1. */
function coverFaces(n: number, codimension: number, rest: number, k: number): LogNumber {
  if (rest === 0) return binomialCount(n, codimension);
  return countOf(
    logBinomialKernel(n, codimension) + Math.LN2 + logBinomialSum(rest - 1, k - 1),
    () => integerBinomial(n, codimension) * 2 * integerBinomialSum(rest - 1, k - 1),
  );
}
