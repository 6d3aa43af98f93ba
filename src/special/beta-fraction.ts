/**
 * Continued fraction of the incomplete beta function.
 *
 *   I_x(a, b) = x^a y^b / B(a, b) * 1/(B_0 + A_1/(B_1 + A_2/(B_2 + ...))),   lambda = a y - b x >= 0,
 *   A_n = (a + n - 1)/(a + 2 n - 1) (a + b + n - 1)/(a + 2 n - 1) n (b - n) x^2,
 *   B_n = n + n (b - n) x/(a + 2 n - 1) + (a + n)/(a + 2 n + 1) (lambda + 1 + n (1 + y)).
 *
 * Source: Algorithm 708, ACM Transactions on Mathematical Software 18 (1992) 360-373,
 * doi 10.1145/131766.131776. At the mean about 2.5 min(a, b)^(1/2) steps are needed below 1000, away
 * from it fewer; beta-expansion.ts takes over where there would be many.
 */

/** Never reached: at most 98 steps have been seen where the fraction is used. */
const MAX_STEPS = 10000;

/** I_x(a, b) B(a, b) / (x^a y^b) for x at or below the mean, by the fraction. */
export function betaFraction(a: number, b: number, x: number, y: number, lambda: number): number {
  // The convergents are summed as a series of their differences, with the rounding errors carried: as
  // a running product they would lose two bits every hundred steps. The first convergent is
  // 1/(lambda + 1); digits are lost only where the result is far below it, at the mean of large shapes.
  let d = (a + 1) / a / (lambda + 1);
  let change = d;
  let sum = d;
  let carry = 0;
  const nu = a + b;
  for (let n = 1; n < MAX_STEPS; n++) {
    const inverse = 1 / (a + 2 * n - 1);
    const t = n * ((b - n) * x) * inverse;
    const numerator = (a + n - 1) * inverse * t * ((nu + (n - 1)) * x);
    const denominator = n + t + ((a + n) / (a + 2 * n + 1)) * (lambda + 1 + n * (1 + y));
    const next = 1 / (denominator + numerator * d);
    change *= -numerator * d * next;
    d = next;
    const term = change + carry;
    const total = sum + term;
    carry = sum - total + term;
    sum = total;
    if (Math.abs(change) <= 3e-17 * sum) return sum;
  }
  throw new Error(`fraction of the incomplete beta function at a = ${a}, b = ${b}, x = ${x}`);
}
