import { walkHull } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const curves = [1, 2, 3, 4, 5].flatMap((d) => {
  const points = [];
  for (let exponent = 0; exponent <= 8; exponent += 0.25) {
    const steps = Math.round(10 ** exponent);
    points.push({ d: `${d}`, steps, p: round(walkHull({ steps, d }).value) });
  }
  return points;
});

/** Vega-Lite specification of the figure in walks.md. */
export default look({
  title: 'The hull of a symmetric random walk contains its start',
  data: { values: curves },
  mark: { type: 'line', strokeWidth: 2 },
  encoding: {
    x: {
      field: 'steps',
      type: 'quantitative',
      scale: { type: 'log' },
      title: 'steps',
      axis: { format: '~s' },
    },
    y: { field: 'p', type: 'quantitative', title: 'probability' },
    color: { field: 'd', type: 'nominal', title: 'dimension' },
  },
});
