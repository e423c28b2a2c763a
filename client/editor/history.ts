/**
 * One history per person and notebook, for prose and for the fields of blocks alike.
 *
 * Y.UndoManager.undo() goes on to older steps when the newest has no effect any more, because a colleague overwrote
 * it. That would undo something the person did not mean. Here the older steps are kept aside during the call: the
 * newest either has an effect or is discarded, and the person is told.
 */
import { defaultDeleteFilter, defaultProtectedNodes, ySyncPluginKey } from "@tiptap/y-tiptap";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";
import { isKindName } from "./blocks/block-elements.ts";

/** Origin of a transaction that writes a block's field or rows: it becomes a step of its own in the history. */
export const FIELD_ORIGIN = Object.freeze({ origin: "field" });
/** Origin of what nobody did by hand (seeding, repairs): never a step. */
export const UNDOABLE_BY_NOBODY = Object.freeze({ origin: "seed" });

export type HistoryOutcome =
  | "done"
  /** There is no step left. */
  | "nothing"
  /** A colleague has overwritten the newest step: it is gone from the history, nothing else was touched. */
  | "overwritten";

export interface HistoryState {
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  /** Words for the last outcome that needs any; counted, so that the same words are said again. */
  readonly message: { readonly text: string; readonly count: number } | null;
}

export interface NotebookHistory {
  readonly manager: Y.UndoManager;
  undoOnce(): HistoryOutcome;
  redoOnce(): HistoryOutcome;
  /** What follows is a new step, even if it comes at once. */
  startNewStep(): void;
  subscribe(listener: () => void): () => void;
  state(): HistoryState;
  destroy(): void;
}

const overwrittenWords = {
  undo: "A colleague has changed this since, so your last change was not undone. It has left your history; earlier ones are untouched.",
  redo: "A colleague has changed this since, so your change was not made again. It has left your history.",
} as const;

const keptWords =
  "A colleague has written in what you had placed, so it stays. Delete it by hand if you both mean to.";

export function createHistory(doc: Y.Doc): NotebookHistory {
  const fragment = doc.getXmlFragment(FRAGMENT);
  let hasKept = false;
  const manager = new Y.UndoManager(fragment, {
    trackedOrigins: new Set<unknown>([ySyncPluginKey, FIELD_ORIGIN]),
    // A paragraph, block or row that a colleague has meanwhile written in stays.
    deleteFilter(item) {
      if (!defaultDeleteFilter(item, defaultProtectedNodes)) return false;
      if (!holdsWorkOfOthers(item, doc.clientID)) return true;
      hasKept = true;
      return false;
    },
    captureTransaction: (transaction) => transaction.meta.get("addToHistory") !== false,
  });
  // An editor's plugin destroys the manager when its view goes, also one that was never shown (React builds some twice).
  // The history outlives any one view: only the notebook's session ends it.
  const destroyManager = manager.destroy;
  manager.destroy = () => undefined;
  const listeners = new Set<() => void>();
  let current: HistoryState = { canUndo: false, canRedo: false, message: null };
  let lastOrigin: unknown = null;

  // What a reader could see: the whole document with its attributes, as XML.
  const shown = () => fragment.toJSON();

  function publish(text: string | null) {
    const message = text === null ? null : { text, count: (current.message?.count ?? 0) + 1 };
    current = { canUndo: manager.canUndo(), canRedo: manager.canRedo(), message };
    for (const listener of listeners) listener();
  }

  // Typing is gathered into steps by time; a field's write is a step of its own on both sides.
  function separateFieldWrites(transaction: Y.Transaction) {
    // Yjs types an origin as any: it is whatever the writer passed.
    const origin: unknown = transaction.origin;
    if (origin !== FIELD_ORIGIN && origin !== ySyncPluginKey) return;
    if (origin === FIELD_ORIGIN || lastOrigin === FIELD_ORIGIN) manager.stopCapturing();
    lastOrigin = origin;
  }

  function step(direction: "undo" | "redo"): HistoryOutcome {
    const stackName = direction === "undo" ? "undoStack" : "redoStack";
    const newest = manager[stackName].at(-1);
    if (!newest) return "nothing";
    const older = manager[stackName].slice(0, -1);
    const before = shown();
    hasKept = false;
    manager[stackName] = [newest];
    let applied: boolean;
    try {
      applied = manager[direction]() !== null;
    } finally {
      manager[stackName] = older;
    }
    // Removing the empty husk of a text that a colleague has deleted counts for Yjs, yet nobody can see it.
    const effective = applied && shown() !== before;
    if (applied && !effective) manager[direction === "undo" ? "redoStack" : "undoStack"].pop();
    manager.stopCapturing();
    // The deletion filter, called by the manager, has set it meanwhile.
    const kept = hasKept as boolean;
    publish(kept ? keptWords : effective ? null : overwrittenWords[direction]);
    return effective ? "done" : "overwritten";
  }

  const republish = () => {
    publish(null);
  };
  manager.on("stack-item-added", republish);
  manager.on("stack-cleared", republish);
  doc.on("beforeTransaction", separateFieldWrites);

  return {
    manager,
    undoOnce: () => step("undo"),
    redoOnce: () => step("redo"),
    startNewStep: () => {
      manager.stopCapturing();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    state: () => current,
    destroy() {
      doc.off("beforeTransaction", separateFieldWrites);
      destroyManager();
      listeners.clear();
    },
  };
}

/** Whether an item is a block, a row or a value in which something was written by anyone but this client. */
function holdsWorkOfOthers(item: Y.Item, own: number): boolean {
  const element = elementIn(item);
  if (!element) return false;
  const { nodeName } = element;
  const isInput = isKindName(nodeName) || nodeName === rowNode || nodeName === cellNode;
  return isInput && isWrittenByOthers(element, own);
}

function isWrittenByOthers(element: Y.XmlElement, own: number): boolean {
  const items = [...element._map.values()];
  for (let item = element._start; item !== null; item = item.right) items.push(item);
  return items.some((item) => {
    if (item.deleted) return false;
    const below = elementIn(item);
    return item.id.client !== own || (below !== null && isWrittenByOthers(below, own));
  });
}

function elementIn({ content }: Y.Item): Y.XmlElement | null {
  if (!(content instanceof Y.ContentType)) return null;
  const { type } = content;
  return type instanceof Y.XmlElement ? (type as Y.XmlElement) : null; // Yjs types its attributes as any
}
