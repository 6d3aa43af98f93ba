/**
 * Polynomials with stored coefficients, from the constant term upwards.
 *
 * The coefficients stand beside the functions that use them; `test/reference/special-coefficients.py`
 * recomputes them all.
 */

/**
 * Value of a polynomial at t.
 *
 * Even and odd powers run as two independent Horner chains: half the latency of one, which is what
 * the functions of this room spend their time on.
 */
export function evaluatePolynomial(coefficients: readonly number[], t: number): number {
  const square = t * t;
  let i = coefficients.length - 1;
  let even = 0;
  let odd = 0;
  if ((i & 1) === 0) {
    even = coefficients[i] as number;
    i--;
  }
  for (; i > 0; i -= 2) {
    odd = odd * square + (coefficients[i] as number);
    even = even * square + (coefficients[i - 1] as number);
  }
  return even + t * odd;
}

/** (p(t) - p(u)) / (t - u), also for t near u: Horner's scheme for the divided difference. */
export function dividedDifference(coefficients: readonly number[], t: number, u: number): number {
  let value = 0;
  let slope = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) {
    slope = slope * u + value;
    value = value * t + (coefficients[i] as number);
  }
  return slope;
}
