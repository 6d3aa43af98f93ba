/**
 * Error functions of a real argument.
 */

import { productError } from './double-double.ts';

const SQRT_HALF = Math.SQRT1_2;

/** exp(-x^2) with x^2 carried to twice the precision. */
export function expOfMinusSquare(x: number): number {
  const square = x * x;
  if (!(square < 760)) return 0;
  const value = Math.exp(-square);
  return value - value * productError(x, x, square);
}

/** exp(-x^2/2) with x^2 carried to twice the precision. */
export function expOfMinusHalfSquare(x: number): number {
  const square = x * x;
  if (!(square < 1520)) return 0;
  const value = Math.exp(-0.5 * square);
  return value - value * (0.5 * productError(x, x, square));
}

/** exp(x^2) with x^2 carried to twice the precision; Infinity where it overflows. */
function expOfSquare(x: number): number {
  const square = x * x;
  if (square > 710) return Number.POSITIVE_INFINITY;
  const value = Math.exp(square);
  return value < Number.POSITIVE_INFINITY ? value + value * productError(x, x, square) : value;
}

/** exp(x^2) erfc(x). */
export function erfcxKernel(x: number): number {
  if (x < 0) return 2 * expOfSquare(x) - erfcxKernel(-x);
  if (x > 50) {
    const q = 1 / (x * x);
    return (
      (1 -
        (q / 2) *
          (1 - ((3 * q) / 2) * (1 - ((5 * q) / 2) * (1 - ((7 * q) / 2) * (1 - (9 * q) / 2))))) /
      (x * 1.7724538509055160273)
    );
  }
  const t = (x - 3.75) / (x + 3.75);
  const t2 = 2 * t;
  let b1 = 0;
  let b2 = 0;
  for (let i = CHEBYSHEV.length - 1; i > 0; i--) {
    const b = t2 * b1 - b2 + (CHEBYSHEV[i] as number);
    b2 = b1;
    b1 = b;
  }
  return (t * b1 - b2 + (CHEBYSHEV[0] as number)) / (1 + 2 * x);
}

const CHEBYSHEV: readonly number[] = [
  1.177578934567401754080459, -0.004590054580646477330853356, -0.08424913336651791558350624,
  0.05920993819998189049807705, -0.02665866843530575227738735, 0.009074997670705265093878874,
  -0.002413163540417608190942522, 0.00049077583652580863228587, -0.00006916973302501206367095533,
  0.000004139027986073010167533729, 7.740383066198490668632915e-7, -2.188640104923439566148978e-7,
  1.07649994656709103771365e-8, 4.521959811218286897930918e-9, -7.754400208831351106474482e-10,
  -6.318088340886684494384997e-11, 2.868795010930669898142463e-11, 1.945586854577734722952947e-13,
  -9.654696748433438905851145e-13, 3.252548148148739841541959e-14, 3.347811948286805387827033e-14,
  -1.864562880419313101543793e-15, -1.250795053068864708532095e-15, 7.418235256624043463048281e-17,
  5.068148904796111316806933e-17, -2.237056659435999597369047e-18, -2.187342944303017664994983e-18,
];

/** erf(x). */
export function erfKernel(x: number): number {
  if (x >= 0.5) return 1 - erfcKernel(x);
  if (x <= -0.5) return erfcKernel(-x) - 1;
  const q = x * x;
  let s = 0;
  let factorial = 1;
  let power = 1;
  for (let n = 0; n < 14; n++) {
    s += power / (factorial * (2 * n + 1));
    power *= -q;
    factorial *= n + 1;
  }
  return 1.1283791670955125739 * x * s;
}

/** erfc(x) = 1 - erf(x). */
export function erfcKernel(x: number): number {
  if (x < 0.5) return 1 - erfKernel(x);
  return expOfMinusSquare(x) * erfcxKernel(x);
}

/** Mills' ratio: upper tail of the standard normal law over its density. */
export function millsRatioKernel(x: number): number {
  if (x >= 0) return 1.2533141373155002512 * erfcxKernel(x * SQRT_HALF);
  const square = x * x;
  if (square > 1420) return Number.POSITIVE_INFINITY;
  const value = Math.exp(0.5 * square);
  return (
    2.5066282746310005024 * (value + value * (0.5 * productError(x, x, square))) -
    millsRatioKernel(-x)
  );
}
