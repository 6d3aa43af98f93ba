/**
 * Facets of polyhedral cones in at most four dimensions, and the intrinsic volumes of pointed ones.
 *
 * v_k is the sum over k-faces of the angle of the face times the angle of the normal cone at it; every
 * angle is one of a cone in at most four dimensions. Where two volumes add up to a third, the one that
 * is known better gives the other.
 */
import { EPSILON } from '../epsilon.ts';
import {
  DEPENDENT,
  dot,
  orthogonal,
  orthonormalBasis,
  removeAll,
  unit,
  type Vector,
} from '../numeric/small-vectors.ts';
import { hyperspaceAngle, planeAngle, spaceAngle } from '../numeric/solid-angle.ts';

/** Two unit vectors closer than this are one, and a product smaller than this is 0. */
export const TOLERANCE = 1e-11;
/** A ray closer to a facet that does not contain it than this leaves no digit of the angles. */
const SMALLEST_HEIGHT = 1e-9;
/** Up to here 1/2 minus a sum keeps its digits. */
const NO_CANCELLATION = 0.4;

/** Unit vectors without repetitions. */
export function distinct(vectors: readonly Vector[]): Vector[] {
  const kept: Vector[] = [];
  for (const vector of vectors) {
    if (!kept.some((other) => planeAngle(other, vector) < TOLERANCE)) kept.push(vector);
  }
  return kept;
}

/** Outer unit normals of the facets of a cone that spans R^n, n <= 4; none if it is all of R^n. */
export function facetNormals(vectors: readonly Vector[], n: number): Vector[] {
  const found: { normal: Vector; size: number }[] = [];
  const test = (frame: readonly Vector[], size: number): void => {
    const direction = orthogonal(frame, n);
    for (const sign of [1, -1]) {
      if (vectors.some((vector) => sign * dot(vector, direction) > TOLERANCE)) continue;
      const outer = direction.map((x) => sign * x);
      // of several descriptions of one facet the best conditioned is kept
      const same = found.find((other) => planeAngle(other.normal, outer) < SAME_FACET);
      if (same === undefined) found.push({ normal: outer, size });
      else if (size > same.size) Object.assign(same, { normal: outer, size });
    }
  };
  // frame: an orthonormal basis of the chosen vectors; size: the volume that they span
  const visit = (start: number, frame: readonly Vector[], size: number): void => {
    if (frame.length === n - 1) {
      test(frame, size);
      return;
    }
    for (let i = start; i < vectors.length; i++) {
      const rest = removeAll(vectors[i] as Vector, frame);
      const length = Math.sqrt(dot(rest, rest));
      if (length < DEPENDENT) continue;
      const direction = unit(removeAll(unit(rest), frame));
      visit(i + 1, [...frame, direction], size * length);
    }
  };
  visit(0, [], 1);
  return found.map(({ normal }) => normal);
}

/** Normals closer than this describe one facet. */
const SAME_FACET = 1e-9;

/** A cone without facets is a subspace; vectors inside a half-space were too close to tell their facets. */
export function refuseHalfspace(vectors: readonly Vector[]): void {
  const sum = vectors.reduce<number[]>(
    (total, vector) => vector.map((x, i) => x + (total[i] ?? 0)),
    [],
  );
  if (vectors.length > 1 && vectors.every((vector) => dot(vector, sum) > 0)) {
    unresolved();
  }
}

export function unresolved(): never {
  throw new Error('polyhedralCone: the generators are too nearly dependent to find the facets');
}

/** Intrinsic volumes of a pointed cone, and the relative error of each. */
export interface FaceVolumes {
  readonly volumes: readonly number[];
  readonly errors: readonly number[];
}

/** The same for a full-dimensional cone in R^p, p <= 4, from its facets and generators. */
export function faceVolumes(
  normals: readonly Vector[],
  generators: readonly Vector[],
  p: number,
): FaceVolumes {
  const near = (a: Vector, b: Vector): boolean => Math.abs(dot(a, b)) < 10 * TOLERANCE;
  const rays = distinct(
    generators.filter((vector) => dot(vector, vector) > TOLERANCE).map((vector) => unit(vector)),
  ).filter((ray) => {
    const facets = normals.filter((normal) => near(ray, normal));
    return orthonormalBasis(facets, DEPENDENT).length === p - 1;
  });
  const touches = rays.map((ray) => normals.map((normal) => near(ray, normal)));
  const touching = (i: number, j: number): boolean => (touches[i] as boolean[])[j] as boolean;
  const raysOf = (j: number): Vector[] => rays.filter((_, i) => touching(i, j));
  const normalsOf = (i: number): Vector[] => normals.filter((_, j) => touching(i, j));
  // a polytope of dimension p - 1 has at least p vertices and p facets, each on p - 1 of the others
  const few = p - 1;
  if (
    rays.length < p ||
    normals.length < p ||
    rays.some((_, i) => normalsOf(i).length < few) ||
    normals.some((_, j) => raysOf(j).length < few)
  ) {
    unresolved();
  }
  const pair = (vectors: readonly Vector[]): number =>
    planeAngle(vectors[0] as Vector, vectors[1] as Vector);
  const total = (count: number, angle: (index: number) => number): number => {
    let sum = 0;
    for (let index = 0; index < count; index++) sum += angle(index);
    return sum;
  };
  // All angles are known to a few roundings, and to what counted as 0, over the smallest height of the
  // cone above a facet.
  let height = 1;
  rays.forEach((ray, i) => {
    normals.forEach((normal, j) => {
      if (!touching(i, j)) height = Math.min(height, Math.abs(dot(ray, normal)));
    });
  });
  let slack = EPSILON;
  for (const vector of generators) {
    for (const normal of normals) {
      const product = Math.abs(dot(vector, normal));
      if (product < 10 * TOLERANCE) slack = Math.max(slack, product);
    }
  }
  if (height < SMALLEST_HEIGHT) unresolved();
  const relative = EPSILON * (16 + rays.length + normals.length) + (8 * slack) / height;
  const all = (volumes: readonly number[]): FaceVolumes => ({
    volumes,
    errors: volumes.map(() => relative),
  });
  if (p === 1) return all([0.5, 0.5]);
  if (p === 2) return all([pair(normals), 0.5, pair(rays)]);
  if (p === 3) {
    const edge = total(rays.length, (i) => 0.5 * pair(normalsOf(i)));
    const facet = total(normals.length, (j) => 0.5 * pair(raysOf(j)));
    // v_0 + v_2 = v_1 + v_3 = 1/2: a sum of plane angles gives the other where nothing cancels
    return all([
      facet < NO_CANCELLATION ? 0.5 - facet : spaceAngle(normals),
      edge,
      facet,
      edge < NO_CANCELLATION ? 0.5 - edge : spaceAngle(rays),
    ]);
  }
  let ridges = 0;
  for (let j = 0; j < normals.length; j++) {
    for (let l = 0; l < j; l++) {
      const shared = rays.filter((_, i) => touching(i, j) && touching(i, l));
      if (shared.length === 2) {
        ridges += pair(shared) * planeAngle(normals[j] as Vector, normals[l] as Vector);
      }
    }
  }
  let cone = hyperspaceAngle(rays, normals.length, touching);
  let polar = hyperspaceAngle(normals, rays.length, (j, i) => touching(i, j));
  // v_0 + v_2 + v_4 = 1/2: the better known one of the two gives the other
  const error = relative + Math.min(cone.error, polar.error);
  if (cone.error > error) cone = { value: 0.5 - ridges - polar.value, error };
  if (polar.error > error) polar = { value: 0.5 - ridges - cone.value, error };
  const edge = total(rays.length, (i) => 0.5 * spaceAngle(normalsOf(i)));
  const facet = total(normals.length, (j) => 0.5 * spaceAngle(raysOf(j)));
  const volumes = [
    polar.value,
    facet < NO_CANCELLATION ? 0.5 - facet : edge,
    ridges,
    edge < NO_CANCELLATION ? 0.5 - edge : facet,
    cone.value,
  ];
  if (!volumes.every((v) => v > 0)) unresolved();
  return {
    volumes,
    errors: [
      relative + polar.error / polar.value,
      relative,
      relative,
      relative,
      relative + cone.error / cone.value,
    ],
  };
}
