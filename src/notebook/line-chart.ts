/**
 * Curves as a Vega-Lite line chart: exact values solid, limit theorems dashed.
 */
import type { LogNumber } from '../log-number.ts';
import { argumentAxis, type Result, resultAxis, type Shown } from './axes.ts';
import type { LimitCurve } from './limit-curve.ts';
import { type Chart, colourScale, NEUTRAL, withLook } from './look.ts';

/** A curve to be drawn. */
export interface Curve {
  /** Its name in the legend; null where it is the only one. */
  readonly label: string | null;
  /** One result a value of the horizontal axis. */
  readonly results: readonly Result[];
  /** The limit theorem beside it. */
  readonly limit: LimitCurve | undefined;
}

/** All that a line chart shows. */
export interface LineChart {
  /** The question in words. */
  readonly title: string;
  /** What is fixed. */
  readonly subtitle: string;
  /** Words beside the horizontal axis. */
  readonly xTitle: string;
  /** Values of the horizontal axis. */
  readonly xs: readonly (number | LogNumber)[];
  /** The curves. */
  readonly curves: readonly Curve[];
  /** Which number of a result is drawn. */
  readonly show: Shown | undefined;
}

/** One row of the data. */
interface Datum {
  readonly x: number;
  readonly y: number;
  readonly series?: string;
}

/** Up to so many values a curve shows its points. */
const FEW_VALUES = 25;
/** Name of the exact curves in the legend. */
const EXACT = 'exact';

/** The chart of some curves. */
export function lineChart({ title, subtitle, xTitle, xs, curves, show }: LineChart): Chart {
  const x = argumentAxis(xTitle, xs);
  const y = resultAxis(
    'chart',
    curves.flatMap(({ results }) => results),
    show,
  );
  const rows = curves.flatMap(({ label, results }) =>
    results.flatMap((result, i) => datum(x.place(xs[i] as number), y.place(result), label)),
  );
  const limitRows = curves.flatMap(({ label, limit }) =>
    within(
      rows,
      (limit?.points ?? []).flatMap(({ n, probability }) =>
        datum(x.place(n), y.place(probability), label),
      ),
    ),
  );
  const limitName = `limit theorem: ${curves.find(({ limit }) => limit)?.limit?.name}`;
  const labels = curves.flatMap(({ label }) => (label === null ? [] : [label]));
  const colour = {
    field: 'series',
    type: 'nominal',
    title: null,
    scale: colourScale(labels),
    legend: { symbolType: 'stroke' },
  };
  const encoding = {
    x: {
      field: 'x',
      type: 'quantitative',
      title: x.title,
      scale: x.scale,
      ...(x.axis && { axis: x.axis }),
    },
    y: { field: 'y', type: 'quantitative', title: y.title, scale: y.scale },
    ...(labels.length === 0 ? {} : { color: colour }),
  };
  const line = (kind: string, strokeWidth: number): object => ({
    mark: { type: 'line', strokeWidth, tooltip: true },
    encoding: limitRows.length === 0 ? {} : { strokeDash: dash(kind, limitName) },
  });
  const points = { mark: { type: 'point', filled: true, size: 40, opacity: 1, tooltip: true } };
  const exactLayer = {
    data: { values: rows },
    encoding,
    layer: xs.length <= FEW_VALUES ? [line(EXACT, 2), points] : [line(EXACT, 2)],
  };
  const limitLayer = {
    data: { values: limitRows },
    encoding,
    layer: [line(limitName, 1.5)],
  };
  const range = x.title === xTitle ? ` from ${ends(rows)}` : '';
  const names = labels.length === 0 ? '' : `; ${labels.join(', ')}`;
  return withLook(`${title} ${y.title} over ${x.title}${range}${names}`, {
    title: subtitle === '' ? title : { text: title, subtitle },
    layer: limitRows.length === 0 ? [exactLayer] : [exactLayer, limitLayer],
  });
}

function datum(x: number | null, y: number | null, label: string | null): readonly Datum[] {
  if (x === null || y === null) return [];
  return [label === null ? { x, y } : { x, y, series: label }];
}

/** Solid for exact values, dashed for the limit theorem, with a legend that says so. */
function dash(kind: string, limitName: string): object {
  const range = [
    [1, 0],
    [5, 4],
  ];
  return {
    datum: kind,
    type: 'nominal',
    title: null,
    scale: { domain: [EXACT, limitName], range },
    legend: { symbolType: 'stroke', symbolStrokeColor: NEUTRAL },
  };
}

/** The rows of a limit curve that lie where the exact ones do. */
function within(exact: readonly Datum[], rows: readonly Datum[]): readonly Datum[] {
  const ranges = (['x', 'y'] as const).map((field) => {
    const positions = exact.map((row) => row[field]);
    return [field, Math.min(...positions), Math.max(...positions)] as const;
  });
  const inside = rows.filter((row) =>
    ranges.every(([field, least, largest]) => row[field] >= least && row[field] <= largest),
  );
  return inside.length < 2 ? [] : inside;
}

/** The range of the horizontal axis in words. */
function ends(rows: readonly Datum[]): string {
  const positions = rows.map(({ x }) => x);
  return `${Math.min(...positions)} to ${Math.max(...positions)}`;
}
