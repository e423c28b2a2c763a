/** One graph: its degree both ways, what that means, and the counterterms it demands. */
import type { Evaluation, Notice, Scalar } from "../evaluation.ts";
import { shown } from "../exact/shown.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import type { Theory } from "../premises/theory.ts";
import { graphCautions } from "./cautions.ts";
import { countertermsOf } from "./counterterms.ts";
import type { Degree, GraphParts } from "./degree.ts";
import { byDimensions, byMomenta } from "./formulas.ts";
import { totalOf } from "./half-edges.ts";
import type { DivergenceInputs } from "./inputs.ts";
import { describeLegs } from "./legs.ts";
import { cutoffMeaning, dimensionalMeaning, logarithmicAt, verdictOf, type GraphFacts } from "./meaning.ts";
import { picturesOf } from "./pictures.ts";
import { readGraph } from "./read-graph.ts";
import { vanishesInVacuum } from "./retarded.ts";
import { forbiddingSymmetry } from "./selection.ts";
import type { GraphDivergence } from "./value.ts";
import { explainGraph } from "./working-graph.ts";

export function evaluateGraph(inputs: DivergenceInputs, theory: Theory): Evaluation<GraphDivergence> {
  const read = readGraph(inputs, theory);
  if (!read.ok) return { value: null, problems: read.problems, notices: [], scalars: [], working: [] };
  const { graph, degree } = read;
  const value = describeGraph(graph, degree, theory, inputs);
  const cautions = graphCautions(
    {
      sign: degree.omega.asRational()?.sign() ?? null,
      loops: degree.loops,
      legs: graph.legs,
      vertexCount: graph.vertices.reduce((sum, { count }) => sum + count, 0),
      fewestLegs: Math.min(...graph.vertices.map(({ edges }) => totalOf(edges))),
      vanishes: value.dimensional === "vanishes: retarded loop",
    },
    theory,
  );
  const broken = inputs.symmetries === "yes" ? forbiddingSymmetry(graph.legs, theory) : null;
  const notices: Notice[] = [
    ...incompletePremises(theory),
    ...(broken ? [{ code: "legs-break-symmetry", path: ["legs"], facts: { symmetry: broken.name } }] : []),
    ...cautions,
  ];
  return {
    value,
    problems: [],
    notices,
    scalars: scalarsOf(value),
    working: explainGraph(graph, degree, value, theory),
  };
}

function describeGraph(
  graph: GraphParts,
  degree: Degree,
  theory: Theory,
  inputs: DivergenceInputs,
): GraphDivergence {
  const { omega, loops, lines } = degree;
  const number = omega.asRational();
  const verdict = verdictOf(omega, loops);
  const counterterms =
    number && loops > 0 ? countertermsOf(number, graph.legs, theory, inputs.symmetries === "yes") : [];
  const facts: GraphFacts = {
    verdict,
    omega,
    loops,
    counterterms,
    vanishes: loops > 0 && vanishesInVacuum(graph.vertices, graph.legs, theory),
    onlySchroedingerLines: theory.fields.every(
      ({ kind }, f) => kind === "Schrödinger field" || lines[f] === 0,
    ),
  };
  const dimensional = dimensionalMeaning(facts, theory);
  return {
    mode: "one graph",
    legs: describeLegs(graph.legs, theory),
    vertices: graph.vertices.map(({ term, count }) => ({
      termRowId: term.rowId,
      latex: term.latex,
      count,
      coefficient: shown(term.ultravioletCoefficient),
      derivatives: shown(term.derivativeWeight),
    })),
    lines: theory.fields.flatMap((field, f) => {
      const count = lines[f] ?? 0;
      return count === 0
        ? []
        : [{ fieldRowId: field.rowId, latex: field.latex, count, weight: shown(field.weight) }];
    }),
    loops,
    omega: shown(omega),
    byMomenta: byMomenta(graph, degree, theory),
    byDimensions: byDimensions(graph, degree, theory),
    verdict,
    logarithmicAt: loops === 0 ? null : logarithmicAt(omega),
    dimensional,
    cutoff: cutoffMeaning(facts, dimensional),
    cutoffPower: verdict === "power" && !facts.vanishes ? shown(omega) : null,
    counterterms: facts.vanishes ? [] : counterterms,
    pictures: picturesOf(graph, loops, theory, inputs),
  };
}

function scalarsOf(value: GraphDivergence): Scalar[] {
  const legs = value.legs.latex === "1" ? "the vacuum" : `$${value.legs.latex}$`;
  return [
    {
      id: "omega",
      label: `degree of divergence of ${legs}`,
      value: { type: "exact", text: value.omega.text },
    },
    {
      id: "loops",
      label: `loops of the graph with legs ${legs}`,
      value: { type: "exact", text: String(value.loops) },
    },
    {
      id: "verdict",
      label: `convergence of the graph with legs ${legs}`,
      value: { type: "word", text: verdictWord(value) },
    },
  ];
}

/** "logarithmic", "convergent", "power 2", "tree", "logarithmic at d = 4". */
function verdictWord({ verdict, omega, logarithmicAt: at }: GraphDivergence): string {
  if (verdict === "power") return `power ${omega.text}`;
  if (verdict === "depends")
    return at ? `logarithmic at ${at.symbol} = ${at.value.text}` : "depends on the dimension";
  return verdict;
}
