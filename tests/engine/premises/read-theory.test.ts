import { describe, expect, it } from "vitest";
import type { FieldKind } from "#engine/premises/theory.ts";
import { fieldKinds } from "#engine/premises/theory.ts";
import { problemsOf, termOf, theoryFrom, type Sketch } from "./state.ts";

describe("dimensions and ultraviolet weights by kind", () => {
  // Own derivation: the quadratic action is dimensionless; the weight is read off the propagator p^(2δ − d).
  const isotropic: Partial<Record<FieldKind, readonly [dimension: string, weight: string]>> = {
    "real scalar": ["1/2*d - 1", "1/2*d - 1"],
    "complex scalar": ["1/2*d - 1", "1/2*d - 1"],
    "Weyl spinor": ["1/2*d - 1/2", "1/2*d - 1/2"],
    "Majorana spinor": ["1/2*d - 1/2", "1/2*d - 1/2"],
    "Dirac spinor": ["1/2*d - 1/2", "1/2*d - 1/2"],
    "gauge potential": ["1/2*d - 1", "1/2*d - 1"],
    "massive vector": ["1/2*d - 1", "1/2*d"],
    "massive vector, conserved current": ["1/2*d - 1", "1/2*d - 1"],
    "static heavy field": ["1/2*d - 1/2", "1/2*d - 1/2"],
    "spin 3/2": ["1/2*d - 1/2", "1/2*d - 1/2"],
    "massive spin 3/2": ["1/2*d - 1/2", "1/2*d + 1/2"],
    "metric fluctuation": ["1/2*d - 1", "1/2*d - 1"],
    "field strength": ["1/2*d", "1/2*d"],
    ghost: ["1/2*d - 1", "1/2*d - 1"],
  };
  const anisotropic: Partial<Record<FieldKind, string>> = {
    "Schrödinger field": "1/2*D",
    "static heavy field": "1/2*D",
    "Dirac spinor": "1/2*D",
    "Weyl spinor": "1/2*D",
    "Majorana spinor": "1/2*D",
    "anisotropic scalar": "1/2*D - 1/2*z",
    "real scalar": "1/2*D - 1/2*z",
    "complex scalar": "1/2*D - 1/2*z",
  };
  it.each(fieldKinds)("%s", (kind) => {
    const flat = theoryFrom({ d: "d", fields: { x: kind } });
    const tilted = theoryFrom({ D: "D", z: "z", fields: { x: kind } });
    const [dimension, weight] = isotropic[kind] ?? [];
    expect([flat.fields[0]?.dimension.toString(), flat.fields[0]?.weight.toString()]).toEqual([
      dimension,
      weight,
    ]);
    expect(tilted.fields[0]?.dimension.toString()).toBe(anisotropic[kind]);
    expect(flat.problems.map(({ code }) => code)).toEqual(
      dimension === undefined ? ["kind-needs-anisotropic"] : [],
    );
    expect(tilted.problems.map(({ code }) => code)).toEqual(
      anisotropic[kind] === undefined ? ["kind-needs-isotropic"] : [],
    );
  });
});

describe("overridden dimensions", () => {
  const field = (dimension: string, kind: FieldKind = "real scalar", d = "d") =>
    theoryFrom({ d, fields: { x: { kind, dimension } } }).fields[0];
  it.each([
    ["(d-4)/2", "1/2*d - 2", true],
    ["d/2 - 1", "1/2*d - 1", false],
    ["(d-2)/2 + 1/40", "1/2*d - 39/40", true],
    ["2", "2", true],
  ])("%s", (typed, form, overridden) => {
    expect([field(typed)?.dimension.toString(), field(typed)?.overridden]).toEqual([form, overridden]);
  });
  it("put the number of d in place", () =>
    expect(field("(d-4)/2", "real scalar", "3")?.dimension.toString()).toBe("-1/2"));
  it("move the weight along, and keep what a massive vector's propagator adds", () => {
    expect(field("(d-2)/2 + 1/10", "massive vector")?.weight.toString()).toBe("1/2*d + 1/10");
  });
  it("may name an exact pure number among the scales, and nothing else", () => {
    const sketch = (value: string): Sketch => ({
      d: "3",
      scales: { gamma: value },
      fields: { phi: { kind: "real scalar", dimension: "(d-2)/2 + gamma" } },
    });
    expect(theoryFrom(sketch("0.018")).fields[0]?.dimension.toString()).toBe("259/500");
    expect(problemsOf(sketch("0.018(1)"))).toEqual(["unknown-symbol at fields/f1/dimension"]);
    expect(problemsOf(sketch("2 GeV"))).toEqual(["unknown-symbol at fields/f1/dimension"]);
  });
  it("give a meaning to kinds that have none in this spacetime", () => {
    expect(
      theoryFrom({ D: "2", z: "1", fields: { A: { kind: "gauge potential", dimension: "1/2" } } }).problems,
    ).toEqual([]);
  });
});

describe("terms", () => {
  const fields: Sketch["fields"] = {
    phi: "real scalar",
    psi: "Dirac spinor",
    V: "massive vector",
    F: "field strength",
  };
  it.each([
    // term, Δ, dimension of the whole coefficient, the same with ultraviolet weights
    ["1/2 (dphi)^2", "d", "0", "0"],
    ["m^2/2 phi^2", "d - 2", "2", "2"],
    ["lambda/4! phi^4", "2*d - 4", "-d + 4", "-d + 4"],
    ["c/Lambda^2 phi^6", "3*d - 6", "-2*d + 6", "-2*d + 6"],
    ["y phi psibar psi", "3/2*d - 2", "-1/2*d + 2", "-1/2*d + 2"],
    ["g psibar V psi", "3/2*d - 2", "-1/2*d + 2", "-1/2*d + 1"],
    ["-1/4 F^2", "d", "0", "0"],
    ["c (dphi)^2 phi^2", "2*d - 2", "-d + 2", "-d + 2"],
  ])("%s", (term, dimension, coefficient, ultraviolet) => {
    const read = termOf({ d: "d", fields, terms: [term] });
    expect([
      read.dimension.toString(),
      read.coefficient.toString(),
      read.ultravioletCoefficient.toString(),
    ]).toEqual([dimension, coefficient, ultraviolet]);
  });
  it("counts ∂ₜ as z", () => {
    const read = termOf({ D: "D", z: "z", fields: { phi: "anisotropic scalar" }, terms: ["(d_t phi)^2"] });
    expect([
      read.derivativeWeight.toString(),
      read.dimension.toString(),
      read.coefficient.toString(),
    ]).toEqual(["2*z", "D + z", "0"]);
  });

  it.each([
    ["1/2 (dphi)^2", true],
    ["phi box phi", true],
    ["i psibar dslash psi", true],
    ["-1/4 F^2", true],
    ["|DPhi|^2", true],
    ["m^2 phi^2", false],
    ["phi^4", false],
    ["(dphi) (dchi)", false],
    ["(dPhi)^2", false],
    ["psibar psi", false],
  ])("%s: kinetic is %s", (term, kinetic) => {
    expect(
      termOf({ fields: { ...fields, chi: "real scalar", Phi: "complex scalar" }, terms: [term] }).kinetic,
    ).toBe(kinetic);
  });
  it("knows both kinetic terms of a Schrödinger field at z = 2", () => {
    const theory = theoryFrom({
      D: "3",
      z: "2",
      fields: { n: "Schrödinger field" },
      terms: ["i n^\\dagger d_t n", "1/(2M) n^\\dagger grad^2 n"],
    });
    expect(theory.terms.map(({ kinetic }) => kinetic)).toEqual([true, true]);
  });
});

describe("symmetries", () => {
  const sketch = (terms: readonly string[]): Sketch => ({
    symmetries: { parity: "Z2", colour: "Z_3", number: "U(1)" },
    fields: {
      chi: { kind: "real scalar", charges: "odd" },
      q: { kind: "complex scalar", charges: "even, 1" },
      psi: { kind: "Dirac spinor", charges: "0, 0, 1/3" },
      W: { kind: "gauge potential", charges: ", , 1" },
    },
    terms,
  });
  it.each([
    ["chi^2", true],
    ["chi^3", false],
    ["q^3", true],
    ["q^2", false],
    ["qbar q", true],
    ["psibar psi", true],
    ["psi^3", false],
    ["W^\\dagger psi^3", true],
    ["W^\\dagger W", true],
    ["W^2", false],
  ])("%s is allowed: %s", (term, allowed) => expect(termOf(sketch([term])).allowed).toBe(allowed));
  it("make a charged vector differ from its conjugate", () => {
    const theory = theoryFrom(sketch([]));
    expect(theory.fields.map(({ selfConjugate }) => selfConjugate)).toEqual([true, false, false, false]);
    expect(theoryFrom({ fields: { A: "gauge potential" } }).fields[0]?.selfConjugate).toBe(true);
  });
  it.each([
    [{ symmetries: { x: "SU(2)" } }, "group-unknown at symmetries/s1/group"],
    [{ symmetries: { x: "Z1" } }, "group-unknown at symmetries/s1/group"],
    [{ fields: { a: { kind: "real scalar", charges: "1" } } }, "charges-too-many at fields/f1/charges"],
    [
      { symmetries: { x: "Z3" }, fields: { a: { kind: "complex scalar", charges: "odd" } } },
      "parity-without-z2 at fields/f1/charges",
    ],
    [
      { symmetries: { x: "Z3" }, fields: { a: { kind: "complex scalar", charges: "1/2" } } },
      "charge-not-whole at fields/f1/charges",
    ],
    [
      { symmetries: { x: "U(1)" }, fields: { a: { kind: "complex scalar", charges: "x" } } },
      "charge-unreadable at fields/f1/charges",
    ],
    [
      { symmetries: { x: "U(1)" }, fields: { a: { kind: "real scalar", charges: "1" } } },
      "real-field-charged at fields/f1/charges",
    ],
  ] as const)("%#: %s", (given, problem) => expect(problemsOf(given)).toEqual([problem]));
});

describe("scales", () => {
  it("use each other in any order and keep their unit", () => {
    const { scales } = theoryFrom({
      scales: {
        Q: "p/Lambda",
        p: "350 GeV",
        Lambda: "3.2(4) TeV",
        r: "1.2 fm",
        k: "1.2 fm^-1",
        twice: "2 Lambda",
      },
    });
    expect(
      scales.map(({ value, sigma, unit }) => [
        Number(value?.toPrecision(8)),
        Number(sigma.toPrecision(8)),
        unit,
      ]),
    ).toEqual([
      [0.109375, 0.013671875, ""],
      [350, 0, "GeV"],
      [3.2, 0.4, "TeV"],
      [1.2, 0, "fm"],
      [1.2, 0, "fm^-1"],
      [6.4, 0.8, "TeV"],
    ]);
    expect(scales.map(({ gev }) => gev && Number(gev.value.toPrecision(6)))).toEqual([
      null,
      350,
      3200,
      null,
      0.236792,
      6400,
    ]);
  });
  it("may be called z only where z is no exponent", () => {
    expect(problemsOf({ scales: { z: "2" } })).toEqual([]);
    expect(problemsOf({ D: "3", z: "2", scales: { z: "2" } })).toEqual([
      "symbol-reserved at scales/k1/symbol",
    ]);
    expect(problemsOf({ D: "3", z: "z", fields: { z: "real scalar" } })).toEqual([
      "symbol-reserved at fields/f1/symbol",
    ]);
  });
  it("without a value have no number, and that is no problem", () => {
    const theory = theoryFrom({ scales: { Lambda: ["", "heavy"] } });
    expect([theory.scales[0]?.value, theory.problems]).toEqual([null, []]);
  });
  it.each([
    [{ a: "b", b: "2a" }, ["scale-circular at scales/k1/value", "scale-circular at scales/k2/value"]],
    [{ a: "a" }, ["scale-circular at scales/k1/value"]],
    [{ a: "q" }, ["unknown-symbol at scales/k1/value"]],
    [{ a: "1 GeV + 1" }, ["units-differ at scales/k1/value"]],
    [{ a: "1/0", b: "2 a" }, ["division-by-zero at scales/k1/value", "scale-in-error at scales/k2/value"]],
    [{ a: "", b: "2 a" }, ["scale-has-no-number at scales/k2/value"]],
    [{ i: "1" }, ["symbol-reserved at scales/k1/symbol"]],
    [{ d: "1" }, ["symbol-reserved at scales/k1/symbol"]],
    [{ GeV: "1" }, ["symbol-reserved at scales/k1/symbol"]],
  ])("%o", (scales, problems) => expect(problemsOf({ scales })).toEqual(problems));
});

describe("a bad row is a problem of its own; the rest computes", () => {
  it("in every table at once", () => {
    const sketch: Sketch = {
      fields: {
        phi: "real scalar",
        "phi chi": "real scalar",
        "\\phi": "real scalar",
        omega: { kind: "real scalar", dimension: "q" },
      },
      scales: { phi: "1 GeV", Lambda: "3 TeV" },
      terms: [
        "phi^4",
        "phi^",
        "omega^2",
        "phi^6/Lambda^2",
        { term: "phi^2", assigned: "1 GeV" },
        { term: "phi^2", natural: "0" },
      ],
    };
    expect(problemsOf(sketch)).toEqual([
      "symbol-unreadable at fields/f2/symbol",
      "symbol-duplicate at fields/f3/symbol",
      "unknown-symbol at fields/f4/dimension",
      "symbol-duplicate at scales/k1/symbol",
      "missing-operand at terms/t2/term",
      "field-in-error at terms/t3/term",
      "size-has-unit at terms/t5/assigned",
      "size-not-positive at terms/t6/natural",
    ]);
    const theory = theoryFrom(sketch);
    expect(theory.terms.map(({ rowId }) => rowId)).toEqual(["t1", "t4", "t5", "t6"]);
    // A size that cannot be read is unknown; it is never taken for 1.
    expect([theory.terms[2]?.assigned?.value, theory.terms[3]?.natural]).toEqual([NaN, NaN]);
  });
  it("passes over rows that nobody has touched", () => {
    expect(problemsOf({ fields: { "": "real scalar" }, scales: { "": "" }, terms: [""] })).toEqual([]);
  });
  it.each([
    [{ d: "x" }, "dimension-unreadable at d", "d"],
    [{ d: "" }, "dimension-unreadable at d", "d"],
    [{ d: "0" }, "dimension-not-positive at d", "d"],
    [{ d: "-4" }, "dimension-not-positive at d", "d"],
    [{ D: "3", z: "q" }, "dimension-unreadable at z", "z + 3"],
  ])("%o leaves the dimension symbolic", (sketch, problem, measure) => {
    expect(problemsOf(sketch)).toEqual([problem]);
    expect(theoryFrom(sketch).measure.toString()).toBe(measure);
  });
  it("reads fractions and decimals for d", () => {
    expect(theoryFrom({ d: "8/3" }).measure.toString()).toBe("8/3");
    expect(theoryFrom({ d: "3.99" }).measure.toString()).toBe("399/100");
  });
});
