/**
 * The parity sequence of a fixed query: terms that do not depend on the dimension.
 *
 * For n independent standard normal points and a query at distance r from their mean,
 *
 *   B_k = (1 / (2 pi)) int Binomial(k; n, Q(y)) (sech u / erfcx(y / sqrt 2))^k V_k(r sech u) du,
 *   y = r tanh u,  k >= 1,   B_0 = (Phi(r)^n + Phi(-r)^n) / 2,
 *
 * are positive and sum to 1/2 over the even k and over the odd k; V_k is the transform of
 * coordinate-sum-transform.ts. They come from the conic
 * Crofton formula given the coordinate of the points along the query.
 *
 * The integrand is unimodal and analytic. The nodes lie on one dyadic grid that all k share, refined
 * until the difference of its levels shows that the finest is exact to rounding.
 */
import { EPSILON } from '../epsilon.ts';
import { erfcxKernel, millsRatioKernel } from '../special/error-function.ts';
import { logNormalCdfKernel, normalQuantileOfLog } from '../special/normal.ts';
import { binomialConstant, binomialDeviance, HUGE_COUNT } from './binomial-weight.ts';
import { CoordinateSumTransform } from './coordinate-sum-transform.ts';
import { trapezoidError } from './orthant-peak.ts';

const SQRT_HALF = Math.SQRT1_2;
const LOG_TWO_PI = 1.8378770664093455;
const CUT = 40;
/** Discretisation error at which the grid is fine enough. */
const SETTLED = 2e-16;
/** Refinements from the first grid before the difference of levels is taken as it is. */
const MAX_REFINEMENTS = 9;
/** Above this n Q(r) nearly all points would have to lie on one side; the integrand is taken relative to u = Infinity. */
const CROWDED = 1e4;
const MAX_NODES = 20_000;

/** What does not depend on k at a node u. */
interface Node {
  readonly mean: number;
  readonly logMean: number;
  /** log Q(y) - log Q(r) to full relative accuracy where it is small. */
  readonly shift: number;
  /** log of sech u / erfcx(y / sqrt 2) */
  readonly logFactor: number;
  readonly Z: number;
}

/** The terms at one n and r. */
export class FixedQuerySequence {
  private readonly n: number;
  private readonly logN: number;
  private readonly r: number;
  private readonly nodes = new Map<number, Node>();
  private readonly transform = new CoordinateSumTransform();
  private readonly error = new Float64Array(1);
  /** log Q(r), and whether n Q(r) is large. */
  private readonly logTail: number;
  private readonly crowded: boolean;
  private level: number;
  private readonly lastLevel: number;
  private mode: number;
  private bound = 0;

  /** @param r - positive and finite */
  constructor(n: number, logN: number, r: number) {
    this.n = n;
    this.logN = logN;
    this.r = r;
    this.logTail = logNormalCdfKernel(-r);
    this.crowded = logN + this.logTail > Math.log(CROWDED);
    this.level = 2 + Math.max(0, Math.ceil(Math.log2(r)));
    this.lastLevel = this.level + MAX_REFINEMENTS;
    this.mode = Number.NaN;
  }

  /** log B_k; writes a bound on its absolute error to `error[0]`. */
  logTerm(k: number, error: Float64Array): number {
    if (k === 0) return this.logZeroth(error);
    let constant = k < this.n ? binomialConstant(this.n, k) : 0;
    let constantError = 0;
    if (this.crowded) {
      const logMean = this.logN + this.logTail;
      const logError = EPSILON * (4 + Math.abs(this.logN));
      constant -= binomialDeviance(this.n, k, Math.exp(logMean), logMean, logError, error);
      constantError = error[0] as number;
    }
    if (Number.isNaN(this.mode)) this.mode = this.firstMode(k);
    for (; ; this.level++) {
      const step = 2 ** -this.level;
      let peak = Math.round(this.mode / step);
      let height = this.logIntegrand(k, peak * step);
      // Climb along the grid, in strides that double while they succeed.
      for (let stride = 1; stride >= 1; ) {
        const left = this.logIntegrand(k, (peak - stride) * step);
        const right = this.logIntegrand(k, (peak + stride) * step);
        if (left > height || right > height) {
          peak += right >= left ? stride : -stride;
          height = Math.max(left, right);
          stride *= 2;
        } else stride = stride > 1 ? Math.floor(stride / 4) || 1 : 0;
      }
      this.mode = peak * step;
      this.logIntegrand(k, this.mode);
      const rounding = this.bound;
      const sums = [1, 0, 0, 0];
      for (let side = 1; side >= -1; side -= 2) {
        for (let j = 1; ; j++) {
          const drop = this.logIntegrand(k, (peak + side * j) * step) - height;
          if (!(drop > -CUT)) break;
          if (j > MAX_NODES) throw new Error(`fixed query: no decay at n = ${this.n}, k = ${k}`);
          sums[j % 4] = (sums[j % 4] as number) + Math.exp(drop);
        }
      }
      const [a, b, c, d] = sums as [number, number, number, number];
      const total = a + b + c + d;
      const coarse = Math.abs(a + c - b - d) / total;
      const discretisation = trapezoidError(coarse, (2 * Math.abs(a - c)) / total);
      if (discretisation < SETTLED || coarse < rounding || this.level >= this.lastLevel) {
        error[0] = discretisation + rounding + constantError;
        return constant + height + Math.log(step * total) - LOG_TWO_PI;
      }
    }
  }

  /** Sign of B_(k+1) - B_(k-1) where the terms themselves do not tell: the mass lies near n Q(r). */
  slope(k: number): number {
    return this.logN + this.logTail - Math.log(k);
  }

  /** Where about k points are expected beyond y: near enough for the climb. */
  private firstMode(k: number): number {
    const target = Math.log(k) - this.logN;
    if (target > -0.7) return 0;
    const y = -normalQuantileOfLog(target);
    return Math.atanh(Math.min(y / this.r, 1 - 1e-6));
  }

  private logZeroth(error: Float64Array): number {
    const { n, r } = this;
    const logTail = logNormalCdfKernel(-r);
    const log = n < HUGE_COUNT ? n * logNormalCdfKernel(r) : -Math.exp(this.logN + logTail);
    error[0] = EPSILON * (4 + Math.abs(log) * (2 + Math.abs(this.logN)));
    return log - Math.LN2 + Math.log1p(Math.exp(Math.max(-745, n * logTail - log)));
  }

  /** log of the integrand without the constant; sets `bound`. */
  private logIntegrand(k: number, u: number): number {
    const node = this.nodeAt(u);
    const { n } = this;
    let log = k * node.logFactor;
    if (this.crowded) {
      const growth = Math.expm1(node.shift);
      const tail = Math.exp(this.logTail);
      // k log Q + (n - k) log(1 - Q), both relative to Q(r)
      log += k * node.shift;
      log +=
        n < HUGE_COUNT
          ? (n - k) * Math.log1p((-tail * growth) / (1 - tail))
          : -Math.exp(this.logN + this.logTail) * growth;
      this.bound = EPSILON * k;
    } else if (k < n) {
      const logError = EPSILON * (n < HUGE_COUNT ? 4 : Math.abs(this.logN));
      log -= binomialDeviance(n, k, node.mean, node.logMean, logError, this.error);
      // a node one deviation from the mode counts too
      this.bound = (this.error[0] as number) + logError * Math.sqrt(k);
    } else {
      // all points: the binomial probability is Q^n
      const power = k * (node.logMean - this.logN);
      log += power;
      this.bound = 2 * EPSILON * Math.abs(power);
    }
    const transform = this.transform.log(k, node.Z);
    this.bound += this.transform.error;
    this.bound += EPSILON * (4 + k * (2 + 2 * Math.abs(node.logFactor)) + node.Z * node.Z);
    return log + transform;
  }

  private nodeAt(u: number): Node {
    const known = this.nodes.get(u);
    if (known !== undefined) return known;
    const size = Math.abs(u);
    const y = this.r * Math.tanh(u);
    const logSech = Math.LN2 - size - Math.log1p(Math.exp(-2 * size));
    const logTail = logNormalCdfKernel(-y);
    const logErfcx =
      y > -5 ? Math.log(erfcxKernel(y * SQRT_HALF)) : Math.LN2 + logTail + 0.5 * y * y;
    const logMean = this.logN + logTail;
    const node = {
      mean: this.n < HUGE_COUNT ? this.n * Math.exp(logTail) : Math.exp(logMean),
      logMean,
      shift: this.shiftAt(u, logTail),
      logFactor: logSech - logErfcx,
      Z: this.r * Math.exp(logSech),
    };
    this.nodes.set(u, node);
    return node;
  }

  /** log Q(y) - log Q(r) at y = r tanh u. */
  private shiftAt(u: number, logTail: number): number {
    // r - y without cancellation
    const e = Math.exp(-2 * Math.abs(u));
    const distance = (2 * this.r * (u > 0 ? e : 1)) / (1 + e);
    if (distance > 1e-3) return logTail - this.logTail;
    // Taylor: (log Q)' = -h, h' = h (h - y), h'' = h ((h - y)(2h - y) - 1)
    const h = 1 / millsRatioKernel(this.r);
    const excess = h - this.r;
    const second = h * excess;
    const third = h * (excess * (h + excess) - 1);
    return distance * (h - distance * (0.5 * second - (distance * third) / 6));
  }
}
