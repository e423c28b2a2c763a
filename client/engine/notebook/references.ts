/** The other blocks whose results a block uses, as its reference fields name them. */
import { kindDescriptions } from "../descriptions.ts";
import type { InputPath } from "../evaluation.ts";
import type { KindName } from "../kind.ts";
import type { FieldSpec } from "../shape.ts";
import type { BlockInputs, BlockInstance } from "./block-instance.ts";

export interface Reference {
  readonly blockId: string;
  readonly path: InputPath;
  readonly allowed: readonly string[] | "any";
}

/** In the order of the shape; a block named twice is there twice, once for each place. */
export function referencesOf({ kind, inputs }: Pick<BlockInstance, "kind" | "inputs">): readonly Reference[] {
  const known = read.get(inputs);
  if (known) return known;
  const { shape } = kindDescriptions[kind];
  const found: Reference[] = [];
  for (const [name, spec] of Object.entries(shape.fields)) note(found, spec, inputs[name], [name]);
  for (const [table, columns] of Object.entries(shape.tables)) {
    const rows = inputs[table];
    const names = Object.keys(columns).filter((column) => columns[column]?.refersTo);
    if (typeof rows !== "object" || names.length === 0) continue;
    for (const row of rows)
      for (const column of names) note(found, columns[column], row[column], [table, row.id, column]);
  }
  read.set(inputs, found);
  return found;
}
/** Inputs never change, and belong to one kind. */
const read = new WeakMap<BlockInputs, readonly Reference[]>();

function note(found: Reference[], spec: FieldSpec | undefined, value: unknown, path: InputPath): void {
  if (spec?.refersTo && typeof value === "string" && value !== "")
    found.push({ blockId: value, path, allowed: spec.refersTo });
}

export function allows({ allowed }: Reference, kind: KindName): boolean {
  return allowed === "any" || allowed.includes(kind);
}
