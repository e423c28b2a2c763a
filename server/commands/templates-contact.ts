/**
 * Template: fermions that meet at a point, and a gauge field. Agrees with Peskin and Schroeder 1995, section 10.1 (the
 * coupling of four fermions has dimension −2, and its loops ask for ever more counterterms), and with Weinberg 1979
 * (Physica A 96, 327) for the order to stop at.
 */
import { block, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const contactBlocks: readonly DocumentNode[] = [
  block("premises", "contact", "", {
    fields: { name: "contact theory", d: "4" },
    tables: {
      symmetries: [{ id: "charge", name: "charge", group: "U(1)" }],
      fields: [
        { id: "psi", symbol: "psi", kind: "Dirac spinor", charges: "1" },
        { id: "A", symbol: "A", kind: "gauge potential", charges: "0" },
      ],
      scales: [
        {
          id: "heavy",
          symbol: "Lambda",
          value: "80 GeV",
          role: "heavy",
          meaning: "mass of what was integrated out",
        },
        { id: "probe", symbol: "p", value: "5 GeV", role: "probe", meaning: "put yours here" },
      ],
      terms: [
        { id: "e", term: "e psibar A psi" },
        { id: "g", term: "G/Lambda^2 (psibar psi)^2" },
        { id: "g8", term: "G_8/Lambda^4 d^2 (psibar psi)^2" },
      ],
    },
  }),
  block("scaling", "contact-scaling", "contact", { fields: { title: "every term" } }),
  block("divergence", "contact-graph", "contact", {
    fields: { title: "two contact vertices", mode: "one graph" },
    tables: {
      vertices: [{ id: "v1", term: "g", count: "2" }],
      legs: [
        { id: "l1", field: "psi", count: "2" },
        { id: "l2", field: "psibar", count: "2" },
      ],
    },
  }),
  block("orderPlan", "contact-plan", "contact", { fields: { title: "to one per mille", target: "0.1 %" } }),
];

export function contactDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, graph, plan] = contactBlocks;
  if (!premises || !scaling || !graph || !plan) throw new Error("this template has four blocks");
  return {
    type: "doc",
    content: [
      heading(1, "Premises"),
      paragraph(
        "Below $\\Lambda$ a charged fermion meets itself at a point and couples to a gauge field. Both scales are placeholders: put your own.",
      ),
      premises,
      heading(1, "What is small"),
      paragraph(
        "The coefficient of four fermions has dimension ",
        pin("contact-scaling", "g/coefficient", ""),
        " and counts $\\Lambda^{-2}$: at the probe scale it is a correction of relative size ",
        pin("contact-scaling", "g/size", ""),
        ". The gauge coupling is ",
        pin("contact-scaling", "e/class", ""),
        " (Peskin and Schroeder 1995, section 10.1).",
      ),
      scaling,
      heading(1, "What it asks for"),
      paragraph(
        "Two contact vertices in one loop diverge with degree ",
        pin("contact-graph", "omega", ""),
        ": a new term with two derivatives is needed, as for every coupling of negative dimension.",
      ),
      graph,
      heading(1, "Where to stop"),
      paragraph(
        "For one per mille one stops at order ",
        pin("contact-plan", "order", ""),
        " and leaves out ",
        pin("contact-plan", "left-out", ""),
        " (Weinberg 1979, Physica A 96, 327).",
      ),
      plan,
    ],
  };
}
