/**
 * Integral over the real line of a positive, unimodal, analytic function given by its logarithm.
 *
 * The trapezoidal rule with equal steps converges geometrically for such functions: with step h the
 * error is of the order e^(-2 pi a / h), a the width of the strip of analyticity, so halving the step
 * squares it. The sum runs outward from the peak until the terms have dropped by 42 nats; each level
 * adds the midpoints of the one before, and the difference of two levels tells when to stop.
 */
import { findPeak } from './peak-search.ts';

/** An integral by its logarithm. */
export interface UnimodalIntegral {
  /** Logarithm of the integral. */
  readonly log: number;
  /** The integral is exp(scale) times this: for its value without the rounding of its logarithm. */
  readonly sum: number;
  /** Logarithm of the largest value of the integrand, roughly. */
  readonly scale: number;
  /** Bound on the relative error of the rule itself, without rounding. */
  readonly error: number;
  /** Where the integrand is largest, roughly. */
  readonly peak: number;
  /** Mean of each factor under the normalised integrand. */
  readonly means: readonly number[];
  /** Number of values of the integrand used. */
  readonly evaluations: number;
}

/** Terms below e^-42 of the largest are dropped. */
const CUT = 42;
/** First step in units of the standard deviation at the peak: error e^-40 for a Gaussian. */
const FIRST_STEP = 0.7;
const MAX_LEVELS = 12;
const MAX_NODES = 60_000;

/**
 * Logarithm of the integral of exp(logIntegrand) over the line.
 *
 * @param logIntegrand - may be -Infinity away from the peak
 * @param width - scale on which the integrand varies near 0, to a factor of a thousand
 * @param factors - functions whose means under the integrand are wanted; each is called after the
 * integrand at the same point and may use the state that call left
 */
export function integrateUnimodal(
  logIntegrand: (x: number) => number,
  width: number,
  factors: readonly (() => number)[] = [],
): UnimodalIntegral {
  const top = findPeak(logIntegrand, width, Number.NEGATIVE_INFINITY);
  let step = FIRST_STEP * deviation(logIntegrand, top.x, top.value, top.step);
  const sums = new Float64Array(factors.length + 1);
  const peak = top.x;
  let highest = top.value;
  let nodes = 0;

  const add = (x: number): number => {
    const value = logIntegrand(x);
    const term = Math.exp(value - top.value);
    sums[0] = (sums[0] as number) + term;
    for (let i = 0; i < factors.length; i++) {
      sums[i + 1] = (sums[i + 1] as number) + term * (factors[i] as () => number)();
    }
    nodes++;
    return value;
  };
  const march = (offset: number, direction: number): void => {
    for (let j = 0; j < MAX_NODES; j++) {
      const value = add(peak + direction * (offset + j) * step);
      if (value > highest) highest = value;
      if (!(value > highest - CUT)) return;
    }
    throw new Error('integrateUnimodal: the integrand does not decay');
  };

  march(0, 1);
  march(1, -1);
  let previous = step * (sums[0] as number);
  for (let level = 1; level <= MAX_LEVELS; level++) {
    march(0.5, 1);
    march(0.5, -1);
    step *= 0.5;
    const current = step * (sums[0] as number);
    const change = Math.abs(current - previous) / current;
    previous = current;
    if (change <= 4e-15 || (change <= 1e-9 && nodes >= 48)) {
      const means = factors.map((_, i) => (sums[i + 1] as number) / (sums[0] as number));
      // geometric convergence squares the change; the margin is for a rule not yet in that regime
      const error = change <= 4e-15 ? change : 1e-7 * change;
      return {
        log: top.value + Math.log(current),
        sum: current,
        scale: top.value,
        error,
        peak,
        means,
        evaluations: nodes,
      };
    }
  }
  throw new Error(
    `integrateUnimodal: no convergence, the logarithm is near ${top.value + Math.log(previous)}`,
  );
}

/** The smaller of the two distances at which the integrand has dropped, as a standard deviation. */
function deviation(f: (x: number) => number, x: number, value: number, start: number): number {
  let smallest = Number.POSITIVE_INFINITY;
  for (const direction of [1, -1]) {
    let step = start;
    let drop = value - f(x + direction * step);
    for (let i = 0; i < 200 && drop > 2; i++) {
      step *= 0.5;
      drop = value - f(x + direction * step);
    }
    for (let i = 0; i < 200 && drop < 0.4; i++) {
      step *= 1.6;
      drop = value - f(x + direction * step);
    }
    const sigma = step / Math.sqrt(2 * Math.max(drop, 0.02));
    if (sigma < smallest) smallest = sigma;
  }
  return smallest;
}
