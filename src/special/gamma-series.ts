/**
 * The three elementary forms of the incomplete gamma function, each divided by what stands in front.
 *
 * Notation: f(x) = x^a e^-x / Gamma(a), P the lower and Q the upper tail of the gamma law with shape
 * a, so that dP/d(log x) = f(x).
 */

const MAX_TERMS = 1000;

/**
 * P Gamma(1 + a) / x^a - 1 = a sum_{n >= 1} (-x)^n / (n! (a + n)), for x <= 1: the alternating
 * series, with the leading 1 left out because it is all that matters when a is tiny.
 */
export function gammaPowerSeries(a: number, x: number): number {
  let power = 1;
  let sum = 0;
  for (let n = 1; n < MAX_TERMS; n++) {
    power *= -x / n;
    const term = power / (a + n);
    sum += term;
    if (Math.abs(term) <= 1e-17 * Math.abs(sum)) return a * sum;
  }
  throw new Error(`power series of the incomplete gamma function at a = ${a}, x = ${x}`);
}

/** P / f = sum_{n >= 0} x^n / (a (a + 1) ... (a + n)), for x <= a: all terms positive. */
export function gammaTermSeries(a: number, x: number): number {
  let term = 1;
  let sum = 0;
  for (let n = 1; n < MAX_TERMS; n++) {
    term *= x / (a + n);
    sum += term;
    if (term <= 1e-17 * sum) return (1 + sum) / a;
  }
  throw new Error(`series of the incomplete gamma function at a = ${a}, x = ${x}`);
}

/**
 * Q / f by Legendre's continued fraction 1 / (x + 1 - a - (1 - a) / (x + 3 - a - ...)), for x > a
 * and x > 1.
 *
 * Evaluated from the back, which damps rounding errors; going forward they pile up to 1e-14 near
 * x = 1. After n steps the truncation error is about exp(-4 sqrt(n x)), hence n = 95 / x; the rest of
 * the count was found by trial for a up to 200 and, for larger a, x > 2 a.
 */
export function gammaFraction(a: number, x: number): number {
  const first = x + 1 - a;
  const terms = a <= 200 ? 14 + 95 / x + 3 * (a / x) * Math.sqrt(a) : 30;
  let rest = 0;
  for (let i = Math.ceil(terms); i > 0; i--) rest = (i * (a - i)) / (first + 2 * i + rest);
  return 1 / (first + rest);
}
