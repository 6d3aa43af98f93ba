/**
 * The target of a search: what the probability has to reach, in one of four forms.
 */
import { checkChoice, checkOptions, DomainError } from '../domain.ts';
import { isProbability, Probability } from '../probability.ts';

/**
 * What the probability has to reach: a number means "at least". `complementAtMost` names a target near
 * 1 without losing it. A {@link Probability} may stand for any of the numbers.
 */
export type Target =
  | number
  | Probability
  | {
      /** The probability is to be at least this. */
      readonly atLeast: number | Probability;
    }
  | {
      /** The probability is to be at most this. */
      readonly atMost: number | Probability;
    }
  | {
      /** One minus the probability is to be at most this. */
      readonly complementAtMost: number | Probability;
    };

/** Validates a target; `atMost` says that the probability has to stay at or below the goal. */
export function readTarget(fn: string, target: Target): { goal: Probability; atMost: boolean } {
  if (typeof target === 'number' || isProbability(target)) {
    return { goal: toGoal(fn, 'target', target), atMost: false };
  }
  const forms = ['atLeast', 'atMost', 'complementAtMost'] as const;
  if (typeof target !== 'object') return { goal: toGoal(fn, 'target', target), atMost: false };
  checkOptions(fn, target, forms, 'target');
  const keys = Object.keys(target);
  if (keys.length !== 1) {
    throw new DomainError(
      fn,
      'target',
      `an object with exactly one of ${forms.join(', ')}`,
      target,
      `${keys.length} of them`,
    );
  }
  const form = keys[0];
  checkChoice(fn, 'target', form, forms);
  const given = (target as Record<string, unknown>)[form];
  const goal = toGoal(fn, `target.${form}`, given, form === 'complementAtMost');
  return { goal, atMost: form === 'atMost' };
}

function toGoal(fn: string, parameter: string, given: unknown, complement = false): Probability {
  if (typeof given === 'number' && given >= 0 && given <= 1) {
    return complement ? Probability.fromComplement(given) : Probability.fromValue(given);
  }
  if (isProbability(given)) {
    const plain = Probability.from(given);
    return complement ? Probability.fromLogComplement(plain.log, plain.logError) : plain;
  }
  throw new DomainError(fn, parameter, 'a number from 0 to 1', given);
}

/** A target as messages show it. */
export function targetText(target: Target): unknown {
  if (typeof target === 'number') return target;
  if (isProbability(target)) return Probability.from(target).toString();
  const [form, value] = Object.entries(target)[0] as [string, number | Probability];
  return `${form} ${isProbability(value) ? Probability.from(value).toString() : value}`;
}
