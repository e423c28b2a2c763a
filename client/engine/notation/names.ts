/** Names of symbols: a base, a subscript and primes. One canonical text and one LaTeX spelling for each. */
import { hasCommand } from "./letters.ts";

export interface Name {
  /** "Lambda", "c", "psibar", "partial". */
  readonly base: string;
  /** Pieces of the subscript: ["6"], ["Pl"], ["mu", "nu"], ["6", ",", "1"]. */
  readonly subscript: readonly string[];
  readonly primes: number;
}

/**
 * Canonical text: the same for every spelling of one symbol, and different for different symbols.
 * @example canonicalName({ base: "M", subscript: ["Pl"], primes: 0 }) // "M_Pl"
 * @example canonicalName({ base: "F", subscript: ["mu", "nu"], primes: 0 }) // "F_{mu nu}"
 */
export function canonicalName(name: Name): string {
  const { subscript } = name;
  const joined =
    subscript.length <= 1 ? subscript.join("") : `{${subscript.join(" ").replaceAll(" , ", ",")}}`;
  return name.base + (joined === "" ? "" : `_${joined}`) + "'".repeat(name.primes);
}

function letterLatex(text: string): string {
  const accented = /^(.+)(bar|tilde|hat)$/.exec(text);
  const stem = accented?.[1] ?? "";
  if (accented && (stem.length === 1 || hasCommand(stem)))
    return `\\${accented[2] ?? ""}{${letterLatex(stem)}}`;
  if (hasCommand(text)) return `\\${text}`;
  if (text === "Box") return "\\Box";
  return /^[A-Za-z]{2,}\d*$/.test(text) ? `\\mathrm{${text}}` : text;
}

/** LaTeX of a subscript's pieces with its underscore, or "". */
export function subscriptLatex(pieces: readonly string[]): string {
  if (pieces.length === 0) return "";
  const spelled = pieces.map(letterLatex);
  const body = spelled.reduce(
    (text, piece) => text + (/\\[A-Za-z]+$/.test(text) && /^[A-Za-z]/.test(piece) ? " " : "") + piece,
    "",
  );
  return body.length === 1 ? `_${body}` : `_{${body}}`;
}

/**
 * LaTeX of a name.
 * @example nameLatex({ base: "Lambda", subscript: ["b"], primes: 0 }) // "\\Lambda_b"
 */
export function nameLatex(name: Name): string {
  return letterLatex(name.base) + subscriptLatex(name.subscript) + "'".repeat(name.primes);
}

/** Edits (insert, delete, replace, swap neighbours) that lead from one text to another. */
function editDistance(a: string, b: string): number {
  const rows: number[][] = [Array.from({ length: b.length + 1 }, (_, j) => j)];
  const at = (i: number, j: number): number => rows[i]?.[j] ?? Infinity;
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    rows.push(row);
    for (let j = 1; j <= b.length; j++) {
      const differs = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min(at(i - 1, j) + 1, at(i, j - 1) + 1, at(i - 1, j - 1) + differs);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        best = Math.min(best, at(i - 2, j - 2) + 1);
      row.push(best);
    }
  }
  return at(a.length, b.length);
}

/** How far a slip leads from one symbol to the other; infinite when they are not alike. */
function slip(typed: string, symbol: string): number {
  if (symbol.toLowerCase() === typed.toLowerCase()) return 0.5;
  // "phi2" for phi², "psi_L" where only psi is declared.
  if (typed.startsWith(`${symbol}_`)) return 0.7;
  const shorter = Math.min(typed.length, symbol.length);
  if (Math.abs(typed.length - symbol.length) > 2) return Infinity;
  const distance = editDistance(typed, symbol);
  return (distance === 1 && shorter > 1) || (distance === 2 && shorter > 4) ? distance : Infinity;
}

/**
 * The declared symbol most like what was typed, or null when none is near. Upper for lower case is the nearest slip.
 * @example nearestSymbol("chy", ["phi", "chi"]) // "chi"
 */
export function nearestSymbol(typed: string, declared: readonly string[]): string | null {
  const short = typed.slice(0, 40);
  let best: { readonly symbol: string; readonly distance: number } | null = null;
  // A theory of thousands of symbols gets suggestions from the first few hundred: a slip must not cost seconds.
  for (const symbol of declared.slice(0, 300)) {
    const distance = slip(short, symbol.slice(0, 40));
    if (distance < (best?.distance ?? Infinity)) best = { symbol, distance };
  }
  return best?.symbol ?? null;
}
