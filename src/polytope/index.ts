/**
 * Convex hulls of random points at finite n and d: volume, facets, heights, faces, membership.
 *
 * @module
 */
export { type CapProbabilityOptions, capProbability } from './cap-probability.ts';
export {
  type ExpectedFacesArgs,
  type ExpectedVerticesArgs,
  expectedFaces,
  expectedVertices,
} from './faces.ts';
export { type FacetHeight, type FacetHeightOptions, facetHeight } from './facet-height.ts';
export {
  type ExpectedFacetsBelowOptions,
  type ExpectedFacetsOptions,
  expectedFacets,
  expectedFacetsBelow,
} from './facets.ts';
export { type HeightLimit, type HeightLimitOptions, heightLimit } from './height-limit.ts';
export type { Hull } from './hull-options.ts';
export {
  type ExpectedHullIntrinsicVolumeOptions,
  type ExpectedHullVolumeOptions,
  expectedHullIntrinsicVolume,
  expectedHullVolume,
} from './hull-volume.ts';
export { type NextPointInHullArgs, nextPointInHull } from './next-point.ts';
export {
  type ProjectedFaces,
  type ProjectedFacesArgs,
  type ProjectedPolytope,
  projectedFaces,
} from './projected-faces.ts';
export { type SimplexVolume, type SimplexVolumeOptions, simplexVolume } from './simplex-volume.ts';
export {
  type HullIntrinsicVolumeRatioOptions,
  type HullVolumeRatioOptions,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
} from './volume-ratio.ts';
export { type ApproxVolumeThresholdOptions, approxVolumeThreshold } from './volume-threshold.ts';
