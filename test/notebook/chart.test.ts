/** Charts: valid Vega-Lite that renders without a warning, exact data, words on the axes, refusals. */
import fc from 'fast-check';
import {
  betaLaw,
  DomainError,
  dichotomyCount,
  gaussian,
  hullVolumeRatio,
  LogNumber,
  labelSeparability,
  nextPointInHull,
  originInHull,
  sizingReport,
  smallest,
  surroundTime,
  uniformBall,
} from 'hullgauge';
import { type Chart, chart, sizingChart } from 'hullgauge/notebook';
import { parse, type Spec, View } from 'vega';
import { compile, type TopLevelSpec } from 'vega-lite';
import { describe, expect, it } from 'vitest';

interface Row {
  readonly x: number;
  readonly y: number;
  readonly series?: string;
}

interface Layer {
  readonly data: { readonly values: readonly Row[] };
  readonly encoding: Readonly<Record<string, { title?: string; scale?: Record<string, unknown> }>>;
}

const layers = (spec: Chart): readonly Layer[] => spec['layer'] as readonly Layer[];
const rows = (spec: Chart, layer = 0): readonly Row[] => layers(spec)[layer]?.data.values ?? [];
const axis = (spec: Chart, field: 'x' | 'y') => layers(spec)[0]?.encoding[field];

/** A logger of Vega that keeps what it is told. */
interface Recorder {
  level(): Recorder;
  error(...args: readonly unknown[]): Recorder;
  warn(...args: readonly unknown[]): Recorder;
  info(): Recorder;
  debug(): Recorder;
}

/** The SVG of a chart; any warning of the compiler or the renderer fails the test. */
async function render(spec: Chart): Promise<string> {
  const messages: string[] = [];
  const logger: Recorder = {
    level: () => logger,
    error: (...args) => logger.warn(...args),
    warn: (...args) => {
      messages.push(args.map(String).join(' '));
      return logger;
    },
    info: () => logger,
    debug: () => logger,
  };
  // Vega numbers the rows of the data that it is given.
  const copy = JSON.parse(JSON.stringify(spec)) as TopLevelSpec;
  const compiled = compile(copy, { logger: logger as never }).spec;
  const view = new View(parse(compiled as Spec), { logger: logger as never });
  const svg = await view.toSVG();
  view.finalize();
  expect(messages).toEqual([]);
  return svg;
}

/** Data that differ between engines only in bits that nobody sees, cut off. */
const structure = (spec: Chart): unknown =>
  JSON.parse(
    JSON.stringify(spec, (key, value: unknown) =>
      key === 'values' && Array.isArray(value) ? `${value.length} rows` : value,
    ),
  );

const ns = [10, 12, 15, 20, 30, 40, 60];

describe('a question over n', () => {
  const spec = chart(originInHull, { x: { n: ns }, series: { d: [5, 10] } });

  it('has the structure that it had', () => {
    expect(structure(spec)).toMatchSnapshot();
  });

  it('holds the exact values, to twelve digits', () => {
    expect(rows(spec)).toHaveLength(2 * ns.length);
    for (const { x, y, series } of rows(spec)) {
      const d = Number(series?.replace('d = ', ''));
      expect(y).toBe(Number(originInHull({ n: x, d }).value.toPrecision(12)));
    }
  });

  it('has the limit theorem beside it, where the exact curve is', () => {
    const limit = rows(spec, 1);
    expect(limit.length).toBeGreaterThan(20);
    for (const { x } of limit) {
      expect(x).toBeGreaterThanOrEqual(10);
      expect(x).toBeLessThanOrEqual(60);
    }
    // At p = 1/2 the theorem says n = 2d.
    expect(limit).toContainEqual({ x: 20, y: 0.5, series: 'd = 10' });
  });

  it('renders', async () => {
    const svg = await render(spec);
    expect(svg).toContain('number of points n');
    expect(svg).toContain('Does the sample surround the nominal point?');
    expect(svg).toContain('limit theorem: 2d + z sqrt(2d)');
  });

  it('shows itself under the hidden symbol and holds nothing but JSON', () => {
    expect(JSON.parse(JSON.stringify(spec))).toEqual(spec);
    expect(Object.getOwnPropertySymbols({ ...spec })).toEqual([]);
    const display = (spec as unknown as Record<symbol, () => Record<string, unknown>>)[
      Symbol.for('Jupyter.display')
    ];
    const bundle = display?.call(spec) ?? {};
    expect(Object.keys(bundle)).toEqual(['application/vnd.vegalite.v5+json', 'text/plain']);
    expect(bundle['application/vnd.vegalite.v5+json']).toBe(spec);
    expect(bundle['text/plain']).toBe(spec.description);
  });
});

describe('what is drawn', () => {
  it('a falling question has its limit theorem falling', () => {
    const spec = chart(labelSeparability, { x: { n: [10, 20, 30, 40, 60] }, args: { d: 10 } });
    const limit = rows(spec, 1);
    expect(limit.length).toBeGreaterThan(5);
    const sorted = [...limit].sort((a, b) => a.x - b.x);
    expect(sorted.every(({ y }, i) => i === 0 || y <= (sorted[i - 1] as Row).y)).toBe(true);
    expect(limit).toContainEqual({ x: 22, y: 0.5 });
    expect(axis(spec, 'x')?.title).toBe('number of cases n');
  });

  it('no limit theorem stands beside a question with arguments that it does not know', () => {
    const args = { d: 10, intercept: false };
    expect(layers(chart(labelSeparability, { x: { n: ns }, args }))).toHaveLength(1);
  });

  it('the phase transition stands beside the volume, for the laws that have one', async () => {
    const n = [10, 30, 100, 300, 1000, 3000, 10_000];
    const spec = chart(hullVolumeRatio, {
      x: { n },
      series: { law: [uniformBall(), betaLaw(2)] },
      args: { d: 4 },
    });
    expect(layers(spec)).toHaveLength(2);
    expect(axis(spec, 'x')?.scale).toEqual({ type: 'log' });
    expect(rows(spec)[0]?.series).toBe('law: uniform ball');
    await render(spec);
  });

  it('tails keep their digits', async () => {
    const options = { x: { n: [50, 200, 1000, 5000] }, args: { d: 20 } };
    const small = chart(originInHull, { ...options, show: 'complement' });
    expect(axis(small, 'y')?.title).toBe('log10 of 1 - probability');
    for (const { x, y } of rows(small)) {
      expect(y).toBeCloseTo(originInHull({ n: x, d: 20 }).logComplement / Math.LN10, 8);
    }
    const one = chart(originInHull, {
      x: { n: [38, 40, 42] },
      args: { d: 20 },
      show: 'complement',
    });
    expect(axis(one, 'y')?.title).toBe('1 - probability');
    const log = chart(originInHull, { x: { n: [20, 21, 30] }, args: { d: 20 }, show: 'log' });
    // P = 0 at n = 20 has no logarithm.
    expect(rows(log).map(({ x }) => x)).toEqual([21, 30]);
    await render(small);
    await render(log);
  });

  it('counts that span decades are drawn by their logarithm', async () => {
    const spec = chart(dichotomyCount, { x: { n: [10, 100, 100_000] }, args: { d: 50 } });
    expect(axis(spec, 'y')?.title).toBe('log10 of the result');
    expect(axis(chart(dichotomyCount, { x: { n: [10, 11] }, args: { d: 2 } }), 'y')?.title).toBe(
      'result',
    );
    await render(spec);
  });

  it('numbers of points beyond doubles are drawn by their logarithm', async () => {
    const n = [10, LogNumber.fromLog(800), LogNumber.fromLog(2000)];
    const spec = chart(nextPointInHull, { x: { n }, args: { d: 200 } });
    expect(axis(spec, 'x')?.title).toBe('log10 of the number of points n');
    expect(rows(spec)[1]?.x).toBeCloseTo(800 / Math.LN10, 8);
    await render(spec);
  });

  it('any argument may run, and any function that answers with a number', async () => {
    const size = ({ d }: { d: number }): number => smallest(originInHull, 'n', { d }, 0.9).value;
    const spec = chart(size, { x: { d: [2, 5, 10] } });
    expect(rows(spec).map(({ x, y }) => y > x)).toEqual([true, true, true]);
    await render(spec);
    await render(chart(nextPointInHull, { x: { d: [2, 3, 4] }, args: { n: 50, law: gaussian() } }));
  });

  it('whole arguments have no tick between them', async () => {
    const ticks = async (d: readonly number[]) =>
      (await render(chart(nextPointInHull, { x: { d }, args: { n: 80 } }))).match(/>\d\.\d</g);
    // of the probabilities only
    expect(await ticks([1, 2, 3, 4])).toEqual(
      ['0.0', '0.2', '0.4', '0.6', '0.8', '1.0'].map((t) => `>${t}<`),
    );
  });

  it('distributions show their distribution function', async () => {
    const time = surroundTime({ d: 10 });
    const spec = chart(time, { x: { 'number of points': [10, 15, 20, 25, 30] } });
    expect(rows(spec).map(({ y }) => y)).toContain(0.5);
    expect(axis(spec, 'x')?.title).toBe('number of points');
    expect(spec['title']).toMatchObject({ subtitle: 'mean 21, standard deviation 4.47214' });
    await render(spec);
  });

  it('more series than the palette has colours take a scale that is read by lightness', async () => {
    const d = [2, 3, 4, 5, 6, 7, 8];
    const spec = chart(originInHull, { x: { n: ns }, series: { d } });
    expect(layers(spec)[0]?.encoding['color']?.scale?.['scheme']).toBe('viridis');
    await render(spec);
  });

  it('twelve digits and no number that JSON cannot hold, whatever the arguments', () => {
    const args = fc.tuple(
      fc.array(fc.integer({ min: 0, max: 3000 }), { minLength: 1, maxLength: 6 }),
      fc.integer({ min: 0, max: 300 }),
      fc.constantFrom('value' as const, 'complement' as const, 'log' as const),
    );
    fc.assert(
      fc.property(args, ([n, d, show]) => {
        const spec = chart(originInHull, { x: { n }, args: { d }, show });
        expect(JSON.parse(JSON.stringify(spec))).toEqual(spec);
        for (const { x, y } of layers(spec).flatMap(({ data }) => data.values)) {
          expect(Number.isFinite(x)).toBe(true);
          expect(Number(y.toPrecision(12))).toBe(y);
        }
      }),
      { numRuns: 60 },
    );
  });
});

describe('refusals of chart', () => {
  const good = { x: { n: [10] }, args: { d: 3 } };
  const refused = (options: unknown, subject: unknown = originInHull): string => {
    try {
      chart(subject as typeof originInHull, options as typeof good);
    } catch (error) {
      expect(error).toBeInstanceOf(DomainError);
      return (error as DomainError).parameter;
    }
    return 'accepted';
  };

  it.each([
    [undefined, 'options'],
    [{ ...good, xs: 1 }, 'xs'],
    [{ args: { d: 3 } }, 'x'],
    [{ x: {}, args: { d: 3 } }, 'x'],
    [{ x: { n: [1], d: [2] } }, 'x'],
    [{ x: { n: [] }, args: { d: 3 } }, 'x.n'],
    [{ x: { n: 10 }, args: { d: 3 } }, 'x.n'],
    [{ x: { n: [10, '11'] }, args: { d: 3 } }, 'x.n[1]'],
    [{ x: { n: [10, Number.NaN] }, args: { d: 3 } }, 'x.n[1]'],
    [{ x: { n: [10, LogNumber.of(0)] }, args: { d: 3 } }, 'x.n[1]'],
    [{ ...good, series: { d: [2] } }, 'args.d'],
    [{ x: { n: [10] }, series: { n: [2] }, args: { d: 3 } }, 'series'],
    [{ ...good, args: null }, 'args'],
    [{ ...good, args: { n: 3, d: 3 } }, 'args.n'],
    [{ ...good, show: 'logit' }, 'show'],
    [{ x: { n: [10.5] }, args: { d: 3 } }, 'n'],
    [{ x: { n: [10] } }, 'd'],
    [{ x: { n: new Array(20_001).fill(9) }, args: { d: 3 } }, 'x'],
  ])('case %# names the argument', (options, parameter) => {
    expect(refused(options)).toBe(parameter);
  });

  it('subjects that are no question and no distribution', () => {
    expect(refused(good, null)).toBe('subject');
    expect(refused(good, 3)).toBe('subject');
    expect(refused(good, { cdf: 1 })).toBe('subject');
    expect(refused(good, () => 'text')).toBe('subject');
    expect(refused(good, () => Number.NaN)).toBe('subject');
  });

  it('what a distribution has no use for', () => {
    const time = surroundTime({ d: 3 });
    expect(refused({ x: { n: [1] }, args: {} }, time)).toBe('args');
    expect(refused({ x: { n: [LogNumber.of(3)] } }, time)).toBe('x.n');
  });

  it('a complement of what is no probability, a value beyond doubles', () => {
    expect(refused({ ...good, show: 'complement' }, dichotomyCount)).toBe('show');
    const huge = { x: { n: [5000] }, args: { d: 2000 }, show: 'value' };
    expect(refused(huge, dichotomyCount)).toBe('show');
    expect(refused({ x: { n: [1] }, show: 'log' }, () => -1)).toBe('show');
  });
});

describe('sizingChart', () => {
  const report = sizingReport({ d: 4, n: 30, law: uniformBall(), targets: [0.5, 0.9] });

  it('has the structure that it had', () => {
    // Of one question, so that a new one in the report is not a change of the chart.
    const rows = report.rows.filter(({ question }) => question === 'originInHull');
    const one = { ...report, rows } as unknown as typeof report;
    expect(structure(sizingChart(one))).toMatchSnapshot();
  });

  it('holds the sizes of the report', () => {
    const spec = sizingChart(report);
    const expected = report.rows.flatMap(({ title, sizes }) =>
      sizes.map(({ target, answer }) => ({
        x: answer?.value,
        question: title,
        target: String(target),
      })),
    );
    expect(rows(spec)).toEqual(expected);
  });

  it('renders, from the report and from its JSON', async () => {
    const svg = await render(sizingChart(report));
    expect(svg).toContain('planned n = 30');
    expect(svg).toContain('limit theorem');
    const restored = JSON.parse(JSON.stringify(report)) as typeof report;
    expect(sizingChart(restored)).toEqual(sizingChart(report));
    await render(sizingChart(sizingReport({ d: 100, n: 1000 })));
  });

  it('names what is never reached', () => {
    const never = {
      ...report,
      rows: [{ ...report.rows[0], sizes: [{ target: 0.9, answer: null }] }],
    };
    const title = sizingChart(never as unknown as typeof report)['title'] as { subtitle: string[] };
    expect(title.subtitle[1]).toMatch(/^never reached: .* 0\.9$/);
  });

  it('refuses anything else', () => {
    for (const bad of [undefined, null, 3, {}, [], { kind: 'sizingReport' }]) {
      expect(() => sizingChart(bad as never)).toThrow(/report must be a report of sizingReport/);
    }
  });
});
