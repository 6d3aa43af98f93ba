/**
 * The questions that a sizing report asks, one row each. A new question adds its row here and nothing
 * else.
 */
import { labelSeparability } from '../conic/separability.ts';
import { originInHull } from '../conic/wendel.ts';
import { type Count, resolveCount } from '../count.ts';
import type { Law } from '../law.ts';
import { hausdorffWithin } from '../polytope/hausdorff.ts';
import { nextPointInHull } from '../polytope/next-point.ts';
import { hullVolumeRatio } from '../polytope/volume-ratio.ts';
import { approxVolumeThreshold } from '../polytope/volume-threshold.ts';
import type { Probability } from '../probability.ts';
import { normalQuantile } from '../special/normal.ts';

/** One question of the report. */
export interface QuestionRow {
  /** Name of the function that answers it. */
  readonly name: string;
  /** The question in words. */
  readonly title: string;
  /** What the answer assumes, in a few words. */
  readonly assumes: string;
  /** Whether the probability rises or falls as n grows; a falling one is to be at most 1 - target. */
  readonly direction: 'rises' | 'falls';
  /** The laws for which there is a formula; undefined where the law does not matter. */
  readonly laws?: readonly Law['family'][];
  /** The smallest dimension in which it makes sense; 1 if left out. */
  readonly leastDimension?: number;
  /** The question at n points in d variables. */
  readonly ask: (args: { n: Count; d: number; law: Law }) => Probability;
  /** The size that the limit theorem would give, to stand beside the exact one. */
  readonly limit?: {
    readonly name: string;
    readonly size: (d: number, target: number, law: Law) => Count;
  };
}

/** n = 2p + z sqrt(2p): the central limit theorem for p failures among fair coins. */
const fairCoinLimit = (p: number, target: number): number =>
  2 * p + normalQuantile(target) * Math.sqrt(2 * p);

/** The rows, in the order of the report. */
export const questions: readonly QuestionRow[] = [
  {
    name: 'originInHull',
    title: 'Does the sample surround the nominal point?',
    assumes: 'law symmetric about the point; optimistic for skewed data',
    direction: 'rises',
    ask: ({ n, d }) => originInHull({ n, d }),
    limit: { name: '2d + z sqrt(2d)', size: fairCoinLimit },
  },
  {
    name: 'nextPointInHull',
    title: 'Will the next case interpolate?',
    assumes: 'the next case is drawn like the others',
    direction: 'rises',
    ask: ({ n, d, law }) => nextPointInHull({ n, d, law }),
  },
  {
    name: 'hullVolumeRatio',
    title: 'How much of the ball does the hull fill?',
    assumes: 'points in the unit ball; the expected share of its volume',
    direction: 'rises',
    laws: ['beta'],
    ask: ({ n, d, law }) => hullVolumeRatio({ n, d, law }),
    limit: {
      name: 'phase transition',
      size: (d, share, law) => approxVolumeThreshold({ d, law, share }),
    },
  },
  {
    name: 'hausdorffWithin',
    title: 'Is every point of the ball within a quarter of its radius from the hull?',
    assumes: 'points in the unit ball; a proved lower bound of the probability',
    direction: 'rises',
    laws: ['beta'],
    leastDimension: 2,
    ask: ({ n, d, law }) => hausdorffWithin({ n, d, distance: 0.25, law }),
  },
  {
    name: 'labelSeparability',
    title: 'Would random labels be linearly separable?',
    assumes: 'fair labels, intercept fitted; the target is that they are not',
    direction: 'falls',
    ask: ({ n, d }) => labelSeparability({ n: resolveCount('labelSeparability', 'n', n).n, d }),
    limit: {
      name: '2p + z sqrt(2p), p = d + 1',
      size: (d, target) => fairCoinLimit(d + 1, target),
    },
  },
];
