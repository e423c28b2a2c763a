/** Rewrites the uses of a symbol: in every block that computes from its premises, and in the prose's formulas. */
import * as Y from "yjs";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { choosePremises } from "#engine/notebook/choose-premises.ts";
import type { FieldSpec } from "#engine/shape.ts";
import type { UseCounts, UseRewriting } from "../../blocks/block-handle.ts";
import { attributeOf, isKindName } from "./block-elements.ts";
import type { BlockWorld } from "./block-world.ts";
import { changeInputs, writeCell, writeField } from "./block-writes.ts";

/** Counts what would change, or changes it as one step of the person's history. */
export function rewriteUses(
  world: BlockWorld,
  premisesId: string,
  rewriting: UseRewriting,
  apply: boolean,
): UseCounts {
  const { directory, session } = world;
  const premises = directory.element(premisesId);
  if (!premises || session.state().readOnly) return { entries: 0, formulas: 0 };
  const writes: (() => void)[] = [];
  for (const block of directory.blocks()) {
    if (block.id === premisesId || premisesOf(block, directory.blocks()) === premisesId)
      noteEntries(world, block, rewriting, writes);
  }
  const entries = writes.length;
  noteFormulas(session.fragment, rewriting.latex, writes);
  if (apply) changeInputs(premises, () => writes.forEach((write) => write()));
  return { entries, formulas: writes.length - entries };
}

function premisesOf(block: BlockInstance, blocks: readonly BlockInstance[]): string | null {
  const choice = choosePremises(block, blocks);
  return "found" in choice ? (choice.found?.id ?? null) : null;
}

/** Typed notation only: no choices, no names of blocks, no titles and notes, not the declaration itself. */
function holdsNotation(spec: FieldSpec | undefined, name: string): boolean {
  return spec?.keyed === true && !spec.choices && !spec.refersTo && name !== "symbol";
}

function noteEntries(
  { directory }: BlockWorld,
  { id, kind, inputs }: BlockInstance,
  { term }: UseRewriting,
  writes: (() => void)[],
): void {
  const element = directory.element(id);
  if (!element) return;
  const { shape } = kindDescriptions[kind];
  for (const [name, value] of Object.entries(inputs)) {
    if (typeof value === "string") {
      const renamed = term(value);
      if (renamed !== value && holdsNotation(shape.fields[name], name))
        writes.push(() => writeField(element, name, renamed));
      continue;
    }
    for (const row of value) {
      for (const [column, spec] of Object.entries(shape.tables[name] ?? {})) {
        const typed = row[column] ?? "";
        const renamed = term(typed);
        if (renamed !== typed && holdsNotation(spec, column))
          writes.push(() => writeCell(element, name, row.id, column, renamed));
      }
    }
  }
}

function noteFormulas(parent: Y.XmlFragment, latex: UseRewriting["latex"], writes: (() => void)[]): void {
  for (const child of parent.toArray()) {
    if (!(child instanceof Y.XmlElement)) continue;
    const element: Y.XmlElement = child;
    if (isKindName(element.nodeName)) continue;
    const source = attributeOf(element, "latex");
    const renamed = latex(source);
    if (renamed !== source) writes.push(() => element.setAttribute("latex", renamed));
    noteFormulas(element, latex, writes);
  }
}
