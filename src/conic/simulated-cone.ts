/**
 * Conic intrinsic volumes of polyhedral cones in any dimension by simulation.
 *
 * The projection of a standard Gaussian vector onto the cone lies in the interior of one face; the share
 * of vectors whose face has dimension k estimates v_k.
 */
import { checkInteger, checkOptions } from '../domain.ts';
import { ConeProjection } from '../numeric/nonnegative-least-squares.ts';
import { randomStream } from '../numeric/random.ts';
import { coordinates, orthonormalBasis, unit } from '../numeric/small-vectors.ts';
import { type Cone, makeCone, subspaceKernel } from './cone.ts';
import { checkGenerators } from './polyhedral-cone.ts';

/** Directions shorter than this count as in the span, distances as 0. */
const TOLERANCE = 1e-9;

/**
 * The cone of all non-negative combinations of the given vectors, with its conic intrinsic volumes
 * estimated by projecting Gaussian vectors.
 *
 * $v_k$ is the share of the vectors whose nearest point in the cone lies inside a face of dimension $k$;
 * its standard error is about $\sqrt{v_k (1 - v_k) / \text{trials}}$. Up to four dimensions
 * {@link polyhedralCone} is exact.
 *
 * Cost: a non-negative least-squares problem per trial: about 0.005 ms with 10 generators.
 *
 * Accuracy: `standardErrors`; `logErrors` holds four of them. The result is the same on every engine for the
 * same seed.
 *
 * Source: Living on the edge: phase transitions in convex programs with random data, Information and
 * Inference 3 (2014), arXiv:1303.6672.
 *
 * @param generators - vectors of one length from 1 to 1000000, at least one, with finite entries; zero vectors
 * are ignored
 * @param options - `trials`, the number of Gaussian vectors, an integer from 1 to $2^{53} - 1$, and
 * `seed`, an integer from 0 to $2^{53} - 1$
 * @returns the cone, with `method: 'simulated'` (a subspace is recognised and exact)
 * @throws A {@link DomainError} if an argument is out of its domain, or an option is unknown
 *
 * @example
 * ```ts
 * import { approxPolyhedralCone } from 'hullgauge/conic';
 * const axes = [[1, 0, 0, 0, 0], [0, 1, 0, 0, 0], [0, 0, 1, 0, 0], [0, 0, 0, 1, 0], [0, 0, 0, 0, 1]];
 * const cone = approxPolyhedralCone(axes, { trials: 2000, seed: 1 });
 * cone.method; // => 'simulated'
 * Math.abs(cone.statisticalDimension - 2.5) < 0.1; // => true
 * ```
 */
export function approxPolyhedralCone(
  generators: readonly ArrayLike<number>[],
  options: { trials: number; seed: number },
): Cone {
  const fn = 'approxPolyhedralCone';
  const { vectors, ambient } = checkGenerators(fn, generators);
  checkOptions(fn, options, ['trials', 'seed']);
  const { trials, seed } = options;
  checkInteger(fn, 'trials', trials, 1);
  checkInteger(fn, 'seed', seed, 0);
  const basis = orthonormalBasis(vectors, TOLERANCE);
  const dimension = basis.length;
  // In coordinates of the span: what lies outside does not change the face.
  const inside = vectors.map((vector) => unit(coordinates(vector, basis)));
  const projection = new ConeProjection(inside);
  const reversible = inside.filter((vector) => {
    const opposite = vector.map((x) => -x);
    projection.project(opposite);
    return projection.squaredDistance(opposite) < TOLERANCE * TOLERANCE;
  });
  const lineality = orthonormalBasis(reversible, TOLERANCE).length;
  if (lineality === dimension) return subspaceKernel(dimension, ambient);
  const hits = new Array<number>(ambient + 1).fill(0);
  const stream = randomStream(seed);
  for (let trial = 0; trial < trials; trial++) {
    const point = basis.map(() => stream.normal());
    const face = projection.project(point);
    hits[face] = (hits[face] as number) + 1;
  }
  const volumes = hits.map((count) => count / trials);
  const standardErrors = hits.map((count, k) => {
    if (k < lineality || k > dimension) return 0;
    // shifted so that a face that was never hit has an error too
    const share = (count + 0.5) / (trials + 1);
    return Math.sqrt((share * (1 - share)) / trials);
  });
  const logErrors = volumes.map((v, k) =>
    k < lineality || k > dimension ? 0 : (4 * (standardErrors[k] as number)) / v,
  );
  const logs = volumes.map((v) => Math.log(v));
  return makeCone({ dimension, lineality, logs, volumes, logErrors, standardErrors });
}
