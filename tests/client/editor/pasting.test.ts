import { Slice, type Node } from "@tiptap/pm/model";
import { describe, expect, it } from "vitest";
import { documentSchema as schema } from "#schema/document-schema.ts";
import { withFreshIds, withMathematics, withoutUnsafeLinks } from "../../../client/editor/pasting.ts";
import { onePerson } from "./two-people.ts";

const cell = (field: string, value: string) => schema.node("cell", { field, value });
const row = (rowId: string, ...cells: Node[]) =>
  schema.node("row", { table: "scales", rowId, order: "a" }, cells);
const premises = (blockId: string, ...rows: Node[]) =>
  schema.node("premises", { blockId, name: "Lantern" }, rows);
const scaling = (blockId: string, standsOn: string) => schema.node("scaling", { blockId, standsOn });
const pin = (pinId: string, blockId: string, scalar: string) =>
  schema.node("pin", { pinId, blockId, scalar, resultKey: "key", value: "1", text: "1", format: "" });
const paragraph = (...content: Node[]) => schema.node("paragraph", null, content);
const slice = (...nodes: Node[]) => new Slice(schema.node("doc", null, nodes).content, 0, 0);
const counting = () => {
  let count = 0;
  return () => `new-${String((count += 1))}`;
};
function attributes(pasted: Slice, name: string): Record<string, unknown>[] {
  const found: Record<string, unknown>[] = [];
  pasted.content.descendants((node) => {
    if (node.type.name === name) found.push({ ...node.attrs });
  });
  return found;
}

describe("what is pasted", () => {
  it("has block, row, pin and equation ids of its own", () => {
    const pasted = withFreshIds(
      slice(
        premises("p", row("r1", cell("symbol", "Λ")), row("r2")),
        paragraph(pin("i", "p", "r1/size")),
        schema.node("displayMath", { latex: "x", id: "e" }),
      ),
    );
    const text = JSON.stringify(pasted.toJSON());
    for (const old of ['"p"', '"r1"', '"r2"', '"i"', '"e"']) expect(text).not.toContain(old);
    expect(attributes(pasted, "cell")).toEqual([{ field: "symbol", value: "Λ" }]);
    expect(attributes(pasted, "premises")[0]).toMatchObject({ name: "Lantern" });
  });

  it("points at its own copies within, and at what it pointed at outside", () => {
    const pasted = withFreshIds(
      slice(
        scaling("s", "p"),
        premises("p", row("r1")),
        scaling("t", "elsewhere"),
        paragraph(pin("i", "p", "r1/size"), pin("j", "s", "plan/order"), pin("k", "elsewhere", "r9/size")),
      ),
      counting(),
    );
    const [p] = attributes(pasted, "premises");
    const [s, t] = attributes(pasted, "scaling");
    const [r] = attributes(pasted, "row");
    const [i, j, k] = attributes(pasted, "pin");
    expect(s?.["standsOn"]).toBe(p?.["blockId"]);
    expect(t?.["standsOn"]).toBe("elsewhere");
    expect(i).toMatchObject({ blockId: p?.["blockId"], scalar: `${String(r?.["rowId"])}/size` });
    expect(j).toMatchObject({ blockId: s?.["blockId"], scalar: "plan/order" });
    expect(k).toMatchObject({ blockId: "elsewhere", scalar: "r9/size" });
  });

  it("never gives two blocks one id, even if the clipboard did", () => {
    const pasted = withFreshIds(slice(premises("p", row("r")), premises("p", row("r"))));
    const ids = [
      ...attributes(pasted, "premises").map((a) => a["blockId"]),
      ...attributes(pasted, "row").map((a) => a["rowId"]),
    ];
    expect(new Set(ids).size).toBe(4);
  });

  it("keeps the identity of what was cut and is nowhere else, with its rows, so that pins hold", () => {
    const pasted = withFreshIds(
      slice(
        premises("p", row("r1", cell("symbol", "Λ"))),
        scaling("s", "p"),
        schema.node("displayMath", { latex: "x", id: "e" }),
        schema.node("displayMath", { latex: "y", id: "f" }),
      ),
      counting(),
      (id) => id === "p" || id === "e",
    );
    expect(attributes(pasted, "premises")[0]?.["blockId"]).toBe("p");
    expect(attributes(pasted, "row")[0]?.["rowId"]).toBe("r1");
    expect(attributes(pasted, "scaling")[0]).toMatchObject({ blockId: "new-1", standsOn: "p" });
    expect(attributes(pasted, "displayMath").map(({ id }) => id)).toEqual(["e", "new-2"]);
  });

  it("loses links that are not safe and keeps their words", () => {
    const link = (href: string) => [schema.marks["link"]?.create({ href }) ?? schema.mark("bold")];
    const pasted = withoutUnsafeLinks(
      slice(
        paragraph(
          schema.text("bad", link("javascript:alert(1)")),
          schema.text("good", link("https://example.org")),
        ),
      ),
    );
    expect(pasted.content.textBetween(0, pasted.content.size)).toBe("badgood");
    expect(JSON.stringify(pasted.toJSON())).not.toContain("javascript");
    expect(JSON.stringify(pasted.toJSON())).toContain("https://example.org");
  });

  it("has its dollar signs read as mathematics, but not in code", () => {
    const code = schema.text("$x$", [schema.mark("code")]);
    const pasted = withMathematics(
      slice(paragraph(schema.text("as $a_1$, $5 or $7"), code), paragraph(schema.text("$$E=mc^2$$"))),
      schema,
    );
    expect(attributes(pasted, "inlineMath")).toEqual([{ latex: "a_1" }]);
    expect(attributes(pasted, "displayMath")).toMatchObject([{ latex: "E=mc^2" }]);
    expect(pasted.content.textBetween(0, pasted.content.size)).toBe("as , $5 or $7$x$");
  });
});

describe("cutting and pasting in an editor", () => {
  it("moves a block as itself once, and copies it from then on", () => {
    const { editor } = onePerson();
    editor.commands.setContent({
      type: "doc",
      content: [
        { type: "scaling", attrs: { blockId: "s", title: "moved" } },
        { type: "paragraph", content: [{ type: "text", text: "words" }] },
      ],
    });
    editor.commands.setNodeSelection(0);
    const html = editor.view.serializeForClipboard(editor.state.selection.content()).dom.innerHTML;
    editor.view.dom.dispatchEvent(new Event("cut", { bubbles: true, cancelable: true }));
    editor.commands.deleteSelection();
    const ids = () => {
      const found: unknown[] = [];
      editor.state.doc.descendants((node) => {
        if (node.type.name === "scaling") found.push(node.attrs["blockId"]);
      });
      return found;
    };
    expect(ids()).toEqual([]);
    editor.commands.focus("end");
    editor.view.pasteHTML(html);
    expect(ids()).toEqual(["s"]);
    editor.commands.setTextSelection(2);
    editor.view.pasteHTML(html);
    expect(ids()).toHaveLength(2);
    expect(new Set(ids()).size).toBe(2);
    editor.destroy();
  });
});

describe("pasting HTML into an editor", () => {
  it("gives a copied block new ids and keeps its inputs, and drops scripts and unsafe links", () => {
    const { editor } = onePerson();
    const copied = onePerson();
    copied.editor.commands.setContent(slice(premises("p", row("r1", cell("symbol", "Λ")))).content.toJSON());
    const html = copied.editor.getHTML();
    editor.view.pasteHTML(
      `${html}<p>words <a href="javascript:alert(1)">here</a><script>alert(1)</script><img src=x onerror="alert(1)"></p>`,
    );
    const json = JSON.stringify(editor.getJSON());
    expect(json).toContain('"name":"Lantern"');
    expect(json).toContain('"value":"Λ"');
    expect(json).not.toContain('"blockId":"p"');
    expect(json).not.toContain('"rowId":"r1"');
    expect(json).not.toMatch(/javascript|alert|onerror/);
    expect(editor.getText()).toContain("words here");
    editor.destroy();
    copied.editor.destroy();
  });
});

describe("dropping a block within its notebook", () => {
  /** What is dropped after the drag is over goes through the same transformation as a paste. */
  function dropped(event: { readonly ctrlKey: boolean }): string {
    const { editor } = onePerson();
    const { view } = editor;
    const block = slice(premises("p", row("r1")));
    view.dragging = { slice: block, move: true };
    view.someProp("handleDOMEvents", (handlers) => {
      // Only these members of a DragEvent are looked at.
      handlers.drop?.(view, event as unknown as DragEvent);
    });
    let result = block;
    view.someProp("transformPasted", (transform) => {
      result = transform(result, view, false);
    });
    editor.destroy();
    return String(result.content.firstChild?.attrs["blockId"]);
  }

  it("moves it under its id", () => {
    expect(dropped({ ctrlKey: false })).toBe("p");
  });
  it("copies it under a new one when the copy key is held", () => {
    expect(dropped({ ctrlKey: true })).not.toBe("p");
  });
});
