/** Support for tests of the places where a function changes its method. */
import { ulpDistance } from '../support/ulp.ts';

/** The next double towards plus or minus infinity. */
export function neighbour(x: number, direction: 1 | -1): number {
  if (x === 0) return direction * Number.MIN_VALUE;
  const view = new BigInt64Array(new Float64Array([x]).buffer);
  view[0] = (view[0] as bigint) + BigInt(direction * Math.sign(x));
  return new Float64Array(view.buffer)[0] as number;
}

/** Largest distance in ulp between f at a threshold and f at its two neighbours. */
export function jumpAt(f: (x: number) => number, threshold: number): number {
  const here = f(threshold);
  return Math.max(
    ulpDistance(here, f(neighbour(threshold, 1))),
    ulpDistance(here, f(neighbour(threshold, -1))),
  );
}

/** Largest drop of f over ascending points, relative to |f|: 0 where f never falls. */
export function largestDrop(f: (x: number) => number, from: number, to: number): number {
  const points = 20_000;
  let worst = 0;
  let before = f(from);
  for (let i = 1; i <= points; i++) {
    const value = f(from + ((to - from) * i) / points);
    worst = Math.max(worst, (before - value) / Math.abs(value || 1));
    before = value;
  }
  return worst;
}
