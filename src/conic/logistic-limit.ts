/**
 * The variational problem that decides whether a logistic fit exists in many dimensions.
 *
 * Notation: X, Z independent standard normal, Y = +1 with probability sigma(u), u = b + g X, and -1
 * otherwise, sigma(u) = 1/(1 + e^-u). With a = t0 + t1 X the threshold is
 *
 *   h(b, g) = min over t0, t1 of E (Y a - Z)_+^2 = min E [sigma(u) G(a) + sigma(-u) G(-a)],
 *
 * G(a) = E (a - Z)_+^2 being known in closed form. What is left is an integral over X of an analytic
 * function, for which the trapezoidal rule converges exponentially, and a smooth convex problem in two
 * unknowns, solved by Newton's method. For g < 8 the rule runs over X; beyond, the integrand lives
 * where u is of order 1, and the rule runs over u.
 *
 * Everything here is even in b, so b >= 0 is assumed throughout. Source: The phase transition for the
 * existence of the maximum likelihood estimate in high-dimensional logistic regression, Annals of
 * Statistics 48 (2020) 27-42, arXiv:1804.09753.
 */
import { normalExcess } from '../numeric/normal-excess.ts';
import { normalTailKernel } from '../special/normal.ts';

/** The rarer class must be at least this likely: the weights of the rule cover no more. */
export const RAREST_CLASS = 1e-12;

const INVERSE_SQRT_TWO_PI = 0.39894228040143267794;
/** The step at which the poles of sigma, at distance pi in u, cost less than 1e-18. */
const STEP = 0.4;
/** From this signal on the rule runs over u. */
const STRONG = 8;
/** Half the range in u: both weights and the Gaussian factor have decayed by e^-40. */
const REACH = 75;
/** Half the range in X around each class. */
const SPREAD = 11;
const MOST_STEPS = 100;

/** Nodes of the rule: v is X or u; the class weights leave out the factor `scale`. */
interface Rule {
  readonly v: Float64Array;
  readonly plus: Float64Array;
  readonly minus: Float64Array;
  readonly scale: number;
}

/** The threshold and what its second-order correction needs. */
export interface LogisticLimit {
  /** h. */
  readonly threshold: number;
  /** E (Y a - Z)_+^4 at the minimiser. */
  readonly fourth: number;
  /** The trace of E[1(. > 0) w w']^-1 E[(.)_+^2 w w'], w = (1, X), or X alone without intercept. */
  readonly trace: number;
}

function ruleFor(b: number, g: number): Rule {
  const strong = g >= STRONG;
  const step = strong ? STEP : STEP / Math.max(1, g);
  const rare = g > 0 ? -Math.min(g, b / g) : 0;
  const first = strong ? -Math.round(REACH / step) : Math.floor((rare - SPREAD) / step);
  const last = strong ? -first : Math.ceil(SPREAD / step);
  const count = last - first + 1;
  const v = new Float64Array(count);
  const plus = new Float64Array(count);
  const minus = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const node = (first + i) * step;
    const u = strong ? node : b + g * node;
    const x = strong ? (node - b) / g : node;
    const weight = step * INVERSE_SQRT_TWO_PI * Math.exp(-0.5 * x * x);
    v[i] = node;
    plus[i] = weight / (1 + Math.exp(-u));
    minus[i] = weight / (1 + Math.exp(u));
  }
  return { v, plus, minus, scale: strong ? 1 / g : 1 };
}

/** Value, gradient and Hessian of the objective, in this order, without the factor `scale`. */
const SUMS: Float64Array = /* @__PURE__ */ new Float64Array(6);
const EXCESS: Float64Array = /* @__PURE__ */ new Float64Array(5);

interface Sums {
  readonly value: number;
  readonly g0: number;
  readonly g1: number;
  readonly h00: number;
  readonly h01: number;
  readonly h11: number;
}

function sums(): Sums {
  const [value, g0, g1, h00, h01, h11] = [...SUMS] as [
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  return { value, g0, g1, h00, h01, h11 };
}

function objective(rule: Rule, t0: number, t1: number): void {
  SUMS.fill(0);
  for (let i = 0; i < rule.v.length; i++) {
    const v = rule.v[i] as number;
    const a = t0 + t1 * v;
    const t = Math.abs(a);
    const density = normalExcess(t, EXCESS);
    // E (-t - Z)_+^2 and its first two derivatives, then those at +t
    const near = 2 * (EXCESS[2] as number) * density;
    const nearSlope = 2 * (EXCESS[1] as number) * density;
    const nearCurve = 2 * (EXCESS[0] as number) * density;
    const far = 1 + t * t - near;
    const farSlope = 2 * t + nearSlope;
    const farCurve = 2 - nearCurve;
    const onFar = (a >= 0 ? rule.plus[i] : rule.minus[i]) as number;
    const onNear = (a >= 0 ? rule.minus[i] : rule.plus[i]) as number;
    const slope = (a >= 0 ? 1 : -1) * (onFar * farSlope - onNear * nearSlope);
    const curve = onFar * farCurve + onNear * nearCurve;
    SUMS[0] = (SUMS[0] as number) + onFar * far + onNear * near;
    SUMS[1] = (SUMS[1] as number) + slope;
    SUMS[2] = (SUMS[2] as number) + slope * v;
    SUMS[3] = (SUMS[3] as number) + curve;
    SUMS[4] = (SUMS[4] as number) + curve * v;
    SUMS[5] = (SUMS[5] as number) + curve * v * v;
  }
}

/** The minimiser by damped Newton steps; leaves the sums there in SUMS. */
function minimise(rule: Rule, intercept: boolean): readonly [number, number] {
  let t0 = 0;
  let t1 = 0;
  objective(rule, t0, t1);
  for (let iteration = 0; iteration < MOST_STEPS; iteration++) {
    const { value, g0, g1, h00, h01, h11 } = sums();
    const determinant = h00 * h11 - h01 * h01;
    const s0 = intercept ? (h01 * g1 - h11 * g0) / determinant : 0;
    const s1 = intercept ? (h01 * g0 - h00 * g1) / determinant : -g1 / h11;
    const decrement = -(g0 * s0 + g1 * s1);
    if (!(decrement > 0)) return [t0, t1];
    let factor = 1;
    objective(rule, t0 + s0, t1 + s1);
    while ((SUMS[0] as number) > value - 0.25 * factor * decrement && decrement > 1e-12 * value) {
      factor /= 2;
      objective(rule, t0 + factor * s0, t1 + factor * s1);
    }
    t0 += factor * s0;
    t1 += factor * s1;
    // The step squares the error of the line: nothing is left of it.
    if (decrement <= 1e-18 * value) return [t0, t1];
  }
  throw new Error(`no convergence: the threshold is at most ${(SUMS[0] as number) * rule.scale}`);
}

/** h(b, g) for b >= 0; without intercept b has to be 0, and the value is the same. */
export function logisticThresholdKernel(b: number, g: number): number {
  if (b === 0 && g === 0) return 0.5;
  const rule = ruleFor(b, g);
  minimise(rule, b > 0);
  // 1/2 is the value at t = 0; rounding may exceed it
  return Math.min(0.5, (SUMS[0] as number) * rule.scale);
}

/** The threshold with its second-order constants, for b >= 0. */
export function logisticLimit(b: number, g: number, intercept: boolean): LogisticLimit {
  if (b === 0 && g === 0) return { threshold: 0.5, fourth: 1.5, trace: intercept ? 2 : 1 };
  const rule = ruleFor(b, g);
  const [t0, t1] = minimise(rule, intercept);
  const { value, h00, h01, h11 } = sums();
  let fourth = 0;
  let b00 = 0;
  let b01 = 0;
  let b11 = 0;
  for (let i = 0; i < rule.v.length; i++) {
    const v = rule.v[i] as number;
    const a = t0 + t1 * v;
    const t = Math.abs(a);
    const square = t * t;
    const density = normalExcess(t, EXCESS);
    const near = 2 * (EXCESS[2] as number) * density;
    const near4 = 24 * (EXCESS[4] as number) * density;
    const onFar = (a >= 0 ? rule.plus[i] : rule.minus[i]) as number;
    const onNear = (a >= 0 ? rule.minus[i] : rule.plus[i]) as number;
    const second = onFar * (1 + square - near) + onNear * near;
    fourth += onFar * (square * square + 6 * square + 3 - near4) + onNear * near4;
    b00 += second;
    b01 += second * v;
    b11 += second * v * v;
  }
  // E[1(. > 0) w w'] is half the Hessian
  const trace = intercept
    ? (2 * (h11 * b00 - 2 * h01 * b01 + h00 * b11)) / (h00 * h11 - h01 * h01)
    : (2 * b11) / h11;
  return { threshold: value * rule.scale, fourth: fourth * rule.scale, trace };
}

/** Spread of the normal law that stands in for the logistic one. */
const MATCH = 1.7;

/** No larger offset leaves the rarer class a probability of 1e-12; beyond, the rule over u fails. */
function largestOffset(g: number): number {
  return g < STRONG ? Number.POSITIVE_INFINITY : 7.1 * g + 2;
}

/** P(Y = -1) for b >= 0, 0 where it is far below {@link RAREST_CLASS}; -d/db of it in `slope[0]`. */
export function rareClassShare(b: number, g: number, slope: Float64Array): number {
  if (b > largestOffset(g)) return 0;
  const { v, plus, minus, scale } = ruleFor(b, g);
  let share = 0;
  let sum = 0;
  for (let i = 0; i < v.length; i++) {
    const p = plus[i] as number;
    const m = minus[i] as number;
    // p + m is the weight of the node
    sum += p + m > 0 ? (p * m) / (p + m) : 0;
    if (g < STRONG) share += m;
    else {
      // sigma(-u) less the normal tail beyond u/MATCH, whose mean is known: small on both sides
      const u = v[i] as number;
      const tail = (p + m) * normalTailKernel(u / MATCH);
      share += u >= 0 ? m - tail : tail - p;
    }
  }
  slope[0] = sum * scale;
  if (g < STRONG) return share;
  return share * scale + normalTailKernel(b / (g * Math.sqrt(1 + (MATCH / g) * (MATCH / g))));
}

/** The b >= 0 at which P(Y = -1) is the given share, from {@link RAREST_CLASS} to 1/2. */
export function offsetOfShare(share: number, g: number): number {
  if (share === 0.5) return 0;
  if (g === 0) return Math.log1p(-share) - Math.log(share);
  const slope = new Float64Array(1);
  const log = Math.log(share);
  let b = 0;
  // The log of the share is concave in b: after the first step the approach is from one side.
  for (let iteration = 0; iteration < MOST_STEPS; iteration++) {
    const at = rareClassShare(b, g, slope);
    const step = ((Math.log(at) - log) * at) / (slope[0] as number);
    const next = Math.min(Math.max(0, b + step), largestOffset(g));
    if (Math.abs(next - b) <= 1e-14 * next) return next;
    b = next;
  }
  return b;
}
