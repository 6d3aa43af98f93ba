/** Accuracy checks of all four fields of a probability from reference rows of one tail or both. */
import type { Probability } from 'hullgauge';
import type { AccuracyCase, AccuracyCheck } from './accuracy.ts';
import { difference } from './reference.ts';

/** One argument object with the exact probability; the complement where the table holds it too. */
export interface ProbabilityCase {
  readonly args: object;
  readonly value: string;
  readonly log: string | null;
  readonly complement?: string | null | undefined;
  readonly region: string;
}

/** 1 and |log|: what a relative error is measured against. */
const logScale =
  (logs: ReadonlyMap<object, number>) =>
  (testCase: AccuracyCase): number =>
    Math.max(1, Math.abs(logs.get(testCase.args[0] as object) ?? 0));

/**
 * Checks of value, complement, log and logComplement. The values are relative errors per max(1, |log|),
 * the logarithms errors per max(1, |log|); values below 1e-290 are left to their logarithms.
 */
export function probabilityChecks(
  name: string,
  cases: readonly ProbabilityCase[],
  ask: (args: never) => Probability,
  bound: number,
): readonly AccuracyCheck[] {
  const logs = new Map<object, number>();
  const values: AccuracyCase[] = [];
  const logValues: AccuracyCase[] = [];
  const complements: AccuracyCase[] = [];
  for (const { args, value, log, complement, region } of cases) {
    if (log !== null) {
      logs.set(args, Number(log));
      logValues.push({ args: [args], exact: log, region });
    }
    if (Number(value) > 1e-290) values.push({ args: [args], exact: value, region });
    if (complement !== undefined && complement !== null && Number(complement) > 1e-290) {
      complements.push({ args: [args], exact: complement, region });
    }
  }
  const check = (
    field: 'value' | 'complement' | 'log',
    fieldCases: readonly AccuracyCase[],
  ): AccuracyCheck[] =>
    fieldCases.length === 0
      ? []
      : [
          {
            name: `${name}.${field}`,
            cases: fieldCases,
            compute: (args: never) => ask(args)[field],
            measure: field === 'log' ? 'log' : 'relative',
            bound,
            ...(field === 'log'
              ? {}
              : {
                  scale:
                    field === 'value'
                      ? logScale(logs)
                      : (testCase: AccuracyCase) =>
                          Math.max(1, Math.abs(Math.log(Number(testCase.exact)))),
                }),
          },
        ];
  return [
    ...check('value', values),
    ...check('complement', complements),
    ...check('log', logValues),
  ];
}

/** The largest ratio of true error to `logError` over the cases: at most 1 where the bound is honest. */
export function worstErrorShare(
  cases: readonly ProbabilityCase[],
  ask: (args: never) => Probability,
): number {
  let worst = 0;
  for (const { args, value, log } of cases) {
    if (log === null || Number(value) > 0.5) continue;
    const p = ask(args as never);
    const error = Math.abs(difference(p.log, log));
    if (error > 0) worst = Math.max(worst, error / (p.logError + 1e-300));
  }
  return worst;
}
