/**
 * Orders at which well-known effective interactions enter, and the expansion of rates, against the literature. The
 * sizes are own derivations from those orders.
 */
import { describe, expect, it } from "vitest";
import { askPlan, planOf } from "../engine/plan/ask.ts";
import { typed } from "../engine/typed-premises.ts";

const scales = ["p | 100 GeV | probe", "Lambda | 1 TeV | heavy"];
const orderOfTerm = (
  fields: readonly string[],
  term: string,
  more: Partial<Parameters<typeof typed>[0]> = {},
) => planOf(typed({ fields, terms: [term], scales, ...more }), { cap: "24" }).terms[0]?.order.text;

describe("the order in p/Λ at which a term enters, Δ − d", () => {
  it.each([
    // Weinberg 1979, Phys. Rev. Lett. 43, 1566: the lepton-number violating operator has dimension 5.
    ["neutrino masses", ["l | Weyl spinor", "h | complex scalar"], "c/Lambda l^2 h^2", "1"],
    // Fermi 1934: four fermions in d = 4, G_F of dimension −2.
    ["four-fermion contact", ["psi | Dirac spinor"], "c/Lambda^2 (psibar psi)^2", "2"],
    // Euler, Heisenberg 1936: light by light at low energy, F⁴/m⁴.
    ["light by light", ["F | field strength"], "c/Lambda^4 F^4", "4"],
    // Neubert 1994, Phys. Rep. 245, 259: the kinetic energy of a heavy quark is suppressed once by 1/m_Q.
    ["heavy-quark kinetic energy", ["h | static heavy field"], "c/Lambda hbar d^2 h", "1"],
    // Goroff, Sagnotti 1986: the two-loop counterterm of gravity has six derivatives, two beyond the curvature squared.
    ["curvature cubed", ["h | metric fluctuation"], "c/Lambda^5 d^6 h^3", "5"],
    // The Pauli term, of dimension 3/2 + 3/2 + 2 = 5 (own derivation).
    ["anomalous magnetic moment", ["psi | Dirac spinor", "F | field strength"], "c/Lambda psibar F psi", "1"],
  ])("%s", (_, fields, term, order) => {
    expect(orderOfTerm(fields, term)).toBe(order);
  });

  it("a contact interaction of Schrödinger fields in D = 3 (Kaplan, Savage, Wise 1998): C₀ at 1, C₂ at 3", () => {
    const contact = (term: string) => orderOfTerm(["N | Schrödinger field"], term, { D: "3", z: "2" });
    expect(contact("c/Lambda (N^\\dagger N)^2")).toBe("1");
    expect(contact("c/Lambda^3 \\nabla^2 (N^\\dagger N)^2")).toBe("3");
  });
});

describe("a rate expanded by total order", () => {
  const smeft = (terms: readonly string[]) =>
    typed({ fields: ["phi | real scalar || odd"], symmetries: ["parity | Z2"], scales, terms });
  const dim6 = "c_6/Lambda^2 phi^6";
  const dim8 = "c_8/Lambda^4 phi^8";

  // Contino, Falkowski, Goertz, Grojean, Riva 2016, JHEP 07, 144: the square of a dimension-6 term is of the order of
  // dimension-8 interference, so a rate with the first and without the second is incomplete.
  it("puts the square of dimension 6 and the interference of dimension 8 at the same order", () => {
    const plan = planOf(smeft([dim6, dim8]), { observable: "rate with interference", insertions: "1" });
    const order4 = plan.orders.find(({ order }) => order[0]?.text === "4")?.entries.map(({ id }) => id);
    expect(order4).toEqual(["t2|", "t1|t1"]);
    const notices = (terms: readonly string[]) =>
      askPlan(smeft(terms), {
        observable: "rate with interference",
        target: "1.05e-4",
        insertions: "1",
        unlisted: "listed terms only",
      }).notices.map(({ code }) => code);
    expect(notices([dim6])).not.toContain("plan-square-alone");
    const strict = (terms: readonly string[]) =>
      askPlan(smeft(terms), {
        observable: "rate with interference",
        target: "5e-5",
        insertions: "1",
        unlisted: "listed terms only",
      }).notices.map(({ code }) => code);
    expect(strict([dim6])).toContain("plan-square-alone");
    expect(strict([dim6, dim8])).not.toContain("plan-square-alone");
  });

  // Azatov, Contino, Machado, Riva 2017, Phys. Rev. D 95, 065014: where helicities differ, dimension 6 does not interfere
  // with the leading amplitude at high energy and its square leads.
  it("starts with the square of dimension 6 where helicity forbids interference", () => {
    const plan = planOf(smeft([dim6]), { observable: "rate without interference", insertions: "1" });
    expect(plan.orders.map(({ order }) => order[0]?.text)).toEqual(["0", "4"]);
    expect(plan.orders[1]?.entries).toMatchObject([{ id: "t1|t1", size: 1e-4 }]);
  });
});

describe("a plan from typed premises", () => {
  it("reads scales, natural coefficients and assigned sizes as they are typed", () => {
    const theory = typed({
      fields: ["chi | real scalar || odd"],
      symmetries: ["parity | Z2"],
      scales: ["Lambda | 3.2(4) TeV | heavy", "p | 320(20) GeV | probe", "m | 80 GeV | light"],
      terms: ["(d chi)^2/2", "m^2 chi^2 / 2 | | m^2/p^2", "lambda/4! chi^4", "c_6/Lambda^2 chi^6 | 0.5"],
    });
    const { value, problems, notices } = askPlan(theory, { target: "1 %" });
    expect([theory.problems, problems, notices]).toEqual([[], [], []]);
    expect(value?.parameters[0]?.value).toBeCloseTo(0.1, 12);
    expect(value?.parameters[0]?.sigma).toBeCloseTo(0.1 * Math.hypot(0.125, 0.0625), 12);
    // Q² · 0.5 and the mass by hand, (80/320)².
    expect(
      value?.terms.map(({ rowId, order, size }) => [rowId, order.text, Number(size.toPrecision(6))]),
    ).toEqual([
      ["t2", "0", 0.0625],
      ["t3", "0", 1],
      ["t4", "2", 0.005],
    ]);
    // At order 0: 0.005 + 0.005² listed and Q⁴/(1 − Q²) unlisted stay below 1 %.
    expect(value?.order?.text).toBe("0");
    expect(value?.leftOut.used).toBeCloseTo(0.005 + 2.5e-5 + 1e-4 / 0.99, 12);
  });
});
