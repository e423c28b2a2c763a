/**
 * How notation groups, held against mathjs's own evaluation of the same expression written out in its language
 * (general-purpose library; it shares the parser of explicit operators, and nothing of what is typed, with the engine).
 */
import fc from "fast-check";
import { evaluate } from "mathjs/number";
import { describe, expect, it } from "vitest";
import { parse } from "#engine/notation/parse.ts";
import type { Tree } from "#engine/notation/tree.ts";

const values: Readonly<Record<string, number>> = { a: 1.25, b: 0.75, c: 2.5, x: 1.5, y: 0.625 };

/** The tree in floating point, every node as its type says. */
function valueOf(tree: Tree): number {
  switch (tree.type) {
    case "number":
      return tree.value.toFloat();
    case "name":
      return values[tree.name.base] ?? NaN;
    case "group":
      return valueOf(tree.body);
    case "modulus":
      return Math.abs(valueOf(tree.body));
    case "quotient":
      return valueOf(tree.over) / valueOf(tree.under);
    case "power":
      return valueOf(tree.base) ** valueOf(tree.exponent);
    case "factorial":
      return [1, 1, 2, 6, 24][valueOf(tree.body)] ?? NaN;
    case "sum":
      return tree.parts.reduce((total, { sign, node }) => total + (sign === "-" ? -1 : 1) * valueOf(node), 0);
    case "product":
      return tree.factors.reduce(
        (total, { join, node }) => (join === "/" ? total / valueOf(node) : total * valueOf(node)),
        1,
      );
    case "call": {
      const parts = tree.parts.map(valueOf);
      if (tree.callee === "sqrt") return Math.sqrt(parts[0] ?? NaN);
      return tree.callee === "max" ? Math.max(...parts) : Math.min(...parts);
    }
    case "accent":
    case "conjugate":
    case "measured":
      throw new Error(`The expressions of this test have no ${tree.type}.`);
  }
}

interface Pair {
  readonly typed: string;
  /** The same, every operator explicit, for mathjs. */
  readonly written: string;
}

const { expression } = fc.letrec<{ atom: Pair; operand: Pair; product: Pair; expression: Pair }>((tie) => {
  const nested = tie("expression");
  const same = (text: string): Pair => ({ typed: text, written: text });
  const leaf = fc.constantFrom(...Object.keys(values), "2", "3", "0.5").map(same);
  const around = (typed: readonly [string, string], written: readonly [string, string]) =>
    nested.map((inner): Pair => ({
      typed: typed[0] + inner.typed + typed[1],
      written: written[0] + inner.written + written[1],
    }));
  return {
    atom: fc.oneof(
      { depthSize: "small", withCrossShrink: true },
      { arbitrary: leaf, weight: 6 },
      { arbitrary: around(["(", ")"], ["(", ")"]), weight: 1 },
      { arbitrary: around(["[", "]"], ["(", ")"]), weight: 1 },
      { arbitrary: around(["|(", ")|"], ["abs(", ")"]), weight: 1 },
      { arbitrary: around(["max(1, ", ")"], ["max(1, ", ")"]), weight: 1 },
      {
        arbitrary: fc.tuple(nested, leaf).map(([over, under]) => ({
          typed: `\\frac{${over.typed}}{${under.typed}}`,
          written: `((${over.written})/(${under.written}))`,
        })),
        weight: 1,
      },
    ),
    operand: fc.oneof(
      { arbitrary: tie("atom"), weight: 4 },
      { arbitrary: fc.constantFrom("2!", "3!", "4!").map(same), weight: 1 },
      {
        arbitrary: fc
          .tuple(
            tie("atom"),
            fc.constantFrom(["2", "2"], ["-1", "(-1)"], ["{-2}", "(-2)"], ["(1 + 2)", "(1 + 2)"]),
          )
          .map(([base, [typed = "", written = ""]]) => ({
            typed: `${base.typed}^${typed}`,
            written: `${base.written}^${written}`,
          })),
        weight: 1,
      },
    ),
    product: fc
      .tuple(
        tie("operand"),
        fc.array(fc.tuple(fc.constantFrom(" ", " * ", "*", "/", " / ", " . "), tie("operand")), {
          maxLength: 4,
        }),
      )
      .map(([first, rest]) =>
        rest.reduce(
          (left, [join, right]) => ({
            typed: left.typed + join + right.typed,
            written: `${left.written} ${join.includes("/") ? "/" : "*"} ${right.written}`,
          }),
          first,
        ),
      ),
    expression: fc
      .tuple(
        fc.constantFrom("", "", "-", "+"),
        fc.array(fc.tuple(tie("product"), fc.constantFrom(" + ", " - ")), { minLength: 1, maxLength: 3 }),
      )
      .map(([sign, terms]) => {
        const join = (part: (pair: Pair) => string): string =>
          sign +
          terms.map(([term, after], index) => part(term) + (index < terms.length - 1 ? after : "")).join("");
        return { typed: join(({ typed }) => typed), written: join(({ written }) => written) };
      }),
  };
});

describe("grouping", () => {
  it("is what mathjs computes from the same expression with every operator explicit", () => {
    let compared = 0;
    fc.assert(
      fc.property(expression, ({ typed, written }) => {
        const reading = parse(typed, { quantities: false });
        if (!reading.ok) {
          expect(["text-too-long", "nested-too-deep"]).toContain(reading.failure.code);
          return;
        }
        const expected = evaluate(written, { ...values }) as number; // only numbers are in it
        const found = valueOf(reading.value);
        if (!Number.isFinite(expected) || !Number.isFinite(found)) {
          expect(Number.isFinite(found)).toBe(Number.isFinite(expected));
          return;
        }
        compared += 1;
        expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(expected)));
      }),
      { numRuns: 2000 },
    );
    expect(compared).toBeGreaterThan(1000);
  });

  it("puts back the kind of every join, and the place of every node", () => {
    const reading = parse("v.D a/b * c ± [d - e]", { quantities: false });
    expect(reading.ok && reading.value).toMatchObject({
      type: "sum",
      at: 0,
      parts: [
        {
          sign: "+",
          at: 0,
          node: {
            type: "product",
            factors: [
              { join: "juxtaposed", node: { at: 0 } },
              { join: ".", node: { at: 2 } },
              { join: "juxtaposed", node: { at: 4 } },
              { join: "/", node: { at: 6 } },
              { join: "*", node: { at: 10 } },
            ],
          },
        },
        {
          sign: "±",
          at: 12,
          node: {
            type: "group",
            bracket: "[",
            at: 14,
            body: {
              type: "sum",
              at: 15,
              parts: [
                { sign: "+", at: 15 },
                { sign: "-", at: 17, node: { at: 19 } },
              ],
            },
          },
        },
      ],
    });
  });

  it("raises from the left, and refuses a second power", () => {
    expect(parse("phi^mu^2", { quantities: false })).toMatchObject({
      ok: true,
      value: {
        type: "power",
        base: { type: "power", exponent: { type: "name" } },
        exponent: { type: "number" },
      },
    });
    expect(parse("2^3^2", { quantities: false })).toMatchObject({
      ok: false,
      failure: { code: "double-power" },
    });
  });
});
