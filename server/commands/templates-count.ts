/**
 * Template: operators of the Standard Model by dimension. Agrees with Henning, Lu, Melia and Murayama 2017 (J. High Energy
 * Phys. 08, 016) and, at dimension 6, with Alonso, Jenkins, Manohar and Trott 2014 (J. High Energy Phys. 04, 159).
 */
import { standardModel } from "#engine/basis/contents.ts";
import { block, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

const tables = { groups: standardModel.groups, fields: standardModel.fields };

export const countBlocks: readonly DocumentNode[] = [
  block("basisCount", "three-generations", "", {
    fields: { title: "three generations", from: "5", to: "8", flavours: "3" },
    tables,
  }),
  block("basisCount", "one-generation", "", {
    fields: { title: "one generation", from: "5", to: "8", flavours: "1" },
    tables,
  }),
  block("basisCount", "bosons", "", {
    fields: { title: "bosons alone", from: "6", to: "8" },
    tables: {
      groups: standardModel.groups,
      fields: standardModel.fields.filter(({ kind }) => !kind.includes("spinor")),
    },
  }),
];

export function countDocument(pin: PinMaker): DocumentNode {
  const [three, one, bosons] = countBlocks;
  if (!three || !one || !bosons) throw new Error("this template has three blocks");
  return {
    type: "doc",
    content: [
      heading(1, "How many operators there are"),
      paragraph(
        "The fields are those of the Standard Model before its symmetry breaks: a Higgs doublet, $n_f$ generations of quarks and leptons, and the gauge fields. At dimension 5 there are ",
        pin("three-generations", "total/5", ""),
        " operators for three generations, at dimension 6 already ",
        pin("three-generations", "total/6", ""),
        ", and ",
        pin("three-generations", "total/8", ""),
        " at dimension 8 (Henning, Lu, Melia and Murayama 2017, J. High Energy Phys. 08, 016). Real parameters are counted: an operator and its Hermitian conjugate are two.",
      ),
      three,
      heading(1, "One generation"),
      paragraph(
        "One generation has ",
        pin("one-generation", "total/6", ""),
        " at dimension 6, and ",
        pin("one-generation", "total/8", ""),
        " at dimension 8.",
      ),
      one,
      heading(1, "Without fermions"),
      paragraph(
        "The Higgs and gauge fields alone have ",
        pin("bosons", "total/6", ""),
        " operators of dimension 6.",
      ),
      bosons,
    ],
  };
}
