/** What is wrong with a result, whatever it is: NaN anywhere in it, or a number that cannot be. */

/** The numbers of a probability. */
export interface Four {
  readonly value: number;
  readonly complement: number;
  readonly log: number;
  readonly logComplement: number;
  readonly logError: number;
}

/** What is wrong with a result, with the path to it; undefined where nothing is. */
export function inspect(result: unknown, depth = 0): string | undefined {
  if (typeof result === 'number') return Number.isNaN(result) ? 'NaN' : undefined;
  if (typeof result === 'string') return result.includes('NaN') ? `text ${result}` : undefined;
  if (typeof result !== 'object' || result === null || depth > 8) return undefined;
  const { kind } = result as { kind?: unknown };
  if (kind === 'probability') return inspectProbability(result as Four);
  if (kind === 'logNumber') return inspectLogNumber(result as Logarithmic);
  if (kind === 'cone') {
    const wrong = inspectCone(result as ConeLike);
    if (wrong !== undefined) return wrong;
  }
  if (isNumbers(result)) {
    const index = result.findIndex((x) => Number.isNaN(x));
    return index < 0 ? undefined : `[${index}]: NaN`;
  }
  if (typeof (result as { toFixed?: unknown }).toFixed === 'function') return inspect(`${result}`);
  for (const [key, value] of Object.entries(result)) {
    const wrong = inspect(value, depth + 1);
    if (wrong !== undefined) return `${key}: ${wrong}`;
  }
  return undefined;
}

/** Numbers in a row, typed or not. */
function isNumbers(value: object): value is readonly number[] {
  if (ArrayBuffer.isView(value)) return true;
  return Array.isArray(value) && value.every((item) => typeof item === 'number');
}

/** What is wrong with a probability: range, both tails, both logarithms, error, printed form. */
export function inspectProbability(p: Four): string | undefined {
  const text = JSON.stringify(p);
  for (const x of [p.value, p.complement, p.log, p.logComplement, p.logError]) {
    if (Number.isNaN(x) || Object.is(x, -0)) return `${x} in ${text}`;
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
    if (value < 1e-290 && log > -667) return `logarithm of a number near 0: ${text}`;
  }
  return inspect(String(p));
}

interface Logarithmic {
  readonly log: number;
  readonly logError: number;
  readonly value: number;
  readonly log10: number;
}

function inspectLogNumber(x: Logarithmic): string | undefined {
  const text = `${JSON.stringify(x)} = ${x.value}`;
  if (Number.isNaN(x.log + x.value + x.log10)) return `NaN in ${text}`;
  if (!(x.logError >= 0)) return `impossible error: ${text}`;
  // counts come out whole where the error allows it
  const slack = 1e-13 * Math.max(1, Math.abs(x.log)) + x.logError;
  const differs = Math.abs(Math.log(x.value) - x.log) > slack;
  if (x.value > 1e-290 && x.value < 1e300 && differs) return `value and logarithm differ: ${text}`;
  return inspect(String(x));
}

interface ConeLike {
  readonly ambient: number;
  readonly dimension: number;
  readonly lineality: number;
  readonly intrinsicVolumes: readonly number[];
  readonly logIntrinsicVolumes: readonly number[];
  readonly logErrors: readonly number[];
  readonly statisticalDimension: number;
  readonly variance: number;
  readonly method: string;
}

function inspectCone(cone: ConeLike): string | undefined {
  const { intrinsicVolumes, logIntrinsicVolumes, logErrors, lineality, dimension } = cone;
  const sums = [0, 0];
  let error = 1e-14 * (1 + cone.ambient);
  for (const [k, v] of intrinsicVolumes.entries()) {
    const log = logIntrinsicVolumes[k] as number;
    if (!(v >= 0 && v <= 1) || !(log <= 0)) return `v_${k} = ${v}, logarithm ${log}`;
    if (v > 0 && (k < lineality || k > dimension)) return `v_${k} = ${v} has no face`;
    if (!((logErrors[k] as number) >= 0)) return `logErrors[${k}] = ${logErrors[k]}`;
    sums[k % 2] = (sums[k % 2] as number) + v;
    if (v > 0) error += v * (logErrors[k] as number);
  }
  const [even, odd] = sums as [number, number];
  if (Math.abs(even + odd - 1) > error) return `sum of intrinsic volumes ${even + odd}`;
  const halves = cone.method === 'exact' && lineality < dimension;
  if (halves && Math.abs(even - 0.5) > error) return `even intrinsic volumes sum to ${even}`;
  const slack = 1e-12 * cone.ambient;
  const { statisticalDimension: mean, variance } = cone;
  if (!(mean >= lineality - slack && mean <= dimension + slack)) return `mean dimension ${mean}`;
  return variance >= 0 ? undefined : `variance ${variance}`;
}
