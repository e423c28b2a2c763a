/** One colour per person, the same in every editor unless two people's would fall together. */

/** Tokens of app/tokens.css, those that are told apart most easily first. */
const order = [1, 2, 3, 4, 5, 7, 6, 8] as const;
const easilyToldApart = 5;
const given = new Map<string, number>();

/** A colour that is safe in both themes. What a stranger's presence says about colour is not asked. */
export function personColor(personId: string): string {
  let slot = given.get(personId);
  if (slot === undefined) {
    const taken = new Set(given.values());
    const own = spread(personId) % easilyToldApart;
    const turns = order.map((_, turn) => (turn < easilyToldApart ? (own + turn) % easilyToldApart : turn));
    // Beyond eight people some share a colour; their names still tell them apart.
    slot = turns.find((candidate) => !taken.has(candidate)) ?? own;
    given.set(personId, slot);
  }
  return `var(--person-${String(order[slot] ?? 1)})`;
}

/** FNV-1a (Fowler, Noll and Vo, 1991), from memory; any even spread will do. */
function spread(text: string): number {
  let hash = 0x811c9dc5;
  for (const letter of text) hash = Math.imul(hash ^ (letter.codePointAt(0) ?? 0), 0x01000193);
  return hash >>> 0;
}

/** Two letters for the header: "Wren Vale" gives "WV", "Otto" gives "Ot". */
export function initials(name: string): string {
  const words = name.trim().split(/\s+/);
  const [first = ""] = words;
  const last = words.length > 1 ? (words.at(-1) ?? "") : "";
  return last === "" ? letters(first, 2) : letters(first, 1) + letters(last, 1);
}

/** The first letters as a reader counts them, accents included. */
function letters(word: string, count: number): string {
  const parts = new Intl.Segmenter(undefined, { granularity: "grapheme" }).segment(word);
  return Array.from(parts, ({ segment }) => segment)
    .slice(0, count)
    .join("");
}
