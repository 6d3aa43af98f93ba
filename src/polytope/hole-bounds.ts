/**
 * Rigorous bounds for the probability that a random polytope leaves a deep hole in the ball.
 *
 * The Hausdorff distance d_H of the ball and the hull of n points exceeds t = 1 - h when some direction u
 * has all points in {x : <x, u> <= h}. Write v for the probability of the cap beyond h and F = 1 - v.
 *
 * - Above: with 0 inside the hull, the shallowest facet below h has the foot of its perpendicular inside
 *   itself, which happens with a probability p that does not depend on the height; so
 *   P <= p E #{facets of height in (0, h]} + P(0 not in the hull).
 * - Below, second moment: with vac the uniform measure of the empty directions, P >= (E vac)^2 / E vac^2.
 * - Below, packing: caps beyond h with disjoint interiors are occupied with negative association, so M of
 *   them give P >= 1 - (1 - F^n)^M; M = 1/sigma always fit, sigma the uniform measure of a cap of twice the
 *   angular radius.
 */

import { wendel } from '../conic/wendel.ts';
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { RULE_POINTS, ruleNode, ruleWeight } from '../numeric/gauss-legendre.ts';
import { digammaKernel } from '../numeric/polygamma.ts';
import { complementError, errorShare } from '../numeric/stated-error.ts';
import type { Probability } from '../probability.ts';
import { logAddExpKernel, logSubExpKernel } from '../special/log-domain.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { facetModel, facetsBeyond } from './facet-measure.ts';

/** A logarithm and a bound on its error. */
export interface LogBound {
  readonly log: number;
  readonly error: number;
}

/** log P(0 not in the hull) from Wendel's probability that it is, with the error of that side. */
export function logOutside(inside: Probability): LogBound {
  return { log: inside.logComplement, error: complementError(inside) };
}

/** log of the probability that the foot of the perpendicular from 0 lies in the typical facet, d >= 2. */
export function logFootInFacet(d: number, beta: number): number {
  const m = d - 1;
  const y = d * (beta + d / 2);
  return (
    Math.log(d) -
    m * Math.LN2 +
    logGammaRatioKernel(m / 2 + beta + 1, 0.5) -
    logGammaRatioKernel(y + 0.5, 0.5)
  );
}

/**
 * log of p E #{facets of height in (0, h]}, with h = 1 - gap and 0 < gap < 1.
 */
export function logHoleCount(d: number, beta: number, count: ResolvedCount, gap: number): LogBound {
  const model = facetModel({ kind: 'law', family: 'beta', b: beta }, d);
  const below = facetsBeyond(model, count, 1 - gap, -1, gap);
  const negative = facetsBeyond(model, count, 0, -1);
  const foot = logFootInFacet(d, beta);
  const rounding = EPSILON * (4 + 2 * Math.abs(foot));
  if (!(below.log > negative.log)) return { log: Number.NEGATIVE_INFINITY, error: 0 };
  const log = logSubExpKernel(below.log, negative.log);
  const error =
    errorShare(below.log, below.error, log) + errorShare(negative.log, negative.error, log);
  return { log: foot + log, error: error + rounding };
}

/**
 * Upper bound of P(d_H > gap), 0 < gap < 1, as a logarithm at most 0 that falls with n and with gap.
 *
 * The count of holes first rises with n; there the bound is 1. It falls as soon as one point more costs
 * every hole below h more than the new choices of its d points bring: -log F(h) > psi(n + 1) - psi(n - d + 1).
 */
export function logUpperBound(
  d: number,
  beta: number,
  count: ResolvedCount,
  gap: number,
): LogBound {
  const certain = { log: 0, error: 0 };
  if (count.n <= d) return certain;
  const tail = new BetaTail(beta + (d - 1) / 2);
  tail.centreAtHeight(1 - gap, gap);
  const logLoss = tail.logTail < -30 ? tail.logTail : Math.log(-tail.logOther);
  const logGain =
    count.log > 20 + 2 * Math.log(d)
      ? Math.log(d) - count.log
      : Math.log(digammaKernel(count.n + 1) - digammaKernel(count.n - d + 1));
  if (!(logLoss > logGain + 1e-9)) return certain;
  const holes = logHoleCount(d, beta, count, gap);
  const outside = logOutside(wendel(count.n, d));
  const log = logAddExpKernel(holes.log, outside.log);
  if (!(log < 0)) return certain;
  if (log === Number.NEGATIVE_INFINITY) return { log, error: Number.POSITIVE_INFINITY };
  // each by its share: the difference of counts in `holes` has few digits where h is tiny
  const error =
    errorShare(holes.log, holes.error, log) + errorShare(outside.log, outside.error, log);
  return { log, error: error + 4 * EPSILON + EPSILON * Math.abs(log) };
}

/** Lower bound of P(d_H > gap), 0 < gap < 1: the largest of the three. */
export function logLowerBound(
  d: number,
  beta: number,
  count: ResolvedCount,
  gap: number,
): LogBound {
  if (count.n <= d) return { log: 0, error: 0 };
  const tail = new BetaTail(beta + (d - 1) / 2);
  tail.centreAtHeight(1 - gap, gap);
  const outside = logOutside(wendel(count.n, d));
  const bounds = [packingBound(d, tail, count)];
  const second = secondMomentBound(d, beta, tail, count);
  if (second !== null) bounds.push(second);
  // quadrature and the rounding of n log F, which a bound from below must not exceed
  const log = Math.min(0, Math.max(...bounds));
  if (outside.log >= log) return outside;
  const digits = tail.logTail < -30 ? 8 + 2 * (count.log - tail.logTail) : 8;
  return { log, error: 1e-8 - EPSILON * digits * logAllBelow(tail, count) };
}

/** log F^n. */
function logAllBelow(tail: BetaTail, count: ResolvedCount): number {
  return tail.logTail < -30 ? -Math.exp(count.log + tail.logTail) : count.n * tail.logOther;
}

function packingBound(d: number, tail: BetaTail, count: ResolvedCount): number {
  const logEmpty = logAllBelow(tail, count);
  // cosine of the doubled angular radius
  const cosine = 2 * tail.height * tail.height - 1;
  let logPacked = Math.LN2;
  if (d > 2) {
    const cap = new BetaTail((d - 3) / 2);
    const gap = cosine >= 0 ? 2 * Math.exp(tail.logWidth) : 1 + cosine;
    if (gap <= 0) return logEmpty;
    cap.centreAtHeight(cosine, gap);
    logPacked = -cap.logTail;
  } else {
    logPacked =
      Math.log(Math.PI) - Math.log(2 * Math.atan2(Math.exp(0.5 * tail.logWidth), tail.height));
  }
  const packed =
    logPacked < 36 ? Math.ceil(Math.exp(logPacked) * (1 - 1e-12)) : Math.exp(logPacked);
  if (packed <= 1) return logEmpty;
  const logFree = logEmpty < -37 ? -Math.exp(logEmpty) : Math.log1p(-Math.exp(logEmpty));
  const product = packed * logFree;
  // 1 - e^product; where the product underflows it is the number of caps times the probability of one
  return product === 0 || !Number.isFinite(packed)
    ? logPacked + logEmpty
    : Math.log(-Math.expm1(product));
}

/**
 * log of (E vac)^2 / E vac^2, or null where n v is too large for the quadrature (the bound is then far
 * below that of the packing or irrelevant).
 *
 * Two directions at the angle phi have both caps hit with probability J(phi); with tan(phi / 2) =
 * (sqrt(w) / h) tanh y it is J = v G(y) / G(0), G(y) the integral from y of
 * sech^(2 beta + d + 2) / (1 + x tanh^2), x = w / h^2.
 */
function secondMomentBound(
  d: number,
  beta: number,
  tail: BetaTail,
  count: ResolvedCount,
): number | null {
  const h = tail.height;
  const logMean = count.log + tail.logTail;
  if (!(logMean < Math.log(300)) || h < 1e-6) return null;
  const power = 2 * beta + d + 2;
  const x = Math.exp(tail.logWidth) / (h * h);
  const density = (y: number): number => {
    const t = Math.tanh(y);
    return Math.exp(-power * Math.log(Math.cosh(y))) / (1 + x * t * t);
  };
  // panels [0, top q^m], ..., [top q, top] of ratio q from the far end, where the density is e^-45
  const top = 45 / power + 1;
  const PANELS = 48;
  const ends = [0];
  for (let i = PANELS; i >= 0; i--) ends.push(top * 0.62 ** i);
  const integrals = new Float64Array(ends.length + 1);
  for (let i = ends.length - 2; i >= 0; i--) {
    integrals[i] =
      (integrals[i + 1] as number) + panel(density, ends[i] as number, ends[i + 1] as number);
  }
  const whole = integrals[0] as number;
  // n (J - v^2) / (1 - v)^2 through n v, which is known where n and v are not doubles
  const mean = Math.exp(logMean);
  const v = tail.tail;
  const logPower = (share: number): number => {
    const z = (share - v) / ((1 - v) * (1 - v));
    return v * Math.abs(z) < 1e-9 ? mean * z : (mean / v) * Math.log1p(v * z);
  };
  const logNorm = logGammaRatioKernel((d - 1) / 2, 0.5) - 0.5 * Math.log(Math.PI);
  const tangent = Math.sqrt(x);
  let sum = 0;
  const shift = logPower(1);
  for (let i = 0; i < ends.length - 1; i++) {
    const a = ends[i] as number;
    const b = ends[i + 1] as number;
    for (let j = 0; j < RULE_POINTS; j++) {
      const y = ruleNode(j, a, b);
      const share = ((integrals[i + 1] as number) + panel(density, y, b)) / whole;
      const half = Math.atan(tangent * Math.tanh(y));
      const cosh = Math.cosh(y);
      const cosHalf = Math.cos(half);
      const jacobian = (2 * tangent * cosHalf * cosHalf) / (cosh * cosh);
      const sine = (d - 2) * Math.log(Math.sin(2 * half));
      sum +=
        ruleWeight(j, a, b) * jacobian * Math.exp(logPower(share) - shift + (d === 2 ? 0 : sine));
    }
  }
  // directions whose caps are disjoint: J = 0 for phi beyond twice the radius
  const radius = Math.atan(tangent);
  const apart = disjointShare(d, 2 * radius);
  const near = Math.exp(logNorm + Math.log(sum) + shift);
  return -Math.log(near + apart * Math.exp(logPower(0)));
}

function panel(f: (y: number) => number, a: number, b: number): number {
  let sum = 0;
  for (let j = 0; j < RULE_POINTS; j++) sum += ruleWeight(j, a, b) * f(ruleNode(j, a, b));
  return sum;
}

/** Uniform measure of the directions at an angle of more than phi from a given one. */
function disjointShare(d: number, phi: number): number {
  if (d === 2) return 1 - phi / Math.PI;
  const cosine = Math.cos(phi);
  if (cosine >= 1) return 1;
  if (cosine <= -1) return 0;
  const cap = new BetaTail((d - 3) / 2);
  cap.centreAtHeight(cosine);
  return Math.exp(cap.logOther);
}
