/** Gauge groups and field contents that many start from. Values are examples; a person puts in her own. */
type Row = Readonly<Record<string, string>>;
export interface Beginning {
  readonly name: string;
  readonly groups: readonly Row[];
  readonly content: readonly Row[];
}

const strong: Row = { group: "SU(3)", symbol: "alpha_s", given: "α = g²/4π", value: "0.118", unit: "" };
const quark = (name: string, mass: string): Row => ({
  name,
  kind: "Dirac fermion",
  charges: "3",
  copies: "1",
  mass,
});
const weyl = (name: string, charges: string): Row => ({
  name,
  kind: "Weyl fermion",
  charges,
  copies: "3",
  mass: "",
});

export const beginnings: readonly Beginning[] = [
  {
    name: "the Standard Model",
    groups: [
      { group: "SU(3)", symbol: "g_3", given: "g", value: "", unit: "" },
      { group: "SU(2)", symbol: "g_2", given: "g", value: "", unit: "" },
      { group: "U(1)", symbol: "g_1", given: "g", value: "", unit: "5/3" },
    ],
    content: [
      weyl("quark doublets", "3, 2, 1/6"),
      weyl("up quarks", "3bar, 1, -2/3"),
      weyl("down quarks", "3bar, 1, 1/3"),
      weyl("lepton doublets", "1, 2, -1/2"),
      weyl("charged leptons", "1, 1, 1"),
      { name: "Higgs doublet", kind: "complex scalar", charges: "1, 2, 1/2", copies: "1", mass: "" },
    ],
  },
  {
    name: "six quarks, the heavy ones with thresholds",
    groups: [strong],
    content: [
      { ...quark("light quarks", ""), copies: "3" },
      quark("charm", "1.3 GeV"),
      quark("bottom", "4.2 GeV"),
      quark("top", "163 GeV"),
    ],
  },
  {
    name: "electrodynamics of one charged fermion",
    groups: [{ group: "U(1)", symbol: "alpha", given: "α = g²/4π", value: "1/137.036", unit: "" }],
    content: [{ name: "electron", kind: "Dirac fermion", charges: "1", copies: "1", mass: "" }],
  },
];
