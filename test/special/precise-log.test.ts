import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { preciseLog, preciseLog1p, scaleLog } from '../../src/special/precise-log.ts';
import { exactDecimal } from '../support/reference.ts';

const Ruler = Decimal.clone({ precision: 60, defaults: true });
const out = new Float64Array(2);

/** out[0] + out[1] - exact. */
function residue(exact: Decimal): number {
  return exactDecimal(out[0] as number)
    .plus(exactDecimal(out[1] as number))
    .minus(exact)
    .toNumber();
}

describe('preciseLog', () => {
  it('has an absolute error below 1e-21 for every normal number', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -700, max: 700, noNaN: true }).map(Math.exp),
        fc.double({ min: -1, max: 1, noNaN: true }),
        (x, part) => {
          const tail = x * part * 2 ** -54;
          preciseLog(x, tail, out);
          const exact = new Ruler(exactDecimal(x)).plus(exactDecimal(tail)).ln();
          expect(Math.abs(residue(exact))).toBeLessThan(1e-21);
          expect(Math.abs(out[1] as number)).toBeLessThanOrEqual(
            2 ** -53 * Math.abs(out[0] as number),
          );
        },
      ),
      { numRuns: 300 },
    );
  });

  it('keeps the tail, not only the number', () => {
    preciseLog(3, 3e-17, out);
    expect(Math.abs(residue(new Ruler('3.00000000000000003').ln()))).toBeLessThan(1e-21);
  });

  it('takes powers of two, neighbours of one and subnormal numbers', () => {
    for (const x of [
      0.5,
      1,
      2,
      1 - 2 ** -53,
      1 + 2 ** -52,
      2 ** 1023,
      2 ** -1022,
      2 ** -1074,
      3e-320,
    ]) {
      preciseLog(x, 0, out);
      expect(Math.abs(residue(new Ruler(exactDecimal(x)).ln()))).toBeLessThan(1e-21);
    }
    preciseLog(1, 0, out);
    expect([out[0], out[1]]).toEqual([0, 0]);
  });
});

describe('preciseLog1p', () => {
  it('has a relative error below 2^-57 down to the smallest arguments', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 600, noNaN: true }),
        fc.boolean(),
        (size, negative) => {
          const t = (negative ? -1 : 1) * Math.exp(-size) * 0.125;
          preciseLog1p(t, out);
          // log(1 + t) to 60 digits by its own series
          const exactT = new Ruler(exactDecimal(t));
          let power = exactT;
          let sum = new Ruler(0);
          for (let k = 1; k < 60; k++) {
            sum = sum.plus(power.div(k));
            power = power.times(exactT).neg();
          }
          expect(Math.abs(residue(sum))).toBeLessThan(2 ** -57 * Math.abs(t));
        },
      ),
      { numRuns: 300 },
    );
  });
});

describe('scaleLog', () => {
  it('multiplies both parts', () => {
    preciseLog(0.3, 0, out);
    scaleLog(1234.5, out);
    const exact = new Ruler(exactDecimal(0.3)).ln().times('1234.5');
    expect(Math.abs(residue(exact))).toBeLessThan(1e-18);
  });
});
