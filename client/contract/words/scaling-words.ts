/** Problems and notices of Scaling. */
import { formula, quoted, said, type Words } from "./words.ts";

export const scalingWords: Words = {
  // Working point.
  "probe-missing": () =>
    "There is no probe scale, so terms have no size. Give a scale of the premises the role probe, or enter one here.",
  "heavy-missing": () =>
    "There is no heavy scale, so terms have no size. Give a scale of the premises the role heavy, or enter one here.",
  "role-ambiguous": ({ role, symbols }) =>
    `Several scales have the role ${said(role)}: ${said(symbols)}. Keep one of them, or enter one here.`,
  "scale-not-positive": ({ symbol }) => `The scale ${formula(symbol)} must be above 0.`,
  "probe-above-heavy": ({ ratio }) =>
    `The probe scale is ${said(ratio)} times the heavy scale: higher terms grow, and the expansion says nothing.`,
  "two-free-dimensions": () =>
    "Both D and z are left symbolic, so classes are told only where they hold for all D and z.",
  // Sizes.
  "relevant-unassigned": (facts) =>
    `The relevant term ${formula(facts["term"])} has its natural size, which upsets the counting. If it is tuned or protected, assign its size in the premises${facts["written"] ? `, such as ${quoted(facts["written"])}` : ""}.`,
  "loop-mass-below-probe": ({ ratio }) =>
    `If the heavy couplings come from loops of weak coupling, new states lie near Λ/4π, and the probe scale is ${said(ratio)} times that.`,
  // With a Running block.
  "fixed-point-gone": ({ text }) =>
    `${quoted(text)} is none of the fixed points of that block. Choose another.`,
  "fixed-point-above-critical": ({ d }) =>
    `That fixed point exists below d = ${said(d)}, in isotropic spacetime. Set d of the premises below it, or leave it symbolic.`,
  "running-of-other-premises": () =>
    "That block runs none of these terms. Choose a Running block that stands on the same premises.",
  "dimensions-not-known-there": ({ terms }) =>
    `${formula(terms)} mix at the fixed point or are not covered there, so their dimensions are those of their fields.`,
  // Naive dimensional analysis.
  "analysis-needs-four-dimensions": () =>
    "Naive dimensional analysis is given here for d = 4 only. Set d to 4, or choose natural size.",
  "analysis-kind-not-covered": ({ symbol, kind }) =>
    `Naive dimensional analysis does not cover ${quoted(symbol)}, a ${said(kind)}. Choose natural size.`,
  "analysis-dimension-overridden": ({ symbol }) =>
    `Naive dimensional analysis needs canonical dimensions, but that of ${quoted(symbol)} is set by hand. Choose natural size.`,
  "analysis-means-strong": ({ couplings }) =>
    `Naive dimensional analysis takes the heavy physics as strongly coupled, which disagrees with couplings stated as ${said(couplings)}.`,
  "coupling-at-strongest": ({ term, symbols }) =>
    `In ${formula(term)} nothing says how large ${quoted(symbols)} is, so it is taken at its strongest. Declare it as a scale with a number to say otherwise.`,
};
