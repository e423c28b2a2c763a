/** Laws of the ruler's drawing: the graduation, and labels that leave each other alone. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { placeLabels, spanOf, type Labelled } from "../../../client/ruler/place-labels.ts";
import { graduations, positionOf, rulerAxis, sizeAtPosition } from "../../../client/ruler/ruler-axis.ts";
import { probeText, targetText } from "../../../client/ruler/kept-text.ts";
import { labelWidth, shortLabel } from "../../../client/ruler/short-label.ts";
import { valueAfterKey } from "../../../client/ruler/slider-keys.ts";

const range = [24, 1016] as const;

describe("the graduation", () => {
  it("runs over whole decades that hold every size and a decade beyond the target", () => {
    expect(rulerAxis([0.9, 0.1, 2e-4], 1e-3, range)).toMatchObject({ high: 0, low: -4 });
    expect(rulerAxis([1, 3e-6], 1e-3, range)).toMatchObject({ high: 0, low: -6 });
    expect(rulerAxis([40, 0.1], 1e-5, range)).toMatchObject({ high: 2, low: -6 });
  });

  it("has an end where sizes have none", () => {
    expect(rulerAxis([], null, range)).toMatchObject({ high: 0, low: -4 });
    expect(rulerAxis([1e-300], 1e-3, range)).toMatchObject({ high: 0, low: -14 });
    expect(rulerAxis([0, Number.POSITIVE_INFINITY], null, range)).toMatchObject({ high: 0, low: -4 });
  });

  it("puts the larger size further left, and finds the size of a place again", () => {
    const axis = rulerAxis([1e-6], 1e-3, range);
    fc.assert(
      fc.property(fc.double({ min: -6, max: 0, noNaN: true }), (power) => {
        const x = positionOf(axis, 10 ** power);
        expect(x).toBeGreaterThanOrEqual(24 - 1e-9);
        expect(x).toBeLessThanOrEqual(1016 + 1e-9);
        expect(Math.log10(sizeAtPosition(axis, x))).toBeCloseTo(power, 9);
      }),
    );
  });

  it("writes every power on a wide ruler, every second on a narrow one, and keeps its ticks apart", () => {
    const powersOf = (width: number) =>
      graduations(rulerAxis([1e-10], null, [24, width - 24])).flatMap(({ power }) => power ?? []);
    expect(powersOf(1040)).toEqual([0, -1, -2, -3, -4, -5, -6, -7, -8, -9, -10]);
    expect(powersOf(320)).toEqual([0, -2, -4, -6, -8, -10]);
    const xs = graduations(rulerAxis([1e-10], null, [24, 1016])).map(({ x }) => x);
    expect([...xs].sort((a, b) => a - b)).toEqual(xs);
  });
});

const labels = fc.array(
  fc.record({
    x: fc.oneof(fc.double({ min: 24, max: 1016, noNaN: true }), fc.constantFrom(24, 25, 30, 500, 1016)),
    width: fc.double({ min: 8, max: 200, noNaN: true }),
  }),
  { maxLength: 24 },
);
const named = (boxes: readonly { x: number; width: number }[]): Labelled[] =>
  boxes.map((box, index) => ({ id: `m${index}`, ...box }));

describe("labels", () => {
  it("never lie on each other, on another mark, or across a stem, and stay on the ruler", () => {
    fc.assert(
      fc.property(
        labels,
        fc.integer({ min: 1, max: 6 }),
        fc.constantFrom(null, 300, 700),
        (boxes, levels, line) => {
          const wanted = named(boxes);
          const placed = placeLabels(wanted, { levels, left: 0, right: 1040, line });
          expect(placed.map(({ id }) => id)).toEqual(wanted.map(({ id }) => id));
          const drawn = placed.flatMap(({ id, x, level, side }) => {
            const label = wanted.find((one) => one.id === id);
            return side && label ? [{ ...spanOf(label, side), level, x }] : [];
          });
          for (const [index, one] of drawn.entries()) {
            expect(one.from).toBeGreaterThanOrEqual(0);
            expect(one.to).toBeLessThanOrEqual(1040);
            expect(one.level).toBeLessThan(levels);
            if (line !== null && Math.abs(line - one.x) > 7)
              expect(line > one.from && line < one.to).toBe(false);
            for (const other of drawn.slice(index + 1)) {
              if (one.level === other.level) expect(one.to <= other.from || other.to <= one.from).toBe(true);
              else {
                const [upper, lower] = one.level > other.level ? [one, other] : [other, one];
                const crosses = upper.x > lower.from && upper.x < lower.to;
                expect(crosses && Math.abs(upper.x - lower.x) > 7).toBe(false);
              }
            }
          }
        },
      ),
    );
  });

  it("turn a crowd at the left end into a staircase, the first lowest", () => {
    const crowd = named([50, 50, 50, 54].map((x) => ({ x, width: 40 })));
    const placed = placeLabels(crowd, { levels: 4, left: 0, right: 1040 });
    expect(placed.map(({ level, side }) => [level, side])).toEqual([
      [1, "right"],
      [2, "right"],
      [3, "right"],
      [0, "right"],
    ]);
  });

  it("stand left of a mark at the right end", () => {
    const [placed] = placeLabels(named([{ x: 1020, width: 60 }]), { levels: 2, left: 0, right: 1040 });
    expect(placed?.side).toBe("left");
  });
});

describe("words on the ruler", () => {
  it("name a term by its coupling and its operator", () => {
    const cases = [
      ["\\frac{c_{6}}{6!\\,\\Lambda^{2}}\\,\\chi^{6}", "c₆ χ⁶"],
      ["\\frac{m^{2}}{2}\\,\\chi^{2}", "m² χ²"],
      ["\\frac{a}{\\Lambda}\\,(\\partial\\chi)^{2}\\,\\sigma", "a (∂χ)² σ"],
      ["\\frac{1}{2}\\,(\\partial\\phi)^{2}", "(∂φ)²"],
      ["r\\,s^{\\dagger}\\,\\partial_t s", "r s† ∂ₜ s"],
      ["w\\,s^{\\dagger}\\,\\partial_i^{4} s", "w s† ∂ᵢ⁴ s"],
    ] as const;
    expect(cases.map(([latex]) => shortLabel(latex))).toEqual(cases.map(([, label]) => label));
  });

  it("cut a long name, and grow with their letters", () => {
    expect(Array.from(shortLabel("a b c d e f g h i j k l m n"))).toHaveLength(18);
    expect(labelWidth("c₆ χ⁶")).toBeLessThan(labelWidth("c₆ χ⁶ twice"));
  });

  it("write what is kept as it would be typed", () => {
    expect(probeText(352, 0, "GeV")).toBe("352 GeV");
    expect(probeText(352, 10, "GeV")).toBe("352(10) GeV");
    expect(probeText(0.352, 0.012, "")).toBe("0.352(12)");
    expect(targetText(0.001)).toBe("1e-3");
    expect(targetText(0.0252)).toBe("2.5e-2");
  });

  it("step by keys, and stop at the ends", () => {
    const slider = { low: 1, high: 100, step: 2, leap: 10 };
    expect(valueAfterKey("ArrowRight", 4, slider)).toBe(8);
    expect(valueAfterKey("ArrowDown", 4, slider)).toBe(2);
    expect(valueAfterKey("PageUp", 40, slider)).toBe(100);
    expect(valueAfterKey("Home", 40, slider)).toBe(1);
    expect(valueAfterKey("x", 40, slider)).toBeNull();
  });
});
