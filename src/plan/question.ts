/**
 * A question as the search sees it: a function of one of its numeric arguments.
 */
import { DomainError } from '../domain.ts';
import { LogNumber } from '../log-number.ts';
import { isCertain, oddsGap } from '../numeric/target.ts';
import { complementOf, isProbability, type Probability } from '../probability.ts';

/** One evaluation inside the domain. */
export interface Evaluation {
  /** The argument; its logarithm where the argument was passed as a LogNumber. */
  readonly x: number;
  /** The probability there. */
  readonly probability: Probability;
  /** Negative while the condition fails, zero or positive where it holds. */
  readonly gap: number;
}

/** The condition "the probability reaches the target" as a function of one argument. */
export interface Condition {
  /** Name of the question, for messages. */
  readonly name: string;
  /** Name of the argument. */
  readonly parameter: string;
  /** Evaluates at a number; undefined outside the domain of the argument. */
  at(x: number): Evaluation | undefined;
  /** Evaluates at e^x points; undefined where the argument takes no such counts. */
  atLog(x: number): Evaluation | undefined;
  /** Whether the stated error cannot change the outcome at an evaluation. */
  certain(evaluation: Evaluation): boolean;
  /** The error with which the question refused the last argument outside its domain. */
  refusal(): DomainError | undefined;
}

/** Binds a question to its fixed arguments, the free one, and a target. */
export function conditionOf(
  fn: string,
  question: (args: never) => Probability,
  parameter: string,
  fixed: object,
  target: Probability,
  atMost: boolean,
): Condition {
  const name = question.name || 'the question';
  const goal = atMost ? complementOf(target) : target;
  let refused: DomainError | undefined;

  const side = (p: Probability): Probability => (atMost ? complementOf(p) : p);

  function evaluate(x: number, value: number | LogNumber): Evaluation | undefined {
    let probability: unknown;
    try {
      probability = question({ ...fixed, [parameter]: value } as never);
    } catch (error) {
      // Whatever its name: with too few variables it is the sparsity that a question refuses.
      if (isDomainError(error)) {
        refused = error;
        return undefined;
      }
      throw error;
    }
    if (!isProbability(probability)) {
      throw new DomainError(fn, 'question', 'a function that returns a Probability', probability);
    }
    return { x, probability, gap: oddsGap(side(probability), goal) };
  }

  return {
    name,
    parameter,
    at: (x) => evaluate(x, x),
    atLog: (x) => evaluate(x, LogNumber.fromLog(x)),
    certain: (evaluation) => isCertain(side(evaluation.probability), goal),
    refusal: () => refused,
  };
}

// By its code: the question may come from another copy of this library.
function isDomainError(error: unknown): error is DomainError {
  return error instanceof Error && (error as { code?: unknown }).code === 'HULLGAUGE_DOMAIN';
}
