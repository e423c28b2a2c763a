/** Fixed points in 4 − ε or 3 − ε dimensions with their exponents. */
import { roundFloat, type Problem, type Scalar } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import { measuredLatex } from "../notation/measured.ts";
import type { RunningContext, RunningPart } from "./evaluate.ts";
import { findFixedPoints, MOST_MARGINAL, type ExponentClass, type FixedPoint } from "./fixed-points.ts";
import { operatorLatex } from "./present.ts";
import type { Complex } from "./roots.ts";
import type { ExponentRow, FixedPointRow } from "./value.ts";
import { fixedPointWorking } from "./working.ts";

const DIGITS = 5;

/**
 * Problems: `epsilon-unreadable`, `no-marginal-coupling`, `too-many-marginal`, `fixed-point-scale`. Notices:
 * `gauge-left-out-of-fixed-points`, `fixed-points-searched`, `epsilon-not-small`.
 */
export function belowCritical(context: RunningContext): RunningPart {
  const { inputs, model, betas, critical, gauge } = context;
  const problems: Problem[] = [];
  const epsilon = readEpsilon(context, problems);
  const empty = (): RunningPart => ({
    scales: [],
    couplings: [],
    pole: null,
    plot: null,
    epsilon: epsilon && shown(epsilon),
    fixedPoints: [],
    drifts: [],
    problems,
    notices: [],
    scalars: [],
    working: fixedPointWorking(context, null, null),
  });
  if (!epsilon || !betas) return empty();
  const search = findFixedPoints(model, betas, critical);
  const refuse = (code: string, facts: Problem["facts"]) => {
    problems.push({ code, path: ["about"], facts });
    return empty();
  };
  if (search.marginal.length === 0)
    return refuse("no-marginal-coupling", { d: critical, power: critical === 4 ? 4 : 6 });
  if (search.marginal.length > MOST_MARGINAL)
    return refuse("too-many-marginal", { count: search.marginal.length, most: MOST_MARGINAL });
  const notices: Problem[] = [];
  if (gauge.groups.length > 0)
    notices.push({ code: "gauge-left-out-of-fixed-points", path: ["groups"], facts: {} });
  if (!search.complete) notices.push({ code: "fixed-points-searched", path: [], facts: {} });
  if (inputs.epsilon.trim() === "" && epsilon.compare(Rational.of(1, 2)) > 0)
    notices.push({ code: "epsilon-not-small", path: ["epsilon"], facts: { epsilon: epsilon.toString() } });
  const rows = search.points.map((point, index) =>
    presentPoint(point, index, search.marginal, context, epsilon),
  );
  return {
    ...empty(),
    fixedPoints: rows,
    notices,
    scalars: scalarsOf(rows),
    working: fixedPointWorking(context, search, rows),
  };
}

function readEpsilon({ inputs, theory, critical }: RunningContext, problems: Problem[]): Rational | null {
  const typed = inputs.epsilon.trim();
  if (typed !== "") {
    const value = Rational.parse(typed);
    if (value && value.sign() > 0 && value.compare(Rational.of(4)) <= 0) return value;
    problems.push({ code: "epsilon-unreadable", path: ["epsilon"], facts: { text: inputs.epsilon } });
    return null;
  }
  const { spacetime } = theory ?? { spacetime: null };
  const d = spacetime?.geometry === "isotropic" ? spacetime.d.asRational() : null;
  const below = d && Rational.of(critical).minus(d);
  return below && below.sign() > 0 ? below : Rational.one;
}

/** "\frac{1}{3}\,\epsilon", "0.3333\,\epsilon". */
function timesEpsilon(value: number, exact: Rational | null, power = 1): string {
  const epsilon = power === 1 ? "\\epsilon" : `\\epsilon^{${power}}`;
  if (value === 0) return "0";
  if (!exact) return `${measuredLatex(value, 0, "", DIGITS)}\\,${epsilon}`;
  if (exact.equals(Rational.one)) return epsilon;
  if (exact.equals(Rational.of(-1))) return `-${epsilon}`;
  return `${exact.toLatex()}\\,${epsilon}`;
}

/** a + b ε. */
function linear(constant: Rational, value: number, exact: Rational | null): string {
  const slope = timesEpsilon(value, exact);
  if (constant.sign() === 0) return slope;
  if (slope === "0") return constant.toLatex();
  return slope.startsWith("-")
    ? `${constant.toLatex()} - ${slope.slice(1)}`
    : `${constant.toLatex()} + ${slope}`;
}

function presentPoint(
  point: FixedPoint,
  index: number,
  marginal: RunningContext["model"]["parameters"],
  context: RunningContext,
  epsilon: Rational,
): FixedPointRow {
  const { model, critical } = context;
  const factor = critical === 4 ? 16 * Math.PI ** 2 : 64 * Math.PI ** 2;
  const factorLatex = critical === 4 ? "16\\pi^2" : "(8\\pi)^2";
  const couplings = marginal.map(({ id, latex, yukawa }, at) => {
    const value = point.couplings[at] ?? 0;
    const exact = point.exact?.[at] ?? null;
    // A Yukawa coupling is in units of 4π and √ε; its square is what has a simple value.
    if (yukawa.length > 0) {
      const square = value ** 2;
      return {
        id,
        latex: `\\frac{${latex}^{2}}{16\\pi^2} = ${timesEpsilon(square, exact && exact.times(exact))}`,
        value: roundFloat(value * Math.sqrt(factor * epsilon.toFloat())),
      };
    }
    return {
      id,
      latex: `\\frac{${latex}}{${factorLatex}} = ${timesEpsilon(value, exact)}`,
      value: roundFloat(value * factor * epsilon.toFloat()),
    };
  });
  const classes = point.classes;
  const unstable = classes
    .filter((one) => one.marginal)
    .reduce((sum, { slopes }) => sum + slopes.filter(({ value }) => value.re < -1e-9).length, 0);
  return {
    id: nameOf(point, marginal),
    couplings,
    name: point.couplings.every((value) => value === 0) ? "Gaussian" : `${index}`,
    unstable,
    exponents: classes.flatMap((one) => exponentsOf(one, nameOf(point, marginal), context, epsilon)),
    dimensions: classes.flatMap(({ parameters, own, constant }) =>
      parameters.flatMap(({ rowIds }, at) => {
        const slope = own[at];
        if (!slope) return [];
        const form = {
          constant: constant.plus(Rational.of(critical)).toString(),
          perEpsilon: slope.minus(Rational.one).toString(),
        };
        return rowIds.map((rowId) => ({ rowId, ...form }));
      }),
    ),
    etas: point.etas.map(({ variable, order, value, exact }) => ({
      field: variable,
      latex: model.scalars.find(({ name }) => name === variable)?.latex ?? variable,
      value: roundFloat(value * epsilon.toFloat() ** order),
      formula: timesEpsilon(value, exact, order),
    })),
  };
}

/** What tells a fixed point apart however many others there are: its couplings per ε. */
function nameOf(point: FixedPoint, marginal: RunningContext["model"]["parameters"]): string {
  if (point.couplings.every((value) => value === 0)) return "gaussian";
  return marginal
    .map(({ id }, index) => {
      const exact = point.exact?.[index];
      return `${id}=${exact ? exact.toString() : Number((point.couplings[index] ?? 0).toPrecision(5))}`;
    })
    .join(",");
}

function exponentsOf(
  one: ExponentClass,
  pointId: string,
  { model, critical }: RunningContext,
  epsilon: Rational,
): ExponentRow[] {
  const operators = [
    ...new Set(
      one.parameters.flatMap(({ operator, latex }) =>
        operator.isZero()
          ? [`\\text{the coupling of }${latex}`]
          : operator.parts().map((part) => operatorLatex(part, model.scalars)),
      ),
    ),
  ];
  const operator =
    operators.length > 3 ? `${operators.slice(0, 3).join(",\\;")},\\;\\ldots` : operators.join(",\\;");
  return one.slopes.map(({ value, exact }, index) => {
    const slope = one.constant.toFloat() + value.re * epsilon.toFloat();
    const dimension = critical - epsilon.toFloat() + slope;
    const ofDimension = exact && exact.minus(Rational.one);
    return {
      id: `${pointId}/${one.legs}${one.slopes.length > 1 ? `.${index + 1}` : ""}`,
      operatorLatex: operator,
      slopeLatex: linear(one.constant, value.re, exact) + imaginary(value),
      slope: roundFloat(Number(slope.toPrecision(10))),
      dimensionLatex: linear(
        one.constant.plus(Rational.of(critical)),
        Number((value.re - 1).toPrecision(10)),
        ofDimension,
      ),
      dimension: roundFloat(Number(dimension.toPrecision(10))),
    };
  });
}
function imaginary({ im }: Complex): string {
  return im === 0 ? "" : ` \\pm ${measuredLatex(Math.abs(im), 0, "", DIGITS)}\\,i\\,\\epsilon`;
}

/** Ids: "<point>/<coupling>", "<point>/<legs>/slope" and "/dimension", "<point>/<field>/eta". */
function scalarsOf(rows: readonly FixedPointRow[]): Scalar[] {
  return rows.flatMap((row): Scalar[] => [
    ...row.couplings.map(({ id, latex, value }): Scalar => ({
      id: `${row.id}/${id}`,
      label: `fixed-point value, where $${latex}$, of ${id}`,
      value: { type: "number", value },
    })),
    ...row.exponents.flatMap(({ id, operatorLatex: operator, slope, dimension }): Scalar[] => [
      {
        id: `${id}/slope`,
        label: `slope of the coupling of $${operator}$ at the fixed point`,
        value: { type: "number", value: slope },
      },
      {
        id: `${id}/dimension`,
        label: `dimension of $${operator}$ at the fixed point`,
        value: { type: "number", value: dimension },
      },
    ]),
    ...row.etas.map(({ field, latex, value }): Scalar => ({
      id: `${row.id}/${field}/eta`,
      label: `$\\eta$ of $${latex}$ at the fixed point`,
      value: { type: "number", value },
    })),
  ]);
}
