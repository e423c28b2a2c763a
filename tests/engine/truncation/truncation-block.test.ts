import fc from "fast-check";
import katex from "katex";
import { describe, expect, it } from "vitest";
import { aloneContext } from "#engine/kind.ts";
import { truncationError } from "#engine/truncation/kind.ts";
import { blockInputs, evaluateBlock, partialSums, scalar } from "./truncation-block.ts";

/** What stands between dollar signs in prose. */
function inlineFormulas(text: string): string[] {
  expect(text.split("$").length % 2).toBe(1);
  return text.split("$").filter((_, index) => index % 2 === 1);
}
const series = { 0: "10", 1: "10.9", 2: "10.63", 3: "10.711" };
const codes = (list: readonly { code: string }[]) => list.map(({ code }) => code);

describe("refusals of a truncation error, each with its place", () => {
  it.each([
    ["no orders at all", {}, {}, "orders-missing", ["orders"]],
    ["only absent orders", { 0: null }, {}, "orders-missing", ["orders"]],
    [
      "a value that is no number",
      { 0: "10", 1: "ten" },
      {},
      "order-value-unreadable",
      ["orders", "n1", "value"],
    ],
    [
      "a value with an uncertainty",
      { 0: "10", 1: "10.9(2)" },
      {},
      "order-value-uncertain",
      ["orders", "n1", "value"],
    ],
    ["a zero reference given", series, { reference: "0" }, "reference-zero", ["reference"]],
    ["a leading order of zero", { 0: "0", 1: "1" }, {}, "reference-zero", ["orders", "n0", "value"]],
    ["a reference that is no number", series, { reference: "NLO" }, "reference-unreadable", ["reference"]],
    ["a belief of 100 %", series, { belief: "68, 100" }, "belief-unreadable", ["belief"]],
    ["no belief", series, { belief: " " }, "belief-missing", ["belief"]],
    ["too many beliefs", series, { belief: "1 2 3 4 5 6 7" }, "belief-too-many", ["belief"]],
    ["a negative ν₀", series, { nu0: "-1" }, "nu0-unreadable", ["nu0"]],
    ["a τ₀ of zero", series, { tau0: "0" }, "tau0-unreadable", ["tau0"]],
    ["a negative Q", series, { q: "-0.3" }, "q-not-positive", ["q"]],
    ["a Q that is no number", series, { q: "small" }, "q-needs-premises", ["q"]],
    ["powers of Q beyond a double", { 0: "1", 150: "2" }, { q: "1e-3" }, "coefficients-not-finite", ["q"]],
  ] as const)("%s", (_, orders, fields, code, path) => {
    const result = evaluateBlock(orders, { q: "0.3", ...fields });
    expect(result.value).toBeNull();
    expect(result.scalars).toEqual([]);
    expect(result.problems).toContainEqual(expect.objectContaining({ code, path }));
  });

  it.each([
    ["", "order-missing"],
    ["two", "order-unreadable"],
    ["-1", "order-unreadable"],
    ["1.5", "order-unreadable"],
    ["201", "order-unreadable"],
    ["0", "order-twice"],
  ])("the order %j in the second row", (order, code) => {
    const inputs = blockInputs({ 0: "10" }, { q: "0.3" });
    const rows = [...inputs.orders, { id: "again", order, value: "11", name: "" }];
    const { problems, value } = truncationError.evaluate({ ...inputs, orders: rows }, null, aloneContext);
    expect(value).toBeNull();
    expect(problems).toEqual([expect.objectContaining({ code, path: ["orders", "again", "order"] })]);
    expect(problems[0]?.facts["row"]).toBe(2);
  });
});

describe("sums over omitted orders", () => {
  it("are refused for Q ≥ 1, never clamped, while first omitted terms remain", () => {
    const result = evaluateBlock(series, { q: "1.2" });
    expect(codes(result.problems)).toEqual(["sum-needs-q-below-one"]);
    expect(result.value?.highlighted).toBeNull();
    expect(
      result.value?.orders
        .flatMap(({ bands }) => bands)
        .filter(({ omitted }) => omitted === "all omitted orders"),
    ).toEqual([]);
    expect(scalar(result, "conjugate-first/68")).toBeGreaterThan(0);
  });

  it("leave a caution when only the first omitted term is asked for", () => {
    const result = evaluateBlock(series, { q: "1", omitted: "first omitted term" });
    expect(result.problems).toEqual([]);
    expect(codes(result.notices)).toContain("q-not-below-one");
  });

  it("leave out the orders that are absent", () => {
    // Orders 4 and 6 absent: Σ Q²ⁿ over n = 5, 7, 8, … = Q¹⁰/(1 − Q²) − Q¹². Own derivation.
    const q = 0.4;
    const all = evaluateBlock({ ...series, 4: null, 6: null }, { q: String(q) });
    const first = scalar(all, "conjugate-first/68");
    expect(all.value?.orders.at(-1)?.nextOrder).toBe(5);
    expect(scalar(all, "conjugate/68") / first).toBeCloseTo(
      Math.sqrt((q ** 10 / (1 - q ** 2) - q ** 12) / q ** 10),
      10,
    );
    // Linear: Q⁵ + Q⁷ + Q⁸ + …
    expect(scalar(all, "first-omitted-all") / scalar(all, "first-omitted")).toBeCloseTo(
      1 + q ** 2 / (1 - q),
      10,
    );
  });
});

describe("what counts as a coefficient", () => {
  it("is not c_0 when the reference is the leading order, even if asked for; the block says so", () => {
    const plain = evaluateBlock(series, { q: "0.3" });
    const asked = evaluateBlock(series, { q: "0.3", first: "from c_0" });
    expect(asked.value?.orders.at(-1)?.coefficientCount).toBe(3);
    expect(codes(asked.notices)).toEqual(["leading-coefficient-excluded"]);
    expect(asked.value?.orders).toEqual(plain.value?.orders);
    // Given as a number, the same reference lets c_0 count.
    const given = evaluateBlock(series, { q: "0.3", first: "from c_0", reference: "10" });
    expect(given.value?.orders.at(-1)?.coefficientCount).toBe(4);
  });

  it("is no order that is absent by symmetry, listed or passed over", () => {
    const listed = evaluateBlock({ 0: "10", 1: null, 2: "10.9" }, { q: "0.3" });
    const passed = evaluateBlock({ 0: "10", 2: "10.9" }, { q: "0.3" });
    expect(listed.value?.orders).toEqual(passed.value?.orders);
    expect(listed.value?.orders.at(-1)?.coefficientCount).toBe(1);
    expect(listed.value?.coefficients[1]).toEqual({ rowId: "n1", order: 1, value: null, used: false });
    expect(codes(passed.notices)).toContain("orders-taken-as-absent");
    expect(codes(listed.notices)).not.toContain("orders-taken-as-absent");
  });

  it("needs an order beyond the leading one, or a prior", () => {
    const byPrior = evaluateBlock({ 0: "10" }, { q: "0.3" });
    expect(byPrior.problems).toEqual([]);
    expect(codes(byPrior.notices)).toContain("methods-without-coefficients");
    // ν = ν₀ = 1, τ² = 1: 10·0.3/√(1 − 0.09)·tan(0.34π), the Cauchy quantile. Own derivation.
    expect(scalar(byPrior, "conjugate/68")).toBeCloseTo((3 / Math.sqrt(0.91)) * Math.tan(0.34 * Math.PI), 9);
    for (const fields of [{ nu0: "0" }, { method: "uniform prior" }, { method: "first omitted term" }]) {
      const refused = evaluateBlock({ 0: "10" }, { q: "0.3", ...fields });
      expect(codes(refused.problems)).toEqual(["method-without-coefficients"]);
      expect(scalar(refused, "differences")).toBeCloseTo(3, 12);
    }
  });

  it("takes a series that starts later at its own leading order", () => {
    // X = X_ref (Q² + 0.5 Q³): the reference is X⁽²⁾/Q², so c_2 = 1 and c_3 = 0.5.
    const result = evaluateBlock({ 2: 0.09, 3: 0.09 + 0.5 * 0.027 }, { q: "0.3" });
    expect(scalar(result, "coefficients/2")).toBeCloseTo(1, 10);
    expect(scalar(result, "coefficients/3")).toBeCloseTo(0.5, 10);
    expect(result.value?.reference).toBeCloseTo(1, 10);
    expect(codes(result.notices)).toEqual(["reference-from-order", "one-coefficient", "variance-infinite"]);
  });
});

describe("cautions", () => {
  it.each([
    ["one coefficient only", { 0: "10", 1: "11" }, { nu0: "2" }, ["one-coefficient"]],
    ["no finite variance", { 0: "10", 1: "11", 2: "11.1" }, { nu0: "0" }, ["variance-infinite"]],
    ["coefficients that vanish", { 0: "10", 1: "10", 2: "10" }, {}, ["coefficients-vanish"]],
    ["a sum the method does not make", series, { method: "uniform prior" }, ["only-first-omitted-term"]],
    ["a probability in place of a percentage", series, { belief: "0.68" }, ["belief-below-one-percent"]],
    ["Q near 1", series, { q: "0.9(2)" }, ["q-may-reach-one"]],
    ["nothing to say", series, {}, []],
  ] as const)("%s", (_, orders, fields, expected) => {
    expect(codes(evaluateBlock(orders, { q: "0.3", ...fields }).notices)).toEqual(expected);
  });
});

describe("uncertainty of Q", () => {
  it("is carried as its effect on each half-width, coefficients included", () => {
    // One coefficient, first omitted term: h = |ΔX| Q, so ΔQ = 0.05 moves h = 0.9·0.3 by 0.9·0.05. Own derivation.
    const result = evaluateBlock(
      { 0: "10", 1: "10.9" },
      { q: "0.30(5)", method: "first omitted term", omitted: "first omitted term" },
    );
    expect(result.value?.highlighted).toMatchObject({ halfWidth: 0.27, fromQ: 0.045 });
  });
  it("is nothing when Q has none", () => {
    const { value } = evaluateBlock(series, { q: "0.3" });
    expect(
      value?.orders.flatMap(({ bands }) => bands.map(({ fromQ }) => fromQ)).every((change) => change === 0),
    ).toBe(true);
  });
});

describe("laws", () => {
  const coefficients = fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { minLength: 2, maxLength: 5 });
  const qs = fc.double({ min: 0.05, max: 0.9, noNaN: true });

  it("every half-width scales with the quantity and does not depend on its sign", () => {
    fc.assert(
      fc.property(coefficients, qs, (c, q) => {
        const one = evaluateBlock(partialSums([1, ...c], q), { q: String(q) });
        const other = evaluateBlock(partialSums([1, ...c], q, -1000), { q: String(q) });
        for (const [index, band] of (one.value?.orders.at(-1)?.bands ?? []).entries()) {
          const scaled = other.value?.orders.at(-1)?.bands[index]?.halfWidth ?? NaN;
          expect(scaled).toBeCloseTo(1000 * band.halfWidth, 4);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("more belief is never a narrower interval", () => {
    fc.assert(
      fc.property(coefficients, qs, (c, q) => {
        const result = evaluateBlock(partialSums([1, ...c], q), { q: String(q), belief: "50, 68, 90, 99" });
        for (const method of ["conjugate", "conjugate-first", "uniform"]) {
          const widths = [50, 68, 90, 99].map((degree) => scalar(result, `${method}/${degree}`));
          expect(widths).toEqual([...widths].sort((a, b) => a - b));
        }
      }),
      { numRuns: 60 },
    );
  });

  it("giving the leading value as a number changes no estimate from c_1", () => {
    // The reference is the same 10, said in two ways.
    const given = evaluateBlock(series, { q: "0.3", reference: "10" });
    const leading = evaluateBlock(series, { q: "0.3" });
    expect(scalar(given, "differences")).toBe(scalar(leading, "differences"));
    expect(scalar(given, "uniform/68")).toBe(scalar(leading, "uniform/68"));
  });

  it("no text throws", () => {
    const text = fc.oneof(
      fc.string(),
      fc.constantFrom("1", "0.5", "1e400", "1/0", "−2", "LO", "p/Lambda", "100", "68,95"),
    );
    fc.assert(
      fc.property(
        text,
        text,
        text,
        text,
        text,
        text,
        text,
        (order, value, q, belief, nu0, tau0, reference) => {
          const inputs = { ...blockInputs({ 0: "1" }, { q, belief, nu0, tau0, reference }) };
          const rows = [...inputs.orders, { id: "x", order, value, name: "" }];
          const result = truncationError.evaluate({ ...inputs, orders: rows }, null, aloneContext);
          expect(result.value === null).toBe(result.scalars.length === 0);
          expect(JSON.parse(JSON.stringify(result))).toEqual(result);
        },
      ),
      { numRuns: 300 },
    );
  });
});

describe("what is stated beside the numbers", () => {
  it("is a working with the formulas filled in", () => {
    const { working } = evaluateBlock(series, { q: "0.3", unit: "pb" });
    const headings = working.flatMap((step) => (step.step === "heading" ? [step.text] : []));
    expect(headings).toEqual([
      "Coefficients",
      "Conjugate prior",
      "Uniform prior",
      "First omitted term",
      "Differences of orders",
      "If Q were another",
      "What this assumes",
    ]);
    const formulas = working.flatMap((step) => (step.step === "formula" ? [step.latex] : [])).join("\n");
    expect(formulas).toContain("c_{3} = \\frac{X^{(3)} - X^{(2)}}{X_{\\mathrm{ref}}\\, Q^{3}} = 0.30000");
    expect(formulas).toContain("\\mathrm{pb}");
  });

  it("is typeset without a complaint, whatever the unit and the numbers", () => {
    const cases = [
      evaluateBlock(series, { q: "0.30(5)", unit: "fm^-1" }),
      evaluateBlock(series, { q: "1.3", unit: "\\%_{}$&#~" }),
      evaluateBlock({ 0: "1e-30", 1: null, 2: "-3e12" }, { q: "1e-9", belief: "0.1, 68.27, 99.9999" }),
      evaluateBlock({ 0: "4" }, { q: "0.5", nu0: "0.5" }),
    ];
    const typesets = (latex: string) =>
      katex.renderToString(latex, { throwOnError: true, strict: "error", displayMode: true });
    for (const { working, scalars } of cases) {
      expect(working.length).toBeGreaterThan(5);
      for (const step of working) {
        if (step.step === "formula") expect(typesets(step.latex)).toContain("katex");
        else expect(inlineFormulas(step.text).map(typesets)).toHaveLength(inlineFormulas(step.text).length);
      }
      for (const { label } of scalars) inlineFormulas(label).forEach(typesets);
    }
  });

  it("names the value with the error of the highlighted method as its uncertainty", () => {
    const result = evaluateBlock(series, { q: "0.3", unit: "pb", method: "uniform prior" });
    const value = result.scalars.find(({ id }) => id === "value")?.value;
    expect(value).toEqual({ type: "number", value: 10.711, sigma: scalar(result, "uniform/68"), unit: "pb" });
  });
});
