import { nameLatex } from "./names.ts";
import { tokenise } from "./tokens.ts";

/**
 * LaTeX of a canonical symbol.
 * @example symbolLatex("Lambda_b") // "\\Lambda_b"
 */
export function symbolLatex(symbol: string): string {
  const tokens = tokenise(symbol, { measuredLiterals: false });
  const [first] = tokens.ok ? tokens.value : [];
  return first?.type === "name" ? nameLatex(first.name) : symbol;
}
