/** The release script refuses what it should; nothing is published here. */
import { expect, it } from 'vitest';

interface State {
  readonly status: string;
  readonly version: string;
  readonly changelog: string;
  readonly repository?: string;
}
const { objections } = (await import(new URL('release.mjs', import.meta.url).href)) as {
  objections: (state: State, publishing: boolean) => readonly string[];
};

const ready = {
  status: '',
  version: '1.2.3',
  changelog: '# Changelog\n\n## 1.2.3\n',
  repository: 'git+https://example.org/hullgauge.git',
};

it('lets a clean tree with its changelog through', () => {
  expect(objections(ready, false)).toEqual([]);
  expect(objections(ready, true)).toEqual([]);
});

it('refuses a dirty tree and a version without a changelog', () => {
  expect(objections({ ...ready, status: ' M src/law.ts' }, false)).toEqual([
    'the tree is dirty:\n M src/law.ts',
  ]);
  expect(objections({ ...ready, version: '1.2.4' }, false)).toEqual([
    'CHANGELOG.md has no heading "## 1.2.4"',
  ]);
});

it('publishes no version that is not yet released, and none without a repository', () => {
  const changelog = '## 1.2.3 (not yet released)';
  expect(objections({ ...ready, changelog }, false)).toEqual([]);
  expect(objections({ ...ready, changelog }, true)).toHaveLength(1);
  const { repository: _, ...without } = ready;
  expect(objections(without, true)).toHaveLength(1);
});
