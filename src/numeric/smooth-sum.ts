/**
 * Every other term of a long, smooth sequence from an index outwards, without visiting them all.
 *
 * With g(x) the term at distance x, the Euler-Maclaurin formula gives
 *
 *   g(0) + g(2) + g(4) + .. = (1/2) int_0^inf g + g(0)/2 - g'(0)/6 + g'''(0)/90 - ..;
 *
 * the rest is below 1e-15 of the sum where g changes over thousands of indices. The integral takes
 * 20-point panels of half the scale over which g changes.
 */
import { RULE_POINTS, ruleNode, ruleWeight } from './gauss-legendre.ts';
import type { LogTerm } from './parity-split.ts';

/** Panels that contribute less than this share end the sum. */
const NEGLIGIBLE = 1e-18;
const MOST_PANELS = 400;

/**
 * log of the sum of exp(term(start + 2 direction i)), i = 0, 1, .., for terms that fall outwards and
 * change by a factor over no fewer than `scale` indices; writes its error bound to `error[0]`.
 */
export function logSmoothSum(
  term: LogTerm,
  start: number,
  direction: 1 | -1,
  scale: number,
  error: Float64Array,
): number {
  const base = term(start, error);
  let bound = error[0] as number;
  const g = (x: number): number => {
    const value = Math.exp(term(start + direction * x, error) - base);
    bound = Math.max(bound, error[0] as number);
    return value;
  };
  let integral = 0;
  for (let panel = 0; panel < MOST_PANELS; panel++) {
    const left = 0.5 * scale * panel;
    let part = 0;
    for (let i = 0; i < RULE_POINTS; i++) {
      part += ruleWeight(i, left, left + 0.5 * scale) * g(ruleNode(i, left, left + 0.5 * scale));
    }
    integral += part;
    if (part < NEGLIGIBLE * integral) break;
  }
  const step = 0.05 * scale;
  // of the logarithm, which is nearly straight
  const rise = term(start + direction * step, error) - term(start - direction * step, error);
  const slope = rise / (2 * step);
  error[0] = bound + 5e-13;
  return base + Math.log(0.5 * integral + 0.5 - slope / 6 + (slope * slope * slope) / 90);
}
