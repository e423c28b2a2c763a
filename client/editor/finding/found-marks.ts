/** Marks on the page what was found, and which of it one is at. */
import type { Node } from "@tiptap/pm/model";
import { Plugin, PluginKey } from "@tiptap/pm/state";
import { Decoration, DecorationSet } from "@tiptap/pm/view";
import type { Match } from "./matches.ts";

export interface FoundState {
  readonly matches: readonly Match[];
  readonly current: number;
}
const nothing: FoundState = { matches: [], current: -1 };

export const foundKey = new PluginKey<FoundState>("found");

/** `refind` is asked after every change of the document; a transaction may set the state by `foundKey`. */
export function foundMarks(refind: (doc: Node) => readonly Match[]): Plugin<FoundState> {
  return new Plugin<FoundState>({
    key: foundKey,
    state: {
      init: () => nothing,
      apply(transaction, before) {
        const set = transaction.getMeta(foundKey) as FoundState | undefined; // only this plugin's users set it
        if (set) return set;
        if (!transaction.docChanged || before.matches.length === 0) return before;
        const matches = refind(transaction.doc);
        return { matches, current: Math.min(before.current, matches.length - 1) };
      },
    },
    props: {
      decorations(state) {
        const { matches, current } = foundKey.getState(state) ?? nothing;
        return DecorationSet.create(
          state.doc,
          matches.flatMap((match, index) => {
            const attributes = { class: index === current ? "found is-current" : "found" };
            if (match.in === "text") return [Decoration.inline(match.from, match.to, attributes)];
            // A block is far more than the entry that was found in it; the entry itself is marked by who goes there.
            return match.in === "atom" ? [Decoration.node(match.from, match.to, attributes)] : [];
          }),
        );
      },
    },
  });
}
