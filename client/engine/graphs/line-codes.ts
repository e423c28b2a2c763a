/** Small whole numbers for multisets of small whole numbers: what joins two vertices becomes a number to compare. */

export interface LineCodes {
  /** The code of a multiset with one more item; the empty multiset is 0. */
  add(code: number, item: number): number;
  /** The items of a multiset, ascending. */
  itemsOf(code: number): readonly number[];
}

export function makeLineCodes(): LineCodes {
  const sets: (readonly number[])[] = [[]];
  const known = new Map<string, number>([["", 0]]);
  const grown: Map<number, number>[] = [new Map<number, number>()];
  return {
    add(code, item) {
      const before = grown[code]?.get(item);
      if (before !== undefined) return before;
      const items = [...(sets[code] ?? []), item].sort((a, b) => a - b);
      const key = items.join(",");
      let found = known.get(key);
      if (found === undefined) {
        found = sets.length;
        sets.push(items);
        grown.push(new Map());
        known.set(key, found);
      }
      grown[code]?.set(item, found);
      return found;
    },
    itemsOf: (code) => sets[code] ?? [],
  };
}

/** How often each item occurs. */
export function tally(items: readonly number[]): Map<number, number> {
  const counts = new Map<number, number>();
  for (const item of items) counts.set(item, (counts.get(item) ?? 0) + 1);
  return counts;
}
