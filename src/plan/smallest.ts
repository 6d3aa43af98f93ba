/**
 * Inversion: the smallest or largest argument at which a question reaches a target. One mechanism
 * serves every question and every numeric argument.
 */
import { DomainError } from '../domain.ts';
import { type Bracket, narrow, type Probe } from '../numeric/monotone-search.ts';
import type { Probability } from '../probability.ts';
import { type Condition, conditionOf, type Evaluation } from './question.ts';
import { readTarget, type Target, targetText } from './target.ts';
import { type Walk, walkFrom, walkUp } from './walk.ts';

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

/** The names of the arguments of a question, also when it takes one of several shapes. */
export type ParameterOf<Args> = Args extends unknown ? keyof Args & string : never;

/** The arguments of a question without one of them. */
export type FixedArgs<Args, Name> = Args extends unknown ? Omit<Args, Name & keyof Args> : never;

/**
 * The smallest value of one argument at which a question reaches a target, for every question that
 * returns a {@link Probability} and is monotone in that argument.
 *
 * Finds the direction itself, brackets on the logarithmic scale, compares on the small side, and says
 * whether the integer is certain. Ties are exact: half is reached at exactly 2d points, not one later.
 *
 * @param question - a function of one options object that returns a `Probability`
 * @param parameter - the name of the free argument; integers stay integers, and counts of points may
 *   exceed 2^53
 * @param args - the other arguments
 * @param target - a number (at least), `{ atLeast }`, `{ atMost }` or `{ complementAtMost }`
 * @returns the value, its logarithm, whether it is certain, the values that remain possible, and the
 *   probability there
 * @remarks Cost: about 10 to 25 evaluations of the question. The answer holds under the assumptions of the
 *   question; for one that is not monotone it may be neither smallest nor unique.
 * @throws A {@link DomainError} if an argument is wrong, or if the question does not reach the target
 *   anywhere in its domain; the message names the limit that it reaches
 *
 * @example
 * ```ts
 * import { originInHull, smallest } from 'hullgauge';
 * smallest(originInHull, 'n', { d: 40 }, 0.5).value; // => 80
 * smallest(originInHull, 'n', { d: 40 }, { complementAtMost: 1e-12 }).value; // => 169
 * ```
 */
export function smallest<Args, Name extends ParameterOf<Args>>(
  question: (args: Args) => Probability,
  parameter: Name,
  args: FixedArgs<Args, Name>,
  target: Target,
): Answer {
  const fn = 'smallest';
  const condition = bind(fn, question as (args: never) => Probability, parameter, args, target);
  const walk = start(condition);
  if (walk.first.gap >= 0) {
    if (walk.first.x > -1e300) return answerAt(condition, walk, walk.first);
    const requirement = `one that smaller ${condition.parameter} fails (${condition.name} keeps it all the way down)`;
    throw new DomainError(fn, 'target', requirement, targetText(target));
  }
  if (walk.change === undefined) throw unreachable(fn, condition, walk, target);
  return answerBetween(condition, walk, true);
}

/**
 * The largest value of one argument at which a question still reaches a target, for every question
 * that returns a {@link Probability} and is monotone in that argument.
 *
 * The counterpart of {@link smallest}, with the same arguments.
 *
 * @param question - a function of one options object that returns a `Probability`
 * @param parameter - the name of the free argument
 * @param args - the other arguments
 * @param target - a number (at least), `{ atLeast }`, `{ atMost }` or `{ complementAtMost }`
 * @returns the value, its logarithm, whether it is certain, the values that remain possible, and the
 *   probability there
 * @remarks Cost and caution as for {@link smallest}.
 * @throws A {@link DomainError} if an argument is wrong, if the question does not reach the target
 *   anywhere, or if it holds for every larger value, so that there is no largest
 *
 * @example
 * ```ts
 * import { largest, originInHull } from 'hullgauge';
 * largest(originInHull, 'd', { n: 80 }, 0.5).value; // => 40
 * ```
 */
export function largest<Args, Name extends ParameterOf<Args>>(
  question: (args: Args) => Probability,
  parameter: Name,
  args: FixedArgs<Args, Name>,
  target: Target,
): Answer {
  const fn = 'largest';
  const condition = bind(fn, question as (args: never) => Probability, parameter, args, target);
  const walk = start(condition);
  const holdsLow = walk.first.gap >= 0;
  if (!holdsLow && walk.change === undefined) throw unreachable(fn, condition, walk, target);
  // Where it holds only from some value on, the largest is where it ends again.
  const held = holdsLow ? walk : walkOn(condition, walk);
  if (held.change !== undefined) return answerBetween(condition, held, false);
  if (held.bounded) return answerAt(condition, held, held.last);
  const requirement = `one that larger ${condition.parameter} fails (${condition.name} keeps it up to ${text(held.last)})`;
  throw new DomainError(fn, 'target', requirement, targetText(target));
}

/** The walk from the upper side of a change. */
function walkOn(condition: Condition, walk: Walk): Walk {
  const { upper, logs } = walk.change as NonNullable<Walk['change']>;
  // Beyond doubles a condition that has begun to hold goes on.
  if (logs) return { integer: walk.integer, first: walk.first, last: walk.last, bounded: false };
  return walkFrom(condition, walk.integer, upper);
}

/** Validates the arguments and binds them to a condition. */
function bind(
  fn: string,
  question: (args: never) => Probability,
  parameter: string,
  args: unknown,
  target: Target,
): Condition {
  if (typeof question !== 'function') {
    throw new DomainError(fn, 'question', 'a function that returns a Probability', question);
  }
  if (typeof parameter !== 'string' || parameter === '') {
    throw new DomainError(fn, 'parameter', 'the name of an argument', parameter);
  }
  if (typeof args !== 'object' || args === null || Array.isArray(args)) {
    throw new DomainError(fn, 'args', 'an object with the other arguments', args);
  }
  if (parameter in args) {
    const given = (args as Record<string, unknown>)[parameter];
    throw new DomainError(
      fn,
      `args.${parameter}`,
      `left out (${parameter} is searched for)`,
      given,
    );
  }
  const { goal, atMost } = readTarget(fn, target);
  return conditionOf(fn, question, parameter, args, goal, atMost);
}

function start(condition: Condition): Walk {
  const walk = walkUp(condition);
  if (walk !== undefined) return walk;
  // Every argument was refused: the question's own error says why.
  throw condition.refusal() ?? new Error(`${condition.name} accepts no ${condition.parameter}`);
}

/** The answer at an end of the domain, where no neighbour has to be compared. */
function answerAt(condition: Condition, walk: Walk, evaluation: Evaluation): Answer {
  const { x, probability } = evaluation;
  const exact = walk.integer && condition.certain(evaluation);
  return { value: x, log: Math.log(Math.abs(x)), exact, bracket: [x, x], probability };
}

/** The answer on one side of a change: the upper side of it for `smallest`, the lower for `largest`. */
function answerBetween(condition: Condition, walk: Walk, upperSide: boolean): Answer {
  const change = walk.change as NonNullable<Walk['change']>;
  const cache = new Map<number, Evaluation>([
    [change.lower.x, change.lower],
    [change.upper.x, change.upper],
  ]);
  const evaluate = (x: number): Evaluation => {
    const known = cache.get(x);
    if (known !== undefined) return known;
    const evaluation = change.logs ? condition.atLog(x) : condition.at(x);
    if (evaluation === undefined) {
      throw (
        condition.refusal() ?? new Error(`${condition.name} refuses ${condition.parameter} = ${x}`)
      );
    }
    cache.set(x, evaluation);
    return evaluation;
  };
  const integer = walk.integer && !change.logs && change.upper.x <= Number.MAX_SAFE_INTEGER;
  const isNoise = (x: number): boolean => !integer && !condition.certain(evaluate(x));
  const gapAt = (x: number): number => evaluate(x).gap;
  const found = narrow(change, gapAt, walk.integer && !change.logs, isNoise);
  const { lower, upper } =
    found.settled === undefined ? found : aroundNoise(condition, evaluate, found, found.settled);
  const best = evaluate(upperSide ? upper.x : lower.x);
  const { probability } = best;
  if (change.logs) {
    const bracket = [Math.exp(lower.x), Math.exp(upper.x)] as const;
    return { value: Math.exp(best.x), log: best.x, exact: false, bracket, probability };
  }
  const log = Math.log(Math.abs(best.x));
  if (!integer) {
    return { value: best.x, log, exact: false, bracket: [lower.x, upper.x], probability };
  }
  const bracket = possible(condition, evaluate, found, walk, upperSide);
  return { value: best.x, log, exact: bracket[0] === bracket[1], bracket, probability };
}

/** The nearest points on both sides of a noisy one at which the outcome is certain. */
function aroundNoise(
  condition: Condition,
  evaluate: (x: number) => Evaluation,
  bracket: Bracket,
  settled: Probe,
): Bracket {
  const { lower, upper } = bracket;
  // The gap of a point at the edge of certainty is about its error; the slope turns it into a distance.
  const slope = Math.abs((upper.gap - lower.gap) / (upper.x - lower.x));
  const error = Math.max(evaluate(settled.x).probability.logError, 2 ** -50);
  const step = Math.max(2 * (error / slope), 2 ** -50 * Math.abs(settled.x));
  const certainSide = (end: Probe): Probe => {
    const sign = Math.sign(end.x - settled.x);
    for (let reach = step; reach < Math.abs(end.x - settled.x); reach *= 4) {
      const evaluation = evaluate(settled.x + sign * reach);
      if (condition.certain(evaluation) && evaluation.gap < 0 === end.gap < 0) return evaluation;
    }
    return end;
  };
  return { lower: certainSide(lower), upper: certainSide(upper) };
}

/** The integers that the error bounds leave possible. */
function possible(
  condition: Condition,
  evaluate: (x: number) => Evaluation,
  bracket: Bracket,
  walk: Walk,
  upperSide: boolean,
): readonly [number, number] {
  const change = walk.change as NonNullable<Walk['change']>;
  const below = certainFrom(condition, evaluate, bracket.lower.x, change.lower.x);
  const above = certainFrom(condition, evaluate, bracket.upper.x, change.upper.x);
  return upperSide ? [below + 1, above] : [below, above - 1];
}

/** The nearest integer to `from`, going towards `end`, at which the outcome is certain. */
function certainFrom(
  condition: Condition,
  evaluate: (x: number) => Evaluation,
  from: number,
  end: number,
): number {
  if (from === end || condition.certain(evaluate(from))) return from;
  const sign = Math.sign(end - from);
  let uncertain = from;
  let reach = 1;
  let known = from + sign;
  while (known !== end && !condition.certain(evaluate(known))) {
    uncertain = known;
    reach *= 2;
    known = sign > 0 ? Math.min(from + reach, end) : Math.max(from - reach, end);
  }
  while (Math.abs(known - uncertain) > 1) {
    const middle = Math.floor(uncertain + (known - uncertain) / 2);
    if (condition.certain(evaluate(middle))) known = middle;
    else uncertain = middle;
  }
  return known;
}

function unreachable(fn: string, condition: Condition, walk: Walk, target: Target): DomainError {
  const best = walk.last.gap >= walk.first.gap ? walk.last : walk.first;
  const where =
    walk.bounded || best === walk.first ? `at ${condition.parameter} = ${best.x}` : 'in the limit';
  const requirement = `within reach (${condition.name} reaches ${text(best)} ${where})`;
  return new DomainError(fn, 'target', requirement, targetText(target));
}

function text({ probability }: Evaluation): string {
  // with more points than doubles can count, a limit of 1 or as good as 1
  return probability.logComplement === Number.NEGATIVE_INFINITY ? '1' : probability.toString();
}
