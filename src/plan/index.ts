/**
 * Sizing: the smallest or largest argument at which a question reaches a target, and reports.
 *
 * @module
 */
export type { Answer } from './answer.ts';
export { logSpaced } from './log-spaced.ts';
export {
  type SizingAnswer,
  type SizingReport,
  type SizingReportArgs,
  type SizingRow,
  sizingReport,
} from './sizing-report.ts';
export { type FixedArgs, largest, type ParameterOf, smallest } from './smallest.ts';
export type { Target } from './target.ts';
