/** Published countings that rules can begin as. */
export const presetNames = [
  "dimension",
  "chiral, mesons",
  "chiral, with nucleons",
  "heavy quark",
  "nonrelativistic velocity",
  "soft-collinear",
  "large scattering length",
  "post-Newtonian",
  "gravity at low energy",
  "Fermi surface",
] as const;
export type PresetName = (typeof presetNames)[number];
