/**
 * Not part of the suite: `npm run bench` runs every exported benchmark in this folder, prints it and
 * writes docs/speed.md.
 */
import { execFileSync } from 'node:child_process';
import { readdirSync, writeFileSync } from 'node:fs';
import { afterAll, expect, it } from 'vitest';
import { tables } from './measure.ts';
import { type SizeRow, speedPage } from './page.ts';

const here = new URL('.', import.meta.url);
const files = readdirSync(here)
  .filter((file) => file.endsWith('.bench.ts'))
  .sort();

for (const name of files) {
  it(name, async () => {
    const before = tables.length;
    const module = (await import(new URL(name, here).href)) as Record<string, unknown>;
    for (const [key, bench] of Object.entries(module)) {
      if (key.startsWith('bench') && typeof bench === 'function') {
        await (bench as () => unknown)();
      }
    }
    expect(tables.length).toBeGreaterThan(before);
  });
}

afterAll((_, { tasks }) => {
  // A page of some of the tables would look complete.
  if (tasks.some(({ result }) => result?.state !== 'pass')) return;
  const limits = execFileSync('npx', ['size-limit', '--json'], {
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'ignore'],
  });
  const sizes = JSON.parse(limits) as readonly SizeRow[];
  writeFileSync(new URL('../../docs/speed.md', here), speedPage(tables, sizes));
});
