import { DomainError, LogNumber, originInHull } from 'hullgauge';
import { describe, expect, it } from 'vitest';
import { resolveCount } from '../src/count.ts';
import {
  checkBoolean,
  checkChoice,
  checkFinite,
  checkInteger,
  checkNumber,
  checkOptions,
  checkPositive,
} from '../src/domain.ts';

/** The message with which a call is refused. */
function refusal(call: () => unknown): string {
  try {
    call();
  } catch (error) {
    expect(error).toBeInstanceOf(DomainError);
    return (error as DomainError).message;
  }
  return 'accepted';
}

describe('DomainError', () => {
  it('tells what was wrong in fields as well as in words', () => {
    try {
      originInHull({ n: 3.5, d: 2 });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(RangeError);
      expect(error).toMatchObject({
        name: 'DomainError',
        code: 'HULLGAUGE_DOMAIN',
        parameter: 'n',
        received: 3.5,
        message: 'originInHull: n must be an integer >= 0, got 3.5',
      });
    }
  });
});

describe('the one wording of all messages', () => {
  it.each([
    [() => checkInteger('f', 'k', '3', 0), 'f: k must be an integer >= 0, got "3"'],
    [() => checkInteger('f', 'k', 7, 0, 5), 'f: k must be an integer from 0 to 5, got 7'],
    [
      () => checkInteger('f', 'k', 2 ** 53, 1),
      'f: k must be an integer from 1 to 2^53 - 1, got 9007199254740992',
    ],
    [() => checkInteger('f', 'k', undefined, 1), 'f: k must be an integer >= 1, got undefined'],
    [() => checkInteger('f', 'k', 3n, 1), 'f: k must be an integer >= 1, got 3n'],
    [() => checkNumber('f', 'x', Number.NaN), 'f: x must be a number, got NaN'],
    [() => checkNumber('f', 'x', 2, 0, 1), 'f: x must be a number from 0 to 1, got 2'],
    [() => checkNumber('f', 'x', -1, 0), 'f: x must be a number >= 0, got -1'],
    [() => checkNumber('f', 'x', 1, undefined, 0), 'f: x must be a number <= 0, got 1'],
    [
      () => checkFinite('f', 'x', Number.POSITIVE_INFINITY),
      'f: x must be a finite number, got Infinity',
    ],
    [() => checkFinite('f', 'x', -2, -1), 'f: x must be a finite number >= -1, got -2'],
    [() => checkPositive('f', 'x', 0), 'f: x must be a finite number > 0, got 0'],
    [() => checkPositive('f', 'x', 3, 2), 'f: x must be a number > 0 and <= 2, got 3'],
    [() => checkBoolean('f', 'on', 1), 'f: on must be true or false, got 1'],
    [() => checkChoice('f', 'type', 'C', ['A', 'B']), 'f: type must be "A" or "B", got "C"'],
    [
      () => checkOptions('f', { n: 1, m: 2 }, ['n', 'd']),
      'f: m must be left out (the options are n, d), got 2',
    ],
    [
      () => checkOptions('f', null, ['n']),
      'f: options must be an object (the options are n), got null',
    ],
    [
      () => checkOptions('f', [1], ['n']),
      'f: options must be an object (the options are n), got an array of length 1',
    ],
    [() => checkNumber('f', 'x', LogNumber.of(1)), 'f: x must be a number, got an object'],
    [() => checkNumber('f', 'x', () => 1), 'f: x must be a number, got a function'],
    [() => checkNumber('f', 'x', {}), 'f: x must be a number, got an object'],
  ])('%#: %s', (call, message) => {
    expect(refusal(call)).toBe(message);
  });
});

describe('counts', () => {
  it('are integers, large doubles or logarithms', () => {
    expect(resolveCount('f', 'n', 0)).toEqual({ n: 0, log: Number.NEGATIVE_INFINITY });
    expect(resolveCount('f', 'n', 1e300).n).toBe(1e300);
    expect(resolveCount('f', 'n', LogNumber.fromLog(5000))).toEqual({
      n: Number.POSITIVE_INFINITY,
      log: 5000,
    });
    expect(resolveCount('f', 'n', LogNumber.of(12345678)).n).toBe(12345678);
    expect(resolveCount('f', 'n', LogNumber.of(0)).n).toBe(0);
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, 3.5, -1, '3', undefined, null, 3n])(
    'refuse %s',
    (bad) => {
      expect(refusal(() => resolveCount('f', 'n', bad))).toMatch(
        /^f: n must be an integer >= 0, got /,
      );
    },
  );

  it('refuse a logarithm without a count', () => {
    for (const log of [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(refusal(() => resolveCount('f', 'n', LogNumber.fromLog(log), 1))).toContain(
        'an object',
      );
    }
  });
});
