/**
 * Template: static nucleons that exchange pions. Agrees with Weinberg 1990 (Phys. Lett. B 251, 288) and 1991 (Nucl. Phys.
 * B 363, 3): one-pion exchange and the contact count 0, two-pion exchange 2; and with van Kolck 1994 (Phys. Rev. C 49,
 * 2932): three-nucleon forces from 3 on, in the normalisation −2 + 2A − 2C.
 */
import { block, heading, paragraph, type DocumentNode, type Row } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

const counting = (id: string, title: string, vertices: readonly Row[], nucleons: string, offset = "") =>
  block("countingRules", id, "nucleons", {
    fields: { title, preset: "chiral, with nucleons", offset },
    tables: { vertices, legs: [{ id: "legs", field: "N", leg: "pair", count: nucleons }] },
  });

export const nucleonBlocks: readonly DocumentNode[] = [
  block("premises", "nucleons", "", {
    fields: { name: "nucleons and pions", d: "4" },
    tables: {
      symmetries: [{ id: "baryons", name: "nucleon number", group: "U(1)" }],
      fields: [
        { id: "N", symbol: "N", kind: "static heavy field", charges: "1", meaning: "nucleon" },
        { id: "phi", symbol: "phi", kind: "real scalar", charges: "0", meaning: "pion" },
      ],
      scales: [
        { id: "mass", symbol: "m", value: "140 MeV", role: "light", meaning: "pion mass" },
        { id: "decay", symbol: "f", value: "92 MeV", role: "other", meaning: "pion decay constant" },
        { id: "probe", symbol: "p", value: "140 MeV", role: "probe", meaning: "put yours here" },
        { id: "heavy", symbol: "Lambda", value: "600(100) MeV", role: "heavy", meaning: "put yours here" },
      ],
      terms: [
        { id: "axial", term: "g_A/f Nbar N d phi" },
        { id: "contact", term: "C_S Nbar Nbar N N" },
        { id: "contact2", term: "C_2 d^2 Nbar Nbar N N" },
        { id: "scatter", term: "c_1 m^2/f^2 Nbar N phi^2" },
        { id: "three", term: "c_E Nbar Nbar Nbar N N N" },
      ],
    },
  }),
  counting("nucleons-one", "one pion is exchanged", [{ id: "v", term: "axial", count: "2" }], "2"),
  counting("nucleons-two", "two pions are exchanged", [{ id: "v", term: "axial", count: "4" }], "2"),
  counting("nucleons-three", "three nucleons meet", [{ id: "v", term: "three", count: "1" }], "3", "3"),
];

export function nucleonDocument(pin: PinMaker): DocumentNode {
  const [premises, one, two, three] = nucleonBlocks;
  if (!premises || !one || !two || !three) throw new Error("this template has four blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "Nucleons at rest and pions, with momenta of the size of the pion mass. All values are placeholders: put your own.",
      ),
      premises,
      heading(1, "The potential"),
      paragraph(
        "Weinberg (1990, 1991) counts momenta and pion masses alike. The axial coupling then counts ",
        pin("nucleons-one", "axial/order", ""),
        " and so does the contact, ",
        pin("nucleons-one", "contact/order", ""),
        ", although their dimensions differ: this counting is ",
        pin("nucleons-one", "verdict", ""),
        ". The exchange of one pion counts $\\nu = $ ",
        pin("nucleons-one", "graph/order", ""),
        ".",
      ),
      one,
      paragraph(
        "The exchange of two pions, as far as it is irreducible, counts $\\nu = $ ",
        pin("nucleons-two", "graph/order", ""),
        ". What remains when only nucleons are in between is enhanced by $m_N/Q$: it is not counted but iterated, by solving the Schrödinger equation with the potential.",
      ),
      two,
      heading(1, "Three nucleons"),
      paragraph(
        "In the normalisation $\\nu = -2 + 2A - 2C + \\dots$, which adds $3A - 6$, the contact of three nucleons stands at ",
        pin("nucleons-three", "graph/order", ""),
        ", where three-nucleon forces begin (van Kolck 1994).",
      ),
      three,
    ],
  };
}
