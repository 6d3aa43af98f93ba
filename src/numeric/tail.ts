/**
 * What an integral over an order statistic needs to know about the upper tail of a distribution.
 *
 * Notation: x is a point of the line, v(x) the probability beyond it, F = 1 - v. A tail is a small
 * machine with a state: `centreAtTail` or `centreAtPoint` fixes a reference point, `moveTo` evaluates
 * everything at an offset from it, so that differences of logarithms keep their digits where the
 * logarithms themselves have thousands of nats.
 */

/** Which part of the line is integrated over, and how it is parametrised. */
export type TailRange =
  /** the whole line */
  | 'line'
  /** x > 0 */
  | 'half'
  /** x > 0, and the tail is the two-sided one, 2 v(x) */
  | 'folded';

/** The tail of a distribution at an offset from a reference point. */
export interface Tail {
  /** log v here - log v at the reference point. */
  shift: number;
  /** log v. */
  logTail: number;
  /** log(1 - v). */
  logOther: number;
  /** log of -dv/du / v, u the variable that `moveTo` takes. */
  logHazard: number;
  /** log of the mean excess: E[X | X > x] for the beta family, density / v for the normal law. */
  logExcess: number;
  /** Chooses the range, and as reference point the one beyond which the (folded) tail is exp(logTail). */
  centreAtTail(logTail: number, range: TailRange): void;
  /** Evaluates all fields at an offset from the reference point, in the variable of the range. */
  moveTo(offset: number): void;
}
