import { describe, expect, it } from "vitest";
import type { Evaluation } from "#engine/evaluation.ts";
import { evaluateNotebook, type Postponed } from "#engine/notebook/evaluate-notebook.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { isLong, neededFor } from "#engine/notebook/references.ts";
import { block, documentOf, premisesBlock, row, truncationBlock } from "./documents.ts";

const budget = (id: string, ...sources: readonly (readonly [blockId: string, scalar: string])[]) =>
  block(
    "errorBudget",
    { blockId: id, unit: "pb" },
    ...sources.map(([from, scalar], index) =>
      row("sources", `${id}${index}`, `b${index}`, { name: "x", from, scalar }),
    ),
  );
const rate = truncationBlock("rate", { unit: "pb", q: "0.3" });
const count = (to: string) =>
  block("basisCount", { blockId: "count", from: "5", to }, row("fields", "f", "b", { symbol: "phi" }));

function evaluate(content: unknown[], memo = new Map<string, Evaluation>()) {
  const postponed: Postponed[] = [];
  const { blocks } = readDocument(documentOf(...content));
  const run = (postpones: boolean) =>
    evaluateNotebook(blocks, {
      memo,
      onInternalError: (error) => {
        throw error;
      },
      ...(postpones ? { onPostponed: (later: Postponed) => postponed.push(later) } : {}),
    });
  return { blocks, run, postponed };
}
const codesOf = (content: unknown[], id: string) =>
  evaluate(content)
    .run(false)
    .find(({ blockId }) => blockId === id)
    ?.evaluation.problems.map(({ code }) => code);
const keysOf = (content: unknown[]) =>
  Object.fromEntries(
    evaluate(content)
      .run(false)
      .map(({ blockId, key }) => [blockId, key]),
  );

describe("a block that uses the result of another", () => {
  it.each([
    ["after it", [rate, budget("b", ["rate", "error"])]],
    ["before it", [budget("b", ["rate", "error"]), rate]],
  ])("computes from it, standing %s", (_, content) => {
    const outcomes = evaluate(content).run(false);
    const evaluation = (id: string) => outcomes.find(({ blockId }) => blockId === id)?.evaluation;
    const error = evaluation("rate")?.scalars.find(({ id }) => id === "error")?.value;
    if (error?.type !== "number") throw new Error("the estimate has no error");
    expect(evaluation("b")?.problems).toEqual([]);
    expect(evaluation("b")?.value).toMatchObject({ total: error.value });
  });

  it("has another key when that one has another result, and the same when only a title differs", () => {
    const before = keysOf([rate, budget("b", ["rate", "error"])]);
    const other = truncationBlock("rate", { unit: "pb", q: "0.4" });
    const titled = truncationBlock("rate", { unit: "pb", q: "0.3", title: "at 350 GeV" });
    expect(keysOf([other, budget("b", ["rate", "error"])])["b"]).not.toBe(before["b"]);
    expect(keysOf([titled, budget("b", ["rate", "error"])])["b"]).toBe(before["b"]);
  });

  it.each([
    ["reference-deleted", [budget("b", ["gone", "error"])]],
    ["reference-broken", [truncationBlock("rate", { q: "wide" }), budget("b", ["rate", "error"])]],
    ["reference-circle", [budget("b", ["b", "total"])]],
    ["reference-circle", [budget("b", ["c", "total"]), budget("c", ["b", "total"])]],
    ["reference-other-kind", [premisesBlock("p"), truncationBlock("b", { data: "p" })]],
  ])("says %s beside the field that names it", (code, content) => {
    expect(codesOf(content, "b")).toContain(code);
  });

  it("says of every block of a circle that it is in one, whichever comes first", () => {
    const [b, c] = [budget("b", ["c", "total"]), budget("c", ["b", "total"], ["rate", "error"])];
    for (const content of [
      [b, c, rate],
      [rate, c, b],
    ]) {
      expect(codesOf(content, "b")).toContain("reference-circle");
      expect(codesOf(content, "c")).toContain("reference-circle");
      expect(codesOf(content, "rate")).toEqual([]);
    }
  });

  it("computes what it can without what is missing", () => {
    const { run } = evaluate([rate, budget("b", ["gone", "error"], ["rate", "error"])]);
    const outcome = run(false).find(({ blockId }) => blockId === "b");
    expect(outcome?.evaluation.value).not.toBeNull();
    expect(outcome?.evaluation.problems[0]?.path).toEqual(["sources", "b0", "from"]);
  });

  it("needs it, and all premises, and nothing else", () => {
    const { blocks } = evaluate([premisesBlock("p"), rate, count("6"), budget("b", ["rate", "error"])]);
    expect(neededFor("b", blocks).map(({ id }) => id)).toEqual(["p", "rate", "b"]);
  });
});

describe("long work", () => {
  const content = [count("8"), budget("b", ["count", "total/6"]), rate];
  it("is left for later with what uses it, where that is asked for", () => {
    const { run, postponed, blocks } = evaluate(content);
    expect(blocks.filter(isLong).map(({ id }) => id)).toEqual(["count"]);
    expect(run(true).map(({ blockId }) => blockId)).toEqual(["rate"]);
    expect(postponed.map(({ blockId, key }) => [blockId, key === null])).toEqual([
      ["count", false],
      ["b", true],
    ]);
  });
  it("is no longer, once its result is known by its key", () => {
    const memo = new Map<string, Evaluation>();
    evaluate(content, memo).run(false);
    const { run, postponed } = evaluate(content, memo);
    expect(run(true).map(({ blockId }) => blockId)).toEqual(["count", "b", "rate"]);
    expect(postponed).toEqual([]);
  });
  it("has the key under which it was postponed", () => {
    const { run, postponed } = evaluate(content);
    run(true);
    expect(run(false).find(({ blockId }) => blockId === "count")?.key).toBe(postponed[0]?.key);
  });
});
