/** The tick in the margin: at the gap nearest the pointer or, without one, after the paragraph with the caret. */
import type { Editor } from "@tiptap/core";
import { useEffect, useRef, useState } from "react";
import { fetched } from "../../ui/fetched.tsx";
import { INDEX_SHORTCUT } from "../editor-extensions.ts";
import { gapAtCaret } from "./place.ts";
import type { PlacementPanelProps } from "./placement-panel.tsx";

export const placementPanel = fetched<PlacementPanelProps>(
  async () => (await import("./placement-panel.tsx")).PlacementPanel,
);

interface MarginTickProps {
  readonly editor: Editor;
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
}

interface Gap {
  readonly index: number;
  /** Distance from the top of the document's box, in CSS pixels. */
  readonly top: number;
}

export function MarginTick({ editor, open, onOpenChange }: MarginTickProps) {
  const gap = useGap(editor, open);
  const tick = useRef<HTMLButtonElement>(null);
  const keys = shortcutWords(INDEX_SHORTCUT);
  const close = () => {
    onOpenChange(false);
  };
  return (
    <>
      <button
        ref={tick}
        type="button"
        className="margin-tick"
        style={{ top: `${String(gap.top)}px` }}
        aria-label="Place something here"
        aria-keyshortcuts="Control+."
        aria-haspopup="dialog"
        aria-expanded={open}
        data-state={open ? "open" : "closed"}
        title={`Place a block, an equation, a heading… (${keys})`}
        onClick={() => {
          onOpenChange(!open);
        }}
      />
      {open && (
        <placementPanel.Part editor={editor} gap={gap.index} tick={tick} onClose={close} onMissing={close} />
      )}
    </>
  );
}

function shortcutWords(shortcut: string): string {
  const apple = /Mac|iPhone|iPad/.test(navigator.userAgent);
  return shortcut.replace("Mod-", apple ? "⌘" : "Ctrl ");
}

/** Follows pointer and caret; while the index is open the gap stays where it was opened. */
function useGap(editor: Editor, frozen: boolean): Gap {
  const [gap, setGap] = useState<Gap>({ index: 0, top: 0 });
  const still = useRef(frozen);
  useEffect(() => {
    still.current = frozen;
  }, [frozen]);

  useEffect(() => {
    const keep = (next: Gap) => {
      if (still.current) return;
      setGap((before) => (before.index === next.index && before.top === next.top ? before : next));
    };
    const followCaret = () => {
      if (!editor.isDestroyed) keep(gapBefore(editor, gapAtCaret(editor)));
    };
    const followPointer = (event: PointerEvent) => {
      if (event.pointerType === "mouse" && event.buttons === 0) keep(gapNear(editor, event.clientY));
    };
    const column = editor.view.dom.closest<HTMLElement>(".notebook-column") ?? editor.view.dom;
    followCaret();
    editor.on("selectionUpdate", followCaret);
    editor.on("update", followCaret);
    column.addEventListener("pointermove", followPointer);
    column.addEventListener("pointerleave", followCaret);
    return () => {
      editor.off("selectionUpdate", followCaret);
      editor.off("update", followCaret);
      column.removeEventListener("pointermove", followPointer);
      column.removeEventListener("pointerleave", followCaret);
    };
  }, [editor]);
  return gap;
}

/** Node views and carets may add elements that are no children of the document; ask ProseMirror for each child's. */
function childElements(editor: Editor): readonly HTMLElement[] {
  const elements: HTMLElement[] = [];
  editor.state.doc.forEach((_child, offset) => {
    const element = editor.view.nodeDOM(offset);
    if (element instanceof HTMLElement) elements.push(element);
  });
  return elements;
}

function gapBefore(editor: Editor, index: number): Gap {
  const elements = childElements(editor);
  const above = elements[index - 1]?.getBoundingClientRect();
  const below = elements[index]?.getBoundingClientRect();
  const box = editor.view.dom.getBoundingClientRect();
  const edge = above && below ? (above.bottom + below.top) / 2 : (above?.bottom ?? below?.top ?? box.top);
  return { index, top: Math.round(edge - box.top + editor.view.dom.offsetTop) };
}

function gapNear(editor: Editor, y: number): Gap {
  const elements = childElements(editor);
  const middles = elements.map((element) => {
    const { top, bottom } = element.getBoundingClientRect();
    return (top + bottom) / 2;
  });
  const index = middles.findIndex((middle) => y < middle);
  return gapBefore(editor, index === -1 ? elements.length : index);
}
