/** Field contents that many start from, as inputs of a Basis count: for templates, tests and measurements. */
import type { BasisInputs } from "./inputs.ts";

type Rows = Pick<BasisInputs, "groups" | "fields">;
type FieldLine = readonly [symbol: string, kind: string, charges: string, flavours: string, meaning: string];

function rows(
  groups: readonly (readonly [name: string, group: string, keep: string])[],
  fields: readonly FieldLine[],
): Rows {
  return {
    groups: groups.map(([name, group, keep], index) => ({ id: `g${index + 1}`, name, group, keep })),
    fields: fields.map(([symbol, kind, charges, flavours, meaning], index) => ({
      id: `f${index + 1}`,
      symbol,
      kind,
      charges,
      flavours,
      meaning,
    })),
  };
}

const standardGroups = [
  ["colour", "SU(3)", ""],
  ["weak", "SU(2)", ""],
  ["hypercharge", "U(1)", ""],
] as const;

const standardFields: readonly FieldLine[] = [
  ["H", "complex scalar", "1, 2, 1/2", "1", "Higgs doublet"],
  ["Q", "left-handed spinor", "3, 2, 1/6", "n_f", "quark doublets"],
  ["u", "right-handed spinor", "3, 1, 2/3", "n_f", "up quarks"],
  ["d", "right-handed spinor", "3, 1, -1/3", "n_f", "down quarks"],
  ["L", "left-handed spinor", "1, 2, -1/2", "n_f", "lepton doublets"],
  ["e", "right-handed spinor", "1, 1, -1", "n_f", "charged leptons"],
  ["G", "field strength", "8, 1, 0", "1", "gluons"],
  ["W", "field strength", "1, 3, 0", "1", "weak bosons"],
  ["B", "field strength", "1, 1, 0", "1", "hypercharge"],
];

/** The Standard Model in its unbroken phase, for n_f generations. */
export const standardModel: Rows = rows(standardGroups, standardFields);

/** The same with n_f right-handed neutrinos. */
export const standardModelWithNeutrinos: Rows = rows(standardGroups, [
  ...standardFields,
  ["N", "right-handed spinor", "1, 1, 0", "n_f", "right-handed neutrinos"],
]);

/** Electrodynamics and chromodynamics below the weak scale: numbers of up and down quarks, charged leptons, neutrinos. */
export function belowTheWeakScale(up: string, down: string, charged: string, neutrinos: string): Rows {
  return rows(
    [
      ["colour", "SU(3)", ""],
      ["electric charge", "U(1)", ""],
      ["B", "U(1)", "all"],
      ["L", "U(1)", "all"],
    ],
    [
      ["u_L", "left-handed spinor", "3, 2/3, 1/3, 0", up, "up quarks"],
      ["u_R", "right-handed spinor", "3, 2/3, 1/3, 0", up, ""],
      ["d_L", "left-handed spinor", "3, -1/3, 1/3, 0", down, "down quarks"],
      ["d_R", "right-handed spinor", "3, -1/3, 1/3, 0", down, ""],
      ["e_L", "left-handed spinor", "1, -1, 0, 1", charged, "charged leptons"],
      ["e_R", "right-handed spinor", "1, -1, 0, 1", charged, ""],
      ["nu", "left-handed spinor", "1, 0, 0, 1", neutrinos, "neutrinos"],
      ["G", "field strength", "8, 0, 0, 0", "1", "gluons"],
      ["F", "field strength", "1, 0, 0, 0", "1", "photon"],
    ],
  );
}

/** N real scalars that O(N) turns into each other. */
export function orthogonalScalars(n: number): Rows {
  return rows([["rotations", `O(${n})`, ""]], [["phi", "real scalar", "vector", "1", "a vector"]]);
}

/** One real scalar alone. */
export const scalarAlone: Rows = rows([], [["phi", "real scalar", "", "1", "a scalar"]]);
