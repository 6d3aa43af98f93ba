import { approxSeparability, labelSeparability, logisticThreshold } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const n = 120;
const shares = [0.5, 0.3, 0.2, 0.1];
const curves = shares.flatMap((classShare) => {
  const points = [];
  for (let d = 2; d <= 80; d += 2) {
    const args = { n, d };
    const p =
      classShare === 0.5 ? labelSeparability(args) : approxSeparability({ ...args, classShare });
    points.push({ share: `${100 * classShare} %`, d, p: round(p.value) });
  }
  return points;
});
const limits = shares.map((share) => ({
  share: `${100 * share} %`,
  d: round(n * logisticThreshold({ signal: 0, offset: Math.log(share / (1 - share)) })),
}));

const color = {
  field: 'share',
  type: 'nominal',
  title: 'rarer class',
  sort: shares.map((share) => `${100 * share} %`),
};

/** Vega-Lite specification of the figure in logistic.md. */
export default look({
  title: 'Pure noise in 120 cases: are the classes separable?',
  layer: [
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: { field: 'd', type: 'quantitative', title: 'variables' },
        y: { field: 'p', type: 'quantitative', title: 'probability that no logistic fit exists' },
        color,
      },
    },
    {
      data: { values: limits },
      mark: { type: 'rule', strokeWidth: 1.5, strokeDash: [4, 4] },
      encoding: {
        x: { field: 'd', type: 'quantitative' },
        color,
      },
    },
  ],
});
