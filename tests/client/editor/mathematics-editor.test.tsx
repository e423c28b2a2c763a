import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, beforeAll, describe, expect, it } from "vitest";
import { mathNodeView } from "../../../client/editor/mathematics/math-node-view.ts";
import { createMathEditing, type MathEditing } from "../../../client/editor/mathematics/math-editing.ts";
import { writeFormula } from "../../../client/editor/mathematics/formula-changes.ts";
import { MathematicsEditor } from "../../../client/editor/mathematics/mathematics-editor.tsx";
import { premisesSymbols } from "../../../client/editor/mathematics/premises-symbols.ts";
import { twoPeople, type, type Person, type TwoPeople } from "./two-people.ts";

let people: TwoPeople;
let editing: MathEditing;
// On a page it is fetched once the page is quiet.
beforeAll(async () => {
  await import("../../../client/editor/mathematics/formula-editor.tsx");
});
afterEach(() => {
  cleanup();
  people.leave();
});

/** Wren writes the text; her formula editor is on the page. */
function stage(text: string): Person {
  editing = createMathEditing();
  people = twoPeople({ wren: { inlineMath: mathNodeView(editing), displayMath: mathNodeView(editing) } });
  const { wren } = people;
  document.body.append(wren.editor.view.dom);
  render(<MathematicsEditor editor={wren.editor} editing={editing} />);
  act(() => {
    type(wren.editor, text);
  });
  return wren;
}
function formulaAt(person: Person): number {
  let position = -1;
  person.editor.state.doc.descendants((node, at) => {
    if (node.type.name === "inlineMath" || node.type.name === "displayMath") position = at;
  });
  return position;
}
const latexOf = (person: Person) => {
  const value: unknown = person.editor.state.doc.nodeAt(formulaAt(person))?.attrs["latex"];
  return value;
};
async function openFormula(person: Person): Promise<HTMLTextAreaElement> {
  const element = person.editor.view.nodeDOM(formulaAt(person));
  if (!(element instanceof HTMLElement)) throw new Error("the formula is not drawn");
  act(() => {
    element.click();
  });
  return screen.findByRole<HTMLTextAreaElement>("textbox", { name: "LaTeX" });
}

describe("the editor of a formula", () => {
  it("opens at a click with the source, and Enter keeps what was typed as one step", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    expect(field.value).toBe("a");
    await userEvent.type(field, "^2{Enter}");
    expect(latexOf(wren)).toBe("a^2");
    expect(screen.queryByRole("textbox", { name: "LaTeX" })).toBeNull();
    act(() => {
      wren.history.undoOnce();
    });
    expect(latexOf(wren)).toBe("a");
  });

  it("keeps nothing after Escape", async () => {
    const wren = stage("so $a$ is");
    await userEvent.type(await openFormula(wren), "^2{Escape}");
    expect(latexOf(wren)).toBe("a");
  });

  it("removes a formula whose source is emptied", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.clear(field);
    await userEvent.type(field, "{Enter}");
    expect(formulaAt(wren)).toBe(-1);
    expect(wren.text()).toBe("so  is");
  });

  it("takes the arrow keys at either end as leaving", async () => {
    const wren = stage("so $a$ is");
    await userEvent.type(await openFormula(wren), "b{ArrowRight}");
    expect(latexOf(wren)).toBe("ab");
    expect(wren.editor.state.selection.from).toBe(formulaAt(wren) + 1);
  });

  it("opens by itself at $$ and is given up without a trace", async () => {
    const wren = stage("$$");
    const field = await screen.findByRole("textbox", { name: "LaTeX" });
    expect(wren.editor.state.doc.firstChild?.type.name).toBe("displayMath");
    await userEvent.type(field, "{Escape}");
    expect(wren.editor.state.doc.firstChild?.type.name).toBe("paragraph");
  });

  it("takes closing dollars for the end", async () => {
    const wren = stage("$$");
    await userEvent.type(await screen.findByRole("textbox", { name: "LaTeX" }), "E=mc^2$${Enter}");
    expect(latexOf(wren)).toBe("E=mc^2");
  });

  it("leaves the caret where one goes on writing after a displayed equation", async () => {
    const wren = stage("$$");
    await userEvent.type(await screen.findByRole("textbox", { name: "LaTeX" }), "x{Enter}");
    act(() => {
      type(wren.editor, "so");
    });
    expect(wren.editor.state.doc.content.content.map((node) => node.type.name)).toEqual([
      "displayMath",
      "paragraph",
    ]);
    expect(wren.text()).toContain("so");
  });

  it("completes symbols by keyboard", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.type(field, " \\lamb");
    expect(screen.getByRole("listbox", { name: "Symbols" }).textContent).toContain("\\lambda");
    await userEvent.type(field, "{Tab}");
    expect(field.value).toBe("a \\lambda");
    await userEvent.type(field, "{Enter}");
    expect(latexOf(wren)).toBe("a \\lambda");
  });

  it("closes the list with the first Escape and the editor with the second", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.type(field, "\\lamb{Escape}");
    expect(screen.getByRole("textbox", { name: "LaTeX" })).toBe(field);
    await userEvent.type(field, "{Escape}");
    expect(screen.queryByRole("textbox", { name: "LaTeX" })).toBeNull();
  });

  it("says so before it overwrites what a colleague has changed meanwhile", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.type(field, "b");
    act(() => {
      writeFormula(people.otto.editor, formulaAt(people.otto), { latex: "c" });
    });
    await userEvent.type(field, "{Enter}");
    expect(screen.getByRole("alert").textContent).toContain("changed this formula to c");
    expect(latexOf(wren)).toBe("c");
    fireEvent.keyDown(field, { key: "Enter" });
    expect([latexOf(wren), latexOf(people.otto)]).toEqual(["ab", "ab"]);
  });

  it("keeps the draft when a colleague removes the formula, and can put it back", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.type(field, "b");
    act(() => {
      const at = formulaAt(people.otto);
      people.otto.editor.commands.deleteRange({ from: at, to: at + 1 });
    });
    await userEvent.type(field, "{Enter}");
    expect(screen.getByRole("alert").textContent).toContain("removed this formula");
    fireEvent.keyDown(field, { key: "Enter" });
    expect(latexOf(wren)).toBe("ab");
  });

  it("goes on when the paragraph around it is drawn anew", async () => {
    const wren = stage("so $a$ is");
    const field = await openFormula(wren);
    await userEvent.type(field, "b");
    await act(async () => {
      people.otto.editor.chain().setTextSelection(2).setHeading({ level: 2 }).run();
      await Promise.resolve();
    });
    expect(wren.editor.state.doc.firstChild?.type.name).toBe("heading");
    await userEvent.type(field, "{Enter}");
    expect(latexOf(wren)).toBe("ab");
  });
});

describe("the symbols of the premises", () => {
  it("are offered however they are spelled", () => {
    const wren = stage("");
    const cell = (value: string) => ({ type: "cell", attrs: { field: "symbol", value } });
    const row = (table: string, value: string) => ({
      type: "row",
      attrs: { table, rowId: value, order: "a" },
      content: [cell(value)],
    });
    act(() => {
      wren.editor.commands.setContent({
        type: "doc",
        content: [
          {
            type: "premises",
            attrs: { blockId: "p" },
            content: [
              row("fields", "χ"),
              row("scales", "Lambda_b"),
              row("scales", "\\Lambda_b"),
              row("scales", "m"),
              row("symmetries", "R"),
              row("scales", "1/x"),
            ],
          },
        ],
      });
    });
    expect(premisesSymbols(wren.editor.state.doc).map(({ insert }) => insert)).toEqual([
      "\\chi",
      "\\Lambda_b",
      "m",
    ]);
  });
});
