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
    type: "paragraph",
    content: [
      { type: "text", text: "The field " },
      { type: "inlineMath", attrs: { latex: "\\chi_0 + \\chi^2" } },
    ],
  },
  {
    type: "premises",
    attrs: { blockId: "p", d: "4" },
    content: [
      row("fields", "f1", "B", { symbol: "chi", kind: "real scalar" }),
      row("terms", "t1", "B", { term: "lambda/4! chi^4" }),
      row("terms", "t2", "C", { term: "c/Lambda^2 (dchi)^2 chi^2" }),
    ],
  },
  {
    type: "divergence",
    attrs: { blockId: "d", title: "about chi" },
    content: [row("legs", "l1", "B", { field: "chi", count: "4" })],
  },
];

function entry(label: RegExp): HTMLElement {
  return screen.getByRole("textbox", { name: label });
}
const typed = (person: PersonAtForms, blockId: string, table: string, column: string) =>
  (person.world.directory.block(blockId)?.inputs[table] as readonly BlockRow[]).map((line) => line[column]);
const formula = (person: PersonAtForms) => person.world.session.fragment.toJSON();

async function rename(person: PersonAtForms, to: string) {
  const field = entry(/^symbol of field 1/);
  await person.user.clear(field);
  await person.user.type(field, to);
  await person.user.tab();
}

describe("a symbol renamed where it is declared", () => {
  it("may be renamed where it is used, as one step of the history", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["p"]);
    await rename(wren, "omega");
    const offer = await screen.findByRole("group", { name: "Rename the uses of a symbol" });
    expect(offer.textContent).toContain("3 entries of blocks and 1 formula in the text");
    await wren.user.click(within(offer).getByRole("button", { name: "rename it there too" }));
    expect(typed(wren, "p", "terms", "term")).toEqual(["lambda/4! omega^4", "c/Lambda^2 (domega)^2 omega^2"]);
    expect(typed(wren, "d", "legs", "field")).toEqual(["omega"]);
    expect(wren.world.directory.block("d")?.title).toBe("about chi");
    expect(formula(wren)).toContain("\\chi_0 + \\omega^2");
    expect(screen.queryByRole("group", { name: "Rename the uses of a symbol" })).toBeNull();

    wren.world.session.history.undoOnce();
    expect(typed(wren, "p", "terms", "term")).toEqual(["lambda/4! chi^4", "c/Lambda^2 (dchi)^2 chi^2"]);
    expect(formula(wren)).toContain("\\chi_0 + \\chi^2");
    expect(typed(wren, "p", "fields", "symbol")).toEqual(["omega"]);
  });

  it("is left alone where it is used when the writer says so", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["p"]);
    await rename(wren, "omega");
    const offer = await screen.findByRole("group", { name: "Rename the uses of a symbol" });
    await wren.user.click(within(offer).getByRole("button", { name: "leave it" }));
    expect(typed(wren, "p", "terms", "term")[0]).toBe("lambda/4! chi^4");
    expect(screen.queryByRole("group", { name: "Rename the uses of a symbol" })).toBeNull();
  });

  it("asks nothing when its old name is used nowhere, or is what it is again", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["p"]);
    await rename(wren, "chi");
    expect(screen.queryByRole("group", { name: "Rename the uses of a symbol" })).toBeNull();
    await rename(wren, "eta");
    await screen.findByRole("group", { name: "Rename the uses of a symbol" });
    await rename(wren, "chi");
    await waitFor(() =>
      expect(screen.queryByRole("group", { name: "Rename the uses of a symbol" })).toBeNull(),
    );
  });
});
