/**
 * Template: a scalar for which time counts twice as much as space. Agrees with Anselmi and Halat 2007 (Phys. Rev. D 76,
 * 125011): in three space dimensions and z = 2 the tenth power of the field is the last renormalisable one.
 */
import { block, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const lifshitzBlocks: readonly DocumentNode[] = [
  block("premises", "lifshitz", "", {
    fields: { name: "Lifshitz scalar", geometry: "anisotropic", D: "3", z: "2" },
    tables: {
      symmetries: [{ id: "reflection", name: "reflection", group: "Z2" }],
      fields: [{ id: "phi", symbol: "phi", kind: "anisotropic scalar", charges: "odd" }],
      terms: [
        { id: "stiff", term: "kappa/2 (d_i d_i phi)^2" },
        { id: "speed", term: "c^2/2 (d_i phi)^2" },
        { id: "four", term: "g_4/4! phi^4" },
        { id: "ten", term: "g_10/10! phi^10" },
        { id: "twelve", term: "g_12/12! phi^12" },
      ],
    },
  }),
  block("scaling", "lifshitz-scaling", "lifshitz", { fields: { title: "every term" } }),
  block("divergence", "lifshitz-graph", "lifshitz", {
    fields: { title: "two quartic vertices", mode: "one graph" },
    tables: {
      vertices: [{ id: "v1", term: "four", count: "2" }],
      legs: [{ id: "l1", field: "phi", count: "4" }],
    },
  }),
];

export function lifshitzDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, graph] = lifshitzBlocks;
  if (!premises || !scaling || !graph) throw new Error("this template has three blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "A real scalar in three space dimensions with $z = 2$: its kinetic term has two time derivatives and four space derivatives, so that time counts twice as much as space.",
      ),
      premises,
      heading(1, "What matters"),
      paragraph(
        "The field has dimension one half. So the quartic coupling has dimension ",
        pin("lifshitz-scaling", "four/coefficient", ""),
        ", the tenth power is ",
        pin("lifshitz-scaling", "ten/class", ""),
        " and the twelfth ",
        pin("lifshitz-scaling", "twelve/class", ""),
        " (Anselmi and Halat 2007, Phys. Rev. D 76, 125011). The ordinary gradient term is ",
        pin("lifshitz-scaling", "speed/class", ""),
        ": at long distances it wins, and space and time scale alike again.",
      ),
      scaling,
      heading(1, "What diverges"),
      paragraph(
        "One loop of two quartic vertices has the degree of divergence ",
        pin("lifshitz-graph", "omega", ""),
        ": it is finite, where the same graph of an ordinary scalar in four dimensions diverges.",
      ),
      graph,
    ],
  };
}
