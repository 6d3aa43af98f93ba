/**
 * The standard normal law: both tails, their logarithms, and quantiles from either.
 */

import { checkNumber } from '../domain.ts';
import { isProbability, type Probability, probabilityFromTail } from '../probability.ts';
import { erfcxKernel, erfKernel, expOfMinusHalfSquare } from './error-function.ts';
import { log1mExpKernel } from './log-domain.ts';
import { evaluatePolynomial } from './polynomial.ts';
import { checkProbability } from './probability-argument.ts';

/** Within this distance of the median a tail is 1/2 minus half an error function. */
const CENTRE = 0.7;

/**
 * The distribution function of the standard normal law at any real x, with both tails.
 *
 * $$ \Phi(x) = \frac{1}{\sqrt{2\pi}} \int_{-\infty}^x e^{-t^2/2}\,dt $$
 *
 * @param x - a number; infinities give a certain result
 * @returns the probability of a value <= x. Beyond |x| = 1.8e154 the logarithm of the smaller tail
 *   leaves the doubles: it is `-Infinity`, with an infinite `logError`
 * @remarks Constant cost. Relative error of both tails below 1e-15 as long as they are above 1e-307, of
 *   the logarithm of the smaller tail below 7e-16.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.
 *
 * @example
 * ```ts
 * import { normalCdf } from 'hullgauge/special';
 * normalCdf(0).value; // => 0.5
 * normalCdf(10).complement.toPrecision(12); // => '7.61985302416e-24'
 * normalCdf(-100).log.toPrecision(12); // => '-5005.52420869'
 * ```
 */
export function normalCdf(x: number): Probability {
  checkNumber('normalCdf', 'x', x);
  const side = x <= 0 ? 'lower' : 'upper';
  const logTail = logNormalCdfKernel(-Math.abs(x));
  if (logTail === -Infinity) {
    return probabilityFromTail(0, logTail, side, Number.isFinite(x) ? Infinity : 0);
  }
  return probabilityFromTail(normalTailKernel(x), logTail, side, 4e-16 * (1 - logTail));
}

/**
 * The logarithm of the standard normal distribution function at any real x.
 *
 * $$ \ln\Phi(x) $$
 *
 * @param x - a number
 * @returns the logarithm, at most 0; `-Infinity` below x = -1.8e154
 * @remarks Constant cost. Relative error below 1e-15, also for large x, where the result is minus the
 *   upper tail.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.
 *
 * @example
 * ```ts
 * import { logNormalCdf } from 'hullgauge/special';
 * logNormalCdf(-100).toPrecision(12); // => '-5005.52420869'
 * ```
 */
export function logNormalCdf(x: number): number {
  checkNumber('logNormalCdf', 'x', x);
  return logNormalCdfKernel(x);
}

/**
 * The quantile of the standard normal law: the x that a value stays below with probability p.
 *
 * $$ \Phi(x) = p $$
 *
 * A {@link Probability} is inverted from its smaller tail, by its logarithm where that tail is small, so
 * that 1 - 1e-300 and e^-1000000 are as good as 0.1.
 *
 * @param p - a number from 0 to 1, or a Probability
 * @returns the quantile; `-Infinity` at 0, `Infinity` at 1
 * @remarks Constant cost: a polynomial for 0.2 <= p <= 0.8, one Halley step beyond. Relative error below
 *   7e-16.
 * @throws A {@link DomainError} if `p` is outside [0, 1], NaN or neither a number nor a Probability
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.17.
 *
 * @example
 * ```ts
 * import { Probability } from 'hullgauge';
 * import { normalQuantile } from 'hullgauge/special';
 * normalQuantile(0.975).toPrecision(12); // => '1.95996398454'
 * normalQuantile(Probability.fromLogComplement(-1e6)).toPrecision(12); // => '1414.20778299'
 * ```
 */
export function normalQuantile(p: number | Probability): number {
  checkProbability('normalQuantile', 'p', p);
  if (isProbability(p)) {
    if (Math.min(p.value, p.complement) >= 0.2) {
      return quantileNearMedian(p.value < 0.5 ? p.value - 0.5 : 0.5 - p.complement);
    }
    return p.value < 0.5 ? normalQuantileOfLog(p.log) : -normalQuantileOfLog(p.logComplement);
  }
  const q = p - 0.5;
  if (q >= -0.3 && q <= 0.3) return quantileNearMedian(q);
  return p < 0.5 ? normalQuantileOfLog(Math.log(p)) : -normalQuantileOfLog(Math.log(1 - p));
}

/** Phi(-|x|): the smaller tail beyond x. */
export function normalTailKernel(x: number): number {
  const distance = Math.abs(x);
  if (distance <= CENTRE) return 0.5 - 0.5 * erfKernel(distance * Math.SQRT1_2);
  return 0.5 * erfcxKernel(distance * Math.SQRT1_2) * expOfMinusHalfSquare(distance);
}

/** {@link logNormalCdf} without checks. */
export function logNormalCdfKernel(x: number): number {
  // + 0 turns the -0 of a vanished tail into 0
  if (x > 0) return Math.log1p(-normalTailKernel(x)) + 0;
  if (x >= -CENTRE) return Math.log(normalTailKernel(x));
  return Math.log(0.5 * erfcxKernel(-x * Math.SQRT1_2)) - x * (0.5 * x);
}

/** The x with log Phi(x) = logP, for logP <= 0; -Infinity and 0 give -Infinity and Infinity. */
export function normalQuantileOfLog(logP: number): number {
  if (logP <= -1.6) return lowerQuantile(logP);
  if (logP >= -0.223) return -lowerQuantile(log1mExpKernel(logP));
  // 2 (e^logP - 1/2) by expm1, with log 2 to twice the precision.
  return quantileNearMedian(0.5 * Math.expm1(logP + Math.LN2 + 2.3190468138462996e-17));
}

/** The x with log Phi(x) = logP, for logP <= -1.6. */
function lowerQuantile(logP: number): number {
  // Beyond, the corrections to sqrt(-2 logP) vanish; the scaling keeps -2 logP from overflowing.
  if (logP < -1e20) return -2 * Math.sqrt(-0.5 * logP);
  // One step of Halley's method on log Phi; the start is good to 2e-6, the step cubes its error.
  const x = lowerQuantileStart(logP);
  const scaled = 0.5 * erfcxKernel(-x * Math.SQRT1_2);
  const mills = SQRT_TWO_PI * scaled;
  const h = (Math.log(scaled) - x * (0.5 * x) - logP) * mills;
  return x - h / (1 + 0.5 * h * (x + 1 / mills));
}

/** A start for the tail: polynomial up to about -8, then the asymptotic series in logP. */
function lowerQuantileStart(logP: number): number {
  const z = -2 * logP;
  const s = Math.sqrt(z);
  if (s <= 8) return -s * evaluatePolynomial(TAIL_START, 1 / s);
  const l = Math.log(z) + LOG_TWO_PI;
  return -Math.sqrt(z - l + (l - 2 + (l * (0.5 * l - 3) + 7) / z) / z);
}

const SQRT_TWO_PI = 2.5066282746310005024;
const LOG_TWO_PI = 1.8378770664093454836;

/** -x/s in powers of 1/s, s = sqrt(-2 log Phi(x)), 1.788 <= s <= 8, relative error 1e-7. */
const TAIL_START: readonly number[] = [
  1.001358719710739, -0.08064274508366892, -3.104906665589566, 6.4526745976881195,
  -14.34310070980795, 25.003692901042932, -29.5794962187083, 20.69836900786413, -6.421305730975706,
];

/** The y with Phi(y) = 1/2 + q, for |q| <= 0.3. */
export function quantileNearMedian(q: number): number {
  return q * evaluatePolynomial(CENTRAL, q * q);
}

/** y/q in powers of q^2, where Phi(y) = 1/2 + q, |q| <= 0.3, relative error 1.9e-18. */
const CENTRAL: readonly number[] = [
  2.5066282746310007, 2.6249349909537094, 5.772533538640411, 15.667608951349475, 47.0357900900343,
  149.82945157904845, 496.3036480704234, 1688.0532903162123, 5952.257487700257, 18275.61722873356,
  131838.98419162692, -725779.7775267261, 13539463.92563471, -110034949.22329785, 715713767.8063973,
  -2652173976.562758, 5273258245.52393,
];
