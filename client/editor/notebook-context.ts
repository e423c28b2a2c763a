/** What parts of the page see of the notebook that is open. */
import type { Editor } from "@tiptap/core";
import { createContext, useCallback, useContext, useMemo, useSyncExternalStore } from "react";
import { connectionWords, type ConnectionState } from "./connection-words.ts";
import type { HistoryState } from "./history.ts";
import type { NotebookSession } from "./notebook-session.ts";
import { presentPeople, type PresentPerson } from "./presence.ts";

export interface OpenNotebook {
  readonly session: NotebookSession;
  readonly editor: Editor;
  /** Nothing can be changed by this person, now. */
  readonly readOnly: boolean;
}

export const NotebookContext = createContext<OpenNotebook | null>(null);

/** The notebook that a block, a pin or a bar is drawn in. */
export function useNotebook(): OpenNotebook {
  const notebook = useContext(NotebookContext);
  if (!notebook) throw new Error("this is drawn inside an open notebook only");
  return notebook;
}

export interface SharedHistory extends HistoryState {
  undo(): void;
  redo(): void;
  startNewStep(): void;
}

/** The person's history, for prose and block fields alike. */
export function useHistory(): SharedHistory {
  const { history } = useNotebook().session;
  const state = useSyncExternalStore(history.subscribe, history.state);
  return useMemo(
    () => ({
      ...state,
      undo: () => void history.undoOnce(),
      redo: () => void history.redoOnce(),
      startNewStep: history.startNewStep,
    }),
    [history, state],
  );
}

// The page's header lies outside the editor. One notebook is open at a time, so it is found here.
let opened: NotebookSession | null = null;
const openedListeners = new Set<() => void>();

export function announceOpened(session: NotebookSession | null): void {
  opened = session;
  for (const listener of openedListeners) listener();
}

/** The session of the open notebook, for what lies outside the editor; null when none is open. */
export function useOpenedSession(): NotebookSession | null {
  return useSyncExternalStore(
    (listener) => {
      openedListeners.add(listener);
      return () => openedListeners.delete(listener);
    },
    () => opened,
  );
}

export interface ConnectionInWords extends ConnectionState {
  readonly words: string;
}

/** The connection of the open notebook, for the header; null when none is open. */
export function useConnection(): ConnectionInWords | null {
  const session = useOpenedSession();
  const subscribe = useCallback(
    (listener: () => void) => session?.subscribe(listener) ?? (() => undefined),
    [session],
  );
  const state = useSyncExternalStore(subscribe, () => session?.state() ?? null);
  return useMemo(() => (state ? { ...state, words: connectionWords(state) } : null), [state]);
}

const nobody: readonly PresentPerson[] = [];

/** Who is in the open notebook, oneself first; for the header. */
export function usePresentPeople(): readonly PresentPerson[] {
  const session = useOpenedSession();
  const store = useMemo(() => peopleStore(session), [session]);
  return useSyncExternalStore(store.subscribe, store.people);
}

/** A list that keeps its identity until it changes: carets move far more often than people come and go. */
function peopleStore(session: NotebookSession | null) {
  let list = session ? presentPeople(session.awareness) : nobody;
  return {
    people: () => list,
    subscribe(listener: () => void) {
      if (!session) return () => undefined;
      const { awareness } = session;
      const refresh = () => {
        const next = presentPeople(awareness);
        if (JSON.stringify(next) === JSON.stringify(list)) return;
        list = next;
        listener();
      };
      refresh();
      awareness.on("change", refresh);
      return () => {
        awareness.off("change", refresh);
      };
    },
  };
}
