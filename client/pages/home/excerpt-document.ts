/**
 * The excerpt on the first page: an invented sector with two blocks and one sentence that relies on them. Its pinned
 * values were taken from the engine; tests/client/pages/excerpt.test.ts takes them again and compares.
 */
import type { PinAttributes } from "#schema/block-structure.ts";
import { cellNode, pinNode, rowNode } from "#schema/block-structure.ts";

export interface ExcerptNode {
  readonly type: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly content?: readonly ExcerptNode[];
  readonly text?: string;
}
type Row = Readonly<Record<string, string>>;

const text = (words: string): ExcerptNode => ({ type: "text", text: words });
const formula = (latex: string): ExcerptNode => ({ type: "inlineMath", attrs: { latex } });
const paragraph = (...content: readonly ExcerptNode[]): ExcerptNode => ({ type: "paragraph", content });

function rows(table: string, entries: readonly Row[]): readonly ExcerptNode[] {
  return entries.map((entry, index) => ({
    type: rowNode,
    attrs: { table, rowId: `${table}-${index + 1}`, order: `a${index}` },
    content: Object.entries(entry).map(([field, value]) => ({ type: cellNode, attrs: { field, value } })),
  }));
}

export const excerptBlocks: readonly ExcerptNode[] = [
  {
    type: "premises",
    attrs: { blockId: "excerpt", standsOn: "", name: "Lantern", d: "4" },
    content: [
      ...rows("symmetries", [{ name: "reflection", group: "Z2" }]),
      ...rows("fields", [
        { symbol: "chi", kind: "real scalar", charges: "odd", meaning: "light scalar" },
        { symbol: "sigma", kind: "real scalar", charges: "even", meaning: "its companion" },
      ]),
      ...rows("scales", [
        { symbol: "Lambda", value: "3.2(4) TeV", role: "heavy", meaning: "threshold" },
        { symbol: "p", value: "350 GeV", role: "probe", meaning: "probe" },
      ]),
      ...rows("terms", [
        { term: "lambda/4! chi^4" },
        { term: "a/Lambda (dchi)^2 sigma" },
        { term: "c_6/(6! Lambda^2) chi^6" },
        { term: "c_8/Lambda^4 d^4 chi^4" },
      ]),
    ],
  },
  {
    type: "scaling",
    attrs: { blockId: "excerpt-scaling", standsOn: "excerpt", title: "every term" },
    content: [],
  },
];

export const excerptPins: readonly PinAttributes[] = [
  {
    pinId: "excerpt-ratio",
    blockId: "excerpt-scaling",
    scalar: "Q",
    resultKey: "b59ea3184bdca84ff872d07c2d4a9a73be40831205d8579c2ebf631cf157b443",
    value: '{"type":"number","value":0.109375,"sigma":0.013671875}',
    text: "0.109(14)",
    format: "",
  },
  {
    pinId: "excerpt-first-left-out",
    blockId: "excerpt-scaling",
    scalar: "terms-4/size",
    resultKey: "b59ea3184bdca84ff872d07c2d4a9a73be40831205d8579c2ebf631cf157b443",
    value: '{"type":"number","value":0.000143110752106,"sigma":0.0000715553760529}',
    text: "1.43(72) × 10⁻⁴",
    format: "",
  },
];

const pins = excerptPins.map((attrs): ExcerptNode => ({ type: pinNode, attrs: { ...attrs } }));

export const excerptDocument: ExcerptNode = {
  type: "doc",
  content: [
    paragraph(
      text("At "),
      formula("p = 350\\,\\mathrm{GeV}"),
      text(" the expansion parameter is "),
      ...pins.slice(0, 1),
      text(", and the first term we leave out, "),
      formula("c_8"),
      text(", enters at "),
      ...pins.slice(1),
      text("."),
    ),
    ...excerptBlocks,
  ],
};
