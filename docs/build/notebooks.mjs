/**
 * Runs docs/notebooks/*.ipynb in the Deno kernel against the built package and compares the outputs with
 * the committed ones.
 *
 * With --update the fresh outputs are written back. Each chart gets an SVG beside its specification, for
 * viewers that draw none. Needs Debian's python3-jupyter-client and python3-nbformat; build first.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parse, View } from 'vega';
import { compile } from 'vega-lite';

const CHART = 'application/vnd.vegalite.v5+json';
const here = (path) => fileURLToPath(new URL(path, import.meta.url));
const folder = here('../notebooks/');
const update = process.argv.includes('--update');
const work = mkdtempSync(join(tmpdir(), 'notebooks-'));
// The kernel is installed in a folder of this run and leaves nothing behind.
const env = {
  ...process.env,
  NO_COLOR: '1',
  XDG_DATA_HOME: work,
  JUPYTER_PATH: join(work, 'jupyter'),
  JUPYTER_RUNTIME_DIR: join(work, 'run'),
};

/** A notebook with fresh outputs, without anything that differs between runs. */
async function execute(text) {
  const notebook = JSON.parse(
    execFileSync('/usr/bin/python3', [here('execute-notebook.py'), folder], {
      env,
      input: text,
      encoding: 'utf8',
      maxBuffer: 2 ** 28,
    }),
  );
  for (const cell of notebook.cells) {
    cell.metadata = {};
    if (cell.cell_type !== 'code') continue;
    cell.execution_count = null;
    for (const output of cell.outputs) {
      if ('execution_count' in output) output.execution_count = null;
      const spec = output.data?.[CHART];
      if (spec === undefined) continue;
      const copy = structuredClone(spec);
      output.data['image/svg+xml'] = await new View(parse(compile(copy).spec)).toSVG();
    }
  }
  return `${JSON.stringify(notebook, null, 1)}\n`;
}

/** The first line in which two texts differ. */
function firstDifference(committed, fresh) {
  const [old, now] = [committed.split('\n'), fresh.split('\n')];
  const line = now.findIndex((text, i) => text !== old[i]);
  const at = line < 0 ? now.length : line;
  return `line ${at + 1}\n  committed ${old[at]?.slice(0, 200)}\n  fresh     ${now[at]?.slice(0, 200)}`;
}

try {
  execFileSync(here('../../node_modules/.bin/deno'), ['jupyter', '--install'], {
    env,
    stdio: 'ignore',
  });
  for (const name of readdirSync(folder).filter((file) => file.endsWith('.ipynb'))) {
    const committed = readFileSync(join(folder, name), 'utf8');
    const fresh = await execute(committed);
    const same = fresh === committed;
    if (update && !same) writeFileSync(join(folder, name), fresh);
    if (!update && !same) process.exitCode = 1;
    console.log(`${update || same ? 'ok  ' : 'FAIL'} ${name}`);
    if (!update && !same) console.error(firstDifference(committed, fresh));
  }
} finally {
  rmSync(work, { recursive: true, force: true });
}
