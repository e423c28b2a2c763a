import { afterEach, describe, expect, it, vi } from "vitest";
import type { Evaluation } from "#engine/evaluation.ts";
import { kinds } from "#engine/kinds.ts";
import { choosePremises } from "#engine/notebook/choose-premises.ts";
import { evaluateNotebook, type NotebookOutcome } from "#engine/notebook/evaluate-notebook.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { block, documentOf, premisesBlock, truncationBlock } from "./documents.ts";

function throwing(error: unknown): never {
  throw error;
}
function evaluate(memo: Map<string, Evaluation>, ...content: unknown[]): NotebookOutcome[] {
  return evaluateNotebook(readDocument(documentOf(...content)).blocks, { memo, onInternalError: throwing });
}
const codes = (outcome: NotebookOutcome | undefined) => outcome?.evaluation.problems.map(({ code }) => code);

afterEach(() => vi.restoreAllMocks());

describe("which premises a block computes from", () => {
  const cases: [string, unknown[], string | null][] = [
    ["the only ones", [premisesBlock("p"), block("scaling", { blockId: "x" })], "p"],
    [
      "the only ones, also when they come later",
      [block("scaling", { blockId: "x" }), premisesBlock("p")],
      "p",
    ],
    [
      "those chosen",
      [premisesBlock("p"), premisesBlock("q"), block("scaling", { blockId: "x", standsOn: "q" })],
      "q",
    ],
    [
      "none for a kind that may do without, when there is no telling which",
      [premisesBlock("p"), premisesBlock("q"), truncationBlock("x")],
      null,
    ],
    ["none for a kind that may do without, when there are none", [truncationBlock("x")], null],
    ["none for premises themselves", [premisesBlock("p"), premisesBlock("x", { standsOn: "p" })], null],
  ];
  it.each(cases)("%s", (_, content, expected) => {
    const { blocks } = readDocument(documentOf(...content));
    const choice = choosePremises(
      blocks.find(({ id }) => id === "x")!,
      blocks,
    );
    expect("found" in choice && (choice.found?.id ?? null)).toBe(expected);
  });

  it.each([
    ["premises-missing", [block("scaling", { blockId: "x" })]],
    ["premises-ambiguous", [premisesBlock("p"), premisesBlock("q"), block("scaling", { blockId: "x" })]],
    ["premises-deleted", [premisesBlock("p"), block("scaling", { blockId: "x", standsOn: "gone" })]],
    ["premises-deleted", [premisesBlock("p"), truncationBlock("x", { standsOn: "gone" })]],
    ["premises-other-kind", [truncationBlock("t"), block("scaling", { blockId: "x", standsOn: "t" })]],
    ["premises-other-kind", [block("scaling", { blockId: "x", standsOn: "x" })]],
    ["premises-broken", [premisesBlock("p", { geometry: "round" }), block("scaling", { blockId: "x" })]],
  ])("or the problem %s, and no value", (code, content) => {
    const outcome = evaluate(new Map(), ...content).find(({ blockId }) => blockId === "x");
    expect(codes(outcome)).toEqual([code]);
    expect(outcome?.evaluation.value).toBeNull();
    expect(outcome?.evaluation.problems[0]?.path).toEqual(["standsOn"]);
  });
});

describe("evaluating a notebook", () => {
  it("gives outcomes in document order, dependants before what they stand on too", () => {
    const outcomes = evaluate(new Map(), truncationBlock("t", { q: "" }), premisesBlock("p"));
    expect(outcomes.map(({ blockId, kind, standsOn }) => [blockId, kind, standsOn])).toEqual([
      ["t", "truncationError", "p"],
      ["p", "premises", null],
    ]);
    expect(outcomes.every(({ key }) => /^[0-9a-f]{64}$/.test(key))).toBe(true);
  });

  it("takes Q from the scales of its premises", () => {
    const [, outcome] = evaluate(new Map(), premisesBlock("p"), truncationBlock("t", { q: "" }));
    // 350 GeV over 3.2 TeV.
    expect(outcome?.evaluation.scalars.find(({ id }) => id === "Q")?.value).toMatchObject({
      value: 0.109375,
    });
  });

  it("computes again only what depends on a change", () => {
    const memo = new Map<string, Evaluation>();
    const spies = Object.values(kinds).map((kind) => [kind.kind, vi.spyOn(kind, "evaluate")] as const);
    const calls = () => {
      const counted = Object.fromEntries(
        spies.map(([name, spy]) => [name, spy.mock.calls.length]).filter(([, count]) => count !== 0),
      );
      for (const [, spy] of spies) spy.mockClear();
      return counted;
    };
    const before = [
      premisesBlock("p"),
      premisesBlock("q"),
      truncationBlock("t", { standsOn: "p", q: "" }),
      truncationBlock("u", { standsOn: "q", q: "p/Lambda" }),
    ];
    evaluate(memo, ...before);
    // Both premises say the same, so they share one key and one computation.
    expect(calls()).toEqual({ premises: 1, truncationError: 2 });
    evaluate(memo, ...before);
    expect(calls()).toEqual({});
    evaluate(memo, premisesBlock("p", { name: "Renamed", note: "a remark" }), ...before.slice(1));
    expect(calls()).toEqual({});
    evaluate(memo, premisesBlock("p", { d: "5" }), ...before.slice(1));
    expect(calls()).toEqual({ premises: 1, truncationError: 1 });
    evaluate(memo, ...before.slice(0, 3), truncationBlock("u", { standsOn: "q", q: "0.2" }));
    expect(calls()).toEqual({ truncationError: 1 });
  });

  it("gives an unfit block its problems instead of a value", () => {
    const [outcome] = evaluate(new Map(), truncationBlock("t", { method: "guess" }));
    expect(codes(outcome)).toEqual(["choice-unknown"]);
    expect(outcome?.key).not.toBe(evaluate(new Map(), truncationBlock("t"))[0]?.key);
  });

  it("turns an exception inside a kind into a problem, tells the caller, and does not remember it", () => {
    const mistake = new Error("a mistake of ours");
    const spy = vi.spyOn(kinds.truncationError, "evaluate").mockImplementation(() => throwing(mistake));
    const memo = new Map<string, Evaluation>();
    const told: unknown[] = [];
    const { blocks } = readDocument(documentOf(truncationBlock("t"), truncationBlock("u", { q: "0.2" })));
    const outcomes = evaluateNotebook(blocks, {
      memo,
      onInternalError: (error, { id }) => told.push(error, id),
    });
    expect(outcomes.map(codes)).toEqual([["internal"], ["internal"]]);
    expect(told).toEqual([mistake, "t", mistake, "u"]);
    expect(memo.size).toBe(0);
    spy.mockRestore();
    expect(evaluateNotebook(blocks, { memo, onInternalError: throwing }).map(codes)).toEqual([[], []]);
  });
});
