/**
 * Charts as plain Vega-Lite JSON that notebooks show by themselves.
 *
 * @module
 */
export type { Shown } from './axes.ts';
export { type ChartedQuestion, type ChartOptions, chart } from './chart.ts';
export type { Chart } from './look.ts';
export { sizingChart } from './sizing-chart.ts';
