import { describe, expect, it } from "vitest";
import { dataShape, type DataInputs } from "#engine/data/inputs.ts";
import { evaluateData } from "#engine/data/evaluate.ts";

const column = (name: string, role = "other", order = ""): DataInputs["columns"][number] => ({
  id: name,
  name,
  role,
  order,
  unit: "",
});
const table = (columns: DataInputs["columns"], ...lines: string[]): DataInputs => ({
  title: "",
  note: "",
  original: "",
  lastImport: "",
  columns,
  lines: lines.map((values, index) => ({ id: `l${index}`, values })),
});
const read = (inputs: DataInputs) => {
  const { value, problems } = evaluateData(inputs);
  return { rows: value?.rows, codes: problems.map(({ code }) => code) };
};
const usual = [column("p", "x"), column("LO", "order", "0")];

describe("a table of data", () => {
  it("keeps every decimal as it was written, and nothing where there is nothing", () => {
    expect(read(table(usual, "60; 10.00", "120\t−1.5e-3", "180; –", "240;"))).toEqual({
      rows: [
        ["60", "10.00"],
        ["120", "-1.5e-3"],
        ["180", null],
        ["240", null],
      ],
      codes: [],
    });
  });
  it("reads many lines of one row as so many lines", () => {
    expect(read(table(usual, "1; 2\n3; 4\n", "5; 6")).rows).toEqual([
      ["1", "2"],
      ["3", "4"],
      ["5", "6"],
    ]);
  });
  it.each([
    [table(usual, "60; ten"), "data-value-unreadable"],
    [table(usual, "60; 1; 2"), "data-line-too-long"],
    [table([column("p", "x"), column("q", "x")], "1; 2"), "data-role-twice"],
    [table([column("a", "order", "1"), column("b", "order", "1")], "1; 2"), "data-role-twice"],
    [table([column("a", "order", "two")], "1"), "data-order-unreadable"],
    [table([], "1"), "data-empty"],
    [table(usual), "data-empty"],
  ])("says what is wrong: %#", (inputs, code) => {
    expect(read(inputs).codes).toContain(code);
  });
  it("names the line and the column of what it cannot read, and keeps the rest", () => {
    const { problems, value } = evaluateData(table(usual, "60; 1", "120; x1"));
    expect(problems[0]).toMatchObject({
      path: ["lines", "l1", "values"],
      facts: { line: 2, column: "LO", text: "x1" },
    });
    expect(value?.rows[1]).toEqual(["120", null]);
  });
  it("does not list complaints without end", () => {
    const { problems } = evaluateData(table(usual, ...Array.from({ length: 100 }, () => "a; b")));
    expect(problems.at(-1)).toMatchObject({ code: "data-more-unreadable", facts: { count: 180 } });
    expect(problems).toHaveLength(21);
  });
  it.each([
    [20_000, []],
    [20_001, ["data-cut"]],
  ])("says so when lines are left out: of %d", (count, codes) => {
    const all = Array.from({ length: count }, (_, index) => `${index}; 1`).join("\n");
    expect(evaluateData(table(usual, all)).notices.map(({ code }) => code)).toEqual(codes);
  });
  it("has its extent in x as numbers to pin", () => {
    const { scalars } = evaluateData(table(usual, "60; 1", "20; 2", "; 3"));
    expect(scalars.map(({ id, value }) => [id, value.type === "number" ? value.value : value.text])).toEqual([
      ["points", "3"],
      ["x/least", 20],
      ["x/most", 60],
    ]);
  });
  it("has a shape whose rows fit into the document", () => {
    expect(Object.keys(dataShape.tables)).toEqual(["columns", "lines"]);
  });
});
