import {
  type Answer,
  DomainError,
  gaussian,
  type Law,
  originInHull,
  Probability,
  smallest,
} from 'hullgauge';
import { type LabelArgs, labelSeparability } from 'hullgauge/conic';
import { logSpaced } from 'hullgauge/plan';
import { normalCdf } from 'hullgauge/special';

const law: Law = gaussian();
const labels: LabelArgs = { n: 10, d: 3, intercept: false };
const answer: Answer = smallest(originInHull, 'n', { d: 40 }, { complementAtMost: 1e-12 });
const p: Probability = labelSeparability(labels);
const error: RangeError = new DomainError('f', 'x', 'positive', -1);
const numbers: readonly number[] = [
  answer.value,
  p.value,
  normalCdf(1).complement,
  ...logSpaced(1, 10, 1),
];
export const all: readonly unknown[] = [law, error, numbers, Probability.fromValue(0.5)];
