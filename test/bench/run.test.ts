/**
 * Not part of the suite: `npm run bench` runs every exported benchmark in this folder, prints it and
 * writes docs/speed.md.
 */
import { spawnSync } from 'node:child_process';
import { readdirSync, writeFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { tables } from './measure.ts';
import { type SizeRow, speedPage } from './page.ts';

const here = new URL('.', import.meta.url);
const files = readdirSync(here)
  .filter((file) => file.endsWith('.bench.ts'))
  .sort();

let finished = 0;

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
    finished++;
  });
}

it('docs/speed.md', () => {
  // A page of some of the tables would look complete.
  expect(finished).toBe(files.length);
  const limits = spawnSync('npx', ['size-limit', '--json'], { encoding: 'utf8' }).stdout;
  const sizes = JSON.parse(limits) as readonly SizeRow[];
  writeFileSync(new URL('../../docs/speed.md', here), speedPage(tables, sizes));
});
