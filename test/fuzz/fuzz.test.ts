/**
 * A short, seeded run of the fuzzer. `npm run fuzz` makes it long: HULLGAUGE_FUZZ calls from the seed
 * HULLGAUGE_SEED, HULLGAUGE_CALL the first or, without a count, the only one.
 */
import process from 'node:process';
import { expect, it } from 'vitest';
import { type FuzzReport, fuzz } from './fuzz.ts';
import { watch } from './watch.ts';

const { HULLGAUGE_FUZZ, HULLGAUGE_SEED = '1', HULLGAUGE_CALL, HULLGAUGE_MINUTES } = process.env;
const long = HULLGAUGE_FUZZ !== undefined || HULLGAUGE_CALL !== undefined;
const first = Number(HULLGAUGE_CALL ?? 0);
const count = Number(HULLGAUGE_FUZZ ?? (HULLGAUGE_CALL === undefined ? 4000 : 1));
const seed = Number(HULLGAUGE_SEED);
const minutes = Number(HULLGAUGE_MINUTES ?? 120);

it(
  `${count} generated calls give answers or refusals, never nonsense`,
  async () => {
    const watching = long ? watch(seed, minutes) : undefined;
    const tell = (line: string): unknown => long && process.stderr.write(`${line}\n`);
    const goesOn = (index: number, call: string): boolean => {
      // a single call may be one that never ends
      if (count === 1) tell(call);
      else if (index > first && (index - first) % 10_000 === 0) tell(`${index - first} calls`);
      return watching?.goesOn(index) ?? true;
    };
    const report = await fuzz({ seed, first, count, goesOn, onFailure: tell });
    await watching?.stop();
    if (long) console.log(summary(report));
    expect(report.failures.slice(0, 20)).toEqual([]);
    expect(report.unconverged.length).toBeLessThan(Math.max(4, count / 500));
    if (count < 4000) return;
    expect(report.silent).toEqual([]);
    expect(report.answers).toBeGreaterThan(report.calls / 2);
    expect(report.comparisons).toBeGreaterThan(report.calls / 5);
  },
  (minutes + 10) * 60_000,
);

/** Durations are multiples of a million logarithms on the same machine. */
function summary({ calls, answers, comparisons, ...report }: FuzzReport): string {
  const unit = millionLogarithms();
  return [
    `seed ${seed}, calls ${first} to ${first + calls - 1}: ${answers} answers, ${comparisons} compared with a second one`,
    `${report.failures.length} failures, ${report.unconverged.length} unconverged; to replay one:`,
    'HULLGAUGE_SEED=.. HULLGAUGE_CALL=.. npx vitest run --config test/vitest.config.ts test/fuzz',
    ...report.unconverged.slice(0, 20),
    'slowest, in times of a million logarithms:',
    ...report.slowest.map(({ time, call }) => `${(time / unit).toFixed(0).padStart(6)} ${call}`),
  ].join('\n');
}

/** Milliseconds for a million logarithms: the least of five times. */
function millionLogarithms(): number {
  const times = Array.from({ length: 5 }, () => {
    const start = performance.now();
    let sum = 0;
    for (let i = 1; i <= 1e6; i++) sum += Math.log(i);
    return sum > 0 ? performance.now() - start : Number.NaN;
  });
  return Math.min(...times);
}
