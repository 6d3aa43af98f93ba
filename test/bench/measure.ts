/** Timing for the benchmarks: medians of repeated batches, printed as ratios in one run. */

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

let sink = 0;

/** Median nanoseconds per call over batches that together last about `budget` milliseconds. */
export function timePerCall(call: () => unknown, budget = 120): number {
  for (let i = 0; i < 20; i++) consume(call());
  let calls = 1;
  for (;;) {
    const elapsed = batch(call, calls);
    if (elapsed > 2) break;
    calls *= 2;
  }
  const times: number[] = [];
  const end = performance.now() + budget;
  while (performance.now() < end || times.length < 5) times.push(batch(call, calls) / calls);
  times.sort((a, b) => a - b);
  return 1e6 * (times[times.length >> 1] as number);
}

function batch(call: () => unknown, calls: number): number {
  const start = performance.now();
  for (let i = 0; i < calls; i++) consume(call());
  return performance.now() - start;
}

// Keeps the optimiser from dropping calls whose result nobody reads.
function consume(value: unknown): void {
  if (value === undefined) sink++;
}

/** Prints a table: own time, and how many times as long each alternative takes. */
export function printRows(title: string, rows: readonly BenchRow[]): void {
  console.log(`\n${title}`);
  for (const { name, own, others, note } of rows) {
    const ratios = Object.entries(others).map(
      ([other, time]) => `${other} x${(time / own).toPrecision(3)}`,
    );
    const time = own < 1e4 ? `${own.toFixed(0)} ns` : `${(own / 1e3).toFixed(1)} us`;
    console.log(
      `  ${name.padEnd(44)} ${time.padStart(10)}  ${ratios.join('  ')}${note ? `  (${note})` : ''}`,
    );
  }
}
