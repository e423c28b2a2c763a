/** The derivation of one graph's degree, with this theory's numbers in both formulas. */
import type { WorkingStep } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { Theory } from "../premises/theory.ts";
import type { Degree, GraphParts } from "./degree.ts";
import { addHalfEdges, countOf, noHalfEdges } from "./half-edges.ts";
import type { GraphDivergence } from "./value.ts";

export function explainGraph(
  graph: GraphParts,
  degree: Degree,
  value: GraphDivergence,
  theory: Theory,
): WorkingStep[] {
  const steps: WorkingStep[] = [
    { step: "heading", text: "Internal lines and loops" },
    {
      step: "formula",
      latex:
        "I_f = \\tfrac12\\Bigl(\\sum_i V_i n_{if} - E_f\\Bigr), \\qquad L = \\sum_f I_f - \\sum_i V_i + 1",
    },
    ...lineSteps(graph, degree, theory),
    { step: "formula", latex: loopFormula(graph, degree) },
    { step: "heading", text: "Degree by powers of momentum" },
    {
      step: "prose",
      text: `The measure weighs $${theory.measure.toLatex()}$; a propagator of $f$ falls as $p^{2\\delta_f - ${theory.measure.toLatex()}}$.`,
    },
    {
      step: "formula",
      latex: aligned(
        "[\\text{measure}]\\,L - \\sum_f I_f\\,([\\text{measure}] - 2\\delta_f) + \\sum_i V_i k_i",
        value.byMomenta,
      ),
    },
    { step: "heading", text: "Degree by dimensions" },
    {
      step: "formula",
      latex: aligned("[\\text{measure}] - \\sum_f E_f \\delta_f - \\sum_i V_i [g_i]", value.byDimensions),
    },
    {
      step: "prose",
      text: "Both ways agree (Weinberg 1995, section 12.1; Peskin and Schroeder 1995, section 10.1).",
    },
    ...symbolicSteps(value),
    ...pictureSteps(value),
  ];
  return value.counterterms.length === 0 ? steps : [...steps, ...countertermSteps(value)];
}

/** The general formula above the one with numbers, which begins with "\\omega =". */
function aligned(general: string, numbers: string): string {
  return `\\begin{aligned} \\omega &= ${general} \\\\ &${numbers.replace(/^\\omega /, "")} \\end{aligned}`;
}

function lineSteps({ vertices, legs }: GraphParts, { lines }: Degree, theory: Theory): WorkingStep[] {
  const ends = vertices.reduce(
    (sum, { edges, count }) => addHalfEdges(sum, edges, count),
    noHalfEdges(theory),
  );
  return theory.fields.flatMap((field, f): WorkingStep[] => {
    if (countOf(ends, f) === 0) return [];
    const parts = vertices
      .filter(({ edges }) => countOf(edges, f) > 0)
      .map(({ edges, count }) => `${count}\\cdot ${countOf(edges, f)}`);
    return [
      {
        step: "formula",
        latex: `I_{${field.latex}} = \\tfrac12\\bigl(${parts.join(" + ")} - ${countOf(legs, f)}\\bigr) = ${lines[f] ?? 0}`,
      },
    ];
  });
}

function loopFormula({ vertices }: GraphParts, { lines, loops }: Degree): string {
  const used = lines.filter((count) => count > 0);
  return `L = ${used.length === 0 ? "0" : used.join(" + ")} - ${vertices.map(({ count }) => count).join(" - ")} + 1 = ${loops}`;
}

function symbolicSteps({ logarithmicAt: at }: GraphDivergence): WorkingStep[] {
  if (!at) return [];
  const [above, below] = at.growsAbove
    ? ["diverges as a power", "converges"]
    : ["converges", "diverges as a power"];
  return [
    {
      step: "prose",
      text: `$\\omega = 0$ at $${at.symbol} = ${at.value.latex}$: there the graph diverges logarithmically; above it ${above}, below it ${below}.`,
    },
  ];
}

/** Which graphs there are, and the sum of their weights that an integral over a single number checks. */
function pictureSteps({ pictures }: GraphDivergence): WorkingStep[] {
  if (!pictures?.complete || pictures.count > pictures.list.length || pictures.count === 0) return [];
  // The sum over a list from which graphs were left out is not that of field theory in zero dimensions.
  if ((pictures.leftOut ?? "nothing") !== "nothing" || (pictures.cancelled ?? 0) > 0) return [];
  const weights = pictures.list.map(({ symmetry, labellings }) =>
    Rational.of(BigInt(labellings), BigInt(symmetry)),
  );
  const total = weights.reduce((sum, weight) => sum.plus(weight), Rational.zero);
  const terms =
    weights.length > 12
      ? ""
      : ` = ${pictures.list.map(({ symmetry, labellings }) => `\\tfrac{${labellings}}{${symmetry}}`).join(" + ")}`;
  return [
    { step: "heading", text: "Graphs" },
    {
      step: "prose",
      text: `There ${pictures.count === 1 ? "is 1 graph" : `are ${String(pictures.count)} graphs`}, ${pictures.irreducible ? "one-particle irreducible" : "connected"}, with ${pictures.labelled ? "legs told apart" : "legs of one field interchangeable"}. $S$ permutes vertices and lines and holds the legs fixed; $N$ is the number of ways to label them. The sum is what field theory in zero dimensions gives with these vertices.`,
    },
    { step: "formula", latex: `\\sum \\frac{N}{S}${terms} = ${total.toLatex()}` },
  ];
}

function countertermSteps({ counterterms, omega }: GraphDivergence): WorkingStep[] {
  return [
    { step: "heading", text: "Counterterms" },
    {
      step: "prose",
      text: `An overall divergence is a polynomial of degree $\\omega = ${omega.latex}$ in external momenta and masses. Its operators have the external legs as factors; derivatives and vector indices contract in pairs unless a spinor or a fixed velocity takes one.`,
    },
    ...counterterms.map((term): WorkingStep => {
      const gauge = term.gauge === "excluded" ? ",\\quad \\text{excluded by gauge invariance}" : "";
      const rest = term.massPower.text === "0" ? "" : `,\\quad \\text{rest } [m]^{${term.massPower.latex}}`;
      return {
        step: "formula",
        latex: `${term.latex}:\\quad \\Delta = ${term.dimension.latex},\\quad [c] = ${term.coefficient.latex}${rest}${gauge}`,
      };
    }),
  ];
}
