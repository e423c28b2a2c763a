/** Blocks, rows and cells as they sit in the shared Y document. See schema/block-structure.ts for the shape. */
import * as Y from "yjs";
import { kindNames, type KindName } from "#engine/kind.ts";
import { freeId } from "#engine/notebook/free-id.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";

const names: ReadonlySet<string> = new Set(kindNames);

export function isKindName(name: string): name is KindName {
  return names.has(name);
}

export function isBlockElement(node: unknown): node is Y.XmlElement {
  return node instanceof Y.XmlElement && isKindName(node.nodeName);
}

/** An attribute as text; what is missing or not text gives the fallback. */
export function attributeOf(element: Y.XmlElement, name: string, fallback = ""): string {
  // y-tiptap stores attributes as they are; Yjs types them all as string.
  const value: unknown = element.getAttribute(name);
  return typeof value === "string" ? value : fallback;
}

/** Every block in document order, also those inside quotations, lists and tables. */
export function blockElements(parent: Y.XmlFragment): Y.XmlElement[] {
  return parent.toArray().flatMap((child) => {
    if (!(child instanceof Y.XmlElement)) return [];
    return isBlockElement(child) ? [child] : blockElements(child);
  });
}

export function rowElements(block: Y.XmlElement): Y.XmlElement[] {
  return block
    .toArray()
    .filter((child): child is Y.XmlElement => child instanceof Y.XmlElement && child.nodeName === rowNode);
}

/** The cell that counts for a column: the last of them, should a merge have left two. */
export function cellElement(row: Y.XmlElement, column: string): Y.XmlElement | null {
  return (
    row
      .toArray()
      .filter(
        (child): child is Y.XmlElement =>
          child instanceof Y.XmlElement &&
          child.nodeName === cellNode &&
          attributeOf(child, "field") === column,
      )
      .at(-1) ?? null
  );
}

export interface RowElement {
  /** As read: of two rows with one id the first in the document keeps it. */
  readonly id: string;
  readonly order: string;
  readonly element: Y.XmlElement;
}

/** Rows of one table in reading order, under the ids that engine/notebook/read-inputs.ts reads them by. */
export function orderedRows(block: Y.XmlElement, table: string): RowElement[] {
  const taken = new Set<string>();
  return rowElements(block)
    .filter((element) => attributeOf(element, "table") === table)
    .map((element) => ({
      id: freeId(attributeOf(element, "rowId"), "row", taken),
      order: attributeOf(element, "order"),
      element,
    }))
    .sort((a, b) => compareText(a.order, b.order) || compareText(a.id, b.id));
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** The block that an element or text lies in, or is. */
export function enclosingBlock(type: Y.AbstractType<unknown>): Y.XmlElement | null {
  let current: Y.AbstractType<unknown> | null = type;
  while (current !== null) {
    if (isBlockElement(current)) return current;
    // Yjs types the parent of a type loosely; it is an AbstractType or null.
    current = current.parent as Y.AbstractType<unknown> | null;
  }
  return null;
}
