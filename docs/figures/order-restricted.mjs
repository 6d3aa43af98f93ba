import { chiBarSquared, simpleTree, totalOrder } from 'hullgauge';
import { chiSquaredCdf } from 'hullgauge/special';
import { look } from '../build/look.mjs';

const round = (x) => Number(x.toPrecision(6));
const groups = 5;
const laws = [
  ['total order', (x) => chiBarSquared(totalOrder(groups)).pValue(x)],
  ['simple tree', (x) => chiBarSquared(simpleTree(groups)).pValue(x)],
  ['no order', (x) => chiSquaredCdf(x, groups - 1).complement],
];
const curves = laws.flatMap(([law, pValue]) =>
  Array.from({ length: 91 }, (_, i) => {
    const x = 0.01 + 0.1999 * i;
    return { law, x: round(x), p: round(pValue(x)) };
  }),
);

/** Vega-Lite specification of the figure in order-restricted.md. */
export default look({
  title: 'Five groups: the p-value of a statistic by what is known of their order',
  data: { values: curves },
  mark: { type: 'line', strokeWidth: 2 },
  encoding: {
    x: {
      field: 'x',
      type: 'quantitative',
      scale: { domain: [0, 18] },
      title: 'likelihood-ratio statistic',
    },
    y: {
      field: 'p',
      type: 'quantitative',
      scale: { type: 'log' },
      axis: { format: 'g', values: [1, 0.1, 0.05, 0.01, 0.001, 0.0001] },
      title: 'p-value',
    },
    color: { field: 'law', type: 'nominal', title: null, sort: laws.map(([law]) => law) },
  },
});
