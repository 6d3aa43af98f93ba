/**
 * Expected share of the unit ball that the hull of random points fills, to any number of digits, by the
 * classical single integral over the signed height h of a facet's hyperplane,
 *
 *   n!/(d! (n-d-1)!) A^d c int_{-1}^{1} (1-h^2)^(d (b'+1) + b') F(h)^(n-d-1) dh,
 *
 * where b' = b + (d-1)/2 is the exponent of one coordinate, F its distribution function, c the constant
 * of its density c (1-h^2)^b' and A = c/(2 (b'+1)).
 */
import type { Decimal } from 'decimal.js';
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import {
  type Arithmetic,
  add,
  arithmetic,
  exp,
  type Float,
  isNegligible,
  log2Estimate,
  multiply,
  power,
  toFloat,
} from './arithmetic.ts';
import { integrate } from './double-exponential.ts';
import {
  checkDigits,
  compare,
  type ExactNumber,
  estimate,
  exactFraction,
  type Fraction,
  lowestTerms,
  sum,
} from './fraction.ts';
import { heightLawIn, oneMinus } from './height-law.ts';
import { bitsFor, floatToDecimal, roundCorrectly, roundQuotient } from './round-correctly.ts';

/** Most points. */
const MAX_POINTS = 1_000_000;
/** Largest dimension. */
const MAX_DIMENSION = 50;
/** Beyond so many digits only small n and d and whole powers take no more than some two seconds. */
const MANY_DIGITS = 300;
/** Most points with many digits. */
const FEW_POINTS = 100;
/** Largest dimension with many digits. */
const FEW_DIMENSIONS = 10;
/** Largest exponent of the law. */
const MAX_EXPONENT = 1000;

/** Arguments of {@link hullVolumeRatioDecimal}. */
export interface HullVolumeRatioDecimalArgs {
  /** Number of points, an integer from 0 to a million; to 100 beyond 300 digits. */
  readonly n: number;
  /** Dimension, an integer from 1 to 50; to 10 beyond 300 digits. */
  readonly d: number;
  /** Exponent of the beta law, from -1 (the uniform sphere) to 1000; 0 is the uniform ball. */
  readonly b: ExactNumber;
  /** Significant digits of the result, an integer from 1 to 1000. */
  readonly digits: number;
}

/**
 * Expected share of the unit ball of R^d that the hull of n random points fills, correctly rounded to
 * any number of digits up to 300 for d up to 50 and n up to a million, up to 1,000 for d up to
 * 10, n up to 100 and b a multiple of 1/2.
 *
 * For points of the law with density proportional to $(1-|x|^2)^b$ and with $b' = b + (d-1)/2$,
 *
 * $$ \frac{\mathbb{E} \operatorname{vol} P}{\operatorname{vol} B} = \frac{n!\, A^d c}{d!\,(n-d-1)!}
 *    \int_{-1}^{1} (1-h^2)^{d(b'+1)+b'} F(h)^{n-d-1}\, dh,
 *    \qquad A = \frac{c}{2(b'+1)}, \quad c = \frac{\Gamma(b'+\frac32)}{\sqrt\pi\,\Gamma(b'+1)}, $$
 *
 * F being the distribution function of one coordinate. The integral is summed by the trapezoidal rule
 * after the substitution $h = \tanh(\frac{\pi}{2} \sinh t)$, with steps halved until the digits agree.
 * Assumptions: as for `hullVolumeRatio`, the same question in doubles.
 *
 * @param args - `n`: an integer from 0 to a million, to 100 beyond 300 digits; `d`: an integer from 1 to
 *   50, to 10 beyond 300 digits; `b`: -1 for the uniform sphere, or a number above -1 up to 1000 (on the
 *   line at least -0.99; beyond 300 digits a multiple of 1/2), a number meaning the double exactly and
 *   text its decimal value; `digits`: an integer from 1 to 1000
 * @returns the ratio rounded to `digits` significant digits, ties to even; exactly 0 for n <= d
 * @remarks Some ten milliseconds for 30 digits, a tenth of a second where n is a million; about two
 *   seconds for 300 digits at the largest n and d, and for 1,000 digits.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * Source: "Expected intrinsic volumes and facet numbers of random beta-polytopes", Mathematische
 * Nachrichten 292 (2019), arXiv:1707.02253. Quadrature: "Double exponential formulas for numerical
 * integration", Publications of the Research Institute for Mathematical Sciences 9 (1974) 721-741,
 * doi:10.2977/prims/1195192451.
 *
 * @example
 * ```ts
 * import { hullVolumeRatioDecimal } from 'hullgauge/precise';
 * hullVolumeRatioDecimal({ n: 10, d: 2, b: 0, digits: 30 }).toString(); // => '0.419132444919352260114358806042'
 * hullVolumeRatioDecimal({ n: 10, d: 3, b: -1, digits: 12 }).toString(); // => '0.293706293706'
 * ```
 */
export function hullVolumeRatioDecimal(args: HullVolumeRatioDecimalArgs): Decimal {
  const fn = 'hullVolumeRatioDecimal';
  checkOptions(fn, args, ['n', 'd', 'b', 'digits']);
  const { n, d, digits } = args;
  checkDigits(fn, digits);
  const many = digits > MANY_DIGITS;
  checkInteger(fn, 'n', n, 0, many ? FEW_POINTS : MAX_POINTS);
  checkInteger(fn, 'd', d, 1, many ? FEW_DIMENSIONS : MAX_DIMENSION);
  const b = exponent(fn, d, args.b);
  if (many && (2n * b.numerator) % b.denominator !== 0n) {
    const requirement = `a multiple of 1/2 beyond ${MANY_DIGITS} digits`;
    throw new DomainError(fn, 'b', requirement, args.b);
  }
  if (n <= d) return roundQuotient(0n, 1n, digits);
  // beta = b' + 1
  const beta = sum(b, { numerator: BigInt(d + 1), denominator: 2n });
  // Points at the two ends of an interval: all on one side or not.
  if (beta.numerator === 0n) {
    const all = 1n << BigInt(n - 1);
    return roundQuotient(all - 1n, all, digits);
  }
  return roundCorrectly(digits, (accuracy) => volumeRatio(n, d, lowestTerms(beta), accuracy));
}

/** The ratio with a relative error below 10^-accuracy; n > d, beta > 0. */
function volumeRatio(n: number, d: number, beta: Fraction, accuracy: number): Decimal {
  const spare = 64 + Math.ceil(2 * Math.log2(n) + 2 * Math.log2(d * (2 + estimate(beta))));
  const context = arithmetic(bitsFor(accuracy, spare));
  const law = heightLawIn(context, beta);
  // n!/(d! (n - d - 1)!) is a whole number.
  let orders = 1n;
  for (let i = 0; i <= d; i++) orders = (orders * BigInt(n - i)) / BigInt(Math.max(1, i));
  const constant = exp(context, BigInt(d) * law.logMean + law.logDensity);
  const scaled = multiply(context, constant, toFloat(context.bits, orders));
  const integrand = (decay: Float, growth: Float, least: Float): Float | null => {
    const { weight, tail } = law.at(decay);
    const bound = multiply(context, power(context, weight, d + 1), growth);
    if (isNegligible(context, bound, least)) return null;
    return multiply(context, bound, bothSides(context, tail(), n - d - 1));
  };
  return floatToDecimal(
    context,
    multiply(context, scaled, integrate(context, accuracy, integrand)),
  );
}

/** (1 - v)^m + v^m for a tail v of at most 1/2. */
function bothSides(context: Arithmetic, tail: Float, m: number): Float {
  const near = power(context, oneMinus(context, tail), m);
  // Where v^m cannot matter it is not worth its multiplications.
  const odds =
    log2Estimate(context, tail) - Math.log1p(-(2 ** log2Estimate(context, tail))) / Math.LN2;
  return m * odds < -context.bits ? near : add(context, near, power(context, tail, m));
}

/** The exponent of the law as a fraction. */
function exponent(fn: string, d: number, value: unknown): Fraction {
  const least = d === 1 ? '-1 or a number from -0.99' : 'a number from -1';
  const requirement = `${least} to ${MAX_EXPONENT}`;
  const b = exactFraction(fn, 'b', value, requirement);
  const aboveSphere = sum(b, { numerator: 1n, denominator: 1n });
  const accepted =
    d === 1
      ? aboveSphere.numerator === 0n ||
        compare(aboveSphere, { numerator: 99n, denominator: 9900n }) >= 0
      : aboveSphere.numerator >= 0n;
  if (accepted && compare(b, { numerator: BigInt(MAX_EXPONENT), denominator: 1n }) <= 0) return b;
  throw new DomainError(fn, 'b', requirement, value);
}
