/** Vocabulary of the notation tests: a theory's symbols, and terms as one line of text. */
import type { Monomial } from "#engine/notation/monomial.ts";
import { readTerm } from "#engine/notation/read-term.ts";
import type { DeclaredField, Vocabulary } from "#engine/notation/vocabulary.ts";

const real: DeclaredField = { selfConjugate: true, inError: false, strength: false };
const complex: DeclaredField = { ...real, selfConjugate: false };

/** Real φ, χ, σ_1 and A; complex Φ, ψ, h_v and n; a field strength F; a field in error ω; scales Λ, m and p. */
export const vocabulary: Vocabulary = {
  geometry: "isotropic",
  fields: new Map([
    ["phi", real],
    ["chi", real],
    ["sigma_1", real],
    ["A", real],
    ["Phi", complex],
    ["psi", complex],
    ["h_v", complex],
    ["n", complex],
    ["F", { ...real, strength: true }],
    ["omega", { ...real, inError: true }],
  ]),
  scales: new Set(["Lambda", "m", "p"]),
};
export const anisotropic: Vocabulary = { ...vocabulary, geometry: "anisotropic" };

/** "1/2 | g | phi2 chi | 0": number, coefficients, legs (conjugates starred), derivatives (and time derivatives). */
export function summary({ prefactor, coefficients, fields, derivatives, timeDerivatives }: Monomial): string {
  const powers = coefficients.map(({ symbol, power }) =>
    power.toString() === "1" ? symbol : `${symbol}^${power.toString()}`,
  );
  const legs = fields.map(
    ({ symbol, conjugated, count }) => `${symbol}${conjugated ? "*" : ""}${count === 1 ? "" : `^${count}`}`,
  );
  const signs = timeDerivatives > 0 ? `${derivatives}, ${timeDerivatives} in time` : String(derivatives);
  return [prefactor.toString(), powers.join(" "), legs.join(" "), signs].join(" | ");
}
/** The summary, or the code of the failure and the offset of its place. */
export function readAs(text: string, symbols: Vocabulary = vocabulary): string {
  const reading = readTerm(text, symbols);
  if (reading.ok) return summary(reading.value.monomial);
  const { code, facts } = reading.failure;
  const suggestion = facts["suggestion"] === undefined ? "" : ` (${facts["suggestion"]}?)`;
  return `${code} at ${facts["offset"]}${facts["symbol"] === undefined ? "" : `: ${facts["symbol"]}`}${suggestion}`;
}
