import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { CurveFigures } from "../../../client/blocks/truncation-error/curve-figures.tsx";
import { evaluateCurve, ternTable } from "../../engine/truncation/curve-block.ts";
import { theoryOf } from "../../engine/theory-builder.ts";

afterEach(cleanup);

const theory = theoryOf({
  fields: {},
  terms: {},
  scales: [{ symbol: "Lambda", role: "heavy", value: 600, unit: "MeV" }],
});

function draw(method: string, count = 41) {
  const { value } = evaluateCurve({ d: ternTable(count, 4) }, { method }, theory);
  if (!value?.curve) throw new Error("there is a curve");
  render(<CurveFigures curve={value.curve} highlighted={value.highlighted} unit={value.unit} degree="68" />);
  return value;
}

describe("what is drawn along x", () => {
  it("point by point: the bands and the coefficients, each with a name and a table", () => {
    draw("conjugate prior");
    const names = screen.getAllByRole("img").map((one) => one.getAttribute("aria-label"));
    expect(names).toEqual([
      "The quantity along p (MeV), order by order, with the band of conjugate prior around order 4",
      "Half-widths of all methods along p (MeV) after order 4, at 68 %",
      "Coefficients along p (MeV), with one and two standard deviations around 0",
    ]);
    expect(screen.getAllByText("as a table")).toHaveLength(3);
  });

  it("with the correlated model: both posteriors and all checks, each with what it found in a sentence", () => {
    const value = draw("correlated along x");
    const names = screen.getAllByRole("img").map((one) => one.getAttribute("aria-label") ?? "");
    expect(names).toHaveLength(8);
    expect(names.join("\n")).toMatch(
      /Posterior density of Λ \(MeV\): median \d+.*68 % from \d+.*\n.*ℓ \(MeV\).*\n.*degree of belief\n.*Mahalanobis.*\n.*Cholesky/,
    );
    for (const { says } of value.curve?.correlated?.findings ?? [])
      expect(screen.getByText(says, { exact: false })).toBeTruthy();
  });

  it.each(["conjugate prior", "prior set B", "correlated along x", "differences of orders"])(
    "has a place for everything it draws: %s",
    (method) => {
      draw(method, 15);
      const paths = [...document.querySelectorAll("path")].map((path) => path.getAttribute("d") ?? "");
      expect(paths.length).toBeGreaterThan(5);
      expect(paths.filter((d) => d === "" || d.includes("NaN") || d.includes("Infinity"))).toEqual([]);
    },
  );
});
