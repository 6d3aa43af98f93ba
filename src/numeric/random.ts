/**
 * Seeded random numbers that are the same, bit for bit, on every engine.
 *
 * The integers come from the xoroshiro128+ generator, started from a hash of the seed so that
 * neighbouring seeds share nothing. Engines differ in the last bit of `Math.log` and `Math.exp`, so
 * both are written out here with additions, multiplications, divisions and square roots only, which
 * the language defines exactly. A simulation therefore counts the same hits everywhere.
 *
 * - uniform: 52 random bits, the midpoints (k + 1/2) / 2^52, so never 0 or 1
 * - normal: polar method (A convenient method for generating normal variables, SIAM Review, 1964,
 *   doi:10.1137/1006063)
 * - gamma: rejection from a cubed normal (A simple method for generating gamma
 *   variables, ACM Transactions on Mathematical Software, 2000, doi:10.1145/358407.358414)
 */
import { xoroshiro128plusFromState } from 'pure-rand/generator/xoroshiro128plus';

/** An endless stream of independent random numbers. */
export interface RandomStream {
  /** A number uniform on (0, 1), never 0 or 1. */
  uniform(): number;
  /** A standard normal number. */
  normal(): number;
  /** A gamma number with the given shape > 0 and scale 1; may underflow to 0 for tiny shapes. */
  gamma(shape: number): number;
}

/** The stream of a seed, an integer from 0 to 2^53 - 1. Checks nothing. */
export function randomStream(seed: number): RandomStream {
  const generator = xoroshiro128plusFromState(stateOf(seed));
  let spare = 0;
  let hasSpare = false;

  const uniform = (): number => {
    const high = generator.next() >>> 6;
    const low = generator.next() >>> 6;
    return (high * 2 ** 26 + low + 0.5) * 2 ** -52;
  };

  const normal = (): number => {
    if (hasSpare) {
      hasSpare = false;
      return spare;
    }
    for (;;) {
      const u = 2 * uniform() - 1;
      const v = 2 * uniform() - 1;
      const s = u * u + v * v;
      if (s < 1 && s > 0) {
        const factor = Math.sqrt((-2 * portableLog(s)) / s);
        spare = v * factor;
        hasSpare = true;
        return u * factor;
      }
    }
  };

  const gamma = (shape: number): number => {
    if (shape < 1) return gamma(shape + 1) * portableExp(portableLog(uniform()) / shape);
    const d = shape - 1 / 3;
    const c = 1 / Math.sqrt(9 * d);
    for (;;) {
      const x = normal();
      const root = 1 + c * x;
      if (root <= 0) continue;
      const v = root * root * root;
      if (portableLog(uniform()) < 0.5 * x * x + d * (1 - v + portableLog(v))) return d * v;
    }
  };

  return { uniform, normal, gamma };
}

/** Four 32-bit words; two of them determine the seed, so no two seeds share a stream's start. */
function stateOf(seed: number): number[] {
  const low = seed | 0;
  const high = Math.floor(seed / 2 ** 32) | 0;
  return [
    mix(high + 0x3c6ef372),
    mix(low + 0x9e3779b9),
    mix(low ^ Math.imul(high, 0x85ebca6b) ^ 0x510e527f),
    mix(high ^ Math.imul(low, 0xc2b2ae35) ^ 0x1f83d9ab),
  ];
}

/** A bijection of 32-bit integers in which each input bit moves about half the output bits. */
function mix(word: number): number {
  let x = word | 0;
  x = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
  x = Math.imul(x ^ (x >>> 13), 0xc2b2ae35);
  return x ^ (x >>> 16);
}

const LN2_HIGH = 0.6931471803691238; // ln 2 to 32 bits: products with exponents are exact
const LN2_LOW = 1.9082149292705877e-10; // the rest of ln 2

/** Natural logarithm of a positive normal double, within 2 ulp, the same on every engine. */
export function portableLog(x: number): number {
  let m = x;
  let e = 0;
  for (let step = 512, scale = 2 ** 512; step >= 1; step /= 2, scale = Math.sqrt(scale)) {
    while (m >= scale) {
      m /= scale;
      e += step;
    }
    while (m * scale < 2) {
      m *= scale;
      e -= step;
    }
  }
  // Now 1 <= m < 2; centre it so that the series is short and small near x = 1.
  if (m > Math.SQRT2) {
    m *= 0.5;
    e++;
  }
  const f = m - 1;
  const s = f / (2 + f);
  const z = s * s;
  // 2 artanh(s) - 2 s = 2 s (z/3 + z^2/5 + ...), z <= 0.0295.
  let sum = 0;
  for (let k = 23; k >= 3; k -= 2) sum = z * (1 / k + sum);
  const half = 0.5 * f * f;
  // 2 s = f - s f, and s f = half - s half: the last correction is small.
  const tail = s * (half + 2 * sum) + e * LN2_LOW;
  return e * LN2_HIGH - (half - tail - f);
}

/** Exponential of x <= 0, within 2 ulp, the same on every engine; 0 where it underflows. */
export function portableExp(x: number): number {
  if (x < -745) return 0;
  const k = Math.round(x / Math.LN2);
  const r = x - k * LN2_HIGH - k * LN2_LOW;
  let sum = 1;
  for (let j = 15; j >= 1; j--) sum = 1 + (r * sum) / j;
  let result = sum;
  let left = -k;
  for (let step = 512, scale = 2 ** -512; step >= 1; step /= 2, scale = Math.sqrt(scale)) {
    while (left >= step) {
      result *= scale;
      left -= step;
    }
  }
  return result;
}
