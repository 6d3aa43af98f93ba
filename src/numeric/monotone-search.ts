/**
 * The crossing of a monotone function, located by as few evaluations as possible.
 *
 * A function value is a signed gap: negative on one side of the crossing, zero or positive on the
 * other. Interpolation works on log(x) over wide brackets and on x over narrow ones; each probe is
 * placed a little beyond the predicted crossing, so that both ends of the bracket close in.
 */

/** A point with its gap. */
export interface Probe {
  /** Where. */
  readonly x: number;
  /** The gap there. */
  readonly gap: number;
}

/** A bracket: the gaps of its ends have different signs (zero counts as positive). */
export interface Bracket {
  /** The lower end. */
  readonly lower: Probe;
  /** The upper end. */
  readonly upper: Probe;
}

/** What a search found. */
export interface Found extends Bracket {
  /** A point whose gap was declared noise: the crossing cannot be located any better. */
  readonly settled?: Probe;
}

/** No search needs more: bisection alone takes at most about 64 on integers, 1100 on reals. */
const MOST_STEPS = 1300;

/**
 * Narrows a bracket to neighbouring integers, or for real arguments to a width of `resolution`
 * relative to the larger end.
 *
 * @param bracket - ends with gaps of different sign
 * @param gapAt - the function; called only strictly inside the bracket
 * @param integer - whether only integers are allowed
 * @param isNoise - whether the gap just computed at a point is below its own error; ends the search
 * @param resolution - for real arguments, the relative width at which to stop
 * @returns the final bracket
 */
export function narrow(
  bracket: Bracket,
  gapAt: (x: number) => number,
  integer: boolean,
  isNoise: (x: number) => boolean = () => false,
  resolution: number = 2 ** -51,
): Found {
  let { lower, upper } = bracket;
  const rises = lower.gap < 0;
  let last: Probe = Math.abs(lower.gap) < Math.abs(upper.gap) ? lower : upper;
  let previous: Probe | undefined;
  let slow = 0;
  let overshoot = 0.1;
  for (let step = 0; step < MOST_STEPS; step++) {
    const width = upper.x - lower.x;
    // Above 2^53 whole numbers are as far apart as doubles.
    const size = Math.max(Math.abs(lower.x), Math.abs(upper.x));
    const unit = integer ? Math.max(1, 2 ** -53 * size) : resolution * size;
    if (width <= unit) return { lower, upper };
    const wide = lower.x > 0 && upper.x > 2 * lower.x;
    let x = slow >= 2 ? midpoint(lower.x, upper.x, wide) : predict(lower, upper, previous, wide);
    if (slow < 2) {
      // Overshoot, seen from the last point, so that the other end of the bracket follows.
      const margin = Math.max(overshoot * Math.abs(x - last.x), 0.6 * unit);
      x +=
        last.x <= x
          ? Math.min(margin, 0.5 * (upper.x - x))
          : -Math.min(margin, 0.5 * (x - lower.x));
    }
    x = Math.min(Math.max(x, lower.x + 0.6 * unit), upper.x - 0.6 * unit);
    if (integer) x = Math.min(Math.max(Math.round(x), lower.x + unit), upper.x - unit);
    if (!(x > lower.x && x < upper.x)) return { lower, upper };
    const probe = { x, gap: gapAt(x) };
    if (isNoise(x)) return { lower, upper, settled: probe };
    const before = wide ? Math.log(upper.x / lower.x) : width;
    if (probe.gap < 0 === rises) {
      previous = lower;
      lower = probe;
    } else {
      previous = upper;
      upper = probe;
    }
    // A prediction that crossed may be trusted more the next time.
    const crossed = probe.gap < 0 !== last.gap < 0;
    overshoot = crossed ? Math.max(0.05 * overshoot, 1e-6) : Math.min(20 * overshoot, 0.2);
    last = probe;
    const after = wide ? Math.log(upper.x / lower.x) : upper.x - lower.x;
    slow = after > 0.5 * before ? slow + 1 : 0;
  }
  throw new Error(`no convergence: the crossing lies between ${lower.x} and ${upper.x}`);
}

function midpoint(a: number, b: number, wide: boolean): number {
  return wide ? Math.sqrt(a) * Math.sqrt(b) : a + 0.5 * (b - a);
}

/** Where inverse quadratic interpolation, or the secant, puts the crossing. */
function predict(lower: Probe, upper: Probe, third: Probe | undefined, wide: boolean): number {
  // An infinite gap says on which side the crossing lies and nothing more.
  if (Math.max(Math.abs(lower.gap), Math.abs(upper.gap)) >= 1e300) {
    return midpoint(lower.x, upper.x, wide);
  }
  const origin = wide ? Math.log(lower.x) : lower.x;
  const coordinate = (x: number): number => (wide ? Math.log(x) : x) - origin;
  const end = coordinate(upper.x);
  const fa = lower.gap;
  const fb = upper.gap;
  let t = (end * fa) / (fa - fb);
  if (third !== undefined && (!wide || third.x > 0) && Math.abs(third.gap) < 1e300) {
    const fc = third.gap;
    const c = coordinate(third.x);
    const quadratic =
      (end * fa * fc) / ((fb - fa) * (fb - fc)) + (c * fa * fb) / ((fc - fa) * (fc - fb));
    // Equal gaps give NaN here, which fails the comparison.
    if (quadratic > 0 && quadratic < end) t = quadratic;
  }
  if (!(t >= 0 && t <= end)) t = 0.5 * end;
  return wide ? Math.exp(origin + t) : origin + t;
}
