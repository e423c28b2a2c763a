import { cleanup, screen, waitFor, within } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import type { BlockRow } from "#engine/notebook/block-instance.ts";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";
import { row } from "./two-editors.ts";

let wren: PersonAtForms | null = null;
afterEach(() => {
  wren?.leave();
  wren = null;
  cleanup();
});

const content = [
  {
    type: "premises",
    attrs: { blockId: "p", d: "4" },
    content: [
      row("symmetries", "s1", "B", { name: "parity", group: "Z2" }),
      row("fields", "f1", "B", { symbol: "phi", kind: "real scalar", charges: "odd" }),
      row("scales", "k1", "B", { symbol: "Lambda", value: "3 TeV", role: "heavy" }),
      row("terms", "t1", "B", { term: "m^2/2 phi^2" }),
      row("terms", "t2", "C", { term: "lambda/4! phi^4" }),
      row("terms", "t3", "D", { term: "c_6/Lambda^2 phi^6" }),
    ],
  },
  { type: "closure", attrs: { blockId: "c", maxOrder: "4", maxLoops: "1" } },
];

const terms = (person: PersonAtForms) =>
  (person.world.directory.block("p")?.inputs["terms"] as readonly BlockRow[]).map(({ term }) => term);
const table = () => screen.findByRole("table", { name: /^Demanded operators/ }, { timeout: 5000 });

describe("a closure's result", () => {
  it("adds a missing operator to the premises as one step of the history", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["c"]);
    const add = await within(await table()).findByRole("button", { name: "add to the premises: phi^8" });
    expect(screen.getByText("not closed")).toBeTruthy();
    await wren.user.click(add);
    expect(terms(wren)).toEqual([
      "m^2/2 phi^2",
      "lambda/4! phi^4",
      "c_6/Lambda^2 phi^6",
      "c_1/Lambda^4 phi^8",
    ]);
    expect(screen.getByText("phi^8 is added to the premises.").getAttribute("role")).toBe("status");
    // It is then present, and nothing is missing: the verdict follows.
    await screen.findByText("closed", {}, { timeout: 5000 });
    expect(screen.queryByRole("button", { name: "add to the premises: phi^8" })).toBeNull();
    wren.world.session.history.undoOnce();
    expect(terms(wren)).toHaveLength(3);
  });

  it("shows each operator with a graph in words, and only the missing ones when asked", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["c"]);
    const rows = within(await table());
    expect(rows.getAllByRole("img").length).toBe(4);
    await wren.user.selectOptions(screen.getByRole("combobox", { name: "show" }), "missing ones");
    expect(within(await table()).getAllByRole("img")).toHaveLength(1);
  });

  it("offers nothing to add to who may only read", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["c"]);
    await table();
    wren.setReadOnly(true);
    await waitFor(() => expect(screen.queryByRole("button", { name: /^add to the premises/ })).toBeNull());
    expect(await table()).toBeTruthy();
  });
});
