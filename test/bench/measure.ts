/** Timing for the benchmarks: the least disturbed of repeated batches, reported as ratios in one run. */

/** One line of a benchmark. */
export interface BenchRow {
  /** What was measured. */
  readonly name: string;
  /** Nanoseconds per call of the library. */
  readonly own: number;
  /** Nanoseconds per call of each alternative. */
  readonly others: Readonly<Record<string, number>>;
  /** Anything worth printing beside the times, such as errors. */
  readonly note?: string;
}

/** Rows that belong together. */
export interface BenchTable {
  /** What the rows have in common. */
  readonly title: string;
  /** The rows. */
  readonly rows: readonly BenchRow[];
}

/** Every table printed so far, for the speed page. */
export const tables: BenchTable[] = [];

const sink: { last?: unknown } = {};

/**
 * Nanoseconds per call of the quickest of the batches that together last about `budget` milliseconds:
 * what else the machine does can only add to a time.
 */
export function timePerCall(call: () => unknown, budget = 120): number {
  for (let i = 0; i < 20; i++) consume(call());
  let calls = 1;
  while (batch(call, calls) <= 2) calls *= 2;
  let least = Number.POSITIVE_INFINITY;
  const end = performance.now() + budget;
  for (let batches = 0; batches < 5 || performance.now() < end; batches++) {
    least = Math.min(least, batch(call, calls) / calls);
  }
  return 1e6 * least;
}

/** Nanoseconds of the quickest of a few single calls, for calls of milliseconds or with promises. */
export async function leastOf(calls: number, call: () => unknown): Promise<number> {
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < calls; i++) {
    const start = performance.now();
    await call();
    least = Math.min(least, performance.now() - start);
  }
  return 1e6 * least;
}

function batch(call: () => unknown, calls: number): number {
  const start = performance.now();
  for (let i = 0; i < calls; i++) consume(call());
  return performance.now() - start;
}

// Keeps the optimiser from dropping calls whose result nobody reads.
function consume(value: unknown): void {
  sink.last = value;
}

/** A time with two digits and its unit. */
export function timeText(nanoseconds: number): string {
  const units = ['ns', 'µs', 'ms', 's'];
  let [value, unit] = [nanoseconds, 0];
  while (value >= 999.5 && unit < 3) {
    value /= 1000;
    unit++;
  }
  return `${Number(value.toPrecision(2))} ${units[unit]}`;
}

/** How many times as long an alternative takes, with two digits. */
export function ratioText(other: number, own: number): string {
  const ratio = other / own;
  return ratio < 1e5 ? `x${Number(ratio.toPrecision(2))}` : `x${ratio.toExponential(1)}`;
}

/** Prints a table, own time and how many times as long each alternative takes, and keeps it for the page. */
export function printRows(title: string, rows: readonly BenchRow[]): void {
  tables.push({ title, rows });
  console.log(`\n${title}`);
  for (const { name, own, others, note } of rows) {
    const ratios = Object.entries(others).map(
      ([other, time]) => `${other} ${ratioText(time, own)}`,
    );
    const remark = note ? `  (${note})` : '';
    console.log(`  ${name.padEnd(44)} ${timeText(own).padStart(8)}  ${ratios.join('  ')}${remark}`);
  }
}
