import { describe, expect, it } from "vitest";
import type { Scale, Theory } from "#engine/premises/theory.ts";
import { readExpansionParameter } from "#engine/truncation/expansion-parameter.ts";
import { LinearForm } from "#engine/exact/linear-form.ts";

function scale(symbol: string, role: Scale["role"], value: number | null, sigma = 0, unit = "GeV"): Scale {
  return { rowId: symbol, symbol, latex: symbol, role, value, sigma, unit, gev: null };
}
function theoryOf(...scales: Scale[]): Theory {
  const d = LinearForm.constant(4);
  return {
    name: "",
    spacetime: { geometry: "isotropic", d },
    measure: d,
    symmetries: [],
    fields: [],
    scales,
    terms: [],
    problems: [],
  };
}
const lantern = theoryOf(
  scale("p", "probe", 350),
  scale("Lambda", "heavy", 3.2, 0.4, "TeV"),
  scale("m", "light", 400),
);

function read(text: string, theory: Theory | null = lantern) {
  const outcome = readExpansionParameter(text, theory);
  return outcome.ok
    ? { value: outcome.q.value, sigma: outcome.q.sigma }
    : outcome.problems.map(({ code }) => code);
}

describe("the expansion parameter", () => {
  it.each([
    ["0.3", 0.3, 0],
    ["3/10", 0.3, 0],
    ["0.30(5)", 0.3, 0.05],
    ["0.3 ± 0.05", 0.3, 0.05],
    // 350/3200, relative uncertainty 0.4/3.2 = 1/8: own evaluation.
    ["", 0.109375, 0.109375 / 8],
    ["p/Lambda", 0.109375, 0.109375 / 8],
    ["\\frac{p}{\\Lambda}", 0.109375, 0.109375 / 8],
    ["max(p, m)/Lambda", 0.125, 0.125 / 8],
    ["(p/Lambda)^2", 0.109375 ** 2, 0.109375 ** 2 / 4],
    ["p/(4 pi 0.1 TeV)", 350 / (400 * Math.PI), 0],
    // The smooth form of Melendez, Wesolowski, Furnstahl, Phys. Rev. C 96 (2017) 024003 (from memory).
    [
      "(p^8 + m^8)/(p^7 + m^7)/Lambda",
      (350 ** 8 + 400 ** 8) / (350 ** 7 + 400 ** 7) / 3200,
      (350 ** 8 + 400 ** 8) / (350 ** 7 + 400 ** 7) / 25600,
    ],
  ])("%j is read", (text, value, sigma) => {
    const found = readExpansionParameter(text, lantern);
    if (!found.ok) throw new Error(found.problems.map(({ code }) => code).join());
    expect(found.q.value / value).toBeCloseTo(1, 12);
    expect(found.q.sigma).toBeCloseTo(sigma, 12);
  });

  it.each([
    ["", null, "q-needs-premises"],
    ["p/Lambda", null, "q-needs-premises"],
    ["", theoryOf(scale("p", "probe", 1)), "q-needs-roles"],
    ["", theoryOf(scale("p", "probe", 1), scale("k", "probe", 2), scale("L", "heavy", 3)), "q-needs-roles"],
    ["", theoryOf(scale("p", "probe", null), scale("L", "heavy", 3)), "scale-has-no-number"],
    ["p/M", lantern, "unknown-symbol"],
    ["p", lantern, "q-has-units"],
    ["p - m/Lambda", lantern, "units-differ"],
    ["0", lantern, "q-not-positive"],
    ["(p - m)/Lambda", lantern, "q-not-positive"],
    ["p/(m - m)", lantern, "division-by-zero"],
    ["p/", lantern, "missing-operand"],
  ])("%j is refused", (text, theory, code) => {
    expect(read(text, theory)).toEqual([code]);
  });

  it("keeps scales made of one another correlated", () => {
    // k = Λ/8 moves with Λ, so k/Λ has no uncertainty at all.
    const heavy = { ...scale("Lambda", "heavy", 3.2, 0.4, "TeV"), spread: { "s1@0": 0.4 } };
    const made = { ...scale("k", "other", 400, 50), spread: { "s1@0": 50 } };
    expect(read("k/Lambda", theoryOf(heavy, made))).toEqual({ value: 0.125, sigma: 0 });
  });

  it("names the field and quotes what was typed", () => {
    const outcome = readExpansionParameter("p", lantern);
    expect(outcome).toMatchObject({
      ok: false,
      problems: [{ path: ["q"], facts: { text: "p", unit: "GeV" } }],
    });
  });
});
