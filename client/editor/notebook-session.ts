/** One opened notebook: its shared document, who is here, its history, and the way to the server. */
import * as Y from "yjs";
import { Awareness } from "y-protocols/awareness";
import { FRAGMENT, type ServerNotice } from "#contract/collab.ts";
import { roleMay, type Role } from "#contract/roles.ts";
import { connectNotebook, type Connection } from "./connection.ts";
import { isFinal, type ConnectionPhase, type ConnectionState } from "./connection-words.ts";
import { createHistory, type NotebookHistory } from "./history.ts";
import { openLocalCopy } from "./local-copy.ts";
import type { PresenceUser } from "./presence.ts";
import { createSavedCount } from "./saved-count.ts";

export type Source =
  | { readonly mode: "member" }
  | { readonly mode: "referee"; readonly token: string }
  /** A document of one's own that is never sent. */
  | { readonly mode: "scratch"; readonly ydoc: Y.Doc };

export interface SessionOptions {
  readonly notebookId: string;
  readonly source: Source;
  /** The signed-in person; null for referees and scratch copies. */
  readonly person: PresenceUser | null;
  /** The person's role; null for referees and scratch copies. */
  readonly role: Role | null;
  readonly onNotice?: ((notice: ServerNotice) => void) | undefined;
  /** The local copy differs from what the server accepts: start afresh, and say why. */
  readonly onMustReload?: ((words: string) => void) | undefined;
  readonly socket?: typeof WebSocket;
}

export interface NotebookSession {
  readonly notebookId: string;
  readonly source: Source;
  readonly ydoc: Y.Doc;
  readonly fragment: Y.XmlFragment;
  readonly awareness: Awareness;
  readonly history: NotebookHistory;
  readonly person: PresenceUser | null;
  state(): ConnectionState;
  subscribe(listener: () => void): () => void;
  destroy(): void;
}

const rejectedWords = (reason: string) =>
  `The notebook did not accept your last change (${reason}). What you see has been loaded afresh.`;
const demotedWords =
  "You may only read this notebook now, so what was not yet saved could not be kept. What you see has been loaded afresh.";

export function openNotebookSession(options: SessionOptions): NotebookSession {
  const { notebookId, source, person, role } = options;
  const scratch = source.mode === "scratch";
  const ydoc = scratch ? source.ydoc : new Y.Doc();
  const awareness = new Awareness(ydoc);
  const history = createHistory(ydoc);
  const copy = source.mode === "member" && person ? openLocalCopy(person.id, notebookId, ydoc) : null;
  const saved = createSavedCount(copy?.unsavedBefore ?? false);
  const mayBePresent = person !== null && role !== null && roleMay(role, "presence.send");
  awareness.setLocalState(mayBePresent ? { user: person } : null);

  const listeners = new Set<() => void>();
  let destroyed = false;
  let current: ConnectionState = {
    phase: scratch ? "scratch" : "opening",
    unsaved: saved.unsaved(),
    readOnly: !scratch && !(role !== null && roleMay(role, "notebook.write")),
    loaded: scratch,
  };
  function change(next: Partial<ConnectionState>) {
    const merged = { ...current, ...next, unsaved: saved.unsaved() };
    const names = ["phase", "unsaved", "readOnly", "loaded"] as const;
    if (names.every((name) => merged[name] === current[name])) return;
    current = merged;
    for (const listener of listeners) listener();
  }

  let connection: Connection | null = null;
  const onUpdate = (_update: Uint8Array, origin: unknown) => {
    if (scratch || current.readOnly || connection?.isOrigin(origin) || copy?.isOrigin(origin)) return;
    saved.typed();
    copy?.markUnsaved();
    change({});
  };
  ydoc.on("update", onUpdate);

  function endAs(phase: ConnectionPhase) {
    // An expired session keeps typing that was not sent until the same person signs in again; nothing else stays.
    const keep =
      phase === "schema-too-old" || phase === "refused" || (phase === "signed-out" && saved.unsaved());
    if (!keep) void copy?.drop();
    change({ phase });
  }

  function startAfresh(words: string) {
    connection?.destroy();
    void (copy?.drop() ?? Promise.resolve()).then(() => {
      if (!destroyed) options.onMustReload?.(words);
    });
  }

  function heed(notice: ServerNotice) {
    switch (notice.about) {
      case "read-only":
        if (saved.unsaved()) startAfresh(demotedWords);
        awareness.setLocalState(null);
        change({ readOnly: true });
        break;
      case "writable":
        awareness.setLocalState(person ? { user: person } : null);
        change({ readOnly: false });
        break;
      case "rejected":
        startAfresh(rejectedWords(notice.reason));
        break;
      case "store-unreachable":
        change({ phase: "store-unreachable" });
        break;
      case "store-back":
        change({ phase: "connected" });
        break;
      case "results":
      case "notebook":
        break;
    }
    options.onNotice?.(notice);
  }

  async function open() {
    await copy?.ready;
    if (destroyed || scratch) return;
    const held = ydoc.getXmlFragment(FRAGMENT).length > 0;
    change(held ? { loaded: true } : {});
    connection = connectNotebook({
      notebookId,
      ydoc,
      awareness,
      token: source.mode === "referee" ? source.token : null,
      socket: options.socket,
      mayWrite: () => !current.readOnly,
      onPhase(phase) {
        if (isFinal(phase)) endAs(phase);
        else change({ phase });
      },
      onOpen: () => {
        saved.connected();
      },
      onSynced: () => {
        change({ phase: "connected", loaded: true });
      },
      onSent: (frame) => {
        saved.sent(frame);
      },
      onSaved(frames) {
        saved.committed(frames);
        if (!saved.unsaved()) copy?.markSaved();
        change({});
      },
      onNotice: heed,
    });
  }
  void open();

  return {
    notebookId,
    source,
    ydoc,
    fragment: ydoc.getXmlFragment(FRAGMENT),
    awareness,
    history,
    person,
    state: () => current,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy() {
      destroyed = true;
      ydoc.off("update", onUpdate);
      connection?.destroy();
      history.destroy();
      awareness.destroy();
      void copy?.close();
      if (!scratch) ydoc.destroy();
      listeners.clear();
    },
  };
}
