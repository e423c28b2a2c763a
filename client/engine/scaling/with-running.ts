/** What a Running block adds to Scaling: how marginal terms drift at one loop, or dimensions at a fixed point. */
import type { Notice, Problem, WorkingStep } from "../evaluation.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Term, Theory } from "../premises/theory.ts";
import type { FixedPointRow, RunningValue } from "../running/value.ts";
import type { ScalingInputs } from "./inputs.ts";
import type { Marginally } from "./value.ts";

export interface WithRunning {
  /** With the dimensions at the fixed point where they are known. */
  readonly theory: Theory;
  readonly marginally: ReadonlyMap<string, Marginally>;
  /** Rows whose dimension is that at the fixed point, with how it came about. */
  readonly anomalous: ReadonlyMap<string, string>;
  readonly problems: readonly Problem[];
  readonly notices: readonly Notice[];
  readonly steps: readonly WorkingStep[];
}

/**
 * Problems: `fixed-point-gone`, `fixed-point-above-critical`. Notices: `running-of-other-premises`,
 * `dimensions-not-known-there`.
 */
export function withRunning(
  theory: Theory,
  inputs: Pick<ScalingInputs, "running" | "fixedPoint">,
  context: EvaluationContext,
): WithRunning {
  const plain: WithRunning = {
    theory,
    marginally: new Map(),
    anomalous: new Map(),
    problems: [],
    notices: [],
    steps: [],
  };
  const source = inputs.running === "" ? null : context.source(inputs.running);
  if (!source) return plain;
  const value = source.value as RunningValue; // the evaluator allows no other kind here
  const title = source.title === "" ? "the Running block" : `“${source.title}”`;
  const own = new Set(theory.terms.map(({ rowId }) => rowId));
  if (!value.termRows.some((rowId) => own.has(rowId)))
    return { ...plain, notices: [{ code: "running-of-other-premises", path: ["running"], facts: {} }] };
  if (value.fixedPoints.length === 0) return drifting(plain, value, title);
  return atFixedPoint(plain, value, inputs.fixedPoint.trim(), title);
}

const words: Readonly<Record<"grows with energy" | "fades with energy" | "stays", Marginally>> = {
  "grows with energy": "marginally irrelevant",
  "fades with energy": "marginally relevant",
  stays: "exactly marginal at one loop",
};

function drifting(plain: WithRunning, { drifts }: RunningValue, title: string): WithRunning {
  const own = new Set(plain.theory.terms.map(({ rowId }) => rowId));
  const marginally = new Map(
    drifts.flatMap(({ rowId, drift }) =>
      own.has(rowId) && drift !== null ? [[rowId, words[drift]] as const] : [],
    ),
  );
  return {
    ...plain,
    marginally,
    steps: [
      { step: "heading", text: "Marginal couplings at one loop" },
      {
        step: "prose",
        text: `By the β functions of ${title}, a marginal coupling that grows with energy fades toward low energy, so it is marginally irrelevant; one that fades with energy is marginally relevant.`,
      },
    ],
  };
}

function atFixedPoint(plain: WithRunning, value: RunningValue, name: string, title: string): WithRunning {
  const { theory } = plain;
  const point = chosen(value.fixedPoints, name);
  const refuse = (code: string, path: Problem["path"], facts: Problem["facts"]): WithRunning => ({
    ...plain,
    problems: [{ code, path, facts }],
  });
  if (!point) return refuse("fixed-point-gone", ["fixedPoint"], { text: name });
  const critical = value.critical;
  const { spacetime } = theory;
  const d = spacetime.geometry === "isotropic" ? spacetime.d : null;
  const epsilon = d && LinearForm.constant(critical).minus(d);
  const number = epsilon?.asRational();
  if (!epsilon || (number && number.sign() <= 0))
    return refuse("fixed-point-above-critical", ["running"], { d: critical });
  const forms = new Map(
    point.dimensions.map(({ rowId, constant, perEpsilon }) => {
      const [a, b] = [Rational.parse(constant), Rational.parse(perEpsilon)];
      if (!a || !b) throw new Error("Running gives dimensions as fractions");
      const dimension = LinearForm.constant(a).plus(epsilon.times(b));
      const latex = `${a.toLatex()} ${b.sign() < 0 ? "-" : "+"} ${b.absolute().toLatex()}\\,\\epsilon = ${dimension.toLatex()}`;
      return [rowId, { dimension, latex }] as const;
    }),
  );
  const terms = theory.terms.map((term): Term => {
    const form = forms.get(term.rowId);
    if (!form || term.kinetic) return term;
    return { ...term, dimension: form.dimension, coefficient: theory.measure.minus(form.dimension) };
  });
  const silent = theory.terms.filter((term) => !forms.has(term.rowId) && !term.kinetic && term.allowed);
  const place = point.couplings.map(({ latex }) => latex).join(",\\; ");
  const notices: Notice[] = [];
  if (silent.length > 0)
    notices.push({
      code: "dimensions-not-known-there",
      path: ["running"],
      facts: { terms: silent.map(({ latex }) => latex).join(",\\; ") },
    });
  return {
    ...plain,
    theory: { ...theory, terms },
    anomalous: new Map([...forms].map(([rowId, { latex }]) => [rowId, latex])),
    notices,
    steps: [
      { step: "heading", text: "At the fixed point" },
      {
        step: "prose",
        text: `Dimensions are those at the fixed point $${place}$ of ${title}, to first order in $\\epsilon = ${critical} - d${number ? ` = ${number.toLatex()}` : ""}$: $\\Delta = d + \\omega$ with $\\omega$ the slope of the coupling there.`,
      },
    ],
  };
}

function chosen(points: readonly FixedPointRow[], name: string): FixedPointRow | undefined {
  if (name !== "") return points.find(({ id }) => id === name);
  const others = points.filter(({ id }) => id !== "gaussian");
  return others.find(({ unstable }) => unstable === 0) ?? others[0] ?? points[0];
}
