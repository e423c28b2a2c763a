/** What a name in a term means, given what the theory declares. */
import { isLowerGreek } from "./letters.ts";
import { canonicalName, nearestSymbol, type Name } from "./names.ts";

export interface DeclaredField {
  readonly selfConjugate: boolean;
  /** Its row cannot be counted with. */
  readonly inError: boolean;
  /** A field strength, whose dual \tilde F is the same to counting. */
  readonly strength: boolean;
}

/** What reading a term needs to know of the theory. */
export interface Vocabulary {
  readonly geometry: "isotropic" | "anisotropic";
  /** By canonical symbol. A field whose row is in error is known by name, so that terms can say so. */
  readonly fields: ReadonlyMap<string, DeclaredField>;
  /** Canonical symbols of the declared scales. */
  readonly scales: ReadonlySet<string>;
}

export type Direction = "time" | "space" | "spacetime" | "unsaid";

interface FieldMeaning {
  readonly means: "field";
  readonly symbol: string;
  readonly conjugated: boolean;
  readonly derivatives: number;
}
export type Meaning =
  | FieldMeaning
  | { readonly means: "derivative"; readonly count: number; readonly direction: Direction }
  | { readonly means: "coefficient"; readonly symbol: string; readonly declared: boolean }
  /** i: a phase, which counting does not see. */
  | { readonly means: "imaginary unit" }
  /** Matrices, invariant tensors, traces: dimensionless, dropped. */
  | { readonly means: "structure" }
  | { readonly means: "bad index"; readonly text: string };

const firstDerivatives = new Set([
  "partial",
  "d",
  "D",
  "nabla",
  "grad",
  "del",
  "dslash",
  "Dslash",
  "partialslash",
]);
const boxes = new Set(["Box", "box"]);
const gradients = new Set(["nabla", "grad", "del"]);
/** Dimensionless only when they carry an index, for otherwise they may be somebody's field. */
const tensors = new Set([
  ..."gamma Gamma sigma tau epsilon varepsilon eta delta T t f g lambda P".split(" "),
]);
const traces = new Set(["Tr", "tr", "Str"]);
/** d's that may be written on to a field: "dddphi". Longer runs are names. */
const MOST_WRITTEN_DERIVATIVES = 8;
/** Directions: D_\perp. */
const transverse = new Set(["perp", "parallel"]);
const latinIndices = /^[abcijklmnrs]$/;

/** Names that no field and no scale may take, because a term reads them otherwise. */
export const reservedSymbols: ReadonlySet<string> = new Set([
  ...["i", "e", "pi", "sqrt", "max", "min"],
  ...firstDerivatives,
  ...boxes,
  ...traces,
]);

/** As a subscript; a superscript n is a power that nobody gave a number, so fewer letters are indices there. */
export function isIndex(piece: string): boolean {
  return isLowerGreek(piece) || latinIndices.test(piece);
}

/** W^I, f^{abe}, G^{A\nu}: among several any letter but n is an index, as nobody raises to a product of letters. */
export function areRaisedIndices(pieces: readonly string[]): boolean {
  const letter = pieces.length > 1 ? /^[A-Za-mo-z]$/ : /^[abcijklABCIJK]$/;
  return pieces.length > 0 && pieces.every((piece) => isLowerGreek(piece) || letter.test(piece));
}

/** The meaning of a name; `raised` are the indices of its superscript. */
export function meaningOf(name: Name, raised: readonly string[], vocabulary: Vocabulary): Meaning {
  const symbol = canonicalName(name);
  const field = fieldMeaning(name, vocabulary);
  if (field) return field;
  if (vocabulary.scales.has(symbol)) return { means: "coefficient", symbol, declared: true };
  if (symbol === "pi") return { means: "coefficient", symbol, declared: true };
  if (symbol === "i") return { means: "imaginary unit" };
  if (traces.has(name.base)) return { means: "structure" };
  // The symmetric structure constants d^{abc}.
  if (name.base === "d" && raised.length === 3 && !raised.some(isLowerGreek)) return { means: "structure" };
  const derivative = derivativeMeaning(name, raised);
  if (derivative) return derivative;
  const matrix = /^(gamma_[05]|P_[LR])$/.test(symbol);
  const pointed = raised.length > 0 || isLorentz(name.subscript);
  if (matrix || (pointed && tensors.has(name.base.replace(/(bar|tilde)$/, ""))))
    return { means: "structure" };
  return { means: "coefficient", symbol, declared: false };
}

/** Greek indices in a subscript point in spacetime: sigma_{mu nu}, unlike the coupling g_i. */
function isLorentz(pieces: readonly string[]): boolean {
  return (
    pieces.length > 0 && pieces.every((piece) => /^(mu|nu|rho|sigma|alpha|beta|kappa|lambda)$/.test(piece))
  );
}

/** Declared fields, bare or differentiated as in dphi and ddchi. */
function fieldMeaning(name: Name, vocabulary: Vocabulary): Meaning | null {
  const bare = bareFieldMeaning(name, vocabulary);
  if (bare) return bare;
  const signs = /^(?:d+|D+)(?=.)/.exec(name.base)?.[0].length ?? 0;
  // The shortest run of d's that leaves a declared field: "ddelta" is d·delta where delta is one.
  for (let count = 1; count <= Math.min(signs, MOST_WRITTEN_DERIVATIVES); count++) {
    const inner = bareFieldMeaning({ ...name, base: name.base.slice(count) }, vocabulary);
    if (inner) return { ...inner, derivatives: count };
  }
  return null;
}

/** Declared fields as they stand, without indices, conjugated (psibar, phidag) or dual (Ftilde). */
function bareFieldMeaning(name: Name, vocabulary: Vocabulary): FieldMeaning | null {
  const plain: Name = name.subscript.every((piece) => isIndex(piece) || piece === ",")
    ? { ...name, subscript: [] }
    : name;
  for (const spelled of [name, plain]) {
    const found = vocabulary.fields.has(canonicalName(spelled));
    if (found) return { means: "field", symbol: canonicalName(spelled), conjugated: false, derivatives: 0 };
  }
  const conjugated = /^(.+?)(?:bar|dagger|dag)$/.exec(name.base)?.[1];
  const dual = /^(.+)tilde$/.exec(name.base)?.[1];
  for (const spelled of [name, plain]) {
    const stem = conjugated === undefined ? null : canonicalName({ ...spelled, base: conjugated });
    const known = stem === null ? undefined : vocabulary.fields.get(stem);
    if (stem !== null && known)
      return { means: "field", symbol: stem, conjugated: !known.selfConjugate, derivatives: 0 };
    const strength = dual === undefined ? null : canonicalName({ ...spelled, base: dual });
    if (strength !== null && vocabulary.fields.get(strength)?.strength)
      return { means: "field", symbol: strength, conjugated: false, derivatives: 0 };
  }
  return null;
}

function derivativeMeaning(name: Name, raised: readonly string[]): Meaning | null {
  if (boxes.has(name.base) && name.subscript.length === 0)
    return { means: "derivative", count: 2, direction: "spacetime" };
  if (!firstDerivatives.has(name.base)) return null;
  const pieces = [...name.subscript, ...raised].flatMap((piece) =>
    isLowerGreek(piece) || transverse.has(piece) || !/^[a-z]+$/.test(piece) ? [piece] : Array.from(piece),
  );
  const bad = pieces.find((piece) => !isIndex(piece) && !transverse.has(piece) && !/^[txyz\d]$/.test(piece));
  if (bad !== undefined) return { means: "bad index", text: bad };
  const timely = pieces.filter((piece) => piece === "t" || piece === "0").length;
  const count = Math.max(1, pieces.length);
  if (timely > 0 && timely === count) return { means: "derivative", count, direction: "time" };
  if (timely > 0) return { means: "bad index", text: pieces.join(" ") };
  const lorentz = name.base.endsWith("slash") || pieces.some((piece) => isLowerGreek(piece));
  if (lorentz) return { means: "derivative", count, direction: "spacetime" };
  return {
    means: "derivative",
    count,
    direction: gradients.has(name.base) || pieces.length > 0 ? "space" : "unsaid",
  };
}

/** The declared symbol nearest to an unknown one, for the wording of the problem. */
export function suggestionFor(symbol: string, vocabulary: Vocabulary): string | null {
  return nearestSymbol(symbol, [...vocabulary.fields.keys(), ...vocabulary.scales]);
}
