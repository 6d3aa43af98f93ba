/**
 * Exact finite-sample answers about convex hulls of random points: both tails, honest error bounds,
 * and inverses.
 *
 * This entry holds the questions, the laws of the points, sizing and the result types. Special
 * functions, intrinsic volumes, arbitrary precision and charts have subpaths of their own.
 *
 * @packageDocumentation
 */
export type { Count } from './count.ts';
export { DomainError } from './domain.ts';
export {
  type BetaLaw,
  type BetaPrimeLaw,
  betaLaw,
  betaPrimeLaw,
  type GaussianLaw,
  gaussian,
  type Law,
  type StudentTLaw,
  studentT,
  uniformBall,
  uniformSphere,
} from './law.ts';
export { LogNumber, type PlainLogNumber } from './log-number.ts';
export { type PlainProbability, Probability, type ProbabilityFields } from './probability.ts';
