/**
 * Rows of `test/reference/faces.json` as numbers that the library computes, each with the error that
 * it states: logarithms of small tails, of expected numbers, and of the integrals behind them.
 */
import { Decimal } from 'decimal.js';
import {
  betaLaw,
  expectedFaces,
  gaussian,
  type Law,
  LogNumber,
  nextPointInHull,
  type Probability,
  pointInHull,
  projectedFaces,
  studentT,
} from 'hullgauge';
import { BetaAngles } from '../../src/numeric/beta-angles.ts';
import { betaContourKernel } from '../../src/numeric/beta-contour.ts';
import { BetaTail } from '../../src/numeric/beta-tail.ts';
import { CoordinateSumTransform } from '../../src/numeric/coordinate-sum-transform.ts';
import { FixedQuerySequence } from '../../src/numeric/fixed-query.ts';
import { logNegativeOrthantKernel, logPositiveOrthantKernel } from '../../src/numeric/orthant.ts';
import { complementOf } from '../../src/probability.ts';
import { logGammaRatioKernel } from '../../src/special/log-gamma.ts';
import { type NamedRow, readTable } from './reference.ts';

/** One number of the table. */
export interface FaceRow {
  /** What is measured, as the accuracy table prints it. */
  readonly name: string;
  readonly region: string;
  readonly args: NamedRow['args'];
  /** The exact logarithm. */
  readonly exact: string;
  readonly compute: () => Computed;
}

/** A computed logarithm with the bound stated for it. */
export interface Computed {
  readonly log: number;
  readonly logError: number;
}

const POLYTOPES = {
  T: 'simplex',
  T0: 'simplexWithOrigin',
  C: 'crosspolytope',
  O: 'cube',
} as const;

/** Arguments of a row; numbers that are not small integers are strings. */
interface Args {
  readonly n?: number | string;
  readonly d?: number;
  readonly k?: number;
  readonly N?: number;
  readonly kind?: keyof typeof POLYTOPES;
  readonly sigma2?: string;
  readonly r?: string;
  readonly Z?: string;
  readonly alpha?: number | string;
  readonly beta?: string;
  readonly nu?: string;
  readonly vertices_per_face?: number;
  readonly face_vertices?: number;
  readonly simplex_vertices?: number;
}

const Ruler = Decimal.clone({ precision: 50, defaults: true });
const error = new Float64Array(1);

/** A kernel's logarithm with its bound. */
function withBound(kernel: (bound: Float64Array) => number): Computed {
  const log = kernel(error);
  return { log, logError: error[0] as number };
}

/** Gaussian and beta rows by dimension or, without one, by the size of the largest parameter. */
function regionOf(args: Args): string {
  const { d, N, n, k, alpha, simplex_vertices: m } = args;
  const size = Number(d ?? alpha ?? m ?? N ?? k ?? n);
  return size <= 100 ? 'd <= 100' : size <= 500 ? 'd <= 500' : 'd > 500';
}

const smallTail = (p: Probability): number => Math.min(p.log, p.logComplement);

/** The row of a probability: value is the probability itself, or its complement if `outside`. */
function tailRow(row: NamedRow, name: string, outside: boolean, ask: () => Probability): FaceRow {
  const value = row.value as string;
  const small = Number(value) <= 0.5;
  const tail = small ? value : (row.complement ?? new Ruler(1).minus(value).toString());
  const exact = small && row.log !== null ? row.log : new Ruler(tail).ln().toString();
  return {
    name,
    region: regionOf(row.args as Args),
    args: row.args,
    exact,
    compute: () => {
      const p = ask();
      const ofValue = outside ? p.logComplement : p.log;
      const log = small ? ofValue : outside ? p.log : p.logComplement;
      // Just above and below 1/2 the smaller tail may be the other one by rounding only.
      const logError = log === smallTail(p) ? p.logError : 1.01 * p.logError;
      return { log, logError };
    },
  };
}

function numberRow(row: NamedRow, name: string, ask: () => Computed): FaceRow {
  const { args } = row;
  return { name, region: regionOf(args as Args), args, exact: row.log as string, compute: ask };
}

/** log C(n, v) to 50 digits. */
function logChoose(n: number, v: number): Decimal {
  let product = new Ruler(1);
  for (let i = 0; i < v; i++) product = product.times(n - i).div(i + 1);
  return product.ln();
}

function toRow(row: NamedRow): FaceRow | undefined {
  const args = row.args as Args;
  const n = Number(args.n);
  const d = Number(args.d);
  const k = Number(args.vertices_per_face) - 1;
  const faces = (law: Law, hull: 'plain' | 'symmetric' = 'plain'): FaceRow =>
    numberRow(row, 'expectedFaces', () => expectedFaces({ n, d, k, law, hull }));
  switch (row.quantity) {
    case 'wendel_p_out':
      return tailRow(row, 'nextPointInHull, scale 0', true, () =>
        nextPointInHull({ n, d, queryScale: 0 }),
      );
    case 'gauss_p_out_sigma':
    case 'gauss_p_in_sigma_at_threshold': {
      const queryScale = Math.sqrt(Number(args.sigma2));
      const outside = row.quantity === 'gauss_p_out_sigma';
      return tailRow(row, 'nextPointInHull', outside, () => nextPointInHull({ n, d, queryScale }));
    }
    case 'gauss_expected_faces':
      return faces(gaussian());
    case 'symmetric_gauss_expected_faces':
      return faces(gaussian(), 'symmetric');
    case 'gauss_expected_lost_faces': {
      const exact = new Ruler(row.log as string).minus(logChoose(n, k + 1)).toString();
      return {
        ...numberRow(row, 'projectedFaces', () => {
          const { survival } = projectedFaces({ polytope: 'simplex', n, d, k });
          return { log: survival.logComplement, logError: survival.logError };
        }),
        exact,
      };
    }
    case 'simplex_internal_angle': {
      const v = Number(args.face_vertices);
      const m = Number(args.simplex_vertices);
      return numberRow(row, 'internal angle', () =>
        withBound((bound) => logNegativeOrthantKernel(m - v, v, bound)),
      );
    }
    case 'simplex_external_angle': {
      const v = Number(args.face_vertices);
      const m = Number(args.simplex_vertices);
      return {
        ...numberRow(row, 'external angle', () =>
          withBound((bound) => logPositiveOrthantKernel(m - v, v, bound)),
        ),
        region: regionOf({ d: v }),
      };
    }
    case 'g': {
      const r = Number(args.r);
      return numberRow(row, 'orthant probability', () =>
        withBound((bound) =>
          r > 0
            ? logPositiveOrthantKernel(n, 1 / r, bound)
            : logNegativeOrthantKernel(n, -1 / r - n, bound),
        ),
      );
    }
    case 'face_survival':
      return tailRow(row, 'projectedFaces', true, () => {
        const polytope = POLYTOPES[args.kind ?? 'T'];
        // For the cube k is the number of free coordinates, the dimension of the face.
        const dimension = polytope === 'cube' ? Number(args.k) : Number(args.k) - 1;
        const { survival } = projectedFaces({ polytope, n: Number(args.N), d, k: dimension });
        return complementOf(survival);
      });
    case 'beta_I':
    case 'beta_J':
    case 'betaprime_J': {
      const family = row.quantity === 'betaprime_J' ? 'betaPrime' : 'beta';
      const m = row.quantity === 'beta_I' ? Number(args.k) : n;
      return numberRow(row, 'beta angles', () =>
        withBound((bound) =>
          new BetaAngles(family, Number(args.alpha)).logTerm(
            { n, log: Math.log(n) },
            m,
            Number(args.k),
            bound,
          ),
        ),
      );
    }
    case 'beta_next_p_out':
      return tailRow(row, 'nextPointInHull, beta', true, () =>
        nextPointInHull({ n, d, law: betaLaw(Number(args.beta)) }),
      );
    case 'student_t_next_p_out':
      return tailRow(row, 'nextPointInHull, t', true, () =>
        nextPointInHull({ n, d, law: studentT({ degreesOfFreedom: Number(args.nu) }) }),
      );
    case 'beta_expected_faces':
      return faces(betaLaw(Number(args.beta)));
    case 'poisson_dual_cell_expected_faces': {
      // The limit of t samples, whose number of faces is bounded.
      const law = studentT({ degreesOfFreedom: Number(args.alpha) });
      return numberRow(row, 'expectedFaces, n = e^600', () =>
        expectedFaces({ n: LogNumber.fromLog(600), d, k, law }),
      );
    }
    case 'W': {
      const order = Number(args.k);
      const constant = logGammaRatioKernel((order - 1) / 2, 0.5) - 0.5 * Math.log(Math.PI);
      return numberRow(row, 'coordinate-sum transform', () => {
        const transform = new CoordinateSumTransform();
        const log = transform.log(order, Number(args.Z)) + constant;
        return { log, logError: transform.error + 4e-16 * Math.abs(constant) };
      });
    }
    case 'B_fixed':
      return numberRow(row, 'fixed query', () =>
        withBound((bound) =>
          new FixedQuerySequence(n, Math.log(n), Number(args.r)).logTerm(Number(args.k), bound),
        ),
      );
    case 'gauss_fixed_p_out':
    case 'gauss_fixed_p_in': {
      const outside = row.quantity === 'gauss_fixed_p_out';
      return tailRow(row, 'pointInHull', outside, () =>
        pointInHull({ n, d, mahalanobisDistance: Number(args.r) }),
      );
    }
    default:
      return undefined;
  }
}

/** Rows of `polytope-extra.json`: laws near the sphere, heavy tails, wide queries, continued angles. */
function extraRow({ quantity, args, log, logComplement }: ExtraRow): FaceRow {
  const { alpha, d = 2, family, n, logn, scale, p, M, e } = args;
  if (quantity === 'angle') {
    const out = new Float64Array(3);
    const compute = (): Computed => {
      betaContourKernel(new BetaTail((Number(p) - 1) / 2), 0, Number(M), Number(e), out);
      return { log: out[0] as number, logError: out[1] as number };
    };
    return { name: 'continued angle', region: 'd > 500', args, exact: log, compute };
  }
  const count = n ?? LogNumber.fromLog(Number(logn));
  const half = Number(alpha);
  const law =
    quantity === 'wide'
      ? gaussian()
      : family === 'beta'
        ? betaLaw((half - d) / 2)
        : studentT({ degreesOfFreedom: half });
  const queryScale = scale === undefined ? {} : { queryScale: Number(scale) };
  const inside = Number(log) < Number(logComplement ?? 0);
  return {
    name: quantity === 'wide' ? 'nextPointInHull, wide query' : `nextPointInHull, ${family}`,
    region: 'd <= 100',
    args,
    exact: inside || logComplement === null ? log : logComplement,
    compute: () => {
      const answer = nextPointInHull({ n: count, d, law, ...queryScale });
      return { log: smallTail(answer), logError: answer.logError };
    },
  };
}

/** One row of that table. */
interface ExtraRow {
  readonly quantity: 'membership' | 'wide' | 'angle';
  readonly args: {
    readonly family?: 'beta' | 'betaPrime';
    readonly alpha?: string;
    readonly d?: number;
    readonly n?: number;
    readonly logn?: string;
    readonly scale?: string;
    readonly p?: string;
    readonly M?: number;
    readonly e?: string;
  };
  readonly log: string;
  readonly logComplement: string | null;
}

/** All rows of both tables; a quantity that nobody computes is an error. */
export const faceRows: readonly FaceRow[] = [
  ...readTable<NamedRow>('faces').map((row) => {
    const known = toRow(row);
    if (known === undefined) throw new Error(`no function for ${row.quantity}`);
    return known;
  }),
  ...readTable<ExtraRow>('polytope-extra').map(extraRow),
];
