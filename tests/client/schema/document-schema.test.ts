// @vitest-environment node
import { describe, expect, it } from "vitest";
import type { Attrs, MarkType, NodeType } from "@tiptap/pm/model";
import { kindDescriptions } from "#engine/descriptions.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";

/** What decides whether an editor keeps or drops what it reads: names, content, attributes and their defaults. */
function shapeOfType(type: NodeType | MarkType) {
  const attributes = Object.entries(type.spec.attrs ?? {}).map(([name, spec]) => {
    // ProseMirror types an attribute's default as any; it is only written out here.
    const initial: unknown = (spec as Attrs)["default"];
    return [name, initial ?? null] as const;
  });
  const { group, inclusive, excludes } = type.spec;
  const content: unknown = "content" in type.spec ? type.spec.content : undefined;
  const atom: unknown = "atom" in type.spec ? type.spec.atom : undefined;
  const marks: unknown = "marks" in type.spec ? type.spec.marks : undefined;
  return { content, group, atom, marks, inclusive, excludes, attributes: Object.fromEntries(attributes) };
}

describe("the document's schema", () => {
  it("loads where there is no DOM", () => {
    expect(typeof document).toBe("undefined");
    expect(Object.keys(documentSchema.nodes)).toContain("paragraph");
  });

  it("changes only together with SCHEMA_VERSION: raise it in version.ts, and a new record is written", async () => {
    const shape = {
      nodes: Object.fromEntries(
        Object.entries(documentSchema.nodes).map(([name, type]) => [name, shapeOfType(type)]),
      ),
      marks: Object.fromEntries(
        Object.entries(documentSchema.marks).map(([name, type]) => [name, shapeOfType(type)]),
      ),
    };
    await expect(`${JSON.stringify(shape, null, 2)}\n`).toMatchFileSnapshot(
      `schema-${String(SCHEMA_VERSION)}.json`,
    );
  });

  it("has a node per block kind whose only content is rows, so that no merge makes it invalid", () => {
    for (const kind of Object.values(kindDescriptions)) {
      const type = documentSchema.nodes[kind.kind];
      expect(type?.spec.content, kind.kind).toBe("row*");
      expect(type?.isAtom).toBe(true);
      const names = Object.keys(type?.spec.attrs ?? {});
      expect(names).toEqual(["blockId", "standsOn", ...Object.keys(kind.shape.fields)]);
    }
  });

  it("gives every block, row and cell attribute a text default", () => {
    for (const name of [
      ...Object.keys(kindDescriptions),
      "row",
      "cell",
      "pin",
      "inlineMath",
      "displayMath",
    ]) {
      for (const initial of Object.values(documentSchema.nodes[name]?.spec.attrs ?? {})) {
        expect(typeof initial.default, name).toBe("string");
      }
    }
  });

  it("has no fixed sequence of children anywhere, and a repeated child only where the empty parent means nothing", () => {
    const sequences = Object.entries(documentSchema.nodes).filter(([, type]) =>
      /\S\s+\S/.test((type.spec.content ?? "").replace(/\([^)]*\)/g, "group")),
    );
    expect(sequences.map(([name]) => name)).toEqual([]);
  });
});
