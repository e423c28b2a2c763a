/** The β functions of a model: μ dP/dμ of every coupling as it is normalised in the premises. */
import { Rational } from "../exact/rational.ts";
import type { Model, Parameter } from "./model.ts";
import { Polynomial, type Part } from "./polynomial.ts";
import { squareOfThird, traceOfSquare } from "./potential.ts";
import { project, type ProjectionFailure } from "./project.ts";
import { yukawaMatrices, yukawaSlopes, type YukawaSlopes } from "./yukawa.ts";

export interface Betas {
  /** Of each parameter, in order, without the factor in front: 16π² β in four dimensions, (8π)² β in three. */
  readonly slopes: readonly Polynomial[];
  /** What running makes and no term has. */
  readonly generated: readonly { readonly inner: Part; readonly rest: Polynomial }[];
  readonly potential: Polynomial;
  /** Null without Yukawa couplings. */
  readonly yukawa: YukawaSlopes | null;
}

/** V, with parameters and scales as variables. */
export function potentialOf({ parameters }: Model): Polynomial {
  return Polynomial.sum(
    parameters.map(({ operator, scale, variable }) =>
      operator.shifted(scale).times(Polynomial.variable(variable)),
    ),
  );
}

/**
 * 16π² β at one loop in four dimensions, Yukawa couplings included.
 * @example fourDimensionalBetas(the model of λφ⁴/4!) // slopes [3 λ²]
 */
export function fourDimensionalBetas(model: Model): Betas | ProjectionFailure {
  const potential = potentialOf(model);
  const bosonic = traceOfSquare(potential, model.scalars).scaled(Rational.of(1, 2));
  const yukawa = model.parameters.some((parameter) => parameter.yukawa.length > 0)
    ? yukawaSlopes(model, potential)
    : null;
  const whole = yukawa ? bosonic.plus(yukawa.potential) : bosonic;
  return assemble(model, whole, potential, yukawa);
}

/** (8π)² β at two loops in three dimensions; scalars alone. */
export function threeDimensionalBetas(model: Model): Betas | ProjectionFailure {
  const potential = potentialOf(model);
  const slope = squareOfThird(potential, model.scalars).scaled(Rational.of(1, 3));
  return assemble(model, slope, potential, null);
}

function assemble(
  model: Model,
  slope: Polynomial,
  potential: Polynomial,
  yukawa: YukawaSlopes | null,
): Betas | ProjectionFailure {
  const names = new Set(model.scalars.map(({ name }) => name));
  const inPotential = model.parameters.filter((parameter) => parameter.yukawa.length === 0);
  const projected = project(slope, inPotential, (name) => names.has(name));
  if ("failure" in projected) return projected;
  const coupled = model.parameters.filter((parameter) => parameter.yukawa.length > 0);
  const couplings = yukawa ? projectYukawa(model, coupled, yukawa) : [];
  if ("failure" in couplings) return couplings;
  return {
    slopes: model.parameters.map((parameter) => {
      const [own, all] = parameter.yukawa.length > 0 ? [coupled, couplings] : [inPotential, projected.slopes];
      return all[own.indexOf(parameter)] ?? Polynomial.zero;
    }),
    generated: projected.generated,
    potential,
    yukawa,
  };
}

/** Reads each entry of the matrices back: all that share a coupling must ask for the same β. */
function projectYukawa(
  model: Model,
  coupled: readonly Parameter[],
  yukawa: YukawaSlopes,
): readonly Polynomial[] | ProjectionFailure {
  const matrices = yukawaMatrices(model);
  const found = new Map<string, Polynomial>();
  for (const [boson, matrix] of matrices)
    for (const [i, row] of matrix.entries())
      for (const [j, entry] of row.entries()) {
        const slope = yukawa.slopes.get(boson)?.[i]?.[j] ?? Polynomial.zero;
        const [part, ...more] = entry.parts();
        if (!part) {
          if (!slope.isZero()) return { failure: "driven apart", parameters: coupled };
          continue;
        }
        const own = coupled.find(({ variable }) => part.powers.has(variable));
        if (!own || more.length > 0) return { failure: "dependent", parameters: coupled };
        const back = new Map([...part.powers].map(([name, power]) => [name, -power]));
        back.delete(own.variable);
        const beta = slope.shifted({ coefficient: Rational.one.over(part.coefficient), powers: back });
        const known = found.get(own.id);
        if (known && !known.equals(beta)) return { failure: "driven apart", parameters: [own] };
        found.set(own.id, beta);
      }
  return coupled.map(({ id }) => found.get(id) ?? Polynomial.zero);
}
