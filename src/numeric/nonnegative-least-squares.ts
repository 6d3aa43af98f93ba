/**
 * Projection onto a cone given by generators: min |A y - x| over y >= 0, by the active-set method.
 *
 * The normal equations are used, through a Cholesky factor of the active generators' Gram matrix: for
 * generic points their squared condition does no harm, and only the four operations and square roots
 * occur, so that every engine finds the same active set. Source: Solving Least Squares Problems,
 * Prentice-Hall (1974), chapter 23.
 */
import { dot, type Vector } from './small-vectors.ts';

/** Squared sine below which a generator counts as dependent on the active ones. */
const DEPENDENT = 1e-13;
/** Gradient, relative to the length of the point, below which no generator is added. */
const OPTIMAL = 1e-11;

/** Projects points onto one cone; keeps its work space between calls. */
export class ConeProjection {
  readonly #generators: readonly Vector[];
  readonly #gram: Float64Array;
  readonly #count: number;
  /** Indices of the active generators, in the order of the factor's rows. */
  #active: number[] = [];
  #weights: number[] = [];
  #factor: Float64Array[] = [];

  /** @param generators - unit vectors */
  constructor(generators: readonly Vector[]) {
    const count = generators.length;
    this.#generators = generators;
    this.#count = count;
    this.#gram = new Float64Array(count * count);
    for (let i = 0; i < count; i++) {
      for (let j = 0; j <= i; j++) {
        const product = dot(generators[i] as Vector, generators[j] as Vector);
        this.#gram[i * count + j] = product;
        this.#gram[j * count + i] = product;
      }
    }
  }

  /** Projects a point; returns the number of generators that carry the projection, all independent. */
  project(point: Vector): number {
    const count = this.#count;
    const products = this.#generators.map((generator) => dot(generator, point));
    const tolerance = OPTIMAL * Math.sqrt(dot(point, point));
    this.#active = [];
    this.#weights = [];
    this.#factor = [];
    for (let round = 0; round <= 20 * count + 100; round++) {
      const next = this.#steepest(products, tolerance);
      if (next < 0) return this.#active.length;
      this.#active.push(next);
      this.#weights.push(0);
      for (;;) {
        const solution = this.#solve(products);
        const step = this.#stepTowards(solution);
        if (step === 1) {
          this.#weights = solution;
          break;
        }
      }
    }
    throw new Error('ConeProjection: the active set did not settle');
  }

  /** Squared distance of the last projected point from the cone. */
  squaredDistance(point: Vector): number {
    const rest = [...point];
    this.#active.forEach((index, i) => {
      const generator = this.#generators[index] as Vector;
      const weight = this.#weights[i] as number;
      for (let j = 0; j < rest.length; j++) {
        rest[j] = (rest[j] as number) - weight * (generator[j] as number);
      }
    });
    return dot(rest, rest);
  }

  /** The inactive generator with the largest product with the residual, or -1 at the optimum. */
  #steepest(products: readonly number[], tolerance: number): number {
    const count = this.#count;
    let best = -1;
    let largest = tolerance;
    for (let j = 0; j < count; j++) {
      if (this.#active.includes(j)) continue;
      let gradient = products[j] as number;
      this.#active.forEach((index, i) => {
        gradient -= (this.#weights[i] as number) * (this.#gram[index * count + j] as number);
      });
      if (gradient > largest && this.#extends(j)) {
        largest = gradient;
        best = j;
      }
    }
    return best;
  }

  /** Whether a generator is independent of the active ones. */
  #extends(j: number): boolean {
    this.#refactor();
    return this.#row(j, this.#active.length) !== undefined;
  }

  /** The factor's row of generator j after the first `length` active ones. */
  #row(j: number, length: number): Float64Array | undefined {
    const count = this.#count;
    const row = new Float64Array(length + 1);
    let rest = this.#gram[j * count + j] as number;
    for (let i = 0; i < length; i++) {
      const other = this.#factor[i] as Float64Array;
      let sum = this.#gram[j * count + (this.#active[i] as number)] as number;
      for (let k = 0; k < i; k++) sum -= (row[k] as number) * (other[k] as number);
      const entry = sum / (other[i] as number);
      row[i] = entry;
      rest -= entry * entry;
    }
    if (rest < DEPENDENT) return undefined;
    row[length] = Math.sqrt(rest);
    return row;
  }

  /** Completes the factor for all active generators; rows already there stay. */
  #refactor(): void {
    while (this.#factor.length < this.#active.length) {
      const length = this.#factor.length;
      const row = this.#row(this.#active[length] as number, length);
      if (row === undefined) throw new Error('ConeProjection: dependent active generators');
      this.#factor.push(row);
    }
  }

  /** Least-squares weights of the active generators, of either sign. */
  #solve(products: readonly number[]): number[] {
    this.#refactor();
    const size = this.#active.length;
    const solution = new Array<number>(size);
    for (let i = 0; i < size; i++) {
      const row = this.#factor[i] as Float64Array;
      let sum = products[this.#active[i] as number] as number;
      for (let k = 0; k < i; k++) sum -= (row[k] as number) * (solution[k] as number);
      solution[i] = sum / (row[i] as number);
    }
    for (let i = size - 1; i >= 0; i--) {
      let sum = solution[i] as number;
      for (let k = i + 1; k < size; k++) {
        sum -= ((this.#factor[k] as Float64Array)[i] as number) * (solution[k] as number);
      }
      solution[i] = sum / ((this.#factor[i] as Float64Array)[i] as number);
    }
    return solution;
  }

  /** Moves the weights towards the solution until one vanishes, and drops those; 1 if none does. */
  #stepTowards(solution: readonly number[]): number {
    let step = 1;
    solution.forEach((target, i) => {
      const weight = this.#weights[i] as number;
      if (target <= 0) step = Math.min(step, weight / (weight - target));
    });
    if (step === 1) return 1;
    let first = this.#active.length;
    const weights = this.#weights.map(
      (weight, i) => weight + step * ((solution[i] as number) - weight),
    );
    const kept: number[] = [];
    const keptWeights: number[] = [];
    this.#active.forEach((index, i) => {
      const weight = weights[i] as number;
      if ((solution[i] as number) <= 0 && weight <= 1e-15) {
        first = Math.min(first, i);
        return;
      }
      kept.push(index);
      keptWeights.push(weight);
    });
    this.#active = kept;
    this.#weights = keptWeights;
    this.#factor.length = Math.min(this.#factor.length, first);
    return step;
  }
}
