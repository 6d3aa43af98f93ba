/**
 * Random cones and what Wendel's formula answers: whether points surround a target, whether labels are
 * separable, whether recovery succeeds, and the weights of order-restricted tests.
 *
 * @module
 */

export { type ApproxSeparabilityArgs, approxSeparability } from './approx-separability.ts';
export { type ApproxTotalOrderOptions, approxTotalOrder } from './approx-total-order.ts';
export {
  type ArrangementArgs,
  type ArrangementFacesArgs,
  arrangementFaces,
  arrangementRegions,
} from './arrangement.ts';
export {
  type ChiBarSquaredOptions,
  chiBarSquared,
  type EBarSquaredOptions,
  eBarSquared,
  type OrderRestrictedLaw,
} from './chi-bar-squared.ts';
export { type Cone, halfspace, orthant, ray, subspace } from './cone.ts';
export { polarCone, productCone } from './cone-algebra.ts';
export { circularCone, weylChamber } from './cone-families.ts';
export { type OriginInHullLowerBoundArgs, originInHullLowerBound } from './depth-bound.ts';
export {
  approxNuclearNormDimension,
  l1DescentCone,
  l1StatisticalDimension,
  linfDescentCone,
} from './descent-cones.ts';
export { coneMeetsSubspace, conesMeet } from './kinematics.ts';
export {
  reversedWeights,
  type SimpleTreeOptions,
  simpleTree,
  totalOrder,
} from './level-probabilities.ts';
export {
  type LogisticSignalArgs,
  type LogisticThresholdArgs,
  logisticSignal,
  logisticThreshold,
} from './logistic-threshold.ts';
export { type OrthantWeightsArgs, orthantWeights } from './orthant-weights.ts';
export { polyhedralCone } from './polyhedral-cone.ts';
export {
  coverEfronCone,
  type RandomCone,
  type RandomConeArgs,
  schlaefliCone,
} from './random-cones.ts';
export {
  type RecoveryArgs,
  type RecoveryBoundsArgs,
  recoveryBounds,
  recoverySuccess,
} from './recovery.ts';
export {
  dichotomyCount,
  type LabelArgs,
  labelSeparability,
  logisticFitExists,
} from './separability.ts';
export { approxPolyhedralCone } from './simulated-cone.ts';
export { surroundTime } from './surround-time.ts';
export {
  bridgeHull,
  type JointWalkHullArgs,
  jointWalkHull,
  type WalkHullArgs,
  walkHull,
} from './walks.ts';
export { type WeakThresholdArgs, weakThreshold } from './weak-threshold.ts';
export { type OriginInHullArgs, originInHull } from './wendel.ts';
