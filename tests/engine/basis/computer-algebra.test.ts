/**
 * The count of scalars against a general-purpose computer algebra system, sympy, where it is installed. It expands the
 * Molien series of five identical scalars from the definition, with matrices; nothing is shared with the engine.
 */
import { spawnSync } from "node:child_process";
import { describe, expect, it } from "vitest";
import { scalarAlone } from "#engine/basis/contents.ts";
import { count } from "./ask.ts";

const hasSympy = spawnSync("python3", ["-c", "import sympy"]).status === 0;

/** Invariants of S5 on the Mandelstam invariants of five legs, by degree: 1/120 Σ 1/det(1 − q g). */
const program = `
from itertools import combinations, permutations
import sympy as sp
q = sp.symbols("q")
pairs = list(combinations(range(5), 2))
# s_ij with sum_j s_ij = 0: the orthogonal complement of five vectors in the space of pairs.
rows = sp.Matrix([[1 if i in pair else 0 for pair in pairs] for i in range(5)])
basis = sp.Matrix.hstack(*rows.nullspace())
left = (basis.T * basis).inv() * basis.T
seen, counts = {}, {}
for g in permutations(range(5)):
    cycles, left_over = [], set(range(5))
    while left_over:
        start = point = left_over.pop(); length = 1
        while g[point] != start:
            point = g[point]; left_over.discard(point); length += 1
        cycles.append(length)
    shape = tuple(sorted(cycles))
    if shape not in seen:
        move = sp.zeros(len(pairs), len(pairs))
        for column, (i, j) in enumerate(pairs):
            move[pairs.index(tuple(sorted((g[i], g[j])))), column] = 1
        determinant = (sp.eye(basis.cols) - q * left * move * basis).det(method="berkowitz")
        seen[shape] = sp.Poly(sp.expand(determinant), q)
    counts[shape] = counts.get(shape, 0) + 1
result = []
for degree in range(5):
    total = sp.Integer(0)
    for shape, number in counts.items():
        c = lambda k: seen[shape].coeff_monomial(q**k)
        inverse = [1 / c(0)]
        for k in range(1, degree + 1):
            inverse.append(-sum(c(j) * inverse[k - j] for j in range(1, k + 1)) / c(0))
        total += number * inverse[degree]
    result.append(str(total / 120))
print(" ".join(result))
`;

describe("five scalars", () => {
  it(hasSympy ? "agree with sympy" : "are not compared here: sympy is not installed", () => {
    const { classes } = count({ ...scalarAlone, d: "6", from: "11", to: "18", parity: "with parity" });
    const found = [1, 2, 3, 4].map(
      (k) =>
        classes.find(({ fields, derivatives }) => fields === 5 && derivatives === 2 * k)?.number.at ?? "0",
    );
    // Without sympy this still holds the count to what sympy 1.14 printed: 1 0 1 1 2.
    const { stdout } = hasSympy
      ? spawnSync("python3", ["-c", program], { encoding: "utf8" })
      : { stdout: "1 0 1 1 2" };
    expect(found).toEqual(stdout.trim().split(" ").slice(1));
  });
});
