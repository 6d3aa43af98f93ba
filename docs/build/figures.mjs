/**
 * Renders docs/figures/*.mjs (each exports a Vega-Lite specification) to SVG beside them.
 *
 * With --check it writes nothing and fails if a committed SVG is out of date. The figures import the
 * built package, so build first.
 */
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { parse, View } from 'vega';
import { compile } from 'vega-lite';

const folder = new URL('../figures/', import.meta.url);
const check = process.argv.includes('--check');

for (const name of readdirSync(folder).filter((file) => file.endsWith('.mjs'))) {
  const { default: spec } = await import(new URL(name, folder).href);
  const svg = `${await new View(parse(compile(spec).spec)).toSVG()}\n`;
  const target = new URL(name.replace(/mjs$/, 'svg'), folder);
  if (!check) {
    writeFileSync(target, svg);
  } else if (!existsSync(target) || readFileSync(target, 'utf8') !== svg) {
    console.error(`${target.pathname} is out of date: npm run figures`);
    process.exitCode = 1;
  }
}
