/**
 * Argument checks that the questions about faces and membership share.
 */
import { checkInteger, DomainError } from '../domain.ts';
import { type BetaLaw, checkLaw, type GaussianLaw, type ResolvedBetaPrimeLaw } from '../law.ts';
import { alphaOf } from './beta-faces.ts';
import { type Hull, resolveHull } from './hull-options.ts';

/** Largest dimension of the questions about faces: cost grows with it, and errors like d epsilon. */
export const MAX_FACE_DIMENSION = 10_000;

/** Below this many degrees of freedom the internal angles of the t law have no formula here. */
const LEAST_FREEDOM = 0.5;
/** The beta families go over into the Gaussian law long before this. */
const LARGEST_ALPHA = 1e6;

/** Refuses a dimension out of range. */
export function checkFaceDimension(fn: string, d: unknown): asserts d is number {
  checkInteger(fn, 'd', d, 1, MAX_FACE_DIMENSION);
}

/**
 * Refuses a law or a kind of hull for which there is no formula; 'plain' if none is given.
 *
 * @param vertices - whether the question is about vertices, which the volume answers for the uniform ball
 */
export function checkFaceLaw(
  fn: string,
  law: unknown,
  hull: unknown,
  d: number,
  vertices: boolean,
): { readonly law: GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw; readonly hull: Hull } {
  const checked = checkLaw(fn, law, ['gaussian', 'beta', 'betaPrime'], d);
  const kind = resolveHull(fn, hull);
  if (checked.family === 'gaussian') return { law: checked, hull: kind };
  const uniform = checked.family === 'beta' && (checked.b === 0 || checked.b === -1);
  if (kind !== 'plain' && !(vertices && uniform)) {
    throw new DomainError(fn, 'hull', '"plain" for this law (no formula for other hulls)', kind);
  }
  const alpha = alphaOf(checked, d);
  const low = checked.family === 'betaPrime' && d > 1 && alpha < LEAST_FREEDOM;
  if (low || alpha > LARGEST_ALPHA) {
    const requirement =
      checked.family === 'betaPrime'
        ? `one with ${LEAST_FREEDOM} <= degrees of freedom = 2b - d <= ${LARGEST_ALPHA}`
        : `one with 2b + d <= ${LARGEST_ALPHA}`;
    throw new DomainError(fn, 'law', `${requirement} here`, alpha);
  }
  return { law: checked, hull: kind };
}
