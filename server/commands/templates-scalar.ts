/**
 * Template: a real scalar pair with quartic and sextic interactions in any dimension. Agrees with Wilson and Kogut 1974
 * (Phys. Rep. 12, 75): the quartic coupling is marginal in four dimensions, the sextic one in three.
 */
import { block, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const scalarBlocks: readonly DocumentNode[] = [
  block("premises", "pair", "", {
    fields: { name: "scalar pair", d: "d" },
    tables: {
      symmetries: [
        { id: "first", name: "first reflection", group: "Z2" },
        { id: "second", name: "second reflection", group: "Z2" },
      ],
      fields: [
        { id: "phi", symbol: "phi", kind: "real scalar", charges: "odd, even" },
        { id: "eta", symbol: "eta", kind: "real scalar", charges: "even, odd" },
      ],
      terms: [
        { id: "m1", term: "m_1^2/2 phi^2" },
        { id: "m2", term: "m_2^2/2 eta^2" },
        { id: "lambda1", term: "lambda_1/4! phi^4" },
        { id: "lambda2", term: "lambda_2/4! eta^4" },
        { id: "lambda12", term: "lambda_12/4 phi^2 eta^2" },
        { id: "six", term: "c/6! phi^6" },
        { id: "mixed", term: "b/48 phi^4 eta^2" },
      ],
    },
  }),
  block("scaling", "pair-scaling", "pair", { fields: { title: "every term" } }),
  block("divergence", "pair-graph", "pair", {
    fields: { title: "one loop, four legs", mode: "one graph" },
    tables: {
      vertices: [{ id: "v1", term: "lambda1", count: "2" }],
      legs: [{ id: "l1", field: "phi", count: "4" }],
    },
  }),
];

export function scalarDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, graph] = scalarBlocks;
  if (!premises || !scaling || !graph) throw new Error("this template has three blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "Two real scalars, each odd under a reflection of its own, in $d$ dimensions. The dimension stays a symbol, so that every statement below holds for each $d$.",
      ),
      premises,
      heading(1, "What matters where"),
      paragraph(
        "The quartic coupling has dimension ",
        pin("pair-scaling", "lambda1/coefficient", ""),
        " and the sextic one ",
        pin("pair-scaling", "six/coefficient", ""),
        ": one is marginal in four dimensions, the other in three, where the tricritical point lies. This agrees with Wilson and Kogut 1974 (Phys. Rep. 12, 75).",
      ),
      scaling,
      heading(1, "What diverges"),
      paragraph(
        "One loop of two quartic vertices has the degree of divergence ",
        pin("pair-graph", "omega", ""),
        ", logarithmic in four dimensions, so that the quartic coupling runs there.",
      ),
      graph,
    ],
  };
}
