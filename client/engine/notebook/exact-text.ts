/** Canonical exact numbers as people read them: "3/2*d - 3" becomes "3d/2 − 3", a positive term leads. */
import type { Markup } from "../notation/float-text.ts";

interface Piece {
  readonly isNegative: boolean;
  readonly coefficient: string;
  readonly symbol: string;
}

/** Splits canonical text at its signs; null when it is not of the form that `LinearForm.toString` prints. */
function piecesOf(text: string): Piece[] | null {
  const parts = text
    .replace(/^-/, "- ")
    .replace(/^(?=[^-])/, "+ ")
    .split(/\s*([+-]) /)
    .slice(1);
  const pieces: Piece[] = [];
  for (let index = 0; index < parts.length; index += 2) {
    const term = /^(?:(?<coefficient>\d+(?:\/\d+)?)(?:\*(?<symbol>[A-Za-z]))?|(?<alone>[A-Za-z]))$/.exec(
      parts[index + 1] ?? "",
    );
    if (!term?.groups) return null;
    const { coefficient = "1", symbol, alone } = term.groups;
    pieces.push({ isNegative: parts[index] === "-", coefficient, symbol: symbol ?? alone ?? "" });
  }
  return pieces;
}

/** @example exactText("-2*d + 6", "unicode") // "6 − 2d" */
export function exactText(text: string, markup: Markup): string {
  const pieces = piecesOf(text);
  if (!pieces) return text;
  const leading = pieces.findIndex(({ isNegative }) => !isNegative);
  const ordered =
    leading > 0
      ? [...pieces.slice(leading, leading + 1), ...pieces.filter((_, index) => index !== leading)]
      : pieces;
  const minus = markup === "latex" ? "-" : "−";
  return ordered
    .map((piece, index) => {
      const sign = piece.isNegative ? minus : "+";
      const before = index === 0 ? (piece.isNegative ? minus : "") : ` ${sign} `;
      return before + bodyOf(piece, markup);
    })
    .join("");
}

function bodyOf({ coefficient, symbol }: Piece, markup: Markup): string {
  const [over = "1", under] = coefficient.split("/");
  const top = symbol !== "" && over === "1" ? symbol : over + symbol;
  if (under === undefined) return top;
  return markup === "latex" ? `\\frac{${top}}{${under}}` : `${top}/${under}`;
}
