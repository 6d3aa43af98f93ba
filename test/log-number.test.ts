import fc from 'fast-check';
import { DomainError, LogNumber } from 'hullgauge';
import { describe, expect, it } from 'vitest';

describe('LogNumber', () => {
  it('gives counts as the integers they are', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e9 }), (count) => {
        expect(LogNumber.of(count).value === count).toBe(true);
      }),
    );
  });

  it('leaves alone what is no integer', () => {
    expect(LogNumber.of(Math.PI).value).toBeCloseTo(Math.PI, 14);
    expect(LogNumber.of(0.1).value).toBeCloseTo(0.1, 15);
  });

  it.each([
    [LogNumber.fromLog(5000), '2.96762838402e+2171'],
    [LogNumber.fromLog(-5000), '3.36969414831e-2172'],
    [LogNumber.of(1e6), '1000000'],
    [LogNumber.of(0), '0'],
    [LogNumber.fromLog(Number.POSITIVE_INFINITY), 'Infinity'],
    [LogNumber.fromLog(1e20), 'exp(1e+20)'],
    [LogNumber.fromLog(1000 * Math.LN10, 1e-13), '1e+1000'],
    [LogNumber.fromLog(Math.log(3.5), 1e-3), '3.5'],
  ])('prints %s', (number, text) => {
    expect(number.toString()).toBe(text);
  });

  it('survives JSON and structured clones, infinities included', () => {
    const logs = fc.oneof(fc.double({ noNaN: true }), fc.constant(Number.NEGATIVE_INFINITY));
    fc.assert(
      fc.property(logs, (log) => {
        const number = LogNumber.fromLog(log, 1e-15);
        expect(LogNumber.from(JSON.parse(JSON.stringify(number)))).toEqual(number);
        expect(LogNumber.from(structuredClone(number))).toEqual(number);
      }),
    );
  });

  it('has the decimal logarithm', () => {
    expect(LogNumber.fromLog(1000 * Math.LN10).log10).toBeCloseTo(1000, 10);
  });

  it('refuses what is no number, or negative', () => {
    for (const bad of [Number.NaN, -1, '1', undefined]) {
      expect(() => LogNumber.of(bad as number)).toThrow(DomainError);
    }
    expect(() => LogNumber.fromLog(Number.NaN)).toThrow(DomainError);
    expect(() => LogNumber.fromLog(1, -1)).toThrow(DomainError);
    expect(() => LogNumber.from({ kind: 'other' } as never)).toThrow(DomainError);
    const plain = { kind: 'logNumber', log: 1, logError: 0 };
    for (const field of ['log', 'logError']) {
      expect(() => LogNumber.from({ ...plain, [field]: null } as never)).toThrow(
        `LogNumber.from: ${field} must be `,
      );
    }
  });

  it('does not compile as a number', () => {
    const number = LogNumber.of(3);
    // @ts-expect-error a LogNumber is not a number
    expect(() => number < 4).toThrow(TypeError);
    // @ts-expect-error a LogNumber is not a number
    expect(() => number - 1).toThrow(TypeError);
  });
});
