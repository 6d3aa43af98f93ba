/**
 * The unit of all error bounds.
 */

/** 2^-52, the spacing of doubles at 1. As a literal, which bundlers can drop where it is not used. */
export const EPSILON = 2.220446049250313e-16;
