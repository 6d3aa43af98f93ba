import { nextPointInHull } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const dimensions = [2, 3, 5, 10, 20, 50];
const curves = dimensions.flatMap((d) => {
  const points = [];
  for (let exponent = Math.log10(d + 1); exponent <= 18; exponent += 0.1) {
    const n = Math.round(10 ** exponent);
    const p = nextPointInHull({ n, d }).value;
    points.push({ d: `d = ${d}`, n: round(n), p: round(p) });
    if (p > 0.999) break;
  }
  return points;
});
const levels = [0.5, 0.9].map((p) => ({ p }));

/** Vega-Lite specification of the figure in interpolation.md. */
export default look({
  title: 'Does the next Gaussian case lie inside the hull of the n before it?',
  layer: [
    {
      data: { values: levels },
      mark: { type: 'rule', strokeDash: [4, 4], color: '#999' },
      encoding: { y: { field: 'p', type: 'quantitative' } },
    },
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: {
          field: 'n',
          type: 'quantitative',
          scale: { type: 'log' },
          title: 'number of cases, n',
          axis: { values: [1, 1e3, 1e6, 1e9, 1e12, 1e15, 1e18], format: '.0e' },
        },
        y: { field: 'p', type: 'quantitative', title: 'probability of interpolation' },
        color: {
          field: 'd',
          type: 'nominal',
          title: null,
          sort: dimensions.map((d) => `d = ${d}`),
        },
      },
    },
  ],
});
