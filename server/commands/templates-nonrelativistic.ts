/**
 * Two templates of slow particles. The bound state agrees with Lepage, Magnea, Nakhleh, Magnea and Hornbostel 1992 (Phys.
 * Rev. D 46, 4052): relativity and spin at v² against kinetic and Coulomb energy. The contact theory agrees with Kaplan,
 * Savage and Wise 1998 (Nucl. Phys. B 534, 329): all chains of C₀ at Q⁻¹, one C₂ at Q⁰.
 */
import { block, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const boundStateBlocks: readonly DocumentNode[] = [
  block("premises", "bound", "", {
    fields: { name: "bound state", d: "4" },
    tables: {
      symmetries: [{ id: "number", name: "number", group: "U(1)" }],
      fields: [
        { id: "psi", symbol: "psi", kind: "static heavy field", charges: "1", meaning: "heavy particle" },
        { id: "A", symbol: "A", kind: "gauge potential", charges: "0", meaning: "g A_0" },
        { id: "E", symbol: "E", kind: "field strength", charges: "0", meaning: "g E" },
        { id: "B", symbol: "B", kind: "field strength", charges: "0", meaning: "g B" },
      ],
      scales: [{ id: "M", symbol: "M", value: "4.7 GeV", role: "other", meaning: "put yours here" }],
      terms: [
        { id: "coulomb", term: "A psibar psi" },
        { id: "kinetic", term: "1/(2 M) psibar d^2 psi" },
        { id: "relativity", term: "c_1/(8 M^3) psibar d^4 psi" },
        { id: "darwin", term: "c_2/(8 M^2) psibar psi d E" },
        { id: "spin", term: "c_4/(2 M) psibar psi B" },
        { id: "contact", term: "f/M^2 psibar psibar psi psi" },
      ],
    },
  }),
  block("countingRules", "bound-counting", "bound", {
    fields: { title: "in powers of velocity", preset: "nonrelativistic velocity" },
    tables: {
      parameters: [{ id: "v", symbol: "v", value: "0.3(1)", meaning: "put yours here" }],
      rules: [
        { id: "psi", of: "field", symbol: "psi", weight: "3/2" },
        { id: "A", of: "field", symbol: "A", weight: "2" },
        { id: "E", of: "field", symbol: "E", weight: "3" },
        { id: "B", of: "field", symbol: "B", weight: "4" },
        { id: "d", of: "derivative", symbol: "", weight: "1" },
        { id: "measure", of: "measure", symbol: "", weight: "-5" },
      ],
    },
  }),
  block("scaling", "bound-scaling", "bound", { fields: { title: "by dimension" } }),
];

export function boundStateDocument(pin: PinMaker): DocumentNode {
  const [premises, counting, scaling] = boundStateBlocks;
  if (!premises || !counting || !scaling) throw new Error("this template has three blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "A heavy particle in the field that binds it. The fields $A$, $E$ and $B$ stand for $g A_0$, $g\\mathbf{E}$ and $g\\mathbf{B}$, and all derivatives below are those in space; mass and velocity are placeholders: put your own.",
      ),
      premises,
      heading(1, "Powers of the velocity"),
      paragraph(
        "Kinetic and Coulomb energy keep each other in balance, so both count ",
        pin("bound-counting", "kinetic/order", ""),
        " and ",
        pin("bound-counting", "coulomb/order", ""),
        ". Relativity and spin come at $v$ to the power ",
        pin("bound-counting", "relativity/order", ""),
        " and ",
        pin("bound-counting", "spin/order", ""),
        " (Lepage and others 1992), which is ",
        pin("bound-counting", "relativity/size", ""),
        " here. A contact term counts ",
        pin("bound-counting", "contact/order", ""),
        ", before its coefficient, which has a loop of its own in front.",
      ),
      counting,
      heading(1, "Against dimension"),
      paragraph(
        "By dimension the kinetic energy would be ",
        pin("bound-scaling", "kinetic/class", ""),
        ", a correction like the magnetic term, and nothing would bind. Velocity counting is ",
        pin("bound-counting", "verdict", ""),
        ": of the six terms ",
        pin("bound-counting", "changed", ""),
        " change place.",
      ),
      scaling,
    ],
  };
}

const premisesOfContact = block("premises", "unnatural", "", {
  fields: { name: "contact theory", geometry: "anisotropic", D: "3", z: "2" },
  tables: {
    symmetries: [{ id: "number", name: "particle number", group: "U(1)" }],
    fields: [{ id: "N", symbol: "N", kind: "Schrödinger field", charges: "1" }],
    scales: [
      { id: "M", symbol: "M", value: "940 MeV", role: "other", meaning: "put yours here" },
      { id: "probe", symbol: "p", value: "45 MeV", role: "probe", meaning: "momentum, like 1/a" },
      { id: "heavy", symbol: "Lambda", value: "140(20) MeV", role: "heavy", meaning: "inverse range" },
    ],
    terms: [
      { id: "c0", term: "C_0 N* N* N N" },
      { id: "c2", term: "C_2 d_i^2 N* N* N N" },
      { id: "c4", term: "C_4 d_i^4 N* N* N N" },
    ],
  },
});
const pair = [{ id: "legs", field: "N", leg: "pair", count: "2" }];

export const unnaturalBlocks: readonly DocumentNode[] = [
  premisesOfContact,
  block("scaling", "unnatural-scaling", "unnatural", { fields: { title: "by dimension" } }),
  block("countingRules", "unnatural-chain", "unnatural", {
    fields: { title: "a chain of three", preset: "large scattering length" },
    tables: { vertices: [{ id: "v", term: "c0", count: "3" }], legs: pair },
  }),
  block("countingRules", "unnatural-range", "unnatural", {
    fields: { title: "with the effective range once", preset: "large scattering length" },
    tables: {
      vertices: [
        { id: "v", term: "c0", count: "2" },
        { id: "w", term: "c2", count: "1" },
      ],
      legs: pair,
    },
  }),
];

export function unnaturalDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, chain, range] = unnaturalBlocks;
  if (!premises || !chain || !range || !scaling) throw new Error("this template has four blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "Particles that meet at a point, with a scattering length far beyond the range of their interaction. All values are placeholders: put your own.",
      ),
      premises,
      heading(1, "What dimension says"),
      paragraph(
        "By dimension $C_0$ is ",
        pin("unnatural-scaling", "c0/class", ""),
        " and would be a small correction. A shallow bound state would then be impossible.",
      ),
      scaling,
      heading(1, "What the scattering length says"),
      paragraph(
        "With $C_{2n} \\sim Q^{-(n+1)}$ (Kaplan, Savage and Wise 1998) the term $C_0$ counts ",
        pin("unnatural-chain", "c0/order", ""),
        ", and three of them in two loops have an amplitude of order $Q$ to the power ",
        pin("unnatural-chain", "graph/order", ""),
        ", like one of them alone: the whole chain is summed. This counting is ",
        pin("unnatural-chain", "verdict", ""),
        ".",
      ),
      chain,
      paragraph(
        "One insertion of $C_2$, the effective range, brings it to ",
        pin("unnatural-range", "graph/order", ""),
        ": a correction of relative size ",
        pin("unnatural-range", "c2/size", ""),
        ".",
      ),
      range,
    ],
  };
}
