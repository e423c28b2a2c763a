/** The symbols a notebook's premises declare, offered when completing: what one writes about most. */
import type { Node } from "@tiptap/pm/model";
import { unicodeName } from "#engine/notation/letters.ts";
import { nameLatex } from "#engine/notation/names.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";
import type { LatexSymbol } from "./latex-symbols.ts";

export const PREMISES_GROUP = "From the premises";

export function premisesSymbols(doc: Node): readonly LatexSymbol[] {
  const found = new Map<string, LatexSymbol>();
  doc.descendants((block) => {
    if (block.type.name !== "premises") return !block.isTextblock;
    block.forEach((row) => {
      const table: unknown = row.attrs["table"];
      if (row.type.name !== rowNode || (table !== "fields" && table !== "scales")) return;
      row.forEach((cell) => {
        if (cell.type.name !== cellNode || cell.attrs["field"] !== "symbol") return;
        const symbol = symbolFor(String(cell.attrs["value"]));
        if (symbol) found.set(symbol.insert, symbol);
      });
    });
    return false;
  });
  return [...found.values()];
}

/** "Lambda_b", "\Lambda_b" and "Λ_b" are one symbol; what is not a letter with a subscript is left out. */
function symbolFor(typed: string): LatexSymbol | null {
  const text = Array.from(typed.trim(), (letter) => unicodeName(letter) ?? letter).join("");
  const parts = /^\\?([A-Za-z]+)(?:_\{?([A-Za-z0-9]+)\}?)?$/.exec(text);
  if (!parts) return null;
  const [, base = "", subscript] = parts;
  const insert = nameLatex({ base, subscript: subscript === undefined ? [] : [subscript], primes: 0 });
  const name = subscript === undefined ? base : `${base}${subscript}`;
  return { name, group: PREMISES_GROUP, insert, example: insert };
}
