import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';
import { rooms } from '../../tsup.config.ts';

const built = (name: string): string =>
  fileURLToPath(new URL(`../../dist/${name}.js`, import.meta.url));

export default defineConfig({
  root: fileURLToPath(new URL('../..', import.meta.url)),
  // The build, loaded natively: the test runner's own module wrapping would slow every call.
  resolve: {
    alias: [
      { find: /^hullgauge$/, replacement: built('index') },
      ...rooms.map((room) => ({ find: `hullgauge/${room}`, replacement: built(room) })),
    ],
  },
  test: {
    include: ['test/bench/run.test.ts'],
    testTimeout: 600_000,
    server: { deps: { external: [/\/dist\//] } },
  },
});
