/**
 * Mixtures of laws on the positive half-line with a point mass at 0: both tails, density, quantiles.
 *
 * Notation: w_j, j = 0..K, are the weights, w_0 that of the mass at 0; F_j, j >= 1, the components, which
 * grow stochastically with j. The smaller of
 *
 *   P(T > x) = sum over j >= 1 of w_j (1 - F_j(x)),   P(T <= x) = w_0 + sum over j >= 1 of w_j F_j(x)
 *
 * is computed, from numbers where they do not underflow and from logarithms beyond. All terms are
 * positive, so no digit is lost; terms that cannot matter are left out before their component is
 * evaluated, which makes the cost that of the fifty or so terms that do.
 */

import { DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { narrow } from '../numeric/monotone-search.ts';
import { oddsGap, reaches } from '../numeric/target.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import type { Cone } from './cone.ts';

/** The weights with their logarithms and bounds on the errors of these; index = degrees of freedom. */
export interface MixtureWeights {
  readonly values: readonly number[];
  readonly logs: readonly number[];
  readonly errors: readonly number[];
  /** The last index with a positive weight. */
  readonly top: number;
}

/** A family of laws: one of the two tails of F_j at x, and whether it is the lower one. */
export interface Component {
  /** Writes value, logarithm and its error bound to `out`; returns whether they are those of F_j(x). */
  tail(j: number, x: number, out: Float64Array): boolean;
  /** Log of the density of F_j at x > 0. */
  logDensity(j: number, x: number): number;
  /** Quantile of F_j. */
  quantile(j: number, p: Probability): number;
  /** The end of the support. */
  readonly end: number;
}

/** Terms below e^-60 of the largest one are left out: 10^6 of them are still nothing. */
const NEGLIGIBLE = -60;
/** Weights may miss the sum 1 by this much; the error bounds then say so. */
const SLACK = 1e-9;
/** Largest number of weights. */
const MOST_WEIGHTS = 1_000_001;
/** Sums of numbers above this have lost nothing to underflow: every term is off by 1e-323 at most. */
const SAFE_VALUE = 1e-304;

/** Refuses anything but non-negative numbers with sum 1. */
export function checkWeights(fn: string, weights: unknown): asserts weights is ArrayLike<number> {
  const parameter = 'weights';
  const length: unknown =
    typeof weights === 'object' && weights !== null
      ? (weights as ArrayLike<number>).length
      : undefined;
  if (typeof length !== 'number' || !(length >= 1 && length <= MOST_WEIGHTS)) {
    throw new DomainError(fn, parameter, 'an array of 1 to 1000001 numbers with sum 1', weights);
  }
  let sum = 0;
  for (let j = 0; j < length; j++) {
    const weight: unknown = (weights as ArrayLike<unknown>)[j];
    if (typeof weight !== 'number' || !(weight >= 0 && weight <= 1 + SLACK)) {
      throw new DomainError(fn, `${parameter}[${j}]`, 'a number from 0 to 1', weight);
    }
    sum += weight;
  }
  if (Math.abs(sum - 1) > SLACK) {
    throw new DomainError(fn, parameter, 'numbers with sum 1', weights, `a sum of ${sum}`);
  }
}

/** The weights of an array that has been checked. */
export function weightsOf(weights: ArrayLike<number>): MixtureWeights {
  const values = Array.from(weights);
  const sum = values.reduce((total, value) => total + value, 0);
  const error = 2 * EPSILON + Math.abs(sum - 1);
  return {
    values: Object.freeze(values),
    logs: values.map((value) => Math.log(value)),
    errors: values.map(() => error),
    top: topOf(values.map((value) => Math.log(value))),
  };
}

/** The weights of a cone from the given index on. */
export function weightsOfCone(cone: Cone, from: number): MixtureWeights {
  const logs = cone.logIntrinsicVolumes.slice(from);
  return {
    values: Object.freeze(cone.intrinsicVolumes.slice(from)),
    logs,
    errors: cone.logErrors.slice(from),
    top: topOf(logs),
  };
}

function topOf(logs: readonly number[]): number {
  let top = logs.length - 1;
  while (top > 0 && logs[top] === Number.NEGATIVE_INFINITY) top--;
  return top;
}

/** A quantile below it is given as 0. */
const SMALLEST = 1e-307;

/** Value, logarithm, error bound of a sum. */
const TOTAL: Float64Array = /* @__PURE__ */ new Float64Array(3);
const TERM: Float64Array = /* @__PURE__ */ new Float64Array(4);

/** P(T > x) or P(T <= x) for 0 <= x < end, to TOTAL. */
function sumTail(weights: MixtureWeights, law: Component, x: number, upper: boolean): void {
  const { values, logs, errors, top } = weights;
  let value = 0;
  let carry = 0;
  let best = Number.NEGATIVE_INFINITY;
  let scaled = 0;
  let spread = 0;
  let worst = 0;
  const add = (j: number): void => {
    const logWeight = logs[j] as number;
    if (logWeight === Number.NEGATIVE_INFINITY || logWeight < best + NEGLIGIBLE) return;
    if (j === 0) {
      TERM[0] = 1;
      TERM[1] = 0;
      TERM[2] = 0;
    } else componentTail(law, j, x, upper);
    const term = (values[j] as number) * (TERM[0] as number) - carry;
    const next = value + term;
    carry = next - value - term;
    value = next;
    const log = logWeight + (TERM[1] as number);
    if (log === Number.NEGATIVE_INFINITY) return;
    const share = Math.exp(log - Math.max(best, log));
    const shrink = log > best ? Math.exp(best - log) : 1;
    scaled = scaled * shrink + share;
    const error = (errors[j] as number) + (TERM[2] as number);
    spread = spread * shrink + share * Math.expm1(error);
    worst = Math.max(worst, error);
    best = Math.max(best, log);
  };
  // From the largest weight outwards, so that most of the others need no evaluation.
  let mode = upper ? 1 : 0;
  for (let j = mode + 1; j <= top; j++) {
    if ((logs[j] as number) > (logs[mode] as number)) mode = j;
  }
  for (let j = mode; j <= top; j++) add(j);
  for (let j = mode - 1; j >= (upper ? 1 : 0); j--) add(j);
  if (best === Number.NEGATIVE_INFINITY) {
    TOTAL.set([0, best, 0]);
    return;
  }
  const log = best + Math.log(scaled);
  // The mean of the relative errors, or where that overflows their largest.
  const known = Math.min(Math.log1p(spread / scaled), worst);
  if (value > SAFE_VALUE) {
    TOTAL[0] = value;
    TOTAL[1] = Math.log(value);
    TOTAL[2] = known + EPSILON * (4 + Math.abs(log));
  } else {
    TOTAL[0] = Math.exp(log);
    TOTAL[1] = log;
    TOTAL[2] = known + EPSILON * (4 + 3 * Math.abs(log));
  }
}

/** The asked tail of F_j, whichever the component gives, to TERM. */
function componentTail(law: Component, j: number, x: number, upper: boolean): void {
  if (x === 0) {
    TERM[0] = upper ? 1 : 0;
    TERM[1] = upper ? 0 : Number.NEGATIVE_INFINITY;
    TERM[2] = 0;
    return;
  }
  if (law.tail(j, x, TERM) !== upper) return;
  const tail = TERM[0] as number;
  TERM[0] = 1 - tail;
  TERM[1] = Math.log1p(-tail);
  TERM[2] = ((TERM[2] as number) * tail) / (1 - tail) + EPSILON;
}

/** P(T <= x) with both tails. */
export function mixtureCdf(weights: MixtureWeights, law: Component, x: number): Probability {
  if (x < 0) return certainty(false);
  if (x >= law.end) return certainty(true);
  sumTail(weights, law, x, true);
  let side: 'lower' | 'upper' = 'upper';
  if ((TOTAL[0] as number) > 0.5) {
    side = 'lower';
    sumTail(weights, law, x, false);
  }
  return probabilityFromTail(TOTAL[0] as number, TOTAL[1] as number, side, TOTAL[2] as number);
}

/** P(T >= x): all of it at x <= 0, where the point mass counts. */
export function mixturePValue(weights: MixtureWeights, law: Component, x: number): number {
  return x <= 0 ? 1 : mixtureCdf(weights, law, x).complement;
}

/** Log of the density of the continuous part, whose mass is 1 - w_0. */
export function mixtureLogDensity(weights: MixtureWeights, law: Component, x: number): number {
  let best = Number.NEGATIVE_INFINITY;
  let sum = 0;
  if (x < 0 || x > law.end) return best;
  for (let j = 1; j <= weights.top; j++) {
    if (weights.logs[j] === Number.NEGATIVE_INFINITY) continue;
    const log = (weights.logs[j] as number) + law.logDensity(j, x);
    if (log === Number.POSITIVE_INFINITY) return log;
    if (log > best) {
      sum = sum * Math.exp(best - log) + 1;
      best = log;
    } else if (log > Number.NEGATIVE_INFINITY) sum += Math.exp(log - best);
  }
  return best + Math.log(sum);
}

/** The smallest x with P(T <= x) >= target; 0 where that is below {@link SMALLEST}. */
export function mixtureQuantile(
  weights: MixtureWeights,
  law: Component,
  target: Probability,
): number {
  if (weights.top === 0 || reaches(mixtureCdf(weights, law, 0), target)) return 0;
  if (target.logComplement === Number.NEGATIVE_INFINITY) return law.end;
  const gapAt = (x: number): number => oddsGap(mixtureCdf(weights, law, x), target);
  // T is stochastically smaller than the component with the most degrees of freedom.
  let upper = { x: Math.max(SMALLEST, law.quantile(weights.top, target)), gap: 0 };
  upper.gap = gapAt(upper.x);
  for (let widen = 1e-15; upper.gap < 0 && upper.x < law.end; widen *= 16) {
    const x = Math.min(law.end, upper.x * (1 + widen));
    upper = { x, gap: gapAt(x) };
  }
  let factor = 4;
  for (;;) {
    const x = Math.max(upper.x / factor, SMALLEST);
    if (x >= upper.x) return 0;
    const gap = gapAt(x);
    if (gap < 0) return narrow({ lower: { x, gap }, upper }, gapAt, false).upper.x;
    upper = { x, gap };
    factor *= factor;
  }
}
