/** Brings the place where a colleague is at work into view: their caret in the prose, or the entry they are in. */
import {
  relativePositionToAbsolutePosition,
  ySyncPluginKey,
  type ProsemirrorBinding,
} from "@tiptap/y-tiptap";
import * as Y from "yjs";
import { goToBlock } from "../blocks/block-places.ts";
import { placeOf } from "../blocks/field-presence.ts";
import { hasReadableCursor } from "../collaboration.ts";
import type { NotebookTools } from "../notebook-tools.ts";
import { userOf } from "../presence.ts";

/** False when they have no place in the notebook now. */
export function goToColleague({ editor, world }: NotebookTools, personId: string): boolean {
  const { awareness, ydoc, fragment } = world.session;
  for (const [clientId, state] of awareness.getStates()) {
    if (clientId === awareness.clientID || userOf(state)?.id !== personId) continue;
    const entry = placeOf(state);
    if (entry && goToBlock(editor, entry.blockId)) return true;
    const head = hasReadableCursor(state) ? headOf(state) : null;
    const sync = ySyncPluginKey.getState(editor.state) as { binding: ProsemirrorBinding } | undefined; // documented by the package, untyped
    if (head === null || !sync) continue;
    const position = relativePositionToAbsolutePosition(
      ydoc,
      fragment,
      Y.createRelativePositionFromJSON(head),
      sync.binding.mapping,
    );
    if (position === null) continue;
    const { node } = editor.view.domAtPos(Math.min(position, editor.state.doc.content.size));
    const element = node instanceof HTMLElement ? node : node.parentElement;
    element?.scrollIntoView({ block: "center" });
    return true;
  }
  return false;
}

/** Shape checked by `hasReadableCursor`. */
function headOf(state: Readonly<Record<string, unknown>>): unknown {
  const cursor = state["cursor"] as { readonly head: unknown } | null | undefined;
  return cursor?.head ?? null;
}
