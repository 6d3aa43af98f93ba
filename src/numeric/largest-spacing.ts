/**
 * The largest of n spacings of a circle of length 1: P(all spacings <= a) for n uniform points.
 *
 * The alternating sum P(some > a) = sum_(k >= 1, k a < 1) (-1)^(k+1) binom(n, k) (1 - k a)^(n-1) serves
 * where its first term is below 1. Where it is not, its terms cancel; then the complement comes from
 * Laplace's inversion of the density of n uniform spacings,
 *
 *   P(all <= a) = (n - 1)! / (2 pi i) int e^z ((1 - e^(-a z)) / z)^n dz,
 *
 * by the trapezoidal rule on the vertical line through the saddle point, where nothing cancels. For n a < 2
 * the spacings are reflected, x -> a - x, which leaves a sum of n a - 1 < 1.
 */
import { EPSILON } from '../epsilon.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { log1mExpKernel, log1pmxKernel } from '../special/log-domain.ts';
import { stirlingRemainderKernel } from '../special/stirling-remainder.ts';
import { errorShare } from './stated-error.ts';

/** Up to this n the sum is used throughout; the line integral needs the decay of |z|^-n. */
const FEW = 12;

/**
 * The smaller tail: out[0] its logarithm, out[1] a bound of its error. True when it is P(all <= a).
 *
 * @param rest - 1 - a, where the caller has it with more digits
 */
export function largestSpacingTail(
  n: number,
  a: number,
  out: Float64Array,
  rest: number = 1 - a,
): boolean {
  out[0] = Number.NEGATIVE_INFINITY;
  out[1] = 0;
  if (a >= 1) return false;
  if (n * a <= 1) return true;
  if (n * a < 2) return smallerTail(logReflected(n, a, out), out);
  const logRest = a > 0.5 ? Math.log(rest) : Math.log1p(-a);
  const logFirst = Math.log(n) + (n - 1) * logRest;
  if (logFirst === Number.NEGATIVE_INFINITY) {
    out[1] = Number.POSITIVE_INFINITY;
    return false;
  }
  if (logFirst < -0.5 || n <= FEW) return alternatingSum(n, a, logRest, Math.min(logFirst, 0), out);
  return smallerTail(logAllShort(n, a, out), out);
}

/** Writes the smaller tail where log P(all <= a) has the error out[1]; true when it is that. */
function smallerTail(log: number, out: Float64Array): boolean {
  out[0] = log;
  if (log < -Math.LN2) return true;
  const complement = -Math.expm1(log);
  if (complement > 0) out[1] = ((out[1] as number) * Math.exp(log)) / complement;
  out[0] = log1mExpKernel(log);
  return false;
}

/** log P(all <= a) for n a < 2: with x -> a - x the spacings are those of a circle of length n a - 1. */
function logReflected(n: number, a: number, out: Float64Array): number {
  const rest = n * a - 1;
  const short = largestSpacingTail(n, a / rest, out);
  const inner = short ? (out[0] as number) : log1mExpKernel(out[0] as number);
  // of the complement as much as the tail has of it
  const error = errorShare(out[0] as number, out[1] as number, inner);
  out[1] = error + EPSILON * n * (2 / rest + Math.abs(Math.log(rest)));
  return (n - 1) * Math.log(rest) + inner;
}

/** The sum relative to e^scale: to its first term, which may be far below every double, or to 1. */
function alternatingSum(
  n: number,
  a: number,
  logRest: number,
  scale: number,
  out: Float64Array,
): boolean {
  let sum = 0;
  let error = 0;
  for (let k = 1; k <= n && k * a < 1; k++) {
    const logChoices = logBinomialKernel(n, k);
    const logEach = (n - 1) * (k === 1 ? logRest : Math.log1p(-k * a));
    const term = Math.exp(logChoices + logEach - scale);
    sum += k % 2 === 1 ? term : -term;
    error += term * EPSILON * (3 + 2 * (logChoices - logEach) + k);
    if (term < 1e-20 * sum && n > FEW) break;
  }
  if (scale < -1) {
    // the first term leads, so its logarithm is known as well as its exponent
    out[0] = scale + Math.log(sum);
    out[1] = error / sum;
    return false;
  }
  const above = Math.exp(scale) * sum <= 0.5;
  const tail = above ? Math.exp(scale) * sum : Math.max(1 - Math.exp(scale) * sum, 0);
  const rounding = Math.exp(scale) * error;
  out[0] = Math.log(Math.max(tail, rounding));
  // a tail below the rounding of the terms is known to be below it, no more
  out[1] =
    tail > rounding
      ? -Math.log1p(-Math.min(rounding / tail, 1 - EPSILON))
      : Number.POSITIVE_INFINITY;
  return !above;
}

/** log P(all <= a), 2/n <= a < 1, n > 12. */
function logAllShort(n: number, a: number, out: Float64Array): number {
  // saddle point n x, x = 1 / (1 + q(x)) with q = n a / (e^(a n x) - 1); q falls in x: bisect, then polish
  const q = (x: number): number => (n * a) / Math.expm1(a * n * x);
  let low = 1e-12;
  let high = 1;
  for (let i = 0; i < 200 && high - low > 1e-15 * high; i++) {
    const middle = 0.5 * (low + high);
    if (middle * (1 + q(middle)) < 1) low = middle;
    else high = middle;
  }
  const x = high;
  const excess = -q(x) / (1 + q(x));
  const az = a * n * x;
  const e = Math.exp(-az);
  // second derivative of the exponent at the saddle
  const curvature = 1 / (n * x * x) - (n * a * a * e) / ((1 - e) * (1 - e));
  const width = 1 / Math.sqrt(curvature);
  const scale = n * x;
  const integrand = (y: number): number => {
    // z = scale + i y; log of the integrand relative to y = 0
    const r = y / scale;
    const cos = e * Math.cos(a * y);
    const sin = e * Math.sin(a * y);
    const real =
      0.5 *
      n *
      (Math.log1p((2 * (e - cos) + cos * cos + sin * sin - e * e) / ((1 - e) * (1 - e))) -
        Math.log1p(r * r));
    const angle = y + n * (Math.atan2(sin, 1 - cos) - Math.atan(r));
    return Math.exp(real) * Math.cos(angle);
  };
  const step = 0.35 * width;
  let sum = 0.5;
  let quiet = 0;
  for (let j = 1; j < 200_000 && quiet < 8; j++) {
    const value = integrand(j * step);
    sum += value;
    quiet = Math.abs(value) < 1e-18 ? quiet + 1 : 0;
  }
  const log =
    0.5 * Math.log((2 * Math.PI) / n) +
    stirlingRemainderKernel(n) -
    n * log1pmxKernel(excess) +
    n * Math.log1p(-e) +
    Math.log((sum * step) / Math.PI);
  out[1] = 1e-14 + EPSILON * (8 + 4 * n * (Math.abs(excess) + e * (1 + az)));
  return Math.min(log, 0);
}
