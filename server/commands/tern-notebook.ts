/**
 * The second demonstration notebook: two invented species at low energy, bound to each other by almost nothing, so that
 * counting by dimension alone would be wrong. A dimer field of dimension 2 carries the unnaturally large scattering
 * length (Kaplan 1997, Nucl. Phys. B 494, 471; its dimension at infinite scattering length: Nishida and Son 2007, Phys.
 * Rev. D 76, 086004). The order-by-order numbers come from the engine's documented invented observable.
 */
import { ternTrap, ternTrapBreakdown } from "#engine/truncation/tern-trap.ts";
import { block, displayed, heading, paragraph, type DocumentNode } from "./document-builder.ts";
import type { PinMaker } from "./pin-maker.ts";

export const TERN_TITLE = "Two species in the Tern trap";

const HIGHEST = 3;
/** Momentum at which the notebook works, in MeV: one of the 31 points from 60 to 360 MeV. */
const MOMENTUM = 150;

const trap = ternTrap(31, HIGHEST);

/** A line for each momentum: X through each order and the sum of all, in eight digits. */
const tableLines = trap.p.map((momentum, at) =>
  [momentum, ...trap.orders.map((through) => through[at] ?? NaN), trap.exact[at] ?? NaN]
    .map((value) => String(Number(value.toPrecision(8))))
    .join("; "),
);
/** What the last order kept leaves out at the notebook's momentum, known since all orders are. */
const at = trap.p.indexOf(MOMENTUM);
const leftOut = Math.abs((trap.exact[at] ?? NaN) - (trap.orders[HIGHEST]?.[at] ?? NaN));

const names = ["LO", "NLO", "N2LO", "N3LO"];

export const ternBlocks: readonly DocumentNode[] = [
  block("premises", "tern", "", {
    fields: { name: "Tern", geometry: "anisotropic", D: "3", z: "2", note: "Invented for demonstration." },
    tables: {
      symmetries: [
        { id: "n1", name: "first", group: "U(1)", meaning: "particles of the first species" },
        { id: "n2", name: "second", group: "U(1)", meaning: "particles of the second species" },
      ],
      fields: [
        { id: "psi", symbol: "psi", kind: "Schrödinger field", charges: "1, 0", meaning: "first species" },
        { id: "chi", symbol: "chi", kind: "Schrödinger field", charges: "0, 1", meaning: "second species" },
        {
          id: "s",
          symbol: "s",
          kind: "Schrödinger field",
          dimension: "2",
          charges: "1, 1",
          meaning: "dimer of the two",
        },
      ],
      scales: [
        {
          id: "heavy",
          symbol: "Lambda",
          value: `${ternTrapBreakdown} MeV`,
          role: "heavy",
          meaning: "inverse range",
        },
        { id: "probe", symbol: "p", value: `${MOMENTUM} MeV`, role: "probe", meaning: "relative momentum" },
        { id: "gamma", symbol: "gamma", value: "20 MeV", role: "light", meaning: "1/a, unnaturally small" },
      ],
      terms: [
        { id: "y", term: "y s* psi chi", meaning: "the dimer breaks up; no small parameter" },
        { id: "yc", term: "y psi* chi* s", meaning: "and forms again" },
        { id: "a", term: "m s* s", assigned: "gamma/p", meaning: "1/a, tuned" },
        { id: "r", term: "r s* d_t s", meaning: "effective range" },
        { id: "h", term: "h s* s psi* psi", meaning: "dimer and a third particle" },
        { id: "w", term: "w s* d_i^4 s", meaning: "shape" },
        { id: "c1", term: "c_1 psi* d_i psi chi* d_i chi", meaning: "p wave" },
      ],
    },
  }),
  block("scaling", "tern-scaling", "tern", { fields: { title: "every term" } }),
  block("divergence", "tern-graph", "tern", {
    fields: { title: "the dimer's self-energy", mode: "one graph" },
    tables: {
      vertices: [
        { id: "v1", term: "y", count: "1" },
        { id: "v2", term: "yc", count: "1" },
      ],
      legs: [
        { id: "l1", field: "s", count: "1" },
        { id: "l2", field: "s*", count: "1" },
      ],
    },
  }),
  block("orderPlan", "tern-plan", "tern", { fields: { title: "to three per cent", target: "3 %" } }),
  block("data", "tern-data", "", {
    fields: { title: "cross section order by order, and exact" },
    tables: {
      columns: [
        { id: "p", name: "p", role: "x", unit: "MeV" },
        ...names.map((name, n) => ({ id: `n${n}`, name, role: "order", order: String(n), unit: "mb" })),
        { id: "exact", name: "exact", role: "measured", unit: "mb" },
      ],
      // Together, as an import keeps them: nobody is meant to go through them one by one.
      lines: [{ id: "lines", values: tableLines.join("\n") }],
    },
  }),
  block("truncationError", "tern-error", "tern", {
    fields: {
      title: "cross section along p",
      quantity: "cross section",
      unit: "mb",
      data: "tern-data",
      at: String(MOMENTUM),
      method: "correlated along x",
    },
  }),
];

export function ternDocument(pin: PinMaker): DocumentNode {
  const [premises, scaling, graph, plan, data, truncation] = ternBlocks;
  if (!premises || !scaling || !graph || !plan || !data || !truncation)
    throw new Error("the Tern notebook has six blocks");
  return {
    type: "doc",
    content: [
      paragraph(
        "This notebook is an invented demonstration: there is no Tern trap, and every number fed in is made up. It argues about two species, $\\psi$ and $\\chi$, whose scattering length is far longer than the range of their interaction.",
      ),
      heading(1, "Why dimension alone will not do"),
      paragraph(
        "In velocity counting a momentum costs one power and an energy two, so time counts twice: $z = 2$, and the action is measured by $D + z = 5$. A contact term $\\psi^\\dagger\\psi\\chi^\\dagger\\chi$ has dimension 6 and would be a small correction. With an unnaturally large scattering length it is not: near threshold the two species form a shallow dimer, which the counting must know of.",
      ),
      paragraph(
        "We give the dimer its own field $s$. At infinite scattering length its dimension is 2, not the $3$ of two free particles, and this one number reorders everything: the coupling of the dimer to the pair is ",
        pin("tern-scaling", "y/class", ""),
        ", the effective range is ",
        pin("tern-scaling", "r/class", ""),
        " with relative size ",
        pin("tern-scaling", "r/size", ""),
        ", and $1/a$ is ",
        pin("tern-scaling", "a/class", ""),
        ". It is small because nature, here our invention, tuned it; so its size is given by hand.",
      ),
      premises,
      paragraph(
        "The table follows from these premises alone. The term with a third particle is counted by its factors; what three bodies do to each other can change that, and this notebook does not study it.",
      ),
      scaling,
      heading(1, "What the tuning costs"),
      paragraph(
        "The dimer breaks up into the pair and forms again. Two vertices and two legs give a degree of divergence of ",
        pin("tern-graph", "omega", ""),
        ". A linear divergence renormalises $s^\\dagger s$, which is $1/a$: without tuning, $1/a$ would be of the size of $\\Lambda$.",
      ),
      graph,
      heading(1, "Where to stop"),
      paragraph(
        `At $p = ${MOMENTUM}\\,\\mathrm{MeV}$ the expansion parameter is `,
        pin("tern-plan", "Q", ""),
        ". For three per cent one needs everything through order ",
        pin("tern-plan", "order", ""),
        "; what is left out then adds up to ",
        pin("tern-plan", "left-out", ""),
        ". Drag the hairline of the ruler above to see what a stricter target would ask for.",
      ),
      plan,
      heading(1, "What is left in doubt"),
      paragraph("The cross section of this sector is made by a formula, so that its error can be checked:"),
      displayed(
        "tern-formula",
        "X(p) = X_0(p) \\sum_{n=0}^{30} c_n(p)\\, Q^n, \\qquad X_0(p) = 40\\,\\mathrm{mb}\\;\\frac{100\\,\\mathrm{MeV}}{p}, \\qquad c_0 = 1",
      ),
      paragraph(
        "with coefficients $c_n(p)$ that are smooth in $p$ over a length of 60 MeV, of size one, and drawn once. The table has its first four orders at 31 momenta, and in its last column the sum of all, which no real calculation knows.",
      ),
      data,
      paragraph(
        `From the four orders at $p = ${MOMENTUM}\\,\\mathrm{MeV}$ the truncation error is `,
        pin("tern-error", "correlated/68", "sign=both"),
        ` at 68 % degree of belief. What is truly left out there is $${leftOut.toPrecision(2)}\\,\\mathrm{mb}$.`,
      ),
      paragraph(
        "One momentum proves little, so all are asked. Through orders 1 to 3 a share of ",
        pin("tern-error", "covered/68", ""),
        " of the exact values lies in the 68 % intervals, and ",
        pin("tern-error", "covered/95", ""),
        " in those of 95 %: they hold about what they promise, as far as 31 neighbours that depend on each other can tell. And where does the expansion break down? From the table alone the breakdown scale is ",
        pin("tern-error", "breakdown/median", ""),
        ", between ",
        pin("tern-error", "breakdown/68/low", ""),
        " and ",
        pin("tern-error", "breakdown/68/high", ""),
        ` at 68 %; the formula was written with $\\Lambda = ${ternTrapBreakdown}\\,\\mathrm{MeV}$.`,
      ),
      truncation,
      paragraph(
        "A truncation estimate is a model of what was left out, not a bound: it takes the coefficients to be of natural size, and it says nothing of a scale that was forgotten.",
      ),
    ],
  };
}
