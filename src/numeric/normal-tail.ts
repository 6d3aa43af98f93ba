/**
 * Upper tail of the standard normal law and its hazard phi / v, at an offset from a reference point.
 *
 * With Mills' ratio R = v / phi the offset t from h0 changes log v by
 * -t (h0 + t / 2) + log R(h0 + t) - log R(h0), which keeps its digits however far out h0 is.
 */
import { millsRatioKernel } from '../special/error-function.ts';
import { logNormalCdfKernel, normalQuantileOfLog, normalTailKernel } from '../special/normal.ts';
import type { Tail, TailRange } from './tail.ts';

const HALF_LOG_TWO_PI = 0.91893853320467274;
const SQRT_TWO_OVER_PI = 0.79788456080286536;

/** The standard normal law as a machine that evaluates its tail; see {@link Tail}. */
export class NormalTail implements Tail {
  shift = 0;
  logTail = 0;
  logOther = 0;
  logHazard = 0;
  logExcess = 0;
  /** h */
  height = 0;
  /** h - h0 */
  heightShift = 0;
  /** log of the hazard phi / v, relative to the reference point. */
  excessShift = 0;

  private range: TailRange = 'line';
  private h0 = 0;
  private logMills0 = 0;
  private logTail0 = 0;

  centreAtTail(logTail: number, range: TailRange): void {
    this.range = range;
    const target = range === 'folded' ? logTail - Math.LN2 : logTail;
    const h = -normalQuantileOfLog(target);
    this.centreAt(range === 'line' ? h : Math.max(h, 1e-3));
  }

  /** Takes the height h as reference point. */
  centreAtHeight(h: number): void {
    this.range = 'line';
    this.centreAt(h);
  }

  private centreAt(h: number): void {
    this.h0 = h;
    this.logTail0 = logNormalCdfKernel(-h);
    this.logMills0 = h > 0 ? Math.log(millsRatioKernel(h)) : this.negativeMills(h, this.logTail0);
    this.moveTo(0);
  }

  moveTo(offset: number): void {
    let t = offset;
    let logJacobian = 0;
    if (this.range !== 'line') {
      t = this.h0 * Math.expm1(offset);
      logJacobian = offset + Math.log(this.h0);
    }
    const h = this.h0 + t;
    this.height = h;
    this.heightShift = t;
    let logMills: number;
    if (h > 0) {
      logMills = Math.log(millsRatioKernel(h));
      this.shift =
        this.h0 > 0
          ? logMills - this.logMills0 - t * (this.h0 + 0.5 * t)
          : logNormalCdfKernel(-h) - this.logTail0;
      this.logTail = this.logTail0 + this.shift;
      this.logOther = Math.log1p(-Math.exp(this.logTail));
    } else {
      const other = normalTailKernel(h);
      this.logTail = Math.log1p(-other);
      this.logOther = logNormalCdfKernel(h);
      this.shift = this.logTail - this.logTail0;
      logMills = this.negativeMills(h, this.logTail);
    }
    this.logExcess = -logMills;
    this.excessShift = this.logMills0 - logMills;
    this.logHazard = logJacobian - logMills;
    if (this.range === 'folded') {
      this.logTail += Math.LN2;
      this.logOther =
        h < 0.6 ? Math.log(1 - 2 * normalTailKernel(h)) : Math.log1p(-Math.exp(this.logTail));
      if (h < 0.3) this.logOther = Math.log(h * SQRT_TWO_OVER_PI * centralSeries(h * h));
    }
  }

  private negativeMills(h: number, logTail: number): number {
    return logTail + 0.5 * h * h + HALF_LOG_TWO_PI;
  }
}

/** (2 Phi(h) - 1) / (2 h phi(0)) = sum (-y/2)^k / (k! (2k + 1)), y = h^2 < 0.1. */
function centralSeries(y: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; k < 12; k++) {
    term *= -y / (2 * k);
    sum += term / (2 * k + 1);
  }
  return sum;
}
