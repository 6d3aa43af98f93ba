/**
 * log V_k(Z) for many Z at once.
 *
 * V_k (coordinate-sum.ts) costs a hundred evaluations of a complex function at each Z, and an integral
 * over Z takes hundreds of values. For k up to 48, log V_k is interpolated by Chebyshev polynomials in
 * Z^2 on panels of unequal width, built where they are first needed; the last coefficients bound the
 * error, and a panel whose coefficients have not died down is left to direct evaluation, like all
 * larger k, whose integrands are so narrow that few values are taken.
 *
 * The coefficients depend on nothing but the panel and k, and making them is nine tenths of the work of a
 * query, so the next one finds them in a store of bounded size.
 */
import { erfKernel } from '../special/error-function.ts';
import { logGammaRatioKernel } from '../special/log-gamma.ts';
import { BLOCK, CoordinateSumTable, tableClass } from './coordinate-sum.ts';

const SQRT_HALF = Math.SQRT1_2;
const SQRT_TWO_PI = 2.5066282746310005;
const HALF_LOG_PI = 0.57236494292470009;
/** Largest k that is interpolated. */
const INTERPOLATED = 48;

/** Nodes of a panel for the k of a table with the given last k. */
function degreeOf(high: number): number {
  return high <= 12 ? 24 : high <= 24 ? 26 : 30;
}
/** Error at which the interpolant of one k on a panel is refused. */
const LARGEST_ERROR = 2e-13;
/** Panels start at multiples of this, but 2.4 besides: V_k has complex zeros near the axis beyond 1.6. */
const PANEL_WIDTH = 1.6;

/** Index of the panel of Z. */
function panelOf(Z: number): number {
  const index = Math.floor(Z / PANEL_WIDTH);
  return Z < 1.5 * PANEL_WIDTH ? index : index + 1;
}

/** Where a panel starts; the next one starts where it ends. */
function panelStart(index: number): number {
  return PANEL_WIDTH * (index < 2 ? index : index === 2 ? 1.5 : index - 1);
}

/** Coefficients of one block of k on a panel, or values at one Z, with their errors. */
interface Block {
  readonly values: Float64Array;
  readonly errors: Float64Array;
}

/** The interpolants made so far, by panel and first k: 1.3 kB each, emptied before it holds 2 MB. */
const INTERPOLANTS: Map<number, Block> = /* @__PURE__ */ new Map();
const MOST_INTERPOLANTS = 1500;

/** What is known at one Z, or on one panel, for all k so far. */
class Site {
  readonly points: readonly number[];
  private readonly tables = new Map<number, CoordinateSumTable[]>();
  readonly blocks = new Map<number, Block>();

  constructor(points: readonly number[]) {
    this.points = points;
  }

  tablesOf(low: number, high: number): CoordinateSumTable[] {
    let tables = this.tables.get(low);
    if (tables === undefined) {
      tables = this.points.map((Z) => new CoordinateSumTable(Z, low, high));
      this.tables.set(low, tables);
    }
    return tables;
  }
}

/** The transform with its memory: one per integral. */
export class CoordinateSumTransform {
  /** Bound on the error of the last logarithm. */
  error = 0;
  private readonly sites = new Map<number, Site>();
  private readonly panels = new Map<number, Site>();

  /** log V_k(Z) for k >= 1, V_1(Z) = 2 exp(-Z^2/2) + sqrt(2 pi) Z erf(Z / sqrt 2); sets `error`. */
  log(k: number, Z: number): number {
    this.error = 1e-15;
    if (k === 1) {
      return Math.log(2 * Math.exp(-0.5 * Z * Z) + SQRT_TWO_PI * Z * erfKernel(Z * SQRT_HALF));
    }
    if (Z < 1e-9) return Math.log(k - 1) + HALF_LOG_PI - logGammaRatioKernel((k - 1) / 2, 0.5);
    const [low, high] = tableClass(k);
    // Blocks of k of one parity, counted from the start of the class.
    const parity = (k - low) & 1;
    const start = low + parity + 2 * BLOCK * Math.floor((k - low) / (2 * BLOCK));
    const at = (k - start) / 2;
    if (k <= INTERPOLATED) {
      const index = panelOf(Z);
      const degree = degreeOf(high);
      const block = this.panelBlock(index, degree, start, low, high);
      this.error = block.errors[at] as number;
      if (this.error < Number.POSITIVE_INFINITY)
        return evaluate(block.values, degree, at, index, Z);
    }
    const block = this.directBlock(Z, start, low, high);
    this.error = block.errors[at] as number;
    return block.values[at] as number;
  }

  private directBlock(Z: number, start: number, low: number, high: number): Block {
    let site = this.sites.get(Z);
    if (site === undefined) {
      site = new Site([Z]);
      this.sites.set(Z, site);
    }
    let block = site.blocks.get(start);
    if (block === undefined) {
      block = { values: new Float64Array(BLOCK), errors: new Float64Array(BLOCK) };
      const [table] = site.tablesOf(low, high);
      table?.logBlock(start, block.values, block.errors, 0);
      site.blocks.set(start, block);
    }
    return block;
  }

  private panelBlock(
    index: number,
    degree: number,
    start: number,
    low: number,
    high: number,
  ): Block {
    // start <= INTERPOLATED
    const blockKey = 64 * index + start;
    const known = INTERPOLANTS.get(blockKey);
    if (known !== undefined) return known;
    const key = 64 * index + degree;
    let panel = this.panels.get(key);
    if (panel === undefined) {
      const points: number[] = [];
      for (let j = 0; j < degree; j++) {
        const x = Math.cos((Math.PI * (j + 0.5)) / degree);
        points.push(Math.sqrt(panelSquare(index, x)));
      }
      panel = new Site(points);
      this.panels.set(key, panel);
    }
    const block = interpolate(panel.tablesOf(low, high), start);
    if (INTERPOLANTS.size === MOST_INTERPOLANTS) INTERPOLANTS.clear();
    INTERPOLANTS.set(blockKey, block);
    return block;
  }
}

/** Z^2 at the coordinate x in [-1, 1] of a panel. */
function panelSquare(index: number, x: number): number {
  const from = panelStart(index);
  const to = panelStart(index + 1);
  return from * from + 0.5 * (to - from) * (to + from) * (1 + x);
}

/** Chebyshev coefficients of a block of k from the values at the nodes of a panel. */
function interpolate(tables: readonly CoordinateSumTable[], start: number): Block {
  const degree = tables.length;
  const values = new Float64Array(BLOCK * degree);
  const errors = new Float64Array(BLOCK);
  const samples = new Float64Array(BLOCK * degree);
  const bounds = new Float64Array(BLOCK);
  tables.forEach((table, j) => {
    table.logBlock(start, samples, bounds, j * BLOCK);
    for (let m = 0; m < BLOCK; m++) {
      errors[m] = Math.max(errors[m] as number, bounds[m] as number);
    }
  });
  for (let i = 0; i < degree; i++) {
    for (let j = 0; j < degree; j++) {
      const c = ((i === 0 ? 1 : 2) / degree) * Math.cos((Math.PI * i * (j + 0.5)) / degree);
      for (let m = 0; m < BLOCK; m++) {
        const at = m * degree + i;
        values[at] = (values[at] as number) + c * (samples[j * BLOCK + m] as number);
      }
    }
  }
  for (let m = 0; m < BLOCK; m++) {
    // The coefficients left out fall like the last ones kept.
    let rest = 0;
    for (let i = degree - 3; i < degree; i++)
      rest += 2 * Math.abs(values[m * degree + i] as number);
    const bound = (errors[m] as number) + rest;
    errors[m] = bound < LARGEST_ERROR ? bound : Number.POSITIVE_INFINITY;
  }
  return { values, errors };
}

/** Clenshaw's rule for the m-th of a block of interpolants. */
function evaluate(
  values: Float64Array,
  degree: number,
  m: number,
  index: number,
  Z: number,
): number {
  const from = panelStart(index);
  const to = panelStart(index + 1);
  const x2 = (4 * (Z - from) * (Z + from)) / ((to - from) * (to + from)) - 2;
  const first = m * degree;
  let b1 = 0;
  let b2 = 0;
  for (let i = first + degree - 1; i > first; i--) {
    const b = x2 * b1 - b2 + (values[i] as number);
    b2 = b1;
    b1 = b;
  }
  return 0.5 * x2 * b1 - b2 + (values[first] as number);
}
