import { Slice } from "@tiptap/pm/model";
import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { Awareness } from "y-protocols/awareness";
import { BlockKeyboard, keyboardPlugin } from "../../../client/editor/blocks/block-keyboard.ts";
import { blockPlaces } from "../../../client/editor/blocks/block-places.ts";
import { createBlockWorld, type BlockWorld } from "../../../client/editor/blocks/block-world.ts";
import type { NotebookSession } from "../../../client/editor/notebook-session.ts";
import { workerInProcess } from "../evaluation/worker-in-process.ts";
import { leave, notebookState, paragraph, person, type Person } from "./two-editors.ts";

let who: Person;
let world: BlockWorld;
beforeEach(() => {
  who = person(
    10,
    notebookState([paragraph("before"), { type: "scaling", attrs: { blockId: "s" } }, paragraph("after")]),
  );
  const awareness = new Awareness(who.doc);
  const state = () =>
    ({ phase: "connected", unsaved: false, readOnly: false, loaded: true }) as ReturnType<
      NotebookSession["state"]
    >;
  world = createBlockWorld(
    {
      notebookId: "n",
      source: { mode: "member" },
      ydoc: who.doc,
      fragment: who.fragment,
      awareness,
      history: who.history,
      person: null,
      state,
      subscribe: () => () => undefined,
      destroy: () => undefined,
    },
    workerInProcess,
  );
  who.editor.registerPlugin(keyboardPlugin(world, who.editor), (mine, others) => [mine, ...others]);
});
afterEach(() => {
  world.destroy();
  world.session.awareness.destroy();
  leave(who);
});

const kinds = () => who.editor.state.doc.content.content.map((node) => node.type.name);
function select() {
  // With the focus inside, the test's DOM reports a selection of its own, which ProseMirror would take for the person's.
  who.editor.view.dom.blur();
  const position = blockPlaces(who.editor.state.doc).get("s")?.position ?? expect.fail("the block is gone");
  who.editor.view.dispatch(
    who.editor.state.tr.setSelection(NodeSelection.create(who.editor.state.doc, position)),
  );
}
function press(key: string, modifiers: KeyboardEventInit = {}): boolean {
  const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true, ...modifiers });
  return (
    who.editor.view.someProp("handleKeyDown", (handle) => handle(who.editor.view, event) === true) === true
  );
}

describe("a selected block", () => {
  it("is a stop of the arrow keys", () => {
    expect(BlockKeyboard.config.priority).toBeGreaterThan(1000);
    expect(NodeSelection.isSelectable(who.editor.state.doc.child(1))).toBe(true);
  });

  it("is not replaced by what is typed on it", () => {
    select();
    const typed = who.editor.view.someProp(
      "handleTextInput",
      (handle) => handle(who.editor.view, 8, 10, "x", () => who.editor.state.tr) === true,
    );
    expect(typed).toBe(true);
    expect(kinds()).toEqual(["paragraph", "scaling", "paragraph"]);
  });

  it.each(["Backspace", "Delete"])("is deleted with %s, and undo brings it back", (key) => {
    select();
    expect(press(key)).toBe(true);
    expect(kinds()).toEqual(["paragraph", "paragraph"]);
    who.history.undoOnce();
    expect(kinds()).toEqual(["paragraph", "scaling", "paragraph"]);
  });

  it("is moved with Alt and arrow, and no further than the ends", () => {
    select();
    press("ArrowUp", { altKey: true });
    expect(kinds()).toEqual(["scaling", "paragraph", "paragraph"]);
    select();
    press("ArrowUp", { altKey: true });
    expect(kinds()).toEqual(["scaling", "paragraph", "paragraph"]);
    for (const _ of [1, 2, 3]) {
      select();
      press("ArrowDown", { altKey: true });
    }
    expect(kinds()).toEqual(["paragraph", "paragraph", "scaling"]);
    expect(who.directory.block("s")).not.toBeNull();
  });

  it("is entered with Enter and not split", () => {
    select();
    expect(press("Enter")).toBe(true);
    expect(kinds()).toEqual(["paragraph", "scaling", "paragraph"]);
  });

  it("lets what is pasted on it go after it", () => {
    select();
    const slice = Slice.maxOpen(
      who.editor.schema.node("doc", null, [
        who.editor.schema.node("paragraph", null, who.editor.schema.text("pasted")),
      ]).content,
    );
    const pasted = who.editor.view.someProp(
      "handlePaste",
      (handle) => handle(who.editor.view, new ClipboardEvent("paste"), slice) === true,
    );
    expect(pasted).toBe(true);
    expect(kinds()).toEqual(["paragraph", "scaling", "paragraph", "paragraph"]);
    expect(who.editor.state.doc.child(2).textContent).toBe("pasted");
  });
});
