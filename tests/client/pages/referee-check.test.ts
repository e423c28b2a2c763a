import { describe, expect, it } from "vitest";
import type { Evaluation, ScalarValue } from "#engine/evaluation.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { documentSchema } from "#schema/document-schema.ts";
import type { BlockResult } from "../../../client/editor/evaluation/results-store.ts";
import { checkPin } from "../../../client/pages/referee/check-state.ts";
import { sayChecks } from "../../../client/pages/referee/check-sheet.tsx";
import { inputsInShort, premisesInShort } from "../../../client/pages/referee/inputs-in-short.ts";
import { placedPins } from "../../../client/pages/referee/placed-pins.ts";
import { sayNames } from "../../../client/pages/referee/reading-strip.tsx";
import { neededFor } from "#engine/notebook/references.ts";
import { recompute } from "../../../client/pages/referee/recompute.ts";
import type { Excerpt } from "../../../client/pages/referee/sentence-excerpt.ts";
import { isSameResult, sayVerdict, verdictOf } from "../../../client/pages/referee/verdict.ts";
import { block, documentOf, premisesBlock, row, truncationBlock } from "../../engine/notebook/documents.ts";
import { workerInProcess } from "../evaluation/worker-in-process.ts";

const ratio: ScalarValue = { type: "number", value: 0.109375, sigma: 0.013671875 };
const attrs = {
  pinId: "p1",
  blockId: "b",
  scalar: "Q",
  resultKey: "key-1",
  value: JSON.stringify(ratio),
  text: "0.109(14)",
  format: "",
};
function evaluationOf(value: ScalarValue, more: Partial<Evaluation> = {}): Evaluation {
  return {
    value: {},
    problems: [],
    notices: [],
    scalars: [{ id: "Q", label: "$Q$", value }],
    working: [],
    ...more,
  };
}
function resultOf(evaluation: Evaluation | null, key = "key-1"): BlockResult {
  return { evaluation, key, standsOn: null, lastGood: evaluation };
}
const settled = { by: "Otto Marsh", at: "2026-12-01T14:02:00Z" };
const moved: ScalarValue = { type: "number", value: 0.14, sigma: 0.02 };

describe("what can be said of a pin", () => {
  const holds = evaluationOf(ratio);
  const known = (...entries: [string, Evaluation][]) => {
    const results = new Map(entries);
    return (key: string) => results.get(key) ?? null;
  };
  it("it holds when its block says the same, also under a new key", () => {
    expect(checkPin(attrs, true, resultOf(holds), null, known(["key-1", holds]))).toEqual({ state: "holds" });
    expect(checkPin(attrs, true, resultOf(holds, "key-2"), null, known(["key-2", holds]))).toEqual({
      state: "holds",
    });
  });
  it.each([
    ["checked", known(["key-1", holds]), true],
    ["not at hand", known(), false],
  ])("it has moved, its old value %s", (_what, lookUp, wasChecked) => {
    expect(checkPin(attrs, true, resultOf(evaluationOf(moved), "key-2"), settled, lookUp)).toEqual({
      state: "moved",
      now: "0.140(20)",
      settled,
      wasChecked,
    });
  });
  it.each([
    ["its block is gone", false, holds],
    ["its block is in error", true, evaluationOf(ratio, { value: null })],
    ["its block no longer gives this number", true, evaluationOf(ratio, { scalars: [] })],
  ])("it is loose because %s", (words, exists, evaluation) => {
    expect(checkPin(attrs, exists, resultOf(evaluation), null, known())).toEqual({ state: "loose", words });
  });
  it("nothing is claimed before its block was computed", () => {
    expect(checkPin(attrs, true, resultOf(null), null, known())).toEqual({ state: "waiting" });
  });

  it("it is unchecked when the result it names gives another value", () => {
    const forged = { ...attrs, value: '{"type":"number","value":0.01}', text: "0.0100" };
    expect(checkPin(forged, true, resultOf(holds), null, known(["key-1", holds]))).toEqual({
      state: "unchecked",
      words: "the result it names does not give this value",
      now: "0.109(14)",
    });
  });
  it("it is unchecked when it shows something else than its value", () => {
    expect(
      checkPin({ ...attrs, text: "0.011" }, true, resultOf(holds), null, known(["key-1", holds])),
    ).toEqual({
      state: "unchecked",
      words: "the text shows “0.011”, but the value behind it reads “0.109(14)”",
      now: null,
    });
  });
  it("it is unchecked when its value cannot be read", () => {
    expect(checkPin({ ...attrs, value: "{" }, true, resultOf(holds), null, known())).toMatchObject({
      state: "unchecked",
      words: "the pin carries no value that can be read",
    });
  });
  it("the sheet counts the states", () => {
    const state = (name: "holds" | "waiting") => ({ state: name });
    expect(sayChecks([state("holds")])).toBe("1 number: 1 holds.");
    expect(sayChecks([state("holds"), state("holds"), { state: "loose", words: "" }, state("waiting")])).toBe(
      "4 numbers: 2 hold, 1 is loose, 1 is being computed.",
    );
  });
});

describe("the sentence a pin stands in", () => {
  const text = (words: string) => ({ type: "text", text: words });
  const formula = (latex: string) => ({ type: "inlineMath", attrs: { latex } });
  const thePin = { type: "pin", attrs };
  const shown = ({ before, after }: Excerpt) => {
    const say = (parts: Excerpt["before"]) =>
      parts.map((part) => (part.part === "math" ? `$${part.latex}$` : part.text)).join("");
    return `${say(before)}[0.109(14)]${say(after)}`;
  };
  const excerpts = (...content: object[]) =>
    placedPins(documentSchema.nodeFromJSON({ type: "doc", content: [{ type: "paragraph", content }] })).map(
      ({ excerpt }) => shown(excerpt),
    );

  it.each([
    ["One thing. Here it is ", ", as said. Another.", "Here it is [0.109(14)], as said."],
    ["It is 0.5 and then ", ".", "It is 0.5 and then [0.109(14)]."],
    ["See e.g. the value ", " there", "See e.g. the value [0.109(14)] there"],
    ["Is it so? (Yes!) Then ", "? Good.", "Then [0.109(14)]?"],
  ])("%j and %j give %j", (before, after, sentence) => {
    expect(excerpts(text(before), thePin, text(after))).toEqual([sentence]);
  });
  it("keeps formulas and the other numbers of the sentence", () => {
    const other = { type: "pin", attrs: { ...attrs, pinId: "p2", text: "7" } };
    expect(
      excerpts(
        text("Before. With "),
        formula("p"),
        text(" it is "),
        thePin,
        text(" or "),
        other,
        text(". So."),
      ),
    ).toEqual(["With $p$ it is [0.109(14)] or 7.", "With $p$ it is 0.109(14) or [0.109(14)]."]);
  });
  it("begins after a sentence that ends where a formula begins", () => {
    expect(excerpts(text("Before. "), formula("p"), text(" is "), thePin)).toEqual(["$p$ is [0.109(14)]"]);
  });
  it("is cut at words where it is long", () => {
    const long = "word ".repeat(60);
    const [cut = ""] = excerpts(text(long), thePin, text(` ${long}`));
    expect(cut.length).toBeLessThan(230);
    expect(cut).toMatch(/^… (word )+\[0\.109\(14\)\]( word)+ …$/);
  });
  it("tells two pins of one id apart, in the order of the text", () => {
    const doc = documentSchema.nodeFromJSON({
      type: "doc",
      content: [
        { type: "heading", attrs: { level: 1 }, content: [text("At "), thePin] },
        { type: "blockquote", content: [{ type: "paragraph", content: [thePin] }] },
      ],
    });
    const placed = placedPins(doc);
    expect(placed.map(({ key }) => key)).toEqual(["p1/0", "p1/1"]);
    expect(placed.map(({ position }) => doc.nodeAt(position)?.type.name)).toEqual(["pin", "pin"]);
  });
});

const read = (...content: unknown[]) => readDocument(documentOf(...content)).blocks;

describe("inputs in short", () => {
  it("name what is filled in and the first rows of long tables", () => {
    const [premises, truncation] = read(premisesBlock("p"), truncationBlock("t", { unit: "pb" }));
    if (!premises || !truncation) throw new Error("two blocks were written");
    expect(inputsInShort(truncation, premises)).toEqual([
      "unit: pb",
      "reference: LO",
      "Q: 0.3",
      "belief: 68, 95",
      "ν₀: 1",
      "τ₀: 1",
      "orders: 0: 10; 1: 10.9; 2: 10.63",
    ]);
    expect(premisesInShort(premises)).toEqual([
      "d = 4 · 1 field · 1 term",
      "scales: Lambda 3.2 TeV heavy; p 350 GeV probe",
    ]);
  });
  it("name the terms of a graph as they are typed", () => {
    const [premises, graph] = read(
      premisesBlock("p"),
      block("divergence", { blockId: "g" }, row("vertices", "v", "a", { term: "t1", count: "2" })),
    );
    if (!premises || !graph) throw new Error("two blocks were written");
    expect(inputsInShort(graph, premises)).toEqual(["vertices: lambda/4! chi^4 × 2"]);
    expect(inputsInShort(graph, null)).toEqual(["vertices: t1 × 2"]);
  });
  it("say how many rows are left out, and nothing of an untouched block", () => {
    const rows = [1, 2, 3, 4, 5, 6].map((n) => row("terms", `t${n}`, `a${n}`, { term: `c_${n} chi^${n}` }));
    const [premises, scaling] = read(
      block("premises", { blockId: "p", geometry: "anisotropic" }, ...rows),
      block("scaling", { blockId: "s" }),
    );
    if (!premises || !scaling) throw new Error("two blocks were written");
    expect(inputsInShort(premises, null)).toEqual([
      "geometry: anisotropic",
      "D: 3",
      "z: 2",
      "terms: c_1 chi^1; c_2 chi^2; c_3 chi^3; c_4 chi^4; and 2 more",
    ]);
    expect(inputsInShort(scaling, premises)).toEqual([]);
  });
});

describe("recomputing one block", () => {
  const blocks = read(
    premisesBlock("p"),
    block("scaling", { blockId: "s", standsOn: "p" }),
    block("scaling", { blockId: "odd", standsOn: "t" }),
    truncationBlock("t"),
  );
  it("takes along only what the choice of premises looks at", () => {
    expect(neededFor("s", blocks).map(({ id }) => id)).toEqual(["p", "s"]);
    expect(neededFor("odd", blocks).map(({ id }) => id)).toEqual(["p", "odd", "t"]);
  });
  it("gives the same key and scalars as the whole notebook does, and starts a worker of its own", async () => {
    let started = 0;
    const start = () => {
      started += 1;
      return workerInProcess();
    };
    const whole = await recompute("s", blocks, { startWorker: start });
    const alone = await recompute("s", neededFor("s", blocks), { startWorker: start });
    expect(started).toBe(2);
    if (!whole.done || !alone.done) throw new Error("both compute");
    expect(alone.outcome.key).toBe(whole.outcome.key);
    expect(alone.outcome.standsOn).toBe("p");
    // Q = p/Λ = 350/3200, own arithmetic.
    expect(alone.outcome.evaluation.scalars.find(({ id }) => id === "Q")?.value).toMatchObject({
      type: "number",
      value: 0.109375,
    });
  });
  it("says why when the block is gone", async () => {
    expect(await recompute("nowhere", blocks, { startWorker: workerInProcess })).toEqual({
      done: false,
      words: "the block is gone",
    });
  });
  it("says why when the worker cannot be started", async () => {
    const failing = () => {
      const worker = workerInProcess();
      worker.postMessage = () => {
        setTimeout(
          () => worker.onerror?.(new ErrorEvent("error", { message: "no memory", cancelable: true })),
          0,
        );
      };
      return worker;
    };
    expect(await recompute("s", blocks, { startWorker: failing })).toEqual({
      done: false,
      words: "this browser could not compute it",
    });
  });
});

describe("the verdict on what was recomputed", () => {
  const fresh = (value: ScalarValue, key = "key-1") => ({
    blockId: "b",
    kind: "scaling" as const,
    key,
    standsOn: null,
    evaluation: evaluationOf(value, { value: { list: [1, { deep: 0.1 }], word: "a" } }),
  });
  const stored = (evaluation: Evaluation, key = "key-1") => ({
    blockId: "b",
    key,
    engineVersion: "1",
    evaluation,
    settledAt: "2026-12-01T09:00:00Z",
    changedBy: null,
  });
  const same = fresh(ratio).evaluation;

  it.each([
    ["all agree", fresh(ratio), stored(same), { now: "0.109(14)", stored: "agrees", pin: "agrees" }],
    [
      "the stored one differs",
      fresh(ratio),
      stored(evaluationOf(moved)),
      { stored: "differs", pin: "agrees" },
    ],
    [
      "the pin differs",
      fresh(moved),
      stored(fresh(moved).evaluation),
      { now: "0.140(20)", stored: "agrees", pin: "differs" },
    ],
    [
      "other inputs are stored",
      fresh(ratio),
      stored(evaluationOf(moved), "key-0"),
      { stored: "other-inputs", pin: "agrees" },
    ],
    ["nothing is stored", fresh(ratio), undefined, { stored: "nothing", pin: "agrees" }],
    [
      "the number is gone",
      { ...fresh(ratio), evaluation: { ...same, scalars: [] } },
      stored(same),
      { now: null, stored: "differs", pin: "not-given" },
    ],
  ])("%s", (_what, outcome, kept, verdict) => {
    expect(verdictOf(outcome, kept, attrs)).toMatchObject(verdict);
  });

  it.each<[string, (evaluation: Evaluation) => Evaluation, boolean]>([
    [
      "the same to 12 digits",
      (e) => ({ ...e, value: { list: [1, { deep: 0.1 + 1e-17 }], word: "a" } }),
      true,
    ],
    [
      "another digit among the first 12",
      (e) => ({ ...e, value: { list: [1, { deep: 0.1000000001 }], word: "a" } }),
      false,
    ],
    ["another word", (e) => ({ ...e, value: { list: [1, { deep: 0.1 }], word: "b" } }), false],
    ["a longer list", (e) => ({ ...e, value: { list: [1, { deep: 0.1 }, 2], word: "a" } }), false],
    [
      "a name that is undefined",
      (e) => ({ ...e, value: { list: [1, { deep: 0.1 }], word: "a", more: undefined } }),
      true,
    ],
    ["a caution more", (e) => ({ ...e, notices: [{ code: "x", path: [], facts: {} }] }), false],
    ["another working", (e) => ({ ...e, working: [{ step: "prose", text: "in other words" }] }), true],
  ])("results with %s are the same: see the table", (_what, change, isSame) => {
    expect(isSameResult(same, change(same))).toBe(isSame);
  });

  it("is said in plain words", () => {
    expect(sayVerdict({ now: "3", stored: "agrees", pin: "agrees" }, "3")).toBe(
      "Recomputed here: 3. The pin agrees to 12 digits. The stored result agrees to 12 digits.",
    );
    expect(sayVerdict({ now: "4", stored: "other-inputs", pin: "differs" }, "3")).toBe(
      "Recomputed here: 4. The pin says 3. The stored result is of other inputs, so it was not compared.",
    );
    expect(sayVerdict({ now: null, stored: "nothing", pin: "not-given" }, "3")).toMatch(
      /does not give this number\. No result/,
    );
  });
});

it("names are listed as one says them", () => {
  expect([["A"], ["A", "B"], ["A", "B", "C"]].map(sayNames)).toEqual(["A", "A and B", "A, B and C"]);
});
