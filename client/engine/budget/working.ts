/** How the errors were added up. */
import type { WorkingStep } from "../evaluation.ts";
import { floatText } from "../notation/float-text.ts";
import type { Contribution } from "./combine.ts";
import type { BudgetValue } from "./value.ts";

const number = (value: number) => floatText(value, 0, { digits: 3, style: "auto", markup: "latex" });

export function budgetWorking(
  value: BudgetValue,
  read: readonly Contribution[],
  coefficientOf: (group: string) => number,
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
  const groups = [...new Set(read.map(({ group }) => group).filter((group) => group !== ""))].filter(
    (group) => read.filter((one) => one.group === group).length > 1,
  );
  const pairs = groups.flatMap((group) => {
    const own = read.filter((one) => one.group === group);
    return own.flatMap((one, index) =>
      own
        .slice(index + 1)
        .map(
          (other) =>
            `2\\cdot${bracketed(coefficientOf(group))}\\cdot${bracketed(one.size)}\\cdot${bracketed(other.size)}`,
        ),
    );
  });
  return [
    { step: "heading", text: "Combination" },
    {
      step: "prose",
      text: "Standard uncertainties combine as in the Guide to the expression of uncertainty in measurement (JCGM 100:2008, eq. 16), with the coefficient of the group that two sources share and 0 between groups:",
    },
    { step: "formula", latex: "u^2 = \\sum_i u_i^2 + 2\\sum_{i<j} r_{ij}\\,u_i u_j" },
    { step: "formula", latex: `u^2 = ${[...sizes.map((size) => `(${size})^2`), ...pairs].join(" + ")}` },
    { step: "formula", latex: `u = ${number(value.total)}` },
  ];
}

function bracketed(value: number): string {
  return value < 0 ? `(${number(value)})` : number(value);
}
