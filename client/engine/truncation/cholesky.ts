/**
 * Symmetric positive definite matrices: lower triangular factors, solving with them, and factors with pivoting.
 * Matrices are square, row by row in one array. (Golub, Van Loan 2013, Matrix Computations, 4.2 and 4.2.8.)
 */
export interface Factor {
  readonly size: number;
  /** L of R = L Lᵀ; above the diagonal, what R was. */
  readonly lower: Float64Array;
  /** ln det R. */
  readonly logDeterminant: number;
  /** (largest/smallest diagonal of L)²: a lower bound of the condition number. */
  readonly condition: number;
}

/** How many rows are worked on together: each entry read is then used four times. */
const ROWS = 4;

/** Overwrites the matrix with its factor. Null when rounding leaves no positive pivot: too ill-conditioned. */
export function factorise(matrix: Float64Array, size: number): Factor | null {
  const full = size - (size % ROWS);
  for (let first = 0; first < size; first += first < full ? ROWS : 1) {
    const rows = first < full ? ROWS : 1;
    if (rows === ROWS) eliminateFour(matrix, size, first);
    for (let row = first; row < first + rows; row += 1)
      if (!finishRow(matrix, size, row, rows === ROWS ? first : 0)) return null;
  }
  let logDeterminant = 0;
  let [least, most] = [Infinity, 0];
  for (let row = 0; row < size; row += 1) {
    const pivot = at(matrix, row * size + row);
    logDeterminant += 2 * Math.log(pivot);
    least = Math.min(least, pivot);
    most = Math.max(most, pivot);
  }
  return { size, lower: matrix, logDeterminant, condition: (most / least) ** 2 };
}

/** The entries of four rows in the columns before the first of them. */
function eliminateFour(matrix: Float64Array, size: number, first: number): void {
  const [a, b, c, d] = [first * size, (first + 1) * size, (first + 2) * size, (first + 3) * size];
  for (let column = 0; column < first; column += 1) {
    const other = column * size;
    let [s, t, u, v] = [0, 0, 0, 0];
    for (let k = 0; k < column; k += 1) {
      const entry = at(matrix, other + k);
      s += at(matrix, a + k) * entry;
      t += at(matrix, b + k) * entry;
      u += at(matrix, c + k) * entry;
      v += at(matrix, d + k) * entry;
    }
    const pivot = at(matrix, other + column);
    matrix[a + column] = (at(matrix, a + column) - s) / pivot;
    matrix[b + column] = (at(matrix, b + column) - t) / pivot;
    matrix[c + column] = (at(matrix, c + column) - u) / pivot;
    matrix[d + column] = (at(matrix, d + column) - v) / pivot;
  }
}

/** The entries of one row from column `from` on; false when its pivot is not positive. */
function finishRow(matrix: Float64Array, size: number, row: number, from: number): boolean {
  const start = row * size;
  for (let column = from; column <= row; column += 1) {
    const other = column * size;
    let rest = at(matrix, start + column);
    for (let k = 0; k < column; k += 1) rest -= at(matrix, start + k) * at(matrix, other + k);
    if (column === row && !(rest > 0)) return false;
    matrix[start + column] = column === row ? Math.sqrt(rest) : rest / at(matrix, other + column);
  }
  return true;
}

function at(values: Float64Array, index: number): number {
  return values[index] ?? NaN;
}

/** z with L z = b, so that zᵀz = bᵀR⁻¹b. */
export function whiten({ lower, size }: Factor, b: ArrayLike<number>): Float64Array {
  const z = new Float64Array(size);
  for (let row = 0; row < size; row += 1) {
    let sum = b[row] ?? NaN;
    for (let k = 0; k < row; k += 1) sum -= at(lower, row * size + k) * at(z, k);
    z[row] = sum / at(lower, row * size + row);
  }
  return z;
}

/** L z: from independent values to values with the correlations of R. */
export function colour({ lower, size }: Factor, z: Float64Array): Float64Array {
  const result = new Float64Array(size);
  for (let row = 0; row < size; row += 1) {
    let sum = 0;
    for (let k = 0; k <= row; k += 1) sum += at(lower, row * size + k) * at(z, k);
    result[row] = sum;
  }
  return result;
}

/**
 * The order in which pivoting takes the rows: each the one that those before it predict worst.
 * Source: Bastos, O'Hagan 2009, Technometrics 51, 425, section 4.3.
 */
export function pivotOrder(matrix: Float64Array, size: number): number[] {
  const order = Array.from({ length: size }, (_, index) => index);
  const left = order.map((index) => at(matrix, index * size + index));
  const columns: Float64Array[] = [];
  for (let step = 0; step < size; step += 1) {
    let best = step;
    for (let index = step + 1; index < size; index += 1)
      if ((left[order[index] ?? 0] ?? 0) > (left[order[best] ?? 0] ?? 0)) best = index;
    const pivot = order[best] ?? 0;
    order[best] = order[step] ?? 0;
    order[step] = pivot;
    const root = Math.sqrt(Math.max(left[pivot] ?? 0, 0));
    if (root === 0) break;
    const column = new Float64Array(size);
    for (let index = step + 1; index < size; index += 1) {
      const row = order[index] ?? 0;
      let value = at(matrix, row * size + pivot);
      for (const earlier of columns) value -= at(earlier, row) * at(earlier, pivot);
      column[row] = value / root;
      left[row] = (left[row] ?? 0) - at(column, row) ** 2;
    }
    column[pivot] = root;
    columns.push(column);
  }
  return order;
}
