/**
 * The blocks of a shared document as their inputs are read: followed by Y events, so that typing prose reads nothing,
 * and an edit of one block gives new inputs for that block alone.
 */
import * as Y from "yjs";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { Problem } from "#engine/evaluation.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { freeId } from "#engine/notebook/free-id.ts";
import { readInputs } from "#engine/notebook/read-inputs.ts";
import { cellNode } from "#schema/block-structure.ts";
import { attributeOf, blockElements, enclosingBlock, isKindName, rowElements } from "./block-elements.ts";

export interface PremisesChoice {
  readonly blockId: string;
  readonly name: string;
}

export interface BlockDirectory {
  /** In document order. The array and each entry stay the same object until they change. */
  blocks(): readonly BlockInstance[];
  block(blockId: string): BlockInstance | null;
  /** The element to write to; null once the block is gone. */
  element(blockId: string): Y.XmlElement | null;
  /** The Premises blocks, for a choice; the same array until one comes, goes or is renamed. */
  premises(): readonly PremisesChoice[];
  subscribe(listener: () => void): () => void;
  destroy(): void;
}

export function createBlockDirectory(fragment: Y.XmlFragment): BlockDirectory {
  let elements = new Map<string, Y.XmlElement>();
  let inputs = new Map<string, BlockInstance>();
  let list: readonly BlockInstance[] = [];
  let premises: readonly PremisesChoice[] = [];
  const listeners = new Set<() => void>();

  function readAll(changed: ReadonlySet<Y.XmlElement>) {
    const found = identify(blockElements(fragment));
    const next = new Map<string, BlockInstance>();
    for (const [blockId, element] of found) {
      const known =
        elements.get(blockId) === element && !changed.has(element) ? inputs.get(blockId) : undefined;
      next.set(blockId, known ?? readBlock(blockId, element));
    }
    elements = found;
    inputs = next;
    list = [...next.values()];
    premises = keepEqual(premises, list);
  }

  function follow(events: readonly Y.YEvent<Y.AbstractType<unknown>>[]) {
    const changed = new Set<Y.XmlElement>();
    let rearranged = false;
    for (const event of events) {
      const block = enclosingBlock(event.target);
      if (block) changed.add(block);
      else if (event.target instanceof Y.XmlFragment && holdsBlocks(event)) rearranged = true;
    }
    if (changed.size === 0 && !rearranged) return;
    const before = list;
    readAll(changed);
    const same = before.length === list.length && before.every((block, index) => block === list[index]);
    if (same) list = before;
    else for (const listener of listeners) listener();
  }

  readAll(new Set());
  // observeDeep hands out events of every type below the fragment; `follow` looks at their targets only.
  const observer = follow as (
    events: Y.YEvent<Y.XmlElement | Y.XmlText | Y.XmlFragment | Y.XmlHook>[],
  ) => void;
  fragment.observeDeep(observer);
  return {
    blocks: () => list,
    block: (blockId) => inputs.get(blockId) ?? null,
    element: (blockId) => elements.get(blockId) ?? null,
    premises: () => premises,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy() {
      fragment.unobserveDeep(observer);
      listeners.clear();
    },
  };
}

function keepEqual(
  before: readonly PremisesChoice[],
  blocks: readonly BlockInstance[],
): readonly PremisesChoice[] {
  const next = blocks
    .filter(({ kind }) => kind === "premises")
    .map(({ id, title }) => ({ blockId: id, name: title }));
  const same =
    next.length === before.length &&
    next.every(
      ({ blockId, name }, index) => blockId === before[index]?.blockId && name === before[index].name,
    );
  return same ? before : next;
}

/** Whether children came or went that are blocks or may contain them; a paragraph's text is neither. */
function holdsBlocks(event: Y.YEvent<Y.AbstractType<unknown>>): boolean {
  if (event.changes.deleted.size > 0) return true;
  return [...event.changes.added].some((item) => {
    const content = item.content;
    return content instanceof Y.ContentType && content.type instanceof Y.XmlElement;
  });
}

/** The same names as engine/notebook/read-document.ts gives them: a second block of one id is read apart. */
function identify(found: readonly Y.XmlElement[]): Map<string, Y.XmlElement> {
  const taken = new Set<string>();
  return new Map(
    found.map((element) => [freeId(attributeOf(element, "blockId"), "unnamed", taken), element]),
  );
}

function readBlock(id: string, element: Y.XmlElement): BlockInstance {
  const kind = element.nodeName;
  if (!isKindName(kind)) throw new Error(`${kind} is not a block kind`);
  const { shape } = kindDescriptions[kind];
  const fields = new Map(Object.keys(shape.fields).flatMap((name) => textAt(element, name)));
  const rows = rowElements(element).map((row) => ({
    table: attributeOf(row, "table"),
    id: attributeOf(row, "rowId"),
    order: attributeOf(row, "order"),
    cells: new Map(
      row.toArray().flatMap((cell) => {
        if (!(cell instanceof Y.XmlElement) || cell.nodeName !== cellNode) return [];
        return textAt(cell, "value").map(([, value]) => [attributeOf(cell, "field"), value] as const);
      }),
    ),
  }));
  const problems: Problem[] = [];
  const inputs = readInputs(shape, fields, rows, problems);
  const title = inputs["title"] ?? inputs["name"];
  const standsOn = attributeOf(element, "standsOn");
  return {
    id,
    kind,
    standsOn: standsOn === "" ? null : standsOn,
    inputs,
    title: typeof title === "string" ? title : "",
    problems,
  };
}

/** A named text, or nothing when the element does not have it. */
function textAt(element: Y.XmlElement, name: string): (readonly [string, string])[] {
  return element.getAttribute(name) === undefined ? [] : [[name, attributeOf(element, name)]];
}
