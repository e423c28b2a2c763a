import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { findMatches, fold } from "../../../client/editor/finding/matches.ts";
import { sayCount } from "../../../client/editor/finding/find-strip.tsx";

const doc = documentSchema.nodeFromJSON({
  type: "doc",
  content: [
    { type: "heading", attrs: { level: 1 }, content: [{ type: "text", text: "The Lantern sector" }] },
    {
      type: "paragraph",
      content: [
        { type: "text", text: "A lantern field " },
        { type: "inlineMath", attrs: { latex: "\\chi^4" } },
        { type: "text", marks: [{ type: "bold" }], text: " of the lan" },
        { type: "text", text: "tern." },
      ],
    },
    { type: "displayMath", attrs: { latex: "V = \\chi^6", label: "", id: "e" } },
    { type: "scaling", attrs: { blockId: "s", title: "Lantern at 350 GeV" } },
  ],
});
const blocks = new Map<string, BlockInstance>([
  [
    "s",
    {
      id: "s",
      kind: "scaling",
      standsOn: null,
      title: "Lantern at 350 GeV",
      problems: [],
      inputs: {
        title: "Lantern at 350 GeV",
        probe: "350 GeV",
        rows: [{ id: "r", term: "chi^4" }],
      },
    },
  ],
]);
const found = (text: string) =>
  findMatches(doc, blocks, text).map((match) =>
    match.in === "text"
      ? doc.textBetween(match.from, match.to)
      : match.in === "atom"
        ? "formula"
        : match.place,
  );

describe("finding in a notebook", () => {
  it.each([
    ["lantern", ["Lantern", "lantern", "lantern", "title"]],
    ["LANTERN ", ["Lantern", "lantern", "lantern", "title"]],
    ["chi^", ["formula", "formula", "rows/r/term"]],
    ["350", ["title", "probe"]],
    ["nothing of this", []],
    ["", []],
    ["  ", []],
    ["field  of", []],
  ])("%j", (text, expected) => {
    expect(found(text)).toEqual(expected);
  });

  it("keeps the length of every text, so that places stay places", () => {
    fc.assert(fc.property(fc.string({ unit: "binary" }), (text) => fold(text).length === text.length));
    expect(fold("İSTANBUL ẞ")).toHaveLength(10);
  });

  it("counts in words", () => {
    expect([
      sayCount("phi", { count: 17, current: 2 }),
      sayCount("phi", { count: 0, current: -1 }),
      sayCount(" ", { count: 0, current: -1 }),
    ]).toEqual(["3 of 17", "nowhere", ""]);
  });
});
