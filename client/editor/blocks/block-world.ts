/** What every block and pin of one opened notebook shares. */
import type { Editor } from "@tiptap/core";
import { createContext, useContext, useSyncExternalStore } from "react";
import type { NotebookSession } from "../notebook-session.ts";
import { startEvaluationWorker, type WorkerLike } from "../evaluation/evaluation-client.ts";
import { createResultsStore, type ResultsStore } from "../evaluation/results-store.ts";
import { createBlockDirectory, type BlockDirectory } from "./block-directory.ts";
import { createDrawingTurns, type DrawingTurns } from "./drawing-turns.ts";
import { createFieldPresence, type FieldPresence } from "./field-presence.ts";

/** Something to be agreed to before it is done, because a colleague is at work there. */
export interface Question {
  readonly title: string;
  readonly sentence: string;
  readonly yes: string;
  readonly act: () => void;
}

export interface BlockWorld {
  readonly session: NotebookSession;
  readonly directory: BlockDirectory;
  readonly results: ResultsStore;
  readonly presence: FieldPresence;
  readonly drawing: DrawingTurns;
  /** The editor that shows the notebook, while there is one. */
  editor(): Editor | null;
  showIn(editor: Editor | null): void;
  /** Asks first; one question at a time. */
  ask(question: Question | null): void;
  question(): Question | null;
  /** Opens and closes the list of numbers that can be pinned. */
  pick(open: boolean): void;
  picking(): boolean;
  /** Told of questions and of the list. */
  onQuestion(listener: () => void): () => void;
  destroy(): void;
}

export function createBlockWorld(
  session: NotebookSession,
  startWorker: () => WorkerLike = startEvaluationWorker,
): BlockWorld {
  const directory = createBlockDirectory(session.fragment);
  const results = createResultsStore({ directory, startWorker });
  const presence = createFieldPresence(session.awareness);
  const drawing = createDrawingTurns();
  const listeners = new Set<() => void>();
  let question: Question | null = null;
  let picking = false;
  let editor: Editor | null = null;
  return {
    session,
    directory,
    results,
    presence,
    drawing,
    editor: () => editor,
    showIn(next) {
      editor = next;
    },
    ask(next) {
      question = next;
      for (const listener of listeners) listener();
    },
    question: () => question,
    pick(open) {
      picking = open;
      for (const listener of listeners) listener();
    },
    picking: () => picking,
    onQuestion(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy() {
      results.destroy();
      directory.destroy();
      presence.destroy();
      drawing.destroy();
      listeners.clear();
    },
  };
}

export const BlockWorldContext = createContext<BlockWorld | null>(null);

export function useBlockWorld(): BlockWorld {
  const world = useContext(BlockWorldContext);
  if (!world) throw new Error("blocks and pins are drawn inside a notebook");
  return world;
}

/** Whether this person may change the notebook right now. */
export function useReadOnly(): boolean {
  const { session } = useBlockWorld();
  return useSyncExternalStore(session.subscribe, () => session.state().readOnly);
}
