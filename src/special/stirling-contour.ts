/**
 * Single Stirling numbers by a Cauchy integral around the saddle point.
 *
 * For Q(s) = prod_{i < n} (s + c + i) the coefficient of s^k is the mean of Q(z) z^-k over any circle
 * |z| = r. At the radius with r Q'(r)/Q(r) = k the integrand has a peak on the positive axis like that
 * of a normal density, with v = sum r (c + i)/(r + c + i)^2 for its inverse variance, and the
 * trapezoidal rule converges exponentially: about 25 nodes of spacing pi/(5 sqrt(v)) suffice for every
 * n and k. Any radius gives the same sum, so a few digits of the saddle point are enough.
 *
 * Saddle-point asymptotics alone would give three to six digits: Stirling number asymptotics from
 * saddle points are in Studies in Applied Mathematics 89 (1993) 233-243, doi 10.1002/sapm1993893233.
 */
import { log1pmxKernel } from './log-domain.ts';
import { logGammaRatioKernel } from './log-gamma.ts';
import { stirlingRemainderDifference } from './stirling-remainder.ts';
import { DIRECT_FACTORS, innerTerm, outerTerm } from './stirling-terms.ts';

/** A term below e^-42 of the peak is left out, and so are all after it. */
const NEGLIGIBLE = -42;
const MAX_NODES = 200;

/** log of the coefficient of s^k in Q(s), for n >= 24, 0 < k < n and c = 1/2 or 1. */
export function logCoefficientByContour(n: number, k: number, c: number): number {
  const saddle = new Float64Array(2);
  saddlePoint(n, k, c, saddle);
  const r = saddle[0] as number;
  const nodes = Math.ceil(5 * Math.sqrt(saddle[1] as number) + 16);
  const m = n - k;
  const inner = r <= n;
  const peak = inner ? 0 : logProductExcess(n, c, r);
  const out = new Float64Array(2);
  let sum = 0.5;
  for (let i = 1; i <= nodes; i++) {
    const theta = (Math.PI * i) / nodes;
    if (inner) innerTerm(n, k, c, r, theta, out);
    else outerTerm(n, m, c, r, theta, out);
    const size = (out[0] as number) - peak;
    if (size < NEGLIGIBLE) break;
    if (i > MAX_NODES) throw new Error(`contour of the Stirling number (${n}, ${k}) does not end`);
    const value = Math.exp(size) * Math.cos(out[1] as number);
    sum += i === nodes ? 0.5 * value : value;
  }
  const logMean = Math.log(sum / nodes);
  return inner
    ? logGammaRatioKernel(r + c, n) - k * Math.log(r) + logMean
    : m * Math.log(r) + peak + logMean;
}

/** log(Q(r) / r^n) for r > n. */
function logProductExcess(n: number, c: number, r: number): number {
  const x = r + c;
  return (
    n * Math.log1p(c / r) +
    x * log1pmxKernel(n / x) +
    (n - 0.5) * Math.log1p(n / x) +
    stirlingRemainderDifference(x, n)
  );
}

/**
 * Writes the radius r with sum r/(r + c + i) = k to `out[0]` and v to `out[1]`.
 *
 * Newton's method in log r on the logarithm of the sum, or for large k on that of the complementary
 * sum of (c + i)/(r + c + i) = n - k, which does not cancel. Either logarithm is concave in log r,
 * and the starting points lie on the side where Newton's method converges monotonically.
 */
function saddlePoint(n: number, k: number, c: number, out: Float64Array): void {
  const m = n - k;
  const inward = k <= m;
  const first = c + DIRECT_FACTORS - 0.5;
  const last = c + n - 0.5;
  let r: number;
  if (inward) {
    let reciprocals = Math.log(last / first);
    for (let i = 0; i < DIRECT_FACTORS; i++) reciprocals += 1 / (c + i);
    r = k / reciprocals;
  } else {
    r = (n / m) * (c + 0.5 * (n - 1));
  }
  for (let step = 0; step < 100; step++) {
    let sum = 0;
    let variance = 0;
    for (let i = 0; i < DIRECT_FACTORS; i++) {
      const share = r / (r + c + i);
      sum += inward ? share : (c + i) / (r + c + i);
      variance += (share * (c + i)) / (r + c + i);
    }
    // the other factors by the midpoint rule with its first correction
    const start = r + first;
    const end = r + last;
    const t = (last - first) / start;
    const log = Math.log1p(t);
    const correction = (r / 24) * (1 / (start * start) - 1 / (end * end));
    sum += inward ? r * log - correction : first * log - start * log1pmxKernel(t) + correction;
    variance += r * (log - (r * t) / end);
    const slope = variance / sum;
    const change = Math.log((inward ? k : m) / sum) / (inward ? slope : -slope);
    r *= Math.exp(change);
    if (Math.abs(change) < 1e-6) {
      out[0] = r;
      out[1] = variance;
      return;
    }
  }
  throw new Error(`saddle point of the Stirling number (${n}, ${k}) not found, last at ${r}`);
}
