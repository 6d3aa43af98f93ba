/**
 * Throws generated argument sets at every export and checks what comes back: no NaN anywhere, nothing
 * outside [0, 1], complements consistent, distributions monotone, refusals by DomainError only.
 */
import { rooms } from '../../tsup.config.ts';
import { calls } from '../package/bad-input.ts';
import { randomFrom, valueFor } from './arguments.ts';

/** What a run found. */
export interface FuzzReport {
  readonly calls: number;
  readonly answers: number;
  readonly failures: readonly string[];
  /** Calls that gave up with an error instead of a number: allowed, but to be rare. */
  readonly unconverged: readonly string[];
  /** The slowest call, in milliseconds. */
  readonly slowest: { readonly time: number; readonly call: string };
}

type Fn = (...args: unknown[]) => unknown;

/** Asynchronous or seeded work has tests of its own. */
const LEFT_OUT = new Set([
  'hullVertices',
  'interpolationAudit',
  'simulate',
  'sampler',
  'inHull',
  'separable',
]);

/** Runs `count` calls spread over all exports. */
export async function fuzz(count: number, seed: number): Promise<FuzzReport> {
  const functions = new Map<string, Fn>();
  for (const name of ['index', ...rooms]) {
    const file = name === 'index' ? '../../src/index.ts' : `../../src/${name}/index.ts`;
    const module = (await import(file)) as Record<string, unknown>;
    for (const [key, value] of Object.entries(module)) {
      if (typeof value === 'function' && key in calls && !LEFT_OUT.has(key))
        functions.set(key, value as Fn);
    }
  }
  const random = randomFrom(seed);
  const failures: string[] = [];
  const unconverged: string[] = [];
  const slowest = { time: 0, call: '' };
  const names = [...functions.keys()].filter((name) => !('skip' in (calls[name] ?? { skip: '' })));
  let answers = 0;
  for (let i = 0; i < count; i++) {
    const name = names[i % names.length] as string;
    const args = generate(name, random);
    const text = `${name}(${args.map(show).join(', ')})`;
    const before = performance.now();
    try {
      const result = (functions.get(name) as Fn)(...args);
      answers++;
      const wrong = inspect(result, random, 0);
      if (wrong !== undefined) failures.push(`${text}: ${wrong}`);
    } catch (error) {
      const plain = (error as Error).constructor === Error;
      if ((error as { code?: unknown }).code !== 'HULLGAUGE_DOMAIN') {
        (plain ? unconverged : failures).push(`${text}: ${String(error)}`);
      }
    }
    const time = performance.now() - before;
    if (time > slowest.time) Object.assign(slowest, { time, call: text });
  }
  return { calls: count, answers, failures, unconverged, slowest };
}

function generate(name: string, random: () => number): unknown[] {
  const call = calls[name];
  if (call === undefined || 'skip' in call) return [];
  if ('options' in call) {
    const options: Record<string, unknown> = {};
    for (const [key, example] of Object.entries(call.options)) {
      if (call.optional?.includes(key) && random() < 0.3) continue;
      options[key] = valueFor(random, key, example, call.counts?.includes(key) ?? false);
    }
    return [options];
  }
  return call.names.map((key, index) => valueFor(random, key, call.args[index], false));
}

/** What is wrong with a result, if anything. */
function inspect(result: unknown, random: () => number, depth: number): string | undefined {
  if (typeof result === 'number') return Number.isNaN(result) ? 'NaN' : undefined;
  if (typeof result !== 'object' || result === null || depth > 4) return undefined;
  if ((result as { kind?: unknown }).kind === 'probability')
    return inspectProbability(result as Four);
  if (typeof (result as { cdf?: unknown }).cdf === 'function') {
    const wrong = inspectDistribution(result as DistributionLike, random);
    if (wrong !== undefined) return wrong;
  }
  const entries = ArrayBuffer.isView(result)
    ? [...(result as Float64Array).entries()]
    : Object.entries(result);
  for (const [key, value] of entries.slice(0, 50)) {
    const wrong = inspect(value, random, depth + 1);
    if (wrong !== undefined) return `${key}: ${wrong}`;
  }
  return undefined;
}

interface Four {
  readonly value: number;
  readonly complement: number;
  readonly log: number;
  readonly logComplement: number;
  readonly logError: number;
}

function inspectProbability(p: Four): string | undefined {
  const text = JSON.stringify(p);
  for (const x of [p.value, p.complement, p.log, p.logComplement, p.logError]) {
    if (Number.isNaN(x)) return `NaN in ${text}`;
  }
  if (p.value < 0 || p.value > 1 || p.complement < 0 || p.complement > 1)
    return `outside [0, 1]: ${text}`;
  if (p.log > 0 || p.logComplement > 0 || p.logError < 0) return `impossible logarithm: ${text}`;
  if (Math.abs(p.value + p.complement - 1) > 4e-16) return `tails do not add up: ${text}`;
  for (const [value, log] of [
    [p.value, p.log],
    [p.complement, p.logComplement],
  ] as const) {
    if (value > 1e-290 && Math.abs(Math.log(value) - log) > 1e-13 * Math.max(1, -log)) {
      return `value and logarithm differ: ${text}`;
    }
  }
  return undefined;
}

interface DistributionLike {
  readonly mean: number;
  readonly variance: number;
  cdf(x: number): Four;
  quantile(p: number): number;
}

function inspectDistribution(
  distribution: DistributionLike,
  random: () => number,
): string | undefined {
  const { mean, variance } = distribution;
  if (Number.isNaN(mean) || !(variance >= 0)) return `moments ${mean}, ${variance}`;
  if (!Number.isFinite(mean + variance)) return undefined;
  const width = Math.sqrt(variance);
  const low = mean + (random() - 0.7) * 4 * width;
  const high = low + random() * 4 * width;
  const [p, q] = [distribution.cdf(low), distribution.cdf(high)];
  const wrong = inspectProbability(p) ?? inspectProbability(q);
  if (wrong !== undefined) return `cdf: ${wrong}`;
  const slack = 1e-12 + p.logError + q.logError;
  if (p.log > q.log + slack * Math.max(1, -q.log)) return `cdf falls from ${low} to ${high}`;
  const level = 0.01 + 0.98 * random();
  const x = distribution.quantile(level);
  if (Number.isNaN(x)) return `quantile(${level}) is NaN`;
  // Where the distribution is narrower than the doubles around x, the next one has to do.
  const at = distribution.cdf(x + 2 ** -52 * Math.abs(x));
  if (at.value < level - 1e-9) return `cdf(quantile(${level})) = ${at.value}`;
  return undefined;
}

function show(value: unknown): string {
  if (typeof value === 'number' || value === undefined) return String(value);
  return JSON.stringify(value) ?? String(value);
}
