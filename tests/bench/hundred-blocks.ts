/** An invented notebook of a hundred blocks of every kind on one Premises, no two with the same key. */
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { block, heading, paragraph, type DocumentNode } from "../../server/commands/document-builder.ts";
import { lanternBlocks } from "../../server/commands/lantern-notebook.ts";

const PREMISES = "lantern";
/** Beside the Premises: 25 of three kinds, 12 graphs and 12 whole theories. */
const makers: readonly { readonly count: number; readonly make: (index: number) => DocumentNode }[] = [
  {
    count: 25,
    make: (index) =>
      block("scaling", `scaling-${index}`, PREMISES, {
        fields: { title: `sizes at ${300 + index} GeV`, probe: `${300 + index} GeV` },
      }),
  },
  {
    count: 25,
    make: (index) =>
      block("orderPlan", `plan-${index}`, PREMISES, {
        fields: { title: `plan ${index}`, target: `${(1 + index / 10).toFixed(1)}e-3` },
      }),
  },
  {
    count: 12,
    make: (index) =>
      block("divergence", `graph-${index}`, PREMISES, {
        fields: { title: `graph ${index}`, mode: "one graph" },
        tables: {
          vertices: [
            { id: "v1", term: "c6", count: String(1 + (index % 3)) },
            { id: "v2", term: "lambda", count: String(1 + Math.floor(index / 3)) },
          ],
          legs: [{ id: "l1", field: "chi", count: "4" }],
        },
      }),
  },
  {
    count: 12,
    make: (index) =>
      block("divergence", `theory-${index}`, PREMISES, {
        fields: {
          title: `theory ${index}`,
          mode: "whole theory",
          maxLoops: String(1 + (index % 2)),
          maxLegs: String(4 + (Math.floor(index / 2) % 3)),
          symmetries: index < 6 ? "yes" : "no",
        },
      }),
  },
  {
    count: 25,
    make: (index) =>
      block("truncationError", `error-${index}`, PREMISES, {
        fields: { title: `rate ${index}`, quantity: "rate", unit: "pb" },
        tables: {
          orders: [8, 9.05, 9.2, 9.188].map((value, order) => ({
            id: `o${order}`,
            order: String(order),
            value: (value * (1 + index / 1000)).toFixed(4),
          })),
        },
      }),
  },
];

export function hundredBlocksDocument(): DocumentNode {
  const [premises] = lanternBlocks;
  if (!premises) throw new Error("the demonstration begins with its premises");
  const content: DocumentNode[] = [heading(1, "Premises"), premises];
  const most = Math.max(...makers.map(({ count }) => count));
  // Kinds take turns, with prose between, as in a notebook.
  for (let index = 0; index < most; index += 1) {
    content.push(
      paragraph(`Part ${index + 1} of an invented notebook, with $c_6\\,p^2/\\Lambda^2$ in a sentence.`),
    );
    for (const { count, make } of makers) if (index < count) content.push(make(index));
  }
  content.push(paragraph("The end."));
  return { type: "doc", content };
}

export function hundredBlocks(): readonly BlockInstance[] {
  const { blocks } = readDocument(hundredBlocksDocument());
  if (blocks.length !== 100) throw new Error(`a hundred blocks were meant, ${blocks.length} were made`);
  return blocks;
}

/** The same blocks after the heavy scale was changed; all but the Premises stay the same objects. */
export function withHeavyScale(blocks: readonly BlockInstance[], value: string): readonly BlockInstance[] {
  return blocks.map((one) => {
    const { scales } = one.inputs;
    if (one.id !== PREMISES || typeof scales !== "object") return one;
    const changed = scales.map((row) => (row.id === "heavy" ? { ...row, value } : row));
    return { ...one, inputs: { ...one.inputs, scales: changed } };
  });
}
