/** Ids for copies: nothing in a document is lost because two things carry one name. */

/** The id itself when it is free, else "id~2", "id~3", …; takes it. */
export function freeId(wanted: string, nameless: string, taken: Set<string>): string {
  const base = wanted === "" ? nameless : wanted;
  let id = wanted === "" ? `${nameless}~1` : wanted;
  for (let copy = 2; taken.has(id); copy += 1) id = `${base}~${copy}`;
  taken.add(id);
  return id;
}
