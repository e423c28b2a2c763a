/**
 * Fixed points below a critical dimension, to lowest order in ε (Wilson and Fisher 1972):
 *   μ dg_i/dμ = −(d − n(d − 2)/2) g_i + β_i(g).
 * The couplings that are marginal at ε = 0 are of order ε there (of order √ε for Yukawa couplings), so in units of ε the
 * equations hold no ε. All others vanish; their slopes at the fixed point give the dimensions of their operators.
 */
import { Rational } from "../exact/rational.ts";
import type { Betas } from "./beta.ts";
import type { Model, Parameter } from "./model.ts";
import { Polynomial } from "./polynomial.ts";
import { quarticSquare } from "./potential.ts";
import { nearbyFraction, polynomialRoots, eigenvalues, solveLinear, type Complex } from "./roots.ts";

export interface FixedPoint {
  /** By marginal parameter, in order: coupling over 16π² (or (8π)²) at ε = 1; a Yukawa coupling over 4π. */
  readonly couplings: readonly number[];
  /** The same as fractions where they are such. */
  readonly exact: readonly Rational[] | null;
  readonly classes: readonly ExponentClass[];
  /** η / ε^order of each scalar variable. */
  readonly etas: readonly {
    readonly variable: string;
    readonly order: 1 | 2;
    readonly value: number;
    readonly exact: Rational | null;
  }[];
}
/** Couplings of one number of legs; their slopes are a + b ε with b the eigenvalues. */
export interface ExponentClass {
  readonly parameters: readonly Parameter[];
  readonly legs: number;
  readonly marginal: boolean;
  /** Slope at ε = 0: −(d₀ − n(d₀ − 2)/2). */
  readonly constant: Rational;
  readonly slopes: readonly { readonly value: Complex; readonly exact: Rational | null }[];
  /** By parameter: b where moving it moves no other one of the class and b is a fraction; else null. */
  readonly own: readonly (Rational | null)[];
}
export type Critical = 4 | 3;

export const MOST_MARGINAL = 4;

export interface FixedPointSearch {
  readonly marginal: readonly Parameter[];
  readonly points: readonly FixedPoint[];
  /** Whether every real fixed point is among them, or they are those that a search from many places finds. */
  readonly complete: boolean;
}

/** Exponent of ε in −(d − n(d − 2)/2) for an operator of `legs` scalars, or of two spinors and one scalar. */
export function canonicalSlope(
  parameter: Parameter,
  critical: Critical,
): { readonly constant: Rational; readonly perEpsilon: Rational } {
  const n = Rational.of(parameter.legs);
  if (parameter.yukawa.length > 0) return { constant: Rational.zero, perEpsilon: Rational.of(-1, 2) };
  const half = Rational.of(1, 2);
  const constant = n
    .times(Rational.of(critical - 2))
    .times(half)
    .minus(Rational.of(critical));
  return { constant, perEpsilon: Rational.one.minus(n.times(half)) };
}

export function isMarginal(parameter: Parameter, critical: Critical): boolean {
  return canonicalSlope(parameter, critical).constant.sign() === 0;
}

/** `betas` without their factor, of all parameters of the model in order. Scales that stand with couplings count as 1. */
export function findFixedPoints(model: Model, betas: Betas, critical: Critical): FixedPointSearch {
  const marginal = model.parameters.filter((parameter) => isMarginal(parameter, critical));
  const slopes = model.parameters.map((_, index) =>
    atUnitScales(betas.slopes[index] ?? Polynomial.zero, model),
  );
  const variables = marginal.map(({ variable }) => variable);
  const rest = new Set(
    model.parameters.filter((one) => !marginal.includes(one)).map(({ variable }) => variable),
  );
  const equations = marginal.map((parameter) => {
    const own = without(slopes[model.parameters.indexOf(parameter)] ?? Polynomial.zero, rest);
    return own.plus(
      Polynomial.variable(parameter.variable).scaled(canonicalSlope(parameter, critical).perEpsilon),
    );
  });
  const isQuadratic = marginal.every(({ yukawa }) => yukawa.length === 0);
  const complete = isQuadratic && marginal.length <= 2;
  const found =
    marginal.length === 0
      ? []
      : complete
        ? quadraticSolutions(equations, variables)
        : searched(equations, variables, marginal);
  const points = found.map((couplings) => describe(couplings, model, marginal, slopes, equations, critical));
  return { marginal, points: sortPoints(points), complete };
}

function sortPoints(points: readonly FixedPoint[]): readonly FixedPoint[] {
  const size = ({ couplings }: FixedPoint) => couplings.reduce((sum, one) => sum + Math.abs(one), 0);
  return [...points].sort((a, b) => size(a) - size(b));
}

function atUnitScales(polynomial: Polynomial, model: Model): Polynomial {
  const own = new Set(model.parameters.map(({ variable }) => variable));
  return Polynomial.sum(
    polynomial.parts().map(({ coefficient, powers }) =>
      Polynomial.monomial(
        coefficient,
        [...powers].filter(([name]) => own.has(name)),
      ),
    ),
  );
}
function without(polynomial: Polynomial, variables: ReadonlySet<string>): Polynomial {
  return Polynomial.sum(
    polynomial
      .parts()
      .filter(({ powers }) => [...powers.keys()].every((name) => !variables.has(name)))
      .map(({ coefficient, powers }) => Polynomial.monomial(coefficient, powers)),
  );
}

/** One or two couplings, −c g_i + quadratic form: along a ray (1, t) the equations leave a cubic in t. */
function quadraticSolutions(
  equations: readonly Polynomial[],
  variables: readonly string[],
): readonly number[][] {
  const [first, second] = equations.map((equation) => equation.compile(variables));
  if (!first) return [];
  if (!second) {
    const [linear, square] = [first([1]) - first([-1]), first([1]) + first([-1])];
    return square === 0 ? [[0]] : [[0], [-linear / square]];
  }
  // At (s, s t): s (quadratic form) = c, and t form₁ = form₂.
  const form = (f: (at: readonly number[]) => number, x: number, y: number) => (f([x, y]) + f([-x, -y])) / 2;
  const c = (first([-1, 0]) - first([1, 0])) / 2;
  const quadratic = (f: (at: readonly number[]) => number) => {
    const [a, b] = [form(f, 1, 0), form(f, 0, 1)];
    return [a, form(f, 1, 1) - a - b, b] as const;
  };
  const [a, b] = [quadratic(first), quadratic(second)];
  const cubic = [-b[0], a[0] - b[1], a[1] - b[2], a[2]];
  while (cubic.length > 1 && Math.abs(cubic.at(-1) ?? 0) < 1e-12) cubic.pop();
  const rays = polynomialRoots(cubic)
    .filter(({ im }) => im === 0)
    .map(({ re }) => [1, re] as const);
  // The ray (0, 1) is no root of the cubic in t.
  const all = Math.abs(a[2]) < 1e-12 ? [...rays, [0, 1] as const] : rays;
  const points = all.flatMap(([x, y]) => {
    const slope = x !== 0 ? form(first, x, y) / x : form(second, x, y) / y;
    return Math.abs(slope) < 1e-12 ? [] : [[(c * x) / slope, (c * y) / slope]];
  });
  return distinct(
    [[0, 0], ...points.map((point) => polish(equations, variables, point) ?? point)],
    equations,
    variables,
  );
}

/** Newton's method from a lattice of places. */
function searched(
  equations: readonly Polynomial[],
  variables: readonly string[],
  marginal: readonly Parameter[],
): readonly number[][] {
  const sizes = equations.map((equation, index) => {
    const yukawa = (marginal[index]?.yukawa.length ?? 0) > 0;
    const largest = Math.max(
      1,
      ...equation
        .parts()
        .filter(({ powers }) => [...powers.values()].reduce((sum, power) => sum + power, 0) > 1)
        .map(({ coefficient }) => Math.abs(coefficient.toFloat())),
    );
    return yukawa ? 1 / Math.sqrt(largest) : 1 / largest;
  });
  let places: number[][] = [[]];
  for (const size of sizes)
    places = places.flatMap((place) => LATTICE.map((step) => [...place, step * size]));
  const found = places.flatMap((place) => {
    const point = polish(equations, variables, place);
    return point ? [point] : [];
  });
  const zero = variables.map(() => 0);
  // A Yukawa coupling and its opposite are the same up to the sign of a field.
  const chosen = found.filter((point) => {
    const sign = marginal.findIndex(
      ({ yukawa }, index) => yukawa.length > 0 && Math.abs(point[index] ?? 0) > 1e-9,
    );
    return sign < 0 || (point[sign] ?? 0) > 0;
  });
  return distinct([zero, ...chosen], equations, variables);
}
const LATTICE = [-2.5, -0.9, -0.25, 0.2, 0.8, 2.2, 5];
const NEWTON_STEPS = 60;

function polish(
  equations: readonly Polynomial[],
  variables: readonly string[],
  start: readonly number[],
): number[] | null {
  const functions = equations.map((equation) => equation.compile(variables));
  const derivatives = equations.map((equation) =>
    variables.map((variable) => equation.derivative(variable).compile(variables)),
  );
  let point = [...start];
  for (let step = 0; step < NEWTON_STEPS; step++) {
    const values = functions.map((f) => f(point));
    const move = solveLinear(
      derivatives.map((row) => row.map((f) => f(point))),
      values,
    );
    if (!move) return null;
    point = point.map((value, index) => value - (move[index] ?? 0));
    const size = Math.hypot(...point);
    if (!(size < 1e6)) return null;
    if (Math.hypot(...move) < 1e-14 * (1e-3 + size))
      return point.map((value) => (Math.abs(value) < 1e-12 ? 0 : value));
  }
  return null;
}

/** A double root is found to half the digits only, from every side: of points so close the best stands for all. */
const SAME = 1e-5;

function distinct(
  points: readonly number[][],
  equations: readonly Polynomial[],
  variables: readonly string[],
): readonly number[][] {
  const functions = equations.map((equation) => equation.compile(variables));
  const residual = (point: readonly number[]) => Math.hypot(...functions.map((f) => f(point)));
  const kept: number[][] = [];
  for (const point of [...points].sort((a, b) => residual(a) - residual(b)))
    if (!kept.some((other) => other.every((value, index) => Math.abs(value - (point[index] ?? 0)) < SAME)))
      kept.push(point);
  return kept;
}

function describe(
  found: readonly number[],
  model: Model,
  marginal: readonly Parameter[],
  slopes: readonly Polynomial[],
  equations: readonly Polynomial[],
  critical: Critical,
): FixedPoint {
  const exact = exactPoint(found, marginal, equations);
  const couplings = exact ? exact.map((one) => one.toFloat()) : found;
  const legs = [
    ...new Set(model.parameters.map((one) => (one.yukawa.length > 0 ? critical : one.legs))),
  ].sort((a, b) => a - b);
  const marginalLegs = critical === 4 ? 4 : 6;
  const classes = legs.flatMap((n) => {
    const isMarginalClass =
      marginal.some((one) => one.legs === n || one.yukawa.length > 0) && n === marginalLegs;
    const own = isMarginalClass
      ? marginal
      : model.parameters.filter((one) => one.legs === n && !marginal.includes(one));
    return own.length === 0
      ? []
      : [exponentClass(own, isMarginalClass, couplings, exact, model, marginal, slopes, critical)];
  });
  return { couplings, exact, classes, etas: critical === 4 ? etasOf(couplings, exact, model, marginal) : [] };
}

/** How far a fraction may lie from the root found; it counts only if it solves the equations exactly. */
const EXACT_WITHIN = 1e-6;
const MOST_BELOW_THE_LINE = 5000;

function exactPoint(
  couplings: readonly number[],
  marginal: readonly Parameter[],
  equations: readonly Polynomial[],
): readonly Rational[] | null {
  const fractions = couplings.map((value) => {
    const found = nearbyFraction(value, EXACT_WITHIN, MOST_BELOW_THE_LINE);
    return found ? Rational.of(found[0], found[1]) : null;
  });
  const point = fractions.filter((one): one is Rational => one !== null);
  if (point.length < couplings.length) return null;
  const values = new Map(marginal.map(({ variable }, index) => [variable, point[index] ?? Rational.zero]));
  return equations.every((equation) => evaluateExactly(equation, values).sign() === 0) ? point : null;
}

function evaluateExactly(polynomial: Polynomial, values: ReadonlyMap<string, Rational>): Rational {
  return polynomial.parts().reduce((sum, { coefficient, powers }) => {
    const part = [...powers].reduce(
      (product, [name, power]) => product.times((values.get(name) ?? Rational.zero).power(power)),
      coefficient,
    );
    return sum.plus(part);
  }, Rational.zero);
}

function exponentClass(
  own: readonly Parameter[],
  isMarginalClass: boolean,
  couplings: readonly number[],
  exact: readonly Rational[] | null,
  model: Model,
  marginal: readonly Parameter[],
  slopes: readonly Polynomial[],
  critical: Critical,
): ExponentClass {
  const [first] = own;
  if (!first) throw new Error("a class of exponents has a parameter");
  const all = model.parameters.map(({ variable }) => variable);
  const at = all.map((variable) => couplings[marginal.findIndex((one) => one.variable === variable)] ?? 0);
  const exactAt = new Map(marginal.map(({ variable }, index) => [variable, exact?.[index] ?? Rational.zero]));
  const entry = (row: Parameter, column: Parameter) =>
    (slopes[model.parameters.indexOf(row)] ?? Polynomial.zero).derivative(column.variable);
  const canonical = (row: Parameter) => canonicalSlope(row, critical).perEpsilon;
  const matrix = own.map((row) =>
    own.map(
      (column) => entry(row, column).compile(all)(at) + (row === column ? canonical(row).toFloat() : 0),
    ),
  );
  const exactMatrix = exact
    ? own.map((row) =>
        own.map((column) => {
          const slope = evaluateExactly(entry(row, column), exactAt);
          return row === column ? slope.plus(canonical(row)) : slope;
        }),
      )
    : null;
  return {
    parameters: own,
    legs: first.legs,
    marginal: isMarginalClass,
    constant: canonicalSlope(first, critical).constant,
    own: own.map((_, column) => {
      const moves = exactMatrix?.some((row, index) => index !== column && row[column]?.sign() !== 0) ?? true;
      return moves ? null : (exactMatrix?.[column]?.[column] ?? null);
    }),
    slopes: [...eigenvalues(matrix)]
      .sort((a, b) => a.re - b.re)
      .map((value) => ({ value, exact: exactEigenvalue(value, exactMatrix) })),
  };
}

/** A float is the fraction next to it when that one is an eigenvalue exactly: det(A − x) = 0. */
function exactEigenvalue(value: Complex, matrix: readonly (readonly Rational[])[] | null): Rational | null {
  if (!matrix || value.im !== 0) return null;
  const near = nearbyFraction(value.re, EXACT_WITHIN, MOST_BELOW_THE_LINE);
  if (!near) return null;
  const candidate = Rational.of(near[0], near[1]);
  const shifted = matrix.map((row, i) => row.map((entry, j) => (i === j ? entry.minus(candidate) : entry)));
  return determinant(shifted).sign() === 0 ? candidate : null;
}

function determinant(matrix: readonly (readonly Rational[])[]): Rational {
  const [first, ...rest] = matrix;
  if (!first) return Rational.one;
  return first.reduce((sum, entry, column) => {
    if (entry.sign() === 0) return sum;
    const minor = determinant(rest.map((row) => row.filter((_, index) => index !== column)));
    const part = entry.times(minor);
    return column % 2 === 0 ? sum.plus(part) : sum.minus(part);
  }, Rational.zero);
}

/** η = 2γ: of order ε with Yukawa couplings, else of order ε² from the quartic ones. */
function etasOf(
  couplings: readonly number[],
  exact: readonly Rational[] | null,
  model: Model,
  marginal: readonly Parameter[],
): FixedPoint["etas"] {
  const hasYukawa = marginal.some(({ yukawa }, index) => yukawa.length > 0 && couplings[index] !== 0);
  if (hasYukawa) return [];
  const quartic = Polynomial.sum(
    marginal.map(({ operator, variable }) => operator.times(Polynomial.variable(variable))),
  );
  const variables = marginal.map(({ variable }) => variable);
  const exactAt = new Map(marginal.map(({ variable }, index) => [variable, exact?.[index] ?? Rational.zero]));
  const isDiagonal = model.scalars.every((a) =>
    model.scalars.every((b) => a === b || quarticSquare(quartic, model.scalars, a, b).isZero()),
  );
  if (!isDiagonal) return [];
  return model.scalars
    .filter(({ name, conjugate }) => name <= conjugate)
    .map((scalar) => {
      const square = quarticSquare(quartic, model.scalars, scalar, scalar).scaled(Rational.of(1, 6));
      return {
        variable: scalar.name,
        order: 2 as const,
        value: square.compile(variables)(couplings),
        exact: exact && evaluateExactly(square, exactAt),
      };
    });
}
