/** How the errors were added up. */
import type { WorkingStep } from "../evaluation.ts";
import { floatText } from "../notation/float-text.ts";
import type { Contribution, Correlation } from "./combine.ts";
import type { BudgetValue } from "./value.ts";

const number = (value: number) => floatText(value, 0, { digits: 3, style: "auto", markup: "latex" });

export function budgetWorking(
  value: BudgetValue,
  read: readonly Contribution[],
  correlationOf: Correlation,
  linear: boolean,
): WorkingStep[] {
  const sizes = read.map(({ size }) => number(Math.abs(size)));
  if (linear)
    return [
      { step: "heading", text: "Linear sum" },
      {
        step: "prose",
        text: "Whatever depends on what, the errors cannot add up to more than the sum of their sizes:",
      },
      { step: "formula", latex: `u = \\sum_i |u_i| = ${sizes.join(" + ")} = ${number(value.total)}` },
    ];
  const pairs = read.flatMap((one, index) =>
    read.slice(index + 1).flatMap((other) => {
      const r = correlationOf(one, other);
      return r === 0
        ? []
        : [`2\\cdot${bracketed(r)}\\cdot${bracketed(one.size)}\\cdot${bracketed(other.size)}`];
    }),
  );
  const terms = [...sizes.map((size) => `(${size})^2`), ...pairs];
  return [
    { step: "heading", text: "Combination" },
    {
      step: "prose",
      text: "Standard uncertainties combine as in the Guide to the expression of uncertainty in measurement (JCGM 100:2008, eq. 16), with the coefficient given for two sources, else that of the group they share, else 0:",
    },
    { step: "formula", latex: "u^2 = \\sum_i u_i^2 + 2\\sum_{i<j} r_{ij}\\,u_i u_j" },
    { step: "formula", latex: `u^2 = ${shortened(terms).join(" + ")}` },
    { step: "formula", latex: `u = ${number(value.total)}` },
  ];
}

function bracketed(value: number): string {
  return value < 0 ? `(${number(value)})` : number(value);
}

/** Ten correlated sources have 45 pairs; nobody reads more terms than these. */
const MOST_TERMS = 24;
function shortened(terms: readonly string[]): readonly string[] {
  return terms.length <= MOST_TERMS ? terms : [...terms.slice(0, MOST_TERMS), "\\cdots"];
}
