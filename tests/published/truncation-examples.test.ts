import { describe, expect, it } from "vitest";
import { uniformPriorFactor } from "#engine/truncation/estimates.ts";
import { evaluateCurve } from "../engine/truncation/curve-block.ts";
import { evaluateBlock, partialSums, scalar, type ByOrder } from "../engine/truncation/truncation-block.ts";

describe("published worked examples, to the digits printed", () => {
  describe("np total cross section at 143 MeV: Epelbaum, Krebs, Meißner, Eur. Phys. J. A 51 (2015) 53, section 7", () => {
    // From memory of the paper: R = 0.9 fm, Λ_b = 600 MeV, in mb: 52.5 (order 0), 49.1 (2), 54.2 (3), 53.7 (4); their
    // errors ± 9.8, 5.1, 2.2, 0.9. The first three follow from the printed values to the printed digits; the last is
    // 0.950 from them, between 0.9 and 1.0, since the values are themselves rounded.
    const x: ByOrder = { 0: "52.5", 1: null, 2: "49.1", 3: "54.2", 4: "53.7" };
    const energy = 143;
    const [proton, neutron] = [938.27208816, 939.56542052];
    const p2 =
      (proton ** 2 * energy * (energy + 2 * neutron)) / ((proton + neutron) ** 2 + 2 * proton * energy);
    const result = evaluateBlock(x, { q: String(Math.sqrt(p2) / 600), method: "differences of orders" });
    it.each([
      ["n0", "9.8"],
      ["n2", "5.1"],
      ["n3", "2.2"],
    ])("%s: ± %s mb", (row, printed) => {
      expect(scalar(result, `${row}/differences`).toFixed(1)).toBe(printed);
    });
    it("n4: ± 0.9 mb, as far as the rounded values say", () => {
      expect(Math.abs(scalar(result, "n4/differences") - 0.9)).toBeLessThan(0.1);
    });
  });

  it("the first omitted term is a 50, 67, 75, 80 % interval: Furnstahl, Klco, Phillips, Wesolowski, Phys. Rev. C 92 (2015) 024005", () => {
    // n_c/(n_c + 1) as percentages, from memory of section III there; also Cacciari, Houdeau (2011).
    const printed = ["50", "67", "75", "80"];
    printed.forEach((percent, index) => {
      const count = index + 1;
      expect(((100 * count) / (count + 1)).toFixed(0)).toBe(percent);
      expect(uniformPriorFactor(count, count / (count + 1))).toBeCloseTo(1, 12);
      const coefficients = Array.from({ length: count + 1 }, (_, n) => (n % 2 === 0 ? 1 : -1));
      const belief = String((100 * count) / (count + 1));
      const result = evaluateBlock(partialSums(coefficients, 0.3), {
        q: "0.3",
        belief,
        method: "prior set A",
        omitted: "first omitted term",
        cbarLow: "0.00000001",
        cbarHigh: "100000000",
      });
      expect(scalar(result, "error") / scalar(result, "first-omitted")).toBeCloseTo(1, 5);
    });
  });

  it("coefficients of the toy function (½ + tan(πx/2))²: Wesolowski et al., J. Phys. G 43 (2016) 074001", () => {
    // Printed there: 0.25 + 1.57 x + 2.47 x² + 1.29 x³ + 4.06 x⁴ + …; the function is from Schindler, Phillips, Ann. Phys.
    // 324 (2009) 682 (both from memory). The partial sums are of its exact Taylor series: own derivation.
    const pi = Math.PI;
    const exact = [0.25, pi / 2, pi ** 2 / 4, pi ** 3 / 24, pi ** 4 / 24, pi ** 5 / 240];
    const x = [0.05, 0.1, 0.2];
    const through = (order: number) =>
      x.map((at) => exact.slice(0, order + 1).reduce((sum, a, n) => sum + a * at ** n, 0));
    const result = evaluateCurve(
      {
        d: {
          name: "z",
          xUnit: "",
          x,
          orders: Object.fromEntries([0, 1, 2, 3, 4].map((n) => [n, through(n)])),
          reference: [1, 1, 1],
        },
      },
      { q: "z", first: "from c_0" },
    );
    const printed = ["0.25", "1.57", "2.47", "1.29", "4.06"];
    printed.forEach((digits, n) => {
      for (const coefficient of result.value?.curve?.orders[n]?.coefficients ?? [])
        expect((coefficient ?? NaN).toFixed(2)).toBe(digits);
    });
    // And the series converges to the function: the error left at the last order is what its next terms are.
    const g = (0.5 + Math.tan((pi * 0.1) / 2)) ** 2;
    expect(Math.abs(through(5)[1]! - g) / (((17 * pi ** 6) / 2880) * 0.1 ** 6)).toBeCloseTo(1, 1);
  });

  it("e⁺e⁻ → hadrons: R at α_s = 0.118 for five flavours is 1 + 0.0376 + 0.0020 − 0.0007", () => {
    // Gorishny, Kataev, Larin, Phys. Lett. B 259 (1991) 144; Surguladze, Samuel, Phys. Rev. Lett. 66 (1991) 560:
    // 1 + a + 1.409 a² − 12.805 a³ with a = α_s/π, from memory; the terms are products of printed numbers.
    const a = 0.118 / Math.PI;
    const result = evaluateBlock(partialSums([1, 1, 1.409, -12.805], a), { q: "0.118/pi", reference: "1" });
    expect(scalar(result, "coefficients/2").toFixed(3)).toBe("1.409");
    expect(scalar(result, "coefficients/3").toFixed(3)).toBe("-12.805");
    expect(scalar(result, "n3/value").toFixed(4)).toBe("1.0389");
  });
});
