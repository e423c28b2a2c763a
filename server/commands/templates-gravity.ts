/**
 * Template: gravity at low energy. Agrees with Donoghue 1994 (Phys. Rev. D 50, 3874): every loop brings two powers of E/M,
 * and one loop stands beside the curvature squared; and with power counting by dimension, which says the same here.
 */
import { block, heading, paragraph, type DocumentNode, type Row } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

const counting = (id: string, title: string, vertices: readonly Row[], legs: string) =>
  block("countingRules", id, "gravity", {
    fields: { title, preset: "gravity at low energy" },
    tables: { vertices, legs: [{ id: "legs", field: "h", count: legs }] },
  });

export const gravityBlocks: readonly DocumentNode[] = [
  block("premises", "gravity", "", {
    fields: { name: "gravity", d: "4" },
    tables: {
      fields: [{ id: "h", symbol: "h", kind: "metric fluctuation", meaning: "graviton" }],
      scales: [
        { id: "probe", symbol: "E", value: "1e13 GeV", role: "probe", meaning: "put yours here" },
        { id: "heavy", symbol: "M", value: "2.4e18 GeV", role: "heavy", meaning: "reduced Planck mass" },
      ],
      terms: [
        { id: "three", term: "1/M d^2 h^3" },
        { id: "four", term: "1/M^2 d^2 h^4" },
        { id: "squared", term: "c/M^4 d^4 h^4", meaning: "from the curvature squared" },
      ],
    },
  }),
  counting("gravity-tree", "two gravitons scatter", [{ id: "v", term: "four", count: "1" }], "4"),
  counting("gravity-loop", "in one loop", [{ id: "v", term: "three", count: "4" }], "4"),
  counting("gravity-squared", "by the curvature squared", [{ id: "v", term: "squared", count: "1" }], "4"),
  block("divergence", "gravity-graph", "gravity", {
    fields: { title: "the loop", mode: "one graph" },
    tables: {
      vertices: [{ id: "v", term: "four", count: "2" }],
      legs: [{ id: "legs", field: "h", count: "4" }],
    },
  }),
];

export function gravityDocument(pin: PinMaker): DocumentNode {
  const [premises, tree, loop, squared, graph] = gravityBlocks;
  if (!premises || !tree || !loop || !squared || !graph) throw new Error("this template has five blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "Fluctuations of the metric around flat space. Of the infinitely many vertices of $\\sqrt{g}\\,R$ two stand for all: each has two derivatives. The energy is a placeholder: put your own.",
      ),
      premises,
      heading(1, "Trees and loops"),
      paragraph(
        "At tree level the amplitude of two gravitons counts $(E/M)$ to the power ",
        pin("gravity-tree", "graph/order", ""),
        ".",
      ),
      tree,
      paragraph(
        "One loop counts ",
        pin("gravity-loop", "graph/order", ""),
        ", two powers more (Donoghue 1994).",
      ),
      loop,
      paragraph(
        "So does the curvature squared, ",
        pin("gravity-squared", "graph/order", ""),
        ": one does not make sense without the other. In pure gravity its two terms are removed by the equations of motion, and the first divergence that stays is cubic in the curvature, at two loops (Goroff and Sagnotti 1986).",
      ),
      squared,
      heading(1, "What it asks for"),
      paragraph(
        "By its degree, ",
        pin("gravity-graph", "omega", ""),
        ", the loop asks for terms with as many derivatives: the curvature squared.",
      ),
      graph,
    ],
  };
}
