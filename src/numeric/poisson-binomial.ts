/**
 * Tails of a sum K of independent Bernoulli variables with success probabilities 1/(step j).
 *
 * Random walks, bridges and reflection groups all lead to such sums. The variables come in runs of
 * consecutive j, a run may be repeated, and it may be far longer than anything that can be
 * enumerated (10^15 steps). Fair coins alone have the binomial kernel; else there are three engines:
 *
 * - whole numbers over the product of all step j while that is below 2^53, correctly rounded;
 * - up to {@link ENUMERATED} variables: the convolution recurrence, all of whose terms are positive,
 *   under an exponential tilt where the tail would underflow;
 * - beyond: the trapezoidal rule on a circle for the generating function (a ratio of gamma
 *   functions), in `poisson-binomial-contour.ts`.
 *
 * The smaller of P(K <= k) and P(K > k) is the one computed, never a difference from 1.
 */
import { EPSILON } from '../epsilon.ts';
import { fairBinomialTail } from '../special/fair-binomial.ts';
import { storeQuotient, TAIL_SLOTS } from '../special/tail-result.ts';
import { contourTail, tiltedMean } from './poisson-binomial-contour.ts';

/** `count` copies of independent Bernoulli variables with probabilities 1/(step j), from <= j <= to. */
export interface BernoulliRun {
  readonly step: 1 | 2;
  readonly from: number;
  readonly to: number;
  readonly count: number;
}

/** The smaller tail of a sum at k, and which one it is: P(K <= k) is 'lower', P(K > k) 'upper'. */
export interface SumTail {
  readonly tail: number;
  readonly log: number;
  readonly side: 'lower' | 'upper';
  readonly logError: number;
}

/** Largest number of variables that are enumerated; there the two engines cost about the same. */
export const ENUMERATED = 300;

/** Tail probabilities below e^-600 are computed under a tilt; above, nothing underflows. */
const SAFE_LOG = -600;

/** Number of variables in the runs. */
export function runSize(runs: readonly BernoulliRun[]): number {
  let size = 0;
  for (const run of runs) size += run.count * Math.max(0, run.to - run.from + 1);
  return size;
}

/** The smaller of P(K <= k) and P(K > k) for an integer k. */
export function poissonBinomialTail(runs: readonly BernoulliRun[], k: number): SumTail {
  const parts = runs.filter((run) => run.to >= run.from && run.count > 0);
  const size = runSize(parts);
  if (k < 0) return { tail: 0, log: Number.NEGATIVE_INFINITY, side: 'lower', logError: 0 };
  if (k >= size) return { tail: 0, log: Number.NEGATIVE_INFINITY, side: 'upper', logError: 0 };
  const out = new Float64Array(TAIL_SLOTS);
  if (parts.every(({ step, to }) => step * to === 2)) {
    return sumTail(fairBinomialTail(size, k, out), out);
  }
  const [run] = parts;
  if (k === 0 && parts.length === 1 && run?.step === 1 && run.count === 1) {
    // the product of 1 - 1/j telescopes
    return sumTail(storeQuotient(run.from - 1, run.to, out), out);
  }
  const lower = size <= MOST_COUNTED ? countedTail(parts, size, k, out) : undefined;
  if (lower !== undefined) return sumTail(lower, out);
  return size <= ENUMERATED ? enumeratedTail(parts, k) : contourTail(parts, size, k);
}

function sumTail(lower: boolean, out: Float64Array): SumTail {
  return {
    tail: out[0] as number,
    log: out[1] as number,
    side: lower ? 'lower' : 'upper',
    logError: out[2] as number,
  };
}

/** So many factors of at least 2 may stay below 2^53. */
const MOST_COUNTED = 53;

/**
 * Stores the smaller tail from whole numbers over the product of all step j, where success counts 1 and
 * failure step j - 1, and returns whether it is P(K <= k); undefined if the product exceeds 2^53.
 */
function countedTail(
  runs: readonly BernoulliRun[],
  size: number,
  k: number,
  out: Float64Array,
): boolean | undefined {
  const counts = new Float64Array(size + 1);
  counts[0] = 1;
  let denominator = 1;
  for (const { step, from, to, count } of runs) {
    for (let copy = 0; copy < count; copy++) {
      for (let j = from; j <= to; j++) {
        denominator *= step * j;
        if (denominator > 2 ** 53) return undefined;
        for (let i = size; i >= 0; i--) {
          counts[i] = (counts[i] as number) * (step * j - 1) + (counts[i - 1] ?? 0);
        }
      }
    }
  }
  return storeQuotient(
    counts.subarray(0, k + 1).reduce((sum, x) => sum + x),
    denominator,
    out,
  );
}

/** The same by the recurrence; cost quadratic in the number of variables. */
export function enumeratedTail(runs: readonly BernoulliRun[], k: number): SumTail {
  const size = runSize(runs);
  const side = k < tiltedMean(runs, 1) ? 'lower' : 'upper';
  const plain = tiltedSum(runs, size, k, side, 1);
  if (plain.log > SAFE_LOG) return plain;
  // Beyond the extreme values 0 and size the tilt would be 0 or infinite; half a unit away it is not.
  const target = Math.min(side === 'lower' ? Math.max(k, 0.5) : k + 1, size - 0.5);
  return tiltedSum(runs, size, k, side, tiltFor(runs, target));
}

/** The r > 0 at which the tilted mean r G'(r)/G(r) equals the target, to about six digits. */
function tiltFor(runs: readonly BernoulliRun[], target: number): number {
  let low = -40;
  let high = 40;
  while (high - low > 1e-6) {
    const middle = 0.5 * (low + high);
    if (tiltedMean(runs, Math.exp(middle)) < target) low = middle;
    else high = middle;
  }
  return Math.exp(0.5 * (low + high));
}

/**
 * P(K <= k) or P(K > k) from the law tilted by r^K. With G(r) = E r^K and b the tilted weights,
 * P(K = i) = G(r) r^-i b_i.
 */
function tiltedSum(
  runs: readonly BernoulliRun[],
  size: number,
  k: number,
  side: 'lower' | 'upper',
  r: number,
): SumTail {
  const top = side === 'lower' ? k : size;
  const weights = new Float64Array(top + 1);
  weights[0] = 1;
  let filled = 0;
  let logMoment = 0;
  let carry = 0;
  for (const { step, from, to, count } of runs) {
    for (let j = from; j <= to; j++) {
      const unlikely = step * j - 1;
      const success = r / (unlikely + r);
      const failure = unlikely / (unlikely + r);
      const logFactor = r === 1 ? 0 : Math.log1p((r - 1) / (step * j));
      for (let copy = 0; copy < count; copy++) {
        if (filled < top) filled++;
        for (let i = filled; i > 0; i--) {
          weights[i] = (weights[i] as number) * failure + (weights[i - 1] as number) * success;
        }
        weights[0] = (weights[0] as number) * failure;
        const term = logFactor - carry;
        const next = logMoment + term;
        carry = next - logMoment - term;
        logMoment = next;
      }
    }
  }
  let sum = 0;
  if (side === 'lower') {
    for (let i = 0; i <= k; i++) sum = sum * r + (weights[i] as number);
  } else {
    for (let i = size; i > k; i--) sum = sum / r + (weights[i] as number);
  }
  // sum = sum over i of b_i r^(k-i) on the lower side, of b_i r^(k+1-i) on the upper
  const shift = r === 1 ? 0 : (side === 'lower' ? k : k + 1) * Math.log(r);
  const log = logMoment - shift + Math.log(sum);
  const rounding = EPSILON * (4 + 1.5 * Math.sqrt(size) + Math.abs(log));
  const logError = rounding + (r === 1 ? 0 : 2 * EPSILON * (Math.abs(logMoment) + Math.abs(shift)));
  return { tail: r === 1 ? sum : Math.exp(log), log, side, logError };
}
