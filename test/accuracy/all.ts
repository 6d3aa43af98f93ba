/** Every accuracy check of the project: the exported arrays of the other files in this folder. */
import { readdirSync } from 'node:fs';
import type { AccuracyCheck } from '../support/accuracy.ts';

/** The checks by the file that defines them. */
export async function allChecks(): Promise<ReadonlyMap<string, readonly AccuracyCheck[]>> {
  const here = new URL('.', import.meta.url);
  const names = readdirSync(here).filter((name) => /^[a-z]+-[a-z0-9-]+\.ts$/.test(name));
  const checks = new Map<string, readonly AccuracyCheck[]>();
  for (const name of names.sort()) {
    const module = (await import(new URL(name, here).href)) as Record<string, unknown>;
    const arrays = Object.values(module).filter((value): value is AccuracyCheck[] =>
      Array.isArray(value),
    );
    checks.set(name.replace(/\.ts$/, ''), arrays.flat());
  }
  return checks;
}
