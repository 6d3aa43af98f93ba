/**
 * Descent cones of the l1 and the l-infinity norm, exactly at finite n, and statistical dimensions.
 *
 * The descent cone of f at x holds the directions in which f does not grow at first. Minimising f
 * subject to random linear equations recovers x iff the kernel of the equations misses that cone.
 */
import { checkInteger, checkOptions, MAX_INTEGER } from '../domain.ts';
import { integrateSmooth } from '../numeric/gauss-legendre.ts';
import {
  lastOrthantIndex,
  type OrthantSequence,
  orthantSequence,
} from '../numeric/orthant-sequences.ts';
import type { LogTerm } from '../numeric/parity-split.ts';
import { type Cone, halfspaceKernel, makeCone, orthantKernel, subspaceKernel } from './cone.ts';
import { productCone } from './cone-algebra.ts';
import { dimensionBound, secondOrderMoments } from './weak-threshold.ts';

/** Three integrals per dimension: about four seconds at this size. */
const LARGEST_DESCENT_CONE = 100_000;

/**
 * log v_i of the descent cone at a vector with `sparsity` of `n` non-zeros, 1 <= sparsity < n, and the
 * indices between which it is positive.
 */
export function descentSequence(
  sequence: OrthantSequence,
  n: number,
  sparsity: number,
): { readonly term: LogTerm; readonly first: number; readonly last: number } {
  const others = n - sparsity;
  const inner = orthantSequence(sequence, others, Math.log(others), sparsity);
  const first = sparsity - 1;
  return {
    term: (i, error) => inner(i - first, error),
    first,
    last: first + lastOrthantIndex(sequence, others),
  };
}

/**
 * The descent cone of the l1 norm at a vector of R^n with the given number of non-zeros, exactly at
 * finite n.
 *
 * With $s$ non-zeros, $\beta$ the internal angles of the regular simplex and $\gamma$ the external angles of
 * the cross-polytope,
 *
 * $$ v_k = \binom{n-s}{k+1-s} 2^{k+1-s}\, \beta(s, k+1)\, \gamma(k+1, n) \quad (s-1 \le k \le n-1), $$
 *
 * and $v_n$ is the solid angle of the cone. For $s = n$ it is a half-space, for $s = 0$ the origin.
 *
 * Cost: two one-dimensional integrals per dimension; about 0.05 s at n = 1000.
 *
 * Accuracy: error of $\ln v_k$ at most $10^{-11} \max(1, |\ln v_k|)$; `logErrors` holds the bound of each.
 *
 * Source: Counting faces of randomly projected polytopes when the projection radically lowers
 * dimension, Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364.
 *
 * @param args - `n`, the dimension, an integer from 1 to 100000, and `sparsity`, the number of
 * non-zeros, an integer from 0 to n
 * @returns the cone
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { l1DescentCone } from 'hullgauge/conic';
 * const cone = l1DescentCone({ n: 20, sparsity: 3 });
 * cone.statisticalDimension.toPrecision(10); // => '7.956702732'
 * cone.variance.toPrecision(10); // => '4.904788645'
 * ```
 */
export function l1DescentCone(args: { n: number; sparsity: number }): Cone {
  const fn = 'l1DescentCone';
  checkOptions(fn, args, ['n', 'sparsity']);
  const { n, sparsity } = args;
  checkInteger(fn, 'n', n, 1, LARGEST_DESCENT_CONE);
  checkInteger(fn, 'sparsity', sparsity, 0, n);
  if (sparsity === 0) return subspaceKernel(0, n);
  if (sparsity === n) return halfspaceKernel(n);
  const { term, first, last } = descentSequence('absolute', n, sparsity);
  const logs = new Array<number>(n + 1).fill(Number.NEGATIVE_INFINITY);
  const logErrors = new Array<number>(n + 1).fill(0);
  const error = new Float64Array(1);
  for (let i = first; i <= last; i++) {
    logs[i] = term(i, error);
    logErrors[i] = error[0] as number;
  }
  return makeCone({ dimension: n, lineality: first, logs, logErrors });
}

/**
 * The descent cone of the largest-modulus norm at a vector of R^n with the given number of
 * coordinates of largest modulus: that many non-negative coordinates and free others, up to rotation.
 *
 * $$ v_{n-k+i} = \binom{k}{i} 2^{-k}, \qquad \delta = n - \tfrac{k}{2}. $$
 *
 * Cost: proportional to n.
 *
 * Accuracy: as for {@link orthant}.
 *
 * Source: The convex geometry of linear inverse problems, Foundations of Computational Mathematics 12
 * (2012), arXiv:1012.0621.
 *
 * @param args - `n`, the dimension, an integer from 1 to 1000000, and `saturated`, the number of
 * coordinates of largest modulus, an integer from 1 to n
 * @returns the cone
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { linfDescentCone } from 'hullgauge/conic';
 * linfDescentCone({ n: 3, saturated: 2 }).intrinsicVolumes; // => [0, 0.25, 0.5, 0.25]
 * ```
 */
export function linfDescentCone(args: { n: number; saturated: number }): Cone {
  const fn = 'linfDescentCone';
  checkOptions(fn, args, ['n', 'saturated']);
  const { n, saturated } = args;
  checkInteger(fn, 'n', n, 1, 1_000_000);
  checkInteger(fn, 'saturated', saturated, 1, n);
  return productCone(subspaceKernel(n - saturated, n - saturated), orthantKernel(saturated));
}

/**
 * From here on the second-order expansion is exact to rounding: its error is a share of about 1/n of a
 * correction that is itself below 1, as the sums confirm to the 1e-13 that their rounding leaves.
 */
const EXPANDED = 1e7;
/** Standard deviations on either side of the mean that the sums for the moments reach. */
const REACH = 10;
/** A smooth law summed in steps of an eighth of its standard deviation has its exact moments. */
const STEPS_PER_DEVIATION = 8;

/**
 * The statistical dimension of the l1 descent cone: the number of Gaussian measurements around which
 * l1 minimisation turns from failure to success.
 *
 * `exact` is the mean of the exact intrinsic volumes (see {@link l1DescentCone}); `upper` is the bound
 *
 * $$ \delta \le \min_{\tau \ge 0} \Bigl\lbrace s(1+\tau^2) + 2(n-s)\,E(Z-\tau)_+^2 \Bigr\rbrace $$
 *
 * that the literature uses in its place; it exceeds the exact number by less than 1 in every case computed.
 *
 * Cost: a few hundred integrals at most, whatever n.
 *
 * Accuracy: relative error of `upper` at most $10^{-14}$, of `exact` $10^{-11}$.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param args - `n`, the dimension, an integer from 1 to $2^{53} - 1$, and `sparsity`, the number of
 * non-zeros, an integer from 0 to n
 * @returns the statistical dimension and its upper bound
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { l1StatisticalDimension } from 'hullgauge/conic';
 * const dimension = l1StatisticalDimension({ n: 20, sparsity: 3 });
 * dimension.exact.toPrecision(10); // => '7.956702732'
 * dimension.upper.toPrecision(10); // => '8.558240833'
 * ```
 */
export function l1StatisticalDimension(args: { n: number; sparsity: number }): {
  /** The statistical dimension. */
  readonly exact: number;
  /** The upper bound by the smallest expected squared distance. */
  readonly upper: number;
} {
  const fn = 'l1StatisticalDimension';
  checkOptions(fn, args, ['n', 'sparsity']);
  const { n, sparsity } = args;
  checkInteger(fn, 'n', n, 1);
  checkInteger(fn, 'sparsity', sparsity, 0, n);
  if (sparsity === 0) return { exact: 0, upper: 0 };
  if (sparsity === n) return { exact: n - 0.5, upper: n };
  const upper = dimensionBound(n, sparsity, 2);
  return { exact: exactMean(n, sparsity), upper };
}

function exactMean(n: number, sparsity: number): number {
  const { mean, variance } = secondOrderMoments(n, sparsity, 2);
  if (Math.min(sparsity, n - sparsity) >= EXPANDED) return mean;
  const { term, first, last } = descentSequence('absolute', n, sparsity);
  const deviation = Math.sqrt(Math.max(variance, 1));
  const step = Math.max(1, Math.floor(deviation / STEPS_PER_DEVIATION));
  const centre = Math.min(Math.max(Math.round(mean), first), last);
  const reach = Math.ceil((REACH * deviation + REACH) / step);
  const error = new Float64Array(1);
  const base = term(centre, error);
  let mass = 0;
  let moment = 0;
  for (let j = -reach; j <= reach; j++) {
    const i = centre + j * step;
    if (i < first || i > last) continue;
    const weight = Math.exp(term(i, error) - base);
    mass += weight;
    moment += j * step * weight;
  }
  return centre + moment / mass;
}

/**
 * The statistical dimension of the descent cone of the nuclear norm at a matrix of the given rank, in
 * the limit of large matrices of that shape.
 *
 * With $m \le n$ the two sides, $\nu = m/n$, $\rho = r/m$, $y = \nu(1-\rho)/(1-\rho\nu)$, $a_\pm = 1 \pm \sqrt{y}$,
 *
 * $$
 * \frac{\delta}{mn} \approx \min_{\tau} \Bigl\lbrace \rho\nu + (1-\rho\nu) \Bigl[ \rho(1+\tau^2) + (1-\rho)
 *    \int_{\max(a_-, \tau)}^{a_+} (u-\tau)^2 f_y(u)\, du \Bigr] \Bigr\rbrace, \qquad
 *    f_y(u) = \frac{\sqrt{(u^2-a_-^2)(a_+^2-u^2)}}{\pi y u}.
 * $$
 *
 * An approximation, not a bound: at finite size the true dimension is larger, by 0.5 % at
 * 24 x 30 with rank 3.
 *
 * Cost: about 1 ms.
 *
 * Accuracy: the limit itself is computed to a relative error of $10^{-12}$.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param args - `rows` and `columns`, integers from 1, and `rank`, an integer from 0 to the smaller
 * of the two
 * @returns the approximate statistical dimension, between 0 and rows x columns
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown
 *
 * @example
 * ```ts
 * import { approxNuclearNormDimension } from 'hullgauge/conic';
 * approxNuclearNormDimension({ rank: 3, rows: 24, columns: 30 }).toPrecision(6); // => '276.282'
 * ```
 */
export function approxNuclearNormDimension(args: {
  rank: number;
  rows: number;
  columns: number;
}): number {
  const fn = 'approxNuclearNormDimension';
  checkOptions(fn, args, ['rank', 'rows', 'columns']);
  const { rank, rows, columns } = args;
  checkInteger(fn, 'rows', rows, 1);
  checkInteger(fn, 'columns', columns, 1);
  const small = Math.min(rows, columns);
  const large = Math.max(rows, columns);
  checkInteger(fn, 'rank', rank, 0, Math.min(small, MAX_INTEGER - 1));
  if (rank === 0) return 0;
  if (rank === small) return rows * columns;
  return rows * columns * nuclearLimit(rank / small, small / large);
}

/** The limit of delta/(m n) at rank rho m and aspect ratio nu = m/n <= 1, for 0 < rho < 1. */
export function nuclearLimit(rho: number, nu: number): number {
  const y = (nu * (1 - rho)) / (1 - rho * nu);
  const root = Math.sqrt(y);
  const lowest = 1 - root;
  const highest = 1 + root;
  // u^2 = (1 - sqrt y)^2 + 4 sqrt(y) cos(theta/2)^2 makes the density smooth
  const moment = (tau: number, power: 1 | 2): number => {
    if (tau >= highest) return 0;
    const square = (tau - lowest) * (tau + lowest);
    const end =
      tau <= lowest ? Math.PI : 2 * Math.acos(Math.min(1, Math.sqrt(square / (4 * root))));
    const f = (theta: number): number => {
      const c = Math.cos(0.5 * theta);
      const s = Math.sin(0.5 * theta);
      const u = Math.sqrt(lowest * lowest + 4 * root * c * c);
      const excess = u - tau;
      return ((power === 1 ? excess : excess * excess) * 8 * s * s * c * c) / (Math.PI * u * u);
    };
    // panels shrink towards the end, where u may come close to 0
    let sum = 0;
    let left = 0;
    for (let panel = 0; panel < PANELS; panel++) {
      const right = panel === PANELS - 1 ? end : left + 0.5 * (end - left);
      sum += integrateSmooth(f, left, right);
      left = right;
    }
    return sum;
  };
  let low = 0;
  let high = highest;
  for (let i = 0; i < 60; i++) {
    const tau = 0.5 * (low + high);
    if (rho * tau < (1 - rho) * moment(tau, 1)) low = tau;
    else high = tau;
  }
  const tau = 0.5 * (low + high);
  const inner = rho * (1 + tau * tau) + (1 - rho) * moment(tau, 2);
  return rho * nu + (1 - rho * nu) * inner;
}

const PANELS = 10;
