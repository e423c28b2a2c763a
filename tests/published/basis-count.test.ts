/** Numbers of operators in the literature, each with its source. */
import { describe, expect, it } from "vitest";
import { belowTheWeakScale, standardModel, standardModelWithNeutrinos } from "#engine/basis/contents.ts";
import { count, field, group, totals } from "../engine/basis/ask.ts";

describe("the Standard Model", () => {
  // Henning, Lu, Melia, Murayama, J. High Energy Phys. 08 (2017) 016, arXiv:1512.03433: the title's sequence.
  it("one generation, dimensions 5 to 12", () => {
    expect(totals(count({ ...standardModel, to: "12", flavours: "1" }))).toEqual({
      5: "2",
      6: "84",
      7: "30",
      8: "993",
      9: "560",
      10: "15456",
      11: "11962",
      12: "261485",
    });
  });

  // Dimension 6: 2499 with B conserved (Alonso, Jenkins, Manohar, Trott 2013) and 2 × 273 without (Alonso, Chang,
  // Jenkins, Manohar, Shotwell 2014); dimension 8: Murphy 2020, arXiv:2005.00059; dimension 9: Li, Ren, Xiao, Yu, Zheng
  // 2020, arXiv:2007.07899; all of them and the rest: arXiv:1512.03433.
  it("three generations, dimensions 5 to 12", () => {
    expect(totals(count({ ...standardModel, to: "12", flavours: "3" }))).toEqual({
      5: "12",
      6: "3045",
      7: "1542",
      8: "44807",
      9: "90456",
      10: "2092441",
      11: "3472266",
      12: "75577476",
    });
  });

  // arXiv:1512.03433, the polynomials in the number of generations.
  it("any number of generations", () => {
    const { totals: found } = count({ ...standardModel, to: "12" });
    expect(Object.fromEntries(found.map(({ dimension, total }) => [dimension, total.text]))).toEqual({
      5: "n_f^2 + n_f",
      6: "397/12*n_f^4 + 3/2*n_f^3 + 413/12*n_f^2 + 15",
      7: "52/3*n_f^4 + 2*n_f^3 + 26/3*n_f^2 + 2*n_f",
      8: "3047/6*n_f^4 + n_f^3 + 2371/6*n_f^2 + 89",
      9: "1943/24*n_f^6 + 17/24*n_f^5 + 2969/8*n_f^4 + 391/24*n_f^3 + 983/12*n_f^2 + 9*n_f",
      10: "33547/18*n_f^6 + 19/3*n_f^5 + 306719/36*n_f^4 + 259/6*n_f^3 + 161741/36*n_f^2 + 530",
      11: "94847/24*n_f^6 + 2549/24*n_f^5 + 164159/24*n_f^4 + 2635/24*n_f^3 + 11233/12*n_f^2 + 18*n_f",
      12: "9617/4*n_f^8 + 33/4*n_f^7 + 4758857/72*n_f^6 + 1573/8*n_f^5 + 9847079/72*n_f^4 + 3417/8*n_f^3 + 1839853/36*n_f^2 + 1/2*n_f + 4481",
    });
  });

  // Operators that hold a right-handed neutrino: Li, Ren, Xiao, Yu, Zheng 2021, arXiv:2105.09329 (abstract); dimensions 6
  // and 7 also Liao, Ma 2016, arXiv:1612.04527 (abstract).
  it.each([
    ["1", { 5: 2, 6: 29, 7: 80, 8: 323, 9: 1358 }],
    ["3", { 5: 18, 6: 1614, 7: 4206, 8: 20400, 9: 243944 }],
  ])("with right-handed neutrinos, for %s generations", (flavours, published) => {
    const [all, without] = [standardModelWithNeutrinos, standardModel].map((content) =>
      totals(count({ ...content, to: "9", flavours })),
    );
    const withNeutrinos = Object.entries(all ?? {}).map(([dimension, number]) => [
      dimension,
      Number(number) - Number(without?.[dimension] ?? 0),
    ]);
    expect(Object.fromEntries(withNeutrinos)).toEqual(published);
  });
});

describe("below the weak scale", () => {
  // Li, Ren, Xiao, Yu, Zheng 2020, arXiv:2012.09188 (abstract): two up and three down quarks, three leptons of each kind;
  // and one of each.
  it.each([
    [["2", "3", "3", "3"], { 8: "35058", 9: "704584" }],
    [["1", "1", "1", "1"], { 8: "756", 9: "3686" }],
  ] as const)("with %j quarks and leptons", ([up, down, charged, neutrinos], published) => {
    const content = belowTheWeakScale(up, down, charged, neutrinos);
    expect(totals(count({ ...content, from: "8", to: "9" }))).toEqual(published);
  });

  // Jenkins, Manohar, Stoffer 2017, arXiv:1709.04486 (abstract): operators that conserve B and L.
  it("with baryon and lepton number conserved", () => {
    const content = belowTheWeakScale("2", "3", "3", "3");
    const groups = content.groups.map((row) => (row.keep === "all" ? { ...row, keep: "0" } : row));
    expect(totals(count({ ...content, groups, to: "6" }))).toEqual({ 5: "70", 6: "3631" });
  });

  // Own calculation by another method (Molien series on the maximal torus), one of each: (B, L) = (1, 1), (1, -1), (0, 2).
  it.each([
    ["1", "1", "6"],
    ["1", "-1", "2"],
    ["0", "2", "11"],
    ["0", "-2", "11"],
  ])("at dimension 6 with B = %s and L = %s", (b, l, published) => {
    const content = belowTheWeakScale("1", "1", "1", "1");
    const groups = content.groups.map((row) => ({
      ...row,
      keep: row.name === "B" ? b : row.name === "L" ? l : "",
    }));
    expect(totals(count({ ...content, groups, from: "6", to: "6" }))).toEqual({ 6: published });
  });
});

describe("smaller contents, from an independent count on the maximal torus", () => {
  it("a photon alone: Euler and Heisenberg's two and their parity-odd companion at dimension 8", () => {
    expect(totals(count({ fields: [field("F", "field strength")], to: "14" }))).toEqual({
      8: "3",
      10: "5",
      12: "8",
      14: "23",
    });
  });
  it("gluons alone", () => {
    const groups = [group("colour", "SU(3)")];
    expect(totals(count({ groups, fields: [field("G", "field strength", "8")], to: "12" }))).toEqual({
      6: "2",
      8: "9",
      10: "24",
      12: "158",
    });
  });
  it("electrodynamics of one charged fermion", () => {
    const fields = [
      field("F", "field strength"),
      field("psi_L", "left-handed spinor", "1"),
      field("psi_R", "right-handed spinor", "1"),
    ];
    expect(totals(count({ groups: [group("charge", "U(1)")], fields, to: "12" }))).toEqual({
      5: "2",
      6: "5",
      7: "4",
      8: "15",
      9: "30",
      10: "73",
      11: "162",
      12: "402",
    });
  });
  it("a complex scalar with its charge conserved", () => {
    const groups = [group("charge", "U(1)")];
    expect(totals(count({ groups, fields: [field("phi", "complex scalar", "1")], to: "14" }))).toEqual({
      6: "2",
      8: "4",
      10: "8",
      12: "21",
      14: "56",
    });
  });
  it("a real scalar", () => {
    expect(totals(count({ fields: [field("phi", "real scalar")], to: "14" }))).toEqual({
      5: "1",
      6: "1",
      7: "1",
      8: "2",
      9: "2",
      10: "3",
      11: "3",
      12: "5",
      13: "6",
      14: "9",
    });
  });
});
