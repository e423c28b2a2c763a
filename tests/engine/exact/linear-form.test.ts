import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { LinearForm } from "#engine/exact/linear-form.ts";
import { Rational } from "#engine/exact/rational.ts";
import { readLinearForm } from "#engine/notation/read-linear-form.ts";
import { linearForm, smallRational } from "./arbitraries.ts";

const d = LinearForm.symbol("d");

describe("linear forms are a vector space", () => {
  it("adds in any order and takes back", () => {
    fc.assert(
      fc.property(
        linearForm,
        linearForm,
        (a, b) => a.plus(b).equals(b.plus(a)) && a.plus(b).minus(b).equals(a),
      ),
    );
  });
  it("distributes over factors", () => {
    fc.assert(
      fc.property(linearForm, linearForm, smallRational, (a, b, k) =>
        a
          .plus(b)
          .times(k)
          .equals(a.times(k).plus(b.times(k))),
      ),
    );
  });
  it("evaluates as it adds and scales", () => {
    fc.assert(
      fc.property(linearForm, linearForm, smallRational, smallRational, (a, b, k, x) =>
        a
          .plus(b.times(k))
          .at("d", x)
          .equals(a.at("d", x).plus(b.at("d", x).times(k))),
      ),
    );
  });
  it("vanishes where it says", () => {
    fc.assert(
      fc.property(smallRational, smallRational, (a, b) => {
        const form = LinearForm.constant(a).plus(d.times(b));
        const zero = form.zeroIn("d");
        return b.sign() === 0 ? zero === null : zero !== null && form.at("d", zero).equals(LinearForm.zero);
      }),
    );
  });
  it("drops a symbol whose slope cancels", () => {
    fc.assert(
      fc.property(
        linearForm,
        (a) => a.minus(a).freeSymbols().length === 0 && a.minus(a).asRational()?.sign() === 0,
      ),
    );
  });
});

describe("the text of a form", () => {
  it.each([
    [d.times(Rational.of(3, 2)).minus(LinearForm.constant(3)), "3/2*d - 3", "\\frac{3}{2}d - 3"],
    [d.times(-1), "-d", "-d"],
    [LinearForm.zero, "0", "0"],
    [
      LinearForm.symbol("D").minus(LinearForm.symbol("z")).times(Rational.of(1, 2)),
      "1/2*D - 1/2*z",
      "\\frac{1}{2}D - \\frac{1}{2}z",
    ],
    [LinearForm.constant(4).minus(d), "-d + 4", "-d + 4"],
  ])("is canonical: %#", (form, text, latex) =>
    expect([form.toString(), form.toLatex()]).toEqual([text, latex]),
  );
  it("reads back as the same form", () => {
    const symbols = new Map(
      (["d", "D", "z"] as const).map((symbol) => [symbol as string, LinearForm.symbol(symbol)]),
    );
    fc.assert(
      fc.property(linearForm, (form) => {
        const reading = readLinearForm(form.toString(), symbols);
        return reading.ok && reading.value.equals(form);
      }),
    );
  });
});
