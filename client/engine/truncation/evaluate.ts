/** Evaluates a Truncation error block: coefficients, the four estimates at every order, scalars and working. */
import type { Evaluation, Notice, Problem } from "../evaluation.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import { readCurve } from "./curve.ts";
import type { CurveSource } from "./curve-data.ts";
import { curveDataOf } from "./curve-source.ts";
import { readExpansionParameter } from "./expansion-parameter.ts";
import { judge } from "./judge.ts";
import { presentValue } from "./present.ts";
import { presentCurve } from "./present-curve.ts";
import { readOrders } from "./read-orders.ts";
import { readSettings } from "./read-settings.ts";
import { describeScalars } from "./scalars.ts";
import { describeCurveScalars } from "./scalars-curve.ts";
import { estimateSeries, type Series } from "./series.ts";
import { rememberQuantiles } from "./student-t.ts";
import { rememberSums } from "./uniform-sum.ts";
import type { TruncationInputs } from "./shape.ts";
import type { TruncationValue } from "./value.ts";
import { describeWorking } from "./working.ts";

/**
 * Pure and total. Errors in the inputs leave no value; a refused method is a problem beside the value when it is
 * the one highlighted, and a notice otherwise.
 *
 * @param theory gives the scales that `q` may name; null when the block stands on no premises
 */
export function evaluateTruncation(
  inputs: TruncationInputs,
  theory: Theory | null,
  context: EvaluationContext,
): Evaluation<TruncationValue> {
  return inputs.data === "" ? evaluatePoint(inputs, theory) : evaluateCurve(inputs, theory, context);
}

function evaluatePoint(inputs: TruncationInputs, theory: Theory | null): Evaluation<TruncationValue> {
  const orders = readOrders(inputs.orders);
  const settings = readSettings(inputs);
  const parameter = readExpansionParameter(inputs.q, theory);
  const problems: Problem[] = [
    ...orders.problems,
    ...settings.problems,
    ...(parameter.ok ? [] : parameter.problems),
  ];
  const notices: Notice[] = [...orders.notices, ...settings.notices];
  const lowest = orders.known[0];
  if (settings.reference === null && lowest && lowest.value === 0) {
    problems.push({ code: "reference-zero", path: ["orders", lowest.rowId, "value"], facts: { text: "0" } });
  }
  if (problems.length > 0 || !parameter.ok) return empty(problems, notices);

  const series: Series = {
    known: orders.known,
    absent: orders.absent.map(({ order }) => order),
    absentRows: orders.absent,
    reference: settings.reference,
    includeOrderZero: inputs.first === "from c_0",
    degrees: settings.degrees,
    nu0: settings.nu0,
    tau0: settings.tau0,
    quantiles: rememberQuantiles(),
    sets: settings.sets && { ...settings.sets, sums: rememberSums() },
    spreadAlong: null,
  };
  const { q } = parameter;
  const estimate = estimateSeries(series, q.value);
  if (!estimate)
    return empty([{ code: "coefficients-not-finite", path: ["q"], facts: { value: q.value } }], notices);

  const value = presentValue(inputs, series, q, estimate);
  const verdict = judge(inputs, series, q, value);
  return {
    value,
    problems: verdict.problems,
    notices: [...notices, ...verdict.notices],
    scalars: describeScalars(value),
    working: describeWorking(value, series, inputs),
  };
}

function evaluateCurve(
  inputs: TruncationInputs,
  theory: Theory | null,
  context: EvaluationContext,
): Evaluation<TruncationValue> {
  const settings = readSettings(inputs);
  const sources = sourcesOf(inputs, context);
  if (settings.problems.length > 0) return empty(settings.problems, settings.notices);
  const read = readCurve(inputs, settings, theory, sources, context.tell);
  const before = [...settings.notices, ...read.notices];
  if (!read.curve) return empty(read.problems, before);
  const { curve } = read;
  const point = presentValue(
    inputs,
    curve.series,
    curve.at,
    curve.estimate,
    curve.correlated?.spreadsMoved ?? null,
  );
  const along = presentCurve(inputs, curve);
  const value: TruncationValue = {
    ...point,
    unit: point.unit === "" ? curve.data.unit : point.unit,
    curve: along,
  };
  const verdict = judge(inputs, curve.series, curve.at, value);
  return {
    value,
    problems: [...read.problems, ...verdict.problems],
    notices: [...before, ...verdict.notices],
    scalars: [...describeScalars(value), ...describeCurveScalars(along)],
    working: describeWorking(value, curve.series, inputs),
  };
}

/** Blocks that cannot be used are left out: the evaluator has said why. */
function sourcesOf(inputs: TruncationInputs, context: EvaluationContext): ReadonlyMap<string, CurveSource> {
  const sources = new Map<string, CurveSource>();
  for (const id of [inputs.data, ...inputs.observables.map(({ data }) => data)]) {
    const source = id === "" ? null : context.source(id);
    if (source) sources.set(id, { name: source.title, data: curveDataOf(source) });
  }
  return sources;
}

function empty(problems: readonly Problem[], notices: readonly Notice[]): Evaluation<TruncationValue> {
  return { value: null, problems, notices, scalars: [], working: [] };
}
