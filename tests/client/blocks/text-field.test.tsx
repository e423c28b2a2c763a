import { act, cleanup, fireEvent, waitFor } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { documentOf, exchange, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";
import { row } from "./two-editors.ts";

const premises = {
  type: "premises",
  attrs: { blockId: "p", name: "Lantern" },
  content: [
    row("scales", "heavy", "K", { symbol: "Lambda", value: "3.2 TeV", role: "heavy", meaning: "" }),
    row("scales", "probe", "V", { symbol: "p", value: "350 GeV", role: "probe", meaning: "" }),
  ],
};

let people: PersonAtForms[] = [];
afterEach(() => {
  for (const person of people) person.leave();
  people = [];
  cleanup();
});

function open(...names: string[]) {
  const state = documentOf([premises]);
  people = names.map((name, index) => personAtForms(name, 10 * (index + 1), state, ["p"]));
  return people;
}
function field(who: PersonAtForms, label: string): HTMLInputElement {
  const found = who.screen.getByLabelText(label);
  if (!(found instanceof HTMLInputElement)) throw new Error(`${label} is no field`);
  return found;
}
const valueField = (who: PersonAtForms) => field(who, "value of scale 1");
const stored = (who: PersonAtForms) => {
  const rows = who.world.directory.block("p")?.inputs["scales"];
  return typeof rows === "object" ? rows[0]?.["value"] : undefined;
};
const one = ([who]: PersonAtForms[]) => who ?? expect.fail("nobody is here");
const two = ([first, second]: PersonAtForms[]) =>
  [first ?? expect.fail("nobody"), second ?? expect.fail("nobody")] as const;

describe("a field", () => {
  it("writes after a pause and not with every letter", async () => {
    const wren = one(open("Wren"));
    let writes = 0;
    wren.doc.on("update", () => (writes += 1));
    await wren.user.click(valueField(wren));
    for (const typed of ["3.2 Te", "2.8 Te", "2.8 TeV"])
      fireEvent.change(valueField(wren), { target: { value: typed } });
    expect(stored(wren)).toBe("3.2 TeV");
    await waitFor(() => expect(stored(wren)).toBe("2.8 TeV"));
    expect(writes).toBe(1);
  });

  it("writes at once on leaving", async () => {
    const wren = one(open("Wren"));
    await wren.user.type(valueField(wren), "s");
    await wren.user.tab();
    expect(stored(wren)).toBe("3.2 TeVs");
  });

  it("goes back to what stood there with Escape, even after a pause has written", async () => {
    const wren = one(open("Wren"));
    await wren.user.type(valueField(wren), "x");
    await waitFor(() => expect(stored(wren)).toBe("3.2 TeVx"));
    await wren.user.type(valueField(wren), "y{Escape}");
    expect(valueField(wren).value).toBe("3.2 TeV");
    expect(stored(wren)).toBe("3.2 TeV");
  });

  it("undoes and redoes through the notebook's history, one field at a time", async () => {
    const wren = one(open("Wren"));
    await wren.user.clear(valueField(wren));
    await wren.user.type(valueField(wren), "2.8 TeV");
    await wren.user.click(wren.screen.getByLabelText("value of scale 2"));
    await wren.user.keyboard("s{Control>}z{/Control}");
    expect(field(wren, "value of scale 2").value).toBe("350 GeV");
    expect(stored(wren)).toBe("2.8 TeV");
    await wren.user.keyboard("{Control>}z{/Control}");
    expect(stored(wren)).toBe("3.2 TeV");
    await wren.user.keyboard("{Control>}y{/Control}");
    expect(stored(wren)).toBe("2.8 TeV");
    await wren.user.keyboard("{Control>}{Shift>}z{/Shift}{/Control}");
    expect(field(wren, "value of scale 2").value).toBe("350 GeVs");
  });

  it("keeps what is typed when it is taken off the page", async () => {
    const wren = one(open("Wren"));
    const { world } = wren;
    await wren.user.type(valueField(wren), "!");
    cleanup();
    const rows = world.directory.block("p")?.inputs["scales"];
    expect(typeof rows === "object" && rows[0]?.["value"]).toBe("3.2 TeV!");
  });

  it("cannot be typed in by who may only read", async () => {
    const wren = one(open("Wren"));
    act(() => wren.setReadOnly(true));
    await wren.user.type(valueField(wren), "x");
    expect(valueField(wren).value).toBe("3.2 TeV");
    expect(wren.screen.queryByLabelText("symbol of a new scale")).toBeNull();
  });
});

describe("two people in one field", () => {
  it("see each other's name on it", async () => {
    const [wren, otto] = two(open("Wren", "Otto"));
    await otto.user.click(valueField(otto));
    act(() => exchange(wren, otto));
    const box = valueField(wren).parentElement;
    expect(box?.textContent).toBe("Otto is in this field");
    await otto.user.tab();
    act(() => exchange(wren, otto));
    expect(box?.textContent).toBe("");
  });

  it("are told who replaced what, and can put their own text back", async () => {
    const [wren, otto] = two(open("Wren", "Otto"));
    act(() => exchange(wren, otto));
    await wren.user.click(valueField(wren));
    act(() => otto.world.presence.enter("elsewhere", "x"));
    act(() => {
      const element = otto.world.directory.element("p");
      const cell = element
        ?.toArray()
        .find((child) => "getAttribute" in child && child.getAttribute("rowId") === "heavy");
      if (!cell || !("toArray" in cell)) throw new Error("no row");
      const value = cell
        .toArray()
        .find((child) => "getAttribute" in child && child.getAttribute("field") === "value");
      if (!value || !("setAttribute" in value)) throw new Error("no cell");
      value.setAttribute("value", "3.4 TeV");
      exchange(wren, otto);
    });
    expect(valueField(wren).value).toBe("3.4 TeV");
    expect(wren.screen.getByText(/Otto replaced “3.2 TeV” by “3.4 TeV”/)).toBeTruthy();
    await wren.user.click(wren.screen.getByRole("button", { name: "Put back “3.2 TeV”" }));
    expect(stored(wren)).toBe("3.2 TeV");
    expect(wren.screen.queryByText(/replaced/)).toBeNull();
  });

  it("keep half-typed text apart from the other's value until they choose", async () => {
    const [wren, otto] = two(open("Wren", "Otto"));
    act(() => exchange(wren, otto));
    await otto.user.type(valueField(otto), " or so");
    await waitFor(() => expect(stored(otto)).toBe("3.2 TeV or so"));
    await wren.user.clear(valueField(wren));
    await wren.user.type(valueField(wren), "2.9");
    act(() => exchange(wren, otto));
    expect(valueField(wren).value).toBe("2.9");
    // No value that nobody typed, and no silent overwriting: the pause does not write while the choice is open.
    await new Promise((done) => setTimeout(done, 400));
    expect(stored(wren)).toBe("3.2 TeV or so");
    await wren.user.click(wren.screen.getByRole("button", { name: "Take “3.2 TeV or so”" }));
    expect(valueField(wren).value).toBe("3.2 TeV or so");
    act(() => exchange(wren, otto));
    expect(stored(otto)).toBe("3.2 TeV or so");
  });

  it("do not undo each other: what a colleague has overwritten stays", async () => {
    const [wren, otto] = two(open("Wren", "Otto"));
    await wren.user.clear(valueField(wren));
    await wren.user.type(valueField(wren), "2.8 TeV");
    await waitFor(() => expect(stored(wren)).toBe("2.8 TeV"));
    act(() => exchange(wren, otto));
    await otto.user.clear(valueField(otto));
    await otto.user.type(valueField(otto), "3.5 TeV");
    await waitFor(() => expect(stored(otto)).toBe("3.5 TeV"));
    act(() => exchange(wren, otto));
    await wren.user.click(valueField(wren));
    await wren.user.keyboard("{Control>}z{/Control}");
    expect(stored(wren)).toBe("3.5 TeV");
  });
});
