import { describe, expect, it } from "vitest";
import { theoryOf, type TheorySketch } from "../theory-builder.ts";
import { typed } from "../typed-premises.ts";
import { askTheory, divergent, graphOf, listOf } from "./ask.ts";

const forbidden = (theory: Parameters<typeof listOf>[0], caps = {}) =>
  Object.fromEntries(
    listOf(theory, caps)
      .amplitudes.filter(({ status }) => status !== "divergent")
      .map(({ legs, status, forbiddenBy }) => [legs.text, forbiddenBy ?? status]),
  );

describe("the amplitudes of a theory", () => {
  const cubic: TheorySketch = {
    d: 6,
    symmetries: [3],
    fields: { phi: { kind: "complex scalar", charges: [1] } },
    terms: { g: "phi3" },
  };

  // Own derivation: φ³ + h.c. in d = 6 with charges modulo 3; ω = 6 − 2E.
  it("follow the charges of a symmetry, and name what it forbids", () => {
    expect(divergent(theoryOf(cubic))).toEqual({ vacuum: "6", "phi* phi": "2", "phi^3": "0" });
    expect(forbidden(theoryOf(cubic))).toEqual({ phi: "Z3", "phi^2": "Z3", "phi* phi^2": "Z3" });
  });

  it("without the symmetry are forbidden all the same where no graph makes them", () => {
    expect(divergent(theoryOf(cubic), { symmetries: "no" })).toEqual({
      vacuum: "6",
      "phi* phi": "2",
      "phi^3": "0",
    });
    expect(new Set(Object.values(forbidden(theoryOf(cubic), { symmetries: "no" })))).toEqual(
      new Set(["no graph within the caps"]),
    );
  });

  it("need an even number of fermions", () => {
    const yukawa = theoryOf({
      fields: { phi: "real scalar", psi: "Majorana spinor" },
      terms: { y: "psi2 phi" },
    });
    expect(forbidden(yukawa)).toMatchObject({
      psi: "forbidden by fermion parity",
      "phi psi": "forbidden by fermion parity",
    });
    expect(divergent(yukawa)).toMatchObject({ "psi^2": "1", "phi psi^2": "0" });
  });

  it("of retarded fields vanish in vacuum where their lines would close", () => {
    const contact = theoryOf({
      D: 2,
      z: 2,
      fields: { psi: "Schrödinger field" },
      terms: { c: "psi~2 psi2" },
    });
    expect(divergent(contact)).toEqual({ "psi*^2 psi^2": "0" });
    // The free loop closes on itself just as little (own derivation: ∫dE/(E − k²/2 + i0) has its pole on one side).
    expect(forbidden(contact)).toMatchObject({
      "psi* psi": "vanishes in vacuum",
      vacuum: "vanishes in vacuum",
    });
  });

  // Boulware 1970, Ann. Phys. 56, 140: the neutral vector theory with a conserved current renormalises as electrodynamics.
  it("of a massive vector with a conserved current need no more than a photon's and the vector's own mass", () => {
    const vector = (kind: "massive vector" | "massive vector, conserved current") =>
      theoryOf({ fields: { psi: "Dirac spinor", V: kind }, terms: { g: "psi~ psi V", m: "psi~ psi" } });
    expect(listOf(vector("massive vector, conserved current")).missing).toEqual([]);
    const proca = listOf(vector("massive vector"), { maxOrder: "2" }).missing.map(({ text }) => text);
    expect(proca).not.toContain("V^2");
    expect(proca).toContain("d^3 psibar psi");
  });

  it("come with what symmetries may take away, for every field that has divergent legs", () => {
    const codes = (theory: Parameters<typeof listOf>[0]) =>
      askTheory(theory, { maxLegs: "4" }).notices.map(({ code }) => code);
    const gravity = theoryOf({
      fields: { h: "metric fluctuation" },
      terms: { k: { fields: "h3", derivatives: 2 } },
    });
    expect(codes(gravity)).toContain("omega-gauge");
    const pions = { fields: "phi4", derivatives: 2 };
    expect(codes(theoryOf({ fields: { phi: "real scalar" }, terms: { pions } }))).toContain("omega-shift");
    expect(codes(theoryOf({ fields: { phi: "real scalar" }, terms: { pions, l: "phi4" } }))).not.toContain(
      "omega-shift",
    );
  });

  it("take the degree from the vertices that raise it most, order by order", () => {
    // φ⁴ and φ⁶/Λ² in d = 4: E = 4 diverges as Λ⁰ at order 0 and as p² at order 2; E = 6 only from order 2 on.
    const { amplitudes, verdict, finitelyManyPerOrder, bounds } = listOf(
      theoryOf({ fields: { phi: "real scalar" }, terms: { l: "phi4", c: "phi6" } }),
    );
    const at = (text: string) =>
      amplitudes
        .find(({ legs }) => legs.text === text)
        ?.atOrders.map(({ order, omega, loops }) => [order.text, omega.text, loops]);
    expect(at("phi^4")).toEqual([
      ["0", "0", 1],
      ["2", "2", 1],
    ]);
    expect(at("phi^6")).toEqual([["2", "0", 1]]);
    expect([verdict, finitelyManyPerOrder]).toEqual(["new terms at every order", true]);
    expect(bounds.map(({ order, largestDimension }) => [order.text, largestDimension.text])).toEqual([
      ["0", "4"],
      ["2", "6"],
    ]);
  });

  it("have every counterterm within the bound of their order", () => {
    const theory = theoryOf({
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: { l: "phi4", y: "psi~ psi phi", c: "phi6", g: "psi~2 psi2" },
    });
    const { amplitudes } = listOf(theory, { maxOrder: "4", maxLegs: "8" });
    const divergentOnes = amplitudes.filter(({ status }) => status === "divergent");
    expect(divergentOnes.length).toBeGreaterThan(15);
    for (const { counterterms, atOrders } of divergentOnes) {
      const order = Math.max(...atOrders.map((one) => Number(one.order.text)));
      for (const { dimension } of counterterms) expect(Number(dimension.text)).toBeLessThanOrEqual(4 + order);
    }
  });

  it("agree with the graph that is said to reach the degree", () => {
    const theory = theoryOf({
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: { l: "phi4", t: "phi3", y: "psi~ psi phi", g: "psi~2 psi2" },
    });
    let checked = 0;
    for (const { legs, atOrders } of listOf(theory).amplitudes) {
      for (const { omega, loops, vertices } of atOrders) {
        if (vertices.length === 0) continue;
        const counts = Object.fromEntries(vertices.map(({ termRowId, count }) => [termRowId, count]));
        const external = Object.fromEntries(
          legs.fields.flatMap(({ symbol, count, conjugateCount }) => [
            ...(count > 0 ? [[symbol, count]] : []),
            ...(conjugateCount > 0 ? [[`${symbol}~`, conjugateCount]] : []),
          ]),
        );
        const graph = graphOf(theory, counts, external);
        expect([graph.omega.text, graph.loops]).toEqual([omega.text, loops]);
        checked += 1;
      }
    }
    expect(checked).toBeGreaterThan(10);
  });

  it("count a field's own kinetic term as a renormalisation, not as missing", () => {
    const { amplitudes, missing } = listOf(
      theoryOf({ fields: { phi: "real scalar" }, terms: { l: "phi4", m: "phi2" } }),
    );
    const self = amplitudes.find(({ legs }) => legs.text === "phi^2")?.counterterms;
    expect(self?.map(({ text, kinetic, presentAs }) => [text, kinetic, presentAs])).toEqual([
      ["d^2 phi^2", true, null],
      ["phi^2", false, "m"],
    ]);
    expect(missing).toEqual([]);
  });

  it("leave fields out that do not interact", () => {
    expect(
      divergent(
        theoryOf({ fields: { phi: "real scalar", chi: "real scalar" }, terms: { l: "phi4", m: "chi2" } }),
      ),
    ).toEqual({ vacuum: "4", "phi^2": "2", "phi^4": "0" });
  });

  it("refuse caps that are no numbers, and what is too large to list", () => {
    const theory = theoryOf({ fields: { phi: "real scalar" }, terms: { l: "phi4" } });
    expect(askTheory(theory, { maxLoops: "0" }).problems).toMatchObject([
      { code: "cap-unreadable", path: ["maxLoops"] },
    ]);
    expect(askTheory(theory, { maxOrder: "many" }).problems).toMatchObject([
      { code: "cap-unreadable", path: ["maxOrder"] },
    ]);
    const names = ["a", "b", "e", "f", "g", "h", "i", "j", "k", "l"];
    const crowd = theoryOf({
      fields: Object.fromEntries(names.map((name) => [name, "complex scalar"])),
      terms: Object.fromEntries(names.map((name) => [name, `${name}~ ${name} a~ a`])),
    });
    expect(askTheory(crowd, { maxLegs: "10" }).problems).toMatchObject([{ code: "theory-too-large" }]);
  });
});

describe("the verdict on a theory", () => {
  it("is given by ranges where the dimension is a symbol", () => {
    const { value, notices } = askTheory(
      theoryOf({ d: "d", fields: { phi: "real scalar" }, terms: { l: "phi4" } }),
    );
    expect(value?.verdict).toBeNull();
    expect(value?.ranges.map(({ from, to, verdict }) => [from?.text, to?.text, verdict])).toEqual([
      ["0", "4", "super-renormalisable"],
      ["4", "4", "renormalisable"],
      ["4", undefined, "new terms at every order"],
    ]);
    expect(notices.map(({ code }) => code)).toEqual(["amplitudes-need-numbers"]);
  });

  it("changes with derivatives: the sigma model is marginal in d = 2 where its field is dimensionless", () => {
    const ranges = listOf(
      theoryOf({ d: "d", fields: { pi: "real scalar" }, terms: { g: { fields: "pi4", derivatives: 2 } } }),
    ).ranges;
    expect(ranges.map(({ verdict }) => verdict)).toEqual([
      "super-renormalisable",
      "infinitely many divergent amplitudes",
      "new terms at every order",
    ]);
  });

  it("of a theory without interactions is that it is free", () => {
    expect(listOf(theoryOf({ fields: { phi: "real scalar" }, terms: { m: "phi2" } })).verdict).toBe("free");
  });

  it("is not changed by a mass, but by an irrelevant bilinear", () => {
    const verdict = (extra: TheorySketch["terms"]) =>
      listOf(theoryOf({ fields: { phi: "real scalar" }, terms: { l: "phi4", ...extra } })).verdict;
    expect(verdict({ m: "phi2" })).toBe("renormalisable");
    expect(verdict({ k: { fields: "phi2", derivatives: 4 } })).toBe("new terms at every order");
  });
});

describe("from typed premises", () => {
  const qed = typed({
    fields: ["A | gauge potential", "F | field strength", "psi | Dirac spinor"],
    scales: ["m | 0.5 MeV | light"],
    terms: ["F^2/4", "psibar d psi", "m psibar psi", "e psibar A psi"],
  });

  it("finds all that electrodynamics needs among its terms", () => {
    expect(qed.problems).toEqual([]);
    const { missing, verdict, amplitudes } = listOf(qed);
    expect(verdict).toBe("renormalisable");
    expect(missing).toEqual([]);
    const present = amplitudes
      .flatMap(({ counterterms }) => counterterms)
      .filter(({ presentAs }) => presentAs !== null);
    expect(present.map(({ text, presentAs }) => `${text}: ${presentAs}`)).toEqual([
      "d^2 A^2: t1",
      "d psibar psi: t2",
      "psibar psi: t3",
      "A psibar psi: t4",
    ]);
    // Four photons: power counting alone would want A⁴; gauge invariance needs a derivative on each leg (Ward 1950).
    const fourPhotons = amplitudes.find(({ legs }) => legs.text === "A^4");
    expect(fourPhotons?.counterterms).toMatchObject([{ gauge: "excluded", presentAs: null }]);
  });

  it("names every scalar by the legs' row ids", () => {
    expect(askTheory(qed).scalars.map(({ id }) => id)).toEqual([
      "verdict",
      "divergent",
      "vacuum/omega",
      "f1:1/omega",
      "f1:2/omega",
      "f3:1:1/omega",
      "f1:3/omega",
      "f1:1,f3:1:1/omega",
      "f1:4/omega",
    ]);
  });

  it("says when part of the premises could not be read", () => {
    const broken = typed({ fields: ["phi | real scalar"], terms: ["lambda/4! phi^4", "g sigma^3"] });
    expect(askTheory(broken).notices.map(({ code }) => code)).toContain("premises-incomplete");
  });
});
