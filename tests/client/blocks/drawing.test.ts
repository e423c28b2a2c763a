import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { splitDecimal } from "../../../client/blocks/parts/decimal.tsx";
import { textTo } from "../../../client/blocks/parts/number-text.ts";
import { axisOf, plain, powerOf } from "../../../client/blocks/parts/plot-scales.ts";
import { spread } from "../../../client/blocks/parts/plot-axes.tsx";
import { workingAsLatex } from "../../../client/blocks/parts/working.tsx";
import { plainLatex } from "../../../client/blocks/parts/plain-latex.ts";

describe("numbers in a column", () => {
  it.each([
    ["0.109(14)", "0", ".109(14)"],
    ["−1.2 × 10⁻²", "−1", ".2 × 10⁻²"],
    ["350 GeV", "350", " GeV"],
    ["12", "12", ""],
    ["∞", "∞", ""],
  ])("%s stands on its decimal mark", (text, before, after) => {
    expect(splitDecimal(text)).toEqual([before, after]);
  });

  it.each([
    [9.26, 0.0042, "9.2600"],
    [0.0042, 0.0042, "0.0042"],
    [-8, 0.5, "−8.00"],
    [1.5e-7, 1e-8, "1.50 × 10⁻⁷"],
  ])("%d with a resolution of %d is %s", (value, resolution, text) => {
    expect(textTo(value, resolution)).toBe(text);
  });
});

describe("axes", () => {
  it("label whole powers of ten over many decades, not more than asked for", () => {
    const { ticks } = axisOf({ kind: "log", label: "", domain: [1e-6, 1] }, [0, 100], 4);
    expect(ticks.filter(({ label }) => label !== "").map(({ label }) => label)).toEqual([
      "10⁻⁶",
      "10⁻⁴",
      "10⁻²",
      "10⁰",
    ]);
  });
  it("label 1, 2, 3 and 5 over a short range", () => {
    const { ticks } = axisOf({ kind: "log", label: "", domain: [50, 3200] }, [0, 100], 20);
    expect(ticks.map(({ value }) => value)).toEqual([50, 100, 200, 300, 500, 1000, 2000, 3000]);
  });
  it("put equal ratios at equal distances", () => {
    const { position } = axisOf({ kind: "log", label: "", domain: [1, 100] }, [0, 100], 4);
    expect(position(10)).toBeCloseTo(50, 9);
  });
  it.each([
    [0.001, "0.001"],
    [1e-5, "10⁻⁵"],
    [2.5e-7, "2.5×10⁻⁷"],
    [-3, "−3"],
    [100000, "10⁵"],
  ])("write %d as %s", (value, text) => {
    expect(plain(value)).toBe(text);
  });
  it("write whole and broken powers", () => {
    expect([powerOf("Q", "3"), powerOf("Q", "3/2")]).toEqual(["Q³", "Q^(3/2)"]);
  });
  it("keep labels apart, in order and inside", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 200, noNaN: true }), { maxLength: 12 }), (positions) => {
        const placed = spread(
          [...positions].sort((a, b) => a - b),
          10,
          0,
          200,
        );
        for (const [index, at] of placed.entries()) {
          if (index > 0) expect(at - (placed[index - 1] ?? 0)).toBeGreaterThanOrEqual(10 - 1e-9);
          expect(at).toBeLessThanOrEqual(200 + 1e-9);
        }
      }),
    );
  });
});

describe("text for people", () => {
  it.each([
    ["\\frac{\\lambda}{4!}\\,\\chi^{4}", "λ/(4!) χ⁴"],
    ["\\bar{\\psi}\\psi", "ψ̄ψ"],
    ["c_{6}", "c₆"],
  ])("%s reads %s in a list", (latex, text) => {
    expect(plainLatex(latex)).toBe(text);
  });
  it("gives the working as it would stand in a paper", () => {
    expect(
      workingAsLatex([
        { step: "heading", text: "Sizes" },
        { step: "prose", text: "With $p$ small:" },
        { step: "formula", latex: "Q = p/\\Lambda" },
      ]),
    ).toBe("% Sizes\n\nWith $p$ small:\n\n\\[\n  Q = p/\\Lambda\n\\]");
  });
});
