/**
 * A short, seeded run of the fuzzer. `npm run fuzz` makes it long: HULLGAUGE_FUZZ calls from the seed
 * HULLGAUGE_SEED.
 */
import process from 'node:process';
import { expect, it } from 'vitest';
import { fuzz } from './fuzz.ts';

const count = Number(process.env['HULLGAUGE_FUZZ'] ?? 6000);
const seed = Number(process.env['HULLGAUGE_SEED'] ?? 1);

it(`${count} generated calls give answers or refusals, never nonsense`, async () => {
  const report = await fuzz(count, seed);
  if (process.env['HULLGAUGE_FUZZ']) {
    const { time, call } = report.slowest;
    console.log(
      `${report.answers} answers of ${report.calls} calls; slowest ${time.toFixed(0)} ms: ${call}`,
    );
    console.log(report.unconverged.slice(0, 20).join('\n'));
  }
  expect(report.unconverged.length).toBeLessThan(Math.max(4, count / 500));
  expect(report.failures.slice(0, 20)).toEqual([]);
  expect(report.answers).toBeGreaterThan(count / 10);
}, 3_600_000);
