/** Nested divergences of graphs whose subtractions textbooks work out, and the limits of looking for them. */
import { describe, expect, it } from "vitest";
import { theoryOf } from "../theory-builder.ts";
import { graphOf } from "./ask.ts";

const phi4 = theoryOf({ fields: { phi: "real scalar" }, terms: { g: "phi4" } });
const qed = theoryOf({ fields: { A: "gauge potential", psi: "Dirac spinor" }, terms: { e: "psi~ psi A" } });

/** "2 lines at 1,2: 0 ×3" for each graph. */
function nestedOf(theory: typeof phi4, vertices: Record<string, number>, legs: Record<string, number>) {
  const pictures = graphOf(theory, vertices, legs).pictures;
  return (pictures?.list ?? []).map(({ symmetry, nested }) => ({
    symmetry,
    nested: nested?.map(
      ({ vertices: at, lines, omega, ways }) =>
        `${lines} at ${at.map((v) => v + 1).join(",")}: ${omega.text} ×${ways}`,
    ),
  }));
}

describe("nested divergences", () => {
  // Collins, Renormalization (1984), section 3.1 and 5.2: the sunset has three divergent bubbles inside.
  it("the φ⁴ sunset in d = 4: each pair of its lines", () => {
    const sunset = nestedOf(phi4, { g: 2 }, { phi: 2 }).find(({ symmetry }) => symmetry === "6");
    expect(sunset?.nested).toEqual(["2 at 1,2: 0 ×3"]);
  });
  it("one loop has none", () => {
    expect(nestedOf(phi4, { g: 2 }, { phi: 4 })).toEqual([{ symmetry: "2", nested: [] }]);
  });
  // Peskin, Schroeder (1995), section 10.5: one divergent bubble in the half-overlapping graph, two in the chain.
  it("the two-loop four-point graphs without closed lines", () => {
    const graphs = nestedOf(phi4, { g: 3 }, { phi: 4 });
    const inside = graphs.map(({ nested }) => (nested ?? []).map((words) => words.replace(/ at .*:/, ":")));
    expect(inside).toContainEqual(["2: 0 ×1"]);
    expect(inside).toContainEqual(["2: 0 ×1", "2: 0 ×1"]);
  });
  // Itzykson, Zuber (1980), section 8.4 (from memory): rainbow, overlapping vertices, vacuum polarisation.
  it("the two-loop electron self-energies: a self-energy, two vertices, a vacuum polarisation", () => {
    const inside = nestedOf(qed, { e: 4 }, { psi: 1, "psi~": 1 }).map(({ nested }) =>
      (nested ?? []).map((words) => words.replace(/ at .*:/, ":")).sort(),
    );
    expect(inside).toHaveLength(3);
    expect(inside).toContainEqual(["2: 1 ×1"]);
    expect(inside).toContainEqual(["3: 0 ×1", "3: 0 ×1"]);
    expect(inside).toContainEqual(["2: 2 ×1"]);
  });
  it("are not told where the dimension is a symbol", () => {
    const symbolic = theoryOf({ d: "d", fields: { phi: "real scalar" }, terms: { g: "phi4" } });
    const sunset = nestedOf(symbolic, { g: 2 }, { phi: 2 });
    expect(sunset.map(({ nested }) => nested)).toEqual([undefined, undefined]);
  });
});

describe("the list of graphs", () => {
  it("counts irreducible ones, or connected ones where there are none", () => {
    expect(graphOf(phi4, { g: 3 }, { phi: 4 }).pictures).toMatchObject({
      irreducible: true,
      count: 3,
      complete: true,
    });
    expect(graphOf(phi4, { g: 2 }, { phi: 6 }).pictures).toMatchObject({
      irreducible: false,
      count: 1,
      complete: true,
    });
  });
  it("takes a term apart into itself and its conjugate where lines close only so", () => {
    const yukawa = theoryOf({
      fields: { chi: "complex scalar", phi: "real scalar" },
      terms: { m: "chi2 phi" },
    });
    const pictures = graphOf(yukawa, { m: 2 }, { phi: 2 }).pictures;
    expect(pictures?.list.map(({ symmetry }) => symmetry)).toEqual(["2"]);
    expect(pictures?.kinds).toHaveLength(2);
  });
  it("says when it is cut short, and is not made above six loops", () => {
    expect(graphOf(phi4, { g: 7 }, { phi: 4 }).pictures?.complete).toBe(false);
    expect(graphOf(phi4, { g: 9 }, { phi: 4 }).pictures).toBeNull();
  });
  it("draws scalars dashed beside fermions, solid among themselves, gluons curly", () => {
    const styles = (theory: typeof phi4, vertices: Record<string, number>, legs: Record<string, number>) =>
      graphOf(theory, vertices, legs).pictures?.fields.map(({ style }) => style);
    expect(styles(phi4, { g: 2 }, { phi: 4 })).toEqual(["solid"]);
    expect(styles(qed, { e: 2 }, { A: 2 })).toEqual(["wavy", "solid"]);
    const gluons = theoryOf({
      fields: { G: "gauge potential", h: "static heavy field", phi: "real scalar" },
      terms: { three: { fields: "G3", derivatives: 1 }, heavy: "h~ h G", p: "h~ h phi" },
    });
    expect(styles(gluons, { heavy: 2 }, { h: 1, "h~": 1 })).toEqual(["curly", "double", "dashed"]);
  });
});
