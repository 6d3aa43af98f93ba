/**
 * Success of sparse recovery by convex programs, exactly at finite size, and proved bounds for any cone.
 *
 * Minimising f subject to A x = A x0, with A an m x n Gaussian matrix, recovers x0 iff the kernel of A
 * misses the descent cone of f at x0; by the Crofton formula the probability is
 * 2 (v_(m-1) + v_(m-3) + ..).
 */
import { checkChoice, checkInteger, checkNumber, checkOptions, DomainError } from '../domain.ts';
import { paritySplit } from '../numeric/parity-split.ts';
import { logSmoothSum } from '../numeric/smooth-sum.ts';
import { certainty, complementOf, type Probability, probabilityFromTail } from '../probability.ts';
import type { Cone } from './cone.ts';
import { descentSequence } from './descent-cones.ts';
import { secondOrderMoments } from './weak-threshold.ts';
import { wendel } from './wendel.ts';

/** Arguments of {@link recoverySuccess}. */
export type RecoveryArgs =
  | {
      /** What is minimised, or that x >= 0 alone is to determine x. */
      readonly model: 'l1' | 'nonnegativeL1' | 'nonnegativeFeasible';
      /** Number of variables; an integer from 1 to 2^53 - 1. */
      readonly n: number;
      /** Number of non-zeros; an integer from 0 to n. */
      readonly sparsity: number;
      /** Number of measurements; an integer from 0 to n. */
      readonly measurements: number;
    }
  | {
      /** That bounds below and above alone are to determine x. */
      readonly model: 'box';
      /** Number of variables; an integer from 1 to 2^53 - 1. */
      readonly n: number;
      /** Number of coordinates strictly between their bounds; an integer from 0 to n. */
      readonly free: number;
      /** Number of measurements; an integer from 0 to n. */
      readonly measurements: number;
    };

/**
 * The probability that a convex program recovers a sparse vector from random linear measurements, at
 * finite size.
 *
 * | model | program, given $y = A x_0$ | probability |
 * |---|---|---|
 * | `'l1'` | minimise $\lVert x \rVert_1$ | $2(v_{m-1} + v_{m-3} + \dots)$ of the l1 descent cone |
 * | `'nonnegativeL1'` | minimise $\sum x_i$ over $x \ge 0$ | the same of its cone |
 * | `'nonnegativeFeasible'` | any $x \ge 0$ | $P(\operatorname{Bin}(n-s-1, \tfrac12) \le m-s-1)$ |
 * | `'box'` | any $x$ between its bounds | the same with the free coordinates for $s$ |
 *
 * Assumptions: $A x = y$ with an $m \times n$ matrix whose kernel is a uniformly random subspace (a
 * Gaussian matrix); for `'nonnegativeFeasible'` and `'box'` any law of the columns that is in general
 * position and unchanged by independent changes of sign. The signs and positions of the non-zeros do
 * not matter, nor do their sizes. No noise. For designed matrices the number is an orientation, nothing is
 * proved; it does not replace a safety review.
 *
 * Cost: a few hundred one-dimensional integrals at most for the l1 models, about 10 ms at n = 1000;
 * constant for the other two.
 *
 * Accuracy: relative error of the smaller tail at most $10^{-11} \max(1, |\ln P|)$ for the l1 models up to
 * n = 10000, $10^{-14}$ for the other two; `logError` bounds it in every case. It grows in proportion to
 * n: $10^{-7}$ at $n = 10^8$, and beyond $10^{15}$ an l1 probability has no digits left.
 *
 * Source: Counting faces of randomly projected polytopes when the projection radically lowers
 * dimension, Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364; Counting
 * the faces of randomly-projected hypercubes and orthants, with applications, Discrete and
 * Computational Geometry 43 (2010), arXiv:0807.3590.
 *
 * @param args - the `model`; `n` variables; `sparsity` non-zeros, or for the box the number of `free`
 * coordinates, strictly between their bounds; `measurements`, from 0 to n
 * @returns the probability of recovery; 1 with n measurements, or for an l1 model without non-zeros
 * @throws A {@link DomainError} if an argument is out of its domain, or an option is unknown
 *
 * @example
 * ```ts
 * import { recoverySuccess } from 'hullgauge';
 * recoverySuccess({ model: 'l1', n: 20, sparsity: 3, measurements: 9 }).value.toPrecision(10); // => '0.6970252977'
 * recoverySuccess({ model: 'box', n: 10, free: 4, measurements: 7 }).value; // => 0.5
 * ```
 */
export function recoverySuccess(args: RecoveryArgs): Probability {
  const fn = 'recoverySuccess';
  const box = args?.model === 'box';
  checkOptions(fn, args, ['model', 'n', box ? 'free' : 'sparsity', 'measurements']);
  const { model, n, measurements } = args;
  checkChoice(fn, 'model', model, ['l1', 'nonnegativeL1', 'nonnegativeFeasible', 'box']);
  const support = args.model === 'box' ? args.free : args.sparsity;
  checkInteger(fn, 'n', n, 1);
  checkInteger(fn, box ? 'free' : 'sparsity', support, 0, n);
  checkInteger(fn, 'measurements', measurements, 0, n);
  if (measurements === n) return certainty(true);
  if (model === 'l1' || model === 'nonnegativeL1') {
    if (support === 0) return certainty(true);
    // From here on measurements < n. With all coordinates in the support the cone is a half-space.
    if (support === n) return certainty(false);
    return l1Success(model, n, support, measurements);
  }
  // The kernel misses R^s x R_+^(n - s): no positive combination of n - s random vectors in R^(m - s)
  if (measurements <= support) {
    return certainty(measurements === support && support === n);
  }
  return complementOf(wendel(n - support, measurements - support));
}

/** Beyond this many terms the sum is taken as an integral. */
const MANY_TERMS = 10_000;
/** Terms this far below the first do not count. */
const CUT = 41;

/** The two l1 models for 0 < sparsity < n and measurements < n. */
function l1Success(
  model: 'l1' | 'nonnegativeL1',
  n: number,
  sparsity: number,
  measurements: number,
): Probability {
  const sequence = model === 'l1' ? 'absolute' : 'nonnegative';
  const { term, first, last } = descentSequence(sequence, n, sparsity);
  const { mean, variance } = secondOrderMoments(n, sparsity, model === 'l1' ? 2 : 1);
  const deviation = Math.sqrt(Math.max(variance, 0));
  if (measurements > first && deviation > MANY_TERMS / 5) {
    const error = new Float64Array(1);
    const direction = measurements >= mean ? 1 : -1;
    const start = measurements + direction;
    // over a distance at which rounding does not hide it
    const distance = Math.max(2, Math.round(deviation / 50));
    const end = start + direction * distance;
    const inside = end >= first && end <= last;
    const fall = inside ? Math.abs(term(start, error) - term(end, error)) / distance : 1;
    if (Math.min(CUT / fall, 9 * deviation) > 2 * MANY_TERMS) {
      const scale = Math.min(deviation, 4 / fall);
      const log = Math.min(0, Math.LN2 + logSmoothSum(term, start, direction, scale, error));
      const side = direction === 1 ? 'upper' : 'lower';
      return probabilityFromTail(Math.exp(log), log, side, error[0] as number);
    }
  }
  return complementOf(paritySplit(term, measurements, first, last));
}

/** Arguments of {@link recoveryBounds}. */
export interface RecoveryBoundsArgs {
  /** The descent cone: a cone, or just its ambient and statistical dimension. */
  readonly cone:
    | Cone
    | {
        /** Dimension of the space. */
        readonly ambient: number;
        /** Expected squared length of the projection of a standard Gaussian vector to the cone. */
        readonly statisticalDimension: number;
      };
  /** Number of measurements; an integer from 0 to the ambient dimension. */
  readonly measurements: number;
}

/**
 * Proved bounds of the probability of recovery with any descent cone, from its statistical dimension
 * alone.
 *
 * With $h(u) = (1+u)\ln(1+u) - u$, $\delta$ the statistical dimension, $\delta^\circ = n - \delta$ and $l = |m - \delta|$,
 *
 * $$ m \ge \delta: \ P(\text{failure}) \le \exp\Bigl(-\tfrac12 \max\bigl\lbrace \delta\, h(l/\delta),\
 *    \delta^\circ h(-l/\delta^\circ)\bigr\rbrace \Bigr), \qquad
 *    m \le \delta: \ P(\text{success}) \le \exp\Bigl(-\tfrac12 \max\bigl\lbrace \delta\, h(-l/\delta),\
 *    \delta^\circ h(l/\delta^\circ)\bigr\rbrace \Bigr). $$
 *
 * The other bound is trivial in each case. Proof: the logarithmic Sobolev inequality bounds the
 * moment generating function of the intrinsic volumes by that of twice a Poisson variable, and the
 * meeting probability lies between two neighbouring tails of their law.
 *
 * Assumptions: Gaussian measurements, a closed convex descent cone. Where the cone itself is known,
 * {@link coneMeetsSubspace} gives the exact probability.
 *
 * Cost: constant. Accuracy: a few roundings.
 *
 * Source: the form of From Steiner formulas for cones to concentration of intrinsic volumes, Discrete
 * and Computational Geometry 51 (2014), arXiv:1308.5265.
 *
 * @param args - `cone`, a cone or an object with `ambient` and `statisticalDimension` (from 0 to
 * ambient), and `measurements`, an integer from 0 to the ambient dimension
 * @returns a `lower` and an `upper` bound of the probability of success
 * @throws A {@link DomainError} if an argument is out of its domain, or an option is unknown
 *
 * @example
 * ```ts
 * import { recoveryBounds } from 'hullgauge';
 * const cone = { ambient: 1000, statisticalDimension: 200 };
 * recoveryBounds({ cone, measurements: 300 }).lower.complement.toPrecision(6); // => '0.0000200002'
 * recoveryBounds({ cone, measurements: 300 }).upper.value; // => 1
 * ```
 */
export function recoveryBounds(args: RecoveryBoundsArgs): {
  /** Lower bound of the probability. */
  readonly lower: Probability;
  /** Upper bound of the probability. */
  readonly upper: Probability;
} {
  const fn = 'recoveryBounds';
  checkOptions(fn, args, ['cone', 'measurements']);
  const { cone, measurements } = args;
  if (typeof cone !== 'object' || cone === null) {
    throw new DomainError(fn, 'cone', 'a cone, or its ambient and statisticalDimension', cone);
  }
  const { ambient, statisticalDimension } = cone;
  checkInteger(fn, 'cone.ambient', ambient, 0);
  checkNumber(fn, 'cone.statisticalDimension', statisticalDimension, 0, ambient);
  checkInteger(fn, 'measurements', measurements, 0, ambient);
  const polar = ambient - statisticalDimension;
  const excess = measurements - statisticalDimension;
  const above = excess >= 0;
  // 0 minus, so that no bound at all is 0 and not -0
  const log = 0 - 0.5 * Math.max(entropy(statisticalDimension, excess), entropy(polar, -excess));
  const rounding = 2 ** -50 * (1 + Math.abs(log));
  const bound = probabilityFromTail(
    Math.exp(log),
    log,
    above ? 'upper' : 'lower',
    Number.isFinite(log) ? rounding : 0,
  );
  const none = certainty(false);
  return above ? { lower: bound, upper: certainty(true) } : { lower: none, upper: bound };
}

/** a h(x/a) with h(u) = (1 + u) log(1 + u) - u, for x >= -a; infinite below and at a = 0 < x. */
function entropy(a: number, x: number): number {
  if (x === 0) return 0;
  if (a === 0 || x < -a) return Number.POSITIVE_INFINITY;
  const u = x / a;
  if (u === -1) return a;
  if (Math.abs(u) < 0.1) {
    // u^2/2 - u^3/6 + u^4/12 - ..
    let sum = 0;
    for (let m = 18; m >= 2; m--) sum = 1 / (m * (m - 1)) - u * sum;
    return a * u * u * sum;
  }
  return a * ((1 + u) * Math.log1p(u) - u);
}
