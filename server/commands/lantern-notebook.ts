/**
 * The demonstration notebook: an invented light scalar pair below an invented threshold.
 * Its pins are taken from the engine when it is made, never written by hand.
 */
import { block, displayed, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const LANTERN_TITLE = "Lantern amplitude to one per mille";

export const lanternBlocks: readonly DocumentNode[] = [
  block("premises", "lantern", "", {
    fields: { name: "Lantern", d: "4", note: "Invented for demonstration." },
    tables: {
      symmetries: [
        { id: "reflection", name: "reflection", group: "Z2", meaning: "chi changes sign, sigma does not" },
      ],
      fields: [
        { id: "chi", symbol: "chi", kind: "real scalar", charges: "odd", meaning: "light scalar" },
        { id: "sigma", symbol: "sigma", kind: "real scalar", charges: "even", meaning: "its companion" },
      ],
      scales: [
        { id: "heavy", symbol: "Lambda", value: "3.2(4) TeV", role: "heavy", meaning: "threshold" },
        { id: "probe", symbol: "p", value: "350 GeV", role: "probe", meaning: "probe" },
        {
          id: "mass",
          symbol: "m",
          value: "330 GeV",
          role: "light",
          meaning: "mass of both scalars, kept at the probe scale",
        },
      ],
      terms: [
        { id: "mchi", term: "m^2/2 chi^2", assigned: "m^2/p^2", meaning: "tuned" },
        { id: "msigma", term: "m^2/2 sigma^2", assigned: "m^2/p^2", meaning: "tuned" },
        { id: "kappa", term: "kappa/2 chi^2 sigma", assigned: "m/p", meaning: "of the size of the mass" },
        { id: "lambda", term: "lambda/4! chi^4" },
        { id: "a5", term: "a/Lambda (dchi)^2 sigma" },
        { id: "b6", term: "b/Lambda^2 chi^4 sigma^2", natural: "0.4" },
        { id: "c6", term: "c_6/(6! Lambda^2) chi^6" },
        { id: "a7", term: "a_7/Lambda^3 (dchi)^2 sigma^3", natural: "0.8" },
        { id: "c8", term: "c_8/Lambda^4 d^4 chi^4" },
      ],
    },
  }),
  block("scaling", "lantern-scaling", "lantern", { fields: { title: "every term" } }),
  block("divergence", "lantern-graph", "lantern", {
    fields: { title: "one loop with the sextic term", mode: "one graph" },
    tables: {
      vertices: [
        { id: "v1", term: "c6", count: "1" },
        { id: "v2", term: "lambda", count: "1" },
      ],
      legs: [{ id: "l1", field: "chi", count: "6" }],
    },
  }),
  block("orderPlan", "lantern-plan", "lantern", { fields: { title: "to one per mille", target: "1e-3" } }),
  block("truncationError", "lantern-error", "lantern", {
    fields: { title: "rate at 350 GeV", quantity: "rate", unit: "pb" },
    tables: {
      orders: [
        { id: "o0", order: "0", value: "8.000", name: "LO" },
        { id: "o1", order: "1", value: "9.050", name: "NLO" },
        { id: "o2", order: "2", value: "9.200", name: "N2LO" },
        { id: "o3", order: "3", value: "9.188", name: "N3LO" },
      ],
    },
  }),
];

/** The whole document; `pin` is called for each pinned number in its sentence. */
export function lanternDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, graph, plan, truncation] = lanternBlocks;
  if (!premises || !scaling || !graph || !plan || !truncation)
    throw new Error("the Lantern notebook has five blocks");
  return {
    type: "doc",
    content: [
      paragraph(
        "This notebook is an invented demonstration: the Lantern sector, the people who write here and every number fed in are made up. Change anything; the numbers in the sentences will say so.",
      ),
      heading(1, "Premises and what they imply"),
      paragraph(
        "Below the threshold $\\Lambda$ the sector holds two real scalars, $\\chi$ odd and $\\sigma$ even under the reflection. Their mass is kept at the probe scale by hand, $m \\sim p$, since a relevant term would otherwise outgrow the kinetic one. With $p = 350\\,\\mathrm{GeV}$ the expansion parameter is ",
        pin("lantern-scaling", "Q", ""),
        ", and the sextic term enters at ",
        pin("lantern-scaling", "c6/size", ""),
        ".",
      ),
      premises,
      paragraph("Every term of the Lagrangian then has its dimension, its class and its size:"),
      scaling,
      heading(1, "What diverges"),
      paragraph(
        "The sextic term meets $\\lambda$ in one loop with six legs. Its degree of divergence is ",
        pin("lantern-graph", "omega", ""),
        ", so that the counterterm is the sextic term itself:",
      ),
      displayed(
        "lantern-beta",
        "\\mu\\,\\frac{\\mathrm{d}c_6}{\\mathrm{d}\\mu} = \\frac{15\\,\\lambda\\,c_6}{16\\pi^2} + \\dots",
      ),
      graph,
      heading(1, "Where to stop, and what it costs"),
      paragraph(
        "At a target of one per mille the expansion is needed through order ",
        pin("lantern-plan", "order", ""),
        " in $p/\\Lambda$; what is left out then adds up to ",
        pin("lantern-plan", "left-out", ""),
        ".",
      ),
      plan,
      paragraph(
        "Taken from the orders computed so far, the rate carries a truncation error of ",
        pin("lantern-error", "conjugate/68", "sign=both"),
        " at 68 % degree of belief.",
      ),
      truncation,
      paragraph(
        "A truncation estimate is a model of what was left out, not a bound: it takes the coefficients to be of natural size.",
      ),
    ],
  };
}
