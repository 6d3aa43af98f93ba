/** Valid calls of the exact and arbitrarily precise functions. */
import type { OptionsCall, PositionalCall } from './types.ts';

const nd = { n: 10, d: 3 };

/** The calls by exported name. */
export const preciseCalls: Readonly<Record<string, OptionsCall | PositionalCall>> = {
  originInHullExact: { options: nd, integers: ['n', 'd'] },
  dichotomyCountExact: {
    options: { ...nd, intercept: true },
    integers: ['n', 'd'],
    optional: ['intercept'],
  },
  originInHullDecimal: { options: { ...nd, digits: 20 }, integers: ['n', 'd', 'digits'] },
  hullVolumeRatioDecimal: {
    options: { ...nd, b: 0, digits: 20 },
    integers: ['n', 'd', 'digits'],
    texts: ['b'],
  },
  incompleteBetaDecimal: {
    args: [2, 3, 0.5, 20],
    names: ['a', 'b', 'x', 'digits'],
    integers: ['digits'],
    texts: ['a', 'b', 'x'],
  },
};
