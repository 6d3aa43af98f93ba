/**
 * The unit of all error bounds, and the bound of what is exact.
 */

/** 2^-52, the spacing of doubles at 1. As a literal, which bundlers can drop where it is not used. */
export const EPSILON = 2.220446049250313e-16;

/**
 * The error bound to state for the logarithm of a tail whose value is exact: the rounding of the
 * logarithm, with a factor that no other bound has, so that searches recognise it.
 */
export function exactLogError(log: number): number {
  // 2^-52 + 2^-75
  return 2.220446313948109e-16 * Math.abs(log);
}
