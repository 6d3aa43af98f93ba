/**
 * Inversion: the smallest or largest argument at which a question reaches a target. One mechanism
 * serves every question and every numeric argument.
 */
import { DomainError } from '../domain.ts';
import type { Probability } from '../probability.ts';
import { type Answer, answerAt, answerBetween } from './answer.ts';
import { type Condition, conditionOf, type Evaluation } from './question.ts';
import { readTarget, type Target, targetText } from './target.ts';
import { type Walk, walkFrom, walkUp } from './walk.ts';

/** The names of the arguments of a question, also when it takes one of several shapes. */
export type ParameterOf<Args> = Args extends unknown ? keyof Args & string : never;

/** The arguments of a question without one of them. */
export type FixedArgs<Args, Name> = Args extends unknown ? Omit<Args, Name & keyof Args> : never;

/**
 * The smallest value of one argument at which a question reaches a target, for every question that
 * returns a {@link Probability} and is monotone in that argument.
 *
 * Finds the direction itself, brackets on the logarithmic scale, compares on the small side, and says
 * whether the integer is certain. Ties are kept where a question knows its value exactly: half is reached
 * at exactly 2d points, not one later.
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
    if (walk.first.x > -1e300) return answerAt(condition, walk, 'first');
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
  if (held.bounded) return answerAt(condition, held, 'last');
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

function unreachable(fn: string, condition: Condition, walk: Walk, target: Target): DomainError {
  const best = walk.last.gap >= walk.first.gap ? walk.last : walk.first;
  const x = walk.logs && best === walk.last ? `e^${best.x}` : best.x;
  const where =
    walk.bounded || best === walk.first ? `at ${condition.parameter} = ${x}` : 'in the limit';
  const requirement = `within reach (${condition.name} reaches ${text(best)} ${where})`;
  return new DomainError(fn, 'target', requirement, targetText(target));
}

function text({ probability }: Evaluation): string {
  // with more points than doubles can count, a limit of 1 or as good as 1
  return probability.logComplement === Number.NEGATIVE_INFINITY ? '1' : probability.toString();
}
