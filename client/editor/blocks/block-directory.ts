/**
 * The blocks of a shared document as their inputs are read: followed by Y events, so that typing prose reads nothing,
 * and an edit of one block gives new inputs for that block alone.
 */
import * as Y from "yjs";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { KindName } from "#engine/kind.ts";
import { attributeOf, blockElements, enclosingBlock, isKindName, orderedRows } from "./block-elements.ts";

export interface RowInputs {
  readonly id: string;
  readonly [column: string]: string;
}

export interface BlockInputs {
  readonly blockId: string;
  readonly kind: KindName;
  /** As chosen; "" leaves it to the only Premises there is. */
  readonly standsOn: string;
  readonly fields: Readonly<Record<string, string>>;
  readonly tables: Readonly<Record<string, readonly RowInputs[]>>;
}

export interface BlockDirectory {
  /** In document order. The array and each entry stay the same object until they change. */
  blocks(): readonly BlockInputs[];
  block(blockId: string): BlockInputs | null;
  /** The element to write to; null once the block is gone. */
  element(blockId: string): Y.XmlElement | null;
  idOf(element: Y.XmlElement): string | null;
  subscribe(listener: () => void): () => void;
  destroy(): void;
}

export function createBlockDirectory(fragment: Y.XmlFragment): BlockDirectory {
  let elements = new Map<string, Y.XmlElement>();
  let ids = new Map<Y.XmlElement, string>();
  let inputs = new Map<string, BlockInputs>();
  let list: readonly BlockInputs[] = [];
  const listeners = new Set<() => void>();

  function readAll(changed: ReadonlySet<Y.XmlElement>) {
    const found = identify(blockElements(fragment));
    const next = new Map<string, BlockInputs>();
    for (const [blockId, element] of found) {
      const known = elements.get(blockId) === element && !changed.has(element) ? inputs.get(blockId) : undefined;
      next.set(blockId, known ?? readBlock(blockId, element));
    }
    elements = found;
    ids = new Map([...found].map(([blockId, element]) => [element, blockId]));
    inputs = next;
    list = [...next.values()];
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
  const observer = follow as (events: Y.YEvent<Y.XmlElement | Y.XmlText | Y.XmlFragment | Y.XmlHook>[]) => void;
  fragment.observeDeep(observer);
  return {
    blocks: () => list,
    block: (blockId) => inputs.get(blockId) ?? null,
    element: (blockId) => elements.get(blockId) ?? null,
    idOf: (element) => ids.get(element) ?? null,
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

/** Whether children came or went that are blocks or may contain them; a paragraph's text is neither. */
function holdsBlocks(event: Y.YEvent<Y.AbstractType<unknown>>): boolean {
  if (event.changes.deleted.size > 0) return true;
  return [...event.changes.added].some((item) => {
    const content = item.content;
    return content instanceof Y.ContentType && content.type instanceof Y.XmlElement;
  });
}

/** First of an id in document order keeps it; a second one, left by two people moving the block at once, is read apart. */
function identify(found: readonly Y.XmlElement[]): Map<string, Y.XmlElement> {
  const byId = new Map<string, Y.XmlElement>();
  for (const element of found) {
    const own = attributeOf(element, "blockId") || "unnamed";
    let blockId = own;
    for (let copy = 2; byId.has(blockId); copy++) blockId = `${own}~${copy}`;
    byId.set(blockId, element);
  }
  return byId;
}

function readBlock(blockId: string, element: Y.XmlElement): BlockInputs {
  const kind = element.nodeName;
  if (!isKindName(kind)) throw new Error(`${kind} is not a block kind`);
  const { shape } = kindDescriptions[kind];
  const fields: Record<string, string> = {};
  for (const [name, spec] of Object.entries(shape.fields)) fields[name] = attributeOf(element, name, spec.initial);
  const tables: Record<string, readonly RowInputs[]> = {};
  for (const [table, columns] of Object.entries(shape.tables)) {
    tables[table] = orderedRows(element, table).map((row) => {
      const values: Record<string, string> = {};
      for (const [column, spec] of Object.entries(columns)) values[column] = spec.initial;
      for (const cell of row.toArray()) {
        if (!(cell instanceof Y.XmlElement)) continue;
        const column = attributeOf(cell, "field");
        const spec = columns[column];
        if (spec) values[column] = attributeOf(cell, "value", spec.initial);
      }
      return { ...values, id: attributeOf(row, "rowId") };
    });
  }
  return { blockId, kind, standsOn: attributeOf(element, "standsOn"), fields, tables };
}
