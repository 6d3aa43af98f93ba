/** What a probability says of its own exactness, and whether that is so. */
import type { Probability } from 'hullgauge';
import { exactLogError } from '../../src/epsilon.ts';

/** Whether the error bound is the one that marks an exact value. */
export function statesExact(p: Pick<Probability, 'log' | 'logComplement' | 'logError'>): boolean {
  return p.logError === exactLogError(Math.min(p.log, p.logComplement));
}

/** Whether a double is exactly a/b. */
export function isQuotient(value: number, a: bigint, b: bigint): boolean {
  let scaled = value;
  let power = 1n;
  for (; !Number.isInteger(scaled); scaled *= 2) power *= 2n;
  return BigInt(scaled) * b === a * power;
}
