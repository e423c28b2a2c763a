/** An invented page of a notebook in which something of every state stands: what holds, what has moved, what is wrong. */
import { cellNode, pinNode, rowNode, type PinAttributes } from "#schema/block-structure.ts";

interface Written {
  readonly type: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly content?: readonly Written[];
  readonly text?: string;
}
type Row = Readonly<Record<string, string>>;

const text = (words: string): Written => ({ type: "text", text: words });
const paragraph = (...content: readonly Written[]): Written => ({ type: "paragraph", content });

function rows(table: string, entries: readonly Row[]): readonly Written[] {
  return entries.map((entry, index) => ({
    type: rowNode,
    attrs: { table, rowId: `${table}-${index + 1}`, order: `a${index}` },
    content: Object.entries(entry).map(([field, value]) => ({ type: cellNode, attrs: { field, value } })),
  }));
}

function pin(pinId: string, blockId: string, value: number, sigma: number, shown: string): Written {
  const attrs: PinAttributes = {
    pinId,
    blockId,
    scalar: "Q",
    resultKey: "",
    value: JSON.stringify({ type: "number", value, sigma }),
    text: shown,
    format: "",
  };
  return { type: pinNode, attrs: { ...attrs } };
}

export const specimenDocument: Written = {
  type: "doc",
  content: [
    { type: "heading", attrs: { level: 2 }, content: [text("A section")] },
    paragraph(
      text("One number holds, "),
      pin("specimen-holds", "specimen-scaling", 0.1, 0.02, "0.100(20)"),
      text("; one has moved, "),
      pin("specimen-moved", "specimen-scaling", 0.14, 0.02, "0.140(20)"),
      text("; one is loose, "),
      pin("specimen-loose", "nowhere", 0.2, 0, "0.2"),
      text("; and a formula stands beside them, "),
      { type: "inlineMath", attrs: { latex: "Q = p/\\Lambda" } },
      text("."),
    ),
    {
      type: "premises",
      attrs: {
        blockId: "specimen-premises",
        standsOn: "",
        name: "with a term that is not understood",
        d: "4",
      },
      content: [
        ...rows("fields", [{ symbol: "phi", kind: "real scalar", meaning: "invented" }]),
        ...rows("scales", [
          { symbol: "Lambda", value: "1.0(2) TeV", role: "heavy" },
          { symbol: "p", value: "100 GeV", role: "probe" },
        ]),
        ...rows("terms", [
          { term: "lambda/4! phi^4" },
          { term: "c_6/Lambda^2 phi^6" },
          { term: "g/3! fi^3" },
        ]),
      ],
    },
    {
      type: "scaling",
      attrs: { blockId: "specimen-scaling", standsOn: "specimen-premises", title: "computes" },
      content: [],
    },
    { type: "orderPlan", attrs: { blockId: "specimen-plan", standsOn: "specimen-premises" }, content: [] },
    {
      type: "scaling",
      attrs: { blockId: "specimen-gone", standsOn: "nowhere", title: "stands on nothing" },
      content: [],
    },
  ],
};
