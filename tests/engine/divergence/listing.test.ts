/** Which graphs are listed on request: without closed lines or tadpole parts, legs told apart, Furry's theorem. */
import { describe, expect, it } from "vitest";
import { evaluateDivergence } from "#engine/divergence/evaluate.ts";
import { divergenceShape } from "#engine/divergence/inputs.ts";
import type { GraphDivergence } from "#engine/divergence/value.ts";
import type { Theory } from "#engine/premises/theory.ts";
import { schemaOf } from "#engine/shape.ts";
import { theoryOf } from "../theory-builder.ts";

const phi4 = theoryOf({ fields: { phi: "real scalar" }, terms: { g: "phi4" } });
const qed = theoryOf({ fields: { A: "gauge potential", psi: "Dirac spinor" }, terms: { e: "psi~ psi A" } });

function asked(
  theory: Theory,
  [term, vertices]: [string, number],
  [field, legs]: [string, number],
  listing: Record<string, string>,
): GraphDivergence {
  const inputs = schemaOf(divergenceShape).parse({
    vertices: [{ id: "v", term, count: String(vertices) }],
    legs: [{ id: "l", field, leg: "field", count: String(legs) }],
    ...listing,
  });
  const { value } = evaluateDivergence(inputs, theory);
  // Mode "one graph" is the initial choice.
  if (value?.mode !== "one graph") throw new Error("refused");
  return value;
}
const picturesOf = (...args: Parameters<typeof asked>) => asked(...args).pictures;

describe("the listed graphs", () => {
  // Kleinert, Schulte-Frohlinde, Critical Properties of φ⁴-Theories (2001), from memory: at two loops the two-point
  // function is the sunset and the double bubble; the latter has a closed line.
  it("leave out closed lines", () => {
    expect(picturesOf(phi4, ["g", 2], ["phi", 2], {})?.count).toBe(2);
    const left = picturesOf(phi4, ["g", 2], ["phi", 2], { leftOut: "closed lines" });
    expect(left?.list.map(({ symmetry }) => symmetry)).toEqual(["6"]);
  });
  // Own derivation: with five φ⁴ vertices one of the graphs without closed lines still has a tadpole part.
  it("tell closed lines from tadpole parts at four loops", () => {
    expect(picturesOf(phi4, ["g", 5], ["phi", 4], { leftOut: "closed lines" })?.count).toBe(27);
    expect(picturesOf(phi4, ["g", 5], ["phi", 4], { leftOut: "tadpole parts" })?.count).toBe(26);
  });
  it("are no reducible ones where the irreducible are left out", () => {
    const left = picturesOf(phi4, ["g", 1], ["phi", 2], { leftOut: "closed lines" });
    expect([left?.count, left?.irreducible]).toEqual([0, true]);
  });
  // The s, t and u channels of the one-loop four-point function: Peskin, Schroeder (1995), section 10.2.
  it("have one graph for each channel when legs are told apart", () => {
    expect(picturesOf(phi4, ["g", 2], ["phi", 4], {})?.list.map(({ labellings }) => labellings)).toEqual([
      "3",
    ]);
    const channels = picturesOf(phi4, ["g", 2], ["phi", 4], { toldLegs: "labelled" });
    expect([channels?.count, channels?.labelled]).toEqual([3, true]);
  });
});

describe("charge conjugation", () => {
  // Furry, Phys. Rev. 51 (1937) 125.
  it("takes the three-photon triangle and leaves the box", () => {
    const three = picturesOf(qed, ["e", 3], ["A", 3], { furry: "yes" });
    expect([three?.count, three?.cancelled]).toEqual([0, 1]);
    const four = picturesOf(qed, ["e", 4], ["A", 4], { furry: "yes" });
    expect([four?.count, four?.cancelled]).toEqual([1, 0]);
  });
  it("takes nothing unless asked", () => {
    expect(picturesOf(qed, ["e", 3], ["A", 3], {})?.cancelled).toBeNull();
  });
  // A scalar with a Yukawa coupling is even: three scalars on a closed line do not cancel.
  it("does not count scalars", () => {
    const yukawa = theoryOf({
      fields: { phi: "real scalar", psi: "Dirac spinor" },
      terms: { y: "psi~ psi phi" },
    });
    expect(picturesOf(yukawa, ["y", 3], ["phi", 3], { furry: "yes" })).toMatchObject({
      count: 1,
      cancelled: 0,
    });
  });
});
