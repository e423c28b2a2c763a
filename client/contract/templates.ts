/** What a new notebook can begin with. The documents themselves are the server's; this is what people choose from. */
export const templateNames = [
  "blank",
  "lantern",
  "tern",
  "scalar-pair",
  "contact-gauge",
  "lifshitz",
  "nucleons",
  "bound-state",
  "large-scattering-length",
  "gravity",
  "standard-model-count",
] as const;
export type Template = (typeof templateNames)[number];

export interface TemplateWords {
  readonly label: string;
  readonly hint: string;
}

export const templateWords: Readonly<Record<Template, TemplateWords>> = {
  blank: { label: "A blank page", hint: "" },
  lantern: {
    label: "A copy of the Lantern demonstration",
    hint: "An invented scalar sector below an invented threshold, counted to one per mille. Nothing in it is a real measurement.",
  },
  tern: {
    label: "A copy of the Tern demonstration",
    hint: "Two invented species with an unnaturally large scattering length, in velocity counting. Nothing in it is a real measurement.",
  },
  "scalar-pair": {
    label: "Quartic and sextic scalar pair",
    hint: "In any dimension d: where each coupling turns marginal, and which graphs diverge.",
  },
  "contact-gauge": {
    label: "Contact theory of fermions with a gauge field",
    hint: "In four dimensions: four fermions at a point, a photon, and the order to stop at.",
  },
  nucleons: {
    label: "Static nucleons with pions",
    hint: "Momenta and pion masses count alike: which graphs make the potential, and where three nucleons come in.",
  },
  "bound-state": {
    label: "Bound state in powers of velocity",
    hint: "A slow heavy particle in the field that binds it: relativity and spin against kinetic energy.",
  },
  "large-scattering-length": {
    label: "Contact theory with a large scattering length",
    hint: "Why counting by dimension fails there, and what is summed to all orders instead.",
  },
  gravity: {
    label: "Gravity at low energy",
    hint: "Loops against the curvature squared, in powers of energy over the Planck mass.",
  },
  "standard-model-count": {
    label: "Operators of the Standard Model",
    hint: "How many independent operators there are at dimensions 5 to 8, for any number of generations.",
  },
  lifshitz: {
    label: "Lifshitz scalar, z = 2",
    hint: "Space and time scale differently: interactions up to the tenth power of the field are allowed.",
  },
};
