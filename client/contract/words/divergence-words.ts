/** Problems and notices of Divergence. */
import { formula, quoted, said, type Words } from "./words.ts";

const capNames: Readonly<Record<string, string>> = {
  maxLoops: "loops",
  maxLegs: "external legs",
  maxOrder: "orders in 1/Λ",
};

export const divergenceWords: Words = {
  "premises-incomplete": ({ count }) =>
    `Something in the premises cannot be read (${said(count)} ${count === 1 ? "problem" : "problems"}), and what it concerns is left out here.`,
  "count-unreadable": ({ text, most }, path) =>
    `The number of ${path[0] === "legs" ? "legs" : "vertices"} is ${quoted(text)}; it must be a whole number from 1 to ${said(most)}.`,
  "vertex-unknown": () =>
    "This vertex is no term of the premises, or its term cannot be read. Choose one that is.",
  "vertex-kinetic": () =>
    "This is a kinetic term: it makes the propagators and is no vertex. Choose an interaction or a mass term.",
  "vertex-without-fields": ({ latex }) => `${formula(latex)} has no fields, so it is no vertex.`,
  "leg-unknown": ({ text }) => `${quoted(text)} is no field of the premises.`,
  "graph-without-vertices": () => "There are no vertices yet. Choose at least one term of the premises.",
  "graph-too-many-legs": ({ symbol, ends, legs }) =>
    `There is no such graph: the vertices have ${said(ends)} legs of ${said(symbol)}, fewer than the ${said(legs)} external ones.`,
  "graph-half-line": ({ symbol, ends, legs }) =>
    `There is no such graph: of ${said(ends)} legs of ${said(symbol)} at the vertices ${said(legs)} are external, which leaves an odd number to be joined in pairs.`,
  "graph-unconnected": ({ lines, vertices, needed }) =>
    `There is no connected graph: ${said(vertices)} vertices need at least ${said(needed)} internal lines, and these legs leave ${said(lines)}.`,
  "graph-falls-apart": () =>
    "There is no connected graph: these vertices cannot all be joined by lines of the fields they share.",
  "graph-charge": ({ symbols }) =>
    `There is no such graph: the external legs do not conserve the number of ${said(symbols)}, so its lines cannot close. Each internal line joins a field to its conjugate; choose “pair” for one of each.`,
  "legs-break-symmetry": ({ symmetry }) =>
    `These external legs carry a charge of ${said(symmetry)}: only terms that break it can make such a graph.`,
  "graph-tree": () =>
    "This graph has no loop: there is nothing to diverge, and ω is only its power of momentum.",
  "graph-reducible": () =>
    "A vertex with a single leg makes every graph one-particle reducible; ω is meant for irreducible ones.",
  "graph-retarded": () =>
    "In vacuum this graph vanishes: a loop of retarded propagators would have to close. It matters at finite density or temperature.",
  "graph-closed-line": () =>
    "With a single vertex no external momentum flows through the loops: they give powers of masses only, and nothing in dimensional regularisation when the lines are massless.",
  "omega-subgraphs": () =>
    "ω below 0 says that the graph has no overall divergence; subgraphs may still diverge.",
  "omega-not-sufficient": () =>
    "ω of 0 or more is necessary for an overall divergence, not sufficient: it is an upper bound, which symmetries and cancellations may lower.",
  "omega-gauge": () =>
    "Gauge invariance lowers the true degree of amplitudes with gauge legs: in electrodynamics two photons diverge as a logarithm, three not at all, four not at all.",
  "omega-ghost": () =>
    "Where the derivative acts on an external antighost, one power of momentum factors out and the true degree is lower by one for each.",
  "omega-chiral": () =>
    "Chiral symmetry, where masses break it only softly, trades a power of momentum for a fermion mass.",
  "omega-shift": () =>
    "A shift symmetry gives each external scalar leg a derivative and lowers the true degree by one for each.",
  "cap-unreadable": ({ text, most }, path) => {
    const first = path[0] ?? "";
    return `The largest number of ${capNames[first] ?? first} is ${quoted(text)}; it must be a number from ${first === "maxOrder" ? "0" : "1"} to ${said(most)}.`;
  },
  "theory-too-large": ({ loops, legs, order }) =>
    `There are too many vertices and legs to go through within ${said(loops)} loops, ${said(legs)} legs and order ${said(order)}. Lower one of these.`,
  "amplitudes-need-numbers": () =>
    "The dimension is a symbol, so the verdict is given by ranges; amplitudes are listed once it is a number.",
  "theory-not-closed": () =>
    "Divergent amplitudes demand terms that the premises lack: they are listed, and the verdict supposes them added.",
};
