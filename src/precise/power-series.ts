/**
 * Power series with positive terms whose ratios are small fractions times the argument.
 */
import { type Arithmetic, bitLength } from './arithmetic.ts';

/**
 * sum_k c_k x^k with c_0 = 1 and c_k/c_(k-1) = above(k)/below(k), for a fixed-point x inside (0, 1).
 *
 * Powers x^i with i < m are left out of the terms, which go to m separate sums: so only every m-th term
 * costs a multiplication of long numbers, all others one by a short number and a division by one.
 */
export function sumPowerSeries(
  { bits, one }: Arithmetic,
  x: bigint,
  above: (k: bigint) => bigint,
  below: (k: bigint) => bigint,
): bigint {
  const scale = BigInt(bits);
  const size = Math.max(
    2 ** -20,
    bits + 1 - bitLength(x),
    1.5 * (1 - Number(x >> (scale - 52n)) / 2 ** 52),
  );
  const m = Math.max(1, Math.round(Math.sqrt(bits / size / 2)));
  const sums = new Array<bigint>(m).fill(0n);
  let stride = one;
  for (let i = 0; i < m; i++) stride = (stride * x) >> scale;
  sums[0] = one;
  let term = one;
  for (let k = 1; term !== 0n; k++) {
    const index = k % m;
    if (index === 0) term = (term * stride) >> scale;
    const order = BigInt(k);
    term = (term * above(order)) / below(order);
    sums[index] = (sums[index] as bigint) + term;
  }
  let total = 0n;
  for (let i = m - 1; i >= 0; i--) total = ((total * x) >> scale) + (sums[i] as bigint);
  return total;
}
