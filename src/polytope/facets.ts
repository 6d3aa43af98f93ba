/**
 * How many facets the hull of random points has, in all and below a given height.
 */

import { type Count, type ResolvedCount, resolveCount } from '../count.ts';
import { checkFinite, checkNumber, checkOptions, DomainError } from '../domain.ts';
import { EPSILON } from '../epsilon.ts';
import { checkLaw, excessOf, type Law } from '../law.ts';
import { LogNumber } from '../log-number.ts';
import { BetaTail } from '../numeric/beta-tail.ts';
import { NormalTail } from '../numeric/normal-tail.ts';
import { errorShare, sumOfLogs } from '../numeric/stated-error.ts';
import { logBinomialKernel } from '../special/log-beta.ts';
import { facetModel, facetsBeyond, facetTotal } from './facet-measure.ts';
import { checkDimension, type Hull, LEAST_MARGINAL, resolveHull } from './hull-options.ts';

const FAMILIES = ['beta', 'betaPrime', 'gaussian'] as const;

/** Options of {@link expectedFacets}. */
export interface ExpectedFacetsArgs {
  /** Number of points; of pairs for the symmetric hull. */
  readonly n: Count;
  /** Dimension, from 1 to a million. */
  readonly d: number;
  /** Any law. */
  readonly law: Law;
  /** Which hull is meant; `'plain'` if left out. */
  readonly hull?: Hull | undefined;
}

/** Options of {@link expectedFacetsBelow}. */
export interface ExpectedFacetsBelowArgs {
  /** Number of points. */
  readonly n: Count;
  /** Dimension, from 1 to a million. */
  readonly d: number;
  /** Signed distance of the facet's hyperplane from the centre of the law. */
  readonly height: number;
  /** Any law. */
  readonly law: Law;
}

/** A law of one of the three families, in R^d, that the integrals can take. */
export function resolveFacetLaw(fn: string, law: unknown, d: number): ReturnType<typeof checkLaw> {
  const resolved = checkLaw(fn, law, FAMILIES, d);
  if (resolved.family === 'betaPrime') {
    const inner = excessOf(resolved, d) - 1;
    if (!(inner >= LEAST_MARGINAL)) {
      const given = law as Law;
      if (given.family === 'studentT') {
        const least = 2 * (LEAST_MARGINAL + 1);
        throw new DomainError(fn, 'law.degreesOfFreedom', `>= ${least}`, given.degreesOfFreedom);
      }
      throw new DomainError(fn, 'law.b', `at least d/2 + ${LEAST_MARGINAL + 1}`, resolved.b);
    }
  }
  return resolved;
}

/**
 * Expected number of facets, faces of dimension d - 1, of the hull of n random points for d from 1 to a
 * million: how large the answer of a hull program will be.
 *
 * For $n > d$ points of the beta law with exponent $\beta$,
 *
 * $$\mathbb{E} f_{d-1} = 2 \binom{n}{d} \int_{-1}^{1} c\,(1 - h^2)^{d\beta + (d^2-1)/2} F(h)^{n-d}\,dh,$$
 *
 * F the distribution function of one coordinate; alike for the other laws. For $n \le d$ the hull is a
 * simplex of dimension n - 1 and the number is $\binom{n}{d}$, 1 or 0. `hull: 'symmetric'` takes n pairs
 * $\pm X_i$; `'withCentre'` adds the centre of the law, whose own facets come from Wendel's count of
 * half-spaces, $2^{d-n} \binom{n}{d-1}$.
 *
 * Assumes independent points. For the Gaussian and Student t laws the number is affinely invariant: any
 * mean and covariance. It rises with n; with n/d fixed it grows exponentially in d.
 *
 * Cost: one integral, about 60 microseconds. Accuracy: the logarithm is within 5e-15 max(1, |log|), or
 * 3e-13 for beta laws at d = 5000; the error of each result is in its `logError`.
 *
 * Source: Expected intrinsic volumes and facet numbers of random beta-polytopes, Mathematische
 * Nachrichten 292 (2019), arXiv:1707.02253.
 *
 * @param args - `n`: an integer >= 0 or a `LogNumber`; `d`: an integer from 1 to a million; `law`: any
 * law (Student t with at least 0.02 degrees of freedom); `hull`: `'plain'`, `'symmetric'` or
 * `'withCentre'`
 * @returns the expected number
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { expectedFacets, gaussian, uniformSphere } from 'hullgauge';
 * expectedFacets({ n: 12, d: 3, law: uniformSphere() }).value; // => 20
 * expectedFacets({ n: 50, d: 10, law: gaussian() }).toString(); // => '93354.9864529'
 * ```
 */
export function expectedFacets(args: ExpectedFacetsArgs): LogNumber {
  const fn = 'expectedFacets';
  checkOptions(fn, args, ['n', 'd', 'law', 'hull']);
  const { d } = args;
  checkDimension(fn, d);
  const law = resolveFacetLaw(fn, args.law, d);
  const hull = resolveHull(fn, args.hull);
  const count = resolveCount(fn, 'n', args.n);
  return expectedFacetsKernel(law, d, count, hull);
}

/** {@link expectedFacets} without checks. */
export function expectedFacetsKernel(
  law: ReturnType<typeof checkLaw>,
  d: number,
  count: ResolvedCount,
  hull: Hull,
): LogNumber {
  const { n } = count;
  if (hull === 'symmetric' ? n < d : n <= d - (hull === 'plain' ? 0 : 1)) {
    // a simplex or cross-polytope of lower dimension: itself a face when that is d - 1
    const whole = hull === 'plain' ? n === d : n === d - 1 && (n > 0 || hull === 'withCentre');
    return LogNumber.fromLog(whole ? 0 : Number.NEGATIVE_INFINITY);
  }
  if (d === 1) return endsOfSegment(law, count, hull);
  if (hull === 'symmetric' && n === d) return LogNumber.fromLog(d * Math.LN2, d * EPSILON);
  const model = facetModel(law, d);
  if (hull === 'withCentre') {
    // of many points none leave the centre on the far side of a facet, to any digit; far from the centre
    // an integral from there has fewer digits than the whole
    const above =
      n > 10 * d + 2000 ? facetTotal(model, count, 'line') : facetsBeyond(model, count, 0, 1);
    const binomial = logBinomialKernel(Math.min(n, 2 ** 1000), d - 1);
    const atCentre = count.log > 30 ? Number.NEGATIVE_INFINITY : binomial + (d - n) * Math.LN2;
    const error = EPSILON * (4 + 2 * binomial + Math.abs(n - d));
    return sumOfLogs(above.log, above.error, atCentre, error);
  }
  const total = facetTotal(model, count, hull === 'symmetric' ? 'folded' : 'line');
  return LogNumber.fromLog(total.log, total.error);
}

/** d = 1: the hull is a segment, or a single point where two points of -1 and 1 may coincide. */
function endsOfSegment(
  law: ReturnType<typeof checkLaw>,
  count: ResolvedCount,
  hull: Hull,
): LogNumber {
  if (law.family !== 'beta' || law.b > -1 || hull !== 'plain') return LogNumber.of(2);
  return LogNumber.fromLog(Math.LN2 + Math.log1p(-Math.exp(-count.n * Math.LN2)), EPSILON);
}

/**
 * Expected number of facets of the hull of n random points whose signed height is at most `height`, for
 * n > d: how many shallow cuts to expect.
 *
 * The height of a facet is the distance of its hyperplane from the centre of the law, negative when the
 * centre lies beyond it. The number is the integral of {@link expectedFacets} from below up to `height`,
 * under the same assumptions (for the Gaussian law: N(0, I), since heights are no affine invariants), and
 * an upper bound of the probability that any facet cuts so deep.
 *
 * Cost: one integral by some 200 nodes, about 150 microseconds. Accuracy: bounded by `logError`; the
 * number is that of the double `height`, to which it is sensitive where n and d are large.
 *
 * Source: as for {@link expectedFacets}.
 *
 * @param args - `n`: an integer >= 0 or a `LogNumber`; `d`: an integer from 1 to a million; `height`: a
 * number; `law`: any law (Student t with at least 0.02 degrees of freedom)
 * @returns the expected number; exactly 0 for n <= d
 * @throws A {@link DomainError} if an option is missing, unknown or out of range
 *
 * @example
 * ```ts
 * import { expectedFacetsBelow, uniformSphere } from 'hullgauge';
 * const below = expectedFacetsBelow({ n: 5, d: 3, height: -0.2, law: uniformSphere() });
 * below.value.toPrecision(12); // => (0.52224).toPrecision(12)
 * ```
 */
export function expectedFacetsBelow(args: ExpectedFacetsBelowArgs): LogNumber {
  const fn = 'expectedFacetsBelow';
  checkOptions(fn, args, ['n', 'd', 'height', 'law']);
  const { d, height } = args;
  checkDimension(fn, d);
  checkNumber(fn, 'height', height);
  const law = resolveFacetLaw(fn, args.law, d);
  const count = resolveCount(fn, 'n', args.n);
  const none = LogNumber.fromLog(Number.NEGATIVE_INFINITY);
  if (count.n <= d || height === Number.NEGATIVE_INFINITY) return none;
  if (law.family === 'beta' && height < -1) return none;
  if (height === Number.POSITIVE_INFINITY || (law.family === 'beta' && height >= 1)) {
    return expectedFacetsKernel(law, d, count, 'plain');
  }
  checkFinite(fn, 'height', height);
  if (d === 1) return lowEnds(law, count, height);
  // exponents beyond doubles
  if (law.family === 'gaussian' && d * height * height > 1e300) {
    return height < 0 ? none : expectedFacetsKernel(law, d, count, 'plain');
  }
  if (law.family === 'beta' && height === -1) return none;
  const model = facetModel(law, d);
  // at least half of the facets are on the positive side
  if (height > 0) {
    const above = facetsBeyond(model, count, height, 1);
    const total = facetTotal(model, count, 'line');
    if (above.log < total.log - Math.LN2) {
      // nearly all of them: the integral from far below would lose the digits that the total has
      const share = Math.exp(above.log - total.log);
      const error = (total.error + errorShare(above.log, above.error, total.log)) / (1 - share);
      return LogNumber.fromLog(total.log + Math.log1p(-share), error);
    }
  }
  const below = facetsBeyond(model, count, height, -1);
  return LogNumber.fromLog(below.log, below.error);
}

/** d = 1: both ends x and y of the segment are facets, at heights -x and y; each is below h if F(h)^n. */
function lowEnds(law: ReturnType<typeof checkLaw>, count: ResolvedCount, h: number): LogNumber {
  if (law.family === 'beta' && law.b === -1) {
    // the ends are at -1 or 1, and both facets have height 1 unless all points coincide
    const log = -count.n * Math.LN2;
    return LogNumber.fromLog(h < -1 ? Number.NEGATIVE_INFINITY : log, -log * EPSILON);
  }
  let logF: number;
  if (law.family === 'gaussian') {
    const tail = new NormalTail();
    tail.centreAtHeight(h);
    logF = tail.logOther;
  } else if (law.family === 'beta') {
    if (h <= -1) return LogNumber.fromLog(Number.NEGATIVE_INFINITY);
    const tail = new BetaTail(law.b);
    tail.centreAtHeight(h);
    logF = tail.logOther;
  } else {
    const tail = new BetaTail(excessOf(law, 1) - 1);
    tail.centreAtArgument(Math.asinh(h));
    logF = tail.logOther;
  }
  const log = count.n * logF;
  return LogNumber.fromLog(Math.LN2 + log, EPSILON * (2 + 4 * Math.abs(log)));
}
