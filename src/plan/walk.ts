/**
 * The walk that finds where a condition changes: from the low end of an argument's domain upwards in
 * steps that grow, beyond doubles on the logarithm, until the condition changes or the domain ends.
 */
import type { Condition, Evaluation } from './question.ts';

/** What a walk up the domain of an argument found. */
export interface Walk {
  /** Whether the argument takes only whole numbers. */
  readonly integer: boolean;
  /** The low end of the domain. */
  readonly first: Evaluation;
  /** The bracket of the change, if the condition changes. */
  readonly change?: {
    readonly lower: Evaluation;
    readonly upper: Evaluation;
    readonly logs: boolean;
  };
  /** The highest evaluation, if the condition does not change. */
  readonly last: Evaluation;
  /** Whether `last` is the top of the domain, rather than as far as the walk went. */
  readonly bounded: boolean;
  /** Whether `last` is the logarithm of the argument. */
  readonly logs?: true;
}

/** Whole numbers tried in search of the low end, which may be another argument: variables, for one. */
const FIRST_INTEGERS = [
  0,
  1,
  2,
  3,
  4,
  8,
  16,
  64,
  256,
  1024,
  4096,
  65536,
  2 ** 20,
  2 ** 26,
  2 ** 33,
  2 ** 42,
  2 ** 53 - 1,
] as const;
/** The stations of the walk on whole numbers. */
const INTEGER_STATIONS = [16, 4096, 9007199254740991] as const;
/** The same for real arguments, negative ones first. */
const REAL_STATIONS = [
  -1e300, -1e100, -1e30, -1e8, -100, -10, -1, 0, 1e-300, 1e-12, 1e-6, 1e-3, 0.1, 0.5, 1, 2, 4, 16,
  256, 65536, 1e9, 1e18, 1e36, 1e72, 1e150, 1e300,
] as const;
/** 2^53, the last whole number whose neighbour below is a double. */
export const LAST_INTEGER = 9007199254740992;
/** Up to here counts beyond 2^53 are passed as doubles, which are finer than logarithms. */
const LAST_DOUBLE = 4611686018427387904;
/** Where the walk on logarithms starts, and where it gives up: e^(10^6) points are enough. */
const LOG_START = 36.7368005696771;
const LOG_END = 1e6;

/**
 * Finds the low end of the domain and walks up until the condition changes.
 *
 * @returns undefined if no argument at all was accepted
 */
export function walkUp(condition: Condition): Walk | undefined {
  const integer = !(condition.at(2.5) ?? condition.at(0.5));
  const first = integer ? firstInteger(condition) : firstReal(condition);
  return first === undefined ? undefined : walkFrom(condition, integer, first);
}

/** Walks up from a given evaluation until the condition changes. */
export function walkFrom(condition: Condition, integer: boolean, first: Evaluation): Walk {
  const changed = (evaluation: Evaluation): boolean => evaluation.gap >= 0 !== first.gap >= 0;
  let last = first;
  for (const station of integer ? INTEGER_STATIONS : REAL_STATIONS) {
    if (station <= last.x) continue;
    const next = condition.at(station);
    if (next === undefined) {
      const edge = approachEdge(condition.at, last, station, integer);
      return changed(edge)
        ? foundChange(integer, first, last, edge, false)
        : { integer, first, last: edge, bounded: true };
    }
    if (changed(next)) return foundChange(integer, first, last, next, false);
    last = next;
  }
  if (!integer) return { integer, first, last, bounded: false };
  const top = last;
  last = { ...top, x: LOG_START };
  for (let log = 4 * LOG_START; log < LOG_END; log *= 4) {
    const next = condition.atLog(log);
    if (next === undefined) {
      const edge = approachEdge(condition.atLog, last, log, false);
      // Most questions that end here take no logarithms at all.
      if (edge.x === LOG_START) return { integer, first, last: top, bounded: true };
      return changed(edge)
        ? foundChange(true, first, last, edge, true)
        : { integer, first, last: edge, bounded: true, logs: true };
    }
    if (changed(next)) {
      for (const x of last.x === LOG_START ? [LAST_INTEGER, LAST_DOUBLE] : []) {
        const middle = condition.at(x);
        if (middle !== undefined && changed(middle)) {
          return foundChange(true, first, top, middle, false);
        }
      }
      return foundChange(true, first, last, next, true);
    }
    // Past double range nothing moves any more: this is the limit.
    const stuck =
      next.gap === last.gap &&
      next.probability.log === last.probability.log &&
      next.probability.logComplement === last.probability.logComplement;
    last = next;
    if (stuck) break;
  }
  return { integer, first, last, bounded: false };
}

function foundChange(
  integer: boolean,
  first: Evaluation,
  lower: Evaluation,
  upper: Evaluation,
  logs: boolean,
): Walk {
  return { integer, first, change: { lower, upper, logs }, last: upper, bounded: false };
}

function firstInteger(condition: Condition): Evaluation | undefined {
  for (const x of FIRST_INTEGERS) {
    const evaluation = condition.at(x);
    if (evaluation === undefined) continue;
    if (x <= 4) return evaluation;
    return approachEdge(condition.at, evaluation, 4, true);
  }
  return undefined;
}

function firstReal(condition: Condition): Evaluation | undefined {
  let outside: number = Number.NEGATIVE_INFINITY;
  for (const x of REAL_STATIONS) {
    const evaluation = condition.at(x);
    if (evaluation === undefined) {
      outside = x;
      continue;
    }
    // Domains mostly start at a station; only elsewhere is a search for the edge worth its cost.
    const atEdge = condition.at(x - 1e-9 * Math.max(1, Math.abs(x))) === undefined;
    return atEdge || x <= 1e-300
      ? evaluation
      : approachEdge(condition.at, evaluation, outside, false);
  }
  return undefined;
}

/** The argument inside the domain that is nearest to one outside it, by bisection. */
export function approachEdge(
  at: Condition['at'],
  inside: Evaluation,
  outside: number,
  integer: boolean,
): Evaluation {
  // The largest whole number is the commonest edge.
  if (integer && outside > inside.x && at(inside.x + 1) === undefined) return inside;
  let last = inside;
  let out = outside;
  for (let step = 0; step < 1100; step++) {
    let middle = last.x + 0.5 * (out - last.x);
    if (integer) middle = out > last.x ? Math.floor(middle) : Math.ceil(middle);
    const width = Math.abs(out - last.x);
    if (integer ? width <= 1 : middle === last.x || middle === out || width < 2 ** -52) return last;
    const next = at(middle);
    if (next === undefined) out = middle;
    else last = next;
  }
  return last;
}
