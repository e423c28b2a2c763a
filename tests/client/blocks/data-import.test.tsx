import { cleanup, screen, waitFor, within } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { guessRoles, packLines, readFile, whyTooLarge } from "../../../client/blocks/data/read-file.ts";
import { placeOfLine } from "../../../client/blocks/data/line-editor.tsx";
import { whatChanged } from "../../../client/blocks/data/what-changed.ts";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";

let wren: PersonAtForms | null = null;
afterEach(() => {
  wren?.leave();
  wren = null;
  cleanup();
  vi.unstubAllGlobals();
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

describe("a file that was taken wrongly", () => {
  it.each([
    // One column of "60,5" to whoever takes commas for separators.
    ["p;LO\n60,5;1,25\n", { hasDecimalComma: false }, [1, 2], undefined],
    ["p;LO\n60;1\n", { delimiter: "," }, [1], undefined],
    ['"p","LO"\n"60,5","1,25"\n', { hasDecimalComma: true }, [], ["60.5", "1.25"]],
    ["p;LO\n1.234;2,5\n", { hasDecimalComma: true }, [1], undefined],
    ["p;LO\n1.234,5;2,5\n", {}, [1], undefined],
    ["p\tLO\n60\t1;2\n", { delimiter: "\t" }, [2], undefined],
    ["p;LO\n−60;+1,5e-3\n", {}, [], ["-60", "+1.5e-3"]],
  ] as const)("%j with %j", (text, corrections, columns, line) => {
    const reading = readFile(text, corrections);
    if (!reading.ok) return expect.fail(reading.sentence);
    expect(reading.file.faults.map(({ column }) => column)).toEqual(columns);
    if (line) expect(reading.file.lines[0]).toEqual(line);
  });
});

describe("nasty files", () => {
  const large = `p;LO;NLO\r\n${Array.from({ length: 20_000 }, (_, n) => `${n},5;1,25;−2e-3`).join("\r\n")}\r\n`;
  it.each<[string, string, number]>([
    ["20,000 lines with decimal commas", `\uFEFF${large}`, 20_000],
    ["lines that end as they did on old machines", "p,LO\r1,2\r3,4\r", 2],
    ["blank lines between, and blanks around", "\n p , LO \n\n 1 , 2 \n\n\n 3 , 4\n", 2],
    ["semicolons inside of quoted names", 'p,"LO; first"\n1,2\n', 1],
    ["no line end at the end, and a hole", "p\tLO\n1\t\n2\t3", 2],
  ])("%s", (_, text, count) => {
    const { lines, faults } = file(text);
    expect([lines.length, faults]).toEqual([count, []]);
    expect(lines.every((line) => line.every((value) => value === "" || Number.isFinite(Number(value))))).toBe(
      true,
    );
  });
});

describe("what a new table changes", () => {
  const columns = [
    { name: "p", role: "x" },
    { name: "LO", role: "order" },
  ] as const;
  const table = (...lines: string[][]) => ({ columns, lines });
  it.each([
    [table(), table(["1", "2"]), ""],
    [table(["1", "2"]), table(["1.0", "2.00"]), "Nothing in it has changed."],
    [
      table(["1", "2"], ["3", "4"], ["5", "6"]),
      table(["3", "4.5"], ["7", "8"], ["9", "8"], ["1", "2"]),
      "Against the table before: 2 lines added, 1 line removed, 1 value changed; lines are compared by their x.",
    ],
    // The same x twice: nobody can say which line is which.
    [
      table(["1", "2"], ["1", "3"]),
      table(["1", "3"]),
      "Against the table before: 1 line removed, 1 value changed; lines are compared in their order.",
    ],
    [
      table(["1", "2"]),
      { columns: [columns[0], { name: "NLO", role: "order" } as const], lines: [["1", "3"]] },
      "Against the table before: 1 column new (NLO), 1 column gone (LO); lines are compared by their x.",
    ],
  ])("%#: %j to %j", (before, after, sentence) => {
    expect(whatChanged(before, after)).toBe(sentence);
  });
});

describe("a line of a large import", () => {
  const rows = [
    { id: "a", values: "1; 2\n\n3; 4" },
    { id: "b", values: "5; 6" },
  ];
  it.each([
    [1, "a", 0],
    [2, "a", 2],
    [3, "b", 0],
  ])("%s stands in row %s", (number, id, index) => {
    expect(placeOfLine(rows, number)).toMatchObject({ row: { id }, index });
  });
  it("beyond the last is none", () =>
    expect([placeOfLine(rows, 4), placeOfLine(rows, 0)]).toEqual([null, null]));

  it("is changed by hand", async () => {
    const attrs = { blockId: "d" };
    wren = personAtForms("Wren", 10, documentOf([{ type: "data", attrs }]), ["d"]);
    const { user, world } = wren;
    await user.click(await screen.findByRole("button", { name: "read in a table" }));
    const dialog = await screen.findByRole("dialog", { name: "Read in a table" });
    await user.click(within(dialog).getByLabelText("or paste it here"));
    await user.paste(`p,LO\n${Array.from({ length: 500 }, (_, n) => `${n},2`).join("\n")}`);
    await user.click(within(dialog).getByRole("button", { name: "Read it in" }));
    await user.type(await screen.findByLabelText("change line"), "401");
    const values = await screen.findByLabelText("values of line 401");
    expect((values as HTMLInputElement).value).toBe("400; 2");
    await user.clear(values);
    await user.type(values, "400; 2.5");
    await user.click(screen.getByRole("button", { name: "Put it in place" }));
    await waitFor(() => {
      const { value } = world.results.result("d").evaluation ?? {};
      expect((value as { rows: string[][] } | null)?.rows[400]).toEqual(["400", "2.5"]);
    });
  });
});

describe("the file itself", () => {
  const importing = async (answer: () => Response) => {
    const sent: { address: string; body: unknown }[] = [];
    vi.stubGlobal("fetch", (address: string, options?: { method?: string; body?: unknown }) => {
      if (options?.method !== "POST") return Promise.resolve(Response.json({ person: null, csrfToken: "t" }));
      sent.push({ address, body: options.body });
      return Promise.resolve(answer());
    });
    wren = personAtForms("Wren", 10, documentOf([{ type: "data", attrs: { blockId: "d" } }]), ["d"]);
    const { user, world } = wren;
    await user.click(await screen.findByRole("button", { name: "read in a table" }));
    const dialog = await screen.findByRole("dialog", { name: "Read in a table" });
    const picked = new File(["p;LO\n1;2\n"], "tern.csv", { type: "text/csv" });
    await user.upload(within(dialog).getByLabelText("File"), picked);
    await user.click(await within(dialog).findByRole("button", { name: "Read it in" }));
    await waitFor(() => expect(screen.queryByRole("dialog")).toBeNull());
    return { sent, inputs: world.directory.block("d")?.inputs };
  };
  const id = "2f1c1f64-0000-4000-8000-000000000001";

  it("is kept when it is read in, and the block names it", async () => {
    const { sent, inputs } = await importing(() =>
      Response.json({ id, name: "tern.csv", size: 9 }, { status: 201 }),
    );
    expect(sent.map(({ address }) => address)).toEqual(["/api/notebooks/n/attachments?name=tern.csv"]);
    expect(inputs).toMatchObject({ original: `${id} tern.csv`, lines: [{ values: "1; 2" }] });
    expect(screen.getByRole("button", { name: /^tern\.csv/ })).toBeTruthy();
  });

  it("that cannot be kept leaves the table read in, and named by nothing", async () => {
    const problem = {
      type: "urn:subleading:too-large",
      title: "",
      status: 413,
      detail: "The files are too many.",
    };
    const { inputs } = await importing(() =>
      Response.json(problem, { status: 413, headers: { "content-type": "application/problem+json" } }),
    );
    expect(inputs).toMatchObject({ original: "", lines: [{ values: "1; 2" }] });
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
