import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { canonicalJson, resultKey, sha256, type Json } from "#engine/notebook/keys.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { documentOf, row, block, truncationBlock } from "./documents.ts";

function keyOf(json: unknown, standsOn: readonly string[] = []): string {
  const [only] = readDocument(documentOf(json)).blocks;
  return resultKey(only!.kind, only!.inputs, standsOn);
}

describe("SHA-256 of text", () => {
  it("gives the examples of FIPS 180-2 (2002), appendix B", () => {
    expect(sha256("abc")).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    expect(sha256("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq")).toBe(
      "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1",
    );
  });
  it("agrees with the runtime's own for any text", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 300 }), (text) => {
        expect(sha256(text)).toBe(createHash("sha256").update(text, "utf8").digest("hex"));
      }),
    );
  });
  it("takes a lone surrogate as U+FFFD, as encoders do", () => {
    expect(sha256("\ud800x")).toBe(createHash("sha256").update("\ufffdx", "utf8").digest("hex"));
  });
});

describe("canonical JSON", () => {
  it("does not depend on the order in which names were written, and is JSON of the same value", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        const text = canonicalJson(value as Json);
        expect(JSON.parse(text)).toEqual(JSON.parse(JSON.stringify(value)));
        expect(canonicalJson(reversed(value) as Json)).toBe(text);
      }),
    );
  });
  function reversed(value: unknown): unknown {
    if (Array.isArray(value)) return value.map(reversed);
    if (typeof value !== "object" || value === null) return value;
    return Object.fromEntries(
      Object.entries(value)
        .reverse()
        .map(([name, inner]) => [name, reversed(inner)]),
    );
  }
});

describe("the key of a result", () => {
  const key = keyOf(truncationBlock("t"));

  it("is the same for the same block, whatever its id, title, notes and names of rows", () => {
    expect(keyOf(truncationBlock("other", { title: "T", note: "N", quantity: "rate" }))).toBe(key);
  });
  it("is the same whether an initial value is written or missing", () => {
    expect(keyOf(truncationBlock("t", { nu0: "1", reference: "LO" }))).toBe(key);
  });
  it.each([
    ["a field", truncationBlock("t", { q: "0.31" })],
    ["a choice", truncationBlock("t", { first: "from c_0" })],
    ["a unit", truncationBlock("t", { unit: "pb" })],
    [
      "rows",
      block(
        "truncationError",
        { blockId: "t", q: "0.3" },
        row("orders", "a", "a", { order: "0", value: "10" }),
      ),
    ],
  ])("differs with %s", (_, other) => {
    expect(keyOf(other)).not.toBe(key);
  });
  it("differs with the id of a row, since scalars are named after it", () => {
    const one = block("truncationError", { blockId: "t" }, row("orders", "a", "a", { order: "0" }));
    const other = block("truncationError", { blockId: "t" }, row("orders", "b", "a", { order: "0" }));
    expect(keyOf(one)).not.toBe(keyOf(other));
  });
  it("differs with what it stands on", () => {
    expect(keyOf(truncationBlock("t"), ["x"])).not.toBe(key);
  });
});
