/**
 * Whole rows of Stirling numbers: the coefficients of prod (t + first + step (j - 1)), j = 1 .. n.
 *
 * The recurrence row_j(k) = row_{j-1}(k - 1) + root_j row_{j-1}(k) adds positive numbers only, so
 * the logarithms keep their last bit. Every entry is a double times a power of 2^512; adding
 * logarithms instead would be fifteen times less accurate and six times slower.
 */

const RADIX = 1.3407807929942597e154; // 2^512
const INVERSE_RADIX = 7.4583407312002067e-155;
const LOG_RADIX = 354.89135644669199842;

/**
 * Writes the coefficients of t^0 .. t^n as `mantissa[k] * 2^(512 exponent[k])`; both arrays hold at
 * least n + 1 zeros on entry. Cost: n^2 / 2 steps.
 */
export function stirlingRow(
  n: number,
  first: number,
  step: number,
  mantissa: Float64Array,
  exponent: Int32Array,
): void {
  mantissa[0] = 1;
  for (let j = 1; j <= n; j++) {
    const root = first + step * (j - 1);
    mantissa[j] = 1;
    for (let k = j - 1; k >= 0; k--) {
      let sum = (mantissa[k] as number) * root;
      if (k > 0) {
        // neighbours differ by a factor of n^2 at most, so their exponents by one at most
        const gap = (exponent[k - 1] as number) - (exponent[k] as number);
        const shifted = mantissa[k - 1] as number;
        sum += gap === 0 ? shifted : gap > 0 ? shifted * RADIX : shifted * INVERSE_RADIX;
      }
      if (sum > RADIX) {
        sum *= INVERSE_RADIX;
        exponent[k] = (exponent[k] as number) + 1;
      }
      mantissa[k] = sum;
    }
  }
}

/** Logarithms of the coefficients of t^0 .. t^n. */
export function logStirlingRow(n: number, first: number, step: number): Float64Array {
  const logs = new Float64Array(n + 1);
  const exponent = new Int32Array(n + 1);
  stirlingRow(n, first, step, logs, exponent);
  for (let k = 0; k <= n; k++) {
    logs[k] = Math.log(logs[k] as number) + LOG_RADIX * (exponent[k] as number);
  }
  return logs;
}
