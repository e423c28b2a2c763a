/** Roots of small polynomials and eigenvalues of small matrices, in floating point. */

export interface Complex {
  readonly re: number;
  readonly im: number;
}
export type NumberMatrix = readonly (readonly number[])[];

const times = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});
const minus = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im });
function over(a: Complex, b: Complex): Complex {
  const size = b.re ** 2 + b.im ** 2;
  return { re: (a.re * b.re + a.im * b.im) / size, im: (a.im * b.re - a.re * b.im) / size };
}
const SWEEPS = 400;

/**
 * All roots of Σ c_k x^k, `coefficients` by rising power, the last not zero (Durand 1960, Kerner 1966).
 * @example polynomialRoots([-2, 0, 1]) // ±√2
 */
export function polynomialRoots(coefficients: readonly number[]): readonly Complex[] {
  const degree = coefficients.length - 1;
  const leading = coefficients[degree] ?? 0;
  if (degree < 1 || leading === 0) return [];
  const monic = coefficients.map((one) => one / leading);
  const size = 1 + Math.max(...monic.slice(0, -1).map(Math.abs));
  let roots: Complex[] = Array.from({ length: degree }, (_, k) => {
    const angle = (2 * Math.PI * k) / degree + 0.4;
    return { re: 0.6 * size * Math.cos(angle), im: 0.6 * size * Math.sin(angle) };
  });
  const at = (x: Complex) =>
    monic.reduceRight<Complex>((sum, one) => ({ re: times(sum, x).re + one, im: times(sum, x).im }), {
      re: 0,
      im: 0,
    });
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let moved = 0;
    roots = roots.map((root, own, all) => {
      const others = all.reduce<Complex>(
        (product, other, index) => (index === own ? product : times(product, minus(root, other))),
        { re: 1, im: 0 },
      );
      if (others.re === 0 && others.im === 0) return { re: root.re + 1e-9 * size, im: root.im };
      const step = over(at(root), others);
      moved = Math.max(moved, Math.hypot(step.re, step.im));
      return minus(root, step);
    });
    if (moved < 1e-15 * size) break;
  }
  // Roots of real polynomials that are real up to rounding are real.
  return joined(roots, size).map(({ re, im }) =>
    Math.abs(im) < 1e-7 * (1 + Math.abs(re)) ? { re, im: 0 } : { re, im },
  );
}

/** Rounding tears a root of order m apart by its m-th root; the middle of the pieces is where it was. */
function joined(roots: readonly Complex[], size: number): readonly Complex[] {
  const near = (one: Complex, other: Complex) =>
    Math.hypot(one.re - other.re, one.im - other.im) < 1e-4 * size;
  return roots.map((root) => {
    const pieces = roots.filter((other) => near(root, other));
    const sum = pieces.reduce((total, { re, im }) => ({ re: total.re + re, im: total.im + im }));
    const clean = (value: number) => (Math.abs(value) < 1e-14 * size ? 0 : value / pieces.length);
    return { re: clean(sum.re), im: clean(sum.im) };
  });
}

/**
 * Eigenvalues by the characteristic polynomial (Faddeev, LeVerrier), for matrices of a few rows. Rows that do not act on
 * each other are taken apart first: a repeated eigenvalue of a diagonal matrix is then as exact as its entries.
 */
export function eigenvalues(matrix: NumberMatrix): readonly Complex[] {
  return blocksOf(matrix).flatMap((indices) => {
    const block = indices.map((row) => indices.map((column) => matrix[row]?.[column] ?? 0));
    return indices.length === 1
      ? [{ re: block[0]?.[0] ?? 0, im: 0 }]
      : polynomialRoots(characteristic(block));
  });
}

/** Indices that reach each other through entries that are not zero: the diagonal blocks of a triangular form. */
function blocksOf(matrix: NumberMatrix): readonly (readonly number[])[] {
  const all = matrix.map((_, index) => index);
  const reaches = matrix.map((row, from) => row.map((entry, to) => entry !== 0 || from === to));
  for (const through of all)
    for (const from of all)
      if (reaches[from]?.[through] === true)
        reaches[from] = (reaches[from] ?? []).map((known, to) => known || reaches[through]?.[to] === true);
  const together = (one: number, other: number) =>
    reaches[one]?.[other] === true && reaches[other]?.[one] === true;
  return all
    .filter((index) => all.find((other) => together(index, other)) === index)
    .map((first) => all.filter((index) => together(first, index)));
}

/** det(x − A), by rising power. */
export function characteristic(matrix: NumberMatrix): readonly number[] {
  const n = matrix.length;
  const coefficients: number[] = Array.from({ length: n + 1 }, (_, k) => (k === n ? 1 : 0));
  let m: number[][] = matrix.map((row) => row.map(() => 0));
  for (let k = 1; k <= n; k++) {
    const known = coefficients[n - k + 1] ?? 0;
    m = multiply(matrix, m).map((row, i) => row.map((entry, j) => entry + (i === j ? known : 0)));
    const trace = multiply(matrix, m).reduce((sum, row, i) => sum + (row[i] ?? 0), 0);
    coefficients[n - k] = -trace / k;
  }
  return coefficients;
}

function multiply(a: NumberMatrix, b: NumberMatrix): number[][] {
  return a.map((row) => row.map((_, j) => row.reduce((sum, entry, k) => sum + entry * (b[k]?.[j] ?? 0), 0)));
}

/** Solves A x = b by elimination with pivots; null where A is singular. */
export function solveLinear(matrix: NumberMatrix, right: readonly number[]): readonly number[] | null {
  const rows = matrix.map((row, index) => [...row, right[index] ?? 0]);
  const n = rows.length;
  for (let column = 0; column < n; column++) {
    const entry = (row: number) => Math.abs(rows[row]?.[column] ?? 0);
    let best = column;
    for (let row = column + 1; row < n; row++) if (entry(row) > entry(best)) best = row;
    if (!(entry(best) > 1e-14)) return null;
    const [top, chosen] = [rows[column] ?? [], rows[best] ?? []];
    rows[best] = top;
    rows[column] = chosen;
    for (let row = 0; row < n; row++) {
      if (row === column) continue;
      const by = (rows[row]?.[column] ?? 0) / (chosen[column] ?? 1);
      rows[row] = (rows[row] ?? []).map((value, index) => value - by * (chosen[index] ?? 0));
    }
  }
  return rows.map((row, index) => (row[n] ?? 0) / (row[index] ?? 1));
}

/**
 * The first convergent that lies `within` of a float, with at most `most` below the line; else null.
 * @example nearbyFraction(0.3333333333333333) // [1, 3]
 */
export function nearbyFraction(
  value: number,
  within = 1e-9,
  most = 100_000,
): readonly [number, number] | null {
  let [h, k, hBefore, kBefore] = [Math.floor(value), 1, 1, 0];
  let rest = value - h;
  while (Math.abs(value - h / k) > within * Math.max(1, Math.abs(value))) {
    if (rest === 0) return null;
    const inverse = 1 / rest;
    const whole = Math.floor(inverse);
    rest = inverse - whole;
    [h, hBefore] = [whole * h + hBefore, h];
    [k, kBefore] = [whole * k + kBefore, k];
    if (k > most) return null;
  }
  return [h, k];
}
