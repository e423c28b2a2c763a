/** The inputs of a block in a few phrases: what is filled in, and long tables by their first rows. */
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance, BlockRow } from "#engine/notebook/block-instance.ts";
import { premisesLine } from "#engine/notebook/summary.ts";
import type { Columns } from "#engine/shape.ts";

const MOST_ROWS = 4;

/** As they are written in the forms, where that is not the plain name. */
const names: Readonly<Record<string, string>> = {
  q: "Q",
  nu0: "ν₀",
  tau0: "τ₀",
  first: "coefficients",
  maxLoops: "loops at most",
  maxLegs: "legs at most",
  maxOrder: "order at most",
  cap: "orders looked at",
  leftOut: "graphs left out, with",
  toldLegs: "legs of one field",
  furry: "what charge conjugation cancels left out",
};

/** What comes before the value of a column, where the value alone would be a riddle. */
const signs: Readonly<Record<string, string>> = {
  count: "× ",
  natural: "ĝ = ",
  assigned: "size ",
  dimension: "dimension ",
};

/** The premises that a block stands on: their line, and the scales that its numbers are made of. */
export function premisesInShort(premises: BlockInstance): readonly string[] {
  const scales = inputsInShort(premises, null).filter((phrase) => phrase.startsWith("scales:"));
  return [premisesLine([premises]), ...scales];
}

/** @param premises what the block stands on, whose terms some tables name by row */
export function inputsInShort(block: BlockInstance, premises: BlockInstance | null): readonly string[] {
  const { shape } = kindDescriptions[block.kind];
  const phrases: string[] = [];
  for (const [name, spec] of Object.entries(shape.fields)) {
    const value = block.inputs[name];
    if (typeof value !== "string" || !spec.keyed || value.trim() === "") continue;
    // A choice nobody changed says nothing.
    if ((spec.choices && value === spec.initial) || !isAsked(block, name)) continue;
    phrases.push(`${names[name] ?? name}: ${value}`);
  }
  for (const [name, columns] of Object.entries(shape.tables)) {
    const rows = block.inputs[name];
    if (typeof rows !== "object") continue;
    const filled = rows.map((row) => rowInShort(row, columns, premises)).filter((text) => text !== "");
    if (filled.length > 0) phrases.push(`${names[name] ?? name}: ${firstOf(filled)}`);
  }
  return phrases;
}

/** Fields that the block does not read as its other choices stand. */
function isAsked({ kind, inputs }: BlockInstance, field: string): boolean {
  if (kind === "premises") {
    const anisotropic = inputs["geometry"] === "anisotropic";
    if (field === "d") return !anisotropic;
    if (field === "D" || field === "z") return anisotropic;
  }
  if (kind === "divergence" && field.startsWith("max")) return inputs["mode"] === "whole theory";
  return true;
}

function rowInShort(row: BlockRow, columns: Columns, premises: BlockInstance | null): string {
  return Object.entries(columns)
    .flatMap(([column, spec]) => {
      const value = (row[column] ?? "").trim();
      if (!spec.keyed || value === "" || (spec.choices && value === spec.initial)) return [];
      return [(signs[column] ?? "") + (column === "term" ? (termOf(premises, value) ?? value) : value)];
    })
    .join("order" in columns ? ": " : " ");
}

/** Graphs name a term of the premises by its row. */
function termOf(premises: BlockInstance | null, rowId: string): string | null {
  const terms = premises?.inputs["terms"];
  return (typeof terms === "object" && terms.find(({ id }) => id === rowId)?.["term"]) || null;
}

function firstOf(rows: readonly string[]): string {
  const shown = rows.slice(0, MOST_ROWS).join("; ");
  return rows.length > MOST_ROWS ? `${shown}; and ${rows.length - MOST_ROWS} more` : shown;
}
