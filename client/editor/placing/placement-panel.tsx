/** The index of what can be placed, beside the margin's tick. */
import type { Editor } from "@tiptap/core";
import { useRef, type RefObject } from "react";
import { PopoverPanel } from "../../ui/popover-panel.tsx";
import { openPinPicker } from "../pins/open-pin-picker.ts";
import { PlacementIndex } from "./placement-index.tsx";

export interface PlacementPanelProps {
  readonly editor: Editor;
  /** The gap that what is chosen goes into. */
  readonly gap: number;
  readonly tick: RefObject<HTMLButtonElement | null>;
  readonly onClose: () => void;
}

export function PlacementPanel({ editor, gap, tick, onClose }: PlacementPanelProps) {
  const chosen = useRef(false);
  return (
    <PopoverPanel
      anchor={tick}
      className="placement"
      label="Index of what can be placed"
      sideOffset={4}
      onClose={onClose}
      onCloseFocus={() => {
        // What was placed takes the focus itself, maybe some frames later; giving up goes back to the prose.
        if (chosen.current) return;
        const { activeElement } = document;
        if (activeElement === document.body || activeElement === tick.current) editor.commands.focus();
      }}
    >
      <PlacementIndex
        onChoose={(placeable) => {
          chosen.current = true;
          onClose();
          placeable.place(editor, gap, { pinPicker: () => openPinPicker(editor) });
        }}
      />
    </PopoverPanel>
  );
}
