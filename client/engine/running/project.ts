/** From μ dV/dμ to the β function of each coupling: Σ β_p O_p = μ dV/dμ, solved exactly. */
import { Rational } from "../exact/rational.ts";
import type { Parameter } from "./model.ts";
import { Polynomial, type Part } from "./polynomial.ts";

export interface Projection {
  /** One per parameter, in order: what μ dP/dμ is in the same units as `slope`. */
  readonly slopes: readonly Polynomial[];
  /** Operators that no term has, with what stands before each. */
  readonly generated: readonly { readonly inner: Part; readonly rest: Polynomial }[];
}
export type ProjectionFailure =
  /** The operators of these parameters are not independent. */
  | { readonly failure: "dependent"; readonly parameters: readonly Parameter[] }
  /** Running drives apart coefficients that share these parameters. */
  | { readonly failure: "driven apart"; readonly parameters: readonly Parameter[] };

interface Row {
  readonly key: string;
  readonly entries: readonly Rational[];
  readonly right: Polynomial;
}

/** `slope` is a polynomial in fields, parameters and scales; `isField` tells the first from the others. */
export function project(
  slope: Polynomial,
  parameters: readonly Parameter[],
  isField: (name: string) => boolean,
): Projection | ProjectionFailure {
  const wanted = slope.collect(isField);
  const operators = parameters.map(({ operator }) => operator.collect(isField));
  const keys = [...new Set(operators.flatMap((operator) => [...operator.keys()]))];
  const rows: Row[] = keys.map((key) => ({
    key,
    entries: operators.map((operator) => {
      const [part] = operator.get(key)?.rest.parts() ?? [];
      return part?.coefficient ?? Rational.zero;
    }),
    right: wanted.get(key)?.rest ?? Polynomial.zero,
  }));
  const pivots: (Row | null)[] = [];
  let open = rows;
  for (const column of parameters.keys()) {
    const pivot = open.find(({ entries }) => at(entries, column).sign() !== 0);
    if (!pivot) {
      const parts = parameters.filter((_, index) => at(solvedRow(pivots, column), index).sign() !== 0);
      return { failure: "dependent", parameters: [...parts, ...parameters.slice(column, column + 1)] };
    }
    const scaled = scaleRow(pivot, Rational.one.over(at(pivot.entries, column)));
    open = open.filter((row) => row !== pivot).map((row) => eliminate(row, scaled, column));
    for (const [index, row] of pivots.entries()) if (row) pivots[index] = eliminate(row, scaled, column);
    pivots.push(scaled);
  }
  const broken = open.filter(({ right }) => !right.isZero());
  if (broken.length > 0) {
    const keysBroken = new Set(broken.map(({ key }) => key));
    const parts = parameters.filter(
      (_, index) =>
        (operators[index]?.size ?? 0) > 1 &&
        [...(operators[index]?.keys() ?? [])].some((key) => keysBroken.has(key)),
    );
    return { failure: "driven apart", parameters: parts };
  }
  const inverse = ({ scale }: Parameter): Part => ({
    coefficient: Rational.one,
    powers: new Map([...scale.powers].map(([name, power]) => [name, -power])),
  });
  return {
    // The solution is for scale × parameter, and the scale does not run.
    slopes: parameters.map((parameter, index) =>
      (pivots[index]?.right ?? Polynomial.zero).shifted(inverse(parameter)),
    ),
    generated: [...wanted].filter(([key]) => !keys.includes(key)).map(([, group]) => group),
  };
}

function at(entries: readonly Rational[], index: number): Rational {
  return entries[index] ?? Rational.zero;
}
function scaleRow({ key, entries, right }: Row, by: Rational): Row {
  return { key, entries: entries.map((entry) => entry.times(by)), right: right.scaled(by) };
}
function eliminate(row: Row, pivot: Row, column: number): Row {
  const by = at(row.entries, column);
  if (by.sign() === 0) return row;
  return {
    key: row.key,
    entries: row.entries.map((entry, index) => entry.minus(by.times(at(pivot.entries, index)))),
    right: row.right.minus(pivot.right.scaled(by)),
  };
}
/** How the column depends on those before it: one entry for each of them. */
function solvedRow(pivots: readonly (Row | null)[], column: number): Rational[] {
  return pivots.map((row) => (row ? at(row.entries, column) : Rational.zero));
}
