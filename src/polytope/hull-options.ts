/**
 * What the questions about hulls of random points share: which hull is meant, and the checks of n, d, k.
 */
import { type ResolvedCount, resolveCount } from '../count.ts';
import { checkChoice, checkInteger, DomainError } from '../domain.ts';
import { type BetaLaw, checkLaw } from '../law.ts';
import type { LogNumber } from '../log-number.ts';

/**
 * Which points the hull is taken of: the sample itself (`'plain'`), the sample and its mirror image
 * (`'symmetric'`, n counts pairs), or the sample and the centre of the law (`'withCentre'`).
 */
export type Hull = 'plain' | 'symmetric' | 'withCentre';

const HULLS: readonly Hull[] = ['plain', 'symmetric', 'withCentre'];

/** Largest dimension of the questions about volumes and facets. */
export const MAX_DIMENSION = 1_000_000;

/** Refuses any `hull` but the three; left out it is `'plain'`. */
export function resolveHull(fn: string, hull: unknown, choices: readonly Hull[] = HULLS): Hull {
  if (hull === undefined) return 'plain';
  checkChoice(fn, 'hull', hull, choices);
  return hull;
}

/** Refuses anything but a dimension in the given range, from 1 to a million if left out. */
export function checkDimension(
  fn: string,
  d: unknown,
  least = 1,
  largest: number = MAX_DIMENSION,
): asserts d is number {
  checkInteger(fn, 'd', d, least, largest);
}

/** Refuses anything but a number of points. */
export function resolvePoints(fn: string, n: number | LogNumber): ResolvedCount {
  return resolveCount(fn, 'n', n, 0);
}

/** Marginal exponents between -1, the two-point law, and this are refused. */
export const LEAST_MARGINAL = -0.99;

/**
 * The exponent beta + (d - 1)/2 of one coordinate, for a beta law.
 *
 * On the line the laws between the two-point law and beta = -0.99 are refused: nearly all their mass
 * lies within rounding of the ends.
 */
export function resolveMarginal(fn: string, law: unknown, d: number): number {
  const { b } = checkLaw(fn, law, ['beta'], d) as BetaLaw;
  const marginal = b + (d - 1) / 2;
  if (marginal > -1 && marginal < LEAST_MARGINAL) {
    throw new DomainError(fn, 'law.b', `-1 or at least ${LEAST_MARGINAL} for d = 1`, b);
  }
  return marginal;
}
