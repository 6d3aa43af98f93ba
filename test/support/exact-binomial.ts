/** Fair binomial sums in exact integers: the oracle that shares nothing with the library. */

/** sum_{k < d} binom(n - 1, k): the numerator of P(not surrounded) over 2^(n-1), n >= 1. */
export function coinSum(n: number, d: number): bigint {
  let term = 1n;
  let sum = 0n;
  const tosses = BigInt(n - 1);
  for (let k = 0n; k < BigInt(Math.min(d, n)); k++) {
    sum += term;
    term = (term * (tosses - k)) / (k + 1n);
  }
  return sum;
}

/** numerator / 2^bits, correctly rounded. */
export function dyadic(numerator: bigint, bits: number): number {
  if (numerator === 0n) return 0;
  const length = numerator.toString(2).length;
  const shift = length - 54;
  if (shift <= 0)
    return Number(numerator) * 2 ** -Math.min(bits, 1000) * 2 ** -Math.max(0, bits - 1000);
  // 54 bits and a sticky bit round like the whole number.
  const top = numerator >> BigInt(shift);
  const sticky = top << BigInt(shift) === numerator ? 0n : 1n;
  const rounded = Number((top << 1n) | sticky);
  const exponent = shift - 1 - bits;
  return rounded * 2 ** Math.max(exponent, -1000) * 2 ** Math.min(0, exponent + 1000);
}
