import { cleanup, screen, waitFor, within } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { guessRoles, packLines, readFile, whyTooLarge } from "../../../client/blocks/data/read-file.ts";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";

let wren: PersonAtForms | null = null;
afterEach(() => {
  wren?.leave();
  wren = null;
  cleanup();
});
const file = (text: string) => {
  const reading = readFile(text);
  return reading.ok ? reading.file : expect.fail(reading.sentence);
};

describe("a file of values", () => {
  // RFC 4180 for quoting and line ends; delimiter and decimal mark by what is found.
  it.each([
    ["p,LO,NLO\n60,1.5,2\n", ",", false],
    ["\uFEFFp;LO;NLO\r\n60;1,5;2\r\n", ";", true],
    ["p\tLO\tNLO\n60\t1.5\t2", "\t", false],
    ['"p","LO","NLO"\n"60","1.5","2"\n\n', ",", false],
  ])("%j", (text, delimiter, hasDecimalComma) => {
    expect(file(text)).toMatchObject({ delimiter, hasDecimalComma, lines: [["60", "1.5", "2"]], faults: [] });
    expect(file(text).columns.map(({ name, role, order }) => [name, role, order])).toEqual([
      ["p", "x", ""],
      ["LO", "order", "0"],
      ["NLO", "order", "1"],
    ]);
  });
  it("says by line and column what is no number", () => {
    expect(file("p,LO\n1,2\n3,four\n5\n").faults.map(({ line, column }) => [line, column])).toEqual([
      [3, 2],
      [4, 2],
    ]);
  });
  it("counts lines as the file does, empty ones and those inside quotation marks too", () => {
    expect(file('"p\n(fm)",LO\n\n1,2\n\n3,four\n').faults.map(({ line }) => line)).toEqual([6]);
  });
  it.each([
    ["", /header/],
    ["p,LO\n1,\uFFFD\n", /UTF-8/],
    ["p,LO\n1,2\u0000\n", /UTF-8/],
    ["p,LO\n", /header/],
    ["1,2\n3,4\n", /name the columns/],
    ['p,LO\n"1,2\n', /quotation mark/],
    [`p\n${"1\n".repeat(20_001)}`, /20000 lines/],
  ])("%#: is refused in words", (text, words) => {
    const reading = readFile(text);
    expect(reading.ok ? "" : reading.sentence).toMatch(words);
  });
  it("has roles and units guessed from its names", () => {
    expect(guessRoles(["E [MeV]", "N2LO (mb)", "X_3", "measured", "sigma", "comment"])).toEqual([
      { name: "E", role: "x", order: "", unit: "MeV" },
      { name: "N2LO", role: "order", order: "2", unit: "mb" },
      { name: "X_3", role: "order", order: "3", unit: "" },
      { name: "measured", role: "measured", order: "", unit: "" },
      { name: "sigma", role: "error", order: "", unit: "" },
      { name: "comment", role: "other", order: "", unit: "" },
    ]);
  });
  it("fits into the rows of a document, however many lines it has", () => {
    const lines = Array.from({ length: 20_000 }, (_, index) => [String(index), "1.2345678", "-2.5e-3"]);
    const rows = packLines(lines);
    expect(rows.length).toBeLessThan(2_000);
    expect(Math.max(...rows.map((row) => row.length))).toBeLessThanOrEqual(4_000);
    expect(rows.join("\n").split("\n")).toHaveLength(20_000);
    expect(packLines(lines.slice(0, 3))).toHaveLength(3);
    expect(whyTooLarge(rows)).toBeNull();
  });
  // The server takes changes of at most 4 MB, and a block's inputs have at most 2,000 rows of 4,000 characters.
  it.each([
    [Array.from({ length: 20_000 }, () => Array<string>(40).fill("1.2345678")), /take 8\.8 MB/],
    [Array.from({ length: 500 }, () => Array<string>(40).fill(`1.${"2".repeat(120)}`)), /4000 characters/],
  ])("is refused in words where it does not: %#", (lines, words) => {
    expect(whyTooLarge(packLines(lines))).toMatch(words);
  });
});

describe("reading in a table", () => {
  it("takes no line whose values cannot be told apart, whatever columns are left out", async () => {
    wren = personAtForms("Wren", 10, documentOf([{ type: "data", attrs: { blockId: "d" } }]), ["d"]);
    const { user } = wren;
    await user.click(await screen.findByRole("button", { name: "read in a table" }));
    const dialog = await screen.findByRole("dialog", { name: "Read in a table" });
    await user.click(within(dialog).getByLabelText("or paste it here"));
    await user.paste("p,LO,NLO\n1,2,3\n4");
    await user.selectOptions(within(dialog).getByLabelText("role of LO"), "leave out");
    expect(within(dialog).getByRole("alert").textContent).toContain("Line 3 has 1 values");
    const readIn = within(dialog).getByRole("button", { name: "Read it in" });
    expect(readIn.hasAttribute("disabled")).toBe(true);
  });
  it("shows it first, takes nothing by halves, and replaces the table in one step", async () => {
    wren = personAtForms("Wren", 10, documentOf([{ type: "data", attrs: { blockId: "d" } }]), ["d"]);
    const { user, world } = wren;
    await user.click(await screen.findByRole("button", { name: "read in a table" }));
    const dialog = await screen.findByRole("dialog", { name: "Read in a table" });
    const text = within(dialog).getByLabelText("or paste it here");
    const readIn = within(dialog).getByRole("button", { name: "Read it in" });
    await user.click(text);
    await user.paste("p,LO,remark\n60,1.5,good\n120,2.5,bad");
    expect(within(dialog).getByRole("alert").textContent).toContain(
      "Line 2, column 3 (remark): “good” is no number.",
    );
    expect((readIn as HTMLButtonElement).disabled).toBe(true);
    await user.selectOptions(within(dialog).getByLabelText("role of remark"), "leave out");
    expect((readIn as HTMLButtonElement).disabled).toBe(false);
    await user.click(readIn);
    await waitFor(() =>
      expect(world.results.result("d").evaluation?.value).toMatchObject({
        rows: [
          ["60", "1.5"],
          ["120", "2.5"],
        ],
      }),
    );
    world.session.history.undoOnce();
    expect(world.directory.block("d")?.inputs).toMatchObject({ columns: [], lines: [] });
  });
});
