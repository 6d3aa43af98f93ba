/**
 * The argument of every quantile: a number from 0 to 1, or a probability with both tails.
 */
import { DomainError } from '../domain.ts';
import { isProbability, type Probability } from '../probability.ts';

/** Refuses anything but a number from 0 to 1 or a {@link Probability}. */
export function checkProbability(
  fn: string,
  parameter: string,
  value: unknown,
): asserts value is number | Probability {
  if (typeof value === 'number' && value >= 0 && value <= 1) return;
  if (
    isProbability(value) &&
    typeof value.log === 'number' &&
    typeof value.logComplement === 'number'
  ) {
    return;
  }
  throw new DomainError(fn, parameter, 'a number from 0 to 1 or a Probability', value);
}
