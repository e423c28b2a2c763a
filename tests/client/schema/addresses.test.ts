import { describe, expect, it } from "vitest";
import { addressesIn } from "#schema/addresses.ts";

describe("addresses written out in a text", () => {
  it.each([
    ["see https://example.org", ["https://example.org"]],
    ["see https://example.org/a?b=c#d.", ["https://example.org/a?b=c#d"]],
    ["(http://example.org/a)", ["http://example.org/a"]],
    ["(http://example.org/a_(b))", ["http://example.org/a_(b)"]],
    ["https://example.org/a, https://example.org/b!", ["https://example.org/a", "https://example.org/b"]],
    ["write to mailto:wren@example.org?", ["mailto:wren@example.org"]],
    ["“https://example.org/a”", ["https://example.org/a"]],
    ["example.org and wren@example.org", []],
    ["https:// alone", []],
    ["xhttps://example.org", []],
    ["javascript:alert(1)", []],
    ["<https://example.org>", ["https://example.org"]],
  ])("%s", (text, expected) => {
    const found = addressesIn(text);
    expect(found.map((address) => address.text)).toEqual(expected);
    for (const { index, text: address } of found) expect(text.slice(index)).toContain(address);
    for (const { index, text: address } of found) expect(text.startsWith(address, index)).toBe(true);
  });
});
