import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { measuredLatex, measuredText } from "#engine/notation/measured.ts";
import { shown } from "#engine/notation/quantity.ts";
import { readQuantity, type Declared } from "#engine/notation/read-quantity.ts";
import { HBARC_GEV_FM } from "#engine/notation/units.ts";

/** Scales by text, each a source of its own. */
function scales(values: Readonly<Record<string, string>>): Declared {
  const declared: Declared = {
    symbols: Object.keys(values),
    lookUp: (symbol) => {
      const text = values[symbol];
      if (text === undefined) return null;
      const reading = readQuantity(text, declared, symbol);
      return reading.ok ? reading.value.quantity : reading.failure;
    },
  };
  return declared;
}
function valueOf(text: string, declared: Declared = scales({})): string {
  const reading = readQuantity(text, declared, "here");
  if (!reading.ok) return `${reading.failure.code} at ${reading.failure.facts["offset"]}`;
  const { value, sigma, unit } = shown(reading.value.quantity);
  return measuredText(value, sigma, unit);
}

describe("values with units and uncertainty", () => {
  it.each([
    ["3.2(4) TeV", "3.2(4) TeV"],
    ["3.2 ± 0.4 TeV", "3.2(4) TeV"],
    ["3.2 +- 0.4 TeV", "3.2(4) TeV"],
    ["(3.2 \\pm 0.4)\\,\\mathrm{TeV}", "3.2(4) TeV"],
    ["3.2 TeV ± 400 GeV", "3.2(4) TeV"],
    ["3.2(0.4) TeV", "3.2(4) TeV"],
    ["350 GeV", "350 GeV"],
    ["0.5", "0.5"],
    ["1.3(2)e3 MeV", "1.3(2) × 10³ MeV"],
    ["91.1876(21) GeV", "91.1876(21) GeV"],
    ["1/2 GeV", "0.5 GeV"],
    ["1.2 fm^-1", "1.2 fm^-1"],
    ["1.2/fm", "1.2 fm^-1"],
    ["1.2 1/fm", "1.2 fm^-1"],
    ["350 GeV / 3.2(4) TeV", "0.109(14)"],
    ["2 keV^2", "2 keV^2"],
    ["-5", "−5"],
    ["1/(16 pi^2)", "0.006332574"],
    ["sqrt(2) GeV", "1.4142136 GeV"],
    ["max(1 GeV, 900 MeV)", "1 GeV"],
    ["min(1 GeV, 900 MeV)", "900 MeV"],
    ["|2 - 5|", "3"],
    ["4!", "24"],
  ])("%s is %s", (text, expected) => expect(valueOf(text)).toBe(expected));
  it.each([
    ["1 GeV + 1", "units-differ at 6"],
    ["1 GeV + 1 fm", "units-differ at 6"],
    ["max(1, 1 GeV)", "units-differ at 0"],
    ["1/0", "division-by-zero at 2"],
    ["sqrt(-1)", "root-of-negative at 0"],
    ["q", "unknown-symbol at 0"],
    ["2 gev", "unknown-symbol at 2"],
    ["1e400", "number-too-large at 0"],
    ["", "empty-text at 0"],
    ["2^x", "exponent-not-a-number at 2"],
    ["p†", "misplaced-mark at 0"],
  ])("%s is refused: %s", (text, expected) => expect(valueOf(text, scales({ p: "1 GeV" }))).toBe(expected));
});

describe("natural units", () => {
  it("convert by ħc, CODATA 2022: 197.326 980 459 3… MeV fm", () => {
    expect(HBARC_GEV_FM * 1000).toBeCloseTo(197.3269804593, 10);
    expect(valueOf("197.3269804593025 MeV fm")).toBe("1");
    expect(valueOf("1 MeV + 1 fm^-1")).toBe("198.32698 MeV");
  });
});

describe("uncertainty is propagated with its correlations", () => {
  const declared = scales({ p: "350(35) GeV", Lambda: "3.2(4) TeV", m: "120 GeV", Q: "p/Lambda" });
  it.each([
    // Independent: relative uncertainties 10 % and 12.5 % in quadrature are 16.008 %.
    ["p/Lambda", 0.109375, 0.109375 * Math.hypot(0.1, 0.125)],
    ["Q", 0.109375, 0.109375 * Math.hypot(0.1, 0.125)],
    // The same scale twice is fully correlated with itself.
    ["p/p", 1, 0],
    ["p - p", 0, 0],
    ["Q Lambda/p", 1, 0],
    ["Q Lambda/(350 GeV)", 1, 0.1],
    ["(m/Lambda)^2 (Lambda/p)^2", (120 / 350) ** 2, (120 / 350) ** 2 * 0.2],
    ["p^2/(350 GeV)^2", 1, 0.2],
    ["sqrt(p/(350 GeV))", 1, 0.05],
  ])("%s", (text, value, sigma) => {
    const reading = readQuantity(text, declared, "here");
    if (!reading.ok) throw new Error(reading.failure.code);
    const result = shown(reading.value.quantity);
    expect(result.value).toBeCloseTo(value, 12);
    expect(result.sigma).toBeCloseTo(sigma, 12);
  });
  it("agrees with finite differences for any rational expression in two scales", () => {
    const exponent = fc.integer({ min: -3, max: 3 });
    fc.assert(
      fc.property(
        exponent,
        exponent,
        fc.double({ min: 0.1, max: 9, noNaN: true }),
        fc.double({ min: 0.1, max: 9, noNaN: true }),
        (a, b, x, y) => {
          const f = (u: number, v: number) => (u / v) ** a + v ** b / u;
          const text = `(u/v)^${a} + v^${b}/u`;
          const at = { u: `${x.toFixed(6)}(10)`, v: `${y.toFixed(6)}(10)` };
          const reading = readQuantity(text, scales(at), "here");
          if (!reading.ok) return false;
          const [u, v, h, sigma] = [Number(x.toFixed(6)), Number(y.toFixed(6)), 1e-5, 1e-5];
          const slope = (g: (e: number) => number) => (g(h) - g(-h)) / (2 * h);
          const expected =
            sigma *
            Math.hypot(
              slope((e) => f(u + e, v)),
              slope((e) => f(u, v + e)),
            );
          const found = shown(reading.value.quantity).sigma;
          return Math.abs(found - expected) <= 1e-6 * Math.max(expected, sigma);
        },
      ),
    );
  });
});

describe("measured values in print", () => {
  it.each([
    [0.109375, 0.013671875, "", "0.109(14)", "0.109(14)"],
    [3.2, 0.4, "TeV", "3.2(4) TeV", "3.2(4)\\,\\mathrm{TeV}"],
    [1.2, 0, "fm^-1", "1.2 fm^-1", "1.2\\,\\mathrm{fm}^{-1}"],
    [350, 0, "GeV", "350 GeV", "350\\,\\mathrm{GeV}"],
    [1, 0, "", "1", "1"],
    [0.0001234, 0, "", "1.234 × 10⁻⁴", "1.234 \\times 10^{-4}"],
  ])("%d ± %d %s", (value, sigma, unit, text, latex) => {
    expect(measuredText(value, sigma, unit)).toBe(text);
    expect(measuredLatex(value, sigma, unit)).toBe(latex);
  });
  it("keep only the digits an estimate deserves", () =>
    expect(measuredText(157.91367, 0, "", 3)).toBe("158"));
});
