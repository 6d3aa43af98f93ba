import { describe, expect, it } from 'vitest';
import { dot, orthogonal, orthonormalBasis, unit } from '../../src/numeric/small-vectors.ts';
import { planeAngle, simplicialAngle, spaceAngle } from '../../src/numeric/solid-angle.ts';

describe('angles as fractions', () => {
  it('of the plane are accurate near 0 and near a half', () => {
    for (const angle of [1e-9, 1e-4, 1, 3, Math.PI - 1e-9]) {
      const computed = planeAngle([1, 0], [Math.cos(angle), Math.sin(angle)]) * 2 * Math.PI;
      expect(Math.abs(computed / angle - 1)).toBeLessThan(1e-14 + 2e-16 / angle);
    }
  });

  it('of space have the values of the regular solids', () => {
    const octant = [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ];
    expect(spaceAngle(octant)).toBeCloseTo(1 / 8, 15);
    const face = [
      [1, 1, 1],
      [1, -1, 1],
      [-1, -1, 1],
      [-1, 1, 1],
    ].map(unit);
    expect(spaceAngle(face)).toBeCloseTo(1 / 6, 15);
    // in any order
    expect(spaceAngle([face[2], face[0], face[3], face[1]] as number[][])).toBeCloseTo(1 / 6, 15);
  });

  it('of thin wedges do not lose their digits', () => {
    // a lune of angle e between two nearly opposite rays, cut by a third
    for (const e of [1e-3, 1e-6]) {
      const rays = [
        [1, 0, 1e-3],
        [-1, 0, 1e-3],
        [0, Math.sin(e), Math.cos(e)],
      ].map(unit);
      const mirrored = [
        [1, 0, 1e-3],
        [-1, 0, 1e-3],
        [0, -Math.sin(e), Math.cos(e)],
      ].map(unit);
      const [a, b] = [spaceAngle(rays), spaceAngle(mirrored)];
      expect(Math.abs(a / b - 1)).toBeLessThan(1e-9);
    }
  });

  it('of four dimensions are orthant probabilities', () => {
    const axes = [0, 1, 2, 3].map((i) => [0, 1, 2, 3].map((j) => (i === j ? 1 : 0)));
    expect(simplicialAngle(axes).value).toBeCloseTo(1 / 16, 16);
    // chamber of type B: 1/(2^4 4!)
    const chamber = [
      [1, 0, 0, 0],
      [1, 1, 0, 0],
      [1, 1, 1, 0],
      [1, 1, 1, 1],
    ].map(unit);
    const { value, error } = simplicialAngle(chamber);
    expect(Math.abs(value - 1 / 384)).toBeLessThanOrEqual(error);
    expect(error).toBeLessThan(1e-14);
  });
});

describe('small vectors', () => {
  it('find the orthogonal direction and an orthonormal basis', () => {
    const rows = [
      [1, 2, 0, 1],
      [0, 1, 1, 3],
      [2, 0, 1, 1],
    ];
    const normal = orthogonal(rows, 4);
    for (const row of rows) expect(dot(row, normal)).toBeCloseTo(0, 12);
    const basis = orthonormalBasis([...rows, [3, 3, 2, 5]], 1e-10);
    expect(basis).toHaveLength(3);
    basis.forEach((a, i) => {
      basis.forEach((b, j) => {
        expect(dot(a, b)).toBeCloseTo(i === j ? 1 : 0, 15);
      });
    });
  });
});
