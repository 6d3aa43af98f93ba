/**
 * What the user's data cover, by their own account: the share of points inside the hull of the others
 * beside what Gaussian points of that number and rank would show.
 */
import { Displayable, type DisplayRow, formatNumber } from '../display.ts';
import { checkNumber, checkOptions } from '../domain.ts';
import { binomialInterval } from '../numeric/binomial-interval.ts';
import { matrixRank } from '../numeric/rank.ts';
import { gaussianMembership } from '../polytope/gaussian-faces.ts';
import { certainty, type Probability } from '../probability.ts';
import { hullVerticesKernel } from './hull-vertices.ts';
import { DEFAULT_TOLERANCE } from './in-hull.ts';
import { type LongWorkOptions, startPace } from './long-work.ts';
import {
  allIntegers,
  centreOf,
  checkPoints,
  columnRanges,
  columnTolerances,
  type Points,
} from './points.ts';

/** Options of {@link interpolationAudit}. */
export interface InterpolationAuditOptions extends LongWorkOptions {
  /** Confidence of the interval, inside (0, 1); 0.95 if left out. */
  readonly confidence?: number;
}

/** The fields of an {@link InterpolationAudit}. */
export interface InterpolationAuditFields {
  /** Number of points. */
  readonly n: number;
  /** Number of columns. */
  readonly d: number;
  /** Dimension of the flat that the points span: the rank of the centred columns. */
  readonly rank: number;
  /** Share of points inside the hull of the others. */
  readonly insideRate: number;
  /** Interval for the probability, as if the n outcomes were independent, which they are not. */
  readonly approxInterval: readonly [lower: number, upper: number];
  /** Confidence of that interval. */
  readonly confidence: number;
  /** The exact probability for n - 1 Gaussian points and one more in `rank` dimensions. */
  readonly gaussian: Probability;
  /** The real dimension at which Gaussian points show that share, by interpolation; null at share 0. */
  readonly effectiveDimension: number | null;
  /** The same for the upper end of the interval. */
  readonly effectiveDimensionAtLeast: number;
}

/** What {@link interpolationAudit} found; `toString()` says it in a sentence. */
export class InterpolationAudit extends Displayable implements InterpolationAuditFields {
  /** Always `'interpolationAudit'`. */
  readonly kind = 'interpolationAudit' as const;
  /** Number of points. */
  readonly n: number;
  /** Number of columns. */
  readonly d: number;
  /** Dimension of the flat that the points span: the rank of the centred columns. */
  readonly rank: number;
  /** Share of points inside the hull of the others. */
  readonly insideRate: number;
  /** Interval for the probability, as if the n outcomes were independent, which they are not. */
  readonly approxInterval: readonly [lower: number, upper: number];
  /** Confidence of that interval. */
  readonly confidence: number;
  /** The exact probability for n - 1 Gaussian points and one more in `rank` dimensions. */
  readonly gaussian: Probability;
  /** The real dimension at which Gaussian points show that share, by interpolation; null at share 0. */
  readonly effectiveDimension: number | null;
  /** The same for the upper end of the interval. */
  readonly effectiveDimensionAtLeast: number;

  /** @internal */
  constructor(fields: InterpolationAuditFields) {
    super();
    this.n = fields.n;
    this.d = fields.d;
    this.rank = fields.rank;
    this.insideRate = fields.insideRate;
    this.approxInterval = fields.approxInterval;
    this.confidence = fields.confidence;
    this.gaussian = fields.gaussian;
    this.effectiveDimension = fields.effectiveDimension;
    this.effectiveDimensionAtLeast = fields.effectiveDimensionAtLeast;
  }

  /** The audit in one sentence. */
  override toString(): string {
    const inside = Math.round(this.insideRate * this.n);
    const [lower, upper] = this.approxInterval.map((x) => formatShare(x));
    const share = `${formatShare(this.insideRate)}, approximately ${lower} to ${upper}`;
    return (
      `${inside} of ${this.n} points inside the hull of the others (${share}); ` +
      `Gaussian points of rank ${this.rank}: ${formatShare(this.gaussian.value)}; ` +
      `effective dimension ${this.dimensionText()}`
    );
  }

  private dimensionText(): string {
    const least = `at least ${this.effectiveDimensionAtLeast.toFixed(1)}`;
    return this.effectiveDimension === null
      ? least
      : `${this.effectiveDimension.toFixed(1)}, ${least}`;
  }

  /** @internal The rows of the table that a notebook shows. */
  override displayRows(): readonly DisplayRow[] {
    const [lower, upper] = this.approxInterval.map((x) => formatShare(x));
    return [
      ['points', String(this.n)],
      ['columns', String(this.d)],
      ['rank', String(this.rank)],
      ['share inside the hull of the others', formatShare(this.insideRate)],
      [`approximate ${formatNumber(100 * this.confidence)} % interval`, `${lower} to ${upper}`],
      ['share for Gaussian points', this.gaussian.toString()],
      ['effective dimension', this.dimensionText()],
    ];
  }
}

/** Three digits are more than the interval supports. */
function formatShare(share: number): string {
  return formatNumber(share, 1e-3);
}

/**
 * Audits how far a data set supports interpolation: which share of its points lies inside the convex
 * hull of the others.
 *
 * If the points are draws from any one law, in exchangeable order, that share is an unbiased estimate
 * of the probability that a draw falls inside the hull of n - 1 others. Beside it stands the exact
 * value for Gaussian points of the same number and rank, and the dimension in which Gaussian points
 * would show the share found: `effectiveDimension`, where the logarithm of
 * {@link nextPointInHull} at whole dimensions is interpolated linearly.
 *
 * Assumptions: the n outcomes share all points, so the interval, which is that of n independent
 * outcomes, is approximate. The share says nothing about how far outside the other points lie, about
 * cases from another law than the data, or about a model's error inside the hull.
 *
 * @param points - rows of finite numbers of size at most 1e150, all of one length; at least one
 * @param options - `confidence`: of the interval, inside (0, 1), 0.95 if left out; `onProgress` and
 *   `signal` as in {@link LongWorkOptions}
 * @returns the audit; a point with an identical twin is inside, `effectiveDimension` is null at share
 *   0, and `effectiveDimensionAtLeast` belongs to the upper end of the interval
 * @remarks Cost: that of {@link hullVertices}. Gives way to the event loop about every 50 ms. The
 *   numbers hold under the stated assumptions; they do not replace a safety review.
 * @throws A {@link DomainError} if a row is empty, ragged or holds anything but finite numbers; the
 *   message names row and column. An `Error` named `AbortError` if called off
 *
 * Source: Absorption probabilities for Gaussian polytopes and regular spherical simplices, Advances
 * in Applied Probability 52 (2020), arXiv:1704.04968.
 *
 * @example
 * ```ts
 * import { interpolationAudit } from 'hullgauge/data';
 * const cross = [[0, 0], [1, 0], [0, 1], [-1, 0], [0, -1], [0.2, 0.1]];
 * const audit = await interpolationAudit(cross);
 * audit.insideRate; // => 2 / 6
 * audit.rank; // => 2
 * audit.gaussian.value.toPrecision(12); // => '0.251311735414'
 * ```
 */
export async function interpolationAudit(
  points: Points,
  options: InterpolationAuditOptions = {},
): Promise<InterpolationAudit> {
  const fn = 'interpolationAudit';
  const matrix = checkPoints(fn, points);
  checkOptions(fn, options, ['confidence', 'onProgress', 'signal']);
  const { confidence = 0.95 } = options;
  checkNumber(fn, 'confidence', confidence, 1e-9, 1 - 1e-9);
  const { rows, n, d } = matrix;
  const pace = startPace(fn, n, options);
  const exact = allIntegers(rows);
  const tolerances = columnTolerances(columnRanges(matrix), DEFAULT_TOLERANCE, exact);
  const rank = matrixRank(rows, n, d, centreOf(matrix, exact), tolerances);
  if (pace.spend(2 * n * d * d)) await pace.pause(0);
  const { copies } = await hullVerticesKernel(matrix, pace);
  // A vertex with a twin lies in the hull of the others.
  const outside = copies.reduce((count, twins) => count + (twins === 1 ? 1 : 0), 0);
  const insideRate = (n - outside) / n;
  const approxInterval = Object.freeze(binomialInterval(n - outside, n, confidence));
  pace.finish();
  return new InterpolationAudit({
    n,
    d,
    rank,
    insideRate,
    approxInterval,
    confidence,
    gaussian: gaussianShare(n - 1, rank),
    effectiveDimension: insideRate === 0 ? null : gaussianDimension(n - 1, insideRate),
    effectiveDimensionAtLeast: gaussianDimension(n - 1, approxInterval[1]),
  });
}

/** P(a Gaussian point lies in the hull of n others); in dimension 0 any other point will do. */
function gaussianShare(n: number, d: number): Probability {
  if (d > 0) return gaussianMembership({ n, log: Math.log(n) }, d, 1, 'plain');
  return certainty(n > 0);
}

/** The largest dimension that the Gaussian value is computed for. */
const MAX_DIMENSION = 10_000;

/** The real dimension at which n Gaussian points hold the next with probability `share` > 0. */
function gaussianDimension(n: number, share: number): number {
  const target = Math.log(share);
  // The logarithm falls from 0 in dimension 0 to -Infinity in dimension n.
  let low = 0;
  let logLow = 0;
  let high = Math.min(n, MAX_DIMENSION);
  let logHigh = gaussianShare(n, high).log;
  if (target <= logHigh) return high;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    const log = gaussianShare(n, middle).log;
    if (log >= target) {
      low = middle;
      logLow = log;
    } else {
      high = middle;
      logHigh = log;
    }
  }
  return logHigh === Number.NEGATIVE_INFINITY ? low : low + (logLow - target) / (logLow - logHigh);
}
