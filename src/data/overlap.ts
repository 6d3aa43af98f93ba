/**
 * When no hyperplane separates two classes strictly: does one separate them weakly?
 *
 * Each case is a vector $z_i = y_i (x_i, 1)$, scaled to length 1. A weak separator is $\beta$ with
 * $z_i \cdot \beta \ge 0$ for all cases and $> 0$ for some. There is none exactly if 0 lies in the
 * relative interior of the hull of the $z_i$, that is if $\sum w_i z_i = 0$ with all weights positive.
 *
 * Such weights are found by asking whether $-\varepsilon \bar z$ lies in the hull, with $\bar z$ the
 * mean. A weak separator vanishes on every case that takes part in a combination of 0, so it is sought
 * in the orthogonal complement of those, round after round.
 */
import { nearest, reproduces } from './in-hull.ts';
import type { Matrix } from './points.ts';

/** The classes overlap, with the weights that prove it, or a weak separator exists, or neither is clear. */
export type Overlap =
  | { readonly kind: 'overlapping'; readonly weights: Float64Array }
  | { readonly kind: 'quasi-complete'; readonly beta: Float64Array }
  | { readonly kind: 'undecided' };

/** A product of unit vectors below this counts as zero. */
const ZERO = 1e-11;
/** A unit vector that keeps less than this outside a subspace counts as lying in it. */
const IN_SPAN = 1e-9;
/** A weight above this is no artefact of rounding. */
const TAKES_PART = 1e-9;

/** Judges unit vectors z whose hull is known to hold 0 to rounding. */
export function judgeOverlap(z: Matrix): Overlap {
  const weights = positiveWeights(z);
  if (weights !== null) return { kind: 'overlapping', weights };
  const beta = weakSeparator(z);
  return beta === null ? { kind: 'undecided' } : { kind: 'quasi-complete', beta };
}

/** Positive weights of all rows that sum to 1 and combine the rows to 0, or null if none are found. */
function positiveWeights(z: Matrix): Float64Array | null {
  const { rows, n, d } = z;
  const mean = new Float64Array(d);
  for (let at = 0; at < n * d; at++) {
    mean[at % d] = (mean[at % d] as number) + (rows[at] as number) / n;
  }
  const ones = new Float64Array(d).fill(1);
  const allowed = new Float64Array(d).fill(4e-15);
  for (let epsilon = 0.1; epsilon > 5e-9; epsilon /= 10) {
    const target = mean.map((x) => -epsilon * x);
    const attempt = nearest(z, target, ones);
    if (!reproduces(attempt, allowed)) continue;
    const { found } = attempt;
    const weights = new Float64Array(n).fill(epsilon / n / (1 + epsilon));
    found.atoms.forEach((atom, i) => {
      weights[atom] = (weights[atom] as number) + (found.weights[i] as number) / (1 + epsilon);
    });
    return weights;
  }
  return null;
}

/** A unit vector with no product below zero and some clearly above, or null if none is found. */
function weakSeparator(z: Matrix): Float64Array | null {
  const { rows, n, d } = z;
  const span: Float64Array[] = [];
  const ones = new Float64Array(d).fill(1);
  const none = new Float64Array(d);
  const allowed = new Float64Array(d).fill(1e-12);
  for (let round = 0; round <= d; round++) {
    // What each row has outside the span, at unit length.
    const rest = new Float64Array(n * d);
    let count = 0;
    for (let i = 0; i < n; i++) {
      const v = rest.subarray(count * d, (count + 1) * d);
      v.set(rows.subarray(i * d, (i + 1) * d));
      if (reduce(v, span) > IN_SPAN) count++;
    }
    if (count === 0) return null;
    const outside: Matrix = { rows: rest.subarray(0, count * d), n: count, d };
    const attempt = nearest(outside, none, ones);
    const { found } = attempt;
    if (!reproduces(attempt, allowed)) {
      return attempt.proven && separatesWeakly(z, found.normal) ? found.normal : null;
    }
    found.atoms.forEach((atom, i) => {
      // A weight of the size of rounding does not prove that its atom takes part.
      if (!((found.weights[i] as number) > TAKES_PART)) return;
      const v = rest.slice(atom * d, (atom + 1) * d);
      if (reduce(v, span) > IN_SPAN) span.push(v);
    });
  }
  return null;
}

/** Makes v orthogonal to an orthonormal list and of unit length; returns the length before that. */
function reduce(v: Float64Array, span: readonly Float64Array[]): number {
  for (let pass = 0; pass < 2; pass++) {
    for (const u of span) {
      const part = u.reduce((sum, x, j) => sum + x * (v[j] as number), 0);
      for (let j = 0; j < v.length; j++) v[j] = (v[j] as number) - part * (u[j] as number);
    }
  }
  const length = Math.sqrt(v.reduce((sum, x) => sum + x * x, 0));
  if (length > 0) for (let j = 0; j < v.length; j++) v[j] = (v[j] as number) / length;
  return length;
}

function separatesWeakly({ rows, n, d }: Matrix, beta: Float64Array): boolean {
  let largest = 0;
  for (let i = 0; i < n; i++) {
    let product = 0;
    for (let j = 0; j < d; j++) product += (rows[i * d + j] as number) * (beta[j] as number);
    if (product < -ZERO) return false;
    largest = Math.max(largest, product);
  }
  return largest > 1000 * ZERO;
}
