/** The table of docs/guide/interpolation.md, recomputed cell by cell. */
import { readFileSync } from 'node:fs';
import { nextPointInHull, smallest } from 'hullgauge';
import { describe, expect, it } from 'vitest';

const page = readFileSync(new URL('../../docs/guide/interpolation.md', import.meta.url), 'utf8');
const rows = [...page.matchAll(/^\| (\d+) \| (\S+) \| (\S+) \| (\S+) \|$/gm)].map((match) =>
  match.slice(1),
);

describe('the table of the interpolation guide', () => {
  it('has the dimensions that users ask for', () => {
    expect(rows.map((row) => Number(row[0]))).toEqual([2, 3, 5, 10, 20, 50, 100]);
  });

  it.each(rows)('d = %s: %s, %s, %s', (d, ...cells) => {
    const computed = [0.5, 0.9, 0.99].map((target) => {
      const answer = smallest(nextPointInHull, 'n', { d: Number(d) }, target);
      if (answer.value >= 1e9) return answer.value.toExponential(3);
      expect(answer.exact).toBe(true);
      return String(answer.value);
    });
    expect(computed).toEqual(cells);
  });
});
