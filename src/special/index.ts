/**
 * Special functions on the log scale: gamma and beta, normal, incomplete beta and gamma, Stirling
 * numbers. Arguments are positional, and a cdf returns a `Probability` with both tails.
 *
 * @module
 */
export { erf, erfc, erfcx, millsRatio } from './error-function.ts';
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
export { stirlingRemainder } from './stirling-remainder.ts';
