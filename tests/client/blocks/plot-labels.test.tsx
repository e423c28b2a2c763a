import { cleanup, render } from "@testing-library/react";
import { afterEach, expect, it } from "vitest";
import { Plot } from "../../../client/blocks/parts/plot.tsx";

afterEach(cleanup);

function labelsFromTop(curves: Readonly<Record<string, readonly (readonly [number, number])[]>>) {
  const { container } = render(
    <Plot
      name="invented"
      x={{ label: "x", kind: "linear", domain: [0, 2] }}
      y={{ label: "y", kind: "linear", domain: [0, 10] }}
      curves={Object.entries(curves).map(([label, points], style) => ({
        key: label,
        label,
        points,
        style,
        color: "ink",
      }))}
      guides={[]}
      table={{ x: "x" }}
    />,
  );
  return [...container.querySelectorAll(".plot-end-label")]
    .sort((a, b) => Number(a.getAttribute("y")) - Number(b.getAttribute("y")))
    .map((label) => label.textContent);
}

it("names curves that cross by where they end", () => {
  const falls = [
    [0, 9],
    [1, 7],
    [2, 1],
  ] as const;
  const stays = [
    [0, 3],
    [1, 3],
    [2, 3],
  ] as const;
  expect(labelsFromTop({ falls, stays })).toEqual(["stays", "falls"]);
});

it("names curves that end together by where they were halfway", () => {
  const low = [
    [0, 1],
    [1, 2],
    [2, 9],
  ] as const;
  const high = [
    [0, 5],
    [1, 7],
    [2, 9],
  ] as const;
  expect(labelsFromTop({ low, high })).toEqual(["high", "low"]);
});
