/**
 * Installs the packed tarball in an empty project and uses it in each way a reader of the README would.
 *
 * Covers ESM, CommonJS, TypeScript in three resolution modes with library checking on, and Deno; Bun too
 * where BUN names its binary.
 */
import { execFileSync } from 'node:child_process';
import { cpSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const bin = (name) => join(root, 'node_modules/.bin', name);
const project = mkdtempSync(join(tmpdir(), 'consumer-'));
const run = (command, ...args) =>
  execFileSync(command, args, {
    cwd: project,
    stdio: ['ignore', 'pipe', 'inherit'],
    encoding: 'utf8',
  });
let failed = 0;

/** Runs one scenario and reports it; a thrown error fails the script but not the other scenarios. */
function scenario(name, body) {
  try {
    const started = performance.now();
    body();
    console.log(`ok   ${name} (${Math.round(performance.now() - started)} ms)`);
  } catch (error) {
    failed++;
    console.error(`FAIL ${name}: ${error.message}\n${error.stdout ?? ''}`);
  }
}

const strict = ['--ignoreConfig', '--noEmit', '--strict', '--target', 'es2022', '--lib', 'es2022'];

try {
  const [{ filename, files }] = JSON.parse(
    execFileSync('npm', ['pack', '--json', '--pack-destination', project], {
      cwd: root,
      encoding: 'utf8',
    }),
  );
  scenario('the tarball holds dist, README, CHANGELOG, LICENSE and package.json only', () => {
    const odd = files
      .map(({ path }) => path)
      .filter((path) => !/^(dist\/.*|README\.md|CHANGELOG\.md|LICENSE|package\.json)$/.test(path));
    if (odd.length > 0) throw new Error(odd.join(', '));
  });
  writeFileSync(join(project, 'package.json'), '{ "name": "consumer", "private": true }');
  run('npm', 'install', '--no-package-lock', '--prefer-offline', `./${filename}`);
  cpSync(join(root, 'test/package/consumers'), project, { recursive: true });

  scenario('Node, import', () => run('node', 'use.mjs'));
  scenario('Node, require', () => run('node', 'use.cjs'));
  for (const mode of ['use.mts', 'use.cts']) {
    scenario(`TypeScript, nodenext, ${mode}`, () =>
      run(bin('tsc'), ...strict, '--module', 'nodenext', mode),
    );
  }
  scenario('TypeScript, bundler', () =>
    run(bin('tsc'), ...strict, '--module', 'esnext', '--moduleResolution', 'bundler', 'use.mts'),
  );
  scenario('Deno, run with type check', () =>
    run(bin('deno'), 'run', '--check', '--quiet', 'use.mts'),
  );
  // engines.mjs brings it.
  const bun = process.env.BUN;
  if (bun) {
    for (const file of ['use.mjs', 'use.cjs', 'use.mts']) {
      scenario(`Bun, ${file}`, () => run(bun, file));
    }
  }
} finally {
  rmSync(project, { recursive: true, force: true });
}
process.exitCode = failed === 0 ? 0 : 1;
