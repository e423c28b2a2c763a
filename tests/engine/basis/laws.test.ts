import { describe, expect, it } from "vitest";
import { standardModel } from "#engine/basis/contents.ts";
import { countOperators } from "#engine/basis/count.ts";
import { cycleTypes, factorial, partitionNumber } from "#engine/basis/cycle-types.ts";
import { GaugeIntegral } from "#engine/basis/gauge-integral.ts";
import { basisShape, type BasisInputs } from "#engine/basis/inputs.ts";
import { OrthogonalIntegral, symmetricCharacter } from "#engine/basis/orthogonal-integral.ts";
import { readContent } from "#engine/basis/read-content.ts";
import {
  conjugate,
  readRepresentation,
  representationTable,
  type Representation,
} from "#engine/basis/representations.ts";
import { operatorsAt } from "#engine/basis/value.ts";
import { amountOfWork } from "#engine/basis/work.ts";
import { codes, count, evaluate, field, group, totals } from "./ask.ts";

const basisInputs = Object.fromEntries(
  Object.entries(basisShape.fields).map(([name, spec]) => [name, spec.initial]),
) as unknown as BasisInputs; // every single field of the shape

const representation = (text: string, n: number): Representation =>
  readRepresentation(text, n) ?? expect.fail(`SU(${n}) has no ${text}`);

describe("representations of SU(N)", () => {
  // Dimensions, indices and anomalies as tabulated by Slansky, Phys. Rep. 79 (1981) 1.
  it.each([
    ["3", 3, 3, 0.5, 1],
    ["3bar", 3, 3, 0.5, -1],
    ["6", 3, 6, 2.5, 7],
    ["8", 3, 8, 3, 0],
    ["10", 3, 10, 7.5, 27],
    ["27", 3, 27, 27, 0],
    ["(1,1)", 3, 8, 3, 0],
    ["4", 2, 4, 5, 0],
    ["10", 5, 10, 1.5, 1],
    ["5bar", 5, 5, 0.5, -1],
    ["adj", 5, 24, 5, 0],
  ])("%s of SU(%d)", (text, n, dimension, index, anomaly) => {
    const found = representation(text, n);
    expect(found.dimension).toBe(dimension);
    expect(found.weights.reduce((sum, { multiplicity }) => sum + multiplicity, 0)).toBe(dimension);
    expect(found.index).toBeCloseTo(index, 9);
    expect(found.anomaly).toBe(anomaly);
    expect(conjugate(conjugate(found)).name).toBe(found.name);
  });
  it.each([
    ["7", 3],
    ["x", 3],
    ["(1,1,1)", 3],
    ["5", 3],
    ["-3", 3],
  ])("%s of SU(%d) does not exist", (text, n) => {
    expect(readRepresentation(text, n)).toBeNull();
  });
});

describe("group integrals", () => {
  const singlets = (n: number, ...factors: readonly (readonly [string, number])[]) => {
    const names = [...new Set(factors.map(([text]) => text))];
    const integral = new GaugeIntegral(
      n,
      names.map((text) => representation(text, n)),
    );
    const multiset = factors.reduce(
      (sum, [text, k]) => integral.multisets.add(sum, integral.element(names.indexOf(text), k)),
      integral.multisets.empty,
    );
    return integral.value(multiset);
  };
  it.each([
    [
      3,
      [
        ["3", 1],
        ["3bar", 1],
      ],
      1,
    ],
    [
      3,
      [
        ["3", 1],
        ["3", 1],
      ],
      0,
    ],
    [
      3,
      [
        ["3", 1],
        ["3", 1],
        ["3", 1],
      ],
      1,
    ],
    [
      3,
      [
        ["8", 1],
        ["8", 1],
        ["8", 1],
      ],
      2,
    ],
    [
      3,
      [
        ["8", 1],
        ["8", 1],
        ["8", 1],
        ["8", 1],
      ],
      8,
    ],
    [
      2,
      [
        ["2", 1],
        ["2", 1],
        ["2", 1],
        ["2", 1],
      ],
      2,
    ],
    // The second power is symmetric minus antisymmetric: −1 for a pseudoreal doublet, 1 for a real triplet.
    [2, [["2", 2]], -1],
    [2, [["3", 2]], 1],
    [3, [["3", 3]], 1],
  ] as const)("SU(%d) has in %j so many singlets: %d", (n, factors, expected) => {
    expect(singlets(n, ...factors)).toBe(expected);
  });

  it("O(N) has one singlet for each way to pair vectors, as long as N is large enough", () => {
    const value = (n: number, ...cycles: number[]) => {
      const integral = new OrthogonalIntegral(n);
      return integral.value(
        cycles.reduce((sum, k) => integral.multisets.add(sum, k), integral.multisets.empty),
      );
    };
    expect([value(5, 1, 1), value(5, 1, 1, 1, 1), value(9, 1, 1, 1, 1, 1, 1)]).toEqual([1, 3, 15]);
    // O(1) is a sign: every even product of ±1 is invariant once.
    expect([value(1, 1, 1, 1, 1), value(1, 2), value(1, 1, 1, 1)]).toEqual([1, 1, 0]);
    // ∫ tr g² over O(N) is 1 (Diaconis, Shahshahani 1994).
    expect(value(6, 2)).toBe(1);
  });

  it("characters of the symmetric group are orthogonal", () => {
    const diagrams = [[4], [3, 1], [2, 2], [2, 1, 1], [1, 1, 1, 1]];
    for (const [i, a] of diagrams.entries())
      for (const [j, b] of diagrams.entries()) {
        const product = cycleTypes(4).reduce(
          (sum, { cycles, permutations }) =>
            sum + Number(permutations) * symmetricCharacter(a, cycles) * symmetricCharacter(b, cycles),
          0,
        );
        expect(product / Number(factorial(4))).toBe(i === j ? 1 : 0);
      }
  });
});

describe("cycle types", () => {
  it("are as many as Euler's recurrence says", () => {
    for (let n = 0; n <= 20; n++) expect(partitionNumber(n)).toBe(cycleTypes(n).length);
  });
});

describe("a count", () => {
  it("without fermions is that at n_f = 0", () => {
    const bosons = standardModel.fields.filter(({ flavours }) => flavours === "1");
    const whole = count({ ...standardModel, to: "10", flavours: "0" });
    expect(totals(whole)).toEqual(totals(count({ ...standardModel, fields: bosons, to: "10" })));
  });
  it("does not change when left and right, and with them all charges, are exchanged", () => {
    const fields = [
      field("Q", "left-handed spinor", "3, 1/3", "n_f"),
      field("u", "right-handed spinor", "3, 4/3", "n_f"),
      field("S", "complex scalar", "3bar, 1"),
    ];
    const mirrored = [
      field("Q", "right-handed spinor", "3bar, -1/3", "n_f"),
      field("u", "left-handed spinor", "3bar, -4/3", "n_f"),
      field("S", "complex scalar", "3, -1"),
    ];
    const groups = [group("colour", "SU(3)"), group("Y", "U(1)")];
    const texts = (rows: typeof fields) =>
      count({ groups, fields: rows, to: "9" }).totals.map(({ total }) => total.text);
    expect(texts(fields)).toEqual(texts(mirrored));
  });
  it("keeps one sign of a charge, or both, as it is told", () => {
    const fields = [field("phi", "complex scalar", "1")];
    const at = (keep: string) =>
      Number(operatorsAt(count({ groups: [group("Q", "U(1)", keep)], fields, to: "8" }), "6"));
    expect(at("2")).toBe(at("-2"));
    expect(at("2, -2")).toBe(2 * at("2"));
    const all = [-6, -4, -2, 0, 2, 4, 6].map((charge) => at(String(charge))).reduce((a, b) => a + b, 0);
    expect(at("all")).toBe(all);
  });
  it("of copies is that of separate fields", () => {
    const two = [field("a", "real scalar"), field("b", "real scalar")];
    expect(totals(count({ fields: two, to: "9" }))).toEqual(
      totals(count({ fields: [field("a", "real scalar", "", "2")], to: "9" })),
    );
    expect(totals(count({ fields: two, to: "9" }))).toEqual(
      totals(count({ fields: [field("a", "real scalar", "", "n_f")], flavours: "2", to: "9" })),
    );
  });
  it("of a thousand copies, far beyond what a float holds, is the polynomial at a thousand", () => {
    const groups = [group("colour", "SU(3)")];
    const content = (flavours: string) => ({
      groups,
      fields: [
        field("Q", "left-handed spinor", "3", flavours),
        field("u", "right-handed spinor", "3", flavours),
      ],
      from: "6",
      to: "12",
      flavours: "1000",
    });
    const [numbers, polynomials] = [count(content("1000")), count(content("n_f"))];
    expect(numbers.totals.map(({ total }) => total.at)).toEqual(
      polynomials.totals.map(({ total }) => total.at),
    );
    expect(Number(operatorsAt(numbers, "12"))).toBeGreaterThan(2 ** 53);
  });
  it("has a scalar to pin for every dimension, and says that it is of real parameters", () => {
    const { scalars, notices } = evaluate({ fields: [field("phi", "real scalar")], to: "7" });
    expect(scalars.map(({ id }) => id)).toEqual(["total/5", "total/6", "total/7"]);
    expect(notices.map(({ code }) => code)).toContain("count-is-of-real-parameters");
  });
});

describe("a count is refused", () => {
  const scalar = { fields: [field("phi", "real scalar")] };
  it.each([
    [{}, "nothing-to-count"],
    [{ ...scalar, from: "4" }, "below-complete"],
    [{ ...scalar, from: "9" }, "range-reversed"],
    [{ ...scalar, to: "99" }, "range-too-high"],
    [{ ...scalar, to: "x" }, "range-unreadable"],
    [{ ...scalar, d: "11" }, "counted-dimension-unreadable"],
    [{ ...scalar, flavours: "many" }, "flavours-at-unreadable"],
    [{ fields: [field("psi", "left-handed spinor")], d: "5", from: "6" }, "spin-needs-four-dimensions"],
    [{ fields: [field("psi", "left-handed spinor")], parity: "with parity" }, "parity-needs-scalars"],
    [
      { fields: [field("phi", "real scalar", "3")], groups: [group("c", "SU(3)")] },
      "real-field-in-complex-representation",
    ],
    [
      { fields: [field("phi", "complex scalar", "7")], groups: [group("c", "SU(3)")] },
      "representation-not-known",
    ],
    [{ fields: [field("phi", "complex scalar", "x")], groups: [group("Y", "U(1)")] }, "charge-not-a-number"],
    [
      { fields: [field("phi", "complex scalar", "1, 2")], groups: [group("Y", "U(1)")] },
      "counted-charges-too-many",
    ],
    [{ ...scalar, groups: [group("g", "E8")] }, "group-not-known"],
    [{ ...scalar, groups: [group("g", "SU(99)")] }, "group-size"],
    [{ ...scalar, groups: [group("g", "U(1)", "some")] }, "kept-unreadable"],
    [{ fields: [field("phi phi", "real scalar")] }, "counted-symbol-unreadable"],
    [
      { fields: [field("phi", "real scalar"), { ...field("phi", "real scalar"), id: "b" }] },
      "counted-symbol-twice",
    ],
    [{ fields: [field("phi", "real scalar", "", "0")] }, "flavours-unreadable"],
    [{ ...standardModel, to: "17" }, "count-takes-long"],
    // Few field contents, but of up to 48 quanta with 147 273 cycle types.
    [{ ...scalar, d: "3", from: "4", to: "24" }, "count-takes-long"],
    [{ ...scalar, d: "6", from: "7", to: "30" }, "count-takes-long"],
    [
      {
        ...scalar,
        d: "3",
        from: "4",
        to: "30",
        patience: "however long it takes",
      },
      "count-too-large",
    ],
  ])("%j: %s", (inputs, code) => {
    expect(codes(inputs)).toContain(code);
  });

  it("rather than given for another theory, when a group or a field cannot be read", () => {
    const fields = [field("Q", "left-handed spinor", "3"), field("u", "right-handed spinor", "3")];
    expect(evaluate({ groups: [group("c", "SU(3)")], fields, to: "6" }).value).not.toBeNull();
    for (const inputs of [
      { groups: [group("c", "SU(12)")], fields },
      { groups: [group("c", "SU(3)")], fields: [...fields, field("S", "complex scalar", "7")] },
      { groups: [group("c", "SU(3)"), group("Y", "U(1)", "some")], fields },
    ]) {
      const { value, scalars, problems } = evaluate({ ...inputs, to: "6" });
      expect([value, scalars, problems.length]).toEqual([null, [], 1]);
    }
  });

  it("not, but a reader is warned, when fermions are anomalous or everything vanishes", () => {
    const notices = (inputs: Parameters<typeof evaluate>[0]) =>
      evaluate(inputs).notices.map(({ code }) => code);
    const chiral = { groups: [group("colour", "SU(3)")], fields: [field("Q", "left-handed spinor", "3")] };
    expect(notices(chiral)).toContain("anomalous-content");
    expect(
      notices({ groups: [group("w", "SU(2)")], fields: [field("L", "left-handed spinor", "2")] }),
    ).toContain("anomalous-content");
    // One generation of the Standard Model is free of anomalies (Bouchiat, Iliopoulos, Meyer 1972).
    expect(notices({ ...standardModel, to: "6" })).not.toContain("anomalous-content");
    expect(
      notices({ groups: [group("Y", "U(1)", "7/3")], fields: [field("phi", "complex scalar", "1")] }),
    ).toContain("everything-vanishes");
  });
});

describe("the table of representations", () => {
  it.each([2, 3, 4, 5, 8])("of SU(%d) names each as it is read, with its conjugate, and none twice", (n) => {
    const table = representationTable(n);
    const diagrams = table.map(({ diagram }) => diagram.join());
    expect(new Set(diagrams).size).toBe(table.length);
    for (const representation of table) {
      expect(readRepresentation(representation.name, n)?.diagram).toEqual(representation.diagram);
      expect(diagrams).toContain(conjugate(representation).diagram.join());
    }
    expect(diagrams).toContain(readRepresentation("adj", n)?.diagram.join());
  });
  // Dimensions of SU(3): (p + 1)(q + 1)(p + q + 2)/2 (Weyl 1925).
  it("of SU(3) holds 1, 3, 6, 8, 10, 15 twice over and 27 with their conjugates", () => {
    const names = representationTable(3).map(({ name }) => name);
    expect(names).toEqual(expect.arrayContaining(["1", "3", "3bar", "6", "6bar", "8", "10", "10bar", "27"]));
    expect(representationTable(3).filter(({ dimension }) => dimension === 15)).toHaveLength(4);
  });
});

describe("a count in big integers", () => {
  it("is the count in certified floats, class by class", () => {
    const content = readContent(
      { ...basisInputs, groups: standardModel.groups, fields: standardModel.fields },
      4,
      [],
    );
    const { classes } = amountOfWork(content, 16);
    const [floats, exact] = [2 ** 53, 0].map((exactBelow) =>
      countOperators(content, classes, 10, 16, () => undefined, exactBelow).map(({ powers, numbers }) => [
        powers.join(),
        numbers.map(({ derivatives, number }) => `${derivatives}: ${number.toString()}`),
      ]),
    );
    expect(exact?.length).toBeGreaterThan(100);
    expect(exact).toEqual(floats);
  });

  it("begins where what is added up in a group no longer certifies a float", () => {
    const eight = representation("8", 3);
    const power = (integral: GaugeIntegral, n: number) =>
      Array.from({ length: n }, () => integral.element(0, 1)).reduce(
        (multiset, element) => integral.multisets.add(multiset, element),
        integral.multisets.empty,
      );
    const [strict, usual] = [new GaugeIntegral(3, [eight], 1000), new GaugeIntegral(3, [eight])];
    // Singlets of four octets: their product with itself holds 1 + 8 + 8 + 10 + 10bar + 27, and 1 + 4 + 1 + 1 + 1 = 8.
    expect(strict.value(power(strict, 4))).toBe(8);
    expect(strict.value(power(strict, 8))).toBeNaN();
    expect(strict.exactValue(power(strict, 4))).toBe(8n);
    expect(strict.exactValue(power(strict, 8))).toBe(BigInt(usual.value(power(usual, 8))));
  });
});
