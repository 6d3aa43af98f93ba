/**
 * A question over one of its arguments, or a distribution function, as a chart.
 */

import { formatNumber } from '../display.ts';
import type { Distribution } from '../distribution.ts';
import { checkChoice, checkOptions, DomainError } from '../domain.ts';
import { describeLaw, type Law } from '../law.ts';
import { isLogNumber, type LogNumber } from '../log-number.ts';
import { isProbability, type Probability } from '../probability.ts';
import { argumentTitle, type Result, type Shown } from './axes.ts';
import { limitCurve, questionTitle } from './limit-curve.ts';
import { type Curve, lineChart } from './line-chart.ts';
import type { Chart } from './look.ts';

/** Anything that answers one options object with a probability, a count or a number. */
export type ChartedQuestion = (args: never) => Probability | LogNumber | number;

/** Options of {@link chart}. */
export interface ChartOptions {
  /** One entry: the argument along the horizontal axis and its values. */
  readonly x: Readonly<Record<string, readonly (number | LogNumber)[]>>;
  /** One entry: the argument that tells the curves apart and its values. */
  readonly series?: Readonly<Record<string, readonly unknown[]>>;
  /** All other arguments of the question. */
  readonly args?: Readonly<Record<string, unknown>>;
  /**
   * Which number is drawn: the probability, one minus it, or its decimal logarithm. Left out, it is the
   * value, or the logarithm of counts that span decades.
   */
  readonly show?: Shown;
}

/** Most points of a chart. */
const MAX_POINTS = 20_000;
/**
 * Draws any question over any of its arguments, or the distribution function of any `Distribution`, as a
 * Vega-Lite specification that notebooks show by themselves.
 *
 * The curves are the exact values. Where the sizing report knows a limit theorem for the question it
 * stands beside them, dashed. An axis is logarithmic where its values span two decades. Values that have
 * no place on an axis, such as the logarithm of a probability 0, are left out.
 *
 * @param subject - a function that takes one options object, or a `Distribution`
 * @param options - `x`: one argument and its values, at most 20,000 points in all; `series`: one argument
 *   and its values, a curve each; `args`: the other arguments; `show`: `'value'`, `'complement'` or
 *   `'log'`; a `Distribution` takes `x`, whose name labels the axis, and `show`
 * @returns the specification, plain JSON with data of twelve digits
 * @remarks Calls the question once a point.
 * @throws A {@link DomainError} if an option is missing, unknown or out of its domain, or the question
 *   refuses an argument
 *
 * @example
 * ```ts
 * import { originInHull } from 'hullgauge';
 * import { chart } from 'hullgauge/notebook';
 * const spec = chart(originInHull, { x: { n: [10, 20, 40] }, series: { d: [5, 10] } });
 * spec.description; // => 'Does the sample surround the nominal point? probability over number of points n from 10 to 40; d = 5, d = 10'
 * ```
 */
export function chart(subject: ChartedQuestion | Distribution, options: ChartOptions): Chart {
  const fn = 'chart';
  const question = typeof subject === 'function' ? subject : null;
  if (question === null && !isDistribution(subject)) {
    throw new DomainError(fn, 'subject', 'a function or a distribution', subject);
  }
  const known = question === null ? ['x', 'show'] : ['x', 'series', 'args', 'show'];
  checkOptions(fn, options, known);
  const { args = {}, show } = options;
  if (show !== undefined) checkChoice(fn, 'show', show, ['value', 'complement', 'log']);
  const [xName, values] = entry(fn, 'x', options.x);
  const xs = values.map((value, index) => horizontal(fn, `x.${xName}[${index}]`, value));
  if (question === null && xs.some(isLogNumber)) {
    throw new DomainError(fn, `x.${xName}`, 'an array of numbers for a distribution', options.x);
  }
  const [seriesName, seriesValues] =
    options.series === undefined ? [null, [undefined]] : entry(fn, 'series', options.series);
  checkArguments(fn, args, xName, seriesName);
  if (xs.length * seriesValues.length > MAX_POINTS) {
    throw new DomainError(fn, 'x', `at most ${MAX_POINTS} points in all`, options.x);
  }
  const curves = seriesValues.map((value): Curve => {
    const own = seriesName === null ? args : { ...args, [seriesName]: value };
    const results = xs.map((x) =>
      question === null
        ? (subject as Distribution).cdf(x as number)
        : answer(fn, question, { ...own, [xName]: x }),
    );
    const limit = question !== null && xName === 'n' ? limitCurve(question.name, own) : undefined;
    return { label: seriesName === null ? null : labelOf(seriesName, value), results, limit };
  });
  const words =
    question === null
      ? distributionWords(subject as Distribution, xName)
      : questionWords(question.name, args);
  return lineChart({
    ...words,
    xTitle: argumentTitle(question?.name ?? '', xName),
    xs,
    curves,
    show,
  });
}

/** The words of a question's chart. */
function questionWords(
  name: string,
  args: Readonly<Record<string, unknown>>,
): { readonly title: string; readonly subtitle: string } {
  const title = questionTitle(name);
  const fixed = Object.entries(args).map(([key, value]) => labelOf(key, value));
  const parts = title === undefined ? fixed : [name, ...fixed];
  return { title: title ?? (name || 'result'), subtitle: parts.join(', ') };
}

/** The words of a distribution's chart. */
function distributionWords(
  { mean, variance }: Distribution,
  xName: string,
): { readonly title: string; readonly subtitle: string } {
  const [centre, spread] = [mean, Math.sqrt(variance)].map((x) => formatNumber(x, 1e-6));
  const subtitle = `mean ${centre}, standard deviation ${spread}`;
  return { title: `Distribution of ${xName}`, subtitle };
}

/** The one entry of `x` or `series`. */
function entry(fn: string, option: string, given: unknown): readonly [string, readonly unknown[]] {
  const requirement = 'an object with one argument and an array of its values';
  if (typeof given !== 'object' || given === null) {
    throw new DomainError(fn, option, requirement, given);
  }
  const [first, ...others] = Object.entries(given);
  if (first === undefined || others.length > 0) {
    throw new DomainError(fn, option, requirement, given);
  }
  const [name, values] = first;
  if (!Array.isArray(values) || values.length === 0) {
    throw new DomainError(fn, `${option}.${name}`, 'an array of at least one value', values);
  }
  return [name, values];
}

/** A value along the horizontal axis. */
function horizontal(fn: string, parameter: string, value: unknown): number | LogNumber {
  if (typeof value === 'number' && Number.isFinite(value)) return value;
  if (isLogNumber(value) && Number.isFinite(value.log)) return value;
  throw new DomainError(fn, parameter, 'a finite number or LogNumber', value);
}

/** Refuses other arguments that are not an object, or that `x` or `series` give too. */
function checkArguments(fn: string, args: unknown, ...taken: readonly (string | null)[]): void {
  if (typeof args !== 'object' || args === null || Array.isArray(args)) {
    throw new DomainError(fn, 'args', 'an object with the other arguments', args);
  }
  for (const name of taken) {
    if (name !== null && name in args) {
      const given = (args as Record<string, unknown>)[name];
      throw new DomainError(fn, `args.${name}`, 'left out (x or series gives it)', given);
    }
  }
  if (taken[0] === taken[1]) {
    throw new DomainError(fn, 'series', 'an argument other than that of x', taken[1]);
  }
}

/** The question's answer, if it is one that a chart can draw. */
function answer(fn: string, question: ChartedQuestion, args: object): Result {
  const result: unknown = question(args as never);
  if (typeof result === 'number' && !Number.isNaN(result)) return result;
  if (isProbability(result) || isLogNumber(result)) return result;
  const requirement = 'a function that answers with a probability, a LogNumber or a number';
  throw new DomainError(fn, 'subject', requirement, result);
}

function isDistribution(subject: unknown): subject is Distribution {
  if (typeof subject !== 'object' || subject === null) return false;
  const { cdf, mean, variance } = subject as Partial<Distribution>;
  return typeof cdf === 'function' && typeof mean === 'number' && typeof variance === 'number';
}

/** An argument with its value, as a legend shows it. */
function labelOf(name: string, value: unknown): string {
  if (typeof value === 'object' && value !== null && (value as Law).kind === 'law') {
    return `${name}: ${describeLaw(value as Law)}`;
  }
  if (typeof value === 'number') return `${name} = ${formatNumber(value)}`;
  if (typeof value === 'object' && value !== null && !isLogNumber(value)) return name;
  return `${name} = ${String(value)}`;
}
