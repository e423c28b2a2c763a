/** How many pins of the open notebook have moved or are loose, for the page's header. */
import type { Editor } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { useSyncExternalStore } from "react";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import type { BlockWorld } from "../blocks/block-world.ts";
import { statusOf } from "./pin-view-state.ts";

export interface PinCounts {
  readonly moved: number;
  readonly loose: number;
  readonly all: number;
}
const none: PinCounts = { moved: 0, loose: 0, all: 0 };

// The header lies outside the editor. One notebook is open at a time, so its counts are found here.
let counts: PinCounts = none;
let ofBlocks: ReadonlyMap<string, number> = new Map();
let jump: (() => void) | null = null;
const listeners = new Set<() => void>();
const blockListeners = new Set<() => void>();

function publish(next: PinCounts) {
  if (next.moved === counts.moved && next.loose === counts.loose && next.all === counts.all) return;
  counts = next;
  for (const listener of listeners) listener();
}

function publishOfBlocks(doc: Node) {
  const next = new Map<string, number>();
  for (const { pin } of pinsOf(doc)) next.set(pin.blockId, (next.get(pin.blockId) ?? 0) + 1);
  const same = next.size === ofBlocks.size && [...next].every(([id, count]) => ofBlocks.get(id) === count);
  if (same) return;
  ofBlocks = next;
  for (const listener of blockListeners) listener();
}

/** How many sentences use a number of this block. */
export function pinCountOf(blockId: string): number {
  return ofBlocks.get(blockId) ?? 0;
}
export function onPinCounts(listener: () => void): () => void {
  blockListeners.add(listener);
  return () => blockListeners.delete(listener);
}

/** Counts as prose and results change, once per frame at most. Returns the way to stop. */
export function announcePins(world: BlockWorld, editor: Editor): () => void {
  let waiting: number | null = null;
  const count = () => {
    waiting = null;
    if (editor.isDestroyed) return;
    publish(countPins(world, editor.state.doc));
    publishOfBlocks(editor.state.doc);
  };
  const soon = () => {
    waiting ??= requestAnimationFrame(count);
  };
  jump = () => goToNextPin(world, editor);
  editor.on("update", soon);
  const quiet = world.results.subscribe(soon);
  soon();
  return () => {
    if (waiting !== null) cancelAnimationFrame(waiting);
    editor.off("update", soon);
    quiet();
    jump = null;
    publish(none);
  };
}

/** The counts, and `goToNext`, which selects the next pin that has moved or is loose. */
export function usePinCounts(): PinCounts & { goToNext(): void } {
  const current = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => counts,
  );
  return { ...current, goToNext: () => jump?.() };
}

interface PlacedPin {
  readonly offset: number;
  readonly pin: PinAttributes;
}
const pinsWithin = new WeakMap<Node, readonly PlacedPin[]>();

/** Pins below a node by their offset in it; remembered per node, so a keystroke looks only at its own paragraph. */
export function pinsOf(parent: Node): readonly PlacedPin[] {
  const known = pinsWithin.get(parent);
  if (known) return known;
  const found: PlacedPin[] = [];
  parent.forEach((child, offset) => {
    // The schema gives a pin these attributes.
    if (child.type.name === pinNode) found.push({ offset, pin: child.attrs as PinAttributes });
    else if (!child.isAtom)
      for (const below of pinsOf(child)) found.push({ offset: offset + 1 + below.offset, pin: below.pin });
  });
  pinsWithin.set(parent, found);
  return found;
}

function needsAttention({ directory, results }: BlockWorld, pin: PinAttributes): "moved" | "loose" | null {
  const { evaluation } = results.result(pin.blockId);
  // Not computed yet on this page: nothing is claimed.
  if (directory.block(pin.blockId) && evaluation === null) return null;
  const { status } = statusOf(pin, directory.block(pin.blockId) ? evaluation : null);
  return status === "holds" ? null : status;
}

export function countPins(world: BlockWorld, doc: Node): PinCounts {
  const pins = pinsOf(doc);
  const states = pins.map(({ pin }) => needsAttention(world, pin));
  return {
    moved: states.filter((state) => state === "moved").length,
    loose: states.filter((state) => state === "loose").length,
    all: pins.length,
  };
}

function goToNextPin(world: BlockWorld, editor: Editor): void {
  goToNext(editor, (pin) => needsAttention(world, pin) !== null);
}

/** Selects the next pin of a block after the caret, from the last one on to the first. */
export function goToNextPinOf(editor: Editor, blockId: string): void {
  goToNext(editor, (pin) => pin.blockId === blockId);
}

function goToNext(editor: Editor, isWanted: (pin: PinAttributes) => boolean): void {
  const { doc, selection } = editor.state;
  const places = pinsOf(doc).filter(({ pin }) => isWanted(pin));
  const next = places.find(({ offset }) => offset > selection.from) ?? places[0];
  if (!next) return;
  editor.chain().setNodeSelection(next.offset).scrollIntoView().focus().run();
}
