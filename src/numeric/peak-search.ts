/**
 * The neighbourhood of the maximum of a unimodal function given by its logarithm.
 */

/** A point near the maximum. */
export interface Peak {
  readonly x: number;
  readonly value: number;
  /** A step that leads to values less than one nat below, on either side. */
  readonly step: number;
}

/**
 * Climbs from 0 with steps that grow while they lead upwards and shrink when they do not.
 *
 * @param f - unimodal; -Infinity allowed away from the maximum
 * @param width - scale on which f varies near 0, to a factor of a thousand
 * @param least - f is not evaluated below this, at most 0
 */
export function findPeak(f: (x: number) => number, width: number, least: number): Peak {
  const g = (x: number): number => (x < least ? Number.NEGATIVE_INFINITY : f(x));
  let x = 0;
  let value = f(0);
  let step = width;
  let right = f(step);
  let left = g(-step);
  // a start where nothing is representable: spread out until something is
  for (let i = 0; i < 60 && !(Math.max(value, left, right) > Number.NEGATIVE_INFINITY); i++) {
    step *= 2;
    right = f(step);
    left = g(-step);
  }
  for (let i = 0; i < 3000; i++) {
    if (right > value && right >= left) {
      x += step;
      value = right;
      step *= 1.6;
    } else if (left > value) {
      x -= step;
      value = left;
      step *= 1.6;
    } else if (right > value - 1 && (left > value - 1 || x - step < least)) {
      break;
    } else {
      // from a step that overshoots everything, come down faster
      step *= Math.max(right, left) < value - 1000 ? 2 ** -8 : 0.4;
    }
    right = f(x + step);
    left = g(x - step);
  }
  return { x, value, step };
}
