import { describe, expect, it } from "vitest";
import { gev, theoryOf, type TheorySketch, type TermSketch } from "../theory-builder.ts";
import { askPlan, codesOf, leftOutByOrder, orderOf, planOf } from "./ask.ts";

/** One scalar with φ → −φ in d = 4 at Q = p/Λ = 0.1. */
function scalar(
  terms: TheorySketch["terms"],
  scales = [gev("p", "probe", 300), gev("Lambda", "heavy", 3000)],
  d: number | string = 4,
) {
  return theoryOf({
    d,
    symmetries: [2],
    fields: { phi: { kind: "real scalar", charges: [1] } },
    terms,
    scales,
  });
}
const listed: Record<string, TermSketch | string> = { l: "phi4", c6: "phi6", c8: "phi8" };

describe("what is left out of an amplitude", () => {
  // Own derivation, Q = 0.1: c6 → Q², c8 → Q⁴, c6² → Q⁴, c6 c8 → Q⁶, c8² → Q⁸; unlisted from Q⁶ in steps of 2.
  const tail = 1e-6 / 0.99;
  it("adds the orders of insertions and sums all that lies beyond the cut", () => {
    const orders = leftOutByOrder(scalar(listed));
    expect(Object.keys(orders)).toEqual(["0", "2", "4", "6", "8"]);
    expect(orders["0"]?.listed).toBeCloseTo(0.01 + 2e-4 + 1e-6 + 1e-8, 12);
    expect(orders["2"]?.listed).toBeCloseTo(2e-4 + 1e-6 + 1e-8, 12);
    expect(orders["4"]?.listed).toBeCloseTo(1e-6 + 1e-8, 14);
    expect(orders["8"]?.listed).toBe(0);
    for (const { unlisted, listed: sum, used } of Object.values(orders)) {
      expect(unlisted).toBeCloseTo(tail, 15);
      expect(used).toBeCloseTo(sum + tail, 12);
    }
  });

  it.each([
    ["5 %", "0"],
    ["1 %", "2"],
    ["1e-3", "2"],
    ["2.1e-4", "2"],
    ["1e-4", "4"],
    ["3e-6", "4"],
    ["1.03e-6", "6"],
  ])("stops at the lowest order that leaves out less than %s: %s", (target, order) => {
    expect(orderOf(scalar(listed), { target })).toBe(order);
  });

  it("says when the listed terms do not reach the target, with the order that would have to be listed", () => {
    const { value, problems } = askPlan(scalar(listed), { target: "1e-6" });
    expect(problems).toMatchObject([
      { code: "plan-target-unreached", facts: { next: "6", target: 1e-6, leftOut: 1.01e-6 } },
    ]);
    expect(value?.order).toBeNull();
    expect(askPlan(scalar(listed), { target: "1e-6" }).scalars.some(({ id }) => id === "order")).toBe(false);
    expect(orderOf(scalar(listed), { target: "1e-6", unlisted: "listed terms only" })).toBe("6");
  });

  it("names what is in, what is first out and the first unlisted order", () => {
    const plan = planOf(scalar(listed), { target: "1e-3" });
    expect(plan.orders.filter(({ included }) => included).map(({ order }) => order[0]?.text)).toEqual([
      "0",
      "2",
    ]);
    expect(plan.orders[0]?.entries.map(({ id }) => id)).toEqual(["l"]);
    expect(plan.firstOut).toMatchObject({ order: [{ text: "4" }], size: 1e-4 });
    expect(plan.orders[2]?.entries.map(({ id }) => id).sort()).toEqual(["c6*c6", "c8"]);
    expect(plan.firstUnlisted).toMatchObject({ order: { text: "6" }, size: 1e-6 });
    expect(plan.step.text).toBe("2");
  });

  it("multiplies natural coefficients in, once per insertion", () => {
    const plan = planOf(scalar({ c6: { fields: "phi6", natural: 3 } }), { insertions: "3" });
    const sizes = Object.fromEntries(
      plan.orders.flatMap(({ entries }) => entries).map(({ id, size }) => [id, size]),
    );
    expect(sizes["c6"]).toBeCloseTo(0.03, 12);
    expect(sizes["c6*c6"]).toBeCloseTo(9e-4, 12);
    expect(sizes["c6*c6*c6"]).toBeCloseTo(27e-6, 14);
  });

  it("keeps within the cap: what lies beyond counts as unlisted", () => {
    const capped = planOf(scalar(listed), { cap: "2" });
    expect(capped.orders.map(({ order }) => order[0]?.text)).toEqual(["0", "2"]);
    expect(capped.orders[1]?.leftOut).toMatchObject({ listed: 0 });
    expect(capped.orders[1]?.leftOut.unlisted).toBeCloseTo(1e-4 / 0.99, 12);
  });

  it("asks about orders at which terms may exist and none is listed", () => {
    const notices = (terms: TheorySketch["terms"]) => askPlan(scalar(terms)).notices;
    expect(notices({ c8: "phi8" })).toMatchObject([{ code: "plan-gap", facts: { orders: "2" } }]);
    expect(notices(listed)).toEqual([]);
  });

  it("lists the largest entries of a long order and counts them all", () => {
    const many = Object.fromEntries(
      Array.from({ length: 12 }, (_, n) => [`c${n}`, { fields: "phi6", natural: 1 + n }]),
    );
    const order4 = planOf(scalar(many)).orders[2];
    expect([order4?.count, order4?.entries.length]).toEqual([78, 40]);
    expect(order4?.entries[0]).toMatchObject({ id: "c11*c11", size: 0.0144 });
    // Own derivation: Σ over pairs i ≤ j of ĝ_i ĝ_j = (78² + 650)/2 for ĝ = 1 … 12.
    expect(order4?.sum).toBeCloseTo(((78 ** 2 + 650) / 2) * 1e-4, 10);
  });

  it("takes unlisted terms at every order that fields and symmetries allow", () => {
    const step = (sketch: Omit<TheorySketch, "scales">) =>
      planOf(theoryOf({ ...sketch, scales: [gev("p", "probe", 1), gev("Lambda", "heavy", 100)] })).step.text;
    // Own derivation: φⁿ∂ᵏ with k even is of order n + k − 4 in d = 4: even with φ → −φ, any without.
    expect(
      step({ symmetries: [2], fields: { phi: { kind: "real scalar", charges: [1] } }, terms: { c: "phi6" } }),
    ).toBe("2");
    expect(step({ fields: { phi: "real scalar" }, terms: { c: "phi6" } })).toBe("1");
    expect(step({ fields: { psi: "Dirac spinor" }, terms: { c: "psi~2 psi2" } })).toBe("1");
    // Weyl spinors in d = 4 with a conserved number: ψ†ψ needs a vector index, so all orders are even; without
    // the numbers l²h² of order 1 exists (Weinberg 1979).
    const weyl = (number: number) =>
      step({
        symmetries: ["U(1)", "U(1)"],
        fields: {
          l: { kind: "Weyl spinor", charges: [number, 0] },
          h: { kind: "complex scalar", charges: [0, number] },
        },
        terms: { c: { fields: "l~ l h~ h", derivatives: 1 } },
      });
    expect([weyl(1), weyl(0)]).toEqual(["2", "1"]);
    // In d = 3 a scalar weighs ½: φ⁸∂ᵏ is of order 1 + k, with φ → −φ all whole orders occur.
    expect(
      step({
        d: 3,
        symmetries: [2],
        fields: { phi: { kind: "real scalar", charges: [1] } },
        terms: { c: "phi8" },
      }),
    ).toBe("1");
    expect(step({ d: 3, fields: { phi: "real scalar" }, terms: { c: "phi8" } })).toBe("1/2");
  });
});

describe("sizes given by hand", () => {
  const massive = (size: readonly [number, number] | undefined) =>
    scalar({ m: { fields: "phi2", ...(size ? { assigned: size } : {}) }, ...listed });

  it("counts a relevant term of assigned size at order 0", () => {
    const plan = planOf(massive([0.05, 0]));
    expect(plan.terms.find(({ rowId }) => rowId === "m")).toMatchObject({
      order: { text: "0" },
      size: 0.05,
      assigned: true,
    });
    expect(plan.orders[0]?.entries.map(({ id }) => id)).toEqual(["l", "m"]);
  });

  it("leaves a relevant term without a size out and says so, with the rest computed", () => {
    const { value, problems } = askPlan(massive(undefined));
    expect(problems).toMatchObject([{ code: "plan-relevant-unassigned", facts: { rowId: "m" } }]);
    expect(value?.order?.text).toBe("2");
  });

  it("warns when an assigned size exceeds the leading amplitude", () => {
    expect(askPlan(massive([1.5, 0])).notices.map(({ code }) => code)).toContain("plan-assigned-large");
  });

  it("lets an assigned size of a suppressed term follow p but not Λ", () => {
    const theory = scalar({ c6: { fields: "phi6", assigned: [0.02, 0.005] } }, [
      gev("p", "probe", 300, 30),
      gev("Lambda", "heavy", 3000, 300),
    ]);
    const plan = planOf(theory, { target: "3 %", unlisted: "listed terms only", insertions: "1" });
    // Left out at order 0: 0.02 (p/300)²; own derivation.
    expect(plan.leftOut.used).toBeCloseTo(0.02, 12);
    expect(plan.largestProbe).toBeCloseTo(300 * Math.sqrt(1.5), 6);
    expect(plan.leftOut.sigma).toBeCloseTo(Math.hypot(0.02 * 2 * 0.1, 0.005), 8);
    expect(
      plan.shifts.map(({ what, order, leftOut }) => [what, order?.text, leftOut?.toPrecision(3)]),
    ).toEqual([
      ["probe up", "0", "0.0242"],
      ["probe down", "0", "0.0162"],
      ["heavy up", "0", "0.0200"],
      ["heavy down", "0", "0.0200"],
    ]);
  });
});

describe("a rate", () => {
  const one = scalar({ c6: "phi6" });
  const tail = 1e-4 / 0.99;
  it("expands |1 + a|² with interference", () => {
    const plan = planOf(one, { observable: "rate with interference", insertions: "1" });
    expect(
      plan.orders.flatMap(({ entries }) => entries).map(({ id, size, role }) => [id, size, role]),
    ).toEqual([
      ["c6|", 0.02, "interference"],
      ["c6|c6", 1e-4, "square"],
    ]);
    expect(plan.orders[0]?.leftOut.unlisted).toBeCloseTo(2 * tail * 1.01 + tail ** 2, 12);
  });

  it("leads with the square where helicity forbids interference", () => {
    const { value, notices } = askPlan(one, {
      observable: "rate without interference",
      insertions: "1",
      target: "1e-3",
    });
    expect(value?.orders.map(({ order }) => order[0]?.text)).toEqual(["0", "4"]);
    expect(value?.order?.text).toBe("0");
    expect(notices).toMatchObject([{ code: "plan-square-leads", facts: { order: "4" } }]);
    expect(value?.orders[0]?.leftOut.unlisted).toBeCloseTo(2 * 0.01 * tail + tail ** 2, 14);
  });

  it("has cross terms of different corrections twice", () => {
    const entries = planOf(scalar({ a: "phi6", b: { fields: "phi4", derivatives: 2 } }), {
      observable: "rate without interference",
      insertions: "1",
    }).orders;
    expect(entries[1]?.entries.map(({ id, size }) => [id, size])).toEqual([
      ["a|b", 2e-4],
      ["a|a", 1e-4],
      ["b|b", 1e-4],
    ]);
  });

  it("flags a square kept without the interference of the same order", () => {
    const flags = (terms: TheorySketch["terms"]) =>
      askPlan(scalar(terms), { observable: "rate with interference", target: "1e-3" }).notices.map(
        ({ code }) => code,
      );
    expect(flags({ c6: "phi6" })).toEqual([]);
    expect(
      askPlan(scalar({ c6: "phi6" }), {
        observable: "rate with interference",
        target: "9e-5",
        insertions: "1",
        unlisted: "listed terms only",
      }).notices.map(({ code }) => code),
    ).toEqual(["plan-tail-matters", "plan-square-alone"]);
    expect(
      askPlan(scalar(listed), {
        observable: "rate with interference",
        target: "1e-5",
        unlisted: "listed terms only",
      }).notices.map(({ code }) => code),
    ).not.toContain("plan-square-alone");
  });
});

describe("how the order moves", () => {
  const theory = scalar(listed, [gev("p", "probe", 300, 60), gev("Lambda", "heavy", 3000, 1000)]);

  it("has the largest probe in closed form for a single term: Q² = target", () => {
    const plan = planOf(scalar({ c6: "phi6" }), {
      target: "0.4 %",
      insertions: "1",
      unlisted: "listed terms only",
    });
    expect(plan.orders[0]?.largestProbe).toBeCloseTo(3000 * Math.sqrt(0.004), 8);
    expect(plan.orders[1]).toMatchObject({ largestProbe: 3000, largestProbeIsHeavy: true });
  });

  it("solves Q²/(1 − Q²) = target with a tail from order 2", () => {
    const plan = planOf(scalar({ l: "phi4" }), { target: "1 %" });
    expect(plan.largestProbe).toBeCloseTo(3000 * Math.sqrt(0.01 / 1.01), 8);
    expect(plan.order).toBeNull();
  });

  it("meets the target just below the largest probe and misses it just above", () => {
    for (const { order, largestProbe } of planOf(theory, { target: "1e-3" }).orders) {
      const at = (p: number) =>
        leftOutByOrder(theory, { target: "1e-3", probe: `${p} GeV` })[order[0]?.text ?? ""]?.used ?? NaN;
      expect(at(largestProbe * (1 - 1e-6))).toBeLessThan(1e-3);
      expect(at(largestProbe * (1 + 1e-6))).toBeGreaterThan(1e-3);
    }
  });

  it("moves with one standard deviation of each scale", () => {
    const { shifts, parameters } = planOf(theory, { target: "1e-3" });
    expect(shifts.map(({ what, Q }) => [what, Q.toPrecision(4)])).toEqual([
      ["probe up", "0.1200"],
      ["probe down", "0.08000"],
      ["heavy up", "0.07500"],
      ["heavy down", "0.1500"],
    ]);
    // At Q = 0.15: 2·0.15⁴ ≈ 1.0e-3 is left out at order 2.
    expect(shifts.map(({ order }) => order?.text)).toEqual(["2", "2", "2", "4"]);
    expect(parameters[0]?.sigma).toBeCloseTo(0.1 * Math.hypot(0.2, 1 / 3), 12);
  });

  it.each(["amplitude", "rate with interference", "rate without interference"] as const)(
    "has the uncertainty of what is left out of an %s that moving p, Λ and sizes by hand gives",
    (observable) => {
      const at = (p: number, heavy: number, c6: number, spread = [0, 0, 0]) =>
        planOf(
          scalar({ c6: { fields: "phi6", assigned: [c6, c6 * (spread[2] ?? 0)] }, c8: "phi8" }, [
            gev("p", "probe", p, p * (spread[0] ?? 0)),
            gev("Lambda", "heavy", heavy, heavy * (spread[1] ?? 0)),
          ]),
          { observable, target: "0.5" },
        ).leftOut;
      const step = 1e-4;
      // Central differences of the whole computation, each source at a time; a size by hand follows p as its square.
      const moved = (p: number, heavy: number, c6: number) =>
        at(300 * p, 3000 * heavy, 0.02 * c6 * p ** 2).used;
      const slopes = [
        (moved(1 + step, 1, 1) - moved(1 - step, 1, 1)) / (2 * step),
        (moved(1, 1 + step, 1) - moved(1, 1 - step, 1)) / (2 * step),
        (moved(1, 1, 1 + step) - moved(1, 1, 1 - step)) / (2 * step),
      ];
      const spread = [0.05, 0.1, 0.2];
      const expected = Math.hypot(...slopes.map((slope, n) => slope * (spread[n] ?? 0)));
      expect(at(300, 3000, 0.02, spread).sigma / expected).toBeCloseTo(1, 5);
    },
  );

  it("never needs a lower order at a higher probe", () => {
    const orders = planOf(theory, { target: "1e-3" }).probeTable.map(({ order }) =>
      order ? Number(order.text) : Infinity,
    );
    expect(orders).toEqual([...orders].sort((a, b) => a - b));
    expect(new Set(orders).size).toBeGreaterThan(2);
  });

  it("draws what is left out along p, rising", () => {
    for (const { points } of planOf(theory).curves)
      for (const [n, point] of points.entries())
        expect(point.leftOut).toBeGreaterThan(points[n - 1]?.leftOut ?? 0);
  });

  it("depends on p and Λ only through their ratio", () => {
    const scaled = scalar(listed, [gev("p", "probe", 30, 6), gev("Lambda", "heavy", 300, 100)]);
    expect(planOf(scaled).orders.map(({ sum, leftOut }) => [sum, leftOut])).toEqual(
      planOf(theory).orders.map(({ sum, leftOut }) => [sum, leftOut]),
    );
  });
});

describe("loops", () => {
  it("costs 1/(16π²) each in d = 4 and as many as the target needs", () => {
    const plan = planOf(scalar(listed), { target: "1e-3" });
    expect(plan.loopFactor).toBeCloseTo(1 / (16 * Math.PI ** 2), 12);
    // Order 0: 6.3e-3 needs one loop, 4e-5 no second; order 2: 1e-2 · 6.3e-3 is below the target already.
    expect(plan.orders.slice(0, 2).map(({ loops }) => loops.needed)).toEqual([1, 0]);
    // Own derivation: one φ⁶ closes two loops at most, φ⁶ twice four, φ⁸ three.
    expect(plan.orders.map(({ loops }) => loops.insertions)).toEqual([0, 2, 4, 5, 6]);
  });

  it.each([
    [2, 1 / (4 * Math.PI)],
    [3, 1 / (4 * Math.PI ** 2)],
    [6, 1 / (128 * Math.PI ** 3)],
  ])("follows the solid angle in d = %i", (d, factor) => {
    expect(planOf(scalar({ c: "phi8" }, undefined, d), { cap: "24" }).loopFactor).toBeCloseTo(factor, 12);
  });

  it("has no leading loops where every interaction is suppressed", () => {
    expect(planOf(scalar({ c6: "phi6" })).orders.map(({ loops }) => loops.needed)).toEqual([0, 0, 0]);
  });
});

describe("what an order plan refuses, in words", () => {
  const noScales = (...scales: NonNullable<TheorySketch["scales"]>) =>
    scalar(listed, [...scales] as ReturnType<typeof gev>[]);
  it.each([
    ["no premises", null, {}, ["premises-missing"]],
    ["no scales", noScales(), {}, ["plan-scale-missing", "plan-scale-missing"]],
    [
      "a probe without a number",
      noScales({ symbol: "p", role: "probe" }, gev("L", "heavy", 3)),
      {},
      ["scale-has-no-number"],
    ],
    [
      "two heavy scales",
      noScales(gev("p", "probe", 1), gev("L", "heavy", 3), gev("M", "heavy", 3)),
      {},
      ["plan-scale-ambiguous"],
    ],
    [
      "a pure number over an energy",
      noScales({ symbol: "p", role: "probe", value: 0.1 }, gev("L", "heavy", 3)),
      {},
      ["plan-scales-differ"],
    ],
    ["p = Λ", noScales(gev("p", "probe", 3), gev("L", "heavy", 3)), {}, ["plan-q-not-below-one"]],
    [
      "a probe of zero",
      noScales(gev("p", "probe", 0), gev("L", "heavy", 3)),
      {},
      ["plan-scale-not-positive"],
    ],
    ["a target in words", scalar(listed), { target: "small" }, ["plan-target-unreadable"]],
    ["a target of nothing", scalar(listed), { target: "0" }, ["plan-target-unreadable"]],
    ["a target of 100 %", scalar(listed), { target: "100 %" }, ["plan-target-unreadable"]],
    ["no insertions", scalar(listed), { insertions: "0" }, ["plan-insertions-unreadable"]],
    ["a negative cap", scalar(listed), { cap: "-2" }, ["plan-cap-unreadable"]],
    ["a symbolic dimension", scalar(listed, undefined, "d"), {}, ["plan-dimension-symbolic"]],
    ["an unknown scale", scalar(listed), { probe: "q" }, ["unknown-symbol"]],
  ])("%s", (_, theory, given, codes) => {
    expect(codesOf(theory, given)).toEqual(codes);
    expect(askPlan(theory, given).value).toBeNull();
  });

  it("takes a probe typed in another unit, or by symbol", () => {
    expect(planOf(scalar(listed), { probe: "0.6 TeV" })).toMatchObject({
      probe: { value: 0.6, unit: "TeV" },
      parameters: [{ value: 0.2 }],
    });
    expect(planOf(scalar(listed), { probe: "p", heavy: "6(1) TeV" })).toMatchObject({
      heavy: { value: 6, sigma: 1 },
      parameters: [{ value: 0.05 }],
    });
  });

  it("has no order by dimension for a cap below every listed term but the leading one", () => {
    expect(planOf(scalar({ c8: "phi8" }), { cap: "2" }).orders.map(({ order }) => order[0]?.text)).toEqual([
      "0",
    ]);
  });
});

describe("what can be pinned", () => {
  it("names every scalar by row id and quantity", () => {
    const { scalars, working } = askPlan(scalar({ l: "phi4", c6: "phi6" }), { target: "1e-3" });
    expect(scalars.map(({ id }) => id)).toEqual([
      "order",
      "Q",
      "left-out",
      "left-out/listed",
      "left-out/unlisted",
      "first-out/size",
      "largest-probe",
      "l/size",
      "l/order",
      "c6/size",
      "c6/order",
    ]);
    expect(scalars.find(({ id }) => id === "order")?.value).toEqual({ type: "exact", text: "2" });
    expect(
      working.some((step) => step.step === "formula" && step.latex.includes("\\frac{Q^{4}}{1 - Q^{2}}")),
    ).toBe(true);
  });
});

describe("scales that lie very far apart", () => {
  const far = (probe: number) => scalar(listed, [gev("p", "probe", probe), gev("Lambda", "heavy", 1e19)]);
  it("finds the largest probe where powers of Q at the working point leave the range of a double", () => {
    // Own derivation: the largest probe is a property of the terms and of Λ; where p stands now does not enter.
    const near = planOf(far(1e18), { target: "1 %" });
    const tiny = planOf(far(1e-60), { target: "1 %" });
    expect((tiny.orders[0]?.largestProbe ?? 0) / (near.orders[0]?.largestProbe ?? 1)).toBeCloseTo(1, 9);
    expect(tiny.orders[0]?.largestProbeIsHeavy).toBe(false);
  });
  it("refuses in words a ratio whose inverse is no double, instead of searching forever", () => {
    expect(codesOf(scalar(listed, [gev("p", "probe", 1e-14), gev("Lambda", "heavy", 1e300)]))).toEqual([
      "plan-q-too-small",
    ]);
  });
});

it("subtracts the measure's own symbols in the working of an anisotropic theory", () => {
  const theory = theoryOf({
    D: 3,
    z: 2,
    fields: { psi: "Schrödinger field" },
    terms: { c: "psi~2 psi2" },
    scales: [gev("p", "probe", 300), gev("Lambda", "heavy", 3000)],
  });
  expect(JSON.stringify(askPlan(theory).working)).toContain("Delta - D - z = 1");
});

it("counts on no terms that change the number of particles, and misses no order at which none exists", () => {
  // Own derivation, D = 3, z = 2: legs of ψ†ⁿψⁿ with 2m gradients are of order 3n + 2m − 5: 1, 3, 4, …; never 1/2 or 2.
  const contact = theoryOf({
    D: 3,
    z: 2,
    fields: { psi: "Schrödinger field" },
    terms: { c0: "psi~2 psi2", c2: { fields: "psi~2 psi2", derivatives: 2 } },
    scales: [gev("p", "probe", 300), gev("Lambda", "heavy", 3000)],
  });
  expect(planOf(contact).step.text).toBe("1");
  expect(askPlan(contact).notices.map(({ code }) => code)).not.toContain("plan-gap");
  const bare = { ...contact, terms: contact.terms.filter(({ rowId }) => rowId === "c2") };
  expect(askPlan(bare).notices).toContainEqual(
    expect.objectContaining({ code: "plan-gap", facts: { orders: "1" } }),
  );
});
