/**
 * A transform of the coordinate sum of a uniform point on the positive part of a sphere.
 *
 * For k >= 2 and Z >= 0, with c the sum of the coordinates of a uniform point on the part of the unit
 * sphere of R^k where all are positive, E[((k-1) + Z^2 (k - c^2)) exp(-Z^2 c^2 / 2)] is, up to the
 * constant Gamma(k/2) / (sqrt(pi) Gamma((k-1)/2)),
 *
 *   V_k(Z) = int_(-1)^1 (1-x^2)^((k-3)/2) w^(k-1) ((k-1) w + k (Z^2 (1-x^2) w + i Z sqrt(2/pi) x)) dx
 *
 * with w = w(Zx / sqrt 2), the Faddeeva function. On the real axis it cancels, so the path is moved:
 * - for small Z to x = tanh(v + i beta), with beta at the saddle where there is one;
 * - for larger Z to x = 1 + rho, rho > 0 (and its mirror image), where it is real and the algebraic
 *   part drops out.
 * Both leave sums over nodes of Re(rho^(k-1) ((k-1) a + k b)) in which only the power depends on k, so
 * the nodes of one Z serve many k, each by one multiplication more. Neither path serves for all Z: on
 * the wrong side of the switch either one loses all digits.
 */
import { EPSILON } from '../epsilon.ts';
import { millsRatioKernel } from '../special/error-function.ts';
import { faddeevaKernel } from '../special/faddeeva.ts';
import { trapezoidError } from './orthant-peak.ts';

const SQRT_HALF = Math.SQRT1_2;
const SQRT_TWO_OVER_PI = 0.79788456080286536;
const DEGREE = 0.017453292519943295;
/** Nodes whose share is below e^-43 at every k of a table are dropped. */
const CUT = 43;
/** From this Z on the imaginary parts on the real path are below 1e-17 of the real ones, squared. */
const DUAL = 9;
/** Number of k, in steps of two, that one pass over the nodes yields. */
export const BLOCK = 6;

/** Nats below the peak at which the nodes on the half line end. */
const FALL = 60;

/** Numbers to a node. */
const WIDTH = 8;

const FADDEEVA: Float64Array = /* @__PURE__ */ new Float64Array(2);

/** Ranges of k that share nodes: step for the largest, range for the smallest. */
export function tableClass(k: number): readonly [number, number] {
  if (k <= 2) return [2, 2];
  if (k <= 4) return [3, 4];
  let low = 5;
  let high = 12;
  while (k > high) {
    low = high + 1;
    high = 2 * high;
  }
  return [low, high];
}

/** The nodes of one Z for a range of k. */
export class CoordinateSumTable {
  private count = 0;
  /**
   * For each node the logarithm of the modulus and the argument of the base of the power, its square
   * over e^(2 top), a and b.
   */
  private data = new Float64Array(WIDTH * 160);
  private top = Number.NEGATIVE_INFINITY;
  /** 1 for complex numbers, 0 for dual ones (imaginary parts to first order). */
  private square = 1;
  private logScale = 0;
  /** Powers below this are left out; on the half line their factors may differ by e^500. */
  private negligible = 1e-40;

  constructor(Z: number, kMin: number, kMax: number) {
    if (Z < (kMax <= 12 ? 1.2 : 1.57)) this.fillLine(Z, kMin, kMax);
    else this.fillHalfLine(Z, kMin, kMax);
    const { data, square } = this;
    for (let at = 0; at < WIDTH * this.count; at += WIDTH) {
      const size = Math.exp(2 * ((data[at] as number) - this.top));
      const angle = 2 * (data[at + 1] as number);
      data[at + 2] = square === 1 ? size * Math.cos(angle) : size;
      data[at + 3] = size * (square === 1 ? Math.sin(angle) : angle);
    }
  }

  private push(
    logModulus: number,
    argument: number,
    a: number,
    ai: number,
    b: number,
    bi: number,
  ): void {
    const at = WIDTH * this.count++;
    if (at === this.data.length) {
      const longer = new Float64Array(2 * at);
      longer.set(this.data);
      this.data = longer;
    }
    const { data } = this;
    data[at] = logModulus;
    data[at + 1] = argument;
    data[at + 4] = a;
    data[at + 5] = ai;
    data[at + 6] = b;
    data[at + 7] = bi;
    if (logModulus > this.top) this.top = logModulus;
  }

  /** Nodes on x = tanh(v + i beta), v >= 0: the other half is the complex conjugate. */
  private fillLine(Z: number, kMin: number, kMax: number): void {
    const cap = (kMax <= 12 ? 45 : 75) * DEGREE;
    const beta = Math.min(Math.atan(saddleTangent(Z)), cap);
    const cosB = Math.cos(beta);
    const sinB = Math.sin(beta);
    const start = lineLogModulus(Z, 0, cosB, sinB);
    let spread = 1;
    while ((kMax - 1) * (lineLogModulus(Z, spread, cosB, sinB) - start) < -2 && spread > 1e-6) {
      spread *= 0.75;
    }
    const step = Math.min(
      (2 * Math.PI * (Math.PI / 2 - beta)) / (kMax <= 12 ? 44 : 56),
      spread / 7,
    );
    for (let i = 0; ; i++) {
      const v = i * step;
      const ch = Math.cosh(v) * cosB;
      const chIm = Math.sinh(v) * sinB;
      const sh = Math.sinh(v) * cosB;
      const shIm = Math.cosh(v) * sinB;
      const norm = ch * ch + chIm * chIm;
      // x = sinh / cosh, and sech^2
      const x = (sh * ch + shIm * chIm) / norm;
      const xIm = (shIm * ch - sh * chIm) / norm;
      const sech = ch / norm;
      const sechIm = -chIm / norm;
      const s2 = sech * sech - sechIm * sechIm;
      const s2Im = 2 * sech * sechIm;
      faddeevaKernel(Z * x * SQRT_HALF, Z * xIm * SQRT_HALF, FADDEEVA);
      const w = FADDEEVA[0] as number;
      const wIm = FADDEEVA[1] as number;
      const logModulus = 0.5 * (Math.log(w * w + wIm * wIm) - Math.log(norm));
      const jacobian = i === 0 ? step : 2 * step;
      this.push(
        logModulus,
        Math.atan2(wIm, w) + Math.atan2(sechIm, sech),
        jacobian * w,
        jacobian * wIm,
        jacobian * (Z * Z * (s2 * w - s2Im * wIm) - Z * SQRT_TWO_OVER_PI * xIm),
        jacobian * (Z * Z * (s2 * wIm + s2Im * w) + Z * SQRT_TWO_OVER_PI * x),
      );
      if ((kMin - 1) * (logModulus - this.top) < -CUT || i > 20_000) break;
    }
  }

  /**
   * Nodes on x = 1 + rho, rho = scale exp(t - e^-t): with w = E + i A on the real axis and
   * z = Z x, the integrand is twice the imaginary part of (x^2 - 1)^((k-3)/2) (A + i E)^(k-1)
   * (((k-1) - k Z^2 (x^2 - 1)) (A + i E) + k z sqrt(2/pi)).
   */
  private fillHalfLine(Z: number, kMin: number, kMax: number): void {
    // Near the switch the integrand oscillates, the faster the larger k.
    const fineness = Z > 1.9 ? 0.06 : Z < 1.66 && kMax > 96 ? 0.03 : 0.05;
    const step = fineness * Math.min(1, Math.sqrt(32 / kMax));
    const scale = 1 / (1 + (Z * Z) / 8);
    const first = kMin < 4 ? -4.6 : kMin < 40 ? -4 : -3.2;
    const [peak, end] = halfLineRange(Z, kMax - 1);
    const last = Math.log(end / (1 + Math.sqrt(1 + end)) / scale);
    let reference = Number.NEGATIVE_INFINITY;
    const dual = Z > DUAL;
    this.square = dual ? 0 : 1;
    this.logScale = dual ? -0.5 * Z * Z : 0;
    for (let t = first, i = 0; t < last; i++, t = first + i * step) {
      const shrink = Math.exp(-t);
      const rho = scale * Math.exp(t - shrink);
      const square = rho * (2 + rho);
      const z = Z * (1 + rho);
      faddeevaKernel(z * SQRT_HALF, 0, FADDEEVA);
      const A = FADDEEVA[1] as number;
      const E = dual ? Math.exp(-0.5 * Z * Z * square) : (FADDEEVA[0] as number);
      const logModulus =
        0.5 * (Math.log(square) + (dual ? 2 * Math.log(A) : Math.log(A * A + E * E)));
      if (square <= peak) reference = logModulus;
      const jacobian = (2 * step * rho * (1 + shrink)) / square;
      const pull = -Z * Z * square;
      // -i times the bracket, so that the real part is wanted
      this.push(
        logModulus,
        dual ? E / A : Math.atan2(E, A),
        jacobian * E,
        -jacobian * A,
        jacobian * pull * E,
        -jacobian * (pull * A + z * SQRT_TWO_OVER_PI),
      );
    }
    // Farther out the base goes on growing while the integrand falls.
    this.top = reference;
    this.negligible = 1e-250;
  }

  /**
   * log V for k, k + 2, .. (BLOCK of them) into `out` from `offset` on, and bounds on their errors
   * into `errors` from 0 on.
   */
  logBlock(k: number, out: Float64Array, errors: Float64Array, offset: number): void {
    const sums = SUMS;
    sums.fill(0);
    const { count, data, top, square } = this;
    for (let i = 0; i < count; i++) {
      const node = WIDTH * i;
      const size = Math.exp((k - 1) * ((data[node] as number) - top));
      if (size < this.negligible) continue;
      const angle = (k - 1) * (data[node + 1] as number);
      let re = square === 1 ? size * Math.cos(angle) : size;
      let im = size * (square === 1 ? Math.sin(angle) : angle);
      const re2 = data[node + 2] as number;
      const im2 = data[node + 3] as number;
      const a = data[node + 4] as number;
      const aIm = data[node + 5] as number;
      const b = data[node + 6] as number;
      const bIm = data[node + 7] as number;
      // which of the sums at one, two and four times the step the node belongs to
      const level = i & 1 ? 1 : i & 2;
      for (let m = 0; m < BLOCK; m++) {
        const q = k + 2 * m;
        const term = re * ((q - 1) * a + q * b) - im * ((q - 1) * aIm + q * bIm);
        const at = 4 * m;
        sums[at + level] = (sums[at + level] as number) + term;
        sums[at + 3] = (sums[at + 3] as number) + Math.abs(term);
        const next = re * re2 - square * im * im2;
        im = re * im2 + im * re2;
        re = next;
      }
    }
    for (let m = 0; m < BLOCK; m++) {
      const q = k + 2 * m;
      const fourth = sums[4 * m] as number;
      const odd = sums[4 * m + 1] as number;
      const second = sums[4 * m + 2] as number;
      const total = fourth + second + odd;
      const size = Math.abs(total);
      const cancellation = (sums[4 * m + 3] as number) / size;
      out[offset + m] = (q - 1) * top + Math.log(total) + this.logScale;
      errors[m] =
        trapezoidError(
          Math.abs(fourth + second - odd) / size,
          (2 * Math.abs(fourth - second)) / size,
        ) +
        EPSILON * (cancellation * (8 + 3 * q) + 2 * q * Math.abs(top) + 4);
    }
  }
}

/**
 * Where (s / (1 + s))^(m/2) e^(-Z^2 s / 2), s = x^2 - 1, about the size of the integrand, is largest, and
 * where it has fallen by FALL nats beyond.
 */
function halfLineRange(Z: number, m: number): readonly [number, number] {
  const q = m / (Z * Z);
  const peak = q / (0.5 + Math.sqrt(0.25 + q));
  const log = (s: number): number => -Math.log1p(1 / s);
  let end = peak;
  for (let i = 0; i < 20; i++) {
    end = peak + (2 * FALL) / (Z * Z) + q * (log(end) - log(peak));
  }
  return [peak, end];
}

/** Four numbers for each of the BLOCK. */
const SUMS: Float64Array = /* @__PURE__ */ new Float64Array(24);

/** log |w(Zx / sqrt 2) sech(v + i beta)| on the line. */
function lineLogModulus(Z: number, v: number, cosB: number, sinB: number): number {
  const ch = Math.cosh(v) * cosB;
  const chIm = Math.sinh(v) * sinB;
  const sh = Math.sinh(v) * cosB;
  const shIm = Math.cosh(v) * sinB;
  const norm = ch * ch + chIm * chIm;
  const x = (sh * ch + shIm * chIm) / norm;
  const xIm = (shIm * ch - sh * chIm) / norm;
  faddeevaKernel(Z * x * SQRT_HALF, Z * xIm * SQRT_HALF, FADDEEVA);
  const w = FADDEEVA[0] as number;
  const wIm = FADDEEVA[1] as number;
  return 0.5 * (Math.log(w * w + wIm * wIm) - Math.log(norm));
}

/** tan beta at the saddle of sqrt(1 - x^2) w on the imaginary axis; 6 where there is none nearby. */
function saddleTangent(Z: number): number {
  if (Z < 1e-8) return 0;
  const f = (a: number): number => 1 / millsRatioKernel(a) - a - a / (Z * Z + a * a);
  let low = 0;
  let high = 6 * Z;
  if (f(high) > 0) return 6;
  for (let i = 0; i < 12; i++) {
    const middle = 0.5 * (low + high);
    if (f(middle) > 0) low = middle;
    else high = middle;
  }
  return (0.5 * (low + high)) / Z;
}
