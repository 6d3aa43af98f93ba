/**
 * The next point on the line, for any law without atoms: of n + 1 numbers in random order the last is
 * as likely as any other to be an extreme one, so it is outside the hull of the others with probability
 * 2/(n + 1), and outside their symmetric hull, where only the largest distance counts, with 1/(n + 1).
 */
import type { ResolvedCount } from '../count.ts';
import { EPSILON } from '../epsilon.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';
import { quotientProbability } from '../special/tail-result.ts';

/** P(the next number lies in the hull of n). */
export function membershipOnLine(
  { n, log }: ResolvedCount,
  hull: 'plain' | 'symmetric',
): Probability {
  const extremes = hull === 'plain' ? 2 : 1;
  if (n < extremes) return certainty(false);
  if (n < 2 ** 53) return quotientProbability(n + 1 - extremes, n + 1);
  const outside = Math.log(extremes) - log;
  return probabilityFromTail(Math.exp(outside), outside, 'upper', EPSILON * (1 + log));
}
