/** Accuracy of the hulls of walks and bridges: conic.json and conic-extra.json. */
import { bridgeHull, jointWalkHull, walkHull } from 'hullgauge/conic';
import type { AccuracyCheck } from '../support/accuracy.ts';
import { type ProbabilityCase, probabilityChecks } from '../support/probability-checks.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

const table = readTable<NamedRow>('conic');
const extra = readTable<NamedRow>('conic-extra');

const region = (steps: number): string =>
  steps <= 300 ? 'up to 300 steps' : steps <= 1e4 ? 'up to 1e4 steps' : 'beyond';

/** Rows of P(0 inside) and, with the tails exchanged, of P(0 outside). */
export function hullCases(kind: 'walk' | 'bridge', side: 'in' | 'out'): readonly ProbabilityCase[] {
  const own = table.flatMap((row) => {
    if (row.quantity !== `${kind}.p_${side}` || row.value === null) return [];
    const args = { steps: Number(row.args['n']), d: Number(row.args['d']) };
    return [{ args, value: row.value, log: row.log, region: region(args.steps) }];
  });
  const others = extra.flatMap((row) => {
    if (row.quantity !== kind || row.value === null || side === 'out') return [];
    const args = row.args as unknown as { steps: number; d: number };
    const { value, log, complement } = row;
    return [{ args, value, log, complement, region: region(args.steps) }];
  });
  return [...own, ...others];
}

/** Rows of the joint hulls. */
export const jointCases = (): readonly ProbabilityCase[] =>
  extra.flatMap((row) => {
    if (row.quantity !== 'joint' || row.value === null) return [];
    const { value, log, complement } = row;
    return [{ args: row.args, value, log, complement, region: 'several' }];
  });

const outside =
  (ask: typeof walkHull) =>
  (args: Parameters<typeof walkHull>[0]): ReturnType<typeof walkHull> => {
    const p = ask(args);
    return { ...p, value: p.complement, log: p.logComplement } as ReturnType<typeof walkHull>;
  };

/** Promise: relative error of both tails, 4e-15 max(1, |log|). */
export const checks: readonly AccuracyCheck[] = [
  ...probabilityChecks('walkHull', hullCases('walk', 'in'), walkHull, 4e-15),
  ...probabilityChecks('walkHull (outside)', hullCases('walk', 'out'), outside(walkHull), 4e-15),
  ...probabilityChecks('bridgeHull', hullCases('bridge', 'in'), bridgeHull, 4e-15),
  ...probabilityChecks(
    'bridgeHull (outside)',
    hullCases('bridge', 'out'),
    outside(bridgeHull),
    4e-15,
  ),
  ...probabilityChecks('jointWalkHull', jointCases(), jointWalkHull, 4e-15),
];
