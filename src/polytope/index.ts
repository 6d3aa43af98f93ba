/**
 * Convex hulls of random points at finite n and d: volume, facets, heights, faces, membership.
 *
 * @module
 */
export type { Hull } from './hull-options.ts';
export {
  type HullIntrinsicVolumeRatioOptions,
  type HullVolumeRatioOptions,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
} from './volume-ratio.ts';
