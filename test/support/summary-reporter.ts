import { appendFileSync } from 'node:fs';
import process from 'node:process';
import type { Reporter, TestModule } from 'vitest/node';

/**
 * Closes a run with one machine-readable line: `tests: N passed, N failed, N skipped`.
 *
 * With HULLGAUGE_COUNTS set to a file, the counts are appended there too, so that a script can add
 * up several runs.
 */
export default class SummaryReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const count = { passed: 0, failed: 0, skipped: 0, pending: 0 };
    for (const module of modules) {
      for (const test of module.children.allTests()) count[test.result().state]++;
      if (module.errors().length > 0) count.failed++;
    }
    console.log(`tests: ${count.passed} passed, ${count.failed} failed, ${count.skipped} skipped`);
    const file = process.env['HULLGAUGE_COUNTS'];
    if (file) appendFileSync(file, `${count.passed} ${count.failed} ${count.skipped}\n`);
  }
}
