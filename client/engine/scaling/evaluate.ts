/** Evaluates Scaling: dimensions, classes and sizes of all terms of the premises. */
import type { Evaluation, Scalar } from "../evaluation.ts";
import type { DimensionSymbol } from "../exact/linear-form.ts";
import { shown as shownExact } from "../exact/shown.ts";
import { shown } from "../notation/quantity.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import { aloneContext, type EvaluationContext } from "../kind.ts";
import { presentEstimate, presentMeasured } from "../premises/present-measured.ts";
import { exactValue, numberValue } from "../premises/scalars.ts";
import type { Term, Theory } from "../premises/theory.ts";
import type { Measured } from "../premises/value.ts";
import { scalingCautions } from "./cautions.ts";
import { classify } from "./classes.ts";
import { analysisRefusals } from "./dimensional-analysis.ts";
import type { ScalingInputs } from "./inputs.ts";
import { meaningOfHeavy } from "./meaning.ts";
import { scalingPlot } from "./plot.ts";
import { sizeOf, type Size } from "./sizes.ts";
import type { ScalingRow, ScalingValue } from "./value.ts";
import { scalingWorking, type WorkedRow } from "./working.ts";
import { withRunning, type WithRunning } from "./with-running.ts";
import { readWorkingPoint, type Point } from "./working-point.ts";

/**
 * Problems: `premises-missing`, those of the working point and of naive dimensional analysis. With the latter or
 * without a working point, dimensions and classes are still given, and no sizes.
 */
export function evaluateScaling(
  inputs: ScalingInputs,
  premises: Theory | null,
  context: EvaluationContext = aloneContext,
): Evaluation<ScalingValue> {
  if (!premises) {
    return {
      value: null,
      problems: [{ code: "premises-missing", path: ["standsOn"], facts: {} }],
      notices: [],
      scalars: [],
      working: [],
    };
  }
  const ran = withRunning(premises, inputs, context);
  const { theory } = ran;
  const counting = inputs.at === "naive dimensional analysis" ? inputs.at : "natural size";
  const point = readWorkingPoint(theory, inputs);
  const refusals = counting === "natural size" ? [] : analysisRefusals(theory);
  const free = freeDimension(theory);
  const rows = theory.terms.map((term): WorkedRow => {
    const found = sizeOf(term, theory, point, counting);
    const size: Size =
      refusals.length > 0 && found.from !== "assigned" ? { ...found, quantity: null } : found;
    return { term, size, row: presentRow(term, size, free, ran) };
  });
  const heavyLatex = point.heavy?.latex ?? "\\Lambda";
  const value: ScalingValue = {
    counting,
    freeDimension: free,
    probe: presentPoint(point.probe),
    heavy: presentPoint(point.heavy),
    expansion: point.expansion && presentQuantity(point.expansion),
    meaningOfHeavy: meaningOfHeavy(inputs.couplings, heavyLatex),
    rows: rows.map(({ row }) => row),
    plot: scalingPlot(
      point,
      rows.map(({ row }) => row),
    ),
  };
  return {
    value,
    problems: [...point.problems, ...refusals, ...ran.problems],
    notices: [
      ...incompletePremises(theory),
      ...point.notices,
      ...ran.notices,
      ...scalingCautions(theory, rows, point, inputs),
    ],
    scalars: scalars(rows, value, free),
    working: scalingWorking(theory, rows, point, value, ran),
  };
}

/** The dimension left symbolic, when exactly one is. */
function freeDimension({ spacetime }: Theory): DimensionSymbol | null {
  if (spacetime.geometry === "isotropic") return spacetime.d.asRational() ? null : "d";
  const free = (["D", "z"] as const).filter((symbol) => !spacetime[symbol].asRational());
  return free.length === 1 ? (free[0] ?? null) : null;
}

function presentQuantity(quantity: Parameters<typeof shown>[0]): Measured {
  const { value, sigma, unit } = shown(quantity);
  return presentMeasured(value, sigma, unit);
}
function presentPoint(point: Point | null): ScalingValue["probe"] {
  return point && { latex: point.latex, size: point.quantity && presentQuantity(point.quantity) };
}

function presentRow(term: Term, size: Size, free: DimensionSymbol | null, ran: WithRunning): ScalingRow {
  const { scalingClass, marginalAt, ranges } = classify(term.coefficient, free);
  return {
    rowId: term.rowId,
    latex: term.latex,
    kinetic: term.kinetic,
    allowed: term.allowed,
    dimension: shownExact(term.dimension),
    coefficient: shownExact(term.coefficient),
    scalingClass,
    marginally:
      scalingClass === "marginal" && !term.kinetic ? (ran.marginally.get(term.rowId) ?? null) : null,
    dimensionFrom: ran.anomalous.has(term.rowId) && !term.kinetic ? "fixed point" : "fields",
    marginalAt: marginalAt && marginalAt.toString(),
    ranges,
    size: size.quantity && presentEstimate(shown(size.quantity).value, shown(size.quantity).sigma),
    sizeLatex: size.latex,
    sizeFrom: size.from,
  };
}

/** Ids: "<row>/dimension", "/coefficient", "/class", "/marginalAt", "/size", and "Q". */
function scalars(rows: readonly WorkedRow[], value: ScalingValue, free: DimensionSymbol | null): Scalar[] {
  const { expansion } = value;
  const ratio: Scalar[] = expansion
    ? [
        {
          id: "Q",
          label: `expansion parameter $Q = ${value.probe?.latex ?? "p"}/${value.heavy?.latex ?? "\\Lambda"}$`,
          value: numberValue(expansion.value, expansion.sigma, ""),
        },
      ]
    : [];
  return [
    ...ratio,
    ...rows.flatMap(({ term, row }): Scalar[] => {
      const { rowId, latex, size } = row;
      const marginal: Scalar[] =
        row.marginalAt === null
          ? []
          : [
              {
                id: `${rowId}/marginalAt`,
                label: `$${free ?? "d"}$ where $${latex}$ is marginal`,
                value: { type: "exact", text: row.marginalAt },
              },
            ];
      const word: Scalar[] = row.scalingClass
        ? [
            {
              id: `${rowId}/class`,
              label: `class of $${latex}$`,
              value: { type: "word", text: row.marginally ?? row.scalingClass },
            },
          ]
        : [];
      const sized: Scalar[] = size
        ? [
            {
              id: `${rowId}/size`,
              label: `size of $${latex}$ at $${value.probe?.latex ?? "p"}$`,
              value: numberValue(size.value, size.sigma, size.unit),
            },
          ]
        : [];
      return [
        { id: `${rowId}/dimension`, label: `dimension of $${latex}$`, value: exactValue(term.dimension) },
        {
          id: `${rowId}/coefficient`,
          label: `exponent of $s$ for the coefficient of $${latex}$`,
          value: exactValue(term.coefficient),
        },
        ...marginal,
        ...word,
        ...sized,
      ];
    }),
  ];
}
