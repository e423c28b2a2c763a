/** Keys of results: the same key means the same engine, inputs and premises, and so the same result. */
import { digest } from "lib0/hash/sha256";
import { ENGINE_VERSION } from "../evaluation.ts";
import { kindDescriptions } from "../descriptions.ts";
import type { KindName } from "../kind.ts";
import type { BlockInputs } from "./block-instance.ts";

export type Json = string | number | boolean | null | readonly Json[] | { readonly [name: string]: Json };

/** JSON with the names of every object in code-unit order and no spaces, so that equal values are equal text. */
export function canonicalJson(value: Json): string {
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  if (isList(value)) return `[${value.map(canonicalJson).join(",")}]`;
  const names = Object.keys(value).sort();
  return `{${names.map((name) => `${JSON.stringify(name)}:${canonicalJson(value[name] ?? null)}`).join(",")}}`;
}
function isList(value: Json): value is readonly Json[] {
  return Array.isArray(value);
}

/** SHA-256 of the text in UTF-8, as 64 hexadecimal digits. */
export function sha256(text: string): string {
  return [...digest(utf8(text))].map((byte) => byte.toString(16).padStart(2, "0")).join("");
}

/** UTF-8 by hand, since the engine has no API of a browser or of Node.js. A lone surrogate becomes U+FFFD. */
function utf8(text: string): Uint8Array {
  const bytes: number[] = [];
  for (const character of text) {
    const point = character.codePointAt(0) ?? 0;
    const code = point >= 0xd800 && point < 0xe000 ? 0xfffd : point;
    if (code < 0x80) bytes.push(code);
    else if (code < 0x800) bytes.push(0xc0 | (code >> 6), 0x80 | (code & 0x3f));
    else if (code < 0x10000)
      bytes.push(0xe0 | (code >> 12), 0x80 | ((code >> 6) & 0x3f), 0x80 | (code & 0x3f));
    else
      bytes.push(
        0xf0 | (code >> 18),
        0x80 | ((code >> 12) & 0x3f),
        0x80 | ((code >> 6) & 0x3f),
        0x80 | (code & 0x3f),
      );
  }
  return Uint8Array.from(bytes);
}

/** Only what a result may depend on: fields that are keyed, and rows in order with their ids, since scalars name them. */
function keyedInputs(kind: KindName, inputs: BlockInputs): Json {
  const { shape } = kindDescriptions[kind];
  const keyed: Record<string, Json> = {};
  for (const [name, spec] of Object.entries(shape.fields)) {
    const value = inputs[name];
    if (spec.keyed && typeof value === "string") keyed[name] = value;
  }
  for (const [table, columns] of Object.entries(shape.tables)) {
    const rows = inputs[table];
    if (typeof rows !== "object") continue;
    const names = Object.keys(columns).filter((column) => columns[column]?.keyed);
    keyed[table] = rows.map((row) =>
      Object.fromEntries(["id", ...names].map((name) => [name, row[name] ?? ""])),
    );
  }
  return keyed;
}

/**
 * Key of a block's result. `standsOn` holds the keys of the results it depends on, or says why there is none.
 * Titles and notes never enter, nor does the order in which fields were written.
 */
export function resultKey(kind: KindName, inputs: BlockInputs, standsOn: readonly string[]): string {
  return sha256(canonicalJson({ engine: ENGINE_VERSION, kind, inputs: keyedInputs(kind, inputs), standsOn }));
}
