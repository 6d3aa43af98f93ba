/**
 * Reference tables: results with 25 or more digits as decimal strings, kept with their provenance in
 * `test/reference/`.
 */
import { readFileSync } from 'node:fs';
import { Decimal } from 'decimal.js';

// decimal.js is the ruler here, never the thing measured: a private copy with digits to spare.
const Ruler = Decimal.clone({ precision: 60, defaults: true });

/** One row of `test/reference/special.json`; `args` are exact decimal expansions of doubles. */
export interface SpecialRow {
  readonly fn: string;
  readonly args: readonly string[];
  /** The result, or null where it leaves the range of doubles. */
  readonly value: string | null;
  /** Its natural logarithm, or null where it is not positive. */
  readonly log: string | null;
  readonly region: string;
  readonly method: string;
}

/** One row of the other tables, whose arguments are named. */
export interface NamedRow {
  readonly quantity: string;
  readonly args: Readonly<Record<string, unknown>>;
  readonly value: string | null;
  readonly log: string | null;
  readonly complement?: string | null;
  readonly method: string;
  readonly source: string;
}

/** A reference table by file name without extension. */
export function readTable<Row>(name: string): readonly Row[] {
  const url = new URL(`../reference/${name}.json`, import.meta.url);
  return JSON.parse(readFileSync(url, 'utf8')) as Row[];
}

/**
 * The exact value of a finite double. (The constructor would take its shortest decimal string, which
 * may be off by half a unit in the last place: as much as the errors measured here.)
 */
export function exactDecimal(x: number): Decimal {
  const bits = new BigUint64Array(new Float64Array([x]).buffer)[0] as bigint;
  const exponent = Number((bits >> 52n) & 0x7ffn);
  const fraction = bits & 0xf_ffff_ffff_ffffn;
  const mantissa = exponent === 0 ? fraction : fraction | (1n << 52n);
  const magnitude = Ruler.pow(2, Math.max(exponent, 1) - 1075).times(mantissa.toString());
  return x < 0 ? magnitude.neg() : magnitude;
}

/** `computed - exact` without the rounding of the exact value to a double. */
export function difference(computed: number, exact: string): number {
  return exactDecimal(computed).minus(exact).toNumber();
}

/** |computed - exact| / |exact|; 0 for an exact zero met exactly. */
export function relativeError(computed: number, exact: string): number {
  const truth = new Ruler(exact);
  if (truth.isZero()) return computed === 0 ? 0 : Number.POSITIVE_INFINITY;
  if (!Number.isFinite(computed)) return Number.POSITIVE_INFINITY;
  return exactDecimal(computed).minus(truth).div(truth).abs().toNumber();
}
