/**
 * Arguments and results as positions on an axis, with the words that stand beside it.
 */
import { DomainError } from '../domain.ts';
import { isLogNumber, type LogNumber } from '../log-number.ts';
import { isProbability, type Probability } from '../probability.ts';
import { rounded, spansDecades } from './look.ts';

/** Which number of a result a chart shows. */
export type Shown = 'value' | 'complement' | 'log';

/** What a chart can draw. */
export type Result = Probability | LogNumber | number;

/** An axis: its words, its scale, and where on it a value stands. */
export interface Axis<Value> {
  /** Words beside the axis. */
  readonly title: string;
  /** Kind of scale. */
  readonly scale: Readonly<Record<string, unknown>>;
  /** Where ticks may stand, if not everywhere. */
  readonly axis?: Readonly<Record<string, unknown>>;
  /** The position of a value; null where it has none. */
  place(value: Value): number | null;
}

/** Arguments in words, with their unit where they have one. */
const ARGUMENTS: Readonly<Record<string, string>> = {
  n: 'number of points n',
  d: 'number of variables d',
  k: 'order k',
  steps: 'number of steps',
  measurements: 'number of measurements',
  sparsity: 'number of non-zero entries',
  depth: 'half-space depth',
  mahalanobisDistance: 'Mahalanobis distance (standard deviations)',
  queryScale: 'scale of the query (standard deviations of the sample)',
  distance: 'distance (radii of the ball)',
  height: 'height above the centre',
  degreesOfFreedom: 'degrees of freedom',
  signal: 'standard deviation of the linear predictor',
};

/** Questions whose n does not count points. */
const CASES: ReadonlySet<string> = new Set([
  'labelSeparability',
  'logisticFitExists',
  'dichotomyCount',
  'approxSeparability',
]);

/** An argument in words. */
export function argumentTitle(question: string, name: string): string {
  if (name === 'n' && CASES.has(question)) return 'number of cases n';
  return ARGUMENTS[name] ?? name;
}

/** Beyond this logarithm a number is drawn by its decimal logarithm. */
const DOUBLE_LOG = 700;

/** The axis of an argument; decimal logarithms where log numbers are beyond doubles. */
export function argumentAxis(
  title: string,
  values: readonly (number | LogNumber)[],
): Axis<number | LogNumber> {
  if (values.some((value) => isLogNumber(value) && value.log > DOUBLE_LOG)) {
    return {
      title: `log10 of the ${title}`,
      scale: { zero: false },
      place: (value) => decimalLog(isLogNumber(value) ? value.log : Math.log(value)),
    };
  }
  const place = (value: number | LogNumber): number => {
    return rounded(isLogNumber(value) ? Math.exp(value.log) : value);
  };
  const positions = values.map(place);
  if (spansDecades(positions)) return { title, scale: { type: 'log' }, place };
  // No tick at one and a half variables.
  const whole = positions.every(Number.isInteger) ? { axis: { tickMinStep: 1 } } : {};
  return { title, scale: { zero: false }, place, ...whole };
}

/** The axis of results: the number that `show` names, on the scale that suits it. */
export function resultAxis(
  fn: string,
  results: readonly Result[],
  show: Shown | undefined,
): Axis<Result> {
  return results.every(isProbability)
    ? (probabilityAxis(results, show ?? 'value') as Axis<Result>)
    : amountAxis(fn, results as readonly (LogNumber | number)[], show);
}

function probabilityAxis(results: readonly Probability[], show: Shown): Axis<Probability> {
  if (show === 'value') {
    const scale = { domain: [0, 1] };
    return { title: 'probability', scale, place: ({ value }) => rounded(value) };
  }
  if (show === 'log') {
    const title = 'log10 of the probability';
    return { title, scale: { zero: false }, place: ({ log }) => decimalLog(log) };
  }
  // By its logarithm where a linear axis would show most of it as 0.
  if (spread(results.map(({ logComplement }) => logComplement)) > WIDE) {
    const title = 'log10 of 1 - probability';
    const scale = { zero: false };
    return { title, scale, place: ({ logComplement }) => decimalLog(logComplement) };
  }
  const scale = { domain: [0, 1] };
  return { title: '1 - probability', scale, place: ({ complement }) => rounded(complement) };
}

/** Counts, volumes and plain numbers. */
function amountAxis(
  fn: string,
  results: readonly (LogNumber | number)[],
  show: Shown | undefined,
): Axis<Result> {
  if (show === 'complement') {
    const requirement = "'value' or 'log' for a question that does not answer with a probability";
    throw new DomainError(fn, 'show', requirement, show);
  }
  const logOf = (result: Result): number =>
    typeof result === 'number' ? Math.log(result) : result.log;
  const logs = results.map(logOf);
  const positive = !logs.some(Number.isNaN);
  const beyond = Math.max(...logs) > DOUBLE_LOG;
  if (show === 'log' || (show === undefined && positive && (beyond || spread(logs) > WIDE))) {
    if (!positive) throw new DomainError(fn, 'show', "'value' for negative results", show);
    const title = 'log10 of the result';
    return { title, scale: { zero: false }, place: (result) => decimalLog(logOf(result)) };
  }
  if (beyond) throw new DomainError(fn, 'show', "'log' for results beyond doubles", show);
  const place = (result: Result): number | null => {
    const value = typeof result === 'number' ? result : result.value;
    return Number.isFinite(value) ? rounded(value) : null;
  };
  return { title: 'result', scale: { zero: false }, place };
}

/** Three decades. */
const WIDE = 6.9;

/** Distance between the ends of the finite logarithms. */
function spread(logs: readonly number[]): number {
  const finite = logs.filter(Number.isFinite);
  return finite.length === 0 ? 0 : Math.max(...finite) - Math.min(...finite);
}

function decimalLog(log: number): number | null {
  return Number.isFinite(log) ? rounded(log / Math.LN10) || 0 : null;
}
