/**
 * Intrinsic volumes of convex bodies, ball volumes, the Steiner polynomial.
 *
 * @module
 */
export { ballVolume, flagCoefficient, sphereArea } from './ball-volume.ts';
export {
  type BallOptions,
  ball,
  box,
  type CrossPolytopeOptions,
  type CubeOptions,
  crossPolytope,
  cube,
  type RegularSimplexOptions,
  regularSimplex,
} from './bodies.ts';
export { type Body, meanWidth, steinerVolume, surfaceArea } from './body.ts';
export { type EllipsoidOptions, ellipsoid } from './ellipsoid.ts';
