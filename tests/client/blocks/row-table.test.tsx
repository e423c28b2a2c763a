import { act, cleanup, fireEvent } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { gridOf } from "../../../client/blocks/parts/pasted-grid.ts";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";
import { row } from "./two-editors.ts";

let wren: PersonAtForms;
beforeEach(() => {
  const orders = ["8.0", "9.1", "9.32"].map((value, index) =>
    row("orders", `o${index}`, `K${index}V`, { order: String(index), value, name: "" }),
  );
  wren = personAtForms(
    "Wren",
    10,
    documentOf([{ type: "truncationError", attrs: { blockId: "t" }, content: orders }]),
    ["t"],
  );
});
afterEach(() => {
  wren.leave();
  cleanup();
});

const table = () => {
  const rows = wren.world.directory.block("t")?.inputs["orders"];
  return typeof rows === "object" ? rows.map(({ order, value, name }) => [order, value, name].join("|")) : [];
};
const at = (label: string) => wren.screen.getByLabelText(label);
const pasteInto = (label: string, text: string) =>
  fireEvent.paste(at(label), { clipboardData: { getData: () => text } });

describe("a table of rows", () => {
  it("goes down a column with Enter and adds a row at the end", async () => {
    await wren.user.click(at("X through it of order 2"));
    await wren.user.keyboard("{Enter}");
    expect(document.activeElement).toBe(at("X through it of order 3"));
    await wren.user.keyboard("{Enter}");
    expect(table()).toHaveLength(4);
    expect(document.activeElement).toBe(at("order n of order 4"));
  });

  it("begins a row with the first letter typed in the last line, and the caret stays after it", async () => {
    await wren.user.type(at("X through it of a new order"), "9.26");
    expect(document.activeElement).toBe(at("X through it of order 4"));
    await wren.user.keyboard("{Enter}");
    expect(table()[3]).toBe("|9.26|");
  });

  it("takes a begun row back whole on Escape, with the caret where it was, and undo brings it again", async () => {
    await wren.user.type(at("X through it of a new order"), "9.26{Escape}");
    expect(table()).toHaveLength(3);
    expect(document.activeElement).toBe(at("X through it of a new order"));
    act(() => void wren.world.session.history.undoOnce());
    expect(table()).toHaveLength(4);
  });

  it("keeps a row once the focus has left where it began", async () => {
    await wren.user.type(at("X through it of a new order"), "9.26{Tab}{Escape}");
    expect(table()[3]).toBe("|9.26|");
  });

  it("fills rows from lines of a spreadsheet, adding what is missing, as one step", () => {
    pasteInto("order n of order 3", '2\t9.33\tN2LO\r\n3\t9.26\t"N3""LO"\r\n');
    expect(table()).toEqual(["0|8.0|", "1|9.1|", "2|9.33|N2LO", '3|9.26|N3"LO']);
    act(() => void wren.world.session.history.undoOnce());
    expect(table()).toEqual(["0|8.0|", "1|9.1|", "2|9.32|"]);
  });

  it("takes lines without tabs as one column, from the one pasted into", () => {
    pasteInto("X through it of a new order", "9.26\n9.27");
    expect(table().slice(3)).toEqual(["|9.26|", "|9.27|"]);
  });

  it("moves a row by the arrow keys on its handle, and by Alt and arrow in a field", async () => {
    const handle = wren.screen.getByRole("button", { name: /^order 1, 0: arrow keys/ });
    handle.focus();
    await wren.user.keyboard("{ArrowDown}");
    expect(table().map((line) => line[0])).toEqual(["1", "0", "2"]);
    await wren.user.click(at("order n of order 3"));
    await wren.user.keyboard("{Alt>}{ArrowUp}{ArrowUp}{/Alt}");
    expect(table().map((line) => line[0])).toEqual(["2", "1", "0"]);
  });

  it("removes a row by Delete on its handle, keeps the focus near, and brings it back with undo", async () => {
    wren.screen.getByRole("button", { name: /^order 2, 1: arrow keys/ }).focus();
    await wren.user.keyboard("{Delete}");
    expect(table()).toEqual(["0|8.0|", "2|9.32|"]);
    expect(document.activeElement?.getAttribute("aria-label")).toMatch(/^order 2, 2: arrow keys/);
    act(() => void wren.world.session.history.undoOnce());
    expect(table()).toEqual(["0|8.0|", "1|9.1|", "2|9.32|"]);
  });
});

describe("what is pasted", () => {
  it.each([
    ["one value is text", "9.26", null],
    ["a tab makes columns", "1\t2", [["1", "2"]]],
    ["empty lines are no rows", "1\n\n2\n", [["1"], ["2"]]],
    ["quotation marks of a spreadsheet are taken off", '"a ""b"" c"\t2', [['a "b" c', "2"]]],
    ["old line ends count", "1\r2", [["1"], ["2"]]],
  ])("%s", (_what, text, grid) => {
    expect(gridOf(text)).toEqual(grid);
  });
});
