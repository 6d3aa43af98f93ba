/**
 * Expected faces and conic intrinsic volumes of two random cones, each the polar of the other.
 *
 * With Cover's count C(n, d) = 2 sum of binom(n - 1, i) over i < d:
 *
 *   Schlaefli cone    E v_k = binom(n, d - k)/C(n, d), k >= 1, and E v_0 = binom(n - 1, d - 1)/C(n, d)
 *                     E f_k = 2^(d - k) binom(n, d - k) C(n - d + k, k)/C(n, d)
 *   Cover-Efron cone  E v_k = E v_(d - k) of the Schlaefli cone
 *                     E f_k = 2^k binom(n, k) C(n - k, d - k)/C(n, d)
 *
 * Source: Random conical tessellations, Discrete and Computational Geometry 56 (2016).
 */

import { checkInteger, checkOptions } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { LogNumber } from '../log-number.ts';
import { logBinomialPmfKernel } from '../special/binomial.ts';
import { sumError } from '../special/double-double.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { TAIL_SLOTS } from '../special/tail-result.ts';
import { wendelTail } from './wendel.ts';

/** Whole vectors of intrinsic volumes are returned. */
const MAX_DIMENSION = 1_000_000;
/** Up to this many ratios are added one by one. */
const MOST_TERMS = 10_000;

/** Arguments of {@link schlaefliCone} and {@link coverEfronCone}. */
export interface RandomConeArgs {
  /** Number of hyperplanes or generators; an integer from 1 to 2^53 - 1. */
  readonly n: number;
  /** Dimension; an integer from 1 to 1000000. */
  readonly d: number;
}

/** Expectations of a random cone. */
export interface RandomCone {
  /** Always `'randomCone'`. */
  readonly kind: 'randomCone';
  /** Expected number of faces of dimension k, an integer from 0 to d. */
  expectedFaces(k: number): LogNumber;
  /** Expected conic intrinsic volumes, index 0 to d; they sum to 1. */
  readonly expectedIntrinsicVolumes: readonly number[];
  /** Their logarithms, also where the numbers underflow. */
  readonly logExpectedIntrinsicVolumes: readonly number[];
  /** Expected statistical dimension: the sum of k times the k-th intrinsic volume. */
  readonly statisticalDimension: number;
  /** Expected solid angle as a fraction of the full sphere: the last intrinsic volume. */
  readonly solidAngle: number;
}

/**
 * Expected faces, conic intrinsic volumes, statistical dimension and solid angle of the random Schläfli
 * cone: a region chosen uniformly among those of n random hyperplanes through the origin of R^d.
 *
 * With $C(n,d) = 2 \sum_{i<d} \binom{n-1}{i}$,
 *
 * $$ E f_k = \frac{2^{d-k} \binom{n}{d-k} C(n-d+k, k)}{C(n,d)}, \qquad
 *    E v_k = \frac{\binom{n}{d-k}}{C(n,d)} \quad (1 \le k \le d), \qquad
 *    E v_0 = \frac{\binom{n-1}{d-1}}{C(n,d)}. $$
 *
 * Assumptions: the normals are in general position. These means over all regions hold for every such
 * arrangement, random or not. For n < d the regions contain a subspace of dimension d - n and have no
 * smaller faces.
 *
 * Cost: proportional to d.
 *
 * Accuracy: relative error of every number at most $10^{-14}$ times the size of its logarithm,
 * where that exceeds 1.
 *
 * Source: Random conical tessellations, Discrete and Computational Geometry 56 (2016), arXiv:1508.07768.
 *
 * @param args - `n` hyperplanes, an integer >= 1, in dimension `d`, an integer from 1 to 1000000
 * @returns the expectations
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown;
 * `expectedFaces` if its argument is not an integer from 0 to d
 *
 * @example
 * ```ts
 * import { schlaefliCone } from 'hullgauge/conic';
 * const cone = schlaefliCone({ n: 8, d: 3 });
 * cone.expectedFaces(2).value.toPrecision(12); // => '3.86206896552'
 * cone.expectedIntrinsicVolumes[3]?.toPrecision(12); // => '0.0172413793103'
 * ```
 */
export function schlaefliCone(args: RandomConeArgs): RandomCone {
  const { n, d } = checkedArgs('schlaefliCone', args);
  return describe('schlaefliCone', n, d, schlaefliVolumes(n, d), (k) => k);
}

/**
 * Expected faces, conic intrinsic volumes, statistical dimension and solid angle of the Cover-Efron
 * cone: the positive hull of n symmetric random points of R^d, given that it is not all of R^d.
 *
 * With $C(n,d) = 2 \sum_{i<d} \binom{n-1}{i}$,
 *
 * $$ E f_k = \frac{2^k \binom{n}{k} C(n-k, d-k)}{C(n,d)} \quad (0 \le k \le d-1), \qquad
 *    E v_k = E v_{d-k}(\text{Schläfli cone}), \qquad
 *    E[\text{solid angle}] = \frac{\binom{n-1}{d-1}}{C(n,d)}. $$
 *
 * Assumptions: the joint law of the points is unchanged by independent changes of sign, and any d of
 * them are almost surely linearly independent. `expectedFaces(d)` is 1 for n >= d and 0 below.
 *
 * Cost, accuracy and source: as for {@link schlaefliCone}.
 *
 * @param args - `n` generators, an integer >= 1, in dimension `d`, an integer from 1 to 1000000
 * @returns the expectations
 * @throws A {@link DomainError} if an argument is not such an integer, or an option is unknown;
 * `expectedFaces` if its argument is not an integer from 0 to d
 *
 * @example
 * ```ts
 * import { coverEfronCone } from 'hullgauge/conic';
 * const cone = coverEfronCone({ n: 8, d: 3 });
 * cone.expectedFaces(2).value.toPrecision(12); // => '3.86206896552'
 * cone.solidAngle.toPrecision(12); // => '0.362068965517'
 * ```
 */
export function coverEfronCone(args: RandomConeArgs): RandomCone {
  const { n, d } = checkedArgs('coverEfronCone', args);
  const { values, logs } = schlaefliVolumes(n, d);
  const volumes = { values: values.reverse(), logs: logs.reverse() };
  return describe('coverEfronCone', n, d, volumes, (k) => d - k);
}

function checkedArgs(fn: string, args: RandomConeArgs): RandomConeArgs {
  checkOptions(fn, args, ['n', 'd']);
  checkInteger(fn, 'n', args.n, 1);
  checkInteger(fn, 'd', args.d, 1, MAX_DIMENSION);
  return args;
}

/** The conic intrinsic volumes of a random cone, index 0..d. */
interface Volumes {
  readonly values: number[];
  readonly logs: number[];
}

/**
 * E v_0..E v_d of the Schlaefli cone. From one anchor neighbours follow by their exact ratio
 * (d - k)/(n - d + k + 1), so that no large logarithms are subtracted; their sum is carried as
 * high + low, or thousands of roundings of a large logarithm would add up.
 */
function schlaefliVolumes(n: number, d: number): Volumes {
  const logs = new Array<number>(d + 1).fill(Number.NEGATIVE_INFINITY);
  const values = new Array<number>(d + 1).fill(0);
  const lowest = Math.max(0, d - n);
  let high = 0;
  let low = 0;
  const store = (k: number, step: number): void => {
    const sum = high + step;
    low += sumError(high, step, sum);
    high = sum;
    logs[k] = high + low;
    values[k] = Math.exp(high) * (1 + low);
  };
  // The anchor: near the largest of binom(n, d - k).
  const anchor = Math.max(1, lowest, d - Math.floor(n / 2));
  const start = logAnchor(n, d, anchor);
  store(anchor, start);
  for (let k = anchor; k < d; k++) store(k + 1, logRatio(d - k, n - d + k + 1));
  high = start;
  low = 0;
  for (let k = anchor; k > Math.max(1, lowest); k--) store(k - 1, -logRatio(d - k + 1, n - d + k));
  // E v_0/E v_1 = binom(n - 1, d - 1)/binom(n, d - 1) = (n - d + 1)/n
  if (lowest === 0) store(0, Math.log1p(-(d - 1) / n));
  return { values, logs };
}

/** log(a/b), accurate where the two are close. */
function logRatio(a: number, b: number): number {
  return 2 * Math.abs(a - b) < b ? Math.log1p((a - b) / b) : Math.log(a / b);
}

/** log of binom(n, d - k)/C(n, d) at the anchor. */
function logAnchor(n: number, d: number, k: number): number {
  // where the anchor is k = 1: binom(n - 1, d - 1)/C(n, d) times n/(n - d + 1)
  if (2 * d <= n) return -Math.LN2 - logPartialRatio(n, d) - Math.log1p(-(d - 1) / n);
  return logBinomialPmfKernel(n, d - k, 0.5, 0.5) - logOutside(n, d);
}

/** log P(Bin(n - 1, 1/2) <= d - 1) = log of C(n, d)/2^n. */
function logOutside(n: number, d: number): number {
  if (n <= d) return 0;
  const out = new Float64Array(TAIL_SLOTS);
  const insideIsSmall = wendelTail(n, d, out);
  return insideIsSmall ? Math.log1p(-(out[0] as number)) : (out[1] as number);
}

/** log of the sum of binom(n - 1, i)/binom(n - 1, k - 1) over i < k, for 1 <= k <= n. */
function logPartialRatio(n: number, k: number): number {
  if (2 * k <= n && (k <= MOST_TERMS || k < 0.05 * n)) {
    let sum = 1;
    for (let i = k - 1, ratio = 1; i >= 1 && ratio > 1e-18 * sum; i--) {
      ratio *= i / (n - i);
      sum += ratio;
    }
    return Math.log(sum);
  }
  return logOutside(n, k) - logBinomialPmfKernel(n - 1, k - 1, 0.5, 0.5);
}

/**
 * log E f_k of the Schlaefli cone, and the size of the terms that it is added from in `size[0]`. With
 * R(n, d) = C(n, d)/(2 binom(n - 1, d - 1)) or T(n, d) = C(n, d)/2^n most of the binomials or the powers
 * of 2 cancel:
 *
 *   E f_k = 2^(d - k) binom(d - 1, k - 1) n/(n - d + k) R(n - d + k, k)/R(n, d)
 *         = binom(n, d - k) T(n - d + k, k)/T(n, d).
 */
function logExpectedFaces(n: number, d: number, k: number, size: Float64Array): number {
  size[0] = 0;
  if (k === 0) return n >= d ? 0 : Number.NEGATIVE_INFINITY;
  if (k < d - n) return Number.NEGATIVE_INFINITY;
  if (2 * d > n) {
    const choices = logBinomialKernel(n, d - k);
    const share = logOutside(n - d + k, k);
    size[0] = choices - share;
    return choices + (share - logOutside(n, d));
  }
  const choices = (d - k) * Math.LN2 + logBinomialKernel(d - 1, k - 1);
  size[0] = choices;
  return (
    choices - Math.log1p(-(d - k) / n) + (logPartialRatio(n - d + k, k) - logPartialRatio(n, d))
  );
}

function describe(
  fn: string,
  n: number,
  d: number,
  { values, logs }: Volumes,
  schlaefliIndex: (k: number) => number,
): RandomCone {
  let statisticalDimension = 0;
  for (let k = 1; k <= d; k++) statisticalDimension += k * (values[k] as number);
  return Object.freeze({
    kind: 'randomCone',
    expectedFaces(k: number): LogNumber {
      checkInteger(`${fn}.expectedFaces`, 'k', k, 0, d);
      const size = new Float64Array(1);
      const log = logExpectedFaces(n, d, schlaefliIndex(k), size);
      // 0, a face in every cone, and -Infinity are exact
      const exact = log === 0 || log === Number.NEGATIVE_INFINITY;
      return LogNumber.fromLog(log, exact ? 0 : EPSILON * (8 + 4 * (size[0] as number)));
    },
    expectedIntrinsicVolumes: Object.freeze(values),
    logExpectedIntrinsicVolumes: Object.freeze(logs),
    statisticalDimension,
    solidAngle: values[d] as number,
  } as const);
}
