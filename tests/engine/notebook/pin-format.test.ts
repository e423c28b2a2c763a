import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { ScalarValue } from "#engine/evaluation.ts";
import { LinearForm } from "#engine/exact/linear-form.ts";
import { Rational } from "#engine/exact/rational.ts";
import {
  defaultPinFormat,
  formatScalar,
  formatScalarLatex,
  numberStyles,
  parsePinFormat,
  printPinFormat,
  signStyles,
  type PinFormat,
} from "#engine/notebook/pin-format.ts";

const number = (value: number, more: { sigma?: number; unit?: string } = {}): ScalarValue => ({
  type: "number",
  value,
  ...more,
});
const exact = (text: string): ScalarValue => ({ type: "exact", text });

describe("the text of a pin", () => {
  const cases: [ScalarValue, Partial<PinFormat>, string, string][] = [
    [number(0.109375, { sigma: 0.0137 }), {}, "0.109(14)", "0.109(14)"],
    [number(0.109375, { sigma: 0.0137 }), { uncertainty: false }, "0.109", "0.109"],
    [number(0.109375, { sigma: 0.0137 }), { style: "percent" }, "10.9(14) %", "10.9(14)\\,\\%"],
    [number(2.4e-4), { digits: 2 }, "2.4 × 10⁻⁴", "2.4 \\times 10^{-4}"],
    [number(0.0484), { digits: 2, sign: "both" }, "±0.048", "\\pm 0.048"],
    [number(-0.0484), { digits: 2, sign: "both" }, "±0.048", "\\pm 0.048"],
    [number(0.0484), { digits: 2, sign: "always" }, "+0.048", "+0.048"],
    [number(-0.0484), { digits: 2, sign: "always" }, "−0.048", "-0.048"],
    [number(3.2, { sigma: 0.4, unit: "TeV" }), {}, "3.20(40) TeV", "3.20(40)\\,\\mathrm{TeV}"],
    [number(3.2, { sigma: 0.4, unit: "TeV" }), { digits: 2, unit: false }, "3.2(4)", "3.2(4)"],
    [number(5, { unit: "fm^-1" }), { digits: 1 }, "5 fm⁻¹", "5\\,\\mathrm{fm^{-1}}"],
    [exact("-2*d + 6"), {}, "6 − 2d", "6 - 2d"],
    [exact("3/2*d - 3"), {}, "3d/2 − 3", "\\frac{3d}{2} - 3"],
    [exact("-d - 1/2"), {}, "−d − 1/2", "-d - \\frac{1}{2}"],
    [exact("D + z"), {}, "D + z", "D + z"],
    [exact("109/5832"), {}, "109/5832", "\\frac{109}{5832}"],
    [exact("109/5832"), { digits: 3 }, "0.0187", "0.0187"],
    [exact("-1/4"), { style: "percent", digits: 2 }, "−25 %", "-25\\,\\%"],
    [exact("-2"), {}, "−2", "-2"],
    [exact("0"), {}, "0", "0"],
    [exact("d - 2"), { digits: 3 }, "d − 2", "d - 2"],
    [exact("not canonical^2"), {}, "not canonical^2", "not canonical^2"],
    [{ type: "word", text: "irrelevant" }, { digits: 3, sign: "always" }, "irrelevant", "\\text{irrelevant}"],
  ];
  it.each(cases)("%j as %j reads %s", (value, more, unicode, latex) => {
    const format = { ...defaultPinFormat, ...more };
    expect(formatScalar(value, format)).toBe(unicode);
    expect(formatScalarLatex(value, format)).toBe(latex);
  });

  it("of an exact number never loses a term", () => {
    const rational = fc
      .tuple(fc.integer({ min: -9, max: 9 }), fc.integer({ min: 1, max: 9 }))
      .map(([n, m]) => Rational.of(n, m));
    fc.assert(
      fc.property(rational, rational, rational, (a, b, c) => {
        const form = LinearForm.symbol("D")
          .times(a)
          .plus(LinearForm.symbol("z").times(b))
          .plus(LinearForm.constant(c));
        const shown = formatScalar(exact(form.toString()), defaultPinFormat);
        // Read back by plain arithmetic at D = 5, z = 7.
        const terms = shown
          .replaceAll("−", "-")
          .replace(/(\d)([Dz])/g, "$1*$2")
          .replaceAll(" ", "");
        const value = terms.split(/(?=[+-])/).reduce((sum, term) => {
          const sign = term.startsWith("-") ? -1 : 1;
          const [over = "", under = "1"] = term.replace(/^[+-]/, "").split("/");
          const product = over
            .split("*")
            .reduce((p, f) => p * (f === "D" ? 5 : f === "z" ? 7 : Number(f)), 1);
          return sum + (sign * product) / Number(under);
        }, 0);
        expect(value).toBeCloseTo(5 * a.toFloat() + 7 * b.toFloat() + c.toFloat(), 10);
      }),
    );
  });
});

describe("the format of a pin", () => {
  const formats: fc.Arbitrary<PinFormat> = fc.record({
    digits: fc.option(fc.integer({ min: 1, max: 12 })),
    style: fc.constantFrom(...numberStyles),
    uncertainty: fc.boolean(),
    unit: fc.boolean(),
    sign: fc.constantFrom(...signStyles),
  });
  it("is read back as it was written", () => {
    fc.assert(
      fc.property(formats, (format) => {
        expect(parsePinFormat(printPinFormat(format))).toEqual(format);
      }),
    );
  });
  it.each([
    ["", {}],
    ["digits=3 unit=no", { digits: 3, unit: false }],
    ["digits=13", {}],
    ["digits=2.5", {}],
    ["digits=", {}],
    ["style=roman sign=none uncertainty=yes", {}],
    ["  style=percent   digits=1", { style: "percent", digits: 1 }],
  ])("%j keeps the default for what it does not say", (text, more) => {
    expect(parsePinFormat(text)).toEqual({ ...defaultPinFormat, ...more });
  });
  it("shows something for any value and any format", () => {
    fc.assert(
      fc.property(
        fc.double(),
        fc.option(fc.double({ min: 0 }), { nil: 0 }),
        formats,
        (value, sigma, format) => {
          expect(formatScalar(number(value, { sigma }), format)).not.toMatch(/undefined|NaN|^$/);
        },
      ),
    );
  });
});
