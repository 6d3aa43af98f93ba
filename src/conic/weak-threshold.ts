/**
 * The one-dimensional bound of the statistical dimension of l1 descent cones, and the limit curve of
 * sparse recovery that it gives.
 *
 * With c = 2 for l1 and c = 1 for l1 of non-negative vectors, and the excess moments
 * A = E (Z - tau)_+ and J = E (Z - tau)_+^2 of a standard normal Z,
 *
 *   delta <= min over tau >= 0 of s (1 + tau^2) + c (n - s) J(tau),  at s tau = c (n - s) A(tau).
 *
 * Divided by n this is the asymptotic curve: measurements per variable at which recovery sets in.
 */
import { checkChoice, checkNumber, checkOptions } from '../domain.ts';
import { normalExcess } from '../numeric/normal-excess.ts';
import { erfKernel } from '../special/error-function.ts';
import { normalTailKernel } from '../special/normal.ts';

/** How many signs a coordinate off the support may take: 2 for l1, 1 if it is known to be >= 0. */
export type Sides = 1 | 2;

const MOMENTS: Float64Array = /* @__PURE__ */ new Float64Array(5);

/** Beyond this level the normal density underflows. */
const LARGEST_LEVEL = 38.5;

/**
 * The minimising level tau for s of n non-zeros, 0 < s < n: at it the function
 * (n - s)/s = tau/(c A(tau)) rises from 0 to infinity.
 */
export function optimalLevel(n: number, s: number, sides: Sides): number {
  const odds = (n - s) / s;
  return bisectLevel((tau) => {
    const density = normalExcess(tau, MOMENTS);
    return sides * density * (MOMENTS[1] as number) * odds < tau;
  });
}

/** The smallest tau at which the condition holds, to rounding; the condition is monotone. */
function bisectLevel(holds: (tau: number) => boolean): number {
  let low = 1e-300;
  let high = LARGEST_LEVEL;
  while (high > 4 * low) {
    const middle = Math.sqrt(low) * Math.sqrt(high);
    if (holds(middle)) high = middle;
    else low = middle;
  }
  for (let i = 0; i < 60; i++) {
    const middle = 0.5 * (low + high);
    if (middle <= low || middle >= high) break;
    if (holds(middle)) high = middle;
    else low = middle;
  }
  return 0.5 * (low + high);
}

/** The upper bound of the statistical dimension of the l1 descent cone at s of n non-zeros. */
export function dimensionBound(n: number, s: number, sides: Sides): number {
  if (s === 0) return 0;
  if (s === n) return n;
  const tau = optimalLevel(n, s, sides);
  const density = normalExcess(tau, MOMENTS);
  return s * (1 + tau * tau) + sides * (n - s) * 2 * density * (MOMENTS[2] as number);
}

/**
 * Mean and variance of the intrinsic volumes to second order: the bound less a gap between 0 and 1, and
 * the variance of the squared distance that the bound is the mean of. Places sums over the exact law.
 */
export function secondOrderMoments(
  n: number,
  s: number,
  sides: Sides,
): { mean: number; variance: number } {
  const tau = optimalLevel(n, s, sides);
  const density = normalExcess(tau, MOMENTS);
  const excess = (m: number): number => sides * density * (MOMENTS[m] as number);
  const first = excess(1);
  const second = 2 * excess(2);
  const fourth = 24 * excess(4);
  const square = tau * tau;
  const bound = s * (1 + square) + (n - s) * second;
  const gap = (s + (n - s) * (second - first * first)) / (s + (n - s) * excess(0));
  const variance = s * (2 + 4 * square) + (n - s) * (fourth - second * second) - 2 * bound;
  return { mean: bound - gap, variance };
}

/** Arguments of {@link weakThreshold}. */
export interface WeakThresholdArgs {
  /** Measurements per variable, m/n; a number from 0 to 1. */
  readonly undersampling: number;
  /** What is minimised: the l1 norm, or the l1 norm over non-negative vectors. */
  readonly model: 'l1' | 'nonnegativeL1';
}

/**
 * The limit, for large problems, of the sparsity up to which l1 minimisation recovers most sparse vectors
 * from Gaussian measurements, at a given number of measurements per variable.
 *
 * With $A = E(Z-\tau)_+$, $J = E(Z-\tau)_+^2$ and $c = 2$ (`'l1'`) or $1$ (`'nonnegativeL1'`), the curve is
 *
 * $$ \frac{s}{n} = \rho = \frac{c A}{\tau + c A}, \qquad
 *    \frac{m}{n} = \rho (1 + \tau^2) + c (1 - \rho) J, \qquad \tau > 0. $$
 *
 * Assumptions: a limit as n grows with m/n and s/n fixed. At finite n the transition is about
 * $\sqrt{n}$ wide; {@link recoverySuccess} gives the exact probability.
 *
 * Cost: about 0.1 ms.
 *
 * Accuracy: relative error at most $10^{-14}$, for `undersampling` above $10^{-307}$.
 *
 * Source: Counting faces of randomly projected polytopes when the projection radically lowers
 * dimension, Journal of the American Mathematical Society 22 (2009), arXiv:math/0607364; in the form of
 * Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param args - `undersampling`, m/n from 0 to 1, and the `model`
 * @returns `perMeasurement`, the limit of s/m, and `perVariable`, the limit of s/n
 * @throws A {@link DomainError} if an argument is out of its domain, or an option is unknown
 *
 * @example
 * ```ts
 * import { weakThreshold } from 'hullgauge/conic';
 * const limit = weakThreshold({ undersampling: 0.5, model: 'l1' });
 * limit.perMeasurement.toPrecision(10); // => '0.3856896662'
 * limit.perVariable.toPrecision(10); // => '0.1928448331'
 * ```
 */
export function weakThreshold(args: WeakThresholdArgs): {
  /** Non-zeros per measurement, s/m. */
  readonly perMeasurement: number;
  /** Non-zeros per variable, s/n. */
  readonly perVariable: number;
} {
  const fn = 'weakThreshold';
  checkOptions(fn, args, ['undersampling', 'model']);
  const { undersampling, model } = args;
  checkNumber(fn, 'undersampling', undersampling, 0, 1);
  checkChoice(fn, 'model', model, ['l1', 'nonnegativeL1']);
  if (undersampling === 1 || undersampling === 0) {
    return { perMeasurement: undersampling, perVariable: undersampling };
  }
  const sides = model === 'l1' ? 2 : 1;
  const spare = 1 - undersampling;
  const tau = bisectLevel(
    spare < 0.5
      ? (level) => spareAt(level, sides) > spare
      : (level) => measurementsAt(level, sides) < undersampling,
  );
  normalExcess(tau, MOMENTS);
  // rho/delta, from which the density cancels
  const excess = (2 * tau * (MOMENTS[2] as number)) / (MOMENTS[1] as number);
  const perMeasurement = 1 / (1 + tau * tau + excess);
  return { perMeasurement, perVariable: perMeasurement * undersampling };
}

/** Measurements per variable at a level. */
function measurementsAt(tau: number, sides: Sides): number {
  const density = normalExcess(tau, MOMENTS);
  const first = sides * density * (MOMENTS[1] as number);
  const second = sides * density * 2 * (MOMENTS[2] as number);
  return (first * (1 + tau * tau) + tau * second) / (tau + first);
}

/**
 * One minus {@link measurementsAt}, without cancellation where it is small: tau (1 - c Q)/(tau + c A) with
 * the upper tail Q of the normal law, as J = (1 + tau^2) Q - tau phi and A = phi - tau Q.
 */
function spareAt(tau: number, sides: Sides): number {
  const first = sides * normalExcess(tau, MOMENTS) * (MOMENTS[1] as number);
  const body = sides === 2 ? erfKernel(tau * Math.SQRT1_2) : 1 - normalTailKernel(tau);
  return (tau * body) / (tau + first);
}
