import { describe, expect, it } from "vitest";
import { floatText, type FloatFormat } from "#engine/notation/float-text.ts";

const format = (more: Partial<FloatFormat> = {}): FloatFormat => ({
  digits: null,
  style: "auto",
  markup: "unicode",
  ...more,
});

describe("a float as people read it", () => {
  // The bracket notation is that of the Guide to the Expression of Uncertainty in Measurement (2008), 7.2.2.
  it.each([
    [0.109375, 0.0137, {}, "0.109(14)"],
    [0.109375, 0.0137, { digits: 2 }, "0.11(1)"],
    [0.109375, 0.0137, { digits: 1 }, "0.11(1)"],
    [0.109375, 0.0137, { style: "percent" }, "10.9(14) %"],
    [2.4e-4, 0, { digits: 2 }, "2.4 × 10⁻⁴"],
    [2.4e-4, 0, { digits: 2, style: "plain" }, "0.00024"],
    [2.4e-4, 0, { digits: 2, style: "scientific", markup: "latex" }, "2.4 \\times 10^{-4}"],
    [-3.14159, 0, {}, "−3.14"],
    [-3.14159, 0, { markup: "latex" }, "-3.14"],
    [0, 0, {}, "0.00"],
    [0, 0.02, {}, "0.000(20)"],
    [100.02147, 0.00035, {}, "100.02147(35)"],
    [123456, 0, { digits: 3 }, "1.23 × 10⁵"],
    [123456, 0, { digits: 3, style: "plain" }, "123000"],
    [9.996, 0, { digits: 3 }, "10.0"],
    [0.05, 0.2, {}, "0.05(20)"],
    [1200, 300, { style: "plain" }, "1200(300)"],
    [1234.5, 300, { style: "plain" }, "1230(300)"],
    [12.3, 4, {}, "12.3(40)"],
    [1, 0, { digits: 1, style: "percent" }, "100 %"],
    [3.2e-7, 4e-8, { markup: "latex" }, "3.20(40) \\times 10^{-7}"],
    [-Infinity, 0, {}, "−∞"],
    [NaN, 0, {}, "?"],
  ] as const)("%d with %d as %o reads %s", (value, sigma, more, shown) => {
    expect(floatText(value, sigma, format(more))).toBe(shown);
  });
});
