import { cleanup, waitFor } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";
import { row } from "./two-editors.ts";

let wren: PersonAtForms | null = null;
afterEach(() => {
  wren?.leave();
  wren = null;
  cleanup();
});

const field = (charges: string) =>
  row("fields", "q", "B", { symbol: "Q", kind: "left-handed spinor", charges, flavours: "1", meaning: "" });
const count = (charges: string) => ({
  type: "basisCount",
  attrs: { blockId: "count", name: "" },
  content: [
    row("groups", "c", "B", { name: "colour", group: "SU(3)", keep: "" }),
    row("groups", "y", "C", { name: "Y", group: "U(1)", keep: "all" }),
    row("groups", "z", "D", { name: "Z", group: "Z3", keep: "" }),
    row("groups", "o", "E", { name: "o", group: "O(4)", keep: "" }),
    field(charges),
  ],
});

async function opened(charges: string) {
  wren = personAtForms("Wren", 1, documentOf([count(charges)]), ["count"]);
  const { screen, user } = wren;
  const choice = async (name: string) => (await screen.findByLabelText(`${name} of Q`)) as HTMLSelectElement; // by its label
  const typed = () =>
    screen.container.querySelector<HTMLInputElement>('[data-place="fields/q/charges"] input')?.value;
  return { choice, typed, user, screen };
}

describe("representations of a field are chosen from a table", () => {
  it("of dimension and Dynkin labels, and the choice is what would have been typed", async () => {
    const { choice, typed, user } = await opened("3, 1/6");
    const colour = await choice("colour");
    expect(colour.selectedOptions[0]?.textContent).toBe("3 · (1,0)");
    await user.selectOptions(colour, "3\u0305 · (0,1)");
    await waitFor(() => expect(typed()).toBe("3bar, 1/6"));
    await user.selectOptions(await choice("Z"), "2");
    await user.selectOptions(await choice("o"), "vector · 4");
    await waitFor(() => expect(typed()).toBe("3bar, 1/6, 2, vector"));
    const charge = await choice("Y");
    await user.clear(charge);
    await user.type(charge, "-2/3{Enter}");
    await waitFor(() => expect(typed()).toBe("3bar, -2/3, 2, vector"));
  });

  it("and one that does not exist is shown as what it is, and refused in words", async () => {
    const { choice, screen } = await opened("7");
    const colour = await choice("colour");
    expect(colour.selectedOptions[0]?.textContent).toBe("7 (not in this table)");
    expect(colour.getAttribute("aria-invalid")).toBe("true");
    expect(await screen.findByText(/no representation/i)).toBeTruthy();
  });
});
