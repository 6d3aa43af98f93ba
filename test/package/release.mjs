/**
 * Decides whether this checkout may be released, and publishes nothing.
 *
 * Refuses a dirty tree, a version that the changelog does not hold, and failing checks. With `--dry-run`
 * it then has npm show what `npm publish --provenance` would send; the real command is for a CI job with
 * an identity token, of the repository that package.json then names.
 */
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const run = (command, ...args) => execFileSync(command, args, { cwd: root, stdio: 'inherit' });

/** Why a state of the repository is not to be released; empty where it is. */
export function objections({ status, version, changelog, repository }, publishing) {
  const reasons = [];
  if (status !== '') reasons.push(`the tree is dirty:\n${status}`);
  const heading = changelog.split('\n').find((line) => line.startsWith(`## ${version}`));
  if (heading === undefined) reasons.push(`CHANGELOG.md has no heading "## ${version}"`);
  if (!publishing) return reasons;
  if (heading?.includes('not yet released')) {
    reasons.push(`CHANGELOG.md still says that ${version} is not yet released`);
  }
  if (repository === undefined) {
    reasons.push('package.json names no repository, which npm compares with the provenance');
  }
  return reasons;
}

function main(publishing) {
  const { version, repository } = JSON.parse(readFileSync(`${root}package.json`, 'utf8'));
  const changelog = readFileSync(`${root}CHANGELOG.md`, 'utf8');
  const clean = () =>
    execFileSync('git', ['status', '--porcelain'], { cwd: root, encoding: 'utf8' });
  const state = { version, repository, changelog };
  const before = objections({ ...state, status: clean() }, publishing);
  if (before.length > 0) {
    console.error(`Not released:\n- ${before.join('\n- ')}`);
    process.exitCode = 1;
    return;
  }
  run('.ci/run');
  // The checks may have rewritten a file.
  const after = objections({ ...state, status: clean() }, publishing);
  if (after.length > 0) throw new Error(after.join('\n'));
  if (publishing) run('npm', 'publish', '--provenance', '--dry-run');
  console.log(`${version} may be released`);
}

if (import.meta.url === pathToFileURL(process.argv[1]).href) {
  main(process.argv.includes('--dry-run'));
}
