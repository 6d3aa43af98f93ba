/** The stated errors of membership and faces, against the table of 20-digit values. */
import { describe, expect, it } from 'vitest';
import { faceChecks } from '../accuracy/polytope-faces.ts';
import { faceRows } from '../support/face-rows.ts';
import { difference } from '../support/reference.ts';

describe('the table of face numbers', () => {
  it('is measured in full', () => {
    const measured = faceChecks.reduce((sum, check) => sum + check.cases.length, 0);
    expect(measured).toBe(faceRows.length);
  });

  it.each(faceRows.map((row) => [`${row.name} ${JSON.stringify(row.args)}`, row] as const))(
    'states an honest and useful error: %s',
    (_, row) => {
      const { log, logError } = row.compute();
      const error = Math.abs(difference(log, row.exact));
      expect(error).toBeLessThanOrEqual(logError);
      expect(logError).toBeLessThanOrEqual(Math.max(1e4 * error, 1e-12));
    },
  );
});
