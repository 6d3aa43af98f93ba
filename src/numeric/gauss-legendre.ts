/**
 * Gauss-Legendre rule with 20 points: exact for polynomials of degree 39.
 *
 * For a function analytic in the ellipse with foci at the ends of the interval and half-axes summing to
 * r half-lengths the error falls like r^-40: 1e-16 where the nearest singularity is half a length away.
 */

/** Positive nodes on [-1, 1] and their weights; to recompute: mpmath, the roots of legendre(20, x). */
const NODES: readonly number[] = [
  0.076526521133497333755, 0.22778585114164507808, 0.37370608871541956067, 0.510867001950827098,
  0.63605368072651502545, 0.74633190646015079261, 0.83911697182221882339, 0.91223442825132590587,
  0.96397192727791379127, 0.99312859918509492479,
];
const WEIGHTS: readonly number[] = [
  0.1527533871307258507, 0.14917298647260374679, 0.14209610931838205133, 0.1316886384491766269,
  0.11819453196151841731, 0.10193011981724043504, 0.083276741576704748725, 0.06267204833410906357,
  0.040601429800386941331, 0.017614007139152118312,
];

/** Number of points of the rule. */
export const RULE_POINTS = 20;

/** Node `i` of 20 on the interval from a to b, in ascending order. */
export function ruleNode(i: number, a: number, b: number): number {
  const half = 0.5 * (b - a);
  const node = i < 10 ? -(NODES[9 - i] as number) : (NODES[i - 10] as number);
  return a + half + half * node;
}

/** Weight `i` of 20 on the interval from a to b. */
export function ruleWeight(i: number, a: number, b: number): number {
  return 0.5 * (b - a) * (WEIGHTS[i < 10 ? 9 - i : i - 10] as number);
}

/** Integral of f from a to b. */
export function integrateSmooth(f: (x: number) => number, a: number, b: number): number {
  let sum = 0;
  for (let i = 0; i < RULE_POINTS; i++) sum += ruleWeight(i, a, b) * f(ruleNode(i, a, b));
  return sum;
}
