/** How strongly coefficients at two points hang together, and what keeps that computable. */
import { factorise, type Factor } from "./cholesky.ts";

/** r(x, x′; ℓ) = exp(−(x − x′)²/2ℓ²), and on the diagonal 1 + nugget. Shape: N × N, row by row. */
export function correlations(x: ArrayLike<number>, length: number, nugget: number): Float64Array {
  const size = x.length;
  const matrix = new Float64Array(size * size);
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < row; column += 1) {
      const steps = ((x[row] ?? NaN) - (x[column] ?? NaN)) / length;
      matrix[row * size + column] = Math.exp(-0.5 * steps * steps);
      matrix[column * size + row] = matrix[row * size + column] ?? NaN;
    }
    matrix[row * size + row] = 1 + nugget;
  }
  return matrix;
}

export interface Regularised {
  readonly factor: Factor;
  /** The nugget that was needed: the one asked for, or ten, a hundred, … times it. */
  readonly nugget: number;
}

/** Rounding errors of a factorisation are N times this. */
const EPSILON = 2 ** -52;

/**
 * The factor of R. A smooth kernel on many points has eigenvalues far below rounding, so a nugget (an independent part
 * of each value with this variance, in units of c̄²) is added to the diagonal, raised tenfold until all pivots are
 * positive and the condition stays within a tenth of what doubles can hold.
 */
export function factorOf(x: ArrayLike<number>, length: number, nugget: number): Regularised {
  const limit = 1 / (10 * EPSILON * x.length);
  for (let tried = nugget; tried < 1; tried *= 10) {
    const factor = factorise(correlations(x, length, tried), x.length);
    if (factor && factor.condition < limit) return { factor, nugget: tried };
    if (tried === 0) tried = EPSILON;
  }
  throw new Error("a correlation matrix with a nugget of the size of its diagonal is positive definite");
}
