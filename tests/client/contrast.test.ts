import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";

const client = join(import.meta.dirname, "../../client");
const tokens = readFileSync(join(client, "app/tokens.css"), "utf8");

type Colour = readonly [number, number, number];

/** The colours declared in the rule whose selector list contains `selector`. */
function coloursOf(selector: string): ReadonlyMap<string, string> {
  const rule = [...tokens.matchAll(/([^{}]+)\{([^{}]*)\}/g)].find(([, selectors]) =>
    selectors?.includes(selector),
  );
  if (!rule?.[2]) throw new Error(`tokens.css has no rule for ${selector}`);
  return new Map(
    [...rule[2].matchAll(/(--[\w-]+):\s*(#[0-9a-f]{6})\s*;/g)].map(([, name = "", value = ""]) => [
      name,
      value,
    ]),
  );
}

function channels(hex: string): Colour {
  return [1, 3, 5].map((start) => parseInt(hex.slice(start, start + 2), 16)) as unknown as Colour; // Three by construction.
}

/** WCAG 2.2, "relative luminance" (W3C, 2023). */
function luminance(hex: string): number {
  const [red, green, blue] = channels(hex).map((value) => {
    const share = value / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * (red ?? NaN) + 0.7152 * (green ?? NaN) + 0.0722 * (blue ?? NaN);
}

/** WCAG 2.2, "contrast ratio" (W3C, 2023). */
function ratio(one: string, other: string): number {
  const [light = NaN, dark = NaN] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (light + 0.05) / (dark + 0.05);
}

const accents = ["--hairline", "--relevant", "--marginal", "--irrelevant"];
const people = [1, 2, 3, 4, 5, 6, 7, 8].map((n) => `--person-${n}`);

/** Every pair of text and ground that the pages use; 4.5 is WCAG 1.4.3 for text of any size. */
const textPairs = [
  ...["--paper", "--field", "--highlight"].flatMap((ground) =>
    ["--ink", "--ink-2", "--ink-3", ...accents, ...people].map((text) => [text, ground] as const),
  ),
  ...["--ink", "--ink-2", ...accents].map((text) => [text, "--hatch"] as const),
  ["--paper", "--ink"] as const,
  ["--paper", "--ink-2"] as const,
];
/** Marks and edges without which a thing could not be found; 3 is WCAG 1.4.11. */
const markPairs = ["--paper", "--field", "--highlight"].flatMap((ground) =>
  ["--tick", "--ink", "--hairline"].map((mark) => [mark, ground] as const),
);

describe("the ratio as the standard works it out", () => {
  it("gives 21 for black on white and 1 for equal colours", () => {
    expect(ratio("#000000", "#ffffff")).toBeCloseTo(21, 10);
    expect(ratio("#38549e", "#38549e")).toBe(1);
  });
  // #767676 is the lightest grey that passes on white at two decimals: WCAG technique G18 discussions, from memory.
  it("finds the well-known grey #767676 at 4.54 on white", () => {
    expect(ratio("#767676", "#ffffff")).toBeCloseTo(4.54, 2);
  });
});

describe.each([
  ["day", ':root[data-theme="day"]'],
  ["night", ':root[data-theme="night"]'],
])("by %s", (_theme, selector) => {
  const colours = coloursOf(selector);
  const ratioOf = (one: string, other: string) => {
    const [first, second] = [colours.get(one), colours.get(other)];
    if (!first || !second) throw new Error(`${one} or ${other} is not declared for ${selector}`);
    return ratio(first, second);
  };
  it.each(textPairs)("%s can be read on %s", (text, ground) => {
    expect(ratioOf(text, ground)).toBeGreaterThanOrEqual(4.5);
  });
  it.each(markPairs)("%s can be seen on %s", (mark, ground) => {
    expect(ratioOf(mark, ground)).toBeGreaterThanOrEqual(3);
  });
  it("declares the same names as the other theme", () => {
    const other = coloursOf(
      selector.includes("day") ? ':root[data-theme="night"]' : ':root[data-theme="day"]',
    );
    expect([...colours.keys()].sort()).toEqual([...other.keys()].sort());
  });
});

describe("colour literals", () => {
  const files = readdirSync(client, { recursive: true, encoding: "utf8" }).filter(
    (file) =>
      /\.(css|tsx?|js)$/.test(file) && !file.startsWith("engine") && file !== join("app", "tokens.css"),
  );
  const literal = /#[0-9a-f]{3,8}\b(?![\w-])|\b(?:rgba?|hsla?|oklch|oklab|lab|lch)\(/gi;
  const findings = (text: string) => text.replace(/\/\*[\s\S]*?\*\/|^\s*\/\/.*$/gm, "").match(literal) ?? [];
  it("are recognised", () => {
    expect(findings("color: #fff; background: rgb(1 2 3); border-color: #14212c")).toHaveLength(3);
    expect(findings("location.hash = '#main'; import '#engine/kind.ts'")).toEqual([]);
  });
  it("stand in tokens.css only", () => {
    expect(files.length).toBeGreaterThan(10);
    const found = files.flatMap((file) =>
      findings(readFileSync(join(client, file), "utf8")).map((hit) => `${file}: ${hit}`),
    );
    expect(found).toEqual([]);
  });
});
