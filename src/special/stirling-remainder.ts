/**
 * Remainder of Stirling's formula, D(x) = log Gamma(x) - (x - 1/2) log x + x - log(2 pi)/2.
 *
 * Subtracting the main part from log Gamma would lose all digits from x = 1000 on, so D is computed
 * by itself: for x >= 6 as a polynomial in 1/x^2 over x, for 1/8 <= x < 6 as a polynomial in
 * (x - 5/16)/(x + 5/16) over 12 x + 1/2, below from log Gamma(1 + x), where nothing cancels. Both
 * polynomials also give differences D(x + a) - D(x) as divided differences, exact for small a.
 * The expansion behind the first is https://dlmf.nist.gov/5.11.1.
 */

import { checkAbove } from '../domain.ts';
import { logGamma1pKernel } from './log-gamma.ts';
import { dividedDifference, evaluatePolynomial } from './polynomial.ts';

/** log(2 pi)/2. */
export const HALF_LOG_TWO_PI = 0.91893853320467274178;

/** From here on the polynomial in 1/x^2 is used. */
const LARGE = 6;

/** The other polynomial is good up to here, so that a difference may straddle LARGE. */
const MIDDLE_END = 8;

/** Below it the other polynomial ends. */
export const SMALL = 0.125;

/**
 * The remainder of Stirling's formula for x > 0: log Gamma(x) minus its main part.
 *
 * $$ D(x) = \ln\Gamma(x) - (x - \tfrac12) \ln x + x - \tfrac12 \ln 2\pi
 *    = \frac{1}{12 x} - \frac{1}{360 x^3} + \cdots $$
 *
 * Positive and falling. Subtracting the main part from $\ln\Gamma$ instead loses all digits from about
 * x = 1000 on.
 *
 * @param x - a number > 0
 * @returns D(x); 0 at `Infinity`
 * @remarks Constant cost. Relative error below 9e-16.
 * @throws A {@link DomainError} if `x` is not above 0
 *
 * Source: NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov/5.11.
 *
 * @example
 * ```ts
 * import { stirlingRemainder } from 'hullgauge/special';
 * stirlingRemainder(1e6).toPrecision(12); // => '8.33333333333e-8'
 * ```
 */
export function stirlingRemainder(x: number): number {
  checkAbove('stirlingRemainder', 'x', x, 0);
  return stirlingRemainderKernel(x);
}

/** {@link stirlingRemainder} without checks. */
export function stirlingRemainderKernel(x: number): number {
  if (x >= LARGE) return largeStirlingRemainder(x);
  if (x >= SMALL) return evaluatePolynomial(D_MIDDLE, (x - 0.3125) / (x + 0.3125)) / (12 * x + 0.5);
  const log = Math.log(x);
  return logGamma1pKernel(x) + (x - x * log) - HALF_LOG_TWO_PI - 0.5 * log;
}

/** {@link stirlingRemainder} for x >= 6, for callers that need not carry the rest. */
export function largeStirlingRemainder(x: number): number {
  const u = 1 / x;
  return u * evaluatePolynomial(D_LARGE, u * u);
}

/**
 * D(x + a) - D(x) for x > 0, x + a > 0, to full relative accuracy for small a.
 *
 * Where x + a rounds, the sum is what a says, not its rounded value.
 */
export function stirlingRemainderDifference(x: number, a: number): number {
  if (a < 0) return -stirlingRemainderDifference(x + a, -a);
  const y = x + a;
  if (x >= LARGE) {
    // D = u P(u^2), u = 1/x; v = 1/(x + a); v - u = -a u v
    const u = 1 / x;
    const v = 1 / y;
    const uu = u * u;
    const vv = v * v;
    const slope = dividedDifference(D_LARGE, uu, vv);
    return -a * u * v * (evaluatePolynomial(D_LARGE, vv) + u * (u + v) * slope);
  }
  if (x < SMALL && y < 1) {
    // D(x) = D(x + 1) + (x + 1/2) log(1 + 1/x) - 1, differenced.
    const log = a > x ? Math.log((x / y) * ((y + 1) / (x + 1))) : Math.log1p(-a / (y * (x + 1)));
    const shift = a * (Math.log1p(y) - Math.log(y)) + (x + 0.5) * log;
    return stirlingRemainderDifference(x + 1, a) + shift;
  }
  // Here a is not small, and the two remainders are far apart.
  if (x < SMALL || y > MIDDLE_END || a > x)
    return stirlingRemainderKernel(y) - stirlingRemainderKernel(x);
  // D = P(t) Q, t = (x - 5/16)/(x + 5/16), Q = 1/(12 x + 1/2)
  const s = (x - 0.3125) / (x + 0.3125);
  const t = (y - 0.3125) / (y + 0.3125);
  const qx = 1 / (12 * x + 0.5);
  const qy = 1 / (12 * y + 0.5);
  const slope = dividedDifference(D_MIDDLE, s, t) * (0.625 / ((x + 0.3125) * (y + 0.3125)));
  return a * qy * (slope - 12 * qx * evaluatePolynomial(D_MIDDLE, s));
}

/** D(x) x in powers of 1/x^2, x >= 6, relative error 4.4e-19. */
const D_LARGE: readonly number[] = [
  0.08333333333333333, -0.0027777777777775593, 0.0007936507934378027, -0.0005952380149179036,
  0.0008417355592101716, -0.0019158741318543258, 0.006303018543572209, -0.02531802956803021,
  0.07960721770756643,
];

/** D(x) (12 x + 1/2) in powers of (x - 5/16)/(x + 5/16), 0.11 <= x <= 8, relative error 4.4e-18. */
const D_MIDDLE: readonly number[] = [
  0.9707851274736986, 0.1407703766925383, -0.1110299888911056, -0.008488205780644097,
  0.008409104643280053, -0.012200743836768932, 0.01844352792163351, -0.015602642922365047,
  0.01719867120846732, -0.015899034461334585, 0.015478353260822348, -0.014864689613088618,
  0.014060694243212385, -0.013564909905810253, 0.012861202377997762, -0.012405691851430265,
  0.01175093044564496, -0.011001567240249402, 0.01082714605750643, -0.012081649279496844,
  0.011576748244246931, -0.004657209838002536, -3.0527564786716616e-5, -0.015004900848303391,
  0.03629699166531024, -0.02019759013597841, -0.02853904675150529, 0.04078089489580414,
  0.007293867825341466, -0.051956183821326093, 0.04692464943726244, -0.018994524710564075,
  0.0030608210636207853,
];
