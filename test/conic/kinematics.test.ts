import fc from 'fast-check';
import { DomainError } from 'hullgauge';
import {
  approxPolyhedralCone,
  type Cone,
  circularCone,
  coneMeetsSubspace,
  conesMeet,
  originInHull,
  orthant,
  polarCone,
  productCone,
  ray,
  subspace,
  weylChamber,
} from 'hullgauge/conic';
import { incompleteBeta } from 'hullgauge/special';
import { describe, expect, it } from 'vitest';
import { certainty } from '../../src/probability.ts';
import { statesExact } from '../support/exactness.ts';

const close = (a: number, b: number, tolerance: number): void =>
  expect(a === b ? 0 : Math.abs(a - b)).toBeLessThanOrEqual(tolerance);

describe('conesMeet', () => {
  it('of two circular cones is a cap probability', () => {
    // they meet iff their axes are at most a + b apart
    fc.assert(
      fc.property(
        fc.integer({ min: 2, max: 60 }),
        fc.double({ min: 0.01, max: 1.5, noNaN: true }),
        fc.double({ min: 0.01, max: 1.5, noNaN: true }),
        (n, a, b) => {
          const sine = Math.sin(a + b);
          const cosine = Math.cos(a + b);
          const cap = incompleteBeta((n - 1) / 2, 0.5, sine * sine, cosine * cosine);
          const wide = a + b > Math.PI / 2;
          const exact = wide ? 1 - cap.value / 2 : cap.value / 2;
          const small = wide ? cap.value / 2 : exact;
          const p = conesMeet(circularCone(n, a), circularCone(n, b));
          close(p.value, exact, 1e-13);
          // both tails relatively: the angle a + b is rounded, which a narrow cap magnifies
          const computed = wide ? p.complement : p.value;
          if (small > 1e-200) close(Math.log(computed), Math.log(small), 1e-11);
        },
      ),
      { numRuns: 200 },
    );
  });

  it('is exactly one half of two symmetric cones', () => {
    for (const cone of [orthant(3), orthant(20), orthant(40), circularCone(7, Math.PI / 4)]) {
      for (const other of [cone, polarCone(cone)]) {
        const p = conesMeet(cone, other);
        expect([p.value, p.complement, statesExact(p)]).toEqual([0.5, 0.5, true]);
      }
    }
    // exact sums of exact products: 2 v_4 of the orthant of R^5, and of that of R^4 with a line
    const flat = productCone(orthant(2), subspace({ dimension: 0, ambient: 1 }));
    const p = conesMeet(flat, orthant(3));
    expect([p.value, statesExact(p)]).toEqual([0.3125, true]);
    const line = productCone(subspace({ dimension: 1, ambient: 1 }), orthant(2));
    expect(conesMeet(line, flat).value).toBe(0.5);
  });

  it('is symmetric, and one minus that of the polars', () => {
    const cones = [orthant(8), circularCone(8, 0.3), weylChamber('B', 8), weylChamber('A', 8)];
    for (const first of cones) {
      for (const second of cones) {
        const p = conesMeet(first, second);
        const q = conesMeet(second, first);
        close(p.value, q.value, 1e-15);
        const polar = conesMeet(polarCone(first), polarCone(second));
        close(polar.value, p.complement, 1e-14);
        close(polar.log, p.logComplement, 1e-13 * Math.max(1, Math.abs(polar.log)));
      }
    }
  });

  it('with a subspace is the Crofton formula', () => {
    for (const cone of [orthant(9), circularCone(9, 1.1), weylChamber('A', 9)]) {
      for (let codimension = 0; codimension <= 9; codimension++) {
        const p = coneMeetsSubspace(cone, { codimension });
        const q = conesMeet(cone, subspace({ dimension: 9 - codimension, ambient: 9 }));
        close(p.value, q.value, 1e-15);
        close(p.complement, q.complement, 1e-15);
      }
    }
  });

  it('of subspaces is a count of dimensions', () => {
    const space = (dimension: number): Cone => subspace({ dimension, ambient: 6 });
    expect(conesMeet(space(3), space(3)).value).toBe(0);
    expect(conesMeet(space(3), space(4)).value).toBe(1);
    expect(conesMeet(space(0), space(6)).value).toBe(0);
    expect(coneMeetsSubspace(space(3), { codimension: 3 }).value).toBe(0);
    expect(coneMeetsSubspace(space(4), { codimension: 3 }).value).toBe(1);
  });

  it('keeps both tails past underflow', () => {
    const p = conesMeet(circularCone(4000, 0.2), circularCone(4000, 0.3));
    expect(p.value).toBe(0);
    // (1/2) I_{sin^2 0.5}(3999/2, 1/2)
    const cap = incompleteBeta(3999 / 2, 0.5, Math.sin(0.5) ** 2, Math.cos(0.5) ** 2);
    close(p.log, cap.log - Math.LN2, 1e-9);
    expect(conesMeet(circularCone(4000, 1.2), circularCone(4000, 1.3)).logComplement).toBeLessThan(
      -800,
    );
  });

  it('refuses what is no cone, and different dimensions', () => {
    expect(() => conesMeet(orthant(3), orthant(4))).toThrow(
      'conesMeet: second must be a cone in dimension 3',
    );
    expect(() => conesMeet(3 as never, orthant(4))).toThrow(DomainError);
  });
});

describe('coneMeetsSubspace', () => {
  it("of an orthant is Wendel's formula", () => {
    for (const n of [1, 2, 5, 40, 301]) {
      for (let codimension = 0; codimension <= n; codimension += Math.ceil(n / 9)) {
        const p = coneMeetsSubspace(orthant(n), { codimension });
        const q = originInHull({ n, d: codimension });
        close(p.value, q.value, 4e-15);
        close(p.log, q.log, 4e-15 * Math.max(1, Math.abs(q.log)));
        close(p.logComplement, q.logComplement, 4e-15 * Math.max(1, Math.abs(q.logComplement)));
      }
    }
  });

  it('of an exact cone is exact, and says so', () => {
    for (const n of [1, 2, 3, 10, 37, 50]) {
      for (let codimension = 1; codimension < n; codimension++) {
        const p = coneMeetsSubspace(orthant(n), { codimension });
        const q = originInHull({ n, d: codimension });
        expect([p.value, p.complement, statesExact(p)]).toEqual([q.value, q.complement, true]);
      }
      expect(coneMeetsSubspace(orthant(n), { codimension: n })).toEqual(certainty(false));
      expect(coneMeetsSubspace(orthant(n), { codimension: 0 })).toEqual(certainty(true));
    }
    const padded = productCone(orthant(5), subspace({ dimension: 2, ambient: 4 }));
    const p = coneMeetsSubspace(padded, { codimension: 4 });
    expect([p.value, statesExact(p)]).toEqual([0.6875, true]);
    expect(statesExact(coneMeetsSubspace(weylChamber('B', 8), { codimension: 2 }))).toBe(false);
  });

  it('is one half in the middle of a symmetric cone, and only there', () => {
    const symmetric = [
      orthant(300),
      circularCone(7, Math.PI / 4),
      productCone(orthant(51), circularCone(9, Math.PI / 4)),
      productCone(orthant(60), subspace({ dimension: 3, ambient: 8 })),
      polarCone(orthant(80)),
      JSON.parse(JSON.stringify(circularCone(1000, Math.PI / 4))) as Cone,
    ];
    for (const cone of symmetric) {
      const middle = (cone.lineality + cone.dimension) / 2;
      if (Number.isInteger(middle)) {
        const p = coneMeetsSubspace(cone, { codimension: middle });
        expect([p.value, p.complement, statesExact(p)]).toEqual([0.5, 0.5, true]);
      }
      const whole = Math.ceil(middle);
      const above = coneMeetsSubspace(cone, { codimension: whole + 1 });
      const below = coneMeetsSubspace(cone, { codimension: 2 * middle - whole - 1 });
      close(above.value, below.complement, 1e-13);
      expect([statesExact(above), above.value < 0.5]).toEqual([false, true]);
    }
    // a half within rounding, but not known to be one
    const beside = circularCone(8, 0.7853981633974484);
    const p = coneMeetsSubspace(beside, { codimension: 4 });
    close(p.value, 0.5, 1e-15);
    expect(statesExact(p)).toBe(false);
  });

  it('falls with the codimension, from certainty to impossibility', () => {
    const cone = productCone(subspace({ dimension: 2, ambient: 2 }), circularCone(20, 0.9));
    let last = Number.POSITIVE_INFINITY;
    for (let codimension = 0; codimension <= 22; codimension++) {
      const p = coneMeetsSubspace(cone, { codimension });
      if (codimension <= 2) expect(p).toMatchObject({ value: 1, complement: 0 });
      else if (codimension < 22) expect(p.log).toBeLessThan(last);
      last = p.log;
    }
    expect(coneMeetsSubspace(cone, { codimension: 22 })).toMatchObject({ value: 0, complement: 1 });
    expect(coneMeetsSubspace(ray(), { codimension: 0 }).value).toBe(1);
    expect(coneMeetsSubspace(ray(), { codimension: 1 }).value).toBe(0);
  });

  it('covers the difference of two cones by the stated errors', () => {
    // the same cone as a product of rays and as an orthant
    let product = ray();
    for (let i = 1; i < 30; i++) product = productCone(product, ray());
    for (let codimension = 1; codimension < 30; codimension++) {
      const p = coneMeetsSubspace(product, { codimension });
      const q = coneMeetsSubspace(orthant(30), { codimension });
      const small = codimension >= 15 ? 'log' : 'logComplement';
      close(p[small], q[small], p.logError + q.logError);
      expect(p.logError).toBeLessThan(1e-12);
    }
  });

  it('says four standard errors of a simulated cone', () => {
    const rays = Array.from({ length: 8 }, (_, i) =>
      Array.from({ length: 8 }, (_, j) => (j >= i ? 1 : 0)),
    );
    const simulated = approxPolyhedralCone(rays, { trials: 4000, seed: 5 });
    const exact = weylChamber('B', 8);
    for (const codimension of [1, 2, 3]) {
      const p = coneMeetsSubspace(simulated, { codimension });
      const q = coneMeetsSubspace(exact, { codimension });
      const small = q.value < 0.5 ? 'log' : 'logComplement';
      close(p[small], q[small], p.logError);
      expect(p.logError).toBeGreaterThan(1e-3);
      const meets = conesMeet(simulated, orthant(8));
      close(meets.log, conesMeet(exact, orthant(8)).log, meets.logError);
    }
  });

  it('refuses bad input', () => {
    expect(() => coneMeetsSubspace(orthant(3), { codimension: 4 })).toThrow('codimension must be');
    expect(() => coneMeetsSubspace(orthant(3), { codim: 1 } as never)).toThrow(DomainError);
    expect(() => coneMeetsSubspace({} as never, { codimension: 1 })).toThrow('cone must be a cone');
  });
});
