/**
 * The Faddeeva function w(z) = exp(-z^2) erfc(-iz) in the whole complex plane.
 *
 * In the first quadrant the defining integral (i z / pi) int exp(-t^2) / (z^2 - t^2) dt is summed by
 * the trapezoidal or the midpoint rule with step h = sqrt(pi / 13), whichever keeps its nodes at
 * least h / 4 away from Re z, and the residue of the pole at t = z that the rule leaves out is
 * added in closed form. Thirteen nodes reach full precision. Source: Computation of the complex error
 * function using modified trapezoidal rules, SIAM Journal on Numerical Analysis 59 (2021),
 * arXiv:2010.05659. Near the origin the power series takes over, far away the first convergent of
 * Laplace's continued fraction; symmetries give the other quadrants.
 */
import { checkFinite, DomainError } from '../domain.ts';
import { productError, sumError } from './double-double.ts';

/** A complex number as plain data. */
export interface ComplexNumber {
  /** Real part. */
  readonly re: number;
  /** Imaginary part. */
  readonly im: number;
}

// h = sqrt(pi / 13). Both tables hold 17 digits of their closed forms, k = 0 .. 12.
const TWO_H_OVER_PI = 0.31295607270217071;
const TWO_PI_OVER_H = 12.781346485666886;
const PI_OVER_H = 6.3906732428334428;
/** 1 / h in two doubles. */
const INVERSE_H = 2.0342144725641096;
const INVERSE_H_LOW = 4.1701925151714986e-17;
const INVERSE_SQRT_PI = 0.56418958354775629;

/** k h; the weight of the node 0 is halved because the rule covers only t >= 0. */
const TRAPEZOID_NODES: readonly number[] = [
  0, 0.49159024944872637, 0.98318049889745274, 1.4747707483461791, 1.9663609977949055,
  2.4579512472436319, 2.9495414966923582, 3.4411317461410846, 3.932721995589811, 4.4243122450385373,
  4.9159024944872637, 5.4074927439359901, 5.8990829933847165,
];
/** exp(-(k h)^2) */
const TRAPEZOID_WEIGHTS: readonly number[] = [
  0.5, 0.78532237763727509, 0.38035741846689089, 0.11361397508152955, 0.020929919814712633,
  0.0023779313882871726, 0.00016661995779637805, 7.2003012373258628e-6, 1.918979158500595e-7,
  3.1541750733300758e-9, 3.1974022640149819e-11, 1.9989627743368265e-13, 7.7074032274401436e-16,
];
/** (k + 1/2) h */
const MIDPOINT_NODES: readonly number[] = [
  0.24579512472436319, 0.73738537417308956, 1.2289756236218159, 1.7205658730705423,
  2.2121561225192687, 2.703746371967995, 3.1953366214167214, 3.6869268708654478, 4.1785171203141742,
  4.6701073697629005, 5.1616976192116269, 5.6532878686603533, 6.1448781181090796,
];
/** exp(-((k + 1/2) h)^2) */
const MIDPOINT_WEIGHTS: readonly number[] = [
  0.941373553317057, 0.58057447584485497, 0.22082580886011734, 0.051800943086725133,
  0.0074941339055707246, 0.000668653583783288, 3.6793986952623797e-5, 1.2486722750665999e-6,
  2.6134610591998732e-8, 3.3734909041837299e-10, 2.6855855973534975e-12, 1.3185433123329509e-14,
  3.9925075593106849e-17,
];

/** Beyond this |z|^2 the leading asymptotic fraction is exact to rounding. */
const FAR_SQUARED = 1e8;
/** Below it the power series is shorter, and keeps the imaginary part, where the rules would cancel. */
const NEAR_SQUARED = 0.1;
/** Below the real axis w grows like 2 exp(im^2 - re^2); 2 e^709 is still finite. */
const GROWTH_LIMIT = 709;
/** Beyond it the phase 2 re im of exp(-z^2) overflows. */
const PHASE_LIMIT = 1e150;

/**
 * The Faddeeva function (scaled complex complementary error function) at any finite point where
 * it does not overflow.
 *
 * $$ w(z) = e^{-z^2} \operatorname{erfc}(-iz), \qquad z = \mathrm{re} + i\,\mathrm{im}. $$
 *
 * On the imaginary axis $w(iy) = e^{y^2} \operatorname{erfc}(y)$, on the real axis
 * $\operatorname{Re} w(x) = e^{-x^2}$; the complementary error function of a complex argument is
 * $\operatorname{erfc}(z) = e^{-z^2} w(iz)$.
 *
 * @param re - real part of z; finite
 * @param im - imaginary part of z; finite. Where it is negative w grows like 2 exp(im^2 - re^2), so
 *   im^2 - re^2 must not exceed 709, and on the diagonals |re| = |im| it must not be below -1e150,
 *   where the phase of w is lost
 * @returns the real and the imaginary part of w(z); `{ re: 1, im: 0 }` at 0
 * @remarks Cost: constant, 13 divisions and up to seven elementary functions. Accuracy: in the closed
 * upper half-plane each of the two parts has a relative error below 4e-15, and the error of w is below
 * 1e-15 |w|; below the real axis the error of either part is below 2e-15 (|2 exp(-z^2)| + |w(-z)|),
 * which is of the size of |w| except near the zeros of w, the first at +-1.9915 - 1.3548 i.
 * @throws A {@link DomainError} if an argument is not finite or w(z) is not representable
 *
 * Source: "Computation of the complex error function using modified trapezoidal rules", SIAM Journal on
 * Numerical Analysis 59 (2021), arXiv:2010.05659.
 *
 * @example
 * ```ts
 * import { faddeeva } from 'hullgauge/special';
 * faddeeva(0, 0); // => { re: 1, im: 0 }
 * faddeeva(1, 2).re.toPrecision(12); // => '0.218492615275'
 * ```
 */
export function faddeeva(re: number, im: number): ComplexNumber {
  checkFinite('faddeeva', 're', re);
  checkFinite('faddeeva', 'im', im);
  if (im < 0) {
    const x = Math.abs(re);
    const y = -im;
    if (y > x && (y - x) * (y + x) > GROWTH_LIMIT) {
      const requirement = `at least -sqrt(re^2 + ${GROWTH_LIMIT}), as w overflows below`;
      throw new DomainError('faddeeva', 'im', requirement, im);
    }
    if (x === y && y > PHASE_LIMIT) {
      const requirement = `at least -${PHASE_LIMIT} where |re| = |im|, as the phase of w is lost`;
      throw new DomainError('faddeeva', 'im', requirement, im);
    }
  }
  const out = new Float64Array(2);
  faddeevaKernel(re, im, out);
  return { re: out[0] as number, im: out[1] as number };
}

/**
 * Writes the real and imaginary part of w(re + i im) to `out[0]` and `out[1]`. Finite arguments;
 * where im^2 - re^2 > 709 and im < 0 the parts are infinite or NaN.
 */
export function faddeevaKernel(re: number, im: number, out: Float64Array): void {
  firstQuadrant(Math.abs(re), Math.abs(im), out);
  const u = out[0] as number;
  const v = out[1] as number;
  if (im >= 0) {
    out[1] = re < 0 ? -v : v; // w(-conj z) = conj w(z)
    return;
  }
  // w(z) = 2 exp(-z^2) - w(-z)
  const x = Math.abs(re);
  const y = -im;
  const scale = 2 * expOfMinusSquare(x, y, 0);
  if (scale === 0) {
    out[0] = -u;
    out[1] = re > 0 ? v : -v;
    return;
  }
  const p = 2 * x * y;
  const low = productError(2 * x, y, p);
  const c = Math.cos(p) * Math.cos(low) - Math.sin(p) * Math.sin(low);
  const s = Math.sin(p) * Math.cos(low) + Math.cos(p) * Math.sin(low);
  // For re > 0, z^2 = (x - i y)^2 has the imaginary part -p, and w(-z) = conj w(x + i y).
  out[0] = scale * c - u;
  const imaginary = scale * s + v;
  out[1] = re < 0 ? -imaginary : imaginary;
}

/** exp(-(x^2 - y^2) - shift) with the square to twice the working precision. */
function expOfMinusSquare(x: number, y: number, shift: number): number {
  const difference = x - y;
  const sum = x + y;
  const p = difference * sum;
  if (p + shift > 746) return 0;
  const low =
    productError(difference, sum, p) +
    (difference * sumError(x, y, sum) + sum * sumError(x, -y, difference));
  return Math.exp(-p - shift) * (1 - low);
}

/** w(x + i y) for x, y >= 0. */
function firstQuadrant(x: number, y: number, out: Float64Array): void {
  const square = x * x + y * y;
  if (square > FAR_SQUARED) {
    farField(x, y, square, out);
    return;
  }
  if (square < NEAR_SQUARED) {
    nearField(x, y, out);
    return;
  }
  const poleNeeded = y < x || y < PI_OVER_H;
  // x / h = nearest integer + offset
  let offset = 0;
  let midpoint = true;
  if (poleNeeded) {
    const quotient = x * INVERSE_H;
    const low = productError(x, INVERSE_H, quotient) + x * INVERSE_H_LOW;
    offset = quotient - Math.round(quotient) + low;
    midpoint = Math.abs(offset) <= 0.25;
  }
  const nodes = midpoint ? MIDPOINT_NODES : TRAPEZOID_NODES;
  const weights = midpoint ? MIDPOINT_WEIGHTS : TRAPEZOID_WEIGHTS;
  const ySquare = y * y;
  let realSum = 0;
  let imaginarySum = 0;
  for (let k = 12; k >= 0; k--) {
    const t = nodes[k] as number;
    const tSquare = t * t;
    const near = (x - t) * (x - t) + ySquare;
    const far = (x + t) * (x + t) + ySquare;
    const g = (weights[k] as number) / (near * far); // weight / |z^2 - t^2|^2
    realSum += g * (square + tSquare);
    imaginarySum += g * ((x - t) * (x + t) + ySquare);
  }
  out[0] = TWO_H_OVER_PI * y * realSum;
  out[1] = TWO_H_OVER_PI * x * imaginarySum;
  if (poleNeeded) addPole(x, y, midpoint ? offset : offset - Math.sign(offset) / 2, out);
}

/**
 * Adds the residue 2 exp(-z^2) / (1 + exp(2 pi (y / h - i f))) that the rule leaves out, where f is
 * the distance of x from the midpoint between two nodes, in units of h (so |f| <= 1/4 and the
 * denominator is never small). Numerator and denominator are divided by exp(2 pi y / h), which
 * would overflow.
 */
function addPole(x: number, y: number, f: number, out: Float64Array): void {
  const shift = TWO_PI_OVER_H * y;
  const magnitude = 2 * expOfMinusSquare(x, y, shift);
  if (magnitude === 0) return;
  const decay = Math.exp(-shift);
  const phase = 2 * Math.PI * f;
  const denominatorRe = decay + Math.cos(phase);
  const denominatorIm = Math.sin(phase);
  const factor = magnitude / (denominatorRe * denominatorRe + denominatorIm * denominatorIm);
  const p = 2 * x * y;
  const low = productError(2 * x, y, p);
  const c = Math.cos(p) - Math.sin(p) * low;
  const s = Math.sin(p) + Math.cos(p) * low;
  out[0] = (out[0] as number) + factor * (c * denominatorRe + s * denominatorIm);
  out[1] = (out[1] as number) + factor * (c * denominatorIm - s * denominatorRe);
}

/** sum (iz)^n / Gamma(1 + n/2) */
function nearField(x: number, y: number, out: Float64Array): void {
  let re = 0;
  let im = 0;
  for (let n = RECIPROCAL_GAMMA.length - 1; n >= 0; n--) {
    const next = (RECIPROCAL_GAMMA[n] as number) - y * re - x * im;
    im = x * re - y * im;
    re = next;
  }
  out[0] = re;
  out[1] = im;
}

/** 1 / Gamma(1 + n/2), as many as |z| < 0.32 needs. */
const RECIPROCAL_GAMMA: readonly number[] = [
  1, 1.1283791670955126, 1.0, 0.75225277806367505, 0.5, 0.30090111122547002, 0.16666666666666667,
  0.085971746064420006, 0.041666666666666667, 0.019104832458760001, 0.0083333333333333333,
  0.0034736059015927275, 0.0013888888888888889, 0.00053440090793734269, 0.00019841269841269841,
  7.1253454391645692e-5, 2.4801587301587302e-5, 8.3827593401936109e-6, 2.7557319223985891e-6,
  8.8239572002038009e-7, 2.7557319223985891e-7, 8.403768762098858e-8, 2.5052108385441719e-8,
];

/** i z / (sqrt(pi) (z^2 - 1/2)); beyond 1e77 its powers overflow and i / (sqrt(pi) z) is enough. */
function farField(x: number, y: number, square: number, out: Float64Array): void {
  if (square < 1e150) {
    const u = (x - y) * (x + y) - 0.5;
    const v = 2 * x * y;
    // The quotient first: the reciprocal of |z|^4 would underflow against a tiny x or y.
    const factor = INVERSE_SQRT_PI / (u * u + v * v);
    out[0] = factor * (square + 0.5) * y;
    out[1] = factor * (square - 0.5) * x;
    return;
  }
  const larger = Math.max(x, y);
  const ratio = Math.min(x, y) / larger;
  const leading = INVERSE_SQRT_PI / larger / (1 + ratio * ratio);
  out[0] = x > y ? leading * ratio : leading;
  out[1] = x > y ? leading : leading * ratio;
}
