/**
 * A general linear-programming package as an oracle. It shares no code and no method with the
 * library; its own feasibility tolerance is 1e-7, so it can judge clear cases only.
 */
import loadHighs, { type Highs } from 'highs';

/** Maximise cost . x subject to low <= A x <= high and lower <= x <= upper. */
export interface LinearProgram {
  readonly cost: ArrayLike<number>;
  readonly lower: ArrayLike<number>;
  readonly upper: ArrayLike<number>;
  /** The rows of A, dense. */
  readonly rows: readonly ArrayLike<number>[];
  readonly low: ArrayLike<number>;
  readonly high: ArrayLike<number>;
}

/** What the solver says. */
export interface LinearSolution {
  readonly status: 'optimal' | 'infeasible' | 'unbounded' | 'other';
  readonly objective: number;
  readonly x: Float64Array;
}

/** Solves a linear program. */
export type LinearSolver = (program: LinearProgram) => LinearSolution;

/** The solver, loaded once for all; it runs offline. */
export async function loadLinearSolver(): Promise<LinearSolver> {
  // The declarations describe the CommonJS build; the ES module's default export is the loader.
  const load = loadHighs as unknown as typeof loadHighs.default;
  const highs: Highs = await load();
  const status = highs.constants.modelStatus;
  return (program) => {
    const numCols = program.cost.length;
    const numRows = program.rows.length;
    const starts = Int32Array.from({ length: numRows + 1 }, (_, i) => i * numCols);
    const indices = new Int32Array(numRows * numCols);
    const values = new Float64Array(numRows * numCols);
    program.rows.forEach((row, i) => {
      values.set(row, i * numCols);
      for (let j = 0; j < numCols; j++) indices[i * numCols + j] = j;
    });
    return highs.withModel(
      {
        numCols,
        numRows,
        sense: highs.constants.objectiveSense.maximize,
        colCost: Float64Array.from(program.cost),
        colLower: Float64Array.from(program.lower),
        colUpper: Float64Array.from(program.upper),
        rowLower: Float64Array.from(program.low),
        rowUpper: Float64Array.from(program.high),
        matrix: { format: 'csr', numRows, numCols, starts, indices, values },
      },
      (model) => {
        model.options.set({ output_flag: false });
        model.run();
        const code = model.getModelStatus();
        const name: LinearSolution['status'] =
          code === status.optimal
            ? 'optimal'
            : code === status.infeasible
              ? 'infeasible'
              : code === status.unbounded || code === status.unboundedOrInfeasible
                ? 'unbounded'
                : 'other';
        const x =
          name === 'optimal'
            ? Float64Array.from(model.getSolution().colValue)
            : new Float64Array(0);
        return { status: name, objective: model.getObjectiveValue(), x };
      },
    );
  };
}
