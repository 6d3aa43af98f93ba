/**
 * The chi-bar-squared and E-bar-squared laws: what likelihood-ratio statistics of order-restricted
 * models follow, with known and with unknown variance.
 *
 * Both are mixtures (mixture.ts) with the level probabilities of the cone as weights: of chi-squared laws
 * of j degrees of freedom, and of beta laws with the shapes j/2 and (M - j)/2, M = N - 1.
 */
import type { Distribution } from '../distribution.ts';
import { checkChoice, checkInteger, checkNumber, checkOptions, DomainError } from '../domain.ts';
import { targetOf } from '../numeric/target.ts';
import type { Probability } from '../probability.ts';
import { incompleteBetaKernel } from '../special/incomplete-beta.ts';
import { incompleteBetaInverse } from '../special/incomplete-beta-inverse.ts';
import { GAMMA_TAIL_SLOTS, gammaTailError, gammaTailKernel } from '../special/incomplete-gamma.ts';
import { gammaInverseKernel } from '../special/incomplete-gamma-inverse.ts';
import { logBetaKernel } from '../special/log-beta.ts';
import { logGammaKernel } from '../special/log-gamma.ts';
import { checkProbability } from '../special/probability-argument.ts';
import { type Cone, momentsOf } from './cone.ts';
import {
  type Component,
  checkWeights,
  type MixtureWeights,
  mixtureCdf,
  mixtureLogDensity,
  mixturePValue,
  mixtureQuantile,
  weightsOf,
  weightsOfCone,
} from './mixture.ts';

/** The law of the statistic of an order-restricted test under its null hypothesis. */
export interface OrderRestrictedLaw extends Distribution {
  /** The level probabilities: `weights[j]` belongs to j degrees of freedom. */
  readonly weights: readonly number[];
  /** P(T >= x), the p-value of an observed statistic x; 1 for x <= 0, where all the mass at 0 counts. */
  pValue(x: number): number;
  /** Log of the density of the continuous part, whose mass is `1 - weights[0]`, at x. */
  logPdf(x: number): number;
}

/** Options of {@link chiBarSquared}. */
export interface ChiBarSquaredOptions {
  /**
   * The null hypothesis for a cone that contains a linear subspace: that the mean lies in it
   * (`'lineality'`, as in "all means are equal") or that it is 0 (`'origin'`).
   */
  readonly null?: 'lineality' | 'origin';
}

/** Options of {@link eBarSquared}. */
export interface EBarSquaredOptions {
  /** Number of observations in all groups together. */
  readonly observations: number;
}

const GAMMA: Float64Array = /* @__PURE__ */ new Float64Array(GAMMA_TAIL_SLOTS);

const chiSquaredLaws: Component = {
  end: Infinity,
  tail(j: number, x: number, out: Float64Array): boolean {
    const lower = gammaTailKernel(0.5 * j, 0.5 * x, GAMMA);
    const log = (GAMMA[1] as number) + (GAMMA[2] as number);
    out[0] = GAMMA[0] as number;
    out[1] = log;
    out[2] = gammaTailError(log);
    return lower;
  },
  logDensity(j: number, x: number): number {
    if (x === Number.POSITIVE_INFINITY) return Number.NEGATIVE_INFINITY;
    const power = j === 2 ? 0 : (0.5 * j - 1) * Math.log(0.5 * x);
    return power - 0.5 * x - logGammaKernel(0.5 * j) - Math.LN2;
  },
  quantile: (j: number, p: Probability): number => 2 * gammaInverseKernel(0.5 * j, p),
};

function betaLaws(total: number): Component {
  return {
    end: 1,
    tail: (j: number, x: number, out: Float64Array): boolean =>
      incompleteBetaKernel(0.5 * j, 0.5 * (total - j), x, 1 - x, out),
    logDensity(j: number, x: number): number {
      const rest = total - j;
      const left = j === 2 ? 0 : (0.5 * j - 1) * Math.log(x);
      const right = rest === 2 ? 0 : (0.5 * rest - 1) * Math.log1p(-x);
      return left + right - logBetaKernel(0.5 * j, 0.5 * rest);
    },
    quantile: (j: number, p: Probability): number =>
      incompleteBetaInverse(0.5 * j, 0.5 * (total - j), p).x,
  };
}

function lawOf(
  fn: string,
  weights: MixtureWeights,
  components: Component,
  mean: number,
  variance: number,
): OrderRestrictedLaw {
  return {
    weights: weights.values,
    mean,
    variance,
    cdf(x: number): Probability {
      checkNumber(`${fn}.cdf`, 'x', x);
      return mixtureCdf(weights, components, x);
    },
    quantile(p: number | Probability): number {
      checkProbability(`${fn}.quantile`, 'p', p);
      return mixtureQuantile(weights, components, targetOf(p));
    },
    pValue(x: number): number {
      checkNumber(`${fn}.pValue`, 'x', x);
      return mixturePValue(weights, components, x);
    },
    logPdf(x: number): number {
      checkNumber(`${fn}.logPdf`, 'x', x);
      return mixtureLogDensity(weights, components, x);
    },
  };
}

/**
 * The chi-bar-squared distribution of an order-restricted test with known variance, from its level
 * probabilities or from a cone.
 *
 * For a standard Gaussian vector g and the nearest point $\Pi_C\, g$ of a closed convex cone,
 *
 * $$ P(\|\Pi_C\, g\|^2 > x) = \sum_{j \ge 1} w_j\, P(\chi^2_j > x), \qquad P(\|\Pi_C\, g\|^2 = 0) = w_0, $$
 *
 * $w_j$ being the j-th conic intrinsic volume of C. It is the law of the likelihood-ratio statistic of "the
 * mean is 0" against "the mean is in C"; if the null hypothesis is the subspace that C contains, as for
 * equal against ordered means, that subspace's dimension is taken off the degrees of freedom. The wrong
 * choice shifts them and can double a p-value, so a cone with a subspace has to name its null
 * hypothesis. Assumptions: normal estimates with known covariance, C in the metric of its inverse. With an
 * estimated covariance p-values are approximate and as a rule too small; {@link eBarSquared} is exact for one
 * unknown variance.
 *
 * @param weights - level probabilities indexed by degrees of freedom, with sum 1 within 1e-9, as
 *   {@link totalOrder}, {@link simpleTree} and {@link orthantWeights} give them; or a {@link Cone}
 * @param options - `null`: for a cone only, `'lineality'` or `'origin'`; may be left out if the cone contains
 *   no line
 * @returns the distribution, with `weights` and `pValue`. `cdf(0)` is the mass at 0, and `quantile(p)` is 0
 *   for all p up to it, and where it is below 1e-307; `logPdf` is that of the continuous part
 * @remarks Cost: of `cdf`, the incomplete gamma functions of the weights that matter, mostly below 60; of
 *   `quantile`, about ten times that. Accuracy for exact weights: relative error of both tails below 4e-15, of
 *   quantiles below 3e-15; `logError` adds the stated errors of a cone's volumes.
 * @throws A {@link DomainError} if the weights are no probabilities, the null hypothesis is missing or
 *   misplaced; the methods throw it for NaN or a probability outside [0, 1]
 *
 * Sources: "Order Restricted Statistical Inference", Wiley (1988); "Constrained Statistical Inference",
 * Wiley (2005).
 *
 * @example
 * ```ts
 * import { chiBarSquared, Probability, totalOrder } from 'hullgauge';
 * import { weylChamber } from 'hullgauge/conic';
 * const law = chiBarSquared(totalOrder(4)); // four groups, equal means against increasing ones
 * law.quantile(0.95).toPrecision(12); // => '4.52832560076'
 * law.pValue(6.3).toPrecision(6); // => '0.0203257'
 * law.quantile(Probability.fromComplement(1e-300)).toPrecision(12); // => '1382.35768912'
 * chiBarSquared(weylChamber('A', 4), { null: 'lineality' }).pValue(6.3).toPrecision(6); // => '0.0203257'
 * ```
 */
export function chiBarSquared(
  weights: readonly number[] | Cone,
  options: ChiBarSquaredOptions = {},
): OrderRestrictedLaw {
  const fn = 'chiBarSquared';
  checkOptions(fn, options, ['null']);
  const hypothesis = options.null;
  if (hypothesis !== undefined) checkChoice(fn, 'null', hypothesis, ['lineality', 'origin']);
  if ((weights as Cone | null)?.kind === 'cone') {
    const cone = weights as Cone;
    if (cone.lineality > 0 && hypothesis === undefined) {
      const requirement = `"lineality" or "origin" for a cone that contains a subspace of dimension ${cone.lineality}`;
      throw new DomainError(fn, 'null', requirement, hypothesis);
    }
    const from = hypothesis === 'lineality' ? cone.lineality : 0;
    const mean = cone.statisticalDimension - from;
    const variance = cone.variance + 2 * mean;
    return lawOf(fn, weightsOfCone(cone, from), chiSquaredLaws, mean, variance);
  }
  checkWeights(fn, weights);
  if (hypothesis !== undefined) {
    const requirement = 'left out: only a cone that contains a subspace leaves it open';
    throw new DomainError(fn, 'null', requirement, hypothesis);
  }
  const { mean, variance } = momentsOf(weights);
  return lawOf(fn, weightsOf(weights), chiSquaredLaws, mean, variance + 2 * mean);
}

/**
 * The E-bar-squared distribution of an order-restricted test with unknown variance, from its level
 * probabilities and the number N of observations.
 *
 * The statistic is the sum of squares that the restricted fit explains over the total sum of squares
 * about the grand mean, from 0 to 1. Under equal means
 *
 * $$ P(\bar E^2 > x) = \sum_{j \ge 1} w_j\, P\bigl(\mathrm{Beta}(\tfrac j2, \tfrac{N-1-j}2) > x\bigr),
 *    \qquad P(\bar E^2 = 0) = w_0. $$
 *
 * Assumptions: independent normal observations with one common, unknown variance, so the weights of the
 * groups in the level probabilities are their sizes; a null hypothesis of one parameter, the common mean.
 *
 * @param weights - level probabilities indexed by degrees of freedom, with sum 1 within 1e-9, as
 *   {@link totalOrder} and {@link simpleTree} give them
 * @param options - `observations`: N, an integer, at least 2 more than the last index with a positive weight
 * @returns the distribution, with `weights` and `pValue`, as {@link chiBarSquared}
 * @remarks Cost: of `cdf`, the incomplete beta functions of the weights that matter, mostly below 60.
 *   Accuracy: relative error of both tails below 5e-15.
 * @throws A {@link DomainError} if the weights are no probabilities or there are too few observations;
 *   the methods throw it for NaN or a probability outside [0, 1]
 *
 * Sources: "Order Restricted Statistical Inference", Wiley (1988); "Constrained Statistical Inference",
 * Wiley (2005).
 *
 * @example
 * ```ts
 * import { eBarSquared, totalOrder } from 'hullgauge';
 * const law = eBarSquared(totalOrder(4), { observations: 20 });
 * law.quantile(0.95).toPrecision(6); // => '0.232682'
 * law.pValue(0.3).toPrecision(6); // => '0.0226611'
 * ```
 */
export function eBarSquared(
  weights: readonly number[],
  options: EBarSquaredOptions,
): OrderRestrictedLaw {
  const fn = 'eBarSquared';
  checkWeights(fn, weights);
  checkOptions(fn, options, ['observations']);
  const checked = weightsOf(weights);
  checkInteger(fn, 'observations', options.observations, checked.top + 2);
  const total = options.observations - 1;
  const levels = momentsOf(weights);
  let within = 0;
  checked.values.forEach((weight, j) => {
    within += (weight * (2 * j) * (total - j)) / (total + 2);
  });
  const variance = (levels.variance + within) / total / total;
  return lawOf(fn, checked, betaLaws(total), levels.mean / total, variance);
}
