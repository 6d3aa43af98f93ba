/** Formulas in comments reach the pages as written: TypeDoc drops the backslash of `\{` and `\}`. */
import { readdirSync, readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

const source = new URL('../../src/', import.meta.url);

it('braces in formulas of comments are written as \\lbrace and \\rbrace', () => {
  const files = readdirSync(source, { recursive: true, encoding: 'utf8' }).filter((name) =>
    name.endsWith('.ts'),
  );
  const lost = files.flatMap((name) =>
    readFileSync(new URL(name, source), 'utf8')
      .split('\n')
      .flatMap((line, i) => (/^\s*\*.*\\[{}]/.test(line) ? [`${name}:${i + 1}`] : [])),
  );
  expect(files.length).toBeGreaterThan(50);
  expect(lost).toEqual([]);
});
