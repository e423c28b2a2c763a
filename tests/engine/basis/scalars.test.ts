/** Scalars against another construction: polynomials in Mandelstam invariants that permutations leave alone. */
import { describe, expect, it } from "vitest";
import { orthogonalScalars, scalarAlone } from "#engine/basis/contents.ts";
import { count } from "./ask.ts";

/** Operators with so many fields, by number of derivatives. */
function byDerivatives(inputs: Parameters<typeof count>[0], fields: number): Map<number, number> {
  return new Map(
    count(inputs)
      .classes.filter((row) => row.fields === fields)
      .map(({ derivatives, number }) => [derivatives, Number(number.at)]),
  );
}

/**
 * Symmetric polynomials of degree k in s, t, u with s + t + u = 0 are polynomials in stu and s² + t² + u²: as many as
 * there are ways to write k = 2a + 3b. Own derivation; the ring of invariants of S₃ is textbook.
 */
function symmetricInMandelstam(degree: number): number {
  let ways = 0;
  for (let b = 0; 3 * b <= degree; b++) if ((degree - 3 * b) % 2 === 0) ways += 1;
  return ways;
}

describe("four scalars", () => {
  it.each(["3", "4", "5", "6"])(
    "are counted by symmetric polynomials in s, t, u, in d = %s, parity even",
    (d) => {
      const to = d === "3" ? "10" : d === "4" ? "14" : "15";
      const found = byDerivatives(
        { ...scalarAlone, d, from: String(Number(d) + 1), to, parity: "with parity" },
        4,
      );
      const fieldsDimension = 4 * ((Number(d) - 2) / 2);
      for (let k = 0; fieldsDimension + 2 * k <= Number(to); k++) {
        if (fieldsDimension + 2 * k <= Number(d)) continue;
        expect(found.get(2 * k) ?? 0, `${2 * k} derivatives`).toBe(symmetricInMandelstam(k));
      }
    },
  );

  /** A(s | t, u), symmetric in t and u: polynomials in s and tu, so 1/((1 − t²)(1 − t⁴)) in derivatives. Own derivation. */
  it.each([2, 3, 7])("of O(%d) by amplitudes symmetric in two of them", (n) => {
    const found = byDerivatives({ ...orthogonalScalars(n), from: "5", to: "14", parity: "with parity" }, 4);
    for (let k = 1; 4 + 2 * k <= 14; k++) expect(found.get(2 * k) ?? 0).toBe(Math.floor(k / 2) + 1);
  });
});

/**
 * Five scalars in d ≥ 4, parity even: invariants of S₅ on the five-dimensional space of Mandelstam invariants, by
 * Molien's series. A permutation acts on s_ij with Σ_j s_ij = 0: pairs minus the permutation representation.
 */
function molienFive(degree: number): number {
  const shapes: readonly (readonly number[])[] = [
    [1, 1, 1, 1, 1],
    [2, 1, 1, 1],
    [2, 2, 1],
    [3, 1, 1],
    [3, 2],
    [4, 1],
    [5],
  ];
  const sizes = [1, 10, 15, 20, 20, 30, 24];
  let sum = 0;
  shapes.forEach((cycles, index) => {
    // Traces of powers give the coefficients of 1/det(1 − q g), by Newton's identities.
    const trace = (power: number) => {
      const split = cycles.flatMap((length) => {
        const pieces = gcd(length, power);
        return Array.from({ length: pieces }, () => length / pieces);
      });
      const fixed = split.filter((length) => length === 1).length;
      const swapped = split.filter((length) => length === 2).length;
      return (fixed * (fixed - 1)) / 2 + swapped - fixed;
    };
    const symmetric = [1];
    for (let k = 1; k <= degree; k++) {
      let value = 0;
      for (let i = 1; i <= k; i++) value += trace(i) * (symmetric[k - i] ?? 0);
      symmetric.push(value / k);
    }
    sum += (sizes[index] ?? 0) * (symmetric[degree] ?? 0);
  });
  return sum / 120;
}
function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}

describe("five scalars", () => {
  it("are counted by Molien's series where momenta are not constrained, in d = 6", () => {
    const found = byDerivatives({ ...scalarAlone, d: "6", from: "11", to: "18", parity: "with parity" }, 5);
    for (let k = 1; 10 + 2 * k <= 18; k++)
      expect(found.get(2 * k) ?? 0, `${2 * k} derivatives`).toBe(molienFive(k));
  });
});

describe("pseudoscalars", () => {
  it("occur an even number of times where nothing else is odd", () => {
    const inputs = { ...scalarAlone, from: "5", to: "9", parity: "with parity" };
    const pseudo = scalarAlone.fields.map((row) => ({ ...row, kind: "pseudoscalar" }));
    const { classes } = count({ ...inputs, fields: pseudo });
    expect(classes.filter(({ fields }) => fields % 2 === 1)).toEqual([]);
    const even = (rows: typeof classes) =>
      rows.filter(({ fields }) => fields % 2 === 0).map(({ id, number }) => [id, number.at]);
    expect(even(classes)).toEqual(even(count(inputs).classes));
  });
});
