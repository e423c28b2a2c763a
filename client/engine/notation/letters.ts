/**
 * The letters of typed notation. Greek by name (`lambda`), by backslash (`\lambda`) or by Unicode (`λ`) is one
 * symbol; upper and lower case are two. `\varphi` is another symbol than `\phi`, but φ and ϕ are both read as phi:
 * keyboards offer only one of them, and which glyph it shows is up to the font. The same holds for ε and ϵ.
 */

const lower = [
  ..."alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi".split(" "),
  ..."rho sigma tau upsilon phi chi psi omega".split(" "),
  ..."varepsilon vartheta varrho varsigma varphi varpi varkappa".split(" "),
  "pi",
];
const upper = "Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega".split(" ");
/** Other single-letter symbols that LaTeX has a command for. */
const others = ["ell", "imath", "jmath", "perp", "parallel"];

const lowerGreek = new Set(lower);
const commanded = new Set([...lower, ...upper, ...others]);

/** Whether LaTeX writes this name with a backslash: "lambda", "Lambda", "ell". */
export function hasCommand(name: string): boolean {
  return commanded.has(name);
}
export function isLowerGreek(name: string): boolean {
  return lowerGreek.has(name);
}

const unicodeTable =
  "α alpha β beta γ gamma δ delta ε epsilon ϵ epsilon ζ zeta η eta θ theta ϑ vartheta ι iota κ kappa ϰ varkappa " +
  "λ lambda μ mu µ mu ν nu ξ xi π pi ϖ varpi ρ rho ϱ varrho σ sigma ς varsigma τ tau υ upsilon φ phi ϕ phi χ chi " +
  "ψ psi ω omega Γ Gamma Δ Delta Θ Theta Λ Lambda Ξ Xi Π Pi Σ Sigma Υ Upsilon Φ Phi Ψ Psi Ω Omega ℓ ell " +
  "∂ partial ∇ nabla □ Box";
const unicodeNames: ReadonlyMap<string, string> = new Map(
  [...unicodeTable.matchAll(/(\S+) (\S+)/g)].map(([, letter = "", name = ""]) => [letter, name]),
);
/** The name of a Unicode letter or operator sign, "φ" → "phi", or null. */
export function unicodeName(character: string): string | null {
  return unicodeNames.get(character) ?? null;
}

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";
const subscripts = "₀₁₂₃₄₅₆₇₈₉";
/** "²" → "2", "⁻" → "-", or null. */
export function superscriptDigit(character: string): string | null {
  if (character === "⁻") return "-";
  const digit = character === "" ? -1 : superscripts.indexOf(character);
  return digit < 0 ? null : String(digit);
}
/** "₆" → "6", or null. */
export function subscriptDigit(character: string): string | null {
  const digit = character === "" ? -1 : subscripts.indexOf(character);
  return digit < 0 ? null : String(digit);
}
