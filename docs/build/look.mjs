/** The look that all figures share: one font list, a colour-blind-safe palette, quiet axes. */

const palette = ['#0072b2', '#e69f00', '#009e73', '#cc79a7', '#56b4e9', '#d55e00'];

/** A Vega-Lite specification with the house's size, schema and configuration. */
export function look(spec) {
  return {
    $schema: 'https://vega.github.io/schema/vega-lite/v5.json',
    width: 460,
    height: 280,
    ...spec,
    config: {
      background: 'white',
      font: 'DejaVu Sans, Helvetica, Arial, sans-serif',
      range: { category: palette },
      axis: { labelFontSize: 12, titleFontSize: 13, titleFontWeight: 'normal', gridColor: '#eee' },
      legend: { labelFontSize: 12, symbolStrokeWidth: 3 },
      title: { fontSize: 14, fontWeight: 'normal', anchor: 'start' },
      view: { stroke: null },
    },
  };
}
