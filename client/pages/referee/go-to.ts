/** From the check sheet to the place in the text: it comes into view and has the focus, so that the keyboard goes on there. */
import type { Editor } from "@tiptap/core";
import { blockPlaces } from "../../editor/blocks/block-places.ts";

export function showSentence(editor: Editor, position: number): void {
  const element = editor.view.nodeDOM(position);
  if (!(element instanceof HTMLElement)) return;
  element.scrollIntoView({ block: "center" });
  element.querySelector<HTMLElement>("button")?.focus({ preventScroll: true });
}

export function showBlock(editor: Editor, blockId: string): void {
  const place = blockPlaces(editor.state.doc).get(blockId);
  const element = place && editor.view.nodeDOM(place.position);
  if (!(element instanceof HTMLElement)) return;
  element.scrollIntoView({ block: "start" });
  element.querySelector<HTMLElement>("input, select, summary, button")?.focus({ preventScroll: true });
}
