import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { applyAwarenessUpdate, Awareness, encodeAwarenessUpdate } from "y-protocols/awareness";
import * as Y from "yjs";
import { carePlugin } from "../../../client/editor/blocks/block-care.ts";
import { deleteBlock, moveBlock } from "../../../client/editor/blocks/block-places.ts";
import { createBlockWorld, type BlockWorld } from "../../../client/editor/blocks/block-world.ts";
import { createFieldPresence } from "../../../client/editor/blocks/field-presence.ts";
import { workerInProcess } from "../evaluation/worker-in-process.ts";
import { leave, notebookState, paragraph, person, type Person } from "./two-editors.ts";

let who: Person;
let world: BlockWorld;
const ottos = new Awareness(new Y.Doc());
const otto = createFieldPresence(ottos);
ottos.setLocalState({ user: { id: "otto", name: "Otto" } });

beforeEach(() => {
  const state = notebookState([
    paragraph("before"),
    { type: "scaling", attrs: { blockId: "s" } },
    { type: "scaling", attrs: { blockId: "t" } },
    paragraph("after"),
  ]);
  // The care asks the world, which needs the document that the editor shows: the editor comes first, its care after.
  who = person(10, state);
  const awareness = new Awareness(who.doc);
  world = createBlockWorld(
    {
      notebookId: "n",
      source: { mode: "member" },
      ydoc: who.doc,
      fragment: who.fragment,
      awareness,
      history: who.history,
      person: null,
      state: () => ({ phase: "connected", unsaved: false, readOnly: false, loaded: true }),
      subscribe: () => () => undefined,
      destroy: () => undefined,
    },
    workerInProcess,
  );
  who.editor.registerPlugin(carePlugin(world, who.editor));
});
afterEach(() => {
  world.destroy();
  world.session.awareness.destroy();
  leave(who);
});

function ottoGoes(blockId: string | null) {
  if (blockId === null) otto.leave("s");
  else otto.enter(blockId, "title");
  applyAwarenessUpdate(world.session.awareness, encodeAwarenessUpdate(ottos, [ottos.clientID]), "test");
}
const ids = () => who.directory.blocks().map(({ id }) => id);
const answerYes = () => {
  const question = world.question() ?? expect.fail("nothing was asked");
  world.ask(null);
  question.act();
};

const edits: Record<string, () => void> = {
  "a range that holds it is deleted": () =>
    void who.editor.commands.deleteRange({ from: 3, to: who.editor.state.doc.content.size - 3 }),
  "it is deleted by its key": () => deleteBlock(world, who.editor, "s"),
  "it is moved": () => moveBlock(world, who.editor, "s", 1),
  "it is put in a quotation": () => {
    who.editor.view.dispatch(who.editor.state.tr.setSelection(NodeSelection.create(who.editor.state.doc, 8)));
    who.editor.commands.setBlockquote();
  },
};

describe.each(Object.entries(edits))("when %s", (_what, edit) => {
  it("asks first while a colleague is inside, and does it when agreed", () => {
    ottoGoes("s");
    const before = who.editor.getJSON();
    edit();
    expect(who.editor.getJSON()).toEqual(before);
    expect(world.question()?.title).toMatch(/^Otto is in (this block|one of these blocks)$/);
    answerYes();
    expect(who.editor.getJSON()).not.toEqual(before);
    ottoGoes(null);
  });

  it("asks nothing when nobody is inside", () => {
    ottoGoes("t".repeat(3));
    const before = who.editor.getJSON();
    edit();
    expect(world.question()).toBeNull();
    expect(who.editor.getJSON()).not.toEqual(before);
  });
});

describe("other edits", () => {
  it("ask nothing, even with a colleague in a block", () => {
    ottoGoes("s");
    who.editor.commands.insertContentAt(2, "words");
    who.editor.commands.insertContentAt(0, paragraph("new"));
    expect(world.question()).toBeNull();
    expect(ids()).toEqual(["s", "t"]);
    ottoGoes(null);
  });
});
