/**
 * The limit theorem of a question as a curve beside the exact one.
 *
 * A limit theorem says which n gives a probability; here the probability runs through a grid.
 */
import type { Count } from '../count.ts';
import { DomainError } from '../domain.ts';
import { gaussian, type Law } from '../law.ts';
import { questions } from '../plan/questions.ts';
import { Probability } from '../probability.ts';

/** One point of the curve. */
export interface LimitPoint {
  /** The size that the theorem gives. */
  readonly n: Count;
  /** The probability of the question at that size. */
  readonly probability: Probability;
}

/** A limit theorem's curve with its name. */
export interface LimitCurve {
  /** Name of the theorem. */
  readonly name: string;
  /** The points, by growing n. */
  readonly points: readonly LimitPoint[];
}

/** Logits of the grid: probabilities from 1e-6 to 1 - 1e-6. */
const LOGITS: readonly number[] = /* @__PURE__ */ Array.from(
  { length: 57 },
  (_, i) => (i - 28) * 0.49,
);

/** The title of a question that the sizing report asks too. */
export function questionTitle(name: string): string | undefined {
  return questions.find((row) => row.name === name)?.title;
}

/** The limit theorem of a question at the given arguments; undefined where there is none. */
export function limitCurve(
  name: string,
  args: Readonly<Record<string, unknown>>,
): LimitCurve | undefined {
  const row = questions.find((question) => question.name === name);
  if (row?.limit === undefined) return undefined;
  const { d, law = gaussian(), ...others } = args;
  // An argument that the theorem does not know may change the answer.
  if (typeof d !== 'number' || Object.keys(others).length > 0) return undefined;
  const { limit, direction } = row;
  try {
    const points = LOGITS.map((logit): LimitPoint => {
      const target = 1 / (1 + Math.exp(-logit));
      const reached = Probability.fromValue(target);
      return {
        n: limit.size(d, target, law as Law),
        probability: direction === 'rises' ? reached : Probability.fromComplement(target),
      };
    });
    return { name: limit.name, points };
  } catch (error) {
    // A theorem for other laws or dimensions.
    if (error instanceof DomainError) return undefined;
    throw error;
  }
}
