/**
 * Error-free transformations: the part of a sum, product or quotient that rounding throws away.
 *
 * A value carried as `high + low`, with `low` the error of `high`, has about 32 significant digits.
 * Nothing here allocates; whoever needs both parts computes the high part with an ordinary operator
 * and asks for the low part. Source: A floating-point technique for extending the available
 * precision, Numerische Mathematik 18 (1971), doi 10.1007/BF01397083. JavaScript has no fused
 * multiply-add, so products are split into halves of 26 bits.
 */

/** 2^27 + 1: multiplying by it separates the upper from the lower 26 bits. */
const SPLITTER = 134217729;

/** Above it the split itself could overflow. */
const SPLIT_LIMIT = 1e290;

/** Exact value of `a + b - s`, where `s` is the rounded sum `a + b`. */
export function sumError(a: number, b: number, s: number): number {
  const z = s - a;
  return a - (s - z) + (b - z);
}

/**
 * Exact value of `a * b - p`, where `p` is the rounded product `a * b`.
 *
 * Exact as long as the error itself is a normal number (|p| above 1e-290); 0 where `p` overflows.
 */
export function productError(a: number, b: number, p: number): number {
  if (!(Math.abs(a) < SPLIT_LIMIT && Math.abs(b) < SPLIT_LIMIT && Math.abs(p) < SPLIT_LIMIT)) {
    return scaledProductError(a, b, p);
  }
  const ac = SPLITTER * a;
  const aHigh = ac - (ac - a);
  const aLow = a - aHigh;
  const bc = SPLITTER * b;
  const bHigh = bc - (bc - b);
  const bLow = b - bHigh;
  return aLow * bLow - (p - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

/** The same near the overflow limit, computed on operands scaled by powers of two. */
function scaledProductError(a: number, b: number, p: number): number {
  if (!(Math.abs(p) <= Number.MAX_VALUE)) return 0;
  const down = 6.842277657836021e-49; // 2^-160
  const up = 1208925819614629174706176; // 2^80
  // |p| is finite, so at most one operand is large; a tiny partner is scaled up against underflow.
  const large = Math.abs(a) > Math.abs(b) ? a : b;
  const other = Math.abs(a) > Math.abs(b) ? b : a;
  return productError(large * down, other * up, p * down * up) * up;
}

/** Rounded value of `a / b - q` where `q` is the rounded quotient `a / b`. */
export function quotientError(a: number, b: number, q: number): number {
  const p = q * b;
  return (a - p - productError(q, b, p)) / b;
}
