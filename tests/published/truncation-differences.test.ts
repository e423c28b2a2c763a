import { describe, expect, it } from "vitest";
import { differencesOfOrders } from "#engine/truncation/estimates.ts";
import { readExpansionParameter } from "#engine/truncation/expansion-parameter.ts";
import { evaluateBlock, scalar, type ByOrder } from "../engine/truncation/truncation-block.ts";

describe("differences of orders of Epelbaum, Krebs and Meißner (2015)", () => {
  // The rule: Eur. Phys. J. A 51 (2015) 53; general form: Binder et al., Phys. Rev. C 93 (2016) 044002. Order 1 is
  // absent there. The inputs are invented round numbers of realistic size, not published cross sections; the errors
  // are an own evaluation of the rule, at Q = 153.1561/600 and 212.21932/600 (nucleon energies of 50 and 96 MeV).
  const cases: { x: ByOrder; q: number; before: number[]; after: number[] }[] = [
    {
      x: { 0: 180, 1: null, 2: 168, 3: 169, 4: 167.5, 5: 167.6 },
      q: 0.25526017,
      before: [11.728396, 3.063122, 0.78189305, 0.38289025, 0.097736631],
      after: [12.5, 3.063122, 1.5, 0.38289025, 0.097736631],
    },
    {
      x: { 0: 85, 1: null, 2: 75, 3: 77, 4: 78, 5: 77.8 },
      q: 0.35369887,
      before: [10.633746, 3.7611438, 1.3303123, 0.47052995, 0.16642591],
      after: [10.633746, 3.7611438, 1.3303123, 0.47052995, 0.16642591],
    },
    {
      x: { 0: 1, 1: null, 2: 1.2, 3: 1.15, 4: 1.16 },
      q: 0.5,
      before: [0.25, 0.125, 0.0625, 0.03125],
      after: [0.25, 0.125, 0.0625, 0.03125],
    },
  ];

  it.each(cases)("bands by order at Q = $q, with the floor", ({ x, q, after }) => {
    const result = evaluateBlock(x, { q: String(q), method: "differences of orders" });
    const bands = result.value?.orders.map(({ rowId }) => scalar(result, `${rowId}/differences`)) ?? [];
    expect(bands).toHaveLength(after.length);
    bands.forEach((band, index) => expect(band / (after[index] ?? NaN)).toBeCloseTo(1, 6));
  });

  it.each(cases)("before the floor, knowing only the orders up to each, at Q = $q", ({ x, q, before }) => {
    const known = Object.entries(x).filter(([, value]) => value !== null);
    before.forEach((expected, index) => {
      // With the later orders not yet known, there is nothing for the floor to see.
      const rows = Object.fromEntries(known.slice(0, index + 1));
      const next = index === 0 ? { 1: null } : {};
      const result = evaluateBlock({ ...rows, ...next }, { q: String(q) });
      expect(scalar(result, "differences") / expected).toBeCloseTo(1, 6);
    });
  });

  // Relative momentum of neutron and proton, p² = m_p² E (E + 2 m_n)/((m_p + m_n)² + 2 m_p E), at the energies of that
  // paper, with m_p = 938.27208816 and m_n = 939.56542052 MeV; at 10 MeV the pion mass 138.03 MeV sets Q. Own evaluation.
  it.each([
    [10, 0.23005, 0.345075],
    [50, 0.25526017, 0.38289025],
    [96, 0.35369887, 0.5305483],
    [143, 0.43168412, 0.64752618],
    [200, 0.51052035, 0.76578052],
    [300, 0.62525718, 0.93788577],
  ])("takes max(p, M_π)/Λ_b for Q at %d MeV, with Λ_b = 600 and 400 MeV", (energy, at600, at400) => {
    const p =
      "sqrt(938.27208816^2 E (E + 2 939.56542052) / ((938.27208816 + 939.56542052)^2 + 2 938.27208816 E)) MeV";
    const expression = (breakdown: number) =>
      `max(${p.replaceAll("E", String(energy))}, 138.03 MeV)/(${breakdown} MeV)`;
    const read = (breakdown: number) => readExpansionParameter(expression(breakdown), null);
    expect([read(600), read(400)]).toMatchObject([{ ok: true }, { ok: true }]);
    for (const [breakdown, expected] of [
      [600, at600],
      [400, at400],
    ] as const) {
      const found = read(breakdown);
      expect(found.ok ? found.q.value / expected : NaN).toBeCloseTo(1, 7);
    }
  });

  it("is written out at the fifth order kept as in the paper", () => {
    // δX = max(Q⁵|X_LO|, Q³|X_LO − X_NLO|, Q²|X_NLO − X_N2LO|, Q|X_N2LO − X_N3LO|), N3LO being order 4 (from memory).
    const [lo, nlo, n2lo, n3lo] = [3.1, 2.2, 2.6, 2.45];
    const q = 0.4;
    const orders = [
      { order: 0, value: lo, shift: lo },
      { order: 2, value: nlo, shift: nlo - lo },
      { order: 3, value: n2lo, shift: n2lo - nlo },
      { order: 4, value: n3lo, shift: n3lo - n2lo },
    ];
    const written = Math.max(
      q ** 5 * lo,
      q ** 3 * Math.abs(lo - nlo),
      q ** 2 * Math.abs(nlo - n2lo),
      q * Math.abs(n2lo - n3lo),
    );
    expect(differencesOfOrders(orders, 3, 5, q)).toBeCloseTo(written, 14);
  });
});
