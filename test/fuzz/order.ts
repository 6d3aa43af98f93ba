/** Whether one result is at most another, as far as their stated errors tell. */
import type { Four } from './inspect.ts';

/** Relative error of plain numbers without a stated one. */
const SLACK = 1e-13;

/** How a result that ought to be at most the other exceeds it; undefined where it does not. */
export function fallsBetween(
  lower: unknown,
  upper: unknown,
  slack: number = SLACK,
): string | undefined {
  if (typeof lower === 'number' && typeof upper === 'number') {
    const size = Math.max(Math.abs(lower), Math.abs(upper));
    // Infinity beside Infinity is in order
    return lower > upper && lower - upper > slack * size ? `${lower} before ${upper}` : undefined;
  }
  if (typeof lower === 'bigint' && typeof upper === 'bigint') {
    return lower > upper ? `${lower} before ${upper}` : undefined;
  }
  if (typeof lower !== 'object' || typeof upper !== 'object' || !lower || !upper) return undefined;
  switch ((lower as { kind?: unknown }).kind) {
    case 'probability':
      return probabilityFalls(lower as Four, upper as Four);
    case 'logNumber':
      return logNumberFalls(lower as Four, upper as Four);
    case 'cone':
      return fieldFalls(lower, upper, 'statisticalDimension', 1e-9);
  }
  if (typeof (lower as Decimal).lte === 'function') {
    return (lower as Decimal).lte(upper) ? undefined : `${String(lower)} before ${String(upper)}`;
  }
  for (const key of Object.keys(lower)) {
    const wrong = fieldFalls(lower, upper, key, slack);
    if (wrong !== undefined) return `${key}: ${wrong}`;
  }
  return undefined;
}

interface Decimal {
  lte(other: unknown): boolean;
}

const fieldFalls = (lower: object, upper: object, key: string, slack: number): string | undefined =>
  fallsBetween(
    (lower as Record<string, unknown>)[key],
    (upper as Record<string, unknown>)[key],
    slack,
  );

/** The smaller tail of the pair decides: its logarithm is what the errors speak of. */
function probabilityFalls(p: Four, q: Four): string | undefined {
  const error = p.logError + q.logError;
  const upperSide = Math.min(p.complement, q.complement) < Math.min(p.value, q.value);
  const [small, large] = upperSide ? [q.logComplement, p.logComplement] : [p.log, q.log];
  const values = upperSide ? [q.complement, p.complement] : [p.value, q.value];
  const [first, second] = values as [number, number];
  // Of the larger of two tails it is the number that carries the error.
  const rounding = 4.5e-16 * (1 + Math.abs(large));
  const wrong =
    (small > large && small - large > error + rounding) ||
    first > second * Math.exp(error) * (1 + 4.5e-16) + 5e-324;
  if (!wrong) return undefined;
  return `${JSON.stringify(p)} before ${JSON.stringify(q)}`;
}

function logNumberFalls(x: Four, y: Four): string | undefined {
  const wrong = x.log > y.log && x.log - y.log > x.logError + y.logError;
  return wrong ? `${JSON.stringify(x)} before ${JSON.stringify(y)}` : undefined;
}
