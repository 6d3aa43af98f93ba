import { hullVolumeRatio, LogNumber, uniformBall } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const dimensions = [5, 20, 100, 1000];
const curves = dimensions.flatMap((d) =>
  Array.from({ length: 81 }, (_, i) => {
    // n^(2/d) / d = u, from 0.05 to 500
    const u = 0.05 * 10 ** (i / 20);
    const n = LogNumber.fromLog((d / 2) * Math.log(d * u));
    const p = n.log > Math.log(d + 1) ? hullVolumeRatio({ n, d, law: uniformBall() }).value : 0;
    return { d: `d = ${d}`, u: round(u), p: round(p) };
  }),
);
const limit = Array.from({ length: 81 }, (_, i) => {
  const u = 0.05 * 10 ** (i / 20);
  return { u: round(u), p: round(Math.exp(-1 / (2 * u))) };
});

/** Vega-Lite specification of the figure in ball-coverage.md. */
export default look({
  title: 'What share of the ball does the hull of n points fill?',
  layer: [
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: {
          field: 'u',
          type: 'quantitative',
          title: 'number of points, as n^(2/d) / d',
          scale: { type: 'log' },
        },
        y: { field: 'p', type: 'quantitative', title: 'expected share of the volume' },
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
        x: { field: 'u', type: 'quantitative', scale: { type: 'log' } },
        y: { field: 'p', type: 'quantitative' },
      },
    },
  ],
});
