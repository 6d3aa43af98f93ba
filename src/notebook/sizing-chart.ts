/**
 * A sizing report as a chart: for each question the sizes that reach the targets.
 */
import type { Count } from '../count.ts';
import { formatNumber } from '../display.ts';
import { DomainError } from '../domain.ts';
import { describeLaw } from '../law.ts';
import { LogNumber } from '../log-number.ts';
import type { SizingReport } from '../plan/sizing-report.ts';
import { argumentAxis } from './axes.ts';
import { type Chart, colourScale, NEUTRAL, withLook } from './look.ts';

/** One size of one question. */
interface Size {
  readonly question: string;
  readonly target: string;
  readonly n: Count;
}

/**
 * Draws a sizing report: one line a question, with the smallest numbers of points that reach the targets
 * as dots, the sizes of the limit theorem as hollow diamonds, and the planned number as a rule.
 *
 * Targets that a question never reaches are named below the title.
 *
 * @param report - a report of `sizingReport`
 * @returns the specification, plain JSON that notebooks show by themselves
 * @throws A {@link DomainError} if `report` is not a sizing report
 *
 * @example
 * ```ts
 * import { sizingReport } from 'hullgauge';
 * import { sizingChart } from 'hullgauge/notebook';
 * const spec = sizingChart(sizingReport({ d: 6, targets: [0.5, 0.95] }));
 * spec.description; // => 'Sizes of a sample in d = 6 variables (Gaussian) for probabilities 0.5, 0.95'
 * ```
 */
export function sizingChart(report: SizingReport): Chart {
  if (!isSizingReport(report)) {
    throw new DomainError('sizingChart', 'report', 'a report of sizingReport', report);
  }
  const { d, law, n, rows } = report;
  const sizes = rows.flatMap((row) =>
    row.sizes.flatMap(({ target, answer }): readonly Size[] => {
      if (answer === null) return [];
      const size = Number.isFinite(answer.value) ? answer.value : LogNumber.fromLog(answer.log);
      return [{ question: row.title, target: formatNumber(target), n: size }];
    }),
  );
  const limits = rows.flatMap((row) =>
    row.sizes.flatMap(({ target, limit }): readonly Size[] =>
      limit === undefined ? [] : [{ question: row.title, target: formatNumber(target), n: limit }],
    ),
  );
  const planned = n === null ? [] : [n];
  const all = [...sizes, ...limits].map((size) => size.n);
  const axis = argumentAxis('number of points n', [...all, ...planned]);
  const placed = (size: Size): readonly object[] => {
    const x = axis.place(size.n);
    return x === null ? [] : [{ x, question: size.question, target: size.target }];
  };
  const targets = [...new Set(rows.flatMap((row) => row.sizes.map(({ target }) => target)))];
  const labels = targets.sort((a, b) => a - b).map((target) => formatNumber(target));
  const kinds = ['smallest n', 'limit theorem'];
  const layer = (kind: string, values: readonly object[], mark: object): object => ({
    data: { values },
    mark: { type: 'point', tooltip: true, ...mark },
    encoding: {
      x: { field: 'x', type: 'quantitative', title: axis.title, scale: axis.scale },
      y: {
        field: 'question',
        type: 'nominal',
        title: null,
        sort: rows.map((row) => row.title),
        axis: { labelLimit: 0, grid: true },
      },
      color: {
        field: 'target',
        type: 'nominal',
        title: 'probability to reach',
        scale: colourScale(labels),
      },
      shape: {
        datum: kind,
        type: 'nominal',
        title: null,
        scale: { domain: kinds, range: ['circle', 'diamond'] },
      },
    },
  });
  const rules = planned.flatMap((count) => {
    const x = axis.place(count);
    return x === null ? [] : [rule(x, `planned n = ${String(count)}`)];
  });
  const missing = rows.flatMap((row) => {
    const never = row.sizes.filter(({ answer }) => answer === null);
    const list = never.map(({ target }) => formatNumber(target)).join(', ');
    return never.length === 0 ? [] : [`never reached: ${row.title} ${list}`];
  });
  const text = `How many points in d = ${d} variables?`;
  const subtitle = [`law of the points: ${describeLaw(law)}`, ...missing];
  const description = `Sizes of a sample in d = ${d} variables (${describeLaw(law)}) for probabilities ${labels.join(', ')}`;
  return withLook(description, {
    title: { text, subtitle },
    height: { step: 48 },
    layer: [
      layer('smallest n', sizes.flatMap(placed), { filled: true, size: 90 }),
      layer('limit theorem', limits.flatMap(placed), { filled: false, size: 110 }),
      ...rules,
    ],
  });
}

function isSizingReport(report: unknown): report is SizingReport {
  if (typeof report !== 'object' || report === null) return false;
  const { kind, rows } = report as { kind?: unknown; rows?: unknown };
  return kind === 'sizingReport' && Array.isArray(rows);
}

/** A vertical rule with its words at the top. */
function rule(x: number, text: string): object {
  const encoding = { x: { datum: x, type: 'quantitative' } };
  return {
    data: { values: [{}] },
    layer: [
      { mark: { type: 'rule', color: NEUTRAL, strokeDash: [2, 3] }, encoding },
      {
        mark: { type: 'text', color: NEUTRAL, align: 'left', baseline: 'top', dx: 4, y: 0, text },
        encoding,
      },
    ],
  };
}
