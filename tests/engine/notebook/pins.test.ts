import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Evaluation, Scalar, ScalarValue } from "#engine/evaluation.ts";
import { isSameScalar, pinStatus, readPinValue } from "#engine/notebook/pins.ts";
import { countPins, premisesLine } from "#engine/notebook/summary.ts";
import { readDocument } from "#engine/notebook/read-document.ts";
import { block, documentOf, premisesBlock, row, truncationBlock } from "./documents.ts";

function evaluationOf(...scalars: Scalar[]): Evaluation {
  return { value: {}, problems: [], notices: [], scalars, working: [] };
}
const size: ScalarValue = { type: "number", value: 0.109375, sigma: 0.0137, unit: "GeV" };
const order: ScalarValue = { type: "exact", text: "3" };
const evaluations = new Map<string, Evaluation>([
  [
    "b",
    evaluationOf({ id: "size", label: "size", value: size }, { id: "order", label: "order", value: order }),
  ],
  [
    "bad",
    {
      value: null,
      problems: [{ code: "internal", path: [], facts: {} }],
      notices: [],
      scalars: [],
      working: [],
    },
  ],
]);
function pinOf(blockId: string, scalar: string, value: unknown) {
  const json = typeof value === "string" ? value : JSON.stringify(value);
  return { pinId: "p", blockId, scalar, resultKey: "", value: json, text: "", format: "" };
}

describe("a pin", () => {
  it.each([
    ["holds", pinOf("b", "size", size)],
    ["holds", pinOf("b", "order", order)],
    // The thirteenth digit is none of the engine's.
    ["holds", pinOf("b", "size", { ...size, value: 0.1093750000000001 })],
    ["moved", pinOf("b", "size", { ...size, value: 0.109375000001 })],
    ["moved", pinOf("b", "size", { ...size, sigma: 0.02 })],
    ["moved", pinOf("b", "size", { ...size, unit: "TeV" })],
    ["moved", pinOf("b", "order", { type: "exact", text: "4" })],
    ["moved", pinOf("b", "order", { type: "word", text: "3" })],
    ["moved", pinOf("b", "order", { type: "number", value: 3 })],
    ["loose", pinOf("b", "other", order)],
    ["loose", pinOf("gone", "order", order)],
    ["loose", pinOf("bad", "order", order)],
  ])("%s: %j", (status, pin) => {
    expect(pinStatus(pin, evaluations).status).toBe(status);
  });

  it("says why it is loose", () => {
    const why = (blockId: string, scalar: string) => {
      const found = pinStatus(pinOf(blockId, scalar, order), evaluations);
      return found.status === "loose" ? found.why : null;
    };
    expect([why("b", "other"), why("gone", "order"), why("bad", "order")]).toEqual([
      "scalar-gone",
      "block-gone",
      "block-in-error",
    ]);
  });

  it("that moved carries both values", () => {
    const was: ScalarValue = { type: "exact", text: "4" };
    expect(pinStatus(pinOf("b", "order", was), evaluations)).toEqual({
      status: "moved",
      was,
      now: { id: "order", label: "order", value: order },
    });
  });

  it.each([
    "",
    "no JSON",
    "null",
    "3",
    '{"type":"exact"}',
    '{"type":"number","value":"3"}',
    '{"type":"other","text":"3"}',
  ])("whose record is %j has moved, since it cannot be vouched for", (json) => {
    expect(pinStatus(pinOf("b", "order", json), evaluations)).toMatchObject({ status: "moved", was: null });
  });
});

describe("the value of a pin", () => {
  const values: fc.Arbitrary<ScalarValue> = fc.oneof(
    fc.record({ type: fc.constant("exact" as const), text: fc.string() }),
    fc.record({ type: fc.constant("word" as const), text: fc.string() }),
    fc.record(
      {
        type: fc.constant("number" as const),
        value: fc.double({ noNaN: true, noDefaultInfinity: true }),
        sigma: fc.double({ min: 0, noNaN: true, noDefaultInfinity: true }),
        unit: fc.string(),
      },
      { requiredKeys: ["type", "value"] },
    ) as fc.Arbitrary<ScalarValue>,
  );
  it("survives the document as JSON and is then the same", () => {
    fc.assert(
      fc.property(values, (value) => {
        const again = readPinValue(JSON.stringify(value));
        expect(again !== null && isSameScalar(value, again)).toBe(true);
      }),
    );
  });
  it("does not tell zero from minus zero", () => {
    expect(isSameScalar({ type: "number", value: 0 }, { type: "number", value: -0 })).toBe(true);
  });
});

describe("what the shelf says", () => {
  const line = (...content: unknown[]) => premisesLine(readDocument(documentOf(...content)).blocks);
  it.each([
    [line(truncationBlock("t")), ""],
    [line(premisesBlock("p")), "d = 4 · 1 field · 1 term"],
    [line(premisesBlock("p", { d: "d" }), premisesBlock("q")), "d = d · 1 field · 1 term · 1 more premises"],
    [
      line(
        block(
          "premises",
          { blockId: "p", geometry: "anisotropic" },
          row("terms", "a", "a", { term: "x" }),
          row("terms", "b", "b", { term: " " }),
          row("terms", "c", "c", { term: "y" }),
        ),
      ),
      "D = 3, z = 2 · 0 fields · 2 terms",
    ],
  ])("%j", (found, expected) => {
    expect(found).toBe(expected);
  });

  it("counts the pins that moved and those that are loose", () => {
    const pins = [
      pinOf("b", "size", size),
      pinOf("b", "order", "?"),
      pinOf("b", "x", order),
      pinOf("gone", "x", order),
    ];
    expect(countPins(pins, evaluations)).toEqual({ moved: 1, loose: 2 });
  });
});
