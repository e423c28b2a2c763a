/** One colour per person, the same in every editor unless two people's would fall together. */

const colors = 8;
const given = new Map<string, number>();

/** A token of app/tokens.css, safe in both themes. What a stranger's presence says about colour is not asked. */
export function personColor(personId: string): string {
  let slot = given.get(personId);
  if (slot === undefined) {
    const taken = new Set(given.values());
    slot = spread(personId);
    // Beyond eight people some share a colour; their names still tell them apart.
    for (let tries = 0; tries < colors && taken.has(slot); tries += 1) slot = (slot + 1) % colors;
    given.set(personId, slot);
  }
  return `var(--person-${String(slot + 1)})`;
}

/** FNV-1a (Fowler, Noll and Vo, 1991), from memory; any even spread will do. */
function spread(text: string): number {
  let hash = 0x811c9dc5;
  for (const letter of text) hash = Math.imul(hash ^ (letter.codePointAt(0) ?? 0), 0x01000193);
  return (hash >>> 0) % colors;
}

/** Two letters for the header: "Wren Vale" gives "WV", "Otto" gives "Ot". */
export function initials(name: string): string {
  const words = name.trim().split(/\s+/);
  const [first = "", last = ""] = [words[0], words.length > 1 ? words.at(-1) : ""];
  const letters = last === "" ? [...first].slice(0, 2) : [[...first][0] ?? "", [...last][0] ?? ""];
  return letters.join("");
}
