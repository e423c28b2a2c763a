import { describe, expect, it } from "vitest";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { fileOf, nodesOf, readFileText } from "../../../client/editor/files/blocks-file.ts";
import { evaluateFile } from "../../../server/compute/evaluate-file.ts";
import { block, documentOf, premisesBlock, row, truncationBlock } from "../../engine/notebook/documents.ts";

const throwing = (error: unknown) => {
  throw error;
};
const { blocks } = readDocument(
  documentOf(
    premisesBlock("p", { name: "Lantern" }),
    premisesBlock("q"),
    block("scaling", { blockId: "s", standsOn: "p", title: "at 350 GeV" }),
    block(
      "divergence",
      { blockId: "d", standsOn: "q" },
      row("legs", "l1", "b", { field: "chi", count: "4" }),
      row("legs", "l0", "a", { field: "sigma", count: "2" }),
    ),
    truncationBlock("t", { standsOn: "p" }),
  ),
);
const numbered = () => {
  let made = 0;
  return () => `new${(made += 1)}`;
};

describe("the file of a notebook's blocks", () => {
  it("is what evaluate reads, and gives the results of the page", () => {
    const outcome = evaluateFile(JSON.parse(JSON.stringify(fileOf(blocks))), throwing);
    if (!outcome.ok) throw new Error(JSON.stringify(outcome.complaints));
    const page = evaluateNotebook(blocks, { memo: new Map(), onInternalError: throwing });
    expect(outcome.results.results.map(({ id, key, evaluation }) => ({ id, key, evaluation }))).toEqual(
      page.map(({ blockId, key, evaluation }) => ({ id: blockId, key, evaluation })),
    );
  });

  it("comes back into a notebook under ids of its own, with rows in order and premises chosen as before", () => {
    const reading = readFileText(JSON.stringify(fileOf(blocks)));
    if (!reading.ok) throw new Error(reading.sentences.join(" "));
    const content = nodesOf(reading.blocks, numbered());
    documentSchema.nodeFromJSON({ type: "doc", content }).check();
    const back = readDocument({ type: "doc", content }).blocks;
    expect(back.map(({ id, standsOn }) => [id, standsOn])).toEqual([
      ["new1", null],
      ["new2", null],
      ["new3", "new1"],
      ["new4", "new2"],
      ["new5", "new1"],
    ]);
    expect(back.map(({ kind, inputs, title }) => ({ kind, inputs, title }))).toEqual(
      blocks.map(({ kind, inputs, title }) => ({ kind, inputs, title })),
    );
  });

  it.each([
    ["{", ["It is no JSON: line 1, column 2 cannot stand there."]],
    [
      '{"format":"subleading-blocks/1",\n"blocks":}',
      ["It is no JSON: line 2, column 10 cannot stand there."],
    ],
    ["[]", ["the file must be an object."]],
    [
      '{"format":"subleading-blocks/1","blocks":[{"id":"a","kind":"scaling","inputs":{"prob":"1"}}]}',
      ["blocks[0].inputs has what is not known here: “prob”."],
    ],
  ])("says what is wrong with %j", (text, sentences) => {
    expect(readFileText(text)).toEqual({ ok: false, sentences });
  });
});
