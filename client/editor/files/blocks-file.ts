/** The blocks of a notebook as the file that `evaluate` reads, and back into a notebook. */
import type { JSONContent } from "@tiptap/core";
import { EVALUATE_FORMAT, type EvaluateFile } from "#contract/evaluate-file.ts";
import { locateJsonError } from "#contract/locate-json-error.ts";
import { readEvaluateFile } from "#contract/read-evaluate-file.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import type { FieldSpec } from "#engine/shape.ts";
import { cellNode, rowNode } from "#schema/block-structure.ts";
import { evenOrderKeys } from "../blocks/order-key.ts";

export function fileOf(blocks: readonly BlockInstance[]): EvaluateFile {
  return {
    format: EVALUATE_FORMAT,
    blocks: blocks.map(({ id, kind, standsOn, inputs }) => ({
      id,
      kind,
      ...(standsOn === null ? {} : { standsOn }),
      inputs,
    })),
  };
}

export type FileText =
  | { readonly ok: true; readonly blocks: readonly BlockInstance[] }
  /** One sentence for each thing that is wrong. */
  | { readonly ok: false; readonly sentences: readonly string[] };

export function readFileText(text: string): FileText {
  const fault = locateJsonError(text);
  if (fault)
    return {
      ok: false,
      sentences: [`It is no JSON: line ${fault.line}, column ${fault.column} cannot stand there.`],
    };
  const reading = readEvaluateFile(JSON.parse(text));
  if (reading.ok) return reading;
  return { ok: false, sentences: reading.complaints.map(({ place, message }) => `${place} ${message}.`) };
}

/** Nodes for the document, with ids of their own: a file opened twice gives two sets of blocks that know each other. */
export function nodesOf(blocks: readonly BlockInstance[], newId: () => string): readonly JSONContent[] {
  const ids = new Map(blocks.map(({ id }) => [id, newId()]));
  return blocks.map(({ id, kind, standsOn, inputs }) => {
    const { shape } = kindDescriptions[kind];
    const fields = Object.entries(shape.fields).map(([name, spec]) => {
      const value = inputs[name];
      return [name, renewed(spec, typeof value === "string" ? value : spec.initial, ids)] as const;
    });
    const rows = Object.entries(shape.tables).flatMap(([table, columns]) => {
      const lines = inputs[table];
      if (typeof lines !== "object") return [];
      const keys = evenOrderKeys(lines.length);
      return lines.map((line, index) => ({
        type: rowNode,
        attrs: { table, rowId: line.id, order: keys[index] ?? "" },
        content: Object.entries(columns).map(([field, spec]) => ({
          type: cellNode,
          attrs: { field, value: renewed(spec, line[field] ?? spec.initial, ids) },
        })),
      }));
    });
    const attrs = {
      blockId: ids.get(id) ?? newId(),
      standsOn: standsOn === null ? "" : (ids.get(standsOn) ?? standsOn),
      ...Object.fromEntries(fields),
    };
    return { type: kind, attrs, ...(rows.length === 0 ? {} : { content: rows }) };
  });
}

function renewed(spec: FieldSpec, value: string, ids: ReadonlyMap<string, string>): string {
  return spec.refersTo ? (ids.get(value) ?? value) : value;
}
