/** Subscripts: `_6`, `_Pl`, `_{6,1}`, `_\chi`, `_{\mathrm{Pl}}`, `_{\mu\nu}`. */
import type { FirstFailure } from "./failure.ts";
import { hasCommand, unicodeName } from "./letters.ts";

export interface Subscript {
  readonly pieces: readonly string[];
  /** Offset of what follows. */
  readonly to: number;
}

const styles = /^\\(?:mathrm|rm|text|textrm|mathit|mathbf|mathcal|mathsf)\b/;

/** Reads what follows an underscore; notes `bad-subscript` and returns no pieces when there is nothing readable. */
export function readSubscript(text: string, start: number, trouble: FirstFailure): Subscript {
  let at = start + (/^\s*/.exec(text.slice(start))?.[0].length ?? 0);
  if (text.charAt(at) === "{") return readBraces(text, at, trouble);
  const style = styles.exec(text.slice(at));
  if (style) {
    at += style[0].length;
    return readBraces(text, at + (/^\s*/.exec(text.slice(at))?.[0].length ?? 0), trouble);
  }
  const piece = readPiece(text, at);
  if (!piece) {
    trouble.note("bad-subscript", { text: text.charAt(at), offset: at });
    return { pieces: [], to: text.length };
  }
  return { pieces: [piece.piece], to: piece.to };
}

function readPiece(text: string, at: number): { readonly piece: string; readonly to: number } | null {
  const rest = text.slice(at);
  const plain = /^(?:\d+|[A-Za-z][A-Za-z0-9]*)/.exec(rest)?.[0];
  if (plain !== undefined) return { piece: plain, to: at + plain.length };
  const command = /^\\([A-Za-z]+)/.exec(rest);
  const name = command?.[1] ?? "";
  if (command && (hasCommand(name) || name === "Box")) return { piece: name, to: at + command[0].length };
  const letter = unicodeName(rest.charAt(0));
  return letter === null ? null : { piece: letter, to: at + 1 };
}

/** Braces may nest only through styles, \mathrm{…}; a comma is a piece of its own. */
function readBraces(text: string, open: number, trouble: FirstFailure): Subscript {
  const pieces: string[] = [];
  let at = open;
  let depth = 0;
  while (at < text.length) {
    const character = text.charAt(at);
    const style = styles.exec(text.slice(at));
    const piece = readPiece(text, at);
    if (character === "{") depth += 1;
    if (character === "}") depth -= 1;
    if (character === "}" && depth === 0 && pieces.length > 0) return { pieces, to: at + 1 };
    if (depth === 0) break;
    if (style) at += style[0].length;
    else if (piece) {
      pieces.push(piece.piece);
      at = piece.to;
    } else if (character === "," || character === "+" || character === "-") {
      pieces.push(character);
      at += 1;
    } else if (/^[{}\s]$/.test(character)) at += 1;
    else break;
  }
  trouble.note("bad-subscript", { text: text.charAt(at), offset: Math.min(at, text.length) });
  return { pieces: [], to: text.length };
}
