/**
 * Reads a file of blocks that somebody else made: what is wrong is said with its place. For the command `evaluate`,
 * POST /api/evaluate and opening a file in a notebook.
 */
import { safeParse, type $ZodIssue } from "zod/v4/core";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { schemaOf } from "#engine/shape.ts";
import { evaluateFile as fileSchema } from "./evaluate-file.ts";

/** Something that keeps a file from being read, and where: "blocks[1].inputs.orders[0].value". */
export interface Complaint {
  readonly place: string;
  readonly message: string;
}
export type FileReading =
  | { readonly ok: true; readonly blocks: readonly BlockInstance[] }
  | { readonly ok: false; readonly complaints: readonly Complaint[] };

/** Nobody reads more, and a hostile file could carry thousands. */
const MOST_COMPLAINTS = 20;

/** @param body the parsed JSON, not trusted */
export function readEvaluateFile(body: unknown): FileReading {
  const file = safeParse(fileSchema, body);
  if (!file.success) return refused(file.error.issues.map((issue) => complain(issue, body, [])));
  const complaints: Complaint[] = [];
  const blocks: BlockInstance[] = [];
  const seen = new Set<string>();
  file.data.blocks.forEach((block, index) => {
    const place = ["blocks", index];
    if (seen.has(block.id))
      complaints.push({
        place: placeOf([...place, "id"]),
        message: `“${block.id}” names another block already`,
      });
    seen.add(block.id);
    const { shape } = kindDescriptions[block.kind];
    const typed = withRowIds(block.inputs, Object.keys(shape.tables));
    const inputs = safeParse(schemaOf(shape), typed);
    if (!inputs.success) {
      complaints.push(...inputs.error.issues.map((issue) => complain(issue, typed, [...place, "inputs"])));
      return;
    }
    complaints.push(...repeatedRowIds(inputs.data, Object.keys(shape.tables), [...place, "inputs"]));
    blocks.push({
      id: block.id,
      kind: block.kind,
      standsOn: block.standsOn ?? null,
      inputs: inputs.data,
      title: "",
      problems: [],
    });
  });
  if (complaints.length > 0) return refused(complaints);

  return { ok: true, blocks };
}

function refused(complaints: readonly Complaint[]): FileReading {
  return { ok: false, complaints: complaints.slice(0, MOST_COMPLAINTS) };
}

/** Rows written by hand may leave their ids out: they are then "terms1", "terms2", … by table and place. */
function withRowIds(
  inputs: Readonly<Record<string, unknown>>,
  tables: readonly string[],
): Record<string, unknown> {
  const complete: Record<string, unknown> = { ...inputs };
  for (const table of tables) {
    const rows = inputs[table];
    if (!Array.isArray(rows)) continue;
    complete[table] = rows.map((row: unknown, index) =>
      typeof row === "object" && row !== null && !("id" in row)
        ? { id: `${table}${index + 1}`, ...row }
        : row,
    );
  }
  return complete;
}

/** Scalars are named by row id and quantity, so a row id may occur once in a block, whatever the table. */
function repeatedRowIds(
  inputs: Readonly<Record<string, unknown>>,
  tables: readonly string[],
  before: readonly PropertyKey[],
): Complaint[] {
  const seen = new Set<string>();
  return tables.flatMap((table) =>
    // The schema has just made every table a list of rows with ids.
    (inputs[table] as readonly { readonly id: string }[]).flatMap(({ id }, index) => {
      const isRepeated = seen.has(id);
      seen.add(id);
      if (!isRepeated) return [];
      return [
        {
          place: placeOf([...before, table, index, "id"]),
          message: `“${id}” names another row of this block already`,
        },
      ];
    }),
  );
}

/** ["blocks", 1, "inputs", "orders", 0] → "blocks[1].inputs.orders[0]". */
function placeOf(path: readonly PropertyKey[]): string {
  const text = path.map((part) => (typeof part === "number" ? `[${part}]` : `.${String(part)}`)).join("");
  return text === "" ? "the file" : text.replace(/^\./, "");
}

function complain(issue: $ZodIssue, input: unknown, before: readonly PropertyKey[]): Complaint {
  const given = issue.path.reduce<unknown>(
    (value, part) => (value as Record<PropertyKey, unknown> | undefined)?.[part],
    input,
  ); // zod walked this path
  return { place: placeOf([...before, ...issue.path]), message: wordsOf(issue, given) };
}

/** The contract is written with zod/mini, which carries no messages; these are ours. */
function wordsOf(issue: $ZodIssue, given: unknown): string {
  switch (issue.code) {
    case "invalid_type":
    case "invalid_union":
      if (given === undefined) return "is missing";
      return issue.code === "invalid_type"
        ? `must be ${articled(issue.expected)}`
        : "must be a text or a number";
    case "invalid_value": {
      const allowed = issue.values.map((value) => `“${String(value)}”`).join(", ");
      const quoted = typeof given === "string" ? ` is “${given.slice(0, 80)}” but` : "";
      return given === undefined
        ? `is missing: it must be ${allowed}`
        : `${quoted} must be ${issue.values.length > 1 ? "one of " : ""}${allowed}`.trim();
    }
    case "unrecognized_keys":
      return `has what is not known here: ${issue.keys.map((key) => `“${key.slice(0, 80)}”`).join(", ")}`;
    case "too_big":
      return `has more than ${issue.maximum} ${issue.origin === "string" ? "characters" : "entries"}`;
    case "too_small":
      return issue.minimum === 1 ? "must not be empty" : `needs at least ${issue.minimum}`;
    case "custom":
      return issue.message;
    default:
      return "is not valid";
  }
}

function articled(type: string): string {
  const words: Readonly<Record<string, string>> = {
    array: "a list",
    object: "an object",
    record: "an object",
    string: "a text",
  };
  return words[type] ?? `a ${type}`;
}
