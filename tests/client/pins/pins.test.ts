import * as Y from "yjs";
import { NodeSelection } from "@tiptap/pm/state";
import { afterEach, describe, expect, it, vi } from "vitest";
import { Awareness } from "y-protocols/awareness";
import type { PinAttributes } from "#schema/block-structure.ts";
import { createBlockWorld, type BlockWorld } from "../../../client/editor/blocks/block-world.ts";
import { changeInputs, writeField } from "../../../client/editor/blocks/block-writes.ts";
import type { NotebookSession } from "../../../client/editor/notebook-session.ts";
import { acceptPin, placePinAtCaret, reformatPin, removePin } from "../../../client/editor/pins/place-pin.ts";
import { lastProsePosition } from "../../../client/editor/pins/prose-caret.ts";
import { movedWords, pinStateOf } from "../../../client/editor/pins/pin-view-state.ts";
import { countPins, pinsOf } from "../../../client/editor/pins/use-pin-counts.ts";
import { withoutMarkup } from "../../../client/editor/pins/pin-in-prose.tsx";
import { defaultPinFormat } from "#engine/notebook/pin-format.ts";
import { leave, notebookState, paragraph, person, row, type Person } from "../blocks/two-editors.ts";
import { workerInProcess } from "../evaluation/worker-in-process.ts";

const orders = ["8.0", "9.1", "9.32"].map((value, index) =>
  row("orders", `o${index}`, `K${index}V`, { order: String(index), value, name: "" }),
);
const block = { type: "truncationError", attrs: { blockId: "t", q: "0.3" }, content: orders };

let who: Person;
let world: BlockWorld;
let isOpen = false;
let readOnly = false;
async function open() {
  who = person(10, notebookState([paragraph("The error is ."), block, paragraph("more")]));
  readOnly = false;
  isOpen = true;
  const awareness = new Awareness(who.doc);
  const state = () =>
    ({ phase: "connected", unsaved: false, readOnly, loaded: true }) as ReturnType<NotebookSession["state"]>;
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
  world.showIn(who.editor);
  await computed();
}
afterEach(() => {
  if (!isOpen) return;
  isOpen = false;
  world.destroy();
  world.session.awareness.destroy();
  leave(who);
});

const computed = () => vi.waitFor(() => expect(world.results.isPending("t")).toBe(false));
async function setQ(q: string) {
  const element = who.directory.element("t") ?? expect.fail("the block is gone");
  changeInputs(element, () => writeField(element, "q", q));
  await computed();
}
function pin(): { position: number; attrs: PinAttributes } {
  const [found] = pinsOf(who.editor.state.doc);
  if (!found) throw new Error("there is no pin");
  return { position: found.offset, attrs: found.pin };
}
const state = () => pinStateOf(pin().attrs, world.directory.block("t") !== null, world.results.result("t"));
const counts = () => countPins(world, who.editor.state.doc);
function pinError() {
  who.editor.commands.setTextSelection(14);
  placePinAtCaret(world, "t", "error");
}

describe("pinning", () => {
  it("puts the number where the caret last stood, also after the focus went into a block", async () => {
    await open();
    who.editor.commands.setTextSelection(14);
    const blockAt = who.editor.state.doc.child(0).nodeSize;
    who.editor.view.dispatch(
      who.editor.state.tr.setSelection(NodeSelection.create(who.editor.state.doc, blockAt)),
    );
    placePinAtCaret(world, "t", "error");
    expect(pin().position).toBe(14);
    expect(state().status).toBe("holds");
    expect(who.editor.getText()).toContain(`The error is ${pin().attrs.text}.`);
  });

  it("carries all it needs to be read and checked with nothing fetched", async () => {
    await open();
    pinError();
    const { attrs } = pin();
    const scalar = world.results.result("t").evaluation?.scalars.find(({ id }) => id === "error");
    expect(attrs).toMatchObject({
      blockId: "t",
      scalar: "error",
      resultKey: world.results.result("t").key,
      value: JSON.stringify(scalar?.value),
      format: "",
    });
    expect(attrs.text).not.toBe("");
    expect(attrs.pinId).not.toBe("");
  });

  it("follows the caret's place through edits before it, and knows when nobody has been in the prose", async () => {
    await open();
    expect(lastProsePosition(who.editor.state)).toBeNull();
    who.editor.commands.setTextSelection(14);
    who.editor.commands.insertContentAt(1, "Now: ", { updateSelection: false });
    expect(lastProsePosition(who.editor.state)).toBe(19);
  });

  it("keeps the caret's place while it is in a block, though the block's own fields change the whole document", async () => {
    await open();
    who.editor.commands.setTextSelection(14);
    who.editor.view.dispatch(
      who.editor.state.tr.setSelection(
        NodeSelection.create(who.editor.state.doc, who.editor.state.doc.child(0).nodeSize),
      ),
    );
    await setQ("0.2");
    who.doc.transact(() => who.fragment.insert(0, [new Y.XmlElement("paragraph")]), "a colleague");
    expect(lastProsePosition(who.editor.state)).toBe(16);
    placePinAtCaret(world, "t", "error");
    expect(who.editor.getText()).toContain(`The error is ${pin().attrs.text}.`);
  });

  it("does nothing for who may only read", async () => {
    await open();
    who.editor.commands.setTextSelection(14);
    readOnly = true;
    placePinAtCaret(world, "t", "error");
    expect(pinsOf(who.editor.state.doc)).toHaveLength(0);
  });
});

describe("a pin", () => {
  it("moves when its number does, shows both, and takes the new one in one step", async () => {
    await open();
    pinError();
    const before = pin().attrs.text;
    await setQ("0.2");
    expect(state()).toMatchObject({ status: "moved" });
    expect(counts()).toEqual({ moved: 1, loose: 0, all: 1 });
    let updates = 0;
    who.doc.on("update", () => (updates += 1));
    expect(acceptPin(world, who.editor, pin().position)).toBe(true);
    expect(updates).toBe(1);
    expect(pin().attrs.text).not.toBe(before);
    expect(state().status).toBe("holds");
    who.history.undoOnce();
    expect(pin().attrs.text).toBe(before);
  });

  it("holds when a title or note changes, which no number depends on", async () => {
    await open();
    pinError();
    const element = who.directory.element("t") ?? expect.fail("gone");
    changeInputs(element, () => writeField(element, "title", "another title"));
    await computed();
    expect(state().status).toBe("holds");
  });

  it("is not accepted by who may only read", async () => {
    await open();
    pinError();
    await setQ("0.2");
    readOnly = true;
    expect(acceptPin(world, who.editor, pin().position)).toBe(false);
  });

  it("is loose when its block is in error, says why, and holds again when the error is mended", async () => {
    await open();
    pinError();
    await setQ("wide");
    expect(state()).toEqual({ status: "loose", words: "its block is in error" });
    expect(counts()).toEqual({ moved: 0, loose: 1, all: 1 });
    await setQ("0.3");
    expect(state().status).toBe("holds");
  });

  it("is loose when its block is gone", async () => {
    await open();
    pinError();
    const at = who.editor.state.doc.child(0).nodeSize;
    who.editor.commands.deleteRange({ from: at, to: at + who.editor.state.doc.child(1).nodeSize });
    expect(state()).toEqual({ status: "loose", words: "its block is gone" });
  });

  it("claims nothing before its block has been computed", async () => {
    await open();
    pinError();
    expect(
      pinStateOf(pin().attrs, true, {
        evaluation: null,
        key: null,
        standsOn: null,
        lastGood: null,
      }),
    ).toEqual({ status: "waiting" });
  });

  it("changes its format without changing its value, and keeps it when accepting", async () => {
    await open();
    pinError();
    const { position, attrs } = pin();
    reformatPin(who.editor, position, { ...defaultPinFormat, digits: 5 }, "0.12345");
    expect(pin().attrs).toEqual({ ...attrs, format: "digits=5", text: "0.12345" });
    await setQ("0.2");
    acceptPin(world, who.editor, position);
    expect(pin().attrs.format).toBe("digits=5");
    removePin(who.editor, position);
    expect(pinsOf(who.editor.state.doc)).toHaveLength(0);
  });
});

describe("words about a pin", () => {
  const noon = new Date("2026-12-01T12:00:00");
  it.each([
    ["nothing is known", null, "moved"],
    ["today", { by: "Otto", at: new Date("2026-12-01T09:02:00").toISOString() }, "moved · Otto, 09:02"],
    [
      "another day",
      { by: "Otto", at: new Date("2026-11-30T14:02:00").toISOString() },
      "moved · Otto, 30 Nov 14:02",
    ],
    ["authors are hidden", { by: null, at: new Date("2026-12-01T09:02:00").toISOString() }, "moved · 09:02"],
  ])("say when and by whom: %s", (_what, settled, words) => {
    expect(movedWords(settled, noon)).toBe(words);
  });
  it("are said without markup", () => {
    expect(withoutMarkup("size of $\\frac{c_{6}}{6!\\,\\Lambda^{2}}\\,\\chi^{6}$ at $p$")).toBe(
      "size of c₆/(6! Λ²) χ⁶ at p",
    );
  });
});
