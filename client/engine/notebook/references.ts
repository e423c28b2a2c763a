/** What a block needs beside its inputs: the other blocks that its reference fields name, and perhaps much time. */
import { kindDescriptions } from "../descriptions.ts";
import type { InputPath } from "../evaluation.ts";
import type { KindName } from "../kind.ts";
import type { FieldSpec, InputsOf, Shape } from "../shape.ts";
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

/** The blocks a block is computed from, itself included, with all Premises, since choosing among them looks at all. */
export function neededFor(blockId: string, blocks: readonly BlockInstance[]): readonly BlockInstance[] {
  const byId = new Map(blocks.map((block) => [block.id, block]));
  const needed = new Set<string>();
  const waiting = [blockId];
  for (let id = waiting.pop(); id !== undefined; id = waiting.pop()) {
    const block = byId.get(id);
    if (!block || needed.has(id)) continue;
    needed.add(id);
    waiting.push(...referencesOf(block).map((reference) => reference.blockId));
    if (block.standsOn !== null) waiting.push(block.standsOn);
  }
  return blocks.filter(({ id, kind }) => kind === "premises" || needed.has(id));
}

/** Whether a block may take seconds: see `BlockDescription.long`. */
export function isLong({ kind, inputs }: Pick<BlockInstance, "kind" | "inputs">): boolean {
  const { long } = kindDescriptions[kind];
  return typeof long === "function" ? long(inputs) : long === true;
}

/** Inputs of a block instance have been fitted to the shape of its kind, which the type cannot say for all kinds at once. */
export function fittedTo(inputs: BlockInputs): InputsOf<Shape> {
  return inputs as unknown as InputsOf<Shape>;
}
