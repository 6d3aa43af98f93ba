import { describe, expect, it } from 'vitest';
import { formatExponential, formatNumber } from '../src/display.ts';

describe('formatExponential', () => {
  // exp of the integers below, from mpmath at 40 digits.
  it.each([
    [5000, '2.96762838402e+2171'],
    [-5000, '3.36969414831e-2172'],
    [-2000, '2.57653587296e-869'],
    [1e5, '2.80666336e+43429'],
    [1e9, '8.00298e+434294481'],
  ])('e^%d is %s', (log, text) => {
    expect(formatExponential(log)).toBe(text);
  });

  it('carries into the exponent', () => {
    expect(formatExponential(1000 * Math.LN10, 1e-9)).toBe('1e+1000');
    expect(formatExponential(-1000 * Math.LN10, 1e-9)).toBe('1e-1000');
  });

  it('never shows more digits than the error leaves', () => {
    expect(formatExponential(-5000, 1e-4)).toBe('3.37e-2172');
    expect(formatExponential(-5000, 0.01)).toBe('3.4e-2172');
    expect(formatNumber(1 / 3, 1e-6)).toBe('0.333333');
  });
});

describe('formatNumber', () => {
  it('drops trailing zeros but no digits of whole numbers', () => {
    expect([100, 1200000, 0.5, 1e-7, 1e21, 0].map((x) => formatNumber(x))).toEqual([
      '100',
      '1200000',
      '0.5',
      '1e-7',
      '1e+21',
      '0',
    ]);
  });

  it('keeps the zeros of an exponent', () => {
    expect(
      [3.14159265359e200, 2.71828182846e-10, 1.23456789012e-100, 2.5e30, 1.5e-20].map((x) =>
        formatNumber(x),
      ),
    ).toEqual([
      '3.14159265359e+200',
      '2.71828182846e-10',
      '1.23456789012e-100',
      '2.5e+30',
      '1.5e-20',
    ]);
    expect(formatNumber(-2.71828182846e-10)).toBe('-2.71828182846e-10');
  });
});
