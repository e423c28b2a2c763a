import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evenOrderKeys, orderKeyBetween } from "../../../client/editor/blocks/order-key.ts";

/** A deterministic stream of numbers in [0, 1): the linear congruence of Numerical Recipes (Press et al. 1992). */
function stream(seed: number): () => number {
  let state = seed >>> 0;
  return () => (state = (Math.imul(state, 1664525) + 1013904223) >>> 0) / 2 ** 32;
}

describe("order keys", () => {
  it("lie strictly between their neighbours, however rows are inserted", () => {
    fc.assert(
      fc.property(fc.array(fc.nat(), { maxLength: 200 }), fc.nat(), (places, seed) => {
        const random = stream(seed);
        const keys: string[] = [];
        for (const place of places) {
          const at = place % (keys.length + 1);
          const key = orderKeyBetween(keys[at - 1] ?? null, keys[at] ?? null, random);
          expect(key).not.toBeNull();
          keys.splice(at, 0, key ?? "");
        }
        expect([...keys].sort((a, b) => (a < b ? -1 : 1))).toEqual(keys);
        expect(new Set(keys).size).toBe(keys.length);
      }),
    );
  });

  it.each([
    [
      "at the end",
      (keys: string[], random: () => number) =>
        keys.push(orderKeyBetween(keys.at(-1) ?? null, null, random) ?? ""),
    ],
    [
      "at the start",
      (keys: string[], random: () => number) =>
        keys.unshift(orderKeyBetween(null, keys[0] ?? null, random) ?? ""),
    ],
  ])("stay short when a thousand rows are added %s", (_where, add) => {
    const keys: string[] = [];
    const random = stream(7);
    for (let count = 0; count < 1000; count++) add(keys, random);
    expect([...keys].sort((a, b) => (a < b ? -1 : 1))).toEqual(keys);
    expect(Math.max(...keys.map((key) => key.length))).toBeLessThan(40);
  });

  it("differ when two people insert at the same place", () => {
    expect(orderKeyBetween("A", "B", stream(1))).not.toBe(orderKeyBetween("A", "B", stream(2)));
  });

  it.each([
    ["the neighbours are equal", "A", "A"],
    ["the neighbours are in the wrong order", "B", "A"],
    ["a neighbour is empty", "", "A"],
    ["a neighbour ends in the digit 0", null, "0"],
    ["a neighbour is not made of our digits", "a-b", null],
  ])("are refused when %s", (_why, before, after) => {
    expect(orderKeyBetween(before, after)).toBeNull();
  });

  it("can be given to a whole table afresh", () => {
    for (const count of [0, 1, 2, 61, 62, 63, 500]) {
      const keys = evenOrderKeys(count);
      expect(keys).toHaveLength(count);
      expect(new Set(keys).size).toBe(count);
      expect([...keys].sort((a, b) => (a < b ? -1 : 1))).toEqual(keys);
      for (const [index, key] of keys.entries()) {
        expect(orderKeyBetween(keys[index - 1] ?? null, key)).not.toBeNull();
      }
    }
  });
});
