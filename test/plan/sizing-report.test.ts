import {
  betaPrimeLaw,
  DomainError,
  gaussian,
  type Law,
  LogNumber,
  originInHull,
  sizingReport,
  smallest,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { logSpaced } from 'hullgauge/plan';
import { describe, expect, it } from 'vitest';
import { questions } from '../../src/plan/questions.ts';

describe('sizingReport', () => {
  const report = sizingReport({ d: 12, n: 40 });

  it('has one row for every question that fits the law', () => {
    const fitting = questions.filter(({ laws }) => laws === undefined || laws.includes('gaussian'));
    expect(report.rows.map(({ question }) => question)).toEqual(fitting.map(({ name }) => name));
  });

  it('holds the answers of the questions themselves', () => {
    const row = report.rows.find(({ question }) => question === 'originInHull');
    expect(row?.planned).toEqual(originInHull({ n: 40, d: 12 }));
    expect(row?.sizes.map(({ target }) => target)).toEqual([0.5, 0.9, 0.99]);
    expect(row?.sizes.map(({ answer }) => answer?.value)).toEqual(
      [0.5, 0.9, 0.99].map((target) => smallest(originInHull, 'n', { d: 12 }, target).value),
    );
    expect(row?.sizes[0]?.limit).toBeCloseTo(24, 12);
  });

  it('sizes a falling question so that its complement reaches the target', () => {
    const row = report.rows.find(({ question }) => question === 'labelSeparability');
    for (const { target, answer } of row?.sizes ?? []) {
      expect(answer?.probability.complement).toBeGreaterThanOrEqual(target);
      expect(answer?.exact).toBe(true);
    }
  });

  it('prints as text, Markdown and JSON', () => {
    const text = report.toString();
    expect(`${report}`).toBe(text);
    expect(text).toContain('Does the sample surround the nominal point?');
    expect(text).toMatch(/planned n = 40: 0\.99526234786/);
    expect(report.toMarkdown()).toContain(
      '| probability | smallest n | limit theorem 2d + z sqrt(2d) |',
    );
    expect(JSON.parse(JSON.stringify(report))).toMatchObject({
      kind: 'sizingReport',
      d: 12,
      n: 40,
    });
  });

  it('takes other laws, targets and counts', () => {
    const ball = sizingReport({ d: 3, law: uniformBall(), targets: [0.95], n: LogNumber.of(100) });
    expect(ball.rows[0]?.sizes).toHaveLength(1);
    expect(ball.toString()).toContain('uniform ball');
    expect(sizingReport({ d: 3 }).n).toBeNull();
  });

  it('adds the questions about the ball for laws in the ball', () => {
    const asked = (d: number): string[] =>
      sizingReport({ d, n: 100, law: uniformBall(), targets: [0.5] }).rows.map(
        (row) => row.question,
      );
    expect(asked(3)).toEqual([
      'originInHull',
      'nextPointInHull',
      'hullVolumeRatio',
      'hausdorffWithin',
      'labelSeparability',
    ]);
    expect(asked(1)).not.toContain('hausdorffWithin');
  });

  it('refuses bad targets by their place', () => {
    expect(() => sizingReport({ d: 3, targets: [0.5, 1] })).toThrow(
      'sizingReport: targets[1] must be a number between 0 and 1, got 1',
    );
    expect(() => sizingReport({ d: 0 })).toThrow('sizingReport: d must be an integer >= 1, got 0');
  });
});

describe('logSpaced', () => {
  it('spaces whole numbers between whole ends, each once', () => {
    expect(logSpaced(1, 1000, 1)).toEqual([1, 10, 100, 1000]);
    expect(logSpaced(1, 10, 50)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect(logSpaced(7, 7, 3)).toEqual([7]);
  });

  it('spaces real numbers evenly on the logarithm', () => {
    const grid = logSpaced(0.5, 50, 4);
    expect(grid).toHaveLength(9);
    for (let i = 1; i < grid.length; i++) {
      expect((grid[i] as number) / (grid[i - 1] as number)).toBeCloseTo(10 ** 0.25, 12);
    }
  });

  it('refuses an empty range and an endless grid', () => {
    expect(() => logSpaced(10, 1, 3)).toThrow('logSpaced: to must be >= from = 10, got 1');
    expect(() => logSpaced(1, 1e300, 1000)).toThrow(DomainError);
  });

  it('leaves out what has no formula for the law in that dimension', () => {
    const asked = (d: number, law: Law): readonly string[] =>
      sizingReport({ d, law, targets: [0.5] }).rows.map(({ question }) => question);
    const always = ['originInHull', 'labelSeparability'];
    expect(asked(20_000, gaussian())).toEqual(always);
    expect(asked(3, studentT({ degreesOfFreedom: 0.3 }))).toEqual(always);
    expect(asked(3, betaPrimeLaw(1.6))).toEqual(always);
    // the phase transition has no form on the line
    const onLine = sizingReport({ d: 1, law: uniformSphere(), targets: [0.9] }).rows[2];
    expect(onLine?.question).toBe('hullVolumeRatio');
    expect(onLine?.sizes[0]?.answer?.value).toBe(5);
    expect(onLine?.sizes[0]?.limit).toBeUndefined();
  });
});
