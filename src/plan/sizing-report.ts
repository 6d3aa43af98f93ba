/**
 * The sizing report: every question that fits a law, at a planned size and at the sizes that reach
 * given targets.
 */
import type { Count } from '../count.ts';
import { resolveCount } from '../count.ts';
import { Displayable, type DisplayRow, formatExponential, formatNumber } from '../display.ts';
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import { checkLaw, describeLaw, gaussian, type Law } from '../law.ts';
import { Probability } from '../probability.ts';
import type { Answer } from './answer.ts';
import { type QuestionRow, questions } from './questions.ts';
import { smallest } from './smallest.ts';

/** Arguments of {@link sizingReport}. */
export interface SizingReportArgs {
  /** Number of variables: an integer >= 1. */
  readonly d: number;
  /** A planned number of points, to be judged too. */
  readonly n?: Count;
  /** The law of the points; `gaussian()` if left out. */
  readonly law?: Law;
  /** Probabilities to reach, each inside (0, 1); 0.5, 0.9 and 0.99 if left out. */
  readonly targets?: readonly number[];
}

/** The number of points that reaches one target. */
export interface SizingAnswer {
  /** The probability to reach. */
  readonly target: number;
  /** The smallest number of points, or null where no number reaches the target. */
  readonly answer: Answer | null;
  /** Why there is no answer. */
  readonly reason?: string;
  /** The size that the question's limit theorem gives. */
  readonly limit?: Count;
}

/** One question of the report. */
export interface SizingRow {
  /** Name of the function that answers it. */
  readonly question: string;
  /** The question in words. */
  readonly title: string;
  /** What the answer assumes. */
  readonly assumes: string;
  /** Name of the limit theorem beside the exact sizes. */
  readonly limitName?: string;
  /** The probability at the planned number of points. */
  readonly planned?: Probability;
  /** One entry a target. */
  readonly sizes: readonly SizingAnswer[];
}

/**
 * Sizes a sample in d variables: for each question that the library can answer under the law in that
 * dimension, the probability at the planned number of points and the smallest numbers that reach the targets.
 *
 * The limit theorem's size stands beside the exact one where there is such a theorem. A question whose
 * probability falls with n (random labels being separable) is sized so that its complement reaches the
 * target.
 *
 * @param args - `d`: number of variables; `n`: planned points; `law`: `gaussian()` if left out;
 *   `targets`: probabilities inside (0, 1), `[0.5, 0.9, 0.99]` if left out
 * @returns rows as data, and as text, Markdown and JSON
 * @remarks Cost: for each question and target some 20 evaluations of the question, a tenth of a second to a
 *   second in all. The numbers hold under the assumptions named in each row; they do not replace a safety
 *   review or the practice and codes that apply.
 * @throws A {@link DomainError} if an argument is missing, unknown or out of its domain
 *
 * @example
 * ```ts
 * import { sizingReport } from 'hullgauge';
 * const report = sizingReport({ d: 6, targets: [0.95] });
 * report.rows[0]?.sizes[0]?.answer?.value; // => 19
 * ```
 */
export function sizingReport(args: SizingReportArgs): SizingReport {
  const fn = 'sizingReport';
  checkOptions(fn, args, ['d', 'n', 'law', 'targets']);
  const { d, n, law = gaussian(), targets = [0.5, 0.9, 0.99] } = args;
  checkInteger(fn, 'd', d, 1);
  if (n !== undefined) resolveCount(fn, 'n', n);
  checkLaw(fn, law, ['gaussian', 'beta', 'betaPrime'], d);
  if (!Array.isArray(targets)) throw new DomainError(fn, 'targets', 'an array', targets);
  targets.forEach((target: unknown, index) => {
    if (!(typeof target === 'number' && target > 0 && target < 1)) {
      throw new DomainError(fn, `targets[${index}]`, 'a number between 0 and 1', target);
    }
  });
  const rows = questions
    .filter(({ laws }) => laws === undefined || laws.includes(law.family))
    .filter(({ leastDimension = 1 }) => d >= leastDimension)
    .filter(({ ask }) => inDomain(() => ask({ n: d, d, law })) !== undefined)
    .map((question) => rowFor(question, d, n, law, targets));
  return new SizingReport(d, law, n, rows);
}

function rowFor(
  question: QuestionRow,
  d: number,
  n: Count | undefined,
  law: Law,
  targets: readonly number[],
): SizingRow {
  const { name, title, assumes, ask, limit } = question;
  const sizes = targets.map((target): SizingAnswer => {
    const limitSize = limit && inDomain(() => limit.size(d, target, law));
    const size = limitSize === undefined ? {} : { limit: limitSize };
    try {
      return { target, answer: sizeFor(question, d, law, target), ...size };
    } catch (error) {
      if (!(error instanceof DomainError && error.parameter === 'target')) throw error;
      return { target, answer: null, reason: error.message, ...size };
    }
  });
  return {
    question: name,
    title,
    assumes,
    ...(limit === undefined ? {} : { limitName: limit.name }),
    ...plannedAt(ask, n, d, law),
    sizes,
  };
}

/** The probability at the planned size; absent where the question does not take so many. */
function plannedAt(
  ask: QuestionRow['ask'],
  n: Count | undefined,
  d: number,
  law: Law,
): { planned?: Probability } {
  const planned = n === undefined ? n : inDomain(() => ask({ n, d, law }));
  return planned === undefined ? {} : { planned };
}

/** The result of a call, or undefined where a function refuses its arguments. */
function inDomain<T>(call: () => T): T | undefined {
  try {
    return call();
  } catch (error) {
    if (error instanceof DomainError) return undefined;
    throw error;
  }
}

function sizeFor(question: QuestionRow, d: number, law: Law, target: number): Answer {
  const { name, ask, direction } = question;
  // Named for the messages of the search.
  const asked = { [name]: (args: { n: Count; d: number; law: Law }) => ask(args) }[
    name
  ] as typeof ask;
  // The complement of a falling question is what must reach the target, exactly.
  const goal = direction === 'rises' ? target : { atMost: Probability.fromComplement(target) };
  return smallest(asked, 'n', { d, law }, goal);
}

/** A sizing report: rows of data that print as text, Markdown or JSON. Made by {@link sizingReport}. */
export class SizingReport extends Displayable {
  /** Always `'sizingReport'`. */
  readonly kind = 'sizingReport' as const;
  /** Number of variables. */
  readonly d: number;
  /** The law of the points. */
  readonly law: Law;
  /** The planned number of points, or null. */
  readonly n: Count | null;
  /** One row a question. */
  readonly rows: readonly SizingRow[];

  /** @internal */
  constructor(d: number, law: Law, n: Count | undefined, rows: readonly SizingRow[]) {
    super();
    this.d = d;
    this.law = law;
    this.n = n ?? null;
    this.rows = rows;
  }

  /** The report as aligned plain text. */
  override toString(): string {
    const lines = [this.heading()];
    for (const row of this.rows) {
      lines.push('', row.title, `  ${row.question}: ${row.assumes}`);
      if (row.planned !== undefined)
        lines.push(`  planned n = ${countText(this.n)}: ${row.planned}`);
      const table = sizeTable(row);
      const widths = (table[0] as readonly string[]).map((_, column) =>
        Math.max(...table.map((cells) => (cells[column] as string).length)),
      );
      for (const cells of table) {
        const padded = cells.map((cell, column) => cell.padEnd(widths[column] as number));
        lines.push(`  ${padded.join('  ').trimEnd()}`);
      }
    }
    return lines.join('\n');
  }

  /** The report as Markdown, one table a question. */
  toMarkdown(): string {
    const lines = [`# ${this.heading()}`];
    for (const row of this.rows) {
      lines.push('', `## ${row.title}`, '', `\`${row.question}\`: ${row.assumes}.`, '');
      if (row.planned !== undefined) {
        lines.push(`At the planned n = ${countText(this.n)}: ${row.planned}.`, '');
      }
      const [head, ...body] = sizeTable(row) as [readonly string[], ...(readonly string[])[]];
      lines.push(`| ${head.join(' | ')} |`, `|${head.map(() => ' --- |').join('')}`);
      for (const cells of body) lines.push(`| ${cells.join(' | ')} |`);
    }
    return `${lines.join('\n')}\n`;
  }

  /** The rows as plain data. */
  toJSON(): object {
    return { kind: this.kind, d: this.d, law: this.law, n: this.n, rows: this.rows };
  }

  /** @internal */
  override displayRows(): readonly DisplayRow[] {
    return this.rows.flatMap((row) =>
      row.sizes.map((size): DisplayRow => [`${row.title} ${size.target}`, sizeText(size)]),
    );
  }

  private heading(): string {
    return `Sizing a sample in d = ${this.d} variables (law of the points: ${describeLaw(this.law)})`;
  }
}

/** Header and rows of one question's table of sizes. */
function sizeTable(row: SizingRow): readonly (readonly string[])[] {
  const limits = row.limitName !== undefined;
  const head = ['probability', 'smallest n', ...(limits ? [`limit theorem ${row.limitName}`] : [])];
  const body = row.sizes.map((size) => [
    formatNumber(size.target),
    sizeText(size),
    ...(limits ? [size.limit === undefined ? '' : limitText(size.limit)] : []),
  ]);
  return [head, ...body];
}

function sizeText({ answer }: SizingAnswer): string {
  if (answer === null) return 'never reached';
  if (answer.log > Math.log(Number.MAX_SAFE_INTEGER)) return formatExponential(answer.log, 1e-6);
  const [from, to] = answer.bracket;
  return from === to ? String(from) : `${from} to ${to}`;
}

function limitText(limit: Count): string {
  return typeof limit === 'number' ? limit.toFixed(1) : formatExponential(limit.log, 5e-5);
}

function countText(n: Count | null): string {
  return typeof n === 'number' ? String(n) : `${n}`;
}
