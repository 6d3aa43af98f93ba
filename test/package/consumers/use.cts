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
import { type Chart, chart } from 'hullgauge/notebook';
import { logSpaced } from 'hullgauge/plan';
import { incompleteBetaDecimal, originInHullExact } from 'hullgauge/precise';
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
const spec: Chart = chart(originInHull, { x: { n: [9, 10] }, series: { d: [2, 3] } });
const exact: bigint = originInHullExact({ n: 10, d: 3 }).numerator;
const digits: string = incompleteBetaDecimal('0.5', 2, 0.25, 30).toFixed(20);
export const all: readonly unknown[] = [
  spec,
  exact,
  digits,
  law,
  error,
  numbers,
  Probability.fromValue(0.5),
];
