import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { onePerson, type, type Person } from "./two-people.ts";

let person: Person;
beforeEach(() => {
  person = onePerson();
});
afterEach(() => {
  person.editor.destroy();
});

/** The document as a line: linked words as [words](address), `·` for a space that lies in a link. */
function line({ editor }: Person): string {
  const parts: string[] = [];
  editor.state.doc.descendants((node) => {
    const link = node.marks.find((mark) => mark.type.name === "link");
    if (node.isText && link)
      parts.push(`[${(node.text ?? "").replaceAll(" ", "·")}](${String(link.attrs["href"])})`);
    else if (node.isText) parts.push(node.text ?? "");
    else if (node.isTextblock && parts.length > 0) parts.push("¶");
  });
  return parts.join("");
}
function press({ editor }: Person, key: string): void {
  editor.view.someProp("handleKeyDown", (handle) =>
    handle(editor.view, new KeyboardEvent("keydown", { key })),
  );
}

describe("an address that is typed", () => {
  it.each([
    ["see https://example.org/a now", "see [https://example.org/a](https://example.org/a) now"],
    ["(see http://example.org/a). Then", "(see [http://example.org/a](http://example.org/a)). Then"],
    ["mailto:wren@example.org ", "[mailto:wren@example.org](mailto:wren@example.org) "],
    ["example.org javascript:alert(1) ", "example.org javascript:alert(1) "],
    ["https://example.org", "https://example.org"],
  ])("%s", (typed, expected) => {
    type(person.editor, typed);
    expect(line(person)).toBe(expected);
  });

  it("becomes a link with Enter too, which goes on as ever", () => {
    type(person.editor, "see https://example.org");
    press(person, "Enter");
    type(person.editor, "and on");
    expect(line(person)).toBe("see [https://example.org](https://example.org)¶and on");
  });

  it("stays as it is in code", () => {
    person.editor.commands.setCodeBlock();
    type(person.editor, "get https://example.org now");
    expect(line(person)).toBe("get https://example.org now");
  });

  it("is plain words again when that is undone, and keeps the space", () => {
    type(person.editor, "https://example.org ");
    press(person, "Backspace");
    expect(line(person)).toBe("https://example.org ");
  });
});

describe("a link", () => {
  it("is not set to an address that is not safe", () => {
    type(person.editor, "words");
    person.editor.commands.selectAll();
    expect(person.editor.commands.setLink({ href: "javascript:alert(1)" })).toBe(false);
    expect(line(person)).toBe("words");
    expect(person.editor.commands.setLink({ href: "https://example.org" })).toBe(true);
    expect(line(person)).toBe("[words](https://example.org)");
    person.editor.commands.unsetLink();
    expect(line(person)).toBe("words");
  });

  it("to an address that is not safe is drawn as plain words, whoever wrote it", () => {
    person.editor.commands.setContent({
      type: "doc",
      content: [
        {
          type: "paragraph",
          content: [
            { type: "text", text: "bad", marks: [{ type: "link", attrs: { href: "javascript:alert(1)" } }] },
            { type: "text", text: "good", marks: [{ type: "link", attrs: { href: "https://example.org" } }] },
          ],
        },
      ],
    });
    const anchors = [...person.editor.view.dom.querySelectorAll("a")];
    expect(anchors.map((anchor) => anchor.textContent)).toEqual(["good"]);
    expect(anchors[0]?.rel).toContain("noopener");
    expect(person.editor.view.dom.innerHTML).not.toContain("javascript");
  });
});

describe("an address that is pasted", () => {
  it("into a sentence is linked where it stands", () => {
    type(person.editor, "a ");
    person.editor.view.pasteText("b https://example.org/c d");
    expect(line(person)).toBe("a b [https://example.org/c](https://example.org/c) d");
  });

  it("over selected words becomes their link", () => {
    type(person.editor, "the paper says");
    person.editor.commands.setTextSelection({ from: 5, to: 10 });
    person.editor.view.pasteText("https://example.org/paper");
    expect(line(person)).toBe("the [paper](https://example.org/paper) says");
  });
});
