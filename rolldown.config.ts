import { defineConfig, type OutputOptions } from 'rolldown';
import { rooms } from './tsup.config.ts';

/**
 * The JavaScript of the package; tsup.config.ts makes the declarations.
 *
 * Two shared files instead of one for each set of entries that share something: each file costs Node
 * one to two milliseconds at the first import. A class is one class across subpaths because it lives
 * in a shared file. Top-level values must be literals or marked pure, or they stay in every bundle
 * (test/package/tree-shaking.test.ts).
 */
const output: OutputOptions = {
  dir: 'dist',
  sourcemap: true,
  // The declarations carry the documentation; comments here would only be parsed again and again.
  comments: { annotation: true, jsdoc: false, legal: false },
  codeSplitting: {
    groups: [
      { name: 'foundation', test: /\/src\/(special\/|(?!index)[a-z-]+\.ts)/, priority: 1 },
      { name: 'core', test: /\/src\/(?!notebook|precise)/ },
    ],
  },
};

const named = (extension: string): OutputOptions => ({
  ...output,
  entryFileNames: `[name].${extension}`,
  chunkFileNames: `[name].${extension}`,
});

export default defineConfig({
  input: {
    index: 'src/index.ts',
    ...Object.fromEntries(rooms.map((room) => [room, `src/${room}/index.ts`])),
  },
  external: ['decimal.js', /^pure-rand\//],
  platform: 'neutral',
  output: [
    { ...named('js'), format: 'esm', cleanDir: true },
    { ...named('cjs'), format: 'cjs' },
  ],
});
