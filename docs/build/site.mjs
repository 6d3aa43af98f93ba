/**
 * Adds the live calculator to the generated site: docs/calculator with the ESM build as one module
 * inside the page, since browsers load no modules from disk.
 *
 * Runs after TypeDoc, which empties the folder. It imports the built package, so build first.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const source = new URL('../calculator/', import.meta.url);
const {
  outputFiles: [module],
} = await build({
  entryPoints: [fileURLToPath(new URL('calculator.mjs', source))],
  bundle: true,
  format: 'esm',
  target: 'es2022',
  // Names stay: error messages quote those of functions.
  minifySyntax: true,
  minifyWhitespace: true,
  legalComments: 'none',
  logLevel: 'error',
  write: false,
});
const tag = '<script type="module" src="calculator.mjs"></script>';
const page = readFileSync(new URL('index.html', source), 'utf8');
if (!page.includes(tag)) throw new Error(`docs/calculator/index.html lacks ${tag}`);
// A closing tag inside a string would end the script.
const inlined = module.text.replaceAll('</script', '<\\/script');
writeFileSync(
  new URL('../../site/calculator.html', import.meta.url),
  page.replace(tag, () => `<script type="module">\n${inlined}</script>`),
);
