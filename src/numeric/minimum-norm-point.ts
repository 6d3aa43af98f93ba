/**
 * The point of smallest norm in a convex hull, by an active-set method on a QR factorisation.
 *
 * With the atoms $p_i$ as columns $a_i = (1, p_i)$, non-negative least squares
 * $\min_{u \ge 0} |\sum u_i a_i - e_0|$ has the nearest point $x = \sum u_i p_i / \sum u_i$ as its
 * solution, and its residual $r$ gives the hyperplane that proves it: with
 * $c = -r_{1..d} / |r_{1..d}|$ every atom has $c \cdot p_i \ge |x|$. Each step adds the atom that the
 * current hyperplane cuts off worst and drops atoms whose weight would turn negative (Finding the
 * nearest point in a polytope, Mathematical Programming, 1976, doi:10.1007/BF01580381).
 *
 * The columns of the active atoms are kept as Q R, orthogonalised twice; normal equations would
 * square the condition. The residual is orthogonalised twice too, so the unit normal stays right to
 * rounding however near the origin the hull comes: distances are resolved to about 1e-15 of the
 * largest coordinate. Callers scale so that the largest coordinate is about 1 and check what they
 * get: nothing here is assumed to have converged.
 */

/** A finite set of points, perhaps implicit, that can say which of them is lowest in a direction. */
export interface AtomSet {
  /** Dimension of the points. */
  readonly dimension: number;
  /** Number of points. */
  readonly size: number;
  /** Index of an atom with the smallest product with `direction`; those below `level` matter. */
  lowest(direction: Float64Array, level: number): number;
  /**
   * The same among a working set much smaller than the whole, where there is one. `lowest` adds to
   * it what it finds, and says the last word.
   */
  lowestAtHand?(direction: Float64Array): number;
  /** Writes the atom's coordinates to `out`, from position `start` on. */
  read(index: number, out: Float64Array, start: number): void;
}

/** What the method found; `lower` and `upper` enclose the distance up to rounding. */
export interface MinimumNormPoint {
  /** Atoms of the nearest point, affinely independent. */
  readonly atoms: readonly number[];
  /** Their weights, positive, with sum 1. */
  readonly weights: readonly number[];
  /** The point itself. */
  readonly point: Float64Array;
  /** Its norm: no hull point is needed that is farther. */
  readonly upper: number;
  /** Unit vector with the best lower bound, or zero when the hull holds the origin. */
  readonly normal: Float64Array;
  /** The smallest product of an atom with `normal`: when positive, no hull point is nearer. */
  readonly lower: number;
}

/** Gap between the bounds, in units of the largest coordinate, that ends the search. */
const GAP = 4e-15;
/** The working set is good enough while it offers an atom this share of the distance below. */
const AT_HAND = 1e-3;
/** A column whose part outside the span of the others is shorter than this share depends on them. */
const DEPENDENT = 1e-14;

/** Nearest point to the origin in the hull of the atoms, started from the atom `first`. */
export function minimumNormPoint(set: AtomSet, first: number): MinimumNormPoint {
  const d = set.dimension;
  const factor = new ActiveSet(set, d + 1);
  const normal = new Float64Array(d);
  const bestNormal = new Float64Array(d);
  const insideNorm = 1e-15 * Math.sqrt(d + 1);
  const maxSteps = 200 + 40 * d;
  let lower = Number.NEGATIVE_INFINITY;
  let last = Number.POSITIVE_INFINITY;
  let fresh = true;
  factor.enter(first);
  for (let step = 0; step < maxSteps; step++) {
    const norm = factor.residual();
    if (norm <= insideNorm) break;
    // No progress: rounding in the updates, or the end. A fresh factorisation tells which.
    if (!(norm < last)) {
      if (fresh) break;
      factor.refresh();
      fresh = true;
      last = Number.POSITIVE_INFINITY;
      continue;
    }
    last = norm;
    const distance = factor.hyperplane(normal);
    if (set.lowestAtHand !== undefined) {
      const atHand = set.lowestAtHand(normal);
      if (factor.product(atHand, normal) < distance * (1 - AT_HAND) && factor.enter(atHand)) {
        fresh = false;
        continue;
      }
    }
    const candidate = set.lowest(normal, distance);
    const value = factor.product(candidate, normal);
    if (value > lower) {
      lower = value;
      bestNormal.set(normal);
    }
    if (distance - value <= GAP * Math.sqrt(d) || !factor.enter(candidate)) {
      if (fresh) break;
      factor.refresh();
      fresh = true;
      last = Number.POSITIVE_INFINITY;
      continue;
    }
    fresh = false;
  }
  factor.refresh();
  return { ...factor.solution(d), normal: bestNormal, lower };
}

/** The active atoms with the factorisation of their columns and their weights. */
class ActiveSet {
  /** Scratch for the column (1, p) of an atom. */
  private readonly column: Float64Array;
  private readonly set: AtomSet;
  /** Length of a column. */
  private readonly m: number;
  /** Most active atoms, which is also the length of a column of t. */
  private readonly most: number;
  private k = 0;
  private readonly atoms: number[] = [];
  /** Weights, not yet with sum 1, and the least-squares solution that they move to. */
  private readonly u: Float64Array;
  private readonly s: Float64Array;
  /** The residual. */
  private readonly r: Float64Array;
  /** Orthonormal columns, one after the other. */
  private readonly q: Float64Array;
  /** Upper triangle, column by column. */
  private readonly t: Float64Array;

  constructor(set: AtomSet, m: number) {
    this.set = set;
    this.m = m;
    this.most = Math.min(set.size, m);
    this.column = new Float64Array(m);
    this.u = new Float64Array(this.most);
    this.s = new Float64Array(this.most);
    this.r = new Float64Array(m);
    this.q = new Float64Array(m * this.most);
    this.t = new Float64Array(this.most * this.most);
  }

  /** Residual of e_0, orthogonal to the active columns to rounding; returns its norm. */
  residual(): number {
    const { r } = this;
    r.fill(0);
    r[0] = 1;
    this.project(r, -1);
    this.project(r, -1);
    return Math.sqrt(squaredNorm(r, 0, this.m));
  }

  /** Subtracts from v its part in the span; adds the coefficients to column `into` of t. */
  private project(v: Float64Array, into: number): void {
    const { q, t, m, k, most } = this;
    for (let c = 0; c < k; c++) {
      const start = c * m;
      let sum = 0;
      for (let i = 0; i < m; i++) sum += (q[start + i] as number) * (v[i] as number);
      for (let i = 0; i < m; i++) v[i] = (v[i] as number) - sum * (q[start + i] as number);
      if (into >= 0) t[into * most + c] = (t[into * most + c] as number) + sum;
    }
  }

  /** Unit normal of the hyperplane of the active atoms; returns its distance from the origin. */
  hyperplane(normal: Float64Array): number {
    const { r, m } = this;
    const length = Math.sqrt(squaredNorm(r, 1, m));
    for (let j = 1; j < m; j++) normal[j - 1] = -(r[j] as number) / length;
    return (r[0] as number) / length;
  }

  /** Product of an atom with a direction. */
  product(atom: number, direction: Float64Array): number {
    const { column, m } = this;
    this.set.read(atom, column, 1);
    let sum = 0;
    for (let j = 1; j < m; j++) sum += (direction[j - 1] as number) * (column[j] as number);
    return sum;
  }

  /** Appends the atom to the factorisation; false when its column depends on the others. */
  private append(atom: number): boolean {
    const { column, q, t, m, k, most } = this;
    if (k === most) return false;
    this.set.read(atom, column, 1);
    column[0] = 1;
    const size = Math.sqrt(squaredNorm(column, 0, m));
    t.fill(0, k * most, (k + 1) * most);
    this.project(column, k);
    this.project(column, k);
    const rest = Math.sqrt(squaredNorm(column, 0, m));
    if (!(rest > DEPENDENT * size)) return false;
    for (let i = 0; i < m; i++) q[k * m + i] = (column[i] as number) / rest;
    t[k * most + k] = rest;
    this.atoms[k] = atom;
    this.u[k] = 0;
    this.k = k + 1;
    return true;
  }

  /** Adds an atom and restores positive weights; false when rounding leaves no such step. */
  enter(atom: number): boolean {
    if (!this.append(atom)) return false;
    // The new weight has the sign of the residual's product with the column: no step if not positive.
    if (!((this.q[(this.k - 1) * this.m] as number) > 0)) {
      this.k--;
      return false;
    }
    this.restore();
    return true;
  }

  /** Moves the weights to the least-squares solution, dropping atoms that would turn negative. */
  private restore(): void {
    const { u, s } = this;
    while (this.k > 0) {
      this.solve();
      let step = 1;
      let leaving = -1;
      for (let i = 0; i < this.k; i++) {
        const ui = u[i] as number;
        const si = s[i] as number;
        if (si > 0) continue;
        const ratio = ui > 0 ? ui / (ui - si) : 0;
        if (leaving < 0 || ratio < step) {
          step = ratio;
          leaving = i;
        }
      }
      if (leaving < 0) {
        u.set(s);
        return;
      }
      for (let i = 0; i < this.k; i++) {
        u[i] = (u[i] as number) + step * ((s[i] as number) - (u[i] as number));
      }
      u[leaving] = 0;
      for (let i = this.k - 1; i >= 0; i--) if (!((u[i] as number) > 0)) this.remove(i);
    }
  }

  /** Back substitution: s solves t s = (row 0 of q), the least-squares solution for e_0. */
  private solve(): void {
    const { q, t, s, m, k, most } = this;
    for (let i = k - 1; i >= 0; i--) {
      let sum = q[i * m] as number;
      for (let j = i + 1; j < k; j++) sum -= (t[j * most + i] as number) * (s[j] as number);
      s[i] = sum / (t[i * most + i] as number);
    }
  }

  /** Drops the atom at position p and rotates the factorisation back into triangular form. */
  private remove(p: number): void {
    const { q, t, u, m, most: stride } = this;
    const k = this.k - 1;
    this.atoms.splice(p, 1);
    u.copyWithin(p, p + 1, k + 1);
    t.copyWithin(p * stride, (p + 1) * stride, (k + 1) * stride);
    for (let i = p; i < k; i++) {
      const a = t[i * stride + i] as number;
      const b = t[i * stride + i + 1] as number;
      const length = Math.sqrt(a * a + b * b);
      if (length === 0) continue;
      const cos = a / length;
      const sin = b / length;
      for (let j = i; j < k; j++) {
        const x = t[j * stride + i] as number;
        const y = t[j * stride + i + 1] as number;
        t[j * stride + i] = cos * x + sin * y;
        t[j * stride + i + 1] = cos * y - sin * x;
      }
      for (let row = 0; row < m; row++) {
        const x = q[i * m + row] as number;
        const y = q[(i + 1) * m + row] as number;
        q[i * m + row] = cos * x + sin * y;
        q[(i + 1) * m + row] = cos * y - sin * x;
      }
    }
    this.k = k;
  }

  /** Factorises the active columns anew and solves for the weights again. */
  refresh(): void {
    const atoms = this.atoms.splice(0);
    const weights = this.u.slice(0, this.k);
    this.k = 0;
    atoms.forEach((atom, i) => {
      if (this.append(atom)) this.u[this.k - 1] = weights[i] as number;
    });
    this.restore();
  }

  /** The nearest point of the active atoms' hull, summed from the atoms themselves. */
  solution(d: number): Pick<MinimumNormPoint, 'atoms' | 'weights' | 'point' | 'upper'> {
    const { k, u, column } = this;
    let total = 0;
    for (let i = 0; i < k; i++) total += u[i] as number;
    const point = new Float64Array(d);
    const weights: number[] = [];
    const atoms = this.atoms.slice(0, k);
    atoms.forEach((atom, i) => {
      const weight = (u[i] as number) / total;
      weights.push(weight);
      this.set.read(atom, column, 1);
      for (let j = 0; j < d; j++) {
        point[j] = (point[j] as number) + weight * (column[j + 1] as number);
      }
    });
    return { atoms, weights, point, upper: Math.sqrt(squaredNorm(point, 0, d)) };
  }
}

/** Sum of squares of v[from..to-1]. */
function squaredNorm(v: Float64Array, from: number, to: number): number {
  let sum = 0;
  for (let i = from; i < to; i++) sum += (v[i] as number) * (v[i] as number);
  return sum;
}
