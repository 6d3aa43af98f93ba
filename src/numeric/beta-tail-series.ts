/**
 * The continued fraction and the series behind the tail of the symmetric beta law.
 *
 * Notation as in beta-tail.ts. For h > 0 the mean excess is L = h (1 + T) with
 *
 *   T = a1 x / (1 + a2 x / (1 + ...)),  x = w / h^2,
 *   a_2i = i (b + 1/2 + i) / ((b + 2i)(b + 2i + 1)),
 *   a_2i+1 = (i + 1/2)(b + 1 + i) / ((b + 2i + 1)(b + 2i + 2)),
 *
 * Gauss's fraction of 2F1(1/2, 1; b + 2; -x), whose terms are all positive. It serves for
 * h^2 > 1 / (b + 7/2); nearer to the centre v = 1/2 - c h w^(b+1) sum (b + 3/2)_k / (3/2)_k h^2k.
 */

const MAX_DEPTH = 400;
const MAX_RATIOS = 100;
/** The depth of the fraction is tabulated by the binary exponent of x, from 2^-60 up. */
const LEAST_EXPONENT = -60;

/** Both expansions for one b; coefficients and depths are found on first use. */
export class BetaTailSeries {
  private readonly b: number;
  /** Largest h^2 of the series. */
  private readonly largest: number;
  private readonly coefficients = new Float64Array(MAX_DEPTH + 2);
  private known = 0;
  private readonly ratios = new Float64Array(MAX_RATIOS);
  private ratioCount = 0;
  private readonly depths = new Int16Array(128);

  constructor(b: number, largest: number) {
    this.b = b;
    this.largest = largest;
  }

  /** sum over k of (b + 3/2)_k / (3/2)_k y^k, y = h^2, from the last term that counts backwards. */
  central(y: number): number {
    const ratios = this.ratios;
    if (this.ratioCount === 0) {
      let term = 1;
      while (term > 1e-18 && this.ratioCount < MAX_RATIOS) {
        const ratio = (this.b + 1.5 + this.ratioCount) / (1.5 + this.ratioCount);
        term *= ratio * this.largest;
        ratios[this.ratioCount++] = ratio;
      }
    }
    let sum = 1;
    for (let k = this.ratioCount - 1; k >= 0; k--) sum = 1 + (ratios[k] as number) * y * sum;
    return sum;
  }

  /**
   * T by backward recurrence from a depth at which it has converged, as a quotient: one division in
   * place of one a step. All terms are positive.
   */
  fraction(x: number): number {
    const a = this.coefficients;
    let p = 1;
    let q = 1;
    for (let j = this.depthFor(x); j >= 2; j--) {
      const next = p + (a[j] as number) * x * q;
      q = p;
      p = next;
      if ((j & 31) === 0 && p > 2 ** 400) {
        p *= 2 ** -400;
        q *= 2 ** -400;
      }
    }
    return ((a[1] as number) * x * q) / p;
  }

  /**
   * Depth at which the fraction at x has converged to 2^-58: a step with coefficient a multiplies the
   * error by (r - 1) / (r + 1), r = sqrt(1 + 4 a x), where the coefficients change slowly.
   */
  private depthFor(x: number): number {
    const exponent = x > 2 ** LEAST_EXPONENT ? Math.ceil(Math.log2(x)) : LEAST_EXPONENT;
    const index = exponent - LEAST_EXPONENT;
    const stored = this.depths[index] as number;
    if (stored > 0) return stored;
    const bound = 2 ** exponent;
    let error = 1;
    let depth = 1;
    this.coefficient(1);
    while (error > 3e-18 && depth < MAX_DEPTH) {
      depth++;
      const r = Math.sqrt(1 + 4 * this.coefficient(depth) * bound);
      error *= (r - 1) / (r + 1);
    }
    this.depths[index] = depth;
    return depth;
  }

  private coefficient(j: number): number {
    const a = this.coefficients;
    while (this.known < j) {
      const next = ++this.known;
      const i = next >> 1;
      const b = this.b;
      a[next] =
        next % 2 === 0
          ? (i * (b + 0.5 + i)) / ((b + 2 * i) * (b + 2 * i + 1))
          : ((i + 0.5) * (b + 1 + i)) / ((b + 2 * i + 1) * (b + 2 * i + 2));
    }
    return a[j] as number;
  }
}
