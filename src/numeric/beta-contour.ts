/**
 * The internal integral of the beta family along a line through its saddle.
 *
 * With f(phi) = c cos(phi)^p a density on (-pi/2, pi/2) and F its distribution function,
 *
 *   int cos(-a + ix)^-Q F(-a + ix)^M dx
 *
 * over the real line does not depend on a in (0, pi/2). At the saddle all terms pull the same way and
 * a few dozen nodes do. F is not evaluated as a special function: its ratio to f is marched up the
 * line by Gauss-Legendre quadrature, and since |cos| grows along the line each step damps the errors of
 * those before. Where there is no saddle, (p + 1) M >= Q, the line collapses onto the end -pi/2 of the
 * interval, and the integral becomes a real one times a cosine that carries sign and zeros:
 *
 *   2 cos(pi e / 2) int_0^inf sinh(x)^-Q (c int_0^x sinh^p)^M dx,   e = (p + 1) M - Q > -1.
 *
 * Sources: Angles of random simplices and face numbers of random polytopes, Advances in Mathematics
 * 380 (2021), arXiv:1909.13335; Beta polytopes and beta cones: an exactly solvable model in geometric
 * probability, arXiv:2503.22488.
 */
import { EPSILON } from '../epsilon.ts';
import type { BetaTail } from './beta-tail.ts';
import { integrateSmooth, RULE_POINTS, ruleNode, ruleWeight } from './gauss-legendre.ts';
import { trapezoidError } from './orthant-peak.ts';

const CUT = -41;
const LEFT_CUT = 48;
const MAX_NODES = 20_000;
/** Halvings of the step, which the real path needs where its peak is narrower than thought. */
const MAX_REFINEMENTS = 5;

/** From this p on sinh^p is too steep for a panel as long as a step, but its series is short. */
const MARCH_LIMIT = 40;
/** So it is for tanh(x)^2 below this. */
const SERIES_LIMIT = 0.4;

/** Turn and fall of the exponent over a panel of the rule, which would keep its digits up to twice this. */
const LARGEST_TURN = 16;

/** Above this e the saddle is too near the end of the interval, or does not exist. */
const NO_SADDLE = -0.3;

/**
 * Writes the logarithm of the modulus of ((p + 1) / c)^M times the integral to `out[0]`, a bound on its
 * absolute error to `out[1]` and the sign of the integral (0 where it vanishes) to `out[2]`.
 *
 * @param tail - the symmetric beta law of exponent (p - 1)/2: sin phi has its distribution function
 * @param M - an integer >= 1
 * @param e - (p + 1) M - Q, which the caller knows without the cancellation
 */
export function betaContourKernel(
  tail: BetaTail,
  Q: number,
  M: number,
  e: number,
  out: Float64Array,
): void {
  const p = 2 * tail.b + 1;
  if (e > NO_SADDLE) collapsed(p, M, e, out);
  else throughSaddle(tail, p, Q, M, e, out);
}

/** The saddle, M f / F = Q tan a, in the variable h: M (p + 1) L(h) = Q h, L the mean excess. */
function saddleHeight(tail: BetaTail, p: number, Q: number, M: number): number {
  const ratio = Q / (M * (p + 1));
  const q = 1 / (ratio - 1);
  let h = q / Math.sqrt(q + 2);
  h /= Math.sqrt(p + 2 + h * h);
  let low = 0;
  let high = 1;
  for (let i = 0; i < 40; i++) {
    tail.centreAtHeight(h);
    const excess = Math.exp(tail.logExcess);
    const gap = excess - ratio * h;
    const slope = ((p + 1) * excess * (excess - h)) / ((1 - h) * (1 + h)) - ratio;
    if (gap > 0) low = h;
    else high = h;
    const newton = h - gap / slope;
    const next = newton > low && newton < high ? newton : 0.5 * (low + high);
    const done = Math.abs(next - h) < 1e-4 * h;
    h = next;
    if (done) break;
  }
  tail.centreAtHeight(h);
  return h;
}

function throughSaddle(
  tail: BetaTail,
  p: number,
  Q: number,
  M: number,
  e: number,
  out: Float64Array,
): void {
  const h = saddleHeight(tail, p, Q, M);
  const cosine = Math.sqrt((1 - h) * (1 + h));
  // R = F / f at the saddle
  const R0 = cosine / ((p + 1) * Math.exp(tail.logExcess));
  const rho = 1 / R0;
  const curvature = Math.max(Q, Q / cosine / cosine + M * rho * ((p * h) / cosine - rho));
  const distance = Math.acos(h);
  const step = 0.6 * Math.min(0.25, 0.55 / (distance * Math.sqrt(curvature)));
  const power = e - M;
  let fourth = 0.5 * distance;
  let second = 0;
  let odd = 0;
  let size = fourth;
  // R / R0, the logarithm of cos / cos a, and the argument of R by continuity
  let re = 1;
  let im = 0;
  let logCos = 0;
  let argCos = 0;
  let argument = 0;
  let x = 0;
  for (let j = 1; ; j++) {
    const tau = j * step;
    const next = distance * Math.sinh(tau);
    const sinh = Math.sinh(next) / cosine;
    const nextLog = 0.5 * Math.log1p(sinh * sinh);
    const nextArg = Math.atan((h / cosine) * Math.tanh(next));
    let sumRe = 0;
    let sumIm = 0;
    // no piece in which the exponent turns or falls by more than the rule resolves
    const turn = Math.abs(p) * (nextArg - argCos + nextLog - logCos);
    const pieces = Math.max(1, Math.ceil(turn / LARGEST_TURN));
    for (let piece = 0; piece < pieces; piece++) {
      const from = x + ((next - x) * piece) / pieces;
      const to = x + ((next - x) * (piece + 1)) / pieces;
      for (let i = 0; i < RULE_POINTS; i++) {
        const t = ruleNode(i, from, to);
        const s = Math.sinh(t) / cosine;
        const modulus = ruleWeight(i, from, to) * Math.exp(p * (0.5 * Math.log1p(s * s) - nextLog));
        const angle = p * (Math.atan((h / cosine) * Math.tanh(t)) - nextArg);
        sumRe += modulus * Math.cos(angle);
        sumIm += modulus * Math.sin(angle);
      }
    }
    const damping = Math.exp(p * (logCos - nextLog));
    const back = p * (argCos - nextArg);
    const c = damping * Math.cos(back);
    const d = damping * Math.sin(back);
    const nextRe = re * c - im * d - sumIm / R0;
    im = re * d + im * c + sumRe / R0;
    re = nextRe;
    x = next;
    logCos = nextLog;
    argCos = nextArg;
    const principal = Math.atan2(im, re);
    argument = principal + 2 * Math.PI * Math.round((argument - principal) / (2 * Math.PI));
    const exponent = power * logCos + 0.5 * M * Math.log(re * re + im * im);
    const jacobian = distance * Math.cosh(tau);
    const modulus = Math.exp(exponent) * jacobian;
    const term = modulus * Math.cos(power * argCos + M * argument);
    if (j % 2 === 1) odd += term;
    else if (j % 4 === 2) second += term;
    else fourth += term;
    size += modulus;
    if (modulus < 1e-18 * size * step) break;
    if (j > MAX_NODES) {
      throw new Error(`beta contour: no decay after ${j} nodes at p = ${p}, Q = ${Q}, M = ${M}`);
    }
  }
  const total = fourth + second + odd;
  const even = fourth + second;
  const excess = M * tail.logExcess;
  const width = 0.5 * e * Math.log1p(-h * h);
  out[0] = Math.log(2 * step * Math.abs(total)) + width - excess;
  out[1] =
    trapezoidError(
      Math.abs(even - odd) / Math.abs(total),
      (2 * Math.abs(fourth - second)) / Math.abs(total),
    ) +
    (size / Math.abs(total)) *
      EPSILON *
      (8 + 6 * M + 2 * Math.abs(power) + (2 * Math.sqrt(Q) * h) / cosine) +
    EPSILON * (Math.abs(width) + 2 * Math.abs(excess));
  out[2] = Math.sign(total);
}

/**
 * The integral at the collapsed line. With S = (p + 1) coth(x) int_0^x (sinh y / sinh x)^p dy the
 * integrand is sinh(x)^e (S / cosh x)^M.
 */
function collapsed(p: number, M: number, e: number, out: Float64Array): void {
  const sign = cosHalfPi(e);
  out[0] = Number.NEGATIVE_INFINITY;
  out[1] = 0;
  out[2] = Math.sign(sign);
  if (sign === 0) return;
  // The peak, but for S; in the variable t of x = peak exp(t - e^-t) it is 2 to 3 steps wide.
  const order = Math.max(e, 0) + 1;
  const peak = Math.atanh(Math.sqrt(order / (order + M - e)));
  let step = Math.min(0.06, 0.3 / (peak * Math.sqrt(M - e)));
  const rounding = EPSILON * (12 + 4 * M);
  let error = 0;
  for (let i = 0; i < MAX_REFINEMENTS; i++, step *= 0.5) {
    error = collapsedSum(p, M, e, peak, step, out);
    if (error < rounding) break;
  }
  out[0] = (out[0] as number) + Math.log(Math.abs(sign));
  out[1] =
    error +
    rounding +
    2 * EPSILON * Math.abs(out[0]) +
    (Math.abs(sign) < 0.1 ? (EPSILON * 4 * (M + 2)) / Math.abs(sign) : 0);
}

/** Writes the logarithm of the sum over nodes `step` apart to `out[0]`; returns a bound on its error. */
function collapsedSum(
  p: number,
  M: number,
  e: number,
  peak: number,
  step: number,
  out: Float64Array,
): number {
  // S only falls to the left
  const floor = (e + 1) * logSinhOf(peak) - M * logCoshOf(peak) - LEFT_CUT;
  let start = 0.57;
  for (let left = peak; (e + 1) * logSinhOf(left) - M * logCoshOf(left) > floor; ) {
    start -= 8 * step;
    left = peak * Math.exp(start - Math.exp(-start));
  }
  const sums = [0, 0, 0, 0];
  let top = Number.NEGATIVE_INFINITY;
  let x = 0;
  let logSinh = 0;
  let ratio = 0;
  for (let j = 0; ; j++) {
    const t = start + j * step;
    const shrink = Math.exp(-t);
    const next = peak * Math.exp(t - shrink);
    const nextLog = logSinhOf(next);
    const tanh = Math.tanh(next);
    const z = tanh * tanh;
    if (p >= MARCH_LIMIT || z < SERIES_LIMIT || j === 0) ratio = sinhRatio(p, z);
    else {
      const steep = (y: number): number => Math.exp(p * (logSinhOf(y) - nextLog));
      const before = ratio * Math.tanh(x) * Math.exp(p * (logSinh - nextLog));
      ratio = (before + (p + 1) * integrateSmooth(steep, x, next)) / tanh;
    }
    x = next;
    logSinh = nextLog;
    const log = e * logSinh + M * (Math.log(ratio) - logCoshOf(x)) + Math.log(x * (1 + shrink));
    if (log > top) {
      const scale = Math.exp(top - log);
      for (let i = 0; i < 4; i++) sums[i] = (sums[i] as number) * scale;
      top = log;
    }
    sums[j % 4] = (sums[j % 4] as number) + Math.exp(log - top);
    if (log < top + CUT && x > peak) break;
    if (j > MAX_NODES) {
      throw new Error(`beta contour: no decay after ${j} nodes at p = ${p}, M = ${M}, e = ${e}`);
    }
  }
  const [a, b, c, d] = sums as [number, number, number, number];
  const total = a + b + c + d;
  out[0] = top + Math.log(2 * step * total);
  return trapezoidError(Math.abs(a + c - b - d) / total, (2 * Math.abs(a - c)) / total);
}

/** S by its series 2F1(1/2, 1; (p + 3)/2; tanh(x)^2): positive terms, the faster the larger p. */
function sinhRatio(p: number, z: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 0; k < MAX_NODES && term > 1e-18 * sum; k++) {
    term *= ((2 * k + 1) / (2 * k + p + 3)) * z;
    sum += term;
  }
  return sum;
}

function logSinhOf(x: number): number {
  return x > 20 ? x - Math.LN2 : Math.log(Math.sinh(x));
}

function logCoshOf(x: number): number {
  const half = Math.sinh(0.5 * x);
  return x < 1 ? Math.log1p(2 * half * half) : x + Math.log1p(Math.exp(-2 * x)) - Math.LN2;
}

/** cos(pi e / 2), exactly 0 at odd integers. */
function cosHalfPi(e: number): number {
  const r = Math.abs(e - 4 * Math.round(e / 4));
  return r < 0.5 ? Math.cos(0.5 * Math.PI * r) : Math.sin(0.5 * Math.PI * (1 - r));
}
