import { cleanup, fireEvent, render, screen, within } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { csvText, svgFile } from "../../../client/blocks/parts/plot-file.ts";
import { tableOf, type Curve, type RangeBand } from "../../../client/blocks/parts/plot-model.ts";
import { Plot } from "../../../client/blocks/parts/plot.tsx";

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const curves: readonly Curve[] = [
  {
    key: "a",
    label: "n = 1",
    points: [
      [1, 10],
      [2, 20],
      [4, 40],
    ],
    style: 0,
    color: "ink",
  },
  {
    key: "b",
    label: "measured",
    points: [
      [2, 21],
      [2, 22],
    ],
    errors: [0.5, null],
    style: 1,
    color: "relevant",
    draw: "marks",
  },
];
const bands: readonly RangeBand[] = [
  {
    key: "68",
    label: "68 %",
    of: "a",
    points: [{ x: 1, low: 9, high: 11 }, null, { x: 4, low: 30, high: 50 }],
    tone: "outer",
  },
];
const draw = (shown = curves) =>
  render(
    <Plot
      name="An invented rate"
      x={{ kind: "linear", label: "p (MeV)", domain: [1, 4] }}
      y={{ kind: "linear", label: "mb", domain: [0, 50] }}
      curves={shown}
      bands={bands}
      table={{ x: "p (MeV)" }}
    />,
  );
const reader = () => screen.getByRole("slider", { name: /An invented rate/ });
const said = () => reader().getAttribute("aria-valuetext");

describe("a plot's values", () => {
  it.each([
    ["ArrowRight", "p (MeV) 1; n = 1: 10; 68 % from 9 to 11"],
    ["ArrowRight ArrowRight", "p (MeV) 2; n = 1: 20"],
    ["End", "p (MeV) 4; n = 1: 40; 68 % from 30 to 50"],
    ["End ArrowRight", "p (MeV) 4; n = 1: 40; 68 % from 30 to 50"],
    ["ArrowRight ArrowDown", "p (MeV) 2; measured: 21 ± 0.5"],
    ["ArrowRight ArrowDown End", "p (MeV) 2; measured: 22"],
    ["ArrowRight ArrowDown ArrowDown", "p (MeV) 2; n = 1: 20"],
    ["ArrowLeft", "p (MeV) 4; n = 1: 40; 68 % from 30 to 50"],
    ["End Escape", "no point is chosen"],
  ])("are said when %s is pressed: %s", (keys, text) => {
    draw();
    for (const key of keys.split(" ")) fireEvent.keyDown(reader(), { key });
    expect(said()).toBe(text);
  });

  it("are those of the nearest point under the pointer, and go when it leaves", () => {
    draw();
    // The frame is 340 wide and 208 high; x runs from 46 to 278, y from 170 up to 22.
    vi.spyOn(reader(), "getBoundingClientRect").mockReturnValue(new DOMRect(100, 0, 680, 416));
    fireEvent.pointerMove(reader(), { clientX: 100 + 2 * 270, clientY: 2 * 60 });
    expect(said()).toBe("p (MeV) 4; n = 1: 40; 68 % from 30 to 50");
    expect(document.querySelectorAll("[data-reading]")).toHaveLength(1);
    fireEvent.pointerLeave(reader());
    expect(said()).toBe("no point is chosen");
  });

  it("do not outlive their points", () => {
    const { rerender } = draw();
    fireEvent.keyDown(reader(), { key: "End" });
    rerender(
      <Plot
        name="An invented rate"
        x={{ kind: "linear", label: "p (MeV)", domain: [1, 4] }}
        y={{ kind: "linear", label: "mb", domain: [0, 50] }}
        curves={curves.slice(1)}
        table={{ x: "p (MeV)" }}
      />,
    );
    expect(said()).toBe("no point is chosen");
  });

  it("stand in a table, every one of them, each x in one row", () => {
    draw();
    const details = screen.getByText("as a table").closest("details");
    if (!details) throw new Error("the table is behind a disclosure");
    details.open = true;
    fireEvent(details, new Event("toggle"));
    const rows = within(screen.getByRole("table")).getAllByRole("row");
    expect(rows.map((row) => [...row.children].map((one) => one.textContent))).toEqual([
      ["p (MeV)", "n = 1", "measured", "error of measured", "n = 1, 68 %, from", "n = 1, 68 %, to"],
      ["1", "10", "", "", "9", "11"],
      ["2", "20", "21", "0.5", "", ""],
      ["2", "", "22", "", "", ""],
      ["4", "40", "", "", "30", "50"],
    ]);
  });
});

describe("the axes of a plot", () => {
  it("are switched where all is positive: the same decade is then as long as the last", () => {
    draw([{ key: "a", label: "", points: [[1, 1], [2, 10], [3, 100]], style: 0, color: "ink", draw: "marks" }]); // prettier-ignore
    const heights = () =>
      [...document.querySelectorAll("path.plot-point")].map((path) =>
        Number(/ ([-\d.]+)\)/.exec(path.getAttribute("transform") ?? "")?.[1]),
      );
    const steps = () =>
      heights().flatMap((at, index, all) => (index === 0 ? [] : [(all[index - 1] ?? 0) - at]));
    const [before = 0, after = 0] = steps();
    expect(after / before).toBeCloseTo(10, 1);
    fireEvent.click(screen.getByRole("button", { name: /^y linear/ }));
    const [first = 0, second = 1] = steps();
    expect(first).toBeCloseTo(second, 1);
    fireEvent.click(screen.getByRole("button", { name: /^y logarithmic/ }));
    expect(steps()[0]).toBeCloseTo(before, 6);
  });

  it("stay linear where something is negative or zero", () => {
    draw([
      {
        ...curves[0]!,
        points: [
          [1, -1],
          [2, 3],
        ],
      },
    ]); // the first is there; prettier-ignore
    expect(screen.queryByRole("button", { name: /^y / })).toBeNull();
    expect(screen.getByRole("button", { name: /^x / })).toBeTruthy();
  });
});

describe("a plot as a file", () => {
  it("as CSV has every number with all its digits, and reads as RFC 4180", () => {
    expect(csvText(tableOf('p, "MeV"', [{ ...curves[0]!, points: [[1 / 3, 2e-7]] }], []))).toBe(
      '"p, ""MeV""",n = 1\r\n0.3333333333333333,2e-7\r\n',
    );
  });

  it("as SVG needs no style sheet: colours and faces are written in, on the paper's own ground", () => {
    const style = document.createElement("style");
    style.textContent =
      ".plot-curve { stroke: #123456; fill: none } .plot-tick-label { font-family: Commissioner }";
    document.head.append(style);
    draw();
    fireEvent.keyDown(reader(), { key: "End" });
    const drawing = screen.getByRole<SVGSVGElement & HTMLElement>("img");
    const { text, width } = svgFile(drawing, "An invented rate");
    style.remove();
    const parsed = new DOMParser().parseFromString(text, "image/svg+xml");
    expect(parsed.querySelector("parsererror")).toBeNull();
    expect(text).not.toMatch(/class=|var\(|NaN/);
    expect(text).not.toContain("data-reading");
    expect(text).toContain('stroke="#123456"');
    expect(text).toContain("Commissioner");
    expect(parsed.querySelector("title")?.textContent).toBe("An invented rate");
    expect(width).toBeGreaterThan(340);
  });
});
