import { readdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build, type Plugin } from 'esbuild';
import { expect, test } from 'vitest';

const source = resolve(import.meta.dirname, '../../src');

/** Takes back package.json's word that files without an imported name may be left out whole. */
const keepFiles: Plugin = {
  name: 'keep-files',
  setup({ onResolve }) {
    onResolve({ filter: /\.ts$/ }, ({ resolveDir, path }) => ({
      path: resolve(resolveDir, path),
      sideEffects: true,
    }));
  },
};

/** What a bundler must keep of a program that uses nothing. */
async function remains(program: string): Promise<string> {
  const result = await build({
    stdin: { contents: program, resolveDir: source },
    bundle: true,
    minifySyntax: true,
    format: 'esm',
    target: 'es2022',
    external: ['decimal.js', 'pure-rand'],
    write: false,
    plugins: [keepFiles],
  });
  const text = (result.outputFiles[0] as { text: string }).text;
  return text.replace(/^import .*;$|^\/\/ .*$/gm, '').trim();
}

// The build puts many modules into one file, so a value that cannot be dropped would stay in every bundle.
test('no module does anything, or computes a value, when it is loaded', async () => {
  const files = readdirSync(source, { recursive: true, encoding: 'utf8' });
  const modules = files.filter((file) => file.endsWith('.ts'));
  const program = modules.map((file) => `import ${JSON.stringify(join(source, file))};`);
  expect(await remains(program.join('\n'))).toBe('');
});

test.each(['var degree = Math.PI / 180;', 'var table = new Float64Array(4);'])(
  'the check sees a value computed at load: %s',
  async (program) => {
    expect(await remains(program)).toBe(program);
  },
);
