/**
 * Circular cones and the Weyl chambers of the reflection groups A, B and D.
 */

import { checkChoice, checkInteger, DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { logBinomialPmfKernel } from '../special/binomial.ts';
import { incompleteBetaKernel } from '../special/incomplete-beta.ts';
import { stirlingRow } from '../special/stirling-row.ts';
import { TAIL_SLOTS } from '../special/tail-result.ts';
import {
  type Cone,
  halfspaceKernel,
  MAX_AMBIENT,
  makeCone,
  orthantKernel,
  roundingErrors,
} from './cone.ts';
import { embed } from './cone-algebra.ts';

const LEAST_ANGLE = 1e-150;

/**
 * The circular cone of half-angle `angle` in R^n: all directions within that angle of an axis, for n
 * from 2 to 1000000 and angles from 0 (a ray) to pi/2 (a half-space).
 *
 * $$ v_k = \tfrac12 \frac{\Gamma(n/2)}{\Gamma((k+1)/2)\,\Gamma((n-k+1)/2)} \sin^{k-1}\!\alpha \cos^{n-k-1}\!\alpha
 *    \quad (1 \le k \le n-1), $$
 * $$ v_n = \tfrac12 I_{\sin^2 \alpha}\bigl(\tfrac{n-1}{2}, \tfrac12\bigr), \qquad
 *    v_0 = \tfrac12 I_{\cos^2 \alpha}\bigl(\tfrac{n-1}{2}, \tfrac12\bigr). $$
 *
 * Its polar is the circular cone of half-angle $\pi/2 - \alpha$.
 *
 * Cost: proportional to n.
 *
 * Accuracy: error of $\ln v_k$ at most $10^{-14} \max(1, |\ln v_k|)$ for the angle given (pi/4 and
 * pi/2 as doubles mean themselves); a rounding of the angle itself changes it by up to $n |k/n - \sin^2\alpha| \cdot 10^{-16}$.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param n - ambient dimension, an integer from 2 to 1000000
 * @param angle - half-angle in radians: 0, or a number from 1e-150 to $\pi/2$
 * @returns the cone
 * @throws A {@link DomainError} if an argument is out of its domain
 *
 * @example
 * ```ts
 * import { circularCone } from 'hullgauge/conic';
 * const cone = circularCone(10, Math.PI / 6);
 * cone.statisticalDimension.toPrecision(12); // => '2.98354671212'
 * cone.variance.toPrecision(12); // => '3.11265381103'
 * ```
 */
export function circularCone(n: number, angle: number): Cone {
  const fn = 'circularCone';
  checkInteger(fn, 'n', n, 2, MAX_AMBIENT);
  if (angle === 0) return embed(orthantKernel(1), n);
  // of a smaller angle the square is no normal double
  if (!(typeof angle === 'number' && angle >= LEAST_ANGLE && angle <= Math.PI / 2)) {
    const requirement = `0 or a number from ${LEAST_ANGLE} to pi/2, in radians`;
    throw new DomainError(fn, 'angle', requirement, angle);
  }
  if (angle === Math.PI / 2) return halfspaceKernel(n);
  // As pi/2 above, the double nearest to pi/4 means pi/4, of which no engine's sine squares to 1/2.
  const symmetric = angle === Math.PI / 4;
  const sine = Math.sin(angle);
  const cosine = Math.cos(angle);
  const p = symmetric ? 0.5 : sine * sine;
  const q = symmetric ? 0.5 : cosine * cosine;
  const logs = new Array<number>(n + 1);
  const out = new Float64Array(TAIL_SLOTS);
  for (const k of [0, n]) {
    const small = incompleteBetaKernel((n - 1) / 2, 0.5, k === 0 ? q : p, k === 0 ? p : q, out);
    logs[k] = (small ? (out[1] as number) : Math.log1p(-(out[0] as number))) - Math.LN2;
  }
  // The gamma factors are those of a binomial law with half-integer parameters.
  for (let k = 1; k < n; k++) {
    logs[k] = logBinomialPmfKernel((n - 2) / 2, (k - 1) / 2, p, q) - Math.LN2;
  }
  const logErrors = roundingErrors(logs, 16);
  return makeCone({ dimension: n, lineality: 0, logs, logErrors, symmetric });
}

/** Rows cost n^2/2 operations; this many take about two seconds. */
const LARGEST_CHAMBER = 30_000;

/**
 * The Weyl chamber of type A, B or D in R^n: the vectors whose coordinates are ordered.
 *
 * | type | cone | generating function of $v_k$ |
 * |---|---|---|
 * | A | $x_1 \le \dots \le x_n$ | $\prod_{j=1}^{n} (t + j - 1)/j$ |
 * | B | $0 \le x_1 \le \dots \le x_n$ | $\prod_{j=1}^{n} (t + 2j - 1)/(2j)$ |
 * | D | $\lvert x_1 \rvert \le x_2 \le \dots \le x_n$ | $\frac{t + n - 1}{n} \prod_{j=1}^{n-1} (t + 2j - 1)/(2j)$ |
 *
 * Type A contains the line of equal coordinates. Its intrinsic volumes are the level probabilities
 * of isotonic regression with equal weights.
 *
 * Cost: $n^2/2$ operations; about 0.2 s at n = 10000.
 *
 * Accuracy: error of $\ln v_k$ at most $10^{-13} \max(1, |\ln v_k|)$.
 *
 * Source: Intrinsic volumes of polyhedral cones: a combinatorial perspective, Discrete and
 * Computational Geometry 58 (2017), arXiv:1512.06033.
 *
 * @param type - `'A'`, `'B'` or `'D'`
 * @param n - ambient dimension, an integer from 1 (2 for type D) to 30000
 * @returns the cone
 * @throws A {@link DomainError} if an argument is out of its domain
 *
 * @example
 * ```ts
 * import { weylChamber } from 'hullgauge/conic';
 * const chamber = weylChamber('A', 4);
 * chamber.intrinsicVolumes[3]; // => 0.25
 * chamber.lineality; // => 1
 * weylChamber('B', 2).intrinsicVolumes; // => [0.375, 0.5, 0.125]
 * ```
 */
export function weylChamber(type: 'A' | 'B' | 'D', n: number): Cone {
  const fn = 'weylChamber';
  checkChoice(fn, 'type', type, ['A', 'B', 'D']);
  checkInteger(fn, 'n', n, type === 'D' ? 2 : 1, LARGEST_CHAMBER);
  const significand = new Float64Array(n + 1);
  const exponent = new Int32Array(n + 1);
  if (type === 'A') stirlingRow(n, 0, 1, significand, exponent);
  else stirlingRow(type === 'B' ? n : n - 1, 1, 2, significand, exponent);
  if (type === 'D') multiplyByRoot(n - 1, significand, exponent);
  // The row divided by its own sum, n! or its like: no large logarithm is subtracted.
  let largest = 0;
  for (let k = 0; k <= n; k++) {
    if ((exponent[k] as number) > largest) largest = exponent[k] as number;
  }
  let sum = 0;
  for (let k = n; k >= 0; k--) {
    sum += (significand[k] as number) * radixPower((exponent[k] as number) - largest);
  }
  const volumes = new Array<number>(n + 1);
  const logs = new Array<number>(n + 1);
  for (let k = 0; k <= n; k++) {
    const share = (significand[k] as number) / sum;
    const power = (exponent[k] as number) - largest;
    volumes[k] = share * radixPower(power);
    logs[k] = Math.log(share) + power * LOG_RADIX;
  }
  const rounding = EPSILON * (6 + 2 * Math.sqrt(n));
  const logErrors = roundingErrors(logs, 3).map((error) => (error > 0 ? error + rounding : 0));
  const lineality = type === 'A' ? 1 : 0;
  return makeCone({ dimension: n, lineality, logs, volumes, logErrors, moments: moments(type, n) });
}

const LOG_RADIX = 354.89135644669199842; // 512 log 2

/** 2^(512 power) for power <= 0. */
function radixPower(power: number): number {
  return power === 0 ? 1 : power === -1 ? 2 ** -512 : power === -2 ? 2 ** -1024 : 0;
}

/** Multiplies the polynomial of degree n - 1 by t + n - 1. */
function multiplyByRoot(root: number, significand: Float64Array, exponent: Int32Array): void {
  const n = root + 1;
  exponent[n] = exponent[n - 1] as number;
  for (let k = n; k >= 0; k--) {
    let sum = (significand[k] as number) * root;
    if (k > 0) {
      const gap = (exponent[k - 1] as number) - (exponent[k] as number);
      sum += (significand[k - 1] as number) * (gap > 0 ? 2 ** 512 : radixPower(gap));
    }
    significand[k] = sum;
  }
}

/** Mean and variance of the sum of independent Bernoulli variables behind a chamber. */
function moments(type: 'A' | 'B' | 'D', n: number): { mean: number; variance: number } {
  const step = type === 'A' ? 1 : 2;
  let mean = 0;
  let variance = 0;
  const add = (p: number): void => {
    mean += p;
    variance += p * (1 - p);
  };
  if (type === 'D') add(1 / n);
  for (let j = type === 'D' ? n - 1 : n; j >= 1; j--) add(1 / (step * j));
  return { mean, variance };
}
