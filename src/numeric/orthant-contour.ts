/**
 * The integral of a power of the scaled normal tail along a vertical line through its saddle.
 *
 * With M(z) = Phi(z) exp(z^2/2), for an integer k >= 1 and kappa > 0, and with or without the pole,
 *
 *   int M(-a + iy)^k exp(kappa (-a + iy)^2 / 2) [1 / (a - iy)] dy
 *
 * over the real line does not depend on a > 0. On the real axis it cancels to nothing; at the
 * saddle of its modulus all terms pull the same way. The trapezoidal sum with step h differs from
 * the integral by the values at multiples of 2 pi / h of the density (with the pole: the
 * distribution function) whose transform it is, and exponential tilting bounds those before anything
 * is summed: the step is chosen for a wanted error instead of being refined until nothing changes.
 */
import { EPSILON } from '../epsilon.ts';
import { millsRatioKernel } from '../special/error-function.ts';
import { faddeevaKernel } from '../special/faddeeva.ts';
import { normalTailKernel } from '../special/normal.ts';

const SQRT_HALF = Math.SQRT1_2;
const SQRT_TWO_OVER_PI = 0.79788456080286536;
const INVERSE_SQRT_TWO_PI = 0.39894228040143268;

/** Natural logarithm of the discretisation error aimed at: e^-41 = 1.6e-18. */
export const CONTOUR_TOLERANCE = 41;

/** Far more nodes than any k and kappa need (at most about 70); a guard against endless loops. */
const MAX_NODES = 100_000;

/** log M(-b) for any real b. */
export function logScaledTail(b: number): number {
  if (b >= -5) return Math.log(millsRatioKernel(b) * INVERSE_SQRT_TWO_PI);
  return 0.5 * b * b + Math.log1p(-normalTailKernel(b));
}

/** phi(b) / Phi(-b) - b: the mean excess over b of a normal variable known to exceed b. */
function meanExcess(b: number): number {
  if (b < 300) return 1 / millsRatioKernel(b) - b;
  const q = 1 / b / b;
  return (1 - q * (2 - q * (10 - 74 * q))) / b;
}

/** Variance of that excess, given its mean. */
function excessVariance(b: number, mean: number): number {
  if (b < 30) return 1 - (mean + b) * mean;
  const q = 1 / b / b;
  return q * (1 - q * (6 - 50 * q));
}

/**
 * Writes the saddle a to `out[0]`, log M(-a) to `out[1]`, log I to `out[2]` and a bound on the
 * absolute error of log I to `out[3]`, where the integral is M(-a)^k exp(kappa a^2 / 2) I.
 *
 * @param k - an integer >= 1 (>= 0 with the pole)
 * @param pole - whether the integrand carries the factor 1 / (a - iy)
 * @param tolerance - minus the logarithm of the discretisation error aimed at
 */
export function contourKernel(
  k: number,
  kappa: number,
  pole: boolean,
  out: Float64Array,
  tolerance: number = CONTOUR_TOLERANCE,
): void {
  const a = saddle(k, kappa, pole);
  const mills = millsRatioKernel(a);
  const period = Math.max(
    aliasDistance(k, kappa, pole, a, -1, tolerance, out),
    // out[3] still holds the bound of the other side
    aliasDistance(k, kappa, pole, a, 1, tolerance, out),
  );
  const h = (2 * Math.PI) / period;
  const w0 = mills * SQRT_TWO_OVER_PI;
  let total = pole ? 0.5 / a : 0.5;
  let size = total;
  for (let j = 1; ; j++) {
    const y = j * h;
    faddeevaKernel(y * SQRT_HALF, a * SQRT_HALF, FADDEEVA);
    const re = (FADDEEVA[0] as number) / w0;
    const im = (FADDEEVA[1] as number) / w0;
    const logModulus = 0.5 * (k * Math.log(re * re + im * im) - kappa * y * y);
    if (logModulus < -CONTOUR_TOLERANCE) break;
    if (j > MAX_NODES) {
      throw new Error(`contour sum: no decay after ${MAX_NODES} nodes at k = ${k}, ${kappa}`);
    }
    const phase = k * Math.atan2(im, re) - kappa * a * y;
    const modulus = Math.exp(logModulus);
    if (pole) {
      const scale = modulus / (a * a + y * y);
      total += scale * (a * Math.cos(phase) - y * Math.sin(phase));
      size += scale * a;
    } else {
      total += modulus * Math.cos(phase);
      size += modulus;
    }
  }
  const aliases = out[3] as number;
  out[0] = a;
  out[1] = Math.log(mills * INVERSE_SQRT_TWO_PI);
  out[2] = Math.log(2 * h * total);
  // 1e-15 is the accuracy of w; it is raised to the power k.
  out[3] = aliases + (size / total) * EPSILON * (6 + 4 * k);
}

const FADDEEVA: Float64Array = /* @__PURE__ */ new Float64Array(2);

/**
 * Where k meanExcess(a) [+ 1/a] = kappa a. The left side is convex and decreasing, so Newton's
 * method started below the root climbs to it; any a > 0 gives the same integral, so a few digits do.
 */
function saddle(k: number, kappa: number, pole: boolean): number {
  const q = k / kappa;
  // From meanExcess(a) > 2 / (a + sqrt(a^2 + 8)).
  let a = q / Math.sqrt(q + 2);
  if (pole) a = Math.max(a, 1 / Math.sqrt(kappa));
  for (let i = 0; i < 20; i++) {
    const mean = meanExcess(a);
    let f = k * mean - kappa * a;
    let slope = k * excessVariance(a, mean) + kappa;
    if (pole) {
      f += 1 / a;
      slope += 1 / a / a;
    }
    const step = f / slope;
    a += step;
    if (Math.abs(step) < 1e-4 * a) break;
  }
  return a;
}

/**
 * Distance beyond which an alias on one side is below e^-tolerance of the result.
 *
 * With K(b) = k log M(-b) + kappa b^2/2 [- log b] and b = a + side t, an alias at distance
 * |K'(b)| has relative size about exp(K(b) - K(a) - (b - a) K'(b)) sqrt(K''(a) / K''(b)). Solves for
 * the t at which the exponent is -tolerance, roughly, and records the bound that was reached: the
 * first call (side -1) sets `out[3]`, the second adds to it.
 */
function aliasDistance(
  k: number,
  kappa: number,
  pole: boolean,
  a: number,
  side: 1 | -1,
  tolerance: number,
  out: Float64Array,
): number {
  const meanAtSaddle = meanExcess(a);
  let curvatureAtSaddle = k * excessVariance(a, meanAtSaddle) + kappa;
  if (pole) curvatureAtSaddle += 1 / a / a;
  const logAtSaddle = logScaledTail(a);
  let t = Math.sqrt((2 * tolerance) / curvatureAtSaddle);
  // K has its pole, or a steep rise, at b = 0.
  if (side < 0) t = Math.min(t, 0.9 * a + (pole ? 0 : 1));
  let near = 0;
  // Where a is large the exponent is far below -tolerance at b = 0, beyond which K rises like b^2 / 2.
  let far = side < 0 && (pole || a > 100) ? a : Number.POSITIVE_INFINITY;
  let slope = 0;
  let exponent = 0;
  let curvature = curvatureAtSaddle;
  for (let i = 0; i < 30; i++) {
    const b = a + side * t;
    const mean = meanExcess(b);
    slope = kappa * b - k * mean;
    curvature = k * excessVariance(b, mean) + kappa;
    // kappa (b^2 - a^2) / 2, and the terms of -t K'
    exponent = k * (logScaledTail(b) - logAtSaddle) + kappa * side * t * (a + 0.5 * side * t);
    if (pole) {
      slope -= 1 / b;
      curvature += 1 / b / b;
      exponent -= Math.log(b / a);
    }
    exponent -= side * t * slope;
    const miss = exponent + tolerance;
    if (Math.abs(miss) < 0.3) break;
    if (miss > 0) near = t;
    else far = t;
    const newton = t + miss / (t * curvature);
    const middle = far < Number.POSITIVE_INFINITY ? 0.5 * (near + far) : 2 * near;
    t = newton > near && newton < far ? newton : middle;
  }
  const bound = 2 * Math.exp(exponent) * Math.sqrt(Math.max(1, curvatureAtSaddle / curvature));
  out[3] = side < 0 ? bound : (out[3] as number) + bound;
  return Math.abs(slope);
}
