/**
 * Seeded draws from the laws of the points.
 *
 * With g a standard normal vector and an independent gamma number G, g / sqrt(|g|^2 + 2 G) has the
 * beta law for shape b + 1 (the sphere for G = 0), and g / sqrt(2 G) the beta-prime law for shape
 * b - d/2: the squared length of g is itself twice a gamma number.
 */
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { type BetaLaw, type BetaPrimeLaw, checkLaw, type GaussianLaw, type Law } from '../law.ts';
import { type RandomStream, randomStream } from '../numeric/random.ts';

/** Where the draws of {@link sampler} start. */
export interface SamplerOptions {
  /** Dimension of the points. */
  readonly d: number;
  /** Integer from 0 to 2^53 - 1: the same seed gives the same points, on every engine. */
  readonly seed: number;
}

/**
 * Makes a function that draws points from a law, the same points for the same seed on every engine.
 *
 * With g a standard normal vector and G an independent gamma number of shape a, points are
 *
 * $$ g \text{ (Gaussian)}, \qquad \frac{g}{\sqrt{|g|^2 + 2 G}} \text{ (beta, } a = b + 1), \qquad
 *    \frac{g}{\sqrt{2 G}} \text{ (beta prime, } a = b - \tfrac d2), $$
 *
 * of the standard laws: N(0, I) for the Gaussian one. Draws use only operations that the language defines
 * exactly, so not even the last bit depends on the engine. The numbers are pseudorandom, for simulation,
 * not for secrets.
 *
 * @param law - the law of the points; `studentT` with at least 1/8 degree of freedom, `betaPrimeLaw`
 *   with b at least d/2 + 1/16, below which lengths leave the range of doubles
 * @param options - `d`: dimension, an integer from 1 to 2^27; `seed`: an integer from 0 to 2^53 - 1
 * @returns a function that returns the next point, each time in a new array
 * @remarks Cost: about d normal numbers a point.
 * @throws A {@link DomainError} if an argument is out of range
 *
 * Sources: A convenient method for generating normal variables, SIAM Review, 1964, doi:10.1137/1006063; A
 * simple method for generating gamma variables, ACM Transactions on Mathematical Software, 2000,
 * doi:10.1145/358407.358414.
 *
 * @example
 * ```ts
 * import { gaussian } from 'hullgauge';
 * import { sampler } from 'hullgauge/data';
 * const draw = sampler(gaussian(), { d: 2, seed: 1 });
 * const again = sampler(gaussian(), { d: 2, seed: 1 });
 * draw().length; // => 2
 * again(); // => sampler(gaussian(), { d: 2, seed: 1 })()
 * ```
 */
export function sampler(law: Law, options: SamplerOptions): () => Float64Array {
  checkOptions('sampler', options, ['d', 'seed']);
  const { d, seed } = options;
  checkInteger('sampler', 'd', d, 1, MAX_NUMBERS);
  checkInteger('sampler', 'seed', seed, 0);
  const fill = pointFiller('sampler', law, d, seed);
  return () => {
    const point = new Float64Array(d);
    fill(point);
    return point;
  };
}

/** Most coordinates drawn at once: they must fit into memory. */
export const MAX_NUMBERS = 134217728;

/** Smallest shape of a gamma number whose square root in a denominator never leaves the doubles. */
const LEAST_SHAPE = 0.0625;

/** A function that fills arrays of length d with successive points; checks the law only. */
export function pointFiller(
  fn: string,
  law: Law,
  d: number,
  seed: number,
): (out: Float64Array) => void {
  const checked = checkLaw(fn, law, ['gaussian', 'beta', 'betaPrime'], d);
  const stream = randomStream(seed);
  const radius = radiusOf(fn, law, checked, d, stream);
  return (out) => {
    let square = 0;
    do {
      square = 0;
      for (let j = 0; j < d; j++) {
        const x = stream.normal();
        out[j] = x;
        square += x * x;
      }
    } while (square === 0);
    const factor = radius(square);
    if (factor !== 1) for (let j = 0; j < d; j++) out[j] = (out[j] as number) * factor;
  };
}

/** The factor that gives a normal vector of the given squared length the law. */
function radiusOf(
  fn: string,
  given: Law,
  law: GaussianLaw | BetaLaw | BetaPrimeLaw,
  d: number,
  stream: RandomStream,
): (square: number) => number {
  if (law.family === 'gaussian') return () => 1;
  if (law.family === 'beta') {
    const shape = law.b + 1;
    if (shape === 0) return (square) => 1 / Math.sqrt(square);
    return (square) => 1 / Math.sqrt(square + 2 * stream.gamma(shape));
  }
  const student = given.family === 'studentT';
  const shape = student ? given.degreesOfFreedom / 2 : law.b - d / 2;
  if (shape < LEAST_SHAPE) {
    if (student) {
      throw new DomainError(fn, 'law.degreesOfFreedom', '>= 1/8', given.degreesOfFreedom);
    }
    throw new DomainError(fn, 'law.b', `>= d/2 + 1/16 = ${d / 2 + LEAST_SHAPE}`, law.b);
  }
  return () => 1 / Math.sqrt(2 * stream.gamma(shape));
}
