/**
 * Digamma and trigamma functions of a positive argument.
 *
 * Shifted upwards by the recurrence to x >= 12, where the asymptotic series with Bernoulli numbers
 * has converged to double precision.
 */

/** psi(x) = (log Gamma)'(x), x > 0; absolute error below 1e-15 max(1, |psi(x)|). */
export function digammaKernel(x: number): number {
  let y = x;
  let sum = 0;
  while (y < 12) {
    sum += 1 / y;
    y += 1;
  }
  const z = 1 / (y * y);
  // B_2k / (2k), k = 1, 2, ...
  const series =
    z *
    (1 / 12 -
      z *
        (1 / 120 -
          z * (1 / 252 - z * (1 / 240 - z * (1 / 132 - z * (691 / 32760 - z * (1 / 12)))))));
  return Math.log(y) - 0.5 / y - series - sum;
}

/** psi'(x), x > 0; relative error below 1e-15. */
export function trigammaKernel(x: number): number {
  let y = x;
  let sum = 0;
  while (y < 12) {
    sum += 1 / (y * y);
    y += 1;
  }
  const z = 1 / (y * y);
  // B_2k, k = 1, 2, ...
  const series =
    1 / 6 -
    z * (1 / 30 - z * (1 / 42 - z * (1 / 30 - z * (5 / 66 - z * (691 / 2730 - z * (7 / 6))))));
  return 1 / y + 0.5 * z + (z / y) * series + sum;
}
