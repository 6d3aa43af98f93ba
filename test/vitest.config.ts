import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const path = (relative: string): string => fileURLToPath(new URL(relative, import.meta.url));

/** Tests and documentation examples import the package by its public names and get the sources. */
export const alias = [
  { find: /^hullgauge$/, replacement: path('../src/index.ts') },
  { find: /^hullgauge\/(.+)$/, replacement: path('../src/$1/index.ts') },
];

export default defineConfig({
  root: path('..'),
  resolve: { alias },
  test: {
    include: ['test/**/*.test.ts'],
    exclude: ['test/accuracy/print.test.ts', 'test/bench/**'],
    reporters: ['default', path('support/summary-reporter.ts')],
    setupFiles: [path('support/seed.ts')],
    testTimeout: 60_000,
  },
});
