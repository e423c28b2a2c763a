import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { onePerson, type, type Person } from "./two-people.ts";

let person: Person;
beforeEach(() => {
  person = onePerson();
});
afterEach(() => {
  person.editor.destroy();
});

/** The document as a line: prose as it is, formulas as ‹latex›, displayed ones as «latex». */
function line({ editor }: Person): string {
  const parts: string[] = [];
  editor.state.doc.descendants((node) => {
    if (node.isText) parts.push(node.text ?? "");
    if (node.type.name === "inlineMath") parts.push(`‹${String(node.attrs["latex"])}›`);
    if (node.type.name === "displayMath") parts.push(`«${String(node.attrs["latex"])}»`);
    if (node.isTextblock && parts.length > 0) parts.push("¶");
  });
  return parts.join("");
}

describe("dollar signs typed in a sentence", () => {
  it.each([
    ["with $x^2$ small", "with ‹x^2› small"],
    ["$a$", "‹a›"],
    ["$\\lambda\\phi^4/4!$", "‹\\lambda\\phi^4/4!›"],
    ["$a$ and $b$", "‹a› and ‹b›"],
    ["from $5 to $7", "from $5 to $7"],
    ["a $ b $ c", "a $ b $ c"],
    ["\\$x$", "\\$x$"],
    ["$\\$5$", "‹\\$5›"],
  ])("%s", (typed, expected) => {
    type(person.editor, typed);
    expect(line(person)).toBe(expected);
  });

  it("stay dollars in code", () => {
    person.editor.commands.setCodeBlock();
    type(person.editor, "echo $x$");
    expect(line(person)).toBe("echo $x$");
  });

  it("come back as typed when the formula is undone", () => {
    type(person.editor, "$x$");
    expect(person.history.undoOnce()).toBe("done");
    expect(person.text()).toContain("$x");
    expect(line(person)).not.toContain("‹");
  });
});

describe("a letter typed on a selected formula", () => {
  it("goes after it", () => {
    type(person.editor, "a $x$ b");
    person.editor.commands.setNodeSelection(3);
    type(person.editor, "!");
    expect(line(person)).toBe("a ‹x›! b");
  });
  it("begins a paragraph after a displayed one", () => {
    type(person.editor, "$$");
    type(person.editor, "so");
    expect(line(person)).toBe("«»¶so");
  });
});

describe("two dollars", () => {
  it("turn an empty paragraph into a displayed equation, selected, with an id", () => {
    type(person.editor, "$$");
    const { doc, selection } = person.editor.state;
    expect(doc.firstChild?.type.name).toBe("displayMath");
    expect(doc.firstChild?.attrs["id"]).toMatch(/^[0-9a-f-]{32,36}$/);
    expect(selection).toBeInstanceOf(NodeSelection);
  });

  it("in the middle of a sentence set the equation between its halves", () => {
    type(person.editor, "beforeafter");
    person.editor.commands.setTextSelection(7);
    type(person.editor, "$$");
    expect(line(person)).toBe("before«»¶after");
  });

  it("at the end of a sentence set the equation after it", () => {
    type(person.editor, "so $$");
    expect(line(person)).toBe("so «»");
  });
});
