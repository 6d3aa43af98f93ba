/**
 * Expectation of a function of the m-th smallest of n independent uniform numbers.
 *
 * V ~ Beta(m, n + 1 - m) is written as V = v(x), the tail of a distribution, and the expectation as
 * an integral over the point x:
 *
 *   E[W] = m int Binomial(m; n, v) (-dv/dx / v) W dx,
 *
 * with the binomial weight in the form that compares n v with m,
 *
 *   log Binomial(m; n, v) = const - m phi(log(n v / m)) - (n - m) phi(log((1 - v) n / (n - m))),
 *   phi(t) = e^t - 1 - t,
 *
 * which keeps its digits up to n = e^100000: beyond doubles the last term is the exponential of its
 * logarithm, 0 but for v far too large.
 */
import { EPSILON } from '../epsilon.ts';
import { sumError } from '../special/double-double.ts';
import { expm1mxKernel } from '../special/log-domain.ts';
import { stirlingRemainderKernel } from '../special/stirling-remainder.ts';
import type { Tail, TailRange } from './tail.ts';
import { integrateUnimodal } from './unimodal-integral.ts';

/** Which of how many; n is `Infinity` where only its logarithm is a double. */
export interface OrderStatistic {
  /** Rank from below, an integer >= 1. */
  readonly m: number;
  /** Sample size, at least m. */
  readonly n: number;
  /** Its natural logarithm. */
  readonly log: number;
}

/** The logarithm of an expectation, with what its error depends on. */
export interface LogExpectation {
  readonly log: number;
  /** The expectation itself, to more digits than the exponential of its logarithm. */
  readonly value: number;
  /** Bound on the absolute error of the logarithm. */
  readonly error: number;
  /** Means of the factors under the weighted law. */
  readonly means: readonly number[];
}

/**
 * log E[exp(logWeight)], where logWeight reads the state of `tail`.
 *
 * The weight must leave the integrand unimodal and analytic.
 */
export function orderStatisticExpectation(
  tail: Tail,
  range: TailRange,
  order: OrderStatistic,
  logWeight: () => number,
  factors: readonly (() => number)[] = [],
): LogExpectation {
  tail.centreAtTail(centralLogTail(order), range);
  const density = logOrderDensity(tail, order);
  const width = Math.exp(-tail.logHazard) / Math.sqrt(order.m);
  const integral = integrateUnimodal((x) => density.at(x) + logWeight(), width, factors);
  const high = density.constant + integral.scale;
  const low = sumError(density.constant, integral.scale, high);
  return {
    log: high + (low + Math.log(integral.sum)),
    value: Math.exp(high) * (1 + low) * integral.sum,
    error: integral.error + density.rounding(integral.peak, logWeight),
    means: integral.means,
  };
}

/** log of the mean of V, at most that of the centre: further left no weight moves the peak. */
export function centralLogTail({ m, n, log }: OrderStatistic): number {
  return Math.min(Math.log(m) - (log > 30 ? log : Math.log(n + 1)), -Math.LN2);
}

/** The logarithm of the density of the order statistic in the variable of a tail. */
export interface OrderDensity {
  /** The part that does not depend on the point. */
  readonly constant: number;
  /** The rest, at an offset from the reference point of the tail; leaves the tail there. */
  at(offset: number): number;
  /** Change of the logarithm of the binomial weight at the reference point with log v. */
  readonly pull: number;
  /** Bound on the error that rounding leaves in log E[W], from the weight near the peak. */
  rounding(peak: number, logWeight: () => number): number;
}

/** The density for the reference point at which the tail stands. */
export function logOrderDensity(tail: Tail, order: OrderStatistic): OrderDensity {
  const { m, n, log } = order;
  const rest = n - m;
  const finite = n < Number.POSITIVE_INFINITY;
  const start = (log > 30 ? log - Math.log(m) : Math.log(n / m)) + tail.logTail;
  const q = !finite || rest === 0 ? 0 : m > 0.5 * n ? Math.log(rest / n) : Math.log1p(-m / n);
  let constant = Math.log(m);
  if (rest > 0) {
    constant -= stirlingRemainderKernel(m) + 0.5 * (Math.log(2 * Math.PI * m) + q);
    if (finite) constant += stirlingRemainderKernel(n) - stirlingRemainderKernel(rest);
  }
  const at = (offset: number): number => {
    tail.moveTo(offset);
    const tau = start + tail.shift;
    if (rest === 0) return m * tau + tail.logHazard;
    const lower = -m * expm1mxKernel(tau);
    const gap = expm1mxKernel(tail.logOther - q);
    const upper = finite ? rest * gap : Math.exp(log + Math.log(gap));
    return lower - upper + tail.logHazard;
  };
  const rounding = (peak: number, logWeight: () => number): number => {
    at(peak);
    const weight = logWeight();
    const tau = start + tail.shift;
    const size = Math.abs(tail.logTail);
    const pull = rest === 0 ? m : m * Math.abs(Math.expm1(tau));
    const { shift } = tail;
    const step = Math.min(1, 0.01 / (Math.exp(tail.logHazard) * Math.sqrt(m)));
    tail.moveTo(peak + step);
    const change = Math.abs(tail.shift - shift);
    const slope = change > 1e-8 ? Math.abs(logWeight() - weight) / change : 0;
    const inputs = Math.abs(log) + size + Math.abs(shift) + 2;
    return (
      EPSILON *
      (6 +
        2 * Math.abs(weight) +
        (2 * slope + 1 / m) * inputs +
        2 * pull * (Math.min(inputs, 4) + Math.abs(shift)))
    );
  };
  return { constant, at, pull: m * Math.abs(Math.expm1(start)), rounding };
}
