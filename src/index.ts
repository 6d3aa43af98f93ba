/**
 * Exact finite-sample answers about convex hulls of random points: both tails, honest error bounds,
 * and inverses.
 *
 * This entry holds the questions, the laws of the points, sizing and the result types. Special
 * functions, intrinsic volumes, arbitrary precision and charts have subpaths of their own.
 *
 * @module hullgauge
 */
export { type ApproxSeparabilityArgs, approxSeparability } from './conic/approx-separability.ts';
export { type ApproxTotalOrderOptions, approxTotalOrder } from './conic/approx-total-order.ts';
export {
  type ChiBarSquaredOptions,
  chiBarSquared,
  type EBarSquaredOptions,
  eBarSquared,
  type OrderRestrictedLaw,
} from './conic/chi-bar-squared.ts';
export type { Cone } from './conic/cone.ts';
export { type OriginInHullLowerBoundArgs, originInHullLowerBound } from './conic/depth-bound.ts';
export { coneMeetsSubspace, conesMeet } from './conic/kinematics.ts';
export {
  reversedWeights,
  type SimpleTreeOptions,
  simpleTree,
  totalOrder,
} from './conic/level-probabilities.ts';
export {
  type LogisticSignalArgs,
  type LogisticThresholdArgs,
  logisticSignal,
  logisticThreshold,
} from './conic/logistic-threshold.ts';
export { type OrthantWeightsArgs, orthantWeights } from './conic/orthant-weights.ts';
export {
  type RecoveryArgs,
  type RecoveryBoundsArgs,
  recoveryBounds,
  recoverySuccess,
} from './conic/recovery.ts';
export {
  dichotomyCount,
  type LabelArgs,
  labelSeparability,
  logisticFitExists,
} from './conic/separability.ts';
export { surroundTime } from './conic/surround-time.ts';
export {
  bridgeHull,
  type JointWalkHullArgs,
  jointWalkHull,
  type WalkHullArgs,
  walkHull,
} from './conic/walks.ts';
export { type WeakThresholdArgs, weakThreshold } from './conic/weak-threshold.ts';
export { type OriginInHullArgs, originInHull } from './conic/wendel.ts';
export type { Count } from './count.ts';
export {
  type HullMembership,
  type HullWeight,
  hullVertices,
  type InHullOptions,
  InterpolationAudit,
  type InterpolationAuditFields,
  type InterpolationAuditOptions,
  inHull,
  interpolationAudit,
  type LongWorkOptions,
  type Points,
  type SamplerOptions,
  type Separability,
  type SeparableOptions,
  type Separator,
  type SimulatedEvent,
  type SimulateOptions,
  type Simulation,
  sampler,
  separable,
  simulate,
} from './data/index.ts';
export type { DisplayBundle, DisplayRow } from './display.ts';
export type { Distribution } from './distribution.ts';
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
export type { Answer } from './plan/answer.ts';
export {
  type SizingAnswer,
  type SizingReport,
  type SizingReportArgs,
  type SizingRow,
  sizingReport,
} from './plan/sizing-report.ts';
export { type FixedArgs, largest, type ParameterOf, smallest } from './plan/smallest.ts';
export type { Target } from './plan/target.ts';
export {
  type ApproxVolumeThresholdArgs,
  approxVolumeThreshold,
  type CapProbabilityArgs,
  capProbability,
  type Exceedance,
  type ExpectedFacesArgs,
  type ExpectedFacetsArgs,
  type ExpectedFacetsBelowArgs,
  type ExpectedHullIntrinsicVolumeArgs,
  type ExpectedHullVolumeArgs,
  type ExpectedVerticesArgs,
  expectedFaces,
  expectedFacets,
  expectedFacetsBelow,
  expectedHullIntrinsicVolume,
  expectedHullVolume,
  expectedVertices,
  type FacetHeight,
  type FacetHeightArgs,
  facetHeight,
  type HausdorffDistance,
  type HausdorffDistanceArgs,
  type HausdorffWithinArgs,
  type HeightLimit,
  type HeightLimitArgs,
  type Hull,
  type HullIntrinsicVolumeRatioArgs,
  type HullVolumeRatioArgs,
  hausdorffDistance,
  hausdorffWithin,
  heightLimit,
  hullIntrinsicVolumeRatio,
  hullVolumeRatio,
  type NextPointInHullArgs,
  nextPointInHull,
  type PointInHullArgs,
  type ProjectedFaces,
  type ProjectedFacesArgs,
  type ProjectedPolytope,
  pointInHull,
  projectedFaces,
  type QueriesInHullArgs,
  queriesInHull,
  type SimplexVolume,
  type SimplexVolumeArgs,
  simplexVolume,
} from './polytope/index.ts';
export { type PlainProbability, Probability, type ProbabilityFields } from './probability.ts';
