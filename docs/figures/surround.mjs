import { originInHull } from 'hullgauge';
import { normalCdf } from 'hullgauge/special';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const dimensions = [3, 10, 30, 100];
const curves = dimensions.flatMap((d) => {
  const points = [];
  const step = Math.max(1, Math.round(d / 25));
  for (let n = d; n <= 4 * d; n += step) {
    points.push({ d: `d = ${d}`, ratio: round(n / d), p: round(originInHull({ n, d }).value) });
  }
  return points;
});
const limit = Array.from({ length: 121 }, (_, i) => {
  const ratio = 1 + i / 40;
  const z = (100 * (ratio - 2)) / Math.sqrt(200);
  return { ratio: round(ratio), p: round(normalCdf(z).value) };
});

/** Vega-Lite specification of the figure in surround.md. */
export default look({
  title: 'Do n points surround the target in R^d?',
  layer: [
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: { field: 'ratio', type: 'quantitative', title: 'points per dimension, n/d' },
        y: { field: 'p', type: 'quantitative', title: 'probability of being surrounded' },
        color: {
          field: 'd',
          type: 'nominal',
          title: null,
          sort: dimensions.map((d) => `d = ${d}`),
        },
      },
    },
    {
      data: { values: limit },
      mark: { type: 'line', strokeWidth: 1.5, strokeDash: [4, 4], color: '#444' },
      encoding: {
        x: { field: 'ratio', type: 'quantitative' },
        y: { field: 'p', type: 'quantitative' },
      },
    },
  ],
});
