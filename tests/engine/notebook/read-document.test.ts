import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { documentNodes, readDocument } from "#engine/notebook/read-document.ts";
import { kindNames } from "#engine/kind.ts";
import { cellNode, pinNode, rowNode } from "#schema/block-structure.ts";
import { block, documentOf, paragraph, pin, row, truncationBlock } from "./documents.ts";

function onlyBlock(...content: unknown[]) {
  const { blocks } = readDocument(documentOf(...content));
  expect(blocks).toHaveLength(1);
  return blocks[0]!;
}

describe("reading a document", () => {
  it("knows the nodes by the names the document's schema gives them", () => {
    expect(documentNodes).toEqual({ row: rowNode, cell: cellNode, pin: pinNode });
  });

  it("takes blocks in document order, also inside other nodes", () => {
    const { blocks } = readDocument(
      documentOf(
        truncationBlock("t1"),
        { type: "blockquote", content: [truncationBlock("t2")] },
        truncationBlock("t3"),
      ),
    );
    expect(blocks.map(({ id }) => id)).toEqual(["t1", "t2", "t3"]);
  });

  it("gives every field of the shape, its initial value when it is missing", () => {
    const { inputs, title, standsOn, problems } = onlyBlock(
      truncationBlock("t", { title: "Rate", standsOn: "p1" }),
    );
    expect(inputs).toMatchObject({
      q: "0.3",
      reference: "LO",
      belief: "68, 95",
      nu0: "1",
      method: "conjugate prior",
    });
    expect(inputs["orders"]).toEqual([
      { id: "a", order: "0", value: "10", name: "LO" },
      { id: "b", order: "1", value: "10.9", name: "NLO" },
      { id: "c", order: "2", value: "10.63", name: "" },
    ]);
    expect({ title, standsOn, problems }).toEqual({ title: "Rate", standsOn: "p1", problems: [] });
  });

  it("sorts rows by their order key and equal keys by id, wherever they stand", () => {
    const { inputs } = onlyBlock(
      block(
        "truncationError",
        { blockId: "t" },
        row("orders", "z", "b", {}),
        row("orders", "y", "b", {}),
        row("orders", "x", "c", {}),
        row("orders", "w", "Z", {}),
      ),
    );
    expect((inputs["orders"] as { id: string }[]).map(({ id }) => id)).toEqual(["w", "y", "z", "x"]);
  });

  it("lets the last of two cells for one field count", () => {
    const twice = row("orders", "a", "a", { order: "0" }) as { content: unknown[] };
    twice.content.push({ type: "cell", attrs: { field: "order", value: "4" } });
    const { inputs } = onlyBlock(block("truncationError", { blockId: "t" }, twice));
    expect(inputs["orders"]).toEqual([{ id: "a", order: "4", value: "", name: "" }]);
  });

  it("keeps what it does not know out of the inputs: fields, columns, tables", () => {
    const { inputs } = onlyBlock(
      block(
        "truncationError",
        { blockId: "t", colour: "red" },
        row("orders", "a", "a", { mood: "good" }),
        row("guests", "g", "a", { name: "x" }),
      ),
    );
    expect(inputs).not.toHaveProperty("colour");
    expect(inputs).not.toHaveProperty("guests");
    expect(inputs["orders"]).toEqual([{ id: "a", order: "", value: "", name: "" }]);
  });

  it("reads two blocks with one id under two: the first in the document keeps it", () => {
    const { blocks } = readDocument(
      documentOf(
        truncationBlock("t"),
        truncationBlock("t"),
        truncationBlock("t~2"),
        truncationBlock("t"),
        truncationBlock(""),
      ),
    );
    expect(blocks.map(({ id }) => id)).toEqual(["t", "t~2", "t~2~2", "t~3", "unnamed~1"]);
  });

  it("reads two rows with one id under two", () => {
    const { inputs } = onlyBlock(
      block(
        "truncationError",
        { blockId: "t" },
        row("orders", "a", "a", { order: "0" }),
        row("orders", "a", "b", { order: "1" }),
      ),
    );
    expect((inputs["orders"] as { id: string }[]).map(({ id }) => id)).toEqual(["a", "a~2"]);
  });

  it("reads rows of two tables with one id under two, since scalars are named by row id alone", () => {
    const { inputs } = onlyBlock(
      block("premises", { blockId: "p" }, row("terms", "a", "a", {}), row("fields", "a", "a", {})),
    );
    const ids = (table: string) => (inputs[table] as { id: string }[]).map(({ id }) => id);
    expect([ids("fields"), ids("terms")]).toEqual([["a"], ["a~2"]]);
  });

  it("reports blocks of unknown kinds and does not lose those around them", () => {
    const { blocks, unknown } = readDocument(
      documentOf(block("remark", { blockId: "n" }), truncationBlock("t")),
    );
    expect(blocks.map(({ id }) => id)).toEqual(["t"]);
    expect(unknown).toEqual([{ blockId: "n", type: "remark" }]);
  });

  it("says when a choice or a text cannot be, and never computes with something else in silence", () => {
    const { problems, inputs } = onlyBlock(truncationBlock("t", { method: "guess", q: "1".repeat(4001) }));
    expect(problems.map(({ code, path }) => [code, path])).toEqual([
      ["text-too-long", ["q"]],
      ["choice-unknown", ["method"]],
    ]);
    expect(inputs["q"]).toBe("");
  });

  it("takes pins in document order with their attributes as text", () => {
    const { pins } = readDocument(
      documentOf(
        paragraph({ type: "text", text: "about " }, pin({ pinId: "p", blockId: "t", scalar: "Q", value: 3 })),
        paragraph(pin({ pinId: "q" })),
      ),
    );
    expect(pins).toEqual([
      { pinId: "p", blockId: "t", scalar: "Q", resultKey: "", value: "3", text: "", format: "" },
      { pinId: "q", blockId: "", scalar: "", resultKey: "", value: "", text: "", format: "" },
    ]);
  });
});

describe("reading whatever there is", () => {
  it("throws on no JSON at all", () => {
    const node: fc.Arbitrary<unknown> = fc.letrec((tie) => ({
      node: fc.record(
        {
          type: fc.oneof(
            fc.constantFrom("doc", "paragraph", "row", "cell", "pin", ...kindNames),
            fc.string(),
            fc.jsonValue(),
          ),
          attrs: fc.oneof(
            fc.dictionary(
              fc.constantFrom(
                "blockId",
                "standsOn",
                "d",
                "q",
                "table",
                "rowId",
                "order",
                "field",
                "value",
                "method",
              ),
              fc.oneof(fc.string(), fc.jsonValue()),
            ),
            fc.jsonValue(),
          ),
          content: fc.oneof({ depthSize: "small" }, fc.array(tie("node"), { maxLength: 4 }), fc.jsonValue()),
        },
        { requiredKeys: [] },
      ),
    })).node;
    fc.assert(
      fc.property(fc.oneof(node, fc.jsonValue()), (json) => {
        const { blocks } = readDocument(json);
        expect(new Set(blocks.map(({ id }) => id)).size).toBe(blocks.length);
      }),
      { numRuns: 300 },
    );
  });

  it("survives nesting deeper than a call stack", () => {
    let deep: unknown = truncationBlock("t");
    for (let level = 0; level < 100_000; level += 1) deep = { type: "blockquote", content: [deep] };
    expect(readDocument(deep).blocks.map(({ id }) => id)).toEqual(["t"]);
  });

  it("does not take a name of every object for a field", () => {
    const attrs = JSON.parse('{"blockId":"t","__proto__":"x","constructor":"y"}');
    expect(onlyBlock(block("truncationError", attrs)).inputs["q"]).toBe("");
  });
});
