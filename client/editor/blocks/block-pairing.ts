/**
 * Keeps blocks apart when an edit of the prose adds, deletes, moves or wraps them.
 *
 * The binding between ProseMirror and Yjs finds out what changed by comparing trees. Between two neighbours of one
 * kind it may guess wrong: deleting the first of two blocks without rows rewrites the first into the second and deletes
 * the second, and a colleague's edit of either lands in the wrong one. This plugin runs before the binding. It knows
 * each block by its identity, takes those that are gone out of the Y document, puts new ones in, and leaves the
 * binding nothing to guess.
 */
import { Extension } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { Plugin, PluginKey } from "@tiptap/pm/state";
import { ySyncPluginKey, type ProsemirrorBinding } from "@tiptap/y-tiptap";
import * as Y from "yjs";
import { blockElements, isKindName } from "./block-elements.ts";
import { placedBlocks, sameBlocks, takenFrom } from "./placed-blocks.ts";

interface SyncState {
  readonly binding: ProsemirrorBinding;
  readonly doc: Y.Doc;
  readonly type: Y.XmlFragment;
  readonly isChangeOrigin: boolean;
  readonly addToHistory: boolean;
}

/** Blocks that an edit took from their place since the binding last looked: if they are still there, they were moved. */
const takenKey = new PluginKey<ReadonlySet<Node>>("blockPairing");
const none: ReadonlySet<Node> = new Set();

/** Runs its plugin's view before that of the collaboration extension, which has priority 1000. */
export const BlockPairing = Extension.create({
  name: "blockPairing",
  priority: 1100,
  addProseMirrorPlugins: () => [
    new Plugin<ReadonlySet<Node>>({
      key: takenKey,
      state: {
        init: () => none,
        apply: (transaction, taken) => (transaction.docChanged ? takenFrom(transaction) : taken),
      },
      view: () => ({
        update(view, before) {
          if (view.state.doc === before.doc) return;
          // The plugin's state is not typed by the package; these are the members it documents and we read.
          const sync = ySyncPluginKey.getState(view.state) as SyncState | undefined;
          if (!sync || sync.isChangeOrigin) return;
          const same = sameBlocks(placedBlocks(before.doc), placedBlocks(view.state.doc));
          if (same && differsInOnePlace(before.doc, view.state.doc)) return;
          sync.binding.mux(() => {
            sync.doc.transact((transaction) => {
              transaction.meta.set("addToHistory", sync.addToHistory);
              pairBlocks(
                sync.type,
                sync.binding.mapping,
                view.state.doc,
                takenKey.getState(view.state) ?? none,
              );
            }, ySyncPluginKey);
          });
        },
      }),
    }),
  ],
});

type Mapping = ProsemirrorBinding["mapping"];

function pairBlocks(fragment: Y.XmlFragment, mapping: Mapping, doc: Node, taken: ReadonlySet<Node>): void {
  const wanted = new Map(placedBlocks(doc).map((block) => [block.node, block.depth]));
  const wantedIds = new Set([...wanted.keys()].map((node) => node.attrs["blockId"] as unknown));
  for (const element of blockElements(fragment)) {
    const node = mapping.get(element);
    if (node === undefined || Array.isArray(node)) continue;
    const depth = wanted.get(node);
    // Same id in another node: its attributes were edited in place, which the binding pairs rightly by position.
    const edited = depth === undefined && wantedIds.has(element.getAttribute("blockId"));
    if ((depth === depthOf(element, fragment) && !taken.has(node)) || edited) continue;
    remove(element, mapping);
  }
  removeOutOfOrder(fragment, mapping, doc);
  removeCrossing(fragment, mapping, doc);
  insertMissing(fragment, mapping, doc);
}

function depthOf(element: Y.XmlElement, fragment: Y.XmlFragment): number {
  let depth = 0;
  for (let parent = element.parent; parent && parent !== fragment; parent = parent.parent as typeof parent)
    depth++;
  return depth;
}

function remove(element: Y.XmlElement, mapping: Mapping): void {
  const parent = element.parent;
  if (!(parent instanceof Y.XmlFragment)) return;
  mapping.delete(element);
  parent.delete(parent.toArray().indexOf(element), 1);
}

/** Of top-level blocks whose order changed, takes out the fewest; `insertMissing` puts them back in their new place. */
function removeOutOfOrder(fragment: Y.XmlFragment, mapping: Mapping, doc: Node): void {
  const places = new Map<unknown, number>();
  doc.forEach((child, _offset, index) => {
    if (isKindName(child.type.name)) places.set(child, index);
  });
  const present = fragment.toArray().flatMap((element) => {
    if (!(element instanceof Y.XmlElement)) return [];
    const place = places.get(mapping.get(element));
    return place === undefined ? [] : [{ element, place }];
  });
  const kept = new Set(longestRising(present.map(({ place }) => place)));
  for (const [index, { element }] of present.entries()) if (!kept.has(index)) remove(element, mapping);
}

/** True for what typing does: at most one child of the document is another, and none has another place. */
function differsInOnePlace(before: Node, after: Node): boolean {
  if (before.childCount !== after.childCount) return false;
  let differing = 0;
  after.forEach((child, _offset, index) => {
    if (child !== before.child(index)) differing++;
  });
  return differing <= 1;
}

/** Prose that was moved past a block goes out, for the binding to write in its new place: it would else move the block. */
function removeCrossing(fragment: Y.XmlFragment, mapping: Mapping, doc: Node): void {
  const places = new Map<unknown, number>();
  doc.forEach((child, _offset, index) => places.set(child, index));
  const present = fragment.toArray().flatMap((element) => {
    if (!(element instanceof Y.XmlElement)) return [];
    const place = places.get(mapping.get(element));
    return place === undefined ? [] : [{ element, place }];
  });
  const isBlock = ({ element }: { readonly element: Y.XmlElement }) => isKindName(element.nodeName);
  for (const [index, entry] of present.entries()) {
    if (isBlock(entry)) continue;
    const crosses = present.some(
      (other, at) => isBlock(other) && (at < index ? other.place > entry.place : other.place < entry.place),
    );
    if (crosses) remove(entry.element, mapping);
  }
}

/** Indices of a longest rising subsequence. Lists here are short, so the quadratic way will do. */
export function longestRising(values: readonly number[]): number[] {
  const best: number[][] = [];
  for (const [index, value] of values.entries()) {
    let longest: number[] = [];
    for (const chain of best) {
      const last = chain.at(-1);
      if (last !== undefined && (values[last] ?? 0) < value && chain.length > longest.length) longest = chain;
    }
    best.push([...longest, index]);
  }
  return best.reduce((a, b) => (b.length > a.length ? b : a), []);
}

/** New top-level blocks go beside the neighbour that is known; without one the binding inserts them itself. */
function insertMissing(fragment: Y.XmlFragment, mapping: Mapping, doc: Node): void {
  const elementOf = new Map<unknown, Y.XmlElement>();
  for (const element of fragment.toArray()) {
    const node = mapping.get(element);
    if (element instanceof Y.XmlElement && node !== undefined) elementOf.set(node, element);
  }
  doc.forEach((child, _offset, index) => {
    if (!isKindName(child.type.name) || elementOf.has(child)) return;
    const previous = index > 0 ? elementOf.get(doc.child(index - 1)) : undefined;
    const next = index + 1 < doc.childCount ? elementOf.get(doc.child(index + 1)) : undefined;
    const siblings = fragment.toArray();
    const at = previous ? siblings.indexOf(previous) + 1 : next ? siblings.indexOf(next) : null;
    if (at === null) return;
    const element = elementFrom(child);
    fragment.insert(at, [element]);
    mapping.set(element, child);
    elementOf.set(child, element);
  });
}

function elementFrom(node: Node): Y.XmlElement {
  const element = new Y.XmlElement(node.type.name);
  for (const [name, value] of Object.entries(node.attrs)) {
    if (typeof value === "string") element.setAttribute(name, value);
  }
  const children: Y.XmlElement[] = [];
  node.forEach((child) => children.push(elementFrom(child)));
  // Not push: it would read the length of an element that is not in a document yet.
  element.insert(0, children);
  return element;
}
