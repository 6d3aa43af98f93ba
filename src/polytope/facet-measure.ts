/**
 * Expected number of facets of a random polytope, by the height of the facet.
 *
 * The signed height h of the hyperplane through d of the points has a density independent of the shape
 * of the simplex they span, and the hyperplane carries a facet when the n - d others lie on one side.
 * With F the distribution function of one coordinate, v = 1 - F and w as in the tail of the law,
 *
 *   E #{facets of height in dh} = 2 binom(n, d) g(h) F(h)^(n - d) dh,
 *   g: c_a (1 - h^2)^a with a = d beta + (d^2 - 1)/2 for the beta law,
 *      c'_a (1 + h^2)^-a with a = d beta - (d^2 - 1)/2 for the beta-prime law,
 *      the density of N(0, 1/d) for the Gaussian.
 *
 * Where n is many times d this is written with the law of the d-th smallest of n uniform numbers,
 * V = v(h), which keeps its digits for any n:
 *
 *   E #{...} = (2/d) (c_a / c_b) E[(w^(b + 1/2) / v)^(d - 1); h in dh],
 *
 * and alike for the other laws, b the exponent of the marginal. For the symmetric hull of n pairs
 * V = 2 v over h > 0, with the same weight.
 */

import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { type BetaLaw, excessOf, type GaussianLaw, type ResolvedBetaPrimeLaw } from '../law.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { integrateHalfLine } from '../numeric/half-line-integral.ts';
import { NormalTail } from '../numeric/normal-tail.ts';
import { centralLogTail, logOrderDensity } from '../numeric/order-statistic.ts';
import type { TailRange } from '../numeric/tail.ts';
import { integrateUnimodal } from '../numeric/unimodal-integral.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';

const HALF_LOG_PI = 0.57236494292470009;
const HALF_LOG_TWO_PI = 0.91893853320467274;
/** Singularities of the integrands lie at |Im s| = pi/2: no piece of Gauss-Legendre is longer. */
const LONGEST_PIECE = 1.5;
/** Below this a logarithm has steps of 1e-4 and more, and what lies beyond a cut cannot be summed. */
export const UNRESOLVED = -1e12;
/** Step of the slope of such a logarithm. */
const SLOPE_STEP = 1e-3;

/** A law of points in R^d as the count of facets needs it, d >= 2. */
export interface FacetModel {
  readonly d: number;
  readonly tail: BetaTail | NormalTail;
  /** log of (2/d) times the ratio of norming constants. */
  readonly logConstant: number;
  /**
   * log of the weight under the law of the order statistic at the place of the tail, relative to that at
   * its reference point: the weight itself may have 1e5 nats.
   */
  logWeight(): number;
  /** log of the weight at the reference point, when the tail stands there. */
  logReferenceWeight(): number;
  /** log of g dh/ds at the place of the tail, relative to that at its reference point. */
  logPlain(): number;
  /** log of g dh/ds without its constant at the reference point, when the tail stands there. */
  logReferencePlain(): number;
  /** log of the constant of g. */
  readonly logPlainConstant: number;
  /** Makes height h the reference point of the tail; `gap` is 1 - |h| for a law on the unit ball. */
  centreAt(height: number, gap?: number): void;
  /** The height at the place of the tail. */
  height(): number;
  /** log of the derivative of the height by the variable of the tail. */
  logSlope(): number;
}

/** log of Gamma(x + 1/2) / (sqrt(pi) Gamma(x)), the norming constant of both beta families. */
function halfStep(x: number): number {
  return logGammaRatioKernel(x, 0.5) - HALF_LOG_PI;
}

/** The model of a law in R^d, d >= 2. */
export function facetModel(
  law: GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw,
  d: number,
): FacetModel {
  if (law.family === 'gaussian') return gaussianModel(d);
  return law.family === 'beta' ? betaModel(law.b, d) : betaPrimeModel(excessOf(law, d), d);
}

function betaModel(beta: number, d: number): FacetModel {
  const b = beta + (d - 1) / 2;
  const a = d * beta + (d * d - 1) / 2;
  const tail = new BetaTail(b);
  const norm = halfStep(a + 1);
  return {
    d,
    tail,
    logConstant: Math.log(2 / d) + norm - tail.logDensity,
    // both forms are the same number; each keeps its digits where it is used
    logWeight: () =>
      (d - 1) *
      (tail.logTail > -4
        ? (b + 0.5) * tail.widthShift - tail.shift
        : tail.excessShift - 0.5 * tail.widthShift),
    logReferenceWeight: () => (d - 1) * (tail.logExcess - tail.logA - 0.5 * tail.logWidth),
    logPlain: () => (a + 1) * tail.widthShift + tail.logJacobian,
    logReferencePlain: () => (a + 1) * tail.logWidth,
    logPlainConstant: norm,
    centreAt: (height, gap) => tail.centreAtHeight(height, gap),
    height: () => tail.height,
    logSlope: () => tail.logWidth + tail.logJacobian,
  };
}

function betaPrimeModel(excess: number, d: number): FacetModel {
  // the marginal (1 + h^2)^-(excess + 1/2) with h = sinh s has the tail of the beta law of exponent
  // excess - 1 at tanh s
  const tail = new BetaTail(excess - 1);
  // the height has the law (1 + h^2)^-(c + 1/2)
  const c = d * excess;
  const norm = halfStep(c);
  return {
    d,
    tail,
    logConstant: Math.log(2 / d) + norm - halfStep(excess),
    logWeight: () =>
      (d - 1) * (tail.logTail > -4 ? excess * tail.widthShift - tail.shift : tail.excessShift),
    logReferenceWeight: () => (d - 1) * (tail.logExcess - tail.logA),
    logPlain: () => c * tail.widthShift + tail.logJacobian,
    logReferencePlain: () => c * tail.logWidth,
    logPlainConstant: norm,
    centreAt: (height) => tail.centreAtArgument(Math.asinh(height)),
    height: () => Math.sinh(tail.s),
    logSlope: () => -0.5 * tail.logWidth + tail.logJacobian,
  };
}

function gaussianModel(d: number): FacetModel {
  const tail = new NormalTail();
  return {
    d,
    tail,
    logConstant: Math.LN2 - 0.5 * Math.log(d),
    logWeight: () => (d - 1) * tail.excessShift,
    logReferenceWeight: () => (d - 1) * (tail.logExcess + HALF_LOG_TWO_PI),
    logPlain: () => -d * tail.heightShift * (tail.height - 0.5 * tail.heightShift),
    logReferencePlain: () => -0.5 * d * tail.height * tail.height,
    logPlainConstant: 0.5 * Math.log(d) - HALF_LOG_TWO_PI,
    centreAt: (height) => tail.centreAtHeight(height),
    height: () => tail.height,
    logSlope: () => 0,
  };
}

/** Whether the plain form keeps its digits: few others than the d points of the facet. */
function fewOthers(model: FacetModel, count: ResolvedCount): boolean {
  return count.n <= 2 * model.d;
}

/** An expected number of facets by its logarithm. */
export interface FacetCount {
  readonly log: number;
  /** Bound on the absolute error of the logarithm. */
  readonly error: number;
  /** Means of the factors over the facets. */
  readonly means: readonly number[];
}

/** log of the expected number of facets of the plain or the symmetric hull, n > d. */
export function facetTotal(
  model: FacetModel,
  count: ResolvedCount,
  range: TailRange,
  factors: readonly (() => number)[] = [],
): FacetCount {
  const { d, tail } = model;
  let form: Form;
  if (range === 'line' && fewOthers(model, count)) {
    model.centreAt(0);
    form = plainForm(model, count);
  } else {
    tail.centreAtTail(centralLogTail({ m: d, n: count.n, log: count.log }), range);
    form = orderForm(model, count);
  }
  const integral = integrateUnimodal(form.at, form.width, factors);
  const error = integral.error + form.constantRounding + form.rounding(integral.peak);
  return { log: form.constant + integral.log, error, means: integral.means };
}

/** Facets on one side of a height. */
export interface FacetShare extends FacetCount {
  /** Part of `error` that a ratio of two such numbers does not have. */
  readonly commonError: number;
}

/** log of the expected number of facets with a height below (-1) or above (1) the given one, n > d. */
export function facetsBeyond(
  model: FacetModel,
  count: ResolvedCount,
  height: number,
  direction: 1 | -1,
  gap?: number,
): FacetShare {
  model.centreAt(height, gap);
  const form = localForm(model, count);
  const integral = integrateHalfLine(form.at, direction, form.width, LONGEST_PIECE);
  const { means } = integral;
  const start = form.at(0);
  if (start < UNRESOLVED && !(integral.log > UNRESOLVED)) {
    // neighbouring doubles are too far apart for an integral; it is the value at the cut over the slope
    const digits = 2 + Math.abs(count.log) + Math.abs(model.tail.logTail);
    const fall = (start - form.at(direction * SLOPE_STEP)) / SLOPE_STEP;
    const log = form.constant + start - (fall > 1 ? Math.log(fall) : 0);
    return { log, error: 1 - 4 * EPSILON * digits * start, commonError: 0, means };
  }
  if (integral.log === Number.NEGATIVE_INFINITY) {
    return { log: integral.log, error: 0, commonError: 0, means };
  }
  // the place of the cut among the order statistics is known to the rounding of log n and log v
  const atCut = Math.min(form.pull, Math.exp(form.at(0) - integral.log - model.tail.logHazard));
  const cut = EPSILON * (Math.abs(count.log) + Math.abs(model.tail.logTail) + 2) * atCut;
  const error = form.constantRounding + 4 * EPSILON + form.rounding(integral.peak) + cut;
  return { log: form.constant + integral.log, error, commonError: form.constantRounding, means };
}

/** The form that keeps its digits about the reference point at which the tail stands. */
function localForm(model: FacetModel, count: ResolvedCount): Form {
  return fewOthers(model, count) ? plainForm(model, count) : orderForm(model, count);
}

/** log of the expected number of facets per unit of height. */
export function logFacetDensity(model: FacetModel, count: ResolvedCount, height: number): number {
  model.centreAt(height);
  const form = localForm(model, count);
  return form.constant + form.at(0) - model.logSlope();
}

/** The integrand in the variable of the tail, whose reference point has been chosen. */
interface Form {
  readonly constant: number;
  /** Bound on the error of the constant, which cancels in a ratio. */
  readonly constantRounding: number;
  /** Change of the logarithm at the reference point with log n, for the form that depends on it. */
  readonly pull: number;
  readonly width: number;
  at(offset: number): number;
  rounding(peak: number): number;
}

function plainForm(model: FacetModel, count: ResolvedCount): Form {
  const { d, tail } = model;
  const { n } = count;
  const rest = n - d;
  const binomial = logBinomialKernel(n, d);
  const reference = model.logReferencePlain();
  const at = (offset: number): number => {
    tail.moveTo(offset);
    return model.logPlain() + (rest === 0 ? 0 : rest * tail.logOther);
  };
  return {
    constant: Math.LN2 + binomial + model.logPlainConstant + reference,
    constantRounding:
      EPSILON * (2 + 2 * binomial + Math.abs(model.logPlainConstant) + Math.abs(reference)),
    pull: 0,
    width: Math.min(1, 1 / (d * Math.exp(tail.logHazard))),
    at,
    rounding: (peak) => EPSILON * (4 + 2 * Math.abs(at(peak))),
  };
}

function orderForm(model: FacetModel, count: ResolvedCount): Form {
  const { d, tail } = model;
  const reference = model.logReferenceWeight();
  const density = logOrderDensity(tail, { m: d, n: count.n, log: count.log });
  return {
    constant: model.logConstant + reference + density.constant,
    constantRounding: 2 * EPSILON * (Math.abs(model.logConstant) + Math.abs(reference)),
    pull: density.pull,
    width: Math.min(1, Math.exp(-tail.logHazard) / Math.sqrt(d)),
    at: (offset) => density.at(offset) + model.logWeight(),
    rounding: (peak) => density.rounding(peak, model.logWeight),
  };
}
