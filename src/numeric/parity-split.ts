/**
 * Probabilities that are twice every other term of a positive sequence.
 *
 * A sequence v_0, v_1, .. whose even and whose odd terms each sum to 1/2 (the intrinsic volumes of a
 * cone that is not a subspace) splits at an index d into
 *
 *   2 (v_(d+1) + v_(d+3) + ..)  and  2 (v_(d-1) + v_(d-3) + ..),
 *
 * which sum to 1. Only the smaller side is summed, from the split outwards and in logarithms, until
 * the terms have fallen by e^-41: a handful to a few hundred terms, whatever the length. The other side
 * is one minus it, which costs no digits. A symmetric sequence split in its middle has equal sides.
 */
import { EPSILON, exactLogError } from '../epsilon.ts';
import { certainty, type Probability, probabilityFromTail } from '../probability.ts';

/** Writes a bound on the absolute error of the returned logarithm to `error[0]`. */
export type LogTerm = (index: number, error: Float64Array) => number;

const CUT = 41;

/** So many terms are taken one by one before panels are tried, and where the shortest one fails. */
const SINGLE = 24;
/** Nodes of a panel, and the length of the shortest in terms. */
const NODES = 13;
const SHORTEST = 32;

/**
 * Logarithm of the sum of the terms at start, start + step, .. as far as `end`, for a sequence that
 * rises at most once and then falls; writes a bound on its absolute error to `error[0]`.
 *
 * Beyond the first terms the logarithms are interpolated on panels that double in length, each checked
 * at a term between its nodes.
 */
export function logOutwardSum(
  term: LogTerm,
  start: number,
  step: number,
  end: number,
  error: Float64Array,
): number {
  let top = Number.NEGATIVE_INFINITY;
  let sum = 0;
  let weightedError = 0;
  let count = 0;
  /** Whether the terms have become negligible. */
  const add = (log: number, bound: number): boolean => {
    count++;
    if (log > top) {
      const scale = Math.exp(top - log);
      sum = sum * scale + 1;
      weightedError = weightedError * scale + bound;
      top = log;
      return false;
    }
    const share = log > Number.NEGATIVE_INFINITY ? Math.exp(log - top) : 0;
    sum += share;
    weightedError += share * bound;
    return log < top - CUT;
  };
  const terms = Math.floor((end - start) / step) + 1;
  const nodes = new Float64Array(NODES);
  const logs = new Float64Array(NODES);
  let length = SHORTEST;
  let single = SINGLE;
  let done = false;
  for (let j = 0; j < terms && !done; ) {
    while (j + length >= terms && length > SHORTEST) length /= 2;
    if (single > 0 || j + length >= terms) {
      done = add(term(start + j * step, error), error[0] as number);
      j++;
      single--;
      continue;
    }
    let bound = 0;
    for (let i = 0; i < NODES; i++) {
      nodes[i] = Math.round(0.5 * length * (1 - Math.cos((Math.PI * i) / (NODES - 1))));
      logs[i] = term(start + (j + (nodes[i] as number)) * step, error);
      bound = Math.max(bound, error[0] as number);
    }
    const between = Math.round(0.28 * length);
    const exact = term(start + (j + between) * step, error);
    const miss = Math.abs(interpolate(nodes, logs, between) - exact);
    if (miss <= 1e-14 + 0.2 * bound) {
      for (let i = 0; i <= length && !done; i++) {
        done = add(interpolate(nodes, logs, i), bound + 2 * miss);
      }
      j += length + 1;
      length *= 2;
    } else if (length > SHORTEST) length /= 2;
    else single = SINGLE;
  }
  if (sum === 0) {
    error[0] = 0;
    return Number.NEGATIVE_INFINITY;
  }
  error[0] = weightedError / sum + EPSILON * (4 + 0.5 * count);
  return top + Math.log(sum);
}

/** The polynomial through the given values at x: Neville's scheme. */
function interpolate(nodes: Float64Array, values: Float64Array, x: number): number {
  const table = SCHEME;
  table.set(values);
  const size = nodes.length;
  for (let k = 1; k < size; k++) {
    for (let i = 0; i + k < size; i++) {
      const a = nodes[i] as number;
      const b = nodes[i + k] as number;
      table[i] = ((x - a) * (table[i + 1] as number) + (b - x) * (table[i] as number)) / (b - a);
    }
  }
  return table[0] as number;
}

const SCHEME: Float64Array = /* @__PURE__ */ new Float64Array(NODES);

/**
 * The probability with value 2 (v_(d+1) + v_(d+3) + ..) and complement 2 (v_(d-1) + v_(d-3) + ..).
 *
 * @param term - log v_i for first <= i <= last
 * @param d - the index at which the sequence is split; the value is 0 for d >= last, 1 for d <= first
 * @param last - last index, `Infinity` allowed
 * @param slope - its sign is that of v_(d+1) - v_(d-1), asked for only where their logarithms are too
 *   large to tell them apart
 * @param symmetric - whether the sequence is known to be the same from both its ends
 */
export function paritySplit(
  term: LogTerm,
  d: number,
  first: number,
  last: number,
  slope?: (index: number) => number,
  symmetric?: boolean,
): Probability {
  if (d >= last) return certainty(false);
  if (d <= first) return certainty(true);
  if (symmetric && 2 * d === first + last) {
    return probabilityFromTail(0.5, -Math.LN2, 'lower', exactLogError(Math.LN2));
  }
  const error = new Float64Array(1);
  const left = term(d - 1, error);
  const leftError = error[0] as number;
  let rise = term(d + 1, error) - left;
  // Not above: both may be minus infinity.
  if (!(Math.abs(rise) > leftError + (error[0] as number)) && slope !== undefined) rise = slope(d);
  let side: 'lower' | 'upper' = rise > 0 ? 'upper' : 'lower';
  let log = logSide(term, d, first, last, side, error);
  if (log > MOSTLY) {
    // the neighbours of the split misled
    side = side === 'upper' ? 'lower' : 'upper';
    log = logSide(term, d, first, last, side, error);
  }
  return probabilityFromSum(log, side, error[0] as number);
}

/** The probability whose value ('lower') or complement ('upper') is the sum with this logarithm. */
export function probabilityFromSum(
  logSum: number,
  side: 'lower' | 'upper',
  error: number,
): Probability {
  // Rounding may lift a sum of nearly everything above 1.
  const log = Math.min(logSum, 0);
  const tail = Math.exp(log);
  // Above 1/2 the tail that was summed is not the small one, and its error counts for more there.
  const inflation = tail > 0.5 ? tail / (1 - tail) : 1;
  return probabilityFromTail(tail, log, side, inflation * error);
}

/** log 0.75 */
const MOSTLY = -0.2876820724517809;

function logSide(
  term: LogTerm,
  d: number,
  first: number,
  last: number,
  side: 'lower' | 'upper',
  error: Float64Array,
): number {
  return (
    Math.LN2 +
    (side === 'lower'
      ? logOutwardSum(term, d + 1, 2, last, error)
      : logOutwardSum(term, d - 1, -2, first, error))
  );
}
