/** The text of a field while someone types in it, between the keyboard and the shared document. */
import { useEffect, useEffectEvent, useState } from "react";
import { useBlock, valueAt, type FieldPlace } from "../block-handle.ts";

export const PAUSE_MS = 300;

/** A colleague's value that came while this person was in the field. */
export interface Replaced {
  readonly by: string;
  readonly from: string;
  readonly to: string;
  /** What this person had: committed, or still being typed. */
  readonly mine: string;
  /** True while the typed text stands in the field and waits for a choice or for leaving. */
  readonly typing: boolean;
}

export interface FieldDraft {
  readonly text: string;
  readonly replaced: Replaced | null;
  type(text: string): void;
  enter(): void;
  leave(): void;
  /** Writes what is typed now, without waiting for the pause. */
  commit(): void;
  /** Back to what stood here on entering; false when there is nothing to go back to. */
  restore(): boolean;
  putBackMine(): void;
  takeTheirs(): void;
  undo(): void;
  redo(): void;
}

export function useFieldDraft(place: FieldPlace): FieldDraft {
  const block = useBlock();
  const stored = valueAt(block, place);
  const [draft, setDraft] = useState<string | null>(null);
  const [seen, setSeen] = useState(stored);
  /** What stood here on entering; null outside the field. */
  const [atEntry, setAtEntry] = useState<string | null>(null);
  const [replaced, setReplaced] = useState<Replaced | null>(null);

  if (stored !== seen) {
    setSeen(stored);
    const by = atEntry === null ? null : block.writerOf(place);
    if (by !== null) {
      const typing = draft !== null && draft !== stored;
      setReplaced({ by, from: seen, to: stored, mine: typing ? draft : seen, typing });
      setAtEntry(stored);
    }
  }

  const commit = () => {
    if (draft === null) return;
    setDraft(null);
    setReplaced(null);
    if (draft !== stored) block.setValue(place, draft);
  };
  const commitNow = useEffectEvent(commit);
  const held = replaced?.typing === true;
  useEffect(() => {
    if (draft === null || held) return;
    const pause = setTimeout(() => commitNow(), PAUSE_MS);
    return () => clearTimeout(pause);
  }, [draft, held]);
  // A field that is taken off the page, by a move to another page for one, has been left.
  const commitUnmounted = useEffectEvent(() => {
    if (draft !== null && draft !== stored) block.setValue(place, draft);
  });
  useEffect(() => () => commitUnmounted(), []);

  const write = (text: string) => {
    setDraft(null);
    setReplaced(null);
    block.setValue(place, text);
  };
  return {
    text: draft ?? stored,
    replaced,
    type: (text) => {
      setDraft(text);
      if (replaced && !replaced.typing) setReplaced(null);
    },
    enter: () => {
      setAtEntry(stored);
      block.setFocus(place);
    },
    leave: () => {
      commit();
      setAtEntry(null);
      setReplaced(null);
      block.setFocus(null);
    },
    commit,
    restore: () => {
      const before = atEntry ?? stored;
      if ((draft ?? stored) === before) return false;
      setDraft(null);
      setReplaced(null);
      if (stored !== before) block.setValue(place, before);
      return true;
    },
    putBackMine: () => write(replaced?.mine ?? stored),
    takeTheirs: () => {
      setDraft(null);
      setReplaced(null);
    },
    undo: () => {
      commit();
      block.undo();
    },
    redo: () => {
      commit();
      block.redo();
    },
  };
}
