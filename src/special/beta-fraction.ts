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
  const nu = a + b;
  // Forwards only to see how many steps it takes: the differences of the convergents alternate, and at
  // the mean of large shapes they cancel.
  let d = (a + 1) / a / (lambda + 1);
  let change = d;
  let sum = d;
  let steps = 0;
  while (Math.abs(change) > 3e-17 * sum) {
    if (++steps === MAX_STEPS) {
      throw new Error(`fraction of the incomplete beta function at a = ${a}, b = ${b}, x = ${x}`);
    }
    const t = innerTerm(a, b, x, steps);
    const numerator = partialNumerator(a, nu, x, steps, t);
    const denominator = partialDenominator(a, y, lambda, steps, t);
    const next = 1 / (denominator + numerator * d);
    change *= -numerator * d * next;
    d = next;
    sum += change;
  }
  // Backwards every step forgets most of the rounding before it.
  let below = 0;
  for (let n = steps; n >= 1; n--) {
    const t = innerTerm(a, b, x, n);
    below = partialNumerator(a, nu, x, n, t) / (partialDenominator(a, y, lambda, n, t) + below);
  }
  return 1 / ((a / (a + 1)) * (lambda + 1) + below);
}

/** n (b - n) x / (a + 2 n - 1), a factor of A_n and a part of B_n. */
function innerTerm(a: number, b: number, x: number, n: number): number {
  return (n * ((b - n) * x)) / (a + 2 * n - 1);
}

/** A_n. */
function partialNumerator(a: number, nu: number, x: number, n: number, t: number): number {
  return ((a + n - 1) / (a + 2 * n - 1)) * t * ((nu + (n - 1)) * x);
}

/** B_n. */
function partialDenominator(a: number, y: number, lambda: number, n: number, t: number): number {
  return n + t + ((a + n) / (a + 2 * n + 1)) * (lambda + 1 + n * (1 + y));
}
