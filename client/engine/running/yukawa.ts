/**
 * One-loop β functions with Yukawa couplings, for −L = ½ Y^a ψψ φ_a + h.c. in left-handed two-component spinors
 * (Machacek and Vaughn 1984, two-component form of Luo, Wang and Xiao 2003, without gauge couplings):
 *   16π² μ dY^a/dμ = ½ (Y₂ᵀ Y^a + Y^a Y₂) + 2 Y^b Y^{†a} Y^b + ½ Y^b Tr (Y^{†b} Y^a + Y^{†a} Y^b),  Y₂ = Y^{†b} Y^b,
 *   16π² γ_ab = ½ Tr (Y^{†a} Y^b + Y^{†b} Y^a),
 *   16π² μ dV/dμ = ½ Tr (V″)² − Tr (M†M)² + 16π² φ_a γ_ab ∂_b V,  M = Y^a φ_a.
 * Complex scalars are kept as φ and φ*: Σ_b Y^b ⊗ Y^b = Σ_x A_x ⊗ A_x̄ and Σ_b Y^{†b} ⊗ Y^b = Σ_x A_x† ⊗ A_x, where A_x
 * stands before x. Couplings are real, so A† is the transpose.
 */
import { Rational } from "../exact/rational.ts";
import type { Model, ScalarVariable } from "./model.ts";
import { Polynomial } from "./polynomial.ts";

type Matrix = readonly (readonly Polynomial[])[];

const half = Rational.of(1, 2);

function product(...matrices: readonly Matrix[]): Matrix {
  return matrices.reduce((a, b) =>
    a.map((row) =>
      (b[0] ?? []).map((_, column) =>
        Polynomial.sum(row.map((entry, k) => entry.times(b[k]?.[column] ?? Polynomial.zero))),
      ),
    ),
  );
}
function sum(matrices: readonly Matrix[], size: number): Matrix {
  return fill(size, (i, j) => Polynomial.sum(matrices.map((matrix) => matrix[i]?.[j] ?? Polynomial.zero)));
}
function transpose(matrix: Matrix): Matrix {
  return fill(matrix.length, (i, j) => matrix[j]?.[i] ?? Polynomial.zero);
}
function scaled(matrix: Matrix, by: Polynomial): Matrix {
  return matrix.map((row) => row.map((entry) => entry.times(by)));
}
function fill(size: number, entry: (i: number, j: number) => Polynomial): Matrix {
  return Array.from({ length: size }, (_, i) => Array.from({ length: size }, (__, j) => entry(i, j)));
}

export interface YukawaSlopes {
  /** By boson variable: 16π² μ dA/dμ. */
  readonly slopes: ReadonlyMap<string, Matrix>;
  /** −Tr (M†M)² + 16π² φ_a γ_ab ∂_b V. */
  readonly potential: Polynomial;
  /** 16π² γ of each scalar variable, its own entry of the matrix. */
  readonly scalarGamma: ReadonlyMap<string, Polynomial>;
}

/** The matrices A_x of a model, by boson variable; the order of rows is that of its spinors. */
export function yukawaMatrices({ scalars, spinors, parameters }: Model): ReadonlyMap<string, Matrix> {
  const index = new Map(spinors.map(({ name }, at) => [name, at]));
  return new Map(
    scalars.map(({ name }) => {
      const entries = fill(spinors.length, () => Polynomial.zero).map((row) => [...row]);
      for (const { variable, scale, yukawa } of parameters)
        for (const { boson, first, second, coefficient } of yukawa) {
          if (boson !== name) continue;
          const [i, j] = [index.get(first) ?? 0, index.get(second) ?? 0];
          const part = Polynomial.monomial(coefficient, [...scale.powers, [variable, 1]]);
          for (const [row, column] of [
            [i, j],
            [j, i],
          ] as const) {
            const line = entries[row];
            if (line) line[column] = (line[column] ?? Polynomial.zero).plus(part);
          }
        }
      return [name, entries];
    }),
  );
}

/** Copies of fermions enter traces as factors; everything else does not see them. */
export function yukawaSlopes(model: Model, potential: Polynomial): YukawaSlopes {
  const { scalars, spinors } = model;
  const size = spinors.length;
  const a = yukawaMatrices(model);
  const of = (name: string) => a.get(name) ?? fill(size, () => Polynomial.zero);
  const trace = (matrix: Matrix) =>
    Polynomial.sum(
      matrix.map((row, i) => (row[i] ?? Polynomial.zero).scaled(Rational.of(spinors[i]?.copies ?? 1))),
    );
  const dagger = (name: string) => transpose(of(name));
  const second = sum(
    scalars.map(({ name }) => product(dagger(name), of(name))),
    size,
  );
  const slope = ({ name, conjugate }: ScalarVariable) => {
    const legs = [product(transpose(second), of(name)), product(of(name), second)].map((matrix) =>
      scaled(matrix, Polynomial.constant(half)),
    );
    const vertex = scalars.map((b) =>
      scaled(product(of(b.name), dagger(conjugate), of(b.conjugate)), Polynomial.constant(2)),
    );
    const boson = scalars.flatMap((b) => [
      scaled(of(b.name), trace(product(dagger(b.name), of(name))).scaled(half)),
      scaled(of(b.conjugate), trace(product(dagger(conjugate), of(b.name))).scaled(half)),
    ]);
    return sum([...legs, ...vertex, ...boson], size);
  };
  const mass = sum(
    scalars.map(({ name }) => scaled(of(name), Polynomial.variable(name))),
    size,
  );
  // M† has φ* where M has φ.
  const massDagger = sum(
    scalars.map(({ name, conjugate }) => scaled(dagger(name), Polynomial.variable(conjugate))),
    size,
  );
  const gamma = scalars.flatMap((b) => [
    trace(product(massDagger, of(b.name)))
      .scaled(half)
      .times(potential.derivative(b.conjugate)),
    trace(product(mass, dagger(b.name)))
      .scaled(half)
      .times(potential.derivative(b.name)),
  ]);
  return {
    slopes: new Map(scalars.map((scalar) => [scalar.name, slope(scalar)])),
    potential: Polynomial.sum([
      trace(product(massDagger, mass, massDagger, mass)).scaled(Rational.of(-1)),
      ...gamma,
    ]),
    scalarGamma: new Map(scalars.map(({ name }) => [name, trace(product(dagger(name), of(name)))])),
  };
}
