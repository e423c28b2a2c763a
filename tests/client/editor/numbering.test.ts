// @vitest-environment node
import type { Node } from "@tiptap/pm/model";
import { describe, expect, it } from "vitest";
import { documentSchema as schema } from "#schema/document-schema.ts";
import { numberDocument } from "../../../client/editor/numbering.ts";

const heading = (level: number) => schema.node("heading", { level }, [schema.text(`level ${String(level)}`)]);
const equation = () => schema.node("displayMath", { latex: "x" });
const doc = (...nodes: Node[]) => schema.node("doc", null, nodes);

describe("the numbers of sections", () => {
  it.each([
    [
      [1, 1, 2, 2, 1],
      ["1", "2", "2.1", "2.2", "3"],
    ],
    [
      [2, 2, 3, 2],
      ["1", "2", "2.1", "3"],
    ],
    [
      [1, 3, 3, 1],
      ["1", "1.1", "1.2", "2"],
    ],
    [
      [1, 3, 2, 3],
      ["1", "1.1", "1.2", "1.2.1"],
    ],
    [
      [2, 1, 2],
      ["1", "2", "2.1"],
    ],
    [
      [1, 2, 3, 1, 2, 3],
      ["1", "1.1", "1.1.1", "2", "2.1", "2.1.1"],
    ],
  ])("%j", (levels, numbers) => {
    const { sections } = numberDocument(doc(...levels.map(heading)));
    expect(sections.map(({ number }) => number)).toEqual(numbers);
  });
});

describe("the numbers of equations", () => {
  it("run through the document, also inside quotations", () => {
    const { equations } = numberDocument(
      doc(equation(), schema.node("blockquote", null, [equation()]), heading(1), equation()),
    );
    expect(equations.map(({ number }) => number)).toEqual([1, 2, 3]);
  });
});
