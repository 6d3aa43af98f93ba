/**
 * Integral over a half line of a positive, log-concave, analytic function given by its logarithm.
 *
 * At the finite end the trapezoidal rule has no exponential convergence; the half line is cut where
 * the integrand has dropped from its largest value by fixed amounts, and each piece gets 20 points of
 * Gauss-Legendre. No piece is longer than a given length, the distance within which the integrand may
 * have singularities off the real line.
 */
import { RULE_POINTS, ruleNode, ruleWeight } from './gauss-legendre.ts';
import { findPeak } from './peak-search.ts';

/** An integral by its logarithm. */
export interface HalfLineIntegral {
  /** Logarithm of the integral; -Infinity where nothing is representable. */
  readonly log: number;
  /** Where the integrand is largest, as an argument of the integrand. */
  readonly peak: number;
  /** Means of the factors under the normalised integrand. */
  readonly means: readonly number[];
}

/** The pieces end where the integrand has dropped by so many nats. */
const DROPS: readonly number[] = [3, 9, 17, 29, 43];
const MAX_PIECES = 20_000;

/**
 * Logarithm of the integral of exp(logIntegrand) from 0 to infinity (direction 1) or from minus
 * infinity to 0 (direction -1).
 *
 * @param width - scale on which the integrand varies, to a factor of a thousand
 * @param longest - no piece is longer than this
 */
export function integrateHalfLine(
  logIntegrand: (x: number) => number,
  direction: 1 | -1,
  width: number,
  longest: number,
  factors: readonly (() => number)[] = [],
): HalfLineIntegral {
  const g = (y: number): number => logIntegrand(direction * y);
  const top = findPeak(g, width, 0);
  if (top.value === Number.NEGATIVE_INFINITY) {
    return { log: top.value, peak: 0, means: factors.map(() => 0) };
  }
  const sums = new Float64Array(factors.length + 1);
  const addPiece = (a: number, b: number): void => {
    for (let i = 0; i < RULE_POINTS; i++) {
      const term = ruleWeight(i, a, b) * Math.exp(g(ruleNode(i, a, b)) - top.value);
      sums[0] = (sums[0] as number) + term;
      for (let j = 0; j < factors.length; j++) {
        sums[j + 1] = (sums[j + 1] as number) + term * (factors[j] as () => number)();
      }
    }
  };
  let pieces = 0;
  const add = (a: number, b: number): void => {
    const parts = Math.max(1, Math.ceil((b - a) / longest));
    for (let i = 0; i < parts; i++) {
      if (++pieces > MAX_PIECES) throw new Error('integrateHalfLine: the integrand does not decay');
      addPiece(a + ((b - a) * i) / parts, a + ((b - a) * (i + 1)) / parts);
    }
  };
  let last = top.x;
  for (const drop of DROPS) {
    const next = descend(g, last, 1, top.step, top.value - drop);
    add(last, next);
    last = next;
  }
  last = top.x;
  for (const drop of DROPS) {
    if (last <= 0) break;
    const next = Math.max(0, descend(g, last, -1, top.step, top.value - drop));
    add(next, last);
    last = next;
  }
  const total = sums[0] as number;
  return {
    log: top.value + Math.log(total),
    peak: direction * top.x,
    means: factors.map((_, i) => (sums[i + 1] as number) / total),
  };
}

/** The point from `start` in a direction at which g falls to a level, to a few per cent. */
function descend(
  g: (y: number) => number,
  start: number,
  direction: number,
  firstStep: number,
  level: number,
): number {
  let inner = start;
  let step = firstStep;
  let outer = start + direction * step;
  for (let i = 0; i < 300 && outer > 0 && g(outer) > level; i++) {
    inner = outer;
    step *= 1.6;
    outer = inner + direction * step;
  }
  if (outer <= 0) return outer;
  for (let i = 0; i < 3; i++) {
    const middle = 0.5 * (inner + outer);
    if (g(middle) > level) inner = middle;
    else outer = middle;
  }
  return outer;
}
