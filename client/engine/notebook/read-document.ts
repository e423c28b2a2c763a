/** Reads the blocks and pins out of a document in ProseMirror's JSON. Total: whatever the JSON, nothing is thrown. */
import type { Problem } from "../evaluation.ts";
import { kindDescriptions } from "../descriptions.ts";
import { kindNames, type KindName } from "../kind.ts";
import type { BlockInstance, PinInstance } from "./block-instance.ts";
import { freeId } from "./free-id.ts";
import { readInputs, type RawRow } from "./read-inputs.ts";

/** The names of nodes in the document, as schema/block-structure.ts gives them; a test holds the two together. */
export const documentNodes = { row: "row", cell: "cell", pin: "pin" } as const;

export interface DocumentReading {
  /** In document order. */
  readonly blocks: readonly BlockInstance[];
  readonly pins: readonly PinInstance[];
  /** Nodes that carry a block id but whose kind this version does not know: they stay in the document, uncomputed. */
  readonly unknown: readonly { readonly blockId: string; readonly type: string }[];
}

interface DocumentNode {
  readonly type: string;
  readonly attrs: Readonly<Record<string, unknown>>;
  readonly content: readonly unknown[];
}

function nodeOf(json: unknown): DocumentNode | null {
  if (typeof json !== "object" || json === null) return null;
  const { type, attrs, content } = json as Record<string, unknown>; // any object may be read by name
  if (typeof type !== "string") return null;
  const isRecord = typeof attrs === "object" && attrs !== null && !Array.isArray(attrs);
  return {
    type,
    attrs: isRecord ? (attrs as Record<string, unknown>) : {}, // just checked
    content: Array.isArray(content) ? content : [],
  };
}

/** Text of an attribute; numbers are taken as text, anything else counts as absent. */
function textOf(value: unknown): string | undefined {
  if (typeof value === "string") return value;
  return typeof value === "number" && Number.isFinite(value) ? String(value) : undefined;
}

function isKindName(type: string): type is KindName {
  return (kindNames as readonly string[]).includes(type);
}

/**
 * Of two blocks with one id the first in document order keeps it; the others are read under a derived id, "b~2", so
 * that nothing is lost and nothing is computed twice under one name. A block without an id is read as "unnamed~1".
 *
 * @param json the document, `{ type: "doc", content: […] }`
 */
export function readDocument(json: unknown): DocumentReading {
  const blocks: BlockInstance[] = [];
  const pins: PinInstance[] = [];
  const unknown: { blockId: string; type: string }[] = [];
  const taken = new Set<string>();
  // An explicit stack: a document nested deeper than the call stack must not throw either.
  const waiting: unknown[] = [json];
  while (waiting.length > 0) {
    const node = nodeOf(waiting.pop());
    if (!node) continue;
    if (isKindName(node.type)) {
      blocks.push(readBlock(node, node.type, freeId(textOf(node.attrs["blockId"]) ?? "", "unnamed", taken)));
      continue;
    }
    if (node.type === documentNodes.pin) pins.push(readPin(node));
    const blockId = textOf(node.attrs["blockId"]);
    if (blockId !== undefined && node.type !== documentNodes.pin) unknown.push({ blockId, type: node.type });
    for (let index = node.content.length - 1; index >= 0; index -= 1) waiting.push(node.content[index]);
  }
  return { blocks, pins, unknown };
}

function readBlock(node: DocumentNode, kind: KindName, id: string): BlockInstance {
  const rows: RawRow[] = [];
  const problems: Problem[] = [];
  for (const child of node.content) {
    const row = nodeOf(child);
    if (row?.type === documentNodes.row) rows.push(readRow(row));
  }
  const fields = new Map<string, string>();
  for (const [name, value] of Object.entries(node.attrs)) {
    const text = textOf(value);
    if (text !== undefined) fields.set(name, text);
  }
  const inputs = readInputs(kindDescriptions[kind].shape, fields, rows, problems);
  const title = inputs["title"] ?? inputs["name"];
  const standsOn = fields.get("standsOn") ?? "";
  return {
    id,
    kind,
    standsOn: standsOn === "" ? null : standsOn,
    inputs,
    title: typeof title === "string" ? title : "",
    problems,
  };
}

function readRow(row: DocumentNode): RawRow {
  const cells = new Map<string, string>();
  for (const child of row.content) {
    const cell = nodeOf(child);
    const field = cell?.type === documentNodes.cell ? textOf(cell.attrs["field"]) : undefined;
    const value = textOf(cell?.attrs["value"]);
    // Of two cells for one field, which two people may have made at once, the last in the row counts.
    if (field !== undefined && value !== undefined) cells.set(field, value);
  }
  return {
    table: textOf(row.attrs["table"]) ?? "",
    id: textOf(row.attrs["rowId"]) ?? "",
    order: textOf(row.attrs["order"]) ?? "",
    cells,
  };
}

function readPin({ attrs }: DocumentNode): PinInstance {
  const text = (name: string) => textOf(attrs[name]) ?? "";
  return {
    pinId: text("pinId"),
    blockId: text("blockId"),
    scalar: text("scalar"),
    resultKey: text("resultKey"),
    value: text("value"),
    text: text("text"),
    format: text("format"),
  };
}
