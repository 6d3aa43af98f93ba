/**
 * What all charts share: size, fonts, a palette that colour-blind readers can tell apart, axes, and the
 * hidden method by which a notebook shows a chart.
 */

/**
 * A Vega-Lite v5 specification: plain JSON that any Vega-Lite renderer draws. As the last value of a
 * cell a notebook shows it; see {@link chart} and {@link sizingChart}.
 */
export interface Chart {
  /** The version of the specification. */
  readonly $schema: string;
  /** What the chart shows, in words. */
  readonly description: string;
  /** All other parts of the specification. */
  readonly [property: string]: unknown;
}

/** Blue, orange, green, pink, sky, vermilion: distinct under the common kinds of colour blindness. */
const PALETTE = ['#0072b2', '#e69f00', '#009e73', '#cc79a7', '#56b4e9', '#d55e00'];
/** Colour of what is not one of the series. */
export const NEUTRAL = '#444';

/** A chart with the given parts, in the common look. */
export function withLook(description: string, spec: Readonly<Record<string, unknown>>): Chart {
  const chart: Chart = {
    $schema: 'https://vega.github.io/schema/vega-lite/v5.json',
    description,
    width: 460,
    height: 280,
    ...spec,
    config: {
      background: 'white',
      font: 'DejaVu Sans, Helvetica, Arial, sans-serif',
      range: { category: PALETTE },
      mark: { color: PALETTE[0] },
      axis: { labelFontSize: 12, titleFontSize: 13, titleFontWeight: 'normal', gridColor: '#eee' },
      legend: {
        labelFontSize: 12,
        titleFontWeight: 'normal',
        symbolStrokeWidth: 3,
        labelLimit: 300,
      },
      title: { fontSize: 14, fontWeight: 'normal', anchor: 'start', subtitleColor: NEUTRAL },
      view: { stroke: null },
    },
  };
  // Not enumerable, so that the object is nothing but its specification.
  return Object.defineProperty(chart, Symbol.for('Jupyter.display'), {
    value: () => ({ 'application/vnd.vegalite.v5+json': chart, 'text/plain': description }),
  });
}

/** A colour for each of so many ordered series: the palette, or a scale that is read by lightness. */
export function colourScale(labels: readonly string[]): Readonly<Record<string, unknown>> {
  return labels.length <= PALETTE.length
    ? { domain: labels, range: PALETTE.slice(0, labels.length) }
    : { domain: labels, scheme: 'viridis' };
}

/** A double as data hold it: twelve significant digits, the same on every engine. */
export function rounded(x: number): number {
  return Number(x.toPrecision(12));
}

/** Whether positive numbers span so much that a logarithmic axis reads better. */
export function spansDecades(values: readonly number[]): boolean {
  const [least, largest] = [Math.min(...values), Math.max(...values)];
  return least > 0 && largest >= 100 * least;
}
