/** Every number of every result, by block, to pin one where the caret last stood. */
import { Fragment, useId, useLayoutEffect, useRef, useState, type KeyboardEvent } from "react";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { Scalar } from "#engine/evaluation.ts";
import { defaultPinFormat, formatScalar } from "#engine/notebook/pin-format.ts";
import { Dialog } from "../../ui/dialog.tsx";
import { classes } from "../../ui/classes.ts";
import { TextWithMath } from "../../ui/math.tsx";
import { useBlockWorld, type BlockWorld } from "../blocks/block-world.ts";
import { placePinAtCaret } from "./place-pin.ts";
import { withoutMarkup } from "./pin-in-prose.tsx";

interface Pinnable {
  readonly key: string;
  readonly block: BlockInstance;
  readonly scalar: Scalar;
  readonly text: string;
}

/** A long truncation block has a hundred numbers; more than this in a list helps nobody: the search narrows it. */
const MOST_SHOWN = 200;

export function PinPicker({ onClose }: { readonly onClose: () => void }) {
  return (
    <Dialog open onClose={onClose} title="Pin a number into the prose">
      <PickerList onClose={onClose} />
    </Dialog>
  );
}

function PickerList({ onClose }: { readonly onClose: () => void }) {
  const world = useBlockWorld();
  const [typed, setTyped] = useState("");
  const [active, setActive] = useState(0);
  const listId = useId();
  const list = useRef<HTMLDivElement>(null);
  const all = pinnables(world);
  const matching = findPinnables(typed, all);
  const found = matching.slice(0, MOST_SHOWN);
  const at = Math.min(active, found.length - 1);
  useLayoutEffect(() => {
    list.current?.querySelector('[aria-selected="true"]')?.scrollIntoView({ block: "nearest" });
  }, [at, typed]);

  function choose({ block, scalar }: Pinnable) {
    onClose();
    // After the dialog has given the focus back, or it would take it from the prose again.
    setTimeout(() => placePinAtCaret(world, block.id, scalar.id), 0);
  }
  function onKeyDown(event: KeyboardEvent) {
    const steps: Readonly<Record<string, number>> = { ArrowDown: 1, ArrowUp: -1, PageDown: 8, PageUp: -8 };
    const step = steps[event.key];
    if (step !== undefined) setActive(Math.max(0, Math.min(found.length - 1, at + step)));
    else if (event.key === "Enter") {
      const chosen = found[at];
      if (chosen) choose(chosen);
    } else return;
    event.preventDefault();
  }

  if (all.length === 0)
    return <p className="pin-picker-none">There is no result yet to pin a number from.</p>;
  return (
    <div className="pin-picker">
      <input
        className="pin-picker-search"
        type="text"
        role="combobox"
        aria-label="Search numbers of all blocks"
        aria-expanded="true"
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={found[at] ? `${listId}-${at}` : undefined}
        placeholder="size, order, error…"
        value={typed}
        spellCheck={false}
        autoComplete="off"
        onChange={(event) => {
          setTyped(event.target.value);
          setActive(0);
        }}
        onKeyDown={onKeyDown}
      />
      <div
        id={listId}
        ref={list}
        role="listbox"
        aria-label="Numbers that can be pinned"
        className="pin-picker-list"
      >
        {found.map((pinnable, index) => (
          <Fragment key={pinnable.key}>
            {pinnable.block !== found[index - 1]?.block && (
              <div className="pin-picker-block engraved" role="presentation">
                {nameOf(pinnable.block)}
              </div>
            )}
            <div
              id={`${listId}-${index}`}
              role="option"
              aria-selected={index === at}
              tabIndex={-1}
              className={classes("pin-picker-entry", index === at && "pin-picker-active")}
              onPointerMove={() => setActive(index)}
              onClick={() => choose(pinnable)}
              onKeyDown={onKeyDown}
            >
              <span className="pin-picker-value">{pinnable.text}</span>
              <span>
                <TextWithMath text={pinnable.scalar.label} />
              </span>
            </div>
          </Fragment>
        ))}
      </div>
      <p className="pin-picker-none" role="status">
        {found.length === 0 && "No number by that name."}
        {matching.length > found.length && `${matching.length - found.length} more; type to narrow the list.`}
      </p>
    </div>
  );
}

function nameOf({ kind, title }: BlockInstance): string {
  return title === "" ? kindDescriptions[kind].title : `${kindDescriptions[kind].title}: ${title}`;
}

/** Results that have a value now; a last good result is not offered, since what it says is no longer so. */
function pinnables({ results }: BlockWorld): Pinnable[] {
  return results.blocks().flatMap((block) => {
    const { evaluation } = results.result(block.id);
    if (!evaluation || evaluation.value === null) return [];
    return evaluation.scalars.map((scalar) => ({
      key: `${block.id} ${scalar.id}`,
      block,
      scalar,
      text: formatScalar(scalar.value, defaultPinFormat),
    }));
  });
}

/** Those that have every word typed in their label, value, or block's name. */
export function findPinnables(typed: string, all: readonly Pinnable[]): readonly Pinnable[] {
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return all;
  return all.filter(({ block, scalar, text }) => {
    const where =
      `${withoutMarkup(scalar.label)} ${scalar.label} ${text} ${nameOf(block)} ${scalar.id}`.toLowerCase();
    return words.every((word) => where.includes(word));
  });
}
