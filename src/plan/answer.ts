/**
 * What a search answers: the argument at which the condition changes, and the arguments that the
 * stated errors leave possible.
 *
 * An outcome is in doubt where the error of the probability could change it. The arguments in doubt
 * surround the change, and may reach beyond the stations between which a walk found it.
 */
import { type Bracket, narrow } from '../numeric/monotone-search.ts';
import type { Probability } from '../probability.ts';
import type { Condition, Evaluation } from './question.ts';
import { approachEdge, LAST_INTEGER, type Walk } from './walk.ts';

/** The answer of {@link smallest} and {@link largest}. */
export interface Answer {
  /** The argument; `Infinity` where it exceeds every double, and then `log` is the answer. */
  readonly value: number;
  /** Its natural logarithm. */
  readonly log: number;
  /**
   * Whether the integer is certain: the error bounds on both sides of it separate from the target.
   * Always false for real arguments and above 2^53.
   */
  readonly exact: boolean;
  /** The values that remain possible. */
  readonly bracket: readonly [number, number];
  /** The probability at `value`. */
  readonly probability: Probability;
}

/** Evaluates at an argument, each once; undefined outside the domain. */
type At = (x: number) => Evaluation | undefined;

/** The answer at an end of the domain: the smallest at the first argument, the largest at the last. */
export function answerAt(condition: Condition, walk: Walk, end: 'first' | 'last'): Answer {
  const evaluation = walk[end];
  const { x, probability } = evaluation;
  if (end === 'last' && walk.logs) {
    const value = Math.exp(x);
    return { value, log: x, exact: false, bracket: [value, value], probability };
  }
  const log = Math.log(Math.abs(x));
  if (condition.certain(evaluation)) {
    return { value: x, log, exact: walk.integer, bracket: [x, x], probability };
  }
  const inward = end === 'first' ? 1 : -1;
  const at = remember(condition, [evaluation], false);
  const step = 2 ** -50 * Math.max(Math.abs(x), 2 ** -50);
  const last = walk.integer
    ? lastDoubt(condition, at, x, inward) + inward
    : certainSide(condition, at, evaluation, inward, step).x;
  const beyond = at(last);
  // Where the condition certainly ends, nothing but the end of the domain could fulfil it.
  const ends = beyond !== undefined && beyond.gap < 0 && condition.certain(beyond);
  const other = ends ? x : beyond === undefined ? last - inward : last;
  const bracket = [Math.min(x, other), Math.max(x, other)] as const;
  return { value: x, log, exact: false, bracket, probability };
}

/** The answer on one side of a change: the upper side of it for `smallest`, the lower for `largest`. */
export function answerBetween(condition: Condition, walk: Walk, upperSide: boolean): Answer {
  const change = walk.change as NonNullable<Walk['change']>;
  const at = remember(condition, [change.lower, change.upper], change.logs);
  const inside = (x: number): Evaluation => {
    const evaluation = at(x);
    if (evaluation !== undefined) return evaluation;
    throw (
      condition.refusal() ?? new Error(`${condition.name} refuses ${condition.parameter} = ${x}`)
    );
  };
  const whole = walk.integer && !change.logs;
  const integer = whole && change.upper.x <= LAST_INTEGER;
  const doubtful = (x: number): boolean => !condition.certain(inside(x));
  const found = narrow(
    change,
    (x) => inside(x).gap,
    whole,
    (x) => !integer && doubtful(x),
  );
  if (integer) {
    const { value, log, probability } = answerOf(inside(upperSide ? found.upper.x : found.lower.x));
    const below = lastDoubt(condition, at, found.lower.x, -1);
    const above = lastDoubt(condition, at, found.upper.x, 1);
    const bracket = upperSide
      ? ([below, at(above + 1) === undefined ? above : above + 1] as const)
      : ([at(below - 1) === undefined ? below : below - 1, above] as const);
    return { value, log, exact: bracket[0] === bracket[1], bracket, probability };
  }
  const { lower, upper } =
    whole || found.settled !== undefined ? found : toNeighbours(found, inside);
  const settled = found.settled?.x ?? [lower.x, upper.x].find(doubtful);
  const [from, to] =
    settled === undefined
      ? [inside(lower.x), inside(upper.x)]
      : aroundDoubt(condition, at, { lower, upper }, inside(settled), whole);
  const best = upperSide ? to : from;
  if (!change.logs) return { ...answerOf(best), exact: false, bracket: [from.x, to.x] };
  const bracket = [Math.exp(from.x), Math.exp(to.x)] as const;
  const { x, probability } = best;
  return { value: Math.exp(x), log: x, exact: false, bracket, probability };
}

function answerOf({ x, probability }: Evaluation): Pick<Answer, 'value' | 'log' | 'probability'> {
  return { value: x, log: Math.log(Math.abs(x)), probability };
}

function remember(condition: Condition, known: readonly Evaluation[], logs: boolean): At {
  const cache = new Map(known.map((evaluation) => [evaluation.x, evaluation]));
  return (x) => {
    const evaluation = cache.get(x) ?? (logs ? condition.atLog(x) : condition.at(x));
    if (evaluation !== undefined) cache.set(x, evaluation);
    return evaluation;
  };
}

/** Halves a bracket of a few units in the last place until its ends are neighbouring doubles. */
function toNeighbours(bracket: Bracket, inside: (x: number) => Evaluation): Bracket {
  let { lower, upper } = bracket;
  for (;;) {
    const x = lower.x + 0.5 * (upper.x - lower.x);
    if (!(x > lower.x && x < upper.x)) return { lower, upper };
    const probe = inside(x);
    if (probe.gap < 0 === lower.gap < 0) lower = probe;
    else upper = probe;
  }
}

/** The nearest points on both sides of one in doubt at which the outcome is certain. */
function aroundDoubt(
  condition: Condition,
  at: At,
  { lower, upper }: Bracket,
  settled: Evaluation,
  whole: boolean,
): [Evaluation, Evaluation] {
  // The gap of a point at the edge of certainty is about its error; the slope turns it into a distance.
  const slope = Math.abs((upper.gap - lower.gap) / (upper.x - lower.x));
  const error = Math.max(settled.probability.logError, 2 ** -50);
  const distance = 2 * (error / slope);
  const least = 2 ** -50 * Math.max(Math.abs(settled.x), 2 ** -1000);
  const step = Math.max(Number.isFinite(distance) ? distance : 0, least);
  const side = (end: Evaluation | undefined, sign: 1 | -1): Evaluation =>
    certainSide(condition, at, settled, sign, whole ? Math.ceil(step) : step, end);
  return [side(at(lower.x), -1), side(at(upper.x), 1)];
}

/**
 * The first point at growing distances from one in doubt at which the outcome is certain: that of
 * `end`, and no farther than `end` where it is certain itself. The edge of the domain if there is none.
 */
function certainSide(
  condition: Condition,
  at: At,
  from: Evaluation,
  sign: 1 | -1,
  step: number,
  end?: Evaluation,
): Evaluation {
  const limit = end !== undefined && condition.certain(end) ? Math.abs(end.x - from.x) : Infinity;
  let last = from;
  for (let reach = step; reach < limit; reach *= 4) {
    const next = at(from.x + sign * reach);
    if (next === undefined) {
      return approachEdge(condition.at, last, from.x + sign * reach, false);
    }
    const expected = end === undefined || next.gap < 0 === end.gap < 0;
    if (expected && condition.certain(next)) return next;
    last = next;
  }
  return limit < Infinity ? (end as Evaluation) : last;
}

/**
 * The last one of the integers in doubt from a given one on, upwards or downwards; the one before if
 * there is no doubt at all, and infinite if there is no end of it.
 */
function lastDoubt(condition: Condition, at: At, from: number, sign: 1 | -1): number {
  const doubtful = (x: number): boolean => {
    const evaluation = at(x);
    return evaluation !== undefined && !condition.certain(evaluation);
  };
  let last = from - sign;
  let next = from;
  for (let reach = 1; doubtful(next); reach *= 2) {
    if (reach > LAST_INTEGER) return sign * Infinity;
    last = next;
    next = from + sign * reach;
  }
  while (Math.abs(next - last) > 1) {
    const middle = Math.floor(last + (next - last) / 2);
    if (doubtful(middle)) last = middle;
    else next = middle;
  }
  return last;
}
