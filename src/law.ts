/**
 * Laws of the points: rotation-invariant distributions on R^d, named independently of d.
 *
 * A law is plain frozen data, so it survives JSON and structured clones; the functions that take one
 * say which families they have a formula for.
 */
import { checkFinite, checkOptions, checkPositive, DomainError } from './domain.ts';

/**
 * A law of independent, identically distributed points. Made by {@link gaussian},
 * {@link uniformBall}, {@link uniformSphere}, {@link betaLaw}, {@link betaPrimeLaw} or
 * {@link studentT}.
 */
export type Law = GaussianLaw | BetaLaw | BetaPrimeLaw | StudentTLaw;

/** The standard normal law; any mean and covariance where a question is affinely invariant. */
export interface GaussianLaw {
  /** Always `'law'`. */
  readonly kind: 'law';
  /** Always `'gaussian'`. */
  readonly family: 'gaussian';
}

/** Density proportional to (1 - |x|^2)^b in the unit ball; b = -1 is the uniform unit sphere. */
export interface BetaLaw {
  /** Always `'law'`. */
  readonly kind: 'law';
  /** Always `'beta'`. */
  readonly family: 'beta';
  /** The exponent, at least -1. */
  readonly b: number;
}

/** Density proportional to (1 + |x|^2)^-b on R^d, for b > d/2. */
export interface BetaPrimeLaw {
  /** Always `'law'`. */
  readonly kind: 'law';
  /** Always `'betaPrime'`. */
  readonly family: 'betaPrime';
  /** The exponent, above d/2 in every dimension d in which the law is used. */
  readonly b: number;
}

/** Multivariate t: in dimension d the beta-prime law with b = (degreesOfFreedom + d)/2. */
export interface StudentTLaw {
  /** Always `'law'`. */
  readonly kind: 'law';
  /** Always `'studentT'`. */
  readonly family: 'studentT';
  /** Degrees of freedom, positive. */
  readonly degreesOfFreedom: number;
}

/**
 * The standard normal law N(0, I) on R^d, and any other mean and covariance where the question does not
 * change under affine maps: membership, vertices and faces.
 *
 * @returns the law
 *
 * @example
 * ```ts
 * import { expectedFacets, gaussian } from 'hullgauge';
 * expectedFacets({ n: 50, d: 10, law: gaussian() }).toString(); // => '93354.9864529'
 * ```
 */
export function gaussian(): GaussianLaw {
  return Object.freeze({ kind: 'law', family: 'gaussian' });
}

/**
 * The uniform law on the unit ball of R^d: {@link betaLaw} with b = 0.
 *
 * @returns the law
 *
 * @example
 * ```ts
 * import { betaLaw, uniformBall } from 'hullgauge';
 * uniformBall(); // => betaLaw(0)
 * ```
 */
export function uniformBall(): BetaLaw {
  return betaLaw(0);
}

/**
 * The uniform law on the unit sphere of R^d, two points of equal probability for d = 1: {@link betaLaw}
 * with b = -1.
 *
 * @returns the law
 *
 * @example
 * ```ts
 * import { betaLaw, uniformSphere } from 'hullgauge';
 * uniformSphere(); // => betaLaw(-1)
 * ```
 */
export function uniformSphere(): BetaLaw {
  return betaLaw(-1);
}

/**
 * The law on the unit ball of R^d with density proportional to $(1 - |x|^2)^b$.
 *
 * @param b - exponent, finite and at least -1; 0 is the uniform ball, -1 means the uniform sphere
 * @returns the law
 * @throws A {@link DomainError} if `b` is out of range
 *
 * @example
 * ```ts
 * import { betaLaw, uniformSphere } from 'hullgauge';
 * betaLaw(-1); // => uniformSphere()
 * ```
 */
export function betaLaw(b: number): BetaLaw {
  checkFinite('betaLaw', 'b', b, -1);
  return Object.freeze({ kind: 'law', family: 'beta', b });
}

/**
 * The law on R^d with density proportional to $(1 + |x|^2)^{-b}$.
 *
 * @param b - exponent, finite and positive; every function that takes the law asks for b > d/2
 * @returns the law
 * @throws A {@link DomainError} if `b` is out of range
 *
 * @example
 * ```ts
 * import { betaPrimeLaw, capProbability, studentT } from 'hullgauge';
 * // in dimension d a t law of nu degrees of freedom, up to its scale, has b = (nu + d)/2
 * const height = { d: 3, height: 0.5 };
 * const p = capProbability({ ...height, law: betaPrimeLaw(4) }).value;
 * capProbability({ ...height, law: studentT({ degreesOfFreedom: 5 }) }).value; // => p
 * ```
 */
export function betaPrimeLaw(b: number): BetaPrimeLaw {
  checkPositive('betaPrimeLaw', 'b', b);
  return Object.freeze({ kind: 'law', family: 'betaPrime', b });
}

/**
 * The multivariate t law on R^d: heavier tails than the Gaussian, which is its limit after scaling.
 *
 * Standardised as the beta-prime law: its density is proportional to $(1 + |x|^2)^{-(\nu + d)/2}$ with $\nu$
 * degrees of freedom, so lengths are those of the usual t divided by $\sqrt{\nu}$.
 *
 * @param args - `degreesOfFreedom`: positive and finite
 * @returns the law; in dimension d it is the beta-prime law with b = (degreesOfFreedom + d)/2
 * @throws A {@link DomainError} if an option is unknown or out of range
 *
 * @example
 * ```ts
 * import { nextPointInHull, studentT } from 'hullgauge';
 * const law = studentT({ degreesOfFreedom: 3 });
 * `${nextPointInHull({ n: 1000, d: 6, law })}`; // => '0.937771058208'
 * ```
 */
export function studentT(args: { readonly degreesOfFreedom: number }): StudentTLaw {
  checkOptions('studentT', args, ['degreesOfFreedom']);
  const { degreesOfFreedom } = args;
  checkPositive('studentT', 'degreesOfFreedom', degreesOfFreedom);
  return Object.freeze({ kind: 'law', family: 'studentT', degreesOfFreedom });
}

/** A beta-prime law as the formulas take it. */
export interface ResolvedBetaPrimeLaw extends BetaPrimeLaw {
  /** Half the degrees of freedom of a Student t: b - d/2 without its rounding. */
  readonly excess?: number;
}

/** b - d/2, half the degrees of freedom: what the marginals depend on, in any dimension. */
export function excessOf(law: ResolvedBetaPrimeLaw, d: number): number {
  return law.excess ?? law.b - d / 2;
}

/**
 * Refuses anything but a valid law of one of the families for which `fn` has a formula in R^d.
 *
 * @returns the law with `studentT` resolved to the beta-prime law that it is in R^d
 */
export function checkLaw(
  fn: string,
  law: unknown,
  families: readonly ('gaussian' | 'beta' | 'betaPrime')[],
  d: number,
): GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw {
  if (typeof law !== 'object' || law === null || (law as Law).kind !== 'law') {
    throw new DomainError(fn, 'law', 'a law such as gaussian() or uniformBall()', law);
  }
  const given = law as Law;
  const resolved = given.family === 'studentT' ? betaPrimeOf(given.degreesOfFreedom, d) : given;
  if (!families.includes(resolved.family as 'gaussian')) {
    const list = families.map((family) => FAMILY_NAMES[family]).join(' or ');
    throw new DomainError(
      fn,
      'law',
      `${list} (no formula for other laws here)`,
      law,
      describeLaw(given),
    );
  }
  if (resolved.family === 'beta') checkFinite(fn, 'law.b', resolved.b, -1);
  if (
    resolved.family === 'betaPrime' &&
    !(excessOf(resolved, d) > 0 && Number.isFinite(resolved.b))
  ) {
    const parameter = given.family === 'studentT' ? 'law.degreesOfFreedom' : 'law.b';
    const requirement =
      given.family === 'studentT' ? 'finite and > 0' : `finite and > d/2 = ${d / 2}`;
    throw new DomainError(
      fn,
      parameter,
      requirement,
      given.family === 'studentT' ? given.degreesOfFreedom : resolved.b,
    );
  }
  return resolved as GaussianLaw | BetaLaw | ResolvedBetaPrimeLaw;
}

/** The t law in R^d. */
function betaPrimeOf(degreesOfFreedom: number, d: number): ResolvedBetaPrimeLaw {
  const b = (degreesOfFreedom + d) / 2;
  return { kind: 'law', family: 'betaPrime', b, excess: degreesOfFreedom / 2 };
}

const FAMILY_NAMES = {
  gaussian: 'gaussian()',
  beta: 'a beta law (uniformBall(), uniformSphere(), betaLaw(b))',
  betaPrime: 'a beta-prime law (betaPrimeLaw(b), studentT(...))',
} as const;

/** A law in words, for titles and error messages. */
export function describeLaw(law: Law): string {
  switch (law.family) {
    case 'gaussian':
      return 'Gaussian';
    case 'beta':
      if (law.b === 0) return 'uniform ball';
      return law.b === -1 ? 'uniform sphere' : `beta law with b = ${law.b}`;
    case 'betaPrime':
      return `beta-prime law with b = ${law.b}`;
    case 'studentT':
      return `Student t with ${law.degreesOfFreedom} degrees of freedom`;
    default:
      return `law of the unknown family ${String((law as Law).family)}`;
  }
}
