/**
 * Angles of polyhedral cones in two, three and four dimensions, as fractions of the full turn or sphere.
 *
 * Vectors are plain arrays of unit length. Three dimensions: a fan of triangles, each by
 * tan(Omega/2) = |det(a, b, c)|/(1 + a.b + a.c + b.c). Four dimensions: simplicial cones, each an orthant
 * probability of four normal variables with the correlations R of the dual vectors. Along s R + (1 - s) I
 * its derivative is elementary (a formula of 1954, Biometrika 41):
 *
 *   P = 1/16 + int_0^1 sum over i < j of R_ij/(2 pi sqrt(1 - s^2 R_ij^2)) (1/4 + asin(rho_kl.ij(s))/(2 pi)) ds.
 *
 * That loses relative accuracy in narrow cones, where the cone is integrated over its simplex instead.
 */
import { EPSILON } from '../epsilon.ts';
import { integrateSmooth } from './gauss-legendre.ts';
import {
  coordinates,
  DEPENDENT,
  dot,
  orthogonal,
  orthonormalBasis,
  removeAll,
  unit,
  type Vector,
} from './small-vectors.ts';

const TWO_PI = 6.283185307179586;

/** Angle between two unit vectors over the full turn; accurate also near 0 and near a half. */
export function planeAngle(a: Vector, b: Vector): number {
  let sum = 0;
  let difference = 0;
  for (let i = 0; i < a.length; i++) {
    const x = (a[i] as number) + (b[i] as number);
    const y = (a[i] as number) - (b[i] as number);
    sum += x * x;
    difference += y * y;
  }
  return (2 * Math.atan2(Math.sqrt(difference), Math.sqrt(sum))) / TWO_PI;
}

/** Solid angle of a pointed cone spanned by three or more extreme rays in a space of dimension 3. */
export function spaceAngle(rays: readonly Vector[]): number {
  const ordered = inCyclicOrder(rays);
  const opposite = ordered.some((a) => ordered.some((b) => dot(a, b) < NEARLY_OPPOSITE));
  return (opposite ? angleByExcess(ordered) : angleByFan(ordered)) / (4 * Math.PI);
}

/** Rays further apart than this cosine spoil the triangles that contain both. */
const NEARLY_OPPOSITE = -0.9;

function angleByFan(ordered: readonly Vector[]): number {
  const a = ordered[0] as Vector;
  let sum = 0;
  for (let i = 1; i + 1 < ordered.length; i++) {
    const b = ordered[i] as Vector;
    const c = ordered[i + 1] as Vector;
    const volume = Math.abs(dot(a, orthogonal([b, c], 3)));
    sum += 2 * Math.atan2(volume, 1 + dot(a, b) + dot(a, c) + dot(b, c));
  }
  return sum;
}

/** The full turn less the exterior angles, those between the normals of neighbouring sides. */
function angleByExcess(ordered: readonly Vector[]): number {
  const sides = ordered.map((ray, i) =>
    unit(orthogonal([ray, ordered[(i + 1) % ordered.length] as Vector], 3)),
  );
  let turns = 1;
  sides.forEach((side, i) => {
    turns -= planeAngle(side, sides[(i + 1) % sides.length] as Vector);
  });
  return Math.max(turns, 0) * TWO_PI;
}

/** The extreme rays of a pointed three-dimensional cone, turning once around its axis, in R^3. */
export function inCyclicOrder(rays: readonly Vector[]): number[][] {
  const basis = orthonormalBasis(rays, DEPENDENT);
  const local = rays.map((ray) => unit(coordinates(ray, basis)));
  return cyclicOrder(local).map((i) => local[i] as number[]);
}

/** Indices of extreme rays in R^3 in cyclic order. */
function cyclicOrder(rays: readonly Vector[]): number[] {
  const axis = unit([0, 1, 2].map((i) => rays.reduce((sum, ray) => sum + (ray[i] as number), 0)));
  const across = orthonormalBasis(
    [0, 1, 2].map((i) =>
      removeAll(
        [0, 1, 2].map((j) => (i === j ? 1 : 0)),
        [axis],
      ),
    ),
    1e-6,
  );
  const angle = rays.map((ray) => {
    const [x, y] = coordinates(ray, across) as [number, number];
    return Math.atan2(y, x);
  });
  return rays.map((_, i) => i).sort((i, j) => (angle[i] as number) - (angle[j] as number));
}

/** An angle and a bound of its absolute error. */
export interface MeasuredAngle {
  readonly value: number;
  readonly error: number;
}

/**
 * Solid angle of a pointed full-dimensional cone in R^4 from its extreme rays and the outer normals of
 * its facets: a fan of simplicial cones from the first ray.
 *
 * @param touches - whether ray i lies in facet j
 */
export function hyperspaceAngle(
  rays: readonly Vector[],
  facets: number,
  touches: (ray: number, facet: number) => boolean,
): MeasuredAngle {
  const apex = rays[0] as Vector;
  const pieces: Vector[][] = [];
  for (let j = 0; j < facets; j++) {
    if (touches(0, j)) continue;
    const members = rays.filter((_, i) => touches(i, j));
    const basis = orthonormalBasis(members, DEPENDENT);
    const order = cyclicOrder(members.map((ray) => unit(coordinates(ray, basis))));
    const ordered = order.map((i) => members[i] as Vector);
    const first = ordered[0] as Vector;
    for (let i = 1; i + 1 < ordered.length; i++) {
      pieces.push([apex, first, ordered[i] as Vector, ordered[i + 1] as Vector]);
    }
  }
  const angle = sumOf(pieces, simplicialAngle);
  const acute = rays.every((a) => rays.every((b) => dot(a, b) >= 0));
  return acute && angle.value < NARROW ? sumOf(pieces, simplexAngle) : angle;
}

function sumOf(
  pieces: readonly Vector[][],
  measure: (rays: readonly Vector[]) => MeasuredAngle,
): MeasuredAngle {
  let value = 0;
  let error = 0;
  for (const piece of pieces) {
    const angle = measure(piece);
    value += angle.value;
    error += angle.error;
  }
  return { value, error };
}

/** Solid angles below this are integrated over the simplex if no two rays are at an obtuse angle. */
const NARROW = 0.01;

/** Solid angle of the cone spanned by four independent unit vectors in R^4. */
export function simplicialAngle(rays: readonly Vector[]): MeasuredAngle {
  const duals = rays.map((ray, i) => {
    const others = orthonormalBasis(
      rays.filter((_, j) => j !== i),
      DEPENDENT,
    );
    const dual = orthogonal(others, 4);
    return dot(dual, ray) < 0 ? dual.map((x) => -x) : dual;
  });
  return orthantProbability(duals);
}

/** The same with a relative error, for rays at acute angles: |A u| >= 1/2 on the simplex. */
function simplexAngle(rays: readonly Vector[]): MeasuredAngle {
  const value = simplexIntegral(rays);
  return { value, error: 1e-13 * value };
}

/** P(all four > 0) for normal variables with the Gram matrix of the given unit vectors. */
function orthantProbability(vectors: readonly Vector[]): MeasuredAngle {
  const correlation = new Float64Array(16);
  vectors.forEach((a, i) => {
    vectors.forEach((b, j) => {
      correlation[4 * i + j] = dot(a, b);
    });
  });
  const r = (i: number, j: number): number => correlation[4 * i + j] as number;
  const slope = (s: number): number => {
    let sum = 0;
    for (const [i, j, k, l] of PAIRS) {
      const rho = s * r(i, j);
      if (rho === 0) continue;
      const rest = (1 - rho) * (1 + rho);
      const a = s * r(k, i);
      const b = s * r(k, j);
      const c = s * r(l, i);
      const d = s * r(l, j);
      // covariances of k and l given i = j = 0
      const kl = s * r(k, l) - (a * c + b * d - rho * (a * d + b * c)) / rest;
      const kk = 1 - (a * a + b * b - 2 * rho * a * b) / rest;
      const ll = 1 - (c * c + d * d - 2 * rho * c * d) / rest;
      const partial = Math.max(-1, Math.min(1, kl / Math.sqrt(Math.max(kk * ll, 1e-300))));
      sum += (r(i, j) / Math.sqrt(rest)) * (0.25 + Math.asin(partial) / TWO_PI);
    }
    return sum / TWO_PI;
  };
  // The integrand is singular just beyond s = 1 when the cone is nearly flat: panels shrink towards it.
  let gap = 1;
  for (let i = 1; i < 4; i++) {
    for (let j = 0; j < i; j++) gap = Math.min(gap, 1 - Math.abs(r(i, j)));
  }
  const panels = Math.min(MOST_PANELS, 8 + Math.ceil(-Math.log2(Math.max(gap, EPSILON))));
  let value = 1 / 16;
  let left = 0;
  for (let panel = 1; panel <= panels; panel++) {
    const right = panel === panels ? 1 : left + 0.5 * (1 - left);
    value += integrateSmooth(slope, left, right);
    left = right;
  }
  // the partial correlations lose 1/gap
  return { value: Math.max(value, 0), error: EPSILON * (4 + 2 / Math.max(gap, EPSILON)) };
}

/** Each pair of four, and the other two. */
const PAIRS: readonly (readonly [number, number, number, number])[] = [
  [1, 0, 2, 3],
  [2, 0, 1, 3],
  [3, 0, 1, 2],
  [2, 1, 0, 3],
  [3, 1, 0, 2],
  [3, 2, 0, 1],
];
const MOST_PANELS = 48;

/** |det A|/(2 pi^2) times the integral of |A u|^-4 over the simplex u >= 0, sum u = 1. */
function simplexIntegral(rays: readonly Vector[]): number {
  const [a, b, c, d] = rays as [Vector, Vector, Vector, Vector];
  const integral = integrateSmooth(
    (x) =>
      (1 - x) *
      (1 - x) *
      integrateSmooth(
        (y) =>
          (1 - y) *
          integrateSmooth(
            (z) => {
              let square = 0;
              for (let i = 0; i < 4; i++) {
                const inner = z * (c[i] as number) + (1 - z) * (d[i] as number);
                const middle = y * (b[i] as number) + (1 - y) * inner;
                const sum = x * (a[i] as number) + (1 - x) * middle;
                square += sum * sum;
              }
              return 1 / (square * square);
            },
            0,
            1,
          ),
        0,
        1,
      ),
    0,
    1,
  );
  return (Math.abs(dot(a, orthogonal([b, c, d], 4))) * integral) / (2 * Math.PI * Math.PI);
}
