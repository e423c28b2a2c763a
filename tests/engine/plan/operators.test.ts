import { describe, expect, it } from "vitest";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import type { OrderPlanValue } from "#engine/plan/value.ts";
import { block, documentOf, row } from "../notebook/documents.ts";

function plan(d: string, basis: string) {
  const content = [
    block(
      "premises",
      { blockId: "p", d },
      row("fields", "f", "a", { symbol: "phi", kind: "real scalar" }),
      row("scales", "s1", "a", { symbol: "Lambda", value: "3 TeV", role: "heavy" }),
      row("scales", "s2", "b", { symbol: "q", value: "300 GeV", role: "probe" }),
      row("terms", "t1", "a", { term: "lambda/4! phi^4" }),
      row("terms", "t2", "b", { term: "c/Lambda^2 phi^6" }),
    ),
    block("basisCount", { blockId: "count", from: "5", to: "7" }, row("fields", "g", "a", { symbol: "phi" })),
    block("orderPlan", { blockId: "plan", target: "1 %", basis }),
  ];
  const outcomes = evaluateNotebook(readDocument(documentOf(...content)).blocks, {
    memo: new Map(),
    onInternalError: (error) => {
      throw error;
    },
  });
  const evaluation = outcomes.find(({ blockId }) => blockId === "plan")?.evaluation;
  return {
    value: evaluation?.value as OrderPlanValue,
    notices: evaluation?.notices.map(({ code }) => code),
  };
}

describe("numbers of operators in an Order plan", () => {
  it("are those of mass dimension d + order, from the Basis count it names", () => {
    const { value } = plan("4", "count");
    // One real scalar has one operator of dimension 6, and dimension 4 is below what a count gives.
    expect(value.orders.map(({ order, operators }) => [order[0]?.text, operators])).toEqual(
      value.orders.map(({ order }) => [order[0]?.text, order[0]?.text === "2" ? "1" : null]),
    );
    expect(value.orders.some(({ order }) => order[0]?.text === "2")).toBe(true);
  });
  it("are left out without one, and where it counts in another dimension", () => {
    expect(plan("4", "").value.orders.some(({ operators }) => operators !== undefined)).toBe(false);
    const other = plan("3", "count");
    expect(other.value.orders.some(({ operators }) => operators !== undefined)).toBe(false);
    expect(other.notices).toContain("plan-basis-other-dimension");
  });
});
