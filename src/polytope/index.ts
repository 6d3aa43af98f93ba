/**
 * Convex hulls of random points at finite n and d: volume, facets, heights, faces, membership.
 *
 * @module
 */
export { type CapProbabilityArgs, capProbability } from './cap-probability.ts';
export {
  type ExpectedFacesArgs,
  type ExpectedVerticesArgs,
  expectedFaces,
  expectedVertices,
} from './faces.ts';
export { type FacetHeight, type FacetHeightArgs, facetHeight } from './facet-height.ts';
export {
  type ExpectedFacetsArgs,
  type ExpectedFacetsBelowArgs,
  expectedFacets,
  expectedFacetsBelow,
} from './facets.ts';
export {
  type Exceedance,
  type HausdorffDistance,
  type HausdorffDistanceArgs,
  type HausdorffWithinArgs,
  hausdorffDistance,
  hausdorffWithin,
} from './hausdorff.ts';
export { type HeightLimit, type HeightLimitArgs, heightLimit } from './height-limit.ts';
export type { Hull } from './hull-options.ts';
export {
  type ExpectedHullIntrinsicVolumeArgs,
  type ExpectedHullVolumeArgs,
  expectedHullIntrinsicVolume,
  expectedHullVolume,
} from './hull-volume.ts';
export { type NextPointInHullArgs, nextPointInHull } from './next-point.ts';
export {
  type PointInHullArgs,
  pointInHull,
  type QueriesInHullArgs,
  queriesInHull,
} from './point-in-hull.ts';
export {
  type ProjectedFaces,
  type ProjectedFacesArgs,
  type ProjectedPolytope,
  projectedFaces,
} from './projected-faces.ts';
export { type SimplexVolume, type SimplexVolumeArgs, simplexVolume } from './simplex-volume.ts';
export {
  type HullIntrinsicVolumeRatioArgs,
  type HullVolumeRatioArgs,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
} from './volume-ratio.ts';
export { type ApproxVolumeThresholdArgs, approxVolumeThreshold } from './volume-threshold.ts';
