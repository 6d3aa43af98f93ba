/** Imports flow down the floors of the house, never up and never sideways except where said. */
import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

const source = new URL('../../src/', import.meta.url);

/** The floor of a file, and the room whose members may import each other. */
function placeOf(file: string): { floor: number; room: string } {
  const room = file.includes('/') ? (file.split('/')[0] as string) : file;
  const floors: Record<string, number> = {
    special: 2,
    numeric: 2.5,
    'law.ts': 3,
    intrinsic: 3.5,
    conic: 4,
    polytope: 5,
    plan: 6,
    data: 6,
    notebook: 7,
    'index.ts': 8,
    precise: 1.5,
  };
  return { floor: floors[room] ?? 1, room };
}

it('every import goes to the same room or to a floor below', () => {
  const files = readdirSync(source, { recursive: true, encoding: 'utf8' }).filter((name) =>
    name.endsWith('.ts'),
  );
  const wrong: string[] = [];
  for (const file of files) {
    const from = placeOf(file);
    const text = readFileSync(new URL(file, source), 'utf8');
    for (const [, target] of text.matchAll(/from '(\.[^']+)'/g)) {
      const path = new URL(target as string, new URL(file, source)).href.slice(source.href.length);
      const to = placeOf(path);
      const allowed =
        to.room === from.room || to.floor < from.floor || (to.floor === 1 && from.floor === 1);
      if (!allowed) wrong.push(`${file} -> ${path}`);
    }
  }
  expect(wrong).toEqual([]);
});

it('no file is longer than a reader can hold', () => {
  const long: string[] = [];
  for (const name of readdirSync(source, { recursive: true, encoding: 'utf8' })) {
    if (!name.endsWith('.ts')) continue;
    const lines = readFileSync(new URL(name, source), 'utf8').split('\n').length;
    if (lines > 340) long.push(`${name}: ${lines} lines`);
  }
  expect(long).toEqual([]);
});
