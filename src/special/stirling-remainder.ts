/**
 * Remainder of Stirling's formula, D(x) = log Gamma(x) - (x - 1/2) log x + x - log(2 pi)/2.
 *
 * Subtracting the main part from log Gamma would lose all digits from x = 1000 on, so D is computed
 * by itself: for x >= 6 as a polynomial in 1/x^2 over x, for 1/8 <= x < 6 as a polynomial in
 * (x - 3/8)/(x + 3/8) over 12 x + 1/2, below from log Gamma(1 + x), where nothing cancels. Both
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

export function stirlingRemainder(x: number): number {
  checkAbove('stirlingRemainder', 'x', x, 0);
  return stirlingRemainderKernel(x);
}

/** {@link stirlingRemainder} without checks. */
export function stirlingRemainderKernel(x: number): number {
  if (x >= LARGE) {
    const u = 1 / x;
    return u * evaluatePolynomial(D_LARGE, u * u);
  }
  if (x >= SMALL) return evaluatePolynomial(D_MIDDLE, (x - 0.375) / (x + 0.375)) / (12 * x + 0.5);
  const log = Math.log(x);
  return logGamma1pKernel(x) + (x - x * log) - HALF_LOG_TWO_PI - 0.5 * log;
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
  if (x < SMALL) {
    // D(x) = D(x + 1) + (x + 1/2) log(1 + 1/x) - 1, differenced.
    const next = stirlingRemainderDifference(x + 1, a);
    const log = a > x ? Math.log((x / y) * ((y + 1) / (x + 1))) : Math.log1p(-a / (y * (x + 1)));
    return next + a * (Math.log1p(y) - Math.log(y)) + (x + 0.5) * log;
  }
  if (y > MIDDLE_END) return stirlingRemainderKernel(y) - stirlingRemainderKernel(x);
  // D = P(t) Q, t = (x - 3/8)/(x + 3/8), Q = 1/(12 x + 1/2)
  const s = (x - 0.375) / (x + 0.375);
  const t = (y - 0.375) / (y + 0.375);
  const qx = 1 / (12 * x + 0.5);
  const qy = 1 / (12 * y + 0.5);
  const slope = dividedDifference(D_MIDDLE, s, t) * (0.75 / ((x + 0.375) * (y + 0.375)));
  return a * qy * (slope - 12 * qx * evaluatePolynomial(D_MIDDLE, s));
}

/** D(x) x in powers of 1/x^2, x >= 6, relative error 4.4e-19. */
const D_LARGE: readonly number[] = [
  0.08333333333333333, -0.0027777777777775593, 0.0007936507934378027, -0.0005952380149179036,
  0.0008417355592101716, -0.0019158741318543258, 0.006303018543572209, -0.02531802956803021,
  0.07960721770756643,
];

/** D(x) (12 x + 1/2) in powers of (x - 3/8)/(x + 3/8), 1/8 <= x <= 8, relative error 4.9e-17. */
const D_MIDDLE: readonly number[] = [
  0.9826589621975447, 0.11939939645528153, -0.1219969313743681, 0.015153256276239589,
  0.003456043939569782, -0.005718203749843847, 0.013350156004818661, -0.01296393808229215,
  0.014017443407101161, -0.014033628676189626, 0.013596894764118121, -0.01340097970193362,
  0.012830258507694741, -0.012436809922025605, 0.011937590734616657, -0.01157406181154124,
  0.011206402205058115, -0.010440749523509532, 0.009499207671206253, -0.010046154397363042,
  0.012259505281237005, -0.01137542877999329, 0.0046588816721909, -0.0003517634917730451,
  0.007227972607428914, -0.018026086086316805, 0.019172122034054148, -0.01094789644078803,
  0.00330056691515299, -0.00041202865551352155,
];
