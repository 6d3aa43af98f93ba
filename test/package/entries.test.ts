/** The public modules are named in several places; they must name the same ones. */
import { existsSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { rooms } from '../../tsup.config.ts';

const json = (file: string): unknown =>
  JSON.parse(readFileSync(new URL(`../../${file}`, import.meta.url), 'utf8'));

const manifest = json('package.json') as {
  exports: Record<string, unknown>;
  typedocOptions: { entryPoints: string[] };
  dependencies?: Record<string, string>;
  devDependencies: Record<string, string>;
};

it('package.json exports exactly the rooms that are built', () => {
  const subpaths = ['.', ...rooms.map((room) => `./${room}`), './package.json'];
  expect(Object.keys(manifest.exports)).toEqual(subpaths);
});

it('the API reference covers exactly the rooms that are built', () => {
  const files = ['src/index.ts', ...rooms.map((room) => `src/${room}/index.ts`)];
  expect(manifest.typedocOptions.entryPoints).toEqual(files);
  for (const file of files)
    expect(existsSync(new URL(`../../${file}`, import.meta.url))).toBe(true);
});

it('every dependency is pinned exactly', () => {
  const all = { ...manifest.dependencies, ...manifest.devDependencies };
  for (const [name, version] of Object.entries(all)) {
    expect(`${name}@${version}`).toMatch(/@\d+\.\d+\.\d+$/);
  }
});

it('runs on nothing but decimal.js and pure-rand', () => {
  for (const name of Object.keys(manifest.dependencies ?? {})) {
    expect(['decimal.js', 'pure-rand']).toContain(name);
  }
});
