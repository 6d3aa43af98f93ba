/**
 * How deep the typical facet of a random polytope cuts.
 */
import { type Count, type ResolvedCount, resolveCount } from '../count.ts';
import type { Distribution } from '../distribution.ts';
import { checkNumber, checkOptions } from '../domain.ts';
import { type BetaLaw, checkLaw, type GaussianLaw, type Law } from '../law.ts';
import { targetOf } from '../numeric/target.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { checkProbability } from '../special/probability-argument.ts';
import {
  type FacetCount,
  type FacetModel,
  facetModel,
  facetsBeyond,
  facetTotal,
  logFacetDensity,
  UNRESOLVED,
} from './facet-measure.ts';
import { checkDimension, resolveMarginal } from './hull-options.ts';

const FAMILIES = ['beta', 'gaussian'] as const;
const MAX_STEPS = 200;
/** Standard deviations beyond which an integral from the far side would miss the bulk. */
const FAR = 1e4;
/** Beyond it exponents overflow. */
const LARGEST_SQUARE = 1e280;

/** Options of {@link facetHeight}. */
export interface FacetHeightArgs {
  /** Number of points, above d. */
  readonly n: Count;
  /** Dimension, from 2 to a million. */
  readonly d: number;
  /** A beta law or the Gaussian. */
  readonly law: Law;
}

/** The law of the height of the typical facet. */
export interface FacetHeight extends Distribution {
  /** Natural logarithm of the density. */
  logPdf(x: number): number;
  /**
   * The height of the limit theorem for d to infinity with log(n)/d fixed: $\sqrt{1 - n^{-2/d}}$ for a
   * beta law, $\sqrt{2 \ln n}$ for the Gaussian.
   */
  readonly limit: number;
}

/**
 * Law of the signed height of the typical facet of the hull of n random points, for n > d >= 2: how far
 * from the centre the hull is cut, facets counted equally.
 *
 * Its density is proportional to $(1 - h^2)^a F(h)^{n-d}$ on $[-1, 1]$ with $a = d\beta + (d^2 - 1)/2$ for
 * the beta law, F the distribution function of one coordinate, and to $e^{-d h^2/2}\, \Phi(h)^{n-d}$ for the
 * Gaussian. A negative height means that the centre lies beyond the facet. The height rises with n in
 * distribution.
 *
 * `limit` stands beside the exact law: it is approached slowly, with an error of the order
 * $\ln d / d$ (0.795 against an exact mean of 0.786 at d = 500 and log n = 250 on the sphere).
 *
 * Assumes independent points of one of these laws; for another law it is nothing.
 *
 * Cost: a fraction of a millisecond for each value of the cdf, a few milliseconds for a quantile. Accuracy:
 * bounded by the `logError` of each probability; mean 1e-14, variance 1e-12 relative up to d = 5000.
 *
 * Source: Facets of spherical random polytopes, arXiv:1908.04033.
 *
 * @param args - `n`: an integer > d or a `LogNumber`; `d`: an integer from 2 to a million; `law`: a beta
 * law or `gaussian()`
 * @returns mean, variance, cdf, quantile, logPdf and the limit
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { facetHeight, uniformSphere } from 'hullgauge';
 * // on the sphere of R^3, (1 + H)/2 has the law Beta(n - 1, 2)
 * const height = facetHeight({ n: 30, d: 3, law: uniformSphere() });
 * height.mean.toPrecision(12); // => (27 / 31).toPrecision(12)
 * height.cdf(0.7).value.toPrecision(8); // => '0.048028899'
 * ```
 */
export function facetHeight(args: FacetHeightArgs): FacetHeight {
  const fn = 'facetHeight';
  checkOptions(fn, args, ['n', 'd', 'law']);
  const { d } = args;
  checkDimension(fn, d, 2);
  const law = checkLaw(fn, args.law, FAMILIES, d) as BetaLaw | GaussianLaw;
  if (law.family === 'beta') resolveMarginal(fn, law, d);
  const count = resolveCount(fn, 'n', args.n, d + 1);
  const model = facetModel(law, d);
  const bounded = law.family === 'beta';
  const { mean, variance, total } = heightMoments(model, count);
  const deviation = Math.sqrt(variance);
  const cdf = (x: number): Probability => {
    checkNumber('facetHeight.cdf', 'x', x);
    if (Math.abs(x) === Number.POSITIVE_INFINITY || (bounded && Math.abs(x) >= 1)) {
      return certainty(x >= 0);
    }
    return heightCdf(model, count, total, x, (x - mean) / deviation);
  };
  return Object.freeze({
    mean,
    variance,
    cdf,
    quantile: (p: number | Probability): number => {
      checkProbability('facetHeight.quantile', 'p', p);
      const target = targetOf(p);
      const end = bounded ? 1 : Number.POSITIVE_INFINITY;
      if (target.log === Number.NEGATIVE_INFINITY) return -end;
      if (target.logComplement === Number.NEGATIVE_INFINITY) return end;
      return heightQuantile(model, count, total, target, mean, deviation, end);
    },
    logPdf: (x: number): number => {
      checkNumber('facetHeight.logPdf', 'x', x);
      if ((bounded && Math.abs(x) >= 1) || d * x * x > LARGEST_SQUARE) {
        return Number.NEGATIVE_INFINITY;
      }
      return logFacetDensity(model, count, x) - total.log;
    },
    limit: bounded ? Math.sqrt(-Math.expm1((-2 * count.log) / d)) : Math.sqrt(2 * count.log),
  });
}

/** Mean and variance, about the height of the reference point of the integral, and the number of facets. */
function heightMoments(
  model: FacetModel,
  count: ResolvedCount,
): { mean: number; variance: number; total: FacetCount } {
  const { tail } = model;
  let start = Number.NaN;
  const shift = (): number => {
    if (Number.isNaN(start)) start = tail.height - tail.heightShift;
    return tail.heightShift;
  };
  const first = facetTotal(model, count, 'line', [shift]);
  const middle = first.means[0] as number;
  const square = (): number => {
    const x = tail.heightShift - middle;
    return x * x;
  };
  const second = facetTotal(model, count, 'line', [square]);
  return { mean: start + middle, variance: second.means[0] as number, total: first };
}

/** The cdf at x, which lies `offset` standard deviations from the mean. */
function heightCdf(
  model: FacetModel,
  count: ResolvedCount,
  total: FacetCount,
  x: number,
  offset: number,
): Probability {
  if (!(Math.abs(offset) < FAR)) return farCdf(model, count, total, x, offset);
  const below = facetsBeyond(model, count, x, -1);
  const above = facetsBeyond(model, count, x, 1);
  const lower = below.log <= above.log;
  const small = lower ? below : above;
  const large = lower ? above : below;
  const log = small.log - large.log - Math.log1p(Math.exp(small.log - large.log));
  const error = small.error - small.commonError + large.error - large.commonError;
  // neither integral is resolved beside so many points
  if (!(error < 1)) return farCdf(model, count, total, x, offset);
  return probabilityFromTail(Math.exp(log), log, lower ? 'lower' : 'upper', error);
}

/** The same so far from the mean that one side has all but nothing. */
function farCdf(
  model: FacetModel,
  count: ResolvedCount,
  total: FacetCount,
  x: number,
  offset: number,
): Probability {
  const side = offset < 0 ? 'lower' : 'upper';
  if (!(offset * offset < LARGEST_SQUARE)) {
    return probabilityFromTail(0, Number.NEGATIVE_INFINITY, side, Number.POSITIVE_INFINITY);
  }
  const beyond = facetsBeyond(model, count, x, offset < 0 ? -1 : 1);
  const log = Math.min(0, beyond.log - total.log);
  return probabilityFromTail(Math.exp(log), log, side, beyond.error + total.error);
}

/** The largest double below 1, and where heights of the unit ball come near it. */
const LAST_BELOW_ONE = 0.99999999999999989;
const NEARLY_ONE = 0.999999999;
/** Deviation over mean below which neighbouring doubles tell heights apart too coarsely for Newton's rule. */
const COARSE = 1e-12;

/**
 * Newton's rule for the logarithm of the smaller tail, or the logarithm of that, between brackets.
 */
function heightQuantile(
  model: FacetModel,
  count: ResolvedCount,
  total: FacetCount,
  target: Probability,
  mean: number,
  deviation: number,
  end: number,
): number {
  const lower = target.log <= target.logComplement;
  const goal = lower ? target.log : target.logComplement;
  const sign = lower ? 1 : -1;
  const gapAt = (x: number): number => {
    const p = heightCdf(model, count, total, x, (x - mean) / deviation);
    return (lower ? p.log : p.logComplement) - goal;
  };
  // between the last double below 1 and 1
  if (end === 1 && mean > NEARLY_ONE && gapAt(LAST_BELOW_ONE) * sign < 0) return end;
  let x = Math.min(mean, end === 1 ? LAST_BELOW_ONE : end);
  let low = -end;
  let high = end;
  // Where the whole law lies between a few doubles the least is wanted that reaches the target.
  const coarse = deviation < COARSE * Math.abs(mean);
  for (let i = 0; i < MAX_STEPS; i++) {
    const gap = gapAt(x);
    const log = gap + goal;
    if (gap === 0) return x;
    // the cdf rises: too much of the lower tail, or too little of the upper one, means x is too high
    if (gap * sign > 0) high = x;
    else low = x;
    const slope = Math.exp(logFacetDensity(model, count, x) - total.log - log);
    // far out the logarithm itself falls like n times a tail: Newton's rule for its logarithm
    const change = log < -1 && goal < -1 ? log * Math.log(log / goal) : Math.min(gap, 3);
    let next = x - (sign * change) / slope;
    // beyond UNRESOLVED the quotient of two such small numbers is noise: bisect
    if (!(next > low && next < high) || log < UNRESOLVED || coarse) {
      next = Number.isFinite(low + high) ? 0.5 * (low + high) : x - 2 * sign * Math.sign(gap);
      if (coarse && !(next > low && next < high)) return high;
    }
    if (!coarse && Math.abs(next - x) <= 2.3e-16 * Math.abs(x) + 1e-17 * deviation) return next;
    x = next;
  }
  throw new Error(
    `facetHeight.quantile: no convergence, the height lies between ${low} and ${high}`,
  );
}
