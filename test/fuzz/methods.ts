/** Calls the methods of a result: distributions, exceedances, moments, expected faces. */
import type { Random } from './arguments.ts';
import { type Four, inspect, inspectProbability } from './inspect.ts';
import { fallsBetween } from './order.ts';

type Method = (argument: number) => unknown;

/** What is wrong with what the methods of a result answer. */
export function inspectMethods(result: unknown, random: Random): string | undefined {
  if (typeof result !== 'object' || result === null) return undefined;
  const methods = result as Readonly<Record<string, Method | undefined>>;
  const names = Object.keys(methods).filter((name) => typeof methods[name] === 'function');
  for (const name of names) {
    const ask = methods[name] as Method;
    const check = Object.hasOwn(CHECKS, name) ? CHECKS[name] : undefined;
    const wrong = check === undefined ? undefined : check(ask, random, result);
    if (wrong !== undefined) return `${name}: ${wrong}`;
  }
  return undefined;
}

type Check = (ask: Method, random: Random, result: object) => string | undefined;

const CHECKS: Readonly<Record<string, Check>> = {
  cdf: (_, random, result) => inspectDistribution(result as DistributionLike, random),
  pValue: (ask, random) => {
    const x = 20 * random();
    const [first, second] = [ask(x) as number, ask(x + random()) as number];
    if (!(first >= 0 && first <= 1 && second >= 0 && second <= 1)) return `outside [0, 1] at ${x}`;
    return second > first * (1 + 1e-12) ? `rises from ${x}` : undefined;
  },
  logPdf: (ask, random) => inspect(ask(20 * random())),
  limit: (ask, random) => inspect(ask(random())),
  expectedFaces: (ask, random) => inspect(ask(Math.floor(3 * random()))),
  moment: (ask, random) => inspect(ask(10 * random())) ?? inspect(ask(0)),
  exceedance: (ask, random) => {
    const t = 1.2 * random();
    const [first, second] = [ask(t), ask(t + 0.2 * random())] as [Exceedance, Exceedance];
    const wrong = inspect(first) ?? inspect(second);
    if (wrong !== undefined) return `${wrong} near ${t}`;
    const { lower, approx, upper } = first;
    return (
      fallsBetween(lower, approx) ??
      fallsBetween(approx, upper) ??
      fallsBetween(second.upper, upper) ??
      fallsBetween(second.lower, lower)
    );
  },
  guarantee: (ask, random) => {
    const level = random();
    const [first, second] = [ask(level) as number, ask(level + (1 - level) * random()) as number];
    if (!(first >= 0 && second <= 2)) return `outside [0, 2] at ${level}`;
    return second < first - 1e-12 ? `falls from ${level}` : undefined;
  },
};

interface Exceedance {
  readonly lower: Four;
  readonly upper: Four;
  readonly approx: Four;
}

interface DistributionLike {
  readonly mean: number;
  readonly variance: number;
  cdf(x: number): Four;
  quantile(p: number): number;
}

function inspectDistribution(law: DistributionLike, random: Random): string | undefined {
  const { mean, variance } = law;
  if (Number.isNaN(mean) || !(variance >= 0)) return `moments ${mean}, ${variance}`;
  // From end to end, far beyond the law.
  let before = law.cdf(Number.NEGATIVE_INFINITY);
  for (const x of [-1e300, -20 * random(), 0, 20 * random(), 1e300, Number.POSITIVE_INFINITY]) {
    const next = law.cdf(x);
    const wrong = inspectProbability(next) ?? fallsBetween(before, next);
    if (wrong !== undefined) return `${wrong} up to ${x}`;
    before = next;
  }
  if (before.complement !== 0) return `${before.complement} is left beyond the end`;
  for (const p of [0, 1]) {
    if (Number.isNaN(law.quantile(p))) return `quantile(${p}) is NaN`;
  }
  if (!Number.isFinite(mean + variance)) return undefined;
  const width = Math.sqrt(variance);
  const low = mean + (random() - 0.7) * 4 * width;
  const high = low + random() * 4 * width;
  const [p, q] = [law.cdf(low), law.cdf(high)];
  const wrong = inspectProbability(p) ?? inspectProbability(q) ?? fallsBetween(p, q);
  if (wrong !== undefined) return `${wrong} from ${low} to ${high}`;
  const level = 0.01 + 0.98 * random();
  const x = law.quantile(level);
  if (Number.isNaN(x)) return `quantile(${level}) is NaN`;
  // Where the distribution is narrower than the doubles around x, the next few have to do.
  const at = law.cdf(x + 2 ** -51 * Math.abs(x));
  if (at.value < level - 1e-9) return `cdf(quantile(${level})) = ${at.value}`;
  const further = law.quantile(level + (1 - level) * random());
  const falls = further < x && x - further > 2 ** -51 * Math.abs(x);
  return falls ? `quantile falls from ${x} to ${further}` : undefined;
}
