/**
 * Generated questions "does q lie in the hull of the points?" with answers known by construction.
 *
 * Inside: q is a convex combination, or a point itself. Outside: a direction is known in which q
 * exceeds every point by a margin that is clear in the units of each column. Everything is made from
 * the seeded stream, so each run sees the same cases.
 */
import { randomStream } from '../../src/numeric/random.ts';

export interface HullCase {
  readonly cloud: string;
  readonly query: string;
  readonly points: Float64Array[];
  readonly q: Float64Array;
  readonly inside: boolean;
}

export type Stream = ReturnType<typeof randomStream>;

const CLOUDS = [
  'gaussian',
  'grid',
  'coarse grid',
  'duplicates',
  'collinear',
  'low rank',
  'constant column',
  'uneven units',
  'far from the origin',
  'heavy tails',
  'sphere',
  'flat face',
] as const;

const QUERIES = [
  'mixture of all',
  'mixture of few',
  'edge',
  'a point',
  'an extreme point',
  'on a face',
  'beyond a point',
  'just beyond a point',
  'far beyond',
] as const;

const integer = (stream: Stream, min: number, max: number): number =>
  min + Math.floor(stream.uniform() * (max - min + 1));

/** Case number `index` of the seed's sequence: every cloud meets every query. */
export function hullCase(seed: number, index: number): HullCase {
  const stream = randomStream(seed * 1_000_003 + index);
  const cloud = CLOUDS[index % CLOUDS.length] as (typeof CLOUDS)[number];
  const query = QUERIES[
    Math.floor(index / CLOUDS.length) % QUERIES.length
  ] as (typeof QUERIES)[number];
  // Small and large sizes alike: the logarithm of n is uniform from 1 to 500.
  const n = Math.floor(501 ** stream.uniform());
  const d = integer(stream, 1, 30);
  const points = makeCloud(stream, cloud, n, d);
  return { cloud, query, ...ask(stream, points, query) };
}

/** A cloud of n points in d dimensions. */
export function makeCloud(stream: Stream, cloud: string, n: number, d: number): Float64Array[] {
  const make = (f: (i: number, j: number) => number): Float64Array[] =>
    Array.from({ length: n }, (_, i) => Float64Array.from({ length: d }, (_, j) => f(i, j)));
  const gaussian = make(() => stream.normal());
  switch (cloud) {
    case 'grid':
      return make(() => integer(stream, -4, 4));
    case 'coarse grid':
      return make(() => integer(stream, 0, 1));
    case 'duplicates': {
      const distinct = gaussian.slice(0, Math.ceil(n / 5));
      return make((i, j) => (distinct[i % distinct.length] as Float64Array)[j] as number);
    }
    case 'collinear': {
      const steps = Array.from({ length: n }, () => integer(stream, -50, 50));
      return make((i, j) => j + (steps[i] as number) * ((j % 3) - 1 + (j === 0 ? 3 : 0)));
    }
    case 'low rank': {
      const rank = integer(stream, 1, d);
      const mix = Array.from({ length: d }, () =>
        Array.from({ length: rank }, () => integer(stream, -2, 2)),
      );
      return make((i, j) =>
        (mix[j] as number[]).reduce(
          (s, m, r) => s + m * ((gaussian[i] as Float64Array)[r] as number),
          0,
        ),
      );
    }
    case 'constant column':
      return make((i, j) => (j % 2 === 0 ? 7.25 : ((gaussian[i] as Float64Array)[j] as number)));
    case 'uneven units':
      return make(
        (i, j) => ((gaussian[i] as Float64Array)[j] as number) * 10 ** (((j * 7) % 19) - 9),
      );
    case 'far from the origin':
      return make((i, j) => ((gaussian[i] as Float64Array)[j] as number) + 1000 * (j + 1));
    case 'heavy tails':
      return gaussian.map((row) => {
        const scale = 1 / Math.sqrt(stream.gamma(0.6) + 1e-9);
        return row.map((x) => x * scale);
      });
    case 'sphere':
      return gaussian.map((row) => {
        const length = Math.sqrt(row.reduce((s, x) => s + x * x, 0));
        return row.map((x) => x / length);
      });
    case 'flat face': {
      // Everything above 0.5 in the first coordinate is pushed onto the face there.
      return gaussian.map((row) => row.map((x, j) => (j === 0 ? Math.min(x, 0.5) : x)));
    }
    default:
      return gaussian;
  }
}

/** A query of the named kind for the points, with the right answer. */
function ask(
  stream: Stream,
  points: Float64Array[],
  query: string,
): Pick<HullCase, 'points' | 'q' | 'inside'> {
  const n = points.length;
  const d = (points[0] as Float64Array).length;
  const some = (count: number): number[] =>
    Array.from({ length: count }, () => integer(stream, 0, n - 1));
  const mixture = (indices: readonly number[]): Float64Array => {
    const weights = indices.map(() => stream.gamma(1));
    const total = weights.reduce((s, w) => s + w, 0);
    return Float64Array.from({ length: d }, (_, j) =>
      indices.reduce(
        (s, i, k) =>
          s + ((weights[k] as number) / total) * ((points[i] as Float64Array)[j] as number),
        0,
      ),
    );
  };
  const ranges = columnRangesOf(points);
  // A direction in units of each column's range, and the point that goes farthest along it.
  const direction = ranges.map((range) => (range > 0 ? stream.normal() / range : 0));
  const heights = points.map((row) => row.reduce((s, x, j) => s + x * (direction[j] as number), 0));
  const top = heights.indexOf(Math.max(...heights));
  const beyond = (share: number): Float64Array =>
    Float64Array.from({ length: d }, (_, j) => {
      const range = ranges[j] as number;
      const step = range > 0 ? share * range * Math.sign(direction[j] as number) : share;
      return ((points[top] as Float64Array)[j] as number) + step;
    });
  switch (query) {
    case 'mixture of all':
      return { points, q: mixture(points.map((_, i) => i)), inside: true };
    case 'mixture of few':
      return { points, q: mixture(some(integer(stream, 1, d + 1))), inside: true };
    case 'edge':
      return { points, q: mixture(some(2)), inside: true };
    case 'a point':
      return { points, q: (points[some(1)[0] as number] as Float64Array).slice(), inside: true };
    case 'an extreme point':
      return { points, q: (points[top] as Float64Array).slice(), inside: true };
    case 'on a face': {
      // A mixture of the points that share the largest first coordinate.
      const high = Math.max(...points.map((row) => row[0] as number));
      const face = points.flatMap((row, i) => (row[0] === high ? [i] : []));
      return { points, q: mixture(face.slice(0, 2 * d)), inside: true };
    }
    case 'just beyond a point':
      return { points, q: beyond(1e-7), inside: false };
    case 'far beyond':
      return { points, q: beyond(1e4), inside: false };
    default:
      return { points, q: beyond(0.3), inside: false };
  }
}

function columnRangesOf(points: readonly Float64Array[]): number[] {
  return Array.from(points[0] as Float64Array, (_, j) => {
    const column = points.map((row) => row[j] as number);
    return Math.max(...column) - Math.min(...column);
  });
}

/** Why an answer is wrong, or null: checks the verdict and both certificates on the raw rows. */
export function faultOf(
  { cloud, points, q, inside }: HullCase,
  answer: {
    position: string;
    distance: number;
    weights: readonly { index: number; weight: number }[];
    separator: { normal: readonly number[]; offset: number } | null;
  },
): string | null {
  if (answer.position !== (inside ? 'inside' : 'outside')) return `says ${answer.position}`;
  const total = answer.weights.reduce((s, { weight }) => s + weight, 0);
  if (!(Math.abs(total - 1) < 1e-14)) return `weights sum to ${total}`;
  if (answer.weights.some(({ weight }) => !(weight > 0))) return 'a weight is not positive';
  if (answer.weights.length > q.length + 1) return 'more than d + 1 weights';
  const ranges = columnRangesOf(points);
  // Nearest hull point minus query, summed from differences.
  const off = Array.from(q, (x, j) =>
    answer.weights.reduce(
      (s, { index, weight }) => s + weight * (((points[index] as Float64Array)[j] as number) - x),
      0,
    ),
  );
  if (inside) {
    if (answer.separator !== null || answer.distance !== 0) return 'inside with a separator';
    const column = off.findIndex((x, j) => {
      const size = Math.max(...points.map((row) => Math.abs(row[j] as number)));
      return !(Math.abs(x) <= 1e-12 * (ranges[j] as number) + 1.5e-14 * size);
    });
    return column < 0 ? null : `column ${column} is not reproduced`;
  }
  if (answer.separator === null) return 'outside without a separator';
  const { normal, offset } = answer.separator;
  const length = Math.sqrt(normal.reduce((s, c) => s + c * c, 0));
  if (!(Math.abs(length - 1) < 1e-14)) return 'the normal is no unit vector';
  const height = (x: ArrayLike<number>): number =>
    normal.reduce((s, c, j) => s + c * (x[j] as number), 0);
  if (!(height(q) > offset)) return 'the query is not above the hyperplane';
  const above = points.findIndex((row) => !(height(row) < offset));
  if (above >= 0) return `point ${above} is not below the hyperplane`;
  const gap = Math.sqrt(off.reduce((s, x) => s + x * x, 0));
  // Weights are doubles: in the widest column they place the nearest point no better than this.
  const blur = 1e-15 * Math.max(...ranges);
  if (!(Math.abs(gap - answer.distance) <= 1e-12 * gap + blur)) {
    return `the nearest point is at ${gap}, not ${answer.distance}`;
  }
  // The hyperplane stands half-way, so it proves the distance from below; with columns of very
  // different units it may prove the verdict only.
  if (cloud === 'uneven units') return null;
  const proven = 2 * (height(q) - offset);
  if (
    !(
      proven >=
      answer.distance * (1 - 1e-9) - blur - 4e-16 * q.length * Math.max(...q.map(Math.abs))
    )
  ) {
    return `the hyperplane proves ${proven} only, not ${answer.distance}`;
  }
  return null;
}
