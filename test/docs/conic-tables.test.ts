/** The tables of the guides about walks, recovery and logistic fits are what the library says today. */
import { readFileSync } from 'node:fs';
import {
  approxSeparability,
  bridgeHull,
  logisticThreshold,
  recoveryBounds,
  recoverySuccess,
  smallest,
  walkHull,
} from 'hullgauge';
import { l1StatisticalDimension } from 'hullgauge/conic';
import { describe, expect, it } from 'vitest';

/** The rows of a guide's tables whose first cell matches. */
function rowsOf(guide: string, first: RegExp): string[][] {
  const text = readFileSync(new URL(`../../docs/guide/${guide}.md`, import.meta.url), 'utf8');
  return [...text.matchAll(/^\| (.*) \|$/gm)]
    .map((match) => (match[1] as string).split(' | '))
    .filter(([cell = '']) => first.test(cell));
}

describe('walks.md', () => {
  const rows = rowsOf('walks', /^\d+$/);

  it('has its table', () => {
    expect(rows.map((row) => row[0])).toEqual(['1', '2', '3', '4', '5']);
  });

  it.each(rows)('d = %s', (...row) => {
    const d = Number(row[0]);
    const sizes = [walkHull, bridgeHull].flatMap((question) =>
      [0.5, 0.95].map((target) => String(smallest(question, 'steps', { d }, target).value)),
    );
    expect(row.slice(1)).toEqual(sizes);
  });
});

describe('recovery.md', () => {
  const rows = rowsOf('recovery', /^\d+$/);

  it('has its table', () => {
    expect(rows.map((row) => row[0])).toEqual(['1', '5', '20', '50', '200']);
  });

  it.each(rows)('%s non-zeros', (...row) => {
    const sparsity = Number(row[0]);
    const sizes = (['l1', 'nonnegativeL1', 'nonnegativeFeasible'] as const).map((model) => {
      const problem = { model, n: 1000, sparsity };
      return String(smallest(recoverySuccess, 'measurements', problem, 0.99).value);
    });
    const { exact } = l1StatisticalDimension({ n: 1000, sparsity });
    const cone = { ambient: 1000, statisticalDimension: exact };
    let bound = Math.ceil(exact);
    while (recoveryBounds({ cone, measurements: bound }).lower.value < 0.99) bound++;
    expect(row.slice(1)).toEqual([...sizes, exact.toFixed(1), String(bound)]);
    // the prose: the statistical dimension marks the even chance to within one measurement
    const even = smallest(
      recoverySuccess,
      'measurements',
      { model: 'l1', n: 1000, sparsity } as const,
      0.5,
    );
    expect(Math.abs(even.value - exact)).toBeLessThan(1);
  });
});

describe('logistic.md', () => {
  const [signals = []] = rowsOf('logistic', /^signal$/);
  const [thresholds = []] = rowsOf('logistic', /^threshold/);
  const [cases = []] = rowsOf('logistic', /^cases a variable$/);
  const columns = signals.slice(1).map((signal, i) => [signal, thresholds[i + 1], cases[i + 1]]);
  const rows = rowsOf('logistic', /^\d+, \d+$/);

  it('has its tables', () => {
    expect([columns.length, rows.length]).toEqual([6, 4]);
  });

  it.each(columns)('signal %s', (signal, threshold, perVariable) => {
    const exact = logisticThreshold({ signal: Number(signal) });
    expect([Number(threshold), Number(perVariable)]).toEqual([
      Number(exact.toFixed(3)),
      Number((1 / exact).toFixed(1)),
    ]);
  });

  it.each(rows)('n, d = %s, signal %s, %s: %s', (size = '', signal, share = '', formula) => {
    const [n = 0, d = 0] = size.split(', ').map(Number);
    const args = { n, d, signal: Number(signal), classShare: Number.parseFloat(share) / 100 };
    expect(formula).toBe(approxSeparability(args).value.toFixed(3));
  });
});
