import { describe, expect, it } from "vitest";
import { aloneContext, type EvaluationContext } from "#engine/kind.ts";
import { evaluateScaling } from "#engine/scaling/evaluate.ts";
import { scalingShape } from "#engine/scaling/inputs.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryFrom, type Sketch } from "../premises/state.ts";
import { ask, codes, real, type Question } from "../running/ask.ts";

/** Scaling with the result of a Running block on the same premises, or on others. */
function scaled(
  theory: Sketch,
  question: Omit<Question, "theory"> & { readonly theory?: Sketch },
  fixedPoint = "",
) {
  const ran = ask({ theory, ...question });
  const context: EvaluationContext = {
    ...aloneContext,
    source: () => (ran.value ? { kind: "running", value: ran.value, scalars: ran.scalars, title: "" } : null),
  };
  return evaluateScaling(
    schemaOf(scalingShape).parse({ running: "r", fixedPoint }),
    theoryFrom(theory),
    context,
  );
}
const quartic = real("1/2 (dphi)^2", "m^2/2 phi^2", "lambda/4! phi^4");

describe("Scaling with β functions", () => {
  it("splits what is marginal", () => {
    const rows = scaled(quartic, {}).value?.rows ?? [];
    expect(rows.map(({ marginally }) => marginally)).toEqual([null, null, "marginally irrelevant"]);
    const word = scaled(quartic, {}).scalars.find(({ id }) => id === "t3/class");
    expect(word?.value).toEqual({ type: "word", text: "marginally irrelevant" });
  });
  it("goes by the values where the sign depends on them", () => {
    const theory: Sketch = {
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: ["lambda/4! phi^4", "g psibar psi phi"],
    };
    const drift = (values: Readonly<Record<string, string>>) =>
      scaled(theory, { from: "1 GeV", to: "2 GeV", values }).value?.rows.map(({ marginally }) => marginally);
    expect(drift({ lambda: "1", g: "0.1" })).toEqual(["marginally irrelevant", "marginally irrelevant"]);
    // 3λ² + 8λg² − 48g⁴ is negative for small λ: it grows toward low energy.
    expect(drift({ lambda: "0.1", g: "1" })).toEqual(["marginally relevant", "marginally irrelevant"]);
    expect(drift({})).toEqual([null, "marginally irrelevant"]);
  });
  it("says when that block runs other terms", () => {
    const other: Sketch = { fields: { chi: "real scalar" }, terms: ["1/2 (dchi)^2", "m^2 chi^2", "w chi^4"] };
    const rows = scaled(real("lambda/4! phi^4"), { theory: other });
    expect(codes(rows.notices)).toContain("running-of-other-premises");
  });
});

describe("Scaling at a fixed point", () => {
  // Wilson and Fisher 1972, to first order at ε = 1: Δ(φ²) = 2 − 2/3, Δ(φ⁴) = 4, one more than d.
  it("takes its dimensions", () => {
    const { value, working } = scaled({ ...quartic, d: "3" }, { about: "4 - eps" });
    expect(value?.rows.map(({ dimension, scalingClass }) => [dimension.text, scalingClass])).toEqual([
      ["3", "marginal"],
      ["4/3", "relevant"],
      ["4", "irrelevant"],
    ]);
    expect(value?.rows.map(({ dimensionFrom }) => dimensionFrom)).toEqual([
      "fields",
      "fixed point",
      "fixed point",
    ]);
    expect(JSON.stringify(working)).toContain("2 - \\\\frac{2}{3}");
  });
  it("keeps d symbolic where the premises do", () => {
    const rows = scaled({ ...quartic, d: "d" }, { about: "4 - eps" }).value?.rows ?? [];
    // 2 − (2/3)(4 − d).
    expect(rows[1]?.dimension.text).toBe("2/3*d - 2/3");
  });
  it("takes another one where told", () => {
    const rows = scaled({ ...quartic, d: "3" }, { about: "4 - eps" }, "gaussian").value?.rows ?? [];
    expect(rows.map(({ dimension }) => dimension.text)).toEqual(["3", "1", "2"]);
  });
  it("refuses what is not there", () => {
    expect(codes(scaled({ ...quartic, d: "3" }, { about: "4 - eps" }, "lambda=7").problems)).toContain(
      "fixed-point-gone",
    );
    expect(codes(scaled(quartic, { about: "4 - eps" }).problems)).toContain("fixed-point-above-critical");
  });
  it("leaves couplings that mix at the dimensions of their fields, and says so", () => {
    const theory: Sketch = {
      d: "3",
      fields: { a: "real scalar", b: "real scalar" },
      terms: ["u/4! a^4", "v/4! b^4", "w/4 a^2 b^2", "m^2/2 a^2", "r/2 b^2"],
    };
    const { notices, value } = scaled(theory, { about: "4 - eps" }, "u=3/10,v=3/10,w=1/10");
    expect(codes(notices)).toContain("dimensions-not-known-there");
    expect(value?.rows[0]?.dimensionFrom).toBe("fields");
  });
});
