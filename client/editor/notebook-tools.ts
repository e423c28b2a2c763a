/** The open notebook's editor and blocks, for instruments that lie outside it: one notebook is open at a time. */
import type { Editor } from "@tiptap/core";
import { useSyncExternalStore } from "react";
import type { BlockWorld } from "./blocks/block-world.ts";

export interface NotebookTools {
  readonly editor: Editor;
  readonly world: BlockWorld;
}

let opened: NotebookTools | null = null;
const listeners = new Set<() => void>();

export function announceTools(tools: NotebookTools | null): void {
  opened = tools;
  for (const listener of listeners) listener();
}

/** Null while no notebook is open. */
export function useNotebookTools(): NotebookTools | null {
  return useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => opened,
  );
}
