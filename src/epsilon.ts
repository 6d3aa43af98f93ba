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
  // 1 + 2^-23
  return 1.00000011920928955078125 * EPSILON * Math.abs(log);
}
