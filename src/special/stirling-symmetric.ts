/**
 * Stirling numbers close to the diagonal: elementary symmetric functions of many roots.
 *
 * The coefficient of s^(n - m) in prod_{i < n} (s + c + i) is e_m(c, c + 1, ..., c + n - 1). With
 * power sums p_j, Newton's identities for E_i = e_i / p_1^i read
 *
 *   i E_i = sum_{j = 1..i} (-1)^(j - 1) E_{i - j} q_j,   q_j = p_j / p_1^j.
 *
 * q_j falls like (2 / n)^j n, so for 8 m^2 < n the alternating sum never cancels.
 */

/**
 * log e_m of the n numbers c, c + 1, ..., c + n - 1, for c >= 1/2, m <= 40 and 8 m^2 < n.
 */
export function logSymmetricFunction(n: number, m: number, c: number): number {
  if (m === 0) return 0;
  const sum = n * (c + (n - 1) / 2);
  const terms: number[] = [1];
  const ratios: number[] = [0, 1];
  for (let i = 1; i <= m; i++) {
    if (i > 1) ratios.push(scaledPowerSum(n, i, c, sum));
    let e = 0;
    for (let j = i; j >= 1; j--) {
      const term = (terms[i - j] as number) * (ratios[j] as number);
      e += j % 2 === 1 ? term : -term;
    }
    terms.push(e / i);
  }
  return m * Math.log(sum) + Math.log(terms[m] as number);
}

/**
 * p_j / p_1^j with p_j = sum_{i < n} (c + i)^j, by the midpoint form of the Euler-Maclaurin formula:
 * the integral of x^j from c - 1/2 to c + n - 1/2 and corrections in its odd derivatives. The
 * first three leave less than 1e-16 for n > 8 m^2.
 */
function scaledPowerSum(n: number, j: number, c: number, sum: number): number {
  const end = c - 0.5 + n;
  const ratio = (c - 0.5) / end; // both ends as a multiple of end^(j + 1), which would overflow
  const inverseSquare = 1 / (end * end);
  let value = 0;
  for (let i = Math.min(3, (j + 1) >> 1); i >= 0; i--) {
    let falling = i === 0 ? 1 / (j + 1) : 1; // j (j - 1) ... (j - 2 i + 2)
    for (let k = 0; k < 2 * i - 1; k++) falling *= j - k;
    const coefficient = (MIDPOINT[i] as number) * falling * (1 - power(ratio, j + 1 - 2 * i));
    value = value * inverseSquare + coefficient;
  }
  return value * power(end / sum, j) * end;
}

/** Coefficients of f^(2 i - 1) in the midpoint rule, f^(-1) being the integral. */
const MIDPOINT: readonly number[] = [
  1, -0.041666666666666664, 0.0012152777777777778, -3.2035383597883595e-5,
];

function power(x: number, n: number): number {
  let result = 1;
  for (let i = 0; i < n; i++) result *= x;
  return result;
}
