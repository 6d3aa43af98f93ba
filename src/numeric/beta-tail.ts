/**
 * Upper tail and mean excess of the symmetric beta law, density c (1 - h^2)^b on [-1, 1], b > -1.
 *
 * With h = tanh s, w = 1 - h^2 and A = c / (2 (b + 1)) the tail is v(h) and the mean excess
 *
 *   L(h) = E[S | S > h] = A w^(b+1) / v(h),
 *
 * so one continued fraction gives both, and a series about h = 0 where that is slow (beta-tail-series.ts).
 *
 * Everything is taken at an offset t from a reference point s0: log w(s0 + t) - log w(s0) is found
 * to full relative accuracy, where the difference of two rounded logarithms would lose four digits
 * at b = 2500 (the peak of an order statistic is then 1e-6 wide in s).
 */
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { BetaTailSeries } from './beta-tail-series.ts';
import type { Tail, TailRange } from './tail.ts';

const HALF_LOG_PI = 0.57236494292470009;
/** Beyond this s, 1 - L is its leading term (b + 1) / (2 (b + 2)) w to double precision. */
const FAR = 18.5;
/** Below this b the law is nearly two-point and s needs the coarser variable asinh s. */
const NEARLY_TWO_POINT = -0.75;

/** The symmetric beta law as a machine that evaluates its tail; see {@link Tail}. */
export class BetaTail implements Tail {
  readonly b: number;
  /** log c */
  readonly logDensity: number;
  /** log A */
  readonly logA: number;

  shift = 0;
  logTail = 0;
  logOther = 0;
  logHazard = 0;
  logExcess = 0;
  /** v, 0 where it underflows. */
  tail = 0;
  /** 1 - L, 0 where it underflows. */
  oneMinusExcess = 0;
  /** log w */
  logWidth = 0;
  /** log w - log w0 and log L - log L0, relative to the reference point. */
  widthShift = 0;
  excessShift = 0;
  /** h */
  height = 0;
  /** s = atanh h */
  s = 0;

  private range: TailRange = 'line';
  private s0 = 0;
  private h0 = 0;
  private logWidth0 = 0;
  private logExcess0 = 0;
  private logTail0 = 0;
  /** exp(-2 |s0|) */
  private e0 = 1;
  /** asinh s0, where that is the variable */
  private u0 = 0;
  private readonly threshold: number;
  private readonly logFar: number;
  private readonly series: BetaTailSeries;

  constructor(b: number) {
    this.b = b;
    const halfStep = logGammaRatioKernel(b + 1, 0.5) - HALF_LOG_PI;
    this.logDensity = halfStep;
    this.logA = halfStep - Math.log(2 * (b + 1));
    this.threshold = 1 / (b + 3.5);
    this.series = new BetaTailSeries(b, this.threshold);
    this.logFar = Math.log((b + 1) / (2 * (b + 2)));
  }

  centreAtTail(logTail: number, range: TailRange): void {
    this.range = range;
    const target = range === 'folded' ? logTail - Math.LN2 : logTail;
    const rate = 2 * (this.b + 1);
    let s = 0;
    this.place(0);
    if (this.logTail < target) {
      // left of the centre the mirrored tail takes over: v(-s) = 1 - v(s)
      const mirrored = Math.log(-Math.expm1(target));
      s = -this.solve(mirrored, rate);
    } else {
      s = this.solve(target, rate);
    }
    // the half line has a variable of its own, s0 e^u, which needs s0 > 0
    if (range !== 'line') s = Math.max(s, 1e-3 / Math.sqrt(this.b + 1.5));
    this.place(s);
    this.fixReference();
  }

  /**
   * Takes the height h as reference point, -1 < h < 1, without rounding atanh h; `gap` is 1 - |h|, for
   * heights nearer to 1 than doubles are.
   */
  centreAtHeight(h: number, gap: number = 1 - Math.abs(h)): void {
    this.range = 'line';
    const a = Math.abs(h);
    this.s = 0.5 * Math.log((2 - gap) / gap);
    if (a < 0.5) this.s = 0.5 * Math.log1p((2 * a) / gap);
    if (h < 0) this.s = -this.s;
    this.logWidth = a < 0.4 ? Math.log1p(-h * h) : Math.log(gap) + Math.log(2 - gap);
    this.evaluate(a, gap, h < 0);
    this.fixReference();
  }

  /** Takes atanh h = s as reference point. */
  centreAtArgument(s: number): void {
    this.range = 'line';
    this.place(s);
    this.fixReference();
  }

  /** s with log v(s) = target <= -log 2; log v is concave and falls, so Newton's rule is safe. */
  private solve(target: number, rate: number): number {
    let s = 0;
    for (let i = 0; i < 60; i++) {
      this.place(s);
      const slope = rate * Math.exp(this.logExcess);
      const step = (this.logTail - target) / slope;
      s = Math.max(s + step, 0);
      // the reference point need not be exact: what counts is that it is known exactly
      if (Math.abs(this.logTail - target) < 1e-3) break;
    }
    return s;
  }

  private place(s: number): void {
    this.s = s;
    const a = Math.abs(s);
    const e = Math.exp(-2 * a);
    const h = a < 0.4 ? Math.tanh(a) : (1 - e) / (1 + e);
    this.logWidth = a < 0.4 ? Math.log1p(-h * h) : -2 * (a + Math.log1p(e) - Math.LN2);
    this.evaluate(h, (2 * e) / (1 + e), s < 0);
  }

  private fixReference(): void {
    this.s0 = this.s;
    this.h0 = this.height;
    this.logWidth0 = this.logWidth;
    this.logExcess0 = this.logExcess;
    this.logTail0 = this.logTail;
    this.e0 = Math.exp(-2 * Math.abs(this.s0));
    this.u0 = Math.asinh(this.s0);
    this.moveTo(0);
  }

  moveTo(offset: number): void {
    let t = offset;
    let logJacobian = 0;
    if (this.range !== 'line') {
      t = this.s0 * Math.expm1(offset);
      logJacobian = offset + Math.log(this.s0);
    } else if (this.b < NEARLY_TWO_POINT) {
      t = 2 * Math.cosh(this.u0 + 0.5 * offset) * Math.sinh(0.5 * offset);
      const u = Math.abs(this.u0 + offset);
      logJacobian = u + Math.log1p(Math.exp(-2 * u)) - Math.LN2;
    }
    const s = this.s0 + t;
    this.s = s;
    const difference = this.widthDifference(t, s);
    this.widthShift = difference;
    this.logWidth = this.logWidth0 + difference;
    // from the reference point, where possible: the rounding of s would cost ulp(s) at every point
    const e = s >= 0 && this.s0 >= 0 ? this.e0 * Math.exp(-2 * t) : Math.exp(-2 * Math.abs(s));
    const a = s > 0.2 || s < -0.2 ? (1 - e) / (1 + e) : Math.abs(Math.tanh(s));
    const fractionUsed = this.evaluate(a, (2 * e) / (1 + e), s < 0);
    this.excessShift = this.logExcess - this.logExcess0;
    this.shift = fractionUsed
      ? (this.b + 1) * difference - this.excessShift
      : this.logTail - this.logTail0;
    if (fractionUsed) {
      this.logTail = this.logTail0 + this.shift;
      this.tail = Math.exp(this.logTail);
    }
    this.logJacobian = logJacobian;
    this.logHazard = Math.log(2 * (this.b + 1)) + this.logExcess + logJacobian;
    if (this.range === 'folded') this.fold();
  }

  /** log w(s) - log w(s0), s = s0 + t, to full relative accuracy; w is even in s. */
  private widthDifference(t: number, s: number): number {
    const mirrored = this.s0 < 0;
    const step = mirrored ? -t : t;
    const start = mirrored ? -this.s0 : this.s0;
    if (start <= 3 && step <= 3 && step >= -3) {
      const sinh = Math.sinh(0.5 * step);
      const cosh = Math.sqrt(1 + sinh * sinh);
      return -2 * Math.log1p(2 * sinh * (sinh + Math.abs(this.h0) * cosh));
    }
    const end = mirrored ? -s : s;
    if (end < -300) return 2 * (end + Math.LN2) - this.logWidth0;
    const growth = step > -3 ? this.e0 * Math.expm1(-2 * step) : Math.exp(-2 * end) - this.e0;
    return -2 * (step + Math.log1p(growth / (1 + this.e0)));
  }

  /** The two-sided tail in place of the upper one; s > 0. */
  private fold(): void {
    const half = this.tail;
    this.logTail += Math.LN2;
    this.tail = 2 * half;
    this.logOther = half < 0.3 ? Math.log1p(-2 * half) : Math.log(2 * this.central);
  }

  /** 1/2 - v of the last evaluation near the centre. */
  private central = 0;

  /**
   * Sets the fields from a = |h|, 1 - a and `logWidth`; `s` and `logWidth` are set before.
   *
   * @returns whether log v there came through A w^(b+1) / L
   */
  private evaluate(a: number, oneMinusA: number, negative: boolean): boolean {
    const power = (this.b + 1) * this.logWidth;
    let logTail: number;
    let tail: number;
    let fractionUsed = false;
    this.height = negative ? -a : a;
    if (a * a > this.threshold) {
      fractionUsed = !negative;
      const T = this.series.fraction(Math.exp(this.logWidth) / (a * a));
      let gap = oneMinusA - a * T;
      if (this.s > FAR || this.s < -FAR) gap = Math.exp(this.logWidth + this.logFar);
      this.oneMinusExcess = gap;
      this.logExcess = gap < 0.5 ? Math.log1p(-gap) : Math.log(a + a * T);
      logTail = this.logA + power - this.logExcess;
      tail = Math.exp(logTail);
      this.central = 0.5 - tail;
    } else {
      this.central = a * Math.exp(this.logDensity + power) * this.series.central(a * a);
      tail = 0.5 - this.central;
      logTail = Math.log(tail);
      this.logExcess = this.logA + power - logTail;
      this.oneMinusExcess = -Math.expm1(this.logExcess);
    }
    if (negative) {
      this.logOther = logTail;
      this.tail = 1 - tail;
      this.logTail = Math.log1p(-tail);
      this.logExcess = this.logA + power - this.logTail;
      this.oneMinusExcess = -Math.expm1(this.logExcess);
    } else {
      this.logTail = logTail;
      this.tail = tail;
      this.logOther = Math.log1p(-tail);
    }
    return fractionUsed;
  }

  /** log of ds/du, u the variable of the range. */
  logJacobian = 0;

  /** h - h0, h0 the height of the reference point: tanh(s0 + t) - tanh(s0) without cancellation. */
  get heightShift(): number {
    const t = this.s - this.s0;
    if (t > 300 || t < -300) return this.height - this.h0;
    return Math.exp(0.5 * (this.logWidth + this.logWidth0)) * Math.sinh(t);
  }

  /** log(1 - L^k) for k > 0, also where it underflows. */
  logOneMinusPower(k: number): number {
    return this.s < 300
      ? Math.log(-Math.expm1(k * this.logExcess))
      : Math.log(k) + this.logOneMinusExcess;
  }

  /** log h for h > 0. */
  get logHeight(): number {
    if (this.s < 0.5) return Math.log(this.height);
    const e = Math.exp(-2 * this.s);
    return Math.log1p((-2 * e) / (1 + e));
  }

  /** log(1 - L), also where 1 - L underflows. */
  get logOneMinusExcess(): number {
    return this.s > FAR ? this.logWidth + this.logFar : Math.log(this.oneMinusExcess);
  }
}
