/** Asserts the bound of every accuracy check; `npm run accuracy` prints the same checks as a table. */
import { describe, expect, it } from 'vitest';
import { violations } from '../support/accuracy.ts';
import { allChecks } from './all.ts';

for (const [file, checks] of await allChecks()) {
  describe(file, () => {
    it.each(checks.map((check) => [check.name, check] as const))('%s', (_, check) => {
      expect(check.cases.length).toBeGreaterThan(0);
      expect(violations(check)).toEqual([]);
    });
  });
}
