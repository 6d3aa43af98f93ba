/** The tables of the guides about coverage and depth are what the library says today. */
import { readFileSync } from 'node:fs';
import { hausdorffWithin, hullVolumeRatio, smallest, uniformBall, uniformSphere } from 'hullgauge';
import { describe, expect, it } from 'vitest';

/** The rows of a guide's table whose first cell is a whole number. */
function numberRows(guide: string): string[][] {
  const text = readFileSync(new URL(`../../docs/guide/${guide}.md`, import.meta.url), 'utf8');
  return [...text.matchAll(/^\| (\d+ \|.*) \|$/gm)].map((match) =>
    (match[1] as string).split('|').map((cell) => cell.trim()),
  );
}

describe('ball-coverage.md', () => {
  const rows = numberRows('ball-coverage');

  it('has its table', () => {
    expect(rows.map((row) => row[0])).toEqual(['2', '3', '5', '8', '10', '20']);
  });

  it.each(rows)('d = %s', (...row) => {
    const size = (share: number): string => {
      const args = { d: Number(row[0]), law: uniformBall() };
      const { value, log, exact } = smallest(hullVolumeRatio, 'n', args, share);
      return exact ? String(value) : `10^${(log / Math.LN10).toFixed(1)}`;
    };
    expect(row.slice(1)).toEqual([size(0.5), size(0.9), size(0.99)]);
  });
});

describe('facet-depth.md', () => {
  const rows = numberRows('facet-depth');

  it('has its table', () => {
    expect(rows.map((row) => row[0])).toEqual(['2', '3', '4', '5', '6', '8']);
  });

  it.each(rows)('d = %s', (...row) => {
    const size = (distance: number): string => {
      const args = { d: Number(row[0]), distance, law: uniformSphere() };
      return String(smallest(hausdorffWithin, 'n', args, 0.99).value);
    };
    expect(row.slice(1)).toEqual([size(0.2), size(0.1), size(0.05)]);
  });
});
