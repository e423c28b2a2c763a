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
  // A code unit takes at most three bytes; the two of a pair take four together.
  const bytes = new Uint8Array(text.length * 3);
  let end = 0;
  const put = (...values: readonly number[]) => {
    for (const value of values) bytes[end++] = value;
  };
  for (const character of text) {
    const point = character.codePointAt(0) ?? 0;
    const code = point >= 0xd800 && point < 0xe000 ? 0xfffd : point;
    if (code < 0x80) bytes[end++] = code;
    else if (code < 0x800) put(0xc0 | (code >> 6), 0x80 | (code & 0x3f));
    else if (code < 0x10000) put(0xe0 | (code >> 12), 0x80 | ((code >> 6) & 0x3f), 0x80 | (code & 0x3f));
    else
      put(
        0xf0 | (code >> 18),
        0x80 | ((code >> 12) & 0x3f),
        0x80 | ((code >> 6) & 0x3f),
        0x80 | (code & 0x3f),
      );
  }
  return bytes.subarray(0, end);
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
  // Canonical JSON of { engine, kind, inputs, standsOn }: inputs never change, and are written once for all premises.
  const known = written.get(inputs);
  const text = known?.kind === kind ? known.text : canonicalJson(keyedInputs(kind, inputs));
  written.set(inputs, { kind, text });
  const [engine, what, below] = [ENGINE_VERSION, kind, standsOn].map(canonicalJson);
  return sha256(`{"engine":${engine},"inputs":${text},"kind":${what},"standsOn":${below}}`);
}
const written = new WeakMap<BlockInputs, { readonly kind: KindName; readonly text: string }>();
