/**
 * Grids of sizes for curves and tables.
 */
import { checkInteger, checkPositive, DomainError } from '../domain.ts';

/** No grid needs more points than this. */
const MOST_POINTS = 100_000;

/**
 * Numbers from `from` to `to`, equally spaced on the logarithmic scale; whole numbers where both ends
 * are whole, each once.
 *
 * @param from - first number, finite and positive
 * @param to - last number, finite and at least `from`
 * @param perDecade - numbers per factor of ten, an integer >= 1
 * @returns the numbers in ascending order, both ends included
 * @throws A {@link DomainError} if an argument is out of its domain or the grid exceeds 100,000 numbers
 *
 * @example
 * ```ts
 * import { logSpaced } from 'hullgauge/plan';
 * logSpaced(1, 100, 3); // => [1, 2, 5, 10, 22, 46, 100]
 * ```
 */
export function logSpaced(from: number, to: number, perDecade: number): number[] {
  const fn = 'logSpaced';
  checkPositive(fn, 'from', from);
  checkPositive(fn, 'to', to);
  if (to < from) throw new DomainError(fn, 'to', `>= from = ${from}`, to);
  checkInteger(fn, 'perDecade', perDecade, 1, MOST_POINTS);
  const span = Math.log(to) - Math.log(from);
  const steps = Math.ceil((span / Math.LN10) * perDecade - 1e-9);
  if (steps >= MOST_POINTS) {
    throw new DomainError(fn, 'perDecade', `small enough for ${MOST_POINTS} numbers`, perDecade);
  }
  const whole = Number.isInteger(from) && Number.isInteger(to);
  const grid: number[] = [from];
  for (let i = 1; i < steps; i++) {
    const x = from * Math.exp((span * i) / steps);
    const next = whole ? Math.round(x) : x;
    if (next > (grid[grid.length - 1] as number) && next < to) grid.push(next);
  }
  if (to > from) grid.push(to);
  return grid;
}
