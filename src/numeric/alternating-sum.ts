/**
 * Sums of alternating terms that fall slowly, or that fall at first and then grow without bound.
 *
 * Levin's transformation: with s_j the sum of the terms before t_j, whose size the term itself tells,
 *
 *   sum = sum_j c_j s_j / t_j / sum_j c_j / t_j,  c_j = (-1)^j C(N, j) ((j + 1) / (N + 1))^(N - 1).
 *
 * All c_j / t_j have one sign, so that it is a mean of the s_j. It gains about a digit a term. Source:
 * Development of non-linear transformations for improving convergence of sequences, International
 * Journal of Computer Mathematics 3 (1973) 371-388, doi 10.1080/00207167308803075.
 */
import { EPSILON } from '../epsilon.ts';

const CUT = 1e-18;
const MAX_TERMS = 60;

/**
 * The sum of term(0) + term(1) + .., which alternate in sign (two zeros end it), with the bound of its
 * absolute error in `error[0]`.
 *
 * @param term - writes a bound on the relative error of the term to the same `error[0]`
 */
export function alternatingSum(term: (index: number) => number, error: Float64Array): number {
  const terms: number[] = [];
  const sums: number[] = [];
  const bounds: number[] = [];
  let sum = 0;
  let bound = 0;
  let worst = EPSILON;
  let best = 0;
  let bestError = Number.POSITIVE_INFINITY;
  let last = Number.NaN;
  for (let small = 0, N = 0; N < MAX_TERMS; N++) {
    const next = term(N);
    small = Math.abs(next) < CUT * Math.abs(sum) || next === 0 ? small + 1 : 0;
    if (small === 2) {
      if (bound < bestError) {
        best = sum;
        bestError = bound;
      }
      break;
    }
    if (next === 0) continue;
    worst = Math.max(worst, error[0] as number);
    terms.push(next);
    sums.push(sum);
    bounds.push(bound);
    sum += next;
    bound += Math.abs(next) * (error[0] as number);
    const estimate = mean(terms, sums);
    const rounding = mean(
      terms,
      sums.map((s, j) => (bounds[j] as number) + 2 * worst * Math.abs(s - estimate)),
    );
    const change = 2 * Math.abs(estimate - last);
    last = estimate;
    if (N > 2 && change + rounding < bestError) {
      best = estimate;
      bestError = change + rounding;
      if (change < 0.1 * rounding) break;
    }
  }
  error[0] = bestError;
  return best;
}

/** The mean of the values with weights |c_j / t_j|. */
function mean(terms: readonly number[], values: readonly number[]): number {
  const N = terms.length - 1;
  let choices = 1;
  let total = 0;
  let weights = 0;
  for (let j = 0; j <= N; j++) {
    const weight =
      (choices * Math.exp((N - 1) * Math.log((j + 1) / (N + 1)))) / Math.abs(terms[j] as number);
    total += weight * (values[j] as number);
    weights += weight;
    choices *= (N - j) / (j + 1);
  }
  return weights > 0 ? total / weights : 0;
}
