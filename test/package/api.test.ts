/**
 * The public surface, one snapshot per room: a change of any exported declaration shows up in review.
 *
 * `npm run test:node -- -u` rewrites the snapshots.
 */
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';
import { expect, it } from 'vitest';
import { rooms } from '../../tsup.config.ts';

const path = (file: string): string => fileURLToPath(new URL(`../../src/${file}`, import.meta.url));

/** The names that an index file re-exports, with the file that declares each. */
function exportsOf(index: string): { name: string; file: string }[] {
  const text = readFileSync(index, 'utf8');
  const tree = ts.createSourceFile(index, text, ts.ScriptTarget.ES2022, true);
  const found: { name: string; file: string }[] = [];
  for (const statement of tree.statements) {
    if (!ts.isExportDeclaration(statement) || !statement.moduleSpecifier) continue;
    if (!statement.exportClause || !ts.isNamedExports(statement.exportClause)) continue;
    const target = (statement.moduleSpecifier as ts.StringLiteral).text;
    const file = fileURLToPath(new URL(target, `file://${index}`));
    // A room's index passes on what its files declare.
    const passedOn = file.endsWith('index.ts') ? exportsOf(file) : [];
    for (const { name } of statement.exportClause.elements) {
      found.push(passedOn.find((entry) => entry.name === name.text) ?? { name: name.text, file });
    }
  }
  return found;
}

const declarations = new Map<string, string>();

/** The declaration of one exported name, comments removed. */
function declarationOf(name: string, file: string): string {
  let text = declarations.get(file);
  if (text === undefined) {
    const result = ts.transpileDeclaration(readFileSync(file, 'utf8'), {
      fileName: file,
      compilerOptions: { isolatedDeclarations: true, removeComments: true, stripInternal: false },
    });
    expect(result.diagnostics).toEqual([]);
    text = result.outputText;
    declarations.set(file, text);
  }
  const tree = ts.createSourceFile(file, text, ts.ScriptTarget.ES2022, true);
  const own = tree.statements.filter((statement) => {
    if (ts.isVariableStatement(statement)) {
      return statement.declarationList.declarations.some((d) => d.name.getText(tree) === name);
    }
    return 'name' in statement && (statement.name as ts.Identifier | undefined)?.text === name;
  });
  if (own.length === 0) throw new Error(`${name} is not declared in ${file}`);
  return own.map((statement) => statement.getText(tree)).join('\n');
}

it.each(['index', ...rooms])('%s declares what its snapshot says', async (room) => {
  const index = room === 'index' ? path('index.ts') : path(`${room}/index.ts`);
  expect(existsSync(index)).toBe(true);
  const names = exportsOf(index).sort((a, b) => (a.name < b.name ? -1 : 1));
  const text = names.map(({ name, file }) => declarationOf(name, file)).join('\n\n');
  await expect(`${text}\n`).toMatchFileSnapshot(`api/${room}.d.ts`);
});
