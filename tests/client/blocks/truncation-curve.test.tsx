import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import type { Evaluation } from "#engine/evaluation.ts";
import { BlockHandleContext, type BlockHandle } from "../../../client/blocks/block-handle.ts";
import { TruncationErrorResult } from "../../../client/blocks/truncation-error/truncation-error-result.tsx";
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

/** As much of a block as a result looks at. */
function handleOf(evaluation: Evaluation): BlockHandle {
  return {
    fields: { quantity: "the rate" },
    tables: {},
    evaluation,
    readOnly: false,
  } as unknown as BlockHandle;
}

describe("what is said along x", () => {
  it("gives the point, the methods, the scales and what was measured, each a number of the block", () => {
    const evaluation = evaluateCurve({ d: ternTable(31, 4) }, { method: "correlated along x" }, theory);
    if (!evaluation.value) throw new Error("there is a value");
    const { container } = render(
      <BlockHandleContext value={handleOf(evaluation)}>
        <TruncationErrorResult value={evaluation.value} stale={false} />
      </BlockHandleContext>,
    );
    const text = container.textContent;
    expect(text).toMatch(/^The rate at .*210 MeV through order 4 is 11\.3/);
    expect(text).toContain("correlated along x");
    expect(text).toMatch(/Of the measured values, 7\d % lie in the 68 % intervals/);
    expect(text).toMatch(/From the data, .* is \d+ to \d+ MeV at 68 %, median \d+ MeV; stated is 600 MeV/);
    expect(text).toMatch(/fitted at \d+ points/);
    expect(text).not.toMatch(/undefined|NaN|null/);
  });
});

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
