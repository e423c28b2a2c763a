import { describe, expect, it } from "vitest";
import { kindNames } from "#engine/kind.ts";
import { methods } from "#engine/truncation/shape.ts";
import { evaluateFile, type FileOutcome } from "../../../server/compute/evaluate-file.ts";

function throwing(error: unknown): never {
  throw error;
}
function complaints(body: unknown): string[] {
  const outcome: FileOutcome = evaluateFile(body, throwing);
  return outcome.ok ? [] : outcome.complaints.map(({ place, message }) => `${place} ${message}`);
}
const file = (...blocks: unknown[]) => ({ format: "subleading-blocks/1", blocks });
const rate = (more: Record<string, unknown> = {}) => ({
  id: "rate",
  kind: "truncationError",
  inputs: {
    q: 0.3,
    orders: [
      { order: 0, value: 10 },
      { order: 1, value: 10.9 },
    ],
    ...more,
  },
});

describe("a file of blocks that cannot be read", () => {
  it.each([
    [null, ["the file must be an object"]],
    [[], ["the file must be an object"]],
    [{}, ["format is missing: it must be “subleading-blocks/1”", "blocks is missing"]],
    [{ format: "other/2", blocks: [rate()] }, ["format is “other/2” but must be “subleading-blocks/1”"]],
    [file(), ["blocks must not be empty"]],
    [file(3), ["blocks[0] must be an object"]],
    [
      file({ id: "a", kind: "budget" }),
      [`blocks[0].kind is “budget” but must be one of ${kindNames.map((kind) => `“${kind}”`).join(", ")}`],
    ],
    [file({ ...rate(), id: "" }), ["blocks[0].id must not be empty"]],
    [file({ ...rate(), mood: 1 }), ["blocks[0] has what is not known here: “mood”"]],
    [file(rate(), rate()), ["blocks[1].id “rate” names another block already"]],
    [file(rate({ metod: "x" })), ["blocks[0].inputs has what is not known here: “metod”"]],
    [file(rate({ q: ["0.3"] })), ["blocks[0].inputs.q must be a text or a number"]],
    [file(rate({ method: "guess" })), [`blocks[0].inputs.method must be one of: ${methods.join(", ")}`]],
    [file(rate({ orders: "10" })), ["blocks[0].inputs.orders must be a list"]],
    [
      file(rate({ orders: [{ order: 0, valeu: 1 }] })),
      ["blocks[0].inputs.orders[0] has what is not known here: “valeu”"],
    ],
    [
      file(rate({ orders: [{ id: "a" }, { id: "b" }, { id: "a" }] })),
      ["blocks[0].inputs.orders[2].id “a” names another row of this block already"],
    ],
  ])("%j", (body, expected) => {
    expect(complaints(body)).toEqual(expected);
  });

  it("is not listed without end", () => {
    expect(complaints(file(...Array.from({ length: 200 }, () => 1)))).toHaveLength(20);
  });
});

describe("a file of blocks that can be read", () => {
  it("gives results in the same order with keys and, for problems, words with their place", () => {
    const outcome = evaluateFile(
      file(rate(), { ...rate({ orders: [{ id: "x", order: 0, value: "ten" }] }), id: "bad" }),
      throwing,
    );
    if (!outcome.ok) throw new Error("expected results");
    const { results, ...about } = outcome.results;
    expect(about).toEqual({ format: "subleading-results/1", engineVersion: "3" });
    expect(results.map(({ id, kind, messages }) => ({ id, kind, messages }))).toEqual([
      { id: "rate", kind: "truncationError", messages: [] },
      {
        id: "bad",
        kind: "truncationError",
        messages: [
          "orders, row “x”, value: Row 1, order 0: “ten” is not a number. Leave it empty only if this order is absent by symmetry.",
        ],
      },
    ]);
    expect(results[0]?.evaluation.value).not.toBeNull();
    expect(results[1]?.evaluation.value).toBeNull();
  });

  it("does not care how a number was written, and names rows without an id by their place", () => {
    const keyOf = (body: unknown) => {
      const outcome = evaluateFile(body, throwing);
      return outcome.ok ? outcome.results.results[0]?.key : null;
    };
    const typed = file(
      rate({
        q: "0.3",
        orders: [
          { id: "orders1", order: "0", value: "10" },
          { id: "orders2", order: "1", value: "10.9" },
        ],
      }),
    );
    expect(keyOf(file(rate()))).toBe(keyOf(typed));
    expect(keyOf(file(rate({ q: "0.30" })))).not.toBe(keyOf(typed));
  });

  it("does not take a hostile name for a field", () => {
    const hostile: unknown = JSON.parse(
      JSON.stringify(file(rate())).replace('"q":0.3', '"__proto__":{"q":"0.3"}'),
    );
    const outcome = evaluateFile(hostile, throwing);
    const problems = outcome.ok ? outcome.results.results[0]?.evaluation.problems : [];
    // Q is empty, so it is looked for in premises that are not there: nothing came in by the back door.
    expect(problems?.map(({ code }) => code)).toEqual(["q-needs-premises"]);
  });
});
