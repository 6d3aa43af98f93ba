import fc from 'fast-check';
import { DomainError, Probability } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { complementOf, logOfComplement, probabilityFromTail } from '../src/probability.ts';
import { relativeError } from './support/reference.ts';

const jupyter = Symbol.for('Jupyter.display');
const logs = fc.oneof(
  fc.double({ min: -1e6, max: 0, noNaN: true }),
  fc.double({ min: -1e-9, max: 0, noNaN: true }),
  fc.constant(Number.NEGATIVE_INFINITY),
);
const units = fc.double({ min: 0, max: 1, noNaN: true });

describe('construction', () => {
  it('keeps a tail far below every double', () => {
    const p = Probability.fromLog(-690775.5);
    expect(p.value).toBe(0);
    expect(p.log).toBe(-690775.5);
    expect(p.complement).toBe(1);
    expect(Probability.fromLogComplement(-690775.5).logComplement).toBe(-690775.5);
  });

  it('gives the complement of a log to full relative accuracy', () => {
    // 1 - exp(-1e-20) and log of it, to 30 digits (mpmath)
    const p = Probability.fromLog(-1e-20);
    expect(relativeError(p.complement, '9.99999999999999999994524953965e-21')).toBeLessThan(3e-16);
    expect(relativeError(p.logComplement, '-46.0517018598809136853600444733')).toBeLessThan(3e-16);
  });

  it('writes 1 - 1e-300 through its complement', () => {
    const p = Probability.fromComplement(1e-300);
    expect(p.value).toBe(1);
    expect(p.complement).toBe(1e-300);
    expect(p.log).toBe(-1e-300);
  });

  it('gives impossible and certain events without negative zeros', () => {
    for (const p of [
      Probability.fromValue(0),
      Probability.fromLog(Number.NEGATIVE_INFINITY),
      probabilityFromTail(0, Number.NEGATIVE_INFINITY, 'lower', 0),
    ]) {
      expect(p.toJSON()).toEqual({
        kind: 'probability',
        value: 0,
        complement: 1,
        log: '-Infinity',
        logComplement: 0,
        logError: 0,
      });
      expect(complementOf(p).toString()).toBe('1');
      expect(p.toString()).toBe('0');
    }
    expect(Object.values(Probability.fromLog(0)).map((x) => Object.is(x, -0))).not.toContain(true);
  });

  it('checks the four numbers against each other', () => {
    const fields = {
      value: 0.25,
      complement: 0.75,
      log: Math.log(0.25),
      logComplement: Math.log(0.75),
    };
    expect(Probability.of(fields).logError).toBe(0);
    expect(() => Probability.of({ ...fields, complement: 0.7 })).toThrow(
      'Probability.of: complement must be 1 - value = 0.75, got 0.7',
    );
    expect(() => Probability.of({ ...fields, log: -1 })).toThrow(DomainError);
    expect(() => Probability.of({ ...fields, logComplement: -1 })).toThrow(DomainError);
    expect(() => Probability.of({ ...fields, logError: -1 })).toThrow(DomainError);
    expect(() => Probability.of(null as never)).toThrow(DomainError);
    const plain = { kind: 'probability', ...fields, logError: 0 };
    for (const field of ['log', 'logComplement', 'logError']) {
      expect(() => Probability.from({ ...plain, [field]: null } as never)).toThrow(
        `Probability.from: ${field} must be `,
      );
    }
  });

  it.each([Number.NaN, 1.5, -0.1, '0.5', undefined, null])('refuses %s', (bad) => {
    expect(() => Probability.fromValue(bad as number)).toThrow(DomainError);
    expect(() => Probability.fromComplement(bad as number)).toThrow(DomainError);
    expect(() => Probability.from(bad as never)).toThrow(DomainError);
  });

  it.each([Number.NaN, 1e-300, '-1', undefined])('refuses the log %s', (bad) => {
    expect(() => Probability.fromLog(bad as number)).toThrow(DomainError);
    expect(() => Probability.fromLogComplement(bad as number)).toThrow(DomainError);
  });
});

describe('properties', () => {
  it('the two tails are consistent', () => {
    fc.assert(
      fc.property(logs, (log) => {
        const p = Probability.fromLog(log);
        expect(Math.abs(p.value + p.complement - 1)).toBeLessThanOrEqual(3e-16);
        expect(Math.exp(p.logComplement)).toBeCloseTo(p.complement, 14);
        const q = complementOf(p);
        expect([q.value, q.log]).toEqual([p.complement, p.logComplement]);
      }),
    );
  });

  it('the complement of a log is its own inverse away from the ends', () => {
    fc.assert(
      fc.property(fc.double({ min: -3, max: -0.05, noNaN: true }), (x) => {
        expect(logOfComplement(logOfComplement(x))).toBeCloseTo(x, 13);
      }),
    );
  });

  it('survives JSON and structured clones', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          logs.map((x) => Probability.fromLog(x)),
          units.map((x) => Probability.fromValue(x)),
        ),
        (p) => {
          expect(Probability.from(JSON.parse(JSON.stringify(p)))).toEqual(p);
          expect(Probability.from(structuredClone(p))).toEqual(p);
        },
      ),
    );
  });
});

describe('text', () => {
  it.each([
    [Probability.fromValue(0.3125), '0.3125'],
    [Probability.fromValue(1 / 3), '0.333333333333'],
    [Probability.fromComplement(1e-300), '1 - 1e-300'],
    [Probability.fromComplement(0.001), '0.999'],
    [Probability.fromLog(-2000), '2.57653587296e-869'],
    [Probability.fromLogComplement(-1e300), '1 - exp(-1e+300)'],
    [Probability.fromValue(1 / 3, 1e-6), '0.333333'],
    [Probability.fromValue(1e-5), '0.00001'],
  ])('%s', (p, text) => {
    expect(p.toString()).toBe(text);
    expect(`${p}`).toBe(text);
  });

  it('shows itself in notebooks as text, Markdown and HTML', () => {
    const p = Probability.fromValue(0.25) as unknown as Record<
      symbol,
      () => Record<string, string>
    >;
    const bundle = (p[jupyter] as () => Record<string, string>)();
    expect(Object.keys(bundle)).toEqual(['text/plain', 'text/markdown', 'text/html']);
    expect(bundle['text/plain']).toBe('0.25');
    expect(bundle['text/markdown']).toContain('| complement | 0.75 |');
    expect(bundle['text/html']).toContain('<td>0.75</td>');
  });

  it('has data fields only, methods on the prototype', () => {
    expect(Object.keys(Probability.fromValue(0.25))).toEqual([
      'kind',
      'value',
      'complement',
      'log',
      'logComplement',
      'logError',
    ]);
  });
});

describe('no arithmetic by accident', () => {
  const p = Probability.fromValue(0.25);

  it('does not compile and throws at run time', () => {
    // @ts-expect-error a Probability is not a number
    expect(() => p < 0.05).toThrow(TypeError);
    // @ts-expect-error a Probability is not a number
    expect(() => 1 - p).toThrow(TypeError);
    // @ts-expect-error a Probability is not a number
    expect(() => p + 0.1).toThrow(TypeError);
    // @ts-expect-error a Probability is not a number
    expect(() => p * 2).toThrow(TypeError);
    // @ts-expect-error a Probability is not a number
    expect(() => Math.log(p)).toThrow(TypeError);
  });

  it('cannot be written to', () => {
    const write = (q: Probability): void => {
      // @ts-expect-error fields are read-only
      q.value = 0.5;
    };
    expect(write).toBeTypeOf('function');
  });
});
