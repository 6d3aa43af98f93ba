/**
 * Random cones and what Wendel's formula answers: whether points surround a target, whether labels are
 * separable, whether recovery succeeds, and the weights of order-restricted tests.
 *
 * @module
 */
export {};
