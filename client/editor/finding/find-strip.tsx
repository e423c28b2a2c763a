import { useCallback, useEffect, useLayoutEffect, useRef, useState, useSyncExternalStore } from "react";
import type { Node } from "@tiptap/pm/model";
import { TextSelection } from "@tiptap/pm/state";
import type { NotebookTools } from "../notebook-tools.ts";
import { findMatches, type Match } from "./matches.ts";
import { foundKey, foundMarks } from "./found-marks.ts";
import "./finding.css";

interface Props extends NotebookTools {
  readonly onClose: () => void;
}

/** Finds text in the notebook. Enter goes on, with Shift back; Escape closes and leaves the caret at what was found. */
export function FindStrip({ editor, world, onClose }: Props) {
  const [typed, setTyped] = useState(() => selectedText(editor));
  const field = useRef<HTMLInputElement>(null);
  const wanted = useRef(typed);

  const find = useCallback(
    (doc: Node) =>
      findMatches(doc, new Map(world.directory.blocks().map((block) => [block.id, block])), wanted.current),
    [world],
  );
  const show = useCallback(
    (matches: readonly Match[], current: number) => {
      const { tr } = editor.state;
      editor.view.dispatch(tr.setMeta(foundKey, { matches, current }).setMeta("addToHistory", false));
      const match = matches[current];
      if (match) bringIntoView(editor, match);
      else unmarkEntry(editor);
    },
    [editor],
  );
  const found = useSyncExternalStore(
    (listener) => {
      editor.on("transaction", listener);
      return () => editor.off("transaction", listener);
    },
    () => foundKey.getState(editor.state) ?? null,
  );
  const at = { count: found?.matches.length ?? 0, current: found?.current ?? -1 };
  // The marks are the editor's while this strip is there.
  useEffect(() => {
    editor.registerPlugin(foundMarks(find));
    return () => {
      if (editor.isDestroyed) return;
      unmarkEntry(editor);
      editor.unregisterPlugin(foundKey);
    };
  }, [editor, find]);
  useLayoutEffect(() => {
    field.current?.select();
  }, []);
  useEffect(() => {
    wanted.current = typed;
    const matches = find(editor.state.doc);
    const next = matches.findIndex(({ from }) => from >= editor.state.selection.from);
    show(matches, matches.length === 0 ? -1 : Math.max(0, next));
  }, [typed, editor, find, show]);

  function go(step: 1 | -1) {
    const matches = find(editor.state.doc);
    const current = foundKey.getState(editor.state)?.current ?? -1;
    if (matches.length > 0) show(matches, (current + step + matches.length) % matches.length);
  }
  function close() {
    const state = foundKey.getState(editor.state);
    const match = state?.matches[state.current];
    onClose();
    if (match) goTo(editor, match);
    else editor.view.focus();
  }

  return (
    <search className="find-strip" aria-label="Find in the notebook">
      <input
        ref={field}
        type="text"
        aria-label="Find in the notebook"
        placeholder="find in text, formulas, blocks"
        value={typed}
        autoComplete="off"
        spellCheck={false}
        onChange={(event) => setTyped(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === "Enter") go(event.shiftKey ? -1 : 1);
          else if (event.key === "Escape") close();
          else return;
          event.preventDefault();
        }}
      />
      <span role="status" className="find-count">
        {sayCount(typed, at)}
      </span>
      <button type="button" onClick={() => go(-1)} disabled={at.count === 0}>
        before
      </button>
      <button type="button" onClick={() => go(1)} disabled={at.count === 0}>
        next
      </button>
      <button type="button" onClick={close}>
        close
      </button>
    </search>
  );
}

/** @example sayCount("phi", { count: 17, current: 2 }) // "3 of 17" */
export function sayCount(
  typed: string,
  { count, current }: { readonly count: number; readonly current: number },
): string {
  if (typed.trim() === "") return "";
  return count === 0 ? "nowhere" : `${current + 1} of ${count}`;
}

function selectedText({ state }: NotebookTools["editor"]): string {
  const { from, to, $from, $to } = state.selection;
  return $from.sameParent($to) && to - from <= 80 ? state.doc.textBetween(from, to) : "";
}

/** The place of a match on the page: the entry of a block, or the nearest element of the prose. */
function elementOf(editor: NotebookTools["editor"], match: Match): HTMLElement | null {
  const node = match.in === "text" ? null : editor.view.nodeDOM(match.from);
  if (match.in === "block" && node instanceof HTMLElement) {
    const fields = [...node.querySelectorAll<HTMLElement>("[data-place]")];
    return fields.find(({ dataset }) => dataset["place"] === match.place) ?? node;
  }
  if (node instanceof HTMLElement) return node;
  const place = editor.view.domAtPos(match.from).node;
  return place instanceof HTMLElement ? place : place.parentElement;
}

function bringIntoView(editor: NotebookTools["editor"], match: Match): void {
  const element = elementOf(editor, match);
  element?.scrollIntoView({ block: "center" });
  unmarkEntry(editor);
  if (match.in === "block") element?.setAttribute(FOUND_HERE, "");
}

/** On the entry of a block that one is at; React, which draws it, knows nothing of it. */
const FOUND_HERE = "data-found-here";

function unmarkEntry(editor: NotebookTools["editor"]): void {
  for (const marked of editor.view.dom.querySelectorAll(`[${FOUND_HERE}]`))
    marked.removeAttribute(FOUND_HERE);
}

/** Puts the caret there: on the text, or in the entry of the block. */
function goTo(editor: NotebookTools["editor"], match: Match): void {
  if (match.in === "block") {
    const entry = elementOf(editor, match)?.querySelector<HTMLElement>("input, select");
    if (entry) return entry.focus();
  }
  if (match.in === "text") {
    const { doc, tr } = editor.state;
    editor.view.dispatch(tr.setSelection(TextSelection.create(doc, match.from, match.to)));
  } else editor.commands.setNodeSelection(match.from);
  editor.view.focus();
}
