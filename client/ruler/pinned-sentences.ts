/** From a tick of the ruler to its row, and to every sentence that relies on a number of it. */
import type { Editor } from "@tiptap/core";
import { blockPlaces, goToBlock } from "../editor/blocks/block-places.ts";
import { pinsOf } from "../editor/pins/use-pin-counts.ts";
import type { ReadMark } from "./reading.ts";
import type { RulerSource } from "./ruler-source.ts";

export interface PinnedSentence {
  readonly position: number;
  /** The words around the pin, with its number in them. */
  readonly words: string;
}

const BEFORE = 48;
const AFTER = 24;

/** In the order of the text. `isFirstOut`: the plan's own number for it counts as well. */
export function sentencesOf(
  editor: Editor,
  { mark }: ReadMark,
  source: RulerSource,
  isFirstOut: boolean,
): readonly PinnedSentence[] {
  const { doc } = editor.state;
  return pinsOf(doc).flatMap(({ offset, pin }) => {
    const ofRow = mark.rowIds.some((rowId) => pin.scalar.startsWith(`${rowId}/`));
    const ofPlan = isFirstOut && pin.blockId === source.blockId && pin.scalar === "first-out/size";
    if (!ofRow && !ofPlan) return [];
    const place = doc.resolve(offset);
    const { parent, parentOffset } = place;
    const words = (from: number, to: number) =>
      parent.textBetween(Math.max(0, from), Math.min(parent.content.size, to), " ", ({ attrs }) =>
        String(attrs["text"] ?? attrs["latex"] ?? ""),
      );
    const before = words(parentOffset - BEFORE, parentOffset);
    const after = words(parentOffset + 1, parentOffset + 1 + AFTER);
    return [{ position: offset, words: `… ${fromWord(before)}${pin.text}${toWord(after)} …` }];
  });
}

/** Without the rest of a word that was cut. */
const fromWord = (text: string) => (text.length < BEFORE ? text : text.replace(/^\S*\s/, ""));
const toWord = (text: string) => (text.length < AFTER ? text : text.replace(/\s\S*$/, ""));

export function goToSentence(editor: Editor, position: number): void {
  const element = editor.view.nodeDOM(position);
  if (!(element instanceof HTMLElement)) return;
  element.scrollIntoView({ block: "center" });
  element.querySelector<HTMLElement>("button")?.focus({ preventScroll: true });
}

/** The row's first field has the focus then; where the block is not drawn yet, the block. */
export function goToRow(editor: Editor, premisesId: string, rowId: string): void {
  const place = blockPlaces(editor.state.doc).get(premisesId);
  const element = place && editor.view.nodeDOM(place.position);
  const row =
    element instanceof HTMLElement ? element.querySelector(`[data-row="${CSS.escape(rowId)}"]`) : null;
  if (!row) {
    goToBlock(editor, premisesId);
    return;
  }
  row.scrollIntoView({ block: "center" });
  row.querySelector<HTMLElement>("input, select, button")?.focus({ preventScroll: true });
}
