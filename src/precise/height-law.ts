/**
 * The law of one coordinate of a beta-distributed point, density c (1-h^2)^(beta-1) on [-1, 1], at the
 * heights h = tanh s: the tail 1 - F(h) and powers of 1 - h^2 = sech^2 s.
 *
 * Notation: beta = b' + 1, w = 1 - h^2, A = c/(2 beta).
 */
import {
  type Arithmetic,
  exp,
  type Float,
  ln,
  multiply,
  pi,
  power,
  shift,
  toFixed,
  toFloat,
} from './arithmetic.ts';
import type { Fraction } from './fraction.ts';
import { logGammaIn } from './log-gamma.ts';
import { sumPowerSeries } from './power-series.ts';

/** The law at one height h >= 0. */
export interface HeightPoint {
  /** w^beta. */
  readonly weight: Float;
  /** The tail 1 - F(h) = F(-h), at most 1/2. */
  readonly tail: () => Float;
}

/** The law of one coordinate. */
export interface HeightLaw {
  /** ln c. */
  readonly logDensity: bigint;
  /** ln A. */
  readonly logMean: bigint;
  /** The law at h = tanh s, for e^-s given as a float at most 1. */
  at(decay: Float): HeightPoint;
}

/** The law with the exponent beta - 1, for a positive fraction beta. */
export function heightLawIn(context: Arithmetic, beta: Fraction): HeightLaw {
  const { bits, one, ln2 } = context;
  const { numerator, denominator } = beta;
  const scale = BigInt(bits);
  const half = { numerator: 2n * numerator + denominator, denominator: 2n * denominator };
  const logGamma = logGammaIn(context);
  const logOfBeta = ln(context, toFloat(bits, numerator)) - ln(context, toFloat(bits, denominator));
  // c = Gamma(beta + 1/2) / (sqrt(pi) Gamma(beta))
  const logDensity =
    logGamma(half) - logGamma(beta) - (ln(context, toFloat(bits, pi(bits), -bits)) >> 1n);
  const logMean = logDensity - logOfBeta - ln2;
  const density = exp(context, logDensity);
  const mean = exp(context, logMean);

  /** Sum of (beta + 1/2)_k / (3/2)_k (h^2)^k: the integral of the density from 0 over c h w^beta. */
  const nearCentre = (square: bigint): bigint =>
    sumPowerSeries(
      context,
      square,
      (k) => half.numerator + (k - 1n) * half.denominator,
      (k) => half.denominator * k + denominator,
    );

  /** Sum of (1/2)_k / k! beta / (beta + k) w^k: the tail over A w^beta. */
  const nearEnd = (w: bigint): bigint =>
    sumPowerSeries(
      context,
      w,
      (k) => (2n * k - 1n) * (numerator + (k - 1n) * denominator),
      (k) => 2n * k * (numerator + k * denominator),
    );

  return {
    logDensity,
    logMean,
    at(decay: Float): HeightPoint {
      const decayed = multiply(context, decay, decay);
      const sumOfOnes = one + toFixed(context, decayed);
      // sech s = 2 e^-s / (1 + e^-2s)
      const sech = toFloat(bits, (decay.mantissa << (scale + 1n)) / sumOfOnes, decay.exponent);
      const weight = powerOf(context, sech, 2n * numerator, denominator);
      const tail = (): Float => {
        const w = toFixed(context, multiply(context, sech, sech));
        if (2n * w <= one) {
          return multiply(
            context,
            multiply(context, mean, weight),
            toFloat(bits, nearEnd(w), -bits),
          );
        }
        const h = ((2n * one - sumOfOnes) << scale) / sumOfOnes;
        const inner = (nearCentre((h * h) >> scale) * h) >> scale;
        const scaled = multiply(context, density, weight);
        return toFloat(bits, (one >> 1n) - ((toFixed(context, scaled) * inner) >> scale), -bits);
      };
      return { weight, tail };
    },
  };
}

/** x^(p/q): repeated squaring where it is a whole power, logarithms otherwise. */
function powerOf(context: Arithmetic, x: Float, p: bigint, q: bigint): Float {
  if (p % q === 0n) return power(context, x, Number(p / q));
  return exp(context, (ln(context, x) * p) / q);
}

/** 1 - x for a float below 1. */
export function oneMinus({ bits, one }: Arithmetic, x: Float): Float {
  return toFloat(bits, one - shift(x.mantissa, x.exponent + bits), -bits);
}
