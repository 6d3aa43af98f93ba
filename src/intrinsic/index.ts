/**
 * Intrinsic volumes of convex bodies, ball volumes, the Steiner polynomial.
 *
 * @module
 */
export {};
