import { facetHeight, heightLimit, LogNumber, uniformSphere } from 'hullgauge';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const dimensions = [5, 20, 100, 500];
const curves = dimensions.flatMap((d) => {
  const height = facetHeight({ n: LogNumber.fromLog(d / 2), d, law: uniformSphere() });
  return Array.from({ length: 161 }, (_, i) => {
    const h = 0.2 + (0.8 * i) / 161;
    return { d: `d = ${d}`, h: round(h), p: round(height.cdf(h).value) };
  });
});
const { limit } = heightLimit({ n: LogNumber.fromLog(50), d: 100 });

/** Vega-Lite specification of the figure in facet-depth.md. */
export default look({
  title: 'Height of the typical facet at log n = d/2',
  layer: [
    {
      data: { values: curves },
      mark: { type: 'line', strokeWidth: 2 },
      encoding: {
        x: { field: 'h', type: 'quantitative', title: 'height h of the facet' },
        y: { field: 'p', type: 'quantitative', title: 'share of the facets below h' },
        color: {
          field: 'd',
          type: 'nominal',
          title: null,
          sort: dimensions.map((d) => `d = ${d}`),
        },
      },
    },
    {
      data: { values: [{}] },
      mark: { type: 'rule', strokeDash: [4, 4], color: '#444' },
      encoding: { x: { datum: round(limit) } },
    },
  ],
});
