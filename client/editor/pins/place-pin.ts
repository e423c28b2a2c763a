/** Putting a scalar of a result into a sentence, and bringing a pin up to date. */
import type { Editor } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { NodeSelection, TextSelection } from "@tiptap/pm/state";
import type { Scalar } from "#engine/evaluation.ts";
import {
  defaultPinFormat,
  formatScalar,
  parsePinFormat,
  printPinFormat,
  type PinFormat,
} from "#engine/notebook/pin-format.ts";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import { say } from "../../ui/notices.ts";
import type { BlockWorld } from "../blocks/block-world.ts";
import { newId } from "../new-id.ts";
import { lastProsePosition } from "./prose-caret.ts";

/** A pin's attributes for a scalar as it is now. */
export function pinAttributes(
  blockId: string,
  scalar: Scalar,
  resultKey: string,
  format: PinFormat,
): Omit<PinAttributes, "pinId"> {
  return {
    blockId,
    scalar: scalar.id,
    resultKey,
    value: JSON.stringify(scalar.value),
    text: formatScalar(scalar.value, format),
    format: printPinFormat(format),
  };
}

/** Puts a pin where the caret last stood in the prose, with the caret after it, and says so. */
export function placePinAtCaret(world: BlockWorld, blockId: string, scalarId: string): void {
  const { results, session } = world;
  const editor = world.editor();
  const { evaluation, key } = results.result(blockId);
  const scalar = evaluation?.scalars.find(({ id }) => id === scalarId);
  if (!editor || !scalar || key === null || session.state().readOnly) return;
  const position = lastProsePosition(editor.state);
  if (position === null) {
    say("Put the caret into a sentence first: the pin goes where it last stood.", "refused");
    return;
  }
  insertPin(editor, position, { pinId: newId(), ...pinAttributes(blockId, scalar, key, defaultPinFormat) });
  say(`Pinned ${formatScalar(scalar.value, defaultPinFormat)} into the prose.`);
}

export function insertPin(editor: Editor, position: number, attributes: PinAttributes): void {
  const type = editor.schema.nodes[pinNode];
  if (!type) throw new Error("the schema has no pin");
  const { tr } = editor.state;
  tr.insert(position, type.create(attributes));
  tr.setSelection(TextSelection.near(tr.doc.resolve(position + 1)));
  editor.view.dispatch(tr.scrollIntoView());
  editor.view.focus();
}

/** The pin takes the value its block says now, in the format it has: one step of the history. */
export function acceptPin(world: BlockWorld, editor: Editor, position: number): boolean {
  const pin = pinAt(editor, position);
  if (!pin || world.session.state().readOnly) return false;
  const { blockId, scalar: scalarId, format } = pin.attrs as PinAttributes; // the schema gives a pin these
  const { evaluation, key } = world.results.result(blockId);
  const scalar = evaluation?.value == null ? undefined : evaluation.scalars.find(({ id }) => id === scalarId);
  if (!scalar || key === null) return false;
  changePin(editor, position, pinAttributes(blockId, scalar, key, parsePinFormat(format)));
  return true;
}

/** Shows the pinned value in another format; the value itself stays. */
export function reformatPin(editor: Editor, position: number, format: PinFormat, text: string): void {
  changePin(editor, position, { format: printPinFormat(format), text });
}

export function removePin(editor: Editor, position: number): void {
  const pin = pinAt(editor, position);
  if (pin) editor.view.dispatch(editor.state.tr.delete(position, position + pin.nodeSize));
}

function changePin(editor: Editor, position: number, attributes: Partial<PinAttributes>): void {
  const pin = pinAt(editor, position);
  if (!pin) return;
  const { tr, selection } = editor.state;
  tr.setNodeMarkup(position, null, { ...pin.attrs, ...attributes });
  if (selection instanceof NodeSelection && selection.from === position)
    tr.setSelection(NodeSelection.create(tr.doc, position));
  editor.view.dispatch(tr);
}

function pinAt(editor: Editor, position: number): Node | null {
  const node = editor.state.doc.nodeAt(position);
  return node?.type.name === pinNode ? node : null;
}
