/**
 * Special functions on the log scale: gamma and beta, normal, incomplete beta and gamma, Stirling
 * numbers. Arguments are positional, and a cdf returns a `Probability` with both tails.
 *
 * @module
 */

export { binomialCdf, logBinomialPmf } from './binomial.ts';
export { binomialQuantile } from './binomial-quantile.ts';
export { chiSquaredCdf, chiSquaredQuantile } from './chi-squared.ts';
export { erf, erfc, erfcx, millsRatio } from './error-function.ts';
export { type ComplexNumber, faddeeva } from './faddeeva.ts';
export { incompleteBeta } from './incomplete-beta.ts';
export { type BetaPoint, incompleteBetaInverse } from './incomplete-beta-inverse.ts';
export { incompleteGamma } from './incomplete-gamma.ts';
export { incompleteGammaInverse } from './incomplete-gamma-inverse.ts';
export { logBeta, logBinomial, logFactorial } from './log-beta.ts';
export {
  expm1mx,
  log1mExp,
  log1pmx,
  logAddExp,
  logSubExp,
  logSumExp,
} from './log-domain.ts';
export { logGamma, logGamma1p, logGammaRatio } from './log-gamma.ts';
export { logNormalCdf, normalCdf, normalQuantile } from './normal.ts';
export {
  logStirling1,
  logStirling1Row,
  logStirlingB,
  logStirlingBRow,
} from './stirling-numbers.ts';
export { stirlingRemainder } from './stirling-remainder.ts';
