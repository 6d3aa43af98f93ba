/**
 * Throws generated argument sets at every export and checks what comes back: no NaN anywhere, nothing
 * outside [0, 1], complements consistent, monotone within the stated error, refusals by DomainError only.
 *
 * A call is a function of the seed and its number alone, so any one can be replayed.
 */
import { rooms } from '../../tsup.config.ts';
import { calls, type OptionsCall, type PositionalCall } from '../package/bad-input.ts';
import { argumentsFor, pick, type Random, randomFrom } from './arguments.ts';
import { checks } from './checks.ts';
import { inspect } from './inspect.ts';
import { inspectMethods } from './methods.ts';
import { fallsBetween } from './order.ts';
import { larger, relations } from './relations.ts';
import { structures } from './structures.ts';

/** What a run found. */
export interface FuzzReport {
  readonly calls: number;
  readonly answers: number;
  /** Pairs of answers whose order was compared. */
  readonly comparisons: number;
  readonly failures: readonly string[];
  /** Calls that gave up with an error instead of a number: allowed, but to be rare. */
  readonly unconverged: readonly string[];
  /** Functions that never answered. */
  readonly silent: readonly string[];
  /** The slowest calls, the slowest first. */
  readonly slowest: readonly TimedCall[];
}

/** A call and its duration in milliseconds. */
export interface TimedCall {
  readonly time: number;
  readonly call: string;
}

/** Where a run begins and ends. */
export interface FuzzOptions {
  readonly seed: number;
  /** Number of the first call; 0 if left out. */
  readonly first?: number;
  readonly count: number;
  /** Asked before each call; the run ends where the answer is false. */
  readonly goesOn?: (index: number, call: string) => boolean;
  /** Told of each failure when it is found. */
  readonly onFailure?: (failure: string) => void;
}

type Fn = (...args: unknown[]) => unknown;

/** Result types have properties of their own; a row may say why it is left out. */
const NOT_CALLED = new Set(['Probability', 'LogNumber', 'DomainError', 'InterpolationAudit']);

/** Functions that ask others many times, or integrate twice: their turn comes more rarely. */
const SLOW = new Set([
  'smallest',
  'largest',
  'sizingReport',
  'sizingChart',
  'chart',
  'queriesInHull',
  'pointInHull',
  'hausdorffDistance',
  'hullVolumeRatioDecimal',
  'logisticSignal',
  'logisticThreshold',
]);

/** The functions of every room by name. */
async function exportedFunctions(): Promise<ReadonlyMap<string, Fn>> {
  const functions = new Map<string, Fn>();
  for (const name of ['index', ...rooms]) {
    const file = name === 'index' ? '../../src/index.ts' : `../../src/${name}/index.ts`;
    const module = (await import(file)) as Record<string, unknown>;
    for (const [key, value] of Object.entries(module)) {
      if (typeof value === 'function' && !NOT_CALLED.has(key)) functions.set(key, value as Fn);
    }
  }
  return functions;
}

/** Runs `count` calls spread over all exports. */
export async function fuzz(options: FuzzOptions): Promise<FuzzReport> {
  const { seed, first = 0, count, goesOn = () => true, onFailure } = options;
  const functions = [...(await exportedFunctions())];
  const answered = new Map<string, number>(functions.map(([name]) => [name, 0]));
  const failures: string[] = [];
  const unconverged: string[] = [];
  let slowest: TimedCall[] = [];
  let done = 0;
  let comparisons = 0;
  for (let index = first; index < first + count; index++) {
    const random = randomFrom(Math.imul(seed, 0x9e3779b1) ^ Math.imul(index, 0x85ebca6b));
    let [name, fn] = functions[index % functions.length] as [string, Fn];
    if (SLOW.has(name) && random() < 0.8) [name, fn] = pick(random, functions);
    const args = generate(name, random);
    const text = `seed ${seed}, call ${index}: ${name}(${args.map(show).join(', ')})`;
    if (!goesOn(index, text)) break;
    done++;
    const before = performance.now();
    try {
      let result: unknown;
      try {
        result = await fn(...args);
      } finally {
        note(text, performance.now() - before);
      }
      answered.set(name, (answered.get(name) as number) + 1);
      const wrong =
        inspect(result) ??
        inRange(name, result) ??
        inspectMethods(typeof result === 'function' ? { sample: result } : result, random) ??
        checks[name]?.(args as [never, never, never, never], result as never);
      if (wrong !== undefined) fail(`${text}: ${wrong}`);
      const step = await stepFrom(name, fn, args, result, random);
      if (step !== undefined) comparisons++;
      if (step) fail(`${text}: ${step}`);
    } catch (error) {
      const plain = (error as Error).constructor === Error;
      if ((error as { code?: unknown }).code !== 'HULLGAUGE_DOMAIN') {
        if (plain) unconverged.push(`${text}: ${String(error)}`);
        else fail(`${text}: ${String(error)}`);
      }
    }
  }
  const silent = [...answered.keys()].filter((name) => answered.get(name) === 0);
  const answers = [...answered.values()].reduce((total, value) => total + value, 0);
  return { calls: done, answers, comparisons, failures, unconverged, silent, slowest };

  function fail(failure: string): void {
    failures.push(failure);
    onFailure?.(failure);
  }

  function note(call: string, time: number): void {
    if (slowest.length === SLOWEST && time <= (slowest[SLOWEST - 1] as TimedCall).time) return;
    slowest = [...slowest, { time, call }].sort((a, b) => b.time - a.time).slice(0, SLOWEST);
  }
}

/** So many slow calls are reported. */
const SLOWEST = 10;

function generate(name: string, random: Random): unknown[] {
  const own = structures[name];
  const call = calls[name];
  const row = call === undefined || 'skip' in call ? undefined : call;
  // Even a function with arguments of its own is given those of its row at times, absurd ones included.
  if (own !== undefined && (row === undefined || random() < 0.9)) return own(random);
  return row === undefined ? [] : argumentsFor(random, name, row);
}

function inRange(name: string, result: unknown): string | undefined {
  const range = relations[name]?.range;
  if (range === undefined) return undefined;
  const numbers = typeof result === 'number' ? [result] : Object.values(result as object);
  const outside = numbers.find((x) => !(x >= range[0] && x <= range[1]));
  return outside === undefined ? undefined : `${outside} outside [${range}]`;
}

/**
 * Enlarges one argument with a known direction. What is wrong with the order of the two answers, '' where
 * it is right, undefined where there is nothing to compare.
 */
async function stepFrom(
  name: string,
  fn: Fn,
  args: readonly unknown[],
  result: unknown,
  random: Random,
): Promise<string | undefined> {
  const relation = relations[name];
  const named = namedArguments(name, args);
  if (relation === undefined || named === undefined) return undefined;
  const { rises = [], falls = [], slack, where } = relation;
  const known = [...rises, ...falls].filter((key) => key in named && (where?.(named, key) ?? true));
  const parameter = pick(random, known);
  if (parameter === undefined) return undefined;
  const value = larger(random, named[parameter]);
  if (value === undefined) return undefined;
  let next: unknown;
  try {
    next = await fn(...withArgument(name, args, parameter, value));
  } catch {
    // out of its domain, or as unconverged as any call may be
    return undefined;
  }
  const [low, high] = falls.includes(parameter) ? [next, result] : [result, next];
  const wrong = inspect(next) ?? fallsBetween(low, high, slack);
  if (wrong === undefined) return '';
  return `with ${parameter} = ${show(value)}: ${wrong}`;
}

const namesOf = (name: string): readonly string[] | undefined =>
  (calls[name] as PositionalCall | undefined)?.names;

/** The arguments by name, options and positions alike. */
function namedArguments(
  name: string,
  args: readonly unknown[],
): Readonly<Record<string, unknown>> | undefined {
  const names = namesOf(name);
  const last = args.at(-1);
  const options = typeof last === 'object' && last !== null ? (last as OptionsCall['options']) : {};
  if (names === undefined) return options;
  return { ...options, ...Object.fromEntries(args.map((arg, index) => [names[index], arg])) };
}

function withArgument(
  name: string,
  args: readonly unknown[],
  parameter: string,
  value: unknown,
): unknown[] {
  const index = namesOf(name)?.indexOf(parameter) ?? -1;
  if (index >= 0) return args.map((arg, i) => (i === index ? value : arg));
  return [...args.slice(0, -1), { ...(args.at(-1) as object), [parameter]: value }];
}

function show(value: unknown): string {
  if (typeof value === 'number' || value === undefined) return String(value);
  if (typeof value === 'function') return value.name;
  const text = JSON.stringify(value, (_, x: unknown) =>
    typeof x === 'number' && !Number.isFinite(x) ? String(x) : x,
  );
  return text.length > 600 ? `${text.slice(0, 600)}...` : text;
}
