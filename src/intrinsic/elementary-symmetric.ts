/**
 * Elementary symmetric polynomials of non-negative numbers given by their logarithms.
 */
import { logAddExpKernel } from '../special/log-domain.ts';

/** Logarithms of e_0, ..., e_d of d numbers, by the recurrence that adds one number at a time. */
export function logElementarySymmetric(logs: readonly number[], leftOut = -1): Float64Array {
  const d = logs.length - (leftOut >= 0 ? 1 : 0);
  const e = new Float64Array(d + 1).fill(Number.NEGATIVE_INFINITY);
  e[0] = 0;
  let count = 0;
  for (let i = 0; i < logs.length; i++) {
    if (i === leftOut) continue;
    count++;
    const log = logs[i] as number;
    for (let k = count; k >= 1; k--) {
      e[k] = logAddExpKernel(e[k] as number, log + (e[k - 1] as number));
    }
  }
  return e;
}
