/** Where blocks stand in the editor's document, and moving and deleting them there. */
import type { Editor } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { NodeSelection } from "@tiptap/pm/state";
import { freeId } from "#engine/notebook/free-id.ts";
import { isKindName } from "./block-elements.ts";
import type { BlockWorld } from "./block-world.ts";
import { agreed, occupiedQuestion } from "./occupied.ts";

export interface BlockPlace {
  readonly position: number;
  readonly node: Node;
}

const known = new WeakMap<Node, ReadonlyMap<string, BlockPlace>>();

/** Blocks in document order under the ids they are read by: a second block of one id is "id~2". */
export function blockPlaces(doc: Node): ReadonlyMap<string, BlockPlace> {
  const before = known.get(doc);
  if (before) return before;
  const places = new Map<string, BlockPlace>();
  const taken = new Set<string>();
  doc.descendants((node, position) => {
    if (!isKindName(node.type.name)) return !node.isTextblock;
    places.set(freeId(String(node.attrs["blockId"]), "unnamed", taken), { position, node });
    return false;
  });
  known.set(doc, places);
  return places;
}

/** The id by which the block at a position is read. */
export function blockIdAt(doc: Node, position: number): string | null {
  for (const [blockId, place] of blockPlaces(doc)) if (place.position === position) return blockId;
  return null;
}

export function selectBlock(editor: Editor, position: number): void {
  if (!isKindName(editor.state.doc.nodeAt(position)?.type.name ?? "")) return;
  editor.view.dispatch(editor.state.tr.setSelection(NodeSelection.create(editor.state.doc, position)));
  editor.view.focus();
}

/** Brings a block into view and selects it. */
export function goToBlock(editor: Editor, blockId: string): boolean {
  const place = blockPlaces(editor.state.doc).get(blockId);
  if (!place) return false;
  selectBlock(editor, place.position);
  const element = editor.view.nodeDOM(place.position);
  if (element instanceof HTMLElement) element.scrollIntoView({ block: "center" });
  return true;
}

/** Swaps a block with its neighbour. The block is made anew in its place, so a colleague inside is asked about first. */
export function moveBlock(world: BlockWorld, editor: Editor, blockId: string, step: -1 | 1): void {
  askIfOccupied(world, blockId, "Move the block", "moves", () => {
    const place = blockPlaces(editor.state.doc).get(blockId);
    if (!place) return;
    const { position, node } = place;
    const { doc, tr } = editor.state;
    const resolved = doc.resolve(position);
    const index = resolved.index();
    const neighbour = resolved.parent.maybeChild(index + step);
    if (!neighbour) return;
    const target = step === -1 ? position - neighbour.nodeSize : position + neighbour.nodeSize;
    tr.delete(position, position + node.nodeSize).insert(target, node);
    tr.setSelection(NodeSelection.create(tr.doc, target));
    editor.view.dispatch(agreed(tr.scrollIntoView()));
    editor.view.focus();
  });
}

export function deleteBlock(world: BlockWorld, editor: Editor, blockId: string): void {
  askIfOccupied(world, blockId, "Delete the block", "goes", () => {
    const place = blockPlaces(editor.state.doc).get(blockId);
    if (!place) return;
    const { tr } = editor.state;
    editor.view.dispatch(
      agreed(tr.delete(place.position, place.position + place.node.nodeSize).scrollIntoView()),
    );
    editor.view.focus();
  });
}

function askIfOccupied(
  world: BlockWorld,
  blockId: string,
  yes: string,
  happening: "moves" | "goes",
  act: () => void,
): void {
  const question = occupiedQuestion(world, [blockId], happening);
  if (question) world.ask({ ...question, yes, act });
  else act();
}
