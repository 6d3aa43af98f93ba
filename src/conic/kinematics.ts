/**
 * Probabilities that randomly rotated cones meet: the Crofton and the kinematic formula.
 *
 * Both are twice every other intrinsic volume beyond a split, and both hold for cones that are not
 * linear subspaces; two subspaces meet or miss by their dimensions alone. The smaller side is summed.
 *
 * Ties matter where a size is searched for, and are kept where they are provable: volumes that are
 * exact multiples of a power of two, as those of small orthants, have exact sums, and symmetric ones
 * make a half of the middle.
 */
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { exactLogError } from '../epsilon.ts';
import { paritySplit } from '../numeric/parity-split.ts';
import { certainty, Probability } from '../probability.ts';
import { type Cone, checkCone, exactTogether, isSubspace, subspaceKernel } from './cone.ts';
import { logProductVolume } from './cone-algebra.ts';

/**
 * The probability that two cones, one of them rotated uniformly at random, share more than the origin.
 *
 * $$ P(C \cap QD \ne \lbrace 0\rbrace) = 2 \sum_{i \ge 0} v_{n+1+2i}(C \times D), $$
 *
 * for closed convex cones in $\mathbb{R}^n$ that are not both subspaces; two subspaces meet with probability 1
 * if their dimensions exceed $n$ together, else with probability 0.
 *
 * Assumptions: the rotation is uniform (by the Haar measure of the rotations).
 *
 * Cost: proportional to n times the number of terms, a few standard deviations of the intrinsic volumes.
 *
 * Accuracy: that of the intrinsic volumes; `logError` is a bound, four standard errors if a cone is
 * simulated.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param first - a cone
 * @param second - a cone in the space of the same dimension
 * @returns the probability that they meet
 * @throws A {@link DomainError} if an argument is not a cone, or the dimensions differ
 *
 * @example
 * ```ts
 * import { conesMeet, orthant, weylChamber } from 'hullgauge/conic';
 * conesMeet(orthant(10), orthant(10)).value; // => 0.5
 * conesMeet(weylChamber('A', 10), orthant(10)).value.toPrecision(12); // => '0.138127119007'
 * ```
 */
export function conesMeet(first: Cone, second: Cone): Probability {
  const fn = 'conesMeet';
  checkCone(fn, 'first', first);
  checkCone(fn, 'second', second);
  const n = first.ambient;
  if (second.ambient !== n) {
    throw new DomainError(fn, 'second', `a cone in dimension ${n}`, second);
  }
  const highest = first.dimension + second.dimension;
  if (isSubspace(first) && isSubspace(second)) return certainty(highest > n);
  const simulated = first.method === 'simulated' || second.method === 'simulated';
  if (simulated || exactTogether(first, second)) return plainMeeting(first, second);
  return paritySplit(
    (k, error) => logProductVolume(first, second, k, error),
    n,
    first.lineality + second.lineality,
    highest,
    undefined,
    first.symmetric && second.symmetric,
  );
}

/**
 * The probability that a cone and a uniformly random subspace of the given codimension share more than
 * the origin.
 *
 * $$ P(C \cap L \ne \lbrace 0\rbrace) = 2 \sum_{i \ge 0} v_{m+1+2i}(C), \qquad m = \operatorname{codim} L, $$
 *
 * for a closed convex cone that is not a subspace; a subspace of dimension $j$ is met if $j > m$.
 * The complement is $2 (v_{m-1} + v_{m-3} + \dots)$: the probability that m random linear equations
 * have no solution but 0 in the cone.
 *
 * Assumptions: the subspace is uniform, such as the kernel of a Gaussian m x n matrix.
 *
 * Cost: a few standard deviations of the intrinsic volumes.
 *
 * Accuracy: that of the intrinsic volumes; `logError` is a bound, four standard errors if the cone is
 * simulated.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param cone - a cone in $\mathbb{R}^n$
 * @param options - `codimension` m of the subspace, an integer from 0 to n
 * @returns the probability that they meet
 * @throws A {@link DomainError} if an argument is out of its domain, or an option is unknown
 *
 * @example
 * ```ts
 * import { circularCone, coneMeetsSubspace } from 'hullgauge/conic';
 * const cone = circularCone(1000, Math.PI / 6);
 * coneMeetsSubspace(cone, { codimension: 260 }).value.toPrecision(10); // => '0.3094039022'
 * ```
 */
export function coneMeetsSubspace(cone: Cone, options: { codimension: number }): Probability {
  const fn = 'coneMeetsSubspace';
  checkCone(fn, 'cone', cone);
  checkOptions(fn, options, ['codimension']);
  const { codimension } = options;
  checkInteger(fn, 'codimension', codimension, 0, cone.ambient);
  return meetsSubspaceKernel(cone, codimension);
}

/** The same without checks. */
export function meetsSubspaceKernel(cone: Cone, codimension: number): Probability {
  if (isSubspace(cone)) return certainty(cone.dimension > codimension);
  const { ambient } = cone;
  const kernel = (): Cone => subspaceKernel(ambient - codimension, ambient);
  if (cone.method === 'simulated' || exactTogether(cone)) return plainMeeting(cone, kernel());
  return paritySplit(
    (k, error) => {
      error[0] = cone.logErrors[k] as number;
      return cone.logIntrinsicVolumes[k] as number;
    },
    codimension,
    cone.lineality,
    cone.dimension,
    undefined,
    cone.symmetric,
  );
}

/**
 * The meeting probability by plain sums: of exact volumes, which make exact sums, or of estimated ones,
 * some of which may be 0 by chance, with four standard errors of the smaller sum as error bound.
 */
function plainMeeting(first: Cone, second: Cone): Probability {
  const n = first.ambient;
  let meets = 0;
  let misses = 0;
  for (let i = 0; i <= n; i++) {
    meets += (first.intrinsicVolumes[i] as number) * alternate(second, n - i, 1);
    misses += (first.intrinsicVolumes[i] as number) * alternate(second, n - i, -1);
  }
  const direction = meets <= misses ? 1 : -1;
  const small = Math.min(meets, misses);
  let variance = 0;
  for (let i = 0; i <= n; i++) {
    const a = (first.standardErrors?.[i] ?? 0) * alternate(second, n - i, direction);
    const b = (second.standardErrors?.[i] ?? 0) * alternate(first, n - i, direction);
    variance += a * a + b * b;
  }
  const exact = first.method === 'exact' && second.method === 'exact';
  if (exact && small === 0) return certainty(direction === -1);
  const logError = exact
    ? exactLogError(Math.log(small))
    : small > 0
      ? (4 * Math.sqrt(variance)) / small
      : Number.POSITIVE_INFINITY;
  return direction === 1
    ? Probability.fromValue(small, logError)
    : Probability.fromComplement(small, logError);
}

/** Twice the sum of v_(m+1), v_(m+3), .. upwards or v_(m-1), v_(m-3), .. downwards. */
function alternate(cone: Cone, m: number, direction: 1 | -1): number {
  let sum = 0;
  for (let k = m + direction; k >= 0 && k <= cone.ambient; k += 2 * direction) {
    sum += cone.intrinsicVolumes[k] as number;
  }
  return 2 * sum;
}
