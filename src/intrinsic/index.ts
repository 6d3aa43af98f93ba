/**
 * Intrinsic volumes of convex bodies, ball volumes, the Steiner polynomial.
 *
 * @module
 */
export { ballVolume, flagCoefficient, sphereArea } from './ball-volume.ts';
export {
  type BallArgs,
  ball,
  box,
  type CrossPolytopeArgs,
  type CubeArgs,
  crossPolytope,
  cube,
  type RegularSimplexArgs,
  regularSimplex,
} from './bodies.ts';
export { type Body, meanWidth, steinerVolume, surfaceArea } from './body.ts';
export { type EllipsoidArgs, ellipsoid } from './ellipsoid.ts';
