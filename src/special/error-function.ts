/**
 * The error function of a real argument, its complement, the scaled complement and Mills' ratio.
 */

import { checkNumber } from '../domain.ts';
import { productError } from './double-double.ts';
import { evaluatePolynomial } from './polynomial.ts';

/**
 * exp(-x^2), with x^2 carried to twice the precision.
 *
 * Squaring in plain double precision would lose x^2 units in the last place: three digits at x = 26.
 */
export function expOfMinusSquare(x: number): number {
  const square = x * x;
  if (!(square < 760)) return 0;
  const value = Math.exp(-square);
  return value - value * productError(x, x, square);
}

/** exp(-x^2/2), with x^2 carried to twice the precision. */
export function expOfMinusHalfSquare(x: number): number {
  const square = x * x;
  if (!(square < 1520)) return 0;
  const value = Math.exp(-0.5 * square);
  return value - value * (0.5 * productError(x, x, square));
}

/** exp(factor x^2) for factor 1 or 1/2; Infinity where it overflows. */
function expOfSquare(x: number, factor: number): number {
  const square = x * x;
  const value = Math.exp(factor * square);
  if (value === Infinity) return value;
  return value + value * (factor * productError(x, x, square));
}

/**
 * The error function of any real x, to full relative accuracy at 0.
 *
 * $$ \operatorname{erf}(x) = \frac{2}{\sqrt\pi} \int_0^x e^{-t^2}\,dt $$
 *
 * @param x - a number
 * @returns a number from -1 to 1
 * @remarks Constant cost. Relative error below 8e-16.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.2.
 *
 * @example
 * ```ts
 * import { erf } from 'hullgauge/special';
 * erf(1).toPrecision(12); // => '0.842700792950'
 * erf(-Infinity); // => -1
 * ```
 */
export function erf(x: number): number {
  checkNumber('erf', 'x', x);
  return erfKernel(x);
}

/** {@link erf} without checks. */
export function erfKernel(x: number): number {
  if (x > 0.5) return 1 - erfcKernel(x);
  if (x < -0.5) return erfcKernel(-x) - 1;
  return x * evaluatePolynomial(ERF, x * x);
}

/** erf(x)/x in powers of x^2, |x| <= 1/2, relative error 4.1e-18. */
const ERF: readonly number[] = [
  1.1283791670955126, -0.37612638903183476, 0.11283791670925457, -0.026866170632921085,
  0.005223977373542183, -0.0008548297798086192, 0.00012053337222877719, -1.4845900896375835e-5,
  1.4726381680017032e-6,
];

/**
 * The complementary error function of any real x, to full relative accuracy in its tail.
 *
 * $$ \operatorname{erfc}(x) = 1 - \operatorname{erf}(x) = \frac{2}{\sqrt\pi} \int_x^\infty e^{-t^2}\,dt $$
 *
 * @param x - a number
 * @returns a number from 0 to 2; it underflows to 0 above x = 27.3, where {@link erfcx} goes on
 * @remarks Constant cost. Relative error below 9e-16 as long as the result is above 1e-307.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.2.
 *
 * @example
 * ```ts
 * import { erfc } from 'hullgauge/special';
 * erfc(20).toPrecision(12); // => '5.39586561161e-176'
 * ```
 */
export function erfc(x: number): number {
  checkNumber('erfc', 'x', x);
  return erfcKernel(x);
}

/** {@link erfc} without checks. */
export function erfcKernel(x: number): number {
  if (x <= 0.5) return 1 - erfKernel(x);
  return expOfMinusSquare(x) * erfcxKernel(x);
}

/**
 * The scaled complementary error function of any real x: erfc(x) times the exponential of x^2.
 *
 * $$ \operatorname{erfcx}(x) = e^{x^2} \operatorname{erfc}(x) $$
 *
 * It falls like $1/(x\sqrt\pi)$ and does not underflow.
 *
 * @param x - a number
 * @returns a positive number; `Infinity` below about x = -26.6, 0 at `Infinity`
 * @remarks Constant cost. Relative error below 7e-16.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: "Chebyshev approximation of (1+2x)exp(x^2)erfc x in 0 <= x < infinity", Mathematics of
 * Computation 36 (1981) 249-253, for the form; the coefficients are recomputed.
 *
 * @example
 * ```ts
 * import { erfcx } from 'hullgauge/special';
 * erfcx(100).toPrecision(12); // => '0.00564161378299'
 * ```
 */
export function erfcx(x: number): number {
  checkNumber('erfcx', 'x', x);
  return erfcxKernel(x);
}

/** {@link erfcx} without checks. */
export function erfcxKernel(x: number): number {
  if (x < 0) return 2 * expOfSquare(x, 1) - erfcxKernel(-x);
  if (x < 12) return evaluatePolynomial(ERFCX, (x - 4) / (x + 4)) / (1 + x);
  const u = 1 / x;
  return u * INVERSE_SQRT_PI * evaluatePolynomial(ERFCX_LARGE, u * u);
}

const INVERSE_SQRT_PI = 0.56418958354775628695;

/**
 * exp(x^2) erfc(x) (1 + x) in powers of (x - 4)/(x + 4), 0 <= x <= 12, relative error 2.6e-18. Form: Chebyshev approximation of (1 + 2x) exp(x^2) erfc x in 0 <= x < infinity,
 * Mathematics of Computation 36 (1981), doi 10.1090/S0025-5718-1981-0595058-X.
 */
const ERFCX: readonly number[] = [
  0.6849972881253069, -0.19934458280036702, 0.11704966551044275, -0.048080381221316415,
  0.003962055681262003, 0.015312509679673703, -0.017515654645352492, 0.012161784745955674,
  -0.006068735244435701, 0.0021164216484572894, -0.000389767199219774, -6.013701004454025e-5,
  6.40308516345157e-5, -1.3151591200322315e-5, -4.131774224240096e-6, 2.6572672827434515e-6,
  -5.920789590232526e-9, -3.860353811935344e-7, 4.752252594531655e-8, 6.842332479803357e-8,
  9.32564314858047e-9, -8.73591192224499e-10,
];

/** exp(x^2) erfc(x) x sqrt(pi) in powers of 1/x^2, x >= 12, relative error 1e-18. */
const ERFCX_LARGE: readonly number[] = [
  1.0, -0.499999999999981, 0.7499999999422798, -1.8749999330738412, 6.5624617919801524,
  -29.519349896661897, 160.34946343231252, -863.4188986947296,
];

/**
 * Mills' ratio of any real x: the upper tail of the standard normal law divided by its density.
 *
 * $$ M(x) = \frac{1 - \Phi(x)}{\varphi(x)} = \sqrt{\pi/2}\; \operatorname{erfcx}(x/\sqrt 2) $$
 *
 * Its inverse is the hazard rate of the normal law.
 *
 * @param x - a number
 * @returns a positive number; `Infinity` below about x = -37.6, 0 at `Infinity`
 * @remarks Constant cost. Relative error below 9e-16.
 * @throws A {@link DomainError} if `x` is NaN or not a number
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/7.8.
 *
 * @example
 * ```ts
 * import { millsRatio } from 'hullgauge/special';
 * millsRatio(10).toPrecision(12); // => '0.0990285964717'
 * ```
 */
export function millsRatio(x: number): number {
  checkNumber('millsRatio', 'x', x);
  return millsRatioKernel(x);
}

/** {@link millsRatio} without checks. */
export function millsRatioKernel(x: number): number {
  if (x >= 0) return SQRT_HALF_PI * erfcxKernel(x * Math.SQRT1_2);
  return 2 * SQRT_HALF_PI * expOfSquare(x, 0.5) - millsRatioKernel(-x);
}

/** sqrt(pi/2). */
const SQRT_HALF_PI = 1.2533141373155002512;
