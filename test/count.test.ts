import { DomainError, LogNumber, originInHull } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { resolveCount } from '../src/count.ts';

describe('a count', () => {
  it('is an integer, a double beyond 2^53, or e^log', () => {
    expect(resolveCount('f', 'n', 12)).toEqual({ n: 12, log: Math.log(12) });
    expect(resolveCount('f', 'n', 1e300)).toEqual({ n: 1e300, log: Math.log(1e300) });
    expect(resolveCount('f', 'n', LogNumber.fromLog(5000))).toEqual({ n: Infinity, log: 5000 });
    // the plain data of another copy of the library, or of JSON
    expect(resolveCount('f', 'n', { kind: 'logNumber', log: 60, logError: 0 }).log).toBe(60);
  });

  it('means the nearest integer by a logarithm below 2^53', () => {
    for (const n of [0, 1, 7, 1000, 123_456_789]) {
      expect(resolveCount('f', 'n', LogNumber.of(n)).n).toBe(n);
    }
  });

  it.each<[unknown]>([
    [2.5],
    [-1],
    [Number.NaN],
    [Number.POSITIVE_INFINITY],
    ['3'],
    [null],
    [3n],
    [LogNumber.fromLog(Number.POSITIVE_INFINITY)],
    [{ kind: 'logNumber', log: Number.NaN }],
    // what JSON makes of a NaN
    [{ kind: 'logNumber', log: null, logError: 0 }],
  ])('is not %o', (n) => {
    expect(() => resolveCount('f', 'n', n)).toThrow('f: n must be an integer >= 0, got ');
    expect(() => originInHull({ n, d: 2 } as never)).toThrow(DomainError);
  });
});
