import type { Editor } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { lazy, Suspense, useState, useSyncExternalStore } from "react";
import type { PinAttributes } from "#schema/block-structure.ts";
import { plainLatex } from "../../blocks/parts/plain-latex.ts";
import { classes } from "../../ui/classes.ts";
import { useBlockWorld, useReadOnly } from "../blocks/block-world.ts";
import { useBlockResult, useSettled } from "../evaluation/use-results.ts";
import { acceptPin } from "./place-pin.ts";
import { movedWords, pinStateOf, type PinState } from "./pin-view-state.ts";
import "./pins.css";

const PinPanel = lazy(async () => ({ default: (await import("./pin-panel.tsx")).PinPanel }));

export interface PinInProseProps {
  readonly editor: Editor;
  readonly node: Node;
  readonly selected: boolean;
  readonly getPosition: () => number | undefined;
}

/** A double-ruled figure. Holds: a quiet mark before it. Moved: the old value struck through, the new one in red. */
export function PinInProse({ editor, node, selected, getPosition }: PinInProseProps) {
  const pin = node.attrs as PinAttributes; // the schema gives a pin these
  const world = useBlockWorld();
  const readOnly = useReadOnly();
  const exists = useSyncExternalStore(
    world.directory.subscribe,
    () => world.directory.block(pin.blockId) !== null,
  );
  const result = useBlockResult(pin.blockId);
  const state = pinStateOf(pin, exists, result, useSettled(pin.blockId));
  const [open, setOpen] = useState(false);
  const position = getPosition();

  return (
    <span className={classes("pin", `pin-${state.status}`, selected && "pin-selected")}>
      <button
        type="button"
        className="pin-figure"
        tabIndex={-1}
        aria-haspopup="dialog"
        aria-expanded={open}
        // A name that skips what is shown between its words is no use to who speaks what they see.
        aria-label={state.status === "moved" ? undefined : nameOf(pin, state)}
        onMouseDown={(event) => event.preventDefault()}
        onClick={() => setOpen(true)}
      >
        {state.status === "moved" ? (
          <>
            <s className="pin-was">{pin.text}</s>
            <span className="sr-only">, pinned: {withoutMarkup(state.label)}; it has moved to</span>{" "}
            <ins className="pin-now">{state.now}</ins>
          </>
        ) : (
          <>
            {state.status === "holds" && <span className="pin-mark" aria-hidden="true" />}
            {pin.text}
          </>
        )}
      </button>
      {state.status === "moved" &&
        (readOnly ? (
          <span className="pin-note">{movedWords(state.settled)}</span>
        ) : (
          <button
            type="button"
            className="pin-note pin-accept inline-flex"
            tabIndex={-1}
            title="accept the new value"
            onMouseDown={(event) => event.preventDefault()}
            onClick={() => position !== undefined && acceptPin(world, editor, position)}
          >
            <span className="pin-accept-word order-1">accept</span>
            <span className="sr-only"> {state.now}, </span>
            {movedWords(state.settled)}
          </button>
        ))}
      {state.status === "loose" && <span className="pin-note">loose: {state.words}</span>}
      {open && (
        <Suspense fallback={null}>
          <PinPanel
            editor={editor}
            pin={pin}
            state={state}
            getPosition={getPosition}
            onClose={() => setOpen(false)}
          />
        </Suspense>
      )}
    </span>
  );
}

/** What a screen reader says for the pin; one that has moved says it in its content. */
function nameOf(pin: PinAttributes, state: Exclude<PinState, { status: "moved" }>): string {
  switch (state.status) {
    case "waiting":
      return `${pin.text}, pinned number`;
    case "holds":
      return `${pin.text}, pinned: ${withoutMarkup(state.label)}; it holds`;
    case "loose":
      return `${pin.text}, pinned number, loose: ${state.words}`;
  }
}

/** LaTeX between dollar signs as plain letters. */
export function withoutMarkup(label: string): string {
  return label.replace(/\$([^$]*)\$/g, (_, latex: string) => plainLatex(latex));
}
