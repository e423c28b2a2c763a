import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { onePerson, type Person } from "./two-people.ts";

let person: Person;
beforeEach(() => {
  person = onePerson();
});
afterEach(() => {
  person.editor.destroy();
});

describe("the writing surface, to React", () => {
  it("is no field whose selection is to be noted, and to browsers is one to write in", () => {
    const { dom } = person.editor.view;
    expect(dom.contentEditable).toBe("inherit");
    expect(dom.getAttribute("contenteditable")).toBe("true");
  });

  it("says when it may only be read, and can be told so by the property too", () => {
    const { dom } = person.editor.view;
    person.editor.setEditable(false);
    expect(dom.contentEditable).toBe("false");
    dom.contentEditable = "true";
    expect(dom.getAttribute("contenteditable")).toBe("true");
  });

  it("is an ordinary element again when its editor goes", () => {
    const { dom } = person.editor.view;
    person.editor.destroy();
    expect(Object.hasOwn(dom, "contentEditable")).toBe(false);
  });
});
