/** Evaluates Running: β functions of premises and gauge groups, then numbers between scales or fixed points. */
import type { Evaluation, Notice, Problem } from "../evaluation.ts";
import type { Declared } from "../notation/read-quantity.ts";
import { declaredScales } from "../premises/declared-scales.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import type { Theory } from "../premises/theory.ts";
import { fourDimensionalBetas, threeDimensionalBetas, type Betas } from "./beta.ts";
import { betweenScales } from "./between-scales.ts";
import { belowCritical } from "./below-critical.ts";
import { gaugeCoefficients } from "./gauge.ts";
import { signs, subjects, type RunningInputs } from "./inputs.ts";
import type { Model, Parameter } from "./model.ts";
import { presentBetas, presentGauge, presentGenerated } from "./present.ts";
import type { ProjectionFailure } from "./project.ts";
import { readComponents } from "./read-components.ts";
import { readGauge, type GaugeReading } from "./read-gauge.ts";
import { readModel } from "./read-model.ts";
import { refused } from "./problems.ts";
import type { RunningValue } from "./value.ts";

/** What both halves of the block work with. */
export interface RunningContext {
  readonly inputs: RunningInputs;
  readonly theory: Theory | null;
  readonly declared: Declared;
  readonly model: Model;
  readonly betas: Betas | null;
  readonly gauge: GaugeReading;
  readonly critical: 4 | 3;
}
/** What one half adds to the β functions. */
export interface RunningPart
  extends
    Pick<RunningValue, "scales" | "couplings" | "pole" | "plot" | "epsilon" | "fixedPoints" | "drifts">,
    Pick<Evaluation, "problems" | "notices" | "scalars" | "working"> {}

const MOST_PARAMETERS = 24;
const MOST_VARIABLES = 8;
const emptyModel: Model = { scalars: [], spinors: [], parameters: [] };
const nothingDeclared: Declared = { symbols: [], lookUp: () => null };

/**
 * Problems: those of reading and projecting, `nothing-runs`, `running-needs-four`, `running-too-large`,
 * `gauge-needs-four`, `yukawa-needs-four`.
 */
export function evaluateRunning(inputs: RunningInputs, theory: Theory | null): Evaluation<RunningValue> {
  const problems: Problem[] = [];
  const declared = theory ? declaredScales(theory) : nothingDeclared;
  const critical = inputs.about === subjects[2] ? 3 : 4;
  const components = readComponents(inputs, theory, problems);
  const sign = inputs.sign === signs[1] ? -1 : 1;
  const reading = theory
    ? readModel(theory, { components, sign })
    : { model: emptyModel, problems: [], notices: [] };
  problems.push(...reading.problems);
  const gauge = readGauge(inputs, declared, problems);
  // A coupling or a field that cannot be read would change every β.
  if (problems.length > 0) return refused(problems);
  const refusal = refuse(inputs, theory, reading.model, gauge, critical);
  if (refusal) return refused([refusal]);
  const { model } = reading;
  const betas =
    model.parameters.length === 0
      ? null
      : critical === 4
        ? fourDimensionalBetas(model)
        : threeDimensionalBetas(model);
  if (betas && "failure" in betas) return refused([failureProblem(betas)]);
  const context: RunningContext = { inputs, theory, declared, model, betas, gauge, critical };
  const part = inputs.about === subjects[0] ? betweenScales(context) : belowCritical(context);
  const coefficients = gaugeCoefficients(gauge.groups, gauge.matter);
  const value: RunningValue = {
    about: subjects.find((one) => one === inputs.about) ?? subjects[0],
    betas: [
      ...presentBetas(context),
      ...presentGauge(gauge.groups, coefficients, inputs.gaugeLoops === "2" ? 2 : 1),
    ],
    generated: presentGenerated(context),
    scales: part.scales,
    couplings: part.couplings,
    pole: part.pole,
    plot: part.plot,
    critical,
    epsilon: part.epsilon,
    fixedPoints: part.fixedPoints,
    drifts: part.drifts,
    termRows: model.parameters.flatMap(({ rowIds }) => rowIds),
  };
  const notices: Notice[] = [
    ...(theory ? incompletePremises(theory) : []),
    ...reading.notices,
    ...part.notices,
  ];
  return { value, problems: part.problems, notices, scalars: part.scalars, working: part.working };
}

function refuse(
  inputs: RunningInputs,
  theory: Theory | null,
  model: Model,
  gauge: GaugeReading,
  critical: 4 | 3,
): Problem | null {
  const isRunning = inputs.about === subjects[0];
  if (model.parameters.length === 0 && gauge.groups.length === 0)
    return { code: "nothing-runs", path: theory ? ["groups"] : ["standsOn"], facts: {} };
  if (model.parameters.length > MOST_PARAMETERS || model.scalars.length > MOST_VARIABLES)
    return {
      code: "running-too-large",
      path: ["standsOn"],
      facts: { couplings: MOST_PARAMETERS, fields: MOST_VARIABLES },
    };
  if (theory && model.parameters.length > 0) {
    if (theory.spacetime.geometry !== "isotropic")
      return { code: "running-needs-isotropic", path: ["standsOn"], facts: {} };
    const d = theory.spacetime.d.asRational();
    if (isRunning && d?.toString() !== "4")
      return { code: "running-needs-four", path: ["about"], facts: { d: theory.spacetime.d.toString() } };
  }
  if (isRunning) return null;
  if (model.parameters.length === 0)
    return { code: "fixed-points-need-premises", path: ["standsOn"], facts: {} };
  if (critical === 3 && model.parameters.some(({ yukawa }) => yukawa.length > 0))
    return { code: "yukawa-needs-four", path: ["about"], facts: {} };
  return null;
}

function failureProblem({ failure, parameters }: ProjectionFailure): Problem {
  const symbols = names(parameters);
  return failure === "dependent"
    ? { code: "couplings-dependent", path: ["standsOn"], facts: { symbols } }
    : { code: "couplings-driven-apart", path: ["standsOn"], facts: { symbols } };
}
function names(parameters: readonly Parameter[]): string {
  return parameters.map(({ latex }) => latex).join(",\\; ");
}
