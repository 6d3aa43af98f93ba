/**
 * How results show themselves: decimal text from a logarithm, and the bundles that notebooks draw.
 *
 * A number whose logarithm is L with error e has about -log10(e) digits, so text never shows more
 * digits than the result has, and at most twelve.
 */

/** Representations of one value, keyed by media type. */
export interface DisplayBundle {
  /** Plain text. */
  readonly 'text/plain': string;
  /** Markdown. */
  readonly 'text/markdown': string;
  /** HTML. */
  readonly 'text/html': string;
}

/** Most significant digits ever shown. */
const MAX_DIGITS = 12;

/** Digits that a relative error leaves, from 1 to 12. */
function digitsFor(relativeError: number): number {
  // An error of 1e-6 leaves six digits, though its logarithm rounds to less.
  const digits = Math.floor(-Math.log(relativeError) / Math.LN10 + 1e-9);
  return Math.max(1, Math.min(MAX_DIGITS, digits));
}

/** Significant digits without the trailing zeros after a point. */
function toDigits(value: number, digits: number): string {
  const text = value.toPrecision(digits);
  // zeros of the exponent stay
  return text.includes('.') ? text.replace(/^([^e]*?)\.?0+(?=e|$)/, '$1') : text;
}

/** A double to at most twelve significant digits, without trailing zeros. */
export function formatNumber(value: number, relativeError = 0): string {
  return toDigits(value, digitsFor(relativeError));
}

/** ln 10 as a part that times an exponent below 2^31 is exact, and the rest. */
const LN10_HIGH = 2.302584648132324;
const LN10_LOW = 4.4486172146526799e-7;

/** The positive number with natural logarithm `log`, in decimal, far beyond the range of doubles. */
export function formatExponential(log: number, logError = 0): string {
  if (log === -Infinity) return '0';
  if (log === Infinity) return 'Infinity';
  const error = logError + Math.abs(log) * 1.2e-16;
  if (Math.abs(log) < 700) return formatNumber(Math.exp(log), error);
  // Beyond 1e15 not even the exponent's last digit is known.
  if (!(error < 0.5)) return `exp(${formatNumber(log)})`;
  let exponent = Math.floor(log / Math.LN10);
  const digits = digitsFor(error);
  const rest = log - exponent * LN10_HIGH - exponent * LN10_LOW;
  let mantissa = toDigits(Math.exp(rest), digits);
  // Rounding may carry into the exponent.
  if (Number(mantissa) === 10) {
    mantissa = '1';
    exponent++;
  }
  return `${mantissa}e${exponent < 0 ? '-' : '+'}${Math.abs(exponent)}`;
}

/** A named quantity in the table that a notebook shows. */
export type DisplayRow = readonly [name: string, value: string];

abstract class ShownResult {
  abstract toString(): string;

  /** @internal The rows of the table that a notebook shows. */
  abstract displayRows(): readonly DisplayRow[];

  /** Text for a string hint; any arithmetic or comparison throws, so that no tail is lost by accident. */
  [Symbol.toPrimitive](hint: string): string {
    if (hint === 'string') return this.toString();
    throw new TypeError('no plain number: read .value or .log');
  }
}

// A notebook kernel finds the method under a registered symbol, which a class body cannot name with
// explicit types; attaching it inside a pure call keeps unused classes out of bundles.
function withNotebookDisplay(base: typeof ShownResult): typeof ShownResult {
  Object.defineProperty(base.prototype, Symbol.for('Jupyter.display'), {
    value(this: ShownResult): DisplayBundle {
      const text = this.toString();
      const rows = this.displayRows();
      const html = rows.map(([name, value]) => `<tr><th>${name}</th><td>${value}</td></tr>`);
      const markdown = rows.map(([name, value]) => `| ${name} | ${value} |`);
      return {
        'text/plain': text,
        'text/markdown': [`| | ${text} |`, '| --- | --- |', ...markdown].join('\n'),
        'text/html': `<table><caption>${text}</caption>${html.join('')}</table>`,
      };
    },
  });
  return base;
}

/**
 * A result that shows itself in notebooks and refuses to be used as a plain number.
 */
export const Displayable: typeof ShownResult = /* @__PURE__ */ withNotebookDisplay(ShownResult);

/** Whether a value is an object of one of the library's kinds, from any copy of it or plain data. */
export function hasKind(value: unknown, kind: string): boolean {
  return (value as { kind?: unknown } | null | undefined)?.kind === kind;
}

/** A number as JSON can hold it: infinities become strings. */
export function toPlainNumber(value: number): number | string {
  return Number.isFinite(value) ? value : String(value);
}
