/** A small vocabulary to write a notebook's document in code: for the demonstration and for tests. */
import type { KindName } from "#engine/kind.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";

export interface DocumentNode {
  readonly type: string;
  readonly attrs?: Readonly<Record<string, unknown>>;
  readonly content?: readonly DocumentNode[];
  readonly text?: string;
  readonly marks?: readonly { readonly type: string }[];
}
export type Row = Readonly<Record<string, string>> & { readonly id: string };
export interface BlockInputs {
  readonly fields?: Readonly<Record<string, string>>;
  readonly tables?: Readonly<Record<string, readonly Row[]>>;
}

/** Plain text with `$…$` for inline mathematics. */
export function sentence(text: string): DocumentNode[] {
  return text
    .split(/(\$[^$]+\$)/)
    .filter((part) => part !== "")
    .map((part) =>
      part.startsWith("$") && part.length > 2
        ? { type: "inlineMath", attrs: { latex: part.slice(1, -1) } }
        : { type: "text", text: part },
    );
}

/** Each part is text (with `$…$`) or a ready inline node such as a pin. */
export function paragraph(...parts: readonly (string | DocumentNode)[]): DocumentNode {
  return {
    type: "paragraph",
    content: parts.flatMap((part) => (typeof part === "string" ? sentence(part) : [part])),
  };
}

export function heading(level: 1 | 2 | 3, text: string): DocumentNode {
  return { type: "heading", attrs: { level }, content: sentence(text) };
}

export function displayed(id: string, latex: string): DocumentNode {
  return { type: "displayMath", attrs: { id, latex, label: "" } };
}

/** Order keys compare as text; four digits leave room for every row of a hand-written table. */
function orderKey(index: number): string {
  return `a${String(index).padStart(4, "0")}`;
}

export function block(
  kind: KindName,
  blockId: string,
  standsOn: string,
  { fields = {}, tables = {} }: BlockInputs,
): DocumentNode {
  const rows = Object.entries(tables).flatMap(([table, entries]) =>
    entries.map(({ id, ...values }, index) => ({
      type: rowNode,
      attrs: { table, rowId: id, order: orderKey(index) },
      content: Object.entries(values).map(([field, value]) => ({ type: cellNode, attrs: { field, value } })),
    })),
  );
  return { type: kind, attrs: { blockId, standsOn, ...fields }, content: rows };
}
