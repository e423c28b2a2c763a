/** Completing a command in a formula's source. */
import type { LatexSymbol } from "./latex-symbols.ts";

/** The command being typed before the caret: "\al|" gives where it begins and "al"; null elsewhere. */
export function commandAt(
  source: string,
  caret: number,
): { readonly from: number; readonly typed: string } | null {
  const found = /(^|[^\\])((?:\\\\)*)\\([A-Za-z]*)$/.exec(source.slice(0, caret));
  if (!found) return null;
  const typed = found[3] ?? "";
  return { from: caret - typed.length - 1, typed };
}

/** The source with the symbol in place of what was typed, and where the caret goes. */
export function complete(
  source: string,
  caret: number,
  symbol: LatexSymbol,
): { readonly source: string; readonly caret: number } {
  const command = commandAt(source, caret);
  const from = command?.from ?? caret;
  const place = symbol.insert.indexOf("▯");
  const text = symbol.insert.replace("▯", "");
  const rest = source.slice(caret);
  // "\alpha" before a letter would read as another command.
  const gap = place === -1 && /[A-Za-z]$/.test(text) && /^[A-Za-z]/.test(rest) ? " " : "";
  return {
    source: source.slice(0, from) + text + gap + rest,
    caret: from + (place === -1 ? text.length + gap.length : place),
  };
}
