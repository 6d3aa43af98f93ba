/**
 * Seeded simulation of any event about n points and one more, with an exact interval.
 */
import { checkInteger, checkOptions, DomainError } from '../domain.ts';
import type { Law } from '../law.ts';
import { binomialInterval } from '../numeric/binomial-interval.ts';
import { type LongWorkOptions, SLICE, startPace } from './long-work.ts';
import { checkRow } from './points.ts';
import { MAX_NUMBERS, pointFiller } from './sampler.ts';

/** An event: does it happen for these points and the next? */
export type SimulatedEvent = (points: readonly Float64Array[], next: Float64Array) => boolean;

/** What {@link simulate} draws and how often. */
export interface SimulateOptions extends LongWorkOptions {
  /** Number of points in each trial. */
  readonly n: number;
  /** Dimension of the points. */
  readonly d: number;
  /** Law of the points; either this or `sampler`. */
  readonly law?: Law;
  /** Draws one point: d finite numbers. Either this or `law`. */
  readonly sampler?: () => ArrayLike<number>;
  /** Number of trials. */
  readonly trials: number;
  /** Integer from 0 to 2^53 - 1; needed with `law`, without meaning for a `sampler` of your own. */
  readonly seed?: number;
}

/** What {@link simulate} counted. */
export interface Simulation {
  /** Number of trials in which the event happened. */
  readonly hits: number;
  /** Number of trials. */
  readonly trials: number;
  /** hits / trials. */
  readonly estimate: number;
  /** Exact 95 % confidence interval of the probability: it covers the truth at least that often. */
  readonly interval: readonly [lower: number, upper: number];
}

/**
 * Counts how often an event happens among independent samples of n points and one more.
 *
 * The interval is the exact one of a binomial proportion, from beta quantiles. With a `law`, the same
 * seed gives the same hits on every engine.
 *
 * @param event - called with the n points and the next one; returns whether the event happened. The
 *   arrays are reused: what is to be kept must be copied
 * @param options - `n` >= 0 and `d` >= 1: integers with (n + 1) d at most 2^27; `law`, or `sampler`: a function that
 *   draws one point; `trials`: an integer >= 1; `seed`: an integer from 0 to 2^53 - 1; `onProgress`
 *   and `signal` as in {@link LongWorkOptions}
 * @returns the hits, their share and its 95 % confidence interval
 * @remarks Cost: trials times (n + 1) d normal numbers, and the event. Gives way to the event loop between
 * trials, at least every 64 of them.
 * @throws A {@link DomainError} if an option is out of range or unknown, the event returns no boolean
 *   or the sampler no point. An `Error` named `AbortError` if called off
 *
 * Source: The use of confidence or fiducial limits illustrated in the case of the binomial,
 * Biometrika, 1934, doi:10.1093/biomet/26.4.404.
 *
 * @example
 * ```ts
 * import { gaussian, nextPointInHull } from 'hullgauge';
 * import { inHull, simulate } from 'hullgauge/data';
 * const run = await simulate((points, next) => inHull([...points], next).position === 'inside', {
 *   n: 20,
 *   d: 2,
 *   law: gaussian(),
 *   trials: 500,
 *   seed: 1,
 * });
 * const exact = nextPointInHull({ n: 20, d: 2 }).value;
 * run.interval[0] < exact && exact < run.interval[1]; // => true
 * ```
 */
export async function simulate(
  event: SimulatedEvent,
  options: SimulateOptions,
): Promise<Simulation> {
  const fn = 'simulate';
  if (typeof event !== 'function') throw new DomainError(fn, 'event', 'a function', event);
  checkOptions(fn, options, OPTION_NAMES);
  const { n, d, law, sampler, trials, seed } = options;
  checkInteger(fn, 'n', n, 0, MAX_NUMBERS);
  checkInteger(fn, 'd', d, 1, MAX_NUMBERS);
  if ((n + 1) * d > MAX_NUMBERS) {
    throw new DomainError(fn, 'n', 'so small that (n + 1) d is at most 2^27', n);
  }
  checkInteger(fn, 'trials', trials, 1);
  if (seed !== undefined || sampler === undefined) checkInteger(fn, 'seed', seed, 0);
  const draw = drawer(law, sampler, d, seed ?? 0);
  const pace = startPace(fn, trials, options);
  const points = Array.from({ length: n }, () => new Float64Array(d));
  const next = new Float64Array(d);
  // The event's cost is unknown, so few trials make a slice.
  const work = Math.max(SLICE / 64, 400 * (n + 1) * d);
  let hits = 0;
  for (let trial = 0; trial < trials; trial++) {
    for (const point of points) draw(point);
    draw(next);
    const happened: unknown = event(points, next);
    if (typeof happened !== 'boolean') {
      throw new DomainError(fn, 'event', 'a function that returns true or false', happened);
    }
    if (happened) hits++;
    if (pace.spend(work)) await pace.pause(trial + 1);
  }
  pace.finish();
  const interval = Object.freeze(binomialInterval(hits, trials, 0.95));
  return { hits, trials, estimate: hits / trials, interval };
}

const OPTION_NAMES: readonly string[] = [
  'n',
  'd',
  'law',
  'sampler',
  'trials',
  'seed',
  'onProgress',
  'signal',
];

/** A function that fills an array with the next point. */
function drawer(
  law: Law | undefined,
  sampler: (() => ArrayLike<number>) | undefined,
  d: number,
  seed: number,
): (out: Float64Array) => void {
  if (sampler === undefined) {
    if (law === undefined) {
      throw new DomainError('simulate', 'law', 'given, or a sampler in its place', law);
    }
    return pointFiller('simulate', law, d, seed);
  }
  if (law !== undefined) throw new DomainError('simulate', 'law', 'left out with a sampler', law);
  if (typeof sampler !== 'function') {
    throw new DomainError('simulate', 'sampler', 'a function that draws a point', sampler);
  }
  return (out) => out.set(checkRow('simulate', 'sampler()', sampler(), d, 'the dimension d'));
}
