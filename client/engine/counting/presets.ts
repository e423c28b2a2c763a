/**
 * Published countings as rows of rules for the fields of a theory. Symbols that a counting speaks of and a theory does
 * not have get no row; what a rule cannot express is said in the conventions.
 */
import type { Field, Scale, Theory } from "../premises/theory.ts";
import type { RuleSubject } from "./inputs.ts";
import { presetNames, type PresetName } from "./preset-names.ts";

export interface RuleRow {
  readonly of: RuleSubject;
  readonly symbol: string;
  readonly weight: string;
}
export interface Proposal {
  readonly parameters: readonly { readonly symbol: string; readonly value: string }[];
  readonly rules: readonly RuleRow[];
}

export function presetNamed(name: string): PresetName {
  return presetNames.find((one) => one === name) ?? "dimension";
}

const rule = (of: RuleSubject, weight: string, symbol = ""): RuleRow => ({ of, symbol, weight });
const eachField = (theory: Theory, weight: (field: Field) => string): RuleRow[] =>
  theory.fields.map((field) => rule("field", weight(field), field.symbol));
const eachScale = (theory: Theory, which: (scale: Scale) => boolean, weight: string): RuleRow[] =>
  theory.scales.filter(which).map(({ symbol }) => rule("coupling or scale", weight, symbol));
const isLight = ({ role }: Scale) => role === "light";

/** "p/Lambda" where the premises have both. */
function ratio({ scales }: Theory): string {
  const [probe, heavy] = (["probe", "heavy"] as const).map((role) => scales.find((one) => one.role === role));
  return probe && heavy && probe.value !== null && heavy.value !== null
    ? `${probe.symbol}/${heavy.symbol}`
    : "";
}
const one = (symbol: string, value: string) => [{ symbol, value }];

/** Contact couplings by their derivatives: C_2n of four legs and 2n derivatives scales as Q^-(n+1). */
function contactCouplings({ terms }: Theory): RuleRow[] {
  const rows = new Map<string, RuleRow>();
  for (const { monomial } of terms) {
    const legs = monomial.fields.reduce((sum, { count }) => sum + count, 0);
    const coupling = monomial.coefficients.find(({ power }) => power.sign() > 0)?.symbol;
    if (legs !== 4 || coupling === undefined || rows.has(coupling)) continue;
    const powers = monomial.derivatives + 2 * monomial.timeDerivatives;
    rows.set(coupling, rule("coupling or scale", `-${String(powers / 2 + 1)}`, coupling));
  }
  return [...rows.values()];
}

/** A pion counts nothing and a nucleon ½: Δ = d + n/2 − 2. */
const chiral = (theory: Theory, fermion: string): Proposal => ({
  parameters: one("Q", ratio(theory)),
  rules: [
    ...eachField(theory, ({ statistics }) => (statistics === "fermion" ? fermion : "0")),
    rule("derivative", "1"),
    ...eachScale(theory, isLight, "1"),
    rule("measure", "-2"),
    rule("loop", theory.spacetime.geometry === "isotropic" ? "d" : "D + z"),
  ],
});

/** Powers of momentum with energy ~ momentum²: a Schrödinger field counts D/2. */
const nonrelativistic = (theory: Theory): RuleRow[] => {
  const isSplit = theory.spacetime.geometry === "anisotropic";
  return [
    rule("derivative", "1"),
    ...(isSplit ? [rule("time derivative", "2")] : []),
    rule("measure", isSplit ? "-D - 2" : "-5"),
  ];
};
const spatial = (theory: Theory) => (theory.spacetime.geometry === "anisotropic" ? "D/2" : "3/2");

const proposals: Readonly<Record<PresetName, (theory: Theory) => Proposal>> = {
  dimension: (theory) => ({
    parameters: one("Q", ratio(theory)),
    rules: [
      ...eachField(theory, ({ dimension }) => dimension.toString()),
      rule("derivative", "1"),
      ...(theory.spacetime.geometry === "anisotropic" ? [rule("time derivative", "z")] : []),
      rule("measure", theory.measure.times(-1).toString()),
    ],
  }),
  "chiral, mesons": (theory) => chiral(theory, "1/2"),
  "chiral, with nucleons": (theory) => chiral(theory, "1/2"),
  "heavy quark": (theory) => ({
    parameters: one("lambda", ratio(theory)),
    rules: [
      ...eachField(theory, ({ dimension }) => dimension.toString()),
      rule("derivative", "1"),
      rule("measure", theory.measure.times(-1).toString()),
    ],
  }),
  "nonrelativistic velocity": (theory) => ({
    parameters: one("v", ""),
    rules: [
      ...eachField(theory, ({ kind }) =>
        kind === "gauge potential" ? "2" : kind === "field strength" ? "3" : spatial(theory),
      ),
      ...nonrelativistic(theory),
    ],
  }),
  "soft-collinear": (theory) => ({
    parameters: one("lambda", ""),
    rules: [...eachField(theory, () => "1"), rule("derivative", "2"), rule("measure", "-4")],
  }),
  "large scattering length": (theory) => ({
    parameters: one("Q", ratio(theory)),
    rules: [
      ...eachField(theory, () => spatial(theory)),
      ...nonrelativistic(theory),
      ...contactCouplings(theory),
    ],
  }),
  "post-Newtonian": (theory) => ({
    parameters: [
      { symbol: "v", value: "" },
      { symbol: "epsilon", value: "" },
    ],
    rules: [
      ...eachField(theory, () => "1/2, 0"),
      rule("derivative", "0, 0"),
      ...(theory.spacetime.geometry === "anisotropic" ? [rule("time derivative", "1, 0")] : []),
      rule("measure", "-1, 0"),
      ...eachScale(theory, ({ role }) => role === "heavy", "-3/2, -1/2"),
      ...eachScale(theory, ({ role }) => role === "light" || role === "other", "-1, -1"),
    ],
  }),
  "gravity at low energy": (theory) => chiral(theory, "1/2"),
  "Fermi surface": (theory) => ({
    parameters: one("s", ""),
    rules: [
      ...eachField(theory, () => "1/2"),
      rule("derivative", "1"),
      ...(theory.spacetime.geometry === "anisotropic" ? [rule("time derivative", "1")] : []),
      rule("measure", "-2"),
    ],
  }),
};

/** @example proposalOf("chiral, mesons", theory).rules // field 0, derivative 1, measure -2, loop d */
export function proposalOf(name: PresetName, theory: Theory): Proposal {
  return proposals[name](theory);
}
