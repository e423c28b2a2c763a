/** The derivation of an order plan: parameter, sizes, sums, the cut, and what is assumed. */
import type { WorkingStep } from "../evaluation.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import type { PlanTerm } from "./terms.ts";
import type { OrderPlanValue } from "./value.ts";

/** "0.0119", "3.2\times 10^{-5}": enough digits to follow, as LaTeX. */
export function floatLatex(value: number): string {
  if (value === 0) return "0";
  if (!Number.isFinite(value)) return "\\infty";
  const [mantissa = "", exponent = "0"] = value.toExponential(2).split("e");
  const power = Number(exponent);
  return power >= -3 && power <= 4
    ? String(Number(value.toPrecision(3)))
    : `${mantissa}\\times 10^{${power}}`;
}

export function explainPlan(
  value: OrderPlanValue,
  terms: readonly PlanTerm[],
  { spacetime }: Pick<Theory, "spacetime">,
): WorkingStep[] {
  return [
    ...parameterSteps(value),
    ...sizeSteps(value, terms, spacetime.geometry === "isotropic" ? "d" : "D - z"),
    ...sumSteps(value),
    ...loopSteps(value),
    ...latticeSteps(value),
    { step: "heading", text: "Assumptions" },
    {
      step: "prose",
      text: `Coefficients are natural unless stated, the scales are well separated, and the premises list every term through order ${value.firstUnlisted.order.text} exclusive. Insertions of order 0 come along with every order and are not counted again. Sizes are added without regard to sign; the estimate is a model of what is left out, not a bound.`,
    },
  ];
}

/** "Q^{2}", and "Q" or "1" where the power is not written. */
function powerOfQ(exponent: { readonly text: string; readonly latex: string }): string {
  return exponent.text === "0" ? "1" : exponent.text === "1" ? "Q" : `Q^{${exponent.latex}}`;
}

function parameterSteps({ parameters, probe, heavy }: OrderPlanValue): WorkingStep[] {
  const [Q] = parameters;
  if (!Q) return [];
  const spread = Q.sigma > 0 ? ` \\pm ${floatLatex(Q.sigma)}` : "";
  const unit = (scale: typeof probe) => (scale.unit === "" ? "" : `\\,\\mathrm{${scale.unit}}`);
  return [
    { step: "heading", text: "Expansion parameter" },
    {
      step: "formula",
      latex: `Q = ${Q.latex} = \\frac{${floatLatex(probe.value)}${unit(probe)}}{${floatLatex(heavy.value)}${unit(heavy)}} = ${floatLatex(Q.value)}${spread}`,
    },
  ];
}

function sizeSteps(
  { terms: sized, orders, observable }: OrderPlanValue,
  terms: readonly PlanTerm[],
  measure: string,
): WorkingStep[] {
  const lines = terms.map((term): WorkingStep => {
    const size = sized.find(({ rowId }) => rowId === term.rowId)?.size ?? 0;
    const natural = term.natural === 1 ? "" : `${floatLatex(term.natural)}\\,`;
    const by = term.assigned ? "\\text{given by hand}" : `${natural}${powerOfQ(shown(term.excess))}`;
    return {
      step: "formula",
      latex: `${term.latex}:\\quad \\Delta - ${measure} = ${term.excess.toLatex()},\\quad ${by} = ${floatLatex(size)}`,
    };
  });
  const rate =
    observable === "amplitude"
      ? "Orders of products add."
      : `The rate is $|1 + \\sum a|^2$ relative to the leading one, expanded by total order: ${observable === "rate with interference" ? "$2a$ from interference, " : "interference with the leading amplitude vanishes, "}$a^2$ and $2ab$ from squares and cross terms.`;
  return [
    { step: "heading", text: "Orders and sizes" },
    ...lines,
    { step: "prose", text: rate },
    ...orders.map(({ order, sum, count }): WorkingStep => ({
      step: "formula",
      latex: `\\text{order }${order[0]?.latex ?? ""}:\\quad ${count}\\text{ listed},\\quad \\Sigma = ${floatLatex(sum)}`,
    })),
  ];
}

function sumSteps(value: OrderPlanValue): WorkingStep[] {
  const { firstUnlisted, step, orders, target, sumUsed, order } = value;
  const decides =
    sumUsed === "natural tail"
      ? "Listed and unlisted terms together decide."
      : "Listed terms alone decide; the estimate of unlisted ones stands beside them.";
  const outcome = order
    ? `The lowest order that leaves out less than the target $${floatLatex(target)}$ is $r = ${order.latex}$.`
    : `No listed order leaves out less than the target $${floatLatex(target)}$: terms of order $${firstUnlisted.order.latex}$ would have to be listed.`;
  return [
    { step: "heading", text: "What is left out" },
    {
      step: "prose",
      text: `Beyond the listed terms, one term of natural size is taken at each order from $${firstUnlisted.order.latex}$ on in steps of $${step.latex}$, the orders that fields and symmetries allow; their amplitude sums to`,
    },
    { step: "formula", latex: `T = \\frac{${powerOfQ(firstUnlisted.order)}}{1 - ${powerOfQ(step)}}` },
    ...orders.map(({ order: at, leftOut }): WorkingStep => ({
      step: "formula",
      latex: `r = ${at[0]?.latex ?? ""}:\\quad ${floatLatex(leftOut.listed)}\\ \\text{listed} + ${floatLatex(leftOut.unlisted)}\\ \\text{unlisted}`,
    })),
    { step: "prose", text: `${decides} ${outcome}` },
  ];
}

function loopSteps({ loopFactor }: OrderPlanValue): WorkingStep[] {
  const prose =
    "Dimensions count powers of $Q$, not loops: a loop of marginal couplings costs no power of $Q$, so each order has contributions of any number of loops, and only the coupling and the loop factor suppress them.";
  const estimate =
    loopFactor === null
      ? []
      : [
          {
            step: "formula",
            latex: `\\frac{1}{(4\\pi)^{d/2}\\,\\Gamma(d/2)} = ${floatLatex(loopFactor)}`,
          } as const,
        ];
  return [
    { step: "heading", text: "Loops" },
    { step: "prose", text: prose },
    ...estimate,
    ...(loopFactor === null
      ? []
      : [
          {
            step: "prose",
            text: "With couplings of 1 each loop is taken to cost this factor; an order needs loops until the next falls below the target.",
          } as const,
        ]),
  ];
}

/** The cut through the orders in several parameters. */
function latticeSteps({ lattice, target }: OrderPlanValue): WorkingStep[] {
  if (!lattice) return [];
  const { parameters, points, leftOut } = lattice;
  const names = parameters.map(({ latex }, index) => `${latex}^{n_{${String(index + 1)}}}`).join("\\,");
  const kept = points.filter(({ included }) => included);
  const at = (order: readonly string[]) => `\\left(${order.join(",\\,")}\\right)`;
  const spread = leftOut.sigma > 0 ? ` \\pm ${floatLatex(leftOut.sigma)}` : "";
  return [
    { step: "heading", text: "In several small parameters" },
    {
      step: "prose",
      text: `By the counting rules a term or product of orders $n$ has size $${names}$, with $${parameters.map(({ latex, size }) => `${latex} = ${floatLatex(size)}`).join(",\\; ")}$; exponents of products add, and coefficients are natural. Sorted by size, orders are kept until the sum of all others is below $${floatLatex(target)}$.`,
    },
    ...(kept.length === 0
      ? []
      : [
          {
            step: "formula",
            latex: `\\text{kept: }${kept
              .slice(0, 12)
              .map(({ order }) => at(order))
              .join(",\\; ")}${kept.length > 12 ? ",\\; \\dots" : ""}`,
          } as const,
        ]),
    { step: "formula", latex: `\\text{left out} = ${floatLatex(leftOut.value)}${spread}` },
    ...(leftOut.sigma > 0
      ? [
          {
            step: "prose",
            text: "Parameters that share a scale move together: its share in each is added before shares are combined in quadrature.",
          } as const,
        ]
      : []),
  ];
}
