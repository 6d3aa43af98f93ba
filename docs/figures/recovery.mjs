import { recoverySuccess, weakThreshold } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const share = 0.02;
const sizes = [100, 400, 1600];
const curves = sizes.flatMap((n) => {
  const points = [];
  const step = n / 100;
  for (let measurements = 0; measurements <= 0.25 * n; measurements += step) {
    const args = { model: 'l1', n, sparsity: share * n, measurements };
    points.push({ n: `${n}`, x: round(measurements / n), p: round(recoverySuccess(args).value) });
  }
  return points;
});

/** Measurements per variable at which the limit curve passes the share of non-zeros. */
function limit() {
  let [low, high] = [0, 1];
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2;
    const { perVariable } = weakThreshold({ undersampling: middle, model: 'l1' });
    if (perVariable < share) low = middle;
    else high = middle;
  }
  return low;
}

/** Vega-Lite specification of the figure in recovery.md. */
export default look({
  title: 'Recovery of 2 % non-zeros by l1 minimisation',
  layer: [
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: { field: 'x', type: 'quantitative', title: 'measurements per variable' },
        y: { field: 'p', type: 'quantitative', title: 'probability of recovery' },
        color: { field: 'n', type: 'nominal', title: 'variables', sort: sizes.map(String) },
      },
    },
    {
      data: { values: [{ x: round(limit()) }] },
      mark: { type: 'rule', strokeWidth: 1.5, strokeDash: [4, 4] },
      encoding: { x: { field: 'x', type: 'quantitative' } },
    },
  ],
});
