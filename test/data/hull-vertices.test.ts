import { gaussian, uniformSphere } from 'hullgauge';
import { hullVertices, inHull, interpolationAudit, sampler, separable } from 'hullgauge/data';
import { describe, expect, it } from 'vitest';
import { randomStream } from '../../src/numeric/random.ts';
import { makeCloud } from './hull-cases.ts';

const KINDS = [
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
];

/** First occurrences that are not inside the hull of all different points. */
function verticesByDefinition(points: readonly Float64Array[]): number[] {
  const keys = points.map((row) => row.join());
  return points.flatMap((row, i) => {
    if (keys.indexOf(keys[i] as string) < i) return [];
    const others = points.filter((_, k) => keys[k] !== keys[i]);
    return others.length === 0 || inHull(others, row).position === 'outside' ? [i] : [];
  });
}

describe('hullVertices', () => {
  it.each(KINDS)('is what the definition says on clouds of the kind %s', async (cloud) => {
    for (let index = 0; index < 20; index++) {
      const stream = randomStream(300 + index);
      const n = 1 + Math.floor(60 * stream.uniform());
      const points = makeCloud(stream, cloud, n, 1 + Math.floor(6 * stream.uniform()));
      expect([index, await hullVertices(points)]).toEqual([index, verticesByDefinition(points)]);
    }
  });

  it('knows the corners of a full grid and the ends of a line', async () => {
    const grid = Array.from({ length: 5 ** 3 }, (_, i) => [
      i % 5,
      Math.floor(i / 5) % 5,
      Math.floor(i / 25),
    ]);
    expect(await hullVertices(grid)).toEqual([0, 4, 20, 24, 100, 104, 120, 124]);
    expect(await hullVertices([3, 1, 4, 1, 5, 9, 2, 6].map((x) => [x, 2 * x]))).toEqual([1, 5]);
    expect(await hullVertices([[7], [7], [7]])).toEqual([0]);
    expect(await hullVertices([[0, 0]])).toEqual([0]);
  });

  it('lists every point of a sphere', async () => {
    const draw = sampler(uniformSphere(), { d: 5, seed: 9 });
    const points = Array.from({ length: 250 }, draw);
    expect(await hullVertices(points)).toEqual(points.map((_, i) => i));
  });

  it('keeps one of several points that rounding cannot tell apart', async () => {
    const corner = [
      [0, 0],
      [1, 0],
      [0, 1],
      [1 + 1e-15, 1],
      [1, 1 + 1e-15],
      [1, 1],
    ];
    const vertices = await hullVertices(corner);
    expect(vertices.slice(0, 3)).toEqual([0, 1, 2]);
    expect(vertices).toHaveLength(4);
  });

  it('tells integers apart wherever they lie', async () => {
    for (const far of [0, 2 ** 47, -(2 ** 51), 2 ** 52 - 8]) {
      const square = [
        [far, 0],
        [far + 4, 0],
        [far + 4, 4],
        [far, 4],
        [far + 2, 2],
      ];
      expect(await hullVertices(square)).toEqual([0, 1, 2, 3]);
      expect(inHull(square, [far + 5, 2])).toMatchObject({ position: 'outside', distance: 1 });
      expect(inHull(square, [far + 1, 2]).position).toBe('inside');
      const { kind, margin, rank } = separable(square, [1, 0, 0, 1, 0]);
      expect({ kind, margin, rank }).toEqual({ kind: 'complete', margin: 1, rank: 2 });
      const { rank: flat, insideRate } = await interpolationAudit(square);
      expect([flat, insideRate]).toEqual([2, 0.2]);
    }
  });

  it('settles 2,000 points in 10 dimensions with progress on the way', async () => {
    const draw = sampler(gaussian(), { d: 10, seed: 3 });
    const points = Array.from({ length: 2000 }, draw);
    const seen: number[] = [];
    let timers = 0;
    const timer = setInterval(() => timers++, 1);
    const vertices = await hullVertices(points, {
      onProgress: (done, total) => {
        expect(total).toBe(2000);
        seen.push(done);
      },
    });
    clearInterval(timer);
    // Other tasks ran in between.
    expect(timers).toBeGreaterThan(2);
    expect(seen.length).toBeGreaterThan(5);
    expect(seen).toEqual(seen.slice().sort((a, b) => a - b));
    expect(seen.at(-1)).toBe(2000);
    // Every point left out is inside the hull of those listed: checked for some.
    const listed = new Set(vertices);
    const hull = vertices.map((i) => points[i] as Float64Array);
    const left = points.filter((_, i) => !listed.has(i));
    for (const row of left.slice(0, 30)) expect(inHull(hull, row).position).toBe('inside');
    for (const i of vertices.slice(0, 30)) {
      expect(
        inHull(
          points.filter((_, k) => k !== i),
          points[i] as Float64Array,
        ).position,
      ).toBe('outside');
    }
  });

  it('stops when called off, before and on the way', async () => {
    const points = Array.from({ length: 1500 }, sampler(gaussian(), { d: 8, seed: 4 }));
    await expect(hullVertices(points, { signal: { aborted: true } })).rejects.toMatchObject({
      name: 'AbortError',
      message: 'hullVertices: aborted after 0 of 1500',
    });
    const controller = new AbortController();
    const run = hullVertices(points, {
      signal: controller.signal,
      onProgress: () => controller.abort(),
    });
    await expect(run).rejects.toThrow(/^hullVertices: aborted after \d+ of 1500$/);
  });

  it('refuses bad arguments', async () => {
    await expect(hullVertices([[1], [Number.NaN]])).rejects.toThrow(
      'points[1][0] must be a finite number, got NaN',
    );
    await expect(hullVertices([])).rejects.toThrow('points must be an array of at least one row');
    await expect(hullVertices([[1]], { onProgress: 3 as never })).rejects.toThrow(
      'onProgress must be a function',
    );
    await expect(hullVertices([[1]], { signal: true as never })).rejects.toThrow(
      'signal must be an object',
    );
    await expect(hullVertices([[1]], { progress: 1 } as never)).rejects.toThrow('progress');
  });
});
