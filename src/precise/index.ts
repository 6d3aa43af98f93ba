/**
 * Exact fractions and decimals of any number of digits, by methods of their own: a second opinion on
 * the functions that answer in doubles.
 *
 * @module
 */
export type { ExactNumber } from './fraction.ts';
export { type HullVolumeRatioDecimalArgs, hullVolumeRatioDecimal } from './hull-volume.ts';
export { incompleteBetaDecimal } from './incomplete-beta.ts';
export {
  type DichotomyCountExactArgs,
  dichotomyCountExact,
  type ExactProbability,
  type OriginInHullDecimalArgs,
  type OriginInHullExactArgs,
  originInHullDecimal,
  originInHullExact,
} from './wendel.ts';
