/** Not part of the suite: `npm run bench` runs every exported benchmark in this folder and prints it. */
import { readdirSync } from 'node:fs';
import { it } from 'vitest';

const here = new URL('.', import.meta.url);
for (const name of readdirSync(here)
  .filter((file) => file.endsWith('.bench.ts'))
  .sort()) {
  it(name, async () => {
    const module = (await import(new URL(name, here).href)) as Record<string, unknown>;
    for (const [key, bench] of Object.entries(module)) {
      if (key.startsWith('bench') && typeof bench === 'function') {
        await (bench as () => unknown)();
      }
    }
  });
}
