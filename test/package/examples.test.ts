/**
 * Runs every ```ts block of the source comments, README, DEVELOPERS.md and guides.
 *
 * A line `expression; // => value` becomes an assertion; other lines run as they stand.
 */
import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { it } from 'vitest';

const root = join(import.meta.dirname, '../..');
const out = join(root, `temp/examples-${process.pid}`);
rmSync(join(root, 'temp'), { recursive: true, force: true });
mkdirSync(out, { recursive: true });

/** Files below a folder of the repository whose names end in `extension`. */
function filesUnder(folder: string, extension: string): string[] {
  const names = readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' });
  return names.filter((name) => name.endsWith(extension)).map((name) => join(folder, name));
}

/** The ```ts blocks of a file, with the margin of block comments removed. */
function examplesIn(file: string): string[] {
  const text = readFileSync(join(root, file), 'utf8').replace(/^ *\* ?/gm, '');
  return [...text.matchAll(/^```ts\n(.*?)^```/gms)].map((match) => match[1] ?? '');
}

/** A block as a module whose `// =>` comments are assertions. */
function asTest(block: string): string {
  const code = block.replace(/^( *)(\S.*?);\s*\/\/ => (.*)$/gm, '$1__expect($2).toEqual($3);');
  return `import { expect, expect as __expect } from 'vitest';\n${code}`;
}

const sources = [
  'README.md',
  'DEVELOPERS.md',
  ...filesUnder('docs', '.md'),
  ...filesUnder('src', '.ts'),
];
const examples = sources
  .map((file) => ({ file, blocks: examplesIn(file) }))
  .filter(({ blocks }) => blocks.length > 0);

it.each(examples)('$file', async ({ file, blocks }) => {
  for (const [index, block] of blocks.entries()) {
    const path = join(out, `${file.replaceAll(/\W/g, '_')}_${index}.ts`);
    writeFileSync(path, asTest(block));
    await import(path);
  }
});
