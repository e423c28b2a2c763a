/** The derivation: what runs and why, then numbers or fixed points. */
import type { WorkingStep } from "../evaluation.ts";
import { measuredLatex } from "../notation/measured.ts";
import type { Column } from "./between-scales.ts";
import type { RunningContext } from "./evaluate.ts";
import type { FixedPointSearch } from "./fixed-points.ts";
import type { RunningResult, RunningSystem } from "./flow.ts";
import { gaugeCoefficients } from "./gauge.ts";
import { RELATIVE_TOLERANCE } from "./integrate.ts";
import { polynomialLatex } from "./polynomial-latex.ts";
import { presentBetas, presentGauge, presentGenerated } from "./present.ts";
import type { RunningScales } from "./read-scales.ts";
import type { CouplingRow, FixedPointRow } from "./value.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

/** The potential itself and how its β functions follow. */
function potentialSteps(context: RunningContext): WorkingStep[] {
  const { model, betas, critical } = context;
  if (!betas) return [];
  const fields = model.scalars.filter(({ components }) => components !== 1);
  const vectors = fields.map(
    ({ latex, components }) => `$${latex}$ stands for the length of a vector of ${components} components`,
  );
  const source =
    critical === 4
      ? "In four dimensions the logarithmic divergence of the one-loop effective potential is $(V'')^2$, traced over the scalars (Coleman and Weinberg 1973). In minimal subtraction, with $\\phi$ not renormalised at this order by the potential itself,"
      : "In three dimensions one loop has no logarithm; the first comes at two loops from the graph with three lines (Pisarski 1982),";
  const law =
    critical === 4
      ? "\\mu\\,\\frac{dV}{d\\mu} = \\frac{1}{32\\pi^2}\\,\\mathrm{Tr}\\,(V'')^2"
      : "\\mu\\,\\frac{dV}{d\\mu} = \\frac{1}{3\\,(8\\pi)^2}\\,V_{ijk}V_{ijk}";
  return [
    heading("The potential"),
    formula(`V = ${potentialLatex(context)}`),
    ...(vectors.length > 0
      ? [prose(`${vectors.join("; ")}: along it $V''$ is the second derivative, across it $V'/r$.`)]
      : []),
    heading("β functions"),
    prose(source),
    formula(law),
    ...(betas.yukawa ? yukawaSteps() : []),
    prose(
      "Comparing the coefficients of each product of fields on both sides gives, for every coupling as it is normalised above,",
    ),
    ...presentBetas(context).map(({ leftLatex, rightLatex }) => formula(`${leftLatex} = ${rightLatex}`)),
    ...mixingSteps(context),
    ...generatedSteps(context),
  ];
}

function potentialLatex({ model, betas }: RunningContext): string {
  const fields = model.scalars.map(({ name, latex }) => ({ variable: name, latex, factors: [] }));
  const names = new Set(fields.map(({ variable }) => variable));
  const parts = [...(betas?.potential.collect((name) => names.has(name)).values() ?? [])];
  return parts
    .map(({ inner, rest }, index) => {
      const operator = [...inner.powers]
        .map(([name, power]) => {
          const latex = fields.find(({ variable }) => variable === name)?.latex ?? name;
          return power === 1 ? latex : latex.includes("^") ? `(${latex})^{${power}}` : `${latex}^{${power}}`;
        })
        .join(" ");
      const before = polynomialLatex(rest, model.parameters);
      const several = rest.parts().length > 1;
      const written = several ? `\\left(${before}\\right)` : before;
      const sign = index === 0 ? "" : written.startsWith("-") ? " - " : " + ";
      return `${sign}${index > 0 ? written.replace(/^-/, "") : written}\\,${operator}`;
    })
    .join("");
}

function yukawaSteps(): WorkingStep[] {
  return [
    prose(
      "Fermions enter with their mass matrix $M = Y^a\\phi_a$, in two-component spinors, and with the anomalous dimensions they give the scalars (Machacek and Vaughn 1984):",
    ),
    formula(
      "\\mu\\,\\frac{dV}{d\\mu} = \\frac{1}{32\\pi^2}\\left[\\mathrm{Tr}\\,(V'')^2 - 2\\,\\mathrm{Tr}\\,(M^\\dagger M)^2\\right] + \\phi_a\\,\\gamma_{ab}\\,\\partial_b V,\\qquad 16\\pi^2\\gamma_{ab} = \\tfrac12\\,\\mathrm{Tr}\\,(Y^{\\dagger a}Y^b + Y^{\\dagger b}Y^a)",
    ),
    formula(
      "16\\pi^2\\,\\mu\\,\\frac{dY^a}{d\\mu} = \\tfrac12\\left(Y_2^{T}Y^a + Y^aY_2\\right) + 2\\,Y^bY^{\\dagger a}Y^b + 16\\pi^2\\,Y^b\\gamma_{ba},\\qquad Y_2 = Y^{\\dagger b}Y^b",
    ),
  ];
}

const LARGEST_MATRIX = 6;

/** ∂β_i/∂g_j: how couplings mix. */
function mixingSteps({ model, betas }: RunningContext): WorkingStep[] {
  const { parameters } = model;
  if (!betas || parameters.length < 2 || parameters.length > LARGEST_MATRIX) return [];
  const rows = betas.slopes.map((slope) =>
    parameters.map(({ variable }) => polynomialLatex(slope.derivative(variable), parameters)).join(" & "),
  );
  const order = parameters.map(({ latex }) => latex).join(",\\, ");
  return [
    prose(
      `In the order $${order}$ the couplings mix by the matrix of derivatives $\\partial\\beta_i/\\partial g_j$, up to the same factor,`,
    ),
    formula(`\\begin{pmatrix} ${rows.join(" \\\\ ")} \\end{pmatrix}`),
  ];
}

function generatedSteps(context: RunningContext): WorkingStep[] {
  const generated = presentGenerated(context);
  if (generated.length === 0) return [];
  return [
    prose("Running also makes what no term of the premises has:"),
    ...generated.map(({ operatorLatex, slopeLatex }) =>
      formula(
        operatorLatex === "1"
          ? `\\mu\\,\\frac{dV}{d\\mu} \\ni ${slopeLatex}\\quad\\text{(vacuum energy)}`
          : `\\mu\\,\\frac{dV}{d\\mu} \\ni ${slopeLatex}\\,${operatorLatex}`,
      ),
    ),
  ];
}

function gaugeSteps({ gauge, inputs }: RunningContext): WorkingStep[] {
  if (gauge.groups.length === 0) return [];
  const coefficients = gaugeCoefficients(gauge.groups, gauge.matter);
  const loops = inputs.gaugeLoops === "2" ? 2 : 1;
  const leaving = gauge.matter.filter(({ mass }) => mass !== null).length;
  return [
    heading("Gauge couplings"),
    prose(
      "With $T$ and $C$ the index and Casimir of each representation, summed over Weyl fermions $F$ and complex scalars $S$ (Gross and Wilczek 1973, Politzer 1973),",
    ),
    formula(
      "\\mu\\,\\frac{d\\alpha}{d\\mu} = -\\frac{\\alpha^2}{2\\pi}\\,\\beta_0,\\qquad \\beta_0 = \\tfrac{11}{3}C(G) - \\tfrac23\\textstyle\\sum_F T(F) - \\tfrac13\\sum_S T(S)",
    ),
    ...(loops === 2
      ? [
          prose("and at two loops (Caswell 1974, Jones 1974, Machacek and Vaughn 1983)"),
          formula(
            "\\beta_0 \\to \\beta_0 + \\sum_j \\beta_{1,ij}\\,\\frac{\\alpha_j}{4\\pi},\\qquad \\beta_{1,ij} = \\delta_{ij}\\left[\\tfrac{34}{3}C(G)^2 - C(G)\\textstyle\\left(\\tfrac{10}{3}\\sum_F T + \\tfrac23\\sum_S T\\right)\\right] - 2\\sum_F T_i C_j - 4\\sum_S T_i C_j.",
          ),
        ]
      : []),
    ...(leaving > 0 ? [prose("With every field in place:")] : []),
    ...presentGauge(gauge.groups, coefficients, loops).map(({ leftLatex, rightLatex }) =>
      formula(`${leftLatex} = ${rightLatex}`),
    ),
    ...(leaving > 0
      ? [
          prose(
            "A field with a mass counts above it and has left below; couplings are continuous there, which is right at this order for thresholds at the running mass.",
          ),
        ]
      : []),
  ];
}

export interface Numbers {
  readonly system: RunningSystem;
  readonly scales: RunningScales;
  readonly result: RunningResult;
  readonly columns: readonly Column[];
  readonly couplings: readonly CouplingRow[];
}

export function runningWorking(context: RunningContext, numbers: Numbers | null): WorkingStep[] {
  return [...potentialSteps(context), ...gaugeSteps(context), ...(numbers ? numberSteps(numbers) : [])];
}

function numberSteps({ result, columns, couplings, scales }: Numbers): WorkingStep[] {
  const [first, last] = [columns[0], columns.at(-1)];
  const power = Math.round(Math.log10(RELATIVE_TOLERANCE));
  const rows = couplings.flatMap(({ latex, values }) => {
    const [start, end] = [values[0], values.at(-1)];
    if (!start) return [];
    const shown = (found: { readonly value: number } | null | undefined, unit: string) =>
      found ? measuredLatex(found.value, 0, unit, 6) : "\\text{past the pole}";
    return { latex, start, end, shown };
  });
  return [
    heading("Between the scales"),
    prose(
      `From ${first?.text ?? ""} to ${last?.text ?? ""} the equations are integrated in $\\ln\\mu$ by extrapolation with control of step and order (Hairer, Nørsett and Wanner 1993, section II.9), each step to a relative error of $10^{${power}}$.`,
    ),
    ...rows.map(({ latex, start, end, shown }) => {
      const unit = couplings.find((row) => row.latex === latex)?.unit ?? "";
      return formula(`${latex}:\\quad ${shown(start, unit)} \\;\\to\\; ${shown(end, unit)}`);
    }),
    ...(result.pole
      ? [
          prose(
            `The couplings reach a pole at $\\mu_* = ${measuredLatex(result.pole.scale / scales.unit.size, 0, scales.unit.name, 6)}$. One loop has lost its meaning before: where a coupling over its loop factor is of order one.`,
          ),
        ]
      : []),
  ];
}

export function fixedPointWorking(
  context: RunningContext,
  search: FixedPointSearch | null,
  rows: readonly FixedPointRow[] | null,
): WorkingStep[] {
  const { critical } = context;
  if (!search || !rows) return potentialSteps(context);
  const marginal = search.marginal.map(({ latex }) => latex).join(",\\, ");
  return [
    ...potentialSteps(context),
    heading(`Below ${critical === 4 ? "four" : "three"} dimensions`),
    prose(
      `For an operator of $n$ scalars the dimensionless coupling has in $d = ${critical} - \\epsilon$ dimensions (Wilson and Fisher 1972)`,
    ),
    formula(
      `\\mu\\,\\frac{dg_n}{d\\mu} = -\\left(d - \\tfrac{n}{2}(d - 2)\\right) g_n + \\beta_n,\\qquad d - \\tfrac{n}{2}(d-2) = ${critical} - ${critical === 4 ? "n" : "\\tfrac{n}{2}"} + \\left(\\tfrac{n}{2} - 1\\right)\\epsilon.`,
    ),
    prose(
      `The marginal ones, $${marginal}$, have ${rows.length} real fixed point${rows.length === 1 ? "" : "s"}${search.complete ? "" : " that a search from many places finds"}; all other couplings vanish there.`,
    ),
    ...rows.flatMap((row) => [
      formula(row.couplings.map(({ latex }) => latex).join(",\\qquad ")),
      ...(row.exponents.length === 0
        ? []
        : [
            prose(
              "The eigenvalues of $\\partial\\beta/\\partial g$ there are slopes $\\omega$, and $\\Delta = d + \\omega$:",
            ),
            ...row.exponents.map(({ operatorLatex, slopeLatex, dimensionLatex }) =>
              formula(`${operatorLatex}:\\quad \\omega = ${slopeLatex},\\qquad \\Delta = ${dimensionLatex}`),
            ),
          ]),
      ...row.etas
        .filter(({ value }) => value !== 0)
        .map(({ latex, formula: eta }) =>
          formula(
            `\\eta_{${latex}} = 2\\gamma_{${latex}} = \\frac{\\lambda_{iklm}\\lambda_{iklm}}{6\\,(16\\pi^2)^2} = ${eta}`,
          ),
        ),
    ]),
    prose(
      "All to the lowest order at which they differ from free fields; $\\omega$ and $\\Delta$ have corrections of order $\\epsilon^2$.",
    ),
  ];
}
