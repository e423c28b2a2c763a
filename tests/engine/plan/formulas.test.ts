/** What the page is given to typeset can be typeset: every formula of a working and of a value, by KaTeX. */
import katex from "katex";
import { describe, expect, it } from "vitest";
import type { Evaluation } from "#engine/evaluation.ts";
import { askGraph, askTheory } from "../divergence/ask.ts";
import { typed } from "../typed-premises.ts";
import { askPlan } from "./ask.ts";

const scales = ["Lambda | 3.2(4) TeV | heavy", "p | 320(20) GeV | probe", "m | 80 GeV | light"];
const relativistic = typed({
  fields: ["A | gauge potential", "phi | complex scalar", "psi | Dirac spinor", "c | ghost"],
  scales,
  terms: [
    "e psibar A psi",
    "y psibar psi phi",
    "m^2 phi^* phi | | m^2/p^2",
    "lambda (phi^* phi)^2",
    "c_6/Lambda^2 (phi^* phi)^3 | 0.5",
    "k/Lambda^2 (psibar psi)^2",
    "g cbar d A c",
  ],
});
const contact = typed({
  D: "3",
  z: "2",
  fields: ["N | Schrödinger field"],
  scales,
  terms: ["C (N^\\dagger N)^2", "C_2 \\nabla^2 (N^\\dagger N)^2"],
});
const symbolic = typed({ d: "d", fields: ["phi | real scalar"], scales, terms: ["lambda/4! phi^4"] });

/** All LaTeX in an evaluation: formulas, `latex` members, and what stands between dollar signs in prose and labels. */
function latexIn(value: unknown, key = ""): string[] {
  if (typeof value === "string") {
    if (key === "latex") return [value];
    return [...value.matchAll(/\$([^$]+)\$/g)].map((match) => match[1] ?? "");
  }
  if (Array.isArray(value)) return value.flatMap((item) => latexIn(item, key));
  if (value === null || typeof value !== "object") return [];
  return Object.entries(value).flatMap(([member, inside]) => latexIn(inside, member));
}

const evaluations: readonly (readonly [string, () => Evaluation])[] = [
  ["a graph", () => askGraph(relativistic, { t1: 2, t2: 2 }, { phi: 1, "phi~": 1 })],
  ["a graph of contact interactions", () => askGraph(contact, { t1: 1, t2: 1 }, { N: 2, "N~": 2 })],
  ["a graph in d dimensions", () => askGraph(symbolic, { t1: 2 }, { phi: 4 })],
  ["a theory", () => askTheory(relativistic, { maxLegs: "4" })],
  ["a theory of contact interactions", () => askTheory(contact)],
  ["a theory in d dimensions", () => askTheory(symbolic)],
  ["a plan", () => askPlan(relativistic, {})],
  ["a plan for a rate", () => askPlan(relativistic, { observable: "rate with interference" })],
  [
    "a plan for a rate without interference",
    () => askPlan(relativistic, { observable: "rate without interference", target: "1e-9" }),
  ],
];

describe("formulas", () => {
  it.each(evaluations)("of %s can be typeset", (_, evaluate) => {
    const evaluation = evaluate();
    expect(evaluation.value).not.toBeNull();
    const formulas = latexIn(evaluation);
    expect(formulas.length).toBeGreaterThan(5);
    for (const latex of formulas)
      expect(() => katex.renderToString(latex, { throwOnError: true, strict: "error" }), latex).not.toThrow();
  });

  it.each(evaluations)("of %s are plain JSON with numbers of at most 12 digits", (_, evaluate) => {
    const evaluation = evaluate();
    expect(JSON.parse(JSON.stringify(evaluation))).toEqual(evaluation);
    const numbers = [...JSON.stringify(evaluation.value).matchAll(/-?\d+\.\d+/g)].map(([digits]) =>
      digits.replace(/[-.]/g, "").replace(/^0+/, ""),
    );
    for (const digits of numbers) expect(digits.length, digits).toBeLessThanOrEqual(12);
  });
});
