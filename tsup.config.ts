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

export default defineConfig({
  entry: {
    index: 'src/index.ts',
    ...Object.fromEntries(rooms.map((room) => [room, `src/${room}/index.ts`])),
  },
  format: ['esm', 'cjs'],
  platform: 'neutral',
  target: 'es2022',
  // Both together: shared code lands in chunks, so a class is one class across subpaths, and the
  // CommonJS output keeps class names and plain calls.
  splitting: true,
  treeshake: true,
  sourcemap: true,
  clean: true,
  // tsup hands the declaration bundler a baseUrl, which TypeScript 6 deprecates.
  dts: { compilerOptions: { ignoreDeprecations: '6.0' } },
});
