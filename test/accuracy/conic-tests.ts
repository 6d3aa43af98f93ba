/** Accuracy of logistic thresholds and of order-restricted tests. */
import { Probability } from 'hullgauge';
import {
  approxSeparability,
  chiBarSquared,
  eBarSquared,
  logisticSignal,
  logisticThreshold,
  orthant,
  orthantWeights,
  reversedWeights,
  simpleTree,
  totalOrder,
} from 'hullgauge/conic';
import { logisticLimit, rareClassShare } from '../../src/conic/logistic-limit.ts';
import type { AccuracyCase, AccuracyCheck } from '../support/accuracy.ts';
import { type NamedRow, readTable } from '../support/reference.ts';

const rows = [...readTable<NamedRow>('conic'), ...readTable<NamedRow>('conic-tests')];

type Args = Readonly<Record<string, number>>;

/** Numeric arguments of a row; arrays and booleans pass. */
function argsOf(row: NamedRow): Args {
  const entries = Object.entries(row.args).map(([name, value]) => [
    name,
    typeof value === 'string' ? Number(value) : value,
  ]);
  return Object.fromEntries(entries) as Args;
}

function cases(quantity: string, field: 'value' | 'log' = 'value'): readonly AccuracyCase[] {
  return rows
    .filter((row) => row.quantity === quantity && row[field] !== null)
    .map((row) => ({ args: [argsOf(row)], exact: row[field] as string, region: quantity }));
}

const fraction = (p: number): Probability => Probability.fromComplement(p);
const num = (args: Args, name: string): number => args[name] as number;
const order = (args: Args) => chiBarSquared(totalOrder(num(args, 'k')));
const observed = (args: Args) =>
  eBarSquared(totalOrder(num(args, 'k')), { observations: num(args, 'observations') });
const tree = (args: Args): readonly number[] =>
  simpleTree(num(args, 'k'), {
    control: num(args, 'w_control'),
    treatment: num(args, 'w_treatment'),
  });

/** The checks. */
export const orderRestrictedChecks: readonly AccuracyCheck[] = [
  {
    name: 'logisticThreshold',
    cases: cases('logit.h_mle').map(({ args: [a], ...rest }) => ({
      ...rest,
      args: [{ offset: (a as Args)['beta0'], signal: (a as Args)['gamma0'] }],
    })),
    compute: (args: { offset: number; signal: number }) => logisticThreshold(args),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'logisticThreshold, rare classes and strong signals',
    cases: cases('logit.threshold'),
    compute: (args: { offset: number; signal: number }) => logisticThreshold(args),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'logisticSignal',
    cases: cases('logit.gamma_critical'),
    compute: (args: Args) =>
      logisticSignal({ ratio: num(args, 'kappa'), offset: num(args, 'beta0') }),
    measure: 'relative',
    bound: 4e-15,
  },
  {
    name: 'approxSeparability, the fourth moment behind it',
    cases: cases('logit.fourth'),
    compute: (args: Args) => logisticLimit(num(args, 'offset'), num(args, 'signal'), true).fourth,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'approxSeparability, the trace behind it',
    cases: cases('logit.trace'),
    compute: (args: Args) => logisticLimit(num(args, 'offset'), num(args, 'signal'), true).trace,
    measure: 'relative',
    bound: 1e-13,
  },
  {
    name: 'approxSeparability, the trace without intercept',
    cases: cases('logit.trace_no_intercept'),
    compute: (args: Args) => logisticLimit(0, num(args, 'signal'), false).trace,
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'approxSeparability, the share of the rarer class',
    cases: cases('logit.rare_share'),
    compute: (args: Args) =>
      rareClassShare(num(args, 'offset'), num(args, 'signal'), new Float64Array(1)),
    measure: 'relative',
    bound: 1e-14,
  },
  {
    name: 'approxSeparability.value, against its own formula',
    cases: cases('logit.p_separable_second_order'),
    compute: (args: Args) =>
      approxSeparability({
        n: num(args, 'n'),
        d: num(args, 'p'),
        signal: num(args, 'gamma0'),
        offset: num(args, 'beta0'),
        intercept: args['intercept'] as unknown as boolean,
      }).value,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'chiBarSquared.quantile, total order',
    cases: [...cases('chibar.critical_total_order'), ...cases('chibar.critical')],
    compute: (args: Args) => order(args).quantile(fraction(num(args, 'p'))),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'chiBarSquared.quantile, reversed order',
    cases: cases('chibar.critical_reversed'),
    compute: (args: Args) =>
      chiBarSquared(reversedWeights(totalOrder(num(args, 'k')))).quantile(fraction(num(args, 'p'))),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'chiBarSquared.quantile, simple tree',
    cases: cases('chibar.critical_simple_tree'),
    compute: (args: Args) => chiBarSquared(tree(args)).quantile(fraction(num(args, 'p'))),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'chiBarSquared.quantile, orthant',
    cases: cases('chibar.critical_orthant'),
    compute: (args: Args) =>
      chiBarSquared(orthant(num(args, 'dim'))).quantile(fraction(num(args, 'p'))),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'chiBarSquared.quantile, one parameter on the boundary',
    cases: cases('chibar.critical_boundary'),
    compute: (args: Args) => chiBarSquared([0.5, 0.5]).quantile(fraction(num(args, 'p'))),
    measure: 'relative',
    bound: 3e-15,
  },
  {
    name: 'chiBarSquared.cdf.complement',
    cases: [...cases('chibar.sf_total_order'), ...cases('chibar.upper')],
    compute: (args: Args) => order(args).cdf(num(args, 'x')).complement,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'chiBarSquared.cdf.logComplement',
    cases: cases('chibar.upper', 'log'),
    compute: (args: Args) => order(args).cdf(num(args, 'x')).logComplement,
    measure: 'tail',
    bound: 4e-16,
  },
  {
    name: 'chiBarSquared.cdf.value',
    cases: cases('chibar.lower'),
    compute: (args: Args) => order(args).cdf(num(args, 'x')).value,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'eBarSquared.cdf.complement',
    cases: cases('ebar.upper'),
    compute: (args: Args) => observed(args).cdf(num(args, 'x')).complement,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'eBarSquared.cdf.logComplement',
    cases: cases('ebar.upper', 'log'),
    compute: (args: Args) => observed(args).cdf(num(args, 'x')).logComplement,
    measure: 'tail',
    bound: 4e-16,
  },
  {
    name: 'eBarSquared.cdf.value',
    cases: cases('ebar.lower'),
    compute: (args: Args) => observed(args).cdf(num(args, 'x')).value,
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'totalOrder, unequal weights',
    cases: cases('chibar.weight_unequal_order'),
    compute: (args: Args) => {
      const weights = args['weights'] as unknown as readonly number[];
      return totalOrder(weights.length, weights)[num(args, 'df')] as number;
    },
    measure: 'relative',
    bound: 2e-15,
  },
  {
    name: 'simpleTree',
    cases: cases('chibar.weight_simple_tree'),
    compute: (args: Args) => tree(args)[args['df'] ?? num(args, 'levels') - 1] as number,
    measure: 'relative',
    bound: 1e-14,
  },
  {
    name: 'orthantWeights',
    cases: cases('chibar.weight_orthant'),
    compute: (args: Args) =>
      orthantWeights({ covariance: args['covariance'] as unknown as number[][] })[
        num(args, 'df')
      ] as number,
    measure: 'absolute',
    bound: 1e-15,
  },
];
