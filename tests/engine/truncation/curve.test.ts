import { describe, expect, it } from "vitest";
import { wordProblem } from "#contract/problem-words.ts";
import { theoryOf } from "../theory-builder.ts";
import { evaluateCurve, ternTable, type Table } from "./curve-block.ts";
import { evaluateBlock, scalar } from "./truncation-block.ts";

const theory = theoryOf({
  fields: {},
  terms: {},
  scales: [
    { symbol: "Lambda", role: "heavy", value: 0.6, unit: "GeV" },
    { symbol: "m", role: "light", value: 138, unit: "MeV" },
    { symbol: "p", role: "probe", value: 200, unit: "MeV" },
  ],
});

const codes = (list: readonly { code: string }[]) => list.map(({ code }) => code);
/** Every problem and notice is said without a fact missing. */
function said(result: ReturnType<typeof evaluateCurve>): string[] {
  const words = [...result.problems, ...result.notices].map(wordProblem);
  for (const sentence of words) expect(sentence).not.toMatch(/\?(?!$)|undefined|NaN/);
  return words;
}
const three: Table = {
  x: [60, 120, 180],
  orders: { 0: [10, 8, 6], 1: [10.9, 8.5, 6.6], 2: [10.63, 8.6, 6.1] },
};

describe("the methods along x", () => {
  it("are at each point what a block typed for that point alone has", () => {
    const along = evaluateCurve({ d: three }, { at: "120", sets: "with sets A, B, C" }, theory);
    const alone = evaluateBlock({ 0: 8, 1: 8.5, 2: 8.6 }, { q: "0.2", sets: "with sets A, B, C" });
    expect(along.problems).toEqual([]);
    const bands = alone.value?.orders.at(-1)?.bands ?? [];
    expect(bands.length).toBeGreaterThan(14);
    for (const [index, band] of bands.entries()) {
      expect(along.value?.orders.at(-1)?.bands[index]?.halfWidth).toBeCloseTo(band.halfWidth, 10);
      const drawn = along.value?.curve?.bands.find(
        (one) =>
          one.order === 2 &&
          one.method === band.method &&
          one.omitted === band.omitted &&
          one.degree === band.degree,
      );
      if (!band.method.startsWith("prior set") || band.omitted === "all omitted orders")
        expect(drawn?.halfWidths[1]).toBeCloseTo(band.halfWidth, 10);
    }
    expect(scalar(along, "at")).toBe(120);
    expect(along.value?.curve?.q).toEqual([0.1, 0.2, 0.3]);
  });

  it("take Q as an expression in x and scales, with a maximum and in a smooth form", () => {
    const sharp = evaluateCurve({ d: three }, { q: "max(p, m)/Lambda" }, theory);
    expect(sharp.value?.curve?.q).toEqual([0.23, 0.23, 0.3]);
    const smooth = evaluateCurve({ d: three }, { q: "(p^8 + m^8)/(p^7 + m^7)/Lambda" }, theory);
    const wanted = [60, 120, 180].map((p) => (p ** 8 + 138 ** 8) / (p ** 7 + 138 ** 7) / 600);
    smooth.value?.curve?.q.forEach((q, index) => expect(q).toBeCloseTo(wanted[index] ?? NaN, 10));
  });

  it("stop at the last order known at a point, and are silent where one between is missing", () => {
    const table = {
      x: [60, 120, 180],
      orders: { 0: [10, 8, 6], 1: [10.9, null, 6.6], 2: [10.63, 8.6, null] },
    };
    const result = evaluateCurve({ d: table }, { at: "60" }, theory);
    const last = (order: number) =>
      result.value?.curve?.bands.find(
        (band) => band.order === order && band.method === "conjugate prior" && band.degree === "68",
      )?.halfWidths;
    expect(last(2)?.map((one) => one !== null)).toEqual([true, false, false]);
    expect(last(1)?.map((one) => one !== null)).toEqual([true, false, true]);
    expect(codes(result.notices)).toContain("points-incomplete");
    expect(said(result).join(" ")).toContain("2 of 3 points lack an order");
    expect(codes(evaluateCurve({ d: table }, { at: "120" }, theory).problems)).toEqual(["point-incomplete"]);
  });

  it("leave out points where the reference vanishes, and say so", () => {
    const table = { ...three, reference: [10, 0, 6] };
    const result = evaluateCurve({ d: table }, { at: "60" }, theory);
    expect(codes(result.notices)).toContain("reference-vanishes");
    expect(result.value?.curve?.orders[1]?.coefficients[1]).toBeNull();
    said(result);
  });

  it("refuse sums where Q reaches 1, say from where to where, and keep the first omitted term", () => {
    const table = { ...three, x: [500, 600, 700] };
    const result = evaluateCurve({ d: table }, { at: "500" }, theory);
    const of = (omitted: string) =>
      result.value?.curve?.bands
        .find((band) => band.order === 2 && band.method === "conjugate prior" && band.omitted === omitted)
        ?.halfWidths.map((one) => one !== null);
    expect(of("all omitted orders")).toEqual([true, false, false]);
    expect(of("first omitted term")).toEqual([true, true, true]);
    expect(said(result).join(" ")).toContain("from x = 600 to 700");
  });

  it("take an empty column for an order absent by symmetry", () => {
    const table = {
      x: [60, 120],
      orders: { 0: [10, 8], 1: [null, null], 2: [10.63, 8.6], 3: [null, null] },
    };
    const result = evaluateCurve({ d: table }, { q: "p/Lambda" }, theory);
    expect(result.value?.orders.at(-1)?.nextOrder).toBe(4);
    expect(result.value?.coefficients.map(({ value }) => value === null)).toEqual([false, true, false, true]);
  });

  it.each<[string, Table, Parameters<typeof evaluateCurve>[1], string]>([
    ["an empty table", { x: [], orders: { 0: [] } }, {}, "curve-empty"],
    ["no predictions", { x: [1, 2], orders: {} }, {}, "curve-empty"],
    ["units that differ", { ...three, reference: [10, 8, 6], otherUnit: "fm" }, {}, "curve-units-differ"],
    ["an x outside", three, { at: "900" }, "at-unreadable"],
    ["an x that is no number", three, { at: "there" }, "at-unreadable"],
    ["Q with units", three, { q: "p" }, "q-has-units"],
    ["Q that vanishes", { ...three, x: [0, 1, 2] }, { q: "p/Lambda" }, "q-not-positive-at"],
    ["a name that is a unit", three, { variable: "GeV" }, "variable-unreadable"],
    ["an unknown unit of x", { ...three, xUnit: "furlong" }, {}, "x-unit-unreadable"],
    ["an unknown breakdown scale", three, { breakdown: "Sigma" }, "breakdown-unknown"],
    [
      "limits of c̄ the wrong way round",
      three,
      { method: "prior set A", cbarLow: "9", cbarHigh: "2" },
      "cbar-limits-reversed",
    ],
    ["a c̄ that is no number", three, { method: "prior set B", cbarWidth: "wide" }, "cbar-unreadable"],
    ["half a term", three, { method: "prior set C", terms: "1.5" }, "terms-unreadable"],
    ["a c̄ that the coefficients exclude", three, { method: "prior set A", cbarHigh: "0.1" }, "cbar-excluded"],
  ])("say what is wrong: %s", (_, table, inputs, code) => {
    const result = evaluateCurve({ d: table }, inputs, theory);
    expect(codes(result.problems)).toContain(code);
    said(result);
  });

  it("need premises only when Q does", () => {
    expect(evaluateCurve({ d: three }, { q: "p/(600 MeV)" }).problems).toEqual([]);
    expect(evaluateCurve({ d: three }, { q: "0.3" }).value?.curve?.q).toEqual([0.3, 0.3, 0.3]);
    expect(codes(evaluateCurve({ d: three }, {}).problems)).toEqual(["q-needs-premises"]);
  });

  it("take only the drawn points into the result", () => {
    const result = evaluateCurve({ d: ternTable(500, 5) }, {}, theory);
    expect(result.value?.curve?.count).toBe(500);
    expect(result.value?.curve?.x.length).toBeLessThanOrEqual(120);
    expect(JSON.stringify(result).length).toBeLessThan(200_000);
  });
});

describe("the correlated model in a block", () => {
  const correlated = { method: "correlated along x" } as const;
  it("finds the breakdown scale and the length scale the data were made with", () => {
    const heard: unknown[] = [];
    const result = evaluateCurve({ d: ternTable(121, 5) }, correlated, theory, heard as never[]);
    expect(result.problems).toEqual([]);
    said(result);
    expect(scalar(result, "breakdown/95/low")).toBeLessThan(0.6);
    expect(scalar(result, "breakdown/95/high")).toBeGreaterThan(0.6);
    expect(scalar(result, "length/95/low")).toBeLessThan(72);
    expect(scalar(result, "length/95/high")).toBeGreaterThan(50);
    expect(heard.length).toBeGreaterThan(10);
    expect(codes(result.notices)).toContain("points-thinned");
    expect(result.value?.highlighted?.method).toBe("correlated along x");
    const { findings = [] } = result.value?.curve?.correlated ?? {};
    expect(findings.map(({ check }) => check)).toEqual(["coverage", "distance", "pivoted", "coefficients"]);
    for (const { says } of findings) expect(says).toMatch(/^[A-Z0-9].*\.$/);
  });

  it("says which orders shift more than the others allow", () => {
    const table = ternTable(61, 5);
    // Order 3 is made three times as large as it is, and everything above it is shifted along.
    const shift = (table.orders[3] ?? []).map(
      (value, index) => 3 * ((value ?? 0) - (table.orders[2]?.[index] ?? 0)),
    );
    const orders = Object.fromEntries(
      Object.entries(table.orders).map(([n, values]) => [
        n,
        Number(n) < 3 ? values : values.map((value, index) => (value ?? 0) + 4 * (shift[index] ?? 0)),
      ]),
    );
    const result = evaluateCurve({ d: { ...table, orders } }, correlated, theory);
    const distance = result.value?.curve?.correlated?.findings.find(({ check }) => check === "distance");
    expect(distance?.against).toBe(true);
    expect(distance?.says).toContain("rder 3 shifts more than these errors allow at 95 %");
    expect(scalar(result, "tail/3")).toBeLessThan(1e-4);
  });

  it("narrows the breakdown scale when observables are combined", () => {
    const one = ternTable(61, 4);
    const other = { ...ternTable(61, 5), name: "k" };
    const alone = evaluateCurve({ d: one }, correlated, theory);
    const both = evaluateCurve(
      { d: one, e: other },
      { ...correlated, observables: [{ id: "r", data: "e", q: "k/Lambda" }] },
      theory,
    );
    expect(both.problems).toEqual([]);
    const width = (result: typeof alone) =>
      scalar(result, "breakdown/68/high") / scalar(result, "breakdown/68/low");
    expect(width(both)).toBeLessThan(width(alone));
    expect(both.value?.curve?.correlated?.breakdown?.alone).toHaveLength(2);
  });

  it("follows a Q that is not inverse to the breakdown scale", () => {
    const result = evaluateCurve(
      { d: ternTable(41, 4) },
      { ...correlated, q: "p/(Lambda + m/10)", breakdown: "Lambda" },
      theory,
    );
    expect(result.problems).toEqual([]);
    expect(scalar(result, "breakdown/median")).toBeGreaterThan(0.35);
    expect(scalar(result, "breakdown/median")).toBeLessThan(1);
  });

  it.each<[string, Table, Parameters<typeof evaluateCurve>[1], string]>([
    ["two points", { x: [60, 120], orders: { 0: [10, 8], 1: [10.9, 8.5] } }, {}, "correlated-few-points"],
    [
      "no coefficient",
      { x: [60, 90, 120], orders: { 0: [10, 8, 7] } },
      {},
      "correlated-without-coefficients",
    ],
    [
      "nothing but zeros",
      { x: [60, 90, 120], orders: { 0: [9, 8, 7], 1: [9, 8, 7] } },
      {},
      "correlated-all-zero",
    ],
    ["a length below 0", three, { length: "-3" }, "length-unreadable"],
    ["a nugget of 1", three, { nugget: "1" }, "nugget-unreadable"],
    ["limits without sense", three, { breakdownFrom: "x^" }, "breakdown-limit-unreadable"],
    ["limits the wrong way round", three, { breakdownFrom: "5 GeV" }, "breakdown-limits-reversed"],
    [
      "a prior without width",
      three,
      { breakdownPrior: "normal in its logarithm", breakdownWidth: "0" },
      "breakdown-width-unreadable",
    ],
    ["the same data twice", three, { observables: [{ id: "r", data: "d", q: "" }] }, "observable-twice"],
    [
      "a crowd of observables",
      three,
      { observables: Array.from({ length: 9 }, (_, row) => ({ id: `r${row}`, data: "", q: "" })) },
      "observables-too-many",
    ],
  ])("says what is wrong: %s", (_, table, inputs, code) => {
    const result = evaluateCurve({ d: table }, { ...correlated, ...inputs }, theory);
    expect(codes(result.problems)).toContain(code);
    said(result);
  });

  it("says when the points are too few for the length scale", () => {
    const rough: Table = {
      x: [60, 90, 120, 150, 180, 210, 240, 270],
      orders: {
        0: [10, 10, 10, 10, 10, 10, 10, 10],
        1: [11, 9, 12.1, 7.3, 13, 7, 14, 5.5],
        2: [11.1, 8.8, 12.5, 7, 12.4, 7.9, 12.3, 7.4],
      },
    };
    const result = evaluateCurve({ d: rough }, correlated, theory);
    expect(codes(result.notices)).toContain("length-not-resolved");
    said(result);
  });

  it("takes a table of many thousand rough points, and repeated ones, by fitting some of them", () => {
    const count = 6000;
    const x = Array.from({ length: count }, (_, index) => 60 + Math.floor(index / 2) / 10);
    const rough = (n: number) => x.map((at, index) => 10 + Math.sin(index * index + n) * (at / 600) ** n);
    const result = evaluateCurve(
      { d: { x, orders: { 0: x.map(() => 10), 1: rough(1) } } },
      { ...correlated, length: "0.1" },
      theory,
    );
    expect(result.problems).toEqual([]);
    expect(result.value?.curve?.correlated?.points).toBe(600);
    expect(codes(result.notices)).toContain("points-thinned");
  });

  it("says when the prior and not the data ends the breakdown scale", () => {
    const result = evaluateCurve({ d: ternTable(61, 3) }, { ...correlated, breakdownTo: "0.55 GeV" }, theory);
    expect(codes(result.notices)).toContain("breakdown-at-limit");
    said(result);
  });

  it("says how an ill-conditioned kernel was regularised", () => {
    const result = evaluateCurve(
      { d: ternTable(61, 3) },
      { ...correlated, nugget: "1e-17", length: "300000" },
      theory,
    );
    expect(codes(result.notices)).toContain("kernel-regularised");
    expect(said(result).join(" ")).toContain("was added to its diagonal instead");
  });

  it("allows for the digits in which data are given", () => {
    const table = ternTable(41, 4);
    const twoDecimals = Object.fromEntries(
      Object.entries(table.orders).map(([n, values]) => [
        n,
        values.map((value) => Number((value ?? 0).toFixed(2))),
      ]),
    );
    const result = evaluateCurve({ d: { ...table, orders: twoDecimals } }, correlated, theory);
    expect(codes(result.notices)).toContain("values-rounded");
    expect(scalar(result, "breakdown/95/high")).toBeGreaterThan(0.6);
  });

  it("needs data along x", () => {
    const result = evaluateBlock({ 0: 8, 1: 8.5, 2: 8.6 }, { q: "0.2", ...correlated });
    expect(codes(result.problems)).toEqual(["correlated-needs-data"]);
  });

  it("estimates no breakdown scale where Q names none", () => {
    const result = evaluateCurve({ d: three }, { ...correlated, q: "p/(600 MeV)" }, theory);
    expect(codes(result.notices)).toContain("breakdown-not-in-q");
    expect(result.value?.curve?.correlated?.breakdown).toBeNull();
  });
});

describe("uncertainty of Q", () => {
  const half = (lambda: number, spread = 0) => {
    const theory = theoryOf({
      fields: {},
      terms: {},
      scales: [{ symbol: "Lambda", role: "heavy", value: lambda, sigma: spread, unit: "MeV" }],
    });
    const { value } = evaluateCurve(
      { d: ternTable(21, 3) },
      { method: "correlated along x", at: "150", length: "60", nu0: "0" },
      theory,
    );
    return value?.highlighted;
  };
  it("is carried into the correlated band, the coefficients at every point included", () => {
    // ℓ is given and ν₀ = 0, so the band at another breakdown scale is the whole effect, computed apart.
    const moved = half(600, 30);
    // Q ± σ_Q with σ_Q/Q = 30/600: what Λ = 600/0.95 and 600/1.05 give.
    const [lower, upper] = [half(600 / 0.95)?.halfWidth ?? NaN, half(600 / 1.05)?.halfWidth ?? NaN];
    const here = half(600)?.halfWidth ?? NaN;
    expect(moved?.halfWidth).toBeCloseTo(here, 10);
    expect(moved?.fromQ).toBeCloseTo(Math.max(Math.abs(lower - here), Math.abs(upper - here)), 8);
    expect(moved?.fromQ).toBeGreaterThan(0);
    expect(half(600)?.fromQ).toBe(0);
  });
});
