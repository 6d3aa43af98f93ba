/** The tables of numbers in the guides are what the library says today. */
import { readFileSync } from 'node:fs';
import { originInHull, smallest } from 'hullgauge';
import { normalQuantile } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';

/** The rows of a guide's table whose first cell is a whole number. */
function numberRows(guide: string): string[][] {
  const text = readFileSync(new URL(`../../docs/guide/${guide}.md`, import.meta.url), 'utf8');
  return [...text.matchAll(/^\| (\d+ \|.*) \|$/gm)].map((match) =>
    (match[1] as string).split('|').map((cell) => cell.trim()),
  );
}

describe('surround.md', () => {
  const rows = numberRows('surround');

  it('has its table', () => {
    expect(rows.map((row) => row[0])).toEqual(['2', '3', '5', '10', '20', '50', '100']);
  });

  it.each(rows)('d = %s', (...row) => {
    const d = Number(row[0]);
    const size = (target: number): string =>
      String(smallest(originInHull, 'n', { d }, target).value);
    const far = smallest(originInHull, 'n', { d }, { complementAtMost: 1e-6 }).value;
    const limit = 2 * d + normalQuantile(0.99) * Math.sqrt(2 * d);
    expect(row.slice(1)).toEqual([size(0.5), size(0.9), size(0.99), String(far), limit.toFixed(1)]);
  });
});
