import { defineConfig } from 'tsup';

/** One entry per public subpath; package.json lists the same names under "exports". */
export const rooms = [
  'special',
  'conic',
  'polytope',
  'intrinsic',
  'plan',
  'data',
  'precise',
  'notebook',
] as const;

/** The declarations of the package; rolldown.config.ts makes the JavaScript. */
export default defineConfig({
  entry: {
    index: 'src/index.ts',
    ...Object.fromEntries(rooms.map((room) => [room, `src/${room}/index.ts`])),
  },
  format: ['esm', 'cjs'],
  // tsup hands the declaration bundler a baseUrl, which TypeScript 6 deprecates.
  dts: { only: true, compilerOptions: { ignoreDeprecations: '6.0' } },
});
